//! Saturation as piecewise Chebyshev expansions, built once per fluid.
//!
//! Source of the method: Bell, I. H.; Alpert, B. K.; Bouck, L. 2018, "Exploring
//! the feasibility of superancillary equations", and Bell, I. H. 2021, J. Phys.
//! Chem. Ref. Data 50, 013102 (cited from memory). What differs here: the
//! variable is x = √(1 − T/T_c). The densities of an analytic equation are
//! analytic in x through the critical point, so few pieces are needed.

/// Values expanded: ln p (p in Pa), ρ′ and ρ″ (kg/m³, ln for the vapour).
const WHAT: usize = 3;
const DEGREE: usize = 16;
const NODES: usize = DEGREE + 1;
/// Relative size of the last coefficients at which a piece is good enough; the
/// direct solve's own noise is just below.
const GOOD: f64 = 2e-13;
const NARROWEST: f64 = 1e-3;

/// Saturation pressure and densities over temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct SaturationCurve {
    critical_temperature_k: f64,
    /// Lowest and highest temperature covered, K.
    range_k: (f64, f64),
    pieces: Vec<Piece>,
    /// Where the liquid density stops rising or falling, K, ascending.
    turning_points: Vec<f64>,
}

#[derive(Debug, Clone, PartialEq)]
struct Piece {
    low: f64,
    high: f64,
    /// By degree, then by what is expanded: the three sums run side by side.
    coefficients: [[f64; WHAT]; NODES],
}

/// One temperature's saturation state in mass units.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct CurvePoint {
    pub pressure_pa: f64,
    pub liquid_kg_per_m3: f64,
    pub vapour_kg_per_m3: f64,
}

impl SaturationCurve {
    /// Expands `solve` (K to a point) between two temperatures.
    ///
    /// # Errors
    /// The first error of `solve`.
    pub fn build<E>(
        critical_temperature_k: f64,
        range_k: (f64, f64),
        mut solve: impl FnMut(f64) -> Result<CurvePoint, E>,
    ) -> Result<Self, E> {
        let x = |t: f64| (1.0 - t / critical_temperature_k).max(0.0).sqrt();
        let mut pieces = Vec::new();
        let mut open = vec![(x(range_k.1), x(range_k.0))];
        while let Some((low, high)) = open.pop() {
            let piece = Piece::fit(low, high, |x| {
                let t = critical_temperature_k * (1.0 - x * x);
                solve(t.clamp(range_k.0, range_k.1))
            })?;
            if piece.is_good() || high - low < NARROWEST {
                pieces.push(piece);
            } else {
                let middle = 0.5 * (low + high);
                open.push((middle, high));
                open.push((low, middle));
            }
        }
        let mut curve = Self {
            critical_temperature_k,
            range_k,
            pieces,
            turning_points: Vec::new(),
        };
        curve.turning_points = curve.find_turning_points();
        Ok(curve)
    }

    /// Lowest and highest temperature covered, K.
    pub fn range_k(&self) -> (f64, f64) {
        self.range_k
    }

    /// Number of pieces and of stored coefficients.
    pub fn size(&self) -> (usize, usize) {
        (self.pieces.len(), self.pieces.len() * WHAT * NODES)
    }

    /// Temperatures at which the liquid is densest or lightest inside the range, ascending, K.
    pub fn turning_points(&self) -> &[f64] {
        &self.turning_points
    }

    /// The state at a temperature inside [`Self::range_k`].
    pub fn at(&self, temperature_k: f64) -> CurvePoint {
        let x = (1.0 - temperature_k / self.critical_temperature_k)
            .max(0.0)
            .sqrt();
        let index = self
            .pieces
            .partition_point(|piece| piece.high < x)
            .min(self.pieces.len() - 1);
        let piece = &self.pieces[index];
        let u = ((2.0 * x - piece.low - piece.high) / (piece.high - piece.low)).clamp(-1.0, 1.0);
        let [p, liquid, vapour] = clenshaw(&piece.coefficients, u);
        CurvePoint {
            pressure_pa: p.exp(),
            liquid_kg_per_m3: liquid,
            vapour_kg_per_m3: vapour.exp(),
        }
    }
}

/// Golden-section steps: the bracket shrinks by 0.618 each, 45 reach 1e-9 of it,
/// where a maximum is flat to all digits of the density.
const GOLDEN_STEPS: usize = 45;

impl SaturationCurve {
    fn find_turning_points(&self) -> Vec<f64> {
        const SAMPLES: usize = 200;
        let (low, high) = self.range_k;
        let t = |i: usize| low + (high - low) * i as f64 / SAMPLES as f64;
        let density = |t: f64| self.at(t).liquid_kg_per_m3;
        let mut points = Vec::new();
        for i in 1..SAMPLES {
            let (before, here, after) = (density(t(i - 1)), density(t(i)), density(t(i + 1)));
            let sign = if here > before && here >= after {
                1.0
            } else if here < before && here <= after {
                -1.0
            } else {
                continue;
            };
            let (mut a, mut b) = (t(i - 1), t(i + 1));
            for _ in 0..GOLDEN_STEPS {
                let (c, d) = (
                    b - 0.618_033_988_749_895 * (b - a),
                    a + 0.618_033_988_749_895 * (b - a),
                );
                if sign * density(c) > sign * density(d) {
                    b = d
                } else {
                    a = c
                }
            }
            points.push(0.5 * (a + b));
        }
        points
    }
}

impl Piece {
    fn fit<E>(
        low: f64,
        high: f64,
        mut solve: impl FnMut(f64) -> Result<CurvePoint, E>,
    ) -> Result<Self, E> {
        let mut values = [[0.0; NODES]; WHAT];
        let [p, liquid, vapour] = &mut values;
        for (k, ((p, liquid), vapour)) in p.iter_mut().zip(liquid).zip(vapour).enumerate() {
            let u = (std::f64::consts::PI * (k as f64 + 0.5) / NODES as f64).cos();
            let point = solve(0.5 * (low + high) + 0.5 * (high - low) * u)?;
            *p = point.pressure_pa.ln();
            *liquid = point.liquid_kg_per_m3;
            *vapour = point.vapour_kg_per_m3.ln();
        }
        let mut coefficients = [[0.0; WHAT]; NODES];
        for (j, row) in coefficients.iter_mut().enumerate() {
            let scale = if j == 0 { 1.0 } else { 2.0 } / NODES as f64;
            for (c, values) in row.iter_mut().zip(&values) {
                let sum: f64 = values
                    .iter()
                    .enumerate()
                    .map(|(k, v)| {
                        v * (std::f64::consts::PI * j as f64 * (k as f64 + 0.5) / NODES as f64)
                            .cos()
                    })
                    .sum();
                *c = scale * sum;
            }
        }
        Ok(Self {
            low,
            high,
            coefficients,
        })
    }

    /// The tail of each expansion is below the noise of the solve.
    fn is_good(&self) -> bool {
        let tail = |what: usize| {
            let last = &self.coefficients[NODES - 2..];
            last.iter()
                .fold(0.0_f64, |most, row| most.max(row[what].abs()))
        };
        // ln p and ln ρ″: an absolute tail is a relative error of p and ρ″.
        let liquid = self.coefficients[0][1].abs();
        tail(0) < GOOD && tail(1) < GOOD * liquid && tail(2) < GOOD
    }
}

/// Clenshaw's sum of each expansion. Side by side, since each waits for itself only.
fn clenshaw(coefficients: &[[f64; WHAT]; NODES], u: f64) -> [f64; WHAT] {
    let (mut b1, mut b2) = ([0.0; WHAT], [0.0; WHAT]);
    let twice = 2.0 * u;
    for row in coefficients[1..].iter().rev() {
        for i in 0..WHAT {
            let next = twice * b1[i] - b2[i] + row[i];
            b2[i] = b1[i];
            b1[i] = next;
        }
    }
    std::array::from_fn(|i| coefficients[0][i] + u * b1[i] - b2[i])
}

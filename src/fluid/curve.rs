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
    coefficients: [[f64; NODES]; WHAT],
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
        let [p, liquid, vapour] = piece.coefficients.each_ref().map(|c| clenshaw(c, u));
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
        let coefficients = values.map(|values| {
            let mut c = [0.0; NODES];
            for (j, c) in c.iter_mut().enumerate() {
                let sum: f64 = values
                    .iter()
                    .enumerate()
                    .map(|(k, v)| {
                        v * (std::f64::consts::PI * j as f64 * (k as f64 + 0.5) / NODES as f64)
                            .cos()
                    })
                    .sum();
                *c = sum * 2.0 / NODES as f64;
            }
            c[0] *= 0.5;
            c
        });
        Ok(Self {
            low,
            high,
            coefficients,
        })
    }

    /// The tail of each expansion is below the noise of the solve.
    fn is_good(&self) -> bool {
        let [p, liquid, vapour] = &self.coefficients;
        let tail = |c: &[f64; NODES]| c[NODES - 2..].iter().fold(0.0_f64, |m, x| m.max(x.abs()));
        // ln p and ln ρ″: an absolute tail is a relative error of p and ρ″.
        tail(p) < GOOD && tail(vapour) < GOOD && tail(liquid) < GOOD * liquid[0].abs()
    }
}

fn clenshaw(c: &[f64; NODES], u: f64) -> f64 {
    let (mut b1, mut b2) = (0.0, 0.0);
    for coefficient in c[1..].iter().rev() {
        (b1, b2) = (2.0 * u * b1 - b2 + coefficient, b1);
    }
    c[0] + u * b1 - b2
}

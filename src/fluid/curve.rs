//! Saturation as piecewise Chebyshev expansions, built once per fluid.
//!
//! Source of the method: Bell, I. H.; Alpert, B. K.; Bouck, L. 2018, "Exploring
//! the feasibility of superancillary equations", and Bell, I. H. 2021, J. Phys.
//! Chem. Ref. Data 50, 013102 (cited from memory). What differs here: the
//! variable is x = √(1 − T/T_c). The densities of an analytic equation are
//! analytic in x through the critical point, so few pieces are needed; each is
//! kept as powers, short enough that they lose no digits.

/// Values expanded: p (Pa), ρ′ and ρ″ (kg/m³).
const WHAT: usize = 3;
const DEGREE: usize = 10;
const NODES: usize = DEGREE + 1;
/// Size of the last coefficients against the values at which a piece is good enough;
/// the direct solve's own noise is just below.
const GOOD: f64 = 2e-13;
/// A tail that halving a piece does not shrink by this is the noise of the solve.
const SHRINKS: f64 = 0.25;
const NARROWEST: f64 = 1e-3;
/// Cells of the even grid by which a piece is found without a search.
const CELLS: usize = 128;

/// Saturation pressure and densities over temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct SaturationCurve {
    critical_temperature_k: f64,
    /// Lowest and highest temperature covered, K.
    range_k: (f64, f64),
    pieces: Vec<Piece>,
    /// The first piece that reaches into each cell of the grid over x.
    first: Vec<u16>,
    /// Lower end of the grid and cells per unit of x.
    grid: (f64, f64),
    /// Where the liquid density stops rising or falling, K, ascending.
    turning_points: Vec<f64>,
}

/// Powers of u = (x − middle)·scale, which runs from −1 to 1 over the piece.
#[derive(Debug, Clone, PartialEq)]
struct Piece {
    high: f64,
    middle: f64,
    scale: f64,
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
    /// Expands `solve` (K to a point) between two temperatures. At `joints_k` the model
    /// passes from one form to another and a slope may jump: pieces end there.
    ///
    /// # Errors
    /// The first error of `solve`.
    pub fn build<E>(
        critical_temperature_k: f64,
        range_k: (f64, f64),
        joints_k: &[f64],
        mut solve: impl FnMut(f64) -> Result<CurvePoint, E>,
    ) -> Result<Self, E> {
        let x = |t: f64| (1.0 - t / critical_temperature_k).max(0.0).sqrt();
        let (from, to) = (x(range_k.1), x(range_k.0));
        let mut pieces = Vec::new();
        let mut ends: Vec<f64> = [from, to]
            .into_iter()
            .chain(joints_k.iter().map(|&t| x(t)))
            .filter(|end| (from..=to).contains(end))
            .collect();
        ends.sort_by(f64::total_cmp);
        // The last in is the first out: pieces come in rising order.
        let mut open: Vec<_> = ends
            .windows(2)
            .filter(|pair| pair[0] < pair[1])
            .map(|pair| (pair[0], pair[1], f64::INFINITY))
            .rev()
            .collect();
        while let Some((low, high, tail_before)) = open.pop() {
            let (piece, tail) = Piece::fit(low, high, |x| {
                let t = critical_temperature_k * (1.0 - x * x);
                solve(t.clamp(range_k.0, range_k.1))
            })?;
            let is_noise = tail < 1e-8 && tail > SHRINKS * tail_before;
            if tail < GOOD || is_noise || high - low < NARROWEST {
                pieces.push(piece);
            } else {
                let middle = 0.5 * (low + high);
                open.push((middle, high, tail));
                open.push((low, middle, tail));
            }
        }
        let per_x = CELLS as f64 / (to - from);
        let first = (0..CELLS)
            .map(|cell| {
                let start = from + cell as f64 / per_x;
                let index = pieces.partition_point(|piece: &Piece| piece.high < start);
                index.min(pieces.len() - 1) as u16
            })
            .collect();
        let mut curve = Self {
            critical_temperature_k,
            range_k,
            pieces,
            first,
            grid: (from, per_x),
            turning_points: Vec::new(),
        };
        curve.turning_points = curve.find_turning_points();
        Ok(curve)
    }

    /// Lowest and highest temperature covered, K.
    pub fn range_k(&self) -> (f64, f64) {
        self.range_k
    }

    /// Number of pieces and of bytes on the heap.
    pub fn size(&self) -> (usize, usize) {
        let bytes = self.pieces.capacity() * size_of::<Piece>()
            + self.first.capacity() * size_of::<u16>()
            + self.turning_points.capacity() * size_of::<f64>();
        (self.pieces.len(), bytes)
    }

    /// Temperatures at which the liquid is densest or lightest inside the range, ascending, K.
    pub fn turning_points(&self) -> &[f64] {
        &self.turning_points
    }

    /// The state at a temperature inside [`Self::range_k`].
    pub fn at(&self, temperature_k: f64) -> CurvePoint {
        let (piece, u) = self.piece(temperature_k);
        let [pressure_pa, liquid_kg_per_m3, vapour_kg_per_m3] = sum(&piece.coefficients, u);
        CurvePoint {
            pressure_pa,
            liquid_kg_per_m3,
            vapour_kg_per_m3,
        }
    }

    /// Slope of the vapour pressure over temperature, Pa/K, from the same powers.
    pub fn slope_at(&self, temperature_k: f64) -> f64 {
        let (piece, u) = self.piece(temperature_k);
        let over_u = piece.coefficients[1..]
            .iter()
            .enumerate()
            .rev()
            .fold(0.0, |sum, (j, row)| sum * u + (j + 1) as f64 * row[0]);
        // u = (x − middle)·scale and x² = 1 − T/T_c.
        let x = piece.middle + u / piece.scale;
        -over_u * piece.scale / (2.0 * x * self.critical_temperature_k)
    }

    /// The piece for a temperature and the place in it, −1 to 1.
    fn piece(&self, temperature_k: f64) -> (&Piece, f64) {
        let x = (1.0 - temperature_k / self.critical_temperature_k)
            .max(0.0)
            .sqrt();
        let (from, per_x) = self.grid;
        let cell = ((x - from) * per_x) as usize;
        let mut index = usize::from(self.first[cell.min(CELLS - 1)]);
        while self.pieces[index].high < x && index + 1 < self.pieces.len() {
            index += 1;
        }
        let piece = &self.pieces[index];
        (piece, ((x - piece.middle) * piece.scale).clamp(-1.0, 1.0))
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
    /// The piece between two x and the size of its last coefficients against its values.
    fn fit<E>(
        low: f64,
        high: f64,
        mut solve: impl FnMut(f64) -> Result<CurvePoint, E>,
    ) -> Result<(Self, f64), E> {
        let mut values = [[0.0; NODES]; WHAT];
        let [p, liquid, vapour] = &mut values;
        for (k, ((p, liquid), vapour)) in p.iter_mut().zip(liquid).zip(vapour).enumerate() {
            let point = solve(0.5 * (low + high) + 0.5 * (high - low) * node(k))?;
            *p = point.pressure_pa;
            *liquid = point.liquid_kg_per_m3;
            *vapour = point.vapour_kg_per_m3;
        }
        let mut coefficients = [[0.0; WHAT]; NODES];
        let mut tail: f64 = 0.0;
        for (what, values) in values.iter().enumerate() {
            let series = chebyshev(values);
            let least = values
                .iter()
                .fold(f64::INFINITY, |least, v| v.abs().min(least));
            let last = &series[NODES - 2..];
            tail = tail.max(last.iter().fold(0.0, |most: f64, c| most.max(c.abs())) / least);
            for (row, c) in coefficients.iter_mut().zip(powers(&series)) {
                row[what] = c;
            }
        }
        let piece = Self {
            high,
            middle: 0.5 * (low + high),
            scale: 2.0 / (high - low),
            coefficients,
        };
        Ok((piece, tail))
    }
}

/// Chebyshev's nodes, the zeros of T_n.
fn node(k: usize) -> f64 {
    (std::f64::consts::PI * (k as f64 + 0.5) / NODES as f64).cos()
}

/// Coefficients of Σ cⱼ Tⱼ(u) through the values at the nodes.
fn chebyshev(values: &[f64; NODES]) -> [f64; NODES] {
    std::array::from_fn(|j| {
        let scale = if j == 0 { 1.0 } else { 2.0 } / NODES as f64;
        let angle = |k: usize| std::f64::consts::PI * j as f64 * (k as f64 + 0.5) / NODES as f64;
        let sum: f64 = values
            .iter()
            .enumerate()
            .map(|(k, v)| v * angle(k).cos())
            .sum();
        scale * sum
    })
}

/// The same polynomial in powers of u. The series falls off so fast that the powers'
/// coefficients stay of the size of the values: no digits are lost on −1 to 1.
fn powers(series: &[f64; NODES]) -> [f64; NODES] {
    let mut sum = [0.0; NODES];
    // T₀ and T₁, then T_{j+1} = 2u T_j − T_{j−1}.
    let (mut before, mut now) = ([0.0; NODES], [0.0; NODES]);
    before[0] = 1.0;
    now[1] = 1.0;
    for c in series {
        for (total, t) in sum.iter_mut().zip(&before) {
            *total += c * t;
        }
        let mut next = before.map(|t| -t);
        for k in 1..NODES {
            next[k] += 2.0 * now[k - 1];
        }
        (before, now) = (now, next);
    }
    sum
}

/// Σ cⱼ uʲ of each expansion by pairs (Estrin's scheme): the chain of operations that
/// wait for each other is four long instead of ten.
fn sum(c: &[[f64; WHAT]; NODES], u: f64) -> [f64; WHAT] {
    const { assert!(NODES == 11) };
    let u2 = u * u;
    let u4 = u2 * u2;
    let u8 = u4 * u4;
    std::array::from_fn(|i| {
        let pair = |j: usize| c[j][i] + c[j + 1][i] * u;
        let low = (pair(0) + pair(2) * u2) + (pair(4) + pair(6) * u2) * u4;
        low + (pair(8) + c[10][i] * u2) * u8
    })
}

//! The powers of the reduced density that an equation's terms share.

/// Values of δˣ, found by slot.
pub(super) type Powers = [f64; Exponents::SLOTS];

/// Which slot holds which exponent: whole ones stand at their own number, since a chain
/// of multiplications gives them all; others follow.
#[derive(Debug, Clone, Default, PartialEq)]
pub(super) struct Exponents {
    /// The largest whole exponent in use.
    highest: usize,
    pub(super) other: Vec<f64>,
}

impl Exponents {
    /// Whole exponents in published equations reach 15.
    const WHOLE: usize = 24;
    pub(super) const MOST_OTHER: usize = 8;
    const SLOTS: usize = Self::WHOLE + Self::MOST_OTHER;

    /// The slot of an exponent; a new one is given if it has none.
    pub(super) fn slot(&mut self, exponent: f64) -> usize {
        let whole = exponent as usize;
        if whole as f64 == exponent && whole < Self::WHOLE {
            self.highest = self.highest.max(whole);
            return whole;
        }
        let place = self.other.iter().position(|known| *known == exponent);
        Self::WHOLE
            + place.unwrap_or_else(|| {
                self.other.push(exponent);
                self.other.len() - 1
            })
    }

    pub(super) fn powers(&self, delta: f64) -> Powers {
        let mut powers = [1.0; Self::SLOTS];
        let square = delta * delta;
        powers[1] = delta;
        // By twos: the two chains do not wait for each other.
        for i in 2..=self.highest {
            powers[i] = powers[i - 2] * square;
        }
        for (power, exponent) in powers[Self::WHOLE..].iter_mut().zip(&self.other) {
            *power = delta.powf(*exponent);
        }
        powers
    }
}

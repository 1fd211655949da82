//! A part: a shape, how often it occurs, and its wall.

use serde::{Deserialize, Serialize};

use super::dimension::{Dimension, Pick};
use super::shape::Shape;

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Part {
    pub name: String,
    pub shape: Shape,
    /// How many alike.
    #[serde(default = "once")]
    pub count: u32,
    /// `None` for inserts, which carry no load.
    #[serde(default)]
    pub wall: Option<Wall>,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Wall {
    /// Id of a material.
    pub material: String,
    pub thickness: Dimension,
    /// What last heated the part; it decides which strength is left.
    #[serde(default)]
    pub treatment: HeatTreatment,
}

/// The last heat a part has seen.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
pub enum HeatTreatment {
    /// None since the stock was bought.
    #[default]
    AsSupplied,
    /// Leaves annealed metal.
    Brazed,
    /// Leaves annealed metal.
    Sintered,
    /// Leaves the material's welded values, or annealed ones where it has none.
    Welded,
    Annealed,
    /// Glass closed in the flame and not annealed since.
    FlameSealed,
}

impl HeatTreatment {
    pub const ALL: [Self; 6] = [
        Self::AsSupplied,
        Self::Brazed,
        Self::Sintered,
        Self::Welded,
        Self::Annealed,
        Self::FlameSealed,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::AsSupplied => "as supplied",
            Self::Brazed => "brazed",
            Self::Sintered => "sintered",
            Self::Welded => "welded",
            Self::Annealed => "annealed",
            Self::FlameSealed => "flame-sealed",
        }
    }
}

/// What a part adds to the inside volume, times its count: negative for inserts,
/// least ≤ nominal ≤ greatest.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct PartVolumes {
    pub nominal_m3: f64,
    pub least_m3: f64,
    pub greatest_m3: f64,
}

impl Part {
    /// Signed volume at the worst corners; an insert is greatest where the cavity
    /// is least.
    pub fn volumes(&self) -> PartVolumes {
        let count = f64::from(self.count);
        let signed = |pick: Pick| {
            if self.shape.is_insert() {
                -count * self.shape.volume(pick.opposite())
            } else {
                count * self.shape.volume(pick)
            }
        };
        PartVolumes {
            nominal_m3: signed(Pick::Nominal),
            least_m3: signed(Pick::Least),
            greatest_m3: signed(Pick::Greatest),
        }
    }
}

const fn once() -> u32 {
    1
}

#[cfg(test)]
mod tests {
    use super::*;

    fn part(text: &str) -> Part {
        ron::from_str(text).expect(text)
    }

    #[test]
    fn an_insert_takes_away_and_swaps_its_corners() {
        let rod = part(
            r#"(name: "rods", count: 3, shape: Insert(form: Block(
                width: (nominal_m: 0.01, tolerance_m: 0.001),
                height: (nominal_m: 0.01), depth: (nominal_m: 0.01))))"#,
        );
        let volumes = rod.volumes();
        for (got, expected) in [
            (volumes.least_m3, -3.3e-6),
            (volumes.nominal_m3, -3.0e-6),
            (volumes.greatest_m3, -2.7e-6),
        ] {
            assert!((got - expected).abs() < 1e-18, "{got} {expected}");
        }
    }

    #[test]
    fn count_wall_and_treatment_have_defaults() {
        let tube = part(
            r#"(name: "body",
                shape: Tube(inside_diameter: (nominal_m: 0.011), length: (nominal_m: 0.2)),
                wall: Some((material: "stainless-316l", thickness: (nominal_m: 0.0005))))"#,
        );
        assert_eq!(tube.count, 1);
        assert_eq!(
            tube.wall.as_ref().map(|wall| wall.treatment),
            Some(HeatTreatment::AsSupplied)
        );
        let text = ron::to_string(&tube).expect("writes");
        assert_eq!(part(&text), tube);
    }
}

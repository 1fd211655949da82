//! A part: a shape, how often it occurs, its wall and where it stands.

use serde::{Deserialize, Serialize};

use super::dimension::{Dimension, Pick};
use super::shape::{Role, Shape};
use crate::units::{Length, Pressure, Ratio, Temperature};

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Part {
    pub name: String,
    pub shape: Shape,
    /// How many alike.
    #[serde(default = "once")]
    pub count: u32,
    /// `None` for what lies inside, which carries no load, and for a bought-in part.
    #[serde(default)]
    pub wall: Option<Wall>,
    /// What its maker states that it bears. A bellows and a fitting bear nothing else;
    /// any other part never more than that.
    #[serde(default)]
    pub rating: Option<Rating>,
    /// Material of what lies inside, by its id: it touches the fluid as well.
    #[serde(default)]
    pub made_of: Option<String>,
    #[serde(default)]
    pub zone: Zone,
    /// Of its inside as the unit is sealed, where that is not the bench's: a bulb whose
    /// fluid is frozen.
    #[serde(rename = "sealing_temperature_k", default)]
    pub sealing_temperature: Option<Temperature>,
}

#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Wall {
    /// Id of a material.
    pub material: String,
    pub thickness: Dimension,
    /// What corrosion may take off over life; counts in no strength.
    #[serde(rename = "corrosion_allowance_m", default = "no_length")]
    pub corrosion_allowance: Length,
    /// Greatest less least diameter, over the nominal one: it weakens against outside
    /// pressure. One per cent where left out: what ASME BPVC VIII-1, UG-80, lets pass
    /// [from memory].
    #[serde(default = "usual_ovality")]
    pub ovality: Ratio,
    /// What last heated the part; it decides which strength is left.
    #[serde(default)]
    pub treatment: HeatTreatment,
    /// Glass that has been handled, cleaned or exposed for years: its surface is scratched.
    #[serde(default)]
    pub worn: bool,
}

/// Stated strength of a bought-in part, over a range of temperature.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Rating {
    /// Greatest inside less outside pressure.
    #[serde(rename = "inside_pressure_pa")]
    pub inside: Pressure,
    /// Greatest outside less inside pressure; `None` where its maker states none.
    #[serde(rename = "outside_pressure_pa", default)]
    pub outside: Option<Pressure>,
    #[serde(rename = "coldest_k")]
    pub coldest: Temperature,
    #[serde(rename = "hottest_k")]
    pub hottest: Temperature,
    /// Who states it, and in which paper.
    pub stated_by: String,
}

/// Where in the device a part works.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, Default, Serialize, Deserialize)]
pub enum Zone {
    #[default]
    NotSaid,
    Evaporator,
    Adiabatic,
    Condenser,
}

impl Zone {
    pub const ALL: [Self; 4] = [
        Self::NotSaid,
        Self::Evaporator,
        Self::Adiabatic,
        Self::Condenser,
    ];

    pub const fn name(self) -> &'static str {
        match self {
            Self::NotSaid => "zone not said",
            Self::Evaporator => "evaporator",
            Self::Adiabatic => "adiabatic",
            Self::Condenser => "condenser",
        }
    }
}

impl Wall {
    /// Nominal, without allowance, of usual stock.
    pub fn new(material: &str, thickness: Dimension) -> Self {
        Self {
            material: material.to_owned(),
            thickness,
            corrosion_allowance: no_length(),
            ovality: usual_ovality(),
            treatment: HeatTreatment::default(),
            worn: false,
        }
    }

    /// What is left at the worst: nominal less tolerance and corrosion allowance.
    pub fn least_thickness_m(&self) -> f64 {
        (self.thickness.least().metre() - self.corrosion_allowance.metre()).max(0.0)
    }
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

/// A volume at its three corners, m³; least ≤ nominal ≤ greatest, negative for what is
/// taken away.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct Spread {
    pub nominal_m3: f64,
    pub least_m3: f64,
    pub greatest_m3: f64,
}

/// What a part adds, times its count.
#[derive(Debug, Clone, Copy, PartialEq, Default)]
pub struct PartVolumes {
    /// To the inside that fluid can fill.
    pub inside: Spread,
    /// To the pores and channels of wicks.
    pub wick_void: Spread,
    /// To the inside without the space of wicks.
    pub vapour_core: Spread,
}

impl Part {
    pub fn new(name: &str, shape: Shape, wall: Option<Wall>) -> Self {
        Self {
            name: name.to_owned(),
            shape,
            count: 1,
            wall,
            rating: None,
            made_of: None,
            zone: Zone::default(),
            sealing_temperature: None,
        }
    }

    /// Signed volumes at the worst corners; an insert is greatest where the cavity
    /// is least.
    pub fn volumes(&self) -> PartVolumes {
        let count = f64::from(self.count);
        let at = |volume: &dyn Fn(Pick) -> f64| Spread::at(|pick| count * volume(pick));
        match (&self.shape, self.shape.role()) {
            (Shape::Wick(wick), _) => PartVolumes {
                inside: at(&|pick| {
                    let (here, there) = (wick.volumes(pick), wick.volumes(pick.opposite()));
                    let channels = here.void_m3 + here.solid_m3 - here.from_core_m3;
                    channels - there.solid_m3
                }),
                wick_void: at(&|pick| wick.volumes(pick).void_m3),
                vapour_core: at(&|pick| -wick.volumes(pick.opposite()).from_core_m3),
            },
            (shape, Role::Insert) => {
                let taken = at(&|pick| -shape.volume(pick.opposite()));
                PartVolumes {
                    inside: taken,
                    vapour_core: taken,
                    wick_void: Spread::default(),
                }
            }
            (shape, Role::Cavity | Role::Lid | Role::Rated | Role::Wick) => {
                let added = at(&|pick| shape.volume(pick));
                PartVolumes {
                    inside: added,
                    vapour_core: added,
                    wick_void: Spread::default(),
                }
            }
        }
    }

    /// Material of what the fluid touches here.
    pub fn material(&self) -> Option<&str> {
        let wall = self.wall.as_ref().map(|wall| wall.material.as_str());
        wall.or(self.made_of.as_deref())
    }
}

impl Spread {
    fn at(volume: impl Fn(Pick) -> f64) -> Self {
        Self {
            nominal_m3: volume(Pick::Nominal),
            least_m3: volume(Pick::Least),
            greatest_m3: volume(Pick::Greatest),
        }
    }
}

impl std::ops::AddAssign for Spread {
    fn add_assign(&mut self, other: Self) {
        self.nominal_m3 += other.nominal_m3;
        self.least_m3 += other.least_m3;
        self.greatest_m3 += other.greatest_m3;
    }
}

const fn once() -> u32 {
    1
}

fn no_length() -> Length {
    Length::from_metre(0.0).expect("0 is a length")
}

fn usual_ovality() -> Ratio {
    Ratio::from_fraction(0.01).expect("a share")
}

#[cfg(test)]
mod tests {
    use super::*;

    fn part(text: &str) -> Part {
        ron::from_str(text).expect(text)
    }

    fn near(got: f64, expected: f64) {
        assert!((got - expected).abs() < 1e-17, "{got} {expected}");
    }

    #[test]
    fn an_insert_takes_away_and_swaps_its_corners() {
        let rod = part(
            r#"(name: "rods", count: 3, shape: Insert(form: Block(
                width: (nominal_m: 0.01, tolerance_m: 0.001),
                height: (nominal_m: 0.01), depth: (nominal_m: 0.01))))"#,
        );
        let volumes = rod.volumes();
        near(volumes.inside.least_m3, -3.3e-6);
        near(volumes.inside.nominal_m3, -3.0e-6);
        near(volumes.inside.greatest_m3, -2.7e-6);
        assert_eq!(volumes.vapour_core, volumes.inside);
    }

    /// Sintered annulus OD 18, ID 16 × 200 mm, ε 0.5: 5.341 mL void; calculated for
    /// methods.md, F3.
    #[test]
    fn a_sintered_lining_holds_half_of_its_space() {
        let wick = part(
            r#"(name: "wick", shape: Wick((form: Powder(
                lies: Lining(bore: (nominal_m: 0.018), length: (nominal_m: 0.2)),
                thickness: (nominal_m: 0.001), particle_diameter: (nominal_m: 0.0001), porosity: 0.5))))"#,
        );
        let volumes = wick.volumes();
        assert!((volumes.wick_void.nominal_m3 - 5.341e-6).abs() < 0.5e-9);
        near(volumes.inside.nominal_m3, -volumes.wick_void.nominal_m3);
        near(
            volumes.vapour_core.nominal_m3,
            -2.0 * volumes.wick_void.nominal_m3,
        );
    }

    /// Inside less wick void is vapour core, whatever the make.
    #[test]
    fn the_three_volumes_of_a_wick_belong_together() {
        for shape in Shape::default_of_each_kind() {
            let volumes = Part::new("wick", shape, None).volumes();
            let core = volumes.inside.nominal_m3 - volumes.wick_void.nominal_m3;
            near(volumes.vapour_core.nominal_m3, core);
            for spread in [volumes.inside, volumes.wick_void, volumes.vapour_core] {
                assert!(spread.least_m3 <= spread.nominal_m3, "{spread:?}");
                assert!(spread.nominal_m3 <= spread.greatest_m3, "{spread:?}");
            }
        }
    }

    #[test]
    fn what_is_left_out_has_defaults() {
        let tube = part(
            r#"(name: "body",
                shape: Tube(inside_diameter: (nominal_m: 0.011), length: (nominal_m: 0.2)),
                wall: Some((material: "stainless-316l", thickness: (nominal_m: 0.0005))))"#,
        );
        assert_eq!((tube.count, tube.zone), (1, Zone::NotSaid));
        assert_eq!(
            tube.wall.as_ref().map(|wall| (wall.treatment, wall.worn)),
            Some((HeatTreatment::AsSupplied, false))
        );
        let text = ron::to_string(&tube).expect("writes");
        assert_eq!(part(&text), tube);
    }

    #[test]
    fn corrosion_counts_in_no_strength() {
        let wall: Wall = ron::from_str(
            r#"(material: "x", thickness: (nominal_m: 0.001, tolerance_m: 0.0001), corrosion_allowance_m: 0.0002)"#,
        )
        .expect("reads");
        assert!((wall.least_thickness_m() - 0.0007).abs() < 1e-15);
    }
}

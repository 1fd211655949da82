//! What each shape of a chamber is in the section: one arm for each.

use super::Device;
use super::body::{Insert, Made, Solid};
use super::lining::{Layer, Lies, Lining};
use super::piece::Form;
use super::stack::{NoSection, Place, Stacked};
use crate::chamber::{self, Chamber, Dimension, InsertForm, Part, Pick, Shape, Wick, WickForm};
use crate::units::{Kind, Units};

impl Device {
    /// The section of a chamber at its nominal sizes, its texts in these units.
    ///
    /// # Errors
    /// [`NoSection`] where nothing can be drawn.
    pub fn of(chamber: &Chamber, units: &Units) -> Result<Self, NoSection> {
        let parts: Vec<Stacked> = chamber
            .parts
            .iter()
            .enumerate()
            .map(|(index, part)| stacked(index, part, units))
            .collect();
        Self::assemble(&parts)
    }
}

fn stacked(index: usize, part: &Part, units: &Units) -> Stacked {
    let text = text(part, units);
    Stacked {
        place: place(&part.shape, index, part.count, &text),
        count: part.count,
        wall_m: part.wall.as_ref().map_or(0.0, |wall| m(&wall.thickness)),
        part: index,
        text,
    }
}

fn place(shape: &Shape, part: usize, count: u32, text: &str) -> Place {
    match shape {
        // By its developed length, whatever its course.
        Shape::Tube {
            inside_diameter,
            length,
            ..
        }
        | Shape::Capillary {
            inside_diameter,
            length,
        } => Place::Along(Form::cylinder(m(inside_diameter), m(length))),
        Shape::Sphere { inside_diameter } => Place::Sphere {
            diameter_m: m(inside_diameter),
        },
        Shape::Bulb {
            inside_diameter,
            neck_diameter,
            neck_length,
        } => Place::Bulb {
            diameter_m: m(inside_diameter),
            neck_diameter_m: m(neck_diameter),
            neck_length_m: m(neck_length),
        },
        // The width lies along the axis, the height stands in the drawing.
        Shape::Box {
            width,
            height,
            depth,
            pillars,
        } => {
            let form = Form::Slab {
                length_m: m(width),
                height_m: m(height),
                depth_m: m(depth),
            };
            match pillars {
                None => Place::Along(form),
                Some(pillars) => Place::Pillared {
                    form,
                    diameter_m: m(&pillars.diameter),
                    columns: pillars.along_width,
                    rows: pillars.along_depth,
                },
            }
        }
        Shape::FlattenedTube {
            width,
            height,
            length,
        } => Place::Along(Form::Obround {
            length_m: m(length),
            height_m: m(height),
            across_m: m(width),
        }),
        Shape::Annulus {
            inside_diameter,
            core_diameter,
            core_thickness,
            length,
        } => Place::Along(Form::Annulus {
            length_m: m(length),
            inside_m: m(inside_diameter),
            core_m: m(core_diameter),
            core_wall_m: m(core_thickness),
        }),
        Shape::Bellows {
            root_diameter,
            crest_diameter,
            length,
            ..
        } => Place::Along(Form::Bellows {
            root_m: m(root_diameter),
            crest_m: m(crest_diameter),
            length_m: m(length),
        }),
        Shape::Fitting { dead_volume } => Place::DeadVolume {
            volume_m3: dead_volume.nominal.cubic_metre(),
        },
        Shape::PlateEnd { height, .. } => Place::End(Form::Plate {
            height_m: m(height),
        }),
        Shape::Wick(wick) => of_wick(wick, part, count, text),
        Shape::ConeFrustum {
            first_diameter,
            second_diameter,
            length,
        } => Place::Along(Form::cone(m(first_diameter), m(second_diameter), m(length))),
        Shape::DishedEnd {
            inside_diameter,
            form,
        } => Place::End(Form::dome(*form, m(inside_diameter))),
        Shape::FlatEnd {
            inside_diameter, ..
        } => Place::End(Form::Plate {
            height_m: m(inside_diameter),
        }),
        Shape::Insert { form } => Place::Inside(Insert {
            solid: match form {
                InsertForm::Cylinder { diameter, length } => Solid::Rod {
                    diameter_m: m(diameter),
                    length_m: m(length),
                },
                InsertForm::Sphere { diameter } => Solid::Ball {
                    diameter_m: m(diameter),
                },
                InsertForm::Block {
                    width,
                    height,
                    depth,
                } => Solid::Block {
                    length_m: m(width),
                    height_m: m(height),
                    depth_m: m(depth),
                },
            },
            made: Made::Solid,
            solidity: 1.0,
            count,
            part,
            text: text.to_owned(),
        }),
    }
}

/// A layer takes its whole space from the core, since its pores fill before a pool does.
fn of_wick(wick: &Wick, part: usize, count: u32, text: &str) -> Place {
    let lining = |bore_m: f64, length_m: f64, lies, thickness_m: f64, space_m2: f64| {
        Place::OnWall(Lining {
            bore_m,
            length_m,
            solid_m2: space_m2,
            layer: Layer {
                lies,
                thickness_m,
                part,
                text: text.to_owned(),
            },
        })
    };
    match &wick.form {
        WickForm::Grooves { length, depth, .. } => {
            // Of whatever bore: they are cut into it.
            lining(0.0, m(length), Lies::InTheWall, m(depth), 0.0)
        }
        WickForm::Artery {
            inside_diameter,
            wall_thickness,
            length,
            ..
        } => Place::Inside(Insert {
            solid: Solid::Rod {
                diameter_m: m(inside_diameter) + 2.0 * m(wall_thickness),
                length_m: m(length),
            },
            made: Made::Porous,
            solidity: 1.0,
            count,
            part,
            text: text.to_owned(),
        }),
        WickForm::Screen { lies, .. }
        | WickForm::Powder { lies, .. }
        | WickForm::Felt { lies, .. } => {
            let thickness_m = wick.thickness_m(Pick::Nominal).unwrap_or(0.0);
            match lies {
                chamber::Lies::Lining { bore, length } => {
                    let core_m = (m(bore) - 2.0 * thickness_m).max(0.0);
                    let space_m2 = 0.25 * std::f64::consts::PI * (m(bore).powi(2) - core_m.powi(2));
                    lining(m(bore), m(length), Lies::OnTheWall, thickness_m, space_m2)
                }
                // On the largest face; its length lies along the axis.
                chamber::Lies::Sheet { width, length } => lining(
                    0.0,
                    m(length),
                    Lies::OnTheWall,
                    thickness_m,
                    f64::from(count) * m(width) * thickness_m,
                ),
            }
        }
    }
}

/// Name and kind, then each size and the wall, a line each.
fn text(part: &Part, units: &Units) -> String {
    let kind = part.shape.kind_name();
    let mut lines = vec![if part.count > 1 {
        format!("{}: {kind}, {} alike", part.name, part.count)
    } else {
        format!("{}: {kind}", part.name)
    }];
    for (name, dimension) in part.shape.dimensions() {
        lines.push(format!("{name} {}", shown(m(dimension), units)));
    }
    if let Some(wall) = &part.wall {
        let thickness = shown(m(&wall.thickness), units);
        lines.push(format!("wall {thickness}, {}", wall.material));
    }
    lines.join("\n")
}

/// A size as a drawing gives it: without the zeros at its end.
fn shown(size_m: f64, units: &Units) -> String {
    let text = units.show_si(Kind::Length, size_m, 5);
    let Some((number, unit)) = text.split_once(crate::units::NBSP) else {
        return text;
    };
    let short = if number.contains('.') && !number.contains('e') {
        number.trim_end_matches('0').trim_end_matches('.')
    } else {
        number
    };
    format!("{short}{}{unit}", crate::units::NBSP)
}

fn m(dimension: &Dimension) -> f64 {
    dimension.nominal.metre()
}

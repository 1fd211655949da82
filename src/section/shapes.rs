//! What each shape of a chamber is in the section: one arm for each.

use super::Device;
use super::body::{Insert, Made, Solid};
use super::forms::Dome;
use super::piece::Form;
use super::stack::{NoSection, Place, Stacked};
use crate::chamber::{Chamber, Dimension, DishedForm, InsertForm, Part, Shape};
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
        Shape::Tube {
            inside_diameter,
            length,
        } => Place::Along(Form::cylinder(m(inside_diameter), m(length))),
        Shape::Sphere { inside_diameter } => Place::Sphere {
            diameter_m: m(inside_diameter),
        },
        // The width lies along the axis, the height stands in the drawing.
        Shape::Box {
            width,
            height,
            depth,
        } => Place::Along(Form::Slab {
            length_m: m(width),
            height_m: m(height),
            depth_m: m(depth),
        }),
        Shape::ConeFrustum {
            first_diameter,
            second_diameter,
            length,
        } => Place::Along(Form::cone(m(first_diameter), m(second_diameter), m(length))),
        Shape::DishedEnd {
            inside_diameter,
            form,
        } => {
            let dome = match form {
                DishedForm::Hemispherical => Dome::Hemisphere,
                DishedForm::TwoToOneEllipsoidal => Dome::Ellipsoid,
                DishedForm::Torispherical => Dome::Torisphere,
            };
            Place::End(Form::dome(dome, m(inside_diameter)))
        }
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

//! The walls as a table: every part at every temperature asked for.

use crate::assess::Assessment;
use crate::design::Design;
use crate::units::{Pressure, Temperature};
use crate::words;

use super::csv::{cell, digits, push_row};

/// Allowable and burst pressure, and the allowable from outside, of every wall; empty
/// where they are not known, with the reason in the last column.
pub(super) fn table(design: &Design, a: &Assessment, at: &[Temperature]) -> String {
    let mut text = String::from(
        "temperature_k,part,allowable_pa,allowable_by,burst_pa,outside_allowable_pa,\
         outside_allowable_by,elastic_collapse_pa,formula,outside_formula,not_known\n",
    );
    let closure = design.chamber.closure.as_ref();
    let parts = design.chamber.parts.iter().map(|part| part.name.as_str());
    let names: Vec<&str> = parts.chain(closure.map(|c| c.kind.name())).collect();
    for temperature in at {
        for (index, name) in names.iter().enumerate() {
            let Some(strength) = a.envelope.part(index, *temperature) else {
                continue;
            };
            let pascal = |pressure: Option<Pressure>| {
                pressure.map_or_else(String::new, |pressure| digits(pressure.pascal()))
            };
            let (inside, outside) = (&strength.allowable, &strength.outside);
            let unknown = inside.as_ref().err().or(outside.as_ref().err());
            push_row(
                &mut text,
                [
                    digits(temperature.kelvin()),
                    cell(name),
                    pascal(inside.as_ref().ok().map(|a| a.pressure)),
                    cell(inside.as_ref().map_or("", |a| words::basis(a.basis))),
                    pascal(strength.burst.ok()),
                    pascal(outside.as_ref().ok().map(|a| a.pressure)),
                    cell(
                        outside
                            .as_ref()
                            .map_or("", |a| words::outside_basis(a.basis)),
                    ),
                    pascal(outside.as_ref().ok().and_then(|a| a.elastic)),
                    cell(strength.formula),
                    cell(strength.outside_formula),
                    cell(&unknown.map_or_else(String::new, |u| u.reason.to_string())),
                ],
            );
        }
    }
    text
}

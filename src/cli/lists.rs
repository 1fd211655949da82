//! What there is to choose from, as CSV.

use super::csv::{cell, digits, push_row};
use crate::chamber::{MaterialKind, Materials, Strength, StrengthAt};
use crate::fluid::Catalog;
use crate::units::Temperature;

/// Every fluid with its model and range.
pub fn fluids(catalog: &Catalog) -> String {
    let mut text = String::from("id,name,cas,refrigerant,model,lowest_k,highest_k,own_file\n");
    for fluid in catalog.entries() {
        let (low, high) = fluid.range_k();
        push_row(
            &mut text,
            [
                fluid.id().to_owned(),
                cell(fluid.name()),
                fluid.cas().to_owned(),
                cell(fluid.refrigerant().unwrap_or_default()),
                fluid.model_kind().to_owned(),
                digits(low),
                digits(high),
                cell(fluid.own_file().unwrap_or_default()),
            ],
        );
    }
    text
}

/// Every material with its strengths at 20 °C as supplied; a cell is empty where nothing is
/// known.
pub fn materials(materials: &Materials) -> String {
    let mut text = String::from(
        "id,name,kind,proof_pa,tensile_pa,permissible_pa,modulus_pa,coldest_k,hottest_k,own_file\n",
    );
    for material in materials.iter() {
        let (kind, strengths) = match &material.kind {
            MaterialKind::Metal(metal) => {
                let (proof, tensile) = (&metal.as_supplied.proof, &metal.as_supplied.tensile);
                ("metal", [at_room(proof), at_room(tensile), None])
            }
            MaterialKind::Glass(glass) => (
                "glass",
                [None, None, Some(glass.permissible_pa(false, false))],
            ),
        };
        let [proof, tensile, permissible] = strengths.map(|pa| pa.map_or_else(String::new, digits));
        let own_file = material.own_file().map_or("", |own| own.name.as_str());
        push_row(
            &mut text,
            [
                material.id.clone(),
                cell(&material.name),
                kind.to_owned(),
                proof,
                tensile,
                permissible,
                digits(material.modulus.value.get()),
                digits(material.coldest().kelvin()),
                digits(material.service.hottest.value.kelvin()),
                cell(own_file),
            ],
        );
    }
    text
}

fn at_room(strength: &Option<Strength>) -> Option<f64> {
    let room = Temperature::from_kelvin(293.15).ok()?;
    match strength.as_ref()?.at(room) {
        StrengthAt::Known(pa) => Some(pa),
        StrengthAt::AtMost(_) => None,
    }
}

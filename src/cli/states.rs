//! States of a fluid as CSV: along saturation, and of a sealed mean density.

use super::csv::{digits, push_row};
use super::{CliError, quantity, temperatures};
use crate::fluid::Fluid;
use crate::units::{Density, Kind, Temperature, unit_named};
use crate::words;

pub(super) fn saturation(fluid: &Fluid, at: &str) -> Result<String, CliError> {
    let mut text = String::from(
        "temperature_k,pressure_pa,liquid_density_kg_per_m3,vapour_density_kg_per_m3,\
         latent_heat_j_per_kg,slope_pa_per_k,surface_tension_n_per_m,liquid_viscosity_pa_s,vapour_viscosity_pa_s\n",
    );
    for t in temperatures(at)? {
        let state = fluid.saturation(t)?;
        let cells = [
            Some(t.kelvin()),
            Some(state.pressure_pa),
            Some(state.liquid_kg_per_m3),
            Some(state.vapour_kg_per_m3),
            Some(state.latent_heat_j_per_kg),
            Some(state.slope_pa_per_k),
            fluid.surface_tension(t),
            fluid.liquid_viscosity(t),
            fluid.vapour_viscosity(t),
        ];
        push_row(
            &mut text,
            cells.map(|cell| cell.map_or_else(String::new, digits)),
        );
    }
    Ok(text)
}

pub(super) fn isochore(fluid: &Fluid, density: &str, at: &str) -> Result<String, CliError> {
    let density: Density = quantity(
        "density",
        density,
        unit_named(Kind::Density, "kg/m³").symbol,
    )?;
    let mut text = String::from(
        "temperature_k,density_kg_per_m3,regime,pressure_pa,liquid_share,vapour_quality\n",
    );
    for t in temperatures(at)? {
        push_row(&mut text, isochore_row(fluid, density, t)?);
    }
    Ok(text)
}

fn isochore_row(fluid: &Fluid, density: Density, t: Temperature) -> Result<[String; 6], CliError> {
    let state = fluid.state(density, t)?;
    let cell = |value: Option<f64>| value.map_or_else(String::new, digits);
    // A pressure that is only bounded is not known: the cell stays empty.
    let pressure = (!state.is_bound).then(|| state.pressure.pascal());
    Ok([
        digits(t.kelvin()),
        digits(density.kilogram_per_cubic_metre()),
        words::regime_key(state.regime).to_owned(),
        cell(pressure),
        cell(state.liquid_share),
        cell(state.quality),
    ])
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::fluid::{Catalog, FluidError};

    #[test]
    fn one_bad_temperature_refuses_the_list() {
        let water = Catalog::built_in().by_id("water").expect("known");
        let ask = |at: &str| saturation(&water, at);
        // −5 °C is below water's freezing point.
        assert!(matches!(
            ask("300,-5degC"),
            Err(CliError::Fluid(FluidError::Frozen { .. }))
        ));
        assert!(ask("300,25degC").is_ok());
        assert!(matches!(ask("300,nan"), Err(CliError::Number { .. })));
        assert!(matches!(ask("300,-1"), Err(CliError::Quantity { .. })));
        assert!(matches!(
            ask("300,700"),
            Err(CliError::Fluid(FluidError::NoSaturation { .. }))
        ));
    }
}

//! The section of a design at one temperature.

use super::Picture;
use super::section::{Filling, Hold, View, section};
use crate::assess::{Assessment, LiquidPlace};
use crate::design::{Design, Duty};
use crate::section::{Device, NoSection};
use crate::units::{Temperature, Units};

/// Slugs that a pulsating loop is drawn with: how many there are depends on its start.
const SLUGS: usize = 9;

/// Draws a design with its liquid where it is at that temperature; empty where the phases
/// are not told apart. `turn_deg` turns the whole picture, down with it.
///
/// # Errors
/// [`NoSection`] where nothing can be drawn.
pub fn of_design(
    design: &Design,
    a: &Assessment,
    temperature: Temperature,
    turn_deg: f64,
    units: &Units,
) -> Result<Picture, NoSection> {
    let device = Device::of(&design.chamber, units)?;
    let place = a.liquid_place(temperature).unwrap_or(LiquidPlace {
        wick: 0.0,
        pool: 0.0,
        frozen: false,
    });
    let filling = Filling {
        liquid_m3: place.pool * device.volume_m3(),
        hold: match design.duty {
            Duty::PulsatingLoop => Hold::Slugs(SLUGS),
            _ => Hold::Gravity,
        },
        wet_share: place.wick,
        frozen: place.frozen,
    };
    let view = View {
        tilt_deg: design.chamber.tilt.radian().to_degrees(),
        turn_deg,
    };
    let title = format!("{}, at {}", design.title, units.show(temperature));
    Ok(section(&device, &filling, &view, &title, units))
}

//! What the sheet says of the inside, the closure and the walls.

use super::page::Page;
use crate::assess::Assessment;
use crate::chamber::{NamedVolumes, Relief, Volumes};
use crate::design::Design;
use crate::units::{Units, figures};
use crate::words;

/// The inside by its name, and how it was found.
pub fn volumes(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let Ok(named) = &a.named else { return };
    let NamedVolumes {
        inside,
        vapour_core,
        wick_void,
        evaporator,
    } = named;
    let chamber = &design.chamber;
    let how = if chamber.water_fill.is_some() {
        "weighed full of water"
    } else if chamber.measured.is_some() {
        "measured"
    } else {
        "by the drawing"
    };
    let range = |volumes: &Volumes, how: &str| {
        format!(
            "{}{how} ({} to {})",
            units.show(volumes.nominal),
            units.show(volumes.least),
            units.show(volumes.greatest)
        )
    };
    page.row(
        "Inside volume",
        &format!("{}, at 20\u{a0}°C", range(inside, &format!(" {how}"))),
    );
    if wick_void.nominal.cubic_metre() > 0.0 {
        page.row("Vapour core", &range(vapour_core, ""));
        page.row("Void of the wick", &range(wick_void, ""));
    }
    if let Some(evaporator) = evaporator {
        page.row("Evaporator", &range(evaporator, ""));
    }
}

/// How the unit is closed; nothing where it is not stated, which is a finding.
pub fn closure(page: &mut Page, design: &Design, units: &Units) {
    let Some(closure) = &design.chamber.closure else {
        return;
    };
    page.heading("CLOSURE");
    page.row("Closed by", closure.kind.name());
    page.row(
        "Dead volume of the port",
        &format!(
            "{} +/- {}, counted in the inside",
            units.show(closure.dead_volume.nominal),
            units.show_to(closure.dead_volume.tolerance, 2)
        ),
    );
    match &closure.stub {
        Some(stub) => page.row(
            "Comes off",
            &format!(
                "a stub of {}, {} inside",
                units.show(stub.mass),
                units.show(stub.volume.nominal)
            ),
        ),
        None if closure.kind.parts_a_stub() => {
            page.row("Comes off", "a stub, nothing stated of it")
        }
        None => page.row("Comes off", "nothing"),
    }
    let refillable = if closure.refillable { "yes" } else { "no" };
    page.row("Can be opened and refilled", refillable);
    let rating = closure.rating.as_ref().map_or_else(
        || "none stated; judged as the glass it is".to_owned(),
        |rating| {
            let outside = rating.outside.map_or_else(
                || "nothing stated of outside pressure".to_owned(),
                |outside| format!("{} from outside", units.show(outside)),
            );
            format!(
                "{} above the outside, {outside}, {} to {}: {}",
                units.show(rating.inside),
                units.show(rating.coldest),
                units.show(rating.hottest),
                rating.stated_by
            )
        },
    );
    page.row("Its rating", &rating);
    match &closure.relief {
        Relief::Device { opens_at, what } => page.row(
            "Relief",
            &format!(
                "{what}, opens at {} above the outside",
                units.show(*opens_at)
            ),
        ),
        Relief::None { because } => page.row("Relief", &format!("none: {because}")),
    }
}

/// How far the outside may press, and how hot the unit may be pumped.
pub fn outside(page: &mut Page, a: &Assessment, units: &Units) {
    if let Some(case) = a.worst_outside() {
        page.heading("WORST FROM OUTSIDE");
        page.row("Outside presses most in", &case.stretch);
        page.row(
            "Load from outside",
            &format!(
                "{} at {}: {} abs outside, {} abs inside",
                units.show(case.load),
                units.show(case.temperature),
                units.show(case.outside),
                units.show_to(case.inside, 3)
            ),
        );
        match (&case.weakest, &case.of_allowable) {
            (Ok(weakest), Ok(share)) => {
                page.row("Weakest part there", &weakest.name);
                page.row(
                    "Allowable from outside",
                    &format!(
                        "{} ({})",
                        units.show(weakest.allowable.pressure),
                        words::outside_basis(weakest.allowable.basis)
                    ),
                );
                page.row("Used of it", &format!("{} %", figures(100.0 * share, 3)));
                page.row("Judged by", weakest.formula);
            }
            (Err(unknown), _) => page.row("Weakest part there", &format!("not known: {unknown}")),
            (Ok(_), Err(_)) => {}
        }
    }
}

/// Up to where the wall stands a full vacuum.
pub fn vacuum(page: &mut Page, a: &Assessment, units: &Units) {
    let text = match a.vacuum_stands_to {
        Some(hottest) => format!(
            "may be pumped out up to {}; hotter it may fold, or its strength is not known",
            units.show_careful(hottest, 3, true)
        ),
        None => "must not be pumped out on the bench: see WORST CASE".to_owned(),
    };
    page.row("Empty, the unit", &text);
}

/// Each stretch of life with its worst moment, from inside and from outside.
pub fn stretches(page: &mut Page, a: &Assessment, units: &Units) {
    let Ok(inside) = &a.inside else { return };
    if inside.len() + a.outside.len() < 3 {
        return;
    }
    page.heading("EVERY STRETCH OF LIFE");
    let used = |share: &Result<f64, _>| match share {
        Ok(share) => format!("{} % used", figures(100.0 * share, 3)),
        Err(_) => "strength not known".to_owned(),
    };
    for case in inside {
        let load = if case.load.pascal() > 0.0 {
            units.show(case.load)
        } else {
            "no load".to_owned()
        };
        let part = case.weakest.as_ref().map_or("", |w| &*w.name);
        page.row(
            &case.stretch,
            &format!(
                "from inside {load} at {}, {part}: {}",
                units.show(case.temperature),
                used(&case.of_allowable)
            ),
        );
    }
    for case in &a.outside {
        let part = case.weakest.as_ref().map_or("", |w| &*w.name);
        page.row(
            &case.stretch,
            &format!(
                "from outside {} at {}, {part}: {}",
                units.show(case.load),
                units.show(case.temperature),
                used(&case.of_allowable)
            ),
        );
    }
}

/// Every part, at the temperatures that govern.
pub fn parts(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    let (Ok(case), Some(outside)) = (&a.worst, a.worst_outside()) else {
        return;
    };
    page.heading("WALLS");
    page.paragraph(&format!(
        "Allowable inside less outside at {}, and outside less inside at {}; factors included.",
        units.show(case.temperature),
        units.show(outside.temperature)
    ));
    let closure = design.chamber.closure.as_ref();
    let names = design.chamber.parts.iter().map(|part| part.name.as_str());
    for (index, name) in names
        .chain(closure.map(|closure| closure.kind.name()))
        .enumerate()
    {
        let (Some(hot), Some(cold)) = (
            a.envelope.part(index, case.temperature),
            a.envelope.part(index, outside.temperature),
        ) else {
            continue;
        };
        let inside = hot.allowable.map_or_else(
            |unknown| format!("not known ({})", unknown.reason),
            |allowable| units.show(allowable.pressure),
        );
        let collapse = cold.outside.map_or_else(
            |unknown| format!("not known ({})", unknown.reason),
            |allowable| units.show(allowable.pressure),
        );
        let wall = design
            .chamber
            .parts
            .get(index)
            .and_then(|p| p.wall.as_ref());
        let state = wall.map_or_else(String::new, |wall| {
            format!("; {}, {}", wall.material, wall.treatment.name())
        });
        page.row(name, &format!("{inside} inside, {collapse} outside{state}"));
    }
}

//! `assess` always returns: designs pulled to their extremes, one field at a time and
//! at random, and what must hold of every one of them.

use std::sync::LazyLock;

use chargewright::assess::{Assessment, FindingKind, Library, Severity, Side, Verdict, assess};
use chargewright::chamber::ChamberFault;
use chargewright::cli::sheet_text;
use chargewright::conditions::ConditionFault;
use chargewright::design::{ChargeAim, Design, Duty, FluidId};
use chargewright::fluid::Catalog;
use chargewright::store;
use chargewright::units::{Amount, Pressure, Temperature, Units};
use chargewright::words;
use proptest::prelude::*;

use crate::given::{assessed, preset_with};
use crate::presets::sheet_fits_the_verdict;
use crate::random_states::check_every;

static LIBRARY: LazyLock<Library> = LazyLock::new(Library::built_in);

/// What must hold of every design that loads.
fn holds(design: &Design, what: &str) -> Assessment {
    let a = assess(design, &LIBRARY);
    let faults = design.chamber.faults(&LIBRARY.materials).len() + design.conditions.faults().len();
    let missing = a.charge.is_err() || a.worst.is_err() || a.window.is_err() || a.volumes.is_err();
    if faults > 0 || missing {
        assert_eq!(
            a.verdict,
            Verdict::NotFit,
            "{what}: {faults} faults, {:#?}",
            a.findings
        );
    }
    // A fit charge lies in its window, tolerance and all. 1e-9: the digits of the ends.
    if let (Ok(charge), Ok(window)) = (&a.charge, &a.window)
        && a.verdict != Verdict::NotFit
    {
        let (least, greatest) = (charge.least.kilogram(), charge.greatest.kilogram());
        for bound in &window.bounds {
            let inside = match bound.side {
                Side::AtLeast => least >= bound.mass.kilogram() * (1.0 - 1e-9),
                Side::AtMost => greatest <= bound.mass.kilogram() * (1.0 + 1e-9),
            };
            assert!(
                inside,
                "{what}: fit with {least} to {greatest} kg, {bound:?}"
            );
        }
    }
    let worst = a.findings.iter().map(|finding| finding.severity).min();
    assert_eq!(
        worst == Some(Severity::Error),
        a.verdict == Verdict::NotFit,
        "{what}"
    );
    assert!(
        a.findings.is_sorted_by_key(|finding| finding.severity),
        "{what}"
    );
    for finding in &a.findings {
        let said = words::finding(finding, Some(&design.chamber), &Units::default());
        let texts = [
            Some(said.title),
            Some(said.detail),
            said.try_this,
            said.button,
            said.source,
        ];
        assert!(texts[0].is_some() && texts[1].is_some());
        for text in texts.into_iter().flatten() {
            assert!(!text.trim().is_empty(), "{what}: {finding:?}");
            let number = |word: &str| word.trim_matches(|c: char| !c.is_alphanumeric()) == "inf";
            assert!(
                !text.contains("NaN") && !text.split_whitespace().any(number),
                "{what}: {text}"
            );
        }
        if let Some(share) = finding.share {
            assert!(share.is_finite() && share >= 0.0, "{what}: {finding:?}");
        }
    }
    sheet_fits_the_verdict(&sheet_text(design, None), a.verdict);
    let text = store::to_text(design);
    let again = store::from_text(&text).unwrap_or_else(|error| panic!("{what}: {error}\n{text}"));
    assert_eq!(&again, design, "{what}");
    a
}

/// Each click takes its finding away.
fn remedies_mend(design: &Design, a: &Assessment, what: &str) {
    for finding in &a.findings {
        let Some(remedy) = finding.remedy else {
            continue;
        };
        let mut mended = design.clone();
        mended.apply(remedy);
        let after = assess(&mended, &LIBRARY);
        let same = std::mem::discriminant(&finding.kind);
        let still = after.findings.iter().find(|found| {
            found.severity == Severity::Error && std::mem::discriminant(&found.kind) == same
        });
        assert!(
            still.is_none(),
            "{what}: {finding:?}\nafter {remedy:?}: {still:?}"
        );
    }
}

/// The numbers of a design's text, with the place of each.
fn numbers(text: &str) -> Vec<(std::ops::Range<usize>, String)> {
    let mut found = Vec::new();
    let mut from = 0;
    while let Some(colon) = text[from..].find(": ") {
        let start = from + colon + 2;
        let end = text[start..]
            .find(|c: char| !c.is_ascii_digit() && !matches!(c, '.' | '-' | 'e'))
            .map_or(text.len(), |length| start + length);
        if text[start..end].parse::<f64>().is_ok() {
            let key = text[..start - 2]
                .rsplit([' ', '('])
                .next()
                .unwrap_or_default();
            if key != "format" {
                found.push((start..end, key.to_owned()));
            }
        }
        from = start;
    }
    found
}

/// What a number is pulled to: nothing, next to nothing, near, far, beyond all measure.
fn pulled(value: f64) -> Vec<f64> {
    let mut to = vec![0.0, 1.0, 1e-12, 1e-3, 1e4, 1e5, 1e9, 1e12, -10.0];
    to.extend([0.0, 0.5, 0.99, 1.01, 2.0, 1000.0].map(|factor| factor * value));
    to
}

fn with(text: &str, place: &std::ops::Range<usize>, key: &str, value: f64) -> String {
    let number = if key == "count" {
        format!("{value:.0}")
    } else {
        format!("{value:?}")
    };
    format!("{}{number}{}", &text[..place.start], &text[place.end..])
}

#[test]
fn every_number_of_every_ready_design_at_its_extremes() {
    let (mut loaded, mut refused) = (0, 0);
    for (name, design) in store::presets() {
        let text = store::to_text(&design);
        let places = numbers(&text);
        assert!(places.len() > 20, "{name}: {places:?}");
        for (place, key) in places {
            let value: f64 = text[place.clone()].parse().expect("a number");
            for to in pulled(value) {
                let what = format!("{name}, {key} {value} to {to}");
                match store::from_text(&with(&text, &place, &key, to)) {
                    Ok(design) => {
                        loaded += 1;
                        let a = holds(&design, &what);
                        remedies_mend(&design, &a, &what);
                    }
                    Err(error) => {
                        refused += 1;
                        assert!(error.to_string().contains(&key), "{what}: {error}");
                    }
                }
            }
        }
    }
    assert!(
        loaded > 1000 && refused > 100,
        "{loaded} loaded, {refused} refused"
    );
}

#[test]
fn every_fluid_and_every_duty_in_every_ready_design() {
    for (name, design) in store::presets() {
        for entry in Catalog::built_in().entries() {
            let mut design = design.clone();
            design.fluid = FluidId::from(entry);
            let what = format!("{name} with {}", entry.id());
            let a = holds(&design, &what);
            remedies_mend(&design, &a, &what);
        }
        for duty in Duty::ALL {
            let mut design = design.clone();
            design.duty = duty;
            holds(&design, &format!("{name} as {}", duty.name()));
        }
    }
}

/// Contradictions that have names of their own.
#[test]
fn a_contradiction_is_a_finding_by_its_name() {
    let pipe = "copper-water-heat-pipe";
    let named = |design: &Design, is: fn(&FindingKind) -> bool, what: &str| {
        let a = holds(design, what);
        assert!(
            a.findings.iter().any(|f| is(&f.kind)),
            "{what}: {:#?}",
            a.findings
        );
    };
    use FindingKind::{Chamber, Conditions};
    let hot = preset_with(pipe, &[("hottest_k: 393.15", "hottest_k: 200.0")]);
    let is = |kind: &_| matches!(kind, Conditions(ConditionFault::HottestBelowColdest { .. }));
    named(&hot, is, "hottest below coldest");
    let reversed = preset_with(pipe, &[("working_high_k: 373.15", "working_high_k: 300.0")]);
    let is = |kind: &_| {
        matches!(
            kind,
            Conditions(ConditionFault::WorkingRangeReversed { .. })
        )
    };
    named(&reversed, is, "working range reversed");
    let outside = preset_with(
        pipe,
        &[("working_high_k: 373.15", "working_high_k: 473.15")],
    );
    let is = |kind: &_| {
        matches!(
            kind,
            Conditions(ConditionFault::WorkingOutsideExtremes { .. })
        )
    };
    named(&outside, is, "working outside");
    let thick = preset_with(pipe, &[("nominal_m: 0.0005,", "nominal_m: 0.5,")]);
    let is = |kind: &_| matches!(kind, Chamber(ChamberFault::WallThickerThanBore { .. }));
    named(&thick, is, "wall thicker than the tube");
    let unknown = preset_with(pipe, &[("copper-c12200-drawn", "unobtainium")]);
    let is = |kind: &_| matches!(kind, Chamber(ChamberFault::UnknownMaterial { .. }));
    named(&unknown, is, "unknown material");
    let loose = preset_with(
        pipe,
        &[
            ("nominal_m: 0.25,", "nominal_m: 0.25, "),
            ("tolerance_m: 0.0005", "tolerance_m: 9.0"),
        ],
    );
    let is = |kind: &_| {
        matches!(
            kind,
            Chamber(ChamberFault::ToleranceLargerThanDimension { .. })
        )
    };
    named(&loose, is, "tolerance larger than the part");
    let mut empty = store::preset(pipe).expect("ready");
    empty.chamber.parts.clear();
    let is = |kind: &_| matches!(kind, Chamber(ChamberFault::NoParts));
    named(&empty, is, "no parts");
    let mut bare = store::preset(pipe).expect("ready");
    bare.chamber.parts[0].wall = None;
    let is = |kind: &_| matches!(kind, Chamber(ChamberFault::WallMissing { .. }));
    named(&bare, is, "no wall");
    let mut flat = store::preset(pipe).expect("ready");
    flat.chamber.closure = None;
    for part in &mut flat.chamber.parts {
        part.count = 0;
    }
    let is = |kind: &_| matches!(kind, Chamber(ChamberFault::ZeroVolume));
    named(&flat, is, "zero volume");
}

/// Any vacuum, any gas made over life, degassed or not, in walls of any cold: what must hold
/// of every design holds, and the remedies mend.
#[test]
fn any_residual_gas() {
    for (name, design) in store::presets() {
        for vacuum in [
            None,
            Some(0.0),
            Some(1.0),
            Some(1e3),
            Some(1e5),
            Some(1e9),
            Some(-5.0),
        ] {
            for amount in [0.0, 1e-7, 1e-3, 1e3] {
                for degassed in [false, true] {
                    let mut design = design.clone();
                    design.bench.vacuum =
                        vacuum.map(|pa| Pressure::from_pascal(pa).expect("a pressure"));
                    design.bench.degassed = degassed;
                    design.conditions.gas_generated = Amount::from_mole(amount).expect("an amount");
                    design.chamber.parts[0].sealing_temperature =
                        Temperature::from_kelvin(77.36).ok().filter(|_| degassed);
                    let what = format!("{name}: {vacuum:?} Pa, {amount} mol, {degassed}");
                    let a = holds(&design, &what);
                    remedies_mend(&design, &a, &what);
                }
            }
        }
    }
}

/// Charges that cannot be: nothing, the brim, ten times what there is room for.
#[test]
fn a_charge_that_cannot_be_is_not_fit() {
    for (name, design) in store::presets() {
        let nominal = assessed(&design).charge.expect(name).nominal;
        let aims = [
            "Mass(mass_kg: 0.0)".to_owned(),
            "Dispensed(volume_m3: 0.0)".to_owned(),
            "FillRatio(ratio: 1.0, of: Inside)".to_owned(),
            "FillRatio(ratio: 0.5, of: Part(\"no such part\"))".to_owned(),
            "FillRatio(ratio: 0.5, temperature_k: Some(2000.0), of: Inside)".to_owned(),
            format!("Mass(mass_kg: {:?})", 10.0 * nominal.kilogram()),
            "Mass(mass_kg: 1e12)".to_owned(),
        ];
        for aim in aims {
            let mut design = design.clone();
            design.charge.aim = ron_aim(&aim);
            let what = format!("{name}, {aim}");
            let a = holds(&design, &what);
            assert_eq!(a.verdict, Verdict::NotFit, "{what}: {:#?}", a.findings);
            remedies_mend(&design, &a, &what);
        }
    }
}

fn ron_aim(text: &str) -> ChargeAim {
    ron::from_str(text).unwrap_or_else(|error| panic!("{text}: {error}"))
}

/// Several numbers at once, at random; one case in a hundred of `CHARGEWRIGHT_CASES`,
/// since an assessment costs a millisecond and more.
#[test]
fn several_numbers_at_random() {
    let texts: Vec<String> = store::presets()
        .map(|(_, design)| store::to_text(&design))
        .collect();
    let changes = prop::collection::vec((any::<prop::sample::Index>(), -3.0..3.0_f64), 1..6);
    check_every(100, (0..texts.len(), changes), |(preset, changes)| {
        let mut text = texts[preset].clone();
        let mut what = format!("preset {preset}");
        for (index, decades) in changes {
            let places = numbers(&text);
            let (place, key) = index.get(&places);
            let value: f64 = text[place.clone()].parse().expect("a number");
            // Temperatures move by less, so that not all of them leave the equation.
            let scale = if key.ends_with("_k") { 0.05 } else { 1.0 };
            let to = value * 10_f64.powf(scale * decades);
            what.push_str(&format!(", {key} {value} to {to}"));
            let changed = with(&text, place, key, to);
            if store::from_text(&changed).is_ok() {
                text = changed;
            }
        }
        let design = store::from_text(&text).expect("checked at each step");
        let a = holds(&design, &what);
        remedies_mend(&design, &a, &what);
        Ok(())
    });
}

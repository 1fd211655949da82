//! The ready designs: they parse, are fit, survive the file, and their sheets are the
//! golden texts of tests/golden.
//!
//! The golden texts are our own output, no reference: they show that a sheet changed.
//! After a change that is meant, `CHARGEWRIGHT_BLESS=1` rewrites them, to be read
//! before they are committed.

use std::path::{Path, PathBuf};

use chargewright::assess::Verdict;
use chargewright::cli::sheet_text;
use chargewright::sheet::WIDTH;
use chargewright::store;

use crate::given::{assessed, preset_with};

fn root(path: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR")).join(path)
}

#[test]
fn there_are_four_ready_designs_or_more_and_each_is_fit() {
    let names: Vec<&str> = store::preset_names().collect();
    assert!(names.len() >= 4, "{names:?}");
    for (name, design) in store::presets() {
        let a = assessed(&design);
        assert_ne!(a.verdict, Verdict::NotFit, "{name}: {:#?}", a.findings);
        assert!(
            !design.title.is_empty() && !design.note.is_empty(),
            "{name}"
        );
        // A charge in the middle of nowhere teaches nothing: each lies in its window.
        let window = a.window.as_ref().expect(name);
        let (low, high) = window.ends().expect(name);
        let charge = a.charge.as_ref().expect(name);
        assert!(low <= charge.least && charge.greatest <= high, "{name}");
    }
}

#[test]
fn a_ready_design_survives_the_file_to_the_byte() {
    for (name, design) in store::presets() {
        let text = store::to_text(&design);
        let again = store::from_text(&text).unwrap_or_else(|error| panic!("{name}: {error}"));
        assert_eq!(again, design, "{name}");
        assert_eq!(store::to_text(&again), text, "{name}");
        assert_eq!(store::fingerprint(&again), store::fingerprint(&design));
        // The file in presets/ is what is compiled in.
        let file = store::load(&root(&format!("presets/{name}.ron"))).expect(name);
        assert_eq!(file, design, "{name}");
    }
}

#[test]
fn fingerprints_tell_designs_apart() {
    let mut seen: Vec<String> = store::presets()
        .map(|(_, design)| store::fingerprint(&design))
        .collect();
    let name = "copper-water-heat-pipe";
    seen.push(store::fingerprint(&preset_with(
        name,
        &[("0.0032", "0.00320001")],
    )));
    seen.push(store::fingerprint(&preset_with(
        name,
        &[("Lindenhof", "Lindenhoff")],
    )));
    let count = seen.len();
    seen.sort();
    seen.dedup();
    assert_eq!(seen.len(), count);
}

#[test]
fn sheets_are_the_golden_texts_to_the_byte() {
    let bless = std::env::var_os("CHARGEWRIGHT_BLESS").is_some();
    for (name, design) in store::presets() {
        let sheet = sheet_text(&design, Some(format!("{name}.ron")));
        assert_eq!(
            sheet,
            sheet_text(&design, Some(format!("{name}.ron"))),
            "{name}"
        );
        let path = root(&format!("tests/golden/{name}.txt"));
        if bless {
            std::fs::create_dir_all(path.parent().expect("a folder")).expect("a folder");
            std::fs::write(&path, &sheet).expect(name);
        }
        let golden = std::fs::read_to_string(&path)
            .unwrap_or_else(|error| panic!("{}: {error}; bless it", path.display()));
        for (number, (found, expected)) in sheet.lines().zip(golden.lines()).enumerate() {
            assert_eq!(found, expected, "{name}, line {}", number + 1);
        }
        assert!(sheet == golden, "{name}: one is longer");
    }
    let golden = std::fs::read_dir(root("tests/golden"))
        .expect("a folder")
        .count();
    assert_eq!(
        golden,
        store::preset_names().count(),
        "a golden text without its design"
    );
}

#[test]
fn no_line_of_a_sheet_is_wider_than_78_characters() {
    assert_eq!(WIDTH, 78);
    for (name, mut design) in store::presets() {
        for title in [
            design.title.clone(),
            "endless".repeat(40),
            "ein Wärmerohr ".repeat(20),
        ] {
            design.title = title.clone();
            design.note = title.replace('e', "é");
            design.chamber.parts[0].name = title;
            let sheet = sheet_text(&design, Some("long-name".repeat(12)));
            for line in sheet.lines() {
                assert!(line.chars().count() <= 78, "{name}: {line}");
                assert_eq!(line, line.trim_end(), "{name}: blanks at the end");
            }
            assert!(sheet.ends_with('\n') && !sheet.ends_with("\n\n"));
        }
    }
}

/// What a design of this verdict may print: the readings, or DO NOT FILL.
pub fn sheet_fits_the_verdict(sheet: &str, verdict: Verdict) {
    // "from 12.3 g to 12.5 g": a number, a unit of mass, and how far. A fluid's note may say
    // from what temperature to what.
    let reading = |line: &str| {
        line.split("from ").skip(1).any(|rest| {
            let mut words = rest.split([' ', '\u{a0}']);
            let number = words
                .next()
                .is_some_and(|word| word.starts_with(|c: char| c.is_ascii_digit()));
            let of_mass = words
                .next()
                .is_some_and(|word| ["g", "kg", "mg", "oz", "lb"].contains(&word));
            number && of_mass && rest.contains(" to ")
        })
    };
    // The titles of papers, below, also say from where to where.
    let (bench, _) = sheet.split_once("\nBASIS\n").expect("a basis");
    let readings = bench.lines().filter(|line| reading(line)).count();
    if verdict == Verdict::NotFit {
        let first = sheet.lines().find(|line| !line.starts_with('#'));
        assert!(
            first.is_some_and(|line| line.starts_with("DO NOT FILL")),
            "{sheet}"
        );
        assert_eq!(readings, 0, "{sheet}");
        for word in [
            "scale shows",
            "Released before filling",
            "UNIT LABEL",
            "Sealed charge",
        ] {
            assert!(!sheet.contains(word), "{word} in\n{sheet}");
        }
    } else {
        assert!(!sheet.contains("DO NOT FILL"), "{sheet}");
        assert_eq!(readings, 2, "{sheet}");
    }
}

#[test]
fn a_design_that_is_not_fit_says_so_first_and_gives_no_readings() {
    for (name, design) in store::presets() {
        sheet_fits_the_verdict(&sheet_text(&design, None), assessed(&design).verdict);
        let mut hot = design.clone();
        hot.conditions.hottest = crate::given::celsius(400.0);
        let a = assessed(&hot);
        assert_eq!(a.verdict, Verdict::NotFit, "{name}");
        let sheet = sheet_text(&hot, None);
        sheet_fits_the_verdict(&sheet, a.verdict);
        // The reason stands between the two rules below it.
        let reason = sheet.split("DO NOT FILL").nth(1).expect("said");
        let reason = reason.split("####").next().expect("closed");
        assert!(reason.contains("  * "), "{name}: {reason}");
    }
}

/// The readings of the sheet are drawn in by the balance and lie in the window.
#[test]
fn scale_readings_keep_the_sealed_mass_inside_the_window() {
    for (name, design) in store::presets() {
        let a = assessed(&design);
        let sheet = sheet_text(&design, None);
        let row = sheet
            .lines()
            .find(|line| line.starts_with("2  Sealed mass"))
            .expect(name);
        let (_, range) = row.split_once("from ").expect("a range");
        let (low, high) = range.split_once(" to ").expect("a range");
        let kilogram = |text: &str| {
            let (number, unit) = text.split_once(' ').expect("a unit");
            let scale = match unit {
                "g" => 1e-3,
                "kg" => 1.0,
                "mg" => 1e-6,
                other => panic!("{name}: {other}"),
            };
            scale * number.parse::<f64>().expect("a number")
        };
        let (low, high) = (kilogram(low), kilogram(high));
        let balance = design.bench.balance.kilogram();
        let (least, greatest) = a.window.as_ref().expect(name).ends().expect(name);
        let charge = a.charge.as_ref().expect(name);
        assert!(low < high, "{name}: {row}");
        assert!(low - balance >= least.kilogram().max(charge.least.kilogram()) - 1e-15);
        assert!(high + balance <= greatest.kilogram().min(charge.greatest.kilogram()) + 1e-15);
    }
}

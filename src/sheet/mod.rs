//! The charge sheet: plain text for the fill bench, the same bytes for the same design.

mod page;
mod sections;

pub use page::WIDTH;

use crate::assess::{Assessment, Severity, Verdict};
use crate::design::Design;
use crate::units::Units;
use crate::words;
use page::Page;

/// What the sheet's head says beside the design.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Head {
    /// Name of the design's file, if it has one.
    pub file_name: Option<String>,
    /// Fingerprint of the design's content.
    pub fingerprint: String,
}

/// The sheet of a design. A design that is not fit says DO NOT FILL with the
/// reason at the top and carries no scale readings.
pub fn render(design: &Design, a: &Assessment, units: &Units, head: &Head) -> String {
    let mut page = Page::default();
    let fit = a.verdict != Verdict::NotFit;
    if !fit {
        do_not_fill(&mut page, design, a, units);
    }
    sections::head(&mut page, design, head);
    sections::release(&mut page, fit);
    sections::fluid(&mut page, a);
    sections::before_filling(&mut page, design, a, units);
    if fit {
        sections::weighing(&mut page, design, a, units);
        sections::steps(&mut page, design, a, units);
        sections::afterwards(&mut page, design, a, units);
    }
    sections::worst_case(&mut page, design, a, units);
    sections::warnings(&mut page, design, a, units);
    sections::basis(&mut page, design, a);
    sections::care(&mut page, a);
    if fit {
        sections::label(&mut page, design, a, units);
    }
    page.finish()
}

fn do_not_fill(page: &mut Page, design: &Design, a: &Assessment, units: &Units) {
    page.rule('#');
    page.paragraph("DO NOT FILL. This design is not fit, for these reasons:");
    for finding in a
        .findings
        .iter()
        .filter(|finding| finding.severity == Severity::Error)
    {
        let said = words::finding(finding, Some(&design.chamber), units);
        page.item("  *", &format!("{}: {}", said.title, said.detail));
    }
    page.rule('#');
}

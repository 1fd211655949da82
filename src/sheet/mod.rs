//! The charge sheet: plain text for the fill bench, the same bytes for the same design.

mod bench;
mod facts;
mod gas;
mod page;
mod steps;
mod walls;

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
    facts::head(&mut page, design, head);
    facts::release(&mut page, fit);
    facts::fluid(&mut page, a);
    facts::before_filling(&mut page, design, a, units);
    walls::closure(&mut page, design, units);
    if fit {
        bench::weighing(&mut page, design, a, units);
        steps::steps(&mut page, design, a, units);
        bench::afterwards(&mut page, design, a, units);
    }
    gas::residual_gas(&mut page, design, a, units);
    facts::worst_case(&mut page, a, units);
    walls::outside(&mut page, a, units);
    walls::stretches(&mut page, a, units);
    walls::parts(&mut page, design, a, units);
    facts::warnings(&mut page, design, a, units);
    facts::basis(&mut page, design, a);
    facts::care(&mut page, a);
    if fit {
        facts::label(&mut page, design, a, units);
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

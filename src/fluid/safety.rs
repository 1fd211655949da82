//! What a fluid does to people and to itself; each figure with its source.

use serde::Deserialize;

use crate::source::{Source, Sourced};

/// Hazard data of a fluid. A gap is a real gap: not known is never "harmless".
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Safety {
    /// Refrigerant safety group.
    #[serde(default)]
    pub group: Option<Sourced<String>>,
    /// GHS hazard statement codes.
    pub statements: Sourced<Vec<String>>,
    /// Volume fraction in air.
    #[serde(default)]
    pub lower_flammable_limit: Option<Sourced<f64>>,
    #[serde(default)]
    pub upper_flammable_limit: Option<Sourced<f64>>,
    #[serde(default)]
    pub flash_point_k: Option<Sourced<f64>>,
    #[serde(default)]
    pub autoignition_k: Option<Sourced<f64>>,
    /// Eight-hour average, the lowest of the authorities found.
    #[serde(default)]
    pub exposure_limit_ppm: Option<Sourced<f64>>,
    #[serde(default)]
    pub short_term_limit_ppm: Option<Sourced<f64>>,
    #[serde(default)]
    pub immediately_dangerous_ppm: Option<Sourced<f64>>,
    /// Why consumers may not be given it.
    #[serde(default)]
    pub consumer_restriction: Option<Sourced<String>>,
    #[serde(default)]
    pub gwp_100: Option<Sourced<f64>>,
    #[serde(default)]
    pub stability: Vec<Stability>,
    #[serde(default)]
    pub highest_stable_temperature_k: Option<Sourced<f64>>,
}

/// One way in which a fluid does not stay what it is.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Stability {
    pub kind: StabilityKind,
    pub note: String,
    pub source: Source,
}

#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Deserialize)]
pub enum StabilityKind {
    SelfDecomposing,
    Oxidising,
    WaterReactive,
    Pyrophoric,
    PeroxideForming,
    Hydrolysing,
    AcidInFlame,
}

impl StabilityKind {
    /// Whether a design with such a fluid is not fit. The others hold while air, water
    /// and flame are kept away, which a sealed unit does: somebody must answer for the
    /// filling.
    pub const fn blocks(self) -> bool {
        match self {
            Self::SelfDecomposing | Self::Oxidising | Self::WaterReactive | Self::Pyrophoric => {
                true
            }
            Self::PeroxideForming | Self::Hydrolysing | Self::AcidInFlame => false,
        }
    }
}

impl Safety {
    /// GHS statements H220 to H226: flammable gas or liquid.
    pub fn is_flammable(&self) -> bool {
        self.lower_flammable_limit.is_some() && is_classed_flammable(self.codes())
    }

    /// Burns only under conditions: a flammable range without a flammable classification.
    pub fn burns_with_difficulty(&self) -> bool {
        self.lower_flammable_limit.is_some() && !self.is_flammable()
    }

    /// GHS statements of acute or chronic poisoning, or of cancer.
    pub fn is_toxic(&self) -> bool {
        is_classed_toxic(self.codes())
    }

    /// GHS statement H314: burns skin and eyes.
    pub fn is_corrosive(&self) -> bool {
        is_classed_corrosive(self.codes())
    }

    fn codes(&self) -> impl Iterator<Item = &str> {
        self.statements.value.iter().map(String::as_str)
    }
}

// The same classes for a fluid whose file is not read: by its statement codes alone.

pub(super) fn is_classed_flammable<'a>(codes: impl Iterator<Item = &'a str>) -> bool {
    has(codes, &["H220", "H221", "H224", "H225", "H226", "H206"])
}

pub(super) fn is_classed_toxic<'a>(codes: impl Iterator<Item = &'a str>) -> bool {
    has(
        codes,
        &[
            "H300", "H301", "H302", "H310", "H311", "H330", "H331", "H332", "H340", "H341", "H350",
            "H351", "H360", "H361", "H370", "H371", "H372", "H373",
        ],
    )
}

pub(super) fn is_classed_corrosive<'a>(codes: impl Iterator<Item = &'a str>) -> bool {
    has(codes, &["H314"])
}

fn has<'a>(mut codes: impl Iterator<Item = &'a str>, wanted: &[&str]) -> bool {
    codes.any(|s| wanted.iter().any(|code| s.starts_with(code)))
}

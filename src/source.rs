//! Where a figure comes from. A data file without it does not parse.

use serde::{Deserialize, Deserializer, Serialize};

/// Provenance of one figure.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
pub enum Source {
    /// A document that can be opened.
    Published(#[serde(deserialize_with = "filled")] String),
    /// From memory of a named document, to be confirmed before it governs.
    Memory(#[serde(deserialize_with = "filled")] String),
    /// Common practice, no source.
    Practice(#[serde(deserialize_with = "filled")] String),
}

/// A value with its source.
#[derive(Debug, Clone, PartialEq, Serialize, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Sourced<T> {
    pub value: T,
    pub source: Source,
}

/// A paper with an equation.
#[derive(Debug, Clone, PartialEq, Deserialize)]
#[serde(deny_unknown_fields)]
pub struct Citation {
    #[serde(deserialize_with = "filled")]
    pub authors: String,
    pub year: u16,
    #[serde(deserialize_with = "filled")]
    pub title: String,
    #[serde(deserialize_with = "filled")]
    pub publication: String,
    #[serde(default)]
    pub doi: Option<String>,
}

impl Source {
    /// The document or practice.
    pub fn text(&self) -> &str {
        match self {
            Self::Published(text) | Self::Memory(text) | Self::Practice(text) => text,
        }
    }

    /// How far the figure is confirmed, in words.
    pub const fn tag(&self) -> &'static str {
        match self {
            Self::Published(_) => "published",
            Self::Memory(_) => "from memory",
            Self::Practice(_) => "common practice",
        }
    }

    /// Whether the figure stands on a document that was seen.
    pub const fn is_confirmed(&self) -> bool {
        matches!(self, Self::Published(_))
    }
}

impl std::fmt::Display for Source {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        match self {
            Self::Published(text) => write!(f, "{text}"),
            Self::Memory(text) => write!(f, "from memory of {text}, to be confirmed"),
            Self::Practice(text) => write!(f, "common practice, no source: {text}"),
        }
    }
}

impl std::fmt::Display for Citation {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(
            f,
            "{} {}, {}, {}",
            self.authors, self.year, self.title, self.publication
        )?;
        match &self.doi {
            Some(doi) => write!(f, ", doi {doi}"),
            None => Ok(()),
        }
    }
}

fn filled<'de, D: Deserializer<'de>>(deserializer: D) -> Result<String, D::Error> {
    let text = String::deserialize(deserializer)?;
    if text.trim().is_empty() {
        return Err(serde::de::Error::custom(
            "a source must name a document or practice, not be empty",
        ));
    }
    Ok(text)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_value_without_a_source_does_not_parse() {
        let parse = |text: &str| ron::from_str::<Sourced<f64>>(text);
        assert!(parse("(value: 1.0, source: Published(\"CRC Handbook, 97th ed.\"))").is_ok());
        assert!(parse("(value: 1.0)").is_err());
        assert!(parse("(value: 1.0, source: Published(\" \"))").is_err());
        assert!(parse("(value: 1.0, source: Rumour(\"pub\"))").is_err());
    }
}

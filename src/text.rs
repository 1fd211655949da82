//! RON text read with the place of whatever is wrong: line, column, field, value.

pub mod scan;

use serde::de::DeserializeOwned;

/// What is wrong in a text, and where.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
#[error("line {line}, column {column}: {}{what}", .field.as_ref().map(|field| format!("{field}: ")).unwrap_or_default())]
pub struct TextError {
    pub line: usize,
    pub column: usize,
    pub field: Option<String>,
    pub what: String,
}

/// A user's own file, which a fluid or a material was read from.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct OwnFile {
    /// File name without its folder.
    pub name: String,
    /// Fingerprint of its text.
    pub fingerprint: String,
}

impl OwnFile {
    pub fn new(name: &str, text: &str) -> Self {
        Self {
            name: name.to_owned(),
            fingerprint: fingerprint(text),
        }
    }
}

impl TextError {
    /// What is wrong with the value at a path such as `model.critical.temperature_k`;
    /// where the text has no such value, at the nearest one around it.
    pub fn about(text: &str, path: &str, what: impl Into<String>) -> Self {
        let mut around = path;
        let offset = loop {
            if let Some((offset, _)) = find(text, around) {
                break offset;
            }
            match around.rfind(['.', '[']) {
                Some(end) => around = &around[..end],
                None => break 0,
            }
        };
        let (line, column) = line_and_column(text, offset);
        Self {
            line,
            column,
            field: Some(path.to_owned()),
            what: what.into(),
        }
    }
}

/// Reads a text.
///
/// # Errors
/// [`TextError`] names line, column, field, value and limit.
pub fn read<T: DeserializeOwned>(text: &str) -> Result<T, TextError> {
    let mut deserializer =
        ron::Deserializer::from_str(text).map_err(|error| at(text, &error, None))?;
    let value = serde_path_to_error::deserialize(&mut deserializer).map_err(|error| {
        let field = error.path().to_string();
        let field = (field != "." && !field.is_empty()).then_some(field);
        at(text, &deserializer.span_error(error.into_inner()), field)
    })?;
    deserializer
        .end()
        .map_err(|error| at(text, &deserializer.span_error(error), None))?;
    Ok(value)
}

/// Fingerprint of a text: FNV-1a, 64 bits. It tells versions apart; it is no
/// protection against forgery.
pub fn fingerprint(text: &str) -> String {
    let hash = text.bytes().fold(0xcbf2_9ce4_8422_2325_u64, |hash, byte| {
        (hash ^ u64::from(byte)).wrapping_mul(0x0100_0000_01b3)
    });
    format!(
        "{:04x}-{:04x}-{:04x}-{:04x}",
        hash >> 48,
        hash >> 32 & 0xffff,
        hash >> 16 & 0xffff,
        hash & 0xffff
    )
}

/// A name by which things are told apart: case, spaces and hyphens do not count ("R134a",
/// "r-134a").
pub fn folded(name: &str) -> String {
    name.chars()
        .filter(|c| !matches!(c, ' ' | '-' | '_'))
        .flat_map(char::to_lowercase)
        .collect()
}

fn at(text: &str, error: &ron::error::SpannedError, field: Option<String>) -> TextError {
    // An error within a value is found where the value starts.
    let position = error.span.start;
    let what = match &error.code {
        ron::Error::IntegerOutOfBounds => {
            let found = value_at(text, position.line, position.col);
            format!("{found} is not a whole number from 0 to {}", u32::MAX)
        }
        code @ (ron::Error::ExpectedFloat
        | ron::Error::ExpectedInteger
        | ron::Error::ExpectedBoolean
        | ron::Error::ExpectedString) => {
            format!(
                "{code}, not {}",
                value_at(text, position.line, position.col)
            )
        }
        code => code.to_string(),
    };
    TextError {
        line: position.line,
        column: position.col,
        field,
        what,
    }
}

/// Byte offset and text of the value at a path.
fn find<'a>(text: &'a str, path: &str) -> Option<(usize, &'a str)> {
    let mut found = None;
    scan::walk(text, |here, offset, value| {
        if here == path {
            // The outermost that has this path comes last.
            found = Some((offset, value));
        }
    });
    found
}

/// The value that stands at a line and column, as it is written there.
fn value_at(text: &str, line: usize, column: usize) -> String {
    const LONGEST: usize = 40;
    let line = text.lines().nth(line.saturating_sub(1)).unwrap_or_default();
    let ends = |c: char| matches!(c, ',' | ':' | '(' | ')' | '[' | ']') || c.is_whitespace();
    let at = line
        .char_indices()
        .nth(column.saturating_sub(1))
        .map_or(line.len(), |(at, _)| at);
    let start = line[..at]
        .char_indices()
        .rev()
        .take_while(|(_, c)| !ends(*c))
        .last()
        .map_or(at, |(start, _)| start);
    line[start..]
        .trim_start()
        .chars()
        .take_while(|c| !ends(*c))
        .take(LONGEST)
        .collect()
}

/// Line and column, both from 1, of a byte of a text.
fn line_and_column(text: &str, offset: usize) -> (usize, usize) {
    let before = &text[..offset];
    let line = before.matches('\n').count() + 1;
    let start = before.rfind('\n').map_or(0, |at| at + 1);
    (line, before[start..].chars().count() + 1)
}

//! Cells and rows of comma-separated values, and text in one line.

use std::fmt::Write as _;

/// A text as a cell of a CSV: in quotes where it holds a comma or a quote.
pub(super) fn cell(text: &str) -> String {
    let plain = one_line(text);
    if plain.contains([',', '"']) {
        format!("\"{}\"", plain.replace('"', "\"\""))
    } else {
        plain
    }
}

pub(super) fn push_row<const N: usize>(text: &mut String, cells: [String; N]) {
    writeln!(text, "{}", cells.join(",")).expect("writing to a string");
}

/// Twelve significant digits, without trailing zeros.
pub(super) fn digits(value: f64) -> String {
    let scientific = format!("{value:.11e}");
    let (mantissa, exponent) = scientific.split_once('e').unwrap_or((&scientific, "0"));
    let exponent: i32 = exponent.parse().unwrap_or(0);
    if (-5..12).contains(&exponent) {
        let decimals = (11 - exponent).max(0) as usize;
        let plain = format!("{value:.decimals$}");
        if plain.contains('.') {
            plain.trim_end_matches('0').trim_end_matches('.').to_owned()
        } else {
            plain
        }
    } else {
        let mantissa = if mantissa.contains('.') {
            mantissa.trim_end_matches('0').trim_end_matches('.')
        } else {
            mantissa
        };
        format!("{mantissa}e{exponent}")
    }
}

pub(super) fn one_line(text: &str) -> String {
    let plain = text.replace(|c: char| c.is_control() || c == '\u{a0}', " ");
    plain.split_whitespace().collect::<Vec<_>>().join(" ")
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn twelve_digits_without_padding() {
        assert_eq!(digits(298.15), "298.15");
        assert_eq!(digits(1.0 / 3.0), "0.333333333333");
        assert_eq!(digits(1.5e-9), "1.5e-9");
        assert_eq!(digits(2_257_000.0), "2257000");
        assert_eq!(digits(1.234_567_890_123_45e15), "1.23456789012e15");
        assert_eq!(digits(0.0), "0");
    }
}

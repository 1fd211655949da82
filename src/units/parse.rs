//! Typed text to an SI value.

use super::unit::{Kind, UNITS, Unit};

/// Why a typed text is not a value. Each sentence says what to type instead.
#[derive(Debug, Clone, PartialEq, thiserror::Error)]
pub enum ParseError {
    #[error("nothing typed")]
    Empty,
    #[error("“{text}” does not start with a number")]
    NoNumber { text: String },
    #[error("“{text}” is ambiguous: write {plain} for thousands, or a point for a decimal")]
    Ambiguous { text: String, plain: String },
    #[error("the unit “{unit}” is not one of {known}")]
    UnknownUnit { unit: String, known: String },
    #[error("“{unit}” is a gauge pressure: type the absolute pressure, as in 2 bar or 30 psi")]
    Gauge { unit: String },
    #[error("“{text}” is too large or too small to be a number here")]
    TooLarge { text: String },
}

/// SI value of `text`, a number with an optional unit; without one, in `default`.
///
/// `0,5` is a half; `1,000` is refused because it can be one or a thousand.
///
/// # Errors
/// [`ParseError`] names what was not understood.
pub fn parse_si(text: &str, kind: Kind, default: &Unit) -> Result<f64, ParseError> {
    let cleaned: String = text
        .trim()
        .chars()
        .map(|c| match c {
            '\u{2212}' | '\u{2013}' => '-',
            '\u{a0}' | '\u{202f}' | '\u{2009}' => ' ',
            c => c,
        })
        .collect();
    if cleaned.is_empty() {
        return Err(ParseError::Empty);
    }
    let split = number_end(&cleaned);
    let (number, unit) = cleaned.split_at(split);
    let number = number_value(number, text)?;
    let unit = unit.trim();
    let unit = if unit.is_empty() {
        default
    } else {
        find_unit(unit, kind)?
    };
    let si = unit.to_si(number);
    if si.is_finite() {
        Ok(si)
    } else {
        Err(ParseError::TooLarge {
            text: text.to_owned(),
        })
    }
}

/// Byte index where the leading number ends (digits, one sign, marks, exponent).
fn number_end(text: &str) -> usize {
    let bytes = text.as_bytes();
    let mut i = usize::from(matches!(bytes.first(), Some(b'+' | b'-')));
    while i < bytes.len() && matches!(bytes[i], b'0'..=b'9' | b'.' | b',') {
        i += 1;
    }
    let had_digits = bytes[..i].iter().any(u8::is_ascii_digit);
    if had_digits && i < bytes.len() && matches!(bytes[i], b'e' | b'E') {
        let mut j = i + 1;
        if j < bytes.len() && matches!(bytes[j], b'+' | b'-') {
            j += 1;
        }
        let digits = j;
        while j < bytes.len() && bytes[j].is_ascii_digit() {
            j += 1;
        }
        if j > digits {
            i = j;
        }
    }
    i
}

fn number_value(number: &str, whole: &str) -> Result<f64, ParseError> {
    if !number.bytes().any(|b| b.is_ascii_digit()) {
        return Err(ParseError::NoNumber {
            text: whole.trim().to_owned(),
        });
    }
    let commas = number.matches(',').count();
    let plain = match commas {
        0 => number.to_owned(),
        1 if !number.contains('.') && !looks_like_thousands(number) => number.replace(',', "."),
        _ => {
            return Err(ParseError::Ambiguous {
                text: number.to_owned(),
                plain: number.replace(',', ""),
            });
        }
    };
    plain
        .parse::<f64>()
        .ok()
        .filter(|value| value.is_finite())
        .ok_or_else(|| ParseError::NoNumber {
            text: whole.trim().to_owned(),
        })
}

/// One to three digits, a comma, exactly three digits, and not a leading zero.
fn looks_like_thousands(number: &str) -> bool {
    let unsigned = number.trim_start_matches(['+', '-']);
    let mantissa = unsigned.split(['e', 'E']).next().unwrap_or(unsigned);
    match mantissa.split_once(',') {
        Some((before, after)) => {
            after.len() == 3 && (1..=3).contains(&before.len()) && !before.starts_with('0')
        }
        None => false,
    }
}

fn find_unit(name: &str, kind: Kind) -> Result<&'static Unit, ParseError> {
    let squeezed: String = name.split_whitespace().collect::<Vec<_>>().join(" ");
    let lower = squeezed.to_lowercase();
    if kind == Kind::Pressure
        && ["barg", "bar g", "bar(g)", "psig", "psi g", "kpag", "mpag"].contains(&lower.as_str())
    {
        return Err(ParseError::Gauge { unit: squeezed });
    }
    let of_kind = || UNITS.iter().filter(move |unit| unit.kind == kind);
    let spelled = |unit: &&Unit, test: &dyn Fn(&str) -> bool| {
        test(unit.symbol) || unit.aliases.iter().any(|alias| test(alias))
    };
    if let Some(unit) = of_kind().find(|unit| spelled(unit, &|s| s == squeezed)) {
        return Ok(unit);
    }
    // Case is forgiven only where a single unit is meant: mPa and MPa are not the same.
    let loose: Vec<_> = of_kind()
        .filter(|unit| spelled(unit, &|s| s.to_lowercase() == lower))
        .collect();
    match loose.as_slice() {
        [one] if lower != "mpa" => Ok(one),
        _ => Err(ParseError::UnknownUnit {
            unit: squeezed,
            known: known_units(kind),
        }),
    }
}

fn known_units(kind: Kind) -> String {
    let symbols: Vec<_> = UNITS
        .iter()
        .filter(|unit| unit.kind == kind && !unit.symbol.is_empty())
        .map(|unit| unit.symbol)
        .collect();
    if symbols.is_empty() {
        "none (a bare number)".to_owned()
    } else {
        symbols.join(", ")
    }
}

#[cfg(test)]
mod tests {
    use super::super::unit::unit_named;
    use super::*;

    fn check(text: &str, kind: Kind, default: &str, expected: f64) {
        let value = parse_si(text, kind, unit_named(kind, default)).expect(text);
        assert!(
            (value - expected).abs() <= 1e-12 * expected.abs(),
            "{text}: {value} {expected}"
        );
    }

    #[test]
    fn units_are_understood() {
        check("2 in", Kind::Length, "mm", 0.0508);
        check(
            "150psi",
            Kind::Pressure,
            "bar",
            150.0 * 6_894.757_293_168_361,
        );
        check("70 degF", Kind::Temperature, "°C", 294.261_111_111_111_1);
        check("-5degC", Kind::Temperature, "K", 268.15);
        check("\u{2212}5", Kind::Temperature, "°C", 268.15);
        check("0,5 mL", Kind::Volume, "L", 0.5e-6);
        check("0,500", Kind::Mass, "g", 0.5e-3);
        check("1.5e-3kg", Kind::Mass, "g", 1.5e-3);
        check("1e3", Kind::Mass, "g", 1.0);
        check("40 %", Kind::Ratio, "%", 0.4);
        check("12 BAR", Kind::Pressure, "Pa", 12e5);
        check("3 MPa", Kind::Pressure, "bar", 3e6);
        check(
            "62,4 lb/ft3",
            Kind::Density,
            "kg/m³",
            62.4 * 16.018_463_373_960_14,
        );
    }

    #[test]
    fn nonsense_is_refused_with_a_word() {
        let parse = |text, kind, unit| parse_si(text, kind, unit_named(kind, unit));
        assert!(matches!(
            parse("1,000", Kind::Mass, "g"),
            Err(ParseError::Ambiguous { .. })
        ));
        assert!(matches!(
            parse("1,234.5", Kind::Mass, "g"),
            Err(ParseError::Ambiguous { .. })
        ));
        assert!(matches!(
            parse("nan", Kind::Mass, "g"),
            Err(ParseError::NoNumber { .. })
        ));
        assert!(matches!(
            parse("inf", Kind::Mass, "g"),
            Err(ParseError::NoNumber { .. })
        ));
        assert!(matches!(
            parse("1e999", Kind::Mass, "g"),
            Err(ParseError::NoNumber { .. })
        ));
        assert!(matches!(
            parse("1e308 kPa", Kind::Pressure, "Pa"),
            Err(ParseError::TooLarge { .. })
        ));
        assert!(matches!(
            parse("3 mPa", Kind::Pressure, "bar"),
            Err(ParseError::UnknownUnit { .. })
        ));
        assert!(matches!(
            parse("3 furlong", Kind::Length, "m"),
            Err(ParseError::UnknownUnit { .. })
        ));
        assert!(matches!(
            parse("2 barg", Kind::Pressure, "bar"),
            Err(ParseError::Gauge { .. })
        ));
        assert!(matches!(
            parse("1.2.3", Kind::Mass, "g"),
            Err(ParseError::NoNumber { .. })
        ));
        assert!(matches!(
            parse("  ", Kind::Mass, "g"),
            Err(ParseError::Empty)
        ));
    }
}

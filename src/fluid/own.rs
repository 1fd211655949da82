//! The user's own fluid: the same file as a built-in one's, trusted only once checked.

use serde::Deserialize;

use super::asset::{self, FluidFileError};
use super::{Fluid, rules, sound};
use crate::text::{OwnFile, TextError};

const LONGEST_NAME: usize = 80;

/// Reads a user's fluid file, called `file`, and checks every figure in it and what the
/// model says over its whole range.
///
/// # Errors
/// [`TextError`] names line, column, field and reason.
pub fn read_own(text: &str, file: &str) -> Result<Fluid, TextError> {
    let mut fluid = checked(text)?;
    if !has_check_digit(fluid.cas()) {
        return Err(wrong_cas(text, fluid.cas()));
    }
    fluid.own_file = Some(OwnFile::new(file, text));
    Ok(fluid)
}

/// All that is asked of a built-in fluid as well.
fn checked(text: &str) -> Result<Fluid, TextError> {
    format(text)?;
    let read = match asset::parse(text) {
        Err(FluidFileError::Text(error)) => return Err(error),
        read => read,
    };
    // First each figure by itself: what it breaks has a place of its own in the text.
    rules::check(text)?;
    let fluid = read.map_err(|error| {
        let what = error.to_string();
        let what = what.strip_prefix("model: ").unwrap_or(&what);
        TextError::about(text, "model", what)
    })?;
    names(text, &fluid)?;
    sound::check(&fluid).map_err(|error| TextError::about(text, "model", error.to_string()))?;
    Ok(fluid)
}

/// A newer file is refused by its version, not by the first field that is new.
fn format(text: &str) -> Result<(), TextError> {
    #[derive(Deserialize)]
    struct FormatOnly {
        format: u32,
    }
    match ron::from_str::<FormatOnly>(text) {
        Ok(FormatOnly { format }) if format != asset::FORMAT => {
            let error = FluidFileError::Format { found: format };
            Err(TextError::about(text, "format", error.to_string()))
        }
        _ => Ok(()),
    }
}

fn names(text: &str, fluid: &Fluid) -> Result<(), TextError> {
    let is_id = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || c == '-';
    if !fluid.id().chars().all(is_id) {
        let what = format!("“{}” may hold only a to z, 0 to 9 and hyphens", fluid.id());
        return Err(TextError::about(text, "id", what));
    }
    for (field, name) in super::Entry::of(fluid)
        .names()
        .chain([("formula".to_owned(), fluid.formula())])
    {
        if name.chars().count() > LONGEST_NAME || name.contains(char::is_control) {
            let what = format!("at most {LONGEST_NAME} characters in one line are allowed");
            return Err(TextError::about(text, &field, what));
        }
    }
    for code in &fluid.safety().statements.value {
        if !is_statement(code) {
            let what = format!("“{code}” is no hazard statement code such as H225 or EUH019");
            return Err(TextError::about(text, "safety.statements", what));
        }
    }
    Ok(())
}

/// H and three digits, EUH and three digits, and what may follow, as in H360FD.
fn is_statement(code: &str) -> bool {
    let rest = code.strip_prefix("EUH").or_else(|| code.strip_prefix('H'));
    rest.is_some_and(|rest| {
        rest.len() >= 3
            && rest.chars().take(3).all(|c| c.is_ascii_digit())
            && rest.chars().skip(3).all(|c| c.is_ascii_alphanumeric())
    })
}

fn wrong_cas(text: &str, cas: &str) -> TextError {
    let what = format!(
        "“{cas}” is no CAS number: two to seven digits, two digits and the check digit that belongs to them"
    );
    TextError::about(text, "cas", what)
}

/// The last digit is the sum of the others, each times its place from the right, modulo 10.
fn has_check_digit(cas: &str) -> bool {
    let parts: Vec<&str> = cas.split('-').collect();
    let [first, second, check] = parts[..] else {
        return false;
    };
    let well_formed = (2..=7).contains(&first.len())
        && second.len() == 2
        && check.len() == 1
        && cas.chars().all(|c| c.is_ascii_digit() || c == '-');
    let digits = first.chars().chain(second.chars()).rev();
    let sum: u32 = digits
        .zip(1..)
        .map(|(digit, place)| place * digit.to_digit(10).unwrap_or(0))
        .sum();
    well_formed && check.parse() == Ok(sum % 10)
}

#[cfg(test)]
mod tests {
    use super::super::catalog::FLUID_FILES;
    use super::*;

    /// What a user's file must keep to the built-in ones keep to as well.
    #[test]
    fn every_fluid_compiled_in_passes_the_check_of_a_users_own() {
        let mut wrong = Vec::new();
        for (id, text) in FLUID_FILES {
            match checked(text) {
                // Parahydrogen shares the number of normal hydrogen, told apart by a p.
                Ok(fluid) if has_check_digit(fluid.cas().trim_end_matches('p')) => {}
                Ok(fluid) => wrong.push(format!("{id}: {}", wrong_cas(text, fluid.cas()))),
                Err(error) => wrong.push(format!("{id}: {error}")),
            }
        }
        assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    }

    #[test]
    fn the_check_digit_of_a_cas_number() {
        // Water's own, and what a slip of the pen makes of it.
        for cas in ["7732-18-5", "75-09-2", "102687-65-0", "1333-74-0"] {
            assert!(has_check_digit(cas), "{cas}");
        }
        for cas in [
            "7732-18-4",
            "7723-18-5",
            "7732185",
            "7732-18-5p",
            "1333-74-0p",
            "1-18-5",
            "",
            "--",
            "7732-18-05",
            "٧٧٣٢-18-5",
        ] {
            assert!(!has_check_digit(cas), "{cas}");
        }
    }
}

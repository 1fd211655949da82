//! The user's own material: the same file as a built-in one's, trusted only once checked.

use super::curve::CurveError;
use super::material::Material;
use super::plausible;
use crate::text::{self, OwnFile, TextError, scan};

const LONGEST_NAME: usize = 80;

/// Reads a user's material file, called `file`, and checks every figure in it.
///
/// # Errors
/// [`TextError`] names line, column, field and reason.
pub fn read_own_material(text: &str, file: &str) -> Result<Material, TextError> {
    let mut material = checked(text)?;
    material.own_file = Some(OwnFile::new(file, text));
    Ok(material)
}

/// All that is asked of a built-in material as well.
fn checked(text: &str) -> Result<Material, TextError> {
    let material: Material = text::read(text).map_err(|error| curves(text).unwrap_or(error))?;
    names(text, &material)?;
    plausible::check(text, &material)?;
    Ok(material)
}

/// The first point that does not belong in its curve, at its own place: the reader names
/// the end of the whole curve.
fn curves(text: &str) -> Option<TextError> {
    const LIST: &str = "points_k_pa";
    let mut found: Option<(String, CurveError)> = None;
    let mut previous: Option<(String, f64)> = None;
    let mut count = 0;
    scan::walk(text, |path, _, value| {
        let mut refuse = |error| {
            found.get_or_insert_with(|| (path.to_owned(), error));
        };
        if path.ends_with(LIST) {
            if count < 2 {
                refuse(CurveError::TooFewPoints { count });
            }
            count = 0;
        }
        let (Some((list, point)), Ok(number)) =
            (path.split_once(LIST), value.replace('_', "").parse::<f64>())
        else {
            return;
        };
        if !(number.is_finite() && number > 0.0) {
            refuse(CurveError::NotPositive { value: number });
        }
        if !point.ends_with("[0]") {
            return;
        }
        count += 1;
        if let Some((before, previous_k)) = &previous
            && before == list
            && number <= *previous_k
        {
            refuse(CurveError::NotAscending {
                previous_k: *previous_k,
                next_k: number,
            });
        }
        previous = Some((list.to_owned(), number));
    });
    found.map(|(path, error)| TextError::about(text, &path, error.to_string()))
}

fn names(text: &str, material: &Material) -> Result<(), TextError> {
    let is_id = |c: char| c.is_ascii_lowercase() || c.is_ascii_digit() || matches!(c, '-' | '.');
    if !material.id.chars().all(is_id) {
        let what = format!(
            "“{}” may hold only a to z, 0 to 9, hyphens and points",
            material.id
        );
        return Err(TextError::about(text, "id", what));
    }
    for (field, name) in material.names() {
        if name.trim().is_empty() {
            return Err(TextError::about(text, &field, "must not be empty"));
        }
        if name.chars().count() > LONGEST_NAME || name.contains(char::is_control) {
            let what = format!("at most {LONGEST_NAME} characters in one line are allowed");
            return Err(TextError::about(text, &field, what));
        }
    }
    Ok(())
}

#[cfg(test)]
mod tests {
    use super::super::materials::MATERIAL_FILES;
    use super::*;

    /// What a user's file must keep to the built-in ones keep to as well.
    #[test]
    fn every_material_compiled_in_passes_the_check_of_a_users_own() {
        let mut wrong = Vec::new();
        for (id, text) in MATERIAL_FILES {
            if let Err(error) = checked(text) {
                wrong.push(format!("{id}: {error}"));
            }
        }
        assert!(wrong.is_empty(), "{}", wrong.join("\n"));
    }
}

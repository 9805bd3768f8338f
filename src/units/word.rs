//! One word of a unit text, with its power.

use std::ops::Range;

use super::ambiguous::ambiguous;
use super::compound::Term;
use super::error::UnitError;
use super::read::HIGHEST_POWER;
use super::slip::nearest_unit;
use super::table::find;

/// Whether a character can be part of a unit's word.
pub(crate) fn is_word(c: char) -> bool {
    c.is_alphabetic() || c.is_ascii_digit() || matches!(c, '_' | '%' | '\u{b0}' | '\u{2103}' | '\u{2109}')
}

/// The unit that a word stands for. `power` is the power behind the word and the place of both; digits at the end of
/// the word are a power too, unless the word is known with them.
pub(crate) fn term(
    word: &str,
    range: Range<usize>,
    power: Option<(i32, Range<usize>)>,
) -> Result<Term, UnitError> {
    if word.starts_with(|c: char| c.is_ascii_digit()) && word != "1" {
        return Err(UnitError::Malformed { at: range.start, why: "a number stands where a unit is wanted" });
    }
    if let Some((3, whole)) = &power {
        let cube = format!("{word}3");
        if is_refused(&cube) || (find(word).is_none() && find(&cube).is_some()) {
            return plain_term(&cube, whole.clone());
        }
    }
    match (known_part(word), power) {
        (Some(part), Some((exponent, range))) if part == word.len() => {
            let name = range.start..range.start + part;
            plain_term(word, name).map(|term| Term { exponent, range, ..term })
        }
        (Some(part), Some(_)) => {
            Err(UnitError::Malformed { at: range.start + part, why: "a unit takes one power" })
        }
        (Some(part), None) => with_digits(word, part, range),
        (None, _) => plain_term(word, range),
    }
}

/// A cubic nanometre by the SI, where gas by the normal cubic metre is meant.
const CUBIC_NANOMETRE: &str = "nm3";

fn is_refused(word: &str) -> bool {
    word == CUBIC_NANOMETRE || ambiguous(word).is_some()
}

/// The length of the longest part of the word that has a meaning or is refused for having several, when only digits
/// follow it.
fn known_part(word: &str) -> Option<usize> {
    let letters = word.trim_end_matches(|c: char| c.is_ascii_digit()).len();
    (letters..=word.len()).rev().find(|end| {
        let part = word.get(..*end).unwrap_or("");
        find(part).is_some() || is_refused(part)
    })
}

fn with_digits(word: &str, part: usize, range: Range<usize>) -> Result<Term, UnitError> {
    let (name, digits) = word.split_at_checked(part).unwrap_or((word, ""));
    let term = plain_term(name, range.start..range.start + part)?;
    if digits.is_empty() {
        return Ok(term);
    }
    let exponent = digits.parse().ok().filter(|exponent| *exponent <= HIGHEST_POWER);
    match exponent {
        Some(exponent) => Ok(Term { exponent, range, ..term }),
        None => Err(UnitError::Power { word: word.to_owned(), range }),
    }
}

/// A word with no power.
fn plain_term(word: &str, range: Range<usize>) -> Result<Term, UnitError> {
    if word == CUBIC_NANOMETRE {
        return Err(UnitError::CubicNanometre { word: word.to_owned(), range });
    }
    if let Some(found) = ambiguous(word) {
        let (choices, why) = (found.choices, found.why);
        return Err(UnitError::Ambiguous { word: word.to_owned(), range, choices, why });
    }
    match find(word) {
        Some(known) => Ok(Term { known, exponent: 1, range }),
        None => Err(UnitError::Unknown { word: word.to_owned(), range, nearest: nearest_unit(word) }),
    }
}

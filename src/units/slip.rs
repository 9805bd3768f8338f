//! The unit that a word nearly is.

use super::dimension::Dimension;
use super::prefix::{PREFIXES, Prefix};
use super::table::{FAMILIES, find};

/// Words that are no units here, with the unit that they stand for elsewhere. A compound stands in parentheses, since
/// the word may stand below a solidus.
const ELSEWHERE: &[(&str, &str)] = &[
    ("C", "degC"),
    ("\u{ba}C", "degC"),
    ("deg_C", "degC"),
    ("Celsius", "degC"),
    ("celsius", "degC"),
    ("centigrade", "degC"),
    ("\u{b0}", "degC"),
    ("F", "degF"),
    ("\u{ba}F", "degF"),
    ("deg_F", "degF"),
    ("Fahrenheit", "degF"),
    ("fahrenheit", "degF"),
    ("R", "degR"),
    ("Rankine", "degR"),
    ("rankine", "degR"),
    ("\u{b0}K", "K"),
    ("degK", "K"),
    ("\u{212a}", "K"),
    ("sec", "s"),
    ("secs", "s"),
    ("hr", "h"),
    ("hrs", "h"),
    ("mt", "t"),
    ("MT", "t"),
    ("gm", "g"),
    ("gms", "g"),
    ("cc", "cm3"),
    ("ccm", "cm3"),
    ("lbm", "lb"),
    ("kgmol", "kmol"),
    ("kgmole", "kmol"),
    ("lbmole", "lbmol"),
    ("Nm", "(N\u{b7}m)"),
    ("cP", "(mPa\u{b7}s)"),
    ("tph", "(t/h)"),
    ("kph", "(km/h)"),
    ("cfm", "(ft3/min)"),
    ("lpm", "(L/min)"),
    ("bar_g", "barg"),
    ("bar_a", "bara"),
    ("psi_g", "psig"),
    ("psi_a", "psia"),
    ("mmWG", "mmH2O"),
    ("mmWC", "mmH2O"),
    ("mmWS", "mmH2O"),
    ("inWG", "inH2O"),
    ("inWC", "inH2O"),
    ("wt%", "%"),
    ("vol%", "%"),
    ("mol%", "%"),
];

/// What is often written onto the end of another unit, with the unit that it is: `kgK`, `m2K`, `kgC`.
const WRITTEN_ON: &[(&str, &str)] = &[
    ("K", "K"),
    ("\u{b0}C", "degC"),
    ("degC", "degC"),
    ("C", "degC"),
    ("\u{b0}F", "degF"),
    ("degF", "degF"),
    ("F", "degF"),
    ("m2", "m2"),
    ("m3", "m3"),
    ("m", "m"),
    ("s", "s"),
    ("h", "h"),
];

/// Prefixes that a slip is taken to have meant; the others are rare.
const COMMON: [i32; 6] = [3, 6, -3, 9, -2, -6];

/// The unit that was probably meant by this word: one that goes by it elsewhere, one in other letter case, one whose
/// English name or plural it is, a product whose parts were run together, or one a letter or two away. What stands behind the unit's letters as a power stays.
pub(crate) fn nearest_unit(word: &str) -> Option<String> {
    let letters = word.trim_end_matches(|c: char| c.is_ascii_digit());
    let power = word.get(letters.len()..).unwrap_or("");
    let with_power = |unit: String| format!("{unit}{power}");
    elsewhere(word)
        .or_else(|| case_slip(word))
        .or_else(|| named(word))
        .or_else(|| run_together(word))
        .or_else(|| elsewhere(letters).map(with_power))
        .or_else(|| case_slip(letters).map(with_power))
        .or_else(|| letter_slip(word))
        .or_else(|| letter_slip(letters).map(with_power))
}

fn elsewhere(word: &str) -> Option<String> {
    ELSEWHERE.iter().find(|(from, _)| *from == word).map(|(_, to)| (*to).to_owned())
}

fn named(word: &str) -> Option<String> {
    let folded = word.to_lowercase();
    let singular = folded.strip_suffix('s').unwrap_or(&folded);
    let mut entries = FAMILIES.iter().flat_map(|family| family.iter());
    let by_name = entries.find(|entry| entry.name == folded || entry.name == singular);
    by_name.map(|entry| entry.symbol.to_owned()).or_else(|| {
        let singular = word.strip_suffix('s').filter(|singular| singular.chars().count() > 1)?;
        find(singular).map(|_| singular.to_owned())
    })
}

/// A word all in small letters may stand for any prefix, so the commonest is taken; else the fewest letters change.
fn case_slip(word: &str) -> Option<String> {
    let folded = word.to_lowercase();
    let mut slips = candidates().filter(|candidate| candidate.folded().eq(folded.chars()));
    let found = if word == folded {
        slips.next()
    } else {
        slips.min_by_key(|candidate| candidate.letters().zip(word.chars()).filter(|(a, b)| a != b).count())
    };
    found.map(Candidate::text)
}

/// Two units without a product sign, as the product in parentheses: it can stand below a solidus as well.
fn run_together(word: &str) -> Option<String> {
    WRITTEN_ON.iter().find_map(|(written, second)| {
        let first = word.strip_suffix(written)?;
        let known = find(first.trim_end_matches(|c: char| c.is_ascii_digit())).is_some();
        known.then(|| format!("({first} {second})"))
    })
}

fn letter_slip(word: &str) -> Option<String> {
    let length = word.chars().count();
    if length < 3 {
        return None;
    }
    let allowed = (length / 3).max(1);
    let folded: Vec<char> = word.to_lowercase().chars().collect();
    let mut letters = Vec::new();
    let mut edits_to = |candidate: &Candidate| {
        letters.clear();
        letters.extend(candidate.folded());
        // at least as many edits as the lengths differ by
        let near = letters.len().abs_diff(folded.len()) <= allowed;
        near.then(|| edits(&folded, &letters)).filter(|edits| *edits <= allowed)
    };
    candidates()
        .filter_map(|candidate| Some((edits_to(&candidate)?, candidate)))
        .filter(|(edits, candidate)| *edits + 1 < candidate.letters().count())
        .min_by_key(|(edits, _)| *edits)
        .map(|(_, candidate)| candidate.text())
}

/// A unit's symbol, with a prefix before it or an empty text.
#[derive(Debug, Clone, Copy)]
struct Candidate {
    prefix: &'static str,
    symbol: &'static str,
}

impl Candidate {
    fn text(self) -> String {
        format!("{}{}", self.prefix, self.symbol)
    }

    fn letters(self) -> impl Iterator<Item = char> {
        self.prefix.chars().chain(self.symbol.chars())
    }

    /// Its letters as small ones.
    fn folded(self) -> impl Iterator<Item = char> {
        self.letters().flat_map(char::to_lowercase)
    }
}

/// Every unit's symbol, plain and with the common prefixes that it takes, what is plain first. Nobody means a `GK`.
fn candidates() -> impl Iterator<Item = Candidate> {
    let prefixes = COMMON.iter().filter_map(|ten| PREFIXES.iter().find(|prefix| prefix.ten == *ten));
    let ways = std::iter::once(None).chain(prefixes.map(Some));
    ways.flat_map(|way: Option<&'static Prefix>| {
        let entries = FAMILIES.iter().flat_map(|family| family.iter());
        entries.flat_map(move |entry| {
            let prefix =
                match way {
                    None => Some(""),
                    Some(prefix) => prefix.symbols.first().copied().filter(|_| {
                        entry.prefixes.admit(prefix) && entry.dimension != Dimension::TEMPERATURE
                    }),
                };
            prefix
                .into_iter()
                .flat_map(|prefix| entry.spellings().map(move |symbol| Candidate { prefix, symbol }))
        })
    })
}

/// How many letters must be put in, left out, exchanged or swapped with their neighbour (each pair once) to come from
/// one word to the other.
fn edits(from: &[char], to: &[char]) -> usize {
    let mut before_last: Vec<usize> = Vec::new();
    let mut last: Vec<usize> = (0..=to.len()).collect();
    for (row, a) in from.iter().enumerate() {
        let mut current = vec![row + 1];
        for (column, b) in to.iter().enumerate() {
            let at = |line: &[usize], place: usize| line.get(place).copied().unwrap_or(usize::MAX - 1);
            let exchanged = at(&last, column) + usize::from(a != b);
            let mut best = exchanged.min(at(&last, column + 1) + 1).min(at(&current, column) + 1);
            let swapped =
                row > 0 && column > 0 && from.get(row - 1) == Some(b) && to.get(column - 1) == Some(a);
            if swapped {
                best = best.min(at(&before_last, column - 1) + 1);
            }
            current.push(best);
        }
        before_last = std::mem::replace(&mut last, current);
    }
    last.last().copied().unwrap_or(0)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::read_unit;

    #[test]
    fn case_slips_are_found_first() {
        for (written, meant) in [
            ("kw", "kW"),
            ("KG", "kg"),
            ("Kj", "kJ"),
            ("KWH", "kWh"),
            ("mpa", "MPa"),
            ("PSI", "psi"),
            ("BTU", "Btu"),
            ("NM3", "Nm3"),
            ("FT3", "ft3"),
            ("degc", "degC"),
        ] {
            assert_eq!(nearest_unit(written).as_deref(), Some(meant), "{written}");
        }
    }

    #[test]
    fn names_and_habits_find_their_symbol() {
        for (written, meant) in [
            ("C", "degC"),
            ("F", "degF"),
            ("hr", "h"),
            ("hours", "h"),
            ("Kelvin", "K"),
            ("tonnes", "t"),
            ("lbs", "lb"),
            ("Nm", "(N\u{b7}m)"),
            ("cc", "cm3"),
        ] {
            assert_eq!(nearest_unit(written).as_deref(), Some(meant), "{written}");
        }
    }

    #[test]
    fn products_run_together_are_parted() {
        for (written, meant) in [
            ("kgK", "(kg K)"),
            ("gK", "(g K)"),
            ("m2K", "(m2 K)"),
            ("molK", "(mol K)"),
            ("kgC", "(kg degC)"),
            ("kg°C", "(kg degC)"),
            ("hm2", "(h m2)"),
        ] {
            assert_eq!(nearest_unit(written).as_deref(), Some(meant), "{written}");
            assert!(read_unit(&format!("W/{meant}")).is_ok());
        }
    }

    #[test]
    fn a_wrong_letter_finds_its_unit_and_a_stranger_none() {
        assert_eq!(nearest_unit("barq").as_deref(), Some("bar"));
        assert_eq!(nearest_unit("kmlo").as_deref(), Some("kmol"));
        assert_eq!(nearest_unit("degD").as_deref(), Some("degC"));
        assert_eq!(nearest_unit("furnace"), None);
        assert_eq!(nearest_unit("x"), None);
        assert_eq!(nearest_unit(""), None);
    }

    #[test]
    fn edits_count_insertions_exchanges_and_swaps() {
        let count = |a: &str, b: &str| edits(&a.chars().collect::<Vec<_>>(), &b.chars().collect::<Vec<_>>());
        assert_eq!(count("kmol", "kmol"), 0);
        assert_eq!(count("kml", "kmol"), 1);
        assert_eq!(count("kmlo", "kmol"), 1);
        assert_eq!(count("", "kmol"), 4);
    }

    #[test]
    fn whatever_is_offered_can_be_written() {
        for (_, offered) in ELSEWHERE {
            assert!(read_unit(offered).is_ok(), "{offered}");
        }
        for offered in candidates().map(Candidate::text) {
            assert!(read_unit(&offered).is_ok(), "{offered}");
        }
    }
}

//! The list of units for a reader.

use super::ambiguous::ambiguous;
use super::prefix::{PREFIXES, Prefixes};
use super::table::{Entry, FAMILIES, find};
use super::unit::Zero;

/// One unit of the list.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Row {
    /// The symbol.
    pub unit: &'static str,
    /// Other spellings of it.
    pub also: &'static [&'static str],
    /// The English name.
    pub name: &'static str,
    /// The name of its dimension.
    pub dimension: &'static str,
    /// The way from a value in it to the coherent SI unit, with all digits: `0.45359237 kg`, or with the zero of its
    /// scale `(x + 273.15) K`.
    pub factor: String,
    /// Where its definition stands.
    pub standard: &'static str,
    /// The prefixes that it takes: "all", none, or their symbols such as `k M G`.
    pub prefixes: String,
}

/// Every unit, by dimension, the dimensions that a thermal sheet uses most first.
pub fn listing() -> Vec<Row> {
    rows(|_| true)
}

/// The units that a word finds: by symbol (with or without a prefix), by a part of the name, by dimension; for a name
/// of several meanings, those that it can stand for.
pub fn listing_matching(word: &str) -> Vec<Row> {
    let folded = word.trim().to_lowercase();
    if folded.is_empty() {
        return listing();
    }
    if let Some(found) = ambiguous(word.trim()) {
        return rows(|entry| found.choices.iter().any(|choice| is_unit(choice, entry)));
    }
    if find(word.trim()).is_some() {
        return rows(|entry| is_unit(word.trim(), entry));
    }
    rows(|entry| {
        entry.spellings().any(|spelling| spelling.to_lowercase() == folded)
            || entry.name.to_lowercase().contains(&folded)
            || entry.dimension.name().is_some_and(|name| name.contains(&folded))
    })
}

fn is_unit(word: &str, entry: &Entry) -> bool {
    find(word).is_some_and(|known| known.entry.symbol == entry.symbol)
}

fn rows(wanted: impl Fn(&Entry) -> bool) -> Vec<Row> {
    let mut entries: Vec<_> =
        FAMILIES.iter().flat_map(|family| family.iter()).filter(|entry| wanted(entry)).collect();
    entries.sort_by_key(|entry| entry.dimension.place());
    entries.into_iter().map(row).collect()
}

fn row(entry: &'static Entry) -> Row {
    Row {
        unit: entry.symbol,
        also: entry.aliases,
        name: entry.name,
        dimension: entry.dimension.name().unwrap_or(""),
        factor: factor_text(entry),
        standard: entry.standard,
        prefixes: prefixes_text(entry.prefixes),
    }
}

fn prefixes_text(prefixes: Prefixes) -> String {
    if prefixes == Prefixes::All {
        return "all".to_owned();
    }
    let admitted = PREFIXES.iter().rev().filter(|prefix| prefixes.admit(prefix));
    admitted.filter_map(|prefix| prefix.symbols.first().copied()).collect::<Vec<_>>().join(" ")
}

fn factor_text(entry: &Entry) -> String {
    let factor = entry.factor.value();
    let si = entry.dimension;
    match entry.zero {
        Zero::None if si.is_one() => format!("{factor}"),
        Zero::None => format!("{factor} {si}"),
        Zero::Kelvin(zero) if factor == 1.0 => format!("(x + {zero}) {si}"),
        Zero::Kelvin(zero) => format!("(x + {zero}) * {factor} {si}"),
        Zero::Atmosphere => format!("x * {factor} {si} + site atmosphere"),
    }
}

//! The data that the answers rest on.

use super::page::{BODY, Page};
use super::style::Ink;
use crate::report::model::{DataRow, LegRow, Report};
use crate::report::number::shown_number;
use crate::units::{Dimension, Unit};

pub(super) fn write_data(page: &mut Page, report: &Report) {
    if report.data.is_empty() {
        return;
    }
    page.section("Data that the answers rest on");
    for (index, row) in report.data.iter().enumerate() {
        write_datum(page, row, index);
    }
}

/// The number of the datum that a leg rests on, with a blank before it; empty where it is not listed.
pub(super) fn datum_mark(leg: &LegRow, data: &[DataRow]) -> String {
    let same = |row: &DataRow| row.species == leg.species && row.written == leg.datum;
    let here = data.iter().position(|row| same(row) && row.phase == leg.phase);
    here.or_else(|| data.iter().position(same)).map_or_else(String::new, |index| format!(" [D{}]", index + 1))
}

fn write_datum(page: &mut Page, row: &DataRow, index: usize) {
    let subject = format!("{} {}", row.species, row.phase);
    let what = if row.written.starts_with(row.what) { String::new() } else { format!("{}, ", row.what) };
    page.item(&format!("[D{}]", index + 1), &format!("{}: {what}{}", subject.trim(), row.written));
    let facts = [
        row.valid_kelvin.map(|range| format!("valid {}", kelvins(range))),
        row.used_kelvin.map(|range| format!("used {}", kelvins(range))),
        row.interval.as_ref().filter(|text| !row.written.contains(*text)).cloned(),
        row.spread.as_ref().map(|spread| format!("spread {spread}")),
        Some(format!("source: {}", row.source.as_deref().unwrap_or("none given"))),
    ];
    page.text(BODY, &facts.into_iter().flatten().collect::<Vec<_>>().join("; "));
    if row.extrapolated {
        let because = row.because.as_ref().map(|why| format!(", allowed because {why}")).unwrap_or_default();
        page.inked(BODY, Ink::Warning, &format!("Extrapolated: it is used outside its range{because}."));
    }
}

fn kelvins((from, to): (f64, f64)) -> String {
    let unit = Unit::coherent(Dimension::TEMPERATURE);
    let shown = |value| shown_number(value, &unit);
    if from == to { format!("at {} K", shown(from)) } else { format!("{} K to {} K", shown(from), shown(to)) }
}

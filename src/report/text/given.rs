//! What is given: the site, inputs and assumptions, and the values derived from them.

use super::grid::Grid;
use super::page::Page;
use crate::report::model::{InputRow, Item, Report, SiteRow};
use crate::report::number::{exact, shown, shown_uncertainty, shown_unit};

const NO_SOURCE: &str = "no source given";

/// A line for each: number, role, name, value with its interval, standard uncertainty or `exact`, source.
pub(super) fn write_inputs(page: &mut Page, report: &Report, items: impl Iterator<Item = Item>) {
    let mut grid = Grid::new();
    for item in items {
        let cells = match item {
            Item::Site => Some(site_cells(&report.site)),
            Item::Input(index) => report.inputs.get(index).map(input_cells),
            _ => None,
        };
        if let Some(cells) = cells {
            grid.row(std::iter::once(page.tick()).chain(cells));
        }
    }
    page.grid(0, grid);
}

fn site_cells(site: &SiteRow) -> [String; 5] {
    let atmosphere = &site.atmosphere;
    let value = format!("{} {}", exact(atmosphere.value), shown_unit(&atmosphere.unit, atmosphere.pressure));
    let (role, name, unsaid) = match site.written {
        Some(_) => ("site", "atmosphere", NO_SOURCE),
        None => ("assume", "site atmosphere", "standard atmosphere, assumed"),
    };
    let source = site.source.as_deref().unwrap_or(unsaid);
    [role.into(), name.into(), value, "exact".into(), source.into()]
}

fn input_cells(row: &InputRow) -> [String; 5] {
    let written = if row.written.is_empty() { shown(&row.value) } else { as_written(row) };
    let value = match &row.interval {
        Some(interval) if !written.contains(interval.as_str()) => format!("{written} {interval}"),
        _ => written,
    };
    let uncertainty =
        row.standard_uncertainty_shown.map(|u| format!("u = {}", shown_uncertainty(u, &row.value.unit)));
    let source = row.source.as_deref().unwrap_or(NO_SOURCE);
    [row.role.into(), row.name.clone(), value, uncertainty.unwrap_or_else(|| "exact".into()), source.into()]
}

/// The value as written; behind a pressure stands `abs` or `gauge`, behind a value that is shown in another unit than it
/// is written in, that value.
fn as_written(row: &InputRow) -> String {
    let symbol = row.value.unit.text.as_str();
    let unit = shown_unit(&row.value.unit, row.value.pressure);
    match row.written.strip_suffix(symbol) {
        Some(number) => format!("{number}{unit}"),
        None if unit.is_empty() => row.written.clone(),
        None => format!("{} = {}", row.written, shown(&row.value)),
    }
}

/// Formula, numbers put in, value.
pub(super) fn write_derived(page: &mut Page, row: &InputRow) {
    let mark = page.tick();
    let value = shown(&row.value);
    page.equation(&mark, &row.name, &worked(&row.written, row.put_in.as_deref(), &value));
    if let Some(source) = &row.source {
        page.text(super::page::BODY, &format!("source: {source}"));
    }
}

/// The sides of an equation, none twice running.
pub(super) fn worked<'a>(formula: &'a str, put_in: Option<&'a str>, value: &'a str) -> Vec<&'a str> {
    let mut sides = vec![formula];
    sides.extend(put_in.filter(|text| *text != formula));
    sides.push(value);
    sides.dedup();
    sides
}

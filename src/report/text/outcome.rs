//! Duties, results, verdicts and tables.

use super::given::worked;
use super::grid::Grid;
use super::opening::found;
use super::page::{BODY, Page};
use super::style::Ink;
use crate::diagnostic::and_list;
use crate::report::model::{DutyRow, RequirementRow, ResultRow, TableColumn, TableRows};
use crate::report::number::{shown, shown_apart, shown_column, shown_unit};

pub(super) fn write_duty(page: &mut Page, row: &DutyRow) {
    let mark = page.tick();
    page.item(&mark, &format!("{}: {}", row.name, row.written));
    let (useful, supplied) = (shown(&row.useful), shown(&row.supplied));
    page.equation("", "useful  ", &worked(&row.put_in, None, &useful));
    let over = row
        .efficiency
        .as_ref()
        .map_or_else(|| useful.clone(), |efficiency| format!("{useful} / {}", bracketed(efficiency)));
    page.equation("", "supplied", &worked(&over, None, &supplied));
}

pub(super) fn write_result(page: &mut Page, row: &ResultRow) {
    let mark = page.tick();
    page.equation(&mark, &row.name, &worked(&row.formula, Some(&row.put_in), &shown(&row.value)));
}

pub(super) fn write_requirement(page: &mut Page, row: &RequirementRow) {
    let mark = page.tick();
    let word = if row.met { "met" } else { "not met" };
    page.inked_item(&mark, Ink::of_verdict(row.met), word, &row.written);
    let limits: Vec<_> = row.limits.iter().map(|limit| shown_apart(&row.found, limit).1).collect();
    let limits = match limits.as_slice() {
        [] => String::new(),
        [limit] => format!("; limit {limit}"),
        limits => format!("; limits {}", and_list(limits)),
    };
    page.text(BODY, &format!("found {}{limits}", found(row)));
    if let Some(because) = &row.because {
        page.text(BODY, &format!("required because: {because}"));
    }
}

pub(super) fn write_table(page: &mut Page, table: &TableRows) {
    let mark = page.tick();
    page.item(&mark, &table.title);
    let texts: Vec<_> =
        table.columns.iter().enumerate().map(|(at, column)| cells(table, at, column)).collect();
    let mut grid = Grid::new().head(table.columns.iter().map(head)).right(0..table.columns.len());
    for row in 0..table.rows.len() {
        grid.row(texts.iter().map(|column| column.get(row).cloned().unwrap_or_default()));
    }
    page.grid(BODY, grid);
}

fn cells(table: &TableRows, at: usize, column: &TableColumn) -> Vec<String> {
    let values: Vec<_> = table.rows.iter().map(|row| row.get(at).copied().flatten()).collect();
    let texts = shown_column(&values, &column.unit).into_iter();
    texts.map(|text| text.unwrap_or_else(|| "refused".to_owned())).collect()
}

fn head(column: &TableColumn) -> String {
    format!("{}\n{}", column.name, shown_unit(&column.unit, column.pressure))
}

/// A divisor in parentheses where it is more than one number with its unit.
fn bracketed(text: &str) -> String {
    if text.contains([' ']) && text.contains(['+', '-', '*', '/']) {
        format!("({text})")
    } else {
        text.to_owned()
    }
}

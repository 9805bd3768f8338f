//! States, and the steps between them.

use textwrap::core::display_width;

use super::given::worked;
use super::grid::Grid;
use super::ground::datum_mark;
use super::page::{BODY, Page};
use crate::report::model::{DataRow, LegRow, StateRow, StepRow};
use crate::report::number::{shown, shown_column, shown_number, shown_share};
use crate::units::{Dimension, Unit, engineering_unit};

pub(super) fn write_state(page: &mut Page, row: &StateRow) {
    let mark = page.tick();
    page.item(&mark, &format!("{} = {}", row.name, row.written));
    page.text(BODY, &format!("{}; {}", conditions(row), amounts(row)));
}

fn conditions(row: &StateRow) -> String {
    let mut temperature = shown(&row.temperature);
    if row.temperature.unit.text != "K" {
        temperature = format!("{temperature} ({})", kelvin(row.temperature.si));
    }
    let settled = |settled: bool| if settled { ", settled by a step" } else { "" };
    let pressure = shown(&row.pressure);
    let by_step = (settled(row.temperature_settled), settled(row.pressure_settled));
    format!("{temperature}{}; {pressure}{}", by_step.0, by_step.1)
}

fn amounts(row: &StateRow) -> String {
    let by = if row.phases_by_mole { "by mole" } else { "by mass" };
    let share = |(phase, share): &(String, f64)| format!("{phase} {}", shown_share(*share));
    let phases: Vec<_> = row.phases.iter().map(share).collect();
    let amount = row.amount.as_ref().map(|amount| format!(" ({})", shown(amount))).unwrap_or_default();
    format!("{}{amount}; {} {by}", shown(&row.mass), phases.join(", "))
}

fn kelvin(value: f64) -> String {
    let unit = Unit::coherent(Dimension::TEMPERATURE);
    format!("{} K", shown_number(value, &unit))
}

pub(super) fn write_step(page: &mut Page, row: &StepRow, data: &[DataRow]) {
    let mark = page.tick();
    page.item(&mark, &format!("{}: {}", row.name, row.written));
    page.text(BODY, &path(row));
    write_legs(page, row, &mark, data);
    write_sides(page, row);
    for settled in &row.settles {
        page.text(BODY, &format!("It settles {settled}."));
    }
    for note in &row.notes {
        page.text(BODY, note);
    }
}

fn path(row: &StepRow) -> String {
    match row.path {
        Some(path) => format!("Path: {path}."),
        None => "No path is given: ΔH and ΔU follow from the two states, heat and work do not.".to_owned(),
    }
}

/// A line for each leg, the datum that it rests on below it.
fn write_legs(page: &mut Page, row: &StepRow, mark: &str, data: &[DataRow]) {
    let column = BODY + mark.len() + 4;
    for (line, leg) in leg_lines(row, mark).iter().zip(&row.legs) {
        let fits = BODY + display_width(line) <= page.columns();
        let folded = || line.split_whitespace().collect::<Vec<_>>().join(" ");
        page.text(BODY, &if fits { line.clone() } else { folded() });
        if !leg.datum.is_empty() {
            let by = format!("by {}{}", in_brief(&leg.datum), datum_mark(leg, data));
            page.hanging(&" ".repeat(column), column + 3, &by);
        }
    }
}

/// Number, kind, matter, temperatures and enthalpy change of each leg, aligned.
fn leg_lines(row: &StepRow, mark: &str) -> Vec<String> {
    let unit = leg_unit(row);
    let values: Vec<_> = row.legs.iter().map(|leg| Some(unit.from_si(leg.enthalpy_change, 0.0))).collect();
    let mut grid = Grid::new().right([4]);
    for ((index, leg), value) in row.legs.iter().enumerate().zip(shown_column(&values, &unit)) {
        let number = mark.replace(']', &format!(".{}]", index + 1));
        let matter = format!("{} {}", leg.species, leg.phase);
        let value = format!("{} {}", value.unwrap_or_default(), unit.text);
        grid.row([number, leg.kind.as_str().into(), matter.trim().into(), temperatures(leg), value]);
    }
    grid.lines(usize::from(u16::MAX))
}

fn temperatures(leg: &LegRow) -> String {
    if leg.from_kelvin == leg.to_kelvin {
        return format!("at {}", kelvin(leg.from_kelvin));
    }
    format!("{} to {}", kelvin(leg.from_kelvin), kelvin(leg.to_kelvin))
}

/// The unit for the largest leg; ΔH may be next to nothing where legs cancel.
fn leg_unit(row: &StepRow) -> Unit {
    let dimension = if row.flow { Dimension::POWER } else { Dimension::ENERGY };
    let largest = row.legs.iter().map(|leg| leg.enthalpy_change.abs()).fold(0.0, f64::max);
    engineering_unit(dimension, largest)
}

/// Each value with how it follows.
fn write_sides(page: &mut Page, row: &StepRow) {
    let mut grid = Grid::new();
    for side in &row.sides {
        let value = shown(&side.value);
        let sides = worked(&side.formula, None, &value).into_iter().filter(|text| !text.is_empty());
        let text = sides.map(|text| format!("= {text}")).collect::<Vec<_>>();
        grid.row(std::iter::once(side.symbol.to_owned()).chain(text));
    }
    page.grid(BODY, grid);
}

/// A datum without its coefficients or rows, which stand among the data: `cp nasa9 { ... } for 200 K to 1000 K`.
fn in_brief(datum: &str) -> String {
    match (datum.find('{'), datum.rfind('}')) {
        (Some(open), Some(close)) if close > open => {
            format!("{}{{ ... }}{}", &datum[..open], &datum[close + 1..])
        }
        _ => datum.to_owned(),
    }
}

//! The passes in their order.

use super::fault::{circle, explain, explain_row};
use super::outputs::required;
use super::warn::{densities_beyond, warnings};
use crate::check::check_sheet;
use crate::diagnostic::{Code, Diagnostic};
use crate::eval::{self, Frame};
use crate::library::Loader;
use crate::plan::{Lowered, lower};
use crate::program::{Node, Program, Quantity};
use crate::report::{Report, TableValues, WorkedSheet, find_cautions, gather};
use crate::source::Sources;
use crate::span::{FileId, Span};
use crate::study::sweep;
use crate::units::Zero;
use std::collections::BTreeSet;

/// What came of a sheet.
#[derive(Debug)]
pub struct Worked {
    /// The files that were read.
    pub sources: Sources,
    /// Everything that was found, in the order of the sheet.
    pub diagnostics: Vec<Diagnostic>,
    /// The report, where the sheet was worked and nothing is wrong.
    pub report: Option<Report>,
}

/// Reads and checks only.
pub fn check(name: &str, identity: &str, text: &str, loader: &dyn Loader) -> Worked {
    let (sources, diagnostics, _) = checked(name, identity, text, loader);
    Worked { sources, diagnostics, report: None }
}

fn checked(
    name: &str,
    identity: &str,
    text: &str,
    loader: &dyn Loader,
) -> (Sources, Vec<Diagnostic>, Option<(Program, Lowered)>) {
    let mut sources = Sources::new();
    let file = sources.add(name, text);
    let checked = check_sheet(&mut sources, file, identity, loader);
    let Some(program) = checked.program else { return (sources, checked.diagnostics, None) };
    match lower(&program) {
        Ok(lowered) => (sources, checked.diagnostics, Some((program, lowered))),
        Err((step, state)) => {
            let mut diagnostics = checked.diagnostics;
            diagnostics.push(circle(&program, step, state));
            in_order(&mut diagnostics);
            (sources, diagnostics, None)
        }
    }
}

/// Reads, checks and works a sheet. `report` is there when nothing is wrong.
pub fn run(name: &str, identity: &str, text: &str, loader: &dyn Loader) -> Worked {
    let (sources, mut diagnostics, known) = checked(name, identity, text, loader);
    let Some((program, lowered)) = known else {
        return Worked { sources, diagnostics, report: None };
    };
    let frame = evaluated(&program, &lowered, &mut diagnostics);
    let tables = tables(&program, &lowered, &frame, &sources, &mut diagnostics);
    if diagnostics.iter().any(Diagnostic::is_error) {
        in_order(&mut diagnostics);
        return Worked { sources, diagnostics, report: None };
    }
    let Lowered { plan, map } = &lowered;
    let mut sheet = WorkedSheet {
        sources: &sources,
        program: &program,
        plan,
        map,
        frame: &frame,
        tables: &tables,
        findings: &[],
        file: name,
    };
    diagnostics.extend(densities_beyond(&sheet));
    if diagnostics.iter().any(Diagnostic::is_error) {
        in_order(&mut diagnostics);
        return Worked { sources, diagnostics, report: None };
    }
    diagnostics.extend(warnings(&sheet));
    diagnostics.extend(find_cautions(&sheet));
    in_order(&mut diagnostics);
    sheet.findings = &diagnostics;
    let report = gather(&sheet);
    Worked { sources, diagnostics, report: Some(report) }
}

/// The single run; what fails on the way to what the sheet asks is reported.
fn evaluated(program: &Program, lowered: &Lowered, diagnostics: &mut Vec<Diagnostic>) -> Frame<1> {
    let mut frame = Frame::<1>::new(&lowered.plan);
    eval::run(&lowered.plan, &mut frame);
    let needed = lowered.plan.needed(&required(program, &lowered.map));
    let mut told = BTreeSet::new();
    for failure in frame.failures.iter().filter(|failure| needed.get(failure.op) == Some(&true)) {
        let found = explain(program, lowered, failure);
        if told.insert(what_it_tells(&found)) {
            diagnostics.push(found);
        }
    }
    diagnostics.extend(
        program
            .quantities
            .iter()
            .zip(&lowered.map.quantities)
            .filter_map(|(quantity, slot)| below_zero(quantity, frame.value(*slot))),
    );
    frame
}

/// A value that is shown as a reading, and lies where no reading is: a difference may have been meant.
fn below_zero(quantity: &Quantity, si: f64) -> Option<Diagnostic> {
    let unit = quantity.display.as_ref().filter(|unit| unit.zero != Zero::None && si < 0.0)?;
    if matches!(quantity.value.node, Node::Quantity(_)) {
        return None; // told where the name has its value
    }
    let (code, message, plain) = match unit.zero {
        Zero::Atmosphere => (Code::PressureNotPositive, "an absolute pressure below zero", "bar"),
        Zero::None | Zero::Kelvin(_) => (Code::BelowAbsoluteZero, "a temperature below absolute zero", "K"),
    };
    Some(
        Diagnostic::new(code, format!("`{}` is shown in `{}`, and is {message}", quantity.name, unit.text))
            .label(quantity.value.span, "worked here")
            .help(match quantity.role.is_input() {
                true => "check the number, its sign and its unit".to_owned(),
                false => format!("if a difference was meant, write `in {plain}`"),
            }),
    )
}

/// What tells a finding from the others: a step between three pressures has one mistake, not two.
fn what_it_tells(found: &Diagnostic) -> (Option<Span>, Code, String) {
    let once = matches!(found.code, Code::PressuresDiffer | Code::TemperaturesDiffer);
    (found.place(), found.code, if once { String::new() } else { found.message.clone() })
}

fn tables(
    program: &Program,
    lowered: &Lowered,
    frame: &Frame<1>,
    sources: &Sources,
    diagnostics: &mut Vec<Diagnostic>,
) -> Vec<TableValues> {
    if diagnostics.iter().any(Diagnostic::is_error) {
        return Vec::new();
    }
    let mut tables = Vec::new();
    for (table, slots) in program.tables.iter().zip(&lowered.map.tables) {
        match sweep(&lowered.plan, frame, slots) {
            Err(rows) => diagnostics.push(
                Diagnostic::new(
                    Code::TableSteps,
                    format!("a table of {rows:.0} rows; from 1 to 1000000 are worked"),
                )
                .label(table.by.span, "the step")
                .label(table.span, "in this table")
                .help("check the ends and the step"),
            ),
            Ok(worked) => {
                diagnostics.extend(explain_row(program, lowered, table, &worked, sources));
                tables.push(
                    worked
                        .rows
                        .into_iter()
                        .map(|row| {
                            let refused = row.iter().any(|value| !value.is_finite());
                            row.into_iter()
                                .enumerate()
                                .map(|(at, value)| (at == 0 || !refused).then_some(value))
                                .collect()
                        })
                        .collect(),
                );
            }
        }
    }
    tables
}

fn in_order(diagnostics: &mut [Diagnostic]) {
    diagnostics.sort_by_key(|found| found.place().map_or((FileId(0), 0), |span| (span.file, span.start)));
}

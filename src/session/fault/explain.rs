//! From a failure to who tells it.

use super::teller::Teller;
use crate::diagnostic::{Code, Diagnostic, count};
use crate::eval::{Failure, Fault};
use crate::plan::{Lowered, Origin, OriginKind};
use crate::program::{Program, StateId, StepId, Table};
use crate::report::number::significant;
use crate::source::Sources;
use crate::study::Sweep;
use crate::units::engineering_unit;

/// Unknowns that wait for each other.
pub(in crate::session) fn circle(program: &Program, step: StepId, state: StateId) -> Diagnostic {
    let (step_name, span) =
        program.steps.get(step.0).map_or(("", Default::default()), |step| (step.name.as_str(), step.span));
    let Some(state) = program.states.get(state.0) else {
        return Diagnostic::new(Code::UnknownLoop, "unknowns wait for each other");
    };
    let place = match (&state.temperature, &state.pressure) {
        (crate::program::Condition::Unknown(span), _) | (_, crate::program::Condition::Unknown(span)) => {
            *span
        }
        _ => state.span,
    };
    Diagnostic::new(
        Code::UnknownLoop,
        format!("the unknown of `{}` depends on itself, by way of the step `{step_name}`", state.name),
    )
    .label(place, "unknown here")
    .label(span, "this step would settle it, and needs it first")
    .help("let the heat, work, losses and amounts of the step depend on known values only; a volume is counted at the temperature and pressure of its own state")
}

/// A failure as a diagnostic.
pub(in crate::session) fn explain(program: &Program, lowered: &Lowered, failure: &Failure) -> Diagnostic {
    let nowhere = Origin { span: Default::default(), kind: OriginKind::Expression };
    let index = lowered.plan.origins.get(failure.op).copied().unwrap_or(u32::MAX);
    let origin = lowered.map.origins.get(index as usize).unwrap_or(&nowhere);
    let teller = Teller { program, origin };
    match failure.fault {
        Fault::Locate { error, kelvin, pascal } => teller.locate(error, kelvin, pascal),
        Fault::Settle(error) => teller.settle(error),
        Fault::Check { check, a, b } => teller.check(check, a, b),
        other => teller.arithmetic(other),
    }
}

/// The rows of a table that are refused, as one warning.
pub(in crate::session) fn explain_row(
    program: &Program,
    lowered: &Lowered,
    table: &Table,
    sweep: &Sweep,
    sources: &Sources,
) -> Option<Diagnostic> {
    let first = sweep.refused.first()?;
    let why = explain(program, lowered, &first.failure);
    let variable = program.quantities.get(table.over.0)?;
    let unit =
        variable.display.clone().unwrap_or_else(|| engineering_unit(variable.value.dimension, first.at));
    let at = format!("{} {}", significant(unit.from_si(first.at, program.site.atmosphere), 8), unit.text);
    let line = why.place().map_or(0, |span| sources.line_column(span.file, span.start).0);
    let rows = count(sweep.refused.len(), "row");
    let message = format!(
        "{rows} of the table \"{}\" refused; the first at {} = {at}, by line {line}: {} ({})",
        table.title, variable.name, why.message, why.code
    );
    let mut found = Diagnostic::new(Code::TableRowRefused, message).label(table.span, "in this table");
    if let Some(help) = why.help {
        found = found.help(help);
    }
    Some(found)
}

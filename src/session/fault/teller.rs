//! Who tells a failure.

use crate::diagnostic::{Code, Diagnostic};
use crate::plan::{Origin, OriginKind};
use crate::program::{Condition, Program, Species};
use crate::report::number::significant;
use crate::units::{Dimension, engineering_unit};

/// Who tells a failure: what the operation was made for.
pub(super) struct Teller<'a> {
    pub(super) program: &'a Program,
    pub(super) origin: &'a Origin,
}

impl Teller<'_> {
    pub(super) fn found(&self, code: Code, message: String, label: impl Into<String>) -> Diagnostic {
        Diagnostic::new(code, message).label(self.origin.span, label)
    }

    /// The name of the state, and the species of the constituent, that the operation was made for.
    pub(super) fn state(&self) -> (&str, Option<&Species>) {
        let (id, at) = match &self.origin.kind {
            OriginKind::State(id, at) => (*id, *at),
            OriginKind::Settle(_, id, _) => (*id, 0),
            _ => return ("", None),
        };
        let Some(state) = self.program.states.get(id.0) else { return ("", None) };
        let species = state.constituents.get(at).and_then(|part| self.program.species.get(part.species.0));
        (&state.name, species)
    }

    /// Whether the state at fault keeps a share of a phase that another state says.
    pub(super) fn inherits_share(&self) -> bool {
        let OriginKind::State(id, _) = &self.origin.kind else { return false };
        let state = self.program.states.get(id.0);
        state.is_some_and(|state| state.share.is_none() && matches!(state.temperature, Condition::Of(_)))
    }

    pub(super) fn step(&self) -> &str {
        let id = match &self.origin.kind {
            OriginKind::Step(id) | OriginKind::Conserved(id, _) | OriginKind::Settle(id, ..) => id,
            _ => return "",
        };
        self.program.steps.get(id.0).map_or("", |step| step.name.as_str())
    }

    /// What the duty takes, W or J, in an engineer's unit.
    pub(super) fn duty_value(&self, si: f64) -> String {
        let dimension = match &self.origin.kind {
            OriginKind::Duty(id) => self.program.duties.get(id.0).map(|duty| match duty.over {
                Some(_) => Dimension::POWER,
                None => duty.value.dimension,
            }),
            _ => None,
        };
        let unit = engineering_unit(dimension.unwrap_or(Dimension::ENERGY), si);
        format!("{} {}", significant(unit.from_si(si, 0.0), 6), unit.text)
    }

    /// In what a step's balance is counted: species by mass, elements by amount of substance.
    pub(super) fn conserved_unit(&self, what: &str) -> &'static str {
        let OriginKind::Conserved(id, _) = &self.origin.kind else { return "" };
        let flow = self.program.steps.get(id.0).is_some_and(|step| step.flow);
        let by_mass = self.program.species.iter().any(|species| species.name == what);
        match (by_mass, flow) {
            (true, false) => "kg",
            (true, true) => "kg/s",
            (false, false) => "mol",
            (false, true) => "mol/s",
        }
    }
}

/// A temperature in both scales: `692.7 K (419.55 degC)`.
pub(super) fn temperature(kelvin: f64) -> String {
    format!("{} K ({} degC)", significant(kelvin, 6), significant(kelvin - 273.15, 5))
}

//! Unknowns: which step settles which, by which law.

use super::checker::Checker;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Condition, Heat, Law, Path, Settles, StateId, StepId, Unknown};
use crate::span::Span;
use std::collections::BTreeMap;

impl Checker<'_> {
    /// Gives each unknown its step; reports unknowns without one, with two, and steps that state too much.
    pub(super) fn settle_unknowns(&mut self) {
        let mut open = self.unknowns();
        for index in 0..self.program.steps.len() {
            self.settle_by(StepId(index), &mut open);
        }
        self.report_unsettled(&open);
        self.report_open_values();
    }

    /// The unknowns of states, with their places and the step that settles them.
    fn unknowns(&self) -> BTreeMap<(StateId, Unknown), (Span, Option<StepId>)> {
        let mut open = BTreeMap::new();
        for (index, state) in self.program.states.iter().enumerate() {
            for (condition, unknown) in
                [(&state.temperature, Unknown::Temperature), (&state.pressure, Unknown::Pressure)]
            {
                if let Condition::Unknown(span) = condition {
                    open.insert((StateId(index), unknown), (*span, None));
                }
            }
        }
        open
    }

    fn settle_by(&mut self, id: StepId, open: &mut Open) {
        let Some(step) = self.program.steps.get(id.0) else { return };
        let Some((path, path_span)) = step.path else { return };
        let (from, to, flow) = (step.from.clone(), step.to.clone(), step.flow);
        let heat_stated = !matches!(step.heat, Heat::Follows);
        let mut found = Vec::new();
        let mut settler = Settler { checker: self, id, from: &from, to: &to, open, found: &mut found };
        let stated = match path {
            Path::ConstantPressure => {
                settler.equal(Unknown::Pressure, Law::SamePressure);
                heat_stated.then(|| settler.energy(Law::Enthalpy))
            }
            Path::NoShaftWork => heat_stated.then(|| settler.energy(Law::Enthalpy)),
            Path::Throttled => Some(settler.energy(Law::Enthalpy)),
            Path::ConstantTemperatureAndPressure => {
                settler.equal(Unknown::Pressure, Law::SamePressure);
                settler.equal(Unknown::Temperature, Law::SameTemperature);
                heat_stated.then_some(false)
            }
            Path::ConstantVolume if flow => heat_stated.then(|| settler.energy(Law::InternalEnergy)),
            Path::ConstantVolume => {
                let energy = heat_stated.then(|| settler.energy(Law::InternalEnergy));
                let first =
                    if settler.knows(Unknown::Pressure) { Unknown::Temperature } else { Unknown::Pressure };
                settler.one(&[first], Law::SameVolume);
                energy
            }
            Path::IsothermalReversible => {
                settler.equal(Unknown::Temperature, Law::SameTemperature);
                heat_stated.then(|| settler.one(&[Unknown::Pressure], Law::IsothermalHeat))
            }
            Path::AdiabaticReversible => {
                Some(settler.one(&[Unknown::Temperature, Unknown::Pressure], Law::Isentropic))
            }
        };
        if stated == Some(false) {
            self.too_much_stated(id, path, path_span);
        }
        if let Some(step) = self.program.steps.get_mut(id.0) {
            step.settles = found;
        }
    }

    /// A heat is stated, or follows from the path, and nothing is left open.
    fn too_much_stated(&mut self, id: StepId, path: Path, span: Span) {
        let Some(step) = self.program.steps.get(id.0) else { return };
        let name = step.name.clone();
        let end = step
            .to
            .first()
            .and_then(|id| self.program.states.get(id.0))
            .map_or(String::new(), |state| state.name.clone());
        let place = match &step.heat {
            Heat::Taking(value) => value.span,
            _ => span,
        };
        let what = if path == Path::AdiabaticReversible || path == Path::Throttled {
            path.as_str()
        } else {
            "the heat"
        };
        self.report(
            Diagnostic::new(
                Code::TwoConstraints,
                format!("`{name}`: {what} is stated, and both ends are known already"),
            )
            .label(place, "one statement too many")
            .help(format!(
                "leave the end open, `state {end} = ... at ?`, or leave this out and ask for `{name}.Q`"
            )),
        );
    }

    fn report_unsettled(&mut self, open: &Open) {
        for ((id, unknown), (span, settled)) in open {
            let Some(state) = self.program.states.get(id.0) else { continue };
            if settled.is_some() || self.settled.contains(&state.name) {
                continue;
            }
            let (name, what, member) = match unknown {
                Unknown::Temperature => (state.name.clone(), "temperature", "T"),
                Unknown::Pressure => (state.name.clone(), "pressure", "P"),
            };
            let help = match unknown {
                Unknown::Temperature => format!(
                    "add a step that ends in `{name}` with a path and a heat: `, at constant pressure, taking ...` or `, adiabatic`"
                ),
                Unknown::Pressure => format!(
                    "add a step to `{name}` with a path that fixes it, such as `, at constant volume`, or write the pressure"
                ),
            };
            self.report(
                Diagnostic::new(Code::NothingSettles, format!("nothing settles the {what} of `{name}`"))
                    .label(*span, format!("`{name}.{member}` is unknown here"))
                    .help(help),
            );
        }
    }

    fn report_open_values(&mut self) {
        for word in std::mem::take(&mut self.open_values) {
            if self.settled.contains(&word.text) {
                continue;
            }
            self.report(
                Diagnostic::new(Code::NothingSettles, format!("nothing settles `{}`", word.text))
                    .label(word.span, "unknown here")
                    .help(format!(
                        "write its value; a `settle {} ...` line is not worked by this version",
                        word.text
                    )),
            );
        }
    }
}

type Open = BTreeMap<(StateId, Unknown), (Span, Option<StepId>)>;

/// A step at work on the open unknowns.
struct Settler<'a, 'b, 'c> {
    checker: &'a mut Checker<'b>,
    id: StepId,
    from: &'a [StateId],
    to: &'a [StateId],
    open: &'a mut Open,
    found: &'c mut Vec<Settles>,
}

impl Settler<'_, '_, '_> {
    /// The unknowns of a sort at this step's states, those at its end first.
    fn open_here(&self, unknown: Unknown) -> Vec<(StateId, bool)> {
        let ends = self.to.iter().map(|id| (*id, true));
        let starts = self.from.iter().map(|id| (*id, false));
        ends.chain(starts).filter(|(id, _)| self.open.contains_key(&(*id, unknown))).collect()
    }

    fn knows(&self, unknown: Unknown) -> bool {
        self.open_here(unknown).iter().all(|(id, _)| self.settled_by_other(*id, unknown).is_some())
    }

    fn settled_by_other(&self, id: StateId, unknown: Unknown) -> Option<StepId> {
        self.open.get(&(id, unknown)).and_then(|(_, settled)| *settled).filter(|step| *step != self.id)
    }

    /// An energy balance settles a temperature.
    fn energy(&mut self, law: Law) -> bool {
        self.one(&[Unknown::Temperature], law)
    }

    /// One equation settles one unknown; whether it found one. An unknown that another step has settled already makes
    /// two constraints on one unknown.
    fn one(&mut self, sorts: &[Unknown], law: Law) -> bool {
        let mut taken = None;
        for unknown in sorts {
            for (state, at_end) in self.open_here(*unknown) {
                match self.settled_by_other(state, *unknown) {
                    Some(other) => taken = taken.or(Some((state, *unknown, other))),
                    None if self
                        .found
                        .iter()
                        .any(|found| found.state == state && found.unknown == *unknown) => {}
                    None => {
                        self.settle(state, *unknown, law, at_end);
                        return true;
                    }
                }
            }
        }
        if let Some((state, unknown, other)) = taken
            && law != Law::SameVolume
        {
            self.two_constraints(state, unknown, other);
            return true;
        }
        false
    }

    /// A condition that stays: each unknown of the sort takes it from the other side.
    fn equal(&mut self, unknown: Unknown, law: Law) {
        let here = self.open_here(unknown);
        let known = self.from.len() + self.to.len() - here.len();
        if known == 0 {
            return;
        }
        for (state, at_end) in here {
            if self.settled_by_other(state, unknown).is_none() {
                self.settle(state, unknown, law, at_end);
            }
        }
    }

    fn settle(&mut self, state: StateId, unknown: Unknown, law: Law, at_end: bool) {
        if let Some((_, settled)) = self.open.get_mut(&(state, unknown)) {
            *settled = Some(self.id);
        }
        self.found.push(Settles { state, unknown, law, at_end });
    }

    fn two_constraints(&mut self, state: StateId, unknown: Unknown, other: StepId) {
        let program = &self.checker.program;
        let (Some(state), Some(this), Some(first)) =
            (program.states.get(state.0), program.steps.get(self.id.0), program.steps.get(other.0))
        else {
            return;
        };
        let member = if unknown == Unknown::Temperature { "T" } else { "P" };
        let found = Diagnostic::new(
            Code::TwoConstraints,
            format!(
                "`{}.{member}` is settled by two steps, `{}` and `{}`",
                state.name, first.name, this.name
            ),
        )
        .label(this.span, "this step states a heat as well")
        .label(first.span, "settled by this step")
        .help(format!("leave the heat of `{}` open and ask for `{}.Q`", this.name, this.name));
        self.checker.report(found);
    }
}

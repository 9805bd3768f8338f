//! Steps: sides, paths and clauses.

use super::checker::{Checker, Entity};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Entry, Expr, Heat, Path, StateId, Step};
use crate::span::Span;
use crate::syntax::tree::{self, Clause, ClauseKind, Expression};
use crate::thermo::{PhaseClass, Pin};
use crate::units::Dimension;
use std::collections::BTreeSet;

/// The clauses as they are gathered, each with its place.
#[derive(Default)]
struct Clauses {
    path: Option<(Path, Span)>,
    adiabatic: Option<Span>,
    taking: Option<(Option<Expr>, Span)>,
    losing: Option<(Option<Expr>, Span)>,
    working: Option<(Option<Expr>, Span)>,
    efficiency: Option<(Option<Expr>, Span)>,
    failed: bool,
}

impl Checker<'_> {
    pub(super) fn step(&mut self, step: &tree::Step, span: Span) {
        let checked = self.checked_step(step, span);
        let entity = match checked {
            Some(checked) => {
                let id = self.next_step();
                self.program.steps.push(checked);
                self.program.order.push(Entry::Step(id));
                Entity::Step(id)
            }
            None => {
                self.touched_by_broken_step(step);
                Entity::Broken
            }
        };
        self.declare(&step.name, entity);
    }

    /// States that a refused step names: it might have settled their unknowns.
    fn touched_by_broken_step(&mut self, step: &tree::Step) {
        for word in step.from.iter().chain(&step.to) {
            self.settled.insert(word.text.clone());
        }
    }

    fn checked_step(&mut self, step: &tree::Step, span: Span) -> Option<Step> {
        let from: Vec<Option<StateId>> = step.from.iter().map(|word| self.state_named(word)).collect();
        let to: Vec<Option<StateId>> = step.to.iter().map(|word| self.state_named(word)).collect();
        let from: Option<Vec<StateId>> = from.into_iter().collect();
        let to: Option<Vec<StateId>> = to.into_iter().collect();
        let flow = from
            .as_ref()
            .and_then(|from| from.first())
            .and_then(|id| self.program.states.get(id.0))
            .map(|state| state.flow);
        let clauses = self.clauses(&step.clauses, flow);
        let (from, to, flow) = (from?, to?, flow?);
        for (id, word) in from.iter().chain(&to).zip(step.from.iter().chain(&step.to)) {
            if self.program.states.get(id.0)?.flow != flow {
                self.flow_and_batch(word.span, flow);
                return None;
            }
        }
        self.path_fits(&clauses, flow, &from, &to)?;
        self.materials_stay(&from, &to, step)?;
        if clauses.failed {
            return None;
        }
        let heat = match (clauses.adiabatic, clauses.taking) {
            (Some(_), _) => Heat::Adiabatic,
            (None, Some((taking, _))) => Heat::Taking(taking?),
            (None, None) => Heat::Follows,
        };
        let written = self.written(span);
        let text = written.split_once(':').map_or("", |(_, rest)| rest.trim()).to_owned();
        Some(Step {
            name: step.name.text.clone(),
            span: step.name.span,
            flow,
            from,
            to,
            path: clauses.path,
            heat,
            losing: said(clauses.losing)?,
            working: said(clauses.working)?,
            efficiency: said(clauses.efficiency)?,
            settles: Vec::new(),
            text,
        })
    }

    fn clauses(&mut self, clauses: &[Clause], flow: Option<bool>) -> Clauses {
        let mut read = Clauses::default();
        for clause in clauses {
            self.clause(clause, flow, &mut read);
        }
        self.clauses_agree(&mut read);
        read
    }

    fn clause(&mut self, clause: &Clause, flow: Option<bool>, read: &mut Clauses) {
        let span = clause.span;
        let path = match &clause.kind {
            ClauseKind::ConstantTemperatureAndPressure => Path::ConstantTemperatureAndPressure,
            ClauseKind::ConstantPressure => Path::ConstantPressure,
            ClauseKind::ConstantVolume => Path::ConstantVolume,
            ClauseKind::IsothermalReversible => Path::IsothermalReversible,
            ClauseKind::AdiabaticReversible => Path::AdiabaticReversible,
            ClauseKind::NoShaftWork => Path::NoShaftWork,
            ClauseKind::Throttled => Path::Throttled,
            ClauseKind::Adiabatic => {
                if let Some(first) = read.adiabatic.replace(span) {
                    self.clash(span, first, "said twice", read);
                }
                return;
            }
            ClauseKind::Taking(value) => {
                let value = self.heat_of_step(value, flow, "the heat that a step takes");
                return self.put(span, value, read, |read| &mut read.taking);
            }
            ClauseKind::Losing(value) => {
                let value = self.heat_of_step(value, flow, "the heat that a step loses");
                return self.put(span, value, read, |read| &mut read.losing);
            }
            ClauseKind::Working(value) => {
                let value = self.heat_of_step(value, flow, "the work that a step takes up");
                return self.put(span, value, read, |read| &mut read.working);
            }
            ClauseKind::IsentropicEfficiency(value) => {
                let value = self.wanted(value, &[Dimension::ONE], "an isentropic efficiency");
                return self.put(span, value, read, |read| &mut read.efficiency);
            }
        };
        if let Some((first, place)) = read.path {
            let message = format!("`{}` beside `{}`: a step has one path", path.as_str(), first.as_str());
            self.clash(span, place, &message, read);
            return;
        }
        read.path = Some((path, span));
    }

    fn put(
        &mut self,
        span: Span,
        value: Option<Expr>,
        read: &mut Clauses,
        slot: impl Fn(&mut Clauses) -> &mut Option<(Option<Expr>, Span)>,
    ) {
        read.failed |= value.is_none();
        if let Some((_, first)) = slot(read).replace((value, span)) {
            self.clash(span, first, "said twice", read);
        }
    }

    /// An energy, or of a flow a power.
    fn heat_of_step(&mut self, value: &Expression, flow: Option<bool>, what: &str) -> Option<Expr> {
        let wanted: &[Dimension] = match flow {
            Some(true) => &[Dimension::POWER],
            Some(false) => &[Dimension::ENERGY],
            None => &[Dimension::ENERGY, Dimension::POWER],
        };
        self.wanted(value, wanted, what)
    }

    fn clash(&mut self, span: Span, other: Span, message: &str, read: &mut Clauses) {
        read.failed = true;
        self.report(
            Diagnostic::new(Code::ClausesClash, format!("clauses that exclude each other: {message}"))
                .label(span, "this one")
                .label(other, "against this one")
                .help("keep one of the two"),
        );
    }

    fn clauses_agree(&mut self, read: &mut Clauses) {
        let taking = read.taking.as_ref().map(|(_, span)| *span);
        let losing = read.losing.as_ref().map(|(_, span)| *span);
        let working = read.working.as_ref().map(|(_, span)| *span);
        if let (Some(taking), Some(adiabatic)) = (taking, read.adiabatic) {
            self.clash(
                taking.max(adiabatic),
                taking.min(adiabatic),
                "`taking` states a heat, `adiabatic` none",
                read,
            );
        }
        if let (Some(losing), Some(adiabatic)) = (losing, read.adiabatic) {
            self.clash(losing.max(adiabatic), losing.min(adiabatic), "an adiabatic step loses no heat", read);
        }
        if let Some((path, place)) = read.path {
            let no_heat = matches!(path, Path::Throttled | Path::AdiabaticReversible);
            let no_work = no_heat || path == Path::NoShaftWork;
            let name = path.as_str();
            for span in [taking, losing].into_iter().flatten().filter(|_| no_heat) {
                self.clash(span, place, &format!("no heat passes in a step that is `{name}`"), read);
            }
            if let Some(working) = working.filter(|_| no_work) {
                self.clash(
                    working,
                    place,
                    &format!("`working` beside `{name}`, which leaves no room for it"),
                    read,
                );
            }
        }
        if let Some((_, span)) = read.efficiency
            && read.path.is_none_or(|(path, _)| path != Path::AdiabaticReversible)
        {
            let place = read.path.map_or(span, |(_, place)| place);
            self.clash(span, place, "an isentropic efficiency belongs to `adiabatic reversible`", read);
        }
        let heat = taking.or(read.adiabatic);
        if let (Some(heat), None) = (heat, read.path) {
            read.failed = true;
            self.report(
                Diagnostic::new(Code::HeatStatedWithoutPath, "heat is stated, but the step has no path")
                    .label(heat, "heat depends on the path")
                    .help("add `, at constant pressure` or `, at constant volume` before it"),
            );
        }
    }

    /// Whether the path fits what the step joins.
    fn path_fits(&mut self, clauses: &Clauses, flow: bool, from: &[StateId], to: &[StateId]) -> Option<()> {
        let Some((path, span)) = clauses.path else { return Some(()) };
        match path {
            Path::NoShaftWork | Path::Throttled if !flow => {
                self.report(
                    Diagnostic::new(Code::FlowPathOnly, format!("`{}` for a batch", path.as_str()))
                        .label(span, "shaft work is a matter of flows")
                        .help("write `at constant pressure` or `at constant volume`, or give the states per time"),
                );
                None
            }
            Path::ConstantVolume if flow && !self.one_density(from, to) => {
                self.report(
                    Diagnostic::new(Code::FlowAtConstantVolume, "constant volume for a flow")
                        .label(span, "a flow passes through; its volume is not closed in")
                        .help("write `no shaft work` (Q = ΔH), or `at constant pressure`"),
                );
                None
            }
            Path::ConstantVolume if from.len() > 1 || to.len() > 1 => {
                self.report(
                    Diagnostic::new(Code::ClosedVolumeTakesIn, "a closed volume that takes in or gives off matter")
                        .label(span, "what enters a volume brings its enthalpy, not its internal energy")
                        .help("declare `state all = a + b at ...` for what is inside at the start, and begin the step there"),
                );
                None
            }
            Path::IsothermalReversible | Path::AdiabaticReversible if !self.can_be_gas(from, to) => {
                self.report(
                    Diagnostic::new(
                        Code::GasPathOnly,
                        format!("`{}` of something that is no gas", path.as_str()),
                    )
                    .label(span, "worked for ideal gases without change of phase")
                    .help("write `at constant pressure` or `no shaft work`; what a pump works is `working`"),
                );
                None
            }
            Path::IsothermalReversible | Path::AdiabaticReversible if from.len() > 1 || to.len() > 1 => {
                self.report(
                    Diagnostic::new(
                        Code::ReversibleMixing,
                        format!("`{}` of several states at once", path.as_str()),
                    )
                    .label(span, "streams that mix or part are not reversible")
                    .help("declare `state all = a + b at ...` before the step, and let it lead from one state to one state"),
                );
                None
            }
            _ => Some(()),
        }
    }

    /// Whether all that the states hold is condensed and of one constant density each.
    fn one_density(&self, from: &[StateId], to: &[StateId]) -> bool {
        self.constituents_of(from, to).all(|part| {
            let Some(species) = self.program.species.get(part.species.0) else { return false };
            let phases: Vec<_> = match part.pin {
                Pin::Phase(at) => species.phases.get(at).into_iter().collect(),
                _ => species.phases.iter().collect(),
            };
            let first = phases.first().and_then(|phase| phase.constant_density);
            first.is_some()
                && phases
                    .iter()
                    .all(|phase| phase.constant_density == first && phase.class != PhaseClass::Gas)
        })
    }

    fn can_be_gas(&self, from: &[StateId], to: &[StateId]) -> bool {
        self.constituents_of(from, to).all(|part| match part.pin {
            Pin::Stable => self
                .program
                .species
                .get(part.species.0)
                .is_some_and(|species| species.phases.iter().any(|phase| phase.class == PhaseClass::Gas)),
            _ => self.class_of_constituent(part) == Some(PhaseClass::Gas),
        })
    }

    fn constituents_of<'b>(
        &'b self,
        from: &'b [StateId],
        to: &'b [StateId],
    ) -> impl Iterator<Item = &'b crate::program::Constituent> {
        from.iter()
            .chain(to)
            .filter_map(|id| self.program.states.get(id.0))
            .flat_map(|state| state.constituents.iter())
    }

    /// One material's mass does not become another's, unless both count from the elements.
    fn materials_stay(&mut self, from: &[StateId], to: &[StateId], step: &tree::Step) -> Option<()> {
        let species = |ids: &[StateId]| -> BTreeSet<crate::program::SpeciesId> {
            self.constituents_of(ids, &[]).map(|part| part.species).collect()
        };
        let (before, after) = (species(from), species(to));
        let gone: Vec<_> = before.difference(&after).copied().collect();
        let come: Vec<_> = after.difference(&before).copied().collect();
        if gone.is_empty() || come.is_empty() {
            return Some(());
        }
        let without = gone.iter().chain(&come).find_map(|id| {
            let species = self.program.species.get(id.0)?;
            (!species.absolute).then(|| species.name.clone())
        });
        let Some(without) = without else { return Some(()) };
        let name = |id: &crate::program::SpeciesId| {
            self.program.species.get(id.0).map_or("", |species| &species.name)
        };
        let (a, b) = (name(&gone[0]).to_owned(), name(&come[0]).to_owned());
        let place = step.to.first().map_or(step.name.span, |word| word.span);
        self.report(
            Diagnostic::new(Code::MaterialTurned, format!("`{a}` is turned into `{b}` without formation enthalpies on both sides"))
                .label(place, format!("`{without}` has no formation enthalpy to count from"))
                .help(format!("give `{without}` a line `formation ... at 298.15 K`, or let both sides hold the same material")),
        );
        None
    }
}

/// A clause that was said: nothing, or its checked value.
#[allow(clippy::option_option)] // outer: whether it was refused; inner: whether it was said
fn said(clause: Option<(Option<Expr>, Span)>) -> Option<Option<Expr>> {
    match clause {
        None => Some(None),
        Some((value, _)) => value.map(Some),
    }
}

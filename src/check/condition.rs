//! Temperatures, pressures and shares of a state.

use super::checker::Checker;
use super::matter::Gathered;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Condition, Expr, Node, SpeciesId, State, StateId};
use crate::span::Span;
use crate::syntax::tree::{self, ConditionKind, Expression, ExpressionKind, Word};
use crate::thermo::{PhaseClass, Pin};
use crate::units::Dimension;
use crate::units::constants::STANDARD_ATMOSPHERE;

/// The conditions of a state.
pub(super) struct Conditions {
    pub(super) temperature: Condition,
    pub(super) pressure: Condition,
    pub(super) share: Option<(usize, Expr)>,
}

/// The conditions while they are read.
#[derive(Default)]
struct Read {
    temperature: Option<(Condition, Span)>,
    pressure: Option<(Condition, Span)>,
    share: Option<((usize, Expr), Span)>,
    saturated: Option<Span>,
    /// Whether it is saturated vapour or saturated liquid, not a mixture of the two.
    all_one_phase: bool,
    failed: bool,
}

impl Checker<'_> {
    pub(super) fn conditions(
        &mut self,
        conditions: &[tree::Condition],
        matter: &Gathered,
        name: &Word,
    ) -> Option<Conditions> {
        let mut read = Read::default();
        for condition in conditions {
            if self.condition(condition, matter, &mut read).is_none() {
                read.failed = true;
            }
        }
        if let (Some(span), true) = (read.saturated, read.temperature.is_none()) {
            read.temperature = Some((Condition::Boiling, span));
        }
        for condition in conditions.iter().filter(|condition| condition.kind == ConditionKind::Unknown) {
            self.unknown_condition(condition.span, &mut read);
        }
        self.saturation(&mut read, matter);
        if read.failed {
            return None;
        }
        let origins = origins_of(matter);
        let temperature = match read.temperature {
            Some((temperature, _)) => temperature,
            None => self.unsaid_temperature(matter, &origins, name)?,
        };
        let pressure = match read.pressure {
            Some((pressure, _)) => pressure,
            None => unsaid_pressure(matter, &origins),
        };
        Some(Conditions { temperature, pressure, share: read.share.map(|(share, _)| share) })
    }

    fn condition(&mut self, condition: &tree::Condition, matter: &Gathered, read: &mut Read) -> Option<()> {
        match &condition.kind {
            ConditionKind::Unknown => Some(()),
            ConditionKind::Value(value) => self.value_condition(value, condition.span, read),
            ConditionKind::Share(value, phase) => self.share_condition(value, phase, matter, read),
            ConditionKind::Saturated(phase) => self.saturated(phase, condition.span, matter, read),
            ConditionKind::Equilibrium(name) => {
                self.material(name);
                self.later_equilibrium(condition.span);
                None
            }
        }
    }

    fn value_condition(&mut self, value: &Expression, span: Span, read: &mut Read) -> Option<()> {
        if self.bare_phase(value, span) {
            return None;
        }
        let wanted = [Dimension::TEMPERATURE, Dimension::PRESSURE];
        let value = self.wanted(value, &wanted, "a temperature or a pressure of a state")?;
        let hot = value.dimension == Dimension::TEMPERATURE;
        self.point(&value, if hot { "the temperature of a state" } else { "the pressure of a state" })?;
        let slot = if hot { &mut read.temperature } else { &mut read.pressure };
        if let Some((_, first)) = slot {
            let first = *first;
            self.said_twice(if hot { "temperature" } else { "pressure" }, span, first);
            return None;
        }
        *slot = Some((Condition::Value(value), span));
        Some(())
    }

    /// `at 692.68 K, liquid`: a phase without its share.
    fn bare_phase(&mut self, value: &Expression, span: Span) -> bool {
        let ExpressionKind::Name(word) = &value.kind else { return false };
        let phase = matches!(word.as_str(), "solid" | "liquid" | "gas" | "vapour" | "vapor")
            || self
                .program
                .species
                .iter()
                .any(|species| species.phases.iter().any(|phase| phase.name == *word));
        if !phase || self.is_name(word) {
            return false;
        }
        self.report(
            Diagnostic::new(Code::UnknownName, format!("the phase `{word}` without its share"))
                .label(span, "a temperature, a pressure or a share of a phase is wanted")
                .help(format!(
                    "on a transition write `100 % {word}`; elsewhere the state symbol says the phase, such as `Zn(l)`"
                )),
        );
        true
    }

    fn said_twice(&mut self, what: &str, span: Span, first: Span) {
        self.report(
            Diagnostic::new(Code::ConditionTwice, format!("a second {what} for one state"))
                .label(span, "said again here")
                .label(first, "said first here")
                .help("keep one of the two"),
        );
    }

    /// `?` is the temperature, or where that is said already the pressure.
    fn unknown_condition(&mut self, span: Span, read: &mut Read) {
        if read.temperature.is_none() {
            read.temperature = Some((Condition::Unknown(span), span));
        } else if let Some((_, first)) = &read.pressure {
            let first = *first;
            self.said_twice("pressure", span, first);
            read.failed = true;
        } else {
            read.pressure = Some((Condition::Unknown(span), span));
        }
    }

    /// `40 % liquid`: how much has changed; `95 % vapour` is a saturated state.
    fn share_condition(
        &mut self,
        value: &Expression,
        phase: &Word,
        matter: &Gathered,
        read: &mut Read,
    ) -> Option<()> {
        let value = self.wanted(value, &[Dimension::ONE], "a share of a phase")?;
        let span = value.span.to(phase.span);
        let at = self.phase_of_share(phase, matter, span)?;
        if let Some((_, first)) = &read.share {
            let first = *first;
            self.said_twice("share", span, first);
            return None;
        }
        read.share = Some(((at, value), span));
        if matches!(phase.text.as_str(), "vapour" | "vapor") {
            let species = matter.constituents.first()?.species;
            let classes = [PhaseClass::Solid, PhaseClass::Liquid];
            if !classes.into_iter().any(|class| self.turns_to_gas(species, class)) {
                self.without_boiling(span);
                return None;
            }
            read.saturated = Some(span);
        }
        Some(())
    }

    /// A saturated state has a temperature or a pressure; the other follows from the vapour pressure, without which
    /// it is known at 101.325 kPa only.
    fn saturation(&mut self, read: &mut Read, matter: &Gathered) {
        let Some(span) = read.saturated else { return };
        let species = matter.constituents.first().and_then(|part| self.program.species.get(part.species.0));
        let Some(species) = species else { return };
        let law = species.curve.vapour_pressure().is_some();
        let said = matches!(read.temperature, Some((Condition::Value(_), _)));
        match (said, law, &read.pressure) {
            (true, true, None) => read.pressure = Some((Condition::Boiling, span)),
            (true, false, None) if read.all_one_phase => {
                let message = format!("the pressure of a saturated state of `{}` is not known", species.name);
                self.without_vapour_pressure(span, message, "or give the pressure as well");
                read.failed = true;
            }
            (false, false, Some((Condition::Value(pressure), _))) => {
                let absolute = match pressure.node {
                    Node::Constant(value) => value,
                    Node::Gauge(value) => value + self.program.site.atmosphere,
                    _ => return,
                };
                if (absolute / STANDARD_ATMOSPHERE - 1.0).abs() > 0.02 {
                    let message = format!("a saturated state of `{}` away from 101.325 kPa", species.name);
                    let other = "elsewhere give the temperature and a state symbol";
                    self.without_vapour_pressure(span, message, other);
                    read.failed = true;
                }
            }
            _ => {}
        }
    }

    fn without_vapour_pressure(&mut self, span: Span, message: String, other: &str) {
        self.report(
            Diagnostic::new(Code::VapourPressureMissing, message)
                .label(span, "its species has no vapour pressure")
                .help(format!(
                    "add `vapour_pressure antoine {{ A = ..., B = ... K, C = ... K, p = 1 bar }} for ... K to ... K`; {other}"
                )),
        );
    }

    /// The phase of the one species that a share is said of.
    fn phase_of_share(&mut self, phase: &Word, matter: &Gathered, span: Span) -> Option<usize> {
        let [only] = matter.constituents.as_slice() else {
            self.share_unplaced(
                span,
                "a share of a phase in a state of several species",
                "give the species their state symbols instead",
            );
            return None;
        };
        if only.pin != Pin::Stable {
            let name = self.constituent_name(only);
            let message = format!("a share of a phase, while `{name}` is in one phase");
            self.share_unplaced(span, &message, "leave out the state symbol, or the share");
            return None;
        }
        self.phase_word(only.species, &phase.text, phase.span)
    }

    fn share_unplaced(&mut self, span: Span, message: &str, help: &str) {
        self.report(
            Diagnostic::new(Code::ShareWithoutPlateau, message.to_owned())
                .label(span, "no one transition that it belongs to")
                .help(help),
        );
    }

    /// Whether a transition leads from a phase of a class to a gas.
    fn turns_to_gas(&self, species: SpeciesId, class: PhaseClass) -> bool {
        let Some(species) = self.program.species.get(species.0) else { return false };
        species.phases.windows(2).enumerate().any(|(link, pair)| {
            pair[0].class == class
                && pair[1].class == PhaseClass::Gas
                && species.curve.transition(link).is_some()
        })
    }

    fn without_boiling(&mut self, span: Span) {
        self.share_unplaced(
            span,
            "a saturated state of a species that does not boil",
            "add `boiling at ... takes ...` to its block",
        );
    }

    /// `saturated vapour`, `saturated liquid`: at the boiling point of the one species.
    fn saturated(&mut self, phase: &Word, span: Span, matter: &Gathered, read: &mut Read) -> Option<()> {
        if !matches!(phase.text.as_str(), "vapour" | "vapor" | "liquid") {
            let message = format!("saturated `{}`", phase.text);
            self.share_unplaced(span, &message, "write `saturated vapour` or `saturated liquid`");
            return None;
        }
        let at = self.phase_of_share(phase, matter, span)?;
        let species = matter.constituents.first()?.species;
        if !self.turns_to_gas(species, PhaseClass::Liquid) {
            self.without_boiling(span);
            return None;
        }
        if let Some((_, first)) = &read.share {
            let first = *first;
            self.said_twice("share", span, first);
            return None;
        }
        (read.saturated, read.all_one_phase) = (Some(span), true);
        let one = Expr {
            span,
            dimension: Dimension::ONE,
            kind: crate::units::Kind::Plain,
            node: Node::Constant(1.0),
        };
        read.share = Some(((at, one), span));
        Some(())
    }

    fn unsaid_temperature(
        &mut self,
        matter: &Gathered,
        origins: &[StateId],
        name: &Word,
    ) -> Option<Condition> {
        if let ([one], false) = (origins, matter.fresh) {
            return Some(Condition::Of(*one));
        }
        self.report(
            Diagnostic::new(
                Code::TemperatureMissing,
                format!("the state `{}` has no temperature", name.text),
            )
            .label(name.span, "at which temperature?")
            .help(format!("add `at 25 degC`; `at ?` where a step settles `{}.T`", name.text)),
        );
        None
    }
}

/// The states that matter is made from, each once.
fn origins_of(matter: &Gathered) -> Vec<StateId> {
    let mut origins = State::origins_of(&matter.source);
    origins.sort_unstable();
    origins.dedup();
    origins
}

/// The pressure of the states that a state is made from; of fresh material the site's atmosphere.
fn unsaid_pressure(matter: &Gathered, origins: &[StateId]) -> Condition {
    match (origins, matter.fresh) {
        ([], _) => Condition::Atmosphere,
        ([one], false) => Condition::Of(*one),
        (several, fresh) => Condition::Agreed(several.to_vec(), fresh),
    }
}

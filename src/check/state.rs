//! States.

use super::checker::{Checker, Entity};
use crate::program::{Constituent, Entry, State};
use crate::span::Span;
use crate::syntax::tree;

impl Checker<'_> {
    pub(super) fn state(&mut self, state: &tree::State, span: Span) {
        let checked = self.checked_state(state, span);
        let entity = match checked {
            Some(checked) => {
                let id = self.next_state();
                self.program.states.push(checked);
                self.program.order.push(Entry::State(id));
                Entity::State(id)
            }
            None => Entity::Broken,
        };
        self.declare(&state.name, entity);
    }

    fn checked_state(&mut self, state: &tree::State, span: Span) -> Option<State> {
        let matter = self.matter(&state.matter);
        if !state.after.is_empty() {
            let place =
                state.after.iter().fold(state.after[0].reaction.span, |all, part| all.to(part.reaction.span));
            for conversion in &state.after {
                if let Some((share, species)) = &conversion.extent {
                    self.expression(share);
                    self.material(species);
                }
            }
            if state.after.iter().all(|part| !self.reactions.contains_key(&part.reaction.text)) {
                self.later_after(place);
            }
        }
        let Some(matter) = matter else {
            // the conditions are still read, so that their mistakes are told in the same run
            self.mistakes_of_conditions(&state.conditions);
            return None;
        };
        let conditions = self.conditions(&state.conditions, &matter, &state.name);
        let places: Vec<(Constituent, Span)> =
            matter.constituents.iter().map(|part| (*part, state.matter.span)).collect();
        let said = self.phases_said(&matter.constituents, &places);
        if !state.after.is_empty() {
            return None;
        }
        said?;
        let conditions = conditions?;
        let written = self.written(span);
        let text = written.split_once('=').map_or("", |(_, rest)| rest.trim()).to_owned();
        Some(State {
            name: state.name.text.clone(),
            span: state.name.span,
            flow: matter.flow,
            constituents: matter.constituents,
            source: matter.source,
            temperature: conditions.temperature,
            pressure: conditions.pressure,
            share: conditions.share,
            text,
        })
    }

    fn mistakes_of_conditions(&mut self, conditions: &[tree::Condition]) {
        for condition in conditions {
            match &condition.kind {
                tree::ConditionKind::Value(value) | tree::ConditionKind::Share(value, _) => {
                    self.expression(value);
                }
                tree::ConditionKind::Equilibrium(_) => self.later_equilibrium(condition.span),
                tree::ConditionKind::Unknown | tree::ConditionKind::Saturated(_) => {}
            }
        }
    }
}

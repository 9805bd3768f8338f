//! Names: what is declared, what a name stands for, and what is said of one that stands for nothing.

use super::checker::{Checker, Declared, Entity};
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::program::{DutyId, QuantityId, StateId, StepId};
use crate::span::Span;
use crate::syntax::tree::{Item, Statement, Word};
use crate::units::read_unit;

/// Names that the language itself gives a value.
pub(super) const CONSTANTS: &[(&str, &str)] = &[
    ("R", "the molar gas constant"),
    ("sigma", "the Stefan-Boltzmann constant"),
    ("g_n", "the standard acceleration of free fall"),
];

/// After so many findings no nearest name or unit is looked for: each search goes through all of them.
const GUESSES: usize = 100;

impl Checker<'_> {
    /// Notes every name that the sheet declares, so that one used too early is told from an unknown one.
    pub(super) fn look_ahead(&mut self, items: &[Item]) {
        for item in items {
            let name = match &item.statement {
                Statement::Input(input) => &input.name,
                Statement::State(state) => &state.name,
                Statement::Step(step) => &step.name,
                Statement::Duty(duty) => &duty.name,
                Statement::Result(line) => &line.name,
                Statement::Balance(balance) => &balance.name,
                Statement::Species(block) => &block.name,
                Statement::Mixture(mixture) => &mixture.name,
                Statement::Reaction(reaction) => &reaction.name,
                _ => continue,
            };
            self.ahead.entry(name.text.clone()).or_insert(name.span);
        }
    }

    /// Declares a name, unless it is declared already.
    pub(super) fn declare(&mut self, word: &Word, entity: Entity) {
        if let Some((_, what)) = CONSTANTS.iter().find(|(name, _)| *name == word.text) {
            self.report(
                Diagnostic::new(Code::DeclaredTwice, format!("`{}` is {what} already", word.text))
                    .label(word.span, "declared again here")
                    .help(format!("choose another name, such as `{}_1`", word.text)),
            );
            return;
        }
        if let Some(other) = self.names.get(&word.text) {
            self.diagnostics.push(declared_twice(word, other.span));
            return;
        }
        self.names.insert(word.text.clone(), Declared { what: entity, span: word.span });
    }

    /// What a name stands for; `None` where that was reported, now or before.
    pub(super) fn look_up(&mut self, name: &str, span: Span) -> Option<Entity> {
        match self.names.get(name) {
            Some(Declared { what: Entity::Broken, .. }) => None,
            Some(declared) => Some(declared.what),
            None if self.broken.contains(name) => None,
            None => {
                let found = self.unknown_name(name, span);
                self.report(found);
                None
            }
        }
    }

    /// A name that both namespaces hold, where either could be meant.
    pub(super) fn report_either(&mut self, name: &str, span: Span) {
        let quantity = self.names.get(name).map(|declared| declared.span);
        let material = self.materials.get(name).map(|declared| declared.span);
        let mut found =
            Diagnostic::new(Code::EitherName, format!("`{name}` is a material and another name as well"))
                .label(span, "either could be meant here")
                .help(format!("rename one of the two, such as `{name}_in`"));
        if let Some(place) = quantity {
            found = found.label(place, "declared as a name here");
        }
        if let Some(place) = material {
            found = found.label(place, "declared as a material here");
        }
        self.report(found);
    }

    fn unknown_name(&self, name: &str, span: Span) -> Diagnostic {
        if let Some(place) = self.ahead.get(name).filter(|place| place.file == span.file) {
            return Diagnostic::new(
                Code::UsedBeforeDeclared,
                format!("`{name}` is used before it is declared"),
            )
            .label(span, "used here")
            .label(
                *place,
                if place.start < span.start { "its own declaration" } else { "declared only here" },
            )
            .help("a sheet is read from the top: move the declaration above this line");
        }
        if self.materials.contains_key(name) {
            return Diagnostic::new(Code::NotAQuantity, format!("`{name}` is a material, not a value"))
                .label(span, "a value is wanted here")
                .help(format!(
                    "`M({name})` is its molar mass; `state s = 1 kg of {name} at 20 degC` makes a state"
                ));
        }
        let found = Diagnostic::new(Code::UnknownName, format!("unknown name `{name}`"))
            .label(span, "nothing of this name is declared above");
        let known = self.names.keys().map(String::as_str).chain(CONSTANTS.iter().map(|(name, _)| *name));
        let guess = self.diagnostics.len() < GUESSES;
        if let Some(near) = guess.then(|| nearest(name, known)).flatten() {
            return found.help(format!("did you mean `{near}`?"));
        }
        if guess && read_unit(name).is_ok() {
            return found.help(format!("`{name}` is a unit and wants a number: `1 {name}`"));
        }
        found.help(format!("declare it above, such as `basis {name} = ...`"))
    }

    /// A name that stands for a state.
    pub(super) fn state_named(&mut self, word: &Word) -> Option<StateId> {
        match self.look_up(&word.text, word.span)? {
            Entity::State(id) => Some(id),
            other => {
                self.report_sort(word, other, "a state");
                None
            }
        }
    }

    /// A name of another sort than its place wants.
    pub(super) fn report_sort(&mut self, word: &Word, entity: Entity, wanted: &str) {
        let sort = sort_of(entity);
        let help = match entity {
            Entity::State(_) => format!("ask for a member: `{0}.T`, `{0}.m`, `{0}.H`", word.text),
            Entity::Step(_) => format!("ask for a member: `{0}.Q`, `{0}.dH`, `{0}.W`", word.text),
            Entity::Duty(_) => format!("ask for a member: `{0}.supplied`, `{0}.useful`", word.text),
            Entity::Quantity(_) | Entity::Broken => format!("declare {wanted} above and name it here"),
        };
        self.report(
            Diagnostic::new(
                Code::NotAQuantity,
                format!("`{}` is {sort}, where {wanted} is wanted", word.text),
            )
            .label(word.span, format!("{sort} here"))
            .help(help),
        );
    }

    pub(super) fn next_quantity(&self) -> QuantityId {
        QuantityId(self.program.quantities.len())
    }

    pub(super) fn next_state(&self) -> StateId {
        StateId(self.program.states.len())
    }

    pub(super) fn next_step(&self) -> StepId {
        StepId(self.program.steps.len())
    }

    pub(super) fn next_duty(&self) -> DutyId {
        DutyId(self.program.duties.len())
    }
}

pub(super) fn sort_of(entity: Entity) -> &'static str {
    match entity {
        Entity::Quantity(_) => "a value",
        Entity::State(_) => "a state",
        Entity::Step(_) => "a step",
        Entity::Duty(_) => "a duty",
        Entity::Broken => "unknown",
    }
}

pub(super) fn declared_twice(word: &Word, other: Span) -> Diagnostic {
    Diagnostic::new(Code::DeclaredTwice, format!("`{}` is declared twice", word.text))
        .label(word.span, "declared again here")
        .label(other, "declared first here")
        .help(format!("choose another name, such as `{}_2`", word.text))
}

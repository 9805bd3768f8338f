//! Members that ask what a state is made of: `fraction`, `mass`, `amount`, `share` and `mass_share`.

use super::checker::{Checker, Material};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{StateId, StateMember};
use crate::syntax::tree::{SpeciesName, Word};
use crate::thermo::Pin;

impl Checker<'_> {
    /// `fraction`, `mass`, `amount`, `share` and `mass_share` of a species or a phase.
    pub(super) fn composition_member(
        &mut self,
        id: StateId,
        member: &Word,
        name: &SpeciesName,
        word: Option<&Word>,
    ) -> Option<StateMember> {
        let state = self.program.states.get(id.0)?.clone();
        if member.text == "fraction" {
            return self.fraction(&state, name);
        }
        let which = self.constituents_named(&state, name)?;
        match member.text.as_str() {
            "mass" => Some(StateMember::MassOf(which)),
            "mass_share" => Some(StateMember::MassShare(which)),
            "amount" => {
                let asked: Vec<_> =
                    which.iter().filter_map(|at| state.constituents.get(*at).copied()).collect();
                self.all_have_moles(&asked, name.span, "the amount of substance")?;
                Some(StateMember::AmountOf(which))
            }
            _ => {
                self.all_have_moles(&state.constituents, name.span, "a share by mole")?;
                let dry = match word.map(|word| word.text.as_str()) {
                    None | Some("wet") => false,
                    Some("dry") => true,
                    Some(other) => {
                        let text = other.to_owned();
                        self.report(
                            Diagnostic::new(Code::UnknownMember, format!("a share cannot be `{text}`"))
                                .label(word.map_or(name.span, |word| word.span), "`dry` or `wet` is wanted")
                                .help("write `share(O2, dry)`"),
                        );
                        return None;
                    }
                };
                let asked = which.first().and_then(|at| state.constituents.get(*at));
                if dry && asked.is_some_and(|part| self.is_water(part.species)) {
                    self.report(
                        Diagnostic::new(Code::UnknownMember, "the share of water in what is free of water")
                            .label(name.span, "`dry` leaves it out")
                            .help(format!("write `share({})`", name.to_text())),
                    );
                    return None;
                }
                let among = (0..state.constituents.len())
                    .filter(|at| !(dry && self.is_water(state.constituents[*at].species)))
                    .collect();
                Some(StateMember::Share(which, among))
            }
        }
    }

    fn is_water(&self, id: crate::program::SpeciesId) -> bool {
        let species = self.program.species.get(id.0);
        species.is_some_and(|species| species.formula.as_ref().is_some_and(|(text, _)| text == "H2O"))
    }

    /// The constituents of a state that a species' name means.
    fn constituents_named(
        &mut self,
        state: &crate::program::State,
        name: &SpeciesName,
    ) -> Option<Vec<usize>> {
        let Material::Species(species) = self.material(name)? else {
            self.report(
                Diagnostic::new(Code::UnknownSpecies, format!("`{}` is no species", name.name))
                    .label(name.span, "a species is wanted here")
                    .help("ask for one of its species"),
            );
            return None;
        };
        let pin = self.pin(species, name)?;
        let which: Vec<usize> = (0..state.constituents.len())
            .filter(|at| {
                let constituent = &state.constituents[*at];
                constituent.species == species && (pin == Pin::Stable || constituent.pin == pin)
            })
            .collect();
        if which.is_empty() {
            let names: Vec<String> =
                state.constituents.iter().map(|part| self.constituent_name(part)).collect();
            self.report(
                Diagnostic::new(
                    Code::UnknownMember,
                    format!("the state `{}` holds no `{}`", state.name, name.to_text()),
                )
                .label(name.span, "not in this state")
                .help(format!("it holds {}", names.join(", "))),
            );
            return None;
        }
        Some(which)
    }

    /// `fraction(liquid)`, or of several species `fraction(Pb(l))`.
    fn fraction(&mut self, state: &crate::program::State, name: &SpeciesName) -> Option<StateMember> {
        let all: Vec<usize> = (0..state.constituents.len()).collect();
        let (which, phase) = match &name.symbol {
            Some(symbol) => {
                let bare = SpeciesName { symbol: None, ..name.clone() };
                (self.constituents_named(state, &bare)?, symbol.text.clone())
            }
            None => {
                let first = state.constituents.first()?.species;
                if state.constituents.iter().any(|part| part.species != first) {
                    let example =
                        self.program.species.get(first.0).map_or("Zn", |species| species.name.as_str());
                    let symbol = match name.name.as_str() {
                        "solid" => "s",
                        "liquid" => "l",
                        "gas" | "vapour" | "vapor" => "g",
                        other => other,
                    };
                    let help = format!("write `fraction({example}({symbol}))`");
                    self.report(
                        Diagnostic::new(
                            Code::UnknownPhase,
                            format!("`{}` is a phase of several species in `{}`", name.name, state.name),
                        )
                        .label(name.span, "of which species?")
                        .help(help),
                    );
                    return None;
                }
                (all, name.name.clone())
            }
        };
        let species = state.constituents.get(*which.first()?)?.species;
        self.phase_word(species, &phase, name.span)?;
        Some(StateMember::Fraction(which, phase))
    }
}

//! Members: `name.member` and `M(species)`.

use super::checker::{Checker, Entity, Material};
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::program::{DutyId, DutyMember, Expr, Heat, Node, Path, StateId, StateMember, StepId, StepMember};
use crate::span::Span;
use crate::syntax::tree::{SpeciesName, Subject, Word};
use crate::thermo::Pin;
use crate::units::{Dimension, Kind};

const STATE_MEMBERS: &[&str] = &[
    "T",
    "P",
    "n",
    "m",
    "V",
    "H",
    "U",
    "h",
    "u",
    "cp",
    "density",
    "fraction",
    "mass",
    "amount",
    "share",
    "mass_share",
];
const STEP_MEMBERS: &[&str] =
    &["dH", "dU", "dV", "Q", "W", "supply", "sensible", "latent", "reaction", "legs"];
const DUTY_MEMBERS: &[&str] = &["useful", "supplied", "flow"];

impl Checker<'_> {
    pub(super) fn member(
        &mut self,
        of: &Word,
        member: &Word,
        subject: Option<&Subject>,
        span: Span,
    ) -> Option<Expr> {
        if self.reactions.contains_key(&of.text) {
            return None; // the reaction itself is reported where it stands
        }
        match self.look_up(&of.text, of.span)? {
            Entity::State(id) => self.state_member(id, of, member, subject, span),
            Entity::Step(id) => self.step_member(id, of, member, span),
            Entity::Duty(id) => self.duty_member(id, of, member, span),
            Entity::Quantity(_) => {
                self.report(
                    Diagnostic::new(
                        Code::UnknownMember,
                        format!("`{}` is a value and has no members", of.text),
                    )
                    .label(member.span, "no member here")
                    .help(format!("write `{}`", of.text)),
                );
                None
            }
            Entity::Broken => None,
        }
    }

    fn unknown_member(&mut self, of: &Word, member: &Word, sort: &str, known: &[&str]) {
        let found = Diagnostic::new(Code::UnknownMember, format!("{sort} has no member `{}`", member.text))
            .label(member.span, format!("asked of {sort}"));
        let help = match nearest(&member.text, known.iter().copied()) {
            Some(near) => format!("did you mean `{}.{near}`?", of.text),
            None => format!("members of {sort}: {}", known.join(", ")),
        };
        self.report(found.help(help));
    }

    fn state_member(
        &mut self,
        id: StateId,
        of: &Word,
        member: &Word,
        subject: Option<&Subject>,
        span: Span,
    ) -> Option<Expr> {
        let flow = self.program.states.get(id.0)?.flow;
        let rate = |dimension: Dimension| {
            if flow { dimension.over(Dimension::TIME).unwrap_or(dimension) } else { dimension }
        };
        let (asked, dimension) = match (member.text.as_str(), subject) {
            ("fraction" | "mass" | "amount" | "share" | "mass_share", Some(Subject::Species(name, word))) => {
                let asked = self.composition_member(id, member, name, word.as_ref())?;
                let dimension = match &asked {
                    StateMember::MassOf(_) => rate(Dimension::MASS),
                    StateMember::AmountOf(_) => rate(Dimension::AMOUNT),
                    _ => Dimension::ONE,
                };
                (asked, dimension)
            }
            ("fraction" | "mass" | "amount" | "share" | "mass_share", _) => {
                let what = if member.text == "fraction" { "liquid" } else { "H2O" };
                self.report(
                    Diagnostic::new(Code::UnknownMember, format!("`{}` wants to know of what", member.text))
                        .label(member.span, "no species or phase in parentheses")
                        .help(format!("write `{}.{}({what})`", of.text, member.text)),
                );
                return None;
            }
            (_, Some(_)) => {
                self.unknown_member(of, member, "a state", STATE_MEMBERS);
                return None;
            }
            ("T", None) => (StateMember::Temperature, Dimension::TEMPERATURE),
            ("P", None) => (StateMember::Pressure, Dimension::PRESSURE),
            ("n", None) => (StateMember::Amount, rate(Dimension::AMOUNT)),
            ("m", None) => (StateMember::Mass, rate(Dimension::MASS)),
            ("V", None) => (StateMember::Volume, rate(Dimension::VOLUME)),
            ("H", None) => (StateMember::Enthalpy, rate(Dimension::ENERGY)),
            ("U", None) => (StateMember::InternalEnergy, rate(Dimension::ENERGY)),
            ("h", None) => (StateMember::SpecificEnthalpy, Dimension::SPECIFIC_ENERGY),
            ("u", None) => (StateMember::SpecificInternalEnergy, Dimension::SPECIFIC_ENERGY),
            ("cp", None) => (StateMember::HeatCapacity, Dimension::SPECIFIC_HEAT_CAPACITY),
            ("density", None) => (StateMember::Density, Dimension::DENSITY),
            _ => {
                self.unknown_member(of, member, "a state", STATE_MEMBERS);
                return None;
            }
        };
        self.member_has_data(id, &asked, member)?;
        Some(Expr { span, dimension, kind: Kind::unsaid(dimension), node: Node::State(id, asked) })
    }

    /// Whether the state's species have the data that the member rests on.
    fn member_has_data(&mut self, id: StateId, asked: &StateMember, member: &Word) -> Option<()> {
        let constituents = self.program.states.get(id.0)?.constituents.clone();
        match asked {
            StateMember::Amount => self.all_have_moles(&constituents, member.span, "the amount of substance"),
            StateMember::Enthalpy
            | StateMember::InternalEnergy
            | StateMember::SpecificEnthalpy
            | StateMember::SpecificInternalEnergy => self.all_have_formation(&constituents, member),
            StateMember::Volume | StateMember::Density => self.all_have_volume(&constituents, member.span),
            _ => Some(()),
        }
    }

    fn all_have_formation(
        &mut self,
        constituents: &[crate::program::Constituent],
        member: &Word,
    ) -> Option<()> {
        let without: Vec<String> = constituents
            .iter()
            .filter_map(|constituent| self.program.species.get(constituent.species.0))
            .filter(|species| !species.absolute)
            .map(|species| species.name.clone())
            .collect();
        let Some(name) = without.first() else { return Some(()) };
        self.report(
            Diagnostic::new(
                Code::FormationMissing,
                format!("the absolute `{}` is asked, but `{name}` has no formation enthalpy", member.text),
            )
            .label(member.span, "absolute, counted from the elements at 298.15 K")
            .help(format!(
                "give `{name}` a line `formation ... kJ/mol at 298.15 K`, or ask a step for its `.dH`"
            )),
        );
        None
    }

    /// `fraction`, `mass`, `amount`, `share` and `mass_share` of a species or a phase.
    fn composition_member(
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

    fn step_member(&mut self, id: StepId, of: &Word, member: &Word, span: Span) -> Option<Expr> {
        let step = self.program.steps.get(id.0)?;
        let (flow, path, reports_heat) = (step.flow, step.path, !matches!(step.heat, Heat::Follows));
        let asked = match member.text.as_str() {
            "dH" => StepMember::EnthalpyChange,
            "dU" => StepMember::InternalEnergyChange,
            "dV" => StepMember::VolumeChange,
            "Q" => StepMember::Heat,
            "W" => StepMember::Work,
            "supply" => StepMember::Supply,
            "sensible" => StepMember::Sensible,
            "latent" => StepMember::Latent,
            "reaction" => StepMember::Reaction,
            "legs" => {
                self.report(
                    Diagnostic::new(Code::NotAQuantity, "the legs of a step are a list, not a value")
                        .label(member.span, "a value is wanted here")
                        .help(format!(
                            "the report lists them; ask for `{0}.sensible` or `{0}.latent`",
                            of.text
                        )),
                );
                return None;
            }
            _ => {
                self.unknown_member(of, member, "a step", STEP_MEMBERS);
                return None;
            }
        };
        let wants_path = matches!(asked, StepMember::Heat | StepMember::Work | StepMember::Supply);
        if wants_path && path.is_none() {
            if !reports_heat {
                self.heat_without_path(of, member, flow);
            }
            return None;
        }
        let base = if asked == StepMember::VolumeChange { Dimension::VOLUME } else { Dimension::ENERGY };
        let dimension = if flow { base.over(Dimension::TIME)? } else { base };
        Some(Expr { span, dimension, kind: Kind::Plain, node: Node::Step(id, asked) })
    }

    fn heat_without_path(&mut self, of: &Word, member: &Word, flow: bool) {
        let (first, second) = if flow {
            (Path::ConstantPressure, Path::NoShaftWork)
        } else {
            (Path::ConstantPressure, Path::ConstantVolume)
        };
        let what = if member.text == "W" { "work" } else { "heat" };
        self.report(
            Diagnostic::new(
                Code::HeatWithoutPath,
                format!("{what} depends on the path, and `{}` has none", of.text),
            )
            .label(member.span, format!("{what} is asked here"))
            .help(format!(
                "add `, {}` or `, {}` to the step; `.dH` and `.dU` need no path",
                first.as_str(),
                second.as_str()
            )),
        );
    }

    fn duty_member(&mut self, id: DutyId, of: &Word, member: &Word, span: Span) -> Option<Expr> {
        let duty = self.program.duties.get(id.0)?;
        let dimension = if duty.over.is_some() { Dimension::POWER } else { duty.value.dimension };
        let asked = match member.text.as_str() {
            "useful" => DutyMember::Useful,
            "supplied" => DutyMember::Supplied,
            "flow" => {
                self.report(
                    Diagnostic::new(
                        Code::LaterCarrier,
                        "`.flow` asks for a carrier, and carriers are not worked yet",
                    )
                    .label(member.span, "the flow of a carrier is asked here")
                    .help(format!("`{0}.supplied` is the heat that a carrier must bring", of.text)),
                );
                return None;
            }
            _ => {
                self.unknown_member(of, member, "a duty", DUTY_MEMBERS);
                return None;
            }
        };
        Some(Expr { span, dimension, kind: Kind::Plain, node: Node::Duty(id, asked) })
    }

    /// `M(Zn)`.
    pub(super) fn molar_mass(&mut self, name: &SpeciesName, span: Span) -> Option<Expr> {
        let Material::Species(id) = self.material(name)? else {
            self.report(
                Diagnostic::new(
                    Code::NotAQuantity,
                    format!("`{}` is a mixture, and `M` takes a species", name.name),
                )
                .label(name.span, "a mixture here")
                .help("ask for the molar mass of one of its species"),
            );
            return None;
        };
        let species = self.program.species.get(id.0)?;
        let Some(molar_mass) = species.molar_mass else {
            let text = species.name.clone();
            self.report_no_moles(&text, name.span, "the molar mass");
            return None;
        };
        let node = Node::Constant(molar_mass);
        Some(Expr { span, dimension: Dimension::MOLAR_MASS, kind: Kind::Plain, node })
    }
}

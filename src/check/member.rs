//! Members: `name.member` and `M(species)`.

use super::checker::{Checker, Entity, Material};
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::program::{DutyId, DutyMember, Expr, Heat, Node, Path, StateId, StateMember, StepId, StepMember};
use crate::span::Span;
use crate::syntax::tree::{SpeciesName, Subject, Word};
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

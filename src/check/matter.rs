//! What a state is made of.

use super::checker::{Checker, Material};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Constituent, Portion, Quantum, Source, StateId};
use crate::span::Span;
use crate::syntax::tree::{Expression, Matter, MatterKind, SpeciesName};
use crate::thermo::{PhaseClass, Pin};
use crate::units::Dimension;

/// Matter as gathered: its constituents, and whether its amounts are rates.
pub(super) struct Gathered {
    pub(super) source: Source,
    pub(super) constituents: Vec<Constituent>,
    pub(super) flow: bool,
    /// Whether fresh material is among it.
    pub(super) fresh: bool,
}

/// How amounts are counted, by dimension: for a batch and per time.
const AMOUNTS: [(Dimension, Quantum, bool); 6] = [
    (Dimension::MASS, Quantum::Mass, false),
    (Dimension::AMOUNT, Quantum::Substance, false),
    (Dimension::VOLUME, Quantum::Volume, false),
    (Dimension::MASS_RATE, Quantum::Mass, true),
    (Dimension::AMOUNT_RATE, Quantum::Substance, true),
    (Dimension::VOLUME_RATE, Quantum::Volume, true),
];

impl Checker<'_> {
    pub(super) fn matter(&mut self, matter: &Matter) -> Option<Gathered> {
        match &matter.kind {
            MatterKind::Named(name) => self.named_matter(name),
            MatterKind::Measured(amount, of) => self.measured(amount.as_ref(), of, matter.span),
            MatterKind::Parted(_, name) => {
                self.state_named(name);
                self.later_parted(matter.span);
                None
            }
            MatterKind::Sum(parts) => self.sum_of_matter(parts, matter.span),
        }
    }

    fn named_matter(&mut self, name: &SpeciesName) -> Option<Gathered> {
        if name.symbol.is_none() && self.names.contains_key(&name.name) {
            let word = self.word_of(&name.name, name.span);
            let id = self.state_named(&word)?;
            return self.whole(id);
        }
        if self.materials.contains_key(&name.name) {
            if self.is_broken_material(&name.name) {
                return None;
            }
            self.report(
                Diagnostic::new(Code::NotAQuantity, format!("how much of `{}`?", name.to_text()))
                    .label(name.span, "a material without an amount")
                    .help(format!("write `1 kg of {}`", name.to_text())),
            );
            return None;
        }
        self.look_up(&name.name, name.span);
        None
    }

    fn whole(&mut self, id: StateId) -> Option<Gathered> {
        let state = self.program.states.get(id.0)?;
        Some(Gathered {
            source: Source::Whole(id),
            constituents: state.constituents.clone(),
            flow: state.flow,
            fresh: false,
        })
    }

    fn sum_of_matter(&mut self, parts: &[Matter], span: Span) -> Option<Gathered> {
        let gathered: Vec<Option<Gathered>> = parts.iter().map(|part| self.matter(part)).collect();
        let gathered: Vec<Gathered> = gathered.into_iter().collect::<Option<_>>()?;
        let flow = gathered.first()?.flow;
        if let Some(at) = gathered.iter().position(|part| part.flow != flow) {
            self.flow_and_batch(parts.get(at).map_or(span, |part| part.span), flow);
            return None;
        }
        let mut constituents: Vec<Constituent> = Vec::new();
        let mut fresh = false;
        let mut sources = Vec::new();
        for part in gathered {
            let at: Vec<usize> = part
                .constituents
                .iter()
                .map(|constituent| place_in(&mut constituents, constituent))
                .collect();
            fresh |= part.fresh;
            sources.push(moved(part.source, &at));
        }
        self.symbols_agree(&constituents, span)?;
        Some(Gathered { source: Source::Sum(sources), constituents, flow, fresh })
    }

    pub(super) fn flow_and_batch(&mut self, span: Span, first_flows: bool) {
        let (this, other) = if first_flows { ("a batch", "a flow") } else { ("a flow", "a batch") };
        self.report(
            Diagnostic::new(Code::FlowAndBatch, format!("{this} beside {other}"))
                .label(span, format!("{this} here"))
                .help("give all amounts as amounts, or all per time"),
        );
    }

    /// `AMOUNT of MATERIAL`, or an amount or a share of a state.
    fn measured(&mut self, amount: Option<&Expression>, of: &Matter, span: Span) -> Option<Gathered> {
        let target = self.target(of);
        let Some(amount) = amount else {
            self.report(
                Diagnostic::new(Code::NothingSettles, "nothing settles an unknown amount")
                    .label(span, "an amount `?` here")
                    .help("`let m = ? in kg` with a `settle` line is for unknown amounts"),
            );
            return None;
        };
        let amount_checked = self.expression(amount);
        let (target, amount) = (target?, amount_checked?);
        let counted = AMOUNTS.iter().find(|(dimension, ..)| *dimension == amount.dimension);
        let share = amount.dimension.is_one() && matches!(target, Target::Matter(_));
        let (quantum, flow) = match (counted, share) {
            (Some((_, quantum, flow)), _) => (*quantum, *flow),
            (None, true) => (Quantum::Share, false),
            (None, false) => {
                let wanted: Vec<Dimension> = AMOUNTS.iter().map(|(dimension, ..)| *dimension).collect();
                self.wrong_dimension(amount.span, amount.dimension, &wanted, "an amount");
                return None;
            }
        };
        match target {
            Target::Material(parts) => {
                let constituents: Vec<Constituent> = parts.iter().map(|(part, _)| *part).collect();
                self.can_be_counted(&constituents, quantum, amount.span)?;
                let portions = parts
                    .iter()
                    .enumerate()
                    .map(|(constituent, (_, share))| Portion { constituent, share: *share });
                let source = Source::Fresh { amount, quantum, portions: portions.collect() };
                Some(Gathered { source, constituents, flow, fresh: true })
            }
            Target::Matter(matter) => {
                if quantum != Quantum::Share && matter.flow != flow {
                    self.flow_and_batch(amount.span, matter.flow);
                    return None;
                }
                self.can_be_counted(&matter.constituents, quantum, amount.span)?;
                let source = Source::PartOf { amount, quantum, of: Box::new(matter.source) };
                Some(Gathered {
                    source,
                    constituents: matter.constituents,
                    flow: matter.flow,
                    fresh: matter.fresh,
                })
            }
        }
    }

    /// What an amount is of.
    fn target(&mut self, of: &Matter) -> Option<Target> {
        let MatterKind::Named(name) = &of.kind else {
            return self.matter(of).map(Target::Matter);
        };
        let is_state = name.symbol.is_none() && self.names.contains_key(&name.name);
        if is_state && self.materials.contains_key(&name.name) {
            self.report_either(&name.name, name.span);
            return None;
        }
        if is_state {
            return self.named_matter(name).map(Target::Matter);
        }
        match self.material(name)? {
            Material::Species(species) => {
                let pin = self.pin(species, name)?;
                Some(Target::Material(vec![(Constituent { species, pin }, 1.0)]))
            }
            Material::Mixture(blend) => {
                if let Some(symbol) = &name.symbol {
                    self.report(
                        Diagnostic::new(
                            Code::UnknownPhase,
                            format!("`{}` is a mixture and takes no state symbol", name.name),
                        )
                        .label(symbol.span, "of which of its species?")
                        .help("give the symbols to its species, where the mixture is declared"),
                    );
                    return None;
                }
                Some(Target::Material(blend.portions))
            }
            Material::Broken => None,
        }
    }

    /// Moles want a molar mass, a volume wants densities.
    fn can_be_counted(&mut self, parts: &[Constituent], quantum: Quantum, span: Span) -> Option<()> {
        match quantum {
            Quantum::Substance => self.all_have_moles(parts, span, "an amount of substance"),
            Quantum::Volume => self.all_have_volume(parts, span),
            Quantum::Mass | Quantum::Share => Some(()),
        }
    }

    /// Whether every constituent has a phase whose volume is known: a gas, or one with a density.
    pub(super) fn all_have_volume(&mut self, parts: &[Constituent], span: Span) -> Option<()> {
        for part in parts {
            let species = self.program.species.get(part.species.0)?;
            let known = |at: usize| {
                let gas = species.phases.get(at).is_some_and(|phase| phase.class == PhaseClass::Gas);
                (gas && species.molar_mass.is_some()) || species.curve.has_density(at)
            };
            let any = match part.pin {
                Pin::Phase(at) => known(at),
                Pin::Class(_) | Pin::Stable => (0..species.phases.len()).any(known),
            };
            if !any {
                let name = self.constituent_name(part);
                self.report(
                    Diagnostic::new(
                        Code::DensityMissing,
                        format!("a volume is asked of `{name}`, which has no density"),
                    )
                    .label(span, "a volume here")
                    .help("add `density ... kg/m3` to its phase, or count it by mass"),
                );
                return None;
            }
        }
        Some(())
    }

    /// One species stands in one state with one symbol: without a symbol beside one with it, nobody knows which is
    /// meant; liquid and gas together want another gas, or the boiling point itself.
    fn symbols_agree(&mut self, parts: &[Constituent], span: Span) -> Option<()> {
        for (at, part) in parts.iter().enumerate() {
            let Some(other) = parts[..at].iter().find(|other| other.species == part.species) else {
                continue;
            };
            let gas_beside = parts.iter().any(|third| {
                third.species != part.species && self.class_of_constituent(third) == Some(PhaseClass::Gas)
            });
            if part.pin != Pin::Stable && other.pin != Pin::Stable && gas_beside {
                continue;
            }
            let (a, b) = (self.constituent_name(other), self.constituent_name(part));
            self.report(
                Diagnostic::new(Code::StateSymbolClash, format!("`{a}` and `{b}` in one state"))
                    .label(span, "a written state symbol stays with the species")
                    .help("declare both without a symbol, so that the stable phase follows, or both with the same"),
            );
            return None;
        }
        Some(())
    }

    /// The phase rule: beside another gas or liquid, a species that could condense or boil says its phase.
    pub(super) fn phases_said(
        &mut self,
        parts: &[Constituent],
        places: &[(Constituent, Span)],
    ) -> Option<()> {
        for (part, span) in places.iter().filter(|(part, _)| part.pin == Pin::Stable) {
            let Some(species) = self.program.species.get(part.species.0) else { continue };
            if !species.can_condense() {
                continue;
            }
            let shares = |class: PhaseClass| {
                self.can_be(part, class)
                    && parts.iter().any(|other| other.species != part.species && self.can_be(other, class))
            };
            let beside = if shares(PhaseClass::Gas) {
                "gas"
            } else if shares(PhaseClass::Liquid) {
                "liquid"
            } else {
                continue;
            };
            let name = species.name.clone();
            let solid = species.phases.iter().any(|phase| phase.class == PhaseClass::Solid);
            let symbols = if solid { format!("`{name}(s)`, `{name}(l)`") } else { format!("`{name}(l)`") };
            self.report(
                Diagnostic::new(
                    Code::SymbolWanted,
                    format!("is `{name}` liquid or gas beside another {beside}?"),
                )
                .label(
                    *span,
                    "its partial pressure is not the total pressure, so that the phase does not follow",
                )
                .help(match self.melting_beside(parts, part).filter(|_| beside == "liquid") {
                    Some(other) => format!(
                        "write {symbols} or `{name}(g)` where its matter is declared; or `{other}(s)`, if that stays solid"
                    ),
                    None => format!("write {symbols} or `{name}(g)` where its matter is declared"),
                }),
            );
            return None;
        }
        Some(())
    }

    /// Another species that could be solid as well as liquid.
    fn melting_beside(&self, parts: &[Constituent], part: &Constituent) -> Option<String> {
        let both = |other: &&Constituent| {
            other.species != part.species
                && other.pin == Pin::Stable
                && self.can_be(other, PhaseClass::Solid)
                && self.can_be(other, PhaseClass::Liquid)
        };
        let other = parts.iter().find(both)?;
        Some(self.program.species.get(other.species.0)?.name.clone())
    }

    fn can_be(&self, part: &Constituent, class: PhaseClass) -> bool {
        match part.pin {
            Pin::Class(pinned) => pinned == class,
            Pin::Phase(_) => self.class_of_constituent(part) == Some(class),
            Pin::Stable => self
                .program
                .species
                .get(part.species.0)
                .is_some_and(|species| species.phases.iter().any(|phase| phase.class == class)),
        }
    }
}

/// A material with shares by mass, or matter of states.
enum Target {
    Material(Vec<(Constituent, f64)>),
    Matter(Gathered),
}

/// The place of a constituent in the list, added where it is new.
fn place_in(list: &mut Vec<Constituent>, constituent: &Constituent) -> usize {
    if let Some(at) = list.iter().position(|known| known == constituent) {
        return at;
    }
    list.push(*constituent);
    list.len() - 1
}

/// A source whose constituents have moved to these places.
fn moved(source: Source, places: &[usize]) -> Source {
    match source {
        Source::Fresh { amount, quantum, portions } => Source::Fresh {
            amount,
            quantum,
            portions: portions
                .into_iter()
                .map(|portion| Portion {
                    constituent: places.get(portion.constituent).copied().unwrap_or(portion.constituent),
                    ..portion
                })
                .collect(),
        },
        Source::PartOf { amount, quantum, of } => {
            Source::PartOf { amount, quantum, of: Box::new(moved(*of, places)) }
        }
        Source::Sum(parts) => Source::Sum(parts.into_iter().map(|part| moved(part, places)).collect()),
        Source::Whole(id) => Source::Whole(id),
    }
}

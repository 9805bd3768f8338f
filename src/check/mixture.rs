//! Mixtures: species with their shares, and what a material's name means.

use super::checker::{Checker, Declared, Material};
use super::datum::About;
use super::names::declared_twice;
use super::species::class_of;
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::program::{Constituent, Entry, MixtureNote, SpeciesId};
use crate::span::Span;
use crate::syntax::tree::{self, Mixture, PortionShare, SpeciesName, Suffixes};
use crate::thermo::{PhaseClass, Pin};
use crate::units::{Dimension, Kind};

/// By how much shares may miss 100 % before they are refused.
const CLOSURE: f64 = 1e-8;

/// A mixture: its constituents with their shares by mass.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Blend {
    pub(super) portions: Vec<(Constituent, f64)>,
}

/// In what the shares are counted.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Counted {
    Mass,
    Mole,
    Volume,
}

impl Checker<'_> {
    /// What a material's name stands for; `None` where that was reported, now or before.
    pub(super) fn material(&mut self, name: &SpeciesName) -> Option<Material> {
        match self.materials.get(&name.name) {
            Some(Declared { what: Material::Broken, .. }) => None,
            Some(declared) => Some(declared.what.clone()),
            None if self.broken.contains(&name.name) => None,
            None => {
                self.unknown_material(name);
                None
            }
        }
    }

    fn unknown_material(&mut self, name: &SpeciesName) {
        if let Some(place) = self.ahead.get(&name.name).copied().filter(|place| place.start > name.span.start)
        {
            self.report(
                Diagnostic::new(
                    Code::UsedBeforeDeclared,
                    format!("`{}` is used before it is declared", name.name),
                )
                .label(name.span, "used here")
                .label(place, "declared only here")
                .help("a sheet is read from the top: move the declaration above this line"),
            );
            return;
        }
        let found = Diagnostic::new(Code::UnknownSpecies, format!("unknown material `{}`", name.name))
            .label(name.span, "no species or mixture of this name");
        let help = match nearest(&name.name, self.materials.keys().map(String::as_str)) {
            Some(near) => format!("did you mean `{near}`?"),
            None => {
                format!("declare it with a block `species {} {{ ... }}`, or take it with `use`", name.name)
            }
        };
        self.report(found.help(help));
    }

    /// The phase that a state symbol says; a species with one phase is always in it.
    pub(super) fn pin(&mut self, species: SpeciesId, name: &SpeciesName) -> Option<Pin> {
        let phases = self.program.species.get(species.0)?.phases.clone();
        let Some(symbol) = &name.symbol else {
            return Some(if phases.len() == 1 { Pin::Phase(0) } else { Pin::Stable });
        };
        let of_class = |class: PhaseClass| -> Vec<usize> {
            (0..phases.len()).filter(|at| phases[*at].class == class).collect()
        };
        let class = match symbol.text.as_str() {
            "s" | "cr" => Some(PhaseClass::Solid),
            "l" => Some(PhaseClass::Liquid),
            "g" => Some(PhaseClass::Gas),
            _ => None,
        };
        if let Some(at) =
            phases.iter().position(|phase| phase.name == symbol.text || phase.symbol == symbol.text)
        {
            return Some(Pin::Phase(at));
        }
        match class.map(|class| (class, of_class(class))) {
            Some((_, which)) if which.len() == 1 => Some(Pin::Phase(which[0])),
            Some((class, which)) if which.len() > 1 => Some(Pin::Class(class)),
            _ => {
                let known: Vec<String> =
                    phases.iter().map(|phase| format!("`{}({})`", name.name, phase.symbol)).collect();
                self.report(
                    Diagnostic::new(
                        Code::UnknownPhase,
                        format!("`{}` has no phase `{}`", name.name, symbol.text),
                    )
                    .label(symbol.span, "not a phase of its block")
                    .help(format!("it has {}", known.join(", "))),
                );
                None
            }
        }
    }

    /// A word for a phase of a species, as in `40 % liquid`: a phase's name or a class.
    pub(super) fn phase_word(&mut self, species: SpeciesId, word: &str, span: Span) -> Option<usize> {
        let info = self.program.species.get(species.0)?;
        let class = match word {
            "vapour" | "vapor" | "g" => Some(PhaseClass::Gas),
            "l" => Some(PhaseClass::Liquid),
            "s" => Some(PhaseClass::Solid),
            _ => class_of(word),
        };
        let by_name = info.phases.iter().position(|phase| phase.name == word);
        let by_class = || info.phases.iter().position(|phase| Some(phase.class) == class);
        if let Some(at) = by_name.or_else(by_class) {
            return Some(at);
        }
        let (name, known) = (
            info.name.clone(),
            info.phases.iter().map(|phase| phase.name.clone()).collect::<Vec<_>>().join(", "),
        );
        self.report(
            Diagnostic::new(Code::UnknownPhase, format!("`{name}` has no phase `{word}`"))
                .label(span, "not a phase of its block")
                .help(format!("its phases: {known}")),
        );
        None
    }

    pub(super) fn constituent_name(&self, part: &Constituent) -> String {
        let Some(species) = self.program.species.get(part.species.0) else { return String::new() };
        match part.pin {
            Pin::Phase(at) if species.phases.len() > 1 => species.in_phase(at),
            Pin::Class(PhaseClass::Solid) => format!("{}(s)", species.name),
            Pin::Class(PhaseClass::Liquid) => format!("{}(l)", species.name),
            Pin::Class(PhaseClass::Gas) => format!("{}(g)", species.name),
            Pin::Phase(_) | Pin::Stable => species.name.clone(),
        }
    }

    pub(super) fn mixture(&mut self, mixture: &Mixture, span: Span) {
        if let Some(other) = self.materials.get(&mixture.name.text) {
            self.diagnostics.push(declared_twice(&mixture.name, other.span));
            return;
        }
        let blend = self.blend(mixture);
        let what = match blend {
            Some(blend) => {
                self.note_mixture(mixture, &blend, span);
                Material::Mixture(blend)
            }
            None => Material::Broken,
        };
        self.materials.insert(mixture.name.text.clone(), Declared { what, span: mixture.name.span });
    }

    fn note_mixture(&mut self, mixture: &Mixture, blend: &Blend, span: Span) {
        let molar: Option<Vec<f64>> = blend
            .portions
            .iter()
            .map(|(part, share)| Some(share / self.molar_mass_of(part.species)?))
            .collect();
        let total: f64 = molar.iter().flatten().sum();
        let portions = blend
            .portions
            .iter()
            .enumerate()
            .map(|(at, (part, share))| {
                let mole = molar.as_ref().and_then(|molar| molar.get(at)).map(|amount| amount / total);
                (self.constituent_name(part), *share, mole)
            })
            .collect();
        let written = self.written(span);
        let text = written
            .split_once(&mixture.name.text)
            .map_or(written.as_str(), |(_, rest)| rest.trim())
            .to_owned();
        let source = mixture.suffixes.source().map(str::to_owned);
        self.program.mixtures.push(MixtureNote { name: mixture.name.text.clone(), text, portions, source });
        self.program.order.push(Entry::Mixture(self.program.mixtures.len() - 1));
    }

    pub(super) fn molar_mass_of(&self, species: SpeciesId) -> Option<f64> {
        self.program.species.get(species.0)?.molar_mass
    }

    fn blend(&mut self, mixture: &Mixture) -> Option<Blend> {
        let counted = match mixture.by.text.as_str() {
            "mass" => Counted::Mass,
            "mole" => Counted::Mole,
            "volume" => Counted::Volume,
            other => {
                let message = format!("shares cannot be counted by `{other}`");
                self.report(
                    Diagnostic::new(Code::ShareWrong, message)
                        .label(mixture.by.span, "mass, mole or volume is wanted")
                        .help("write `by mass`, `by mole`, or of gases `by volume`"),
                );
                return None;
            }
        };
        let mut parts: Vec<(Vec<(Constituent, f64)>, f64)> = Vec::new();
        let shares = self.shares(mixture);
        let mut complete = shares.is_some() && self.each_once(mixture);
        for (at, portion) in mixture.portions.iter().enumerate() {
            let share = shares.as_ref().and_then(|shares| shares.get(at)).copied().unwrap_or(0.0);
            match self.portion(&portion.species, counted) {
                Some(inner) => parts.push((inner, share)),
                None => complete = false,
            }
        }
        if !complete {
            return None;
        }
        let by_mass = self.to_mass(parts, counted);
        let pinned: Vec<(Constituent, Span)> = mixture
            .portions
            .iter()
            .filter_map(|portion| {
                let constituent = by_mass.iter().find(|(part, _)| self.named(part, &portion.species))?;
                Some((constituent.0, portion.species.span))
            })
            .collect();
        self.phases_said(&by_mass.iter().map(|(part, _)| *part).collect::<Vec<_>>(), &pinned)?;
        Some(Blend { portions: by_mass })
    }

    /// A part given twice is a slip as likely as a sum.
    fn each_once(&mut self, mixture: &Mixture) -> bool {
        let text = |at: usize| mixture.portions.get(at).map(|portion| portion.species.to_text());
        let again = (1..mixture.portions.len())
            .find_map(|at| (0..at).find(|first| text(*first) == text(at)).map(|first| (first, at)));
        let Some((first, at)) = again else { return true };
        let (first, again) = (&mixture.portions[first], &mixture.portions[at]);
        self.report(
            Diagnostic::new(
                Code::ShareWrong,
                format!("`{}` is given twice in one mixture", again.species.to_text()),
            )
            .label(again.span, "given again here")
            .label(first.span, "given first here")
            .help("give each part once, with the share of all of it"),
        );
        false
    }

    fn named(&self, part: &Constituent, name: &SpeciesName) -> bool {
        self.program.species.get(part.species.0).is_some_and(|species| species.name == name.name)
    }

    /// The shares in the order of the portions, adding up to one exactly enough, `rest` filled in.
    fn shares(&mut self, mixture: &Mixture) -> Option<Vec<f64>> {
        let mut shares = Vec::new();
        let mut rest: Option<(usize, Span)> = None;
        let mut complete = true;
        for (at, portion) in mixture.portions.iter().enumerate() {
            match &portion.share {
                PortionShare::Rest => {
                    if let Some((_, first)) = rest.replace((at, portion.span)) {
                        self.second_rest(portion.span, first);
                        complete = false;
                    }
                    shares.push(0.0);
                }
                PortionShare::Share(datum, interval) => match self.share(datum, interval.as_ref()) {
                    Some(share) => shares.push(share),
                    None => {
                        complete = false;
                        shares.push(0.0);
                    }
                },
            }
        }
        if !complete {
            return None;
        }
        let sum: f64 = shares.iter().sum();
        match rest {
            Some((at, _)) if sum < 1.0 - CLOSURE => {
                shares[at] = 1.0 - sum;
                Some(shares)
            }
            None if (sum - 1.0).abs() <= CLOSURE => Some(shares.iter().map(|share| share / sum).collect()),
            _ => {
                self.shares_off(mixture, sum, rest.is_some());
                None
            }
        }
    }

    fn second_rest(&mut self, second: Span, first: Span) {
        self.report(
            Diagnostic::new(Code::ShareWrong, "a second `rest` in one mixture")
                .label(second, "what is left cannot be shared out")
                .label(first, "the first `rest`")
                .help("give one of the two its share"),
        );
    }

    fn shares_off(&mut self, mixture: &Mixture, sum: f64, rest: bool) {
        let percent = format!("{:.6}", sum * 100.0);
        let percent = percent.trim_end_matches('0').trim_end_matches('.');
        let (message, help) = if rest {
            (
                format!("the shares of `{}` are {percent} % and leave no rest", mixture.name.text),
                "check the shares, or leave out the part that is the rest",
            )
        } else {
            (
                format!("the shares of `{}` add up to {percent} %", mixture.name.text),
                "correct a share, or let one part be the `rest`",
            )
        };
        self.report(
            Diagnostic::new(Code::SharesSum, message)
                .label(mixture.name.span, "100 % is wanted, within 1e-6 %")
                .help(help),
        );
    }

    fn share(&mut self, datum: &tree::Datum, interval: Option<&tree::Interval>) -> Option<f64> {
        let read = self.datum_value(datum)?;
        if !read.unit.dimension.is_one() {
            self.wrong_dimension(datum.span, read.unit.dimension, &[Dimension::ONE], "a share");
            return None;
        }
        if let Some(interval) = interval {
            let about = About {
                dimension: Dimension::ONE,
                kind: Kind::Plain,
                si: read.si,
                percent: read.unit.is_percent(),
                span: datum.span,
            };
            let suffixes = Suffixes { intervals: vec![interval.clone()], ..Suffixes::default() };
            self.interval(&suffixes, about)?;
        }
        if read.si > 0.0 && read.si <= 1.0 {
            return Some(read.si);
        }
        self.report(
            Diagnostic::new(Code::ShareWrong, "a share that does not lie between 0 % and 100 %")
                .label(datum.span, "here")
                .help("leave out what is not there"),
        );
        None
    }

    /// The constituents of a portion with their shares by mass: a species, or a mixture inside the mixture.
    fn portion(&mut self, name: &SpeciesName, counted: Counted) -> Option<Vec<(Constituent, f64)>> {
        let parts = match self.material(name)? {
            Material::Mixture(blend) => blend.portions,
            Material::Species(species) => vec![(Constituent { species, pin: self.pin(species, name)? }, 1.0)],
            Material::Broken => return None,
        };
        if counted == Counted::Mass {
            return Some(parts);
        }
        for (part, _) in &parts {
            if self.molar_mass_of(part.species).is_none() {
                let text = self.constituent_name(part);
                self.report_no_moles(&text, name.span, "a share by mole");
                return None;
            }
            if counted == Counted::Volume && self.class_of_constituent(part) != Some(PhaseClass::Gas) {
                let text = self.constituent_name(part);
                self.report(
                    Diagnostic::new(
                        Code::ShareWrong,
                        format!("a share by volume of `{text}`, which is not said to be a gas"),
                    )
                    .label(name.span, "shares by volume are for gases")
                    .help(format!("write `{}(g)`, or give the shares by mass", name.name)),
                );
                return None;
            }
        }
        Some(parts)
    }

    /// Shares as counted to shares by mass, equal constituents added up.
    fn to_mass(
        &self,
        parts: Vec<(Vec<(Constituent, f64)>, f64)>,
        counted: Counted,
    ) -> Vec<(Constituent, f64)> {
        let mut by_mass: Vec<(Constituent, f64)> = Vec::new();
        for (inner, share) in parts {
            // the molar mass of the portion: 1 / Σ w/M
            let per_mole: f64 =
                inner.iter().map(|(part, mass)| mass / self.molar_mass_of(part.species).unwrap_or(1.0)).sum();
            let factor = if counted == Counted::Mass { 1.0 } else { 1.0 / per_mole };
            for (part, mass) in inner {
                let mass = share * factor * mass;
                match by_mass.iter_mut().find(|(known, _)| *known == part) {
                    Some((_, sum)) => *sum += mass,
                    None => by_mass.push((part, mass)),
                }
            }
        }
        let total: f64 = by_mass.iter().map(|(_, mass)| mass).sum();
        by_mass.iter_mut().for_each(|(_, mass)| *mass /= total);
        by_mass
    }

    /// The class of a constituent where its phase is said, or where all its phases are of one class.
    pub(super) fn class_of_constituent(&self, part: &Constituent) -> Option<PhaseClass> {
        let species = self.program.species.get(part.species.0)?;
        match part.pin {
            Pin::Phase(at) => species.phases.get(at).map(|phase| phase.class),
            Pin::Class(class) => Some(class),
            Pin::Stable => {
                let first = species.phases.first()?.class;
                species.phases.iter().all(|phase| phase.class == first).then_some(first)
            }
        }
    }

    pub(super) fn report_no_moles(&mut self, name: &str, span: Span, what: &str) {
        self.report(
            Diagnostic::new(
                Code::MolesWithoutFormula,
                format!("{what} is asked, but `{name}` has no formula"),
            )
            .label(span, "moles of a material without a formula")
            .help("count it by mass, or give the species its `formula` or `molar_mass`"),
        );
    }

    pub(super) fn all_have_moles(&mut self, parts: &[Constituent], span: Span, what: &str) -> Option<()> {
        for part in parts {
            if self.molar_mass_of(part.species).is_none() {
                let name = self.constituent_name(part);
                self.report_no_moles(&name, span, what);
                return None;
            }
        }
        Some(())
    }
}

//! Mixtures: species with their shares, and what a material's name means.

use super::checker::{Blend, Checker, Declared, Material};
use super::datum::About;
use super::names::declared_twice;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Constituent, Entry, MixtureNote};
use crate::span::Span;
use crate::syntax::tree::{self, Mixture, PortionShare, SpeciesName, Suffixes};
use crate::thermo::PhaseClass;
use crate::units::{Dimension, Kind};

/// By how much shares may miss 100 % before they are refused.
const CLOSURE: f64 = 1e-8;

/// In what the shares are counted.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Counted {
    Mass,
    Mole,
    Volume,
}

impl Checker<'_> {
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
}

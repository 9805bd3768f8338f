//! Species blocks to heating curves.

use super::checker::{Checker, Declared, Material};
use super::names::declared_twice;
use super::pedigree::{Draft, given_twice, transition_range};
use super::phase::{Phase, phase_info};
use super::transition::{self, Neighbour};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{DatumKind, Entry, Species, SpeciesId};
use crate::span::Span;
use crate::syntax::tree::{SpeciesBlock, SpeciesEntry, TransitionEntry, Word};
use crate::thermo::{CurveData, CurveError, HeatingCurve, Link, VapourPressure};
use crate::units::quantity;

impl Checker<'_> {
    pub(super) fn species_statement(&mut self, block: &SpeciesBlock) {
        let species = self.species(block, None);
        self.warn_if_read(species.as_ref());
        self.enter_species(&block.name, species);
        if let Some(Declared { what: Material::Species(id), .. }) = self.materials.get(&block.name.text) {
            self.program.order.push(Entry::Species(*id));
        }
    }

    /// Warns of what does not agree in a species that the user wrote.
    pub(super) fn warn_if_read(&mut self, species: Option<&Species>) {
        let claims = std::mem::take(&mut self.claims);
        if let Some(species) = species {
            self.warn_of_inconsistency(species, &claims);
        }
    }

    /// Puts a species into the materials, as broken where it could not be read.
    pub(super) fn enter_species(&mut self, name: &Word, species: Option<Species>) {
        if let Some(other) = self.materials.get(&name.text).filter(|other| other.what != Material::Broken) {
            let found = declared_twice(name, other.span);
            self.diagnostics
                .push(found.help("take one of the two out: a material has one set of data in a sheet"));
            return;
        }
        let what = match species {
            Some(species) => {
                self.program.species.push(species);
                Material::Species(SpeciesId(self.program.species.len() - 1))
            }
            None => Material::Broken,
        };
        self.materials.insert(name.text.clone(), Declared { what, span: name.span });
    }

    /// Reads a block; `None` where something in it was reported.
    pub(super) fn species(&mut self, block: &SpeciesBlock, from: Option<String>) -> Option<Species> {
        let before = self.error_count();
        let formula = self.species_formula(block);
        let source = self.single(block, |entry| match entry {
            SpeciesEntry::Source(text) => Some((text.text.clone(), text.span)),
            _ => None,
        });
        let cas = self.single(block, |entry| match entry {
            SpeciesEntry::Cas(text) => Some((text.text.clone(), text.span)),
            _ => None,
        });
        let mut draft = Draft { block, source, molar_mass: None, data: Vec::new() };
        let given = self.given_molar_mass(&mut draft);
        let poison = self.error_count() > before; // a formula at fault is told once
        let from_formula = formula.as_ref().map(|(_, composition)| composition.molar_mass().value);
        draft.molar_mass = given.or(from_formula).or(poison.then_some(1.0));
        let formation = self.species_formation(&mut draft);
        let decomposes = self.decomposition(&mut draft);
        let vapour_pressure = self.species_vapour_pressure(&mut draft);
        let (phases, links, link_spans) = self.phases(&mut draft, formation.is_some())?;
        if self.error_count() > before || block.damaged {
            return None;
        }
        let infos = phases.iter().map(|phase| phase_info(&phase.data)).collect();
        let data = CurveData {
            phases: phases.iter().map(|phase| phase.data.clone()).collect(),
            links,
            formation: formation.map(quantity),
            decomposes_at: decomposes.map(quantity),
            vapour_pressure,
            molar_mass: draft.molar_mass.map(quantity),
        };
        let curve = match HeatingCurve::build(data) {
            Ok(curve) => curve,
            Err(error) => {
                self.curve_error(error, block, &phases, &link_spans);
                return None;
            }
        };
        Some(Species {
            name: block.name.text.clone(),
            label: block.label.as_ref().map(|label| label.text.clone()),
            formula,
            cas,
            molar_mass: draft.molar_mass,
            phases: infos,
            absolute: curve.absolute(),
            curve: std::sync::Arc::new(curve),
            data: draft.data,
            allowances: Vec::new(),
            remarks: remarks(block),
            from,
            span: block.name.span,
        })
    }

    pub(super) fn error_count(&self) -> usize {
        self.diagnostics.iter().filter(|found| found.is_error()).count()
    }

    /// The one entry of a sort; a second one is refused.
    pub(super) fn single<T>(
        &mut self,
        block: &SpeciesBlock,
        pick: impl Fn(&SpeciesEntry) -> Option<(T, Span)>,
    ) -> Option<T> {
        let mut picked = block.entries.iter().filter_map(pick);
        let first = picked.next();
        if let (Some((_, first)), Some((_, second))) = (&first, picked.next()) {
            let diagnostic = given_twice(second, *first);
            self.diagnostics.push(diagnostic);
        }
        first.map(|(value, _)| value)
    }

    fn species_vapour_pressure(&mut self, draft: &mut Draft<'_>) -> Option<VapourPressure> {
        let entry = self.single(draft.block, |entry| match entry {
            SpeciesEntry::VapourPressure(entry) => Some((entry.clone(), entry.span)),
            _ => None,
        })?;
        let law = self.vapour_pressure(&entry);
        let valid = law.map(|law| law.span()).map(|(lo, hi)| (lo.value, hi.value));
        let datum = self.datum(draft, DatumKind::VapourPressure, &entry.suffixes, entry.span, valid);
        draft.data.push(datum);
        law
    }

    /// Phases and the links between them, in the order of the block.
    fn phases(
        &mut self,
        draft: &mut Draft<'_>,
        formation: bool,
    ) -> Option<(Vec<Phase>, Vec<Link>, Vec<Span>)> {
        let block = draft.block;
        let name = block.name.text.clone();
        let mut phases: Vec<(Option<Phase>, Neighbour)> = Vec::new();
        let (mut links, mut link_spans) = (Vec::new(), Vec::new());
        let mut pending: Option<&TransitionEntry> = None;
        let mut complete = true;
        for entry in &block.entries {
            match entry {
                SpeciesEntry::Transition(transition) => {
                    if pending.is_some() || phases.is_empty() {
                        self.stray_transition(transition.span, block.damaged);
                        complete = false;
                    }
                    pending = Some(transition);
                }
                SpeciesEntry::Phase(phase) => {
                    let index = phases.len();
                    let (read, neighbour) = self.phase(draft, phase, index);
                    if let Some((_, first)) = phases.iter().find(|(_, known)| known.name == phase.name.text) {
                        let first = first.head;
                        self.diagnostics.push(given_twice(phase.head, first));
                        complete = false;
                    }
                    if let Some((_, below)) = phases.last() {
                        let material =
                            transition::Material { name: &name, molar_mass: draft.molar_mass, formation };
                        let below = below.clone();
                        match self.link(pending, &below, &neighbour, &material) {
                            Some(link) => links.push(link),
                            None => complete = false,
                        }
                        link_spans.push(pending.map_or(phase.head, |transition| transition.span));
                    }
                    complete &= read.is_some();
                    if let (Some(transition), Some(below)) = (pending.take(), index.checked_sub(1)) {
                        let kind = DatumKind::Transition { below };
                        let at = transition_range(self, transition);
                        let datum = self.datum(draft, kind, &transition.suffixes, transition.span, at);
                        draft.data.push(datum);
                    }
                    phases.push((read, neighbour));
                }
                _ => {}
            }
        }
        if let Some(transition) = pending {
            self.stray_transition(transition.span, block.damaged);
            complete = false;
        }
        if phases.is_empty() && complete && !block.damaged {
            self.report(
                Diagnostic::new(Code::DatumMissing, format!("`{name}` has no phase"))
                    .label(block.head, "no heat capacity, no heat")
                    .help("add `phase solid { cp = ... for ... to ... }`"),
            );
            complete = false;
        }
        let phases = phases.into_iter().map(|(phase, _)| phase).collect::<Option<Vec<_>>>()?;
        complete.then_some((phases, links, link_spans))
    }

    fn stray_transition(&mut self, span: Span, damaged: bool) {
        if damaged {
            return;
        }
        self.report(
            Diagnostic::new(Code::TransitionNames, "a transition that does not stand between two phases")
                .label(span, "a phase is missing beside it")
                .help("put it between the phase that it leaves and the phase that it leads to"),
        );
    }

    fn curve_error(&mut self, error: CurveError, block: &SpeciesBlock, phases: &[Phase], links: &[Span]) {
        let found = super::curve_error::explain(
            error,
            &super::curve_error::Places {
                block: block.name.span,
                heads: &phases.iter().map(|phase| phase.head).collect::<Vec<_>>(),
                ranges: &phases.iter().map(|phase| phase.ranges.clone()).collect::<Vec<_>>(),
                densities: &phases.iter().map(|phase| phase.density).collect::<Vec<_>>(),
                names: &phases.iter().map(|phase| phase.data.name.clone()).collect::<Vec<_>>(),
                links,
                vapour_pressure: block.entries.iter().find_map(|entry| match entry {
                    SpeciesEntry::VapourPressure(entry) => Some(entry.span),
                    _ => None,
                }),
                formation: block.entries.iter().find_map(|entry| match entry {
                    SpeciesEntry::Formation(value, _) => Some(value.span),
                    _ => None,
                }),
            },
        );
        self.report(found);
    }
}

/// The remarks of a block; lines that follow one another are one remark.
fn remarks(block: &SpeciesBlock) -> Vec<String> {
    let mut remarks: Vec<String> = Vec::new();
    let mut goes_on = false;
    for entry in &block.entries {
        let SpeciesEntry::Remark(text) = entry else {
            goes_on = false;
            continue;
        };
        match remarks.last_mut().filter(|_| goes_on) {
            Some(last) => {
                last.push(' ');
                last.push_str(&text.text);
            }
            None => remarks.push(text.text.clone()),
        }
        goes_on = true;
    }
    remarks
}

//! Species blocks to heating curves.

use super::checker::{Checker, Declared, Material};
use super::names::declared_twice;
use super::transition::{self, Neighbour};
use crate::diagnostic::{Code, Diagnostic};
use crate::numeric::Formula;
use crate::program::{Datum, DatumKind, Entry, PhaseInfo, Species, SpeciesId};
use crate::span::Span;
use crate::syntax::tree::{
    self, CoefficientForm, Expression, HeatCapacityEntry, LawText, PhaseBlock, PhaseEntry, SpeciesBlock,
    SpeciesEntry, Suffixes, TransitionEntry, TransitionPlace, Word,
};
use crate::thermo::{
    Composition, CurveData, CurveError, Density, Fault, HeatingCurve, LawRange, Link, PhaseClass, PhaseData,
    VapourPressure,
};
use crate::units::{Dimension, quantity};

/// A species being read.
struct Draft<'a> {
    block: &'a SpeciesBlock,
    source: Option<String>,
    molar_mass: Option<f64>,
    data: Vec<Datum>,
}

/// A phase as read, with the places of its ranges.
struct Phase {
    data: PhaseData,
    head: Span,
    ranges: Vec<Span>,
    density: Option<Span>,
}

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

    fn error_count(&self) -> usize {
        self.diagnostics.iter().filter(|found| found.is_error()).count()
    }

    /// The one entry of a sort; a second one is refused.
    fn single<T>(
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

    fn species_formula(&mut self, block: &SpeciesBlock) -> Option<(String, Composition)> {
        let word = self.single(block, |entry| match entry {
            SpeciesEntry::Formula(word) => Some((word.clone(), word.span)),
            _ => None,
        })?;
        match Composition::parse(&word.text) {
            Ok(composition) => Some((word.text, composition)),
            Err(error) => {
                self.formula_error(&word, &error);
                None
            }
        }
    }

    fn formula_error(&mut self, word: &Word, error: &crate::thermo::CompositionError) {
        let place = |range: &std::ops::Range<usize>| {
            let at =
                |offset: usize| word.span.start + u32::try_from(offset.min(word.text.len())).unwrap_or(0);
            if range.is_empty() {
                word.span
            } else {
                Span { start: at(range.start), end: at(range.end), ..word.span }
            }
        };
        let found = match error {
            crate::thermo::CompositionError::UnknownElement { symbol, range } => Diagnostic::new(
                Code::UnknownElement,
                format!("`{symbol}` in `{}` is no element", word.text),
            )
            .label(place(range), "no element of this symbol")
            .help("symbols are IUPAC's: a capital, then a small letter where there are two, such as `Zn`"),
            crate::thermo::CompositionError::NoAtomicWeight { element, range } => Diagnostic::new(
                Code::UnknownElement,
                format!("`{}` has no standard atomic weight", element.symbol()),
            )
            .label(place(range), "no stable isotopes")
            .help("leave the formula out and give `molar_mass ... g/mol`"),
            crate::thermo::CompositionError::Malformed { fault, range } => {
                Diagnostic::new(Code::BadFormula, format!("the formula `{}` cannot be read", word.text))
                    .label(place(range), fault_in_words(*fault))
                    .help("write formulas such as `Ca(OH)2`, `Fe0.947O` or `CuSO4·5H2O`")
            }
        };
        self.report(found);
    }

    fn given_molar_mass(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let entry = self.single(draft.block, |entry| match entry {
            SpeciesEntry::MolarMass(entry) => Some((entry.clone(), entry.span)),
            _ => None,
        })?;
        let value = self.datum_of(&entry.value, Dimension::MOLAR_MASS, "a molar mass")?;
        let datum = self.datum(draft, DatumKind::MolarMass, &entry.suffixes, entry.span, None);
        draft.data.push(datum);
        if value > 0.0 {
            return Some(value);
        }
        self.report(
            Diagnostic::new(Code::DatumNotPositive, "a molar mass that is not positive")
                .label(entry.value.span, "here")
                .help("write such as `molar_mass 65.38 g/mol`"),
        );
        None
    }

    /// The formation enthalpy at 298.15 K in J/kg.
    fn formation(
        &mut self,
        value: &LawText<tree::Datum>,
        at: &tree::Datum,
        species: &str,
        molar_mass: Option<f64>,
    ) -> Option<f64> {
        let kelvin = self.datum_temperature(at, "the temperature of a formation enthalpy")?;
        if (kelvin - 298.15).abs() > 1e-9 {
            self.report(
                Diagnostic::new(
                    Code::FormationWrong,
                    "a formation enthalpy at another temperature than 298.15 K",
                )
                .label(at.span, "298.15 K is wanted")
                .help("give the standard formation enthalpy, `at 298.15 K`"),
            );
            return None;
        }
        let read = self.datum_value(&value.value)?;
        match (read.unit.dimension, molar_mass) {
            (Dimension::SPECIFIC_ENERGY, _) => Some(read.si),
            (Dimension::MOLAR_ENERGY, Some(molar_mass)) => Some(read.si / molar_mass),
            (Dimension::MOLAR_ENERGY, None) => {
                self.molar_datum(value.value.span, species);
                None
            }
            (found, _) => {
                let wanted = [Dimension::MOLAR_ENERGY, Dimension::SPECIFIC_ENERGY];
                self.wrong_dimension(value.value.span, found, &wanted, "a formation enthalpy");
                None
            }
        }
    }

    fn species_formation(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let (value, at) = self.single(draft.block, |entry| match entry {
            SpeciesEntry::Formation(value, at) => Some(((value.clone(), at.clone()), value.span)),
            _ => None,
        })?;
        let kind = DatumKind::Formation { phase: None };
        let datum = self.datum(draft, kind, &value.suffixes, value.span, Some((298.15, 298.15)));
        draft.data.push(datum);
        self.formation(&value, &at, &draft.block.name.text, draft.molar_mass)
    }

    fn decomposition(&mut self, draft: &mut Draft<'_>) -> Option<f64> {
        let entry = self.single(draft.block, |entry| match entry {
            SpeciesEntry::Decomposes(entry) => Some((entry.clone(), entry.span)),
            _ => None,
        })?;
        let datum = self.datum(draft, DatumKind::Decomposition, &entry.suffixes, entry.span, None);
        draft.data.push(datum);
        self.datum_temperature(&entry.value, "the temperature of decomposition")
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

    /// Reads a phase; what its neighbours need to know of it comes back even where it is at fault.
    fn phase(
        &mut self,
        draft: &mut Draft<'_>,
        block: &PhaseBlock,
        index: usize,
    ) -> (Option<Phase>, Neighbour) {
        let class = self.phase_class(block);
        let own_source = block.entries.iter().find_map(|entry| match entry {
            PhaseEntry::Source(text) => Some(text.text.clone()),
            _ => None,
        });
        let mut ranges = Vec::new();
        let mut spans = Vec::new();
        let (mut density, mut density_span) = (None, None);
        let (mut formation, mut has_formation) = (None, None);
        let mut complete = true;
        let name = draft.block.name.text.clone();
        let outer = draft.source.clone();
        draft.source = own_source.or_else(|| outer.clone());
        for entry in &block.entries {
            match entry {
                PhaseEntry::HeatCapacity(entry) => {
                    let law = self.heat_capacity(entry, draft.molar_mass, &name);
                    let valid = law.as_ref().map(|law: &LawRange| (law.lo.value, law.hi.value));
                    let kind = DatumKind::HeatCapacity { phase: index, range: spans.len() };
                    let datum = self.datum(draft, kind, &entry.suffixes, entry.span, valid);
                    draft.data.push(datum);
                    complete &= law.is_some();
                    ranges.extend(law);
                    spans.push(range_span(entry));
                }
                PhaseEntry::Density(entry) => {
                    if let Some(first) = density_span.replace(entry.span) {
                        self.diagnostics.push(given_twice(entry.span, first));
                        complete = false;
                    }
                    let (read, valid) = self.density(entry);
                    let datum = self.datum(
                        draft,
                        DatumKind::Density { phase: index },
                        &entry.suffixes,
                        entry.span,
                        valid,
                    );
                    draft.data.push(datum);
                    complete &= read.is_some();
                    density = read;
                }
                PhaseEntry::Formation(value, at) => {
                    if let Some(first) = has_formation.replace(value.span) {
                        self.diagnostics.push(given_twice(value.span, first));
                        complete = false;
                    }
                    formation = self.formation(value, at, &name, draft.molar_mass);
                    complete &= formation.is_some();
                    let kind = DatumKind::Formation { phase: Some(index) };
                    let datum = self.datum(draft, kind, &value.suffixes, value.span, Some((298.15, 298.15)));
                    draft.data.push(datum);
                }
                PhaseEntry::Source(_) | PhaseEntry::Remark(_) => {}
            }
        }
        draft.source = outer;
        if spans.is_empty() && !block.damaged {
            self.report(
                Diagnostic::new(
                    Code::DatumMissing,
                    format!("the phase `{}` of `{name}` has no heat capacity", block.name.text),
                )
                .label(block.head, "no `cp`")
                .help("add `cp = ... J/(mol K) for ... K to ... K`"),
            );
            complete = false;
        }
        let neighbour = Neighbour {
            name: block.name.text.clone(),
            class,
            own_formation: has_formation.is_some(),
            head: block.head,
        };
        let (Some(class), true) = (class, complete && !block.damaged) else { return (None, neighbour) };
        let name = block.name.text.clone();
        let data = PhaseData { name, class, ranges, density, formation: formation.map(quantity) };
        (Some(Phase { data, head: block.head, ranges: spans, density: density_span }), neighbour)
    }

    fn phase_class(&mut self, block: &PhaseBlock) -> Option<PhaseClass> {
        let word = block.class.as_ref().unwrap_or(&block.name);
        if let Some(class) = class_of(&word.text) {
            return Some(class);
        }
        let (message, help) = match &block.class {
            Some(class) => (
                format!("a phase cannot be `{}`", class.text),
                format!("write `phase {} is solid`, `is liquid` or `is gas`", block.name.text),
            ),
            None => (
                format!("is the phase `{}` solid, liquid or gas?", block.name.text),
                format!("write `phase {} is solid {{`", block.name.text),
            ),
        };
        self.report(Diagnostic::new(Code::UnknownPhase, message).label(word.span, "not said").help(help));
        None
    }

    /// A density, constant or a formula, in kg/m³.
    fn density(
        &mut self,
        entry: &LawText<(Expression, Option<(tree::Datum, tree::Datum)>)>,
    ) -> (Option<Density>, Option<(f64, f64)>) {
        let (expression, range) = &entry.value;
        let valid = range.as_ref().and_then(|(low, high)| {
            Some((
                self.datum_temperature(low, "the lower end of a range")?,
                self.datum_temperature(high, "the upper end of a range")?,
            ))
        });
        let Some(checked) = self.formula(expression) else { return (None, valid) };
        if checked.dimension != Dimension::DENSITY {
            self.wrong_dimension(checked.span, checked.dimension, &[Dimension::DENSITY], "a density");
            return (None, valid);
        }
        if let Some(value) = super::constant::value_of(&checked) {
            return (Some(Density::Constant(quantity(value))), valid);
        }
        let code: Option<Formula> = super::law_formula::compiled(&checked);
        (code.map(Density::Formula), valid)
    }

    /// A datum with its pedigree: its own source, else that of the block around it.
    fn datum(
        &mut self,
        draft: &Draft<'_>,
        kind: DatumKind,
        suffixes: &Suffixes,
        span: Span,
        valid: Option<(f64, f64)>,
    ) -> Datum {
        let interval = suffixes.intervals.first().map(|interval| self.written(interval.span));
        if let [_, second, ..] = suffixes.intervals.as_slice() {
            self.diagnostics.push(given_twice(second.span, span));
        }
        let spread = suffixes.spreads.first().map(|spread| {
            let amount = self.written(spread.amount.span);
            format!("{amount} against \"{}\"", spread.against.text)
        });
        let text = without_suffixes(&self.written(span));
        let source = suffixes.source().map(str::to_owned).or_else(|| draft.source.clone());
        Datum { kind, text, valid, source, interval, spread, span }
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

fn transition_range(checker: &mut Checker<'_>, transition: &TransitionEntry) -> Option<(f64, f64)> {
    let read = |datum: &tree::Datum| {
        let unit = datum.literal.unit.as_ref()?;
        let unit = crate::units::read_unit(&unit.text).ok()?;
        let value = if datum.negative { -datum.literal.value } else { datum.literal.value };
        Some(unit.to_si(value, checker.program.site.atmosphere))
    };
    match &transition.place {
        TransitionPlace::At(at) => read(at).map(|kelvin| (kelvin, kelvin)),
        TransitionPlace::Over(low, high) => Some((read(low)?, read(high)?)),
    }
}

/// The entry without what follows the datum: interval, source and spread are kept apart.
fn without_suffixes(text: &str) -> String {
    let ends = [" source \"", " spread ", " ±", " +-", " +/-"];
    let end = ends.iter().filter_map(|mark| text.find(mark)).min().unwrap_or(text.len());
    text[..end].trim_end().to_owned()
}

fn given_twice(second: Span, first: Span) -> Diagnostic {
    Diagnostic::new(Code::DatumTwice, "a datum given twice")
        .label(second, "given again here")
        .label(first, "given first here")
        .help("keep one of the two")
}

fn range_span(entry: &LawText<HeatCapacityEntry>) -> Span {
    match (&entry.value.range, &entry.value.form) {
        (Some((low, high)), _) => low.span.to(high.span),
        (None, CoefficientForm::Table(rows, _)) => rows.first().map_or(entry.span, |row| row.at.span),
        _ => entry.span,
    }
}

pub(super) fn class_of(word: &str) -> Option<PhaseClass> {
    match word {
        "solid" => Some(PhaseClass::Solid),
        "liquid" => Some(PhaseClass::Liquid),
        "gas" => Some(PhaseClass::Gas),
        _ => None,
    }
}

fn phase_info(phase: &PhaseData) -> PhaseInfo {
    let symbol = match phase.name.as_str() {
        "solid" => "s",
        "liquid" => "l",
        "gas" => "g",
        other => other,
    };
    let constant_density = match &phase.density {
        Some(Density::Constant(density)) => Some(density.value),
        _ => None,
    };
    PhaseInfo { name: phase.name.clone(), class: phase.class, symbol: symbol.to_owned(), constant_density }
}

fn fault_in_words(fault: Fault) -> &'static str {
    match fault {
        Fault::Empty => "an element or a group is wanted here",
        Fault::Character => "no formula has this character",
        Fault::Bracket => "a bracket without its partner",
        Fault::TooDeep => "brackets nested too deep",
        Fault::Count => "a count that is no positive number",
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

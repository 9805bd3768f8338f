//! Steps with their legs, and how heat and work follow.

use super::worked::WorkedSheet;
use crate::program::{DatumKind, Heat, Path, SpeciesId, StateId, Step, StepId, Unknown};
use crate::report::model::{LegKind, LegRow, Side, StepRow};
use crate::report::number::{shown, significant};
use crate::thermo::{self, Leg, PhaseClass};
use crate::units::{Dimension, quantity};

impl WorkedSheet<'_> {
    pub(super) fn step_row(&self, id: StepId) -> Option<StepRow> {
        let (step, slots) = (self.program.steps.get(id.0)?, self.map.steps.get(id.0)?);
        let optional = |slot: Option<crate::plan::Slot>| {
            slot.map(|slot| self.value(slot)).filter(|value| value.is_finite())
        };
        Some(StepRow {
            name: step.name.clone(),
            written: step.text.clone(),
            flow: step.flow,
            path: step.path.map(|(path, _)| path.as_str()),
            legs: self.legs(step),
            enthalpy_change: self.value(slots.enthalpy_change),
            internal_energy_change: self.value(slots.internal_energy_change),
            heat: optional(slots.heat),
            work: optional(slots.work),
            sides: self.sides(step, id),
            settles: self.settles(step),
            notes: self.notes(step),
        })
    }

    /// The parts of ΔH in order: each species' way, and what pressure adds.
    fn legs(&self, step: &Step) -> Vec<LegRow> {
        let mut rows: Vec<LegRow> = Vec::new();
        for (parcel, legs) in self.ways(step) {
            for leg in legs {
                let row = self.leg_row(parcel.constituent.species, parcel.mass, &leg);
                add_leg(&mut rows, row);
            }
        }
        for (start, end) in self.paired(step) {
            let Some(species) = self.program.species.get(start.constituent.species.0) else { continue };
            let part = |parcel: &super::usage::Parcel| {
                let added =
                    species.curve.condensed_pressure_enthalpy(parcel.place, quantity(parcel.pressure));
                added.map_or(0.0, |added| added.value)
            };
            let change = start.mass * (part(&end) - part(&start));
            if change != 0.0 {
                let (from, to) = (start.place.temperature().value, end.place.temperature().value);
                rows.push(LegRow {
                    kind: LegKind::Pressure,
                    species: species.name.clone(),
                    phase: String::new(),
                    from_kelvin: from,
                    to_kelvin: to,
                    enthalpy_change: change,
                    datum: self.density_text(start.constituent.species, start.place),
                });
            }
        }
        rows
    }

    fn density_text(&self, id: SpeciesId, place: thermo::Place) -> String {
        let Some(species) = self.program.species.get(id.0) else { return String::new() };
        let phase = species.curve.phases_at(place).lower.0;
        self.datum_text(id, DatumKind::Density { phase })
    }

    pub(super) fn datum_text(&self, id: SpeciesId, kind: DatumKind) -> String {
        let species = self.program.species.get(id.0);
        species
            .and_then(|species| species.data.iter().find(|datum| datum.kind == kind))
            .map_or(String::new(), |datum| datum.text.clone())
    }

    fn leg_row(&self, id: SpeciesId, mass: f64, leg: &Leg) -> LegRow {
        let species = self.program.species.get(id.0);
        let name = |phase: usize| {
            species
                .and_then(|species| species.phases.get(phase))
                .map_or(String::new(), |phase| phase.name.clone())
        };
        let (kind, phase, datum) = match leg.kind {
            thermo::LegKind::Sensible { phase } => {
                (LegKind::Sensible, name(phase), self.law_text(id, phase, leg))
            }
            thermo::LegKind::SensibleInRange { link } => (
                LegKind::Sensible,
                format!("{} and {}", name(link), name(link + 1)),
                self.datum_text(id, DatumKind::Transition { below: link }),
            ),
            thermo::LegKind::Transition { from, to, link } => {
                let datum = match link {
                    Some(link) if self.boils_by_law(id, link, leg.from.value) => DatumKind::VapourPressure,
                    Some(link) => DatumKind::Transition { below: link },
                    None => DatumKind::Formation { phase: Some(from.max(to)) },
                };
                (LegKind::Transition, format!("{} to {}", name(from), name(to)), self.datum_text(id, datum))
            }
        };
        LegRow {
            kind,
            species: species.map_or(String::new(), |species| species.name.clone()),
            phase,
            from_kelvin: leg.from.value,
            to_kelvin: leg.to.value,
            enthalpy_change: mass * leg.enthalpy.value,
            datum,
        }
    }

    /// The heat-capacity datum in which a leg begins.
    fn law_text(&self, id: SpeciesId, phase: usize, leg: &Leg) -> String {
        let Some(species) = self.program.species.get(id.0) else { return String::new() };
        let middle = 0.5 * (leg.from.value + leg.to.value);
        let of_phase = || {
            species.data.iter().filter(
                |datum| matches!(datum.kind, DatumKind::HeatCapacity { phase: of, .. } if of == phase),
            )
        };
        let holds =
            |datum: &&crate::program::Datum| datum.valid.is_some_and(|(lo, hi)| lo <= middle && middle <= hi);
        of_phase().find(holds).or_else(|| of_phase().next()).map_or(String::new(), |datum| datum.text.clone())
    }

    /// ΔH, ΔU and with a path Q, W and the supply, each with how it follows.
    fn sides(&self, step: &Step, id: StepId) -> Vec<Side> {
        let Some(slots) = self.map.steps.get(id.0) else { return Vec::new() };
        let dimension = if step.flow { Dimension::POWER } else { Dimension::ENERGY };
        let mut sides = Vec::new();
        let mut push = |symbol: &'static str, formula: String, si: f64| {
            if si.is_finite() {
                sides.push(Side { symbol, formula, value: self.shown(si, dimension, None, false) });
            }
        };
        push("ΔH", "sum of the legs".to_owned(), self.value(slots.enthalpy_change));
        push("ΔU", "ΔH − Δ(pV)".to_owned(), self.value(slots.internal_energy_change));
        if let (Some((path, _)), Some(heat), Some(work)) = (step.path, slots.heat, slots.work) {
            push("W", work_formula(step, path), self.value(work));
            push("Q", heat_formula(step, path), self.value(heat));
            if let (Some(losing), Some(supply)) = (slots.losing, slots.supply) {
                push("losses", self.written(step.losing.as_ref()), self.value(losing));
                push("supply", "Q + losses".to_owned(), self.value(supply));
            }
        }
        sides
    }

    fn written(&self, expr: Option<&crate::program::Expr>) -> String {
        expr.map_or(String::new(), |expr| self.sources.line_of(expr.span))
    }

    fn settles(&self, step: &Step) -> Vec<String> {
        step.settles
            .iter()
            .filter_map(|settles| {
                let state = self.program.states.get(settles.state.0)?;
                let slots = self.map.states.get(settles.state.0)?;
                let (member, value) = match settles.unknown {
                    Unknown::Temperature => {
                        let unit = super::display::unit("degC");
                        (
                            "T",
                            self.shown(
                                self.value(slots.temperature),
                                Dimension::TEMPERATURE,
                                unit.as_ref(),
                                false,
                            ),
                        )
                    }
                    Unknown::Pressure => {
                        ("P", self.shown(self.value(slots.pressure), Dimension::PRESSURE, None, false))
                    }
                };
                Some(format!("{}.{member} = {}", state.name, shown(&value)))
            })
            .collect()
    }

    /// What this step rests on beside its data.
    fn notes(&self, step: &Step) -> Vec<String> {
        let mut notes = Vec::new();
        let without = self.without_density(step);
        if !without.is_empty() {
            notes.push(format!(
                "The volume of {} is neglected: no density is given.",
                crate::diagnostic::and_list(&without)
            ));
        }
        for id in step.from.iter().chain(&step.to) {
            for (part, _, _) in self.contents(*id) {
                let Some(species) = self.program.species.get(part.species.0) else { continue };
                let note = format!(
                    "The formation enthalpy of {} at 298.15 K is taken with its heat capacity stretched down to 298.15 K, by at most 2 K.",
                    species.name
                );
                if species.curve.formation_extrapolated() && self.turns_matter(step) && !notes.contains(&note)
                {
                    notes.push(note);
                }
            }
        }
        for note in self.boilings(step) {
            if !notes.contains(&note) {
                notes.push(note);
            }
        }
        notes.extend(step.settles.iter().filter_map(|settles| self.shared_plateau(settles.state)));
        if let Some((Path::ConstantPressure, _)) = step.path {
            let p = self.map.states.get(step.from[0].0).map_or(f64::NAN, |slots| self.value(slots.pressure));
            notes.push(format!("Pressure {} kPa abs throughout.", significant(p / 1e3, 6)));
        }
        notes
    }

    /// What boils by its vapour pressure, and what the latent heat there rests on.
    fn boilings(&self, step: &Step) -> Vec<String> {
        let mut notes = Vec::new();
        for (parcel, legs) in self.ways(step) {
            let id = parcel.constituent.species;
            let Some(species) = self.program.species.get(id.0) else { continue };
            for leg in legs {
                let thermo::LegKind::Transition { link: Some(link), .. } = leg.kind else { continue };
                notes.extend(self.boils_short_of(step, id, link, leg.from.value));
                let Some(latent) = species
                    .curve
                    .boiling_latent(leg.from)
                    .filter(|_| self.boils_by_law(id, link, leg.from.value))
                else {
                    continue;
                };
                notes.push(format!(
                    "{} boils at {} K by its vapour pressure; its latent heat there, {} kJ/kg, is the difference of the enthalpies of both phases, the vapour taken as ideal.",
                    species.name,
                    significant(leg.from.value, 6),
                    significant(latent.value / 1e3, 5)
                ));
            }
        }
        notes
    }

    /// A way over the stated boiling point where the vapour pressure has another, which the data do not reach.
    fn boils_short_of(&self, step: &Step, id: SpeciesId, link: usize, kelvin: f64) -> Option<String> {
        let species = self.program.species.get(id.0)?;
        let gas = species.curve.phase_class(link + 1) == Some(PhaseClass::Gas);
        species.curve.vapour_pressure().filter(|_| gas)?;
        let slots = self.map.states.get(step.to.first()?.0)?;
        let pressure = self.value(slots.pressure);
        let boils = species.curve.boiling_temperature(quantity(pressure)).ok()?.value;
        (boils != kelvin && species.curve.transition(link)?.from.value == kelvin).then(|| {
            format!(
                "{} boils at {} K at {} kPa abs, which the data of its liquid or its gas do not reach by themselves: the legs go over its stated boiling point, and what is latent is the latent heat there. The sum of the legs does not depend on this.",
                species.name,
                significant(boils, 6),
                significant(pressure / 1e3, 6)
            )
        })
    }

    /// Several species on one plateau: an enthalpy does not say how far each of them is.
    fn shared_plateau(&self, id: StateId) -> Option<String> {
        let mut names: Vec<&str> = Vec::new();
        for (part, _, place) in self.contents(id) {
            let (Some(place), Some(species)) = (place, self.program.species.get(part.species.0)) else {
                continue;
            };
            let present = species.curve.phases_at(place);
            let below = present.lower.0;
            let half_way = present.upper.is_some_and(|(_, share)| share > 0.0 && share < 1.0);
            let plateau = species.data.iter().any(|datum| {
                datum.kind == DatumKind::Transition { below } && datum.valid.is_some_and(|(lo, hi)| lo >= hi)
            });
            if half_way && plateau && !names.contains(&species.name.as_str()) {
                names.push(&species.name);
            }
        }
        let names: Vec<String> = names.into_iter().map(str::to_owned).collect();
        (names.len() > 1).then(|| {
            format!(
                "{} change at one temperature: the heat does not tell them apart, and the same share of each is taken as changed.",
                crate::diagnostic::and_list(&names)
            )
        })
    }

    /// The condensed phases of a step that have no density.
    pub fn without_density(&self, step: &Step) -> Vec<String> {
        let mut names = Vec::new();
        for id in step.from.iter().chain(&step.to) {
            for (part, _, place) in self.contents(*id) {
                let (Some(place), Some(species)) = (place, self.program.species.get(part.species.0)) else {
                    continue;
                };
                for (phase, _) in species.curve.phases_at(place).present() {
                    let condensed = species.curve.phase_class(phase) != Some(PhaseClass::Gas);
                    let name = species.in_phase(phase);
                    if condensed && !species.curve.has_density(phase) && !names.contains(&name) {
                        names.push(name);
                    }
                }
            }
        }
        names
    }
}

/// Legs of one kind in one phase between the same temperatures are one.
fn add_leg(rows: &mut Vec<LegRow>, row: LegRow) {
    let same = |known: &&mut LegRow| {
        (known.kind, &known.species, &known.phase, known.from_kelvin, known.to_kelvin)
            == (row.kind, &row.species, &row.phase, row.from_kelvin, row.to_kelvin)
    };
    match rows.iter_mut().find(same) {
        Some(known) => known.enthalpy_change += row.enthalpy_change,
        None => rows.push(row),
    }
}

fn work_formula(step: &Step, path: Path) -> String {
    let own = match path {
        Path::ConstantPressure | Path::ConstantTemperatureAndPressure if !step.flow => "−p ΔV",
        Path::IsothermalReversible => "n R T ln(p2/p1)",
        Path::AdiabaticReversible if step.flow => "ΔH, no heat passes",
        Path::AdiabaticReversible => "ΔU, no heat passes",
        Path::ConstantVolume => "no volume work",
        Path::ConstantPressure | Path::ConstantTemperatureAndPressure => "no shaft work",
        Path::NoShaftWork | Path::Throttled => "no shaft work",
    };
    match (step.working.is_some(), own.starts_with("no ")) {
        (true, true) => "the work that ends in the matter".to_owned(),
        (true, false) => format!("{own}, and the work that ends in the matter"),
        (false, _) => own.to_owned(),
    }
}

fn heat_formula(step: &Step, path: Path) -> String {
    if matches!(step.heat, Heat::Taking(_)) {
        return "as stated".to_owned();
    }
    if step.heat == Heat::Adiabatic || matches!(path, Path::Throttled | Path::AdiabaticReversible) {
        return "adiabatic".to_owned();
    }
    let closed = !step.flow || path == Path::ConstantVolume;
    let working = if step.working.is_some() { " − the work that ends in the matter" } else { "" };
    match path {
        Path::ConstantPressure | Path::ConstantTemperatureAndPressure | Path::NoShaftWork => {
            format!("ΔH{working}")
        }
        Path::IsothermalReversible if closed => "ΔU − W".to_owned(),
        Path::IsothermalReversible => "ΔH − W".to_owned(),
        _ => format!("ΔU{working}"),
    }
}

//! Species and the data that the answers rest on.

use super::usage::Usage;
use super::worked::WorkedSheet;
use crate::program::{Datum, DatumKind, Species, SpeciesId};
use crate::report::model::{DataRow, SpeciesRow};

impl WorkedSheet<'_> {
    /// The rows of the data that are used, by species in the order of the sheet.
    pub(super) fn data_rows(&self, usage: &Usage) -> Vec<DataRow> {
        let mut rows = Vec::new();
        for (at, species) in self.program.species.iter().enumerate() {
            for datum in &species.data {
                if let Some(used) = usage.of(SpeciesId(at), datum.kind) {
                    rows.push(data_row(species, datum, used));
                }
            }
        }
        rows
    }

    /// The species of which data are used.
    pub(super) fn used_species(&self, usage: &Usage) -> Vec<SpeciesId> {
        let mut ids: Vec<SpeciesId> = usage.species().collect();
        ids.dedup();
        ids
    }
}

pub(super) fn species_row(species: &Species) -> SpeciesRow {
    SpeciesRow {
        name: species.name.clone(),
        label: species.label.clone(),
        formula: species.formula.as_ref().map(|(text, _)| text.clone()),
        cas: species.cas.clone(),
        molar_mass: species.molar_mass,
        molar_mass_given: species.data.iter().any(|datum| datum.kind == DatumKind::MolarMass),
        from: species.from.clone(),
        remarks: species.remarks.clone(),
    }
}

fn data_row(species: &Species, datum: &Datum, (from, to): (f64, f64)) -> DataRow {
    let phase = |at: usize| species.phases.get(at).map_or(String::new(), |phase| phase.name.clone());
    let (name, what, at) = match datum.kind {
        DatumKind::HeatCapacity { phase: at, .. } => (phase(at), "cp", Some(at)),
        DatumKind::Density { phase: at } => (phase(at), "density", Some(at)),
        DatumKind::Transition { below } => {
            (format!("{} to {}", phase(below), phase(below + 1)), change(datum), None)
        }
        DatumKind::Formation { phase: at } => (at.map_or(String::new(), phase), "formation", at),
        DatumKind::MolarMass => (String::new(), "molar mass", None),
        DatumKind::VapourPressure => (String::new(), "vapour pressure", None),
        DatumKind::Decomposition => (String::new(), "decomposition", None),
    };
    let dated = !matches!(datum.kind, DatumKind::MolarMass | DatumKind::Decomposition);
    let beyond = datum.valid.is_some_and(|(lo, hi)| from < lo - 1e-9 || to > hi + 1e-9);
    let extrapolated =
        beyond && matches!(datum.kind, DatumKind::HeatCapacity { .. } | DatumKind::Density { .. });
    DataRow {
        species: species.name.clone(),
        phase: name,
        what,
        written: datum.text.clone(),
        valid_kelvin: datum.valid,
        used_kelvin: dated.then_some((from, to)),
        source: datum.source.clone(),
        interval: datum.interval.clone(),
        spread: datum.spread.clone(),
        extrapolated,
        because: at.filter(|_| extrapolated).and_then(|at| reasons(species, at, (from, to))),
    }
}

/// Why the data of a phase are used beyond their ends, below and above.
fn reasons(species: &Species, phase: usize, (from, to): (f64, f64)) -> Option<String> {
    let mut reasons: Vec<&str> = [from, to]
        .into_iter()
        .filter_map(|kelvin| species.allowed(phase, kelvin))
        .map(|one| one.because.as_str())
        .collect();
    if reasons.is_empty() && from >= 298.15 - 1e-9 {
        reasons.push("it begins no more than 2 K above 298.15 K, where enthalpies are counted from");
    }
    reasons.dedup();
    (!reasons.is_empty()).then(|| reasons.join("; "))
}

/// The word that a transition's line begins with.
fn change(datum: &Datum) -> &'static str {
    ["melting", "boiling", "sublimation"]
        .into_iter()
        .find(|word| datum.text.starts_with(word))
        .unwrap_or("transition")
}

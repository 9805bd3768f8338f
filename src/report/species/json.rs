//! Species as JSON.

use super::model::SpeciesPage;
use serde::Serialize;

#[derive(Serialize)]
struct Listed<T> {
    species: Vec<T>,
}

#[derive(Serialize)]
struct Brief<'a> {
    species: &'a str,
    name: Option<&'a str>,
    formula: Option<&'a str>,
    cas: Option<&'a str>,
    family: &'a str,
    phases: Vec<&'a str>,
}

#[derive(Serialize)]
#[allow(non_snake_case)] // the fields are those of the published page
struct Full<'a> {
    #[serde(flatten)]
    brief: Brief<'a>,
    molar_mass_kg_mol: Option<f64>,
    decomposes_K: Option<f64>,
    absolute: bool,
    ranges_K: Vec<(&'a str, f64, f64)>,
    transitions: Vec<Change<'a>>,
    values: Vec<Value<'a>>,
    data: Vec<Datum<'a>>,
    remarks: &'a [String],
}

#[derive(Serialize)]
#[allow(non_snake_case)] // the fields are those of the published page
struct Change<'a> {
    from: &'a str,
    to: &'a str,
    from_K: f64,
    to_K: f64,
    dH_J_kg: f64,
    dH_J_mol: Option<f64>,
}

#[derive(Serialize)]
#[allow(non_snake_case)] // the fields are those of the published page
struct Value<'a> {
    phase: &'a str,
    T_K: f64,
    cp_J_kg_K: f64,
    cp_J_mol_K: Option<f64>,
    H_minus_H298_J_kg: Option<f64>,
    H_minus_H298_J_mol: Option<f64>,
}

#[derive(Serialize)]
#[allow(non_snake_case)] // the fields are those of the published page
struct Datum<'a> {
    phase: &'a str,
    written: &'a str,
    valid_K: Option<(f64, f64)>,
    interval: Option<&'a str>,
    spread: Option<&'a str>,
    source: Option<&'a str>,
}

/// The species in brief, one entry each.
pub fn render_species_list_json(pages: &[SpeciesPage]) -> String {
    written(&Listed { species: pages.iter().map(brief).collect::<Vec<_>>() })
}

/// Species with their data.
pub fn render_species_json(pages: &[&SpeciesPage]) -> String {
    written(&Listed { species: pages.iter().map(|page| full(page)).collect::<Vec<_>>() })
}

fn written<T: Serialize>(value: &T) -> String {
    serde_json::to_string_pretty(value).expect("texts, numbers and lists always turn into JSON") + "\n"
}

fn brief(page: &SpeciesPage) -> Brief<'_> {
    Brief {
        species: &page.name,
        name: page.label.as_deref(),
        formula: page.formula.as_deref(),
        cas: page.cas.as_deref(),
        family: &page.family,
        phases: page.phases.iter().map(|phase| phase.name.as_str()).collect(),
    }
}

fn full(page: &SpeciesPage) -> Full<'_> {
    let molar = |value: f64| page.molar_mass.map(|molar_mass| value * molar_mass);
    let phase = |at: usize| page.phases.get(at).map_or("", |phase| phase.name.as_str());
    Full {
        brief: brief(page),
        molar_mass_kg_mol: page.molar_mass,
        decomposes_K: page.decomposes,
        absolute: page.absolute,
        ranges_K: page
            .phases
            .iter()
            .map(|phase| (phase.name.as_str(), phase.kelvin.0, phase.kelvin.1))
            .collect(),
        transitions: page
            .changes
            .iter()
            .map(|change| Change {
                from: &change.between.0,
                to: &change.between.1,
                from_K: change.kelvin.0,
                to_K: change.kelvin.1,
                dH_J_kg: change.latent,
                dH_J_mol: molar(change.latent),
            })
            .collect(),
        values: page
            .rows
            .iter()
            .map(|row| Value {
                phase: phase(row.phase),
                T_K: row.kelvin,
                cp_J_kg_K: row.heat_capacity,
                cp_J_mol_K: molar(row.heat_capacity),
                H_minus_H298_J_kg: row.above_reference,
                H_minus_H298_J_mol: row.above_reference.and_then(molar),
            })
            .collect(),
        data: page
            .data
            .iter()
            .map(|datum| Datum {
                phase: &datum.phase,
                written: &datum.written,
                valid_K: datum.valid_kelvin,
                interval: datum.interval.as_deref(),
                spread: datum.spread.as_deref(),
                source: datum.source.as_deref(),
            })
            .collect(),
        remarks: &page.remarks,
    }
}

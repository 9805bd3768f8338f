//! From a checked species to its page.

use super::model::{PageChange, PageDatum, PagePhase, PageRow, SpeciesPage};
use crate::program::{DatumKind, Species};
use crate::thermo::{Allowance, PhaseClass, Pin, Place};
use crate::units::quantity;

/// The standard atmosphere, Pa: enthalpies stand at it.
const ATMOSPHERE: f64 = 101_325.0;

/// How many points a phase has in a drawn curve.
const POINTS: u32 = 120;

/// How many rows a phase has at the most.
const ROWS: usize = 7;

/// The page of a species.
pub fn species_page(species: &Species, family: &str) -> SpeciesPage {
    let curve = &species.curve;
    let phases: Vec<PagePhase> = species
        .phases
        .iter()
        .enumerate()
        .filter_map(|(at, info)| {
            let (lo, hi) = curve.phase_span(at)?;
            let linked = curve.transition(at).is_some() || (at > 0 && curve.transition(at - 1).is_some());
            Some(PagePhase {
                name: info.name.clone(),
                class: class(info.class),
                symbol: info.symbol.clone(),
                kelvin: (lo.value, hi.value),
                linked: linked || species.phases.len() == 1,
            })
        })
        .collect();
    let changes = (0..species.phases.len().saturating_sub(1)).filter_map(|at| change(species, at)).collect();
    SpeciesPage {
        name: species.name.clone(),
        label: species.label.clone(),
        formula: species.formula.as_ref().map(|(text, _)| text.clone()),
        cas: species.cas.clone(),
        family: family.to_owned(),
        molar_mass: species.molar_mass,
        changes,
        decomposes: curve.decomposes_at().map(|at| at.value),
        absolute: species.absolute,
        rows: rows(species, &phases),
        curve: points(species, &phases),
        phases,
        data: data(species),
        remarks: species.remarks.clone(),
    }
}

fn class(class: PhaseClass) -> &'static str {
    match class {
        PhaseClass::Solid => "solid",
        PhaseClass::Liquid => "liquid",
        PhaseClass::Gas => "gas",
    }
}

fn change(species: &Species, at: usize) -> Option<PageChange> {
    let transition = species.curve.transition(at)?;
    let name = |at: usize| species.phases.get(at).map_or(String::new(), |phase| phase.name.clone());
    Some(PageChange {
        between: (name(at), name(at + 1)),
        kelvin: (transition.from.value, transition.to.value),
        latent: transition.latent.value,
    })
}

fn place(species: &Species, phase: usize, kelvin: f64) -> Option<Place> {
    let allowance = Allowance::none();
    species.curve.place(quantity(kelvin), quantity(ATMOSPHERE), Pin::Phase(phase), None, allowance).ok()
}

/// The enthalpy from which a page counts: that of the stable phase at 298.15 K.
fn reference(species: &Species) -> Option<f64> {
    let allowance = Allowance::none();
    let at =
        species.curve.place(quantity(298.15), quantity(ATMOSPHERE), Pin::Stable, None, allowance).ok()?;
    Some(species.curve.enthalpy(at).value)
}

fn rows(species: &Species, phases: &[PagePhase]) -> Vec<PageRow> {
    let reference = reference(species);
    let mut rows = Vec::new();
    for (phase, info) in phases.iter().enumerate() {
        let (lo, hi) = stable_span(species, phase, info);
        for kelvin in temperatures(lo, hi) {
            let Some(place) = place(species, phase, kelvin) else { continue };
            let Some(cp) = species.curve.heat_capacity(place) else { continue };
            let enthalpy = species.curve.enthalpy(place).value;
            rows.push(PageRow {
                phase,
                kelvin,
                heat_capacity: cp.value,
                above_reference: reference.map(|reference| enthalpy - reference),
            });
        }
    }
    rows
}

/// The temperatures between the transitions beside a phase, as far as it has data.
fn stable_span(species: &Species, phase: usize, info: &PagePhase) -> (f64, f64) {
    let below =
        phase.checked_sub(1).and_then(|link| species.curve.transition(link)).map(|change| change.to.value);
    let above = species.curve.transition(phase).map(|change| change.from.value);
    let decomposes = species.curve.decomposes_at().map_or(f64::INFINITY, |at| at.value);
    let lo = below.unwrap_or(info.kelvin.0);
    (lo, above.unwrap_or(info.kelvin.1).min(decomposes.max(lo)))
}

/// Both ends, 298.15 K where it lies between them, and round temperatures.
fn temperatures(lo: f64, hi: f64) -> Vec<f64> {
    let step = [25.0, 50.0, 100.0, 200.0, 500.0, 1000.0]
        .into_iter()
        .find(|step| (hi - lo) / step <= 4.0)
        .unwrap_or(1000.0);
    let mut kelvins = vec![lo, hi];
    if lo < 298.15 && 298.15 < hi {
        kelvins.push(298.15);
    }
    let mut round = (lo / step).ceil() * step;
    while round < hi && kelvins.len() < ROWS {
        if kelvins.iter().all(|known| (known - round).abs() > 0.1 * step) {
            kelvins.push(round);
        }
        round += step;
    }
    kelvins.sort_by(f64::total_cmp);
    kelvins.dedup();
    kelvins
}

fn points(species: &Species, phases: &[PagePhase]) -> Vec<(usize, f64, f64, f64)> {
    let mut points = Vec::new();
    let mut origin = reference(species);
    for (phase, info) in phases.iter().enumerate() {
        let (lo, hi) = stable_span(species, phase, info);
        let hi = hi.min(lo.max(3000.0));
        for at in 0..=POINTS {
            let kelvin = lo + (hi - lo) * f64::from(at) / f64::from(POINTS);
            let Some(place) = place(species, phase, kelvin) else { continue };
            let Some(cp) = species.curve.heat_capacity(place) else { continue };
            let enthalpy = species.curve.enthalpy(place).value;
            let above = enthalpy - *origin.get_or_insert(enthalpy);
            points.push((phase, kelvin, cp.value, above));
        }
    }
    points
}

fn data(species: &Species) -> Vec<PageDatum> {
    let name = |at: usize| species.phases.get(at).map_or(String::new(), |phase| phase.name.clone());
    species
        .data
        .iter()
        .map(|datum| PageDatum {
            phase: match datum.kind {
                DatumKind::HeatCapacity { phase, .. } | DatumKind::Density { phase } => name(phase),
                DatumKind::Formation { phase: Some(phase) } => name(phase),
                DatumKind::Transition { below } => format!("{} to {}", name(below), name(below + 1)),
                _ => String::new(),
            },
            written: datum.text.clone(),
            valid_kelvin: datum.valid,
            interval: datum.interval.clone(),
            spread: datum.spread.clone(),
            source: datum.source.clone(),
        })
        .collect()
}

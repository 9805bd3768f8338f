//! Whether the data of a species agree with themselves: warnings that a reviewer would raise.
//!
//! A remark in the block that names a warning, `| W107: ...`, gives its reason and answers it.

use super::checker::{Checker, Claim};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{DatumKind, Species};
use crate::thermo::{Allowance, Pin};
use crate::units::quantity;

/// By how much cp may jump from one range to the next, relative.
const JUMP: f64 = 0.02;

/// By how much a polynomial's own enthalpy constant may differ from what formation enthalpy and transitions give,
/// J/mol.
const CONTRADICTION: f64 = 50.0;

/// How far a second source may lie, in per cent.
const SPREAD: f64 = 1.0;

/// By how much the stated boiling point may lie off that of the vapour pressure, K.
const BOILING: f64 = 0.5;

/// By how much a latent heat may lie off that of the vapour pressure's slope, relative.
const SLOPE: f64 = 0.05;

impl Checker<'_> {
    /// Warns where the data of a species do not agree.
    pub(super) fn warn_of_inconsistency(&mut self, species: &Species, claims: &[Claim]) {
        let mut found = jumps(species);
        found.extend(contradictions(species, claims));
        found.extend(wide_spreads(species));
        found.extend(unsourced(species));
        found.extend(boiling_off_law(species));
        found.extend(latent_off_slope(species));
        let answered = |code: Code| species.remarks.iter().any(|remark| remark.contains(code.as_str()));
        self.diagnostics.extend(found.into_iter().filter(|found| !answered(found.code)));
    }
}

/// Boundaries between two ranges of a phase at which cp jumps.
fn jumps(species: &Species) -> Vec<Diagnostic> {
    let mut found = Vec::new();
    for pair in species.data.windows(2) {
        let (DatumKind::HeatCapacity { phase, .. }, DatumKind::HeatCapacity { phase: next, .. }) =
            (pair[0].kind, pair[1].kind)
        else {
            continue;
        };
        let (Some((_, joint)), Some((lo, hi))) = (pair[0].valid, pair[1].valid) else { continue };
        if phase != next || lo >= hi {
            continue;
        }
        let (Some(below), Some(above)) =
            (heat_capacity(species, phase, joint, false), heat_capacity(species, phase, joint, true))
        else {
            continue;
        };
        let jump = (above - below) / below;
        if jump.abs() > JUMP {
            let message = format!(
                "the heat capacity of `{}` jumps by {:+.1} % at {joint} K, from one range to the next",
                species.in_phase(phase),
                jump * 100.0
            );
            found.push(
                Diagnostic::new(Code::HeatCapacityJump, message)
                    .label(pair[1].span, "this range begins there")
                    .label(pair[0].span, "this one ends there")
                    .help("check the coefficients; a transition that is missing shows like this"),
            );
        }
    }
    found
}

/// cp just below or just above a joint, by a step that no coefficient would notice.
fn heat_capacity(species: &Species, phase: usize, joint: f64, above: bool) -> Option<f64> {
    let kelvin = if above { joint * (1.0 + 1e-9) } else { joint * (1.0 - 1e-9) };
    let atmosphere = quantity(101_325.0);
    let place =
        species.curve.place(quantity(kelvin), atmosphere, Pin::Phase(phase), None, Allowance::none()).ok()?;
    species.curve.heat_capacity(place).map(|cp| cp.value)
}

/// Published forms whose own enthalpy constant says another enthalpy.
fn contradictions(species: &Species, claims: &[Claim]) -> Vec<Diagnostic> {
    let Some(molar_mass) = species.molar_mass.filter(|_| species.absolute) else { return Vec::new() };
    let told = |claim: &Claim| {
        let datum = species.data.iter().find(|datum| datum.span == claim.span)?;
        let DatumKind::HeatCapacity { phase, .. } = datum.kind else { return None };
        let (t, p) = (quantity(claim.kelvin), quantity(101_325.0));
        let place = species.curve.place(t, p, Pin::Phase(phase), None, Allowance::none()).ok()?;
        let built = species.curve.enthalpy(place).value * molar_mass;
        let apart = claim.enthalpy - built;
        (apart.abs() > CONTRADICTION).then(|| {
            Diagnostic::new(
                Code::EnthalpyConstant,
                format!(
                    "the enthalpy constant of `{}` lies {apart:+.0} J/mol off formation enthalpy and transitions",
                    species.in_phase(phase)
                ),
            )
            .label(claim.span, "its own constant is read, but not used")
            .help("check formation enthalpy, transitions and `R`: enthalpies are built from these")
        })
    };
    claims.iter().filter_map(told).collect()
}

/// Data from which a second source lies far.
fn wide_spreads(species: &Species) -> Vec<Diagnostic> {
    species
        .data
        .iter()
        .filter_map(|datum| {
            let spread = datum.spread.as_ref()?;
            let percent: f64 = spread.split_once('%')?.0.trim().parse().ok()?;
            (percent.abs() > SPREAD).then(|| {
                Diagnostic::new(
                    Code::SourcesDiffer,
                    format!(
                        "two sources of `{}` differ by {percent} %",
                        datum.text.split_whitespace().next().unwrap_or_default()
                    ),
                )
                .label(datum.span, format!("spread {spread}"))
                .help("say in a remark, `| W109: ...`, why this one is taken")
            })
        })
        .collect()
}

/// A species with data of which nobody knows the source.
fn unsourced(species: &Species) -> Option<Diagnostic> {
    let without: Vec<_> = species.data.iter().filter(|datum| datum.source.is_none()).collect();
    let first = without.first()?;
    let count = crate::diagnostic::count(without.len(), "datum").replace("datums", "data");
    Some(
        Diagnostic::new(Code::SourceMissing, format!("`{}` has {count} without a source", species.name))
            .label(first.span, "where does this come from?")
            .help("add `source \"...\"` behind it, or once to the block"),
    )
}

/// A stated boiling point at which the vapour pressure is not 101.325 kPa.
fn boiling_off_law(species: &Species) -> Option<Diagnostic> {
    let shift = species.curve.boiling_shift().filter(|shift| shift.abs() >= BOILING)?;
    let datum = species.data.iter().find(|datum| datum.kind == DatumKind::VapourPressure)?;
    Some(
        Diagnostic::new(
            Code::BoilingContradiction,
            format!(
                "the stated boiling point of `{}` lies {shift:+.2} K off that of its vapour pressure",
                species.name
            ),
        )
        .label(datum.span, "this law is moved to meet the stated point")
        .help("check both data; boiling is stated at 101.325 kPa"),
    )
}

/// A latent heat that the slope of the vapour pressure contradicts, by the equation of Clausius and Clapeyron.
fn latent_off_slope(species: &Species) -> Option<Diagnostic> {
    let (by_slope, latent) = species.curve.latent_by_slope()?;
    let off = latent.value / by_slope.value - 1.0;
    let datum = species.data.iter().find(|datum| datum.kind == DatumKind::VapourPressure)?;
    (off.abs() >= SLOPE).then(|| {
        Diagnostic::new(
            Code::LatentSlope,
            format!(
                "the latent heat of boiling of `{}`, {:.1} kJ/kg, lies {:+.1} % off the {:.1} kJ/kg of its vapour pressure",
                species.name,
                latent.value / 1e3,
                off * 100.0,
                by_slope.value / 1e3
            ),
        )
        .label(datum.span, "its slope gives R T²/M d ln p/dT, the vapour taken as ideal")
        .help("check both data, and whether the vapour is of the molecules that `formula` says")
    })
}

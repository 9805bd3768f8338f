//! Cautions: what in this sheet can hurt someone.

use super::worked::WorkedSheet;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Constituent, Path, Species, StateId, Step};
use crate::report::number::significant;
use crate::span::Span;
use crate::thermo::{PhaseClass, Place};

/// Gauge pressure above which pressure-equipment rules commonly apply, Pa (the European Pressure Equipment Directive
/// 2014/68/EU begins there; common practice elsewhere).
const PRESSURE_LIMIT: f64 = 0.5e5;

/// What the reader should do, by code.
pub(super) fn advice(code: Code) -> &'static str {
    match code {
        Code::ClosedVolume => {
            "A closed volume needs relief that is sized for the worst case, also for a vessel full of liquid, whose pressure rises far faster than a gas'. The figure here does not replace local codes, the makers' limits or a licensed engineer's judgement."
        }
        Code::WaterBesideHot => {
            "Water that is trapped beside or below something hotter than its boiling point flashes to steam and can throw hot matter. Keep charges dry and follow local codes and the makers' rules; the figure here does not replace a licensed engineer's judgement."
        }
        Code::PressureEquipment => {
            "Above 0.5 bar gauge pressure-equipment rules commonly apply. The figure here does not replace local codes, the makers' limits or a licensed engineer's judgement."
        }
        _ => {
            "A flammable vapour needs ventilation, control of ignition sources and, where codes ask for it, area classification. The figure here does not replace local codes, the makers' limits or a licensed engineer's judgement."
        }
    }
}

/// The cautions of a worked sheet, each at its place.
pub fn find_cautions(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut found = Vec::new();
    for step in &sheet.program.steps {
        closed_volume(sheet, step, &mut found);
        water_beside_hot(sheet, step, &mut found);
        flammable_vapour(sheet, step, &mut found);
    }
    for (at, state) in sheet.program.states.iter().enumerate() {
        high_pressure(sheet, StateId(at), state.span, &state.name, &mut found);
    }
    found
}

fn caution(code: Code, message: String, span: Span) -> Diagnostic {
    Diagnostic::new(code, message).label(span, "here").help(advice(code))
}

fn temperature(sheet: &WorkedSheet<'_>, id: StateId) -> f64 {
    sheet.map.states.get(id.0).map_or(f64::NAN, |slots| sheet.value(slots.temperature))
}

fn closed_volume(sheet: &WorkedSheet<'_>, step: &Step, found: &mut Vec<Diagnostic>) {
    let closed = step.path.is_some_and(|(path, _)| path == Path::ConstantVolume) && !step.flow;
    let ends = step.from.first().zip(step.to.first());
    let heated = ends.is_some_and(|(from, to)| temperature(sheet, *to) > temperature(sheet, *from));
    if closed && heated {
        found.push(caution(Code::ClosedVolume, format!("`{}` heats a closed volume", step.name), step.span));
    }
}

/// Liquid water in a state: its name and its boiling point.
fn liquid_water(sheet: &WorkedSheet<'_>, id: StateId) -> Option<(String, f64)> {
    sheet.contents(id).into_iter().find_map(|(part, _, place)| {
        let species = sheet.program.species.get(part.species.0)?;
        let liquid = place.is_some_and(|place| class_at(species, place) == Some(PhaseClass::Liquid));
        let is_water = species.formula.as_ref().is_some_and(|(formula, _)| formula == "H2O");
        (is_water && liquid).then(|| (species.name.clone(), boiling_point(species)))
    })
}

/// Water that is hot itself, under pressure, stands beside nothing.
fn water_beside_hot(sheet: &WorkedSheet<'_>, step: &Step, found: &mut Vec<Diagnostic>) {
    let Some((water, boiling)) = step.from.iter().find_map(|id| liquid_water(sheet, *id)) else { return };
    let beside = step.from.iter().filter(|id| liquid_water(sheet, **id).is_none());
    let hottest = beside.map(|id| temperature(sheet, *id)).fold(f64::NEG_INFINITY, f64::max);
    if hottest > boiling {
        let message = format!(
            "`{}` brings `{water}` beside something at {} degC",
            step.name,
            significant(hottest - 273.15, 4)
        );
        found.push(caution(Code::WaterBesideHot, message, step.span));
    }
}

/// The boiling point of the block; of water without one, 100 degC.
fn boiling_point(species: &Species) -> f64 {
    (1..species.phases.len())
        .filter(|at| species.phases[*at].class == PhaseClass::Gas)
        .find_map(|at| species.curve.transition(at - 1))
        .map_or(373.15, |transition| transition.from.value)
}

fn class_at(species: &Species, place: Place) -> Option<PhaseClass> {
    let present = species.curve.phases_at(place);
    let main = present.upper.filter(|(_, share)| *share > 0.5).unwrap_or(present.lower);
    species.curve.phase_class(main.0)
}

fn high_pressure(sheet: &WorkedSheet<'_>, id: StateId, span: Span, name: &str, found: &mut Vec<Diagnostic>) {
    let Some(slots) = sheet.map.states.get(id.0) else { return };
    let gauge = sheet.value(slots.pressure) - sheet.atmosphere();
    if gauge > PRESSURE_LIMIT * (1.0 + 1e-9) {
        let message = format!("`{name}` stands at {} bar gauge", significant(gauge / 1e5, 4));
        found.push(caution(Code::PressureEquipment, message, span));
    }
}

/// A flammable substance that is gas at the end of a step and was condensed, or stands in the open.
fn flammable_vapour(sheet: &WorkedSheet<'_>, step: &Step, found: &mut Vec<Diagnostic>) {
    let vapour = |id: &StateId| {
        sheet.contents(*id).into_iter().find_map(|(part, mass, place)| vapour_name(sheet, part, mass, place))
    };
    let was_vapour = step.from.iter().any(|id| vapour(id).is_some());
    if let (Some(name), false) = (step.to.iter().find_map(vapour), was_vapour) {
        found.push(caution(
            Code::FlammableVapour,
            format!("`{}` lets off a flammable vapour, `{name}`", step.name),
            step.span,
        ));
    }
}

fn vapour_name(
    sheet: &WorkedSheet<'_>,
    part: Constituent,
    mass: f64,
    place: Option<Place>,
) -> Option<String> {
    let species = sheet.program.species.get(part.species.0)?;
    let place = place.filter(|_| mass > 0.0)?;
    let gas = species.curve.class_share(place, PhaseClass::Gas) > 0.0;
    (gas && is_flammable(species)).then(|| species.name.clone())
}

/// Hydrogen, carbon monoxide, ammonia, hydrogen sulfide, and every compound of carbon and hydrogen without halogens in
/// excess: common practice, meant to err on the side of a caution.
fn is_flammable(species: &Species) -> bool {
    let Some((formula, composition)) = &species.formula else { return false };
    let count = |symbol: &str| {
        composition
            .parts()
            .iter()
            .filter(|(element, _)| element.symbol() == symbol)
            .map(|(_, count)| *count)
            .sum::<f64>()
    };
    let halogens = count("F") + count("Cl") + count("Br");
    let organic = count("C") > 0.0 && count("H") > halogens;
    organic || matches!(formula.as_str(), "H2" | "CO" | "NH3" | "H2S" | "CS2" | "HCN")
}

//! Which data the answers rest on, and over which temperatures.

use super::worked::WorkedSheet;
use crate::program::{Constituent, DatumKind, Node, Species, SpeciesId, StateId, StateMember, Step};
use crate::thermo::{Allowance, Leg, LegKind, PhaseClass, Pin, Place};
use crate::units::quantity;
use std::collections::BTreeMap;

/// The temperatures over which each datum is used, K.
#[derive(Debug, Default)]
pub(super) struct Usage {
    used: BTreeMap<(SpeciesId, DatumKind), (f64, f64)>,
}

/// A parcel of a species on its way through a step.
#[derive(Debug, Clone, Copy)]
pub(super) struct Parcel {
    pub(super) constituent: Constituent,
    pub(super) mass: f64,
    pub(super) place: Place,
    pub(super) pressure: f64,
}

impl Usage {
    /// Where a datum is used.
    pub(super) fn of(&self, species: SpeciesId, kind: DatumKind) -> Option<(f64, f64)> {
        self.used.get(&(species, kind)).copied()
    }

    /// The species of which a datum is used.
    pub(super) fn species(&self) -> impl Iterator<Item = SpeciesId> {
        self.used.keys().map(|(species, _)| *species)
    }

    fn note(&mut self, species: SpeciesId, kind: DatumKind, (from, to): (f64, f64)) {
        let (low, high) = if from <= to { (from, to) } else { (to, from) };
        let known = self.used.entry((species, kind)).or_insert((low, high));
        *known = (known.0.min(low), known.1.max(high));
    }

    /// All data that a worked sheet rests on.
    pub(super) fn of_sheet(sheet: &WorkedSheet<'_>) -> Usage {
        let mut usage = Usage::default();
        for id in 0..sheet.program.states.len() {
            usage.state(sheet, StateId(id));
        }
        for step in &sheet.program.steps {
            for (parcel, legs) in sheet.ways(step) {
                for leg in legs {
                    usage.leg(sheet, parcel.constituent.species, &leg);
                }
            }
        }
        usage.absolute(sheet);
        usage
    }

    /// What a state uses at its own temperature: the heat capacity and the density of its phases.
    fn state(&mut self, sheet: &WorkedSheet<'_>, id: StateId) {
        for (constituent, _, place) in sheet.contents(id) {
            let (Some(place), Some(species)) = (place, sheet.program.species.get(constituent.species.0))
            else {
                continue;
            };
            let t = place.temperature().value;
            let present = species.curve.phases_at(place);
            let changing = present.upper.is_some_and(|(_, share)| share > 0.0 && share < 1.0);
            for (phase, _) in present.present() {
                if !changing {
                    self.sensible(sheet, constituent.species, phase, (t, t));
                }
                self.note(constituent.species, DatumKind::Density { phase }, (t, t));
            }
            if changing {
                self.note(constituent.species, DatumKind::Transition { below: present.lower.0 }, (t, t));
            }
            if present.upper.is_some() && sheet.boils_by_law(constituent.species, present.lower.0, t) {
                self.note(constituent.species, DatumKind::VapourPressure, (t, t));
            }
            self.note(constituent.species, DatumKind::MolarMass, (t, t));
        }
    }

    fn leg(&mut self, sheet: &WorkedSheet<'_>, id: SpeciesId, leg: &Leg) {
        let span = (leg.from.value, leg.to.value);
        match leg.kind {
            LegKind::Sensible { phase } => self.sensible(sheet, id, phase, span),
            LegKind::SensibleInRange { link } => self.note(id, DatumKind::Transition { below: link }, span),
            LegKind::Transition { link: Some(link), .. } => {
                self.note(id, DatumKind::Transition { below: link }, span);
                if sheet.boils_by_law(id, link, leg.from.value) {
                    self.note(id, DatumKind::VapourPressure, span);
                }
            }
            LegKind::Transition { .. } => {
                self.note(id, DatumKind::Formation { phase: None }, (298.15, 298.15))
            }
        }
    }

    /// The ranges of a phase that a change of temperature passes.
    fn sensible(&mut self, sheet: &WorkedSheet<'_>, id: SpeciesId, phase: usize, (from, to): (f64, f64)) {
        let Some(species) = sheet.program.species.get(id.0) else { return };
        let (low, high) = (from.min(to), from.max(to));
        let ranges: Vec<(DatumKind, (f64, f64))> = species
            .data
            .iter()
            .filter(|datum| matches!(datum.kind, DatumKind::HeatCapacity { phase: of, .. } if of == phase))
            .map(|datum| (datum.kind, datum.valid.unwrap_or((low, high))))
            .collect();
        let last = ranges.len().saturating_sub(1);
        for (at, (kind, (lo, hi))) in ranges.into_iter().enumerate() {
            // the outermost ranges carry what lies beyond them
            let lo = if at == 0 { f64::NEG_INFINITY } else { lo };
            let hi = if at == last { f64::INFINITY } else { hi };
            let (begin, end) = (low.max(lo), high.min(hi));
            if begin < end || (low == high && begin == end) {
                self.note(id, kind, (begin, end));
            }
        }
    }

    /// Absolute enthalpies rest on formation enthalpies and on the way from 298.15 K.
    fn absolute(&mut self, sheet: &WorkedSheet<'_>) {
        let mut asked: Vec<StateId> = Vec::new();
        sheet.program.each_expression(&mut |expr| {
            if let Node::State(
                id,
                StateMember::Enthalpy
                | StateMember::InternalEnergy
                | StateMember::SpecificEnthalpy
                | StateMember::SpecificInternalEnergy,
            ) = &expr.node
            {
                asked.push(*id);
            }
        });
        for step in sheet.program.steps.iter().filter(|step| sheet.turns_matter(step)) {
            asked.extend(step.from.iter().chain(&step.to));
        }
        for id in asked {
            for (constituent, _, place) in sheet.contents(id) {
                let (Some(place), Some(species)) = (place, sheet.program.species.get(constituent.species.0))
                else {
                    continue;
                };
                for kind in species.data.iter().map(|datum| datum.kind) {
                    if matches!(kind, DatumKind::Formation { .. }) {
                        self.note(constituent.species, kind, (298.15, 298.15));
                    }
                }
                let start = species.curve.place(
                    quantity(298.15),
                    quantity(101_325.0),
                    Pin::Stable,
                    None,
                    &from_298(species),
                );
                for leg in start.map(|start| species.curve.route(start, place)).unwrap_or_default() {
                    self.leg(sheet, constituent.species, &leg);
                }
            }
        }
    }
}

/// Data that begin up to 2 K above 298.15 K hold from there for an absolute enthalpy.
fn from_298(species: &Species) -> Allowance {
    (0..species.phases.len()).fold(Allowance::default(), |allowance, phase| {
        match species.curve.phase_span(phase) {
            Some((lo, hi)) if lo.value > 298.15 && lo.value <= 300.15 => {
                allowance.allow(phase, quantity(298.15), hi)
            }
            _ => allowance,
        }
    })
}

impl WorkedSheet<'_> {
    /// Whether a species boils at a temperature by its vapour pressure, not at its stated boiling point.
    pub(super) fn boils_by_law(&self, id: SpeciesId, link: usize, kelvin: f64) -> bool {
        self.program.species.get(id.0).is_some_and(|species| {
            let stated = species.curve.transition(link).map(|transition| transition.from.value);
            let gas = species.curve.phase_class(link + 1) == Some(PhaseClass::Gas);
            gas && species.curve.vapour_pressure().is_some() && stated != Some(kelvin)
        })
    }

    /// Whether a step turns one species into another.
    pub(super) fn turns_matter(&self, step: &Step) -> bool {
        let species = |ids: &[StateId]| -> std::collections::BTreeSet<SpeciesId> {
            ids.iter().flat_map(|id| self.contents(*id)).map(|(part, ..)| part.species).collect()
        };
        species(&step.from) != species(&step.to)
    }

    fn parcels(&self, ids: &[StateId]) -> Vec<Parcel> {
        ids.iter()
            .flat_map(|id| {
                let pressure = self.map.states.get(id.0).map_or(f64::NAN, |slots| self.value(slots.pressure));
                self.contents(*id)
                    .into_iter()
                    .map(move |(constituent, mass, place)| (constituent, mass, place, pressure))
            })
            .filter_map(|(constituent, mass, place, pressure)| {
                Some(Parcel { constituent, mass, place: place?, pressure })
            })
            .filter(|parcel| parcel.mass > 0.0)
            .collect()
    }

    /// The ways of a step: each species' mass from a place at the start to one at the end, with the legs per kilogram.
    pub(super) fn ways(&self, step: &Step) -> Vec<(Parcel, Vec<Leg>)> {
        let last = step.to.first().and_then(|id| self.map.states.get(id.0));
        let pressure = quantity(last.map_or(f64::NAN, |slots| self.value(slots.pressure)));
        self.paired(step)
            .into_iter()
            .filter_map(|(start, end)| {
                let species = self.program.species.get(start.constituent.species.0)?;
                Some((start, species.curve.route_at(start.place, end.place, pressure)))
            })
            .collect()
    }

    /// Parcels at the start matched with parcels of the same species at the end, first come first served.
    pub(super) fn paired(&self, step: &Step) -> Vec<(Parcel, Parcel)> {
        let mut ends = self.parcels(&step.to);
        let mut pairs = Vec::new();
        for mut start in self.parcels(&step.from) {
            let whole = start.mass;
            for end in &mut ends {
                if end.constituent.species != start.constituent.species || start.mass <= whole * 1e-12 {
                    continue;
                }
                let mass = start.mass.min(end.mass);
                if mass <= 0.0 {
                    continue;
                }
                pairs.push((Parcel { mass, ..start }, Parcel { mass, ..*end }));
                start.mass -= mass;
                end.mass -= mass;
            }
        }
        pairs
    }
}

//! States: pressures, temperatures, places, and sums over their constituents.

use super::builder::{Builder, Lowering, Placing, Temperature};
use crate::plan::{Check, Op, OriginKind, PlaceSlot, Slot, StateSlots};
use crate::program::{Condition, Constituent, State, StateId, Unknown};
use crate::thermo::PhaseClass;

/// The sums over a state's constituents that are kept.
#[derive(Clone, Copy)]
#[repr(u8)]
pub(super) enum Total {
    Mass,
    Amount,
    Enthalpy,
    InternalEnergy,
    PressurePart,
    Volume,
    VolumeOrNothing,
    HeatCapacity,
}

impl Builder<'_> {
    pub(super) fn program_state(&self, id: StateId) -> Option<&State> {
        self.program.states.get(id.0)
    }

    /// The slots of a state, lowered where they are not yet.
    pub(super) fn state_slots(&mut self, id: StateId) -> Lowering<StateSlots> {
        let temperature = self.temperature(id)?;
        let places = self.placed(id)?;
        let masses = self.masses(id)?;
        let constituents = self.constituents(id);
        let molar = constituents.iter().all(|part| self.molar_mass(part).is_some());
        let amount = if molar { Some(self.sum(id, Total::Amount)?) } else { None };
        Ok(StateSlots {
            temperature: temperature.slot,
            pressure: self.pressure(id)?,
            mass: self.sum(id, Total::Mass)?,
            amount,
            enthalpy: self.sum(id, Total::Enthalpy)?,
            masses,
            materials: constituents.iter().map(|part| self.material(part)).collect(),
            places,
            settled: matches!(temperature.placing, Placing::Settled(_)),
        })
    }

    pub(super) fn molar_mass(&self, constituent: &Constituent) -> Option<f64> {
        self.program.species.get(constituent.species.0)?.molar_mass
    }

    pub(super) fn pressure(&mut self, id: StateId) -> Lowering<Slot> {
        if let Some(slot) = self.pressures.get(&id) {
            return Ok(*slot);
        }
        let Some(state) = self.program.states.get(id.0) else { return Ok(self.constant(f64::NAN)) };
        let before = self.from(state.span, OriginKind::State(id, 0));
        let slot = match &state.pressure {
            Condition::Value(expr) => {
                let a = self.expr(expr)?;
                self.from(expr.span, OriginKind::State(id, 0));
                self.emit(|to| Op::Guard { check: Check::PositivePressure, a, b: a, value: a, to })
            }
            Condition::Of(other) => self.pressure(*other)?,
            Condition::Agreed(others, atmosphere) => {
                let mut slots =
                    others.iter().map(|other| self.pressure(*other)).collect::<Lowering<Vec<Slot>>>()?;
                slots.extend(self.map.atmosphere.filter(|_| *atmosphere));
                let first = slots.first().copied().unwrap_or_else(|| self.constant(f64::NAN));
                slots.iter().skip(1).filter(|slot| **slot != first).copied().collect::<Vec<_>>().iter().fold(
                    first,
                    |value, &b| {
                        self.emit(|to| Op::Guard { check: Check::AgreedPressure, a: first, b, value, to })
                    },
                )
            }
            Condition::Unknown(_) => self.settled(id, Unknown::Pressure)?,
            Condition::Boiling => {
                let t = self.temperature(id)?.slot;
                let material = self.first_material(id);
                self.from(state.span, OriginKind::State(id, 0));
                self.emit(|to| Op::SaturationPressure { material, t, to })
            }
            Condition::Atmosphere => self.map.atmosphere.unwrap_or(Slot(0)),
        };
        self.back(before);
        self.pressures.insert(id, slot);
        Ok(slot)
    }

    pub(super) fn temperature(&mut self, id: StateId) -> Lowering<Temperature> {
        if let Some(temperature) = self.temperatures.get(&id) {
            return Ok(*temperature);
        }
        let Some(state) = self.program.states.get(id.0) else {
            let slot = self.constant(f64::NAN);
            return Ok(Temperature { slot, placing: Placing::Plain });
        };
        let side = match &state.share {
            Some((phase, share)) => {
                let share = self.expr(share)?;
                Some((u32::try_from(*phase).unwrap_or(u32::MAX), share))
            }
            None => None,
        };
        let said = side.map_or(Placing::Plain, |(phase, share)| Placing::Side(phase, share));
        let temperature = match &state.temperature {
            Condition::Value(expr) => Temperature { slot: self.expr(expr)?, placing: said },
            Condition::Of(other) => {
                let other = self.temperature(*other)?;
                Temperature { placing: if side.is_some() { said } else { other.placing }, ..other }
            }
            Condition::Unknown(_) => {
                let slot = self.settled(id, Unknown::Temperature)?;
                let share = self.shares.get(&id).copied();
                let share = share.unwrap_or_else(|| self.constant(f64::NAN));
                Temperature { slot, placing: Placing::Settled(share) }
            }
            Condition::Boiling if self.follows_law(id) => {
                let p = self.pressure(id)?;
                let material = self.first_material(id);
                let before = self.from(state.span, OriginKind::State(id, 0));
                let slot = self.emit(|to| Op::BoilingTemperature { material, p, to });
                self.back(before);
                Temperature { slot, placing: said }
            }
            Condition::Boiling | Condition::Atmosphere | Condition::Agreed(..) => {
                let kelvin = self.boiling_point(id);
                Temperature { slot: self.constant(kelvin), placing: said }
            }
        };
        self.temperatures.insert(id, temperature);
        Ok(temperature)
    }

    /// Whether a vapour-pressure law says where the one species of a state boils.
    fn follows_law(&self, id: StateId) -> bool {
        let only = self.program_state(id).and_then(|state| state.constituents.first());
        only.and_then(|part| self.program.species.get(part.species.0))
            .is_some_and(|species| species.curve.vapour_pressure().is_some())
    }

    fn first_material(&mut self, id: StateId) -> u32 {
        self.constituents(id).first().map_or(u32::MAX, |part| self.material(part))
    }

    /// The latent heat passed by a state, boiling where it is at the pressure `p`.
    pub(super) fn latent_sum(&mut self, id: StateId, p: Slot) -> Lowering<Slot> {
        let masses = self.masses(id)?;
        let mut terms = Vec::new();
        for (at, (mass, part)) in masses.iter().zip(&self.constituents(id)).enumerate() {
            let place = self.place(id, at)?;
            let material = self.material(part);
            let specific = self.emit(|to| Op::Latent { material, place, p, to });
            terms.push(self.multiply(*mass, specific));
        }
        Ok(self.total(&terms))
    }

    /// The boiling point of a state's one species.
    fn boiling_point(&self, id: StateId) -> f64 {
        let species = self
            .program_state(id)
            .and_then(|state| state.constituents.first())
            .and_then(|part| self.program.species.get(part.species.0));
        let Some(species) = species else { return f64::NAN };
        (1..species.phases.len())
            .filter(|at| species.phases[*at].class == PhaseClass::Gas)
            .find_map(|at| species.curve.transition(at - 1))
            .map_or(f64::NAN, |transition| transition.from.value)
    }

    /// The places of all constituents.
    pub(super) fn placed(&mut self, id: StateId) -> Lowering<Vec<PlaceSlot>> {
        (0..self.constituents(id).len()).map(|at| self.place(id, at)).collect()
    }

    pub(super) fn place(&mut self, id: StateId, at: usize) -> Lowering<PlaceSlot> {
        if let Some(place) = self.places.get(&id).and_then(|places| places.get(at)) {
            return Ok(*place);
        }
        let temperature = self.temperature(id)?;
        let p = self.pressure(id)?;
        let span = self.program_state(id).map(|state| state.span).unwrap_or_default();
        let mut places = Vec::new();
        for (index, part) in self.constituents(id).iter().enumerate() {
            let before = self.from(span, OriginKind::State(id, index));
            let material = self.material(part);
            let (to, t) = (self.place_slot(), temperature.slot);
            let op = match temperature.placing {
                Placing::Plain => Op::Locate { material, t, p, side: None, to },
                Placing::Side(phase, share) => Op::Locate { material, t, p, side: Some((phase, share)), to },
                Placing::Settled(share) => Op::Place { material, t, p, share, to },
            };
            self.push(op);
            self.back(before);
            places.push(to);
        }
        let place = places.get(at).copied().unwrap_or(PlaceSlot(0));
        self.places.insert(id, places);
        Ok(place)
    }

    /// A sum over the constituents of a state: Σ m x.
    pub(super) fn sum(&mut self, id: StateId, total: Total) -> Lowering<Slot> {
        let key = (id, total as u8);
        if let Some(slot) = self.sums.get(&key) {
            return Ok(*slot);
        }
        let masses = self.masses(id)?;
        let constituents = self.constituents(id);
        let span = self.program_state(id).map(|state| state.span).unwrap_or_default();
        let mut terms = Vec::new();
        for (at, (mass, part)) in masses.iter().zip(&constituents).enumerate() {
            let before = self.from(span, OriginKind::State(id, at));
            terms.push(match total {
                Total::Mass => *mass,
                Total::Amount => {
                    let molar_mass = self.molar_mass(part).unwrap_or(f64::NAN);
                    let molar_mass = self.constant(molar_mass);
                    self.divide(*mass, molar_mass)
                }
                _ => {
                    let specific = self.specific(id, at, part, total)?;
                    self.multiply(*mass, specific)
                }
            });
            self.back(before);
        }
        let slot = self.total(&terms);
        self.sums.insert(key, slot);
        Ok(slot)
    }

    /// A property per mass of one constituent.
    fn specific(&mut self, id: StateId, at: usize, part: &Constituent, total: Total) -> Lowering<Slot> {
        let place = self.place(id, at)?;
        let material = self.material(part);
        let p = self.pressure(id)?;
        Ok(self.emit(|to| match total {
            Total::InternalEnergy => Op::InternalEnergy { material, place, to },
            Total::PressurePart => Op::PressurePart { material, place, p, to },
            Total::HeatCapacity => Op::HeatCapacity { material, place, to },
            Total::Volume => Op::Volume { material, place, p, neglect: false, to },
            Total::VolumeOrNothing => Op::Volume { material, place, p, neglect: true, to },
            Total::Mass | Total::Amount | Total::Enthalpy => Op::Enthalpy { material, place, p, to },
        }))
    }
}

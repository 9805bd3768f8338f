//! States: masses, pressures, temperatures, places, and what is asked of them.

use super::builder::{Builder, Lowering, Placing, Temperature};
use crate::plan::{Check, Op, OriginKind, PhaseSet, PlaceSlot, Slot, StateSlots};
use crate::program::{Condition, Constituent, Quantum, Source, State, StateId, StateMember, Unknown};
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
    fn program_state(&self, id: StateId) -> Option<&State> {
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

    /// The masses of a state's constituents.
    pub(super) fn masses(&mut self, id: StateId) -> Lowering<Vec<Slot>> {
        if let Some(masses) = self.masses.get(&id) {
            return Ok(masses.clone());
        }
        let Some(state) = self.program.states.get(id.0) else { return Ok(Vec::new()) };
        let before = self.from(state.span, OriginKind::State(id, 0));
        let masses = self.masses_of(id, &state.source)?;
        self.back(before);
        let zero = self.constant(0.0);
        let masses: Vec<Slot> = masses.into_iter().map(|mass| mass.unwrap_or(zero)).collect();
        self.masses.insert(id, masses.clone());
        Ok(masses)
    }

    /// The masses that a source brings to each constituent of the state.
    fn masses_of(&mut self, id: StateId, source: &Source) -> Lowering<Vec<Option<Slot>>> {
        let constituents = self.constituents(id);
        match source {
            Source::Whole(other) => {
                let theirs = self.constituents(*other);
                let masses = self.masses(*other)?;
                Ok(constituents
                    .iter()
                    .map(|part| {
                        theirs.iter().position(|known| known == part).and_then(|at| masses.get(at)).copied()
                    })
                    .collect())
            }
            Source::Sum(parts) => {
                let mut total: Vec<Option<Slot>> = vec![None; constituents.len()];
                for part in parts {
                    for (at, mass) in self.masses_of(id, part)?.into_iter().enumerate() {
                        total[at] = match (total[at], mass) {
                            (Some(a), Some(b)) => Some(self.add(a, b)),
                            (a, b) => a.or(b),
                        };
                    }
                }
                Ok(total)
            }
            Source::Fresh { amount, quantum, portions } => {
                let value = self.amount(amount)?;
                let per_kilogram: Vec<(usize, Option<Slot>)> = portions
                    .iter()
                    .map(|portion| {
                        (portion.constituent, (portion.share != 1.0).then(|| self.constant(portion.share)))
                    })
                    .collect();
                let mut masses: Vec<Option<Slot>> = vec![None; constituents.len()];
                let one = self.constant(1.0);
                for (at, share) in &per_kilogram {
                    masses[*at] = Some(share.unwrap_or(one));
                }
                let mass = self.mass_of_amount(id, value, *quantum, &masses)?;
                for (at, share) in per_kilogram {
                    masses[at] = Some(match share {
                        None => mass,
                        Some(share) => self.multiply(mass, share),
                    });
                }
                Ok(masses)
            }
            Source::PartOf { amount, quantum, of } => {
                let value = self.amount(amount)?;
                let whole = self.masses_of(id, of)?;
                let factor = if *quantum == Quantum::Share {
                    let before = self.from(amount.span, OriginKind::Expression);
                    let share =
                        self.emit(|to| Op::Guard { check: Check::Share, a: value, b: value, value, to });
                    self.back(before);
                    share
                } else {
                    self.mass_of_amount(id, value, *quantum, &whole)?
                };
                Ok(whole.into_iter().map(|mass| mass.map(|mass| self.multiply(mass, factor))).collect())
            }
        }
    }

    fn amount(&mut self, amount: &crate::program::Expr) -> Lowering<Slot> {
        let a = self.expr(amount)?;
        let before = self.from(amount.span, OriginKind::Expression);
        let slot = self.emit(|to| Op::Guard { check: Check::PositiveAmount, a, b: a, value: a, to });
        self.back(before);
        Ok(slot)
    }

    /// By what the masses of a whole are multiplied to make up an amount of it.
    fn mass_of_amount(
        &mut self,
        id: StateId,
        amount: Slot,
        quantum: Quantum,
        whole: &[Option<Slot>],
    ) -> Lowering<Slot> {
        let constituents = self.constituents(id);
        let mut terms = Vec::new();
        for (at, mass) in whole.iter().enumerate() {
            let (Some(mass), Some(part)) = (*mass, constituents.get(at)) else { continue };
            terms.push(match quantum {
                Quantum::Mass | Quantum::Share => mass,
                Quantum::Substance => {
                    let molar_mass = self.molar_mass(part).unwrap_or(f64::NAN);
                    let molar_mass = self.constant(molar_mass);
                    self.divide(mass, molar_mass)
                }
                Quantum::Volume => {
                    let volume = self.specific_volume(id, at)?;
                    self.multiply(mass, volume)
                }
            });
        }
        let total = self.total(&terms);
        if quantum == Quantum::Mass && self.constants.get(&1.0_f64.to_bits()) == Some(&total) {
            return Ok(amount);
        }
        Ok(self.divide(amount, total))
    }

    fn specific_volume(&mut self, id: StateId, at: usize) -> Lowering<Slot> {
        let place = self.place(id, at)?;
        let p = self.pressure(id)?;
        let Some(part) = self.constituents(id).get(at).copied() else { return Ok(self.constant(f64::NAN)) };
        let material = self.material(&part);
        Ok(self.emit(|to| Op::Volume { material, place, p, neglect: false, to }))
    }

    /// The places of all constituents.
    pub(super) fn placed(&mut self, id: StateId) -> Lowering<Vec<PlaceSlot>> {
        (0..self.constituents(id).len()).map(|at| self.place(id, at)).collect()
    }

    fn place(&mut self, id: StateId, at: usize) -> Lowering<PlaceSlot> {
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

    pub(super) fn state_member(&mut self, id: StateId, member: &StateMember) -> Lowering<Slot> {
        Ok(match member {
            StateMember::Temperature => {
                let value = self.temperature(id)?.slot;
                self.known_to_hold(id, value)?
            }
            StateMember::Pressure => {
                let value = self.pressure(id)?;
                self.known_to_hold(id, value)?
            }
            StateMember::Amount => self.sum(id, Total::Amount)?,
            StateMember::Mass => self.sum(id, Total::Mass)?,
            StateMember::Volume => self.sum(id, Total::Volume)?,
            StateMember::Enthalpy => self.sum(id, Total::Enthalpy)?,
            StateMember::InternalEnergy => self.sum(id, Total::InternalEnergy)?,
            StateMember::SpecificEnthalpy => self.per_mass(id, Total::Enthalpy)?,
            StateMember::SpecificInternalEnergy => self.per_mass(id, Total::InternalEnergy)?,
            StateMember::HeatCapacity => self.per_mass(id, Total::HeatCapacity)?,
            StateMember::Density => {
                let (mass, volume) = (self.sum(id, Total::Mass)?, self.sum(id, Total::Volume)?);
                self.divide(mass, volume)
            }
            StateMember::MassOf(which) => self.mass_among(id, which)?,
            StateMember::MassShare(which) => {
                let (mass, all) = (self.mass_among(id, which)?, self.sum(id, Total::Mass)?);
                self.divide(mass, all)
            }
            StateMember::AmountOf(which) => self.amount_among(id, which)?,
            StateMember::Share(which, among) => {
                let (amount, all) = (self.amount_among(id, which)?, self.amount_among(id, among)?);
                self.divide(amount, all)
            }
            StateMember::Fraction(which, phase) => self.fraction(id, which, phase)?,
        })
    }

    /// A condition of a state, where the state has a place on its heating curves. While an unknown of the state is
    /// being settled its place is not known yet, and the condition goes on as it is.
    fn known_to_hold(&mut self, id: StateId, value: Slot) -> Lowering<Slot> {
        if self.waiting.iter().any(|(waiting, _)| *waiting == id) {
            return Ok(value);
        }
        let given = self.sum(id, Total::Enthalpy)?;
        Ok(self.emit(|to| Op::Known { value, given, to }))
    }

    fn per_mass(&mut self, id: StateId, total: Total) -> Lowering<Slot> {
        let (value, mass) = (self.sum(id, total)?, self.sum(id, Total::Mass)?);
        Ok(self.divide(value, mass))
    }

    fn mass_among(&mut self, id: StateId, which: &[usize]) -> Lowering<Slot> {
        let masses = self.masses(id)?;
        let chosen: Vec<Slot> = which.iter().filter_map(|at| masses.get(*at)).copied().collect();
        Ok(self.total(&chosen))
    }

    fn amount_among(&mut self, id: StateId, which: &[usize]) -> Lowering<Slot> {
        let masses = self.masses(id)?;
        let constituents = self.constituents(id);
        let mut terms = Vec::new();
        for at in which {
            let (Some(mass), Some(part)) = (masses.get(*at), constituents.get(*at)) else { continue };
            let molar_mass = self.molar_mass(part).unwrap_or(f64::NAN);
            let molar_mass = self.constant(molar_mass);
            terms.push(self.divide(*mass, molar_mass));
        }
        Ok(self.total(&terms))
    }

    /// The share of a species that is in a phase: by mass and by mole alike, since it is one species.
    fn fraction(&mut self, id: StateId, which: &[usize], phase: &str) -> Lowering<Slot> {
        let masses = self.masses(id)?;
        let constituents = self.constituents(id);
        let mut terms = Vec::new();
        for at in which {
            let (Some(mass), Some(part)) = (masses.get(*at).copied(), constituents.get(*at)) else {
                continue;
            };
            let Some(phases) = self.phase_set(part, phase) else { continue };
            let place = self.place(id, *at)?;
            let material = self.material(part);
            let share = self.emit(|to| Op::PhaseShare { material, place, phases, to });
            terms.push(self.multiply(mass, share));
        }
        let (part, all) = (self.total(&terms), self.mass_among(id, which)?);
        Ok(self.divide(part, all))
    }

    /// A phase by name, or all phases of a class.
    fn phase_set(&self, part: &Constituent, word: &str) -> Option<PhaseSet> {
        let species = self.program.species.get(part.species.0)?;
        let class = match word {
            "solid" | "s" => Some(PhaseClass::Solid),
            "liquid" | "l" => Some(PhaseClass::Liquid),
            "gas" | "g" | "vapour" | "vapor" => Some(PhaseClass::Gas),
            _ => None,
        };
        let named = species.phases.iter().position(|phase| phase.name == word || phase.symbol == word);
        match (class, named) {
            (Some(class), _) => Some(PhaseSet::Class(class)),
            (None, Some(at)) => Some(PhaseSet::One(u32::try_from(at).ok()?)),
            (None, None) => None,
        }
    }
}

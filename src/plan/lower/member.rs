//! What is asked of a state.

use super::builder::{Builder, Lowering};
use super::state::Total;
use crate::plan::{Op, PhaseSet, Slot};
use crate::program::{Constituent, StateId, StateMember};
use crate::thermo::PhaseClass;

impl Builder<'_> {
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

//! Unknown temperatures and pressures, each by the law of its step.

use super::builder::{Builder, Lowering};
use super::state::Total;
use crate::plan::{Check, Op, OriginKind, PartRange, Settle, Slot};
use crate::program::{Condition, Heat, Law, Settles, StateId, Step, Unknown};

/// Enthalpy for a flow and at constant pressure, internal energy in a closed volume.
#[derive(Clone, Copy, PartialEq)]
enum Energy {
    Enthalpy,
    Internal,
}

impl Energy {
    fn total(self) -> Total {
        match self {
            Energy::Enthalpy => Total::Enthalpy,
            Energy::Internal => Total::InternalEnergy,
        }
    }

    fn settle(self) -> Settle {
        match self {
            Energy::Enthalpy => Settle::Enthalpy,
            Energy::Internal => Settle::InternalEnergy,
        }
    }
}

impl Builder<'_> {
    /// The slot of an unknown, by the step that settles it.
    pub(super) fn settled(&mut self, id: StateId, unknown: Unknown) -> Lowering<Slot> {
        let program = self.program;
        let by = self.settling.get(&(id, unknown)).copied();
        let step = by.and_then(|(step_id, _)| program.steps.get(step_id.0));
        let (Some((step_id, settles)), Some(step)) = (by, step) else { return Ok(self.constant(f64::NAN)) };
        if self.waiting.contains(&(id, unknown)) {
            return Err((step_id, id));
        }
        self.waiting.push((id, unknown));
        let before = self.from(step.span, OriginKind::Settle(step_id, id, unknown));
        let slot = self.by_law(step, settles);
        self.back(before);
        self.waiting.pop();
        slot
    }

    fn by_law(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        match (settles.law, settles.unknown) {
            (Law::SamePressure, _) => {
                let other = self.known_beside(step, settles);
                self.pressure(other)
            }
            (Law::SameTemperature, _) => {
                let other = self.known_beside(step, settles);
                let temperature = self.temperature(other)?;
                if let super::builder::Placing::Settled(share) = temperature.placing {
                    self.shares.insert(settles.state, share);
                }
                Ok(temperature.slot)
            }
            (Law::Enthalpy, _) => self.by_energy(step, settles, Energy::Enthalpy),
            (Law::InternalEnergy, _) => self.by_energy(step, settles, Energy::Internal),
            (Law::SameVolume, Unknown::Pressure) => self.pressure_by_volume(step, settles),
            (Law::SameVolume, Unknown::Temperature) => {
                let target = self.side(&opposite(step, settles), Total::VolumeOrNothing)?;
                let (parts, p) = (self.parts(settles.state)?, self.pressure(settles.state)?);
                Ok(self.settle_temperature(settles.state, Settle::Volume, parts, target, p))
            }
            (Law::Isentropic, Unknown::Temperature) => self.isentropic_temperature(step, settles),
            (Law::Isentropic, Unknown::Pressure) => self.isentropic_pressure(step, settles),
            (Law::IsothermalHeat, _) => self.pressure_by_heat(step, settles),
        }
    }

    /// A state of the step whose condition this step does not settle, on the other side if there is one.
    fn known_beside(&self, step: &Step, settles: Settles) -> StateId {
        let own = |id: &StateId| {
            step.settles.iter().any(|other| other.state == *id && other.unknown == settles.unknown)
        };
        let (near, far) = if settles.at_end { (&step.to, &step.from) } else { (&step.from, &step.to) };
        far.iter().chain(near).find(|id| !own(id)).copied().unwrap_or(settles.state)
    }

    fn settle_temperature(
        &mut self,
        id: StateId,
        by: Settle,
        parts: PartRange,
        target: Slot,
        p: Slot,
    ) -> Slot {
        let (to, share) = (self.slot(), self.slot());
        self.push(Op::SettleTemperature { by, parts, target, p, to, share });
        self.shares.insert(id, share);
        to
    }

    /// The energy that a state has to hold, from the balance of the step.
    fn by_energy(&mut self, step: &Step, settles: Settles, energy: Energy) -> Lowering<Slot> {
        let opposite = opposite(step, settles);
        let near = if settles.at_end { &step.to } else { &step.from };
        let others: Vec<StateId> = near.iter().copied().filter(|id| *id != settles.state).collect();
        let mut target = self.side(&opposite, energy.total())?;
        let heat = match &step.heat {
            Heat::Taking(value) => Some(self.expr(value)?),
            Heat::Adiabatic | Heat::Follows => None,
        };
        for energy in [heat, self.optional(step.working.as_ref())?].into_iter().flatten() {
            target = if settles.at_end { self.add(target, energy) } else { self.subtract(target, energy) };
        }
        for other in others {
            let held = self.sum(other, energy.total())?;
            target = self.subtract(target, held);
        }
        let parts = self.parts(settles.state)?;
        let p = self.pressure_for_phases(step, settles)?;
        Ok(self.settle_temperature(settles.state, energy.settle(), parts, target, p))
    }

    /// The pressure that tells which phase is stable: the state's own, or where that waits for the temperature the one
    /// at the other side; the place that is found is checked again at its own pressure.
    fn pressure_for_phases(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        let state = self.program.states.get(settles.state.0);
        let waits = state.is_some_and(|state| matches!(state.pressure, Condition::Unknown(_)))
            && step.settles.iter().any(|other| {
                other.state == settles.state
                    && other.unknown == Unknown::Pressure
                    && other.law != Law::SamePressure
            });
        if waits {
            let other = opposite(step, settles);
            return self.pressure(other.first().copied().unwrap_or(settles.state));
        }
        self.pressure(settles.state)
    }

    fn pressure_by_volume(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        let target = self.side(&opposite(step, settles), Total::VolumeOrNothing)?;
        let p = self.pressure_for_phases(step, settles)?;
        let t = self.temperature(settles.state)?;
        let nothing = self.constant(f64::NAN);
        let share = self.shares.get(&settles.state).copied().unwrap_or(nothing);
        let parts = self.parts(settles.state)?;
        let t = t.slot;
        Ok(self.emit(|to| Op::SettlePressure { parts, target, t, share, p, to }))
    }

    /// p₂ = p₁ exp(−(Q + W')/(n R T)), W' being the work beside the path's own.
    fn pressure_by_heat(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        let other = opposite(step, settles).first().copied().unwrap_or(settles.state);
        let known = self.pressure(other)?;
        let Heat::Taking(value) = &step.heat else { return Ok(known) };
        let mut energy = self.expr(value)?;
        if let Some(working) = self.optional(step.working.as_ref())? {
            energy = self.add(energy, working);
        }
        let scale = self.amount_times_rt(other)?;
        let exponent = self.divide(energy, scale);
        let exponent = if settles.at_end { self.emit(|to| Op::Negate { a: exponent, to }) } else { exponent };
        let factor = self.emit(|to| Op::Exponential { a: exponent, to });
        Ok(self.multiply(known, factor))
    }

    fn log_ratio(&mut self, p2: Slot, p1: Slot) -> Slot {
        let ratio = self.divide(p2, p1);
        self.emit(|to| Op::Logarithm { a: ratio, to })
    }

    fn isentropic_temperature(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        let other = opposite(step, settles).first().copied().unwrap_or(settles.state);
        let (here, there) = (self.pressure(settles.state)?, self.pressure(other)?);
        let from = self.temperature(other)?.slot;
        let target = self.log_ratio(here, there);
        let parts = self.parts(settles.state)?;
        let by = Settle::Isentropic { from };
        let ideal = self.settle_temperature(settles.state, by, parts, target, here);
        let Some(efficiency) = self.efficiency(step)? else { return Ok(ideal) };
        let energy = if step.flow { Energy::Enthalpy } else { Energy::Internal };
        let start = self.sum(other, energy.total())?;
        let reached = self.held_at(settles.state, ideal, here, energy)?;
        let ideal_work = self.subtract(reached, start);
        let work = self.real_work(ideal_work, efficiency, false);
        let target = self.add(start, work);
        Ok(self.settle_temperature(settles.state, energy.settle(), parts, target, here))
    }

    fn isentropic_pressure(&mut self, step: &Step, settles: Settles) -> Lowering<Slot> {
        let other = opposite(step, settles).first().copied().unwrap_or(settles.state);
        let p1 = self.pressure(other)?;
        let from = self.temperature(other)?.slot;
        let mut t = self.temperature(settles.state)?.slot;
        let parts = self.parts(settles.state)?;
        if let Some(efficiency) = self.efficiency(step)? {
            let energy = if step.flow { Energy::Enthalpy } else { Energy::Internal };
            let start = self.sum(other, energy.total())?;
            let end = self.held_at(settles.state, t, p1, energy)?;
            let work = self.subtract(end, start);
            let ideal = self.real_work(work, efficiency, true);
            let target = self.add(start, ideal);
            let (to, share) = (self.slot(), self.slot());
            self.push(Op::SettleTemperature { by: energy.settle(), parts, target, p: p1, to, share });
            t = to;
        }
        let logarithm = self.emit(|to| Op::PressureRatio { parts, from, t, to });
        let ratio = self.emit(|to| Op::Exponential { a: logarithm, to });
        Ok(self.multiply(p1, ratio))
    }

    fn efficiency(&mut self, step: &Step) -> Lowering<Option<Slot>> {
        let Some(a) = self.optional(step.efficiency.as_ref())? else { return Ok(None) };
        Ok(Some(self.emit(|to| Op::Guard { check: Check::Efficiency, a, b: a, value: a, to })))
    }

    /// Of the work of the reversible twin that of the real machine: a compression divides by the efficiency, an
    /// expansion multiplies; `back` from the real to the reversible.
    fn real_work(&mut self, work: Slot, efficiency: Slot, back: bool) -> Slot {
        let zero = self.constant(0.0);
        let up = self.emit(|to| Op::Maximum { a: work, b: zero, to });
        let down = self.emit(|to| Op::Minimum { a: work, b: zero, to });
        let (up, down) = if back {
            (self.multiply(up, efficiency), self.divide(down, efficiency))
        } else {
            (self.divide(up, efficiency), self.multiply(down, efficiency))
        };
        self.add(up, down)
    }

    /// What the gas of a state would hold at another temperature.
    fn held_at(&mut self, id: StateId, t: Slot, p: Slot, energy: Energy) -> Lowering<Slot> {
        let masses = self.masses(id)?;
        let nothing = self.constant(f64::NAN);
        let mut terms = Vec::new();
        for (part, mass) in self.constituents(id).iter().zip(masses) {
            let material = self.material(part);
            let place = self.place_slot();
            self.push(Op::Place { material, t, p, share: nothing, to: place });
            let specific = self.emit(|to| match energy {
                Energy::Enthalpy => Op::Enthalpy { material, place, p, to },
                Energy::Internal => Op::InternalEnergy { material, place, to },
            });
            terms.push(self.multiply(mass, specific));
        }
        Ok(self.total(&terms))
    }
}

/// The states at the other side of the step.
fn opposite(step: &Step, settles: Settles) -> Vec<StateId> {
    if settles.at_end { step.from.clone() } else { step.to.clone() }
}

//! A Plan cut down to what some outputs need.

use super::merge::merged;
use super::op::{Op, Plan, Slot};

/// The slots and places that an operation reads.
pub(super) fn reads(op: &Op, plan: &Plan, slot: &mut impl FnMut(Slot), place: &mut impl FnMut(u32)) {
    match *op {
        Op::Add { a, b, .. }
        | Op::Subtract { a, b, .. }
        | Op::Multiply { a, b, .. }
        | Op::Divide { a, b, .. }
        | Op::Power { a, b, .. }
        | Op::Minimum { a, b, .. }
        | Op::Maximum { a, b, .. }
        | Op::LogMean { a, b, .. } => {
            slot(a);
            slot(b);
        }
        Op::Negate { a, .. }
        | Op::PowerInteger { a, .. }
        | Op::Absolute { a, .. }
        | Op::SquareRoot { a, .. }
        | Op::Exponential { a, .. }
        | Op::Logarithm { a, .. }
        | Op::Logarithm10 { a, .. } => slot(a),
        Op::Known { value, given, .. } => [value, given].into_iter().for_each(slot),
        Op::Guard { a, b, value, .. } => [a, b, value].into_iter().for_each(slot),
        Op::Locate { t, p, side, .. } => {
            slot(t);
            slot(p);
            side.into_iter().for_each(|(_, share)| slot(share));
        }
        Op::EnthalpyAt { t, p, .. } => [t, p].into_iter().for_each(slot),
        Op::Place { t, p, share, .. } => [t, p, share].into_iter().for_each(slot),
        Op::Enthalpy { place: at, p, .. }
        | Op::Latent { place: at, p, .. }
        | Op::PressurePart { place: at, p, .. }
        | Op::Volume { place: at, p, .. } => {
            place(at.0);
            slot(p);
        }
        Op::InternalEnergy { place: at, .. }
        | Op::HeatCapacity { place: at, .. }
        | Op::PhaseShare { place: at, .. } => place(at.0),
        Op::BoilingTemperature { p: a, .. } | Op::SaturationPressure { t: a, .. } => slot(a),
        Op::GasOnly { place: at, value, .. } => {
            place(at.0);
            slot(value);
        }
        Op::SettleTemperature { by, parts, target, p, .. } => {
            [target, p].into_iter().for_each(&mut *slot);
            if let super::Settle::Isentropic { from } = by {
                slot(from);
            }
            plan.parts_of(parts).iter().for_each(|part| slot(part.mass));
        }
        Op::SettlePressure { parts, target, t, share, p, .. } => {
            [target, t, share, p].into_iter().for_each(&mut *slot);
            plan.parts_of(parts).iter().for_each(|part| slot(part.mass));
        }
        Op::PressureRatio { parts, from, t, .. } => {
            [from, t].into_iter().for_each(&mut *slot);
            plan.parts_of(parts).iter().for_each(|part| slot(part.mass));
        }
    }
}

/// What an operation writes: a slot, a second one, a place.
fn writes(op: &Op) -> (Option<Slot>, Option<Slot>, Option<u32>) {
    match *op {
        Op::Locate { to, .. } | Op::Place { to, .. } => (None, None, Some(to.0)),
        Op::SettleTemperature { to, share, .. } => (Some(to), Some(share), None),
        Op::Add { to, .. }
        | Op::Subtract { to, .. }
        | Op::Multiply { to, .. }
        | Op::Divide { to, .. }
        | Op::Negate { to, .. }
        | Op::PowerInteger { to, .. }
        | Op::Power { to, .. }
        | Op::Minimum { to, .. }
        | Op::Maximum { to, .. }
        | Op::Absolute { to, .. }
        | Op::SquareRoot { to, .. }
        | Op::Exponential { to, .. }
        | Op::Logarithm { to, .. }
        | Op::Logarithm10 { to, .. }
        | Op::LogMean { to, .. }
        | Op::Known { to, .. }
        | Op::Guard { to, .. }
        | Op::Enthalpy { to, .. }
        | Op::EnthalpyAt { to, .. }
        | Op::InternalEnergy { to, .. }
        | Op::Latent { to, .. }
        | Op::BoilingTemperature { to, .. }
        | Op::SaturationPressure { to, .. }
        | Op::PressurePart { to, .. }
        | Op::HeatCapacity { to, .. }
        | Op::Volume { to, .. }
        | Op::PhaseShare { to, .. }
        | Op::GasOnly { to, .. }
        | Op::SettlePressure { to, .. }
        | Op::PressureRatio { to, .. } => (Some(to), None, None),
    }
}

impl Plan {
    /// The operations that these outputs need, in order, as a Plan with the same slots; places that serve one operation
    /// alone are not kept.
    #[must_use]
    pub fn pruned(&self, outputs: &[Slot]) -> Plan {
        let needed = self.needed(outputs);
        let numbers: Vec<usize> = (0..self.ops.len()).filter(|at| needed[*at]).collect();
        self.part(&numbers).0
    }

    /// The operations that lead from these inputs to these outputs: what a sweep over the inputs has to repeat. A Plan
    /// with the same slots, as [`Plan::pruned`] gives it, and the numbers that its operations have in this one.
    #[must_use]
    pub fn between(&self, inputs: &[Slot], outputs: &[Slot]) -> (Plan, Vec<usize>) {
        let (needed, varies) = (self.needed(outputs), self.varying(inputs));
        let numbers: Vec<usize> = (0..self.ops.len()).filter(|at| needed[*at] && varies[*at]).collect();
        self.part(&numbers)
    }

    fn part(&self, numbers: &[usize]) -> (Plan, Vec<usize>) {
        let (ops, numbers) = merged(self, numbers);
        let plan = Plan {
            ops,
            origins: numbers.iter().map(|at| self.origins[*at]).collect(),
            slots: self.slots,
            places: self.places,
            start: self.start.clone(),
            materials: self.materials.clone(),
            parts: self.parts.clone(),
        };
        (plan, numbers)
    }

    /// Which operations these outputs need.
    pub fn needed(&self, outputs: &[Slot]) -> Vec<bool> {
        let mut slots = vec![false; self.slots as usize];
        let mut places = vec![false; self.places as usize];
        for output in outputs {
            slots[output.0 as usize] = true;
        }
        let mut kept = vec![false; self.ops.len()];
        for (at, op) in self.ops.iter().enumerate().rev() {
            let (first, second, place) = writes(op);
            let wanted = first.into_iter().chain(second).any(|slot| slots[slot.0 as usize])
                || place.is_some_and(|place| places[place as usize]);
            if wanted {
                kept[at] = true;
                reads(op, self, &mut |slot| slots[slot.0 as usize] = true, &mut |place| {
                    places[place as usize] = true
                });
            }
        }
        kept
    }

    /// Which operations these inputs have a bearing on.
    fn varying(&self, inputs: &[Slot]) -> Vec<bool> {
        let mut slots = vec![false; self.slots as usize];
        let mut places = vec![false; self.places as usize];
        for input in inputs {
            slots[input.0 as usize] = true;
        }
        let mut varies = Vec::with_capacity(self.ops.len());
        for op in &self.ops {
            let (mut touched, mut placed) = (false, false);
            reads(op, self, &mut |slot| touched |= slots[slot.0 as usize], &mut |place| {
                placed |= places[place as usize]
            });
            let varying = touched || placed;
            if varying {
                let (first, second, place) = writes(op);
                first.into_iter().chain(second).for_each(|slot| slots[slot.0 as usize] = true);
                place.into_iter().for_each(|place| places[place as usize] = true);
            }
            varies.push(varying);
        }
        varies
    }
}

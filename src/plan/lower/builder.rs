//! The builder: slots, constants, and what was lowered already.

use super::Lowered;
use crate::plan::{
    Material, Op, Origin, OriginKind, Part, PartRange, PlaceSlot, Plan, Slot, SlotMap, StateSlots, StepSlots,
};
use crate::program::{Constituent, Entry, Program, Settles, SpeciesId, StateId, StepId, Unknown};
use crate::span::Span;
use crate::thermo::{Allowance, Pin};
use crate::units::quantity;
use std::collections::BTreeMap;

/// A circle of unknowns: the step and the state.
pub(super) type Circle = (StepId, StateId);
pub(super) type Lowering<T> = Result<T, Circle>;

/// How a state's constituents are placed at its temperature.
#[derive(Debug, Clone, Copy)]
pub(super) enum Placing {
    /// By the written temperature alone.
    Plain,
    /// By the share of a phase that is said.
    Side(u32, Slot),
    /// By a temperature that was settled, with the share of the upper phase.
    Settled(Slot),
}

/// A temperature with how to place by it.
#[derive(Debug, Clone, Copy)]
pub(super) struct Temperature {
    pub(super) slot: Slot,
    pub(super) placing: Placing,
}

pub(super) struct Builder<'p> {
    pub(super) program: &'p Program,
    pub(super) plan: Plan,
    pub(super) map: SlotMap,
    origin: u32,
    pub(super) constants: BTreeMap<u64, Slot>,
    materials: BTreeMap<SpeciesId, Vec<(Pin, u32)>>,
    pub(super) temperatures: BTreeMap<StateId, Temperature>,
    pub(super) pressures: BTreeMap<StateId, Slot>,
    pub(super) masses: BTreeMap<StateId, Vec<Slot>>,
    pub(super) places: BTreeMap<StateId, Vec<PlaceSlot>>,
    pub(super) sums: BTreeMap<(StateId, u8), Slot>,
    /// Of settled temperatures the share of the upper phase.
    pub(super) shares: BTreeMap<StateId, Slot>,
    pub(super) steps: BTreeMap<StepId, StepSlots>,
    /// Of each unknown the first step that settles it.
    pub(super) settling: BTreeMap<(StateId, Unknown), (StepId, Settles)>,
    /// The unknowns being settled, to see a circle.
    pub(super) waiting: Vec<(StateId, Unknown)>,
    /// Slots of quantities, filled in order.
    pub(super) quantities: BTreeMap<usize, Slot>,
    pub(super) duties: BTreeMap<usize, crate::plan::DutySlots>,
}

impl<'p> Builder<'p> {
    pub(super) fn new(program: &'p Program) -> Self {
        Builder {
            program,
            plan: Plan::default(),
            map: SlotMap::default(),
            origin: 0,
            constants: BTreeMap::new(),
            materials: BTreeMap::new(),
            temperatures: BTreeMap::new(),
            pressures: BTreeMap::new(),
            masses: BTreeMap::new(),
            places: BTreeMap::new(),
            sums: BTreeMap::new(),
            shares: BTreeMap::new(),
            steps: BTreeMap::new(),
            settling: settling(program),
            waiting: Vec::new(),
            quantities: BTreeMap::new(),
            duties: BTreeMap::new(),
        }
    }

    pub(super) fn lower(mut self) -> Result<Lowered, Circle> {
        let atmosphere = self.input(self.program.site.atmosphere);
        self.map.atmosphere = Some(atmosphere);
        for entry in &self.program.order {
            match *entry {
                Entry::Quantity(id) => {
                    self.quantity(id)?;
                }
                Entry::State(id) => {
                    self.state(id)?;
                }
                Entry::Step(id) => {
                    self.step(id)?;
                }
                Entry::Duty(id) => {
                    self.duty(id)?;
                }
                Entry::Requirement(at) => self.requirement(at)?,
                Entry::Table(at) => self.table(at)?,
                Entry::Remark(_) | Entry::Species(_) | Entry::Mixture(_) | Entry::Site => {}
            }
        }
        for id in 0..self.program.states.len() {
            let slots = self.state_slots(StateId(id))?;
            self.map.states.push(slots);
        }
        self.map.steps = std::mem::take(&mut self.steps).into_values().collect();
        self.map.quantities = std::mem::take(&mut self.quantities).into_values().collect();
        self.map.duties = std::mem::take(&mut self.duties).into_values().collect();
        Ok(Lowered { plan: self.plan, map: self.map })
    }

    fn state(&mut self, id: StateId) -> Lowering<StateSlots> {
        self.state_slots(id)
    }

    /// From here on operations come from this place.
    pub(super) fn from(&mut self, span: Span, kind: OriginKind) -> u32 {
        let before = self.origin;
        self.map.origins.push(Origin { span, kind });
        self.origin = u32::try_from(self.map.origins.len() - 1).unwrap_or(u32::MAX);
        before
    }

    /// Back to the origin before.
    pub(super) fn back(&mut self, origin: u32) {
        self.origin = origin;
    }

    pub(super) fn slot(&mut self) -> Slot {
        self.plan.slots += 1;
        Slot(self.plan.slots - 1)
    }

    pub(super) fn place_slot(&mut self) -> PlaceSlot {
        self.plan.places += 1;
        PlaceSlot(self.plan.places - 1)
    }

    /// A slot of its own with a value at the start: an input.
    pub(super) fn input(&mut self, value: f64) -> Slot {
        let slot = self.slot();
        self.plan.start.push((slot, value));
        slot
    }

    /// A slot with a constant; equal constants share one.
    pub(super) fn constant(&mut self, value: f64) -> Slot {
        if let Some(slot) = self.constants.get(&value.to_bits()) {
            return *slot;
        }
        let slot = self.input(value);
        self.constants.insert(value.to_bits(), slot);
        slot
    }

    pub(super) fn push(&mut self, op: Op) {
        self.plan.ops.push(op);
        self.plan.origins.push(self.origin);
    }

    pub(super) fn emit(&mut self, op: impl FnOnce(Slot) -> Op) -> Slot {
        let to = self.slot();
        self.push(op(to));
        to
    }

    pub(super) fn add(&mut self, a: Slot, b: Slot) -> Slot {
        self.emit(|to| Op::Add { a, b, to })
    }

    pub(super) fn subtract(&mut self, a: Slot, b: Slot) -> Slot {
        self.emit(|to| Op::Subtract { a, b, to })
    }

    pub(super) fn multiply(&mut self, a: Slot, b: Slot) -> Slot {
        self.emit(|to| Op::Multiply { a, b, to })
    }

    pub(super) fn divide(&mut self, a: Slot, b: Slot) -> Slot {
        self.emit(|to| Op::Divide { a, b, to })
    }

    /// The sum of slots; zero of none.
    pub(super) fn total(&mut self, slots: &[Slot]) -> Slot {
        match slots {
            [] => self.constant(0.0),
            [first, rest @ ..] => rest.iter().fold(*first, |sum, slot| self.add(sum, *slot)),
        }
    }

    /// The Plan's material of a constituent.
    pub(super) fn material(&mut self, constituent: &Constituent) -> u32 {
        let known = self.materials.entry(constituent.species).or_default();
        if let Some((_, at)) = known.iter().find(|(pin, _)| *pin == constituent.pin) {
            return *at;
        }
        let at = u32::try_from(self.plan.materials.len()).unwrap_or(u32::MAX);
        known.push((constituent.pin, at));
        if let Some(species) = self.program.species.get(constituent.species.0) {
            let allowance = species.allowances.iter().fold(Allowance::default(), |allowance, entry| {
                let span = species.curve.phase_span(entry.phase);
                let (lo, hi) = span.map_or((0.0, 0.0), |(lo, hi)| (lo.value, hi.value));
                let (from, to) = (entry.from.unwrap_or(lo), entry.to.unwrap_or(hi));
                allowance.allow(entry.phase, quantity(from), quantity(to))
            });
            let curve = std::sync::Arc::clone(&species.curve);
            self.plan.materials.push(Material { curve, pin: constituent.pin, allowance });
        }
        at
    }

    /// The constituents of a state as parts with their masses.
    pub(super) fn parts(&mut self, id: StateId) -> Lowering<PartRange> {
        let masses = self.masses(id)?;
        let constituents = self.constituents(id);
        let start = u32::try_from(self.plan.parts.len()).unwrap_or(u32::MAX);
        for (constituent, mass) in constituents.iter().zip(masses) {
            let material = self.material(constituent);
            self.plan.parts.push(Part { material, mass });
        }
        let end = u32::try_from(self.plan.parts.len()).unwrap_or(u32::MAX);
        Ok(PartRange { start, end })
    }

    pub(super) fn constituents(&self, id: StateId) -> Vec<Constituent> {
        self.program.states.get(id.0).map(|state| state.constituents.clone()).unwrap_or_default()
    }
}

/// Of each unknown the first step that settles it, and how.
fn settling(program: &Program) -> BTreeMap<(StateId, Unknown), (StepId, Settles)> {
    let mut found = BTreeMap::new();
    for (at, step) in program.steps.iter().enumerate() {
        for settles in &step.settles {
            found.entry((settles.state, settles.unknown)).or_insert((StepId(at), *settles));
        }
    }
    found
}

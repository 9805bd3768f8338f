//! The values of a run.

use crate::plan::{Check, PlaceSlot, Plan, Slot};
use crate::thermo::{LocateError, Place, SettleError};

/// What went wrong in an operation, with the values.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum Fault {
    DivisionByZero {
        numerator: f64,
    },
    /// A result beyond the range of a double.
    Overflow,
    /// A logarithm of this, which is not above zero.
    Logarithm {
        of: f64,
    },
    /// A root of this, which is negative; or a power that no real number answers.
    Root {
        of: f64,
    },
    /// A temperature without a place.
    Locate {
        error: LocateError,
        kelvin: f64,
        pascal: f64,
    },
    /// No temperature answers.
    Settle(SettleError),
    /// No pressure answers: the volume left for this amount of gas, m³.
    SettlePressure {
        volume: f64,
        amount: f64,
    },
    /// A liquid that boils, or a vapour that condenses, in a closed volume.
    BoilsClosed,
    /// A guard that does not hold.
    Check {
        check: Check,
        a: f64,
        b: f64,
    },
    /// A volume where a condensed phase has no density.
    NoVolume,
    /// A heat capacity on a plateau.
    NoHeatCapacity,
    /// Something that is no gas on a path for gases.
    NoGas,
}

/// A fault with the operation and the lane in which it came up.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Failure {
    /// The index of the operation in the Plan that was run.
    pub op: usize,
    /// The lane.
    pub lane: usize,
    /// What went wrong.
    pub fault: Fault,
}

/// The values of `N` points.
#[derive(Debug, Clone)]
pub struct Frame<const N: usize> {
    pub(super) slots: Vec<[f64; N]>,
    pub(super) places: Vec<[Option<Place>; N]>,
    /// What failed.
    pub failures: Vec<Failure>,
}

impl<const N: usize> Frame<N> {
    /// A frame for a Plan, its constants and inputs filled in.
    pub fn new(plan: &Plan) -> Self {
        let mut frame = Frame {
            slots: vec![[f64::NAN; N]; plan.slots as usize],
            places: vec![[None; N]; plan.places as usize],
            failures: Vec::new(),
        };
        for (slot, value) in &plan.start {
            frame.slots[slot.0 as usize] = [*value; N];
        }
        frame
    }

    /// The values of a slot.
    pub fn get(&self, slot: Slot) -> [f64; N] {
        self.slots.get(slot.0 as usize).copied().unwrap_or([f64::NAN; N])
    }

    /// Sets an input.
    pub fn set(&mut self, slot: Slot, values: [f64; N]) {
        if let Some(known) = self.slots.get_mut(slot.0 as usize) {
            *known = values;
        }
    }

    /// The places of a slot.
    pub fn place(&self, slot: PlaceSlot) -> [Option<Place>; N] {
        self.places.get(slot.0 as usize).copied().unwrap_or([None; N])
    }

    /// Two slots to read and the one to write, which a Plan numbers after what it is made from.
    #[inline]
    pub(super) fn two_to(&mut self, a: Slot, b: Slot, to: Slot) -> (&[f64; N], &[f64; N], &mut [f64; N]) {
        let (known, open) = self.slots.split_at_mut(to.0 as usize);
        (&known[a.0 as usize], &known[b.0 as usize], &mut open[0])
    }

    /// A frame whose lanes all hold what lane 0 of another holds.
    pub fn spread<const M: usize>(other: &Frame<M>) -> Self {
        Frame {
            slots: other.slots.iter().map(|values| [values[0]; N]).collect(),
            places: other.places.iter().map(|places| [places[0]; N]).collect(),
            failures: Vec::new(),
        }
    }
}

impl Frame<1> {
    /// The value of a slot at the one point.
    pub fn value(&self, slot: Slot) -> f64 {
        self.get(slot)[0]
    }

    /// The place of a slot at the one point.
    pub fn placed(&self, slot: PlaceSlot) -> Option<Place> {
        self.place(slot)[0]
    }
}

//! The operations.

use crate::thermo::{Allowance, HeatingCurve, PhaseClass, Pin};
use std::sync::Arc;

/// The number of a slot that holds an f64 in SI.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Slot(pub u32);

/// The number of a slot that holds a place on a heating curve.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct PlaceSlot(pub u32);

/// A species in a phase, with what may be stretched.
#[derive(Debug, Clone, PartialEq)]
pub struct Material {
    /// Its heating curve.
    pub curve: Arc<HeatingCurve>,
    /// Its phase.
    pub pin: Pin,
    /// What is allowed beyond its data.
    pub allowance: Allowance,
}

/// A material and the slot of its mass.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Part {
    /// The index of the material in the Plan.
    pub material: u32,
    /// Its mass.
    pub mass: Slot,
}

/// A run of parts in the Plan.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct PartRange {
    /// The first.
    pub start: u32,
    /// After the last.
    pub end: u32,
}

/// What a guard asks of its values `a` and `b`.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Check {
    /// `a` is an amount above zero.
    PositiveAmount,
    /// `a` is a share above 0 and at most 1.
    Share,
    /// `a` is an efficiency above 0 and at most 1.
    Efficiency,
    /// `a` is a pressure above zero.
    PositivePressure,
    /// `a` and `b` are one pressure, within 1e-6.
    SamePressure,
    /// `b`, the pressure at the end, is no higher than `a`.
    NoRise,
    /// `a` and `b`, pressures of the states that a state is made from, are one.
    AgreedPressure,
    /// `a` and `b` are one temperature, within 1e-6 K.
    SameTemperature,
    /// `a` and `b` are one volume, within 1e-6.
    SameVolume,
    /// `a` and `b` are one mass, or one amount of an element, within 1e-5 of it.
    Conserved,
    /// `a` is a duty that heats, since it has an efficiency.
    Heating,
    /// `a` is a time above zero.
    PositiveTime,
}

/// By what an unknown temperature or pressure is found.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Settle {
    /// The temperature at which the parts hold this enthalpy.
    Enthalpy,
    /// The temperature at which the parts hold this internal energy.
    InternalEnergy,
    /// The temperature to which the parts come from `from` by a reversible change with this ln(p₂/p₁).
    Isentropic {
        /// The temperature at the start.
        from: Slot,
    },
    /// The temperature at which the parts fill this volume.
    Volume,
}

/// An operation: what it reads, and the slot it writes.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum Op {
    Add {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Subtract {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Multiply {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Divide {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Negate {
        a: Slot,
        to: Slot,
    },
    PowerInteger {
        a: Slot,
        exponent: i32,
        to: Slot,
    },
    Power {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Minimum {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Maximum {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    Absolute {
        a: Slot,
        to: Slot,
    },
    SquareRoot {
        a: Slot,
        to: Slot,
    },
    Exponential {
        a: Slot,
        to: Slot,
    },
    Logarithm {
        a: Slot,
        to: Slot,
    },
    Logarithm10 {
        a: Slot,
        to: Slot,
    },
    LogMean {
        a: Slot,
        b: Slot,
        to: Slot,
    },
    /// `value` goes on where `given` is known: it is the same, without its rounding.
    Known {
        value: Slot,
        given: Slot,
        to: Slot,
    },
    /// `value` goes on where the check holds.
    Guard {
        check: Check,
        a: Slot,
        b: Slot,
        value: Slot,
        to: Slot,
    },
    /// The place at a written temperature; `side` is the phase whose share is said.
    Locate {
        material: u32,
        t: Slot,
        p: Slot,
        side: Option<(u32, Slot)>,
        to: PlaceSlot,
    },
    /// The place at a temperature that was worked out, with the share of the upper phase (NaN for none).
    Place {
        material: u32,
        t: Slot,
        p: Slot,
        share: Slot,
        to: PlaceSlot,
    },
    /// Enthalpy per mass, with the pressure's part.
    Enthalpy {
        material: u32,
        place: PlaceSlot,
        p: Slot,
        to: Slot,
    },
    /// Enthalpy per mass at a written temperature, with the pressure's part; the place is not kept.
    EnthalpyAt {
        material: u32,
        t: Slot,
        p: Slot,
        to: Slot,
    },
    /// Internal energy per mass.
    InternalEnergy {
        material: u32,
        place: PlaceSlot,
        to: Slot,
    },
    /// Latent heat passed, per mass, boiling where it is at the pressure `p`.
    Latent {
        material: u32,
        place: PlaceSlot,
        p: Slot,
        to: Slot,
    },
    /// The temperature at which a liquid boils at a pressure.
    BoilingTemperature {
        material: u32,
        p: Slot,
        to: Slot,
    },
    /// The pressure at which a liquid boils at a temperature.
    SaturationPressure {
        material: u32,
        t: Slot,
        to: Slot,
    },
    /// What the pressure adds to the enthalpy, per mass.
    PressurePart {
        material: u32,
        place: PlaceSlot,
        p: Slot,
        to: Slot,
    },
    /// Heat capacity per mass.
    HeatCapacity {
        material: u32,
        place: PlaceSlot,
        to: Slot,
    },
    /// Volume per mass; where `neglect`, zero for a condensed phase without density.
    Volume {
        material: u32,
        place: PlaceSlot,
        p: Slot,
        neglect: bool,
        to: Slot,
    },
    /// The mass share of the phases of a class, or of one phase.
    PhaseShare {
        material: u32,
        place: PlaceSlot,
        phases: PhaseSet,
        to: Slot,
    },
    /// `value` goes on where the place is a gas.
    GasOnly {
        material: u32,
        place: PlaceSlot,
        value: Slot,
        to: Slot,
    },
    /// A temperature, and the share of the upper phase where it lies on a plateau (else NaN).
    SettleTemperature {
        by: Settle,
        parts: PartRange,
        target: Slot,
        p: Slot,
        to: Slot,
        share: Slot,
    },
    /// The pressure at which the parts fill the volume `target` at `t`; `p` is the pressure that tells the phases.
    SettlePressure {
        parts: PartRange,
        target: Slot,
        t: Slot,
        share: Slot,
        p: Slot,
        to: Slot,
    },
    /// ln(p₂/p₁) of a reversible adiabatic change of the parts from `from` to `t`.
    PressureRatio {
        parts: PartRange,
        from: Slot,
        t: Slot,
        to: Slot,
    },
}

/// Which phases a share is asked of.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum PhaseSet {
    /// One phase.
    One(u32),
    /// All phases of a class.
    Class(PhaseClass),
}

/// Straight-line operations with what they start from.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Plan {
    /// The operations in order.
    pub ops: Vec<Op>,
    /// Of each operation the index of its origin.
    pub origins: Vec<u32>,
    /// How many slots there are.
    pub slots: u32,
    /// How many places there are.
    pub places: u32,
    /// Slots with their values at the start: constants and inputs.
    pub start: Vec<(Slot, f64)>,
    /// The materials.
    pub materials: Vec<Material>,
    /// The parts of the settling operations.
    pub parts: Vec<Part>,
}

impl Plan {
    /// The parts of a range.
    pub fn parts_of(&self, range: PartRange) -> &[Part] {
        self.parts.get(range.start as usize..range.end as usize).unwrap_or_default()
    }
}

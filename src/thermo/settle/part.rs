//! What a temperature is sought for, and how the search may end.

use uom::si::f64::{Energy, Mass, ThermodynamicTemperature};

use crate::thermo::curve::{Allowance, HeatingCurve, Pin};

/// So much of one species in one phase, or in whichever is stable.
#[derive(Debug, Clone, Copy)]
pub struct Part<'a> {
    /// The species.
    pub curve: &'a HeatingCurve,
    /// Which phase it is in.
    pub pin: Pin,
    /// By how much its data may be stretched.
    pub allowance: &'a Allowance,
    /// How much of it; for a flow, the mass that passes in one second.
    pub mass: Mass,
}

/// A temperature, and how far a transition has gone there.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Settled {
    /// The temperature.
    pub temperature: ThermodynamicTemperature,
    /// Exactly on a point transition the mass share of the upper phase, the same in every part that changes
    /// there.
    pub upper_share: Option<f64>,
}

/// Why no temperature answers; parts by their place.
#[derive(Debug, Clone, Copy, PartialEq)]
#[allow(missing_docs)]
pub enum SettleError {
    /// There is no part, or none with a mass.
    NothingThere,
    /// A mass that is negative or no number.
    Mass { part: usize },
    /// A species without the phase that is wanted.
    NoSuchPhase { part: usize },
    /// A part that is not a gas, or a gas without molar mass, where an ideal gas is wanted.
    NotAGas { part: usize },
    /// A start at which a part has no data.
    StartOutsideRange { part: usize, lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// The data of the parts share no temperature: the highest of their lower ends lies above the lowest
    /// upper end.
    NoCommonRange { lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// The target lies outside what the parts hold between the ends of their data.
    Unreachable(Unreachable),
    /// A pressure ratio that leads outside the data.
    RatioUnreachable { lo: ThermodynamicTemperature, hi: ThermodynamicTemperature },
    /// A value that is no number.
    NotFinite,
}

/// What the parts can hold.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Unreachable {
    /// The least they hold, at the lower end.
    pub least: Energy,
    /// The most they hold, at the upper end.
    pub most: Energy,
    /// The lowest temperature at which all have data.
    pub lo: ThermodynamicTemperature,
    /// The highest temperature at which all have data.
    pub hi: ThermodynamicTemperature,
    /// Whether an end is a boiling point that does not hold at the pressure.
    pub boiling: bool,
}

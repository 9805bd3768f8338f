//! The physics of heat, on typed quantities.
//!
//! In come heat capacity laws, transitions and temperatures as `uom` quantities; out come enthalpies, latent
//! heats, volumes and temperatures, likewise typed. Everything is per mass. Nothing here knows a sheet, a
//! span or a unit's name: an error carries indices and quantities, and the caller adds the place. Nothing
//! stretches a datum in silence: outside its range there is an error, or a flag that says so.

pub mod composition;
pub mod constants;
pub mod curve;
pub mod element;
pub mod heat_capacity;
pub mod ideal_gas;
pub mod path_work;
pub mod settle;
mod si;
pub mod vapour_pressure;

pub use composition::{Composition, CompositionError, Fault};
pub use curve::{
    Allowance, CurveData, CurveError, Density, HeatingCurve, LawRange, Leg, LegKind, Link, LocateError,
    Locator, MeltingFault, PhaseClass, PhaseData, PhaseShares, Pin, Place, SaturationFault, Side,
};
pub use element::Element;
pub use heat_capacity::{Basis, HeatCapacity, HeatCapacityError, MaierKelley};
pub use settle::{
    Part, SettleError, Settled, Unreachable, temperature_for_enthalpy, temperature_for_internal_energy,
    temperature_isentropic,
};
pub use vapour_pressure::{VapourPressure, VapourPressureError, VapourPressureForm};

//! The units, as data by family.
//!
//! Each entry names its symbol, its other spellings, its English name, its dimension, its factor as the definition
//! gives it, the standard of that definition and the prefixes that it takes. Words are found through [`find`]. A
//! test holds that no word can be read in two ways.

mod accepted;
mod customary;
mod energy;
mod entry;
mod gas_volume;
mod pressure;
mod si;
mod temperature;
mod words;

pub(crate) use entry::Entry;
pub(crate) use words::{Known, find};

/// The families, in the order of the list of units.
pub(crate) const FAMILIES: [&[Entry]; 7] = [
    si::UNITS,
    accepted::UNITS,
    temperature::UNITS,
    pressure::UNITS,
    energy::UNITS,
    gas_volume::UNITS,
    customary::UNITS,
];

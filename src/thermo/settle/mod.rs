//! From a heat content back to a temperature: several parts at one temperature, whose enthalpies, internal
//! energies or entropies add up to a given value.
//!
//! In come parts - a heating curve, a phase, a mass - and a target; out comes the temperature, and on a
//! plateau how far the transition has gone, or a refusal that says what can be reached. The total rises with
//! temperature. Every edge of every part - a transition, the end of a law's range - is tried first, so that a
//! plateau is met exactly and its share follows by proportion; between two edges the total is smooth, and a
//! closed form or Newton's method inside a bracket takes it to the last digits. The order of evaluations is
//! fixed.

mod part;
mod sum;
mod temperature;

#[cfg(test)]
mod tests;

pub use part::{Part, SettleError, Settled, Unreachable};
pub use temperature::{temperature_for_enthalpy, temperature_for_internal_energy, temperature_isentropic};

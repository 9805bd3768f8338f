//! The searches, each by one state function.

use uom::si::f64::{Energy, Pressure, ThermodynamicTemperature};

use super::part::{Part, SettleError, Settled};
use super::sum::Sum;
use crate::thermo::constants::{GAS_CONSTANT, STANDARD_ATMOSPHERE};
use crate::thermo::curve::Measure;
use crate::thermo::si::typed;

/// The temperature at which the parts' enthalpies add up to `target`, at `pressure`. For a flow the masses
/// are those of one second and the target is its power times one second.
///
/// # Errors
/// [`SettleError`].
#[inline]
pub fn temperature_for_enthalpy(
    parts: &[Part<'_>],
    target: Energy,
    pressure: Pressure,
) -> Result<Settled, SettleError> {
    let excess = pressure.value - STANDARD_ATMOSPHERE;
    if let [part] = parts
        && let Some(settled) = settle_alone(part, target.value, pressure.value)
    {
        return Ok(settled);
    }
    let sum = Sum::new(parts, Measure::Enthalpy { excess }, pressure.value);
    sum.settle(target.value)
}

/// The temperature at which the parts' internal energies add up to `target`. The pressure decides only on
/// which side of its boiling point a species may be.
///
/// # Errors
/// [`SettleError`].
pub fn temperature_for_internal_energy(
    parts: &[Part<'_>],
    target: Energy,
    pressure: Pressure,
) -> Result<Settled, SettleError> {
    let sum = Sum::new(parts, Measure::InternalEnergy, pressure.value);
    for (part, track) in sum.tracks() {
        let track = track.ok_or(SettleError::NoSuchPhase { part })?;
        let with_mass = parts.get(part).is_some_and(|part| part.curve.molar_mass().is_some());
        if !with_mass && parts.get(part).is_some_and(|part| part.curve.holds_gas(track)) {
            return Err(SettleError::NotAGas { part });
        }
    }
    sum.settle(target.value)
}

/// The temperature to which ideal gases at `from` come when their pressure changes reversibly without heat by
/// the factor `exp(log_pressure_ratio)`: their entropies change by `m R/M ln(p2/p1)` altogether.
///
/// # Errors
/// [`SettleError`]; every part has to be pinned to a gas and to have a molar mass.
pub fn temperature_isentropic(
    parts: &[Part<'_>],
    from: ThermodynamicTemperature,
    log_pressure_ratio: f64,
) -> Result<Settled, SettleError> {
    let sum = Sum::new(parts, Measure::Entropy, STANDARD_ATMOSPHERE);
    let mut gain = 0.0;
    for ((index, track), part) in sum.tracks().zip(parts) {
        let track = track.ok_or(SettleError::NoSuchPhase { part: index })?;
        match part.curve.molar_mass() {
            Some(molar_mass) if part.curve.all_gas(track) => gain += part.mass.value / molar_mass.value,
            _ => return Err(SettleError::NotAGas { part: index }),
        }
        let limits = part.curve.limits(track, part.allowance, STANDARD_ATMOSPHERE);
        if !(from.value >= limits.lo && from.value <= limits.hi) {
            let (lo, hi) = (typed(limits.lo), typed(limits.hi));
            return Err(SettleError::StartOutsideRange { part: index, lo, hi });
        }
    }
    let target = sum.total(from.value, false) + GAS_CONSTANT * gain * log_pressure_ratio;
    sum.settle(target).map_err(|error| match error {
        SettleError::Unreachable(reach) => SettleError::RatioUnreachable { lo: reach.lo, hi: reach.hi },
        other => other,
    })
}

/// One part whose enthalpy pressure does not touch, inside its own data: the piece is read off, no sum is
/// needed.
#[inline]
fn settle_alone(part: &Part<'_>, target: f64, pressure: f64) -> Option<Settled> {
    let curve = part.curve;
    let moved = curve.sought_track(part.pin, pressure, part.allowance);
    let track = moved.as_ref().or(curve.track(part.pin))?;
    if part.mass.value.is_nan()
        || part.mass.value <= 0.0
        || !curve.pressure_free(pressure - STANDARD_ATMOSPHERE)
    {
        return None;
    }
    let h = target / part.mass.value;
    let piece = track.pieces.iter().find(|piece| h <= piece.h_hi).filter(|piece| h >= piece.h_lo)?;
    let limits = curve.limits(track, part.allowance, pressure);
    let cut = limits.gas_only || limits.condensed_only;
    if cut || piece.lo < limits.lo || piece.hi > limits.hi {
        return None;
    }
    if piece.plateau {
        let share = (h - piece.h_lo) / (piece.h_hi - piece.h_lo);
        return Some(Settled { temperature: typed(piece.lo), upper_share: Some(share) });
    }
    let t = curve.temperature_on(piece, h);
    let side = if t == piece.lo { 1.0 } else { 0.0 };
    let upper_share = track.changes_at(t).then_some(side);
    t.is_finite().then_some(Settled { temperature: typed(t), upper_share })
}

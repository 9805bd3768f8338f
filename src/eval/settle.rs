//! Unknown temperatures and pressures.

use super::frame::{Fault, Frame};
use crate::numeric::find_root;
use crate::plan::{PartRange, Plan, Settle, Slot};
use crate::thermo::constants::GAS_CONSTANT;
use crate::thermo::{
    Part, PhaseClass, Pin, SettleError, Settled, temperature_for_enthalpy, temperature_for_internal_energy,
    temperature_isentropic,
};
use crate::units::quantity;

/// The parts of an operation at one lane; `None` where a mass is not known.
fn with_parts<const N: usize, T>(
    plan: &Plan,
    frame: &Frame<N>,
    range: PartRange,
    lane: usize,
    work: impl FnOnce(&[Part<'_>]) -> T,
) -> Option<T> {
    let read = |part: &crate::plan::Part| {
        let material = &plan.materials[part.material as usize];
        let mass = frame.slots[part.mass.0 as usize][lane];
        (!mass.is_nan()).then(|| Part {
            curve: &material.curve,
            pin: material.pin,
            allowance: &material.allowance,
            mass: quantity(mass),
        })
    };
    match plan.parts_of(range) {
        [only] => Some(work(&[read(only)?])),
        several => {
            let parts = several.iter().map(read).collect::<Option<Vec<_>>>()?;
            Some(work(&parts))
        }
    }
}

pub(super) fn temperature<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    by: Settle,
    range: PartRange,
    [target, p]: [Slot; 2],
    [to, share]: [Slot; 2],
) {
    let (target, p) = (frame.get(target), frame.get(p));
    let from = match by {
        Settle::Isentropic { from } => frame.get(from),
        _ => [0.0; N],
    };
    for lane in 0..N {
        let (wanted, pascal) = (target[lane], p[lane]);
        let silent = wanted.is_nan() || pascal.is_nan() || from[lane].is_nan();
        let found = if silent {
            None
        } else {
            with_parts(plan, frame, range, lane, |parts| match by {
                Settle::Enthalpy => temperature_for_enthalpy(parts, quantity(wanted), quantity(pascal)),
                Settle::InternalEnergy => {
                    temperature_for_internal_energy(parts, quantity(wanted), quantity(pascal))
                }
                Settle::Isentropic { .. } => temperature_isentropic(parts, quantity(from[lane]), wanted),
                Settle::Volume => temperature_for_volume(parts, wanted, pascal),
            })
        };
        let (kelvin, upper) = match found {
            None => (f64::NAN, None),
            Some(Ok(settled)) => (settled.temperature.value, settled.upper_share),
            Some(Err(error)) => {
                frame.fail(at, lane, Fault::Settle(error));
                (f64::NAN, None)
            }
        };
        frame.slots[to.0 as usize][lane] = kelvin;
        frame.slots[share.0 as usize][lane] = upper.unwrap_or(f64::NAN);
    }
}

/// The volume of the parts at a temperature and a pressure, m³, and how much of it is gas, mol.
fn volume_and_gas(parts: &[Part<'_>], kelvin: f64, pascal: f64, share: Option<f64>) -> Option<(f64, f64)> {
    let mut condensed = 0.0;
    let mut gas = 0.0;
    for part in parts {
        let place =
            part.curve.place(quantity(kelvin), quantity(pascal), part.pin, share, part.allowance).ok()?;
        let gas_share = part.curve.class_share(place, PhaseClass::Gas);
        if gas_share > 0.0 {
            gas += part.mass.value * gas_share / part.curve.molar_mass()?.value;
        }
        if gas_share < 1.0 {
            let total =
                part.curve.specific_volume(place, quantity(pascal)).map_or(0.0, |volume| volume.value);
            let of_gas = if gas_share > 0.0 {
                gas_share * GAS_CONSTANT * kelvin / (part.curve.molar_mass()?.value * pascal)
            } else {
                0.0
            };
            condensed += part.mass.value * (total - of_gas).max(0.0);
        }
    }
    Some((condensed, gas))
}

/// Whether a part that may boil is all liquid or all gas at a temperature, and the same at both pressures.
fn stays_as_it_is(part: &Part<'_>, kelvin: f64, (start, end): (f64, f64), share: Option<f64>) -> bool {
    let gas_share = |pascal: f64| {
        let place = part.curve.place(quantity(kelvin), quantity(pascal), part.pin, share, part.allowance);
        let present = part.curve.phases_at(place.ok()?);
        let gas = |(phase, share): (usize, f64)| {
            if part.curve.phase_class(phase) == Some(PhaseClass::Gas) { share } else { 0.0 }
        };
        Some(gas(present.lower) + present.upper.map_or(0.0, gas))
    };
    if part.pin != Pin::Stable {
        return true;
    }
    let before = gas_share(start);
    (before == Some(0.0) || before == Some(1.0)) && gas_share(end) == before
}

/// Between which temperatures a part has data, K.
fn data_span(part: &Part<'_>) -> Option<(f64, f64)> {
    let wanted = |phase: usize| match part.pin {
        Pin::Phase(one) => phase == one,
        Pin::Class(class) => part.curve.phase_class(phase) == Some(class),
        Pin::Stable => true,
    };
    let spans = (0..part.curve.phase_count())
        .filter(|phase| wanted(*phase))
        .filter_map(|phase| part.curve.phase_span(phase));
    spans.map(|(lo, hi)| (lo.value, hi.value)).reduce(|(lo, hi), (from, to)| (lo.min(from), hi.max(to)))
}

/// The temperature at which the parts fill a volume at a pressure.
fn temperature_for_volume(parts: &[Part<'_>], volume: f64, pascal: f64) -> Result<Settled, SettleError> {
    let ends = parts.iter().filter_map(data_span);
    let (lo, hi) =
        ends.fold((0.0, f64::INFINITY), |(lo, hi): (f64, f64), (from, to)| (lo.max(from), hi.min(to)));
    let miss = |kelvin: f64| {
        volume_and_gas(parts, kelvin, pascal, None)
            .map_or(f64::NAN, |(condensed, gas)| condensed + gas * GAS_CONSTANT * kelvin / pascal - volume)
    };
    if parts.is_empty() || lo >= hi {
        return Err(SettleError::NothingThere);
    }
    match find_root(miss, lo, hi, 0.0) {
        Ok(root) => Ok(Settled { temperature: quantity(root.x), upper_share: None }),
        Err(_) => Err(SettleError::NoCommonRange { lo: quantity(lo), hi: quantity(hi) }),
    }
}

pub(super) fn pressure<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    range: PartRange,
    [target, t, share, p]: [Slot; 4],
    to: Slot,
) {
    let (target, t, share, p) = (frame.get(target), frame.get(t), frame.get(share), frame.get(p));
    for lane in 0..N {
        let silent = target[lane].is_nan() || t[lane].is_nan() || p[lane].is_nan();
        let upper = (!share[lane].is_nan()).then_some(share[lane]);
        let found = if silent {
            None
        } else {
            with_parts(plan, frame, range, lane, |parts| volume_and_gas(parts, t[lane], p[lane], upper))
                .flatten()
        };
        let pascal = found.map(|(condensed, gas)| (gas, target[lane] - condensed));
        let same_phases = |end: f64| {
            let same = |parts: &[Part<'_>]| {
                parts.iter().all(|part| stays_as_it_is(part, t[lane], (p[lane], end), upper))
            };
            with_parts(plan, frame, range, lane, same) == Some(true)
        };
        frame.slots[to.0 as usize][lane] = match pascal {
            None => f64::NAN,
            Some((gas, volume)) if gas > 0.0 && volume > 0.0 => {
                let end = gas * GAS_CONSTANT * t[lane] / volume;
                if same_phases(end) {
                    end
                } else {
                    frame.fail(at, lane, Fault::BoilsClosed);
                    f64::NAN
                }
            }
            Some((amount, volume)) => {
                frame.fail(at, lane, Fault::SettlePressure { volume, amount });
                f64::NAN
            }
        };
    }
}

/// ln(p₂/p₁) = Σ m ∫ cp/T dT / (n R).
pub(super) fn pressure_ratio<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    range: PartRange,
    [from, t]: [Slot; 2],
    to: Slot,
) {
    let (from, t) = (frame.get(from), frame.get(t));
    for lane in 0..N {
        let silent = from[lane].is_nan() || t[lane].is_nan();
        let found = if silent {
            None
        } else {
            with_parts(plan, frame, range, lane, |parts| log_ratio(parts, from[lane], t[lane]))
        };
        frame.slots[to.0 as usize][lane] = match found {
            None => f64::NAN,
            Some(Some(ratio)) => ratio,
            Some(None) => {
                frame.fail(at, lane, Fault::NoGas);
                f64::NAN
            }
        };
    }
}

fn log_ratio(parts: &[Part<'_>], from: f64, to: f64) -> Option<f64> {
    let atmosphere = crate::thermo::constants::STANDARD_ATMOSPHERE;
    let (mut entropy, mut amount) = (0.0, 0.0);
    for part in parts {
        let at = |kelvin: f64| {
            part.curve.place(quantity(kelvin), quantity(atmosphere), part.pin, None, part.allowance).ok()
        };
        entropy += part.mass.value * part.curve.entropy_increment(at(from)?, at(to)?)?.value;
        amount += part.mass.value / part.curve.molar_mass()?.value;
    }
    Some(entropy / (amount * GAS_CONSTANT))
}

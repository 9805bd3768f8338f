//! Places on heating curves and what they tell.

use super::frame::{Failure, Fault, Frame};
use crate::plan::{Material, PhaseSet, PlaceSlot, Plan, Slot};
use crate::thermo::constants::STANDARD_ATMOSPHERE;
use crate::thermo::{HeatingCurve, LocateError, PhaseClass, Place, Side};
use crate::units::quantity;

/// The material of an operation; a Plan names only materials it holds.
fn material(plan: &Plan, at: u32) -> &Material {
    &plan.materials[at as usize]
}

#[inline]
pub(super) fn locate<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    [t, p]: [Slot; 2],
    side: Option<(u32, Slot)>,
    to: PlaceSlot,
) {
    let material = material(plan, which);
    let plain = if side.is_none() { material.curve.locator(material.pin, &material.allowance) } else { None };
    let (kelvin, pascal) = (&frame.slots[t.0 as usize], &frame.slots[p.0 as usize]);
    let places = &mut frame.places[to.0 as usize];
    let mut all = true;
    for lane in 0..N {
        places[lane] = match plain {
            Some(plain) if !pascal[lane].is_nan() => plain.place(kelvin[lane], pascal[lane]),
            _ => None,
        };
        all &= places[lane].is_some();
    }
    if !all {
        locate_others(frame, at, material, [t, p], side, to);
    }
}

/// The lanes in which no place is plain: those with a side said, near a transition, outside the data.
#[inline(never)]
fn locate_others<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    material: &Material,
    [t, p]: [Slot; 2],
    side: Option<(u32, Slot)>,
    to: PlaceSlot,
) {
    let (t, p) = (frame.get(t), frame.get(p));
    let share = side.map(|(phase, slot)| (phase as usize, frame.get(slot)));
    for lane in 0..N {
        let side = share.map(|(phase, shares)| Side { phase, share: shares[lane] });
        let silent = t[lane].is_nan() || p[lane].is_nan() || side.is_some_and(|side| side.share.is_nan());
        if silent || frame.places[to.0 as usize][lane].is_some() {
            continue;
        }
        let (kelvin, pascal) = (t[lane], p[lane]);
        let (pin, allowance) = (material.pin, &material.allowance);
        match material.curve.locate(quantity(kelvin), quantity(pascal), pin, side, allowance) {
            Ok(place) => frame.places[to.0 as usize][lane] = Some(place),
            Err(error) => frame.fail(at, lane, Fault::Locate { error, kelvin, pascal }),
        }
    }
}

pub(super) fn place<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    [t, p, share]: [Slot; 3],
    to: PlaceSlot,
) {
    let material = material(plan, which);
    let (t, p, share) = (frame.get(t), frame.get(p), frame.get(share));
    for lane in 0..N {
        let (kelvin, pascal) = (t[lane], p[lane]);
        let upper = (!share[lane].is_nan()).then_some(share[lane]);
        let place = if kelvin.is_nan() || pascal.is_nan() {
            None
        } else {
            match material.curve.place(
                quantity(kelvin),
                quantity(pascal),
                material.pin,
                upper,
                &material.allowance,
            ) {
                Ok(place) => Some(place),
                Err(error) => {
                    frame.fail(at, lane, Fault::Locate { error, kelvin, pascal });
                    None
                }
            }
        };
        frame.places[to.0 as usize][lane] = place;
    }
}

/// A property of a place in each lane; none gives NaN, with a fault if there is one for it.
fn each<const N: usize>(
    frame: &mut Frame<N>,
    place: PlaceSlot,
    to: Slot,
    fault: Option<(usize, Fault)>,
    tell: impl Fn(Place, usize) -> Option<f64>,
) {
    let places = &frame.places[place.0 as usize];
    let out = &mut frame.slots[to.0 as usize];
    for (lane, place) in places.iter().enumerate() {
        let value = place.map(|place| tell(place, lane));
        out[lane] = value.flatten().unwrap_or(f64::NAN);
        if let (Some(None), Some((at, fault))) = (value, fault) {
            frame.failures.push(Failure { op: at, lane, fault });
        }
    }
}

/// What a pressure adds to the enthalpy of condensed matter, J/kg: nothing at 101.325 kPa or without a density.
#[inline]
fn pressure_enthalpy(curve: &HeatingCurve, place: Place, pascal: f64) -> f64 {
    if pascal == STANDARD_ATMOSPHERE {
        return 0.0;
    }
    curve.condensed_pressure_enthalpy(place, quantity(pascal)).map_or(0.0, |part| part.value)
}

#[inline]
pub(super) fn enthalpy<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    which: u32,
    place: PlaceSlot,
    p: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    let places = &frame.places[place.0 as usize];
    let (known, open) = frame.slots.split_at_mut(to.0 as usize);
    let (p, out) = (&known[p.0 as usize], &mut open[0]);
    for lane in 0..N {
        out[lane] = match places[lane] {
            Some(place) => curve.enthalpy(place).value + pressure_enthalpy(curve, place, p[lane]),
            None => f64::NAN,
        };
    }
}

/// Place and enthalpy in one: the place serves nothing else and is not kept.
#[inline]
pub(super) fn enthalpy_at<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    [t, p]: [Slot; 2],
    to: Slot,
) {
    let material = material(plan, which);
    let curve = &*material.curve;
    let (kelvin, pascal, out) = frame.two_to(t, p, to);
    let mut all = false;
    if let Some(plain) = curve.locator(material.pin, &material.allowance) {
        all = true;
        for lane in 0..N {
            let place = plain.place(kelvin[lane], pascal[lane]).filter(|_| !pascal[lane].is_nan());
            all &= place.is_some();
            out[lane] = place.map_or(f64::NAN, |place| {
                curve.enthalpy(place).value + pressure_enthalpy(curve, place, pascal[lane])
            });
        }
    } else {
        *out = [f64::NAN; N];
    }
    if !all {
        enthalpy_at_others(frame, at, material, [t, p], to);
    }
}

/// The lanes in which no place is plain.
#[inline(never)]
fn enthalpy_at_others<const N: usize>(
    frame: &mut Frame<N>,
    at: usize,
    material: &Material,
    [t, p]: [Slot; 2],
    to: Slot,
) {
    let curve = &*material.curve;
    for lane in 0..N {
        let (t, p, out) = frame.two_to(t, p, to);
        let (kelvin, pascal) = (t[lane], p[lane]);
        if kelvin.is_nan() || pascal.is_nan() || !out[lane].is_nan() {
            continue;
        }
        match curve.locate(quantity(kelvin), quantity(pascal), material.pin, None, &material.allowance) {
            Ok(place) => {
                out[lane] = curve.enthalpy(place).value + pressure_enthalpy(curve, place, pascal);
            }
            Err(error) => frame.fail(at, lane, Fault::Locate { error, kelvin, pascal }),
        }
    }
}

pub(super) fn internal_energy<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    place: PlaceSlot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    each(frame, place, to, Some((at, Fault::NoVolume)), |place, _| {
        curve.internal_energy(place).map(|energy| energy.value)
    });
}

pub(super) fn latent<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    which: u32,
    place: PlaceSlot,
    p: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    let p = frame.slots[p.0 as usize];
    each(frame, place, to, None, |place, lane| Some(curve.latent_at(place, quantity(p[lane])).value));
}

pub(super) fn boiling_temperature<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    p: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    for (lane, pascal) in frame.get(p).into_iter().enumerate() {
        let found = (!pascal.is_nan()).then(|| curve.boiling_temperature(quantity(pascal)));
        saturated(frame, (at, lane), found.map(|t| t.map(|t| t.value)), (f64::NAN, pascal), to);
    }
}

pub(super) fn saturation_pressure<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    t: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    for (lane, kelvin) in frame.get(t).into_iter().enumerate() {
        let found = (!kelvin.is_nan()).then(|| curve.saturation_pressure(quantity(kelvin)));
        saturated(frame, (at, lane), found.map(|p| p.map(|p| p.value)), (kelvin, f64::NAN), to);
    }
}

/// What saturation gives goes to its slot; a failure is kept with the temperature and the pressure asked.
fn saturated<const N: usize>(
    frame: &mut Frame<N>,
    (at, lane): (usize, usize),
    found: Option<Result<f64, LocateError>>,
    (kelvin, pascal): (f64, f64),
    to: Slot,
) {
    let value = match found {
        Some(Ok(value)) => value,
        Some(Err(error)) => {
            frame.fail(at, lane, Fault::Locate { error, kelvin, pascal });
            f64::NAN
        }
        None => f64::NAN,
    };
    frame.slots[to.0 as usize][lane] = value;
}

pub(super) fn pressure_part<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    which: u32,
    place: PlaceSlot,
    p: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    let p = frame.slots[p.0 as usize];
    each(frame, place, to, None, |place, lane| Some(pressure_enthalpy(curve, place, p[lane])));
}

pub(super) fn heat_capacity<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    which: u32,
    place: PlaceSlot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    each(frame, place, to, Some((at, Fault::NoHeatCapacity)), |place, _| {
        curve.heat_capacity(place).map(|cp| cp.value)
    });
}

pub(super) fn volume<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    (which, place, p): (u32, PlaceSlot, Slot),
    neglect: bool,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    let p = frame.slots[p.0 as usize];
    let has_gas = |place: Place| curve.class_share(place, PhaseClass::Gas) > 0.0;
    each(frame, place, to, Some((at, Fault::NoVolume)), |place, lane| {
        match curve.specific_volume(place, quantity(p[lane])) {
            Some(volume) => Some(volume.value),
            None => (neglect && !has_gas(place)).then_some(0.0),
        }
    });
}

pub(super) fn phase_share<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    which: u32,
    place: PlaceSlot,
    phases: PhaseSet,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    each(frame, place, to, None, |place, _| {
        Some(match phases {
            PhaseSet::One(one) => curve.phases_at(place).share(one as usize),
            PhaseSet::Class(class) => curve.class_share(place, class),
        })
    });
}

pub(super) fn gas_only<const N: usize>(
    plan: &Plan,
    frame: &mut Frame<N>,
    at: usize,
    (which, place): (u32, PlaceSlot),
    value: Slot,
    to: Slot,
) {
    let curve = &material(plan, which).curve;
    let value = frame.slots[value.0 as usize];
    each(frame, place, to, Some((at, Fault::NoGas)), |place, lane| {
        let present = curve.phases_at(place);
        let gas = |phase: usize| curve.phase_class(phase) == Some(PhaseClass::Gas);
        let all = gas(present.lower.0) && present.upper.is_none_or(|(phase, _)| gas(phase));
        all.then_some(value[lane])
    });
}

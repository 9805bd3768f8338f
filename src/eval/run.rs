//! The interpreter's loop.

use super::frame::{Failure, Fault, Frame};
use super::{arithmetic, property, settle};
use crate::plan::{Op, Plan};

/// Runs every operation of the Plan over the frame's lanes.
pub fn run<const N: usize>(plan: &Plan, frame: &mut Frame<N>) {
    for (at, op) in plan.ops.iter().enumerate() {
        step(plan, frame, at, op);
    }
}

#[inline(always)]
fn step<const N: usize>(plan: &Plan, frame: &mut Frame<N>, at: usize, op: &Op) {
    match *op {
        Op::Add { a, b, to } => arithmetic::binary(frame, at, a, b, to, |a, b| a + b, overflow),
        Op::Subtract { a, b, to } => arithmetic::binary(frame, at, a, b, to, |a, b| a - b, overflow),
        Op::Multiply { a, b, to } => arithmetic::binary(frame, at, a, b, to, |a, b| a * b, overflow),
        Op::Divide { a, b, to } => {
            arithmetic::binary(frame, at, a, b, to, arithmetic::quotient, arithmetic::quotient_fault)
        }
        Op::Minimum { a, b, to } => arithmetic::binary(frame, at, a, b, to, arithmetic::lesser, overflow),
        Op::Maximum { a, b, to } => arithmetic::binary(frame, at, a, b, to, arithmetic::greater, overflow),
        Op::Power { a, b, to } => {
            arithmetic::binary(frame, at, a, b, to, arithmetic::power, arithmetic::power_fault)
        }
        Op::LogMean { a, b, to } => {
            arithmetic::binary(frame, at, a, b, to, arithmetic::log_mean, |a, b| Fault::Logarithm {
                of: a.min(b),
            });
        }
        Op::Negate { a, to } => arithmetic::unary(frame, at, a, to, |a| -a, |_| Fault::Overflow),
        Op::Absolute { a, to } => arithmetic::unary(frame, at, a, to, f64::abs, |_| Fault::Overflow),
        Op::PowerInteger { a, exponent, to } => arithmetic::power_integer(frame, at, a, exponent, to),
        Op::SquareRoot { a, to } => {
            arithmetic::unary(frame, at, a, to, f64::sqrt, |of| Fault::Root { of });
        }
        Op::Exponential { a, to } => {
            arithmetic::unary(frame, at, a, to, crate::numeric::math::exp, |_| Fault::Overflow);
        }
        Op::Logarithm { a, to } => {
            arithmetic::unary(frame, at, a, to, arithmetic::ln, |of| Fault::Logarithm { of })
        }
        Op::Logarithm10 { a, to } => {
            arithmetic::unary(frame, at, a, to, arithmetic::log10, |of| Fault::Logarithm { of });
        }
        Op::Known { value, given, to } => arithmetic::known(frame, value, given, to),
        Op::Guard { check, a, b, value, to } => arithmetic::guard(frame, at, check, [a, b, value], to),
        Op::Locate { material, t, p, side, to } => {
            property::locate(plan, frame, at, material, [t, p], side, to)
        }
        Op::Place { material, t, p, share, to } => {
            property::place(plan, frame, at, material, [t, p, share], to)
        }
        Op::Enthalpy { material, place, p, to } => property::enthalpy(plan, frame, material, place, p, to),
        Op::EnthalpyAt { material, t, p, to } => property::enthalpy_at(plan, frame, at, material, [t, p], to),
        Op::InternalEnergy { material, place, to } => {
            property::internal_energy(plan, frame, at, material, place, to)
        }
        Op::Latent { material, place, p, to } => property::latent(plan, frame, material, place, p, to),
        Op::BoilingTemperature { material, p, to } => {
            property::boiling_temperature(plan, frame, at, material, p, to)
        }
        Op::SaturationPressure { material, t, to } => {
            property::saturation_pressure(plan, frame, at, material, t, to)
        }
        Op::PressurePart { material, place, p, to } => {
            property::pressure_part(plan, frame, material, place, p, to)
        }
        Op::HeatCapacity { material, place, to } => {
            property::heat_capacity(plan, frame, at, material, place, to)
        }
        Op::Volume { material, place, p, neglect, to } => {
            property::volume(plan, frame, at, (material, place, p), neglect, to);
        }
        Op::PhaseShare { material, place, phases, to } => {
            property::phase_share(plan, frame, material, place, phases, to)
        }
        Op::GasOnly { material, place, value, to } => {
            property::gas_only(plan, frame, at, (material, place), value, to)
        }
        Op::SettleTemperature { by, parts, target, p, to, share } => {
            settle::temperature(plan, frame, at, by, parts, [target, p], [to, share]);
        }
        Op::SettlePressure { parts, target, t, share, p, to } => {
            settle::pressure(plan, frame, at, parts, [target, t, share, p], to);
        }
        Op::PressureRatio { parts, from, t, to } => {
            settle::pressure_ratio(plan, frame, at, parts, [from, t], to)
        }
    }
}

fn overflow(_: f64, _: f64) -> Fault {
    Fault::Overflow
}

impl<const N: usize> Frame<N> {
    pub(super) fn fail(&mut self, op: usize, lane: usize, fault: Fault) {
        self.failures.push(Failure { op, lane, fault });
    }
}

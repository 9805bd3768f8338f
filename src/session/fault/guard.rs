//! Guards that do not hold.

use super::teller::{Teller, temperature};
use crate::diagnostic::{Code, Diagnostic};
use crate::plan::{Check, OriginKind};
use crate::report::number::significant;

impl Teller<'_> {
    pub(super) fn check(&self, check: Check, a: f64, b: f64) -> Diagnostic {
        let step = self.step();
        let (state, _) = self.state();
        let (x, y) = (significant(a, 6), significant(b, 6));
        match check {
            Check::PositiveAmount => self
                .found(
                    Code::NegativeAmount,
                    format!("an amount of {x} (SI), which is not above zero"),
                    "this amount",
                )
                .help("matter has a positive amount: check the signs"),
            Check::PositiveTime => self
                .found(
                    Code::NegativeAmount,
                    format!("a time of {x} s, which is not above zero"),
                    "in this duty",
                )
                .help("check the time over which the heat is brought"),
            Check::Share => self
                .found(
                    Code::ShareOutOfBounds,
                    format!("a share of {} %, outside 0 % to 100 %", significant(a * 100.0, 6)),
                    "this share",
                )
                .help("a part of a state is more than nothing and at most all of it"),
            Check::Efficiency => self
                .found(
                    Code::BadEfficiency,
                    format!("an efficiency of {} %", significant(a * 100.0, 6)),
                    "worked here",
                )
                .help("an efficiency lies above 0 % and is at most 100 %"),
            Check::PositivePressure => self
                .found(
                    Code::PressureNotPositive,
                    format!("a pressure of {x} Pa abs in `{state}`"),
                    "not above zero",
                )
                .help("check the sign, and whether a gauge reading was meant, such as `0.2 barg`"),
            Check::SamePressure => self
                .found(
                    Code::PressuresDiffer,
                    format!(
                        "`{step}` is at constant pressure, but its states stand at {} kPa and at {} kPa abs",
                        significant(a / 1e3, 6),
                        significant(b / 1e3, 6)
                    ),
                    "this step",
                )
                .help("give all its states one pressure, or choose another path"),
            Check::AgreedPressure => self
                .found(
                    Code::PressureUnsaid,
                    format!(
                        "`{state}` is made from matter at {} kPa and at {} kPa abs, and says no pressure",
                        significant(a / 1e3, 6),
                        significant(b / 1e3, 6)
                    ),
                    "which pressure?",
                )
                .help("add the pressure after the temperature, such as `, 1 bar`"),
            Check::NoRise => self
                .found(Code::PressureRises, format!("`{step}` does no shaft work, but its pressure rises from {} kPa to {} kPa abs", significant(a / 1e3, 6), significant(b / 1e3, 6)), "this step")
                .help("write `adiabatic reversible` with its efficiency, or `at constant pressure, working ...`, or correct the pressures"),
            Check::SameTemperature => self
                .found(
                    Code::TemperaturesDiffer,
                    format!(
                        "`{step}` is at constant temperature, but its states stand at {} and at {}",
                        temperature(a),
                        temperature(b)
                    ),
                    "this step",
                )
                .help("give all its states one temperature, or choose another path"),
            Check::SameVolume => self
                .found(
                    Code::VolumeChanges,
                    format!("`{step}` is at constant volume, but leads from {x} m3 to {y} m3"),
                    "this step",
                )
                .help("leave the pressure at the end open, `at TEMPERATURE, ?`, so that the step settles it; condensed matter alone needs one constant density"),
            Check::Conserved => {
                let what = match &self.origin.kind {
                    OriginKind::Conserved(_, name) => name.as_str(),
                    _ => "matter",
                };
                let unit = self.conserved_unit(what);
                let word = if a > b { "loses" } else { "gains" };
                let by = significant(100.0 * (a - b).abs() / a.abs().max(b.abs()), 4);
                self.found(
                    Code::NotConserved,
                    format!("`{step}` {word} `{what}`: {x} {unit} at its start, {y} {unit} at its end"),
                    format!(
                        "{by} % of `{what}` {}",
                        if a > b { "missing at the end" } else { "missing at the start" }
                    ),
                )
                .help("name all states that take part, on both sides of `->`")
            }
            Check::Heating => self
                .found(
                    Code::EfficiencyOnCooling,
                    format!("an efficiency on a duty that cools, {}", self.duty_value(a)),
                    "this duty",
                )
                .help("leave the efficiency out: what a cooler takes away is the heat itself"),
        }
    }
}

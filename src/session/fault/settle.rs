//! Unknowns that nothing answers.

use super::teller::{Teller, temperature};
use crate::diagnostic::{Code, Diagnostic};
use crate::thermo::SettleError;

impl Teller<'_> {
    pub(super) fn settle(&self, error: SettleError) -> Diagnostic {
        let (state, _) = self.state();
        let step = self.step();
        match error {
            SettleError::Unreachable(reach) => {
                let (lo, hi) = (temperature(reach.lo.value), temperature(reach.hi.value));
                let boiling = if reach.boiling { "; an end is a boiling point, which holds at 101.325 kPa only" } else { "" };
                self.found(
                    Code::Unreachable,
                    format!("no temperature of `{state}` answers the heat of `{step}`: the data reach from {lo} to {hi}{boiling}"),
                    "this step asks for more than its end can hold, or less",
                )
                .help("check the heat and the amounts, or extend the data with `allow`")
            }
            SettleError::NoCommonRange { lo, hi } => self
                .found(
                    Code::Unreachable,
                    format!(
                        "no temperature of `{state}` answers `{step}`: its species have no data in common there ({} to {})",
                        temperature(lo.value),
                        temperature(hi.value)
                    ),
                    "this step",
                )
                .help("extend the data, with their source, or with `allow`"),
            SettleError::NotAGas { .. } => self
                .found(Code::GasPathOnly, format!("`{step}` is a path for gases, and `{state}` is not all gas"), "this step")
                .help("name the phase with its state symbol, such as `H2O(g)`, or choose another path"),
            SettleError::StartOutsideRange { .. } | SettleError::RatioUnreachable { .. } => self
                .found(
                    Code::Unreachable,
                    format!("`{step}` leads `{state}` beyond the data of its species"),
                    "this step",
                )
                .help("extend the data, with their source, or with `allow`"),
            SettleError::NotFinite => self
                .found(Code::NotFinite, format!("the heat of `{step}` is no finite number"), "this step")
                .help("check the powers of ten"),
            SettleError::NothingThere | SettleError::Mass { .. } | SettleError::NoSuchPhase { .. } => self
                .found(Code::NegativeAmount, format!("`{state}` holds nothing that `{step}` could heat"), "this step")
                .help("check the amounts"),
        }
    }
}

//! Arithmetic that gives no number.

use super::teller::Teller;
use crate::diagnostic::{Code, Diagnostic};
use crate::eval::Fault;
use crate::report::number::significant;

impl Teller<'_> {
    pub(super) fn arithmetic(&self, fault: Fault) -> Diagnostic {
        match fault {
            Fault::DivisionByZero { numerator } => self
                .found(
                    Code::DivisionByZero,
                    format!("{} divided by 0", significant(numerator, 6)),
                    "zero here",
                )
                .help("check the values that the divisor is made of"),
            Fault::Logarithm { of } => self
                .found(
                    Code::NotFinite,
                    format!("the logarithm of {}, which is not above zero", significant(of, 6)),
                    "worked here",
                )
                .help("check the signs of what stands inside"),
            Fault::Root { of } => self
                .found(
                    Code::NotFinite,
                    format!("a root of {}, which is negative", significant(of, 6)),
                    "worked here",
                )
                .help("check the signs of what stands inside"),
            Fault::NoVolume => {
                let (state, species) = self.state();
                let name = species.map_or("matter", |species| species.name.as_str());
                let step = self.step();
                let at = if state.is_empty() { step } else { state };
                self.found(
                    Code::DensityMissing,
                    format!("a volume in `{at}` of `{name}`, which has no density there"),
                    "a volume is asked",
                )
                .help("give the phase a line `density ... kg/m3`, or a gas its molar mass")
            }
            Fault::NoHeatCapacity => self
                .found(
                    Code::NotFinite,
                    "a heat capacity on a transition, where heat changes no temperature".to_owned(),
                    "of this state",
                )
                .help("ask for it beside the transition"),
            Fault::NoGas => {
                let step = self.step();
                self.found(
                    Code::GasPathOnly,
                    format!("`{step}` is a path for gases, and not all of it is gas"),
                    "this step",
                )
                .help("choose another path, or name the gas phase with its state symbol")
            }
            Fault::BoilsClosed => {
                let (state, _) = self.state();
                self.found(
                    Code::LaterEquilibrium,
                    format!("`{state}` boils or condenses in a closed volume: its pressure would be a vapour pressure, which is not worked by this version"),
                    "this step",
                )
                .help("let it boil at constant pressure, or name the phase at the end with its state symbol")
            }
            Fault::SettlePressure { volume, amount } => {
                let (state, _) = self.state();
                let why = if amount > 0.0 {
                    format!("{} m3 are left for its gas", significant(volume, 4))
                } else {
                    "it holds no gas at its temperature".to_owned()
                };
                self.found(Code::Unreachable, format!("no pressure of `{state}` fills the volume: {why}"), "this step")
                    .help("liquids and solids are taken as incompressible: a volume full of them has no pressure of its own here; that of a vapour which condenses is its vapour pressure, which is not worked by this version")
            }
            _ => self
                .found(Code::NotFinite, "a value beyond the range of a double".to_owned(), "worked here")
                .help("check the powers of ten"),
        }
    }
}

//! Temperatures without a place on a heating curve.

use super::teller::{Teller, temperature};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::Species;
use crate::report::number::significant;
use crate::thermo::LocateError;

impl Teller<'_> {
    pub(super) fn locate(&self, error: LocateError, kelvin: f64, pascal: f64) -> Diagnostic {
        let (state, species) = self.state();
        let name = species.map_or("the species", |species| species.name.as_str());
        let phase = |at: usize| species.map_or(String::new(), |species| species.in_phase(at));
        let here = temperature(kelvin);
        match error {
            LocateError::OutsideVapourPressure { liquid_below, gas_above, lo, hi } => {
                let stands = if pascal.is_nan() {
                    format!("`{state}` is saturated at {here}")
                } else {
                    format!("`{state}` stands at {} kPa abs", significant(pascal / 1e3, 6))
                };
                let sure = match (liquid_below.value > 0.0, gas_above.value.is_finite()) {
                    (true, _) => format!("liquid is sure up to {} K only", significant(liquid_below.value, 6)),
                    (false, true) => format!("gas is sure from {} K only", significant(gas_above.value, 6)),
                    (false, false) => "beyond the law".to_owned(),
                };
                self.found(
                    Code::OutsideVapourPressure,
                    format!(
                        "{stands}, and the vapour pressure of `{name}` is known from {} kPa to {} kPa only",
                        significant(lo.value / 1e3, 6),
                        significant(hi.value / 1e3, 6)
                    ),
                    sure,
                )
                .help(format!(
                    "name the phase where its matter is declared, such as `{}`, or give a law that reaches further",
                    species.map_or(String::new(), |species| beside_boiling(species, kelvin > gas_above.value))
                ))
            }
            LocateError::NotATemperature => self
                .found(Code::BelowAbsoluteZero, format!("`{state}` lies at {here}, not above absolute zero"), "this state")
                .help("0 K is -273.15 degC: check the unit and the sign of its temperature"),
            LocateError::OnTransition { temperature: at, below, above } => {
                let t = significant(at.value, 7);
                let word = species.and_then(|species| species.phases.get(above)).map_or("liquid", |phase| &phase.name);
                self.found(
                    Code::OnTransition,
                    format!("`{state}` lies within 0.5 K of a transition of `{name}` at {t} K, and no side is said"),
                    format!("at {here}: {} or {}?", phase(below), phase(above)),
                )
                .help(format!("say how much has changed, `at {t} K, 40 % {word}`, or name the phase, `{}`", phase(above)))
            }
            LocateError::OutsideRange { phase: at, lo, hi } => {
                let (what, end) = if kelvin < lo.value {
                    ("below", format!("from {} K", kelvin.floor()))
                } else {
                    ("above", format!("to {} K", kelvin.ceil()))
                };
                let (low, high) = (significant(lo.value, 7), significant(hi.value, 7));
                self.found(
                    Code::OutsideRange,
                    format!("`{state}` lies at {here}, {what} the data of `{}`, {low} K to {high} K", phase(at)),
                    format!("at {here}"),
                )
                .help(format!("if it can be defended: `allow {} {end} because \"...\"`", phase(at)))
            }
            LocateError::Decomposes { at } => {
                let last = species.map_or(0, |species| species.phases.len().saturating_sub(1));
                self.found(
                    Code::OutsideRange,
                    format!("`{state}` lies at {here}, where `{name}` decomposes (above {} K)", significant(at.value, 7)),
                    format!("at {here}"),
                )
                .help(format!("if it can be defended: `allow {} to {} K because \"...\"`", phase(last), kelvin.ceil()))
            }
            LocateError::BoilingPressure { temperature: at } => self
                .found(
                    Code::BoilingPressure,
                    format!(
                        "`{state}` stands at {} kPa abs, and the boiling point of `{name}`, {} K, holds at 101.325 kPa only",
                        significant(pascal / 1e3, 6),
                        significant(at.value, 7)
                    ),
                    format!("at {here}: liquid or gas?"),
                )
                .help(format!(
                    "name the phase where its matter is declared, such as `{}`",
                    species.map_or(String::new(), |species| beside_boiling(species, kelvin > at.value))
                )),
            LocateError::NoTransition if self.inherits_share() => self
                .found(
                    Code::ShareWithoutPlateau,
                    format!("`{state}` keeps the temperature and the share of a phase of the state it is made from, but no transition of `{name}` lies within 0.5 K of {here} at its pressure"),
                    format!("at {here}"),
                )
                .help(format!("say its temperature or `saturated vapour`, or write `at ?, {} kPa` and let a step settle it", significant(pascal / 1e3, 6))),
            LocateError::NoTransition => self
                .found(
                    Code::ShareWithoutPlateau,
                    format!("`{state}` says a share of a phase, but no transition of `{name}` lies within 0.5 K of {here}"),
                    format!("at {here}"),
                )
                .help("leave the share out, or give the temperature of the transition; in a melting range the share follows"),
            LocateError::ShareOutOfBounds => self
                .found(Code::ShareOutOfBounds, format!("the share of a phase in `{state}` lies outside 0 % to 100 %"), "this state")
                .help("give a share from 0 % to 100 %"),
            LocateError::NoSuchPhase => self
                .found(Code::UnknownPhase, format!("`{name}` has no such phase in `{state}`"), "this state")
                .help("name a phase of its block"),
        }
    }
}

/// The phase above or below the boiling point: the last, or the one before it.
fn beside_boiling(species: &Species, above: bool) -> String {
    species.in_phase(species.phases.len().saturating_sub(if above { 1 } else { 2 }))
}

//! Failures of a run at their places in the sheet.

use crate::diagnostic::{Code, Diagnostic, count};
use crate::eval::{Failure, Fault};
use crate::plan::{Check, Lowered, Origin, OriginKind};
use crate::program::{Program, Species, StateId, StepId, Table};
use crate::report::number::significant;
use crate::source::Sources;
use crate::study::Sweep;
use crate::thermo::{LocateError, SettleError};
use crate::units::{Dimension, engineering_unit};

/// Unknowns that wait for each other.
pub(super) fn circle(program: &Program, step: StepId, state: StateId) -> Diagnostic {
    let (step_name, span) =
        program.steps.get(step.0).map_or(("", Default::default()), |step| (step.name.as_str(), step.span));
    let Some(state) = program.states.get(state.0) else {
        return Diagnostic::new(Code::UnknownLoop, "unknowns wait for each other");
    };
    let place = match (&state.temperature, &state.pressure) {
        (crate::program::Condition::Unknown(span), _) | (_, crate::program::Condition::Unknown(span)) => {
            *span
        }
        _ => state.span,
    };
    Diagnostic::new(
        Code::UnknownLoop,
        format!("the unknown of `{}` depends on itself, by way of the step `{step_name}`", state.name),
    )
    .label(place, "unknown here")
    .label(span, "this step would settle it, and needs it first")
    .help("let the heat, work and losses of the step depend on known values only")
}

/// A failure as a diagnostic.
pub(super) fn explain(program: &Program, lowered: &Lowered, failure: &Failure) -> Diagnostic {
    let nowhere = Origin { span: Default::default(), kind: OriginKind::Expression };
    let index = lowered.plan.origins.get(failure.op).copied().unwrap_or(u32::MAX);
    let origin = lowered.map.origins.get(index as usize).unwrap_or(&nowhere);
    let teller = Teller { program, origin };
    match failure.fault {
        Fault::Locate { error, kelvin, pascal } => teller.locate(error, kelvin, pascal),
        Fault::Settle(error) => teller.settle(error),
        Fault::Check { check, a, b } => teller.check(check, a, b),
        other => teller.arithmetic(other),
    }
}

/// The rows of a table that are refused, as one warning.
pub(super) fn explain_row(
    program: &Program,
    lowered: &Lowered,
    table: &Table,
    sweep: &Sweep,
    sources: &Sources,
) -> Option<Diagnostic> {
    let first = sweep.refused.first()?;
    let why = explain(program, lowered, &first.failure);
    let variable = program.quantities.get(table.over.0)?;
    let unit =
        variable.display.clone().unwrap_or_else(|| engineering_unit(variable.value.dimension, first.at));
    let at = format!("{} {}", significant(unit.from_si(first.at, program.site.atmosphere), 8), unit.text);
    let line = why.place().map_or(0, |span| sources.line_column(span.file, span.start).0);
    let rows = count(sweep.refused.len(), "row");
    let message = format!(
        "{rows} of the table \"{}\" refused; the first at {} = {at}, by line {line}: {} ({})",
        table.title, variable.name, why.message, why.code
    );
    let mut found = Diagnostic::new(Code::TableRowRefused, message).label(table.span, "in this table");
    if let Some(help) = why.help {
        found = found.help(help);
    }
    Some(found)
}

/// Who tells a failure: what the operation was made for.
struct Teller<'a> {
    program: &'a Program,
    origin: &'a Origin,
}

impl Teller<'_> {
    fn found(&self, code: Code, message: String, label: impl Into<String>) -> Diagnostic {
        Diagnostic::new(code, message).label(self.origin.span, label)
    }

    /// The name of the state, and the species of the constituent, that the operation was made for.
    fn state(&self) -> (&str, Option<&Species>) {
        let (id, at) = match &self.origin.kind {
            OriginKind::State(id, at) => (*id, *at),
            OriginKind::Settle(_, id, _) => (*id, 0),
            _ => return ("", None),
        };
        let Some(state) = self.program.states.get(id.0) else { return ("", None) };
        let species = state.constituents.get(at).and_then(|part| self.program.species.get(part.species.0));
        (&state.name, species)
    }

    fn step(&self) -> &str {
        let id = match &self.origin.kind {
            OriginKind::Step(id) | OriginKind::Conserved(id, _) | OriginKind::Settle(id, ..) => id,
            _ => return "",
        };
        self.program.steps.get(id.0).map_or("", |step| step.name.as_str())
    }

    /// What the duty takes, W or J, in an engineer's unit.
    fn duty_value(&self, si: f64) -> String {
        let dimension = match &self.origin.kind {
            OriginKind::Duty(id) => self.program.duties.get(id.0).map(|duty| match duty.over {
                Some(_) => Dimension::POWER,
                None => duty.value.dimension,
            }),
            _ => None,
        };
        let unit = engineering_unit(dimension.unwrap_or(Dimension::ENERGY), si);
        format!("{} {}", significant(unit.from_si(si, 0.0), 6), unit.text)
    }

    /// In what a step's balance is counted: species by mass, elements by amount of substance.
    fn conserved_unit(&self, what: &str) -> &'static str {
        let OriginKind::Conserved(id, _) = &self.origin.kind else { return "" };
        let flow = self.program.steps.get(id.0).is_some_and(|step| step.flow);
        let by_mass = self.program.species.iter().any(|species| species.name == what);
        match (by_mass, flow) {
            (true, false) => "kg",
            (true, true) => "kg/s",
            (false, false) => "mol",
            (false, true) => "mol/s",
        }
    }

    fn locate(&self, error: LocateError, kelvin: f64, pascal: f64) -> Diagnostic {
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

    fn settle(&self, error: SettleError) -> Diagnostic {
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

    fn check(&self, check: Check, a: f64, b: f64) -> Diagnostic {
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
                .help("leave the pressure at the end open, `at TEMPERATURE, ?`, so that the step settles it"),
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

    fn arithmetic(&self, fault: Fault) -> Diagnostic {
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
                    "asked here",
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
                    "it holds no gas".to_owned()
                };
                self.found(Code::Unreachable, format!("no pressure of `{state}` fills the volume: {why}"), "this step")
                    .help("liquids and solids are taken as incompressible: a volume full of them has no pressure of its own here")
            }
            _ => self
                .found(Code::NotFinite, "a value beyond the range of a double".to_owned(), "worked here")
                .help("check the powers of ten"),
        }
    }
}

/// The phase above or below the boiling point: the last, or the one before it.
fn beside_boiling(species: &Species, above: bool) -> String {
    species.in_phase(species.phases.len().saturating_sub(if above { 1 } else { 2 }))
}

/// A temperature in both scales: `692.7 K (419.55 degC)`.
fn temperature(kelvin: f64) -> String {
    format!("{} K ({} degC)", significant(kelvin, 6), significant(kelvin - 273.15, 5))
}

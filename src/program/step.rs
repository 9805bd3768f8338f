//! Steps: from some states to others, along a path.

use super::{Expr, StateId};
use crate::span::Span;

/// The paths of the language.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Path {
    ConstantPressure,
    ConstantVolume,
    IsothermalReversible,
    AdiabaticReversible,
    ConstantTemperatureAndPressure,
    NoShaftWork,
    Throttled,
}

impl Path {
    /// As written.
    pub fn as_str(self) -> &'static str {
        match self {
            Path::ConstantPressure => "at constant pressure",
            Path::ConstantVolume => "at constant volume",
            Path::IsothermalReversible => "isothermal reversible",
            Path::AdiabaticReversible => "adiabatic reversible",
            Path::ConstantTemperatureAndPressure => "at constant temperature and pressure",
            Path::NoShaftWork => "no shaft work",
            Path::Throttled => "throttled",
        }
    }
}

/// What is said of the heat.
#[derive(Debug, Clone, PartialEq)]
pub enum Heat {
    /// Nothing: it follows.
    Follows,
    /// None passes.
    Adiabatic,
    /// So much.
    Taking(Expr),
}

/// What is not known of a state.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum Unknown {
    /// Its temperature.
    Temperature,
    /// Its pressure.
    Pressure,
}

/// The law by which a step settles an unknown.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Law {
    /// The enthalpy at the end is that at the start, and heat and work.
    Enthalpy,
    /// The internal energy at the end is that at the start, and heat and work.
    InternalEnergy,
    /// The pressure stays.
    SamePressure,
    /// The temperature stays.
    SameTemperature,
    /// The volume stays.
    SameVolume,
    /// The entropy stays (with the isentropic efficiency, where one is said).
    Isentropic,
    /// The heat of an isothermal reversible step.
    IsothermalHeat,
}

/// An unknown that a step settles.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Settles {
    /// Whose.
    pub state: StateId,
    /// Which.
    pub unknown: Unknown,
    /// By what.
    pub law: Law,
    /// Whether the state stands at the step's end.
    pub at_end: bool,
}

/// A step.
#[derive(Debug, Clone, PartialEq)]
pub struct Step {
    /// Its name.
    pub name: String,
    /// Where it is declared.
    pub span: Span,
    /// Whether it is a flow.
    pub flow: bool,
    /// The states at the start.
    pub from: Vec<StateId>,
    /// The states at the end.
    pub to: Vec<StateId>,
    /// The path, with its place.
    pub path: Option<(Path, Span)>,
    /// The heat.
    pub heat: Heat,
    /// The heat lost to the surroundings.
    pub losing: Option<Expr>,
    /// Shaft or electrical work that ends in the matter.
    pub working: Option<Expr>,
    /// The isentropic efficiency.
    pub efficiency: Option<Expr>,
    /// The unknowns that it settles.
    pub settles: Vec<Settles>,
    /// The statement after its name, as written.
    pub text: String,
}

impl Step {
    /// The expressions of its clauses.
    pub fn expressions(&self) -> impl Iterator<Item = &Expr> {
        let taking = match &self.heat {
            Heat::Taking(value) => Some(value),
            Heat::Follows | Heat::Adiabatic => None,
        };
        [taking, self.losing.as_ref(), self.working.as_ref(), self.efficiency.as_ref()].into_iter().flatten()
    }
}

//! Species with their heating curves and the pedigree of every datum.

use crate::span::Span;
use crate::thermo::{Composition, HeatingCurve, PhaseClass};
use std::sync::Arc;

/// What a datum says.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum DatumKind {
    /// A heat capacity, an enthalpy table or a mean heat capacity: the phase and the range's index in it.
    HeatCapacity {
        /// The phase.
        phase: usize,
        /// Which of its ranges.
        range: usize,
    },
    /// A density.
    Density {
        /// The phase.
        phase: usize,
    },
    /// The transition above the phase of this index.
    Transition {
        /// The phase below it.
        below: usize,
    },
    /// The formation enthalpy; of a phase where it has its own.
    Formation {
        /// The phase, where it is a phase's own.
        phase: Option<usize>,
    },
    /// The molar mass, where it is given.
    MolarMass,
    /// The vapour pressure.
    VapourPressure,
    /// The temperature at which it decomposes.
    Decomposition,
}

/// A datum as written, with its pedigree.
#[derive(Debug, Clone, PartialEq)]
pub struct Datum {
    /// What it says.
    pub kind: DatumKind,
    /// As written.
    pub text: String,
    /// Where it is valid, K.
    pub valid: Option<(f64, f64)>,
    /// Where it comes from.
    pub source: Option<String>,
    /// Its interval, as written.
    pub interval: Option<String>,
    /// How far a second source lies, as written.
    pub spread: Option<String>,
    /// Where it stands.
    pub span: Span,
}

/// A phase by name.
#[derive(Debug, Clone, PartialEq)]
pub struct PhaseInfo {
    /// Its name in the sheet.
    pub name: String,
    /// Solid, liquid or gas.
    pub class: PhaseClass,
    /// The symbol that stands in parentheses after the species.
    pub symbol: String,
    /// Its density in kg/m³, where it is one constant.
    pub constant_density: Option<f64>,
}

/// `allow Zn(l) to 1250 K because "..."`.
#[derive(Debug, Clone, PartialEq)]
pub struct Allowance {
    /// Which phase.
    pub phase: usize,
    /// The lower end, K.
    pub from: Option<f64>,
    /// The upper end, K.
    pub to: Option<f64>,
    /// Why.
    pub because: String,
    /// Where it stands.
    pub span: Span,
}

/// A species.
#[derive(Debug, Clone, PartialEq)]
pub struct Species {
    /// Its name in the sheet.
    pub name: String,
    /// Its plain name.
    pub label: Option<String>,
    /// Its formula as written, and what it holds.
    pub formula: Option<(String, Composition)>,
    /// Its CAS number.
    pub cas: Option<String>,
    /// Its molar mass, kg/mol.
    pub molar_mass: Option<f64>,
    /// Its phases in the order of heating.
    pub phases: Vec<PhaseInfo>,
    /// Its heating curve, per kilogram, allowances included.
    pub curve: Arc<HeatingCurve>,
    /// Its data.
    pub data: Vec<Datum>,
    /// What is allowed beyond the data.
    pub allowances: Vec<Allowance>,
    /// Whether it has a formation enthalpy.
    pub absolute: bool,
    /// Remarks in its block.
    pub remarks: Vec<String>,
    /// From where, if not this sheet.
    pub from: Option<String>,
    /// Where it is declared.
    pub span: Span,
}

impl Species {
    /// `Zn(l)`: the species in the phase of this index.
    pub fn in_phase(&self, phase: usize) -> String {
        match self.phases.get(phase) {
            Some(info) => format!("{}({})", self.name, info.symbol),
            None => self.name.clone(),
        }
    }

    /// What allows this phase at a temperature in K beyond its data, or where the species decomposes.
    pub fn allowed(&self, phase: usize, kelvin: f64) -> Option<&Allowance> {
        let (lo, hi) = self.curve.phase_span(phase)?;
        let decomposed = self.curve.decomposes_at().is_some_and(|at| kelvin > at.value);
        let (below, above) = (kelvin < lo.value, kelvin > hi.value || decomposed);
        self.allowances.iter().find(|allowance| {
            let reaches = (below && allowance.from.is_some()) || (above && allowance.to.is_some());
            allowance.phase == phase && reaches
        })
    }

    /// Whether it can be a gas and something else, so that its phase beside another gas must be said.
    pub fn can_condense(&self) -> bool {
        let gas = self.phases.iter().any(|phase| phase.class == PhaseClass::Gas);
        gas && self.phases.iter().any(|phase| phase.class != PhaseClass::Gas)
    }
}

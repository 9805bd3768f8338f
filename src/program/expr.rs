//! Checked expressions.

use super::{DutyId, QuantityId, StateId, StepId};
use crate::span::Span;
use crate::units::{Dimension, Kind};

/// An expression whose dimension and kind are known. Values are in SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Expr {
    /// Where it stands.
    pub span: Span,
    /// Its dimension.
    pub dimension: Dimension,
    /// Its kind.
    pub kind: Kind,
    /// What it is.
    pub node: Node,
}

/// The sorts of expression.
#[derive(Debug, Clone, PartialEq)]
pub enum Node {
    /// A value in SI.
    Constant(f64),
    /// A gauge reading: Pa above the site's atmosphere.
    Gauge(f64),
    /// The temperature of a heat-capacity or density formula.
    Variable,
    /// A named quantity.
    Quantity(QuantityId),
    /// A member of a state.
    State(StateId, StateMember),
    /// A member of a step.
    Step(StepId, StepMember),
    /// A member of a duty.
    Duty(DutyId, DutyMember),
    /// A leading minus.
    Negative(Box<Expr>),
    /// A sum; `true` where a term is taken away.
    Sum(Vec<(bool, Expr)>),
    /// A product; `true` where a factor divides.
    Product(Vec<(bool, Expr)>),
    /// A power with a whole exponent.
    PowerInteger(Box<Expr>, i32),
    /// A power with any exponent.
    Power(Box<Expr>, Box<Expr>),
    /// A function of its arguments.
    Call(Function, Vec<Expr>),
}

/// The functions of the language.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Function {
    Min,
    Max,
    Abs,
    Sqrt,
    Exp,
    Ln,
    Log10,
    Mean,
    /// The logarithmic mean (a − b)/ln(a/b).
    LogMean,
}

impl Function {
    /// The functions by name.
    pub const NAMED: &'static [(&'static str, Function)] = &[
        ("min", Function::Min),
        ("max", Function::Max),
        ("abs", Function::Abs),
        ("sqrt", Function::Sqrt),
        ("exp", Function::Exp),
        ("ln", Function::Ln),
        ("log10", Function::Log10),
        ("mean", Function::Mean),
        ("log_mean", Function::LogMean),
    ];

    /// Its name in the language.
    pub fn name(self) -> &'static str {
        Function::NAMED.iter().find(|(_, function)| *function == self).map_or("", |(name, _)| name)
    }
}

/// What can be asked of a state.
#[derive(Debug, Clone, PartialEq, Eq, PartialOrd, Ord)]
pub enum StateMember {
    /// The thermodynamic temperature, K.
    Temperature,
    /// The pressure, Pa.
    Pressure,
    /// The amount of substance, mol (of a flow mol/s).
    Amount,
    /// The mass, kg (of a flow kg/s).
    Mass,
    /// The volume, m³ (of a flow m³/s).
    Volume,
    /// The enthalpy, J, counted from the elements at 298.15 K.
    Enthalpy,
    /// The internal energy, J.
    InternalEnergy,
    /// The enthalpy per mass.
    SpecificEnthalpy,
    /// The internal energy per mass.
    SpecificInternalEnergy,
    /// The heat capacity per mass at constant pressure.
    HeatCapacity,
    /// The density.
    Density,
    /// The share of the species or phase, by mole.
    Fraction(Vec<usize>, String),
    /// The mass of a species: of these constituents.
    MassOf(Vec<usize>),
    /// The amount of a species.
    AmountOf(Vec<usize>),
    /// The mole share of a species, among these constituents (all, or without water).
    Share(Vec<usize>, Vec<usize>),
    /// The mass share of a species.
    MassShare(Vec<usize>),
}

/// What can be asked of a step.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum StepMember {
    /// ΔH.
    EnthalpyChange,
    /// ΔU.
    InternalEnergyChange,
    /// ΔV.
    VolumeChange,
    /// The heat into the matter.
    Heat,
    /// The work into the matter.
    Work,
    /// The heat that must be brought: Q and the losses.
    Supply,
    /// The part of ΔH that changes temperature.
    Sensible,
    /// The part of ΔH that changes phase.
    Latent,
    /// The part of ΔH that reacts.
    Reaction,
}

/// What can be asked of a duty.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub enum DutyMember {
    /// What the matter takes.
    Useful,
    /// Useful over efficiency.
    Supplied,
}

impl Expr {
    /// Every expression in it, itself first; calls `see` for each.
    pub fn walk(&self, see: &mut impl FnMut(&Expr)) {
        see(self);
        match &self.node {
            Node::Negative(inner) | Node::PowerInteger(inner, _) => inner.walk(see),
            Node::Power(base, exponent) => {
                base.walk(see);
                exponent.walk(see);
            }
            Node::Sum(parts) | Node::Product(parts) => parts.iter().for_each(|(_, part)| part.walk(see)),
            Node::Call(_, arguments) => arguments.iter().for_each(|argument| argument.walk(see)),
            Node::Constant(_)
            | Node::Gauge(_)
            | Node::Variable
            | Node::Quantity(_)
            | Node::State(..)
            | Node::Step(..)
            | Node::Duty(..) => {}
        }
    }

    /// Whether a species' own value stands behind it, for messages.
    pub fn is_literal(&self) -> bool {
        matches!(self.node, Node::Constant(_) | Node::Gauge(_))
    }
}

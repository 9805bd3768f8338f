//! Named quantities: inputs, derived values and results.

use super::Expr;
use crate::span::Span;
use crate::units::Unit;

/// What a named quantity is to its reader.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Role {
    /// A design input.
    Basis,
    /// An input that a reviewer must agree to.
    Assume,
    /// A derived value.
    Let,
    /// An answer.
    Result,
}

impl Role {
    /// The statement word.
    pub fn as_str(self) -> &'static str {
        match self {
            Role::Basis => "basis",
            Role::Assume => "assume",
            Role::Let => "let",
            Role::Result => "result",
        }
    }

    /// Whether it is an input.
    pub fn is_input(self) -> bool {
        matches!(self, Role::Basis | Role::Assume)
    }
}

/// The distribution that an interval stands for (JCGM 100:2008, 4.3).
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum IntervalShape {
    /// All values within the limits alike.
    Rectangular,
    /// The middle likelier, none beyond the limits.
    Triangular,
    /// Normal, the half-width being this many standard uncertainties.
    Normal(f64),
}

/// An interval about a value.
#[derive(Debug, Clone, PartialEq)]
pub struct Interval {
    /// How far the limit above lies, in SI.
    pub above: f64,
    /// How far the limit below lies, in SI.
    pub below: f64,
    /// The distribution.
    pub shape: IntervalShape,
    /// As written.
    pub text: String,
}

impl Interval {
    /// The standard uncertainty in SI (JCGM 100:2008): of a rectangular interval of full width w, w/√12; of a
    /// triangular one with half-width a, a/√6; of an expanded one, U/k.
    pub fn standard_uncertainty(&self) -> f64 {
        let half = 0.5 * (self.above + self.below);
        match self.shape {
            IntervalShape::Rectangular => half / 3f64.sqrt(),
            IntervalShape::Triangular => half / 6f64.sqrt(),
            IntervalShape::Normal(k) => half / k,
        }
    }
}

/// A named quantity.
#[derive(Debug, Clone, PartialEq)]
pub struct Quantity {
    /// Its name.
    pub name: String,
    /// Where the name is declared.
    pub span: Span,
    /// What it is.
    pub role: Role,
    /// Its value.
    pub value: Expr,
    /// The value as written, of an input; the formula of a derived one.
    pub text: String,
    /// The unit it is shown in; of a value without an asked unit, chosen when shown.
    pub display: Option<Unit>,
    /// Its interval.
    pub interval: Option<Interval>,
    /// Where it comes from.
    pub source: Option<String>,
}

//! Constants: those with a name, and expressions that are one number.

use crate::program::{Expr, Node};
use crate::span::Span;
use crate::units::constants::{GAS_CONSTANT, STANDARD_GRAVITY, STEFAN_BOLTZMANN};
use crate::units::{Dimension, Kind};

/// A constant by name: `R`, `sigma` or `g_n`.
pub(super) fn named(name: &str, span: Span) -> Option<Expr> {
    let (value, dimension) = match name {
        "R" => (GAS_CONSTANT, Dimension::MOLAR_HEAT_CAPACITY),
        "g_n" => (STANDARD_GRAVITY, Dimension::ACCELERATION),
        "sigma" => {
            let per_fourth = Dimension::TEMPERATURE.power(4)?;
            (STEFAN_BOLTZMANN, Dimension::HEAT_FLUX_DENSITY.over(per_fourth)?)
        }
        _ => return None,
    };
    Some(Expr { span, dimension, kind: Kind::Plain, node: Node::Constant(value) })
}

/// The value of an expression of literals only, worked in the order in which it is evaluated.
pub(super) fn value_of(expr: &Expr) -> Option<f64> {
    match &expr.node {
        Node::Constant(value) => Some(*value),
        Node::Negative(inner) => value_of(inner).map(|value| -value),
        Node::Sum(terms) => terms.iter().try_fold(0.0, |sum, (taken_away, term)| {
            let term = value_of(term)?;
            Some(if *taken_away { sum - term } else { sum + term })
        }),
        Node::Product(factors) => factors.iter().try_fold(1.0, |product, (divides, factor)| {
            let factor = value_of(factor)?;
            Some(if *divides { product / factor } else { product * factor })
        }),
        _ => None,
    }
}

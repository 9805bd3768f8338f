//! Values with the unit to show them in.

use super::worked::WorkedSheet;
use crate::program::{Condition, Expr, Limit, Node, QuantityId};
use crate::report::model::{PressureBasis, Quantity};
use crate::units::{Dimension, Kind, Unit, engineering_unit, read_unit};

impl WorkedSheet<'_> {
    /// A value in a unit; without one, in the unit that an engineer would read it in.
    pub(super) fn shown(
        &self,
        si: f64,
        dimension: Dimension,
        unit: Option<&Unit>,
        difference: bool,
    ) -> Quantity {
        let unit = unit.cloned().unwrap_or_else(|| engineering_unit(dimension, si));
        let pressure = (dimension == Dimension::PRESSURE).then(|| pressure_basis(&unit, difference));
        Quantity { si, value: unit.from_si(si, self.atmosphere()), unit, pressure }
    }

    /// The value of an expression in the unit of what it names, or another.
    pub(super) fn expression_shown(&self, expr: &Expr, si: f64, unit: Option<&Unit>) -> Quantity {
        let own = match (&expr.node, unit) {
            (_, Some(unit)) => Some(unit.clone()),
            (Node::Quantity(id), None) => self.unit_of(*id),
            _ => None,
        };
        self.shown(si, expr.dimension, own.as_ref(), self.is_difference(expr))
    }

    /// Whether a pressure or temperature is a difference: known as one, or made by taking one from another, here or
    /// where its name is given its value.
    pub(super) fn is_difference(&self, expr: &Expr) -> bool {
        match (&expr.node, expr.kind) {
            (_, Kind::Difference) => true,
            (Node::Sum(terms), Kind::Open) => terms.iter().any(|(taken_away, _)| *taken_away),
            (Node::Quantity(id), Kind::Open) => {
                self.serves_as_difference(*id)
                    || self.program.quantities.get(id.0).is_some_and(|named| self.is_difference(&named.value))
            }
            _ => false,
        }
    }

    /// Whether an open quantity serves as a difference only: it stands in sums behind the first term, or in products,
    /// and nowhere alone.
    pub(super) fn serves_as_difference(&self, id: QuantityId) -> bool {
        let is_it = |expr: &Expr| expr.node == Node::Quantity(id);
        let (mut alone, mut inside) = (false, false);
        self.program.each_expression(&mut |expr| match &expr.node {
            Node::Sum(terms) => {
                alone |= terms.first().is_some_and(|(_, term)| is_it(term));
                inside |= terms.iter().skip(1).any(|(_, term)| is_it(term));
            }
            Node::Product(factors) => inside |= factors.iter().any(|(_, factor)| is_it(factor)),
            _ => {}
        });
        let program = self.program;
        alone |= program.quantities.iter().any(|quantity| is_it(&quantity.value));
        alone |= program
            .states
            .iter()
            .any(|state| matches!(&state.pressure, Condition::Value(expr) if is_it(expr)));
        alone |= program.requirements.iter().any(|requirement| {
            is_it(&requirement.value)
                || match &requirement.limit {
                    Limit::Compared(_, limit) => is_it(limit),
                    Limit::Within(low, high) => is_it(low) || is_it(high),
                }
        });
        inside && !alone
    }

    /// The unit in which a named quantity is shown.
    pub(super) fn unit_of(&self, id: QuantityId) -> Option<Unit> {
        self.program.quantities.get(id.0)?.display.clone()
    }
}

/// A unit of the table of units, by its text.
pub(super) fn unit(text: &str) -> Option<Unit> {
    read_unit(text).ok()
}

fn pressure_basis(unit: &Unit, difference: bool) -> PressureBasis {
    if unit.is_gauge() {
        PressureBasis::Gauge
    } else if difference {
        PressureBasis::Difference
    } else {
        PressureBasis::Absolute
    }
}

//! Values with the unit to show them in.

use super::worked::WorkedSheet;
use crate::program::{Expr, Node, QuantityId};
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
                self.program.quantities.get(id.0).is_some_and(|named| self.is_difference(&named.value))
            }
            _ => false,
        }
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

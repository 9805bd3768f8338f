//! Expressions and named quantities.

use super::builder::{Builder, Lowering};
use crate::plan::{Op, OriginKind, Slot};
use crate::program::{DutyMember, Expr, Function, Node, QuantityId, StepMember};

impl Builder<'_> {
    /// A named quantity; an input has a slot of its own, so that it can be varied.
    pub(super) fn quantity(&mut self, id: QuantityId) -> Lowering<Slot> {
        if let Some(slot) = self.quantities.get(&id.0) {
            return Ok(*slot);
        }
        let Some(quantity) = self.program.quantities.get(id.0) else { return Ok(self.constant(f64::NAN)) };
        let slot = match (&quantity.value.node, quantity.role.is_input()) {
            (Node::Constant(value), true) => self.input(*value),
            (Node::Gauge(value), true) => {
                // kept absolute; a change of the site is a change of the sheet
                let absolute = value + self.program.site.atmosphere;
                self.input(absolute)
            }
            _ => self.expr(&quantity.value)?,
        };
        self.quantities.insert(id.0, slot);
        Ok(slot)
    }

    pub(super) fn expr(&mut self, expr: &Expr) -> Lowering<Slot> {
        let before = self.from(expr.span, OriginKind::Expression);
        let slot = self.node(expr);
        self.back(before);
        slot
    }

    fn node(&mut self, expr: &Expr) -> Lowering<Slot> {
        let slot = self.value(expr)?;
        if matches!(expr.node, Node::State(..) | Node::Step(..)) {
            self.map.members.insert(expr.span, slot);
        }
        Ok(slot)
    }

    fn value(&mut self, expr: &Expr) -> Lowering<Slot> {
        match &expr.node {
            Node::Constant(value) => Ok(self.constant(*value)),
            Node::Gauge(value) => Ok(self.constant(value + self.program.site.atmosphere)),
            Node::Variable => Ok(self.constant(f64::NAN)),
            Node::Quantity(id) => self.quantity(*id),
            Node::State(id, member) => self.state_member(*id, member),
            Node::Step(id, member) => {
                let step = self.step(*id)?;
                Ok(match member {
                    StepMember::EnthalpyChange => step.enthalpy_change,
                    StepMember::InternalEnergyChange => step.internal_energy_change,
                    StepMember::VolumeChange => self.strict_volume_change(*id)?,
                    StepMember::Heat => step.heat.unwrap_or(step.enthalpy_change),
                    StepMember::Work => step.work.unwrap_or(step.enthalpy_change),
                    StepMember::Supply => step.supply.unwrap_or(step.enthalpy_change),
                    StepMember::Sensible => self.sensible(*id)?,
                    StepMember::Latent => self.latent(*id)?,
                    StepMember::Reaction => self.constant(0.0),
                })
            }
            Node::Duty(id, member) => {
                let duty = self.duty(*id)?;
                Ok(match member {
                    DutyMember::Useful => duty.useful,
                    DutyMember::Supplied => duty.supplied,
                })
            }
            Node::Negative(inner) => {
                let a = self.expr(inner)?;
                Ok(self.emit(|to| Op::Negate { a, to }))
            }
            Node::Sum(terms) => self.chain(terms, Builder::add, Builder::subtract),
            Node::Product(factors) => self.chain(factors, Builder::multiply, Builder::divide),
            Node::PowerInteger(base, exponent) => {
                let (a, exponent) = (self.expr(base)?, *exponent);
                Ok(self.emit(|to| Op::PowerInteger { a, exponent, to }))
            }
            Node::Power(base, exponent) => {
                let (a, b) = (self.expr(base)?, self.expr(exponent)?);
                Ok(self.emit(|to| Op::Power { a, b, to }))
            }
            Node::Call(function, arguments) => self.function(*function, arguments),
        }
    }

    /// A sum or a product from the left.
    fn chain(
        &mut self,
        parts: &[(bool, Expr)],
        forward: fn(&mut Self, Slot, Slot) -> Slot,
        backward: fn(&mut Self, Slot, Slot) -> Slot,
    ) -> Lowering<Slot> {
        let mut total = None;
        for (reversed, part) in parts {
            let origin = self.from(part.span, OriginKind::Expression);
            let slot = self.node(part)?;
            total = Some(match total {
                None => slot,
                Some(total) if *reversed => backward(self, total, slot),
                Some(total) => forward(self, total, slot),
            });
            self.back(origin);
        }
        Ok(total.unwrap_or_else(|| self.constant(f64::NAN)))
    }

    fn function(&mut self, function: Function, arguments: &[Expr]) -> Lowering<Slot> {
        let slots = arguments.iter().map(|argument| self.expr(argument)).collect::<Lowering<Vec<Slot>>>()?;
        let Some((&a, rest)) = slots.split_first() else { return Ok(self.constant(f64::NAN)) };
        Ok(match function {
            Function::Abs => self.emit(|to| Op::Absolute { a, to }),
            Function::Sqrt => self.emit(|to| Op::SquareRoot { a, to }),
            Function::Exp => self.emit(|to| Op::Exponential { a, to }),
            Function::Ln => self.emit(|to| Op::Logarithm { a, to }),
            Function::Log10 => self.emit(|to| Op::Logarithm10 { a, to }),
            Function::Min => rest.iter().fold(a, |a, &b| self.emit(|to| Op::Minimum { a, b, to })),
            Function::Max => rest.iter().fold(a, |a, &b| self.emit(|to| Op::Maximum { a, b, to })),
            Function::LogMean => rest.iter().fold(a, |a, &b| self.emit(|to| Op::LogMean { a, b, to })),
            Function::Mean => {
                let sum = self.total(&slots);
                #[allow(clippy::cast_precision_loss)] // a handful of arguments
                let count = self.constant(slots.len() as f64);
                self.divide(sum, count)
            }
        })
    }
}

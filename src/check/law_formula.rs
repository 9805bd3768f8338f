//! Formulas in `T`: to a sum of powers where they are one, else to compiled code.

use super::checker::Checker;
use super::constant::value_of;
use crate::diagnostic::{Code, Diagnostic};
use crate::numeric::{Formula, Op, math};
use crate::program::{Expr, Function, Node};
use crate::syntax::tree::Expression;

/// The most terms that a product of sums is multiplied out to.
const TERM_LIMIT: usize = 64;

impl Checker<'_> {
    /// An expression in which `T` is the temperature and every other word a number.
    pub(super) fn formula(&mut self, expression: &Expression) -> Option<Expr> {
        let before = std::mem::replace(&mut self.in_formula, true);
        let checked = self.expression(expression);
        self.in_formula = before;
        let checked = checked?;
        let mut named = None;
        checked.walk(&mut |part| {
            if matches!(part.node, Node::Quantity(_) | Node::State(..) | Node::Step(..) | Node::Duty(..)) {
                named = Some(part.span);
            }
        });
        let Some(span) = named else { return Some(checked) };
        let text = self.written(span);
        self.report(
            Diagnostic::new(Code::NotAQuantity, format!("`{text}` stands in a formula of a species"))
                .label(span, "data of a species are numbers, so that they can be defended")
                .help("write the number with its unit and its source"),
        );
        None
    }
}

/// The terms `(coefficient, exponent of T)` of a formula that is a sum of powers.
pub(super) fn as_powers(formula: &Expr) -> Option<Vec<(f64, f64)>> {
    match &formula.node {
        Node::Variable => Some(vec![(1.0, 1.0)]),
        Node::Negative(inner) => Some(as_powers(inner)?.into_iter().map(|(c, n)| (-c, n)).collect()),
        Node::Sum(parts) => {
            let mut terms = Vec::new();
            for (taken_away, part) in parts {
                for (coefficient, exponent) in as_powers(part)? {
                    add_term(&mut terms, if *taken_away { -coefficient } else { coefficient }, exponent);
                }
            }
            Some(terms)
        }
        Node::Product(parts) => parts.iter().try_fold(vec![(1.0, 0.0)], |product, (divides, part)| {
            let terms = as_powers(part)?;
            match (divides, terms.as_slice()) {
                (false, terms) => multiplied(&product, terms),
                (true, [(c, n)]) => Some(product.iter().map(|(a, m)| (a / c, m - n)).collect()),
                (true, _) => None,
            }
        }),
        Node::PowerInteger(base, exponent) => integer_power(&as_powers(base)?, *exponent),
        Node::Power(base, exponent) => match as_powers(base)?.as_slice() {
            [(c, n)] if *c > 0.0 => {
                let exponent = value_of(exponent)?;
                Some(vec![(math::pow(*c, exponent), n * exponent)])
            }
            _ => None,
        },
        Node::Call(Function::Sqrt, arguments) => match as_powers(arguments.first()?)?.as_slice() {
            [(c, n)] if *c > 0.0 => Some(vec![(math::sqrt(*c), 0.5 * n)]),
            _ => None,
        },
        _ => value_of(formula).map(|value| vec![(value, 0.0)]),
    }
}

fn add_term(terms: &mut Vec<(f64, f64)>, coefficient: f64, exponent: f64) {
    match terms.iter_mut().find(|(_, known)| *known == exponent) {
        Some((sum, _)) => *sum += coefficient,
        None => terms.push((coefficient, exponent)),
    }
}

fn multiplied(a: &[(f64, f64)], b: &[(f64, f64)]) -> Option<Vec<(f64, f64)>> {
    let mut terms = Vec::new();
    for (c, n) in a {
        for (d, m) in b {
            add_term(&mut terms, c * d, n + m);
        }
    }
    (terms.len() <= TERM_LIMIT).then_some(terms)
}

fn integer_power(base: &[(f64, f64)], exponent: i32) -> Option<Vec<(f64, f64)>> {
    match base {
        [(c, n)] => Some(vec![(math::powi(*c, exponent), n * f64::from(exponent))]),
        _ if (0..=8).contains(&exponent) => {
            (0..exponent).try_fold(vec![(1.0, 0.0)], |product, _| multiplied(&product, base))
        }
        _ => None,
    }
}

/// The formula as code for the numeric kernel.
pub(super) fn compiled(formula: &Expr) -> Option<Formula> {
    let mut code = Vec::new();
    emit(formula, &mut code)?;
    Formula::new(code).ok()
}

fn emit(formula: &Expr, code: &mut Vec<Op>) -> Option<()> {
    match &formula.node {
        Node::Constant(value) => code.push(Op::Const(*value)),
        Node::Variable => code.push(Op::Var),
        Node::Negative(inner) => {
            emit(inner, code)?;
            code.push(Op::Neg);
        }
        Node::Sum(parts) => emit_chain(parts, [Op::Add, Op::Sub], code)?,
        Node::Product(parts) => emit_chain(parts, [Op::Mul, Op::Div], code)?,
        Node::PowerInteger(base, exponent) => {
            emit(base, code)?;
            code.push(Op::PowI(*exponent));
        }
        Node::Power(base, exponent) => {
            emit(base, code)?;
            emit(exponent, code)?;
            code.push(Op::Pow);
        }
        Node::Call(function, arguments) => emit_call(*function, arguments, code)?,
        _ => return None,
    }
    Some(())
}

fn emit_chain(parts: &[(bool, Expr)], [forward, backward]: [Op; 2], code: &mut Vec<Op>) -> Option<()> {
    for (at, (reversed, part)) in parts.iter().enumerate() {
        emit(part, code)?;
        if at > 0 {
            code.push(if *reversed { backward } else { forward });
        }
    }
    Some(())
}

fn emit_call(function: Function, arguments: &[Expr], code: &mut Vec<Op>) -> Option<()> {
    let single = match function {
        Function::Abs => Op::Abs,
        Function::Sqrt => Op::Sqrt,
        Function::Exp => Op::Exp,
        Function::Ln => Op::Ln,
        Function::Log10 => Op::Log10,
        Function::Min | Function::Max | Function::Mean => {
            let both = match function {
                Function::Min => Op::Min,
                Function::Max => Op::Max,
                _ => Op::Add,
            };
            for (at, argument) in arguments.iter().enumerate() {
                emit(argument, code)?;
                if at > 0 {
                    code.push(both);
                }
            }
            if function == Function::Mean {
                #[allow(clippy::cast_precision_loss)] // a handful of arguments
                code.push(Op::Const(arguments.len() as f64));
                code.push(Op::Div);
            }
            return Some(());
        }
        Function::LogMean => return None,
    };
    emit(arguments.first()?, code)?;
    code.push(single);
    Some(())
}

//! A formula of one variable, compiled to postfix code: what a heat capacity or a density is worked from when
//! it is no sum of powers.

use super::math;

/// One instruction. Operands come from the top of the stack; the right operand was pushed last.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Op {
    /// Push a number.
    Const(f64),
    /// Push the variable.
    Var,
    /// Sum of two.
    Add,
    /// Left minus right.
    Sub,
    /// Product of two.
    Mul,
    /// Left over right.
    Div,
    /// Change of sign.
    Neg,
    /// Left to the power of right.
    Pow,
    /// Power with a whole exponent.
    PowI(i32),
    /// Square root.
    Sqrt,
    /// Exponential function.
    Exp,
    /// Natural logarithm.
    Ln,
    /// Decimal logarithm.
    Log10,
    /// Magnitude.
    Abs,
    /// The smaller of two.
    Min,
    /// The larger of two.
    Max,
}

/// Why a code is refused.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum FormulaError {
    /// The instruction at this place finds too few operands.
    TooFewOperands {
        /// Its place in the code.
        at: usize,
    },
    /// The code needs a deeper stack than [`Formula::DEPTH_LIMIT`].
    TooDeep {
        /// The place in the code where it overflows.
        at: usize,
    },
    /// The code leaves no value, or more than one.
    NotOneValue {
        /// How many values are left.
        left: usize,
    },
}

/// A checked formula. Evaluation never fails; out of a function's domain it gives `NaN` or an infinity.
#[derive(Debug, Clone, PartialEq)]
pub struct Formula {
    code: Box<[Op]>,
}

impl Formula {
    /// Deepest stack that a formula may need: 32 values.
    pub const DEPTH_LIMIT: usize = 32;

    /// Checks the code once, so that [`Formula::eval`] needs no checks.
    ///
    /// # Errors
    /// [`FormulaError`] when operands are missing, the stack would grow too deep, or not one value is left.
    pub fn new(code: Vec<Op>) -> Result<Formula, FormulaError> {
        let mut depth = 0_usize;
        for (at, op) in code.iter().enumerate() {
            let takes = operands(*op);
            if depth < takes {
                return Err(FormulaError::TooFewOperands { at });
            }
            depth = depth - takes + 1;
            if depth > Formula::DEPTH_LIMIT {
                return Err(FormulaError::TooDeep { at });
            }
        }
        if depth == 1 {
            Ok(Formula { code: code.into_boxed_slice() })
        } else {
            Err(FormulaError::NotOneValue { left: depth })
        }
    }

    /// The value at `x`.
    pub fn eval(&self, x: f64) -> f64 {
        let mut stack = Stack { values: [0.0; Formula::DEPTH_LIMIT], height: 0 };
        for op in &self.code {
            let value = match *op {
                Op::Const(value) => value,
                Op::Var => x,
                unary if operands(unary) == 1 => one_operand(unary, stack.pop()),
                binary => {
                    let right = stack.pop();
                    two_operands(binary, stack.pop(), right)
                }
            };
            stack.push(value);
        }
        stack.pop()
    }

    /// The instructions.
    pub fn code(&self) -> &[Op] {
        &self.code
    }
}

fn operands(op: Op) -> usize {
    match op {
        Op::Const(_) | Op::Var => 0,
        Op::Neg | Op::PowI(_) | Op::Sqrt | Op::Exp | Op::Ln | Op::Log10 | Op::Abs => 1,
        Op::Add | Op::Sub | Op::Mul | Op::Div | Op::Pow | Op::Min | Op::Max => 2,
    }
}

fn one_operand(op: Op, x: f64) -> f64 {
    match op {
        Op::Neg => -x,
        Op::PowI(exponent) => math::powi(x, exponent),
        Op::Sqrt => math::sqrt(x),
        Op::Exp => math::exp(x),
        Op::Ln => math::ln(x),
        Op::Log10 => math::log10(x),
        Op::Abs => x.abs(),
        _ => f64::NAN,
    }
}

fn two_operands(op: Op, left: f64, right: f64) -> f64 {
    match op {
        Op::Add => left + right,
        Op::Sub => left - right,
        Op::Mul => left * right,
        Op::Div => left / right,
        Op::Pow => math::pow(left, right),
        Op::Min if left.is_nan() || right.is_nan() => f64::NAN,
        Op::Min => left.min(right),
        Op::Max if left.is_nan() || right.is_nan() => f64::NAN,
        Op::Max => left.max(right),
        _ => f64::NAN,
    }
}

/// A stack of at most 32 values; the depth was checked when the formula was built, and the mask keeps every
/// access inside the array whatever happens.
struct Stack {
    values: [f64; Formula::DEPTH_LIMIT],
    height: usize,
}

impl Stack {
    const MASK: usize = Formula::DEPTH_LIMIT - 1;

    #[inline]
    fn push(&mut self, value: f64) {
        self.values[self.height & Self::MASK] = value;
        self.height = self.height.wrapping_add(1);
    }

    #[inline]
    fn pop(&mut self) -> f64 {
        self.height = self.height.wrapping_sub(1);
        self.values[self.height & Self::MASK]
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn evaluates_in_the_order_written() {
        // (x - 1) / 4 + 2^x at x = 3: 0.5 + 8.
        let code = vec![
            Op::Var,
            Op::Const(1.0),
            Op::Sub,
            Op::Const(4.0),
            Op::Div,
            Op::Const(2.0),
            Op::Var,
            Op::Pow,
            Op::Add,
        ];
        assert_eq!(Formula::new(code).unwrap().eval(3.0), 8.5);
        // sqrt(max(x, 2)^2) - |-min(x, 1)| at x = 5: 5 - 1.
        let code = vec![
            Op::Var,
            Op::Const(2.0),
            Op::Max,
            Op::PowI(2),
            Op::Sqrt,
            Op::Var,
            Op::Const(1.0),
            Op::Min,
            Op::Neg,
            Op::Abs,
            Op::Sub,
        ];
        assert_eq!(Formula::new(code).unwrap().eval(5.0), 4.0);
    }

    #[test]
    fn the_deepest_stack_works_and_one_more_is_refused() {
        let deep = |n: usize| {
            let mut code = vec![Op::Var; n];
            code.extend(vec![Op::Add; n - 1]);
            Formula::new(code)
        };
        assert_eq!(deep(32).unwrap().eval(2.0), 64.0);
        assert_eq!(deep(33), Err(FormulaError::TooDeep { at: 32 }));
    }

    #[test]
    fn broken_code_is_refused() {
        assert_eq!(Formula::new(vec![]), Err(FormulaError::NotOneValue { left: 0 }));
        assert_eq!(Formula::new(vec![Op::Var, Op::Var]), Err(FormulaError::NotOneValue { left: 2 }));
        assert_eq!(Formula::new(vec![Op::Var, Op::Add]), Err(FormulaError::TooFewOperands { at: 1 }));
    }

    #[test]
    fn a_number_that_is_none_is_not_hidden_by_min_and_max() {
        let code = vec![Op::Var, Op::Ln, Op::Const(0.0), Op::Max];
        assert!(Formula::new(code).unwrap().eval(-1.0).is_nan());
    }
}

//! Expressions: flat sums and products over literals, names and members.

use super::{Literal, SpeciesName, Word};
use crate::span::Span;

/// An expression at its place.
#[derive(Debug, Clone, PartialEq)]
pub struct Expression {
    /// What it is.
    pub kind: ExpressionKind,
    /// Its place.
    pub span: Span,
}

/// Whether a member of a product multiplies or divides.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Factor {
    /// It multiplies.
    Times,
    /// It divides.
    Over,
}

/// What stands in the parentheses of a member, such as `share(O2, dry)`.
#[derive(Debug, Clone, PartialEq)]
pub enum Subject {
    /// A species, and a word after it.
    Species(SpeciesName, Option<Word>),
    /// An expression, as in `dH(298.15 K)`.
    Value(Box<Expression>),
}

/// The kinds of expression.
#[derive(Debug, Clone, PartialEq)]
pub enum ExpressionKind {
    /// A number with or without unit.
    Literal(Literal),
    /// A name.
    Name(String),
    /// `name.member` or `name.member(subject)`.
    Member {
        /// The name before the dot.
        of: Word,
        /// The member.
        member: Word,
        /// What it is asked of.
        subject: Option<Subject>,
    },
    /// `M(Zn)`.
    MolarMass(SpeciesName),
    /// `min(a, b)`.
    Call {
        /// The function.
        function: Word,
        /// Its arguments.
        arguments: Vec<Expression>,
    },
    /// A leading minus.
    Negative(Box<Expression>),
    /// `base ^ exponent`.
    Power(Box<Expression>, Box<Expression>),
    /// `a + b - c`: each with whether it is taken away. The first is never taken away.
    Sum(Vec<(bool, Expression)>),
    /// `a * b / c`. The first always multiplies.
    Product(Vec<(Factor, Expression)>),
    /// Parentheses.
    Group(Box<Expression>),
}

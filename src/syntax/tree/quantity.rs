//! Numbers with units, as written.

use crate::span::Span;

/// A word at its place.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Word {
    /// The word.
    pub text: String,
    /// Its place.
    pub span: Span,
}

/// A quoted text at its place (the span takes in the quotes).
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Text {
    /// What stands between the quotes.
    pub text: String,
    /// Its place.
    pub span: Span,
}

/// A unit as written, not yet read.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct UnitText {
    /// The unit, such as `kJ/(kg K)`; it starts with `/` where a slash touches the number.
    pub text: String,
    /// Its place.
    pub span: Span,
}

/// A number, with its unit where one is written.
#[derive(Debug, Clone, PartialEq)]
pub struct Literal {
    /// The number; infinite where it is beyond a double.
    pub value: f64,
    /// The unit.
    pub unit: Option<UnitText>,
    /// Number and unit together.
    pub span: Span,
}

/// A literal with an optional minus, where a datum is wanted.
#[derive(Debug, Clone, PartialEq)]
pub struct Datum {
    /// Whether a minus stands before it.
    pub negative: bool,
    /// The literal.
    pub literal: Literal,
    /// All of it.
    pub span: Span,
}

/// How an interval is to be understood.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum IntervalMark {
    /// Nothing said, or `(rectangular)`: a tolerance.
    Rectangular,
    /// `(triangular)`.
    Triangular,
    /// `(std)`: a standard uncertainty.
    Standard,
    /// `(k=2)`: expanded, normal.
    Expanded(f64),
}

/// `± 2 %`, or `+0.1 -0.05 t/h`: the half-widths above and below.
#[derive(Debug, Clone, PartialEq)]
pub struct Interval {
    /// Above the value.
    pub above: Literal,
    /// Below the value.
    pub below: Literal,
    /// Whether `relative` is written.
    pub relative: bool,
    /// How it is meant; a word that is no mark is kept for the message.
    pub mark: Result<IntervalMark, Word>,
    /// All of it.
    pub span: Span,
}

/// `spread 0.8 % against "..."`.
#[derive(Debug, Clone, PartialEq)]
pub struct Spread {
    /// How far the second source lies.
    pub amount: Literal,
    /// The second source.
    pub against: Text,
}

/// What may follow an input or a datum, each at most once.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct Suffixes {
    /// The intervals written; more than one is refused.
    pub intervals: Vec<Interval>,
    /// The sources written; more than one is refused.
    pub sources: Vec<Text>,
    /// The spreads written.
    pub spreads: Vec<Spread>,
    /// Units asked for by `in UNIT`.
    pub displays: Vec<UnitText>,
}

impl Suffixes {
    /// The first source, which is the one used.
    pub fn source(&self) -> Option<&str> {
        self.sources.first().map(|source| source.text.as_str())
    }
}

//! Literals: numbers with units to values in SI.

use super::checker::Checker;
use super::unit::unit_error;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Expr, Node};
use crate::span::Span;
use crate::syntax::tree::{Datum, Expression, ExpressionKind, Factor, Literal, UnitText, Word};
use crate::units::{Dimension, Kind, Unit, UnitError, Zero, read_unit};

/// A literal that was read: its value in SI and its unit.
pub(super) struct Read {
    pub(super) si: f64,
    pub(super) unit: Unit,
}

impl Checker<'_> {
    /// A literal as an expression; `negative` where a minus belongs to a reading.
    pub(super) fn literal(&mut self, literal: &Literal, negative: bool, span: Span) -> Option<Expr> {
        let Some(text) = &literal.unit else {
            let value = if negative { -literal.value } else { literal.value };
            return Some(Expr {
                span,
                dimension: Dimension::ONE,
                kind: Kind::Plain,
                node: Node::Constant(value),
            });
        };
        match read_unit(&text.text) {
            Ok(unit) => {
                self.warn_of_name(literal, text);
                self.note_calorie(&unit, text.span);
                let value = if negative { -literal.value } else { literal.value };
                Some(constant(value, &unit, span))
            }
            Err(error) => self.not_a_unit(literal, text, &error, negative, span),
        }
    }

    /// Whether the words of a unit are names of the sheet, so that a product or a quotient was meant.
    fn not_a_unit(
        &mut self,
        literal: &Literal,
        text: &UnitText,
        error: &UnitError,
        negative: bool,
        span: Span,
    ) -> Option<Expr> {
        let word = match error {
            UnitError::Unknown { word, .. } => word,
            // a word that stands for several units, but for one value of this sheet
            UnitError::Ambiguous { word, .. } if self.is_name(word) => word,
            _ => {
                self.report(unit_error(error, text));
                return None;
            }
        };
        if let Some(quotient) = self.quotient_by_names(literal, text) {
            let value = self.expression(&quotient)?;
            return Some(if negative {
                Expr { span, node: Node::Negative(Box::new(value.clone())), ..value }
            } else {
                value
            });
        }
        if self.is_name(word) {
            let number = self.sources.slice(literal.span);
            let number = number
                .split(|c: char| c.is_whitespace() || c.is_alphabetic())
                .next()
                .unwrap_or_default()
                .to_owned();
            let help = match text.text.split_once('/') {
                Some((unit, _)) if unit != word && !unit.is_empty() => {
                    format!("write `{number} {unit} / {word}`")
                }
                _ => format!("write `{number} * {word}`"),
            };
            self.report(
                Diagnostic::new(Code::NumberBeforeName, format!("`{word}` is a name, not a unit"))
                    .label(text.span, "read as the unit of the number before it")
                    .help(help),
            );
        } else if !self.broken.contains(word) {
            self.report(unit_error(error, text));
        }
        None
    }

    /// `2/eff`: a slash that touches a number, before names that are no units, divides by them.
    fn quotient_by_names(&self, literal: &Literal, text: &UnitText) -> Option<Expression> {
        let names = text.text.strip_prefix('/')?;
        let mut at = text.span.start + 1;
        let number =
            Literal { unit: None, span: Span { end: text.span.start, ..literal.span }, ..literal.clone() };
        let mut factors =
            vec![(Factor::Times, Expression { span: number.span, kind: ExpressionKind::Literal(number) })];
        for name in names.split('/') {
            let end = at + u32::try_from(name.len()).ok()?;
            let span = Span { start: at, end, ..text.span };
            if !self.is_name(name) {
                return None;
            }
            factors.push((Factor::Over, Expression { span, kind: ExpressionKind::Name(name.to_owned()) }));
            at = end + 1;
        }
        Some(Expression { span: literal.span, kind: ExpressionKind::Product(factors) })
    }

    pub(super) fn is_name(&self, word: &str) -> bool {
        self.names.contains_key(word)
            || super::names::CONSTANTS.iter().any(|(name, _)| *name == word)
            || (self.in_formula && word == "T")
    }

    /// A word that is both is the unit, with a warning.
    fn warn_of_name(&mut self, literal: &Literal, text: &UnitText) {
        let words =
            text.text.split(|c: char| !(c.is_alphanumeric() || c == '_')).filter(|word| !word.is_empty());
        let Some(word) = words.into_iter().find(|word| self.names.contains_key(*word)) else { return };
        self.report(
            Diagnostic::new(Code::UnitAndName, format!("`{word}` is a unit and a name of this sheet"))
                .label(text.span, "read as the unit")
                .help(format!("if the value was meant, write `{} * {word}`", literal.value)),
        );
    }

    /// A literal where a datum is wanted: its value in SI and its unit.
    pub(super) fn datum_value(&mut self, datum: &Datum) -> Option<Read> {
        let unit = match &datum.literal.unit {
            Some(text) => self.unit(text)?,
            None => Unit::coherent(Dimension::ONE),
        };
        let value = if datum.negative { -datum.literal.value } else { datum.literal.value };
        Some(Read { si: unit.to_si(value, self.program.site.atmosphere), unit })
    }

    /// A datum of one dimension, in SI.
    pub(super) fn datum_of(&mut self, datum: &Datum, dimension: Dimension, what: &str) -> Option<f64> {
        let read = self.datum_value(datum)?;
        if read.unit.dimension != dimension {
            self.wrong_dimension(datum.span, read.unit.dimension, &[dimension], what);
            return None;
        }
        Some(read.si)
    }

    /// A temperature given as a datum, K; below absolute zero is refused.
    pub(super) fn datum_temperature(&mut self, datum: &Datum, what: &str) -> Option<f64> {
        let kelvin = self.datum_of(datum, Dimension::TEMPERATURE, what)?;
        if kelvin < 0.0 {
            self.report(
                Diagnostic::new(
                    Code::BelowAbsoluteZero,
                    format!("`{}` is below absolute zero", self.written(datum.span)),
                )
                .label(datum.span, what)
                .help("0 K is -273.15 degC, or -459.67 degF"),
            );
            return None;
        }
        Some(kelvin)
    }

    /// A name at its place, for messages.
    pub(super) fn word_of(&self, name: &str, span: Span) -> Word {
        Word { text: name.to_owned(), span }
    }
}

/// A value in a unit as a constant of the Program.
fn constant(value: f64, unit: &Unit, span: Span) -> Expr {
    let node = match unit.zero {
        Zero::Atmosphere => Node::Gauge(unit.to_si(value, 0.0)),
        Zero::None | Zero::Kelvin(_) => Node::Constant(unit.to_si(value, 0.0)),
    };
    Expr { span, dimension: unit.dimension, kind: unit.kind(), node }
}

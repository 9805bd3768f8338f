//! Literals, data, intervals and what follows a datum.

use super::builder::{Builder, parts};
use crate::diagnostic::{Code, Diagnostic};
use crate::syntax::grammar::Rule;
use crate::syntax::tree::{Datum, Interval, IntervalMark, Literal, Spread, Suffixes, UnitText};
use pest::iterators::Pair;

impl Builder<'_> {
    pub(super) fn literal(&mut self, pair: Pair<'_, Rule>) -> Option<Literal> {
        let span = self.span(&pair);
        let mut parts = parts(pair);
        let value = self.number(&parts.next()?);
        let unit = parts.next().map(|part| self.unit(&part));
        Some(Literal { value, unit, span })
    }

    /// A number; one beyond a double is reported and read as one.
    pub(super) fn number(&mut self, pair: &Pair<'_, Rule>) -> f64 {
        match pair.as_str().parse::<f64>() {
            Ok(value) if value.is_finite() && (value != 0.0 || is_zero(pair.as_str())) => value,
            Ok(0.0) => {
                self.diagnostics.push(
                    Diagnostic::new(Code::NumberTooLarge, "a number too small for a double")
                        .label(self.span(pair), "less than 4.9e-324")
                        .help("write it in a smaller unit"),
                );
                1.0
            }
            _ => {
                self.diagnostics.push(
                    Diagnostic::new(Code::NumberTooLarge, "a number beyond the range of a double")
                        .label(self.span(pair), "more than 1.8e308")
                        .help("write it in a larger unit"),
                );
                1.0
            }
        }
    }

    pub(super) fn unit(&self, pair: &Pair<'_, Rule>) -> UnitText {
        UnitText { text: pair.as_str().trim().to_owned(), span: self.span(pair) }
    }

    pub(super) fn datum(&mut self, pair: Pair<'_, Rule>) -> Option<Datum> {
        let span = self.span(&pair);
        let mut negative = false;
        let mut literal = None;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::minus => negative = true,
                _ => literal = self.literal(part),
            }
        }
        Some(Datum { negative, literal: literal?, span })
    }

    /// A coefficient's value; blanks in the numerator of its unit are products.
    pub(super) fn coefficient_datum(&mut self, pair: Pair<'_, Rule>) -> Option<Datum> {
        let mut datum = self.datum(pair)?;
        if let Some(unit) = &mut datum.literal.unit {
            let (numerator, rest) = unit.text.split_at(unit.text.find('/').unwrap_or(unit.text.len()));
            unit.text = format!("{}{rest}", numerator.split_whitespace().collect::<Vec<_>>().join("·"));
        }
        Some(datum)
    }

    /// `for A to B`, `over A to B`: two data.
    pub(super) fn range(&mut self, pair: Pair<'_, Rule>) -> Option<(Datum, Datum)> {
        let mut data = parts(pair);
        let low = self.datum(data.next()?)?;
        let high = self.datum(data.next()?)?;
        Some((low, high))
    }

    /// Takes a part into the suffixes if it is one.
    pub(super) fn suffix(&mut self, part: Pair<'_, Rule>, into: &mut Suffixes) {
        match part.as_rule() {
            Rule::interval => into.intervals.extend(self.interval(part)),
            Rule::source => into.sources.extend(self.first_text(part)),
            Rule::spread => into.spreads.extend(self.spread(part)),
            Rule::display => into.displays.extend(self.display(part)),
            _ => {}
        }
    }

    pub(super) fn display(&mut self, pair: Pair<'_, Rule>) -> Option<UnitText> {
        parts(pair).next().map(|part| self.unit(&part))
    }

    fn spread(&mut self, pair: Pair<'_, Rule>) -> Option<Spread> {
        let mut parts = parts(pair);
        let amount = self.literal(parts.next()?)?;
        let against = self.text(&parts.next()?);
        Some(Spread { amount, against })
    }

    pub(super) fn interval(&mut self, pair: Pair<'_, Rule>) -> Option<Interval> {
        let span = self.span(&pair);
        let mut relative = false;
        let mut sides = Vec::new();
        let mut mark = Ok(IntervalMark::Rectangular);
        for part in parts(pair) {
            match part.as_rule() {
                Rule::symmetric | Rule::sided => {
                    for inner in parts(part) {
                        match inner.as_rule() {
                            Rule::literal => sides.extend(self.literal(inner)),
                            Rule::relative => relative = true,
                            _ => {}
                        }
                    }
                }
                Rule::mark => mark = self.mark(part),
                _ => {}
            }
        }
        let below = sides.pop()?;
        let mut above = sides.pop().unwrap_or_else(|| below.clone());
        above.unit = above.unit.or_else(|| below.unit.clone());
        Some(Interval { above, below, relative, mark, span })
    }

    fn mark(&mut self, pair: Pair<'_, Rule>) -> Result<IntervalMark, crate::syntax::tree::Word> {
        let whole = self.word(&pair);
        let Some(inner) = parts(pair).next() else { return Err(whole) };
        if inner.as_rule() == Rule::coverage {
            return match parts(inner).next() {
                Some(number) => Ok(IntervalMark::Expanded(self.number(&number))),
                None => Err(whole),
            };
        }
        match inner.as_str() {
            "std" => Ok(IntervalMark::Standard),
            "triangular" => Ok(IntervalMark::Triangular),
            "rectangular" => Ok(IntervalMark::Rectangular),
            _ => Err(self.word(&inner)),
        }
    }
}

/// Whether every digit before the exponent is a zero.
fn is_zero(number: &str) -> bool {
    number.split(['e', 'E']).next().unwrap_or_default().chars().all(|c| matches!(c, '0' | '.'))
}

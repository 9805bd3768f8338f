//! Expressions.

use super::builder::{Builder, parts};
use crate::syntax::grammar::Rule;
use crate::syntax::tree::{Expression, ExpressionKind, Factor, Subject, Word};
use pest::iterators::Pair;

impl Builder<'_> {
    pub(super) fn expression(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        let span = self.span(&pair);
        let mut terms = Vec::new();
        let mut taken_away = false;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::plus => taken_away = false,
                Rule::minus => taken_away = true,
                _ => terms.push((taken_away, self.product(part)?)),
            }
        }
        if terms.len() == 1 {
            return terms.pop().map(|(_, term)| term);
        }
        Some(Expression { kind: ExpressionKind::Sum(terms), span })
    }

    pub(super) fn product(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        let span = self.span(&pair);
        let mut factors = Vec::new();
        let mut sign = Factor::Times;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::times => sign = Factor::Times,
                Rule::over => sign = Factor::Over,
                _ => factors.push((sign, self.factor(part)?)),
            }
        }
        if factors.len() == 1 {
            return factors.pop().map(|(_, factor)| factor);
        }
        Some(Expression { kind: ExpressionKind::Product(factors), span })
    }

    /// A factor: `-a ^ -b` is `-(a ^ (-b))`.
    fn factor(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        let span = self.span(&pair);
        let (mut negative, mut negative_exponent, mut raised) = (false, false, false);
        let mut base = None;
        let mut exponent = None;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::minus if raised => negative_exponent = true,
                Rule::minus => negative = true,
                Rule::hat => raised = true,
                _ if raised => exponent = Some(self.primary(part)?),
                _ => base = Some(self.primary(part)?),
            }
        }
        let mut value = base?;
        if let Some(exponent) = exponent {
            let exponent = if negative_exponent { negated(exponent) } else { exponent };
            let span = value.span.to(exponent.span);
            value = Expression { kind: ExpressionKind::Power(Box::new(value), Box::new(exponent)), span };
        }
        Some(if negative {
            Expression { kind: ExpressionKind::Negative(Box::new(value)), span }
        } else {
            value
        })
    }

    fn primary(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        let span = self.span(&pair);
        let kind = match pair.as_rule() {
            Rule::literal => ExpressionKind::Literal(self.literal(pair)?),
            Rule::group => ExpressionKind::Group(Box::new(self.expression(parts(pair).next()?)?)),
            Rule::molar => ExpressionKind::MolarMass(self.species_name(parts(pair).next()?)?),
            Rule::call => self.call(pair)?,
            _ => self.path(pair)?,
        };
        Some(Expression { kind, span })
    }

    fn call(&mut self, pair: Pair<'_, Rule>) -> Option<ExpressionKind> {
        let mut inner = parts(pair);
        let function = self.word(&inner.next()?);
        let arguments = parts(inner.next()?).map(|part| self.expression(part)).collect::<Option<Vec<_>>>()?;
        Some(ExpressionKind::Call { function, arguments })
    }

    fn path(&mut self, pair: Pair<'_, Rule>) -> Option<ExpressionKind> {
        let mut inner = parts(pair);
        let of = self.word(&inner.next()?);
        let Some(member) = inner.next() else { return Some(ExpressionKind::Name(of.text)) };
        let mut inner = parts(member);
        let member = self.member_name(&inner.next()?);
        let subject = match inner.next() {
            None => None,
            Some(part) if part.as_rule() == Rule::expr => {
                Some(Subject::Value(Box::new(self.expression(part)?)))
            }
            Some(part) => {
                let mut inner = parts(part);
                let species = self.species_name(inner.next()?)?;
                Some(Subject::Species(species, inner.next().map(|word| self.word(&word))))
            }
        };
        Some(ExpressionKind::Member { of, member, subject })
    }

    /// Both deltas and the ASCII spelling are one name.
    fn member_name(&self, pair: &Pair<'_, Rule>) -> Word {
        let mut word = self.word(pair);
        word.text = word.text.replace(['Δ', '∆'], "d");
        word
    }
}

fn negated(value: Expression) -> Expression {
    let span = value.span;
    Expression { kind: ExpressionKind::Negative(Box::new(value)), span }
}

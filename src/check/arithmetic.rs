//! Sums and products.

use super::checker::Checker;
use super::wanted::{mass_against_amount, with_dimension};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Expr, Node, StateMember};
use crate::span::Span;
use crate::syntax::tree::{Expression, ExpressionKind, Factor};
use crate::units::{self, Dimension, Kind, KindClash};

/// The kind of a term in a sum. The temperature of a state is open, but what is less by it is a difference: `out.T -
/// bath.T in degC` would show a rise as a reading.
fn taken(so_far: Kind, term: &Expr) -> Kind {
    match term.node {
        Node::State(_, StateMember::Temperature) if so_far != Kind::Difference => Kind::Point,
        _ => term.kind,
    }
}

impl Checker<'_> {
    pub(super) fn sum(&mut self, terms: &[(bool, Expression)], span: Span) -> Option<Expr> {
        let checked: Vec<(bool, Option<Expr>)> =
            terms.iter().map(|(taken_away, term)| (*taken_away, self.expression(term))).collect();
        let terms: Vec<(bool, Expr)> =
            checked.into_iter().map(|(taken_away, term)| Some((taken_away, term?))).collect::<Option<_>>()?;
        let (_, first) = terms.first()?;
        let dimension = first.dimension;
        let mut kind = first.kind;
        let mut so_far = first.span;
        for (taken_away, term) in &terms[1..] {
            if term.dimension != dimension {
                self.unlike_sum(first, term, *taken_away);
                return None;
            }
            let together = if *taken_away {
                units::difference(dimension, kind, taken(kind, term))
            } else {
                units::sum(dimension, kind, term.kind)
            };
            match together {
                Ok(next) => kind = next,
                Err(clash) => {
                    self.readings_clash(so_far, term, dimension, clash);
                    return None;
                }
            }
            so_far = so_far.to(term.span);
        }
        Some(Expr { span, dimension, kind, node: Node::Sum(terms) })
    }

    fn unlike_sum(&mut self, first: &Expr, other: &Expr, taken_away: bool) {
        let verb = if taken_away { "subtracted from" } else { "added to" };
        let (a, b) = (with_dimension(first.dimension), with_dimension(other.dimension));
        let molar = mass_against_amount(first.dimension, other.dimension);
        let code = if molar { Code::MassAgainstAmount } else { Code::UnlikeSum };
        let help = if molar {
            "multiply or divide by a molar mass, such as `M(Zn)`".to_owned()
        } else {
            self.sum_help(first, other)
        };
        self.report(
            Diagnostic::new(code, format!("{b} is {verb} {a}"))
                .label(other.span, format!("{b} here"))
                .label(first.span, format!("{a} here"))
                .help(help),
        );
    }

    /// Power against energy is the slip seen most: a time is missing.
    fn sum_help(&self, first: &Expr, other: &Expr) -> String {
        let (a, b) = (self.written(first.span), self.written(other.span));
        match (first.dimension, other.dimension) {
            (Dimension::ENERGY, Dimension::POWER) => format!("a time makes it an energy: `{b} * 1 h`"),
            (Dimension::POWER, Dimension::ENERGY) => format!("over a time it is a power: `{b} / 1 h`"),
            _ => format!("`{a}` and `{b}` need one dimension: check the factors of each"),
        }
    }

    fn readings_clash(&mut self, left: Span, term: &Expr, dimension: Dimension, clash: KindClash) {
        let (a, b) = (self.written(left), self.written(term.span));
        let gauge = dimension == Dimension::PRESSURE;
        let sort = if gauge { "gauge readings" } else { "temperatures" };
        let number = b.split_whitespace().next().unwrap_or_default();
        let found = match clash {
            KindClash::ReadingsAdded => {
                let code = if gauge { Code::GaugesAdded } else { Code::PointsAdded };
                let difference = if gauge { "bar" } else { "K" };
                let way_out = if term.is_literal() {
                    format!(
                        "write `{a} + {number} {difference}` for a difference, `mean({a}, {b})` for their mean"
                    )
                } else {
                    format!("`mean({a}, {b})` is their mean; a difference is written in {difference}")
                };
                Diagnostic::new(code, format!("two {sort} are added: `{a}` and `{b}`"))
                    .label(term.span, "a reading added to another here")
                    .label(left, "a reading here")
                    .help(way_out)
            }
            KindClash::ReadingFromDifference | KindClash::ReadingAgainstDifference => {
                let code = if gauge { Code::GaugeForDifference } else { Code::PointForDifference };
                Diagnostic::new(code, format!("a reading, `{b}`, is subtracted from a difference"))
                    .label(term.span, "a reading here")
                    .label(left, "a difference here")
                    .help(format!("write the difference in {}", if gauge { "bar" } else { "K" }))
            }
        };
        self.report(found);
    }

    pub(super) fn product(&mut self, factors: &[(Factor, Expression)], span: Span) -> Option<Expr> {
        self.warn_of_fraction(factors);
        let checked: Vec<(bool, Option<Expr>)> =
            factors.iter().map(|(sign, factor)| (*sign == Factor::Over, self.expression(factor))).collect();
        let factors: Vec<(bool, Expr)> =
            checked.into_iter().map(|(divides, factor)| Some((divides, factor?))).collect::<Option<_>>()?;
        let readings: Vec<&Expr> = factors.iter().map(|(_, f)| f).filter(|f| f.kind == Kind::Point).collect();
        if !readings.is_empty() {
            for reading in readings {
                self.reading_in_product(reading, "multiplied or divided");
            }
            return None;
        }
        let mut dimension = Dimension::ONE;
        for (divides, factor) in &factors {
            let next =
                if *divides { dimension.over(factor.dimension) } else { dimension.times(factor.dimension) };
            let Some(next) = next else {
                self.bad_dimension(span);
                return None;
            };
            dimension = next;
        }
        let kind = product_kind(&factors, dimension);
        Some(Expr { span, dimension, kind, node: Node::Product(factors) })
    }

    /// A reading in a product: its number depends on where its scale has its zero.
    pub(super) fn reading_in_product(&mut self, reading: &Expr, how: &str) {
        let text = self.written(reading.span);
        let number = text.split_whitespace().next().unwrap_or_default();
        let found = if reading.dimension == Dimension::PRESSURE {
            Diagnostic::new(Code::GaugeInProduct, format!("the gauge reading `{text}` is {how}")).help(
                if reading.is_literal() {
                    format!("write `{number} bar` for a difference, or `let p = {text} in bar` for the absolute pressure")
                } else {
                    format!("`let p = {text} in bar` makes it an absolute pressure that may enter a product")
                },
            )
        } else {
            Diagnostic::new(Code::PointInProduct, format!("the temperature `{text}` is {how}")).help(
                if reading.is_literal() {
                    format!("write `{number} K` for a difference, or `let T_abs = {text} in K` for the thermodynamic temperature")
                } else {
                    format!("`let T_abs = {text} in K` makes it a thermodynamic temperature that may enter a product")
                },
            )
        };
        self.report(found.label(reading.span, "a reading on a scale with its own zero"));
    }

    /// `1/2 kg` is 1/(2 kg).
    fn warn_of_fraction(&mut self, factors: &[(Factor, Expression)]) {
        for pair in factors.windows(2) {
            let [(_, top), (Factor::Over, bottom)] = pair else { continue };
            let (ExpressionKind::Literal(top), ExpressionKind::Literal(bottom)) = (&top.kind, &bottom.kind)
            else {
                continue;
            };
            let Some(unit) = bottom.unit.as_ref().filter(|_| top.unit.is_none()) else { continue };
            let between = Span { start: top.span.end, end: bottom.span.start, ..top.span };
            if unit.text == "%" && self.sources.slice(between).contains(char::is_whitespace) {
                continue; // `2 / 20.95 %` is set apart as a quotient
            }
            let text = self.written(top.span.to(bottom.span));
            self.report(
                Diagnostic::new(
                    Code::FractionOfUnit,
                    format!("`{text}` is {}/({} {})", top.value, bottom.value, unit.text),
                )
                .label(top.span.to(bottom.span), "the unit belongs to the number before it")
                .help(format!(
                    "write `{} {}` if the fraction was meant",
                    top.value / bottom.value,
                    unit.text
                )),
            );
        }
    }
}

/// A difference times pure numbers is a difference; otherwise a temperature or pressure that comes of a product is
/// open.
fn product_kind(factors: &[(bool, Expr)], dimension: Dimension) -> Kind {
    let mut with_dimension = factors.iter().filter(|(_, factor)| !factor.dimension.is_one());
    match (with_dimension.next(), with_dimension.next()) {
        (Some((false, only)), None) => only.kind,
        _ => Kind::unsaid(dimension),
    }
}

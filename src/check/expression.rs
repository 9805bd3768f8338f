//! Expressions: each node's dimension and kind.

use super::checker::{Checker, Entity};
use super::constant;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Expr, Node};
use crate::span::Span;
use crate::syntax::tree::{Expression, ExpressionKind};
use crate::units::{Dimension, Kind, Zero, read_unit};

impl Checker<'_> {
    /// Checks an expression; `None` where something was reported.
    pub(super) fn expression(&mut self, expression: &Expression) -> Option<Expr> {
        let span = expression.span;
        match &expression.kind {
            ExpressionKind::Literal(literal) => self.literal(literal, false, span),
            ExpressionKind::Name(name) => self.name(name, span),
            ExpressionKind::Member { of, member, subject } => self.member(of, member, subject.as_ref(), span),
            ExpressionKind::MolarMass(species) => self.molar_mass(species, span),
            ExpressionKind::Call { function, arguments } => self.call(function, arguments, span),
            ExpressionKind::Negative(inner) => self.negative(inner, span),
            ExpressionKind::Power(base, exponent) => self.power(base, exponent, span),
            ExpressionKind::Sum(terms) => self.sum(terms, span),
            ExpressionKind::Product(factors) => self.product(factors, span),
            ExpressionKind::Group(inner) => self.expression(inner),
        }
    }

    fn name(&mut self, name: &str, span: Span) -> Option<Expr> {
        if self.in_formula && name == "T" {
            return Some(Expr {
                span,
                dimension: Dimension::TEMPERATURE,
                kind: Kind::Open,
                node: Node::Variable,
            });
        }
        if !self.names.contains_key(name)
            && let Some(constant) = constant::named(name, span)
        {
            return Some(constant);
        }
        match self.look_up(name, span)? {
            Entity::Quantity(id) => {
                let quantity = self.program.quantities.get(id.0)?;
                let (dimension, kind) = (quantity.value.dimension, self.shown_kind(id));
                Some(Expr { span, dimension, kind, node: Node::Quantity(id) })
            }
            other => {
                let word = self.word_of(name, span);
                self.report_sort(&word, other, "a value");
                None
            }
        }
    }

    /// `-x`: before a reading the minus belongs to the literal.
    fn negative(&mut self, inner: &Expression, span: Span) -> Option<Expr> {
        if let ExpressionKind::Literal(literal) = &inner.kind
            && literal
                .unit
                .as_ref()
                .is_some_and(|unit| read_unit(&unit.text).is_ok_and(|unit| unit.zero != Zero::None))
        {
            return self.literal(literal, true, span);
        }
        let value = self.expression(inner)?;
        if value.kind == Kind::Point {
            self.reading_in_product(&value, "taken negative");
            return None;
        }
        Some(Expr {
            span,
            dimension: value.dimension,
            kind: value.kind,
            node: Node::Negative(Box::new(value)),
        })
    }

    /// A power: a whole exponent for a quantity, any for a pure number.
    fn power(&mut self, base: &Expression, exponent: &Expression, span: Span) -> Option<Expr> {
        let (base, exponent) = (self.expression(base), self.expression(exponent));
        let (base, exponent) = (base?, exponent?);
        if base.kind == Kind::Point {
            self.reading_in_product(&base, "raised to a power");
            return None;
        }
        if exponent.dimension != Dimension::ONE {
            self.bad_exponent(exponent.span, "an exponent is a pure number");
            return None;
        }
        let known = constant::value_of(&exponent);
        if let Some(whole) = known.filter(|value| value.fract() == 0.0 && value.abs() < f64::from(i32::MAX)) {
            #[allow(clippy::cast_possible_truncation)] // whole and in range, as just tested
            let whole = whole as i32;
            let Some(dimension) = base.dimension.power(whole) else {
                self.bad_dimension(span);
                return None;
            };
            let kind = Kind::unsaid(dimension);
            return Some(Expr { span, dimension, kind, node: Node::PowerInteger(Box::new(base), whole) });
        }
        let dimension =
            if base.dimension.is_one() { Some(Dimension::ONE) } else { rooted(base.dimension, known) };
        let Some(dimension) = dimension else {
            self.bad_exponent(
                exponent.span,
                "a quantity with a dimension takes a whole exponent that is written out",
            );
            return None;
        };
        let node = Node::Power(Box::new(base), Box::new(exponent));
        Some(Expr { span, dimension, kind: Kind::unsaid(dimension), node })
    }

    fn bad_exponent(&mut self, span: Span, label: &str) {
        let text = self.written(span);
        self.report(
            Diagnostic::new(Code::BadExponent, format!("`{text}` cannot be an exponent here"))
                .label(span, label)
                .help("divide the base by its unit first: `(x / (1 kg)) ^ 0.7`"),
        );
    }

    pub(super) fn bad_dimension(&mut self, span: Span) {
        self.report(
            Diagnostic::new(Code::DimensionOverflow, "a dimension beyond all bounds")
                .label(span, "the powers of the base units exceed 127 here")
                .help("check the exponents"),
        );
    }
}

/// The dimension to a power of a half, a third or another simple fraction.
fn rooted(dimension: Dimension, exponent: Option<f64>) -> Option<Dimension> {
    let exponent = exponent?;
    (2..=6).find_map(|n| {
        let numerator = exponent * f64::from(n);
        #[allow(clippy::cast_possible_truncation)] // whole and small, as tested
        let whole = (numerator.fract() == 0.0 && numerator.abs() < 100.0).then_some(numerator as i32)?;
        dimension.power(whole)?.root(n)
    })
}

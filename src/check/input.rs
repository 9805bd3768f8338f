//! Inputs, derived values and the site.

use super::checker::{Checker, Entity};
use super::datum::About;
use super::names::declared_twice;
use super::wanted::with_dimension;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Entry, Expr, Node, Quantity, QuantityId, Role, StateMember};
use crate::span::Span;
use crate::syntax::tree::{
    Datum, Expression, ExpressionKind, Input, InputRole, InputValue, Suffixes, UnitText, Word,
};
use crate::units::{Dimension, Kind, Unit, Zero, read_unit};

impl Checker<'_> {
    pub(super) fn input(&mut self, input: &Input) {
        let role = match input.role {
            InputRole::Basis => Role::Basis,
            InputRole::Assume => Role::Assume,
            InputRole::Let => Role::Let,
        };
        let quantity = match &input.value {
            InputValue::Unknown(place) => {
                self.unknown_value(role, &input.name, *place);
                None
            }
            InputValue::Expression(expression) => self.input_quantity(role, input, expression),
        };
        let entity = match quantity {
            Some(quantity) => self.push_quantity(quantity),
            None => Entity::Broken,
        };
        self.declare(&input.name, entity);
    }

    pub(super) fn push_quantity(&mut self, quantity: Quantity) -> Entity {
        let id = self.next_quantity();
        self.program.quantities.push(quantity);
        self.program.order.push(Entry::Quantity(id));
        Entity::Quantity(id)
    }

    fn unknown_value(&mut self, role: Role, name: &Word, place: Span) {
        if role == Role::Let {
            self.open_values.push(name.clone());
            return;
        }
        self.report(
            Diagnostic::new(Code::Unreadable, format!("the value of `{}` is not given", name.text))
                .label(place, format!("a `{}` is known", role.as_str()))
                .help(format!("write `let {} = ?` for an unknown", name.text)),
        );
    }

    fn input_quantity(&mut self, role: Role, input: &Input, expression: &Expression) -> Option<Quantity> {
        if role.is_input() && !is_literal(expression) {
            self.expression(expression);
            self.report(
                Diagnostic::new(
                    Code::Unreadable,
                    format!("a `{}` takes one number with its unit", role.as_str()),
                )
                .label(expression.span, "an expression here")
                .help(format!(
                    "write `let {} = {}`",
                    input.name.text,
                    self.written(expression.span)
                )),
            );
            return None;
        }
        let value = self.expression(expression)?;
        let display = self.display(input.suffixes.displays.first(), &value);
        let about = About {
            dimension: value.dimension,
            kind: value.kind,
            si: super::constant::value_of(&value).unwrap_or(0.0),
            percent: written_unit(expression).is_some_and(|unit| unit.is_percent()),
            span: value.span,
        };
        let interval = if role == Role::Let && !input.suffixes.intervals.is_empty() {
            self.interval_of_derived(&input.suffixes);
            None
        } else {
            self.interval(&input.suffixes, about)
        };
        Some(Quantity {
            name: input.name.text.clone(),
            span: input.name.span,
            role,
            text: self.written(expression.span),
            display: match display {
                Some(display) => Some(display?),
                None => written_unit(expression),
            },
            value,
            interval,
            source: input.suffixes.source().map(str::to_owned),
        })
    }

    fn interval_of_derived(&mut self, suffixes: &Suffixes) {
        let Some(interval) = suffixes.intervals.first() else { return };
        self.report(
            Diagnostic::new(Code::BadInterval, "an interval for a derived value")
                .label(interval.span, "it follows from the intervals of what the value is made of")
                .help("give the interval to the inputs, with `basis` or `assume`"),
        );
    }

    /// The unit asked for: `None` where none is, `Some(None)` where it was refused.
    #[allow(clippy::option_option)] // the three cases are what the caller has to tell apart
    pub(super) fn display(&mut self, text: Option<&UnitText>, value: &Expr) -> Option<Option<Unit>> {
        let text = text?;
        let Some(unit) = self.unit(text) else { return Some(None) };
        if unit.dimension != value.dimension {
            let (found, wanted) = (with_dimension(value.dimension), with_dimension(unit.dimension));
            let example = crate::units::engineering_unit(value.dimension, 1.0).text;
            self.report(
                Diagnostic::new(
                    Code::WrongDisplayUnit,
                    format!("{found} cannot be shown in `{}`, {wanted}", unit.text),
                )
                .label(text.span, format!("the value is {found}"))
                .help(format!("write `in {example}`, or correct the formula")),
            );
            return Some(None);
        }
        if unit.zero != Zero::None && (value.kind == Kind::Difference || is_pressure_drop(value)) {
            let plain = if unit.is_gauge() { "bar" } else { "K" };
            self.report(
                Diagnostic::new(
                    Code::DifferenceForPoint,
                    format!("a difference cannot be shown in `{}`", unit.text),
                )
                .label(text.span, "a scale with its own zero")
                .help(format!("write `in {plain}`")),
            );
            return Some(None);
        }
        Some(Some(unit))
    }

    /// The kind of a named quantity, as the unit that it is shown in makes it.
    pub(super) fn shown_kind(&self, id: QuantityId) -> Kind {
        let Some(quantity) = self.program.quantities.get(id.0) else { return Kind::Plain };
        match (quantity.value.kind, &quantity.display) {
            (Kind::Point, Some(unit)) if unit.zero == Zero::None => Kind::Open,
            (Kind::Open, Some(unit)) if unit.zero != Zero::None => Kind::Point,
            (kind, _) => kind,
        }
    }

    pub(super) fn site(&mut self, datum: &Datum, suffixes: &Suffixes, span: Span) {
        if let Some(first) = self.site_seen.replace(span) {
            let word = self.word_of("site atmosphere", span);
            self.report(declared_twice(&word, first).help("keep one `site atmosphere` line"));
            return;
        }
        let Some(read) = self.datum_value(datum) else { return };
        if read.unit.dimension != Dimension::PRESSURE {
            self.wrong_dimension(
                datum.span,
                read.unit.dimension,
                &[Dimension::PRESSURE],
                "the site's atmosphere",
            );
            return;
        }
        if read.unit.is_gauge() {
            let text = self.written(datum.span);
            self.report(
                Diagnostic::new(
                    Code::GaugeForDifference,
                    format!("the site's atmosphere as a gauge reading, `{text}`"),
                )
                .label(datum.span, "gauge readings count from the atmosphere")
                .help("give it absolute, such as `1005 mbar`"),
            );
            return;
        }
        if read.si <= 0.0 {
            self.report(
                Diagnostic::new(Code::PressureNotPositive, "an atmosphere without pressure")
                    .label(datum.span, "not positive")
                    .help("write such as `site atmosphere 1005 mbar`"),
            );
            return;
        }
        let about = About {
            dimension: Dimension::PRESSURE,
            kind: Kind::Open,
            si: read.si,
            percent: false,
            span: datum.span,
        };
        let interval = self.interval(suffixes, about);
        let text = Some(self.written(datum.span));
        let source = suffixes.source().map(str::to_owned);
        self.program.site =
            crate::program::Site { atmosphere: read.si, text, unit: Some(read.unit), source, interval };
        self.program.order.push(Entry::Site);
    }
}

fn is_literal(expression: &Expression) -> bool {
    match &expression.kind {
        ExpressionKind::Literal(_) => true,
        ExpressionKind::Negative(inner) => matches!(inner.kind, ExpressionKind::Literal(_)),
        _ => false,
    }
}

/// What is less by the pressure of a state serves as a pressure, a partial one, but is no reading of a gauge.
fn is_pressure_drop(value: &Expr) -> bool {
    let of_state = |term: &Expr| matches!(term.node, Node::State(_, StateMember::Pressure));
    match &value.node {
        Node::Sum(terms) => {
            value.kind == Kind::Open && terms.iter().any(|(taken, term)| *taken && of_state(term))
        }
        _ => false,
    }
}

/// The unit of a literal, with or without a minus.
pub(super) fn written_unit(expression: &Expression) -> Option<Unit> {
    match &expression.kind {
        ExpressionKind::Literal(literal) => read_unit(&literal.unit.as_ref()?.text).ok(),
        ExpressionKind::Negative(inner) => written_unit(inner),
        _ => None,
    }
}

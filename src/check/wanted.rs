//! Places that want a quantity of one dimension and kind.

use super::checker::Checker;
use crate::diagnostic::{Code, Diagnostic, or_list};
use crate::program::{Expr, Node};
use crate::span::Span;
use crate::syntax::tree::Expression;
use crate::units::{Dimension, Kind};

impl Checker<'_> {
    /// An expression of one of these dimensions; `what` says what the place wants, such as "a time".
    pub(super) fn wanted(
        &mut self,
        expression: &Expression,
        dimensions: &[Dimension],
        what: &str,
    ) -> Option<Expr> {
        let value = self.expression(expression)?;
        if dimensions.contains(&value.dimension) {
            return Some(value);
        }
        self.wrong_dimension(value.span, value.dimension, dimensions, what);
        None
    }

    /// A temperature or a pressure as a point: a difference is refused.
    pub(super) fn point(&mut self, value: &Expr, what: &str) -> Option<()> {
        if value.kind != Kind::Difference {
            return Some(());
        }
        let text = self.written(value.span);
        let term = if matches!(value.node, Node::Sum(_)) { format!("({text})") } else { text.clone() };
        let way_out = if let Some(meant) = self.reading_taken_away(value) {
            meant
        } else if value.dimension == Dimension::TEMPERATURE {
            format!("add it to a temperature: `20 degC + {term}`")
        } else {
            format!("add it to a pressure: `1 bar + {term}`")
        };
        self.report(
            Diagnostic::new(
                Code::DifferenceForPoint,
                format!("`{text}` is a difference, where {what} is wanted"),
            )
            .label(value.span, "a difference here")
            .help(way_out),
        );
        None
    }

    /// `pour_T - 20 degC` where a temperature is wanted: the reading was meant as a difference.
    fn reading_taken_away(&self, value: &Expr) -> Option<String> {
        let Node::Sum(terms) = &value.node else { return None };
        let (_, last) = terms.last().filter(|(taken_away, term)| *taken_away && term.is_literal())?;
        let text = self.written(last.span);
        let number = text.split_whitespace().next()?;
        let plain = match (value.dimension, text.contains('F')) {
            (Dimension::PRESSURE, _) => "bar",
            (_, true) => "degR",
            (_, false) => "K",
        };
        let whole = self.written(value.span);
        let before = whole.strip_suffix(text.as_str())?;
        Some(format!("write `{before}{number} {plain}`"))
    }

    /// A temperature or pressure difference: a reading is refused.
    pub(super) fn difference(&mut self, value: &Expr, what: &str) -> Option<()> {
        if value.kind != Kind::Point {
            return Some(());
        }
        let text = self.written(value.span);
        let number = text.split_whitespace().next().unwrap_or_default();
        let found = if value.dimension == Dimension::TEMPERATURE {
            let unit = if text.contains("degF") { "degR" } else { "K" };
            Diagnostic::new(
                Code::PointForDifference,
                format!("`{text}` is a temperature, where {what} is wanted"),
            )
            .help(if value.is_literal() {
                format!("write `{number} {unit}`")
            } else {
                "take a difference of two readings".to_owned()
            })
        } else {
            let plain =
                text.split_whitespace().nth(1).map_or("bar", |unit| unit.strip_suffix('g').unwrap_or(unit));
            Diagnostic::new(
                Code::GaugeForDifference,
                format!("`{text}` is a gauge reading, where {what} is wanted"),
            )
            .help(if value.is_literal() {
                format!("write `{number} {plain}`")
            } else {
                "take a difference of two readings".to_owned()
            })
        };
        self.report(found.label(value.span, "a reading here"));
        None
    }

    /// A quantity of another dimension than its place wants; mass against amount of substance has its own words.
    pub(super) fn wrong_dimension(&mut self, span: Span, found: Dimension, wanted: &[Dimension], what: &str) {
        let text = self.written(span);
        if let [only] = wanted
            && mass_against_amount(found, *only)
        {
            self.report(
                Diagnostic::new(
                    Code::MassAgainstAmount,
                    format!("`{text}` is {}, where {what} is wanted", with_dimension(found)),
                )
                .label(span, format!("{} here", with_dimension(found)))
                .help("the molar mass `M(X)` of the species turns one into the other"),
            );
            return;
        }
        let choices: Vec<String> = wanted.iter().map(|dimension| with_dimension(*dimension)).collect();
        self.report(
            Diagnostic::new(
                Code::WrongDimension,
                format!("`{text}` is {}, where {what} is wanted", with_dimension(found)),
            )
            .label(span, format!("{} here", with_dimension(found)))
            .help(format!("{what} is {}", or_list(&choices))),
        );
    }
}

/// `a power (kg m2 s-3)`.
pub(super) fn with_dimension(dimension: Dimension) -> String {
    match dimension.name() {
        Some("pure number") => "a pure number".to_owned(),
        Some(name) => format!("{} ({dimension})", with_article(name)),
        None => format!("a quantity in {dimension}"),
    }
}

fn with_article(noun: &str) -> String {
    let article = if noun.starts_with(['a', 'e', 'i', 'o', 'u']) { "an" } else { "a" };
    format!("{article} {noun}")
}

/// Whether two dimensions differ only in that one counts mass where the other counts amount of substance.
pub(super) fn mass_against_amount(a: Dimension, b: Dimension) -> bool {
    let ratio = a.over(b);
    ratio == Some(Dimension::MOLAR_MASS) || ratio == Dimension::ONE.over(Dimension::MOLAR_MASS)
}

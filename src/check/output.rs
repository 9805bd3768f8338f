//! Results, requirements and tables.

use super::checker::{Checker, Entity};
use super::constant::value_of;
use super::input::written_unit;
use super::wanted::{mass_against_amount, with_dimension};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{self, Column, Comparison, Entry, Expr, Limit, Quantity, QuantityId, Role, Table};
use crate::span::Span;
use crate::syntax::tree::{self, Expression, ExpressionKind, Require, ResultLine, Word};
use crate::units::{self, Dimension, Kind, Unit};

/// How many rows a table may have.
const ROW_LIMIT: f64 = 1e6;

impl Checker<'_> {
    pub(super) fn result(&mut self, line: &ResultLine) {
        let quantity = self.expression(&line.value).and_then(|value| {
            let display = match self.display(line.display.as_ref(), &value) {
                Some(display) => Some(display?),
                None => self.unit_of(&line.value),
            };
            Some(Quantity {
                name: line.name.text.clone(),
                span: line.name.span,
                role: Role::Result,
                text: self.written(line.value.span),
                value,
                display,
                interval: None,
                source: None,
            })
        });
        let entity = match quantity {
            Some(quantity) => self.push_quantity(quantity),
            None => Entity::Broken,
        };
        self.declare(&line.name, entity);
    }

    /// The unit of an expression that is one name, the name's own, or one literal, as written.
    fn unit_of(&self, expression: &Expression) -> Option<Unit> {
        let ExpressionKind::Name(name) = &expression.kind else { return written_unit(expression) };
        match self.names.get(name)?.what {
            Entity::Quantity(id) => self.program.quantities.get(id.0)?.display.clone(),
            _ => None,
        }
    }

    pub(super) fn require(&mut self, line: &Require) {
        let value = self.expression(&line.value);
        let limit = match &line.requirement {
            tree::Requirement::Compared(comparison, limit) => {
                let limit = self.expression(limit);
                let comparison = match comparison {
                    tree::Comparison::Less => Comparison::Less,
                    tree::Comparison::AtMost => Comparison::AtMost,
                    tree::Comparison::Greater => Comparison::Greater,
                    tree::Comparison::AtLeast => Comparison::AtLeast,
                };
                limit.map(|limit| Limit::Compared(comparison, limit))
            }
            tree::Requirement::Within(low, high) => {
                let (low, high) = (self.expression(low), self.expression(high));
                low.zip(high).map(|(low, high)| Limit::Within(low, high))
            }
        };
        let (Some(value), Some(limit)) = (value, limit) else { return };
        let limits: Vec<&Expr> = match &limit {
            Limit::Compared(_, limit) => vec![limit],
            Limit::Within(low, high) => vec![low, high],
        };
        for limit in limits {
            if self.can_compare(&value, limit).is_none() {
                return;
            }
        }
        if let Limit::Within(low, high) = &limit
            && self.turned_round(low, high)
        {
            return;
        }
        self.program.requirements.push(program::Requirement {
            text: self.sources.line_of(line.condition),
            value,
            limit,
            because: line.because.as_ref().map(|text| text.text.clone()),
            span: line.condition,
        });
        self.program.order.push(Entry::Requirement(self.program.requirements.len() - 1));
    }

    /// No value lies from a higher limit to a lower one.
    fn turned_round(&mut self, low: &Expr, high: &Expr) -> bool {
        let empty = value_of(low).zip(value_of(high)).is_some_and(|(low, high)| low > high);
        if empty {
            let (from, to) = (self.written(low.span), self.written(high.span));
            self.report(
                Diagnostic::new(Code::BadInterval, format!("no value lies from `{from}` to `{to}`"))
                    .label(low.span.to(high.span), "the lower limit comes first")
                    .help(format!("write `within {to} to {from}`")),
            );
        }
        empty
    }

    fn can_compare(&mut self, value: &Expr, limit: &Expr) -> Option<()> {
        let (a, b) = (with_dimension(value.dimension), with_dimension(limit.dimension));
        if value.dimension != limit.dimension {
            let code = if mass_against_amount(value.dimension, limit.dimension) {
                Code::MassAgainstAmount
            } else {
                Code::UnlikeComparison
            };
            self.report(
                Diagnostic::new(code, format!("{a} is compared with {b}"))
                    .label(limit.span, format!("{b} here"))
                    .label(value.span, format!("{a} here"))
                    .help("give the limit in a unit of the value"),
            );
            return None;
        }
        if units::comparable(value.dimension, value.kind, limit.kind).is_err() {
            let (reading, difference) =
                if value.kind == Kind::Point { (value, limit) } else { (limit, value) };
            let open = if value.dimension == Dimension::PRESSURE { "bar" } else { "K" };
            self.report(
                Diagnostic::new(Code::UnlikeComparison, "a reading is compared with a difference")
                    .label(difference.span, "a difference here")
                    .label(reading.span, "a reading here")
                    .help(if reading.is_literal() {
                        let text = self.written(reading.span);
                        let number = text.split_whitespace().next().unwrap_or_default();
                        format!("for a difference write `{number} {open}`")
                    } else {
                        format!("compare two readings, or two differences in {open}")
                    }),
            );
            return None;
        }
        Some(())
    }

    pub(super) fn table(&mut self, table: &tree::Table, span: Span) {
        let columns: Vec<Option<Column>> = table.columns.iter().map(|column| self.column(column)).collect();
        let over = self.table_variable(&table.over);
        let bounds = [&table.from, &table.to, &table.by].map(|bound| self.expression(bound));
        let columns: Option<Vec<Column>> = columns.into_iter().collect();
        let (Some(columns), Some(over), [Some(from), Some(to), Some(by)]) = (columns, over, bounds) else {
            return;
        };
        if self.table_steps(over, &from, &to, &by, span).is_none() {
            return;
        }
        self.program.tables.push(Table {
            title: table.title.text.clone(),
            columns,
            over,
            from,
            to,
            by,
            span,
        });
        self.program.order.push(Entry::Table(self.program.tables.len() - 1));
    }

    fn column(&mut self, column: &tree::Column) -> Option<Column> {
        let value = self.expression(&column.value)?;
        let display = match self.display(column.display.as_ref(), &value) {
            Some(display) => Some(display?),
            None => self.unit_of(&column.value),
        };
        Some(Column { name: self.written(column.value.span), value, display })
    }

    /// A table varies a basis or an assumption.
    fn table_variable(&mut self, word: &Word) -> Option<QuantityId> {
        let sort = match self.look_up(&word.text, word.span)? {
            Entity::Quantity(id)
                if self.program.quantities.get(id.0).is_some_and(|quantity| quantity.role.is_input()) =>
            {
                return Some(id);
            }
            Entity::Quantity(_) => "a derived value",
            other => super::names::sort_of(other),
        };
        self.report(
            Diagnostic::new(Code::TableVariable, format!("a table cannot vary `{}`, {sort}", word.text))
                .label(word.span, format!("{sort} here"))
                .help("vary a `basis` or an `assume`"),
        );
        None
    }

    fn table_steps(&mut self, over: QuantityId, from: &Expr, to: &Expr, by: &Expr, span: Span) -> Option<()> {
        let varied = self.program.quantities.get(over.0)?;
        let (dimension, kind) = (varied.value.dimension, varied.value.kind);
        for (bound, what) in [
            (from, "the first value of a table"),
            (to, "the last value of a table"),
            (by, "the step of a table"),
        ] {
            if bound.dimension != dimension {
                self.wrong_dimension(bound.span, bound.dimension, &[dimension], what);
                return None;
            }
        }
        if kind == Kind::Point {
            self.point(from, "the first value of a table")?;
            self.point(to, "the last value of a table")?;
        }
        self.difference(by, "the step of a table")?;
        let (Some(first), Some(last), Some(step)) = (value_of(from), value_of(to), value_of(by)) else {
            return Some(());
        };
        let rows = (last - first) / step + 1.0;
        let (message, help) = if step == 0.0 {
            ("a table with a step of zero".to_owned(), "give a step, such as `by 10 K`".to_owned())
        } else if rows < 1.0 {
            (
                "a table whose step leads away from its end".to_owned(),
                "turn the step, or the ends, round".to_owned(),
            )
        } else if rows > ROW_LIMIT {
            (
                format!("a table of {rows:.0} rows; at most 1000000 are worked"),
                "take a larger step".to_owned(),
            )
        } else {
            return Some(());
        };
        self.report(
            Diagnostic::new(Code::TableSteps, message)
                .label(by.span, "the step")
                .label(span, "in this table")
                .help(help),
        );
        None
    }
}

//! Duties.

use super::checker::{Checker, Entity};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Duty, Entry, Expr};
use crate::span::Span;
use crate::syntax::tree::{self, DutyClause};
use crate::units::Dimension;

impl Checker<'_> {
    pub(super) fn duty(&mut self, duty: &tree::Duty, span: Span) {
        let checked = self.checked_duty(duty, span);
        let entity = match checked {
            Some(checked) => {
                let id = self.next_duty();
                self.program.duties.push(checked);
                self.program.order.push(Entry::Duty(id));
                Entity::Duty(id)
            }
            None => Entity::Broken,
        };
        self.declare(&duty.name, entity);
    }

    fn checked_duty(&mut self, duty: &tree::Duty, span: Span) -> Option<Duty> {
        let value = self.wanted(&duty.value, &[Dimension::ENERGY, Dimension::POWER], "a duty");
        let (mut over, mut efficiency): (Option<Option<Expr>>, Option<Option<Expr>>) = (None, None);
        let mut carried = false;
        for clause in &duty.clauses {
            match clause {
                DutyClause::Over(time) => {
                    let time = self.wanted(time, &[Dimension::TIME], "a time over which heat is brought");
                    self.said_once(over.replace(time).is_some(), span, "over");
                }
                DutyClause::Efficiency(share) => {
                    let share = self.wanted(share, &[Dimension::ONE], "an efficiency");
                    self.said_once(efficiency.replace(share).is_some(), span, "at efficiency");
                }
                DutyClause::Carried(word) => {
                    self.look_up(&word.text, word.span);
                    self.later_carrier(word.span);
                    carried = true;
                }
            }
        }
        let value = value?;
        if let (Some(Some(_)), Dimension::POWER) = (&over, value.dimension) {
            self.wrong_dimension(
                value.span,
                value.dimension,
                &[Dimension::ENERGY],
                "a heat that is brought over a time",
            );
            return None;
        }
        if carried {
            return None;
        }
        let written = self.written(span);
        let text = written.split_once('=').map_or("", |(_, rest)| rest.trim()).to_owned();
        Some(Duty {
            name: duty.name.text.clone(),
            span: duty.name.span,
            value,
            over: checked_clause(over)?,
            efficiency: checked_clause(efficiency)?,
            text,
        })
    }

    fn said_once(&mut self, again: bool, span: Span, clause: &str) {
        if again {
            self.report(
                Diagnostic::new(Code::ClausesClash, format!("`{clause}` is said twice"))
                    .label(span, "in this duty")
                    .help("keep one of the two"),
            );
        }
    }
}

/// A clause that was not said, or said and checked.
#[allow(clippy::option_option)] // outer: whether it was refused; inner: whether it was said
fn checked_clause(clause: Option<Option<Expr>>) -> Option<Option<Expr>> {
    match clause {
        None => Some(None),
        Some(value) => value.map(Some),
    }
}

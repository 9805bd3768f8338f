//! Formulas with numbers put in.

use super::worked::WorkedSheet;
use crate::plan::Slot;
use crate::program::{DutyMember, Expr, Node};
use crate::report::number::{shown, significant};
use crate::units::Unit;

/// How tightly an expression binds, for the parentheses around it.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Tightness {
    /// A value with a minus of its own.
    Signed,
    Sum,
    Product,
    Power,
    Atom,
}

impl WorkedSheet<'_> {
    /// The expression with every name replaced by its value.
    pub(super) fn put_in(&self, expr: &Expr) -> String {
        self.text(expr).0
    }

    fn inside(&self, expr: &Expr, around: Tightness) -> String {
        let (text, tightness) = self.text(expr);
        if tightness < around { format!("({text})") } else { text }
    }

    fn text(&self, expr: &Expr) -> (String, Tightness) {
        let (text, tightness) = self.text_of_node(expr);
        let signed = tightness == Tightness::Atom && text.starts_with('-');
        (text, if signed { Tightness::Signed } else { tightness })
    }

    fn text_of_node(&self, expr: &Expr) -> (String, Tightness) {
        match &expr.node {
            Node::Constant(_) | Node::Gauge(_) => (self.literal(expr), Tightness::Atom),
            Node::Variable => ("T".to_owned(), Tightness::Atom),
            Node::Quantity(id) => {
                let slot = self.map.quantities.get(id.0).copied();
                (self.named(expr, slot, self.unit_of(*id).as_ref()), Tightness::Atom)
            }
            Node::State(..) | Node::Step(..) => {
                let slot = self.map.members.get(&expr.span).copied();
                (self.named(expr, slot, None), Tightness::Atom)
            }
            Node::Duty(id, member) => {
                let slot = self.map.duties.get(id.0).map(|duty| match member {
                    DutyMember::Useful => duty.useful,
                    DutyMember::Supplied => duty.supplied,
                });
                (self.named(expr, slot, None), Tightness::Atom)
            }
            Node::Negative(inner) => {
                (format!("-{}", self.inside(inner, Tightness::Power)), Tightness::Product)
            }
            Node::Sum(terms) => (self.chain(terms, [" + ", " - "], Tightness::Sum), Tightness::Sum),
            Node::Product(factors) => {
                (self.chain(factors, [" * ", " / "], Tightness::Product), Tightness::Product)
            }
            Node::PowerInteger(base, exponent) => {
                (format!("{} ^ {exponent}", self.inside(base, Tightness::Atom)), Tightness::Power)
            }
            Node::Power(base, exponent) => {
                let (base, exponent) =
                    (self.inside(base, Tightness::Atom), self.inside(exponent, Tightness::Atom));
                (format!("{base} ^ {exponent}"), Tightness::Power)
            }
            Node::Call(function, arguments) => {
                let arguments: Vec<String> = arguments.iter().map(|argument| self.put_in(argument)).collect();
                (format!("{}({})", function.name(), arguments.join(", ")), Tightness::Atom)
            }
        }
    }

    fn chain(&self, parts: &[(bool, Expr)], signs: [&str; 2], tightness: Tightness) -> String {
        let mut text = String::new();
        for (at, (reversed, part)) in parts.iter().enumerate() {
            if at > 0 {
                text.push_str(signs[usize::from(*reversed)]);
            }
            // behind a minus or a solidus an equal must stand in parentheses
            let around = if *reversed { next_tighter(tightness) } else { tightness };
            text.push_str(&self.inside(part, around));
        }
        text
    }

    /// A literal as its author wrote it; a constant with a name, or a molar mass, as its value.
    fn literal(&self, expr: &Expr) -> String {
        let written = self.sources.line_of(expr.span);
        let digit = |c: char| c.is_ascii_digit() || c == '-' || c == '−';
        if written.starts_with(digit) {
            return written;
        }
        let Node::Constant(value) = expr.node else { return written };
        let shown_value = self.shown(value, expr.dimension, None, false);
        format!("{} {}", significant(shown_value.value, 9), shown_value.unit.text)
            .trim_end_matches(" 1")
            .to_owned()
    }

    fn named(&self, expr: &Expr, slot: Option<Slot>, unit: Option<&Unit>) -> String {
        let Some(slot) = slot else { return self.sources.line_of(expr.span) };
        shown(&self.shown(self.value(slot), expr.dimension, unit, self.is_difference(expr)))
    }
}

fn next_tighter(tightness: Tightness) -> Tightness {
    match tightness {
        Tightness::Signed | Tightness::Sum => Tightness::Product,
        Tightness::Product => Tightness::Power,
        Tightness::Power | Tightness::Atom => Tightness::Atom,
    }
}

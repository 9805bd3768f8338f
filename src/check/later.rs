//! Constructs that this version reads and does not work yet: each is refused by its own name, never passed over.

use super::checker::{Checker, Declared, Entity, Material};
use crate::diagnostic::{Code, Diagnostic};
use crate::span::Span;
use crate::syntax::tree::{Balance, Reaction, Settle};

impl Checker<'_> {
    fn later(&mut self, code: Code, what: &str, span: Span, help: &str) {
        self.report(
            Diagnostic::new(code, format!("{what} not worked by this version"))
                .label(span, "read, but not worked yet")
                .help(help),
        );
    }

    pub(super) fn later_reaction(&mut self, reaction: &Reaction, span: Span) {
        self.reactions.insert(reaction.name.text.clone(), reaction.name.span);
        let help = "work the step without the reaction, and enter its heat as an assumption with its source";
        self.later(Code::LaterReaction, "reactions are", span, help);
    }

    pub(super) fn later_after(&mut self, span: Span) {
        let help = "declare the states before and after the reaction by their own amounts";
        self.later(Code::LaterReaction, "reactions are", span, help);
    }

    pub(super) fn later_correlate(&mut self, span: Span) {
        let help = "leave it out: intervals are echoed, not propagated, so that nothing rests on it yet";
        self.later(Code::LaterCorrelate, "correlated inputs are", span, help);
    }

    pub(super) fn later_balance(&mut self, balance: &Balance, span: Span) {
        self.names
            .insert(balance.name.text.clone(), Declared { what: Entity::Broken, span: balance.name.span });
        let help = "a step between the sums of the states gives `.dH`; a `result` can add up the rest";
        self.later(Code::LaterBalance, "balances are", span, help);
    }

    pub(super) fn later_settle(&mut self, settle: &Settle, span: Span) {
        for sought in &settle.sought {
            self.settled.insert(sought.name.text.clone());
        }
        let help = "an unknown temperature or pressure, `at ?`, is settled by a step";
        self.later(Code::LaterSettle, "`settle` is", span, help);
    }

    pub(super) fn later_steam(&mut self, span: Span) {
        let help = "give water a `species` block with the values of a steam table and its edition as source";
        self.later(Code::LaterSteam, "steam tables are", span, help);
    }

    pub(super) fn later_carrier(&mut self, span: Span) {
        let help = "leave `carried by` out and divide `.supplied` by the carrier's heat per kilogram";
        self.later(Code::LaterCarrier, "carriers are", span, help);
    }

    pub(super) fn later_equilibrium(&mut self, span: Span) {
        let help = "give the species its state symbol, in two parts if need be";
        self.later(Code::LaterEquilibrium, "equilibria are", span, help);
    }

    pub(super) fn later_parted(&mut self, span: Span) {
        let help = "declare the part as a state of its own, by its amounts";
        self.later(Code::LaterParted, "parting a state by phase is", span, help);
    }

    /// Whether a material is one whose mistake is already reported.
    pub(super) fn is_broken_material(&self, name: &str) -> bool {
        matches!(self.materials.get(name), Some(Declared { what: Material::Broken, .. }))
            || self.broken.contains(name)
    }
}

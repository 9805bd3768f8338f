//! A worked sheet: the Program with the values of all its slots.

use crate::diagnostic::Diagnostic;
use crate::eval::Frame;
use crate::plan::{Plan, Slot, SlotMap};
use crate::program::{Constituent, Program, StateId};
use crate::source::Sources;
use crate::thermo::Place;

/// The rows of a table, in SI; `None` where a row is refused.
pub type TableValues = Vec<Vec<Option<f64>>>;

/// What the report is gathered from.
#[derive(Debug, Clone, Copy)]
pub struct WorkedSheet<'a> {
    /// The files.
    pub sources: &'a Sources,
    /// The checked sheet.
    pub program: &'a Program,
    /// Its operations.
    pub plan: &'a Plan,
    /// Which slot holds what.
    pub map: &'a SlotMap,
    /// The values.
    pub frame: &'a Frame<1>,
    /// The rows of the tables.
    pub tables: &'a [TableValues],
    /// Warnings and cautions.
    pub findings: &'a [Diagnostic],
    /// The name of the sheet's file.
    pub file: &'a str,
}

impl WorkedSheet<'_> {
    pub(super) fn value(&self, slot: Slot) -> f64 {
        self.frame.value(slot) + 0.0 // no minus before zero
    }

    /// The site's atmosphere, Pa.
    pub(super) fn atmosphere(&self) -> f64 {
        self.program.site.atmosphere
    }

    /// The constituents of a state with their masses and places.
    pub(super) fn contents(&self, id: StateId) -> Vec<(Constituent, f64, Option<Place>)> {
        let (Some(state), Some(slots)) = (self.program.states.get(id.0), self.map.states.get(id.0)) else {
            return Vec::new();
        };
        state
            .constituents
            .iter()
            .zip(slots.masses.iter().zip(&slots.places))
            .map(|(part, (mass, place))| (*part, self.value(*mass), self.frame.placed(*place)))
            .collect()
    }
}

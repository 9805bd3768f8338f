//! Program to Plan: straight-line operations on numbered slots.
//!
//! In comes a checked [`Program`](crate::program::Program); out go a [`Plan`], which holds no names, units or text, and
//! the [`SlotMap`] that says which slot holds what. A sheet is lowered once and evaluated as often as there are points.
//! Every operation carries the index of its origin, through which a failure finds its place in the sheet again.
//!
//! Guaranteed: an operation reads only slots that an earlier one has written, or inputs, and all of them have lower
//! numbers than the slot it writes; whatever can fail passes its value through a guard, so that a Plan pruned to some
//! outputs still guards them. Pruning merges operations, and changes no bit and no failure by it.

mod lower;
mod merge;
mod op;
mod prune;
mod slots;

pub use lower::{Lowered, lower};
pub use op::{Check, Material, Op, Part, PartRange, PhaseSet, PlaceSlot, Plan, Settle, Slot};
pub use slots::{DutySlots, LimitSlots, Origin, OriginKind, SlotMap, StateSlots, StepSlots, TableSlots};

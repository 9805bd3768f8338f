//! Syntax tree to checked Program.
//!
//! In comes a tree with its texts; out comes a [`Program`](crate::program::Program), or every mistake of meaning:
//! names, units, dimensions, kinds, materials, states and steps. One file per construct. After an error the pass goes
//! on: what could not be checked is `None`, and whoever needs it stays silent.

mod allow;
mod arithmetic;
mod call;
mod checker;
mod composition;
mod condition;
mod consistency;
mod constant;
mod curve_error;
mod datum;
mod duty;
mod expression;
mod heat_capacity;
mod import;
mod input;
mod known;
mod later;
mod law_formula;
mod literal;
mod material;
mod matter;
mod member;
mod mixture;
mod names;
mod output;
mod pedigree;
mod phase;
mod species;
mod state;
mod step;
mod substance;
mod transition;
mod unit;
mod unknowns;
mod vapour_pressure;
mod wanted;

pub use checker::{Checked, check_sheet};
pub use import::check_family;

//! Running a Plan.
//!
//! In come a [`Plan`](crate::plan::Plan) and the values of its inputs; out come the values of all slots, in SI, and
//! what failed, as indices of operations. A run works a block of points at once, in lanes; a single point is a block
//! of one, by the same code, so that a table gives the same bits as a single run.
//!
//! Guaranteed: an operation whose input has failed gives NaN and is silent, so that each fault is told once; nothing
//! depends on how many lanes a block has.

mod arithmetic;
mod frame;
mod property;
mod run;
mod settle;

pub use frame::{Failure, Fault, Frame};
pub use run::run;

//! The cutter: a text into statements, before anything is parsed.
//!
//! It makes a copy of the text in which comments and continued line ends are blanks, of the same length, and
//! ranges into that copy: a piece for each statement, with the pieces inside it where it opens a block. A piece
//! that cannot be cut cleanly is reported and kept only by the names it would have declared.

mod cutter;
mod mark;
mod piece;

pub(super) use cutter::cut;
pub(super) use piece::{Cut, Piece};

//! Text to syntax tree.
//!
//! In comes the text of one file; out go a [`tree::Tree`] and every mistake of syntax, each of which costs one
//! statement. The text is cut into pieces, each piece is parsed by the rule of the grammar that its first word
//! names, and the pairs are built into the tree. Nothing here knows a unit, a name or a dimension. `grammar.rs`
//! and `build/` are the only places that name pest.
//!
//! Guaranteed: any text comes back with a tree; nesting is bounded before anything recurses; every span lies on
//! character borders of the text.

mod build;
mod complaint;
mod grammar;
mod parse;
mod pieces;
pub mod tree;
mod words;

pub use parse::{Parsed, parse_sheet};

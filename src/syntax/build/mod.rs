//! Pairs of the parser to nodes of the tree, one file per sort of node.
//!
//! A builder knows the file and where its piece begins, so that every span is one of the file. What the grammar
//! admits and the language does not (a reserved word declared, a number beyond a double) is reported here.

mod builder;
mod expression;
mod quantity;
mod species;
mod state;
mod statement;

pub(super) use builder::Builder;

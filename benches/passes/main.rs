//! The passes, each beside a hand-written floor of the same work.
//!
//! Times differ from machine to machine, so what counts is the ratio of a pair, `NAME/product` to `NAME/floor`;
//! `benches/ratios.sh` prints it.

#![allow(missing_docs)] // criterion's macros make public items

mod cold;
mod evaluate;
mod floor;
mod read;
mod settle;
mod sheet;
mod table;

use criterion::{criterion_group, criterion_main};

criterion_group!(
    passes,
    evaluate::one_at_a_time,
    evaluate::in_blocks,
    table::rows,
    settle::plateau,
    read::ten_thousand_lines,
    cold::zinc_sheet
);
criterion_main!(passes);

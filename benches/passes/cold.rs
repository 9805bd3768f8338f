//! The zinc sheet from text to report, in one process; its floor reads the same text by the bare grammar.

use crate::read::bare_sheet;
use crate::sheet::ZINC_POT;
use criterion::Criterion;
use heatpath::library::NoFiles;
use heatpath::report::{Style, render_text};
use heatpath::session::run;
use std::hint::black_box;

pub(crate) fn zinc_sheet(criterion: &mut Criterion) {
    let style = Style { colour: false, width: 100 };
    let printed = || {
        let worked = run("zinc-pot.heat", "", black_box(ZINC_POT), &NoFiles);
        render_text(&worked.report.expect("the sheet is right"), style)
    };
    let mut group = criterion.benchmark_group("cold");
    group.bench_function("product", |bench| bench.iter(printed));
    group.bench_function("floor", |bench| bench.iter(|| bare_sheet(black_box(ZINC_POT))));
    group.finish();
}

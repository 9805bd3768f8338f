//! A table of 10,000 rows.

use crate::floor::{self, Inputs};
use crate::sheet::{ZINC_POT, lowered};
use criterion::Criterion;
use heatpath::eval::{Frame, run};
use heatpath::study::sweep;
use std::hint::black_box;

pub(crate) fn rows(criterion: &mut Criterion) {
    let kept = ZINC_POT.lines().filter(|line| !line.starts_with("table"));
    let mut text: String = kept.flat_map(|line| [line, "\n"]).collect();
    text.push_str("table \"fine\": rating in kW over pour_T from 430 degC to 499.993 degC by 0.007 K\n");
    let (_, lowered) = lowered(&text);
    let mut base = Frame::<1>::new(&lowered.plan);
    run(&lowered.plan, &mut base);
    let table = &lowered.map.tables[0];
    let worked = sweep(&lowered.plan, &base, table).expect("the rows can be counted");
    assert_eq!(worked.rows.len(), 10_000);
    let mut group = criterion.benchmark_group("table");
    group.bench_function("product", |bench| {
        bench.iter(|| sweep(black_box(&lowered.plan), black_box(&base), table));
    });
    group.bench_function("floor", |bench| {
        bench.iter(|| {
            let pours = (0..10_000).map(|row| 703.15 + 0.007 * f64::from(row));
            let row = |pour: f64| (pour, floor::rating(Inputs { pour, ..black_box(floor::ZINC_POT) }));
            pours.map(row).collect::<Vec<_>>()
        });
    });
    group.finish();
}

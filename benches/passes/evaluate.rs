//! One evaluation of the zinc sheet's rating, alone and in blocks of lanes.

use crate::floor::{self, Inputs};
use crate::sheet::{ZINC_POT, lowered, slot};
use criterion::{Criterion, Throughput};
use heatpath::eval::{Frame, run};
use heatpath::plan::{Plan, Slot};
use std::hint::black_box;

/// Lanes of a block.
const LANES: usize = 64;

/// The Plan of the rating alone, the slots of its inputs in the order of [`Inputs`], and the slot of the rating.
fn rating() -> (Plan, [Slot; 6], Slot) {
    let sheet = lowered(ZINC_POT);
    let inputs = ["charge", "store_T", "pour_T", "time", "eff", "wall"].map(|name| slot(&sheet, name));
    let rating = slot(&sheet, "rating");
    (sheet.1.plan.pruned(&[rating]), inputs, rating)
}

fn array(of: Inputs) -> [f64; 6] {
    [of.charge, of.store, of.pour, of.time, of.efficiency, of.wall]
}

/// All six inputs set anew, one point.
pub(crate) fn one_at_a_time(criterion: &mut Criterion) {
    let (plan, slots, output) = rating();
    let mut frame = Frame::<1>::new(&plan);
    run(&plan, &mut frame);
    assert!((frame.value(output) - floor::rating(floor::ZINC_POT)).abs() < 1e-6, "they do the same work");
    let mut group = criterion.benchmark_group("evaluate_one");
    group.bench_function("product", |bench| {
        bench.iter(|| {
            for (slot, value) in slots.iter().zip(array(black_box(floor::ZINC_POT))) {
                frame.set(*slot, [value]);
            }
            run(&plan, &mut frame);
            frame.value(output)
        });
    });
    group.bench_function("floor", |bench| bench.iter(|| floor::rating(black_box(floor::ZINC_POT))));
    group.finish();
}

/// All six inputs set anew in 64 lanes, beside as many calls of the floor.
pub(crate) fn in_blocks(criterion: &mut Criterion) {
    let (plan, slots, output) = rating();
    let mut frame = Frame::<LANES>::new(&plan);
    let pours: [f64; LANES] = std::array::from_fn(|lane| 703.15 + lane as f64);
    let mut group = criterion.benchmark_group("evaluate_block");
    group.throughput(Throughput::Elements(LANES as u64));
    group.bench_function("product", |bench| {
        bench.iter(|| {
            for (slot, value) in slots.iter().zip(array(black_box(floor::ZINC_POT))) {
                frame.set(*slot, [value; LANES]);
            }
            frame.set(slots[2], black_box(pours));
            run(&plan, &mut frame);
            frame.get(output)
        });
    });
    group.bench_function("floor", |bench| {
        bench.iter(|| {
            black_box(pours).map(|pour| floor::rating(black_box(Inputs { pour, ..floor::ZINC_POT })))
        });
    });
    group.finish();
}

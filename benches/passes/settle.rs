//! A heat that ends on either side of the melting plateau, or inside it.

use crate::floor;
use crate::sheet::{ZINC_POT, lowered, slot};
use criterion::Criterion;
use heatpath::eval::{Frame, run};
use std::hint::black_box;

/// Heats that end in the solid, on the plateau and in the liquid, J.
const HEATS: [f64; 4] = [40e6, 80e6, 105e6, 140e6];

pub(crate) fn plateau(criterion: &mut Criterion) {
    let kept = ZINC_POT.split("basis  charge").next().unwrap_or_default();
    let sheet = lowered(&format!(
        "{kept}
basis heat = 100 MJ
state cold   = 450 kg of Zn at 18 degC
state warmed = cold at ?
step soak: cold -> warmed, at constant pressure, taking heat
result T = warmed.T in K
"
    ));
    let (heat, output) = (slot(&sheet, "heat"), slot(&sheet, "T"));
    let plan = sheet.1.plan.pruned(&[output]);
    let mut frame = Frame::<1>::new(&plan);
    let mut group = criterion.benchmark_group("plateau");
    group.bench_function("product", |bench| {
        bench.iter(|| {
            black_box(HEATS).map(|value| {
                frame.set(heat, [value]);
                run(&plan, &mut frame);
                let found = frame.value(output);
                debug_assert!((found - floor::settled(450.0, 291.15, value)).abs() < 1e-9);
                found
            })
        });
    });
    group.bench_function("floor", |bench| {
        bench.iter(|| black_box(HEATS).map(|heat| floor::settled(black_box(450.0), 291.15, heat)));
    });
    group.finish();
}

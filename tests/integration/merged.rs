//! A Plan cut down for a sweep, with its merged operations, beside the whole.

use heatpath::check::check_sheet;
use heatpath::eval::{Failure, Frame, run};
use heatpath::library::NoFiles;
use heatpath::plan::{Op, Plan, lower};
use heatpath::source::Sources;

const SHEET: &str = "species Zn \"zinc\" {
    formula Zn
    source \"invented for this test\"
    phase solid { cp = 22.40 J/(mol K) + 10.05e-3 J/(mol K2) * T for 273.15 K to 692.68 K }
    melting at 692.68 K takes 7.322 kJ/mol
    phase liquid { cp = 31.38 J/(mol K) for 692.68 K to 1180 K }
}
basis pour_T = 460 degC
state cold = 450 kg of Zn at 18 degC
state melt = cold at pour_T
step heat_up: cold -> melt, at constant pressure
result heat = heat_up.Q in MJ
";

/// The reference is the whole Plan, which keeps every place: same bits, same failures.
#[test]
fn a_merged_plan_gives_the_bits_and_the_failures_of_the_whole() {
    let mut sources = Sources::new();
    let file = sources.add("pot.heat", SHEET);
    let program = check_sheet(&mut sources, file, "", &NoFiles).program.expect("the sheet is right");
    let lowered = lower(&program).expect("nothing is unknown");
    let (input, output) = (lowered.map.quantities[0], lowered.map.quantities[1]);
    let (plan, numbers) = lowered.plan.between(&[input], &[output]);
    assert!(plan.ops.iter().any(|op| matches!(op, Op::EnthalpyAt { .. })), "{:?}", plan.ops);
    // solid, liquid, near the melting point on either side, beyond the data, no temperatures
    let points = [300.0, 733.15, 692.5, 692.9, 1180.0, 1300.0, -5.0, f64::NAN];
    let mut block = Frame::<8>::spread(&started(&lowered.plan));
    block.set(input, points);
    run(&plan, &mut block);
    for (lane, point) in points.into_iter().enumerate() {
        let mut whole = started(&lowered.plan);
        whole.set(input, [point]);
        run(&lowered.plan, &mut whole);
        assert_eq!(block.get(output)[lane].to_bits(), whole.value(output).to_bits(), "at {point} K");
        let found = block.failures.iter().filter(|failure| failure.lane == lane);
        let found: Vec<Failure> =
            found.map(|failure| Failure { op: numbers[failure.op], lane: 0, ..*failure }).collect();
        assert_eq!(format!("{found:?}"), format!("{:?}", whole.failures), "at {point} K");
    }
}

fn started(plan: &Plan) -> Frame<1> {
    let mut frame = Frame::<1>::new(plan);
    run(plan, &mut frame);
    frame.failures.clear();
    frame
}

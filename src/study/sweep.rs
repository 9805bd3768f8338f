//! A table: columns over one input.

use crate::eval::{Failure, Frame, run};
use crate::plan::{Plan, TableSlots};

/// How many points are worked at once.
const LANES: usize = 64;

/// A row that is refused: its number, the value of the input, and why. The failure's operation is one of the Plan
/// that was given.
#[derive(Debug, Clone, PartialEq)]
pub struct RefusedRow {
    /// The row, from 0.
    pub row: usize,
    /// The input there, in SI.
    pub at: f64,
    /// What failed first.
    pub failure: Failure,
}

/// The rows of a table.
#[derive(Debug, Clone, PartialEq)]
pub struct Sweep {
    /// The input and the columns, in SI; NaN in a row that is refused.
    pub rows: Vec<Vec<f64>>,
    /// The rows that are refused.
    pub refused: Vec<RefusedRow>,
}

/// Works a table. `base` holds the values of the single run.
///
/// # Errors
/// The number of rows, where it is no number from 1 to 1000000.
pub fn sweep(plan: &Plan, base: &Frame<1>, table: &TableSlots) -> Result<Sweep, f64> {
    let [from, to, by] = table.bounds.map(|slot| base.value(slot));
    // a row that misses the end by rounding alone belongs to the table
    let steps = ((to - from) / by + 1e-9).floor();
    let count = steps + 1.0;
    if !(1.0..=1e6).contains(&count) {
        return Err(count);
    }
    #[allow(clippy::cast_possible_truncation, clippy::cast_sign_loss)] // from 1 to 1000000, as tested
    let count = count as usize;
    let (varying, numbers) = plan.between(&[table.over], &table.columns);
    let mut sweep = Sweep { rows: Vec::with_capacity(count), refused: Vec::new() };
    // every operation that varies writes its slot anew in every block
    let mut frame = Frame::<LANES>::spread(base);
    let mut start = 0;
    while start < count {
        frame.failures.clear();
        #[allow(clippy::cast_precision_loss)] // at most 1000000
        let at = |lane: usize| from + by * ((start + lane).min(count - 1) as f64);
        let inputs: [f64; LANES] = std::array::from_fn(at);
        frame.set(table.over, inputs);
        run(&varying, &mut frame);
        let lanes = LANES.min(count - start);
        take_rows(&frame, table, &inputs[..lanes], &mut sweep);
        take_refused(&frame, &numbers, start, &inputs[..lanes], &mut sweep);
        start += lanes;
    }
    Ok(sweep)
}

fn take_rows(frame: &Frame<LANES>, table: &TableSlots, inputs: &[f64], sweep: &mut Sweep) {
    let columns: Vec<[f64; LANES]> = table.columns.iter().map(|slot| frame.get(*slot)).collect();
    for (lane, input) in inputs.iter().enumerate() {
        let row = std::iter::once(*input).chain(columns.iter().map(|column| column[lane]));
        sweep.rows.push(row.collect());
    }
}

fn take_refused(frame: &Frame<LANES>, numbers: &[usize], start: usize, inputs: &[f64], sweep: &mut Sweep) {
    for (lane, input) in inputs.iter().enumerate() {
        let Some(failure) = frame.failures.iter().find(|failure| failure.lane == lane) else { continue };
        let op = numbers.get(failure.op).copied().unwrap_or(failure.op);
        let failure = Failure { op, ..*failure };
        sweep.refused.push(RefusedRow { row: start + lane, at: *input, failure });
    }
}

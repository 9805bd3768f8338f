//! Operations merged where a place serves one enthalpy alone.

use super::op::{Op, Plan, Slot};
use super::prune::reads;

/// The operations of these numbers, each with its number: where an enthalpy is all that a place is asked for, both are
/// one operation, which stands where the place was and fails as it would.
pub(super) fn merged(plan: &Plan, numbers: &[usize]) -> (Vec<Op>, Vec<usize>) {
    let mut uses = vec![0_usize; plan.places as usize];
    let mut enthalpies: Vec<Option<Op>> = vec![None; plan.places as usize];
    for op in numbers.iter().map(|at| &plan.ops[*at]) {
        reads(op, plan, &mut |_| {}, &mut |place| uses[place as usize] += 1);
        if let Op::Enthalpy { place, .. } = op {
            enthalpies[place.0 as usize] = Some(*op);
        }
    }
    let only = |place: u32| enthalpies[place as usize].filter(|_| uses[place as usize] == 1);
    let mut laid = vec![false; plan.places as usize];
    let mut kept = Vec::with_capacity(numbers.len());
    for at in numbers {
        let op = plan.ops[*at];
        match op {
            Op::Locate { t, p, side: None, to: place, .. } => {
                let both = only(place.0).and_then(|enthalpy| at_once(enthalpy, t, p));
                laid[place.0 as usize] = both.is_some();
                kept.push((both.unwrap_or(op), *at));
            }
            Op::Enthalpy { place, .. } if laid[place.0 as usize] => {}
            _ => kept.push((op, *at)),
        }
    }
    kept.into_iter().unzip()
}

/// The enthalpy and its place in one, where both are at the same pressure.
fn at_once(enthalpy: Op, t: Slot, pressure: Slot) -> Option<Op> {
    match enthalpy {
        Op::Enthalpy { material, p, to, .. } if p == pressure => Some(Op::EnthalpyAt { material, t, p, to }),
        _ => None,
    }
}

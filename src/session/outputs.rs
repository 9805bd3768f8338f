//! What a sheet asks for: what fails on the way to it is an error; what fails elsewhere is merely not known.

use crate::plan::{Slot, SlotMap};
use crate::program::{Heat, Path, Program};

/// The slots of all that the sheet states or asks.
pub(super) fn required(program: &Program, map: &SlotMap) -> Vec<Slot> {
    let mut slots = map.quantities.clone();
    for state in &map.states {
        slots.extend([state.temperature, state.pressure, state.mass, state.enthalpy]);
        slots.extend(state.amount);
    }
    for (step, known) in program.steps.iter().zip(&map.steps) {
        slots.push(known.enthalpy_change);
        let by_enthalpy = matches!(
            step.path,
            Some((
                Path::ConstantPressure
                    | Path::ConstantTemperatureAndPressure
                    | Path::NoShaftWork
                    | Path::Throttled,
                _
            ))
        );
        let stated = !matches!(step.heat, Heat::Follows);
        if by_enthalpy || stated {
            slots.extend(known.heat);
        } else if step.path.is_some() {
            slots.push(known.internal_energy_change);
            slots.extend(known.heat);
            slots.extend(known.work);
        }
        slots.extend(known.losing);
        slots.extend(known.working);
    }
    for duty in &map.duties {
        slots.extend([duty.useful, duty.supplied]);
    }
    for requirement in &map.requirements {
        slots.push(requirement.value);
        slots.extend(&requirement.limits);
    }
    for table in &map.tables {
        slots.extend(table.bounds);
        slots.extend(&table.columns);
    }
    slots
}

//! Duties.

use super::builder::{Builder, Lowering};
use crate::plan::{Check, DutySlots, Op, OriginKind};
use crate::program::DutyId;

impl Builder<'_> {
    pub(super) fn duty(&mut self, id: DutyId) -> Lowering<DutySlots> {
        if let Some(slots) = self.duties.get(&id.0) {
            return Ok(slots.clone());
        }
        let program = self.program;
        let Some(duty) = program.duties.get(id.0) else {
            let nothing = self.constant(f64::NAN);
            return Ok(DutySlots { useful: nothing, supplied: nothing });
        };
        let before = self.from(duty.span, OriginKind::Duty(id));
        let mut useful = self.expr(&duty.value)?;
        if let Some(time) = self.optional(duty.over.as_ref())? {
            let time =
                self.emit(|to| Op::Guard { check: Check::PositiveTime, a: time, b: time, value: time, to });
            useful = self.divide(useful, time);
        }
        let supplied = match self.optional(duty.efficiency.as_ref())? {
            None => useful,
            Some(a) => {
                let share = self.emit(|to| Op::Guard { check: Check::Efficiency, a, b: a, value: a, to });
                let heating = self.emit(|to| Op::Guard {
                    check: Check::Heating,
                    a: useful,
                    b: useful,
                    value: useful,
                    to,
                });
                self.divide(heating, share)
            }
        };
        self.back(before);
        let slots = DutySlots { useful, supplied };
        self.duties.insert(id.0, slots.clone());
        Ok(slots)
    }
}

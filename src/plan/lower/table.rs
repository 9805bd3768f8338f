//! Requirements and tables.

use super::builder::{Builder, Lowering};
use crate::plan::{LimitSlots, Slot, TableSlots};
use crate::program::Limit;

impl Builder<'_> {
    pub(super) fn requirement(&mut self, at: usize) -> Lowering<()> {
        let program = self.program;
        let Some(requirement) = program.requirements.get(at) else { return Ok(()) };
        let value = self.expr(&requirement.value)?;
        let limits = match &requirement.limit {
            Limit::Compared(_, limit) => vec![self.expr(limit)?],
            Limit::Within(low, high) => vec![self.expr(low)?, self.expr(high)?],
        };
        self.map.requirements.push(LimitSlots { value, limits });
        Ok(())
    }

    pub(super) fn table(&mut self, at: usize) -> Lowering<()> {
        let program = self.program;
        let Some(table) = program.tables.get(at) else { return Ok(()) };
        let over = self.quantity(table.over)?;
        let bounds = [self.expr(&table.from)?, self.expr(&table.to)?, self.expr(&table.by)?];
        let columns =
            table.columns.iter().map(|column| self.expr(&column.value)).collect::<Lowering<Vec<Slot>>>()?;
        self.map.tables.push(TableSlots { over, bounds, columns });
        Ok(())
    }
}

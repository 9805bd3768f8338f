//! The masses of a state's constituents.

use super::builder::{Builder, Lowering};
use crate::plan::{Check, Op, OriginKind, Slot};
use crate::program::{Quantum, Source, StateId};

impl Builder<'_> {
    /// The masses of a state's constituents.
    pub(super) fn masses(&mut self, id: StateId) -> Lowering<Vec<Slot>> {
        if let Some(masses) = self.masses.get(&id) {
            return Ok(masses.clone());
        }
        let Some(state) = self.program.states.get(id.0) else { return Ok(Vec::new()) };
        let before = self.from(state.span, OriginKind::State(id, 0));
        let masses = self.masses_of(id, &state.source)?;
        self.back(before);
        let zero = self.constant(0.0);
        let masses: Vec<Slot> = masses.into_iter().map(|mass| mass.unwrap_or(zero)).collect();
        self.masses.insert(id, masses.clone());
        Ok(masses)
    }

    /// The masses that a source brings to each constituent of the state.
    fn masses_of(&mut self, id: StateId, source: &Source) -> Lowering<Vec<Option<Slot>>> {
        let constituents = self.constituents(id);
        match source {
            Source::Whole(other) => {
                let theirs = self.constituents(*other);
                let masses = self.masses(*other)?;
                Ok(constituents
                    .iter()
                    .map(|part| {
                        theirs.iter().position(|known| known == part).and_then(|at| masses.get(at)).copied()
                    })
                    .collect())
            }
            Source::Sum(parts) => {
                let mut total: Vec<Option<Slot>> = vec![None; constituents.len()];
                for part in parts {
                    for (at, mass) in self.masses_of(id, part)?.into_iter().enumerate() {
                        total[at] = match (total[at], mass) {
                            (Some(a), Some(b)) => Some(self.add(a, b)),
                            (a, b) => a.or(b),
                        };
                    }
                }
                Ok(total)
            }
            Source::Fresh { amount, quantum, portions } => {
                let value = self.amount(amount)?;
                let per_kilogram: Vec<(usize, Option<Slot>)> = portions
                    .iter()
                    .map(|portion| {
                        (portion.constituent, (portion.share != 1.0).then(|| self.constant(portion.share)))
                    })
                    .collect();
                let mut masses: Vec<Option<Slot>> = vec![None; constituents.len()];
                let one = self.constant(1.0);
                for (at, share) in &per_kilogram {
                    masses[*at] = Some(share.unwrap_or(one));
                }
                let mass = self.mass_of_amount(id, value, *quantum, &masses)?;
                for (at, share) in per_kilogram {
                    masses[at] = Some(match share {
                        None => mass,
                        Some(share) => self.multiply(mass, share),
                    });
                }
                Ok(masses)
            }
            Source::PartOf { amount, quantum, of } => {
                let value = self.amount(amount)?;
                let whole = self.masses_of(id, of)?;
                let factor = if *quantum == Quantum::Share {
                    let before = self.from(amount.span, OriginKind::Expression);
                    let share =
                        self.emit(|to| Op::Guard { check: Check::Share, a: value, b: value, value, to });
                    self.back(before);
                    share
                } else {
                    self.mass_of_amount(id, value, *quantum, &whole)?
                };
                Ok(whole.into_iter().map(|mass| mass.map(|mass| self.multiply(mass, factor))).collect())
            }
        }
    }

    fn amount(&mut self, amount: &crate::program::Expr) -> Lowering<Slot> {
        let a = self.expr(amount)?;
        let before = self.from(amount.span, OriginKind::Expression);
        let slot = self.emit(|to| Op::Guard { check: Check::PositiveAmount, a, b: a, value: a, to });
        self.back(before);
        Ok(slot)
    }

    /// By what the masses of a whole are multiplied to make up an amount of it.
    fn mass_of_amount(
        &mut self,
        id: StateId,
        amount: Slot,
        quantum: Quantum,
        whole: &[Option<Slot>],
    ) -> Lowering<Slot> {
        let constituents = self.constituents(id);
        let mut terms = Vec::new();
        for (at, mass) in whole.iter().enumerate() {
            let (Some(mass), Some(part)) = (*mass, constituents.get(at)) else { continue };
            terms.push(match quantum {
                Quantum::Mass | Quantum::Share => mass,
                Quantum::Substance => {
                    let molar_mass = self.molar_mass(part).unwrap_or(f64::NAN);
                    let molar_mass = self.constant(molar_mass);
                    self.divide(mass, molar_mass)
                }
                Quantum::Volume => {
                    let volume = self.specific_volume(id, at)?;
                    self.multiply(mass, volume)
                }
            });
        }
        let total = self.total(&terms);
        if quantum == Quantum::Mass && self.constants.get(&1.0_f64.to_bits()) == Some(&total) {
            return Ok(amount);
        }
        Ok(self.divide(amount, total))
    }

    fn specific_volume(&mut self, id: StateId, at: usize) -> Lowering<Slot> {
        let place = self.place(id, at)?;
        let p = self.pressure(id)?;
        let Some(part) = self.constituents(id).get(at).copied() else { return Ok(self.constant(f64::NAN)) };
        let material = self.material(&part);
        Ok(self.emit(|to| Op::Volume { material, place, p, neglect: false, to }))
    }
}

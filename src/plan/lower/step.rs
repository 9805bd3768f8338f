//! Steps: state functions of the two ends, and heat and work along the path.

use super::builder::{Builder, Lowering};
use super::state::Total;
use crate::plan::{Check, Op, OriginKind, Slot, StepSlots};
use crate::program::{Heat, Law, Path, SpeciesId, StateId, Step, StepId};
use crate::units::constants::GAS_CONSTANT;
use std::collections::BTreeMap;

impl Builder<'_> {
    /// The slots of a step, lowered where they are not yet.
    pub(super) fn step(&mut self, id: StepId) -> Lowering<StepSlots> {
        if let Some(slots) = self.steps.get(&id) {
            return Ok(slots.clone());
        }
        let program = self.program;
        let Some(step) = program.steps.get(id.0) else {
            let nothing = self.constant(f64::NAN);
            return Ok(StepSlots {
                enthalpy_change: nothing,
                internal_energy_change: nothing,
                volume_change: nothing,
                heat: None,
                work: None,
                supply: None,
                losing: None,
                working: None,
            });
        };
        let before = self.from(step.span, OriginKind::Step(id));
        let change = self.change_or_stated(step, Total::Enthalpy, Law::Enthalpy)?;
        let enthalpy_change = self.conserved(id, step, change)?;
        self.from(step.span, OriginKind::Step(id));
        let internal_energy_change =
            self.change_or_stated(step, Total::InternalEnergy, Law::InternalEnergy)?;
        let volume_change = self.change(step, Total::VolumeOrNothing)?;
        let mut slots = StepSlots {
            enthalpy_change,
            internal_energy_change,
            volume_change,
            heat: None,
            work: None,
            supply: None,
            losing: self.optional(step.losing.as_ref())?,
            working: self.optional(step.working.as_ref())?,
        };
        if let Some((path, _)) = step.path {
            self.along(step, path, &mut slots)?;
        }
        self.back(before);
        self.steps.insert(id, slots.clone());
        Ok(slots)
    }

    pub(super) fn optional(&mut self, expr: Option<&crate::program::Expr>) -> Lowering<Option<Slot>> {
        expr.map(|expr| self.expr(expr)).transpose()
    }

    /// What the states at one side hold together.
    pub(super) fn side(&mut self, states: &[StateId], total: Total) -> Lowering<Slot> {
        let terms = states.iter().map(|id| self.sum(*id, total)).collect::<Lowering<Vec<Slot>>>()?;
        Ok(self.total(&terms))
    }

    /// What the end holds less what the start holds.
    fn change(&mut self, step: &Step, total: Total) -> Lowering<Slot> {
        let (start, end) = (self.side(&step.from, total)?, self.side(&step.to, total)?);
        Ok(self.subtract(end, start))
    }

    /// The change of an energy; where the step settled a temperature by it, what it states of heat and work, with no
    /// rounding of the search.
    fn change_or_stated(&mut self, step: &Step, total: Total, law: Law) -> Lowering<Slot> {
        let change = self.change(step, total)?;
        if step.efficiency.is_some() || !step.settles.iter().any(|settles| settles.law == law) {
            return Ok(change);
        }
        let zero = self.constant(0.0);
        let mut stated = match &step.heat {
            Heat::Taking(value) => self.expr(value)?,
            Heat::Adiabatic | Heat::Follows => zero,
        };
        if let Some(working) = self.optional(step.working.as_ref())? {
            stated = if stated == zero { working } else { self.add(stated, working) };
        }
        Ok(self.emit(|to| Op::Known { value: stated, given: change, to }))
    }

    /// The latent heats of a step, boiling where it is at the pressure of its end.
    pub(super) fn latent(&mut self, id: StepId) -> Lowering<Slot> {
        let program = self.program;
        let Some(step) = program.steps.get(id.0) else { return Ok(self.constant(f64::NAN)) };
        let before = self.from(step.span, OriginKind::Step(id));
        let last = step.to.first().copied().unwrap_or(StateId(usize::MAX));
        let p = self.pressure(last)?;
        let mut side = |states: &[StateId]| {
            let terms = states.iter().map(|id| self.latent_sum(*id, p)).collect::<Lowering<Vec<Slot>>>()?;
            Ok(self.total(&terms))
        };
        let (start, end) = (side(&step.from)?, side(&step.to)?);
        let slot = self.subtract(end, start);
        self.back(before);
        Ok(slot)
    }

    fn part_of_change(&mut self, id: StepId, total: Total) -> Lowering<Slot> {
        let program = self.program;
        match program.steps.get(id.0) {
            Some(step) => {
                let before = self.from(step.span, OriginKind::Step(id));
                let slot = self.change(step, total);
                self.back(before);
                slot
            }
            None => Ok(self.constant(f64::NAN)),
        }
    }

    /// What is left of ΔH when the transitions and the pressure's part are taken away.
    pub(super) fn sensible(&mut self, id: StepId) -> Lowering<Slot> {
        let total = self.step(id)?.enthalpy_change;
        let (latent, pressure) = (self.latent(id)?, self.part_of_change(id, Total::PressurePart)?);
        let rest = self.subtract(total, latent);
        Ok(self.subtract(rest, pressure))
    }

    /// ΔV with every volume known.
    pub(super) fn strict_volume_change(&mut self, id: StepId) -> Lowering<Slot> {
        self.part_of_change(id, Total::Volume)
    }

    /// ΔH guarded by what the step conserves: every element where all species count from the elements, else the mass
    /// of every species.
    fn conserved(&mut self, id: StepId, step: &Step, change: Slot) -> Lowering<Slot> {
        let (start, end) = (self.species_masses(&step.from)?, self.species_masses(&step.to)?);
        let mut all: Vec<SpeciesId> = start.keys().chain(end.keys()).copied().collect();
        all.sort_unstable();
        all.dedup();
        let species = |id: &SpeciesId| self.program.species.get(id.0);
        let by_element = all.len() > 1
            && all
                .iter()
                .all(|id| species(id).is_some_and(|species| species.absolute && species.formula.is_some()));
        let balances = if by_element {
            self.element_amounts(&start, &end)
        } else {
            let zero = self.constant(0.0);
            let side =
                |masses: &BTreeMap<SpeciesId, Slot>, id: &SpeciesId| masses.get(id).copied().unwrap_or(zero);
            let name = |id: &SpeciesId| {
                self.program.species.get(id.0).map_or(String::new(), |species| species.name.clone())
            };
            all.iter().map(|id| (name(id), side(&start, id), side(&end, id))).collect()
        };
        let mut value = change;
        for (name, a, b) in balances {
            if a == b {
                continue;
            }
            self.from(step.span, OriginKind::Conserved(id, name));
            value = self.emit(|to| Op::Guard { check: Check::Conserved, a, b, value, to });
        }
        Ok(value)
    }

    fn species_masses(&mut self, states: &[StateId]) -> Lowering<BTreeMap<SpeciesId, Slot>> {
        let mut found: BTreeMap<SpeciesId, Vec<Slot>> = BTreeMap::new();
        for id in states {
            let masses = self.masses(*id)?;
            for (part, mass) in self.constituents(*id).iter().zip(masses) {
                found.entry(part.species).or_default().push(mass);
            }
        }
        Ok(found.into_iter().map(|(species, slots)| (species, self.total(&slots))).collect())
    }

    /// The amount of each element at the start and at the end.
    fn element_amounts(
        &mut self,
        start: &BTreeMap<SpeciesId, Slot>,
        end: &BTreeMap<SpeciesId, Slot>,
    ) -> Vec<(String, Slot, Slot)> {
        let mut amounts: BTreeMap<&'static str, [Vec<Slot>; 2]> = BTreeMap::new();
        for (side, masses) in [start, end].into_iter().enumerate() {
            for (id, mass) in masses {
                let Some(species) = self.program.species.get(id.0) else { continue };
                let Some((_, composition)) = &species.formula else { continue };
                let molar_mass = species.molar_mass.unwrap_or(f64::NAN);
                for (element, count) in composition.parts() {
                    let factor = self.constant(count / molar_mass);
                    let amount = self.multiply(*mass, factor);
                    amounts.entry(element.symbol()).or_default()[side].push(amount);
                }
            }
        }
        amounts
            .into_iter()
            .map(|(symbol, [start, end])| (symbol.to_owned(), self.total(&start), self.total(&end)))
            .collect()
    }

    /// Heat and work along the path, in the sign convention of the IUPAC: positive into the system.
    fn along(&mut self, step: &Step, path: Path, slots: &mut StepSlots) -> Lowering<()> {
        self.ends_fit(step, path, slots)?;
        let zero = self.constant(0.0);
        let working = slots.working.unwrap_or(zero);
        let path_work = self.path_work(step, path, slots)?;
        let closed = !step.flow || path == Path::ConstantVolume;
        let total = if closed { slots.internal_energy_change } else { slots.enthalpy_change };
        let work = match (path_work, slots.working) {
            (Some(path_work), Some(working)) => self.add(path_work, working),
            (Some(path_work), None) => path_work,
            (None, _) => working,
        };
        let heat = match &step.heat {
            Heat::Taking(value) => self.expr(value)?,
            Heat::Adiabatic => zero,
            Heat::Follows if matches!(path, Path::Throttled | Path::AdiabaticReversible) => zero,
            Heat::Follows => {
                let at_pressure =
                    matches!(path, Path::ConstantPressure | Path::ConstantTemperatureAndPressure);
                if at_pressure {
                    // ΔU − W with W = −p ΔV is ΔH, with no difference of large numbers
                    self.less(slots.enthalpy_change, slots.working)
                } else if path_work.is_some() {
                    self.subtract(total, work)
                } else {
                    self.less(total, slots.working)
                }
            }
        };
        slots.heat = Some(heat);
        slots.work = Some(work);
        slots.supply = Some(match slots.losing {
            Some(losing) => self.add(heat, losing),
            None => heat,
        });
        Ok(())
    }

    fn less(&mut self, value: Slot, taken: Option<Slot>) -> Slot {
        match taken {
            Some(taken) => self.subtract(value, taken),
            None => value,
        }
    }

    /// The work that the path itself does; `None` where there is none.
    fn path_work(&mut self, step: &Step, path: Path, slots: &StepSlots) -> Lowering<Option<Slot>> {
        Ok(match path {
            Path::ConstantPressure | Path::ConstantTemperatureAndPressure if !step.flow => {
                let pressure = self.pressure(step.from[0])?;
                let work = self.multiply(pressure, slots.volume_change);
                Some(self.emit(|to| Op::Negate { a: work, to }))
            }
            Path::IsothermalReversible => Some(self.isothermal_work(step)?),
            Path::AdiabaticReversible if step.flow => Some(slots.enthalpy_change),
            Path::AdiabaticReversible => Some(slots.internal_energy_change),
            _ => None,
        })
    }

    /// n R T ln(p₂/p₁), of a closed change and of a flow alike.
    fn isothermal_work(&mut self, step: &Step) -> Lowering<Slot> {
        let (start, end) = (step.from[0], step.to[0]);
        let (p1, p2) = (self.pressure(start)?, self.pressure(end)?);
        let ratio = self.divide(p2, p1);
        let logarithm = self.emit(|to| Op::Logarithm { a: ratio, to });
        let scale = self.amount_times_rt(start)?;
        Ok(self.multiply(scale, logarithm))
    }

    /// n R T of a state.
    pub(super) fn amount_times_rt(&mut self, id: StateId) -> Lowering<Slot> {
        let amount = self.sum(id, Total::Amount)?;
        let gas_constant = self.constant(GAS_CONSTANT);
        let t = self.temperature(id)?.slot;
        let nr = self.multiply(amount, gas_constant);
        Ok(self.multiply(nr, t))
    }

    /// Guards that both ends fit the path; the changes go on where they do.
    fn ends_fit(&mut self, step: &Step, path: Path, slots: &mut StepSlots) -> Lowering<()> {
        let states: Vec<StateId> = step.from.iter().chain(&step.to).copied().collect();
        let same_pressure = matches!(path, Path::ConstantPressure | Path::ConstantTemperatureAndPressure);
        let same_temperature =
            matches!(path, Path::IsothermalReversible | Path::ConstantTemperatureAndPressure);
        let mut checks = Vec::new();
        if same_pressure {
            let pressures = states.iter().map(|id| self.pressure(*id)).collect::<Lowering<Vec<Slot>>>()?;
            checks.extend(pressures.iter().skip(1).map(|slot| (Check::SamePressure, pressures[0], *slot)));
        }
        if same_temperature {
            let slots =
                states.iter().map(|id| Ok(self.temperature(*id)?.slot)).collect::<Lowering<Vec<Slot>>>()?;
            checks.extend(slots.iter().skip(1).map(|slot| (Check::SameTemperature, slots[0], *slot)));
        }
        if matches!(path, Path::NoShaftWork | Path::Throttled) {
            let starts = step.from.iter().map(|id| self.pressure(*id)).collect::<Lowering<Vec<Slot>>>()?;
            let highest =
                starts.iter().skip(1).fold(starts[0], |a, &b| self.emit(|to| Op::Maximum { a, b, to }));
            for id in &step.to {
                checks.push((Check::NoRise, highest, self.pressure(*id)?));
            }
        }
        if path == Path::ConstantVolume {
            let start = self.side(&step.from, Total::VolumeOrNothing)?;
            let end = self.side(&step.to, Total::VolumeOrNothing)?;
            checks.push((Check::SameVolume, start, end));
        }
        for (check, a, b) in checks.into_iter().filter(|(_, a, b)| a != b) {
            let value = slots.enthalpy_change;
            slots.enthalpy_change = self.emit(|to| Op::Guard { check, a, b, value, to });
        }
        if matches!(path, Path::IsothermalReversible | Path::AdiabaticReversible) {
            for id in states {
                let places = self.placed(id)?;
                for (part, place) in self.constituents(id).iter().zip(places) {
                    let material = self.material(part);
                    let value = slots.enthalpy_change;
                    slots.enthalpy_change = self.emit(|to| Op::GasOnly { material, place, value, to });
                }
            }
        }
        Ok(())
    }
}

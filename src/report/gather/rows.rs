//! The rows of the report.

use super::caution::advice;
use super::data::species_row;
use super::display::unit;
use super::usage::Usage;
use super::worked::WorkedSheet;
use crate::diagnostic::Severity;
use crate::program::{
    Comparison, Condition, DutyId, Entry, Expr, Limit, Node, QuantityId, Role, SpeciesId, StateId,
};
use crate::report::conventions::standing_conventions;
use crate::report::model::{
    Caution, DutyRow, Finding, InputRow, Item, MixtureRow, PressureBasis, Quantity, Report, RequirementRow,
    ResultRow, SiteRow, StateRow, TableColumn, TableRows,
};
use crate::units::{Dimension, Kind, Unit, Zero, engineering_unit};

/// Gathers the report of a worked sheet.
pub fn gather(sheet: &WorkedSheet<'_>) -> Report {
    let usage = Usage::of_sheet(sheet);
    let program = sheet.program;
    let used = sheet.used_species(&usage);
    let mut report = Report {
        version: env!("CARGO_PKG_VERSION"),
        file: sheet.file.to_owned(),
        title: program.head.title.clone(),
        head: program.head.entries.clone(),
        remarks: program.remarks.iter().map(|remark| remark.text.clone()).collect(),
        site: sheet.site_row(),
        inputs: Vec::new(),
        species: used.iter().filter_map(|id| program.species.get(id.0)).map(species_row).collect(),
        mixtures: program
            .mixtures
            .iter()
            .map(|note| MixtureRow {
                name: note.name.clone(),
                written: note.text.clone(),
                portions: note.portions.clone(),
                source: note.source.clone(),
            })
            .collect(),
        data: sheet.data_rows(&usage),
        states: (0..program.states.len()).filter_map(|id| sheet.state_row(StateId(id))).collect(),
        steps: (0..program.steps.len()).filter_map(|id| sheet.step_row(crate::program::StepId(id))).collect(),
        duties: (0..program.duties.len()).filter_map(|id| sheet.duty_row(DutyId(id))).collect(),
        results: Vec::new(),
        requirements: (0..program.requirements.len()).filter_map(|at| sheet.requirement_row(at)).collect(),
        tables: (0..program.tables.len()).filter_map(|at| sheet.table_rows(at)).collect(),
        order: Vec::new(),
        warnings: sheet.warnings(),
        cautions: sheet.cautions(),
        conventions: sheet.conventions(),
    };
    for entry in &program.order {
        let item = match *entry {
            Entry::Remark(at) => Some(Item::Remark(at)),
            Entry::Species(SpeciesId(id)) => used.iter().position(|known| known.0 == id).map(Item::Species),
            Entry::Mixture(at) => Some(Item::Mixture(at)),
            Entry::Site => Some(Item::Site),
            Entry::Quantity(id) => sheet.quantity_item(id, &mut report),
            Entry::State(id) => Some(Item::State(id.0)),
            Entry::Step(id) => Some(Item::Step(id.0)),
            Entry::Duty(id) => Some(Item::Duty(id.0)),
            Entry::Requirement(at) => Some(Item::Requirement(at)),
            Entry::Table(at) => Some(Item::Table(at)),
        };
        report.order.extend(item);
    }
    report
}

impl WorkedSheet<'_> {
    fn site_row(&self) -> SiteRow {
        let site = &self.program.site;
        let atmosphere = self.shown(site.atmosphere, Dimension::PRESSURE, site.unit.as_ref(), false);
        SiteRow { atmosphere, written: site.text.clone(), source: site.source.clone() }
    }

    /// Puts a quantity among the inputs or the results.
    fn quantity_item(&self, id: QuantityId, report: &mut Report) -> Option<Item> {
        let quantity = self.program.quantities.get(id.0)?;
        let si = self.value(*self.map.quantities.get(id.0)?);
        let mut value = self.expression_shown(&quantity.value, si, quantity.display.as_ref());
        let open = quantity.value.kind == Kind::Open && value.pressure == Some(PressureBasis::Absolute);
        if open && self.serves_as_difference(id) {
            value.pressure = Some(PressureBasis::Difference);
        }
        if quantity.role.is_input()
            && let Some(number) = written_number(&quantity.text, &value.unit)
        {
            value.value = number; // as its author wrote it, without the way to SI and back
        }
        if quantity.role == Role::Result {
            report.results.push(ResultRow {
                name: quantity.name.clone(),
                formula: quantity.text.clone(),
                put_in: self.put_in(&quantity.value),
                value,
                dimension: quantity.value.dimension.to_string(),
            });
            return Some(Item::Result(report.results.len() - 1));
        }
        let uncertainty = quantity.interval.as_ref().map(crate::program::Interval::standard_uncertainty);
        let shown = uncertainty.map(|si| si / value.unit.factor);
        report.inputs.push(InputRow {
            name: quantity.name.clone(),
            role: quantity.role.as_str(),
            written: quantity.text.clone(),
            put_in: (quantity.role == Role::Let).then(|| self.put_in(&quantity.value)),
            value,
            interval: quantity.interval.as_ref().map(|interval| interval.text.clone()),
            standard_uncertainty: uncertainty,
            standard_uncertainty_shown: shown,
            source: quantity.source.clone(),
        });
        Some(Item::Input(report.inputs.len() - 1))
    }

    fn state_row(&self, id: StateId) -> Option<StateRow> {
        let (state, slots) = (self.program.states.get(id.0)?, self.map.states.get(id.0)?);
        let rate = |dimension: Dimension| {
            if state.flow { dimension.over(Dimension::TIME).unwrap_or(dimension) } else { dimension }
        };
        let celsius = unit("degC");
        let asked = |condition: &Condition| match condition {
            Condition::Value(Expr { node: Node::Quantity(id), .. }) => self.unit_of(*id),
            _ => None,
        };
        let temperature_unit = asked(&state.temperature).or(celsius);
        let (phases, by_mole) = self.phases(id);
        Some(StateRow {
            name: state.name.clone(),
            written: state.text.clone(),
            flow: state.flow,
            temperature: self.shown(
                self.value(slots.temperature),
                Dimension::TEMPERATURE,
                temperature_unit.as_ref(),
                false,
            ),
            temperature_settled: matches!(state.temperature, Condition::Unknown(_)),
            pressure: self.shown(
                self.value(slots.pressure),
                Dimension::PRESSURE,
                asked(&state.pressure).as_ref(),
                false,
            ),
            pressure_settled: matches!(state.pressure, Condition::Unknown(_)),
            mass: self.shown(self.value(slots.mass), rate(Dimension::MASS), None, false),
            amount: slots
                .amount
                .map(|slot| self.shown(self.value(slot), rate(Dimension::AMOUNT), None, false)),
            phases,
            phases_by_mole: by_mole,
        })
    }

    /// Phases of a state with their shares, and whether these are by mole.
    fn phases(&self, id: StateId) -> (Vec<(String, f64)>, bool) {
        let contents = self.contents(id);
        let species = |id: SpeciesId| self.program.species.get(id.0);
        let by_mole =
            contents.iter().all(|(part, ..)| species(part.species).is_some_and(|s| s.molar_mass.is_some()));
        let mut phases: Vec<(String, f64)> = Vec::new();
        for (part, mass, place) in contents {
            let (Some(species), Some(place)) = (species(part.species), place) else { continue };
            let amount = if by_mole { mass / species.molar_mass.unwrap_or(1.0) } else { mass };
            let present = species.curve.phases_at(place);
            for (phase, share) in present.present() {
                let name = species.in_phase(phase);
                match phases.iter_mut().find(|(known, _)| *known == name) {
                    Some((_, sum)) => *sum += amount * share,
                    None => phases.push((name, amount * share)),
                }
            }
        }
        let total: f64 = phases.iter().map(|(_, amount)| amount).sum();
        phases.iter_mut().for_each(|(_, amount)| *amount /= total);
        (phases, by_mole)
    }

    fn duty_row(&self, id: DutyId) -> Option<DutyRow> {
        let (duty, slots) = (self.program.duties.get(id.0)?, self.map.duties.get(id.0)?);
        let dimension = if duty.over.is_some() { Dimension::POWER } else { duty.value.dimension };
        let mut put_in = self.put_in(&duty.value);
        if let Some(time) = &duty.over {
            put_in = format!("({put_in}) / {}", self.put_in(time));
        }
        Some(DutyRow {
            name: duty.name.clone(),
            written: duty.text.clone(),
            put_in,
            efficiency: duty.efficiency.as_ref().map(|efficiency| self.put_in(efficiency)),
            useful: self.shown(self.value(slots.useful), dimension, None, false),
            supplied: self.shown(self.value(slots.supplied), dimension, None, false),
        })
    }

    fn requirement_row(&self, at: usize) -> Option<RequirementRow> {
        let (requirement, slots) = (self.program.requirements.get(at)?, self.map.requirements.get(at)?);
        let limits: Vec<f64> = slots.limits.iter().map(|slot| self.value(*slot)).collect();
        let value = self.value(slots.value);
        let met = match (&requirement.limit, limits.as_slice()) {
            (Limit::Compared(comparison, _), [limit]) => comparison.holds(value, *limit),
            (Limit::Within(..), [low, high]) => {
                Comparison::AtLeast.holds(value, *low) && Comparison::AtMost.holds(value, *high)
            }
            _ => false,
        };
        let first = match &requirement.limit {
            Limit::Compared(_, limit) | Limit::Within(limit, _) => limit,
        };
        let shown_in = self.limit_unit(&requirement.value, first, value);
        let show =
            |si: f64, expr: &Expr| self.shown(si, expr.dimension, Some(&shown_in), self.is_difference(expr));
        Some(RequirementRow {
            written: requirement.text.clone(),
            found: show(value, &requirement.value),
            limits: limits.into_iter().map(|limit| show(limit, &requirement.value)).collect(),
            met,
            because: requirement.because.clone(),
        })
    }

    /// The unit of a verdict: that of the value, else that of the limit as written.
    fn limit_unit(&self, value: &Expr, limit: &Expr, si: f64) -> Unit {
        let own = |expr: &Expr| match &expr.node {
            Node::Quantity(id) => self.unit_of(*id),
            Node::Constant(_) | Node::Gauge(_) => {
                let text = self.sources.line_of(expr.span);
                text.split_once(' ')
                    .and_then(|(_, unit_text)| unit(unit_text))
                    .filter(|unit| unit.dimension == expr.dimension)
            }
            _ => None,
        };
        own(value).or_else(|| own(limit)).unwrap_or_else(|| engineering_unit(value.dimension, si))
    }

    fn table_rows(&self, at: usize) -> Option<TableRows> {
        let (table, values) = (self.program.tables.get(at)?, self.tables.get(at)?);
        let varied = self.program.quantities.get(table.over.0)?;
        let first_of =
            |column: usize| values.iter().find_map(|row| row.get(column).copied().flatten()).unwrap_or(0.0);
        let mut columns =
            vec![self.table_column(&varied.name, &varied.value, varied.display.as_ref(), first_of(0))];
        for (index, column) in table.columns.iter().enumerate() {
            columns.push(self.table_column(
                &column.name,
                &column.value,
                column.display.as_ref(),
                first_of(index + 1),
            ));
        }
        let show = |row: &Vec<Option<f64>>| -> Vec<Option<f64>> {
            row.iter()
                .zip(&columns)
                .map(|(value, column)| value.map(|si| column.unit.from_si(si, self.atmosphere())))
                .collect()
        };
        let rows = values.iter().map(show).collect();
        Some(TableRows { title: table.title.clone(), columns, rows })
    }

    fn table_column(&self, name: &str, value: &Expr, unit: Option<&Unit>, si: f64) -> TableColumn {
        let Quantity { unit, pressure, .. } = self.expression_shown(value, si, unit);
        TableColumn { name: name.to_owned(), unit, pressure }
    }

    fn warnings(&self) -> Vec<Finding> {
        let line = |diagnostic: &crate::diagnostic::Diagnostic| {
            diagnostic.place().map(|span| self.sources.line_column(span.file, span.start).0)
        };
        self.findings
            .iter()
            .filter(|found| found.severity() == Severity::Warning)
            .map(|found| Finding {
                code: found.code.as_str(),
                message: found.message.clone(),
                line: line(found),
            })
            .collect()
    }

    fn cautions(&self) -> Vec<Caution> {
        self.findings
            .iter()
            .filter(|found| found.severity() == Severity::Caution)
            .map(|found| Caution {
                code: found.code.as_str(),
                finding: found.message.clone(),
                advice: advice(found.code).to_owned(),
            })
            .collect()
    }

    /// What holds for every sheet, and what for this one.
    fn conventions(&self) -> Vec<String> {
        let mut sentences = standing_conventions();
        let gauge = self
            .program
            .quantities
            .iter()
            .any(|quantity| quantity.display.as_ref().is_some_and(|unit| unit.zero == Zero::Atmosphere));
        if gauge {
            sentences.push("Gauge readings count from the site's atmosphere.".to_owned());
        }
        sentences
    }
}

/// The number of a literal in this unit: `25.1 degC` is 25.1, however K and degC round.
fn written_number(text: &str, unit: &Unit) -> Option<f64> {
    let text = text.replace('−', "-");
    let number = text.trim_end().strip_suffix(unit.text.as_str())?.trim_end();
    number.parse().ok()
}

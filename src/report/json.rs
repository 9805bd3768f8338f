//! The report as one JSON object.
//!
//! The fields and their order are fixed; fields may be added, none is renamed or dropped. Numbers are written with the
//! digits that read back to the same bits.

use serde::ser::SerializeMap;
use serde::{Serialize, Serializer};

use super::model::*;

/// The report as one JSON object, indented, with a line end behind it.
///
/// `si` of a pressure is absolute, in Pa, also where it is shown in a gauge unit; of a temperature, in K.
pub fn render_json(report: &Report) -> String {
    written(&document(report))
}

/// An object, indented, with a line end behind it.
pub(super) fn written<T: Serialize>(object: &T) -> String {
    let mut text =
        serde_json::to_string_pretty(object).expect("the objects here have text keys and cannot fail");
    text.push('\n');
    text
}

#[derive(Serialize)]
struct Document<'a> {
    heatpath: &'static str,
    file: &'a str,
    sheet: Head<'a>,
    site: Site<'a>,
    inputs: Vec<Input<'a>>,
    data: Vec<Datum<'a>>,
    states: Vec<State<'a>>,
    steps: Vec<Step<'a>>,
    duties: Vec<Duty<'a>>,
    results: Vec<Answer<'a>>,
    requirements: Vec<Requirement<'a>>,
    tables: Vec<Table<'a>>,
    warnings: Vec<Warning<'a>>,
    cautions: Vec<Precaution<'a>>,
}

fn document(report: &Report) -> Document<'_> {
    Document {
        heatpath: report.version,
        file: &report.file,
        sheet: Head(report),
        site: Site {
            atmosphere: shown(&report.site.atmosphere),
            said: report.site.written.is_some(),
            source: report.site.source.as_deref(),
        },
        inputs: report.inputs.iter().map(input).collect(),
        data: report.data.iter().map(datum).collect(),
        states: report.states.iter().map(State).collect(),
        steps: report.steps.iter().map(Step).collect(),
        duties: report.duties.iter().map(duty).collect(),
        results: report.results.iter().map(answer).collect(),
        requirements: report.requirements.iter().map(requirement).collect(),
        tables: report.tables.iter().map(table).collect(),
        warnings: report.warnings.iter().map(warning).collect(),
        cautions: report.cautions.iter().map(precaution).collect(),
    }
}

/// The title, number and revision, then every other entry by its word. An entry that comes twice, and one named
/// `title` beside the title, is added to the first on a line of its own.
struct Head<'a>(&'a Report);

impl Serialize for Head<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let mut entries = vec![("title", Some(self.0.title.clone())), ("number", None), ("revision", None)];
        for (word, text) in &self.0.head {
            match entries.iter_mut().find(|(known, _)| known == word) {
                Some((_, Some(before))) => *before = format!("{before}\n{text}"),
                Some((_, empty)) => *empty = Some(text.clone()),
                None => entries.push((word, Some(text.clone()))),
            }
        }
        serializer.collect_map(entries)
    }
}

#[derive(Serialize)]
struct Site<'a> {
    atmosphere: Shown<'a>,
    said: bool,
    source: Option<&'a str>,
}

/// A value in its unit and in SI.
#[derive(Serialize)]
struct Shown<'a> {
    value: f64,
    unit: &'a str,
    si: f64,
    #[serde(skip_serializing_if = "Option::is_none")]
    pressure: Option<&'static str>,
}

fn shown(quantity: &Quantity) -> Shown<'_> {
    Shown {
        value: quantity.value,
        unit: &quantity.unit.text,
        si: quantity.si,
        pressure: quantity.pressure.map(basis),
    }
}

fn basis(pressure: PressureBasis) -> &'static str {
    match pressure {
        PressureBasis::Absolute => "absolute",
        PressureBasis::Gauge => "gauge",
        PressureBasis::Difference => "difference",
    }
}

#[derive(Serialize)]
struct Input<'a> {
    name: &'a str,
    role: &'static str,
    #[serde(flatten)]
    value: Shown<'a>,
    std_uncertainty_si: Option<f64>,
    source: Option<&'a str>,
    written: &'a str,
    interval: Option<&'a str>,
}

fn input(row: &InputRow) -> Input<'_> {
    Input {
        name: &row.name,
        role: row.role,
        value: shown(&row.value),
        std_uncertainty_si: row.standard_uncertainty,
        source: row.source.as_deref(),
        written: &row.written,
        interval: row.interval.as_deref(),
    }
}

#[derive(Serialize)]
struct Datum<'a> {
    species: &'a str,
    phase: &'a str,
    what: &'static str,
    #[serde(rename = "valid_K")]
    valid: Option<(f64, f64)>,
    #[serde(rename = "used_K")]
    used: Option<(f64, f64)>,
    source: Option<&'a str>,
    extrapolated: bool,
    because: Option<&'a str>,
    written: &'a str,
    interval: Option<&'a str>,
    spread: Option<&'a str>,
}

fn datum(row: &DataRow) -> Datum<'_> {
    Datum {
        species: &row.species,
        phase: &row.phase,
        what: row.what,
        valid: row.valid_kelvin,
        used: row.used_kelvin,
        source: row.source.as_deref(),
        extrapolated: row.extrapolated,
        because: row.because.as_deref(),
        written: &row.written,
        interval: row.interval.as_deref(),
        spread: row.spread.as_deref(),
    }
}

struct State<'a>(&'a StateRow);

impl Serialize for State<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let row = self.0;
        let (mass, amount) = if row.flow { ("mass_kg_s", "amount_mol_s") } else { ("mass_kg", "amount_mol") };
        let mut map = serializer.serialize_map(None)?;
        map.serialize_entry("name", &row.name)?;
        map.serialize_entry("T_K", &row.temperature.si)?;
        map.serialize_entry("P_Pa", &row.pressure.si)?;
        map.serialize_entry(mass, &row.mass.si)?;
        map.serialize_entry(amount, &row.amount.as_ref().map(|amount| amount.si))?;
        map.serialize_entry("phases", &Shares(&row.phases))?;
        map.serialize_entry("phases_by", if row.phases_by_mole { "mole" } else { "mass" })?;
        map.end()
    }
}

/// Shares by name, in the order of the model.
struct Shares<'a>(&'a [(String, f64)]);

impl Serialize for Shares<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        serializer.collect_map(self.0.iter().map(|(name, share)| (name, share)))
    }
}

struct Step<'a>(&'a StepRow);

impl Serialize for Step<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let row = self.0;
        let unit = energy_unit(row.flow);
        let legs: Vec<_> = row.legs.iter().map(|leg| Leg { leg, flow: row.flow }).collect();
        let sides: Vec<_> = row.sides.iter().map(side).collect();
        let mut map = serializer.serialize_map(None)?;
        map.serialize_entry("name", &row.name)?;
        map.serialize_entry(&format!("dH_{unit}"), &row.enthalpy_change)?;
        map.serialize_entry(&format!("dU_{unit}"), &row.internal_energy_change)?;
        map.serialize_entry(&format!("Q_{unit}"), &row.path.and(row.heat))?;
        map.serialize_entry(&format!("W_{unit}"), &row.path.and(row.work))?;
        map.serialize_entry("legs", &legs)?;
        map.serialize_entry("path", &row.path)?;
        map.serialize_entry("sides", &sides)?;
        map.serialize_entry("settles", &row.settles)?;
        map.serialize_entry("notes", &row.notes)?;
        map.end()
    }
}

fn energy_unit(flow: bool) -> &'static str {
    if flow { "W" } else { "J" }
}

struct Leg<'a> {
    leg: &'a LegRow,
    flow: bool,
}

impl Serialize for Leg<'_> {
    fn serialize<S: Serializer>(&self, serializer: S) -> Result<S::Ok, S::Error> {
        let leg = self.leg;
        let mut map = serializer.serialize_map(None)?;
        map.serialize_entry("kind", leg.kind.as_str())?;
        map.serialize_entry("species", &leg.species)?;
        map.serialize_entry("phase", &leg.phase)?;
        map.serialize_entry("from_K", &leg.from_kelvin)?;
        map.serialize_entry("to_K", &leg.to_kelvin)?;
        map.serialize_entry(&format!("dH_{}", energy_unit(self.flow)), &leg.enthalpy_change)?;
        map.serialize_entry("datum", &leg.datum)?;
        map.end()
    }
}

#[derive(Serialize)]
struct SideValue<'a> {
    symbol: &'static str,
    formula: &'a str,
    #[serde(flatten)]
    value: Shown<'a>,
}

fn side(row: &Side) -> SideValue<'_> {
    SideValue { symbol: row.symbol, formula: &row.formula, value: shown(&row.value) }
}

#[derive(Serialize)]
struct Duty<'a> {
    name: &'a str,
    useful: Shown<'a>,
    supplied: Shown<'a>,
}

fn duty(row: &DutyRow) -> Duty<'_> {
    Duty { name: &row.name, useful: shown(&row.useful), supplied: shown(&row.supplied) }
}

#[derive(Serialize)]
struct Answer<'a> {
    name: &'a str,
    #[serde(flatten)]
    value: Shown<'a>,
    dimension: &'a str,
    std_uncertainty_si: Option<f64>,
    formula: &'a str,
}

fn answer(row: &ResultRow) -> Answer<'_> {
    Answer {
        name: &row.name,
        value: shown(&row.value),
        dimension: &row.dimension,
        std_uncertainty_si: None,
        formula: &row.formula,
    }
}

#[derive(Serialize)]
struct Requirement<'a> {
    text: &'a str,
    met: bool,
    because: Option<&'a str>,
    probability: Option<f64>,
    found: Shown<'a>,
    limits: Vec<Shown<'a>>,
}

fn requirement(row: &RequirementRow) -> Requirement<'_> {
    Requirement {
        text: &row.written,
        met: row.met,
        because: row.because.as_deref(),
        probability: None,
        found: shown(&row.found),
        limits: row.limits.iter().map(shown).collect(),
    }
}

#[derive(Serialize)]
struct Table<'a> {
    title: &'a str,
    columns: Vec<Column<'a>>,
    rows: &'a [TableRow],
}

#[derive(Serialize)]
struct Column<'a> {
    name: &'a str,
    unit: &'a str,
    #[serde(skip_serializing_if = "Option::is_none")]
    pressure: Option<&'static str>,
}

fn table(table: &TableRows) -> Table<'_> {
    Table { title: &table.title, columns: table.columns.iter().map(column).collect(), rows: &table.rows }
}

fn column(column: &TableColumn) -> Column<'_> {
    Column { name: &column.name, unit: &column.unit.text, pressure: column.pressure.map(basis) }
}

#[derive(Serialize)]
struct Warning<'a> {
    code: &'static str,
    message: &'a str,
    line: Option<usize>,
}

fn warning(finding: &Finding) -> Warning<'_> {
    Warning { code: finding.code, message: &finding.message, line: finding.line }
}

#[derive(Serialize)]
struct Precaution<'a> {
    code: &'static str,
    finding: &'a str,
    advice: &'a str,
}

fn precaution(caution: &Caution) -> Precaution<'_> {
    Precaution { code: caution.code, finding: &caution.finding, advice: &caution.advice }
}

#[cfg(test)]
mod tests;

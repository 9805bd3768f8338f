//! What a report says, as data.

use crate::units::Unit;

/// A value with the unit it is shown in.
#[derive(Debug, Clone, PartialEq)]
pub struct Quantity {
    /// The value in the coherent SI unit; of a pressure absolute, in Pa; of a temperature in K.
    pub si: f64,
    /// The value in `unit`.
    pub value: f64,
    /// The unit.
    pub unit: Unit,
    /// Of a pressure: absolute, gauge or a difference.
    pub pressure: Option<PressureBasis>,
}

/// From where a pressure counts.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum PressureBasis {
    /// From vacuum.
    Absolute,
    /// From the site's atmosphere.
    Gauge,
    /// Between two pressures.
    Difference,
}

/// The site's atmosphere.
#[derive(Debug, Clone, PartialEq)]
pub struct SiteRow {
    /// The atmosphere.
    pub atmosphere: Quantity,
    /// As written, where the sheet says it; else the standard atmosphere is assumed.
    pub written: Option<String>,
    /// Where it comes from.
    pub source: Option<String>,
}

/// A named quantity: an input or a derived value.
#[derive(Debug, Clone, PartialEq)]
pub struct InputRow {
    /// Its name.
    pub name: String,
    /// `basis`, `assume` or `let`.
    pub role: &'static str,
    /// The value as its author wrote it (of a `let`, the formula).
    pub written: String,
    /// The formula with numbers put in, of a `let`.
    pub put_in: Option<String>,
    /// Its value.
    pub value: Quantity,
    /// The interval as written.
    pub interval: Option<String>,
    /// The standard uncertainty in SI.
    pub standard_uncertainty: Option<f64>,
    /// The standard uncertainty in `value.unit` (of a temperature as a difference).
    pub standard_uncertainty_shown: Option<f64>,
    /// Where it comes from.
    pub source: Option<String>,
}

/// A species that the sheet uses.
#[derive(Debug, Clone, PartialEq)]
pub struct SpeciesRow {
    /// Its name.
    pub name: String,
    /// Its plain name.
    pub label: Option<String>,
    /// Its formula.
    pub formula: Option<String>,
    /// Its CAS number.
    pub cas: Option<String>,
    /// Its molar mass, kg/mol.
    pub molar_mass: Option<f64>,
    /// Whether the molar mass is given, not worked from the formula.
    pub molar_mass_given: bool,
    /// From which file, if not the sheet.
    pub from: Option<String>,
    /// Remarks in its block.
    pub remarks: Vec<String>,
}

/// A mixture.
#[derive(Debug, Clone, PartialEq)]
pub struct MixtureRow {
    /// Its name.
    pub name: String,
    /// As written.
    pub written: String,
    /// Species, share by mass, share by mole (where every part has a molar mass).
    pub portions: Vec<(String, f64, Option<f64>)>,
    /// Where it comes from.
    pub source: Option<String>,
}

/// A datum that the answers rest on.
#[derive(Debug, Clone, PartialEq)]
pub struct DataRow {
    /// The species.
    pub species: String,
    /// Its phase by name; empty for what belongs to the species.
    pub phase: String,
    /// `cp`, `density`, `melting`, `boiling`, `sublimation`, `transition`, `formation`, `molar mass`, `decomposition`.
    pub what: &'static str,
    /// As written.
    pub written: String,
    /// Where it is valid, K.
    pub valid_kelvin: Option<(f64, f64)>,
    /// Where it is used, K.
    pub used_kelvin: Option<(f64, f64)>,
    /// Where it comes from.
    pub source: Option<String>,
    /// Its interval, as written.
    pub interval: Option<String>,
    /// How far a second source lies, as written.
    pub spread: Option<String>,
    /// Whether it is used outside its range.
    pub extrapolated: bool,
    /// What admits that, as written after `because`.
    pub because: Option<String>,
}

/// A state.
#[derive(Debug, Clone, PartialEq)]
pub struct StateRow {
    /// Its name.
    pub name: String,
    /// As written.
    pub written: String,
    /// Whether its amounts are rates.
    pub flow: bool,
    /// Its temperature.
    pub temperature: Quantity,
    /// Whether a step settled the temperature.
    pub temperature_settled: bool,
    /// Its pressure.
    pub pressure: Quantity,
    /// Whether a step settled the pressure.
    pub pressure_settled: bool,
    /// Its mass or mass flow.
    pub mass: Quantity,
    /// Its amount of substance or molar flow, where every species has a molar mass.
    pub amount: Option<Quantity>,
    /// Phases as `Zn(l)` with their shares: by mole where every species has a molar mass, else by mass.
    pub phases: Vec<(String, f64)>,
    /// Whether the shares are by mole.
    pub phases_by_mole: bool,
}

/// What a leg does.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum LegKind {
    Sensible,
    Transition,
    Reaction,
    Pressure,
    Mixing,
}

impl LegKind {
    /// The word in JSON.
    pub fn as_str(self) -> &'static str {
        match self {
            LegKind::Sensible => "sensible",
            LegKind::Transition => "transition",
            LegKind::Reaction => "reaction",
            LegKind::Pressure => "pressure",
            LegKind::Mixing => "mixing",
        }
    }
}

/// A part of a step's enthalpy change.
#[derive(Debug, Clone, PartialEq)]
pub struct LegRow {
    /// What it does.
    pub kind: LegKind,
    /// The species.
    pub species: String,
    /// The phase; of a transition `solid to liquid`.
    pub phase: String,
    /// From, K.
    pub from_kelvin: f64,
    /// To, K.
    pub to_kelvin: f64,
    /// The enthalpy change, J or W.
    pub enthalpy_change: f64,
    /// The datum it rests on, as written.
    pub datum: String,
}

/// A path with its words.
pub type Path = &'static str;

/// A value that a step has, with how it came about.
#[derive(Debug, Clone, PartialEq)]
pub struct Side {
    /// Its symbol, such as `ΔH` or `Q`.
    pub symbol: &'static str,
    /// How it follows, such as `ΔH − W_el`.
    pub formula: String,
    /// Its value.
    pub value: Quantity,
}

/// A step.
#[derive(Debug, Clone, PartialEq)]
pub struct StepRow {
    /// Its name.
    pub name: String,
    /// As written.
    pub written: String,
    /// Whether it is a flow.
    pub flow: bool,
    /// The path, where one is given.
    pub path: Option<Path>,
    /// The legs, in order; their sum is ΔH.
    pub legs: Vec<LegRow>,
    /// ΔH in J or W.
    pub enthalpy_change: f64,
    /// ΔU in J or W.
    pub internal_energy_change: f64,
    /// Q in J or W, where a path is given.
    pub heat: Option<f64>,
    /// W in J or W, where a path is given.
    pub work: Option<f64>,
    /// The values in the order to print them: ΔH, ΔU, and with a path Q, W and the supply.
    pub sides: Vec<Side>,
    /// What it settles, in words, such as `out.T = 36.4 degC`.
    pub settles: Vec<String>,
    /// Conventions that this step rests on, in sentences: volumes neglected, routes over 298.15 K and so on.
    pub notes: Vec<String>,
}

/// A duty.
#[derive(Debug, Clone, PartialEq)]
pub struct DutyRow {
    /// Its name.
    pub name: String,
    /// As written.
    pub written: String,
    /// The formula of what the matter takes, with numbers put in.
    pub put_in: String,
    /// The efficiency with numbers put in, where one is said.
    pub efficiency: Option<String>,
    /// What the matter takes.
    pub useful: Quantity,
    /// Useful over efficiency.
    pub supplied: Quantity,
}

/// A result.
#[derive(Debug, Clone, PartialEq)]
pub struct ResultRow {
    /// Its name.
    pub name: String,
    /// The formula as written.
    pub formula: String,
    /// The formula with numbers put in.
    pub put_in: String,
    /// Its value.
    pub value: Quantity,
    /// Its dimension, such as `kg m2 s-3`.
    pub dimension: String,
}

/// A requirement with its verdict.
#[derive(Debug, Clone, PartialEq)]
pub struct RequirementRow {
    /// As written, without `require`.
    pub written: String,
    /// The value found.
    pub found: Quantity,
    /// The limits in the unit of `found`: one, or two for `within`.
    pub limits: Vec<Quantity>,
    /// Whether it is met.
    pub met: bool,
    /// Why it is required.
    pub because: Option<String>,
}

/// A column of a table.
#[derive(Debug, Clone, PartialEq)]
pub struct TableColumn {
    /// Its name.
    pub name: String,
    /// The unit that its numbers are in.
    pub unit: Unit,
    /// Of a pressure: absolute, gauge or a difference.
    pub pressure: Option<PressureBasis>,
}

/// A row of a table: a number for each column, `None` where the row is refused.
pub type TableRow = Vec<Option<f64>>;

/// A table.
#[derive(Debug, Clone, PartialEq)]
pub struct TableRows {
    /// Its title.
    pub title: String,
    /// Its columns, the varied input first.
    pub columns: Vec<TableColumn>,
    /// Its rows.
    pub rows: Vec<TableRow>,
}

/// A warning or a remark of the tool.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Finding {
    /// Its code.
    pub code: &'static str,
    /// What it says.
    pub message: String,
    /// The line of the sheet it belongs to, where there is one.
    pub line: Option<usize>,
}

/// A caution.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Caution {
    /// Its code.
    pub code: &'static str,
    /// What is found in this sheet.
    pub finding: String,
    /// What to do about it, in sentences.
    pub advice: String,
}

/// A statement of the sheet in its place: the index into the list of its sort.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
#[allow(missing_docs)]
pub enum Item {
    Remark(usize),
    Species(usize),
    Mixture(usize),
    Site,
    Input(usize),
    State(usize),
    Step(usize),
    Duty(usize),
    Result(usize),
    Requirement(usize),
    Table(usize),
}

/// The whole report.
#[derive(Debug, Clone, PartialEq)]
pub struct Report {
    /// The version of the program.
    pub version: &'static str,
    /// The file's name as given.
    pub file: String,
    /// The title; empty without a head.
    pub title: String,
    /// The entries of the head, word and text.
    pub head: Vec<(String, String)>,
    /// The remarks.
    pub remarks: Vec<String>,
    /// The site.
    pub site: SiteRow,
    /// Inputs, assumptions and derived values.
    pub inputs: Vec<InputRow>,
    /// The species used.
    pub species: Vec<SpeciesRow>,
    /// The mixtures.
    pub mixtures: Vec<MixtureRow>,
    /// The data used.
    pub data: Vec<DataRow>,
    /// The states.
    pub states: Vec<StateRow>,
    /// The steps.
    pub steps: Vec<StepRow>,
    /// The duties.
    pub duties: Vec<DutyRow>,
    /// The results.
    pub results: Vec<ResultRow>,
    /// The requirements.
    pub requirements: Vec<RequirementRow>,
    /// The tables.
    pub tables: Vec<TableRows>,
    /// The statements in the order of the sheet.
    pub order: Vec<Item>,
    /// The warnings.
    pub warnings: Vec<Finding>,
    /// The cautions of this sheet.
    pub cautions: Vec<Caution>,
    /// Conventions that hold for the whole report, in sentences: signs, ideal gas, atomic weights, exact inputs.
    pub conventions: Vec<String>,
}

impl Report {
    /// Whether every requirement is met.
    pub fn all_met(&self) -> bool {
        self.requirements.iter().all(|requirement| requirement.met)
    }
}

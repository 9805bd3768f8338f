//! A small report, written by hand, for the tests of its readers: the zinc pot of the invented works "Tern Point".

use super::model::*;
use crate::units::read_unit;

pub(super) fn quantity(value: f64, unit: &str) -> Quantity {
    let unit = read_unit(unit).expect("a unit");
    Quantity { si: unit.to_si(value, 101_325.0), value, unit, pressure: None }
}

fn absolute(kilopascal: f64) -> Quantity {
    Quantity { pressure: Some(PressureBasis::Absolute), ..quantity(kilopascal, "kPa") }
}

fn input(name: &str, role: &'static str, written: &str, value: Quantity) -> InputRow {
    InputRow {
        name: name.into(),
        role,
        written: written.into(),
        put_in: None,
        value,
        interval: None,
        standard_uncertainty: None,
        standard_uncertainty_shown: None,
        source: None,
    }
}

fn inputs() -> Vec<InputRow> {
    let charge = InputRow {
        interval: Some("± 2 %".into()),
        standard_uncertainty: Some(5.196),
        standard_uncertainty_shown: Some(5.196),
        source: Some("weighbridge ticket 8841".into()),
        ..input("charge", "basis", "450 kg", quantity(450.0, "kg"))
    };
    let eff = InputRow {
        interval: Some("± 4 pp (k=2)".into()),
        standard_uncertainty: Some(0.02),
        standard_uncertainty_shown: Some(2.0),
        source: Some("burner commissioning report".into()),
        ..input("eff", "assume", "62 %", quantity(62.0, "%"))
    };
    let spare = InputRow {
        put_in: Some("450 kg * 5 %".into()),
        ..input("spare", "let", "charge * 5 %", quantity(22.5, "kg"))
    };
    vec![charge, input("store_T", "basis", "18 degC", quantity(18.0, "degC")), eff, spare]
}

fn state(name: &str, written: &str, celsius: f64, phase: &str) -> StateRow {
    StateRow {
        name: name.into(),
        written: written.into(),
        flow: false,
        temperature: quantity(celsius, "degC"),
        temperature_settled: false,
        pressure: absolute(101.325),
        pressure_settled: false,
        mass: quantity(450.0, "kg"),
        amount: Some(quantity(6_882.84, "mol")),
        phases: vec![(phase.into(), 1.0)],
        phases_by_mole: true,
    }
}

const SOLID_CP: &str = "cp = 22.40 J/(mol K) + 10.05e-3 J/(mol K2) * T for 273.15 K to 692.68 K";
const MELTING: &str = "melting at 692.68 K takes 7.322 kJ/mol";

fn leg(kind: LegKind, phase: &str, from: f64, to: f64, joule: f64, datum: &str) -> LegRow {
    LegRow {
        kind,
        species: "Zn".into(),
        phase: phase.into(),
        from_kelvin: from,
        to_kelvin: to,
        enthalpy_change: joule,
        datum: datum.into(),
    }
}

pub(super) fn step() -> StepRow {
    let side = |symbol, formula: &str, value, unit| Side {
        symbol,
        formula: formula.into(),
        value: quantity(value, unit),
    };
    StepRow {
        name: "heat_up".into(),
        written: "cold -> melt, at constant pressure".into(),
        flow: false,
        path: Some("at constant pressure"),
        legs: vec![
            leg(LegKind::Sensible, "solid", 291.15, 692.68, 75.6e6, SOLID_CP),
            leg(LegKind::Transition, "solid to liquid", 692.68, 692.68, 50.4e6, MELTING),
        ],
        enthalpy_change: 126.0e6,
        internal_energy_change: 126.0e6 - 554.04,
        heat: Some(126.0e6),
        work: Some(-554.04),
        sides: vec![
            side("ΔH", "sum of the legs", 126.0, "MJ"),
            side("ΔU", "ΔH − Δ(pV)", 125.999_446, "MJ"),
            side("Q", "ΔH", 126.0, "MJ"),
            side("W", "ΔU − Q", -554.04, "J"),
        ],
        settles: vec![],
        notes: vec!["The density of the solid is taken as constant.".into()],
    }
}

fn datum(phase: &str, what: &'static str, written: &str, used: (f64, f64)) -> DataRow {
    DataRow {
        species: "Zn".into(),
        phase: phase.into(),
        what,
        written: written.into(),
        valid_kelvin: Some((273.15, 692.68)),
        used_kelvin: Some(used),
        source: Some("invented for this sheet".into()),
        interval: None,
        spread: None,
        extrapolated: false,
        because: None,
    }
}

fn data() -> Vec<DataRow> {
    let melting = DataRow {
        valid_kelvin: None,
        interval: Some("± 1 %".into()),
        spread: Some("0.8 % against \"a second table\"".into()),
        ..datum("", "melting", MELTING, (692.68, 692.68))
    };
    let liquid = DataRow {
        extrapolated: true,
        because: Some("vendor data end at 700 K".into()),
        source: None,
        ..datum("liquid", "cp", "cp = 31.38 J/(mol K)", (692.68, 733.15))
    };
    vec![datum("solid", "cp", SOLID_CP, (291.15, 692.68)), melting, liquid]
}

fn requirement(written: &str, found: Quantity, limit: Quantity, met: bool) -> RequirementRow {
    RequirementRow {
        written: written.into(),
        found,
        limits: vec![limit],
        met,
        because: Some("installed burner".into()).filter(|_| !met),
    }
}

fn table() -> TableRows {
    let column = |name: &str, unit| TableColumn {
        name: name.into(),
        unit: read_unit(unit).expect("a unit"),
        pressure: None,
    };
    TableRows {
        title: "Rating and pouring temperature".into(),
        columns: vec![column("pour_T", "degC"), column("rating", "kW")],
        rows: vec![
            vec![Some(430.0), Some(19.8)],
            vec![Some(440.0), None],
            vec![Some(450.0), Some(20.146_69)],
        ],
    }
}

fn zinc() -> SpeciesRow {
    SpeciesRow {
        name: "Zn".into(),
        label: Some("zinc".into()),
        formula: Some("Zn".into()),
        cas: Some("7440-66-6".into()),
        molar_mass: Some(0.06538),
        molar_mass_given: false,
        from: Some("metals".into()),
        remarks: vec!["Pure metal.".into()],
    }
}

fn rating() -> ResultRow {
    ResultRow {
        name: "rating".into(),
        formula: "burner.supplied".into(),
        put_in: "12.491 kW / 62 %".into(),
        value: quantity(20.146_69, "kW"),
        dimension: "kg m2 s-3".into(),
    }
}

fn burner() -> DutyRow {
    DutyRow {
        name: "burner".into(),
        written: "heat_up.Q + wall * time, over time, at efficiency eff".into(),
        put_in: "(134.71 MJ + 1.8 kW * 3.5 h) / 3.5 h".into(),
        efficiency: Some("62 %".into()),
        useful: quantity(12.491, "kW"),
        supplied: quantity(20.146_69, "kW"),
    }
}

pub(super) fn report() -> Report {
    let words = [("number", "TP-0147"), ("revision", "B"), ("prepared", "process group, 2026-11-30")];
    Report {
        version: "0.1.0",
        file: "zinc-pot.heat".into(),
        title: "Zinc holding pot 2".into(),
        head: words.map(|(word, text)| (word.to_owned(), text.to_owned())).into(),
        remarks: vec!["Purpose: show that the\u{1b}[31m burner suffices.".into()],
        site: SiteRow { atmosphere: absolute(101.325), written: None, source: None },
        inputs: inputs(),
        species: vec![zinc()],
        mixtures: vec![MixtureRow {
            name: "alloy".into(),
            written: "by mass { Zn 96 %, Al rest }".into(),
            portions: vec![("Zn".into(), 0.96, Some(0.908)), ("Al".into(), 0.04, None)],
            source: Some("works analysis 17".into()),
        }],
        data: data(),
        states: vec![
            state("cold", "charge of Zn at store_T", 18.0, "Zn(s)"),
            StateRow { temperature_settled: true, ..state("melt", "cold at ?", 460.0, "Zn(l)") },
        ],
        steps: vec![step()],
        duties: vec![burner()],
        results: vec![rating()],
        requirements: vec![
            requirement("rating <= 20 kW", quantity(20.146_69, "kW"), quantity(20.0, "kW"), false),
            requirement("charge <= 500 kg", quantity(450.0, "kg"), quantity(500.0, "kg"), true),
        ],
        tables: vec![table()],
        order: vec![
            Item::Remark(0),
            Item::Species(0),
            Item::Mixture(0),
            Item::Input(0),
            Item::Input(1),
            Item::Input(2),
            Item::Input(3),
            Item::State(0),
            Item::State(1),
            Item::Step(0),
            Item::Duty(0),
            Item::Result(0),
            Item::Requirement(0),
            Item::Requirement(1),
            Item::Table(0),
        ],
        warnings: vec![Finding {
            code: "W105",
            message: "a datum is used outside its range".into(),
            line: Some(12),
        }],
        cautions: vec![Caution {
            code: "C802",
            finding: "water stands beside metal at 460 degC".into(),
            advice: "Keep the charge dry.".into(),
        }],
        conventions: crate::report::standing_conventions(),
    }
}

use serde_json::{Value, json};

use super::render_json;
use crate::report::model::*;
use crate::report::sample;

fn read(report: &Report) -> Value {
    serde_json::from_str(&render_json(report)).expect("valid JSON")
}

fn keys(object: &Value) -> Vec<&str> {
    object.as_object().map(|map| map.keys().map(String::as_str).collect()).unwrap_or_default()
}

#[test]
fn the_head_has_every_entry_by_its_word() {
    let mut report = sample::report();
    let read_head = |report: &Report| read(report)["sheet"].clone();
    assert_eq!(
        read_head(&report),
        json!({ "title": "Zinc holding pot 2", "number": "TP-0147", "revision": "B",
                "prepared": "process group, 2026-11-30" })
    );
    report.head =
        vec![("note".into(), "one".into()), ("note".into(), "two".into()), ("title".into(), "b".into())];
    assert_eq!(
        read_head(&report),
        json!({ "title": "Zinc holding pot 2\nb", "number": null, "revision": null, "note": "one\ntwo" })
    );
}

#[test]
fn the_fields_stand_in_the_documented_order() {
    let text = render_json(&sample::report());
    let place =
        |field: &str| text.find(&format!("\n  \"{field}\": ")).unwrap_or_else(|| panic!("no {field}"));
    let fields =
        ["heatpath", "sheet", "inputs", "data", "states", "steps", "results", "requirements", "tables"];
    let places: Vec<_> = fields.iter().chain(&["warnings"]).map(|field| place(field)).collect();
    assert!(places.is_sorted(), "{places:?}");
    assert!(text.starts_with("{\n") && text.ends_with("}\n"));
}

#[test]
fn an_input_has_its_value_in_its_unit_and_in_si() {
    let inputs = read(&sample::report())["inputs"].clone();
    assert_eq!(
        inputs[0],
        json!({ "name": "charge", "role": "basis", "value": 450.0, "unit": "kg", "si": 450.0,
                "std_uncertainty_si": 5.196, "source": "weighbridge ticket 8841", "written": "450 kg",
                "interval": "± 2 %" })
    );
    assert_eq!(inputs[1]["si"], 291.15);
    assert_eq!(inputs[1]["std_uncertainty_si"], Value::Null);
    assert_eq!(inputs[3]["role"], "let");
}

#[test]
fn a_datum_has_its_ranges_in_kelvin() {
    let data = read(&sample::report())["data"].clone();
    assert_eq!(data[0]["valid_K"], json!([273.15, 692.68]));
    assert_eq!(data[0]["used_K"], json!([291.15, 692.68]));
    assert_eq!(data[0]["extrapolated"], false);
    assert_eq!(data[1]["valid_K"], Value::Null);
    assert_eq!(data[2]["extrapolated"], true);
    assert_eq!(data[2]["because"], "vendor data end at 700 K");
}

#[test]
fn a_batch_has_joules_and_a_flow_has_watts() {
    let mut report = sample::report();
    let batch = read(&report);
    assert_eq!(batch["steps"][0]["dH_J"], 126.0e6);
    assert_eq!(batch["steps"][0]["W_J"], -554.04);
    assert_eq!(batch["steps"][0]["legs"][1]["kind"], "transition");
    assert_eq!(batch["steps"][0]["legs"][1]["dH_J"], 50.4e6);
    assert_eq!(batch["states"][0]["mass_kg"], 450.0);
    assert_eq!(batch["states"][0]["amount_mol"], 6_882.84);
    report.steps[0].flow = true;
    report.states[0].flow = true;
    let flow = read(&report);
    let names: Vec<_> = keys(&flow["steps"][0]).into_iter().filter(|key| key.ends_with("_J")).collect();
    assert_eq!(names, Vec::<&str>::new());
    assert_eq!(flow["steps"][0]["Q_W"], 126.0e6);
    assert_eq!(flow["steps"][0]["legs"][0]["dH_W"], 75.6e6);
    assert_eq!(flow["states"][0]["mass_kg_s"], 450.0);
    assert_eq!(flow["states"][0]["amount_mol_s"], 6_882.84);
}

#[test]
fn heat_and_work_are_null_without_a_path() {
    let mut report = sample::report();
    report.steps[0] = StepRow { path: None, heat: None, work: None, ..sample::step() };
    let step = read(&report)["steps"][0].clone();
    assert_eq!((&step["Q_J"], &step["W_J"], &step["path"]), (&Value::Null, &Value::Null, &Value::Null));
    assert_eq!(step["dH_J"], 126.0e6);
}

#[test]
fn the_phases_of_a_state_keep_their_order() {
    let mut report = sample::report();
    report.states[0].phases = vec![("Zn(s)".into(), 0.25), ("Al(l)".into(), 0.75)];
    report.states[0].amount = None;
    let text = render_json(&report);
    assert!(text.find("\"Zn(s)\"") < text.find("\"Al(l)\""));
    assert_eq!(read(&report)["states"][0]["amount_mol"], Value::Null);
    assert_eq!(read(&report)["states"][0]["phases"], json!({ "Zn(s)": 0.25, "Al(l)": 0.75 }));
}

#[test]
fn a_verdict_has_no_odds() {
    let requirement = read(&sample::report())["requirements"][0].clone();
    assert_eq!(requirement["text"], "rating <= 20 kW");
    assert_eq!(requirement["met"], false);
    assert_eq!(requirement["because"], "installed burner");
    assert_eq!(requirement["probability"], Value::Null);
}

#[test]
fn results_tables_and_findings_are_complete() {
    let read = read(&sample::report());
    assert_eq!(read["results"][0]["value"], 20.146_69);
    assert_eq!(read["results"][0]["unit"], "kW");
    assert_eq!(read["results"][0]["dimension"], "kg m2 s-3");
    assert_eq!(read["results"][0]["std_uncertainty_si"], Value::Null);
    assert_eq!(read["tables"][0]["columns"][0], json!({ "name": "pour_T", "unit": "degC" }));
    assert_eq!(read["tables"][0]["rows"], json!([[430.0, 19.8], [440.0, null], [450.0, 20.146_69]]));
    assert_eq!(read["warnings"][0]["code"], "W105");
    assert_eq!(read["cautions"][0]["advice"], "Keep the charge dry.");
}

#[test]
fn numbers_read_back_to_the_same_bits() {
    let mut report = sample::report();
    for value in [0.1 + 0.2, 134_705_984.6, 5e-324, f64::MAX, -2.0 / 3.0, 1e21] {
        report.results[0].value.si = value;
        assert_eq!(read(&report)["results"][0]["si"].as_f64().map(f64::to_bits), Some(value.to_bits()));
    }
}

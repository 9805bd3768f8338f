use super::{Style, render_text};
use crate::report::model::*;
use crate::report::sample;

const PLAIN: Style = Style { colour: false, width: 100 };

fn text() -> String {
    render_text(&sample::report(), PLAIN)
}

/// The lines after the one that holds `first`, without the blanks before them.
fn from<'a>(text: &'a str, first: &str) -> Vec<&'a str> {
    let lines: Vec<_> = text.lines().map(str::trim_start).skip_while(|line| !line.contains(first)).collect();
    assert!(!lines.is_empty(), "no `{first}` in\n{text}");
    lines
}

#[test]
fn the_verdict_stands_at_the_top() {
    let text = text();
    let short = from(&text, "Answer in short");
    assert_eq!(short[1], "1 of 2 requirements is not met: rating <= 20 kW (found 20.147 kW).");
    assert_eq!(short[2], "rating = 20.147 kW.");
    assert_eq!(short[3], "1 warning and 1 caution at the end of this report.");
}

#[test]
fn a_verdict_has_its_value_its_limit_and_its_reason() {
    let text = text();
    let lines = from(&text, "Verdicts ─");
    assert_eq!(lines[1], "[13]  not met  rating <= 20 kW");
    assert_eq!(lines[2], "found 20.147 kW; limit 20 kW");
    assert_eq!(lines[3], "required because: installed burner");
    assert_eq!(lines[4], "[14]  met  charge <= 500 kg");
}

#[test]
fn a_result_goes_from_formula_over_numbers_to_value() {
    let text = text();
    let lines = from(&text, "[12]  rating");
    assert_eq!(lines[..3], ["[12]  rating = burner.supplied", "= 12.491 kW / 62 %", "= 20.147 kW"]);
    let lines = from(&text, "[7]   spare");
    assert_eq!(lines[..3], ["[7]   spare = charge * 5 %", "= 450 kg * 5 %", "= 22.5 kg"]);
}

#[test]
fn an_input_has_its_interval_its_uncertainty_and_its_source() {
    let text = text();
    let words = |name| from(&text, name)[0].split_whitespace().collect::<Vec<_>>().join(" ");
    assert_eq!(words("  charge  "), "[4] basis charge 450 kg ± 2 % u = 5.2 kg weighbridge ticket 8841");
    assert_eq!(words("  store_T  "), "[5] basis store_T 18 degC exact no source given");
    assert_eq!(words("  eff  "), "[6] assume eff 62 % ± 4 pp (k=2) u = 2 pp burner commissioning report");
}

#[test]
fn the_atmosphere_is_an_assumption_where_the_sheet_is_silent() {
    let text = text();
    let line = from(&text, "site atmosphere")[0];
    assert!(line.starts_with("[3]  assume") && line.contains("101.325 kPa abs"), "{line}");
    assert!(line.contains("standard atmosphere, assumed"), "{line}");
    let mut said = sample::report();
    said.site.written = Some("1005 mbar".into());
    said.site.atmosphere =
        Quantity { pressure: Some(PressureBasis::Absolute), ..sample::quantity(1005.0, "mbar") };
    said.order.insert(3, Item::Site);
    let text = render_text(&said, PLAIN);
    assert!(!text.contains("standard atmosphere, assumed"), "{text}");
    assert!(from(&text, "  atmosphere  ")[0].contains("1005 mbar abs"), "{text}");
}

#[test]
fn an_input_shown_in_another_unit_has_both_and_a_pressure_its_basis() {
    let mut report = sample::report();
    report.inputs[0].written = "0.45 t".into();
    let barg = Quantity { pressure: Some(PressureBasis::Gauge), ..sample::quantity(0.2, "barg") };
    report.inputs[1] = InputRow { written: "0.2 barg".into(), value: barg, ..report.inputs[1].clone() };
    let text = render_text(&report, PLAIN);
    assert!(text.contains("0.45 t = 450 kg ± 2 %"), "{text}");
    assert!(text.contains("0.2 barg (gauge)"), "{text}");
}

#[test]
fn a_state_has_its_temperature_pressure_amounts_and_phases() {
    let text = text();
    let lines = from(&text, "cold = charge of Zn at store_T");
    assert_eq!(lines[1], "18 degC (291.15 K); 101.33 kPa abs; 450 kg (6882.8 mol); Zn(s) 100 % by mole");
    assert!(from(&text, "melt = cold at ?")[1].contains("settled by a step"));
}

#[test]
fn a_step_has_its_path_its_legs_and_how_each_value_follows() {
    let text = text();
    let lines = from(&text, "heat_up: cold -> melt");
    assert_eq!(lines[1], "Path: at constant pressure.");
    assert_eq!(lines[2], "[10.1]  sensible    Zn solid            291.15 K to 692.68 K  75.6 MJ");
    assert!(lines[3].starts_with("by cp = 22.40 J/(mol K) + 10.05e-3 J/(mol K2) * T"), "{}", lines[3]);
    assert!(lines[3].ends_with("[D1]"), "{}", lines[3]);
    assert_eq!(lines[4], "[10.2]  transition  Zn solid to liquid  at 692.68 K           50.4 MJ");
    let spaced = |line: &str| line.split_whitespace().collect::<Vec<_>>().join(" ");
    assert_eq!(spaced(lines[6]), "ΔH = sum of the legs = 126 MJ");
    assert_eq!(spaced(lines[9]), "W = ΔU − Q = -554.04 J");
    assert_eq!(lines[10], "The density of the solid is taken as constant.");
}

#[test]
fn a_step_without_a_path_says_what_it_leaves_open() {
    let mut report = sample::report();
    report.steps[0] = StepRow { path: None, sides: vec![], legs: vec![], ..sample::step() };
    let text = render_text(&report, PLAIN);
    assert!(text.contains("No path is given"), "{text}");
}

#[test]
fn a_datum_has_its_ranges_its_source_and_its_spread() {
    let text = text();
    let lines = from(&text, "[D1]  Zn solid");
    assert_eq!(
        lines[1],
        "valid 273.15 K to 692.68 K; used 291.15 K to 692.68 K; source: invented for this sheet"
    );
    assert!(from(&text, "[D2]  Zn: melting")[1].contains("± 1 %; spread 0.8 % against \"a second table\""));
    let lines = from(&text, "[D3]  Zn liquid");
    assert!(lines[1].ends_with("source: none given"), "{}", lines[1]);
    assert_eq!(
        lines[2],
        "Extrapolated: it is used outside its range, allowed because vendor data end at 700 K."
    );
}

#[test]
fn a_table_has_units_and_says_which_rows_are_refused() {
    let text = text();
    let lines = from(&text, "[15]  Rating and pouring temperature");
    let words = |at: usize| lines[at].split_whitespace().collect::<Vec<_>>();
    assert_eq!((words(1), words(2)), (vec!["pour_T", "rating"], vec!["degC", "kW"]));
    assert_eq!((words(4), words(5)), (vec!["430", "19.800"], vec!["440", "refused"]));
}

#[test]
fn every_report_ends_with_its_conventions_and_a_caution() {
    let text = text();
    for sentence in
        ["positive into the system", "does not propagate them", "Gases are ideal", "C802  water stands"]
    {
        assert!(text.contains(sentence), "{sentence}");
    }
    assert!(text.contains("W105  line 12: a datum is used outside its range"));
    assert!(text.contains("do not replace local codes"));
    assert!(text.ends_with("heatpath 0.1.0, zinc-pot.heat\n"), "{text}");
}

#[test]
fn text_of_the_sheet_loses_its_control_characters_only() {
    let text = text();
    assert!(text.contains("Purpose: show that the[31m burner suffices."));
    assert!(text.chars().all(|c| c == '\n' || !c.is_control()));
}

#[test]
fn colour_adds_nothing_but_colour() {
    let coloured = render_text(&sample::report(), Style { colour: true, ..PLAIN });
    assert!(coloured.contains("\u{1b}[31mnot met\u{1b}[0m  rating <= 20 kW"));
    assert!(coloured.contains("\u{1b}[32mmet\u{1b}[0m  charge <= 500 kg"));
    let codes = ["1", "31", "32", "33", "0"].map(|code| format!("\u{1b}[{code}m"));
    let plain = codes.iter().fold(coloured, |text, code| text.replace(code, ""));
    assert_eq!(plain, text());
}

#[test]
fn no_line_is_wider_than_the_page() {
    for (asked, width) in [(20, 80), (80, 80), (100, 100), (400, 120)] {
        let text = render_text(&sample::report(), Style { colour: false, width: asked });
        let widest = text.lines().map(|line| line.chars().count()).max();
        assert_eq!(widest, Some(width), "the hairline is as wide as the page, and nothing is wider");
    }
}

#[test]
fn a_report_of_nothing_is_still_a_report() {
    let report = Report {
        title: String::new(),
        head: vec![],
        inputs: vec![],
        requirements: vec![],
        data: vec![],
        results: vec![],
        warnings: vec![],
        cautions: vec![],
        order: vec![Item::State(9), Item::Input(9), Item::Remark(9)],
        ..sample::report()
    };
    let text = render_text(&report, PLAIN);
    assert!(text.starts_with("Process sheet without a title\n"), "{text}");
    assert!(text.contains("The sheet states no requirement."), "{text}");
    assert!(text.contains("No input has an interval"), "{text}");
}

#[test]
fn a_leg_too_wide_for_its_columns_is_wrapped_as_a_sentence() {
    let mut report = sample::report();
    report.steps[0].legs[0].species = "(NH4)2Fe(SO4)2·6H2O".into();
    report.steps[0].legs[0].phase = "a_phase_with_quite_a_long_name".into();
    let text = render_text(&report, Style { colour: false, width: 80 });
    let lines = from(&text, "[10.1]");
    assert_eq!(lines[0], "[10.1] sensible (NH4)2Fe(SO4)2·6H2O a_phase_with_quite_a_long_name");
    assert_eq!(lines[1], "291.15 K to 692.68 K 75.6 MJ");
}

#[test]
fn a_value_within_limits_has_both() {
    let mut report = sample::report();
    report.requirements[1].limits.push(sample::quantity(600.0, "kg"));
    assert!(render_text(&report, PLAIN).contains("found 450 kg; limits 500 kg and 600 kg"));
}

#[test]
fn legs_that_cancel_keep_the_unit_of_the_largest() {
    let mut report = sample::report();
    report.steps[0].legs[1].enthalpy_change = -75.6e6;
    report.steps[0].sides[0].value = sample::quantity(3e-8, "J");
    let text = render_text(&report, PLAIN);
    assert!(from(&text, "[10.1]")[0].ends_with(" 75.6 MJ"), "{text}");
    assert!(from(&text, "[10.2]")[0].ends_with(" -75.6 MJ"), "{text}");
}

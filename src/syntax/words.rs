//! The words that begin a statement or an entry, each with its rule of the grammar and its form for messages.

use super::grammar::Rule;

/// A word that begins something, the rule that reads it, and the shape of what it begins.
pub(super) struct Opening {
    pub(super) word: &'static str,
    pub(super) rule: Rule,
    pub(super) form: &'static str,
}

const fn opening(word: &'static str, rule: Rule, form: &'static str) -> Opening {
    Opening { word, rule, form }
}

/// The statement words.
pub(super) const STATEMENTS: &[Opening] = &[
    opening("sheet", Rule::sheet_head, r#"sheet "TITLE" { number "..." }"#),
    opening("use", Rule::use_line, "use Zn, Cu from metals"),
    opening("species", Rule::species_head, r#"species NAME "plain name" { ... }"#),
    opening("mixture", Rule::mixture, "mixture air by mole { O2(g) 21 %, N2(g) rest }"),
    opening("reaction", Rule::reaction, "reaction NAME: A(s) -> B(s) + C(g)"),
    opening("site", Rule::site, "site atmosphere 1005 mbar"),
    opening("basis", Rule::input, r#"basis NAME = 450 kg ± 2 % source "...""#),
    opening("assume", Rule::input, r#"assume NAME = 62 % ± 4 pp source "...""#),
    opening("let", Rule::let_line, "let NAME = EXPRESSION in UNIT"),
    opening("correlate", Rule::correlate, "correlate T1, T2 = 0.9"),
    opening("state", Rule::state, "state NAME = AMOUNT of MATERIAL at TEMPERATURE, PRESSURE"),
    opening("step", Rule::step, "step NAME: START -> END, at constant pressure"),
    opening("duty", Rule::duty, "duty NAME = EXPRESSION, over TIME, at efficiency SHARE"),
    opening("balance", Rule::balance_head, "balance NAME { ... }"),
    opening("settle", Rule::settle, "settle NAME within A to B so that EXPRESSION = EXPRESSION"),
    opening("result", Rule::result, "result NAME = EXPRESSION in UNIT"),
    opening("require", Rule::require, r#"require EXPRESSION <= LIMIT because "...""#),
    opening("table", Rule::table, r#"table "TITLE": COLUMN in UNIT over INPUT from A to B by STEP"#),
    opening("allow", Rule::allow, r#"allow Zn(l) to 1250 K because "...""#),
];

/// The words that begin an entry of a species block, beside `phase`.
pub(super) const SPECIES_ENTRIES: &[Opening] = &[
    opening("formula", Rule::species_entry, "formula Zn"),
    opening("source", Rule::species_entry, r#"source "...""#),
    opening("formation", Rule::species_entry, "formation -350.5 kJ/mol at 298.15 K"),
    opening("cas", Rule::species_entry, r#"cas "7440-66-6""#),
    opening("molar_mass", Rule::species_entry, "molar_mass 65.38 g/mol"),
    opening("melting", Rule::species_entry, "melting at 692.68 K takes 7.322 kJ/mol"),
    opening("boiling", Rule::species_entry, "boiling at 373.15 K takes 40.65 kJ/mol"),
    opening("sublimation", Rule::species_entry, "sublimation at 194.7 K takes 25.2 kJ/mol"),
    opening("transition", Rule::species_entry, "transition alpha to gamma at 1184 K takes 900 J/mol"),
    opening(
        "vapour_pressure",
        Rule::species_entry,
        "vapour_pressure antoine { A = 5.2, B = 1731 K, C = -40 K, p = 1 bar } for 334 K to 480 K",
    ),
    opening("decomposes", Rule::species_entry, "decomposes at 1172 K"),
];

/// The word that opens a phase inside a species block.
pub(super) const PHASE: Opening = opening("phase", Rule::phase_head, "phase solid { ... }");

/// The words that begin an entry of a phase block.
pub(super) const PHASE_ENTRIES: &[Opening] = &[
    opening("cp", Rule::phase_entry, "cp = 31.38 J/(mol K) for 692.68 K to 1180 K"),
    opening("enthalpy", Rule::phase_entry, "enthalpy table from 20 degC { 100 degC 38 kJ/kg, ... }"),
    opening("mean_cp", Rule::phase_entry, "mean_cp from 0 degC table { 100 degC 0.48 kJ/(kg K), ... }"),
    opening("density", Rule::phase_entry, "density 7140 kg/m3"),
    opening("formation", Rule::phase_entry, "formation -241.8 kJ/mol at 298.15 K"),
    opening("source", Rule::phase_entry, r#"source "...""#),
];

/// The words that begin an entry of a balance.
pub(super) const BALANCE_ENTRIES: &[Opening] = &[
    opening("in", Rule::balance_entry, "in stone, fuel, air"),
    opening("out", Rule::balance_entry, "out lime, flue, shell"),
    opening("datum", Rule::balance_entry, "datum 25 degC"),
    opening("net", Rule::balance_entry, "net heating values"),
    opening("gross", Rule::balance_entry, "gross heating values"),
];

/// Words that are reserved everywhere.
pub(super) const RESERVED: &[&str] = &["in", "of", "at", "to", "by", "from", "for", "is"];

/// The opening of `table` whose word is `word`.
pub(super) fn find<'a>(table: &'a [Opening], word: &str) -> Option<&'a Opening> {
    table.iter().find(|opening| opening.word == word)
}

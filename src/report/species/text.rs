//! The list and the page as text.

use super::model::{PageChange, SpeciesPage};
use crate::report::number::{fixed, significant};
use comfy_table::presets::NOTHING;
use comfy_table::{CellAlignment, ContentArrangement, Table};
use std::fmt::Write;

/// The width of a page.
const WIDTH: usize = 100;

/// Families with their species, a line each.
pub fn render_species_list(pages: &[SpeciesPage]) -> String {
    let mut out = String::new();
    let mut family = "";
    let mut rows = Vec::new();
    for page in pages {
        if page.family != family {
            out.push_str(&columns(std::mem::take(&mut rows), &[]));
            family = &page.family;
            let _ = writeln!(out, "{}{family}", if out.is_empty() { "" } else { "\n" });
        }
        let phases: Vec<&str> = page.phases.iter().map(|phase| phase.name.as_str()).collect();
        rows.push(vec![
            format!("  {}", page.name),
            page.label.clone().unwrap_or_default(),
            page.cas.clone().unwrap_or_default(),
            phases.join(", "),
        ]);
    }
    out.push_str(&columns(rows, &[]));
    out
}

fn columns(rows: Vec<Vec<String>>, right: &[usize]) -> String {
    if rows.is_empty() {
        return String::new();
    }
    let mut table = Table::new();
    table.load_style(NOTHING).set_content_arrangement(ContentArrangement::Disabled);
    table.add_rows(rows);
    for (at, column) in table.column_iter_mut().enumerate() {
        column.set_padding((0, 2));
        if right.contains(&at) {
            column.set_cell_alignment(CellAlignment::Right);
        }
    }
    table.lines().map(|line| format!("{}\n", line.trim_end())).collect()
}

/// A species' page.
pub fn render_species_page(page: &SpeciesPage) -> String {
    let mut out = String::new();
    let label = page.label.as_ref().map(|label| format!("  {label}")).unwrap_or_default();
    let _ = writeln!(out, "{}{label}", page.name);
    out.push_str(&"─".repeat(WIDTH));
    out.push('\n');
    let facts = [
        page.formula.as_ref().map(|formula| format!("formula {formula}")),
        page.molar_mass.map(|mass| format!("M = {} g/mol", significant(mass * 1e3, 7))),
        page.cas.as_ref().map(|cas| format!("CAS {cas}")),
        Some(format!("family {}", page.family)),
        page.decomposes.map(|kelvin| format!("decomposes at {} K", significant(kelvin, 6))),
    ];
    let _ = writeln!(out, "{}", facts.into_iter().flatten().collect::<Vec<_>>().join("; "));
    for remark in &page.remarks {
        out.push_str(&wrapped("", remark));
    }
    out.push_str("\nOn heating\n");
    out.push_str(&heating(page));
    let (_, per) = page.basis();
    let _ = writeln!(out, "\nHeat capacity and enthalpy, per {per}, at 101.325 kPa");
    out.push_str(&values(page));
    out.push_str("\nData and sources\n");
    for datum in &page.data {
        out.push_str(&wrapped("  ", &format!("{}: {}", subject(&datum.phase, page), datum.written)));
        let facts = [
            datum.valid_kelvin.map(|(lo, hi)| range("valid", lo, hi)),
            datum.interval.clone(),
            datum.spread.as_ref().map(|spread| format!("spread {spread}")),
            Some(format!("source: {}", datum.source.as_deref().unwrap_or("none given"))),
        ];
        out.push_str(&wrapped("      ", &facts.into_iter().flatten().collect::<Vec<_>>().join("; ")));
    }
    out
}

fn subject(phase: &str, page: &SpeciesPage) -> String {
    if phase.is_empty() { page.name.clone() } else { phase.to_owned() }
}

fn range(word: &str, lo: f64, hi: f64) -> String {
    if lo == hi {
        format!("{word} at {} K", significant(lo, 6))
    } else {
        format!("{word} {} K to {} K", significant(lo, 6), significant(hi, 6))
    }
}

fn wrapped(indent: &str, text: &str) -> String {
    let later = format!("{indent}  ");
    let options = textwrap::Options::new(WIDTH).initial_indent(indent).subsequent_indent(&later);
    textwrap::wrap(text, options).into_iter().map(|line| format!("{line}\n")).collect()
}

/// Phases and transitions, in the order of heating.
fn heating(page: &SpeciesPage) -> String {
    let mut rows = Vec::new();
    for (at, phase) in page.phases.iter().enumerate() {
        let by = if phase.linked {
            String::new()
        } else {
            format!("reached by its symbol, {}({})", page.name, phase.symbol)
        };
        let class = if phase.class == phase.name { String::new() } else { format!(", {}", phase.class) };
        rows.push(vec![
            format!("  {}{class}", phase.name),
            range("data", phase.kelvin.0, phase.kelvin.1),
            by,
        ]);
        let name = &phase.name;
        let next = page.phases.get(at + 1).map(|phase| &phase.name);
        if let Some(change) =
            page.changes.iter().find(|change| &change.between.0 == name && Some(&change.between.1) == next)
        {
            rows.push(vec![
                format!("    to {}", change.between.1),
                range("", change.kelvin.0, change.kelvin.1),
                takes(change, page),
            ]);
        }
    }
    columns(rows, &[])
}

fn takes(change: &PageChange, page: &SpeciesPage) -> String {
    let (factor, per) = page.basis();
    format!("takes {} kJ/{per}", significant(change.latent * factor / 1e3, 6))
}

/// Phase, temperature, heat capacity, enthalpy above 298.15 K.
fn values(page: &SpeciesPage) -> String {
    let (factor, per) = page.basis();
    let molar = page.molar_mass.is_some();
    let (cp_factor, cp_unit) = if molar { (factor, "J/(mol K)") } else { (1e-3, "kJ/(kg K)") };
    let mut rows = vec![vec![
        "  phase".to_owned(),
        "T / K".to_owned(),
        "t / degC".to_owned(),
        format!("cp / {cp_unit}"),
        format!("H(T) − H(298.15 K) / (kJ/{per})"),
    ]];
    for row in &page.rows {
        let above = row.above_reference.map_or("—".to_owned(), |value| fixed(value * factor / 1e3, 3));
        rows.push(vec![
            format!("  {}", page.phases.get(row.phase).map_or("", |phase| phase.name.as_str())),
            fixed(row.kelvin, 2),
            fixed(row.kelvin - 273.15, 2),
            fixed(row.heat_capacity * cp_factor, 3),
            above,
        ]);
    }
    columns(rows, &[1, 2, 3, 4])
}

//! `units`: lists the units that sheets may use.

use super::arguments::{Format, UnitsArguments};
use super::status::Status;
use super::streams::{complain, print};
use crate::diagnostic::nearest;
use crate::units::{Row, listing, listing_matching};
use comfy_table::{ContentArrangement, Table};
use serde::Serialize;

/// The list as a program reads it.
#[derive(Serialize)]
struct Listed<'a> {
    units: Vec<ListedUnit<'a>>,
}

#[derive(Serialize)]
struct ListedUnit<'a> {
    unit: &'a str,
    also: &'a [&'a str],
    name: &'a str,
    dimension: &'a str,
    factor: &'a str,
    prefixes: &'a str,
    standard: &'a str,
}

/// Prints the units, or those that a word finds.
pub(super) fn units(arguments: &UnitsArguments) -> Status {
    let rows = arguments.word.as_deref().map_or_else(listing, listing_matching);
    if let (true, Some(word)) = (rows.is_empty(), &arguments.word) {
        return unknown(word);
    }
    match arguments.format {
        Format::Text => print(&text(&rows), Status::Well),
        Format::Json => print(&json(&rows), Status::Well),
    }
}

fn unknown(word: &str) -> Status {
    let rows = listing();
    let spellings = rows.iter().flat_map(|row| row.also.iter().copied().chain([row.unit]));
    let names = rows.iter().flat_map(|row| row.name.split_whitespace().chain([row.name, row.dimension]));
    let help = match nearest(word.trim(), spellings.chain(names)) {
        Some(near) => format!("`{near}` is the nearest; `heatpath units` lists all units"),
        None => "`heatpath units` lists all units; a compound unit is made from them".to_owned(),
    };
    complain(&format!("no unit of the list matches `{word}`"), Some(&help));
    Status::Wrong
}

/// One unit a line however long, so that the list can be searched line by line.
fn text(rows: &[Row]) -> String {
    let mut table = Table::new();
    table.load_style(comfy_table::presets::NOTHING).set_content_arrangement(ContentArrangement::Disabled);
    table.set_header(["unit", "name", "dimension", "factor", "standard"]);
    for row in rows {
        table.add_row([row.unit, row.name, row.dimension, &row.factor, row.standard]);
    }
    table.lines().map(|line| format!("{}\n", line.trim())).collect()
}

fn json(rows: &[Row]) -> String {
    let units = rows.iter().map(|row| ListedUnit {
        unit: row.unit,
        also: row.also,
        name: row.name,
        dimension: row.dimension,
        factor: &row.factor,
        prefixes: &row.prefixes,
        standard: row.standard,
    });
    let listed = Listed { units: units.collect() };
    let text = serde_json::to_string_pretty(&listed).expect("texts and lists always turn into JSON");
    text + "\n"
}

//! The examples: each is worked, and its report stands beside it as it is printed.
//!
//! `HEATPATH_BLESS=1` rewrites the reports after a change that is meant.

use crate::program::{Ran, heatpath, path};
use crate::sheets::{Sheet, gather, sheets_below};
use std::collections::BTreeSet;

/// Examples whose answer is no: a requirement is not met.
const ANSWER_IS_NO: &[&str] = &["examples/zinc-pot.heat"];

fn report_of(sheet: &Sheet) -> String {
    format!("{}.report.txt", sheet.name.trim_end_matches(".heat"))
}

/// What differs, if anything.
fn mismatch(sheet: &Sheet, bless: bool) -> Option<String> {
    let Ran { status, stdout, stderr } = heatpath(&["run", &sheet.name]);
    let wanted = if ANSWER_IS_NO.contains(&sheet.name.as_str()) { 1 } else { 0 };
    if status != Some(wanted) || !stderr.is_empty() {
        return Some(format!("{}: wanted exit status {wanted}, found {status:?}: {stderr}", sheet.name));
    }
    let file = path(&report_of(sheet));
    if bless {
        std::fs::write(&file, &stdout).expect("the report can be written");
    }
    let kept = std::fs::read_to_string(&file).unwrap_or_default().replace("\r\n", "\n");
    first_difference(&kept, &stdout).map(|line| format!("{}: {line}", report_of(sheet)))
}

fn first_difference(kept: &str, printed: &str) -> Option<String> {
    let pairs = (1..).zip(kept.lines().map(Some).chain(std::iter::repeat(None)).zip(printed.lines()));
    let differing = pairs.into_iter().find(|(_, (kept, printed))| *kept != Some(*printed));
    match differing {
        Some((line, (kept, printed))) => {
            Some(format!("line {line}: kept `{}`, printed `{printed}`", kept.unwrap_or_default()))
        }
        None => (kept != printed).then(|| "the kept report goes on past the printed one".to_owned()),
    }
}

#[test]
fn every_example_prints_the_report_that_stands_beside_it() {
    let sheets = sheets_below("examples");
    assert!(sheets.len() >= 8, "only {} examples were found", sheets.len());
    let bless = std::env::var_os("HEATPATH_BLESS").is_some_and(|value| value == "1");
    let failures: Vec<_> = sheets.iter().filter_map(|sheet| mismatch(sheet, bless)).collect();
    assert!(failures.is_empty(), "{}", failures.join("\n"));
}

#[test]
fn every_report_belongs_to_an_example() {
    let wanted: BTreeSet<_> = sheets_below("examples").iter().map(|sheet| path(&report_of(sheet))).collect();
    let mut reports = Vec::new();
    gather(&path("examples"), "txt", &mut reports);
    let alone: Vec<_> = reports.iter().filter(|report| !wanted.contains(*report)).collect();
    assert!(alone.is_empty(), "without a sheet: {alone:?}");
}

#[test]
fn every_example_says_how_its_main_figure_was_worked_out_another_way() {
    for sheet in sheets_below("examples") {
        assert!(sheet.header.iter().any(|line| line.contains(" by hand")), "{}", sheet.name);
    }
}

//! The corpus: small sheets, each with the diagnostics it must give, and no others.
//!
//! A case says in its header what is run and expected; lines count from 1, in order of report:
//!
//! ```text
//! # case: what is tried
//! # run: check | run
//! # expect: CODE line N      or: none
//! # help: a part of the help of the diagnostic before
//! # exit: N                  unsaid: 2 with an error among them, else 0
//! ```

use crate::program::{Ran, heatpath};
use crate::sheets::{Sheet, sheets_below};
use heatpath::diagnostic::{Code, Severity};
use serde_json::Value;
use std::collections::BTreeSet;

/// Codes without a case, and why.
const WITHOUT_CASE: &[(Code, &str)] = &[
    (Code::FileTooLarge, "a file of 256 MB is not kept; `cli.rs` makes one"),
    (Code::FileUnreadable, "no file is the case; `robust.rs` names one that is missing"),
];

/// A diagnostic as the tests compare it.
#[derive(Debug, Clone, PartialEq, Eq)]
struct Found {
    code: String,
    line: Option<u64>,
    help: String,
}

fn cases() -> Vec<Sheet> {
    sheets_below("tests/corpus").into_iter().filter(|sheet| sheet.said("case:").next().is_some()).collect()
}

#[test]
fn every_case_gives_its_diagnostics_and_no_others() {
    let cases = cases();
    assert!(cases.len() > 300, "only {} cases were found", cases.len());
    let failures: Vec<_> = cases.iter().filter_map(mismatch).collect();
    assert!(
        failures.is_empty(),
        "{} of {} cases differ:\n\n{}",
        failures.len(),
        cases.len(),
        failures.join("\n")
    );
}

#[test]
fn every_code_has_a_case() {
    let cases = cases();
    let shown: BTreeSet<_> = cases.iter().flat_map(wanted).map(|found| found.code).collect();
    let without = |code: &Code| WITHOUT_CASE.iter().any(|(known, _)| known == code);
    let missing: Vec<_> = Code::ALL
        .iter()
        .filter(|code| !without(code))
        .filter(|code| !shown.contains(code.as_str()))
        .collect();
    assert!(missing.is_empty(), "without a case: {missing:?}");
    let idle: Vec<_> = WITHOUT_CASE.iter().filter(|(code, _)| shown.contains(code.as_str())).collect();
    assert!(idle.is_empty(), "excepted, but with a case: {idle:?}");
    let unknown: Vec<_> = shown.iter().filter(|code| Code::parse(code).is_none()).collect();
    assert!(unknown.is_empty(), "no such code: {unknown:?}");
}

#[test]
fn every_code_is_explained_with_an_example() {
    for code in Code::ALL {
        let page = code.explanation();
        let title = format!("# {code}: {}\n", code.title());
        assert!(page.starts_with(&title), "{code}: the page does not begin with `{}`", title.trim());
        assert!(page.len() > title.len() + 100, "{code}: the page says no more than its title");
        assert!(page.contains("\n```heat\n"), "{code}: the page shows no sheet");
    }
}

#[test]
fn every_sheet_of_the_corpus_is_a_case_or_used_by_one() {
    let cases = cases();
    let folders: BTreeSet<_> = cases.iter().filter_map(|case| case.name.strip_suffix("/main.heat")).collect();
    for sheet in sheets_below("tests/corpus") {
        let folder = sheet.name.rsplit_once('/').map_or("", |(folder, _)| folder);
        assert!(
            sheet.said("case:").next().is_some() || folders.contains(folder),
            "{}: no header",
            sheet.name
        );
    }
}

/// What differs, if anything.
fn mismatch(case: &Sheet) -> Option<String> {
    let (ran, printed) = match case.said("run:").next() {
        Some("check") => {
            let ran = heatpath(&["check", "--format", "json", &case.name]);
            let printed = ran.stdout.clone();
            (ran, printed)
        }
        Some("run") => {
            let ran = heatpath(&["run", "--format", "json", "--diagnostics", "json", &case.name]);
            let printed = ran.stderr.clone();
            (ran, printed)
        }
        other => return Some(format!("{}: `# run: {}` is unknown", case.name, other.unwrap_or_default())),
    };
    let differences = match found(&printed) {
        Some(found) => differences(case, &wanted(case), &found, &ran),
        None => vec![format!("no diagnostics, but {:?}: {}{}", ran.status, ran.stdout, ran.stderr)],
    };
    (!differences.is_empty()).then(|| format!("{}\n    {}", case.name, differences.join("\n    ")))
}

fn differences(case: &Sheet, wanted: &[Found], found: &[Found], ran: &Ran) -> Vec<String> {
    let mut differences = Vec::new();
    if places(wanted) != places(found) {
        differences.push(format!("wanted {}, found {}", places(wanted), places(found)));
    } else {
        let pairs = wanted.iter().zip(found).filter(|(wanted, found)| !found.help.contains(&wanted.help));
        differences.extend(
            pairs.map(|(wanted, found)| format!("wanted `{}` in the help `{}`", wanted.help, found.help)),
        );
    }
    let exit = exit(case, wanted);
    if ran.status != Some(exit) {
        differences.push(format!("wanted exit status {exit}, found {:?}", ran.status));
    }
    differences
}

fn places(found: &[Found]) -> String {
    let place = |found: &Found| match found.line {
        Some(line) => format!("{} line {line}", found.code),
        None => format!("{} without a line", found.code),
    };
    let places: Vec<_> = found.iter().map(place).collect();
    if places.is_empty() { "none".to_owned() } else { places.join(", ") }
}

/// The diagnostics that the header names.
fn wanted(case: &Sheet) -> Vec<Found> {
    let mut wanted: Vec<Found> = Vec::new();
    for line in &case.header {
        if let Some(expected) = line.strip_prefix("expect:").map(str::trim).filter(|text| *text != "none") {
            let (code, line) = expected.split_once(" line ").unwrap_or((expected, ""));
            wanted.push(Found { code: code.to_owned(), line: line.parse().ok(), help: String::new() });
        }
        if let (Some(help), Some(last)) = (line.strip_prefix("help:"), wanted.last_mut()) {
            last.help = help.trim().to_owned();
        }
    }
    wanted
}

fn exit(case: &Sheet, wanted: &[Found]) -> i32 {
    let said = case.said("exit:").next().map(|status| status.parse().expect("a number"));
    let is_error =
        |found: &Found| Code::parse(&found.code).is_none_or(|code| code.severity() == Severity::Error);
    said.unwrap_or(if wanted.iter().any(is_error) { 2 } else { 0 })
}

/// The diagnostics that the program printed; `None` if this is not the JSON of diagnostics.
fn found(printed: &str) -> Option<Vec<Found>> {
    let printed: Value = serde_json::from_str(printed).ok()?;
    printed.get("diagnostics")?.as_array()?.iter().map(found_one).collect()
}

fn found_one(diagnostic: &Value) -> Option<Found> {
    Some(Found {
        code: diagnostic.get("code")?.as_str()?.to_owned(),
        line: diagnostic.pointer("/labels/0/line").and_then(Value::as_u64),
        help: diagnostic.get("help").and_then(Value::as_str).unwrap_or_default().to_owned(),
    })
}

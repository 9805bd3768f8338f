//! The reference sheets: numbers worked out on their own, compared with what the program prints.
//!
//! `tests/reference/README.md` says how the headers are written and where the numbers come from.

use crate::program::heatpath;
use crate::sheets::{Sheet, sheets_below};
use serde_json::Value;

/// A number that a header wants.
#[derive(Debug, PartialEq)]
struct Wanted {
    value: f64,
    unit: String,
    /// How far the printed value may lie off, in its unit.
    allowed: f64,
}

#[test]
fn every_reference_sheet_gives_its_numbers() {
    let sheets = sheets_below("tests/reference");
    assert!(sheets.len() > 60, "only {} sheets were found", sheets.len());
    let failures: Vec<_> = sheets.iter().filter_map(mismatch).collect();
    assert!(
        failures.is_empty(),
        "{} of {} sheets differ:\n\n{}",
        failures.len(),
        sheets.len(),
        failures.join("\n")
    );
}

#[test]
fn every_result_of_a_reference_sheet_is_compared_by_a_line_that_can_be_read() {
    for sheet in sheets_below("tests/reference") {
        for line in sheet.said("value ") {
            let read = line.split_once(" = ").and_then(|(_, wanted)| read_wanted(wanted));
            assert!(read.is_some(), "{}: `# value {line}` cannot be read", sheet.name);
        }
        let text = String::from_utf8_lossy(&sheet.bytes).into_owned();
        for line in text.lines().filter_map(|line| line.strip_prefix("result ")) {
            let name = line.split(['=', ' ']).next().unwrap_or_default();
            let compared = sheet.said("value ").any(|line| line.split(' ').next() == Some(name));
            assert!(compared, "{}: `{name}` has no `# value` line", sheet.name);
        }
    }
}

#[test]
fn headers_are_read_as_their_page_says() {
    let wanted = |value, unit: &str, allowed| Some(Wanted { value, unit: unit.to_owned(), allowed });
    assert_eq!(read_wanted("134.5 MJ within 1e-9 relative"), wanted(134.5, "MJ", 134.5 * 1e-9));
    assert_eq!(read_wanted("-15553 J within 8 J"), wanted(-15553.0, "J", 8.0));
    assert_eq!(read_wanted("12 J/(mol K) within 0.5 J/(mol K)"), wanted(12.0, "J/(mol K)", 0.5));
    assert_eq!(read_wanted("0.25 within 1e-9 relative"), wanted(0.25, "", 0.25e-9));
    assert_eq!(read_wanted("134.5 MJ"), None);
}

/// What differs, if anything.
fn mismatch(sheet: &Sheet) -> Option<String> {
    let ran = heatpath(&["run", "--format", "json", &sheet.name]);
    let exit: i32 = sheet.said("exit:").next().map_or(0, |status| status.parse().expect("a number"));
    let mut differences = Vec::new();
    if ran.status != Some(exit) {
        differences.push(format!("wanted exit status {exit}, found {:?}", ran.status));
    }
    match serde_json::from_str::<Value>(&ran.stdout) {
        Ok(report) => {
            differences.extend(sheet.said("value ").filter_map(|line| value_differs(line, &report)));
            differences.extend(sheet.said("row ").filter_map(|line| row_differs(line, &report)));
        }
        Err(_) => differences.push(format!("no report: {}", ran.stderr)),
    }
    (!differences.is_empty()).then(|| format!("{}\n    {}", sheet.name, differences.join("\n    ")))
}

fn value_differs(line: &str, report: &Value) -> Option<String> {
    let Some((name, wanted)) =
        line.split_once(" = ").and_then(|(name, rest)| Some((name, read_wanted(rest)?)))
    else {
        return Some(format!("`# value {line}` cannot be read"));
    };
    let result = entry(report, "results", "name", name);
    let found =
        result.and_then(|result| Some((result.get("value")?.as_f64()?, result.get("unit")?.as_str()?)));
    match found {
        None => Some(format!("{name}: there is no such result")),
        Some((_, unit)) if unit != wanted.unit => {
            Some(format!("{name}: wanted in `{}`, found in `{unit}`", wanted.unit))
        }
        Some((value, _)) => value_off(name, value, wanted.value, wanted.allowed),
    }
}

/// `TITLE I = a, b within TOLERANCE relative`
fn row_differs(line: &str, report: &Value) -> Option<String> {
    let unreadable = || Some(format!("`# row {line}` cannot be read"));
    let Some((place, numbers)) = line.split_once(" = ") else { return unreadable() };
    let Some((title, index)) = place.rsplit_once(' ') else { return unreadable() };
    let Some((numbers, tolerance)) = numbers.split_once(" within ") else { return unreadable() };
    let Ok(index) = index.parse::<usize>() else { return unreadable() };
    let Some(relative) = tolerance.strip_suffix(" relative").and_then(|text| text.parse::<f64>().ok()) else {
        return unreadable();
    };
    let table = entry(report, "tables", "title", title);
    let row = table.and_then(|table| table.get("rows")?.get(index.checked_sub(1)?)?.as_array());
    let Some(row) = row else { return Some(format!("{place}: there is no such row")) };
    let found: Vec<_> = row.iter().skip(1).map(Value::as_f64).collect();
    let wanted: Vec<f64> = numbers.split(", ").map(|number| number.parse().expect("a number")).collect();
    if found.len() != wanted.len() {
        return Some(format!("{place}: wanted {} numbers, found {}", wanted.len(), found.len()));
    }
    let pairs = wanted.into_iter().zip(found);
    pairs
        .filter_map(|(wanted, found)| {
            value_off(place, found.unwrap_or(f64::NAN), wanted, wanted.abs() * relative)
        })
        .next()
}

fn value_off(name: &str, found: f64, wanted: f64, allowed: f64) -> Option<String> {
    let off = (found - wanted).abs();
    let holds = off <= allowed;
    (!holds).then(|| format!("{name}: wanted {wanted}, found {found}: {off:e} off, {allowed:e} allowed"))
}

fn entry<'a>(report: &'a Value, list: &str, key: &str, name: &str) -> Option<&'a Value> {
    let entries = report.get(list)?.as_array()?;
    entries.iter().find(|entry| entry.get(key).and_then(Value::as_str) == Some(name))
}

/// `NUMBER UNIT within TOLERANCE relative` or `NUMBER UNIT within TOLERANCE UNIT`
fn read_wanted(text: &str) -> Option<Wanted> {
    let (quantity, tolerance) = text.split_once(" within ")?;
    let (value, unit) = quantity.split_once(' ').unwrap_or((quantity, ""));
    let (size, word) = tolerance.split_once(' ').unwrap_or((tolerance, ""));
    let (value, size): (f64, f64) = (value.parse().ok()?, size.parse().ok()?);
    let allowed = if word == "relative" { value.abs() * size } else { size };
    (word == "relative" || word == unit).then(|| Wanted { value, unit: unit.to_owned(), allowed })
}

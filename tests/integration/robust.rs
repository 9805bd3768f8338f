//! Sheets that no engineer writes: each is refused with a code, in bounded time, without a fault of the program.

use crate::program::{command, scratch, within};
use std::path::{Path, PathBuf};
use std::time::Duration;

/// A generous bound: nothing here may take long, on a slow machine and unoptimised either.
const LIMIT: Duration = Duration::from_secs(10);

/// Writes a sheet, runs it, and asserts the refusal.
fn refused(name: &str, sheet: impl AsRef<[u8]>) -> String {
    let path = scratch(name).join("sheet.heat");
    std::fs::write(&path, sheet).expect("the folder is ours");
    refused_at(&path)
}

fn refused_at(path: &Path) -> String {
    let ran = within(command(&["run".as_ref(), path.as_os_str()]), b"", LIMIT);
    let shown: String = ran.stderr.chars().take(2000).collect();
    assert_eq!(ran.status, Some(2), "{}: {shown}", path.display());
    assert!(ran.stdout.is_empty(), "{}: something is printed on standard output", path.display());
    assert!(!ran.stderr.contains("panicked") && !ran.stderr.contains("overflow"), "{shown}");
    assert!(ran.stderr.len() < 100_000, "{}: {} bytes of diagnostics", path.display(), ran.stderr.len());
    let code = ran.stderr.strip_prefix("error ").and_then(|rest| rest.get(..4));
    assert!(code.is_some(), "{}: no code: {shown}", path.display());
    code.unwrap_or_default().to_owned()
}

#[test]
fn a_hundred_thousand_parentheses() {
    let sheet = format!("let a = {}1{}\n", "(".repeat(100_000), ")".repeat(100_000));
    assert_eq!(refused("parentheses", sheet), "S108");
}

#[test]
fn two_hundred_thousand_signs() {
    refused("signs", format!("let a = {}1\n", "-".repeat(200_000)));
}

#[test]
fn a_sum_of_five_million_terms() {
    assert_eq!(refused("sum", format!("let a = {}1\n", "1 + ".repeat(5_000_000))), "S109");
}

#[test]
fn a_line_of_twenty_megabytes() {
    assert_eq!(refused("line", format!("let {} = 1\n", "a".repeat(20_000_000))), "S109");
}

#[test]
fn bytes_that_are_no_text() {
    assert_eq!(refused("bytes", b"basis pour_T = 460 \xb0C\n"), "S111");
}

#[test]
fn nul_bytes() {
    assert_eq!(refused("nul", b"basis charge = 450\0 kg\n"), "S112");
    assert_eq!(refused("nul_only", [0; 1_000_000]), "S112");
}

#[test]
fn a_table_of_a_million_million_rows() {
    let sheet = "basis a = 1 kg\nresult b = 2 * a\ntable \"long\": b in kg over a from 1 kg to 1000000000000 kg by 1 kg\n";
    assert_eq!(refused("table", sheet), "T624");
}

#[test]
fn a_product_beyond_all_doubles() {
    assert_eq!(refused("product", "let a = 1e308*1e308\nresult b = a\n"), "R706");
}

#[test]
fn a_power_beyond_all_doubles() {
    assert_eq!(refused("power", "let a = 2 ^ 1000000\nresult b = a\n"), "R706");
}

#[test]
fn a_unit_to_a_power_beyond_all_bounds() {
    assert_eq!(refused("unit_power", "basis a = 3 kg^999999999999\n"), "U204");
}

#[test]
fn a_folder_in_place_of_a_sheet() {
    assert_eq!(refused_at(&scratch("folder")), "S120");
}

#[test]
fn a_sheet_that_is_not_there() {
    assert_eq!(refused_at(&PathBuf::from("no-such-sheet.heat")), "S120");
}

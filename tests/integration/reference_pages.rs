//! The language reference: every example does what the page says of it.
//!
//! A block marked `heat` is a whole sheet that is worked. Marked `heat,fragment` it stands behind the block marked
//! `heat,preamble`; so does one marked `heat,refused=CODE` or `heat,warned=CODE`, which must give that code and no
//! other. `heat,file=NAME` is a file beside the sheets that follow.

use crate::blocks::{Block, blocks_of};
use crate::program::{command, path, scratch, within};
use heatpath::diagnostic::Code;
use serde_json::Value;
use std::collections::BTreeSet;
use std::path::Path;
use std::time::Duration;

const PAGE: &str = "grammar/README.md";

/// What a page says of a block.
#[derive(Debug, PartialEq, Eq)]
enum Said<'a> {
    Whole,
    Preamble,
    Fragment,
    Refused(&'a str),
    Warned(&'a str),
    File(&'a str),
    Unknown,
}

fn said(info: &str) -> Option<Said<'_>> {
    let mark = info.strip_prefix("heat")?;
    let Some(mark) = mark.strip_prefix(',') else {
        return Some(if mark.is_empty() { Said::Whole } else { Said::Unknown });
    };
    Some(match mark.split_once('=') {
        None if mark == "preamble" => Said::Preamble,
        None if mark == "fragment" => Said::Fragment,
        Some(("refused", code)) => Said::Refused(code),
        Some(("warned", code)) => Said::Warned(code),
        Some(("file", name)) => Said::File(name),
        _ => Said::Unknown,
    })
}

/// The exit status of a run and the codes that it gave.
fn worked(folder: &Path, sheet: &str) -> (Option<i32>, BTreeSet<String>) {
    std::fs::write(folder.join("sheet.heat"), sheet).expect("the folder is ours");
    let mut call = command(&["run", "--diagnostics", "json", "sheet.heat"]);
    call.current_dir(folder);
    let ran = within(call, b"", Duration::from_secs(60));
    let printed: Value = serde_json::from_str(&ran.stderr).expect("diagnostics in JSON");
    let found = printed.get("diagnostics").and_then(Value::as_array).cloned().unwrap_or_default();
    let codes = found.iter().filter_map(|one| one.get("code")?.as_str()).map(str::to_owned);
    (ran.status, codes.collect())
}

/// What differs from what the page says, if anything.
fn mismatch(block: &Block, preamble: &str, folder: &Path) -> Option<String> {
    let behind = || format!("{preamble}\n{}", block.text);
    let (sheet, status, code) = match said(&block.info)? {
        Said::Whole | Said::Preamble => (block.text.clone(), 0, None),
        Said::Fragment => (behind(), 0, None),
        Said::Refused(code) => (behind(), 2, Some(code)),
        Said::Warned(code) => (behind(), 0, Some(code)),
        Said::File(name) => {
            std::fs::write(folder.join(name), &block.text).expect("the folder is ours");
            return None;
        }
        Said::Unknown => return Some(format!("{PAGE}:{}: `{}` says nothing", block.line, block.info)),
    };
    let (found_status, found) = worked(folder, &sheet);
    let codes_fit = code.is_none_or(|code| found.iter().eq([code]));
    let fits = found_status == Some(status) && codes_fit;
    (!fits).then(|| {
        format!("{PAGE}:{}: `{}`, found exit status {found_status:?} and {found:?}", block.line, block.info)
    })
}

#[test]
fn every_example_of_the_reference_does_what_the_page_says() {
    let blocks = blocks_of(PAGE);
    let folder = scratch("reference_pages");
    let preamble = blocks.iter().find(|block| said(&block.info) == Some(Said::Preamble));
    let preamble = preamble.expect("the page has a preamble").text.clone();
    let failures: Vec<_> = blocks.iter().filter_map(|block| mismatch(block, &preamble, &folder)).collect();
    assert!(failures.is_empty(), "{}", failures.join("\n"));
    let run = blocks.iter().filter(|block| said(&block.info).is_some()).count();
    assert!(run > 60, "only {run} examples were found");
}

#[test]
fn every_code_stands_in_the_reference() {
    let page = std::fs::read_to_string(path(PAGE)).expect("the page is there");
    let missing: Vec<_> = Code::ALL.iter().filter(|code| !page.contains(code.as_str())).collect();
    assert!(missing.is_empty(), "not on the page: {missing:?}");
}

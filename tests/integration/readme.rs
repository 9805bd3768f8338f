//! The introduction of the README: its sheets are written to a folder, its commands are run there, and what they
//! print is compared.
//!
//! A block `heat file=NAME` is a file. In a block `console` a line `$ heatpath ...` is a call, `$ echo $?` shows the
//! exit status of the call before, and a line `...` stands for any number of lines.

use crate::blocks::{Block, blocks_of};
use crate::program::{command, path, scratch, within};
use std::path::Path;
use std::time::Duration;

/// What the README and the checks of every change call.
const TEST_COMMAND: &str = "cargo test --locked";

/// A command of a console block with the lines that it prints.
#[derive(Debug)]
struct Call<'a> {
    command: &'a str,
    printed: Vec<&'a str>,
}

fn calls(console: &str) -> Vec<Call<'_>> {
    let mut calls: Vec<Call<'_>> = Vec::new();
    for line in console.lines() {
        match line.strip_prefix("$ ") {
            Some(command) => calls.push(Call { command, printed: Vec::new() }),
            None => calls.last_mut().expect("a block begins with its command").printed.push(line),
        }
    }
    calls
}

/// The lines of a pattern that are not found where they should be; a line `...` stands for any number of lines.
fn missing<'a>(pattern: &[&'a str], lines: &[&str]) -> Option<Vec<&'a str>> {
    let groups: Vec<_> = pattern.split(|line| *line == "...").collect();
    let last = groups.len() - 1;
    let mut at = 0;
    for (index, group) in groups.iter().enumerate() {
        let left = lines.get(at..).unwrap_or_default();
        let found = match (index, last) {
            (0, 0) => (left == *group).then_some(0),
            (0, _) => left.starts_with(group).then_some(0),
            (index, last) if index == last => {
                left.ends_with(group).then(|| left.len().saturating_sub(group.len()))
            }
            _ if group.is_empty() => Some(0),
            _ => left.windows(group.len()).position(|window| window == *group),
        };
        match found {
            Some(skipped) => at += skipped + group.len(),
            None => return Some(group.to_vec()),
        }
    }
    None
}

/// Runs the calls of a block; what differs, if anything.
fn mismatch(block: &Block, folder: &Path) -> Option<String> {
    let mut status = None;
    for call in calls(&block.text) {
        let printed = if call.command == "echo $?" {
            status.map_or(String::new(), |status: i32| status.to_string())
        } else {
            let words: Vec<_> = call.command.split(' ').collect();
            assert_eq!(words.first(), Some(&"heatpath"), "README.md:{}: `{}`", block.line, call.command);
            let mut started = command(&words[1..]);
            started.current_dir(folder);
            let ran = within(started, b"", Duration::from_secs(60));
            status = ran.status;
            ran.stdout + &ran.stderr
        };
        if let Some(lines) = missing(&call.printed, &printed.lines().collect::<Vec<_>>()) {
            let lines = lines.join("\n");
            let place = format!("README.md:{}: `{}`", block.line, call.command);
            return Some(format!("{place} prints\n{printed}\nbut not\n{lines}"));
        }
    }
    None
}

#[test]
fn the_introduction_prints_what_it_shows() {
    let blocks = blocks_of("README.md");
    let folder = scratch("readme");
    let mut run = 0;
    for block in &blocks {
        if let Some(name) = block.info.strip_prefix("heat file=") {
            std::fs::write(folder.join(name), &block.text).expect("the folder is ours");
        } else if block.info == "console" {
            let differs = mismatch(block, &folder);
            assert!(differs.is_none(), "{}", differs.unwrap_or_default());
            run += calls(&block.text).len();
        } else {
            assert!(!block.info.starts_with("heat"), "README.md:{}: a sheet without `file=`", block.line);
        }
    }
    assert!(run >= 9, "only {run} commands were found");
}

#[test]
fn the_readme_and_the_checks_call_the_same_tests() {
    for file in ["README.md", ".ci/run"] {
        let text = std::fs::read_to_string(path(file)).expect("the file is there");
        let calls = text.lines().any(|line| line.trim().ends_with(TEST_COMMAND));
        assert!(calls, "{file} does not call `{TEST_COMMAND}`");
    }
}

#[test]
fn dots_stand_for_any_number_of_lines() {
    assert_eq!(missing(&["a", "...", "d"], &["a", "b", "c", "d"]), None);
    assert_eq!(missing(&["a", "...", "b"], &["a", "b"]), None);
    assert_eq!(missing(&["...", "b", "c", "..."], &["a", "b", "b", "c", "d"]), None);
    assert_eq!(missing(&["a", "...", "c"], &["a", "b"]), Some(vec!["c"]));
    assert_eq!(missing(&["...", "b", "d", "..."], &["a", "b", "c", "d"]), Some(vec!["b", "d"]));
    assert_eq!(missing(&["a"], &["a", "b"]), Some(vec!["a"]));
}

//! Who may use whom, read from the sources.

use crate::program::path;
use crate::sheets::gather;
use std::collections::BTreeSet;

/// Each room with the rooms it may use.
const MAY_USE: &[(&str, &[&str])] = &[
    ("span", &[]),
    ("numeric", &[]),
    ("source", &["span"]),
    ("diagnostic", &["span"]),
    ("units", &["numeric"]),
    ("thermo", &["units", "numeric"]),
    ("syntax", &["span", "source", "diagnostic"]),
    ("library", &["source"]),
    ("program", &["span", "units", "thermo"]),
    (
        "check",
        &["syntax", "program", "units", "thermo", "library", "diagnostic", "source", "span", "numeric"],
    ),
    ("plan", &["program", "thermo", "units", "numeric", "span"]),
    ("eval", &["plan", "thermo", "units", "numeric"]),
    ("study", &["plan", "eval"]),
    ("report", &["program", "plan", "eval", "study", "units", "thermo", "diagnostic", "source", "span"]),
    (
        "session",
        &[
            "report",
            "study",
            "eval",
            "plan",
            "check",
            "program",
            "library",
            "syntax",
            "thermo",
            "units",
            "diagnostic",
            "source",
            "numeric",
            "span",
        ],
    ),
    (
        "cli",
        &[
            "session",
            "report",
            "study",
            "eval",
            "plan",
            "check",
            "program",
            "library",
            "syntax",
            "thermo",
            "units",
            "diagnostic",
            "source",
            "numeric",
            "span",
        ],
    ),
];

/// Parts of std that touch the machine.
const OUTER: &[&str] = &["fs", "env", "time"];

/// The sources: path below `src/`, room, and the code without its comments.
fn sources() -> Vec<(String, String, String)> {
    let root = path("src");
    let mut files = Vec::new();
    gather(&root, "rs", &mut files);
    files.sort();
    let mut sources = Vec::new();
    for file in files {
        let below = file.strip_prefix(&root).expect("below the root").to_string_lossy().replace('\\', "/");
        let room = below.split(['/', '.']).next().unwrap_or_default().to_owned();
        let text = std::fs::read_to_string(&file).expect("a source is text");
        let code: Vec<_> = text.lines().map(|line| line.split("//").next().unwrap_or_default()).collect();
        sources.push((below, room, code.join("\n")));
    }
    sources
}

/// The first names behind each `prefix::`, also in braces.
fn named(code: &str, prefix: &str) -> BTreeSet<String> {
    let mut names = BTreeSet::new();
    for (at, found) in code.match_indices(prefix) {
        let own =
            code.get(..at).is_some_and(|before| !before.ends_with(|c: char| c.is_alphanumeric() || c == '_'));
        let rest = code.get(at + found.len()..).unwrap_or_default();
        if own {
            names.extend(firsts(rest));
        }
    }
    names
}

fn firsts(rest: &str) -> Vec<String> {
    let word = |text: &str| {
        text.trim().split(|c: char| !(c.is_alphanumeric() || c == '_')).next().map(str::to_owned)
    };
    let Some(list) = rest.strip_prefix('{') else { return word(rest).into_iter().collect() };
    let mut depth = 0;
    let mut names = vec![String::new()];
    for c in list.chars() {
        match c {
            '{' => depth += 1,
            '}' if depth == 0 => break,
            '}' => depth -= 1,
            ',' if depth == 0 => names.push(String::new()),
            _ => {}
        }
        if let (0, Some(name)) = (depth, names.last_mut()) {
            name.push(c);
        }
    }
    names.iter().filter_map(|name| word(name.trim_start_matches(','))).collect()
}

#[test]
fn rooms_use_only_the_rooms_below_them() {
    let mut found = Vec::new();
    for (file, room, code) in sources() {
        if ["lib", "main"].contains(&room.as_str()) {
            continue;
        }
        let Some((_, allowed)) = MAY_USE.iter().find(|(known, _)| *known == room) else {
            found.push(format!("{file}: the room `{room}` is not in the table"));
            continue;
        };
        let used = named(&code, "crate::");
        let refused = used.iter().filter(|used| **used != room && !allowed.contains(&used.as_str()));
        found.extend(refused.map(|used| format!("{file}: `{room}` may not use `{used}`")));
    }
    assert!(found.is_empty(), "{}", found.join("\n"));
}

#[test]
fn rooms_build_on_each_other_without_a_circle() {
    let mut below: Vec<&str> = Vec::new();
    for (room, allowed) in MAY_USE {
        let above: Vec<_> = allowed.iter().filter(|used| !below.contains(used)).collect();
        assert!(above.is_empty(), "{room} uses {above:?}, which stand above it");
        below.push(room);
    }
}

#[test]
fn only_the_command_line_touches_the_machine() {
    let mut found = Vec::new();
    for (file, room, code) in sources() {
        let touched = named(&code, "std::");
        let outer = touched.iter().filter(|name| OUTER.contains(&name.as_str()));
        if !["cli", "main"].contains(&room.as_str()) {
            found.extend(outer.map(|name| format!("{file}: names `std::{name}`")));
        }
    }
    assert!(found.is_empty(), "{}", found.join("\n"));
}

#[test]
fn names_are_found_in_every_form_of_use() {
    let code = "use crate::span::Span;\nuse crate::{units::{self, Unit}, program, thermo::law};\nfn f() { crate::eval::run() }";
    let names: Vec<_> = named(code, "crate::").into_iter().collect();
    assert_eq!(names, ["eval", "program", "span", "thermo", "units"]);
}

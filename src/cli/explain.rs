//! `explain`: says more about the code of a diagnostic.

use super::arguments::ExplainArguments;
use super::status::Status;
use super::streams::{complain, print};
use crate::diagnostic::{Code, nearest};

/// The areas of codes, by their letter.
const AREAS: &[(char, &str)] = &[
    ('S', "Syntax"),
    ('U', "Units"),
    ('K', "Kinds and dimensions"),
    ('N', "Names"),
    ('M', "Materials"),
    ('T', "States and steps"),
    ('R', "Found while working the sheet"),
    ('L', "Not worked by this version"),
    ('W', "Warnings"),
    ('C', "Cautions"),
];

/// Prints the page of a code, or the table of codes.
pub(super) fn explain(arguments: &ExplainArguments) -> Status {
    let Some(word) = &arguments.code else { return print(&table(), Status::Well) };
    match Code::parse(word.trim()) {
        Some(code) => print(code.explanation(), Status::Well),
        None => unknown(word),
    }
}

fn unknown(word: &str) -> Status {
    let codes = Code::ALL.iter().map(|code| code.as_str());
    let help = match nearest(word.trim(), codes) {
        Some(near) => format!("`{near}` is the nearest; `heatpath explain` lists all codes"),
        None => "`heatpath explain` lists all codes".to_owned(),
    };
    complain(&format!("no diagnostic has the code `{word}`"), Some(&help));
    Status::Wrong
}

fn table() -> String {
    let mut text = String::new();
    for (letter, area) in AREAS {
        let codes = Code::ALL.iter().filter(|code| code.as_str().starts_with(*letter));
        let start = if text.is_empty() { "" } else { "\n" };
        text.push_str(&format!("{start}{area}\n"));
        text.extend(codes.map(|code| format!("  {code}  {}\n", code.title())));
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_table_holds_every_code() {
        let table = table();
        for code in Code::ALL {
            assert!(table.contains(&format!("  {code}  {}\n", code.title())), "{code}");
        }
    }
}

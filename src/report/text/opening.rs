//! The head of the note, and the answer in short.

use textwrap::core::display_width;

use super::page::Page;
use super::style::Ink;
use crate::diagnostic::{and_list, count};
use crate::report::model::{Report, RequirementRow};
use crate::report::number::{shown, shown_apart};

/// How many results are named in the answer in short.
const NAMED: usize = 6;

pub(super) fn write_opening(page: &mut Page, report: &Report) {
    page.title(if report.title.is_empty() { "Process sheet without a title" } else { &report.title });
    page.hairline();
    let file = ("file".to_owned(), report.file.clone());
    let entries: Vec<_> = report.head.iter().chain([&file]).collect();
    let widest =
        entries.iter().map(|(word, _)| display_width(word)).max().unwrap_or(0).min(page.columns() / 3);
    for (word, text) in entries {
        let blanks = " ".repeat(widest.saturating_sub(display_width(word)) + 2);
        page.hanging(&format!("{word}{blanks}"), widest + 2, text);
    }
    page.section("Answer in short");
    write_verdict(page, &report.requirements);
    write_results(page, report);
    write_findings(page, report);
}

fn write_verdict(page: &mut Page, requirements: &[RequirementRow]) {
    let failed: Vec<_> = requirements.iter().filter(|row| !row.met).collect();
    let text = match (requirements.len(), failed.as_slice()) {
        (0, _) => return page.text(0, "The sheet states no requirement."),
        (1, []) => {
            format!("The requirement is met: {}.", requirements.iter().map(verdict).collect::<String>())
        }
        (all, []) => format!("All {all} requirements are met."),
        (1, [row]) => format!("The requirement is not met: {}.", verdict(row)),
        (all, [row]) => format!("1 of {all} requirements is not met: {}.", verdict(row)),
        (all, rows) => {
            let rows: Vec<_> = rows.iter().map(|row| verdict(row)).collect();
            format!("{} of {all} requirements are not met: {}.", rows.len(), rows.join("; "))
        }
    };
    page.inked(0, Ink::of_verdict(failed.is_empty()), &text);
}

fn verdict(row: &RequirementRow) -> String {
    format!("{} (found {})", row.written, found(row))
}

/// The value found, with as many digits as it takes to tell it from its limits.
pub(super) fn found(row: &RequirementRow) -> String {
    let texts = row.limits.iter().map(|limit| shown_apart(&row.found, limit).0);
    texts.max_by_key(String::len).unwrap_or_else(|| shown(&row.found))
}

fn write_results(page: &mut Page, report: &Report) {
    if report.results.is_empty() {
        return;
    }
    let named = report.results.iter().take(NAMED).map(|row| format!("{} = {}", row.name, shown(&row.value)));
    let mut texts: Vec<_> = named.collect();
    let more = report.results.len() - texts.len();
    if more > 0 {
        texts.push(format!("and {more} more"));
    }
    page.text(0, &format!("{}.", texts.join("; ")));
}

fn write_findings(page: &mut Page, report: &Report) {
    let counts = [(report.warnings.len(), "warning"), (report.cautions.len(), "caution")];
    let texts: Vec<_> = counts.iter().filter(|(n, _)| *n > 0).map(|(n, noun)| count(*n, noun)).collect();
    if !texts.is_empty() {
        page.inked(0, Ink::Warning, &format!("{} at the end of this report.", and_list(&texts)));
    }
}

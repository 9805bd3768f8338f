//! The end of the note: warnings, cautions, conventions, signatures.

use super::page::{BODY, Page};
use super::style::Ink;
use crate::report::model::Report;

/// What every report says of itself.
const GENERAL_CAUTION: &str = "These figures follow from the inputs and data above. They do not replace local codes, \
    the makers' limits or a licensed engineer's judgement.";

/// How numbers are printed.
const NUMBERS: &str = "Numbers are printed to five significant digits, temperatures and percentages to 0.01; the \
    working uses the unrounded values.";

/// How intervals are read.
const INTERVALS: &str = "u is the standard uncertainty that an input's interval stands for (JCGM 100:2008); an \
    interval without a mark is rectangular. Inputs marked exact have no interval. This version prints intervals \
    but does not propagate them: the results carry no uncertainty and the verdicts no odds.";

/// The same where there are none.
const NO_INTERVALS: &str =
    "No input has an interval: all count as exact, and the results carry no uncertainty.";

pub(super) fn write_closing(page: &mut Page, report: &Report) {
    write_warnings(page, report);
    write_cautions(page, report);
    page.section("Conventions");
    let any = report.inputs.iter().any(|row| row.interval.is_some());
    let intervals = if any { INTERVALS } else { NO_INTERVALS };
    for sentence in report.conventions.iter().map(String::as_str).chain([intervals, NUMBERS]) {
        page.hanging("– ", 2, sentence);
    }
    write_signatures(page);
    page.hairline();
    page.text(0, GENERAL_CAUTION);
    page.text(0, &format!("heatpath {}, {}", report.version, report.file));
}

fn write_warnings(page: &mut Page, report: &Report) {
    if report.warnings.is_empty() {
        return;
    }
    page.section("Warnings");
    for finding in &report.warnings {
        let mark = page.tick();
        let place = finding.line.map(|line| format!("line {line}: ")).unwrap_or_default();
        page.inked_item(&mark, Ink::Warning, finding.code, &format!("{place}{}", finding.message));
    }
}

fn write_cautions(page: &mut Page, report: &Report) {
    if report.cautions.is_empty() {
        return;
    }
    page.section("Cautions");
    for caution in &report.cautions {
        let mark = page.tick();
        page.inked_item(&mark, Ink::Warning, caution.code, &caution.finding);
        page.text(BODY, &caution.advice);
    }
}

fn write_signatures(page: &mut Page) {
    let line = "_".repeat(page.columns() / 3 - 12);
    page.gap();
    page.gap();
    page.text(0, &["prepared", "checked ", "approved"].map(|word| format!("{word} {line}")).join("  "));
    page.gap();
}

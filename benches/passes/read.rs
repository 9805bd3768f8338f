//! Reading and checking a sheet of 10,000 lines, beside pest alone with a bare tree of the same grammar.

#![allow(missing_docs)] // the parser that pest derives

use crate::sheet::long_sheet;
use criterion::Criterion;
use heatpath::library::NoFiles;
use heatpath::session::check;
use pest::Parser;
use pest::iterators::Pair;
use pest_derive::Parser;
use std::hint::black_box;

#[derive(Parser)]
#[grammar = "grammar/sheet.pest"]
struct Bare;

/// A rule with its place and what is below it, and nothing else.
#[allow(dead_code)] // built to be weighed, not read
pub(crate) struct Node {
    rule: Rule,
    start: usize,
    end: usize,
    below: Vec<Node>,
}

fn node(pair: Pair<'_, Rule>) -> Node {
    let (rule, span) = (pair.as_rule(), pair.as_span());
    Node { rule, start: span.start(), end: span.end(), below: pair.into_inner().map(node).collect() }
}

/// The rule that a line's first word names.
fn rule(line: &str) -> Option<Rule> {
    Some(match line.split_whitespace().next()? {
        "species" => Rule::species_head,
        "formula" | "source" | "formation" | "melting" => Rule::species_entry,
        "phase" => Rule::phase_head,
        "cp" | "density" => Rule::phase_entry,
        "basis" | "assume" => Rule::input,
        "let" => Rule::let_line,
        "state" => Rule::state,
        "step" => Rule::step,
        "duty" => Rule::duty,
        "require" => Rule::require,
        "table" => Rule::table,
        "result" => Rule::result,
        _ => return None,
    })
}

pub(crate) fn bare_sheet(text: &str) -> Vec<Node> {
    let lines = text.lines().map(|line| line.trim_end_matches('{').trim());
    let read = |line| Bare::parse(rule(line)?, line).ok()?.next().map(node);
    lines.filter_map(read).collect()
}

pub(crate) fn ten_thousand_lines(criterion: &mut Criterion) {
    let text = long_sheet(10_000);
    let checked = check("bench.heat", "", &text, &NoFiles);
    assert!(checked.diagnostics.is_empty(), "the sheet is right");
    let statements = text.lines().filter(|line| rule(line.trim()).is_some()).count();
    assert_eq!(bare_sheet(&text).len(), statements, "the floor reads every line");
    let mut group = criterion.benchmark_group("read");
    group.sample_size(10);
    group.bench_function("product", |bench| {
        bench.iter(|| check("bench.heat", "", black_box(&text), &NoFiles))
    });
    group.bench_function("floor", |bench| bench.iter(|| bare_sheet(black_box(&text))));
    group.finish();
}

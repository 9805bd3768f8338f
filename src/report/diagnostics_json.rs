//! Diagnostics as JSON, with byte offsets, lines and columns.

use serde::Serialize;

use crate::diagnostic::{Diagnostic, Label};
use crate::source::Sources;

#[derive(Serialize)]
struct Document<'a> {
    diagnostics: Vec<Entry<'a>>,
}

#[derive(Serialize)]
struct Entry<'a> {
    code: &'static str,
    severity: &'static str,
    message: &'a str,
    labels: Vec<Place<'a>>,
    help: Option<&'a str>,
}

#[derive(Serialize)]
struct Place<'a> {
    file: &'a str,
    start: u32,
    end: u32,
    line: usize,
    column: usize,
    text: &'a str,
}

/// `{"diagnostics": [...]}` with a line end behind it. `start` and `end` of a label are byte offsets into its file;
/// `line` and `column` belong to `start` and count from 1, columns in Unicode scalar values.
pub fn render_diagnostics_json(diagnostics: &[Diagnostic], sources: &Sources) -> String {
    let diagnostics = diagnostics.iter().map(|diagnostic| entry(diagnostic, sources)).collect();
    super::json::written(&Document { diagnostics })
}

fn entry<'a>(diagnostic: &'a Diagnostic, sources: &'a Sources) -> Entry<'a> {
    Entry {
        code: diagnostic.code.as_str(),
        severity: diagnostic.severity().as_str(),
        message: &diagnostic.message,
        labels: diagnostic.labels.iter().map(|label| place(label, sources)).collect(),
        help: diagnostic.help.as_deref(),
    }
}

fn place<'a>(label: &'a Label, sources: &'a Sources) -> Place<'a> {
    let span = label.span;
    let (line, column) = sources.line_column(span.file, span.start);
    let file = sources.get(span.file).map_or("", |source| source.name.as_str());
    Place { file, start: span.start, end: span.end, line, column, text: &label.text }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Code;
    use crate::span::Span;

    #[test]
    fn a_label_has_its_file_and_its_place_in_characters() {
        let mut sources = Sources::new();
        let file = sources.add("pot.heat", "| Tern Point\nlet ΔT = a + b\n");
        let found = Diagnostic::new(Code::PointsAdded, "two readings \u{1} added")
            .label(Span::new(file, 23, 24), "a reading here")
            .help("mean(a, b)");
        let text = render_diagnostics_json(&[found, Diagnostic::new(Code::UnitAndName, "bare")], &sources);
        let read: serde_json::Value = serde_json::from_str(&text).expect("valid JSON");
        let first = &read["diagnostics"][0];
        assert_eq!(first["code"], "K302");
        assert_eq!(first["severity"], "error");
        assert_eq!(first["message"], "two readings \u{1} added");
        assert_eq!(first["help"], "mean(a, b)");
        // The second line begins at byte 13; `Δ` takes two bytes, so byte 23 is its tenth character.
        let place = serde_json::json!(
            { "file": "pot.heat", "start": 23, "end": 24, "line": 2, "column": 10, "text": "a reading here" }
        );
        assert_eq!(first["labels"], serde_json::json!([place]));
        assert_eq!(read["diagnostics"][1]["help"], serde_json::Value::Null);
        assert_eq!(read["diagnostics"][1]["severity"], "warning");
        assert!(text.ends_with("}\n"));
    }

    #[test]
    fn no_findings_are_an_empty_list() {
        let text = render_diagnostics_json(&[], &Sources::new());
        assert_eq!(
            serde_json::from_str::<serde_json::Value>(&text).expect("valid JSON")["diagnostics"],
            serde_json::json!([])
        );
    }
}

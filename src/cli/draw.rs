//! Diagnostics as they are drawn on a terminal.

use super::colour::Look;
use super::excerpt::Excerpt;
use super::streams::visible;
use crate::diagnostic::{Diagnostic, Label, Severity, and_list, count};
use crate::source::Sources;
use crate::span::Span;
use miette::{GraphicalReportHandler, GraphicalTheme, LabeledSpan, SourceCode};
use std::fmt;

/// How many are drawn; the rest are counted.
const DRAWN: usize = 50;

/// Draws diagnostics, errors first, and counts them. Nothing to say gives an empty text.
pub(super) fn draw(diagnostics: &[Diagnostic], sources: &Sources, look: Look) -> String {
    if diagnostics.is_empty() {
        return String::new();
    }
    let mut sorted: Vec<_> = diagnostics.iter().collect();
    sorted.sort_by_key(|diagnostic| diagnostic.severity());
    let handler = handler(look);
    let drawn = sorted.iter().take(DRAWN).map(|diagnostic| draw_one(diagnostic, sources, &handler));
    drawn.chain([summary(diagnostics)]).collect()
}

fn handler(look: Look) -> GraphicalReportHandler {
    let theme = if look.colour { GraphicalTheme::unicode() } else { GraphicalTheme::unicode_nocolor() };
    GraphicalReportHandler::new_themed(theme)
        .with_width(look.width)
        .with_links(false)
        .without_primary_span_start()
}

fn draw_one(diagnostic: &Diagnostic, sources: &Sources, handler: &GraphicalReportHandler) -> String {
    let (here, elsewhere) = parted(&diagnostic.labels);
    let spans: Vec<_> = here.iter().map(|label| label.span).collect();
    let excerpt = Excerpt::around(&spans, sources);
    let drawing = Drawing { diagnostic, labels: &here, excerpt: excerpt.as_ref() };
    let mut text = String::new();
    if handler.render_report(&mut text, &drawing).is_err() {
        text = format!("{}\n\n  {}\n", heading(diagnostic), plain(&diagnostic.message));
    }
    text.extend(
        elsewhere
            .iter()
            .map(|label| format!("  also: {}: {}\n", place(label.span, sources), plain(&label.text))),
    );
    text + "\n"
}

/// The labels in the file of the first one, and those in others.
fn parted(labels: &[Label]) -> (Vec<&Label>, Vec<&Label>) {
    let file = labels.first().map(|label| label.span.file);
    labels.iter().partition(|label| Some(label.span.file) == file)
}

fn place(span: Span, sources: &Sources) -> String {
    let name = sources.get(span.file).map_or("", |source| &source.name);
    let (line, column) = sources.line_column(span.file, span.start);
    format!("{}:{line}:{column}", plain(name))
}

fn heading(diagnostic: &Diagnostic) -> String {
    format!("{} {}", diagnostic.severity().as_str(), diagnostic.code)
}

/// How many there are, how many are not shown, and where to read on.
fn summary(diagnostics: &[Diagnostic]) -> String {
    let counts = [Severity::Error, Severity::Warning, Severity::Caution].into_iter().filter_map(|severity| {
        let number = diagnostics.iter().filter(|diagnostic| diagnostic.severity() == severity).count();
        (number > 0).then(|| count(number, severity.as_str()))
    });
    let all = and_list(&counts.collect::<Vec<_>>());
    let hidden = diagnostics.len().saturating_sub(DRAWN);
    let shown = if hidden > 0 { format!(", the first {DRAWN} shown") } else { String::new() };
    format!("{all}{shown}; `heatpath explain CODE` says more\n")
}

fn plain(text: &str) -> String {
    text.chars().map(visible).collect()
}

/// A diagnostic as the drawing library wants it.
#[derive(Debug)]
struct Drawing<'a> {
    diagnostic: &'a Diagnostic,
    labels: &'a [&'a Label],
    excerpt: Option<&'a Excerpt>,
}

impl fmt::Display for Drawing<'_> {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&plain(&self.diagnostic.message))
    }
}

impl std::error::Error for Drawing<'_> {}

impl miette::Diagnostic for Drawing<'_> {
    fn code<'a>(&'a self) -> Option<Box<dyn fmt::Display + 'a>> {
        Some(Box::new(heading(self.diagnostic)))
    }

    fn severity(&self) -> Option<miette::Severity> {
        Some(match self.diagnostic.severity() {
            Severity::Error => miette::Severity::Error,
            Severity::Warning | Severity::Caution => miette::Severity::Warning,
        })
    }

    fn help<'a>(&'a self) -> Option<Box<dyn fmt::Display + 'a>> {
        let help = self.diagnostic.help.as_deref()?;
        Some(Box::new(help.lines().map(plain).collect::<Vec<_>>().join("\n")))
    }

    fn source_code(&self) -> Option<&dyn SourceCode> {
        self.excerpt.map(|excerpt| excerpt as &dyn SourceCode)
    }

    fn labels(&self) -> Option<Box<dyn Iterator<Item = LabeledSpan> + '_>> {
        let ranges = self.excerpt?.ranges();
        let labels = ranges.zip(self.labels).enumerate().map(|(index, (range, label))| {
            let text = Some(plain(&label.text)).filter(|text| !text.is_empty());
            let span = (range.start, range.len());
            if index == 0 {
                LabeledSpan::new_primary_with_span(text, span)
            } else {
                LabeledSpan::new_with_span(text, span)
            }
        });
        Some(Box::new(labels))
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::diagnostic::Code;

    const LOOK: Look = Look { colour: false, width: 80 };

    fn sheet() -> (Sources, crate::span::FileId) {
        let mut sources = Sources::new();
        let file = sources.add("pot.heat", "basis ΔT = 3 K\nlet spare = ΔT + 4 kg\nresult x = spare\n");
        (sources, file)
    }

    #[test]
    fn the_place_counts_characters() {
        let (sources, file) = sheet();
        let at = sources.get(file).and_then(|source| source.text.find("+ 4")).expect("in the text");
        let diagnostic = Diagnostic::new(Code::UnlikeSum, "`ΔT` is a temperature")
            .label(Span::new(file, at, at + 1), "added here")
            .help("leave it out");
        let text = draw(&[diagnostic], &sources, LOOK);
        assert!(text.starts_with("error K301\n\n  × `ΔT` is a temperature\n"), "{text}");
        assert!(
            text.contains("─[pot.heat:2:16]\n 1 │ basis ΔT = 3 K\n 2 │ let spare = ΔT + 4 kg\n"),
            "{text}"
        );
        assert!(text.contains("added here") && text.contains("  help: leave it out\n"), "{text}");
        assert!(text.ends_with("1 error; `heatpath explain CODE` says more\n"), "{text}");
    }

    #[test]
    fn a_place_in_another_file_is_named() {
        let (mut sources, file) = sheet();
        let other = sources.add("alloys.heat", "\nspecies a \"b\" {\n}\n");
        let diagnostic = Diagnostic::new(Code::DeclaredTwice, "`a` is declared twice")
            .label(Span::new(file, 0, 5), "again here")
            .label(Span::new(other, 1, 8), "first here");
        let text = draw(&[diagnostic], &sources, LOOK);
        assert!(text.contains("  also: alloys.heat:2:1: first here\n"), "{text}");
    }

    #[test]
    fn errors_come_first_and_the_rest_is_counted() {
        let (sources, file) = sheet();
        let warning =
            Diagnostic::new(Code::FractionOfUnit, "read as a fraction").label(Span::new(file, 0, 1), "");
        let error = Diagnostic::new(Code::Unreadable, "cannot be read").label(Span::new(file, 0, 1), "");
        let all: Vec<_> = std::iter::once(warning).chain(std::iter::repeat_n(error, 60)).collect();
        let text = draw(&all, &sources, LOOK);
        assert_eq!(text.matches("error S101").count(), 50);
        assert!(!text.contains("read as a fraction"));
        assert!(
            text.ends_with(
                "60 errors and 1 warning, the first 50 shown; `heatpath explain CODE` says more\n"
            )
        );
    }

    #[test]
    fn nothing_of_a_sheet_steers_the_terminal() {
        let mut sources = Sources::new();
        let file = sources.add("a\u{1b}[2J.heat", "let \u{1b}[31m = 1\n");
        let diagnostic = Diagnostic::new(Code::ControlCharacter, "`\u{1b}[31m` here")
            .label(Span::new(file, 4, 5), "\u{7} here")
            .help("\u{9b}31m");
        let text = draw(&[diagnostic], &sources, LOOK);
        assert!(!text.chars().any(|c| c.is_control() && c != '\n'), "{text:?}");
    }
}

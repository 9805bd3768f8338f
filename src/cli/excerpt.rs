//! The lines of a file that a diagnostic shows.

use super::streams::visible;
use crate::source::Sources;
use crate::span::Span;
use miette::{MietteError, MietteSpanContents, SourceCode, SourceSpan, SpanContents};
use std::collections::BTreeMap;
use std::ops::Range;

/// Of a label over more lines than this, the first line is shown.
const LINES: usize = 8;
/// A longer line is shown in part, in bytes.
const LONG: usize = 160;
/// How much of a long line is shown before its label.
const LEAD: usize = 60;

/// The lines around the labels of one diagnostic in one file, made fit to be drawn: control characters replaced, long
/// lines cut, each line with its number in the file. Its size depends on the labels, not on the file.
#[derive(Debug)]
pub(super) struct Excerpt {
    name: String,
    text: String,
    lines: Vec<Line>,
    places: Vec<Place>,
}

/// A line of the excerpt.
#[derive(Debug)]
struct Line {
    /// Its number in the file, from 1.
    number: usize,
    /// What of it is shown, in the file.
    source: Range<usize>,
    /// Where it stands in the excerpt, its line end included.
    range: Range<usize>,
    /// Where in the excerpt its own first character stands: after the `…` of a cut.
    start: usize,
}

/// A label's place.
#[derive(Debug)]
struct Place {
    /// In the excerpt.
    range: Range<usize>,
    /// Line and column in the file.
    line_column: (usize, usize),
}

impl Excerpt {
    /// The excerpt around spans of one file; `None` where the file has no text to show.
    pub(super) fn around(spans: &[Span], sources: &Sources) -> Option<Excerpt> {
        let file = spans.first()?.file;
        let source = sources.get(file)?;
        let text = source.text.as_str();
        let clamped: Vec<_> = spans.iter().map(|span| clamp(text, span.range())).collect::<Option<_>>()?;
        let number = |range: &Range<usize>| sources.line_column(file, offset(range.start)).0;
        let mut shown = BTreeMap::new();
        for range in &clamped {
            show_around(text, range, number(range), &mut shown);
        }
        let mut excerpt =
            Excerpt { name: source.name.clone(), text: String::new(), lines: Vec::new(), places: vec![] };
        for (number, line) in shown {
            excerpt.push(text, number, &line, &clamped);
        }
        for range in &clamped {
            let line_column = sources.line_column(file, offset(range.start));
            let start = excerpt.position(text, range.start);
            let end = excerpt.position(text, range.end).max(start);
            excerpt.places.push(Place { range: start..end, line_column });
        }
        Some(excerpt)
    }

    /// The places of the spans in the excerpt, in their order.
    pub(super) fn ranges(&self) -> impl Iterator<Item = Range<usize>> {
        self.places.iter().map(|place| place.range.clone())
    }

    fn push(&mut self, text: &str, number: usize, line: &Range<usize>, labels: &[Range<usize>]) {
        let source = shown_part(text, line, labels);
        let start = self.text.len();
        if source.start > line.start {
            self.text.push('…');
        }
        let own = self.text.len();
        let slice = text.get(source.clone()).unwrap_or_default();
        self.text.extend(slice.chars().map(shown_char));
        if source.end < line.end {
            self.text.push('…');
        }
        self.text.push('\n');
        self.lines.push(Line { number, source, range: start..self.text.len(), start: own });
    }

    /// Where an offset of the file stands in the excerpt, as near as the excerpt shows it.
    fn position(&self, text: &str, at: usize) -> usize {
        let line = self.lines.iter().rev().find(|line| line.source.start <= at).or(self.lines.first());
        let Some(line) = line else { return 0 };
        let before =
            text.get(line.source.start..at.clamp(line.source.start, line.source.end)).unwrap_or_default();
        line.start + before.chars().map(|c| shown_char(c).len_utf8()).sum::<usize>()
    }

    /// The index of the line that holds an offset of the excerpt.
    fn line_at(&self, at: usize) -> usize {
        let after = self.lines.partition_point(|line| line.range.start <= at);
        after.saturating_sub(1)
    }

    /// The last line from `index` on, at most `count` away, without a gap in the numbers.
    fn neighbour(&self, index: usize, count: usize, step: isize) -> usize {
        let mut at = index;
        for _ in 0..count {
            let Some(next) = at.checked_add_signed(step) else { break };
            match (self.lines.get(at), self.lines.get(next)) {
                (Some(here), Some(there)) if here.number.abs_diff(there.number) == 1 => at = next,
                _ => break,
            }
        }
        at
    }

    /// The file with the line and column of the label that begins at an offset of the excerpt.
    fn headline(&self, at: usize) -> String {
        let place = self.places.iter().find(|place| place.range.start == at).or(self.places.first());
        let name: String = self.name.chars().map(visible).collect();
        place.map_or(name.clone(), |place| format!("{name}:{}:{}", place.line_column.0, place.line_column.1))
    }
}

impl SourceCode for Excerpt {
    fn read_span<'a>(
        &'a self,
        span: &SourceSpan,
        before: usize,
        after: usize,
    ) -> Result<Box<dyn SpanContents<'a> + 'a>, MietteError> {
        let end = span.offset() + span.len();
        let first = self.neighbour(self.line_at(span.offset()), before, -1);
        let last = self.neighbour(self.line_at(end.saturating_sub(1).max(span.offset())), after, 1);
        let (Some(from), Some(to)) = (self.lines.get(first), self.lines.get(last)) else {
            return Err(MietteError::OutOfBounds);
        };
        let range = from.range.start..to.range.end;
        let data = self.text.as_bytes().get(range.clone()).ok_or(MietteError::OutOfBounds)?;
        Ok(Box::new(MietteSpanContents::new_named(
            self.headline(span.offset()),
            data,
            (range.start, range.len()).into(),
            from.number.saturating_sub(1),
            0,
            last - first + 1,
        )))
    }
}

fn offset(at: usize) -> u32 {
    u32::try_from(at).unwrap_or(u32::MAX)
}

/// A character as it is drawn; a tab stays.
fn shown_char(c: char) -> char {
    if c == '\t' { c } else { visible(c) }
}

/// The range on character borders, inside the text and covering at least one character; of a range over many lines
/// the first one. `None` for an empty text.
fn clamp(text: &str, range: Range<usize>) -> Option<Range<usize>> {
    let (last, last_char) = text.trim_end_matches(['\n', '\r']).char_indices().next_back()?;
    let start = floor(text, range.start.min(last));
    let most = last + last_char.len_utf8();
    let end = ceil(text, range.end.clamp(start + 1, most.max(start + 1)));
    let many = text.get(start..end).is_some_and(|covered| covered.matches('\n').nth(LINES - 1).is_some());
    let end = if many { line_of(text, start).end.max(start + 1) } else { end };
    Some(start..ceil(text, end))
}

/// The character border at or before an offset.
fn floor(text: &str, at: usize) -> usize {
    (0..=at.min(text.len())).rev().find(|at| text.is_char_boundary(*at)).unwrap_or(0)
}

/// The character border at or after an offset.
fn ceil(text: &str, at: usize) -> usize {
    (at..text.len()).find(|at| text.is_char_boundary(*at)).unwrap_or(text.len())
}

/// The line around an offset, without its line end.
fn line_of(text: &str, at: usize) -> Range<usize> {
    let bytes = text.as_bytes();
    let at = at.min(bytes.len());
    let start = bytes.iter().take(at).rposition(|byte| *byte == b'\n').map_or(0, |found| found + 1);
    let end = bytes.iter().skip(at).position(|byte| *byte == b'\n').map_or(bytes.len(), |found| at + found);
    let ends_in_return = end > start && bytes.get(end - 1) == Some(&b'\r');
    start..if ends_in_return { end - 1 } else { end }
}

/// Adds the lines of a range with one line on either side, by number.
fn show_around(text: &str, range: &Range<usize>, number: usize, shown: &mut BTreeMap<usize, Range<usize>>) {
    let first = line_of(text, range.start);
    if first.start > 0 {
        shown.insert(number.saturating_sub(1), line_of(text, first.start - 1));
    }
    let (mut number, mut line) = (number, first);
    let mut after = false;
    while !after {
        after = line.start >= range.end;
        let next = text.get(line.end..).and_then(|rest| rest.find('\n')).map(|found| line.end + found + 1);
        shown.insert(number, line);
        match next {
            Some(next) if next < text.len() => (number, line) = (number + 1, line_of(text, next)),
            _ => return,
        }
    }
}

/// What of a line is shown: all of it, or of a long one the part around its first label.
fn shown_part(text: &str, line: &Range<usize>, labels: &[Range<usize>]) -> Range<usize> {
    if line.len() <= LONG {
        return line.clone();
    }
    let focus = labels.iter().map(|label| label.start).filter(|start| line.contains(start)).min();
    let from = focus.map_or(line.start, |focus| focus.saturating_sub(LEAD).max(line.start));
    let from = if from - line.start < '…'.len_utf8() { line.start } else { floor(text, from) };
    let to = floor(text, (from + LONG).min(line.end));
    from..to
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::span::FileId;

    fn around(text: &str, ranges: &[(usize, usize)]) -> (String, Vec<String>) {
        let mut sources = Sources::new();
        let file = sources.add("a.heat", text);
        let spans: Vec<_> = ranges.iter().map(|(start, end)| Span::new(file, *start, *end)).collect();
        let excerpt = Excerpt::around(&spans, &sources).expect("an excerpt");
        let shown = excerpt.ranges().map(|range| excerpt.text[range].to_owned()).collect();
        (excerpt.text, shown)
    }

    #[test]
    fn a_label_shows_one_line_on_either_side() {
        let (text, labels) = around("one\ntwo\nthree\nfour\nfive\n", &[(8, 13)]);
        assert_eq!((text.as_str(), labels), ("two\nthree\nfour\n", vec!["three".to_owned()]));
    }

    #[test]
    fn distant_labels_do_not_show_what_lies_between() {
        let lines: String = (100..200).map(|number| format!("{number}\n")).collect();
        let (text, labels) = around(&lines, &[(4, 7), (360, 363)]);
        assert_eq!(text, "100\n101\n102\n189\n190\n191\n");
        assert_eq!(labels, ["101", "190"]);
    }

    #[test]
    fn a_label_keeps_its_letters_in_a_cut_line() {
        let long = format!("{}Δcharge{}", "x + ".repeat(100_000), " + y".repeat(100_000));
        let (text, labels) = around(&long, &[(400_000, 400_008)]);
        assert_eq!(labels, ["Δcharge"]);
        assert!(text.len() < 250 && text.starts_with('…') && text.ends_with("…\n"), "{text}");
    }

    #[test]
    fn places_beyond_the_text_or_inside_a_letter_are_moved_into_it() {
        for range in [(0, 1), (1, 2), (3, 9), (5, 5), (90, 99), (99, 90)] {
            let (_, labels) = around("ΔT\n\n", &[range]);
            assert!(!labels.concat().is_empty(), "{range:?}");
        }
    }

    #[test]
    fn a_label_over_many_lines_shows_its_first() {
        let (text, labels) = around(&"let a = (\n".repeat(100), &[(10, 900)]);
        assert_eq!(labels, ["let a = ("]);
        assert_eq!(text.lines().count(), 3);
    }

    #[test]
    fn control_characters_are_shown_as_one_sign() {
        let (text, labels) = around("let \u{1b}[31m = 1\r\n\u{202e}", &[(4, 9)]);
        assert_eq!(text, "let \u{fffd}[31m = 1\n\u{fffd}\n");
        assert_eq!(labels, ["\u{fffd}[31m"]);
    }

    #[test]
    fn a_file_without_text_shows_nothing() {
        let mut sources = Sources::new();
        let file = sources.add("a.heat", "\n");
        assert!(Excerpt::around(&[Span::new(file, 0, 1)], &sources).is_none());
        assert!(Excerpt::around(&[Span::new(FileId(7), 0, 1)], &sources).is_none());
    }
}

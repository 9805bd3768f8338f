//! The files of a run: their texts, and where lines begin.

use crate::span::{FileId, Span};

/// A file as read.
#[derive(Debug, Clone)]
pub struct Source {
    /// Its name for messages, as the user gave it.
    pub name: String,
    /// Its text.
    pub text: String,
    line_starts: Vec<u32>,
}

/// The files of a run, by id.
#[derive(Debug, Clone, Default)]
pub struct Sources {
    files: Vec<Source>,
}

impl Sources {
    /// No files yet.
    pub fn new() -> Self {
        Sources::default()
    }

    /// Takes in a file.
    pub fn add(&mut self, name: impl Into<String>, text: impl Into<String>) -> FileId {
        let text = text.into();
        let ends = text.bytes().enumerate().filter(|(_, byte)| *byte == b'\n');
        let line_starts =
            std::iter::once(0).chain(ends.map(|(at, _)| u32::try_from(at + 1).unwrap_or(u32::MAX))).collect();
        self.files.push(Source { name: name.into(), text, line_starts });
        FileId(u32::try_from(self.files.len() - 1).unwrap_or(u32::MAX))
    }

    /// The file of an id, if there is one.
    pub fn get(&self, file: FileId) -> Option<&Source> {
        self.files.get(file.0 as usize)
    }

    /// The text that a span covers.
    pub fn slice(&self, span: Span) -> &str {
        self.get(span.file).and_then(|file| file.text.get(span.range())).unwrap_or_default()
    }

    /// The text that a span covers as one line: comments and line ends taken out, blanks folded.
    pub fn line_of(&self, span: Span) -> String {
        let lines = self.slice(span).lines().map(without_comment);
        lines.flat_map(str::split_whitespace).collect::<Vec<_>>().join(" ")
    }

    /// Line and column of an offset, both from 1, the column in Unicode scalar values.
    pub fn line_column(&self, file: FileId, offset: u32) -> (usize, usize) {
        let Some(source) = self.get(file) else { return (1, 1) };
        let line = source.line_starts.partition_point(|start| *start <= offset);
        let start = source.line_starts.get(line.saturating_sub(1)).copied().unwrap_or(0) as usize;
        let before = source.text.get(start..offset as usize).unwrap_or_default();
        (line.max(1), before.chars().count() + 1)
    }
}

fn without_comment(line: &str) -> &str {
    let mut quoted = false;
    for (at, c) in line.char_indices() {
        match c {
            '"' => quoted = !quoted,
            '#' if !quoted => return &line[..at],
            _ => {}
        }
    }
    line
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn columns_count_characters() {
        let mut sources = Sources::new();
        let file = sources.add("a.heat", "let ΔT = 3 K\nlet b = 4\n");
        assert_eq!(sources.line_column(file, 0), (1, 1));
        assert_eq!(sources.line_column(file, 8), (1, 8));
        assert_eq!(sources.line_column(file, 14), (2, 1));
    }

    #[test]
    fn a_formula_over_lines_reads_as_one() {
        let mut sources = Sources::new();
        let text = "(a +   # first \"x\n   b)";
        let file = sources.add("a.heat", text);
        assert_eq!(sources.line_of(Span::new(file, 0, text.len())), "(a + b)");
    }
}

//! The cutter at work, line by line.

use super::piece::{Cut, DEPTH_LIMIT, LENGTH_LIMIT, Piece};
use crate::diagnostic::{Code, Diagnostic};
use crate::span::{FileId, Span};
use crate::syntax::words::{self, STATEMENTS};
use std::ops::Range;

/// Cuts a text.
pub(in crate::syntax) fn cut(file: FileId, text: &str) -> Cut {
    let mut cutter = Cutter::new(file, text);
    let mut start = 0;
    while start < text.len() {
        let end = text[start..].find('\n').map_or(text.len(), |at| start + at);
        cutter.line(start, end);
        start = end + 1;
    }
    cutter.finish()
}

/// A block that is open: its opening line, the brace, and what it holds so far.
struct Block {
    head: Range<usize>,
    brace: usize,
    pieces: Vec<Piece>,
    broken: bool,
}

/// The entry being gathered.
pub(super) struct Entry {
    start: usize,
    end: usize,
    pub(super) broken: bool,
}

pub(super) struct Cutter<'a> {
    file: FileId,
    pub(super) source: &'a [u8],
    out: Vec<u8>,
    pieces: Vec<Piece>,
    blocks: Vec<Block>,
    brackets: Vec<usize>,
    pub(super) entry: Option<Entry>,
    /// Brackets that a new line closed early: as many closing ones may still come.
    orphans: usize,
    pub(super) diagnostics: Vec<Diagnostic>,
}

impl<'a> Cutter<'a> {
    pub(super) fn new(file: FileId, text: &'a str) -> Self {
        Cutter {
            file,
            source: text.as_bytes(),
            out: text.as_bytes().to_vec(),
            pieces: Vec::new(),
            blocks: Vec::new(),
            brackets: Vec::new(),
            entry: None,
            orphans: 0,
            diagnostics: Vec::new(),
        }
    }
}

impl Cutter<'_> {
    pub(super) fn line(&mut self, start: usize, end: usize) {
        let Some(first) = (start..end).find(|&at| !self.source[at].is_ascii_whitespace()) else {
            self.blank(start..(end + 1).min(self.source.len()), self.entry.is_some());
            return;
        };
        if self.source[first] == b'|' {
            self.close_entry_early();
            let last = trimmed_end(self.source, first, end);
            self.push(Piece { range: first..last, block: None, remark: true, broken: false });
            return;
        }
        self.meet_statement_word(first, end);
        let last = self.scan(first, end);
        if self.entry.is_some() && (!self.brackets.is_empty() || last == Some(b',')) {
            self.blank(end..(end + 1).min(self.source.len()), true);
        } else {
            self.end_entry();
        }
    }

    /// A statement word at the start of a line closes whatever is still open.
    fn meet_statement_word(&mut self, first: usize, end: usize) {
        if self.entry.is_none() && self.blocks.is_empty() && self.orphans == 0 {
            return;
        }
        if starts_statement(&self.source[first..end], self.in_sheet_block()) {
            self.close_entry_early();
            self.close_blocks();
            self.orphans = 0;
        }
    }

    fn in_sheet_block(&self) -> bool {
        self.blocks.last().is_some_and(|block| self.word_at(block.head.start) == b"sheet")
    }

    /// Reads a line's characters; the last one that is no blank or comment comes back.
    fn scan(&mut self, first: usize, end: usize) -> Option<u8> {
        let mut last = None;
        let mut at = first;
        while at < end {
            let byte = self.source[at];
            match byte {
                b'#' => {
                    self.blank(at..end, true);
                    break;
                }
                b' ' | b'\t' | b'\r' => {
                    at += 1;
                    continue;
                }
                b'"' => at = self.text(at, end),
                b'(' | b'{' => self.open(at),
                b')' | b'}' => {
                    self.close(at);
                }
                b',' => self.comma(at),
                b'.' => self.point(at),
                0..=8 | 11..=31 | 127 => self.control(at),
                _ => {}
            }
            if !matches!(byte, b'{' | b'}') || self.entry.is_some() {
                self.extend(at);
            }
            last = Some(byte);
            at += 1;
        }
        last
    }

    fn extend(&mut self, at: usize) {
        match &mut self.entry {
            Some(entry) => entry.end = at + 1,
            None => self.entry = Some(Entry { start: at, end: at + 1, broken: false }),
        }
    }

    pub(super) fn break_entry(&mut self, at: usize) {
        self.extend(at);
        if let Some(entry) = &mut self.entry {
            entry.broken = true;
        }
    }

    /// Passes over a quoted text; the offset of its last byte comes back.
    fn text(&mut self, at: usize, end: usize) -> usize {
        self.extend(at);
        if let Some(length) = self.source[at + 1..end].iter().position(|&byte| byte == b'"') {
            if let Some(bad) = (at..at + 1 + length).find(|&i| self.source[i] < 32 && self.source[i] != b'\t')
            {
                self.control(bad);
            }
            return at + 1 + length;
        }
        self.diagnostics.push(
            Diagnostic::new(Code::OpenText, "a text without its closing quote")
                .label(
                    self.span(at..trimmed_end(self.source, at, end)),
                    "the text starts here and the line ends",
                )
                .help("close the text with `\"` on the same line"),
        );
        self.break_entry(at);
        end - 1
    }

    fn open(&mut self, at: usize) {
        let opens_block = self.source[at] == b'{' && self.brackets.is_empty() && self.entry_opens_block();
        if self.blocks.len() + self.brackets.len() >= DEPTH_LIMIT {
            if !self.entry.as_ref().is_some_and(|entry| entry.broken) {
                self.diagnostics.push(
                    Diagnostic::new(Code::TooDeep, format!("brackets nested more than {DEPTH_LIMIT} deep"))
                        .label(self.span(at..at + 1), "one bracket too many here")
                        .help("name a part of the expression with `let` and use the name"),
                );
            }
            self.break_entry(at);
            self.brackets.push(at);
            return;
        }
        if opens_block {
            let (range, broken) = self.take_entry();
            self.blocks.push(Block { head: range, brace: at, pieces: Vec::new(), broken });
        } else {
            self.extend(at);
            self.brackets.push(at);
        }
    }

    fn entry_opens_block(&self) -> bool {
        let Some(entry) = &self.entry else { return false };
        let word = self.word_at(entry.start);
        if self.blocks.is_empty() {
            matches!(word, b"sheet" | b"species" | b"balance")
        } else {
            word == b"phase"
        }
    }

    fn close(&mut self, at: usize) {
        let wanted = if self.source[at] == b')' { b'(' } else { b'{' };
        match self.brackets.last() {
            Some(&open) if self.source[open] == wanted => {
                self.brackets.pop();
            }
            Some(&open) => {
                self.mismatch(open, at);
                if wanted == b'{' && !self.blocks.is_empty() {
                    self.end_entry();
                    self.close_block(false);
                }
            }
            None if wanted == b'{' && !self.blocks.is_empty() => {
                self.end_entry();
                self.close_block(false);
            }
            None if self.orphans > 0 => {
                // its partner was closed early, and that is told
                self.orphans -= 1;
                self.break_entry(at);
            }
            None => {
                let message = format!("`{}` without its partner", char::from(self.source[at]));
                self.diagnostics.push(
                    Diagnostic::new(Code::Bracket, message)
                        .label(self.span(at..at + 1), "nothing is open here")
                        .help("take it out, or open it before"),
                );
                self.break_entry(at);
            }
        }
    }

    fn mismatch(&mut self, open: usize, at: usize) {
        if !self.entry.as_ref().is_some_and(|entry| entry.broken) {
            self.diagnostics.push(
                Diagnostic::new(
                    Code::Bracket,
                    format!(
                        "`{}` is closed by `{}`",
                        char::from(self.source[open]),
                        char::from(self.source[at])
                    ),
                )
                .label(self.span(open..open + 1), "opened here")
                .label(self.span(at..at + 1), "closed here")
                .help(format!("close it with `{}`", partner(self.source[open]))),
            );
        }
        self.break_entry(at);
        self.brackets.clear();
    }

    fn take_entry(&mut self) -> (Range<usize>, bool) {
        self.brackets.clear();
        match self.entry.take() {
            Some(entry) => (entry.start..entry.end, entry.broken),
            None => (0..0, false),
        }
    }

    fn end_entry(&mut self) {
        if self.entry.is_none() {
            return;
        }
        let (range, mut broken) = self.take_entry();
        if range.len() > LENGTH_LIMIT && !broken {
            self.diagnostics.push(
                Diagnostic::new(
                    Code::TooLong,
                    format!("a statement of {} bytes; at most {LENGTH_LIMIT} are read", range.len()),
                )
                .label(self.span(range.start..(range.start + 40).min(range.end)), "it starts here")
                .help("split it with `let`, or a table into ranges of one phase each"),
            );
            broken = true;
        }
        self.push(Piece { range, block: None, remark: false, broken });
    }

    /// Ends an entry whose brackets are still open, because something new begins.
    fn close_entry_early(&mut self) {
        self.orphans = self.brackets.len();
        if let Some(&open) = self.brackets.first() {
            if !self.entry.as_ref().is_some_and(|entry| entry.broken) {
                self.report_open(open);
            }
            if let Some(entry) = &mut self.entry {
                entry.broken = true;
            }
        }
        self.end_entry();
    }

    fn report_open(&mut self, open: usize) {
        let bracket = char::from(self.source[open]);
        self.diagnostics.push(
            Diagnostic::new(Code::Bracket, format!("`{bracket}` is never closed"))
                .label(self.span(open..open + 1), "opened here")
                .help(format!("close it with `{}`", partner(self.source[open]))),
        );
    }

    fn close_block(&mut self, broken: bool) {
        let Some(block) = self.blocks.pop() else { return };
        let broken_head = block.broken;
        let mut pieces = block.pieces;
        if broken {
            // the block's content is incomplete: say so to whoever reads it
            pieces.push(Piece { range: block.head.clone(), block: None, remark: false, broken: true });
        }
        self.push(Piece { range: block.head, block: Some(pieces), remark: false, broken: broken_head });
    }

    fn push(&mut self, piece: Piece) {
        match self.blocks.last_mut() {
            Some(block) => block.pieces.push(piece),
            None => self.pieces.push(piece),
        }
    }

    pub(super) fn finish(mut self) -> Cut {
        self.close_entry_early();
        self.close_blocks();
        let text = String::from_utf8(self.out).expect("only whole characters are blanked");
        Cut { text, pieces: self.pieces, diagnostics: self.diagnostics }
    }

    /// Closes every block that is still open; each is reported.
    fn close_blocks(&mut self) {
        while let Some(block) = self.blocks.last() {
            let brace = block.brace;
            self.report_open(brace);
            self.close_block(true);
        }
    }

    fn word_at(&self, start: usize) -> &[u8] {
        leading_word(&self.source[start.min(self.source.len())..])
    }

    fn blank(&mut self, range: Range<usize>, wanted: bool) {
        if wanted {
            self.out[range].fill(b' ');
        }
    }

    pub(super) fn span(&self, range: Range<usize>) -> Span {
        Span::new(self.file, range.start, range.end)
    }
}

fn partner(open: u8) -> char {
    if open == b'(' { ')' } else { '}' }
}

fn trimmed_end(source: &[u8], start: usize, end: usize) -> usize {
    (start..end).rev().find(|&at| !source[at].is_ascii_whitespace()).map_or(start, |at| at + 1)
}

fn leading_word(bytes: &[u8]) -> &[u8] {
    let end =
        bytes.iter().position(|byte| !(byte.is_ascii_alphanumeric() || *byte == b'_')).unwrap_or(bytes.len());
    &bytes[..end]
}

/// Whether a line begins a statement: a statement word, and after a blank what such a statement goes on with.
/// In the head of a sheet a word before a text is an entry, whatever the word.
fn starts_statement(line: &[u8], in_sheet_block: bool) -> bool {
    let word = leading_word(line);
    let known = STATEMENTS.iter().any(|opening| opening.word.as_bytes() == word);
    let rest = &line[word.len()..];
    let next = rest.iter().position(|byte| !byte.is_ascii_whitespace());
    let (true, Some(gap)) = (known, next) else { return false };
    let follows = rest[gap];
    let text_follows = follows == b'"';
    if in_sheet_block && text_follows {
        return false;
    }
    gap > 0
        && (text_follows || follows.is_ascii_alphabetic() || follows >= 128 || follows == b'(')
        && !words::RESERVED.iter().any(|reserved| reserved.as_bytes() == leading_word(&rest[gap..]))
}

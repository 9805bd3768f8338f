//! The pass itself: pieces to statements.

use super::build::Builder;
use super::complaint;
use super::grammar::{Rule, SheetParser};
use super::pieces::{Cut, Piece, cut};
use super::tree::{Balance, Head, Item, PhaseBlock, SpeciesBlock, SpeciesEntry, Statement, Text, Tree, Word};
use super::words::{self, Opening};
use crate::diagnostic::Diagnostic;
use crate::span::{FileId, Span};
use pest::Parser;
use pest::iterators::Pair;

/// What a text says, and what in it could not be read.
#[derive(Debug)]
pub struct Parsed {
    /// The statements that could be read.
    pub tree: Tree,
    /// Words in the statements that could not be read: what they would have declared is unknown, so later
    /// passes stay silent about these names.
    pub broken: Vec<String>,
    /// The mistakes.
    pub diagnostics: Vec<Diagnostic>,
}

/// Reads a sheet, or a file of species.
pub fn parse_sheet(file: FileId, text: &str) -> Parsed {
    let Cut { text, pieces, diagnostics } = cut(file, text);
    let mut reader = Reader { file, text: &text, diagnostics, broken: Vec::new() };
    let items = pieces.iter().filter_map(|piece| reader.statement(piece)).collect();
    let Reader { mut diagnostics, broken, .. } = reader;
    diagnostics.sort_by_key(|diagnostic| diagnostic.place().map_or(0, |span| span.start));
    Parsed { tree: Tree { items }, broken, diagnostics }
}

struct Reader<'a> {
    file: FileId,
    text: &'a str,
    diagnostics: Vec<Diagnostic>,
    broken: Vec<String>,
}

impl<'a> Reader<'a> {
    fn statement(&mut self, piece: &Piece) -> Option<Item> {
        let span = self.span(piece);
        if piece.remark {
            return Some(Item { statement: Statement::Remark(self.remark(piece)), span });
        }
        if piece.broken {
            self.give_up(piece);
            return None;
        }
        let slice = &self.text[piece.range.clone()];
        let word = complaint::first_word(slice);
        let Some(opening) = words::find(words::STATEMENTS, word) else {
            self.diagnostics.push(complaint::unknown_statement(slice, word, span));
            self.give_up(piece);
            return None;
        };
        let before = self.diagnostics.len();
        let statement = match (opening.rule, &piece.block) {
            (Rule::sheet_head, block) => self.head(piece, opening, block.as_deref()),
            (Rule::species_head, Some(block)) => self.species(piece, opening, block),
            (Rule::balance_head, Some(block)) => self.balance(piece, opening, block),
            (Rule::species_head | Rule::balance_head, None) => {
                self.diagnostics.push(complaint::block_missing(opening, span));
                None
            }
            (_, Some(_)) | (_, None) => {
                let pair = self.parse(piece, opening)?;
                self.builder(piece).statement(pair)
            }
        };
        if statement.is_none() && self.diagnostics.len() == before {
            // nothing is ever dropped in silence
            self.diagnostics.push(complaint::not_understood(opening, span));
        }
        if statement.is_none() {
            self.give_up(piece);
        }
        statement.map(|statement| Item { statement, span })
    }

    /// Parses a piece by the rule of its opening word; what cannot be read is reported.
    fn parse(&mut self, piece: &Piece, opening: &Opening) -> Option<Pair<'a, Rule>> {
        let slice = &self.text[piece.range.clone()];
        match SheetParser::parse(opening.rule, slice) {
            Ok(mut pairs) => pairs.next(),
            Err(error) => {
                let found = complaint::unreadable(&error, slice, piece.range.start, self.file, opening);
                self.diagnostics.push(found);
                self.give_up(piece);
                None
            }
        }
    }

    fn builder(&mut self, piece: &Piece) -> Builder<'_> {
        Builder { file: self.file, base: piece.range.start, diagnostics: &mut self.diagnostics }
    }

    /// Keeps the words of a piece that could not be read, so that nobody complains of them again.
    fn give_up(&mut self, piece: &Piece) {
        let slice = &self.text[piece.range.clone()];
        let declared = slice.split(['=', ':', '{', '"']).next().unwrap_or_default();
        let words =
            declared.split(|c: char| !(c.is_alphanumeric() || c == '_')).filter(|word| !word.is_empty());
        self.broken.extend(words.skip(1).map(str::to_owned));
    }

    fn remark(&self, piece: &Piece) -> Text {
        let text = self.text[piece.range.clone()].trim_start_matches('|').trim().to_owned();
        Text { text, span: self.span(piece) }
    }

    fn head(&mut self, piece: &Piece, opening: &Opening, block: Option<&[Piece]>) -> Option<Statement> {
        let pair = self.parse(piece, opening)?;
        let title = self.builder(piece).first_text(pair)?;
        let mut entries = Vec::new();
        for entry in block.unwrap_or_default() {
            let opening = Opening { word: "", rule: Rule::head_entry, form: r#"number "TP-0147""# };
            if let Some(pair) = self.readable(entry).then(|| self.parse(entry, &opening)).flatten() {
                entries.extend(self.builder(entry).head_entry(pair));
            }
        }
        Some(Statement::Head(Head { title, entries }))
    }

    fn readable(&self, entry: &Piece) -> bool {
        !entry.broken && !entry.remark
    }

    fn species(&mut self, piece: &Piece, opening: &Opening, block: &[Piece]) -> Option<Statement> {
        let pair = self.parse(piece, opening)?;
        let (name, label) = self.builder(piece).species_head(pair)?;
        let mut species =
            SpeciesBlock { name, label, entries: Vec::new(), head: self.span(piece), damaged: piece.broken };
        for entry in block {
            match self.species_entry(entry) {
                Some(read) => {
                    species.damaged |= matches!(&read, SpeciesEntry::Phase(phase) if phase.damaged);
                    species.entries.push(read);
                }
                None => species.damaged = true,
            }
        }
        Some(Statement::Species(species))
    }

    fn species_entry(&mut self, entry: &Piece) -> Option<SpeciesEntry> {
        if entry.remark {
            return Some(SpeciesEntry::Remark(self.remark(entry)));
        }
        if let (Some(block), false) = (&entry.block, entry.broken) {
            return self.phase(entry, block).map(SpeciesEntry::Phase);
        }
        let pair = self.entry(entry, words::SPECIES_ENTRIES, "species block")?;
        self.builder(entry).species_entry(pair)
    }

    fn phase(&mut self, piece: &Piece, block: &[Piece]) -> Option<PhaseBlock> {
        let pair = self.parse(piece, &words::PHASE)?;
        let (name, class) = self.builder(piece).phase_head(pair)?;
        let mut phase =
            PhaseBlock { name, class, entries: Vec::new(), head: self.span(piece), damaged: false };
        for entry in block {
            if entry.remark {
                phase.entries.push(super::tree::PhaseEntry::Remark(self.remark(entry)));
                continue;
            }
            let read = self
                .entry(entry, words::PHASE_ENTRIES, "phase block")
                .and_then(|pair| self.builder(entry).phase_entry(pair));
            match read {
                Some(read) => phase.entries.push(read),
                None => phase.damaged = true,
            }
        }
        Some(phase)
    }

    fn balance(&mut self, piece: &Piece, opening: &Opening, block: &[Piece]) -> Option<Statement> {
        let pair = self.parse(piece, opening)?;
        let name = self.builder(piece).first_word(pair)?;
        let mut entries = Vec::new();
        for entry in block.iter().filter(|entry| !entry.remark) {
            if let Some(pair) = self.entry(entry, words::BALANCE_ENTRIES, "balance") {
                entries.extend(self.builder(entry).balance_entry(pair));
            }
        }
        Some(Statement::Balance(Balance { name, entries }))
    }

    /// Parses an entry of a block by its first word.
    fn entry(&mut self, entry: &Piece, table: &'static [Opening], place: &str) -> Option<Pair<'a, Rule>> {
        if entry.broken {
            return None;
        }
        let slice = &self.text[entry.range.clone()];
        let word = complaint::first_word(slice);
        match words::find(table, word) {
            Some(opening) => self.parse(entry, opening),
            None => {
                let span = self.span(entry);
                self.diagnostics.push(complaint::unknown_entry(slice, word, table, place, span));
                None
            }
        }
    }

    fn span(&self, piece: &Piece) -> Span {
        Span::new(self.file, piece.range.start, piece.range.end)
    }
}

/// The word that a statement declares, for builders.
pub(super) fn is_reserved(word: &Word) -> bool {
    words::RESERVED.contains(&word.text.as_str())
}

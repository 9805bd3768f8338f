//! The builder, and the words and texts that every node has.

use crate::diagnostic::{Code, Diagnostic};
use crate::span::{FileId, Span};
use crate::syntax::grammar::{Rule, is_keyword};
use crate::syntax::parse::is_reserved;
use crate::syntax::tree::{SpeciesName, Text, Word};
use pest::iterators::Pair;

/// Builds the nodes of one piece.
pub(in crate::syntax) struct Builder<'a> {
    pub(in crate::syntax) file: FileId,
    pub(in crate::syntax) base: usize,
    pub(in crate::syntax) diagnostics: &'a mut Vec<Diagnostic>,
}

/// The parts of a pair, keywords and the end of the text passed over.
pub(super) fn parts<'i>(pair: Pair<'i, Rule>) -> impl Iterator<Item = Pair<'i, Rule>> {
    pair.into_inner().filter(|part| !is_keyword(part.as_rule()) && part.as_rule() != Rule::EOI)
}

impl Builder<'_> {
    pub(super) fn span(&self, pair: &Pair<'_, Rule>) -> Span {
        let span = pair.as_span();
        let trimmed = span.start() + span.as_str().trim_end().len();
        Span::new(self.file, self.base + span.start(), self.base + trimmed)
    }

    pub(super) fn word(&self, pair: &Pair<'_, Rule>) -> Word {
        Word { text: pair.as_str().to_owned(), span: self.span(pair) }
    }

    /// A declared name; a reserved word is reported.
    pub(super) fn declared(&mut self, pair: &Pair<'_, Rule>) -> Word {
        let word = self.word(pair);
        if is_reserved(&word) {
            self.diagnostics.push(
                Diagnostic::new(Code::ReservedName, format!("`{}` is reserved and names nothing", word.text))
                    .label(word.span, "declared as a name here")
                    .help(format!("choose another name, such as `{}_1`", word.text)),
            );
        }
        word
    }

    pub(super) fn text(&self, pair: &Pair<'_, Rule>) -> Text {
        let inner = pair.as_str();
        let text = inner.get(1..inner.len().saturating_sub(1)).unwrap_or_default();
        Text { text: text.to_owned(), span: self.span(pair) }
    }

    pub(super) fn species_name(&self, pair: Pair<'_, Rule>) -> Option<SpeciesName> {
        let span = self.span(&pair);
        let mut parts = parts(pair);
        let name = parts.next()?.as_str().to_owned();
        let symbol = parts.next().map(|part| self.word(&part));
        Some(SpeciesName { name, symbol, span })
    }

    pub(in crate::syntax) fn first_text(&self, pair: Pair<'_, Rule>) -> Option<Text> {
        parts(pair).find(|part| part.as_rule() == Rule::text).map(|part| self.text(&part))
    }

    pub(in crate::syntax) fn first_word(&mut self, pair: Pair<'_, Rule>) -> Option<Word> {
        let part = parts(pair).next()?;
        Some(self.declared(&part))
    }
}

//! The page that the note is written on: wrapped lines, section titles, numbered items.

use textwrap::core::display_width;
use textwrap::{Options, WordSplitter};

use super::grid::Grid;
use super::style::{Ink, Style};

/// The column in which the text of a numbered line begins.
pub(super) const BODY: usize = 6;

/// The columns that a lead leaves to its text at the least.
const ROOM: usize = 20;

/// A blank at which no line ends.
const BOUND: char = '\u{a0}';

/// A page in the making.
pub(super) struct Page {
    out: String,
    style: Style,
    ticks: usize,
}

impl Page {
    pub(super) fn new(style: Style) -> Self {
        Page { out: String::new(), style, ticks: 0 }
    }

    pub(super) fn finish(self) -> String {
        self.out
    }

    pub(super) fn columns(&self) -> usize {
        self.style.columns()
    }

    /// The number of the next line to agree to: `[3]`.
    pub(super) fn tick(&mut self) -> String {
        self.ticks += 1;
        format!("[{}]", self.ticks)
    }

    pub(super) fn gap(&mut self) {
        self.push("");
    }

    /// A line across the page.
    pub(super) fn hairline(&mut self) {
        self.push(&"─".repeat(self.columns()));
    }

    /// A section's title, with the hairline running on behind it.
    pub(super) fn section(&mut self, title: &str) {
        let rest = self.columns().saturating_sub(display_width(title) + 1);
        self.gap();
        self.push(&format!("{} {}", self.style.painted(Ink::Title, title), "─".repeat(rest)));
    }

    /// Text from a column on, wrapped.
    pub(super) fn text(&mut self, indent: usize, text: &str) {
        self.hanging(&" ".repeat(indent), indent, text);
    }

    /// Text in an ink, wrapped.
    pub(super) fn inked(&mut self, indent: usize, ink: Ink, text: &str) {
        for line in self.wrapped(&" ".repeat(indent), indent, text) {
            let body = line.trim_start();
            let before = line.len() - body.len();
            self.push(&format!("{}{}", " ".repeat(before), self.style.painted(ink, body)));
        }
    }

    /// A numbered line: its mark, then text that hangs behind it.
    pub(super) fn item(&mut self, mark: &str, text: &str) {
        self.hanging(&lead(mark), BODY, text);
    }

    /// A numbered line that begins with a word in an ink.
    pub(super) fn inked_item(&mut self, mark: &str, ink: Ink, word: &str, text: &str) {
        let mut lines = self.wrapped(&lead(mark), BODY, &format!("{word}  {text}")).into_iter();
        if let Some(first) = lines.next() {
            let painted = self.style.painted(ink, word);
            self.push(&first.replacen(word, &painted, 1));
        }
        lines.for_each(|line| self.push(&line));
    }

    /// A numbered equation over lines, the signs below each other: `name = formula`, `= numbers`, `= value`.
    pub(super) fn equation(&mut self, mark: &str, name: &str, sides: &[&str]) {
        let name = clean(name);
        let column = BODY + display_width(&name).min(self.columns() / 3);
        let mut lead = format!("{}{name} = ", lead(mark));
        for side in sides {
            self.hanging(&lead, column + 3, side);
            lead = format!("{} = ", " ".repeat(column));
        }
    }

    /// Aligned columns from a column on.
    pub(super) fn grid(&mut self, indent: usize, grid: Grid) {
        for line in grid.lines(self.columns().saturating_sub(indent)) {
            self.push(&format!("{}{line}", " ".repeat(indent)));
        }
    }

    /// Text behind a lead; further lines begin in a column.
    pub(super) fn hanging(&mut self, lead: &str, column: usize, text: &str) {
        for line in self.wrapped(lead, column, text) {
            self.push(&line);
        }
    }

    /// The title, wrapped.
    pub(super) fn title(&mut self, text: &str) {
        self.inked(0, Ink::Title, text);
    }

    /// The lines of a text behind a lead. A lead that leaves no room for text stands on a line of its own.
    fn wrapped(&self, lead: &str, column: usize, text: &str) -> Vec<String> {
        let (lead, text) = (clean(lead), clean(text));
        let indent = " ".repeat(column);
        let lead_width = width(&lead);
        if lead_width + ROOM > self.columns() {
            let mut lines = self.filled("", &indent, lead.trim_end());
            lines.extend(self.filled(&indent, &indent, &bound(&text)));
            return lines;
        }
        // most texts fit on their line, where the search for the best line ends would only cost time
        let rest = text.trim_end_matches(' ');
        if !rest.is_empty() && lead_width + width(rest) <= self.columns() {
            return vec![format!("{lead}{rest}").replace(BOUND, " ")];
        }
        self.filled(&lead, &indent, &bound(&text))
    }

    fn filled(&self, first: &str, indent: &str, text: &str) -> Vec<String> {
        let options = Options::new(self.columns())
            .initial_indent(first)
            .subsequent_indent(indent)
            .word_splitter(WordSplitter::NoHyphenation);
        textwrap::wrap(text, options).into_iter().map(|line| line.replace(BOUND, " ")).collect()
    }

    fn push(&mut self, line: &str) {
        self.out.push_str(line.trim_end());
        self.out.push('\n');
    }
}

/// The columns that a clean text takes.
fn width(text: &str) -> usize {
    if text.is_ascii() { text.len() } else { display_width(text) }
}

fn lead(mark: &str) -> String {
    format!("{mark:<width$} ", width = BODY - 1)
}

/// The blanks between a number and its unit, bound so that no line ends there.
fn bound(text: &str) -> String {
    let mut out = String::with_capacity(text.len() + 16);
    let mut chars = text.chars().peekable();
    let mut behind_digit = false;
    while let Some(c) = chars.next() {
        let before_unit = chars.peek().is_some_and(|c| c.is_alphabetic() || matches!(c, '%' | '°'));
        out.push(if c == ' ' && behind_digit && before_unit { BOUND } else { c });
        behind_digit = c.is_ascii_digit();
    }
    out
}

/// A text without control characters and without marks that turn the direction of writing; a line end becomes a blank.
pub(super) fn clean(text: &str) -> String {
    if text.chars().all(|c| kept(c) == Some(c)) {
        return text.to_owned();
    }
    text.chars().filter_map(kept).collect()
}

/// A character as it may stand on the page; none where it may not.
fn kept(c: char) -> Option<char> {
    match c {
        ' '..='~' => Some(c),
        '\n' | '\t' => Some(' '),
        '\u{200e}' | '\u{200f}' | '\u{202a}'..='\u{202e}' | '\u{2066}'..='\u{2069}' => None,
        c if c.is_control() => None,
        c => Some(c),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn page() -> Page {
        Page::new(Style { colour: false, width: 80 })
    }

    #[test]
    fn long_text_hangs_behind_its_mark() {
        let mut page = page();
        let mark = page.tick();
        page.item(&mark, &"ten lettrs ".repeat(12));
        let text = page.finish();
        let lines: Vec<_> = text.lines().collect();
        assert!(lines[0].starts_with("[1]   ten lettrs"), "{text}");
        assert!(lines[1].starts_with("      ten lettrs") || lines[1].starts_with("      lettrs"), "{text}");
        assert!(lines.iter().all(|line| line.chars().count() <= 80), "{text}");
    }

    #[test]
    fn the_signs_of_an_equation_stand_below_each_other() {
        let mut page = page();
        page.equation("[7]", "ΔT_all", &["a - b", "20 K - 5 K", "15 K"]);
        assert_eq!(page.finish(), "[7]   ΔT_all = a - b\n             = 20 K - 5 K\n             = 15 K\n");
    }

    #[test]
    fn a_number_is_not_parted_from_its_unit() {
        let mut page = page();
        page.text(64, "about 10.05e-3 J/(mol K)");
        assert!(page.finish().lines().any(|line| line.trim().starts_with("10.05e-3 J")));
    }

    #[test]
    fn a_name_wider_than_the_page_is_broken() {
        let mut page = page();
        page.equation("[1]", &"n".repeat(200), &["1 kg", "2 kg"]);
        let text = page.finish();
        assert!(text.lines().all(|line| line.chars().count() <= 80), "{text}");
        assert_eq!(text.matches('n').count(), 200);
    }

    #[test]
    fn control_characters_do_not_reach_the_page() {
        assert_eq!(clean("a\u{1b}[31mb\u{7}\u{202e}c\nd\u{9b}"), "a[31mbc d");
    }
}

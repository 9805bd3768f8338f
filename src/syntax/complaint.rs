//! What is said of a piece that cannot be read.

use super::grammar::Rule;
use super::words::{self, Opening};
use crate::diagnostic::{Code, Diagnostic, nearest, or_list};
use crate::span::{FileId, Span};
use pest::error::{Error, ErrorVariant, InputLocation};

/// The word that a piece begins with; empty where it begins with something else.
pub(super) fn first_word(text: &str) -> &str {
    let end = text.find(|c: char| !(c.is_alphanumeric() || c == '_')).unwrap_or(text.len());
    &text[..end]
}

/// A line that begins with no statement word.
pub(super) fn unknown_statement(text: &str, word: &str, span: Span) -> Diagnostic {
    let end = span.start + u32::try_from(word.len().max(1)).unwrap_or(1);
    let place = if word.is_empty() { span } else { Span { end, ..span } };
    let shown = shown(word, text);
    let found = Diagnostic::new(Code::UnknownStatement, format!("no statement begins with {shown}"))
        .label(place, "a statement word is wanted here");
    let after = text[word.len()..].trim_start();
    if text.starts_with(['+', '-', '*', '/', '−', '×', '^']) {
        return found.help(
            "a statement goes on inside open parentheses, or after a comma: put the expression in `( )`",
        );
    }
    let known = words::STATEMENTS.iter().map(|opening| opening.word);
    if !word.is_empty() && after.starts_with('=') {
        return found.help(format!(
            "write `let {word} = ...` for a derived value, `basis {word} = ...` for an input"
        ));
    }
    match nearest(word, known.clone()) {
        Some(near) => {
            found.help(format!("did you mean `{near}`? A comment starts with `#`, a remark with `|`"))
        }
        None => found.help(format!("statements begin with {}", or_list(&known.collect::<Vec<_>>()))),
    }
}

/// An entry that its block does not know.
pub(super) fn unknown_entry(
    text: &str,
    word: &str,
    table: &[Opening],
    place: &str,
    span: Span,
) -> Diagnostic {
    let end = span.start + u32::try_from(word.len().max(1)).unwrap_or(1);
    let known: Vec<&str> = table.iter().map(|opening| opening.word).collect();
    let found = Diagnostic::new(Code::UnknownEntry, format!("a {place} has no entry {}", shown(word, text)))
        .label(Span { end: end.min(span.end), ..span }, "not known here");
    match nearest(word, known.iter().copied()) {
        Some(near) => found.help(format!("did you mean `{near}`?")),
        None => {
            let phase = if place == "species block" { " or `phase NAME { ... }`" } else { "" };
            found.help(format!("entries here: {}{phase}", known.join(", ")))
        }
    }
}

/// A statement whose parts do not make one.
pub(super) fn not_understood(opening: &Opening, span: Span) -> Diagnostic {
    Diagnostic::new(Code::Unreadable, format!("this `{}` line cannot be read", opening.word))
        .label(span, "its parts do not make a statement")
        .help(format!("the form is `{}`", opening.form))
}

/// A statement that wants a block and has none.
pub(super) fn block_missing(opening: &Opening, span: Span) -> Diagnostic {
    Diagnostic::new(Code::Unreadable, format!("`{}` wants a block in braces", opening.word))
        .label(span, "no `{` on this line")
        .help(format!("write `{}`", opening.form))
}

/// A piece that its rule cannot read.
pub(super) fn unreadable(
    error: &Error<Rule>,
    text: &str,
    base: usize,
    file: FileId,
    opening: &Opening,
) -> Diagnostic {
    let at = match error.location {
        InputLocation::Pos(at) | InputLocation::Span((at, _)) => at.min(text.len()),
    };
    let place = Place { text, base, file, at };
    chained_power(&place)
        .or_else(|| two_signs(&place))
        .or_else(|| blank_in_unit(&place))
        .or_else(|| number_before_name(&place))
        .or_else(|| reserved(&place))
        .or_else(|| call_blank(&place))
        .unwrap_or_else(|| unexpected(error, &place, opening))
}

/// Where the parser could not go on.
struct Place<'a> {
    text: &'a str,
    base: usize,
    file: FileId,
    at: usize,
}

impl Place<'_> {
    fn span(&self, start: usize, end: usize) -> Span {
        Span::new(self.file, self.base + start, self.base + end)
    }

    fn before(&self) -> &str {
        self.text[..self.at].trim_end()
    }

    fn rest(&self) -> &str {
        self.text[self.at..].trim_start()
    }

    /// The offset of the first character of [`Self::rest`].
    fn rest_at(&self) -> usize {
        self.text.len() - self.rest().len()
    }

    /// The token at which it stopped.
    fn token(&self) -> &str {
        let rest = self.rest();
        let word = first_word(rest);
        if word.is_empty() { &rest[..rest.chars().next().map_or(0, char::len_utf8)] } else { word }
    }

    fn token_span(&self) -> Span {
        let start = self.rest_at();
        if self.rest().is_empty() {
            let last = self.before().char_indices().last().map_or(0, |(at, _)| at);
            return self.span(last, self.before().len().max(last));
        }
        self.span(start, start + self.token().len())
    }
}

fn chained_power(place: &Place<'_>) -> Option<Diagnostic> {
    let hats = place.before().matches('^').count();
    (place.rest().starts_with('^') && hats > 0).then(|| {
        Diagnostic::new(Code::ChainedPower, "a second `^` in one power")
            .label(place.token_span(), "this one could bind either way")
            .help("write `(a ^ b) ^ c` or `a ^ (b ^ c)`")
    })
}

fn two_signs(place: &Place<'_>) -> Option<Diagnostic> {
    let sign = |c: char| matches!(c, '+' | '-' | '−');
    let here = place.rest().starts_with(sign);
    let mut after = place.rest().chars();
    let ahead = after.next().is_some() && after.as_str().trim_start().starts_with(sign);
    let before = place.before().ends_with(sign) && !place.before().ends_with("->");
    (here && (before || ahead)).then(|| {
        Diagnostic::new(Code::TwoSigns, "two signs in a row")
            .label(place.token_span(), "the second sign")
            .help("write one sign, or put the negative value in parentheses: `a - (-b)`")
    })
}

/// `8 W/m2 K`: the unit ended at the blank.
fn blank_in_unit(place: &Place<'_>) -> Option<Diagnostic> {
    let word = first_word(place.rest());
    if word.is_empty() || place.rest_at() == place.at && place.before().len() == place.at {
        return None;
    }
    let before = place.before();
    let start = before.rfind(char::is_whitespace).map_or(0, |at| at + 1);
    let unit = &before[start..];
    let number = before[..start].trim_end();
    let digits = number.ends_with(|c: char| c.is_ascii_digit());
    let unit_like = unit.starts_with(|c: char| c.is_alphabetic() || c == '%' || c == '°');
    let tail_len =
        place.rest().find(|c: char| c.is_whitespace() || ",)}#".contains(c)).unwrap_or(place.rest().len());
    let tail = &place.rest()[..tail_len];
    let no_unit = words::find(words::STATEMENTS, word).is_some() || words::RESERVED.contains(&word);
    if !(digits && unit_like) || no_unit || word.chars().count() > 4 {
        return None;
    }
    let whole = match unit.rsplit_once('/') {
        Some((top, bottom)) => format!("{top}/({bottom} {tail})"),
        None => format!("{unit}·{tail}"),
    };
    let digits_at = number.rfind(|c: char| c.is_whitespace() || "=(,{*/".contains(c)).map_or(0, |at| at + 1);
    Some(
        Diagnostic::new(Code::BlankInUnit, format!("a blank inside the unit `{unit} {tail}`"))
            .label(place.span(start, place.rest_at() + tail_len), "the unit ends at the blank")
            .help(format!("write `{} {whole}`", number[digits_at..].trim())),
    )
}

/// `2 (a + b)` or `2 (`: no product is understood without its sign.
fn number_before_name(place: &Place<'_>) -> Option<Diagnostic> {
    let before = place.before();
    let number = before.ends_with(|c: char| c.is_ascii_digit());
    let start = before
        .rfind(|c: char| !(c.is_ascii_digit() || c == '.'))
        .map_or(0, |at| at + before[at..].chars().next().map_or(1, char::len_utf8));
    let in_name = before[..start].ends_with(|c: char| c.is_alphanumeric() || c == '_');
    (number && !in_name && place.rest().starts_with('(')).then(|| {
        let number = &before[start..];
        Diagnostic::new(
            Code::NumberBeforeName,
            format!("the number `{number}` stands straight before a parenthesis"),
        )
        .label(place.span(start, place.rest_at() + 1), "no sign between them")
        .help(format!("write `{number} * (...)`"))
    })
}

fn reserved(place: &Place<'_>) -> Option<Diagnostic> {
    let word = first_word(place.rest());
    let before = place.before();
    let operand = before.ends_with(['=', '+', '*', '/', '(', '^', '-', '−']) || before.is_empty();
    (operand && words::RESERVED.contains(&word)).then(|| {
        Diagnostic::new(Code::ReservedName, format!("`{word}` is reserved and names nothing"))
            .label(place.token_span(), "a value is wanted here")
            .help(format!("choose another name, such as `{word}_1`"))
    })
}

/// `sqrt (x)`: a call's parenthesis touches its word.
fn call_blank(place: &Place<'_>) -> Option<Diagnostic> {
    let before = place.before();
    let blank = place.rest_at() > before.len();
    let start = before
        .rfind(|c: char| !(c.is_alphanumeric() || c == '_'))
        .map_or(0, |at| at + before[at..].chars().next().map_or(1, char::len_utf8));
    let word = &before[start..];
    let named = word.starts_with(char::is_alphabetic) && words::find(words::STATEMENTS, word).is_none();
    (blank && named && place.rest().starts_with('(')).then(|| {
        Diagnostic::new(Code::Unreadable, format!("a parenthesis after `{word}` and a blank"))
            .label(place.span(start, place.rest_at() + 1), "a call's parenthesis touches its word")
            .help(format!("write `{word}(...)`, or a sign between them"))
    })
}

fn unexpected(error: &Error<Rule>, place: &Place<'_>, opening: &Opening) -> Diagnostic {
    let wanted = match &error.variant {
        ErrorVariant::ParsingError { positives, .. } => wanted(positives),
        ErrorVariant::CustomError { .. } => Vec::new(),
    };
    let found = place.token();
    let found = if found.is_empty() { "it ends here".to_owned() } else { format!("`{found}` here") };
    let label = match wanted.as_slice() {
        [] => found,
        wanted => format!("{found}; wanted {}", or_list(wanted)),
    };
    let what = if opening.word.is_empty() { "entry" } else { opening.word };
    Diagnostic::new(Code::Unreadable, format!("this `{what}` line cannot be read"))
        .label(place.token_span(), label)
        .help(format!("the form is `{}`", opening.form))
}

/// The rules that would have fitted, in words, each once, at most five.
fn wanted(rules: &[Rule]) -> Vec<String> {
    let mut words: Vec<String> = Vec::new();
    for rule in rules {
        let word = rule_in_words(*rule);
        if !word.is_empty() && !words.contains(&word) {
            words.push(word);
        }
    }
    words.truncate(5);
    words
}

fn rule_in_words(rule: Rule) -> String {
    let fixed = match rule {
        Rule::EOI => "the end of the line",
        Rule::declared | Rule::name | Rule::path => "a name",
        Rule::word => "a word",
        Rule::text => "a text in quotes",
        Rule::species | Rule::species_name | Rule::subject => "a species",
        Rule::number | Rule::literal | Rule::datum => "a number with its unit",
        Rule::unit | Rule::per_unit | Rule::display_unit => "a unit",
        Rule::expr | Rule::product | Rule::factor | Rule::group | Rule::call | Rule::molar => "an expression",
        Rule::plus | Rule::minus | Rule::times | Rule::over | Rule::hat => "an operator",
        Rule::unknown => "`?`",
        Rule::interval | Rule::symmetric | Rule::sided => "an interval `± ...`",
        Rule::clause => "a path or a clause",
        Rule::comparison => "`<=`, `>=`, `<` or `>`",
        Rule::rows | Rule::coefficients => "a list in braces",
        _ => "",
    };
    if !fixed.is_empty() {
        return fixed.to_owned();
    }
    let name = format!("{rule:?}");
    name.strip_prefix("kw_").map_or_else(String::new, |word| format!("`{word}`"))
}

fn shown(word: &str, text: &str) -> String {
    if word.is_empty() {
        text.chars().next().map_or_else(|| "nothing".to_owned(), |c| format!("`{c}`"))
    } else {
        format!("`{word}`")
    }
}

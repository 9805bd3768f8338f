//! Reads a unit text.
//!
//! ```text
//! unit   = part (("/" | product) part)*      a leading "/" begins with 1
//! part   = word power? | "(" unit ")" power?
//! power  = "^"? "-"? digits | superscripts
//! product = "·" | "⋅" | blanks, inside parentheses
//! ```

use std::ops::Range;

use super::compound::{Term, compound};
use super::error::UnitError;
use super::unit::Unit;
use super::word::{is_word, term};

/// The longest text, in characters, and the deepest nesting of parentheses.
const LONGEST: usize = 200;
const DEEPEST: usize = 16;

/// Powers are limited to this, up and down.
pub(crate) const HIGHEST_POWER: i32 = 99;

/// Reads a unit as it stands behind a number: `kJ/(kg K)`, `m3/h`, `s⁻¹`, `°C`, `/h`.
///
/// `degC` and `degF` alone are readings; inside a compound they are differences. Slashes go from left to right.
pub fn read_unit(text: &str) -> Result<Unit, UnitError> {
    if let Some((at, _)) = text.char_indices().nth(LONGEST) {
        return Err(UnitError::Malformed { at, why: "a unit has at most 200 characters" });
    }
    let mut reader = Reader { text, at: 0, depth: 0 };
    let terms = reader.unit()?;
    match reader.peek() {
        None => compound(text, &terms),
        Some(found) => Err(reader.unexpected(found)),
    }
}

fn is_product(c: char) -> bool {
    matches!(c, '\u{b7}' | '\u{22c5}')
}

struct Reader<'a> {
    text: &'a str,
    at: usize,
    depth: usize,
}

/// A sign between two parts of a unit.
enum Joint {
    Over,
    Times,
}

impl Reader<'_> {
    /// Parts joined by slashes and product signs.
    fn unit(&mut self) -> Result<Vec<Term>, UnitError> {
        let start = self.at;
        let mut terms = if self.peek() == Some('/') { Vec::new() } else { self.part()? };
        let mut below = None;
        loop {
            let end = self.at;
            match self.joint() {
                Some(Joint::Over) => {
                    below = Some(self.at);
                    terms.extend(self.part()?.into_iter().map(Term::inverse));
                }
                Some(Joint::Times) => match below {
                    Some(below) => return Err(self.product_below(start, below, end)?),
                    None => terms.extend(self.part()?),
                },
                None => return Ok(terms),
            }
        }
    }

    /// Takes the sign to the next part, if there is one.
    fn joint(&mut self) -> Option<Joint> {
        let blank = self.skip_blanks();
        match self.peek()? {
            '/' => self.take(Joint::Over),
            sign if is_product(sign) => self.take(Joint::Times),
            next if blank && (next == '(' || is_word(next)) => Some(Joint::Times),
            _ => None,
        }
    }

    fn take(&mut self, joint: Joint) -> Option<Joint> {
        self.advance();
        self.skip_blanks();
        Some(joint)
    }

    /// A product sign was met after a solidus: reads the product to its end and words its two readings.
    fn product_below(
        &mut self,
        start: usize,
        below: usize,
        first_end: usize,
    ) -> Result<UnitError, UnitError> {
        let second = self.at;
        self.part()?;
        let mut end = self.at;
        while let Some(Joint::Times) = self.joint() {
            self.part()?;
            end = self.at;
        }
        let cut = |range: Range<usize>| self.text.get(range).unwrap_or("");
        let (before, after) = (cut(0..start), cut(end..self.text.len()));
        let quotient = cut(start..first_end);
        let choices = [
            format!("{before}{}({}){after}", cut(start..below), cut(below..end)),
            format!("{before}({quotient})\u{b7}{}{after}", cut(second..end)),
        ];
        Ok(UnitError::ProductBelow { word: cut(start..end).to_owned(), range: start..end, choices })
    }

    /// A word or a group, with its power.
    fn part(&mut self) -> Result<Vec<Term>, UnitError> {
        match self.peek() {
            Some('(') => self.group(),
            Some(c) if is_word(c) => Ok(vec![self.word()?]),
            Some(_) => Err(self.malformed("a unit is wanted here")),
            None => Err(self.malformed("a unit is wanted after this")),
        }
    }

    fn group(&mut self) -> Result<Vec<Term>, UnitError> {
        let start = self.at;
        if self.depth == DEEPEST {
            return Err(self.malformed("parentheses nest at most 16 deep in a unit"));
        }
        self.depth += 1;
        self.advance();
        self.skip_blanks();
        let terms = self.unit()?;
        if self.peek() != Some(')') {
            return Err(self.peek().map_or_else(
                || UnitError::Malformed { at: start, why: "this parenthesis is not closed" },
                |found| self.unexpected(found),
            ));
        }
        self.advance();
        self.depth -= 1;
        let power_at = self.at;
        let power = match self.digits() {
            Some(digits) => Some(self.limited(digits, power_at)?),
            None => self.power()?,
        };
        let Some(power) = power else { return Ok(terms) };
        terms.into_iter().map(|term| term.raised(power).ok_or_else(|| self.power_error(start))).collect()
    }

    /// A word with the power behind it.
    fn word(&mut self) -> Result<Term, UnitError> {
        let start = self.at;
        while self.peek().is_some_and(is_word) {
            self.advance();
        }
        let end = self.at;
        let power = self.power()?;
        term(self.text.get(start..end).unwrap_or(""), start..end, power.map(|power| (power, start..self.at)))
    }

    /// A power with a sign of its own: `^3`, `^-1`, `-1` or superscripts.
    fn power(&mut self) -> Result<Option<i32>, UnitError> {
        let start = self.at;
        if let Some(power) = self.superscripts() {
            return self.limited(power, start).map(Some);
        }
        let caret = self.skip('^');
        let minus = self.skip('-') || self.skip('\u{2212}');
        if !caret && !minus {
            return Ok(None);
        }
        let Some(digits) = self.digits() else {
            return Err(self.malformed("a power is a whole number"));
        };
        self.limited(if minus { -digits } else { digits }, start).map(Some)
    }

    fn limited(&self, power: i32, start: usize) -> Result<i32, UnitError> {
        if power.abs() > HIGHEST_POWER { Err(self.power_error(start)) } else { Ok(power) }
    }

    fn digits(&mut self) -> Option<i32> {
        self.number(|c| c.to_digit(10))
    }

    fn superscripts(&mut self) -> Option<i32> {
        let start = self.at;
        let minus = self.skip('\u{207b}');
        let number = self.number(superscript);
        if number.is_none() {
            self.at = start;
        }
        number.map(|number| if minus { -number } else { number })
    }

    /// Digits as a number, large ones as one that is out of range.
    fn number(&mut self, value: fn(char) -> Option<u32>) -> Option<i32> {
        let mut number: Option<i32> = None;
        while let Some(digit) = self.peek().and_then(value).and_then(|digit| i32::try_from(digit).ok()) {
            number = Some(number.unwrap_or(0).saturating_mul(10).saturating_add(digit).min(1000));
            self.advance();
        }
        number
    }

    fn skip_blanks(&mut self) -> bool {
        let start = self.at;
        while self.depth > 0 && self.peek().is_some_and(char::is_whitespace) {
            self.advance();
        }
        self.at > start
    }

    fn skip(&mut self, wanted: char) -> bool {
        let found = self.peek() == Some(wanted);
        if found {
            self.advance();
        }
        found
    }

    fn peek(&self) -> Option<char> {
        self.text.get(self.at..).and_then(|rest| rest.chars().next())
    }

    fn advance(&mut self) {
        self.at += self.peek().map_or(0, char::len_utf8);
    }

    /// Reading stopped before this character.
    fn unexpected(&self, found: char) -> UnitError {
        let rest = self.text.get(self.at..).unwrap_or("");
        let marked = ["(g)", "(a)", "(abs)", "(gauge)"].iter().any(|mark| rest.starts_with(mark));
        self.malformed(match found {
            ')' => "this parenthesis closes none",
            '(' if marked => "gauge and absolute pressures are written as one word, `barg` and `bara`",
            '^' => "a unit takes one power",
            '*' | '\u{d7}' => "units are multiplied by `·`, or by a blank inside parentheses",
            c if c.is_whitespace() => "a blank stands in a unit inside parentheses only",
            c if c == '(' || is_word(c) => "a product sign `·` is missing here",
            _ => "this does not belong in a unit",
        })
    }

    fn malformed(&self, why: &'static str) -> UnitError {
        UnitError::Malformed { at: self.at, why }
    }

    fn power_error(&self, start: usize) -> UnitError {
        let word = self.text.get(start..self.at).unwrap_or("").to_owned();
        UnitError::Power { word, range: start..self.at }
    }
}

fn superscript(c: char) -> Option<u32> {
    "\u{2070}\u{b9}\u{b2}\u{b3}\u{2074}\u{2075}\u{2076}\u{2077}\u{2078}\u{2079}"
        .chars()
        .position(|digit| digit == c)
        .and_then(|value| u32::try_from(value).ok())
}

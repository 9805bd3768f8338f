//! Chemical formulas: `Ca(OH)2`, `(NH4)2SO4`, `Fe0.947O`, `CuSO4·5H2O`.

use std::ops::Range;

use uom::si::f64::MolarMass;

use super::element::Element;
use super::si::typed;

/// How deep brackets may nest in a formula.
const NESTING_LIMIT: usize = 8;

/// What a substance is made of: how many atoms of each element, by rising atomic number, each element once.
#[derive(Debug, Clone, PartialEq)]
pub struct Composition {
    parts: Vec<(Element, f64)>,
}

/// Why a formula cannot be read; ranges are bytes of the formula's text.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum CompositionError {
    /// A symbol that no element has.
    UnknownElement {
        /// The symbol as written.
        symbol: String,
        /// Where it stands.
        range: Range<usize>,
    },
    /// An element that has no standard atomic weight.
    NoAtomicWeight {
        /// The element.
        element: Element,
        /// Where it stands.
        range: Range<usize>,
    },
    /// Text that is no formula.
    Malformed {
        /// What is wrong with it.
        fault: Fault,
        /// Where it stands.
        range: Range<usize>,
    },
}

/// What is wrong with a text that is no formula.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Fault {
    /// An element or a group is wanted here.
    Empty,
    /// A character that no formula has.
    Character,
    /// A bracket without its partner.
    Bracket,
    /// Brackets nested more than eight deep.
    TooDeep,
    /// A count that is zero, or no number.
    Count,
}

impl Composition {
    /// Reads a formula. Counts may be decimal; round and square brackets group; `·`, `•` or `⋅` joins the
    /// parts of an addition compound, each with its multiplier in front.
    ///
    /// # Errors
    /// [`CompositionError`] with the place in the text.
    pub fn parse(text: &str) -> Result<Composition, CompositionError> {
        let mut reader = Reader { text, at: 0 };
        let mut parts = reader.group(None, 0)?;
        while reader.peek().is_some() {
            reader.skip();
            let factor = reader.optional_count()?;
            parts.extend(scaled(reader.group(None, 0)?, factor));
        }
        Ok(Composition { parts: gathered(parts) })
    }

    /// The elements with their counts, by rising atomic number.
    pub fn parts(&self) -> &[(Element, f64)] {
        &self.parts
    }

    /// How many atoms of `element` one formula unit has.
    pub fn count(&self, element: Element) -> f64 {
        self.parts.iter().find(|(known, _)| *known == element).map_or(0.0, |(_, count)| *count)
    }

    /// The mass of one mole of formula units, from the standard atomic weights.
    pub fn molar_mass(&self) -> MolarMass {
        let grams: f64 = self
            .parts
            .iter()
            .map(|(element, count)| count * element.molar_mass().map_or(f64::NAN, |mass| mass.value * 1000.0))
            .sum();
        typed(grams / 1000.0)
    }
}

type Parts = Vec<(Element, f64)>;

fn scaled(parts: Parts, factor: f64) -> impl Iterator<Item = (Element, f64)> {
    parts.into_iter().map(move |(element, count)| (element, count * factor))
}

/// Each element once, counts added in the order written.
fn gathered(mut parts: Parts) -> Parts {
    parts.sort_by_key(|(element, _)| *element);
    let mut sums: Parts = Vec::with_capacity(parts.len());
    for (element, count) in parts {
        match sums.last_mut() {
            Some((last, sum)) if *last == element => *sum += count,
            _ => sums.push((element, count)),
        }
    }
    sums
}

fn is_hydrate_dot(c: char) -> bool {
    matches!(c, '·' | '•' | '⋅')
}

struct Reader<'a> {
    text: &'a str,
    at: usize,
}

impl<'a> Reader<'a> {
    fn rest(&self) -> &'a str {
        self.text.get(self.at..).unwrap_or("")
    }

    fn peek(&self) -> Option<char> {
        self.rest().chars().next()
    }

    fn next_is(&self, test: impl Fn(char) -> bool) -> bool {
        self.peek().is_some_and(test)
    }

    fn skip(&mut self) {
        self.at += self.peek().map_or(0, char::len_utf8);
    }

    fn take_while(&mut self, test: impl Fn(char) -> bool) -> &'a str {
        let rest = self.rest();
        let end = rest.find(|c| !test(c)).unwrap_or(rest.len());
        self.at += end;
        rest.get(..end).unwrap_or("")
    }

    fn fault(&self, fault: Fault) -> CompositionError {
        let width = self.peek().map_or(0, char::len_utf8);
        CompositionError::Malformed { fault, range: self.at..self.at + width }
    }

    /// Elements and bracketed groups up to `close`, or to a hydrate dot or the end where `close` is none.
    fn group(&mut self, close: Option<char>, depth: usize) -> Result<Parts, CompositionError> {
        let mut parts = Vec::new();
        loop {
            match self.peek() {
                Some(c) if c.is_ascii_uppercase() => parts.push(self.element()?),
                Some(open @ ('(' | '[')) => parts.extend(self.bracketed(open, depth)?),
                end if end == close || (close.is_none() && end.is_some_and(is_hydrate_dot)) => {
                    return if parts.is_empty() { Err(self.fault(Fault::Empty)) } else { Ok(parts) };
                }
                None | Some(')' | ']') => return Err(self.fault(Fault::Bracket)),
                Some(c) if is_hydrate_dot(c) => return Err(self.fault(Fault::Bracket)),
                Some(_) => return Err(self.fault(Fault::Character)),
            }
        }
    }

    fn bracketed(&mut self, open: char, depth: usize) -> Result<Vec<(Element, f64)>, CompositionError> {
        if depth >= NESTING_LIMIT {
            return Err(self.fault(Fault::TooDeep));
        }
        self.skip();
        let parts = self.group(Some(if open == '(' { ')' } else { ']' }), depth + 1)?;
        self.skip();
        let count = self.optional_count()?;
        Ok(scaled(parts, count).collect())
    }

    fn element(&mut self) -> Result<(Element, f64), CompositionError> {
        let start = self.at;
        self.skip();
        self.take_while(|c| c.is_ascii_lowercase());
        let range = start..self.at;
        let symbol = self.text.get(range.clone()).unwrap_or("");
        let Some(element) = Element::from_symbol(symbol) else {
            return Err(CompositionError::UnknownElement { symbol: symbol.to_owned(), range });
        };
        if element.molar_mass().is_none() {
            return Err(CompositionError::NoAtomicWeight { element, range });
        }
        Ok((element, self.optional_count()?))
    }

    fn optional_count(&mut self) -> Result<f64, CompositionError> {
        if self.next_is(|c| c.is_ascii_digit()) { self.count() } else { Ok(1.0) }
    }

    fn count(&mut self) -> Result<f64, CompositionError> {
        let start = self.at;
        let digits = self.take_while(|c| c.is_ascii_digit() || c == '.');
        let wrong = CompositionError::Malformed { fault: Fault::Count, range: start..self.at };
        if digits.ends_with('.') {
            return Err(wrong);
        }
        match digits.parse::<f64>() {
            Ok(count) if count > 0.0 && count.is_finite() => Ok(count),
            _ => Err(wrong),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn counts(text: &str) -> Vec<(&'static str, f64)> {
        let composition = Composition::parse(text).unwrap();
        composition.parts().iter().map(|(element, count)| (element.symbol(), *count)).collect()
    }

    #[test]
    fn reads_what_chemists_write() {
        assert_eq!(counts("Ca(OH)2"), [("H", 2.0), ("O", 2.0), ("Ca", 1.0)]);
        assert_eq!(counts("(NH4)2SO4"), [("H", 8.0), ("N", 2.0), ("O", 4.0), ("S", 1.0)]);
        assert_eq!(counts("Fe0.947O"), [("O", 1.0), ("Fe", 0.947)]);
        assert_eq!(counts("C6H14"), [("H", 14.0), ("C", 6.0)]);
        assert_eq!(counts("CH3COOH"), [("H", 4.0), ("C", 2.0), ("O", 2.0)]);
        assert_eq!(counts("CO"), [("C", 1.0), ("O", 1.0)]);
        assert_eq!(counts("Co"), [("Co", 1.0)]);
        assert_eq!(counts("K4[Fe(CN)6]"), [("C", 6.0), ("N", 6.0), ("K", 4.0), ("Fe", 1.0)]);
        for dot in ["·", "•", "⋅"] {
            let gypsum = counts(&format!("CaSO4{dot}2H2O"));
            assert_eq!(gypsum, [("H", 4.0), ("O", 6.0), ("S", 1.0), ("Ca", 1.0)]);
        }
        assert_eq!(counts("CaSO4·0.5H2O"), [("H", 1.0), ("O", 4.5), ("S", 1.0), ("Ca", 1.0)]);
    }

    #[test]
    fn molar_masses_added_up_by_hand() {
        // Abridged weights of 2021: 2·1.008 + 15.999; 40.078 + 12.011 + 3·15.999; CuSO4 159.602 + 5·18.015.
        for (text, grams) in
            [("H2O", 18.015), ("CaCO3", 100.086), ("CuSO4·5H2O", 249.677), ("Fe0.947O", 68.884215)]
        {
            let mass = Composition::parse(text).unwrap().molar_mass().value;
            assert!((mass - grams * 1e-3).abs() < 1e-15, "{text}: {mass}");
        }
    }

    #[test]
    fn says_where_a_symbol_is_unknown() {
        assert_eq!(
            Composition::parse("CaXo3"),
            Err(CompositionError::UnknownElement { symbol: "Xo".to_owned(), range: 2..4 })
        );
        assert!(matches!(
            Composition::parse("Na2Tc"),
            Err(CompositionError::NoAtomicWeight { range, .. }) if range == (3..5)
        ));
    }

    #[test]
    fn refuses_what_is_no_formula() {
        let fault = |text: &str| match Composition::parse(text) {
            Err(CompositionError::Malformed { fault, range }) => (fault, range),
            other => panic!("{text}: {other:?}"),
        };
        assert_eq!(fault(""), (Fault::Empty, 0..0));
        assert_eq!(fault("Ca()2"), (Fault::Empty, 3..4));
        assert_eq!(fault("Ca(OH"), (Fault::Bracket, 5..5));
        assert_eq!(fault("CaOH)2"), (Fault::Bracket, 4..5));
        assert_eq!(fault("(CaO]"), (Fault::Bracket, 4..5));
        assert_eq!(fault("(CaO·H2O)"), (Fault::Bracket, 4..6));
        assert_eq!(fault("Ca-O"), (Fault::Character, 2..3));
        assert_eq!(fault("2H2O"), (Fault::Character, 0..1), "a coefficient is no part of a formula");
        assert_eq!(fault("CuSO4·"), (Fault::Empty, 7..7));
        assert_eq!(fault("H0"), (Fault::Count, 1..2));
        assert_eq!(fault("H2.O"), (Fault::Count, 1..3));
        let deep = format!("{}H{}", "(".repeat(9), ")".repeat(9));
        assert_eq!(fault(&deep), (Fault::TooDeep, 8..9));
        assert!(Composition::parse(&format!("{}H{}", "(".repeat(8), ")".repeat(8))).is_ok());
    }
}

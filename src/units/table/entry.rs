//! One unit of the table.

use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes;
use crate::units::unit::{Calorie, Zero};

/// A unit with its definition.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Entry {
    /// The symbol that reports and lists use.
    pub(crate) symbol: &'static str,
    /// Other spellings of the symbol.
    pub(crate) aliases: &'static [&'static str],
    /// The English name.
    pub(crate) name: &'static str,
    /// The dimension.
    pub(crate) dimension: Dimension,
    /// How many coherent SI units it is.
    pub(crate) factor: Factor,
    /// Where its definition stands.
    pub(crate) standard: &'static str,
    /// Which prefixes it takes.
    pub(crate) prefixes: Prefixes,
    /// Where the zero of its scale lies.
    pub(crate) zero: Zero,
    /// The calorie that it rests on.
    pub(crate) flavour: Option<Calorie>,
    /// Whether it counts gas by a volume at reference conditions.
    pub(crate) gas_volume: bool,
}

impl Entry {
    /// A unit without prefixes whose scale begins at zero.
    pub(crate) const fn new(
        symbol: &'static str,
        name: &'static str,
        dimension: Dimension,
        factor: Factor,
        standard: &'static str,
    ) -> Entry {
        Entry {
            symbol,
            aliases: &[],
            name,
            dimension,
            factor,
            standard,
            prefixes: Prefixes::None,
            zero: Zero::None,
            flavour: None,
            gas_volume: false,
        }
    }

    /// Adds other spellings.
    pub(crate) const fn or(mut self, aliases: &'static [&'static str]) -> Entry {
        self.aliases = aliases;
        self
    }

    /// Lets it take prefixes.
    pub(crate) const fn prefixed(mut self, prefixes: Prefixes) -> Entry {
        self.prefixes = prefixes;
        self
    }

    /// Sets the zero of its scale.
    pub(crate) const fn zero(mut self, zero: Zero) -> Entry {
        self.zero = zero;
        self
    }

    /// Says which calorie it rests on.
    pub(crate) const fn flavour(mut self, calorie: Calorie) -> Entry {
        self.flavour = Some(calorie);
        self
    }

    /// Says that it counts gas by a volume at reference conditions.
    pub(crate) const fn of_gas(mut self) -> Entry {
        self.gas_volume = true;
        self
    }

    /// The symbol and its other spellings.
    pub(crate) fn spellings(&self) -> impl Iterator<Item = &'static str> {
        std::iter::once(self.symbol).chain(self.aliases.iter().copied())
    }
}

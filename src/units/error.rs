//! Why a unit text could not be read.

use std::ops::Range;

/// Why a unit text could not be read. Places are bytes of that text.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum UnitError {
    /// No unit has this name.
    Unknown {
        /// The name.
        word: String,
        /// Its place.
        range: Range<usize>,
        /// The unit that was probably meant.
        nearest: Option<String>,
    },
    /// The name means different things to different people.
    Ambiguous {
        /// The name.
        word: String,
        /// Its place.
        range: Range<usize>,
        /// Units that can be written in its place.
        choices: &'static [&'static str],
        /// What it means to whom, as a clause.
        why: &'static str,
    },
    /// A cubic nanometre, where a normal cubic metre of gas, `Nm3`, was meant.
    CubicNanometre {
        /// The unit as written.
        word: String,
        /// Its place.
        range: Range<usize>,
    },
    /// A power beyond -99 to 99, or one that leads out of the range of numbers or dimensions.
    Power {
        /// The unit with its power.
        word: String,
        /// Its place.
        range: Range<usize>,
    },
    /// A gauge unit inside a compound unit.
    ReadingInCompound {
        /// The gauge unit.
        word: String,
        /// Its place.
        range: Range<usize>,
    },
    /// A product after a solidus, such as `J/kg·K`: which factors stand below it is unclear (NIST SP 811, 2008,
    /// 6.1.6).
    ProductBelow {
        /// The unclear part.
        word: String,
        /// Its place.
        range: Range<usize>,
        /// The whole unit in its two readings: the factors below the solidus, and beside the quotient.
        choices: [String; 2],
    },
    /// The text is no unit.
    Malformed {
        /// Where reading stopped.
        at: usize,
        /// What is wrong there, as a clause.
        why: &'static str,
    },
}

impl UnitError {
    /// The place of the fault; empty where reading merely stopped.
    pub fn range(&self) -> Range<usize> {
        match self {
            UnitError::Unknown { range, .. }
            | UnitError::Ambiguous { range, .. }
            | UnitError::CubicNanometre { range, .. }
            | UnitError::Power { range, .. }
            | UnitError::ReadingInCompound { range, .. }
            | UnitError::ProductBelow { range, .. } => range.clone(),
            UnitError::Malformed { at, .. } => *at..*at,
        }
    }
}

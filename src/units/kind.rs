//! Readings on a scale and differences between them, and what may be done with each.

use super::dimension::Dimension;

/// What a quantity is beside its dimension. Only temperature and pressure come in more than one kind.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Kind {
    /// A quantity whose dimension knows no readings: a mass, a power.
    Plain,
    /// A reading on a scale: a temperature in `degC` or `degF`, a gauge pressure. In SI it is kept in K, and in Pa
    /// absolute.
    Point,
    /// A difference of two readings.
    Difference,
    /// A temperature in `K` or `degR`, a pressure in `bar`, `Pa` or `psi`: it serves as a reading and as a difference,
    /// the number being the same.
    Open,
}

/// Why two kinds do not go together.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum KindClash {
    /// Two readings were added; their mean may have been meant.
    ReadingsAdded,
    /// A reading was subtracted from a difference.
    ReadingFromDifference,
    /// A reading was compared with a difference.
    ReadingAgainstDifference,
}

impl Kind {
    /// The kind of a quantity of this dimension of which nothing else is known.
    pub fn unsaid(dimension: Dimension) -> Kind {
        if dimension.has_reading() { Kind::Open } else { Kind::Plain }
    }

    /// This kind as far as the dimension has it: `Plain` where there are no readings, never `Plain` where there are.
    fn within(self, dimension: Dimension) -> Kind {
        match (dimension.has_reading(), self) {
            (false, _) => Kind::Plain,
            (true, Kind::Plain) => Kind::Open,
            (true, kind) => kind,
        }
    }
}

/// The kind of `a + b`, both of this dimension.
pub fn sum(dimension: Dimension, a: Kind, b: Kind) -> Result<Kind, KindClash> {
    match (a.within(dimension), b.within(dimension)) {
        (Kind::Plain, _) | (_, Kind::Plain) => Ok(Kind::Plain),
        (Kind::Point, Kind::Point) => Err(KindClash::ReadingsAdded),
        (Kind::Point, _) | (_, Kind::Point) => Ok(Kind::Point),
        (Kind::Open, _) | (_, Kind::Open) => Ok(Kind::Open),
        (Kind::Difference, Kind::Difference) => Ok(Kind::Difference),
    }
}

/// The kind of `a - b`, both of this dimension.
///
/// A reading less an open quantity stays open: 40 degC less 293.15 K is a difference of 20 K if the second is a
/// reading, and a temperature of 20 K if it is a difference. The number in SI is the same.
pub fn difference(dimension: Dimension, a: Kind, b: Kind) -> Result<Kind, KindClash> {
    match (a.within(dimension), b.within(dimension)) {
        (Kind::Plain, _) | (_, Kind::Plain) => Ok(Kind::Plain),
        (Kind::Difference, Kind::Point) => Err(KindClash::ReadingFromDifference),
        (Kind::Point | Kind::Open, Kind::Point) => Ok(Kind::Difference),
        (Kind::Point, Kind::Difference) => Ok(Kind::Point),
        (Kind::Point, Kind::Open) | (Kind::Open, Kind::Open | Kind::Difference) => Ok(Kind::Open),
        (Kind::Difference, Kind::Open | Kind::Difference) => Ok(Kind::Difference),
    }
}

/// Whether `a` and `b`, both of this dimension, may be compared.
pub fn comparable(dimension: Dimension, a: Kind, b: Kind) -> Result<(), KindClash> {
    match (a.within(dimension), b.within(dimension)) {
        (Kind::Point, Kind::Difference) | (Kind::Difference, Kind::Point) => {
            Err(KindClash::ReadingAgainstDifference)
        }
        _ => Ok(()),
    }
}

#[cfg(test)]
mod tests {
    use super::Kind::{Difference, Open, Plain, Point};
    use super::*;

    const KINDS: [Kind; 3] = [Point, Difference, Open];

    /// The language's rules as tables: a row for the left kind, a column for the right, both in the order of `KINDS`.
    fn assert_matrix<T: Copy + PartialEq + std::fmt::Debug>(
        rule: fn(Dimension, Kind, Kind) -> Result<T, KindClash>,
        expected: [[Result<T, KindClash>; 3]; 3],
    ) {
        for dimension in [Dimension::TEMPERATURE, Dimension::PRESSURE] {
            for (a, row) in KINDS.into_iter().zip(expected) {
                for (b, outcome) in KINDS.into_iter().zip(row) {
                    assert_eq!(rule(dimension, a, b), outcome, "{a:?} with {b:?}");
                }
            }
        }
    }

    #[test]
    fn sums_follow_the_language() {
        assert_matrix(
            sum,
            [
                [Err(KindClash::ReadingsAdded), Ok(Point), Ok(Point)],
                [Ok(Point), Ok(Difference), Ok(Open)],
                [Ok(Point), Ok(Open), Ok(Open)],
            ],
        );
    }

    #[test]
    fn differences_follow_the_language() {
        assert_matrix(
            difference,
            [
                [Ok(Difference), Ok(Point), Ok(Open)],
                [Err(KindClash::ReadingFromDifference), Ok(Difference), Ok(Difference)],
                [Ok(Difference), Ok(Open), Ok(Open)],
            ],
        );
    }

    #[test]
    fn comparisons_follow_the_language() {
        let clash = Err(KindClash::ReadingAgainstDifference);
        assert_matrix(
            comparable,
            [[Ok(()), clash, Ok(())], [clash, Ok(()), Ok(())], [Ok(()), Ok(()), Ok(())]],
        );
    }

    #[test]
    fn a_dimension_without_readings_has_one_kind() {
        assert_eq!(Kind::unsaid(Dimension::MASS), Plain);
        assert_eq!(Kind::unsaid(Dimension::PRESSURE), Open);
        for a in [Plain, Point, Difference, Open] {
            for b in [Plain, Point, Difference, Open] {
                assert_eq!(sum(Dimension::MASS, a, b), Ok(Plain));
                assert_eq!(difference(Dimension::MASS, a, b), Ok(Plain));
                assert_eq!(comparable(Dimension::MASS, a, b), Ok(()));
            }
        }
    }
}

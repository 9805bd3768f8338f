//! Base units, units with a special name, and the pure number.

use super::Entry;
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes::All;

const BASE: &str = "SI Brochure, 9th ed. (2019), table 2";
const DERIVED: &str = "SI Brochure, 9th ed. (2019), table 4";
const NUMBER: &str = "SI Brochure, 9th ed. (2019), 5.4.7";

pub(super) const UNITS: &[Entry] = &[
    Entry::new("m", "metre", Dimension::LENGTH, Factor::ONE, BASE).prefixed(All),
    Entry::new("g", "gram", Dimension::MASS, Factor::decimal(1.0, -3), BASE).prefixed(All),
    Entry::new("s", "second", Dimension::TIME, Factor::ONE, BASE).prefixed(All),
    Entry::new("A", "ampere", Dimension::ELECTRIC_CURRENT, Factor::ONE, BASE).prefixed(All),
    Entry::new("K", "kelvin", Dimension::TEMPERATURE, Factor::ONE, BASE).prefixed(All),
    Entry::new("mol", "mole", Dimension::AMOUNT, Factor::ONE, BASE).prefixed(All),
    Entry::new("cd", "candela", Dimension::LUMINOUS_INTENSITY, Factor::ONE, BASE).prefixed(All),
    Entry::new("Hz", "hertz", Dimension::FREQUENCY, Factor::ONE, DERIVED).prefixed(All),
    Entry::new("N", "newton", Dimension::FORCE, Factor::ONE, DERIVED).prefixed(All),
    Entry::new("J", "joule", Dimension::ENERGY, Factor::ONE, DERIVED).prefixed(All),
    Entry::new("W", "watt", Dimension::POWER, Factor::ONE, DERIVED).prefixed(All),
    Entry::new("V", "volt", Dimension::ELECTRIC_POTENTIAL, Factor::ONE, DERIVED).prefixed(All),
    Entry::new("1", "one", Dimension::ONE, Factor::ONE, NUMBER),
    Entry::new("%", "percent", Dimension::ONE, Factor::decimal(1.0, -2), NUMBER),
];

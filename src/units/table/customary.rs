//! Customary units of length, volume, mass, amount and force.

use super::Entry;
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;

const YARD_POUND: &str = "international yard and pound (1959); NIST SP 811 (2008), app. B.8";
const GRAVITY: &str = "standard gravity, 3rd CGPM (1901); NIST SP 811 (2008), app. B.8";
const SP_811: &str = "NIST SP 811 (2008), app. B.8";

/// The standard acceleration of free fall, 9.806 65 m/s2.
pub(super) const FREE_FALL: Factor = Factor::decimal(980_665.0, -5);
/// 0.453 592 37 kg.
pub(super) const POUND: Factor = Factor::decimal(45_359_237.0, -8);
/// 25.4 mm.
pub(super) const INCH: Factor = Factor::decimal(254.0, -4);
/// 12 inches.
pub(super) const FOOT: Factor = Factor::decimal(3_048.0, -4);
/// The weight of a pound at standard gravity.
pub(super) const POUND_FORCE: Factor = POUND.times(FREE_FALL);

const YARD: Factor = Factor::decimal(9_144.0, -4);
const MILE: Factor = whole(5_280.0).times(FOOT);
/// 231 cubic inches.
const GALLON_US: Factor = whole(231.0).times(INCH.power(3));
/// 4.546 09 L.
const GALLON_UK: Factor = Factor::decimal(454_609.0, -8);

/// 64.798 91 mg.
const GRAIN: Factor = Factor::decimal(6_479_891.0, -11);

const fn whole(number: f64) -> Factor {
    Factor::decimal(number, 0)
}

const fn volume(symbol: &'static str, name: &'static str, factor: Factor, standard: &'static str) -> Entry {
    Entry::new(symbol, name, Dimension::VOLUME, factor, standard)
}

const fn mass(symbol: &'static str, name: &'static str, factor: Factor) -> Entry {
    Entry::new(symbol, name, Dimension::MASS, factor, YARD_POUND)
}

pub(super) const UNITS: &[Entry] = &[
    Entry::new("in", "inch", Dimension::LENGTH, INCH, YARD_POUND).or(&["inch"]),
    Entry::new("ft", "foot", Dimension::LENGTH, FOOT, YARD_POUND),
    Entry::new("yd", "yard", Dimension::LENGTH, YARD, YARD_POUND),
    Entry::new("mi", "international mile", Dimension::LENGTH, MILE, YARD_POUND),
    volume("gal_US", "US gallon, 231 cubic inches", GALLON_US, SP_811),
    volume("gal_UK", "imperial gallon", GALLON_UK, SP_811),
    volume("fl_oz_US", "US fluid ounce", GALLON_US.over(whole(128.0)), SP_811),
    volume("fl_oz_UK", "imperial fluid ounce", GALLON_UK.over(whole(160.0)), SP_811),
    volume("bbl_oil", "barrel of petroleum, 42 US gallons", GALLON_US.times(whole(42.0)), SP_811),
    mass("lb", "pound", POUND),
    mass("oz_av", "avoirdupois ounce", POUND.over(whole(16.0))),
    mass("oz_troy", "troy ounce, 480 grains", GRAIN.times(whole(480.0))),
    mass("ton_short", "short ton, 2000 pounds", POUND.times(whole(2_000.0))),
    mass("ton_long", "long ton, 2240 pounds", POUND.times(whole(2_240.0))),
    Entry::new("lbmol", "pound-mole", Dimension::AMOUNT, POUND.times(whole(1_000.0)), YARD_POUND),
    Entry::new("lbf", "pound-force", Dimension::FORCE, POUND_FORCE, GRAVITY),
    Entry::new("kgf", "kilogram-force", Dimension::FORCE, FREE_FALL, GRAVITY),
];

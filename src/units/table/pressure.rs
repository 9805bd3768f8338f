//! Pressures: absolute, gauge, and columns of liquid.

use super::Entry;
use super::customary::{FREE_FALL, INCH, POUND_FORCE};
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes::{All, Only};
use crate::units::unit::Zero;

const PASCAL: &str = "SI Brochure, 9th ed. (2019), table 4";
const GAUGE: &str = "ISO 80000-4:2019 (gauge pressure)";
const ATMOSPHERE: &str = "10th CGPM (1954), resolution 4";
const SP_811: &str = "NIST SP 811 (2008), app. B.8";

const BAR_IN_PASCAL: Factor = Factor::decimal(1.0, 5);
const ATMOSPHERE_IN_PASCAL: Factor = Factor::decimal(101_325.0, 0);
const PSI: Factor = POUND_FORCE.over(INCH.power(2));
const MILLIMETRE: Factor = Factor::decimal(1.0, -3);

/// The weight of conventional mercury by volume: 13 595.1 kg/m3 at standard gravity.
const MERCURY: Factor = Factor::decimal(135_951.0, -1).times(FREE_FALL);

/// The weight of conventional water by volume: 1000 kg/m3 at standard gravity.
const WATER: Factor = Factor::decimal(1.0, 3).times(FREE_FALL);

const fn pressure(symbol: &'static str, name: &'static str, factor: Factor, standard: &'static str) -> Entry {
    Entry::new(symbol, name, Dimension::PRESSURE, factor, standard)
}

const fn gauge(symbol: &'static str, name: &'static str, factor: Factor) -> Entry {
    pressure(symbol, name, factor, GAUGE).zero(Zero::Atmosphere)
}

pub(super) const UNITS: &[Entry] = &[
    pressure("Pa", "pascal", Factor::ONE, PASCAL).or(&["Paa"]).prefixed(All),
    gauge("Pag", "pascal gauge", Factor::ONE).prefixed(Only(&["hecto", "kilo", "mega"])),
    pressure("bar", "bar", BAR_IN_PASCAL, SP_811).or(&["bara"]).prefixed(Only(&["kilo", "milli", "micro"])),
    gauge("barg", "bar gauge", BAR_IN_PASCAL).prefixed(Only(&["milli"])),
    pressure("atm", "standard atmosphere", ATMOSPHERE_IN_PASCAL, ATMOSPHERE),
    pressure("psi", "pound-force per square inch", PSI, SP_811).or(&["psia"]),
    gauge("psig", "pound-force per square inch gauge", PSI),
    pressure("Torr", "torr", ATMOSPHERE_IN_PASCAL.over(Factor::decimal(760.0, 0)), SP_811)
        .prefixed(Only(&["milli"])),
    pressure("mmHg", "conventional millimetre of mercury", MERCURY.times(MILLIMETRE), SP_811),
    pressure("inHg", "conventional inch of mercury", MERCURY.times(INCH), SP_811),
    pressure("mmH2O", "conventional millimetre of water", WATER.times(MILLIMETRE), SP_811),
    pressure("inH2O", "conventional inch of water", WATER.times(INCH), SP_811),
];

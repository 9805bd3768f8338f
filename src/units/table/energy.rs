//! Customary units of energy and power.

use super::Entry;
use super::customary::{FOOT, FREE_FALL, POUND, POUND_FORCE};
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes::Only;
use crate::units::unit::Calorie::{InternationalTable, Thermochemical};

const CALORIE_TH: &str = "thermochemical calorie, 4.184 J: NIST SP 811 (2008), app. B.8";
const CALORIE_IT: &str =
    "International Table calorie, 4.1868 J: 5th ICPS (1956); NIST SP 811 (2008), app. B.8";
const BTU: &str =
    "one calorie per gram and kelvin, for a pound and a degree Fahrenheit: NIST SP 811 (2008), app. B.8";
const SP_811: &str = "NIST SP 811 (2008), app. B.8";

const THERMOCHEMICAL: Factor = Factor::decimal(4_184.0, -3);
const INTERNATIONAL: Factor = Factor::decimal(41_868.0, -4);

/// Calories in a British thermal unit of the same kind: the grams of a pound times the kelvins of a degree
/// Fahrenheit.
const CALORIES: Factor =
    POUND.times(Factor::decimal(1.0, 3)).times(Factor::decimal(5.0, 0)).over(Factor::decimal(9.0, 0));
const BTU_IT: Factor = INTERNATIONAL.times(CALORIES);
const MILLION: Factor = Factor::decimal(1.0, 6);

const fn energy(symbol: &'static str, name: &'static str, factor: Factor, standard: &'static str) -> Entry {
    Entry::new(symbol, name, Dimension::ENERGY, factor, standard)
}

const fn power(symbol: &'static str, name: &'static str, factor: Factor) -> Entry {
    Entry::new(symbol, name, Dimension::POWER, factor, SP_811)
}

pub(super) const UNITS: &[Entry] = &[
    energy("cal", "thermochemical calorie", THERMOCHEMICAL, CALORIE_TH)
        .or(&["cal_th"])
        .prefixed(Only(&["kilo", "mega", "giga"]))
        .flavour(Thermochemical),
    energy("cal_IT", "International Table calorie", INTERNATIONAL, CALORIE_IT)
        .prefixed(Only(&["kilo", "mega", "giga"]))
        .flavour(InternationalTable),
    energy("Btu", "British thermal unit (International Table)", BTU_IT, BTU)
        .or(&["Btu_IT"])
        .prefixed(Only(&["kilo"]))
        .flavour(InternationalTable),
    energy("MMBtu", "million British thermal units (International Table)", BTU_IT.times(MILLION), BTU)
        .flavour(InternationalTable),
    energy("Btu_th", "British thermal unit (thermochemical)", THERMOCHEMICAL.times(CALORIES), BTU)
        .flavour(Thermochemical),
    energy("therm_EC", "therm (EC)", Factor::decimal(105_506.0, 3), SP_811),
    energy("therm_US", "therm (US)", Factor::decimal(1_054_804.0, 2), SP_811),
    power("hp_mech", "mechanical horsepower, 550 foot pound-force per second", HP_MECH),
    power("hp_metric", "metric horsepower, 75 metre kilogram-force per second", HP_METRIC),
    power("hp_electric", "electric horsepower", Factor::decimal(746.0, 0)),
];

const HP_MECH: Factor = Factor::decimal(550.0, 0).times(FOOT).times(POUND_FORCE);
const HP_METRIC: Factor = Factor::decimal(75.0, 0).times(FREE_FALL);

//! Temperatures beside the kelvin.

use super::Entry;
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::unit::Zero;

const CELSIUS: &str = "SI Brochure, 9th ed. (2019), 2.3.1 and table 4";
const CUSTOMARY: &str = "NIST SP 811 (2008), app. B.8";

const FIVE_NINTHS: Factor = Factor::decimal(5.0, 0).over(Factor::decimal(9.0, 0));

pub(super) const UNITS: &[Entry] = &[
    Entry::new("degC", "degree Celsius", Dimension::TEMPERATURE, Factor::ONE, CELSIUS)
        .or(&["\u{b0}C", "\u{2103}"])
        .zero(Zero::Kelvin(273.15)),
    Entry::new("degF", "degree Fahrenheit", Dimension::TEMPERATURE, FIVE_NINTHS, CUSTOMARY)
        .or(&["\u{b0}F", "\u{2109}"])
        .zero(Zero::Kelvin(459.67)),
    Entry::new("degR", "degree Rankine", Dimension::TEMPERATURE, FIVE_NINTHS, CUSTOMARY).or(&["\u{b0}R"]),
];

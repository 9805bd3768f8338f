//! Gas counted by its volume at reference conditions: an amount of substance, n = pV/(RT) for the ideal gas.

use super::Entry;
use super::customary::{FOOT, INCH, POUND_FORCE};
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes::Only;

const NORMAL: &str = "DIN 1343:1990: 0 degC, 101.325 kPa; R by SI Brochure, 9th ed. (2019)";
const STANDARD: &str = "ISO 13443:1996: 15 degC, 101.325 kPa; R by SI Brochure, 9th ed. (2019)";
const SCF: &str = "60 degF, 14.696 psi; R by SI Brochure, 9th ed. (2019)";

/// The molar gas constant 8.314 462 618 153 24 J/(mol K), exact since 2019.
const GAS_CONSTANT: Factor = Factor::decimal(831_446_261_815_324.0, -14);
const ATMOSPHERE: Factor = Factor::decimal(101_325.0, 0);
const PSI_14_696: Factor = Factor::decimal(14_696.0, -3).times(POUND_FORCE).over(INCH.power(2));
const CELSIUS_0: Factor = Factor::decimal(27_315.0, -2);
const CELSIUS_15: Factor = Factor::decimal(28_815.0, -2);

/// (60 + 459.67) degR in K.
const FAHRENHEIT_60: Factor =
    Factor::decimal(51_967.0, -2).times(Factor::decimal(5.0, 0)).over(Factor::decimal(9.0, 0));

const fn amount(pressure: Factor, volume: Factor, temperature: Factor) -> Factor {
    pressure.times(volume).over(GAS_CONSTANT.times(temperature))
}

const fn gas(symbol: &'static str, name: &'static str, factor: Factor, standard: &'static str) -> Entry {
    Entry::new(symbol, name, Dimension::AMOUNT, factor, standard).prefixed(Only(&["kilo"])).of_gas()
}

pub(super) const UNITS: &[Entry] = &[
    gas("Nm3", "normal cubic metre of gas", amount(ATMOSPHERE, Factor::ONE, CELSIUS_0), NORMAL),
    gas("Sm3", "standard cubic metre of gas", amount(ATMOSPHERE, Factor::ONE, CELSIUS_15), STANDARD),
    gas("scf_60F", "standard cubic foot of gas", amount(PSI_14_696, FOOT.power(3), FAHRENHEIT_60), SCF),
];

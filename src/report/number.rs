//! How numbers are printed: the only number formatting of the program.
//!
//! A number is rounded from its exact decimal expansion, half to even, to significant digits. From 0.001 up to a
//! million it is printed plain, its integer part always whole; beyond, with an exponent that is a multiple of three.
//! Zeros at the end of a fraction are dropped, a negative zero is `0`.

use super::model::{PressureBasis, Quantity};
use crate::units::{Dimension, Kind, Unit};

/// The significant digits of a number for which nothing else is said.
pub const DIGITS: usize = 5;

/// The most significant digits that are ever printed.
pub const MOST_DIGITS: usize = 12;

/// The most digits of a number that shares its fraction digits with the others of its column.
const COLUMN_DIGITS: usize = 8;

/// The fraction digits of a temperature and of a percentage.
const HUNDREDTHS: usize = 2;

/// What stands where a number is not finite; a worked sheet holds none.
const NOT_FINITE: &str = "no finite number";

/// A number to so many significant digits, 1 to 12: `20.147`, `123457`, `1.2346e6`, `150e-6`.
pub fn significant(value: f64, digits: usize) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    if value == 0.0 {
        return "0".to_owned();
    }
    let digits = digits.clamp(1, MOST_DIGITS);
    let scientific = format!("{value:.*e}", digits - 1);
    let (mantissa, exponent) = scientific.split_once('e').expect("the `e` form has an `e`");
    let exponent: i32 = exponent.parse().expect("the exponent of a double is a small integer");
    if (-3..6).contains(&exponent) { plain(value, digits, exponent) } else { engineering(mantissa, exponent) }
}

/// A number to so many fraction digits, zeros at the end kept: `20.10`.
pub fn fixed(value: f64, decimals: usize) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    let text = format!("{value:.decimals$}");
    match text.strip_prefix('-') {
        Some(rest) if rest.bytes().all(|byte| matches!(byte, b'0' | b'.')) => rest.to_owned(),
        _ => text,
    }
}

/// The shortest digits that read back to the same double: `0.1`, `134705984.6`, `1e-12`.
pub fn exact(value: f64) -> String {
    if !value.is_finite() {
        return NOT_FINITE.to_owned();
    }
    let text = format!("{value:?}");
    text.strip_suffix(".0").map(str::to_owned).unwrap_or(text)
}

/// A quantity's number without its unit: a temperature and a percentage to 0.01, anything else to five digits.
pub fn shown_number(value: f64, unit: &Unit) -> String {
    with_digits(value, unit, DIGITS)
}

/// A quantity: number, unit and, beside a pressure, `abs` or `gauge`.
pub fn shown(quantity: &Quantity) -> String {
    shown_to(quantity, DIGITS)
}

/// A quantity and another in the same unit, both with as many digits more as it takes to tell them apart, so that a
/// verdict can be read off them: `20.0001 kW` and `20 kW`.
pub fn shown_apart(first: &Quantity, second: &Quantity) -> (String, String) {
    let pair = |digits| (shown_to(first, digits), shown_to(second, digits));
    if first.value == second.value {
        return pair(DIGITS);
    }
    (DIGITS..MOST_DIGITS).map(pair).find(|(a, b)| a != b).unwrap_or_else(|| pair(MOST_DIGITS))
}

/// A share of 0 to 1 in per cent: `95.5 %`.
pub fn shown_share(share: f64) -> String {
    format!("{} %", to_hundredths(share * 100.0, DIGITS, false))
}

/// A unit as it stands beside a number: its symbol and, of a pressure, `abs` or `gauge`; empty for a pure number.
/// Where the symbol says so itself the word stands in parentheses: `barg (gauge)`.
pub fn shown_unit(unit: &Unit, pressure: Option<PressureBasis>) -> String {
    let text = unit.text.as_str();
    let (word, said) = match pressure {
        Some(PressureBasis::Absolute) => {
            ("abs", ["bara", "psia", "Paa"].iter().any(|end| text.ends_with(end)))
        }
        Some(PressureBasis::Gauge) => ("gauge", unit.is_gauge()),
        Some(PressureBasis::Difference) | None if text == "1" => return String::new(),
        Some(PressureBasis::Difference) | None => return text.to_owned(),
    };
    if said { format!("{text} ({word})") } else { format!("{text} {word}") }
}

/// A standard uncertainty in the unit of its value, to two significant digits (JCGM 100:2008, 7.2.6). Beside a
/// reading it is a difference, beside a percentage it is in percentage points.
pub fn shown_uncertainty(value: f64, unit: &Unit) -> String {
    let text = match unit.text.as_str() {
        "degC" | "°C" => "K",
        "degF" | "°F" => "degR",
        "%" => "pp",
        "1" => return significant(value, 2),
        gauge if unit.is_gauge() => gauge.strip_suffix('g').unwrap_or(gauge),
        other => other,
    };
    format!("{} {text}", significant(value, 2))
}

/// The numbers of a column, all with the fraction digits of the one that has most; `None` is an empty place. Where that
/// would take an exponent, or more than eight digits in one of them, each is printed for itself.
pub fn shown_column(values: &[Option<f64>], unit: &Unit) -> Vec<Option<String>> {
    let alone: Vec<_> = values.iter().map(|value| value.map(|value| shown_number(value, unit))).collect();
    let present = || alone.iter().flatten();
    let decimals = present().map(|text| decimals_of(text)).max().unwrap_or(0);
    let whole = present().map(|text| text.split('.').next().map_or(0, str::len)).max().unwrap_or(0);
    let plain = |text: &String| text.bytes().all(|byte| matches!(byte, b'0'..=b'9' | b'.' | b'-'));
    if !present().all(plain) || whole + decimals > COLUMN_DIGITS {
        return alone;
    }
    values.iter().map(|value| value.map(|value| fixed(value, decimals))).collect()
}

fn shown_to(quantity: &Quantity, digits: usize) -> String {
    let number = with_digits(quantity.value, &quantity.unit, digits);
    match shown_unit(&quantity.unit, quantity.pressure) {
        unit if unit.is_empty() => number,
        unit => format!("{number} {unit}"),
    }
}

fn with_digits(value: f64, unit: &Unit, digits: usize) -> String {
    let temperature = unit.dimension == Dimension::TEMPERATURE;
    if temperature || unit.is_percent() {
        return to_hundredths(value, digits, temperature && unit.kind() == Kind::Point);
    }
    significant(value, digits)
}

/// A value to 0.01, and so much finer as the digits exceed the usual ones. Below 0.1 a value keeps its significant
/// digits, unless it is a reading on a scale, whose zero is a mark like any other.
fn to_hundredths(value: f64, digits: usize, reading: bool) -> String {
    let small = value.abs() < 0.1 && !reading;
    if small || value.abs() >= 1e6 {
        return significant(value, digits);
    }
    let decimals = HUNDREDTHS + digits.saturating_sub(DIGITS);
    let whole = fixed(value.abs().trunc(), 0).len();
    trimmed(&fixed(value, decimals.min(MOST_DIGITS.saturating_sub(whole))))
}

fn plain(value: f64, digits: usize, exponent: i32) -> String {
    let before = usize::try_from(exponent + 1).unwrap_or(0);
    let behind_point = usize::try_from(-exponent - 1).unwrap_or(0);
    trimmed(&fixed(value, digits.saturating_sub(before) + behind_point))
}

/// Moves the point of `d.ddd` so far that the exponent is a multiple of three.
fn engineering(mantissa: &str, exponent: i32) -> String {
    let (sign, mantissa) = mantissa.strip_prefix('-').map_or(("", mantissa), |rest| ("-", rest));
    let mut digits = mantissa.replace('.', "");
    let before = usize::try_from(exponent.rem_euclid(3)).unwrap_or(0) + 1;
    while digits.len() < before {
        digits.push('0');
    }
    let (whole, fraction) = digits.split_at(before);
    let number = if fraction.is_empty() { whole.to_owned() } else { trimmed(&format!("{whole}.{fraction}")) };
    format!("{sign}{number}e{}", exponent - exponent.rem_euclid(3))
}

fn trimmed(text: &str) -> String {
    if text.contains('.') {
        text.trim_end_matches('0').trim_end_matches('.').to_owned()
    } else {
        text.to_owned()
    }
}

fn decimals_of(text: &str) -> usize {
    text.split_once('.').map_or(0, |(_, fraction)| fraction.len())
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::read_unit;

    fn quantity(value: f64, unit: &str, pressure: Option<PressureBasis>) -> Quantity {
        let unit = read_unit(unit).expect("a unit");
        Quantity { si: unit.to_si(value, 101_325.0), value, unit, pressure }
    }

    fn plain_shown(value: f64, unit: &str) -> String {
        shown(&quantity(value, unit, None))
    }

    /// 134 705 984.6 J = 134.705 984 6 MJ and 20 146.69 W = 20.146 69 kW; rounded to five digits by hand.
    #[test]
    fn energies_and_powers_have_five_digits() {
        assert_eq!(plain_shown(134.705_984_6, "MJ"), "134.71 MJ");
        assert_eq!(plain_shown(20.146_69, "kW"), "20.147 kW");
        assert_eq!(plain_shown(-554.04, "J"), "-554.04 J");
        assert_eq!(plain_shown(450.0, "kg"), "450 kg");
    }

    #[test]
    fn zero_has_no_sign() {
        assert_eq!(significant(0.0, 5), "0");
        assert_eq!(significant(-0.0, 5), "0");
        assert_eq!(fixed(-0.001, 2), "0.00");
        assert_eq!(plain_shown(-0.001, "degC"), "0 degC");
    }

    #[test]
    fn large_and_small_numbers_take_an_exponent_of_three() {
        assert_eq!(significant(1e-12, 5), "1e-12");
        assert_eq!(significant(1_234_567.0, 5), "1.2346e6");
        assert_eq!(significant(123_456_789.0, 2), "120e6");
        assert_eq!(significant(-1.5e-4, 5), "-150e-6");
        assert_eq!(significant(0.001_234_56, 5), "0.0012346");
        assert_eq!(significant(f64::MAX, 5), "179.77e306");
    }

    /// The double nearest to 9.99995 lies above it (9.999950000000000116...), so it rounds up, over the power of ten.
    #[test]
    fn rounding_carries_over_a_power_of_ten() {
        assert_eq!(significant(9.99995, 5), "10");
        assert_eq!(significant(999_999.96, 7), "1e6");
        assert_eq!(significant(0.000_999_999, 5), "0.001");
    }

    /// 0.5, 1.5, 2.5 and 0.125 are exact doubles and so true ties.
    #[test]
    fn ties_go_to_the_even_digit() {
        assert_eq!(significant(2.5, 1), "2");
        assert_eq!(significant(1.5, 1), "2");
        assert_eq!(significant(0.125, 2), "0.12");
        assert_eq!(fixed(0.5, 0), "0");
    }

    #[test]
    fn an_integer_part_is_never_rounded_away() {
        assert_eq!(significant(101_325.0, 5), "101325");
        assert_eq!(significant(123_456.7, 5), "123457");
    }

    #[test]
    fn temperatures_and_percentages_go_to_hundredths() {
        assert_eq!(plain_shown(419.534_6, "degC"), "419.53 degC");
        assert_eq!(plain_shown(1_063.157, "K"), "1063.16 K");
        assert_eq!(plain_shown(99.999, "%"), "100 %");
        assert_eq!(plain_shown(0.004_21, "%"), "0.00421 %");
        assert_eq!(plain_shown(0.004_21, "K"), "0.00421 K");
        assert_eq!(shown_share(1.0), "100 %");
        assert_eq!(shown_share(2.0 / 3.0), "66.67 %");
        assert_eq!(shown_share(4.21e-5), "0.00421 %");
    }

    #[test]
    fn a_pressure_says_from_where_it_counts() {
        let shown = |value, unit, basis| shown(&quantity(value, unit, Some(basis)));
        assert_eq!(shown(101.325, "kPa", PressureBasis::Absolute), "101.33 kPa abs");
        assert_eq!(shown(0.3687, "barg", PressureBasis::Gauge), "0.3687 barg (gauge)");
        assert_eq!(shown(30.0, "psia", PressureBasis::Absolute), "30 psia (abs)");
        assert_eq!(shown(20.0, "mbar", PressureBasis::Difference), "20 mbar");
    }

    #[test]
    fn a_verdict_can_be_read_off_its_numbers() {
        let apart = |a, b, unit| shown_apart(&quantity(a, unit, None), &quantity(b, unit, None));
        assert_eq!(apart(20.000_000_4, 20.0, "kW"), ("20.0000004 kW".to_owned(), "20 kW".to_owned()));
        assert_eq!(apart(60.000_1, 60.0, "degC"), ("60.0001 degC".to_owned(), "60 degC".to_owned()));
        assert_eq!(apart(20.146_69, 20.0, "kW"), ("20.147 kW".to_owned(), "20 kW".to_owned()));
        assert_eq!(apart(20.0, 20.0, "kW").0, "20 kW");
    }

    /// A rectangular interval of ± 9 kg has the standard uncertainty 9/√3 = 5.196 kg, one of ± 5 K 2.887 K.
    #[test]
    fn uncertainties_have_two_digits_and_are_differences() {
        let shown = |value, unit: &str| shown_uncertainty(value, &read_unit(unit).expect("a unit"));
        assert_eq!(shown(5.196, "kg"), "5.2 kg");
        assert_eq!(shown(2.887, "degC"), "2.9 K");
        assert_eq!(shown(2.0, "%"), "2 pp");
        assert_eq!(shown(0.0116, "barg"), "0.012 bar");
    }

    #[test]
    fn a_column_has_one_number_of_fraction_digits() {
        let unit = read_unit("kW").expect("a unit");
        let texts = shown_column(&[Some(19.8), None, Some(20.146_69), Some(21.0)], &unit);
        let texts: Vec<_> = texts.iter().map(|text| text.as_deref().unwrap_or("-")).collect();
        assert_eq!(texts, ["19.800", "-", "20.147", "21.000"]);
        // 75.568 43 is 75.568 by itself; beside 8.7409 it has a digit more, and that is the 4 it has, not a zero.
        let texts = shown_column(&[Some(75.568_43), Some(8.740_94)], &unit);
        assert_eq!(texts, [Some("75.5684".to_owned()), Some("8.7409".to_owned())]);
        let texts = shown_column(&[Some(101_325.0), Some(0.001_25)], &unit);
        assert_eq!(texts, [Some("101325".to_owned()), Some("0.00125".to_owned())]);
        let texts = shown_column(&[Some(1e-9), Some(2.5)], &unit);
        assert_eq!(texts, [Some("1e-9".to_owned()), Some("2.5".to_owned())]);
    }

    #[test]
    fn exact_digits_read_back_to_the_same_bits() {
        for value in [0.1, 134_705_984.6, 1e-12, 5e-324, f64::MAX, -2.0 / 3.0, 1e21] {
            assert_eq!(exact(value).parse::<f64>().expect("a number").to_bits(), value.to_bits());
        }
        assert_eq!(exact(450.0), "450");
    }
}

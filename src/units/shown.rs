//! The unit for a value that asks for none.

use std::sync::OnceLock;

use super::dimension::Dimension;
use super::read::read_unit;
use super::unit::Unit;

/// Units by dimension, the smallest first. The largest that the value reaches is taken.
const SHOWN: &[(Dimension, &[&str])] = &[
    (Dimension::ONE, &["1"]),
    (Dimension::TEMPERATURE, &["K"]),
    (Dimension::PRESSURE, &["kPa"]),
    (Dimension::MASS, &["g", "kg", "t"]),
    (Dimension::AMOUNT, &["mol", "kmol"]),
    (Dimension::VOLUME, &["m3"]),
    (Dimension::TIME, &["s"]),
    (Dimension::ENERGY, &["J", "kJ", "MJ", "GJ"]),
    (Dimension::POWER, &["W", "kW", "MW", "GW"]),
    (Dimension::MASS_RATE, &["kg/h"]),
    (Dimension::AMOUNT_RATE, &["kmol/h"]),
    (Dimension::VOLUME_RATE, &["m3/h"]),
    (Dimension::SPECIFIC_ENERGY, &["kJ/kg"]),
    (Dimension::MOLAR_ENERGY, &["kJ/mol"]),
    (Dimension::HEAT_CAPACITY, &["kJ/K"]),
    (Dimension::SPECIFIC_HEAT_CAPACITY, &["kJ/(kg K)"]),
    (Dimension::MOLAR_HEAT_CAPACITY, &["J/(mol K)"]),
    (Dimension::VOLUMETRIC_HEAT_CAPACITY, &["kJ/(m3 K)"]),
    (Dimension::MOLAR_MASS, &["g/mol"]),
    (Dimension::DENSITY, &["kg/m3"]),
    (Dimension::SPECIFIC_VOLUME, &["m3/kg"]),
    (Dimension::MOLAR_VOLUME, &["m3/mol"]),
    (Dimension::CONCENTRATION, &["mol/m3"]),
    (Dimension::MOLALITY, &["mol/kg"]),
    (Dimension::HEAT_FLUX_DENSITY, &["W/m2", "kW/m2"]),
    (Dimension::HEAT_TRANSFER_COEFFICIENT, &["W/(m2 K)"]),
    (Dimension::THERMAL_CONDUCTIVITY, &["W/(m K)"]),
    (Dimension::THERMAL_RESISTANCE, &["K/W"]),
    (Dimension::RECIPROCAL_TEMPERATURE, &["1/K"]),
    (Dimension::MASS_FLUX, &["kg/(m2 s)"]),
    (Dimension::LENGTH, &["m"]),
    (Dimension::AREA, &["m2"]),
    (Dimension::VELOCITY, &["m/s"]),
    (Dimension::ACCELERATION, &["m/s2"]),
    (Dimension::FORCE, &["N", "kN"]),
    (Dimension::FREQUENCY, &["1/s"]),
    (Dimension::DYNAMIC_VISCOSITY, &["Pa\u{b7}s"]),
    (Dimension::KINEMATIC_VISCOSITY, &["m2/s"]),
    (Dimension::ELECTRIC_CURRENT, &["A"]),
    (Dimension::ELECTRIC_POTENTIAL, &["V"]),
    (Dimension::LUMINOUS_INTENSITY, &["cd"]),
];

/// The units of each row above, read when first asked for.
static READ: [OnceLock<Vec<Unit>>; SHOWN.len()] = [const { OnceLock::new() }; SHOWN.len()];

/// A unit in which an engineer would read a value of this dimension, given in the coherent SI unit. A dimension
/// without a usual unit gets the product of base units, such as `kg m-1 s-2`.
pub fn engineering_unit(dimension: Dimension, si: f64) -> Unit {
    let row = SHOWN.iter().zip(&READ).find(|((shown, _), _)| *shown == dimension);
    let Some(((_, texts), read)) = row else { return Unit::coherent(dimension) };
    let units = read.get_or_init(|| {
        let unit = |text: &&str| read_unit(text).expect("the texts above are units, which a test holds");
        texts.iter().map(unit).collect()
    });
    let reached = units.iter().take_while(|unit| si.is_finite() && si.abs() >= unit.factor).last();
    reached.or(units.first()).cloned().unwrap_or_else(|| Unit::coherent(dimension))
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_text_is_a_unit_of_its_dimension_and_the_factors_rise() {
        for (dimension, texts) in SHOWN {
            let units: Vec<_> = texts.iter().map(|text| read_unit(text).expect("a unit")).collect();
            assert!(units.iter().all(|unit| unit.dimension == *dimension), "{texts:?}");
            assert!(units.windows(2).all(|pair| pair[0].factor < pair[1].factor), "{texts:?}");
        }
    }

    #[test]
    fn a_value_is_shown_in_the_unit_that_it_reaches() {
        let shown = |dimension, si| engineering_unit(dimension, si).text;
        assert_eq!(shown(Dimension::ENERGY, 999.0), "J");
        assert_eq!(shown(Dimension::ENERGY, -67.4e6), "MJ");
        assert_eq!(shown(Dimension::POWER, 8.6e3), "kW");
        assert_eq!(shown(Dimension::MASS, 450.0), "kg");
        assert_eq!(shown(Dimension::MASS, 1e-5), "g");
        assert_eq!(shown(Dimension::PRESSURE, 12.0), "kPa");
        assert_eq!(shown(Dimension::ENERGY, 0.0), "J");
        assert_eq!(shown(Dimension::ENERGY, f64::NAN), "J");
        assert_eq!(shown(Dimension::ENERGY, f64::INFINITY), "J");
    }

    #[test]
    fn an_unusual_dimension_is_shown_in_base_units() {
        let dimension = Dimension::PRESSURE.times(Dimension::TEMPERATURE).expect("in range");
        let unit = engineering_unit(dimension, 2.0);
        assert_eq!(unit.text, "kg m-1 s-2 K");
        assert_eq!(unit.from_si(2.0, 0.0), 2.0);
    }
}

//! Factors against the units library `uom`, and the way to SI and back.

use heatpath::units::constants::{GAS_CONSTANT, STANDARD_ATMOSPHERE};
use heatpath::units::{Dimension, Zero, dimension_of, listing, read_unit};
use proptest::prelude::*;
use uom::si;

/// A unit text, what one of it is in SI by `uom`, and its dimension there.
type Known = (&'static str, f64, Dimension);

macro_rules! known {
    ($($text:literal $module:ident::$unit:ident $quantity:ident;)*) => {
        [$((
            $text,
            si::f64::$quantity::new::<si::$module::$unit>(1.0).value,
            dimension_of::<si::$module::Dimension>(),
        ),)*]
    };
}

/// Every unit that `uom` has as well, with compounds of the trade. Its `standard_cubic_meter` and
/// `standard_cubic_foot` are other units: they are at 0 degC and 1 bar.
fn known() -> Vec<Known> {
    known! {
        "m" length::meter Length;
        "in" length::inch Length;
        "ft" length::foot Length;
        "yd" length::yard Length;
        "mi" length::mile Length;
        "g" mass::gram Mass;
        "t" mass::ton Mass;
        "lb" mass::pound Mass;
        "oz_av" mass::ounce Mass;
        "oz_troy" mass::ounce_troy Mass;
        "ton_short" mass::ton_short Mass;
        "ton_long" mass::ton_long Mass;
        "s" time::second Time;
        "min" time::minute Time;
        "h" time::hour Time;
        "d" time::day Time;
        "A" electric_current::ampere ElectricCurrent;
        "K" temperature_interval::kelvin TemperatureInterval;
        "degR" temperature_interval::degree_rankine TemperatureInterval;
        "mol" amount_of_substance::mole AmountOfSubstance;
        "cd" luminous_intensity::candela LuminousIntensity;
        "Hz" frequency::hertz Frequency;
        "N" force::newton Force;
        "lbf" force::pound_force Force;
        "kgf" force::kilogram_force Force;
        "J" energy::joule Energy;
        "Wh" energy::watt_hour Energy;
        "kWh" energy::kilowatt_hour Energy;
        "cal" energy::calorie Energy;
        "kcal" energy::kilocalorie Energy;
        "cal_IT" energy::calorie_it Energy;
        "Btu" energy::btu_it Energy;
        "Btu_th" energy::btu Energy;
        "therm_EC" energy::therm_ec Energy;
        "therm_US" energy::therm_us Energy;
        "W" power::watt Power;
        "hp_mech" power::horsepower Power;
        "hp_metric" power::horsepower_metric Power;
        "hp_electric" power::horsepower_electric Power;
        "V" electric_potential::volt ElectricPotential;
        "1" ratio::ratio Ratio;
        "%" ratio::percent Ratio;
        "Pa" pressure::pascal Pressure;
        "bar" pressure::bar Pressure;
        "mbar" pressure::millibar Pressure;
        "atm" pressure::atmosphere Pressure;
        "psi" pressure::psi Pressure;
        "Torr" pressure::torr Pressure;
        "mTorr" pressure::millitorr Pressure;
        "mmHg" pressure::millimeter_of_mercury Pressure;
        "inHg" pressure::inch_of_mercury Pressure;
        "mmH2O" pressure::millimeter_of_water Pressure;
        "inH2O" pressure::inch_of_water Pressure;
        "kgf/cm2" pressure::kilogram_force_per_square_centimeter Pressure;
        "lbf/ft2" pressure::pound_force_per_square_foot Pressure;
        "L" volume::liter Volume;
        "m3" volume::cubic_meter Volume;
        "ft3" volume::cubic_foot Volume;
        "gal_US" volume::gallon Volume;
        "gal_UK" volume::gallon_imperial Volume;
        "fl_oz_US" volume::fluid_ounce Volume;
        "fl_oz_UK" volume::fluid_ounce_imperial Volume;
        "bbl_oil" volume::barrel Volume;
        "t/h" mass_rate::ton_per_hour MassRate;
        "lb/h" mass_rate::pound_per_hour MassRate;
        "m3/h" volume_rate::cubic_meter_per_hour VolumeRate;
        "kJ/kg" available_energy::kilojoule_per_kilogram AvailableEnergy;
        "Btu/lb" available_energy::btu_it_per_pound AvailableEnergy;
        "cal/g" available_energy::calorie_per_gram AvailableEnergy;
        "kcal/mol" molar_energy::kilocalorie_per_mole MolarEnergy;
        "J/(mol K)" molar_heat_capacity::joule_per_kelvin_mole MolarHeatCapacity;
        "cal/(mol K)" molar_heat_capacity::calorie_per_kelvin_mole MolarHeatCapacity;
        "Btu/(lb degF)" specific_heat_capacity::btu_it_per_pound_degree_fahrenheit SpecificHeatCapacity;
        "kJ/degC" heat_capacity::kilojoule_per_degree_celsius HeatCapacity;
        "g/mol" molar_mass::gram_per_mole MolarMass;
        "lb/ft3" mass_density::pound_per_cubic_foot MassDensity;
        "W/(m K)" thermal_conductivity::watt_per_meter_kelvin ThermalConductivity;
        "Btu/(h ft2 degF)" heat_transfer::btu_it_per_hour_square_foot_degree_fahrenheit HeatTransfer;
        "kW/m2" heat_flux_density::kilowatt_per_square_meter HeatFluxDensity;
    }
    .to_vec()
}

#[test]
fn factors_agree_with_uom_to_its_seven_digits() {
    for (text, si, dimension) in known() {
        let unit = read_unit(text).unwrap_or_else(|error| panic!("{text}: {error:?}"));
        assert_eq!(unit.dimension, dimension, "{text}");
        assert!((unit.factor / si - 1.0).abs() < 3e-7, "{text}: {} against {si}", unit.factor);
    }
}

#[test]
fn temperature_scales_agree_with_uom() {
    use si::f64::ThermodynamicTemperature;
    use si::thermodynamic_temperature::{degree_celsius, degree_fahrenheit};
    let celsius = ThermodynamicTemperature::new::<degree_celsius>(460.0).value;
    let fahrenheit = ThermodynamicTemperature::new::<degree_fahrenheit>(60.0).value;
    assert!((read_unit("degC").expect("a unit").to_si(460.0, 0.0) - celsius).abs() < 1e-9);
    assert!((read_unit("degF").expect("a unit").to_si(60.0, 0.0) - fahrenheit).abs() < 1e-9);
}

#[test]
fn no_unit_is_left_out_of_the_comparison() {
    let beside = ["degC", "degF", "Pag", "barg", "psig", "MMBtu", "Nm3", "Sm3", "scf_60F", "lbmol"];
    let compared: Vec<_> = known().into_iter().map(|(text, ..)| text).chain(beside).collect();
    let left: Vec<_> =
        listing().into_iter().map(|row| row.unit).filter(|unit| !compared.contains(unit)).collect();
    assert!(left.is_empty(), "{left:?}");
}

#[test]
fn units_that_uom_lacks_follow_their_definition() {
    let factor = |text: &str| read_unit(text).expect("a unit").factor;
    // The pound-mole is as many moles as a pound has grams (international pound, 1959).
    assert!((factor("lbmol") - 453.59237).abs() < 1e-12);
    assert!((factor("MMBtu") / 1.05505585262e9 - 1.0).abs() < 1e-15);
    // n = pV/(RT); 22.413 969 54 L/mol is the molar volume of an ideal gas at 0 degC and 101.325 kPa (CODATA 2018).
    assert!((factor("Nm3") * 22.41396954e-3 - 1.0).abs() < 1e-9);
    assert!((factor("Sm3") / (STANDARD_ATMOSPHERE / (GAS_CONSTANT * 288.15)) - 1.0).abs() < 1e-15);
    let scf = 14.696 * factor("psi") * 0.3048 * 0.3048 * 0.3048 / (GAS_CONSTANT * (60.0 + 459.67) / 1.8);
    assert!((factor("scf_60F") / scf - 1.0).abs() < 1e-14);
    assert_eq!(factor("kPag"), 1000.0);
    assert_eq!(read_unit("psig").expect("a unit").zero, Zero::Atmosphere);
}

proptest! {
    #[test]
    fn a_value_comes_back_from_si(value in -1e6..1e6_f64, atmosphere in 6e4..1.2e5_f64) {
        for row in listing() {
            let unit = read_unit(row.unit).expect("a listed unit");
            let back = unit.from_si(unit.to_si(value, atmosphere), atmosphere);
            // A few roundings, of the value or of the zero of its scale where that is larger.
            let scale = value.abs() + 459.67 + atmosphere / unit.factor * f64::from(unit.is_gauge());
            prop_assert!((back - value).abs() <= 1e-15 * scale, "{value} {} came back as {back}", row.unit);
        }
    }

    #[test]
    fn any_text_is_read_or_refused_within_itself(text in "[mkgJK/()·² ³^0-9µ°C%_-]{0,24}") {
        match read_unit(&text) {
            Ok(unit) => prop_assert!(unit.factor.is_normal() && unit.factor > 0.0),
            Err(error) => prop_assert!(text.get(error.range()).is_some()),
        }
    }
}

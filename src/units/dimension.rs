//! The dimension of a quantity: a product of powers of the seven base quantities (SI Brochure, 9th ed., 2.3.3).

use std::fmt;

use super::bridge::dimension_of;

/// A product of powers of length, mass, time, electric current, thermodynamic temperature, amount of substance and
/// luminous intensity, in this order.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub struct Dimension([i8; 7]);

/// Constants and names of the dimensions that have one, each from the quantity of `uom` of that name.
macro_rules! named_dimensions {
    ($($constant:ident, $quantity:ident, $name:literal;)*) => {
        impl Dimension {
            $(
                #[doc = concat!("The dimension of ", $name, ".")]
                pub const $constant: Dimension = dimension_of::<uom::si::$quantity::Dimension>();
            )*
        }

        /// The dimensions with a name, in the order in which a reader looks for them.
        const NAMED: &[(Dimension, &str)] = &[$((Dimension::$constant, $name),)*];
    };
}

named_dimensions! {
    ONE, ratio, "pure number";
    TEMPERATURE, temperature_interval, "temperature";
    PRESSURE, pressure, "pressure";
    MASS, mass, "mass";
    AMOUNT, amount_of_substance, "amount of substance";
    VOLUME, volume, "volume";
    TIME, time, "time";
    ENERGY, energy, "energy";
    POWER, power, "power";
    MASS_RATE, mass_rate, "mass flow rate";
    AMOUNT_RATE, catalytic_activity, "molar flow rate";
    VOLUME_RATE, volume_rate, "volume flow rate";
    SPECIFIC_ENERGY, available_energy, "specific energy";
    MOLAR_ENERGY, molar_energy, "molar energy";
    HEAT_CAPACITY, heat_capacity, "heat capacity";
    SPECIFIC_HEAT_CAPACITY, specific_heat_capacity, "specific heat capacity";
    MOLAR_HEAT_CAPACITY, molar_heat_capacity, "molar heat capacity";
    VOLUMETRIC_HEAT_CAPACITY, volumetric_heat_capacity, "volumetric heat capacity";
    MOLAR_MASS, molar_mass, "molar mass";
    DENSITY, mass_density, "density";
    SPECIFIC_VOLUME, specific_volume, "specific volume";
    MOLAR_VOLUME, molar_volume, "molar volume";
    CONCENTRATION, molar_concentration, "amount concentration";
    MOLALITY, molality, "molality";
    HEAT_FLUX_DENSITY, heat_flux_density, "heat flux density";
    HEAT_TRANSFER_COEFFICIENT, heat_transfer, "heat transfer coefficient";
    THERMAL_CONDUCTIVITY, thermal_conductivity, "thermal conductivity";
    THERMAL_RESISTANCE, thermal_resistance, "thermal resistance";
    RECIPROCAL_TEMPERATURE, temperature_coefficient, "reciprocal temperature";
    MASS_FLUX, mass_flux, "mass flux";
    LENGTH, length, "length";
    AREA, area, "area";
    VELOCITY, velocity, "velocity";
    ACCELERATION, acceleration, "acceleration";
    FORCE, force, "force";
    FREQUENCY, frequency, "frequency";
    DYNAMIC_VISCOSITY, dynamic_viscosity, "dynamic viscosity";
    KINEMATIC_VISCOSITY, kinematic_viscosity, "kinematic viscosity";
    ELECTRIC_CURRENT, electric_current, "electric current";
    ELECTRIC_POTENTIAL, electric_potential, "electric potential";
    LUMINOUS_INTENSITY, luminous_intensity, "luminous intensity";
}

/// The base units in the order in which they are written, each with its place in the exponents.
const WRITTEN: [(&str, usize); 7] =
    [("kg", 1), ("m", 0), ("s", 2), ("A", 3), ("K", 4), ("mol", 5), ("cd", 6)];

impl Dimension {
    /// The dimension with these exponents of length, mass, time, electric current, thermodynamic temperature, amount
    /// of substance and luminous intensity.
    pub const fn from_exponents(exponents: [i8; 7]) -> Self {
        Dimension(exponents)
    }

    /// The exponents, in the order of [`Dimension::from_exponents`].
    pub const fn exponents(self) -> [i8; 7] {
        self.0
    }

    /// The dimension of a product; `None` if an exponent would leave -128 to 127.
    pub fn times(self, other: Dimension) -> Option<Dimension> {
        self.paired(other, i8::checked_add)
    }

    /// The dimension of a quotient; `None` if an exponent would leave -128 to 127.
    pub fn over(self, other: Dimension) -> Option<Dimension> {
        self.paired(other, i8::checked_sub)
    }

    /// The dimension of a power; `None` if an exponent would leave -128 to 127.
    pub fn power(self, exponent: i32) -> Option<Dimension> {
        self.each(|e| i32::from(e).checked_mul(exponent).and_then(|p| i8::try_from(p).ok()))
    }

    /// The dimension of an `n`-th root; `None` if an exponent would not be whole, or `n` is not positive.
    pub fn root(self, n: i32) -> Option<Dimension> {
        if n <= 0 {
            return None;
        }
        self.each(|e| (i32::from(e) % n == 0).then(|| i32::from(e) / n).and_then(|q| i8::try_from(q).ok()))
    }

    /// Whether it is that of a pure number.
    pub fn is_one(self) -> bool {
        self == Dimension::ONE
    }

    /// Its name as a noun for messages, such as "power" or "molar heat capacity"; `None` if it has no usual name.
    pub fn name(self) -> Option<&'static str> {
        NAMED.iter().find(|(dimension, _)| *dimension == self).map(|(_, name)| *name)
    }

    /// Whether its quantities come as readings on a scale and as differences: temperature and pressure.
    pub fn has_reading(self) -> bool {
        self == Dimension::TEMPERATURE || self == Dimension::PRESSURE
    }

    /// Its place in lists, which begin with what a thermal sheet uses most; dimensions without a name come last.
    pub(crate) fn place(self) -> usize {
        NAMED.iter().position(|(dimension, _)| *dimension == self).unwrap_or(NAMED.len())
    }

    fn each(self, change: impl Fn(i8) -> Option<i8>) -> Option<Dimension> {
        let mut changed = self.0;
        for exponent in &mut changed {
            *exponent = change(*exponent)?;
        }
        Some(Dimension(changed))
    }

    fn paired(self, other: Dimension, join: fn(i8, i8) -> Option<i8>) -> Option<Dimension> {
        let mut joined = self.0;
        for (exponent, second) in joined.iter_mut().zip(other.0) {
            *exponent = join(*exponent, second)?;
        }
        Some(Dimension(joined))
    }
}

impl fmt::Display for Dimension {
    /// The coherent SI unit as a product of base units: `kg m2 s-3`, or `1` for a pure number.
    fn fmt(&self, out: &mut fmt::Formatter<'_>) -> fmt::Result {
        let mut parts = Vec::new();
        for (symbol, place) in WRITTEN {
            match self.0.get(place).copied().unwrap_or(0) {
                0 => {}
                1 => parts.push(symbol.to_owned()),
                exponent => parts.push(format!("{symbol}{exponent}")),
            }
        }
        if parts.is_empty() {
            parts.push("1".to_owned());
        }
        out.pad(&parts.join(" "))
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_dimension_is_written_in_base_units() {
        assert_eq!(Dimension::POWER.to_string(), "kg m2 s-3");
        assert_eq!(Dimension::MOLAR_HEAT_CAPACITY.to_string(), "kg m2 s-2 K-1 mol-1");
        assert_eq!(Dimension::ONE.to_string(), "1");
        assert_eq!(Dimension::TEMPERATURE.to_string(), "K");
    }

    #[test]
    fn the_catalogue_agrees_with_the_si_brochure() {
        // Exponents in the order L M T I Θ N J, from the SI Brochure, 9th ed., tables 4 to 6.
        let expected = [
            (Dimension::ENERGY, [2, 1, -2, 0, 0, 0, 0]),
            (Dimension::POWER, [2, 1, -3, 0, 0, 0, 0]),
            (Dimension::PRESSURE, [-1, 1, -2, 0, 0, 0, 0]),
            (Dimension::SPECIFIC_ENERGY, [2, 0, -2, 0, 0, 0, 0]),
            (Dimension::MOLAR_ENERGY, [2, 1, -2, 0, 0, -1, 0]),
            (Dimension::SPECIFIC_HEAT_CAPACITY, [2, 0, -2, 0, -1, 0, 0]),
            (Dimension::HEAT_TRANSFER_COEFFICIENT, [0, 1, -3, 0, -1, 0, 0]),
            (Dimension::AMOUNT_RATE, [0, 0, -1, 0, 0, 1, 0]),
            (Dimension::ELECTRIC_POTENTIAL, [2, 1, -3, -1, 0, 0, 0]),
        ];
        for (dimension, exponents) in expected {
            assert_eq!(dimension.exponents(), exponents);
        }
    }

    #[test]
    fn products_quotients_powers_and_roots_follow_the_quantities() {
        assert_eq!(Dimension::POWER.times(Dimension::TIME), Some(Dimension::ENERGY));
        assert_eq!(Dimension::ENERGY.over(Dimension::AMOUNT), Some(Dimension::MOLAR_ENERGY));
        assert_eq!(Dimension::LENGTH.power(3), Some(Dimension::VOLUME));
        assert_eq!(Dimension::TIME.power(-1), Some(Dimension::FREQUENCY));
        assert_eq!(Dimension::AREA.root(2), Some(Dimension::LENGTH));
        assert_eq!(Dimension::VOLUME.root(2), None);
        assert_eq!(Dimension::VOLUME.root(0), None);
    }

    #[test]
    fn an_exponent_out_of_range_is_none() {
        let large = Dimension::LENGTH.power(100);
        assert_eq!(large.and_then(|d| d.times(d)), None);
        assert_eq!(Dimension::AREA.power(64), None);
        assert_eq!(Dimension::AREA.power(i32::MAX), None);
        assert_eq!(Dimension::LENGTH.power(-128).and_then(|d| d.over(Dimension::LENGTH)), None);
    }

    #[test]
    fn no_dimension_has_two_names() {
        for (place, (dimension, name)) in NAMED.iter().enumerate() {
            assert_eq!(dimension.place(), place, "{name} has another name before it");
        }
        assert_eq!(Dimension::MOLAR_HEAT_CAPACITY.name(), Some("molar heat capacity"));
        assert_eq!(Dimension::ENERGY.power(7).and_then(Dimension::name), None);
    }

    #[test]
    fn temperature_and_pressure_have_readings() {
        let with_reading: Vec<_> =
            NAMED.iter().filter(|(d, _)| d.has_reading()).map(|(_, name)| *name).collect();
        assert_eq!(with_reading, ["temperature", "pressure"]);
    }
}

//! Between plain SI numbers and the typed quantities of `uom`.

use std::marker::PhantomData;

use uom::si::{Quantity, SI};
use uom::typenum::Integer;

use super::dimension::Dimension;

/// The dimension of a `uom` quantity, such as `dimension_of::<uom::si::energy::Dimension>()`.
pub const fn dimension_of<D: uom::si::Dimension + ?Sized>() -> Dimension {
    Dimension::from_exponents([
        <D::L as Integer>::I8,
        <D::M as Integer>::I8,
        <D::T as Integer>::I8,
        <D::I as Integer>::I8,
        <D::Th as Integer>::I8,
        <D::N as Integer>::I8,
        <D::J as Integer>::I8,
    ])
}

/// A number in the coherent SI unit as a typed quantity. The type that is asked for decides the dimension.
pub fn quantity<D: uom::si::Dimension + ?Sized>(si: f64) -> Quantity<D, SI<f64>, f64> {
    Quantity { dimension: PhantomData, units: PhantomData, value: si }
}

/// As [`quantity`], for a number whose dimension is known at run time: `None` if it is another one.
pub fn quantity_checked<D: uom::si::Dimension + ?Sized>(
    dimension: Dimension,
    si: f64,
) -> Option<Quantity<D, SI<f64>, f64>> {
    (dimension == dimension_of::<D>()).then(|| quantity(si))
}

/// A typed quantity as a number in its coherent SI unit.
pub fn si_value<D: uom::si::Dimension + ?Sized>(typed: Quantity<D, SI<f64>, f64>) -> f64 {
    typed.value
}

#[cfg(test)]
mod tests {
    use uom::si::energy::kilojoule;
    use uom::si::f64::{Energy, ThermodynamicTemperature};
    use uom::si::thermodynamic_temperature::degree_celsius;

    use super::*;

    #[test]
    fn an_energy_crosses_both_ways() {
        let typed: Energy = quantity(1500.0);
        assert_eq!(typed.get::<kilojoule>(), 1.5);
        assert_eq!(si_value(typed), 1500.0);
    }

    #[test]
    fn a_temperature_crosses_though_it_is_of_another_kind() {
        let typed: ThermodynamicTemperature = quantity(373.15);
        assert!((typed.get::<degree_celsius>() - 100.0).abs() < 1e-12);
    }

    #[test]
    fn a_wrong_dimension_does_not_cross() {
        let power = quantity_checked::<uom::si::power::Dimension>(Dimension::ENERGY, 1.0);
        assert!(power.is_none());
        let energy = quantity_checked::<uom::si::energy::Dimension>(Dimension::ENERGY, 1.0);
        assert_eq!(energy.map(si_value), Some(1.0));
    }
}

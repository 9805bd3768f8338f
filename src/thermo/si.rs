//! The bridge between typed quantities and the plain SI numbers that the arithmetic runs on.

use std::marker::PhantomData;

use uom::si::{Dimension, Quantity, SI};

/// The quantity with this value in coherent SI units. It costs nothing at run time and rounds nothing.
#[inline]
pub(crate) fn typed<D: Dimension + ?Sized>(value: f64) -> Quantity<D, SI<f64>, f64> {
    Quantity { dimension: PhantomData, units: PhantomData, value }
}

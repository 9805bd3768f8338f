//! Laws of heat capacity: cp of temperature, with its integrals.
//!
//! In come published coefficients or tables, per mass or per mole, exactly as published; out come cp, the
//! enthalpy increment `∫ cp dT` and the entropy increment `∫ cp/T dT`, all per mass. A molar law is divided
//! by the molar mass through one factor. Sums of powers and tables are integrated in closed form, any other
//! formula by adaptive Gauss-Kronrod quadrature. A table outside its span gives `NaN`: no law is stretched in
//! silence.

mod law;
mod powers;
mod published;

#[cfg(test)]
mod tests;

pub use law::{Basis, HeatCapacity, HeatCapacityError};
pub use published::MaierKelley;

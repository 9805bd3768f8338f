//! Units of measurement: what a unit text means in SI, and what may be done with it.
//!
//! In comes the text of a unit as it stands behind a number, such as `kJ/(kg degC)`, `Nm3/h` or `barg`. Out comes a
//! [`Unit`]: its [`Dimension`], its factor to the coherent SI unit and, for readings on a scale, its zero. Or a
//! [`UnitError`] with the offending word and its place in the text: plain data, for the caller to word and to draw.
//!
//! What is guaranteed:
//!
//! - Every factor is built from the definition of its unit, with the standard named ([`listing`] shows both), and is
//!   rounded once wherever the definition is a ratio of whole numbers and a power of ten.
//! - A name that two engineers could read differently is refused with the choice spelled out, never guessed.
//! - A temperature in `degC` or `degF` and a gauge pressure are readings, not amounts. [`Kind`] says which of the two
//!   a quantity is, [`sum`], [`difference`] and [`comparable`] what may be done with it.
//! - Reading never fails otherwise than by a [`UnitError`], whatever the text; texts are limited in length and depth.
//!
//! Dimensions are those of the `uom` crate, and [`quantity`] and [`si_value`] cross between plain SI numbers and its
//! typed quantities. Its factors are not used: many are rounded to seven digits.

mod ambiguous;
mod bridge;
mod compound;
pub mod constants;
mod dimension;
mod error;
mod factor;
mod kind;
mod listing;
mod prefix;
mod read;
mod shown;
mod slip;
mod table;
mod unit;
mod word;

pub use bridge::{dimension_of, quantity, quantity_checked, si_value};
pub use dimension::Dimension;
pub use error::UnitError;
pub use kind::{Kind, KindClash, comparable, difference, sum};
pub use listing::{Row, listing, listing_matching};
pub use read::read_unit;
pub use shown::engineering_unit;
pub use unit::{Calorie, Unit, Zero};

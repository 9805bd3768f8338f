//! Numbers and nothing else: what the physics needs of numerical analysis.
//!
//! In come `f64` and plain functions of one variable; out come `f64`, error estimates and counts. Every
//! routine evaluates in one fixed order and takes its transcendental functions from [`math`], so that the
//! same arguments give the same bits on every machine. Nothing here knows a unit, and nothing panics: bad
//! input comes back as `NaN` or as a typed failure.

pub mod formula;
pub mod interpolation;
pub mod math;
pub mod quadrature;
pub mod root;

pub use formula::{Formula, FormulaError, Op};
pub use interpolation::{Interpolant, InterpolantError, Shape};
pub use quadrature::{Integral, QuadratureFailure, Tolerance, integrate};
pub use root::{Root, RootFailure, find_rising_root, find_root};

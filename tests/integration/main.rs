//! Tests of the program as its users meet it.

mod units_factors;
mod units_listing;
mod units_reading;
mod units_reference;

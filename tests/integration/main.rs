//! Tests of the program as its users meet it.

mod cli;
mod corpus;
mod laws;
mod mutated;
mod program;
mod reference;
mod robust;
mod rooms;
mod sheets;
mod units_factors;
mod units_listing;
mod units_reading;
mod units_reference;

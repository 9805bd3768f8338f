//! Tests of the program as its users meet it.

mod blocks;
mod cli;
mod corpus;
mod examples;
mod laws;
mod library;
mod library_values;
mod merged;
mod mutated;
mod program;
mod readme;
mod reference;
mod reference_pages;
mod robust;
mod rooms;
mod saturation;
mod sheets;
mod units_factors;
mod units_listing;
mod units_reading;
mod units_reference;

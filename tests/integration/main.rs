//! Tests of the program as its users meet it.

mod units_reading;

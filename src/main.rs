//! The `heatpath` program: hands its arguments on.

fn main() {}

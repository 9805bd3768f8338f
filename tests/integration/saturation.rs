//! Boiling at pressure, as the shipped species have it, against published saturation values.

use crate::library::family_program;
use heatpath::program::Species;
use heatpath::units::quantity;
use std::collections::BTreeSet;

/// A published point of saturation.
struct Point {
    family: String,
    species: String,
    kelvin: f64,
    pascal: f64,
    within: f64,
    /// The latent heat to the real vapour, J/mol, and by how many per cent that to an ideal gas may lie above it.
    latent: Option<(f64, f64)>,
}

fn points() -> Vec<Point> {
    let text =
        std::fs::read_to_string("tests/reference/data/saturation.csv").expect("a CSV beside the tests");
    let lines = text.lines().filter(|line| !line.starts_with('#')).skip(1);
    lines.map(|line| point(line).unwrap_or_else(|| unreachable!("no point: {line}"))).collect()
}

fn point(line: &str) -> Option<Point> {
    let mut cells = line.split(',');
    let (family, species) = (cells.next()?.to_owned(), cells.next()?.to_owned());
    let mut number = || cells.next()?.parse::<f64>().ok();
    let (kelvin, kilopascal, within) = (number()?, number()?, number()?);
    let latent = number().zip(number());
    Some(Point { family, species, kelvin, pascal: kilopascal * 1e3, within, latent })
}

fn each_point(see: impl Fn(&Point, &Species)) {
    for point in points() {
        let program = family_program(&point.family);
        let species = program.species.iter().find(|species| species.name == point.species);
        see(&point, species.expect("a shipped species"));
    }
}

#[test]
fn the_library_boils_where_it_is_published() {
    let tried: BTreeSet<_> = points().into_iter().map(|point| (point.family, point.species)).collect();
    let count = |family: &str| tried.iter().filter(|(known, _)| known == family).count();
    assert!(count("water") == 1 && count("solvents") >= 3 && count("metals") >= 2, "{tried:?}");
    each_point(|point, species| {
        let (name, curve) = (&point.species, &species.curve);
        let boils = curve.boiling_temperature(quantity(point.pascal)).expect("inside the law").value;
        let off = boils - point.kelvin;
        assert!(off.abs() <= point.within, "{name} boils {off:+.3} K off {} K", point.kelvin);
        let back = curve.saturation_pressure(quantity(boils)).expect("inside the law").value;
        assert!((back / point.pascal - 1.0).abs() < 1e-9, "{name}: {back} Pa for {} Pa", point.pascal);
    });
}

#[test]
fn latent_heats_at_pressure_exceed_the_real_ones_as_ideal_gases_do() {
    each_point(|point, species| {
        let (Some((real, bound)), Some(molar_mass)) = (point.latent, species.molar_mass) else { return };
        let latent = species.curve.boiling_latent(quantity(point.kelvin)).expect("a law").value * molar_mass;
        let excess = (latent / real - 1.0) * 100.0;
        assert!(
            excess > -0.5 && excess <= bound,
            "{} at {} K: {latent:.0} J/mol lies {excess:+.2} % off {real} J/mol",
            point.species,
            point.kelvin
        );
    });
}

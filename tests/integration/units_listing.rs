//! The list of units.

use heatpath::units::{Row, listing, listing_matching, read_unit};

fn found(word: &str) -> Vec<&'static str> {
    listing_matching(word).into_iter().map(|row| row.unit).collect()
}

fn row(unit: &str) -> Row {
    listing().into_iter().find(|row| row.unit == unit).expect("a listed unit")
}

#[test]
fn every_row_is_complete_and_can_be_read() {
    for row in listing() {
        for spelling in row.also.iter().chain([&row.unit]) {
            let unit = read_unit(spelling).unwrap_or_else(|error| panic!("{spelling}: {error:?}"));
            assert_eq!(unit.dimension.name(), Some(row.dimension), "{spelling}");
        }
        assert!(!row.name.is_empty() && !row.standard.is_empty() && !row.factor.is_empty(), "{row:?}");
    }
}

#[test]
fn rows_stand_together_by_dimension() {
    let mut dimensions: Vec<_> = listing().into_iter().map(|row| row.dimension).collect();
    dimensions.dedup();
    let mut once = dimensions.clone();
    once.sort_unstable();
    once.dedup();
    assert_eq!(once.len(), dimensions.len(), "{dimensions:?}");
}

#[test]
fn factors_have_all_their_digits() {
    for (unit, factor) in [
        ("lb", "0.45359237 kg"),
        ("Btu", "1055.05585262 kg m2 s-2"),
        ("degC", "(x + 273.15) K"),
        ("degF", "(x + 459.67) * 0.5555555555555556 K"),
        ("barg", "x * 100000 kg m-1 s-2 + site atmosphere"),
        ("%", "0.01"),
    ] {
        assert_eq!(row(unit).factor, factor);
    }
}

#[test]
fn prefixes_are_told() {
    for (unit, prefixes) in [("J", "all"), ("t", "k M G"), ("lb", ""), ("barg", "m"), ("Nm3", "k")] {
        assert_eq!(row(unit).prefixes, prefixes, "{unit}");
    }
}

#[test]
fn a_word_finds_units_by_symbol_name_and_dimension() {
    assert_eq!(found("kW"), ["W"]);
    assert_eq!(found("°C"), ["degC"]);
    assert_eq!(found("celsius"), ["degC"]);
    assert_eq!(found("molar mass"), Vec::<&str>::new());
    assert_eq!(found("power"), ["W", "hp_mech", "hp_metric", "hp_electric"]);
    assert!(found("gallon").contains(&"gal_UK"));
    assert_eq!(found("ton"), ["t", "ton_short", "ton_long"]);
    assert_eq!(found("furnace"), Vec::<&str>::new());
    assert_eq!(found("").len(), listing().len());
}

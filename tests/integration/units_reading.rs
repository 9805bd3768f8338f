//! Unit texts as they stand on sheets: what is read, and what is refused with which words.

use heatpath::units::{Calorie, Dimension, Kind, Unit, UnitError, Zero, read_unit};

fn unit(text: &str) -> Unit {
    read_unit(text).expect(text)
}

fn error(text: &str) -> UnitError {
    read_unit(text).expect_err(text)
}

/// The same factor and dimension, whatever the text.
fn assert_alike(texts: &[&str]) {
    let first = unit(texts[0]);
    for text in texts {
        let other = unit(text);
        assert_eq!(
            (other.dimension, other.factor),
            (first.dimension, first.factor),
            "{text} and {}",
            texts[0]
        );
        assert_eq!(&other.text, text);
    }
}

#[test]
fn powers_are_read_in_every_spelling() {
    assert_alike(&["m3", "m^3", "m³"]);
    assert_alike(&["s-1", "s^-1", "s⁻¹", "/s", "1/s", "s−1", "s^−1", "Hz"]);
    assert_alike(&["m10", "m^10", "m¹⁰"]);
    assert_alike(&["(m s)2", "(m s)^2", "(m s)²", "m2·s2"]);
    assert_alike(&["(m/s)-1", "s/m"]);
}

#[test]
fn products_and_quotients_are_read() {
    assert_alike(&[
        "J/(mol K)",
        "J/mol/K",
        "J/(mol·K)",
        "J/(mol⋅K)",
        "J·mol-1·K-1",
        "J/( mol  K )",
        "J/(mol\u{a0}K)",
    ]);
    assert_alike(&["W", "kg·m2/s3", "(kg m2)/s3", "J/s", "V·A"]);
    assert_alike(&["kg/(m s2)", "Pa", "N/m2"]);
    assert_alike(&["J/(mol/K)", "J·K/mol"]);
    assert_eq!(unit("J/(mol K)").dimension, Dimension::MOLAR_HEAT_CAPACITY);
    assert_eq!(unit("W/(m2 K)").dimension, Dimension::HEAT_TRANSFER_COEFFICIENT);
    assert_eq!(unit("t/h").dimension, Dimension::MASS_RATE);
}

#[test]
fn letters_with_two_code_points_are_one() {
    assert_alike(&["µm", "μm", "um"]);
    assert_alike(&["l", "L", "dm3"]);
    for text in ["degC", "°C", "℃"] {
        assert_eq!(unit(text).to_si(20.0, 0.0), 293.15);
    }
}

#[test]
fn the_longest_known_word_goes_first() {
    // 1000 kg/m3 * 9.80665 m/s2 * 1 mm, by the definition of the conventional millimetre of water.
    assert_eq!(unit("mmH2O").factor, 9.80665);
    assert_eq!(unit("mmH2O2").dimension, unit("Pa2").dimension);
    assert_eq!(unit("min").factor, 60.0);
    assert_eq!(unit("ft").factor, 0.3048);
    assert_eq!(unit("scf_60F").dimension, Dimension::AMOUNT);
    assert_alike(&["Nm3", "Nm³", "Nm^3"]);
    assert_alike(&["kNm3", "kNm³"]);
    assert_eq!(unit("Nm3^2").dimension.exponents(), [0, 0, 0, 0, 0, 2, 0]);
}

#[test]
fn decimal_multiples_are_exact() {
    for (text, factor) in [
        ("cm3", 1e-6),
        ("mm3", 1e-9),
        ("g/cm3", 1000.0),
        ("kJ/(kg K)", 1000.0),
        ("mbar", 100.0),
        ("kWh", 3.6e6),
        ("GJ/t", 1e6),
        ("kg", 1.0),
        ("mg", 1e-6),
    ] {
        assert_eq!(unit(text).factor, factor, "{text}");
    }
}

#[test]
fn temperatures_and_pressures_are_readings_or_open() {
    for (text, kind) in [
        ("degC", Kind::Point),
        ("degF", Kind::Point),
        ("(degC)", Kind::Point),
        ("barg", Kind::Point),
        ("kPag", Kind::Point),
        ("psig", Kind::Point),
        ("K", Kind::Open),
        ("degR", Kind::Open),
        ("bar", Kind::Open),
        ("psia", Kind::Open),
        ("N/mm2", Kind::Open),
        ("kg", Kind::Plain),
        ("kJ/(kg degC)", Kind::Plain),
    ] {
        assert_eq!(unit(text).kind(), kind, "{text}");
    }
}

#[test]
fn scales_convert_from_their_zero() {
    // 32 degF and 212 degF are the ice and steam points of the Fahrenheit scale: 273.15 K and 373.15 K.
    assert!((unit("degF").to_si(32.0, 0.0) - 273.15).abs() < 1e-12);
    assert!((unit("degF").to_si(212.0, 0.0) - 373.15).abs() < 1e-12);
    assert!((unit("degF").from_si(373.15, 0.0) - 212.0).abs() < 1e-12);
    assert_eq!(unit("degC").from_si(273.15, 0.0), 0.0);
    // A gauge of 0.5 bar at 1005 mbar is 150.5 kPa absolute.
    assert_eq!(unit("barg").to_si(0.5, 100_500.0), 150_500.0);
    assert_eq!(unit("barg").from_si(150_500.0, 100_500.0), 0.5);
    assert_eq!(unit("bar").to_si(0.5, 100_500.0), 50_000.0);
}

#[test]
fn degrees_in_a_compound_are_differences() {
    assert_alike(&["kJ/(kg degC)", "kJ/(kg °C)", "kJ/(kg K)"]);
    assert_eq!(unit("kJ/(kg degC)").zero, Zero::None);
    assert_eq!(unit("degC2").zero, Zero::None);
    // One Btu per pound and degree Fahrenheit is one calorie per gram and kelvin of the same kind: 4186.8 J/(kg K).
    assert!((unit("Btu/(lb degF)").factor - 4186.8).abs() < 1e-9);
}

#[test]
fn a_gauge_unit_in_a_compound_is_refused() {
    for (text, word, range) in [("barg/h", "barg", 0..4), ("m3·kPag", "kPag", 4..8), ("psig2", "psig2", 0..5)]
    {
        assert_eq!(error(text), UnitError::ReadingInCompound { word: word.to_owned(), range }, "{text}");
    }
}

#[test]
fn energies_know_their_calorie() {
    assert_eq!(unit("kcal/mol").flavour, Some(Calorie::Thermochemical));
    assert_eq!(unit("Btu/lb").flavour, Some(Calorie::InternationalTable));
    assert_eq!(unit("kcal/Btu").flavour, Some(Calorie::Both));
    assert_eq!(unit("kJ").flavour, None);
}

#[test]
fn percent_and_gas_volumes_are_told() {
    assert!(unit("%").is_percent());
    assert!(!unit("%/h").is_percent());
    assert_eq!(unit("%").factor, 0.01);
    assert!(unit("Nm3/h").is_gas_volume());
    assert!(unit("kSm3/d").is_gas_volume());
    assert!(!unit("m3/h").is_gas_volume());
}

#[test]
fn an_unknown_word_names_its_place_and_the_nearest_unit() {
    let expected = UnitError::Unknown { word: "Kg".into(), range: 3..5, nearest: Some("kg".into()) };
    assert_eq!(error("kJ/Kg"), expected);
    let expected = UnitError::Unknown { word: "°X".into(), range: 4..7, nearest: None };
    assert_eq!(error("kJ/(°X)"), expected);
    for (text, meant) in
        [("C", "degC"), ("F", "degF"), ("kw", "kW"), ("KWh", "kWh"), ("Nm", "(N·m)"), ("M3", "m3")]
    {
        let UnitError::Unknown { nearest, .. } = error(text) else { panic!("{text}") };
        assert_eq!(nearest.as_deref(), Some(meant), "{text}");
    }
}

#[test]
fn ambiguous_names_are_refused_with_their_choices() {
    for text in
        ["ton", "gal", "hp", "oz", "barrel", "bbl", "scf", "MBtu", "Mscf", "ppm", "therm", "Cal", "yr", "Mm3"]
    {
        let UnitError::Ambiguous { word, range, choices, .. } = error(text) else { panic!("{text}") };
        assert_eq!((word.as_str(), range), (text, 0..text.len()));
        assert!(!choices.is_empty());
    }
    let UnitError::Ambiguous { word, range, choices, .. } = error("kJ/ton") else { panic!() };
    assert_eq!((word.as_str(), range, choices), ("ton", 3..6, &["t", "ton_short", "ton_long"][..]));
    assert!(matches!(error("m/gal2"), UnitError::Ambiguous { range, .. } if range == (2..5)));
}

#[test]
fn a_cubic_nanometre_is_refused_in_every_spelling() {
    for text in ["nm3", "nm^3", "nm³", "nm3/h", "kJ/nm3"] {
        assert!(matches!(error(text), UnitError::CubicNanometre { .. }), "{text}");
    }
    assert_eq!(unit("nm2").factor, 1e-18);
}

#[test]
fn powers_out_of_range_are_refused() {
    for text in
        ["m100", "m^100", "m^-100", "m¹⁰⁰", "(m2)50", "m99·m99", "km^-99/Gm^99", "m^99999999999999999999"]
    {
        assert!(matches!(error(text), UnitError::Power { .. }), "{text}: {:?}", error(text));
    }
    assert_eq!(unit("m^99").dimension.exponents()[0], 99);
    assert_eq!(unit("m0").dimension, Dimension::ONE);
}

#[test]
fn a_product_below_a_solidus_is_refused_with_both_readings() {
    for (text, below, beside) in [
        ("J/kg·K", "J/(kg·K)", "(J/kg)·K"),
        ("J/mol/K·s/m", "J/mol/(K·s)/m", "(J/mol/K)·s/m"),
        ("W/(J/kg K)", "W/(J/(kg K))", "W/((J/kg)·K)"),
        ("/h·m", "/(h·m)", "(/h)·m"),
    ] {
        let UnitError::ProductBelow { choices, .. } = error(text) else { panic!("{text}") };
        assert_eq!(choices, [below, beside], "{text}");
        assert_ne!(unit(below).dimension, unit(beside).dimension);
    }
}

#[test]
fn malformed_texts_say_where() {
    for (text, at) in [
        ("", 0),
        ("kJ/", 3),
        ("kJ//kg", 3),
        ("kJ/(kg K", 3),
        ("kJ)", 2),
        ("()", 1),
        ("J/mol K", 5),
        (" J", 0),
        ("kg*m", 2),
        ("m^", 2),
        ("m^x", 2),
        ("m-", 2),
        ("m2^3", 1),
        ("m²³x", 5),
        ("s--1", 2),
        ("2m", 0),
        ("kg.m", 2),
        ("(m)2^3", 4),
        ("kg(m)", 2),
    ] {
        let UnitError::Malformed { at: found, why } = error(text) else {
            panic!("{text}: {:?}", error(text))
        };
        assert_eq!(found, at, "`{text}`: {why}");
    }
}

#[test]
fn long_and_deep_texts_are_refused() {
    let deep = |depth: usize| format!("{}m{}", "(".repeat(depth), ")".repeat(depth));
    assert_eq!(unit(&deep(16)).dimension, Dimension::LENGTH);
    assert!(matches!(error(&deep(17)), UnitError::Malformed { at: 16, .. }));
    let long = |count: usize| format!("m{}", "/m".repeat(count));
    assert!(read_unit(&long(99)).is_ok());
    assert!(matches!(error(&long(100)), UnitError::Malformed { at: 200, .. }));
    assert!(matches!(error(&"(".repeat(100_000)), UnitError::Malformed { .. }));
}

#[test]
fn a_fault_lies_within_the_text() {
    for text in [
        "°°°",
        "µ",
        "m³³³³",
        "(((",
        "))",
        "²",
        "-",
        "/",
        "·",
        "m·",
        "℃℃",
        "m\u{301}",
        "%%",
        "1",
        "11",
        "_3",
        "^2",
    ] {
        if let Err(error) = read_unit(text) {
            assert!(text.get(error.range()).is_some(), "{text}: {error:?}");
        }
    }
}

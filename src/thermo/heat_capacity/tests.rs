//! Closed forms against quadrature, and published coefficients against published enthalpies.

use proptest::prelude::*;
use uom::si::f64::ThermodynamicTemperature;
use uom::si::molar_heat_capacity::joule_per_kelvin_mole;
use uom::si::molar_mass::gram_per_mole;
use uom::si::thermodynamic_temperature::kelvin;

use super::*;
use crate::numeric::{Formula, Op, Shape, Tolerance, integrate};

fn k(t: f64) -> ThermodynamicTemperature {
    ThermodynamicTemperature::new::<kelvin>(t)
}

fn grams(m: f64) -> uom::si::f64::MolarMass {
    uom::si::f64::MolarMass::new::<gram_per_mole>(m)
}

/// 1 kg/mol: per mass and per mole are the same number.
fn unit_mass() -> uom::si::f64::MolarMass {
    grams(1000.0)
}

fn nasa_r() -> uom::si::f64::MolarHeatCapacity {
    uom::si::f64::MolarHeatCapacity::new::<joule_per_kelvin_mole>(8.31451)
}

/// NASA/TP-2002-211556 (McBride, Zehe, Gordon 2002): lower limit, upper limit, a1 to a7.
type Interval = (f64, f64, [f64; 7]);

const O2: [Interval; 2] = [
    (
        200.0,
        1000.0,
        [-34255.6342, 484.700097, 1.119010961, 0.00429388924, -6.83630052e-7, -2.0233727e-9, 1.039040018e-12],
    ),
    (
        1000.0,
        6000.0,
        [
            -1037939.022,
            2344.830282,
            1.819732036,
            0.001267847582,
            -2.188067988e-7,
            2.053719572e-11,
            -8.19346705e-16,
        ],
    ),
];
const CO2: [Interval; 2] = [
    (
        200.0,
        1000.0,
        [
            49436.5054,
            -626.411601,
            5.30172524,
            0.002503813816,
            -2.127308728e-7,
            -7.68998878e-10,
            2.849677801e-13,
        ],
    ),
    (
        1000.0,
        6000.0,
        [
            117696.2419,
            -1788.791477,
            8.29152319,
            -9.22315678e-5,
            4.86367688e-9,
            -1.891053312e-12,
            6.33003659e-16,
        ],
    ),
];
const STEAM: [Interval; 2] = [
    (
        200.0,
        1000.0,
        [
            -39479.6083,
            575.573102,
            0.931782653,
            0.00722271286,
            -7.34255737e-6,
            4.95504349e-9,
            -1.336933246e-12,
        ],
    ),
    (
        1000.0,
        6000.0,
        [
            1034972.096,
            -2412.698562,
            4.64611078,
            0.002291998307,
            -6.83683048e-7,
            9.42646893e-11,
            -4.82238053e-15,
        ],
    ),
];
const ZINC: [Interval; 1] = [(
    200.0,
    692.73,
    [370208.038, -5915.4755, 39.5950036, -0.1143735885, 0.0001934363797, -1.675385126e-7, 6.07818994e-11],
)];
const ALUMINIUM: [Interval; 1] = [(
    200.0,
    933.61,
    [-62518.1143, 634.393435, -0.713188382, 0.0108872528, -1.45874182e-5, 9.96116088e-9, -1.77492801e-12],
)];

/// A species, its intervals and points `(T, H(T) - H(298.15 K))`.
type Case<'a> = (&'a str, &'a [Interval], &'a [(f64, f64)]);

/// H(T) - H(298.15 K) in J/mol, summed over the intervals.
fn molar_enthalpy(intervals: &[Interval], t: f64) -> f64 {
    intervals
        .iter()
        .map(|&(low, high, a)| {
            let law = HeatCapacity::nasa9(a, nasa_r(), unit_mass()).unwrap();
            let (from, to) = (298.15_f64.max(low), t.min(high));
            if to > from { law.enthalpy_increment(k(from), k(to)).value } else { 0.0 }
        })
        .sum()
}

#[test]
fn published_coefficients_give_the_published_enthalpies() {
    // Expected: the NASA 9-term records' own enthalpies with R = 8.314510 J/(mol K), to the hundredth of a
    // J/mol.
    let cases: [Case; 5] = [
        (
            "O2",
            &O2,
            &[(300.0, 54.36), (700.0, 12500.14), (1300.0, 33356.3), (2400.0, 74502.14), (3000.0, 98117.46)],
        ),
        ("CO2", &CO2, &[(300.0, 68.78), (800.0, 22808.62), (1400.0, 55899.92), (2500.0, 121905.23)]),
        ("H2O(g)", &STEAM, &[(300.0, 62.14), (800.0, 18002.99), (1400.0, 43528.66), (3000.0, 127658.32)]),
        ("Zn", &ZINC, &[(300.0, 46.99), (500.0, 5299.21), (600.0, 8095.72)]),
        ("Al", &ALUMINIUM, &[(300.0, 44.8), (800.0, 13809.3)]),
    ];
    for (name, intervals, points) in cases {
        for &(t, expected) in points {
            // Across the joint at 1000 K the two intervals of a record differ by some thousandths of a J/mol.
            let tolerance = if t > 1000.0 { 0.02 } else { 0.005_001 };
            let found = molar_enthalpy(intervals, t);
            assert!((found - expected).abs() <= tolerance, "{name} at {t} K: {found} for {expected}");
        }
    }
}

#[test]
fn nasa7_shomate_and_maier_kelley_are_their_polynomials() {
    // Worked by hand at 500 K: 8 (1 + 2·0.5 + 3·0.25 + 4·0.125 + 5·0.0625) = 28.5; 2 + 1 + 1 + 1 + 20 = 25
    // with t = 0.5; 10 + 5 + 4 + 0.5·√500 + 25.
    let eight = uom::si::f64::MolarHeatCapacity::new::<joule_per_kelvin_mole>(8.0);
    let nasa7 = HeatCapacity::nasa7([1.0, 2e-3, 3e-6, 4e-9, 5e-12], eight, unit_mass()).unwrap();
    assert!((nasa7.cp(k(500.0)).value - 28.5).abs() < 1e-12);
    let shomate = HeatCapacity::shomate([2.0, 2.0, 4.0, 8.0, 5.0], unit_mass()).unwrap();
    assert!((shomate.cp(k(500.0)).value - 25.0).abs() < 1e-12);
    let form = MaierKelley { a: 10.0, b: 1e-2, c: 1e6, d: 250.0, e: 1e-4 };
    let kelley = HeatCapacity::maier_kelley(form, Basis::Mass).unwrap();
    assert!((kelley.cp(k(500.0)).value - (44.0 + 0.5 * 500.0_f64.sqrt())).abs() < 1e-12);
}

#[test]
fn a_molar_law_is_divided_by_the_molar_mass() {
    // 31.38 J/(mol K) over 65.38 g/mol, divided by hand: 479.96329 J/(kg K).
    let zinc = HeatCapacity::powers(&[(31.38, 0.0)], Basis::Molar(grams(65.38))).unwrap();
    assert!((zinc.cp(k(800.0)).value - 479.963_29).abs() < 1e-5);
}

/// One law of every kind; all hold from 300 K to 900 K.
fn laws() -> Vec<(&'static str, HeatCapacity)> {
    let every_power = [
        (30.0, 0.0),
        (1e-2, 1.0),
        (1e-6, 2.0),
        (1e-9, 3.0),
        (1e-16, 5.0),
        (1e3, -1.0),
        (-1e5, -2.0),
        (1e7, -3.0),
        (1e15, -6.0),
        (0.3, 0.5),
        (50.0, -0.5),
        (0.2, 1.5),
        (40.0, -0.25),
    ];
    let table = [(300.0, 25.1), (400.0, 26.4), (600.0, 28.0), (900.0, 33.5)];
    let heats = [(300.0, 0.0), (400.0, 2600.0), (600.0, 8100.0), (900.0, 17000.0)];
    // 20 + 5 exp(-300/T) + |T - 650|/100: a bump and a kink.
    let code = vec![
        Op::Const(20.0),
        Op::Const(5.0),
        Op::Const(-300.0),
        Op::Var,
        Op::Div,
        Op::Exp,
        Op::Mul,
        Op::Add,
        Op::Var,
        Op::Const(650.0),
        Op::Sub,
        Op::Abs,
        Op::Const(100.0),
        Op::Div,
        Op::Add,
    ];
    let mass = Basis::Mass;
    let mut laws = vec![
        ("powers", HeatCapacity::powers(&every_power, mass).unwrap()),
        ("formula", HeatCapacity::formula(Formula::new(code).unwrap(), k(300.0), mass).unwrap()),
    ];
    for shape in [Shape::Linear, Shape::MonotoneCubic] {
        laws.push(("table", HeatCapacity::table(&table, shape, mass).unwrap()));
        laws.push(("enthalpy", HeatCapacity::enthalpy_table(&heats, shape, mass).unwrap()));
        laws.push(("mean", HeatCapacity::mean_table(k(273.15), &table, shape, mass).unwrap()));
    }
    laws
}

#[test]
fn increments_agree_with_quadrature() {
    let fine = Tolerance { absolute: 0.0, relative: 1e-11 };
    for (name, law) in laws() {
        // Between the points of the tables, where the laws have no kink that quadrature could overlook.
        for (a, b) in [(300.0, 400.0), (310.0, 330.0), (400.0, 600.0), (899.0, 600.0)] {
            let h = integrate(|t| law.cp(k(t)).value, a, b, fine).unwrap().value;
            let s = integrate(|t| law.cp(k(t)).value / t, a, b, fine).unwrap().value;
            let (dh, ds) =
                (law.enthalpy_increment(k(a), k(b)).value, law.entropy_increment(k(a), k(b)).value);
            assert!((dh - h).abs() <= 2e-10 * h.abs(), "{name} {a}..{b}: {dh} {h}");
            assert!((ds - s).abs() <= 2e-10 * s.abs(), "{name} {a}..{b}: {ds} {s}");
        }
    }
}

#[test]
fn enthalpy_and_mean_tables_return_their_entries() {
    let heats = [(300.0, 0.0), (400.0, 2600.0), (600.0, 8100.0)];
    let means = [(400.0, 26.4), (600.0, 28.0)];
    for shape in [Shape::Linear, Shape::MonotoneCubic] {
        let law = HeatCapacity::enthalpy_table(&heats, shape, Basis::Mass).unwrap();
        for (t, h) in heats {
            assert!((law.enthalpy_increment(k(300.0), k(t)).value - h).abs() < 1e-9);
        }
        let law = HeatCapacity::mean_table(k(273.15), &means, shape, Basis::Mass).unwrap();
        for (t, mean) in means {
            let h = law.enthalpy_increment(k(273.15), k(t)).value;
            assert!((h - mean * (t - 273.15)).abs() < 1e-9, "{shape:?} {t}: {h}");
        }
        assert_eq!(law.enthalpy_increment(k(273.15), k(273.15)).value, 0.0);
    }
}

#[test]
fn a_table_is_never_stretched() {
    let law = HeatCapacity::table(&[(300.0, 25.0), (400.0, 26.0)], Shape::Linear, Basis::Mass).unwrap();
    assert!(law.cp(k(401.0)).value.is_nan());
    assert!(law.enthalpy_increment(k(299.0), k(350.0)).value.is_nan());
    assert_eq!(law.span(), Some((k(300.0), k(400.0))));
}

#[test]
fn laws_that_cannot_be_are_refused() {
    assert_eq!(HeatCapacity::powers(&[], Basis::Mass), Err(HeatCapacityError::NoTerms));
    assert_eq!(
        HeatCapacity::powers(&[(1.0, 0.0), (f64::NAN, 1.0)], Basis::Mass),
        Err(HeatCapacityError::NotFinite { at: 1 })
    );
    assert_eq!(HeatCapacity::powers(&[(1.0, 0.0)], Basis::Molar(grams(0.0))), Err(HeatCapacityError::Factor));
    assert_eq!(
        HeatCapacity::table(&[(0.0, 1.0), (1.0, 1.0)], Shape::Linear, Basis::Mass),
        Err(HeatCapacityError::BelowAbsoluteZero { at: 0 })
    );
}

proptest! {
    #[test]
    fn increments_add_up_over_any_split(a in 300.0_f64..900.0, b in 300.0_f64..900.0, c in 300.0_f64..900.0) {
        for (name, law) in laws() {
            let whole = law.enthalpy_increment(k(a), k(c)).value;
            let parts = law.enthalpy_increment(k(a), k(b)).value + law.enthalpy_increment(k(b), k(c)).value;
            let scale = law.enthalpy_increment(k(300.0), k(900.0)).value;
            prop_assert!((whole - parts).abs() <= 1e-11 * scale, "{}", name);
            prop_assert_eq!(law.enthalpy_increment(k(c), k(a)).value, -whole, "{}", name);
        }
    }
}

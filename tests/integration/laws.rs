//! Laws of thermodynamics that hold for every sheet, tried on sheets made up at random.
//!
//! Amounts, temperatures, pressures and heat capacities are drawn; what a law asks is compared between steps of one
//! sheet, or with a sum by hand from the published definitions (ISO 80000-5; cp of a perfect gas: `H = U + n R T`).
//! A change of enthalpy is a difference of two enthalpies, each of them rounded some ten times at 1.1e-16 of its size,
//! so sums agree to about 1e-15 of the largest enthalpy that takes part; [`ROUNDING`] leaves a factor of a thousand.

use heatpath::library::NoFiles;
use heatpath::report::Report;
use heatpath::session::run;
use proptest::prelude::*;

/// How far two sums of the same terms may differ, of the largest term.
const ROUNDING: f64 = 1e-12;
/// The molar gas constant, J/(mol K): exact, from the SI Brochure, 9th edition (k N_A).
const R: f64 = 8.31446261815324;
/// Molar mass of zinc, kg/mol: IUPAC standard atomic weight, abridged.
const M_ZN: f64 = 65.38e-3;
/// Melting point of the invented zinc, K, and its latent heat, J/mol.
const MELTING: f64 = 692.68;
const LATENT: f64 = 7322.0;

const ZINC: &str = "species Zn {
    formula Zn
    source \"invented for this test\"
    formation 0 kJ/mol at 298.15 K
    phase solid {
        cp = 22.40 J/(mol K) + 10.05e-3 J/(mol K2) * T for 273.15 K to 692.68 K
        density 7140 kg/m3
    }
    melting at 692.68 K takes 7.322 kJ/mol
    phase liquid {
        cp = 31.38 J/(mol K) for 692.68 K to 1180 K
        density 6570 kg/m3
    }
}
";

/// A gas of constant heat capacity.
fn gas(cp: f64) -> String {
    format!(
        "species G {{
    molar_mass 20 g/mol
    source \"invented for this test\"
    phase gas {{
        cp = {cp} J/(mol K) for 50 K to 5000 K
    }}
}}
"
    )
}

/// Works a sheet that is right.
fn work(text: &str) -> Report {
    let worked = run("law.heat", "", text, &NoFiles);
    let found: Vec<_> = worked.diagnostics.iter().map(|found| found.message.as_str()).collect();
    assert!(worked.report.is_some(), "refused: {found:?}\n{text}");
    worked.report.expect("there is one, as asserted")
}

/// A result in SI.
fn value(report: &Report, name: &str) -> f64 {
    let row = report.results.iter().find(|row| row.name == name);
    assert!(row.is_some(), "no result `{name}`");
    row.map_or(f64::NAN, |row| row.value.si)
}

fn values<const N: usize>(report: &Report, names: [&str; N]) -> [f64; N] {
    names.map(|name| value(report, name))
}

/// Whether two sums agree, of which `terms` are the largest parts.
fn agree(a: f64, b: f64, terms: &[f64]) -> bool {
    let scale = terms.iter().fold(a.abs().max(b.abs()), |scale, term| scale.max(term.abs()));
    (a - b).abs() <= ROUNDING * scale
}

/// Molar enthalpy of the invented zinc, J/mol, from 0 K of its own formulas: the integrals of cp by hand.
fn zinc(kelvin: f64, liquid: f64) -> f64 {
    let solid = |t: f64| 22.40 * t + 0.5 * 10.05e-3 * t * t;
    if kelvin < MELTING {
        solid(kelvin)
    } else {
        solid(MELTING) + liquid * LATENT + 31.38 * (kelvin - MELTING)
    }
}

/// A temperature of the zinc that lies clear of its melting point.
fn zinc_temperature() -> impl Strategy<Value = f64> {
    prop_oneof![280.0..690.0, 695.0..1170.0]
}

/// A place of the zinc as a sheet writes it: a temperature, or a share of the melting plateau.
fn zinc_place() -> impl Strategy<Value = String> {
    prop_oneof![
        3 => zinc_temperature().prop_map(|t| format!("{t} K")),
        1 => (0.0..100.0).prop_map(|share: f64| format!("692.68 K, {share} % liquid")),
    ]
}

proptest! {
    #![proptest_config(ProptestConfig { cases: 64, failure_persistence: None, ..ProptestConfig::default() })]

    #[test]
    fn a_route_may_be_split_anywhere(m in 0.1..1e4, a in zinc_place(), b in zinc_place(), c in zinc_place()) {
        let report = work(&format!("{ZINC}
            state a = {m} kg of Zn at {a}
            state b = a at {b}
            state c = a at {c}
            step whole: a -> c, at constant pressure
            step first: a -> b, at constant pressure
            step second: b -> c, at constant pressure
            result H = whole.dH
            result H1 = first.dH
            result H2 = second.dH
            result U = whole.dU
            result U1 = first.dU
            result U2 = second.dU\n"));
        // the largest enthalpy of the curve: liquid at 1180 K, about 0.6 MJ/kg
        let scale = m * 6e5;
        let [h, h1, h2] = values(&report, ["H", "H1", "H2"]);
        prop_assert!(agree(h, h1 + h2, &[h1, h2, scale]), "{h} and {h1} + {h2}");
        let [u, u1, u2] = values(&report, ["U", "U1", "U2"]);
        prop_assert!(agree(u, u1 + u2, &[u1, u2, scale]), "{u} and {u1} + {u2}");
    }

    #[test]
    fn a_closed_cycle_changes_nothing(m in 0.1..1e4, places in prop::collection::vec(zinc_place(), 3)) {
        let report = work(&format!("{ZINC}
            state a = {m} kg of Zn at {}
            state b = a at {}
            state c = b at {}
            step ab: a -> b, at constant pressure
            step bc: b -> c, at constant pressure
            step ca: c -> a, at constant pressure
            result H = ab.dH + bc.dH + ca.dH
            result U = ab.dU + bc.dU + ca.dU
            result Q = ab.Q + bc.Q + ca.Q
            result W = ab.W + bc.W + ca.W\n", places[0], places[1], places[2]));
        for name in ["H", "U", "Q", "W"] {
            let sum = value(&report, name);
            prop_assert!(agree(sum, 0.0, &[m * 6e5]), "{name}: {sum}");
        }
    }

    /// Two ways round a rectangle in the p-V diagram: the work differs by its area, and so does the heat.
    #[test]
    fn heat_and_work_depend_on_the_path_and_internal_energy_does_not(
        n in 0.01..1e3, cp in 21.0..60.0, t1 in 250.0..900.0, ratio in 1.2..2.0, rise in 1.2..2.0,
    ) {
        let p1 = 1e5;
        let (p2, t2) = (p1 * ratio, t1 * ratio * rise);
        let report = work(&format!("{}
            state a = {n} mol of G at {t1} K, {p1} Pa
            state b = a at {t2} K, {p2} Pa
            state up = a at {} K, {p2} Pa
            state out = a at {} K, {p1} Pa
            step up_first: a -> up, at constant volume
            step out_then: up -> b, at constant pressure
            step out_first: a -> out, at constant pressure
            step up_then: out -> b, at constant volume
            result U1 = up_first.dU + out_then.dU
            result U2 = out_first.dU + up_then.dU
            result Q1 = up_first.Q + out_then.Q
            result Q2 = out_first.Q + up_then.Q
            result W1 = up_first.W + out_then.W
            result W2 = out_first.W + up_then.W\n", gas(cp), t1 * ratio, t1 * rise));
        let [u1, u2, q1, q2, w1, w2] = values(&report, ["U1", "U2", "Q1", "Q2", "W1", "W2"]);
        let scale = n * cp * t2;
        let area = (p2 - p1) * (n * R * t1 / p1) * (rise - 1.0);
        prop_assert!(agree(u1, u2, &[scale]), "{u1} and {u2}");
        prop_assert!(agree(w2 - w1, area, &[scale]), "{w2} - {w1} and {area}");
        prop_assert!(agree(q1 - q2, area, &[scale]), "{q1} - {q2} and {area}");
        prop_assert!(agree(u1, q1 + w1, &[scale]) && agree(u2, q2 + w2, &[scale]));
        prop_assert!(q1 - q2 > 0.01 * area && area > 0.0);
    }

    /// ΔH = n cp ΔT and ΔH − ΔU = n R ΔT of an ideal gas, whatever its pressure does.
    #[test]
    fn an_ideal_gas_of_constant_heat_capacity(
        n in 0.01..1e3, cp in 21.0..60.0, t1 in 60.0..4000.0_f64, t2 in 60.0..4000.0, p1 in 0.01..100.0, p2 in 0.01..100.0,
    ) {
        let report = work(&format!("{}
            state a = {n} mol of G at {t1} K, {p1} bar
            state b = a at {t2} K, {p2} bar
            step change: a -> b
            result H = change.dH
            result U = change.dU\n", gas(cp)));
        let [h, u] = values(&report, ["H", "U"]);
        let scale = n * cp * t1.max(t2);
        prop_assert!(agree(h, n * cp * (t2 - t1), &[scale]), "{h}");
        prop_assert!(agree(h - u, n * R * (t2 - t1), &[scale]), "{h} - {u}");
    }

    /// Exactly: the same two numbers are subtracted the other way round.
    #[test]
    fn a_step_reversed_changes_its_sign(m in 0.1..1e4, a in zinc_place(), b in zinc_place()) {
        let report = work(&format!("{ZINC}
            state a = {m} kg of Zn at {a}
            state b = a at {b}
            step there: a -> b, at constant pressure
            step back: b -> a, at constant pressure
            result H = there.dH
            result H_back = back.dH
            result U = there.dU
            result U_back = back.dU
            result Q = there.Q
            result Q_back = back.Q\n"));
        for (name, back) in [("H", "H_back"), ("U", "U_back"), ("Q", "Q_back")] {
            prop_assert_eq!(value(&report, name), -value(&report, back), "{}", name);
        }
    }

    /// The same matter by mass and by amount, its heat capacity given per mass and per amount of substance.
    #[test]
    fn bases_of_mass_and_of_amount_agree(n in 0.01..1e3, cp in 5.0..200.0, m in 2.0..300.0, t in 280.0..900.0) {
        let species = |name: &str, cp: f64, unit: &str| format!("species {name} {{
    molar_mass {m} g/mol
    source \"invented for this test\"
    phase solid {{
        cp = {cp} {unit} for 250 K to 1000 K
    }}
}}\n");
        let report = work(&format!("{}{}
            state a1 = {n} mol of A at {t} K
            state a2 = a1 at 300 K
            state b1 = {} kg of B at {t} K
            state b2 = b1 at 300 K
            step a: a1 -> a2
            step b: b1 -> b2
            result A_H = a.dH
            result B_H = b.dH\n",
            species("A", cp, "J/(mol K)"), species("B", cp / (m * 1e-3), "J/(kg K)"), n * m * 1e-3));
        let [a, b] = values(&report, ["A_H", "B_H"]);
        prop_assert!(agree(a, b, &[n * cp * 1000.0]), "{a} and {b}");
    }

    /// The temperature of a mixture is the same in any order, and its enthalpy that of its parts: by hand, from the
    /// integrals of cp. The temperature is found to 1e-10 of itself at worst.
    #[test]
    fn a_mixture_without_heat_keeps_its_enthalpy_in_any_order(
        m in prop::collection::vec(1.0..500.0, 3), t in prop::collection::vec(zinc_temperature(), 3),
    ) {
        let report = work(&format!("{ZINC}
            state a = {} kg of Zn at {} K
            state b = {} kg of Zn at {} K
            state c = {} kg of Zn at {} K
            state one = a + b + c at ?
            state two = c + a + b at ?
            state pair = b + c at ?
            state three = pair + a at ?
            step mix1: a + b + c -> one, at constant pressure, adiabatic
            step mix2: c + a + b -> two, at constant pressure, adiabatic
            step mix_pair: b + c -> pair, at constant pressure, adiabatic
            step mix3: pair + a -> three, at constant pressure, adiabatic
            result T1 = one.T in K
            result T2 = two.T in K
            result T3 = three.T in K
            result x1 = one.fraction(liquid)
            result x2 = two.fraction(liquid)
            result x3 = three.fraction(liquid)
            result H = mix1.dH\n", m[0], t[0], m[1], t[1], m[2], t[2]));
        let [t1, t2, t3, x1, x2, x3] = values(&report, ["T1", "T2", "T3", "x1", "x2", "x3"]);
        prop_assert!((t1 - t2).abs() <= 1e-10 * t1 && (t1 - t3).abs() <= 1e-10 * t1, "{t1}, {t2}, {t3} K");
        prop_assert!((x1 - x2).abs() <= 1e-10 && (x1 - x3).abs() <= 1e-10, "{x1}, {x2}, {x3}");
        let before: f64 = m.iter().zip(&t).map(|(m, &t)| m / M_ZN * zinc(t, 1.0)).sum();
        let total = m.iter().sum::<f64>() / M_ZN;
        let after = total * zinc(t1, x1);
        // a temperature off by 1e-10 of itself moves the enthalpy by as much of cp T
        prop_assert!((before - after).abs() <= 1e-10 * total * 31.38 * 1180.0, "{before} and {after}");
        prop_assert!(value(&report, "H").abs() <= 1e-10 * total * 31.38 * 1180.0);
    }

    #[test]
    fn legs_add_up_to_the_enthalpy_change(m in 0.1..1e4, a in zinc_place(), b in zinc_place(), p in 1.0..50.0) {
        let report = work(&format!("{ZINC}
            state a = {m} kg of Zn at {a}
            state b = a at {b}, {p} bar
            step change: a -> b
            result H = change.dH\n"));
        let step = &report.steps[0];
        let legs: f64 = step.legs.iter().map(|leg| leg.enthalpy_change).sum();
        prop_assert!(agree(legs, value(&report, "H"), &[m * 6e5]), "{legs} and {}", step.enthalpy_change);
    }

    /// Heated to the plateau and a share of the latent heat further, by the integrals of hand.
    #[test]
    fn a_heat_that_ends_inside_the_plateau_gives_the_share(m in 0.1..1e4, t in 280.0..690.0, share in 0.001..0.999_f64) {
        let n = m / M_ZN;
        let heat = n * (zinc(MELTING, 0.0) - zinc(t, 0.0) + share * LATENT);
        let report = work(&format!("{ZINC}
            state cold = {m} kg of Zn at {t} K
            state warm = cold at ?
            step soak: cold -> warm, at constant pressure, taking {heat} J
            result T = warm.T in K
            result x = warm.fraction(liquid)
            result latent = soak.latent\n"));
        prop_assert_eq!(value(&report, "T"), MELTING);
        let [x, latent] = values(&report, ["x", "latent"]);
        // the latent heat is a third of the whole enthalpy, so the share is as good as the sums
        prop_assert!((x - share).abs() <= 10.0 * ROUNDING, "{x} and {share}");
        prop_assert!(agree(latent, share * n * LATENT, &[n * LATENT * 10.0]), "{latent}");
    }
}

/// The sheets whose tables are compared with single runs: properties, two settled temperatures, a gas path.
fn swept(input: &str, table: &str) -> String {
    format!(
        "{ZINC}{}
        basis x = {input}
        state cold = 450 kg of Zn at 291.15 K
        state melt = cold at x
        step heat: cold -> melt, at constant pressure
        state mixed = melt + cold at ?
        step mix: melt + cold -> mixed, at constant pressure, adiabatic
        state low = 3 mol of G at x, 1 bar
        state high = low at ?, 7 bar
        step squeeze: low -> high, adiabatic reversible
        result Q = heat.Q in J
        result U = heat.dU in J
        result T = mixed.T in K
        result f = mixed.fraction(liquid)
        result hot = high.T in K
        result W = squeeze.W in J
        result log = ln(x / (1 K)) * sqrt(high.T / x)
        {table}\n",
        gas(29.1)
    )
}

#[test]
fn a_row_of_a_table_is_a_run_with_its_input_bit_for_bit() {
    // 129 rows: two whole blocks of lanes and one more; 1.21875 K has an exact double, so the inputs are as written
    let columns = "Q in J, U in J, T in K, f, hot in K, W in J, log";
    let report =
        work(&swept("800 K", &format!("table \"all\": {columns} over x from 694 K to 850 K by 1.21875 K")));
    let table = &report.tables[0];
    assert_eq!(table.rows.len(), 129);
    for row in table.rows.iter().step_by(3) {
        let input = row[0].expect("an input");
        let single = work(&swept(&format!("{input} K"), ""));
        for (value, result) in row[1..].iter().zip(&single.results) {
            assert_eq!(
                value.map(f64::to_bits),
                Some(result.value.si.to_bits()),
                "{} at {input} K",
                result.name
            );
        }
    }
}

//! What can be a curve, and where its enthalpies count from.

use super::*;

#[test]
fn latent_heat_follows_from_two_formation_enthalpies() {
    // Liquid cp 4180, gas cp 1865, formations -15.866e6 and -13.423e6 J/kg at 298.15 K; at 373.15 K the gas
    // lies higher by 2.443e6 + 75 (1865 - 4180) = 2 269 375 J/kg.
    let mut liquid = phase("liquid", PhaseClass::Liquid, &[(273.15, 500.0, &[(4180.0, 0.0)])]);
    let mut gas = phase("gas", PhaseClass::Gas, &[(298.15, 1000.0, &[(1865.0, 0.0)])]);
    gas.formation = Some(j(-13.423e6));
    let mut water =
        data(vec![liquid.clone(), gas.clone()], vec![Link::AtFromFormations { temperature: k(373.15) }]);
    water.formation = Some(j(-15.866e6));
    let curve = HeatingCurve::build(water.clone()).unwrap();
    assert!((curve.transition(0).unwrap().latent.value - 2_269_375.0).abs() < 1e-6);
    water.formation = None;
    assert_eq!(HeatingCurve::build(water.clone()), Err(CurveError::FormationMissing { phase: 0 }));
    // Given as well, the latent heat must agree.
    liquid.formation = Some(j(-15.866e6));
    let takes = |latent| {
        let at = Link::At { temperature: k(373.15), latent: j(latent) };
        HeatingCurve::build(data(vec![liquid.clone(), gas.clone()], vec![at]))
    };
    assert!(takes(2.27e6).is_ok());
    assert!(matches!(takes(2.1e6), Err(CurveError::LatentContradiction { phase: 1, .. })));
}

#[test]
fn a_formation_enthalpy_needs_data_at_its_temperature() {
    let build = |lo: f64| {
        let mut data = data(vec![phase("solid", PhaseClass::Solid, &[(lo, 900.0, &[(800.0, 0.0)])])], vec![]);
        data.formation = Some(j(-1e6));
        HeatingCurve::build(data)
    };
    let stretched = build(300.0).unwrap();
    assert!(stretched.formation_extrapolated());
    assert!((h(&stretched, 300.0) - (-1e6 + 1.85 * 800.0)).abs() < 1e-6);
    assert_eq!(build(300.2), Err(CurveError::FormationUnplaced));
}

#[test]
fn what_cannot_be_a_curve_is_refused() {
    let two = |a: (f64, f64), b: (f64, f64), link: Link| {
        let solid = phase("solid", PhaseClass::Solid, &[(a.0, a.1, &[(800.0, 0.0)])]);
        let liquid = phase("liquid", PhaseClass::Liquid, &[(b.0, b.1, &[(900.0, 0.0)])]);
        HeatingCurve::build(data(vec![solid, liquid], vec![link])).unwrap_err()
    };
    let melt = |t, latent| Link::At { temperature: k(t), latent: j(latent) };
    assert_eq!(
        two((300.0, 500.0), (500.0, 900.0), melt(510.0, 1e5)),
        CurveError::RangeShort { phase: 0, link: 0, reaches: k(500.0), transition: k(510.0) }
    );
    assert_eq!(
        two((300.0, 520.0), (515.0, 900.0), melt(510.0, 1e5)),
        CurveError::RangeShort { phase: 1, link: 0, reaches: k(515.0), transition: k(510.0) }
    );
    assert_eq!(
        two((300.0, 500.0), (500.0, 900.0), melt(500.0, -1.0)),
        CurveError::LatentSign { link: 0, latent: j(-1.0) }
    );
    let over = |from, to, along| Link::Over { from: k(from), to: k(to), latent: j(1e5), along };
    let wrong = |fault| CurveError::MeltingRange { link: 0, fault };
    assert_eq!(two((300.0, 500.0), (500.0, 900.0), over(500.0, 480.0, vec![])), wrong(MeltingFault::Ends));
    let falling = vec![(k(480.0), 0.0), (k(490.0), 0.6), (k(495.0), 0.5), (k(500.0), 1.0)];
    assert_eq!(
        two((300.0, 500.0), (500.0, 900.0), over(480.0, 500.0, falling)),
        wrong(MeltingFault::Order { at: 2 })
    );
    let one = |ranges: &[TestRange<'_>]| {
        HeatingCurve::build(data(vec![phase("solid", PhaseClass::Solid, ranges)], vec![])).unwrap_err()
    };
    let c: &[(f64, f64)] = &[(800.0, 0.0)];
    assert_eq!(one(&[]), CurveError::NoLaw { phase: 0 });
    assert_eq!(
        one(&[(300.0, 400.0, c), (401.0, 500.0, c)]),
        CurveError::Gap { phase: 0, range: 1, from: k(400.0), to: k(401.0) }
    );
    assert_eq!(
        one(&[(300.0, 400.0, c), (399.0, 500.0, c)]),
        CurveError::Overlap { phase: 0, range: 1, from: k(399.0), to: k(400.0) }
    );
    assert_eq!(one(&[(400.0, 300.0, c)]), CurveError::EmptyRange { phase: 0, range: 0 });
    assert!(matches!(
        one(&[(300.0, 400.0, &[(800.0, 0.0), (-2.2, 1.0)])]),
        CurveError::HeatCapacityNotPositive { phase: 0, range: 0, .. }
    ));
}

#[test]
fn transitions_out_of_order_and_phases_upside_down_are_refused() {
    let mut data = rich_data();
    data.links[0] = Link::At { temperature: k(410.0), latent: j(1e4) };
    data.links[1] = Link::At { temperature: k(405.0), latent: j(1e4) };
    assert!(matches!(HeatingCurve::build(data), Err(CurveError::TransitionOrder { link: 1, .. })));
    let mut data = zinc_data();
    data.phases[0].class = PhaseClass::Gas;
    assert_eq!(HeatingCurve::build(data), Err(CurveError::ClassOrder { link: 0 }));
    let mut data = rich_data();
    data.formation = None;
    assert!(matches!(HeatingCurve::build(data), Err(CurveError::FormationMissing { phase: 0 })));
}

#[test]
fn a_table_must_cover_its_range_and_is_not_stretched_by_leave() {
    let table = |lo, hi| {
        let points = [(lo, 800.0), (0.5 * (lo + hi), 850.0), (hi, 820.0)];
        HeatCapacity::table(&points, crate::numeric::Shape::MonotoneCubic, Basis::Mass).unwrap()
    };
    let build = |law| {
        let mut solid = phase("solid", PhaseClass::Solid, &[(300.0, 500.0, &[(1.0, 0.0)])]);
        solid.ranges[0].law = law;
        HeatingCurve::build(data(vec![solid], vec![]))
    };
    assert!(matches!(build(table(300.0, 490.0)), Err(CurveError::TableShort { phase: 0, range: 0, .. })));
    let curve = build(table(300.0, 500.0)).unwrap();
    let allowed = Allowance::default().allow(0, k(300.0), k(600.0));
    assert!(curve.locate(k(550.0), atmosphere(), Pin::Stable, None, &allowed).is_err());
}

#[test]
fn published_records_give_their_published_enthalpies_through_melting() {
    // NASA/TP-2002-211556 (McBride, Zehe, Gordon 2002), records Zn(cr), Zn(L), AL(cr), AL(L): coefficients,
    // melting points and the jump between the records as latent heat; expected H(T) - H(298.15 K) in J/mol
    // from the records' own enthalpy constants.
    type Record = ([f64; 7], [f64; 7], f64, f64, [(f64, f64); 4]);
    let liquid = |a3: f64| [0.0, 0.0, a3, 0.0, 0.0, 0.0, 0.0];
    let zinc: Record = (
        [370208.038, -5915.4755, 39.5950036, -0.1143735885, 0.0001934363797, -1.675385126e-7, 6.07818994e-11],
        liquid(3.776530427),
        692.73,
        7300.0,
        [(500.0, 5299.21), (800.0, 21530.34), (900.0, 24670.34), (1100.0, 30950.34)],
    );
    let aluminium: Record = (
        [-62518.1143, 634.393435, -0.713188382, 0.0108872528, -1.45874182e-5, 9.96116088e-9, -1.77492801e-12],
        liquid(3.81862551),
        933.61,
        10700.0,
        [(800.0, 13809.3), (1300.0, 40478.78), (1700.0, 53178.78), (2700.0, 84928.78)],
    );
    for (solid_a, liquid_a, melts, latent, points) in [zinc, aluminium] {
        // A molar mass of 1 kg/mol makes per mass and per mole the same number.
        let law = |a| HeatCapacity::nasa9(a, typed(8.314_51), typed(1.0)).unwrap();
        let mut solid = phase("solid", PhaseClass::Solid, &[(200.0, melts, &[(1.0, 0.0)])]);
        let mut liquid = phase("liquid", PhaseClass::Liquid, &[(melts, 6000.0, &[(1.0, 0.0)])]);
        (solid.ranges[0].law, liquid.ranges[0].law) = (law(solid_a), law(liquid_a));
        let melting = Link::At { temperature: k(melts), latent: j(latent) };
        let mut data = data(vec![solid, liquid], vec![melting]);
        data.formation = Some(j(0.0));
        let curve = HeatingCurve::build(data).unwrap();
        for (t, expected) in points {
            let found = h(&curve, t);
            assert!((found - expected).abs() < 0.006, "{t} K: {found} for {expected}");
        }
    }
}

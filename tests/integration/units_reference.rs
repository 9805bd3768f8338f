//! Factors against another library's, which were worked out in exact arithmetic: see the head of the table.

use heatpath::units::read_unit;

#[test]
fn factors_agree_with_another_library_in_exact_arithmetic() {
    let table = include_str!("../reference/units.csv");
    let mut reader = csv::ReaderBuilder::new().comment(Some(b'#')).from_reader(table.as_bytes());
    let mut rows = 0;
    for record in reader.records() {
        let record = record.expect("a row of the table");
        let (text, value, si, base_units) = (&record[0], &record[1], &record[2], &record[3]);
        let unit = read_unit(text).unwrap_or_else(|error| panic!("{text}: {error:?}"));
        let value: f64 = value.parse().expect("a number");
        let si: f64 = si.parse().expect("a number");
        assert_eq!(unit.dimension.to_string(), base_units, "{text}");
        let found = unit.to_si(value, 0.0);
        assert!((found / si - 1.0).abs() <= 1e-12, "{text}: {found} against {si}");
        rows += 1;
    }
    assert!(rows >= 200, "{rows} rows");
}

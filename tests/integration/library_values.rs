//! The shipped species library against published values.
//!
//! The values stand in `tests/reference/data/` with their publications. What differs by more than is allowed stands in
//! `library_exceptions.csv`, with the reason; an exception that is no longer one fails too.

use crate::library::family_program;
use crate::program::path;
use heatpath::library::NoFiles;
use heatpath::numeric::math;
use heatpath::session::{self, Worked};
use std::collections::{BTreeMap, BTreeSet};
use std::fmt::Write as _;

/// A published enthalpy increment.
struct Point {
    family: String,
    species: String,
    subject: String,
    kelvin: f64,
    increment: f64,
}

impl Point {
    fn key(&self) -> (String, u32) {
        (self.subject.clone(), (self.kelvin * 100.0) as u32)
    }
}

/// What a file of data holds, line by line, without its comments and its head.
fn records(name: &str) -> Vec<Vec<String>> {
    let file = path("tests/reference/data").join(name);
    let mut reader =
        csv::ReaderBuilder::new().comment(Some(b'#')).from_path(file).expect("the file can be opened");
    reader
        .records()
        .map(|record| record.expect("a line of the file").iter().map(str::to_owned).collect())
        .collect()
}

fn number(text: &str) -> f64 {
    text.parse().expect("a number")
}

fn points(name: &str) -> Vec<Point> {
    let point = |record: Vec<String>| match record.as_slice() {
        [family, species, subject, kelvin, increment, _] => Point {
            family: family.clone(),
            species: species.clone(),
            subject: subject.clone(),
            kelvin: number(kelvin),
            increment: number(increment),
        },
        _ => unreachable!("{name}: {record:?}"),
    };
    records(name).into_iter().map(point).collect()
}

fn run(sheet: &str) -> Worked {
    session::run("sheet.heat", "sheet.heat", sheet, &NoFiles)
}

/// The codes of the mistakes of a sheet.
pub(crate) fn refusals(sheet: &str) -> Vec<String> {
    let errors = run(sheet).diagnostics.into_iter().filter(|found| found.is_error());
    errors.map(|found| found.code.as_str().to_owned()).collect()
}

/// The results of a sheet in the units they are shown in.
pub(crate) fn numbers(sheet: &str) -> BTreeMap<String, f64> {
    let worked = run(sheet);
    let told: Vec<_> = worked.diagnostics.iter().map(|found| &found.message).collect();
    let report = worked.report.unwrap_or_else(|| unreachable!("{told:?}"));
    report.results.into_iter().map(|row| (row.name, row.value.value)).collect()
}

/// Lines that use species of a family and allow what lies above their decomposition.
fn uses(family: &str, species: &BTreeSet<&str>) -> String {
    let names: Vec<_> = species.iter().copied().collect();
    let mut sheet = format!("use {} from {family}\n", names.join(", "));
    let program = family_program(family);
    for known in program.species.iter().filter(|known| species.contains(known.name.as_str())) {
        let Some(decomposes) = known.curve.decomposes_at() else { continue };
        for at in 0..known.phases.len() {
            let (_, hi) = known.curve.phase_span(at).expect("a phase of the species");
            if hi > decomposes {
                let (phase, to) = (known.in_phase(at), hi.value.min(3500.0));
                let _ = writeln!(sheet, "allow {phase} to {to} K because \"compared with a table\"");
            }
        }
    }
    sheet
}

/// H(T) - H(298.15 K) of every point in J/mol, by the library.
fn increments(points: &[Point]) -> Vec<f64> {
    let mut found = vec![f64::NAN; points.len()];
    let families: BTreeSet<_> = points.iter().map(|point| point.family.as_str()).collect();
    for family in families {
        let here = || points.iter().enumerate().filter(|(_, point)| point.family == family);
        let species = here().map(|(_, point)| point.species.as_str()).collect();
        let mut sheet = uses(family, &species);
        for (at, point) in here() {
            let from = if point.subject.ends_with("(g)") { &point.subject } else { &point.species };
            let (subject, kelvin) = (&point.subject, point.kelvin);
            let _ = writeln!(sheet, "state from_{at} = 1 mol of {from} at 298.15 K");
            let _ = writeln!(sheet, "state to_{at} = 1 mol of {subject} at {kelvin} K");
            let _ = writeln!(sheet, "result d_{at} = to_{at}.H - from_{at}.H in J");
        }
        let numbers = numbers(&sheet);
        for (at, _) in here() {
            let value = numbers.get(&format!("d_{at}")).copied();
            if let (Some(place), Some(value)) = (found.get_mut(at), value) {
                *place = value;
            }
        }
    }
    found
}

/// The known differences of a comparison: how far, in J/mol.
fn exceptions(check: &str) -> BTreeMap<(String, u32), f64> {
    let known = records("library_exceptions.csv").into_iter().filter_map(|record| match record.as_slice() {
        [name, subject, kelvin, difference, reason] if name == check => {
            assert!(reason.len() > 20, "{subject} at {kelvin} K: an exception without a reason");
            Some(((subject.clone(), (number(kelvin) * 100.0) as u32), number(difference)))
        }
        _ => None,
    });
    known.collect()
}

/// Compares, and says what differs without being a known exception, and what is one no more.
fn compare(check: &str, points: &[Point], relative: f64, absolute: f64) -> Vec<String> {
    let mut known = exceptions(check);
    let mut wrong = Vec::new();
    for (point, found) in points.iter().zip(increments(points)) {
        let difference = found - point.increment;
        let allowed = (point.increment.abs() * relative).max(absolute);
        let holds = difference.abs() <= allowed;
        let exception = if holds { None } else { known.remove(&point.key()) };
        let excused = exception.is_some_and(|known| (difference - known).abs() <= 0.51);
        if !holds && !excused {
            wrong.push(format!("{check},{},{},{difference:.0}", point.subject, point.kelvin));
        }
    }
    wrong.extend(
        known.into_keys().map(|(subject, kelvin)| format!("{subject} at {kelvin}/100 K: no exception")),
    );
    wrong
}

fn species_of(points: &[Point]) -> BTreeMap<&str, BTreeSet<u32>> {
    let mut temperatures: BTreeMap<&str, BTreeSet<u32>> = BTreeMap::new();
    for point in points {
        temperatures.entry(point.species.as_str()).or_default().insert((point.kelvin * 100.0) as u32);
    }
    temperatures
}

/// Within 0.5 % or 50 J/mol of NIST-JANAF, at five temperatures or more of every species that has a table there.
#[test]
fn enthalpy_increments_agree_with_the_janaf_tables() {
    let points = points("library_janaf.csv");
    let temperatures = species_of(&points);
    assert!(temperatures.len() >= 70, "{} species", temperatures.len());
    assert!(temperatures.values().all(|temperatures| temperatures.len() >= 5));
    let wrong = compare("janaf", &points, 0.005, 50.0);
    assert!(wrong.is_empty(), "{} points:\n{}", wrong.len(), wrong.join("\n"));
}

/// Within 1 % or 100 J/mol of a second evaluation that owes nothing to the first.
#[test]
fn enthalpy_increments_agree_with_a_second_source() {
    let points = points("library_second_source.csv");
    let species = species_of(&points).len();
    assert!(species >= 40, "{species} species");
    let wrong = compare("second", &points, 0.01, 100.0);
    assert!(wrong.is_empty(), "{} points:\n{}", wrong.len(), wrong.join("\n"));
}

/// Within the uncertainty that CODATA states.
#[test]
fn formation_enthalpies_agree_with_the_codata_key_values() {
    let records = records("codata_formation.csv");
    assert!(records.len() >= 19);
    for record in records {
        let [family, subject, wanted, uncertainty] = record.as_slice() else { unreachable!("{record:?}") };
        let species = subject.trim_end_matches("(g)");
        let sheet = format!(
            "use {species} from {family}\nstate a = 1 mol of {subject} at 298.15 K\nresult H = a.H in kJ\n"
        );
        let found = numbers(&sheet).get("H").copied().expect("a result");
        let off = (found - number(wanted)).abs();
        assert!(off <= number(uncertainty), "{subject}: {found} kJ/mol, CODATA {wanted} ± {uncertainty}");
    }
}

/// Every solvent, water and two metals boil where the publication says, and take what it says, less what the vapour
/// is short of an ideal gas.
#[test]
fn boiling_points_and_latent_heats_are_the_published_ones() {
    let records = records("library_boiling.csv");
    assert!(records.len() >= 10);
    for record in records {
        let [family, species, boiling, handbook, latent, share, _] = record.as_slice() else {
            unreachable!("{record:?}")
        };
        let [boiling, handbook, latent, share] = [boiling, handbook, latent, share].map(|text| number(text));
        let sheet = format!(
            "use {species} from {family}\n\
             state cold = 1 mol of {species} at {below} K\nstate part = cold at ?\nstate hot = cold at {above} K\n\
             step begin: cold -> part, at constant pressure, taking 10 kJ\n\
             step boil: cold -> hot, at constant pressure\n\
             result T = part.T in K\nresult latent = boil.latent in J\n",
            below = boiling - 1.0,
            above = boiling + 1.0,
        );
        let found = numbers(&sheet);
        let value = |name: &str| found.get(name).copied().expect("a result");
        assert!((value("T") - boiling).abs() < 1e-9, "{species} boils at {} K", value("T"));
        assert!((value("T") - handbook).abs() < 2.0, "{species} boils at {} K, {handbook} K", value("T"));
        let excess = 100.0 * (value("latent") - latent) / latent;
        assert!(excess.abs() <= share, "{species} takes {} J/mol, {excess:.2} % off", value("latent"));
    }
}

/// The vapour-pressure equations meet the boiling points of the library at 101.325 kPa within 0.2 K.
#[test]
fn vapour_pressures_meet_the_boiling_points() {
    let boiling: BTreeMap<String, f64> = records("library_boiling.csv")
        .into_iter()
        .filter_map(|record| Some((record.get(1)?.clone(), number(record.get(2)?))))
        .collect();
    let laws = records("vapour_pressure.csv");
    assert!(boiling.keys().all(|species| laws.iter().any(|law| law.first() == Some(species))));
    for law in laws {
        let [species, form, numbers @ .., _publication] = law.as_slice() else { unreachable!("{law:?}") };
        let numbers: Vec<f64> = numbers.iter().map(|text| text.parse().unwrap_or(f64::NAN)).collect();
        let [tc, pc, a, b, c, d, e, f, lo, hi, boils] = numbers.as_slice() else { unreachable!("{law:?}") };
        let x = 1.0 - boils / tc;
        let term = |factor: &f64, power: f64| factor * math::pow(x, power);
        let logarithm = match form.as_str() {
            "wagner" => (a * x + term(b, 1.5) + term(c, 3.0) + term(d, 6.0)) / (1.0 - x) + math::ln(*pc),
            "wagner_iapws" => {
                let sum = a * x + term(b, 1.5) + term(c, 3.0) + term(d, 3.5) + term(e, 4.0) + term(f, 7.5);
                sum / (1.0 - x) + math::ln(*pc)
            }
            _ => a + b / boils + c * math::ln(*boils),
        };
        let pressure = math::exp(logarithm);
        assert!((pressure / 101_325.0 - 1.0).abs() < 1e-4, "{species}: {pressure} Pa at {boils} K");
        assert!(lo < boils && boils < hi, "{species}");
        let known = boiling.get(species).copied().unwrap_or(*boils);
        assert!(
            (known - boils).abs() < 0.2,
            "{species} boils at {boils} K by its vapour pressure, {known} K"
        );
    }
}

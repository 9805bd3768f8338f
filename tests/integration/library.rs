//! The shipped species library as a reviewer reads it: what it holds, and the pedigree of its data.

use crate::library_values::{numbers, refusals};
use heatpath::check::check_sheet;
use heatpath::library::{NoFiles, families, family};
use heatpath::program::{DatumKind, Program, Species};
use heatpath::session;
use heatpath::source::Sources;
use heatpath::thermo::PhaseClass;

/// What each family holds at the least.
const LISTED: &[(&str, &str)] = &[
    ("metals", "Al Cu Fe Zn Pb Sn Mg Ni Ag Au Si Ti W Cr Mn Na Co Mo V Ca K"),
    (
        "minerals",
        "Al2O3 CaO MgO SiO2 TiO2 Cr2O3 Fe2O3 Fe3O4 Fe0.947O Cu2O CuO PbO ZnO MnO SnO2 MgAl2O4 SiC C S \
         CaCO3 MgCO3 Na2CO3 Ca(OH)2 Mg(OH)2 NaOH CaSO4 MgSO4 ZnSO4 CaSO4·2H2O",
    ),
    ("sulfides", "FeS FeS2 Cu2S PbS ZnS"),
    ("salts", "NaCl KCl MgCl2 CaCl2 CaF2"),
    (
        "gases",
        "N2 O2 Ar He Air H2 CO CO2 CH4 C2H6 C3H8 C4H10 C2H4 C2H2 SO2 SO3 H2S S2 NH3 HCl HF Cl2 NO NO2 N2O",
    ),
    ("solvents", "CH3OH C2H5OH C6H6 C7H8 C6H14 C8H18 C3H6O CH3COOH C3H8O3"),
    ("water", "H2O"),
    (
        "materials",
        "carbon_steel stainless_steel cast_iron firebrick insulating_brick concrete soda_lime_glass dry_wood \
         mineral_oil",
    ),
];

/// Liquids that the library gives no density: none is recalled well enough to be defended.
const LIQUIDS_WITHOUT_DENSITY: &str = "CaO MgO TiO2 Cr2O3 Fe3O4 Cu2O PbO MgAl2O4 CaSO4 MgSO4 Cu2S PbS";

/// A family as a sheet of its own.
pub(crate) fn family_program(name: &str) -> Program {
    let mut sources = Sources::new();
    let file = sources.add(name, family(name).expect("a shipped family"));
    let checked = check_sheet(&mut sources, file, name, &NoFiles);
    let problems: Vec<_> = checked.diagnostics.iter().map(|found| found.message.clone()).collect();
    checked.program.unwrap_or_else(|| unreachable!("{name}: {}", problems.join("; ")))
}

fn each_species(see: impl Fn(&str, &Species)) {
    for name in families() {
        for species in &family_program(name).species {
            see(name, species);
        }
    }
}

#[test]
fn every_family_is_a_sheet_without_a_mistake_or_a_warning() {
    for name in families() {
        let worked = session::check(name, name, family(name).expect("a text"), &NoFiles);
        let found: Vec<_> = worked.diagnostics.iter().map(|found| &found.message).collect();
        assert!(found.is_empty(), "{name}: {found:?}");
    }
}

#[test]
fn every_listed_species_can_be_used() {
    let listed: Vec<_> = LISTED.iter().map(|(name, _)| *name).collect();
    assert_eq!(listed, families().collect::<Vec<_>>());
    for (name, species) in LISTED {
        let line = format!("use {} from {name}\n", species.split_whitespace().collect::<Vec<_>>().join(", "));
        assert_eq!(refusals(&line), Vec::<String>::new(), "{name}");
    }
}

#[test]
fn every_datum_names_its_publication() {
    each_species(|family, species| {
        for datum in &species.data {
            let source = datum.source.as_deref().unwrap_or_default();
            assert!(source.len() > 5, "{family}, {}: `{}` has no source", species.name, datum.text);
        }
    });
}

#[test]
fn every_species_is_told_by_its_plain_name_and_its_substance_by_formula_and_cas_number() {
    each_species(|family, species| {
        assert!(species.label.is_some(), "{family}: {} has no plain name", species.name);
        let substance = family != "materials";
        assert_eq!(species.formula.is_some(), substance, "{family}: {}", species.name);
        let wanted = substance && species.name != "Air"; // a mixture has no number
        assert_eq!(species.cas.is_some(), wanted, "{family}: {}", species.name);
        assert!(species.cas.as_deref().is_none_or(cas_holds), "{family}: {}", species.name);
        assert_eq!(species.absolute, substance, "{family}: {} and its formation enthalpy", species.name);
    });
}

/// The check digit of a CAS number: the digits before it, weighted 1, 2, 3, ... from the right, modulo 10.
fn cas_holds(number: &str) -> bool {
    let digits: Vec<u32> = number.chars().filter_map(|digit| digit.to_digit(10)).rev().collect();
    let sum: u32 = digits.iter().zip(0..).skip(1).map(|(digit, weight)| digit * weight).sum();
    digits.first() == Some(&(sum % 10))
}

#[test]
fn condensed_phases_have_densities() {
    each_species(|family, species| {
        for (at, phase) in species.phases.iter().enumerate() {
            let without = phase.class == PhaseClass::Liquid
                && LIQUIDS_WITHOUT_DENSITY.split(' ').any(|name| name == species.name);
            let wanted = phase.class != PhaseClass::Gas && !without;
            let found = species.curve.has_density(at);
            assert_eq!(found, wanted, "{family}: density of {}", species.in_phase(at));
        }
    });
}

#[test]
fn spreads_are_told_where_a_second_source_is_known() {
    let (mut told, mut all) = (0, 0);
    for name in families().filter(|name| *name != "materials") {
        for species in &family_program(name).species {
            let told_here = species.data.iter().filter(|datum| datum.spread.is_some()).count();
            assert!(told_here > 0 || lone(species), "{name}: {} has no spread", species.name);
            told += told_here;
            all += species.data.len();
        }
    }
    assert!(told * 3 > all, "only {told} of {all} data have a spread");
}

/// A second source more than 1 % off is spoken of in a remark of the species.
#[test]
fn wide_spreads_are_explained() {
    each_species(|family, species| {
        let percent = |text: &String| text.split(' ').next().and_then(|number| number.parse::<f64>().ok());
        let spreads = species.data.iter().filter_map(|datum| datum.spread.as_ref());
        let widest = spreads.map(|text| percent(text).expect("a percentage")).fold(0.0, f64::max);
        let explained = widest <= 1.0 || !species.remarks.is_empty();
        assert!(explained, "{family}: {} with {widest} % and no remark", species.name);
    });
}

/// Species that rest on a single source.
fn lone(species: &Species) -> bool {
    ["MnO", "CaSO4·2H2O", "CH3COOH", "C3H8O3"].contains(&species.name.as_str())
}

#[test]
fn the_gas_constant_of_the_publication_stands_beside_its_coefficients() {
    each_species(|family, species| {
        for datum in species.data.iter().filter(|datum| datum.text.starts_with("cp nasa9")) {
            assert!(matches!(datum.kind, DatumKind::HeatCapacity { .. }));
            for wanted in ["R = 8.314510", "b1 = "] {
                assert!(datum.text.contains(wanted), "{family}, {}: `{}`", species.name, datum.text);
            }
        }
    });
}

/// Each family says at its head which publication is primary, and why, in remarks that its report prints.
#[test]
fn every_family_says_which_publication_is_primary() {
    for name in families() {
        let remarks: Vec<_> = family_program(name).remarks.iter().map(|remark| remark.text.clone()).collect();
        assert!(remarks.iter().any(|line| line.contains("Primary: ")), "{name}: {remarks:?}");
    }
}

#[test]
fn calcite_is_refused_above_its_decomposition_but_by_leave() {
    let at = |kelvin: u32, line: &str| {
        format!(
            "use CaCO3 from minerals\n{line}state hot = 1 mol of CaCO3 at {kelvin} K\nresult H = hot.H in kJ\n"
        )
    };
    assert_eq!(refusals(&at(1173, "")), Vec::<String>::new());
    assert_eq!(refusals(&at(1180, "")), ["R702"]);
    assert_eq!(
        refusals(&at(1180, "allow CaCO3(s) to 1200 K because \"short stay\"\n")),
        Vec::<String>::new()
    );
}

#[test]
fn changes_without_latent_heat_are_no_transitions() {
    // 1424 K of fluorite and 306 K of chromium(III) oxide: cp peaks, nothing is taken up at one temperature
    for (species, family, from, to) in [
        ("CaF2", "salts", 1300, 1600),
        ("Cr2O3", "minerals", 300, 320),
        ("Fe2O3", "minerals", 900, 1000),
        ("NaOH", "minerals", 500, 560),
    ] {
        let sheet = format!(
            "use {species} from {family}\nstate a = 1 mol of {species} at {from} K\nstate b = a at {to} K\n\
             step heat: a -> b, at constant pressure\nresult latent = heat.latent in J\n"
        );
        assert_eq!(numbers(&sheet).get("latent"), Some(&0.0), "{species}");
    }
}

/// 52.3 kJ/mol at 3695 K: Dinsdale, SGTE data for pure elements (1991); not the 35.4 kJ/mol of older tables.
#[test]
fn tungsten_melts_as_evaluated_by_sgte() {
    let found = numbers(
        "use W from metals\nstate a = 1 mol of W at 3694 K\nstate b = a at 3696 K\n\
         step melt: a -> b, at constant pressure\nresult latent = melt.latent in kJ\n",
    );
    let latent = found.get("latent").copied().expect("a result");
    assert!((latent - 52.3).abs() < 1e-9, "{latent}");
}

#[test]
fn a_species_asked_of_the_wrong_family_is_told_its_own() {
    let worked = session::check("sheet.heat", "sheet.heat", "use N2, Argon from metals\n", &NoFiles);
    let helps: Vec<_> = worked.diagnostics.iter().filter_map(|found| found.help.as_deref()).collect();
    assert_eq!(helps.first(), Some(&"write `use N2 from gases`"));
    assert!(helps.get(1).is_some_and(|help| help.contains("Al, Cu, Fe, Zn")), "{helps:?}");
}

/// Pairs of molecules halve the real latent heat, so that heating past the boiling point is refused.
#[test]
fn acetic_acid_is_not_boiled_to_single_molecules() {
    let heated = "use CH3COOH from solvents\nstate a = 1 kg of CH3COOH at 20 degC\nstate b = a at 130 degC\n\
                  step heat: a -> b, at constant pressure\nresult Q = heat.Q in kJ\n";
    assert_eq!(refusals(heated), ["R702"]);
    let vapour =
        "use CH3COOH from solvents\nstate a = 1 kg of CH3COOH(g) at 130 degC\nresult H = a.H in kJ\n";
    assert_eq!(refusals(vapour), Vec::<String>::new());
}

//! The command line: what it prints where, and its exit status.

use crate::program::{Ran, command, heatpath, heatpath_reading, scratch};
use serde_json::Value;

const GOOD: &str = "basis charge = 450 kg\n";
const BAD: &str = "basis charge = 0,5 t\n";

fn called(ran: &Ran) -> (Option<i32>, &str, &str) {
    (ran.status, &ran.stdout, &ran.stderr)
}

#[test]
fn help_names_the_commands_and_the_exit_status() {
    let ran = heatpath(&["--help"]);
    assert_eq!((ran.status, ran.stderr.as_str()), (Some(0), ""));
    for word in ["run ", "check ", "species ", "units ", "explain ", "--color", "Exit status: 0"] {
        assert!(ran.stdout.contains(word), "{word}");
    }
    for later in ["why", "tidy", "record", "audit", "compare"] {
        assert!(!ran.stdout.contains(&format!("  {later} ")), "{later}");
        assert_eq!(heatpath(&[later, "sheet.heat"]).status, Some(2), "{later}");
    }
}

#[test]
fn a_call_without_a_command_shows_the_help() {
    let ran = heatpath::<&str>(&[]);
    assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""));
    assert!(ran.stderr.contains("Usage: heatpath"), "{}", ran.stderr);
}

#[test]
fn the_version_is_that_of_the_package() {
    let ran = heatpath(&["--version"]);
    assert_eq!(called(&ran), (Some(0), concat!("heatpath ", env!("CARGO_PKG_VERSION"), "\n"), ""));
}

#[test]
fn a_wrong_call_is_told_on_standard_error() {
    for call in [&["run"][..], &["run", "a", "b"], &["check", "a", "--format", "xml"], &["units", "--colour"]]
    {
        let ran = heatpath(call);
        assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""), "{call:?}");
        assert!(ran.stderr.starts_with("error: "), "{call:?}: {}", ran.stderr);
    }
}

#[test]
fn units_are_listed_one_a_line() {
    let ran = heatpath(&["units"]);
    assert_eq!((ran.status, ran.stderr.as_str()), (Some(0), ""));
    let heading: Vec<_> = ran.stdout.lines().next().unwrap_or_default().split_whitespace().collect();
    assert_eq!(heading, ["unit", "name", "dimension", "factor", "standard"]);
    assert_eq!(ran.stdout.lines().count(), heatpath::units::listing().len() + 1);
    let pound = ran.stdout.lines().find(|line| line.starts_with("lb ")).unwrap_or_default();
    assert!(pound.contains("0.45359237 kg"), "{pound}");
}

#[test]
fn a_word_picks_units() {
    let ran = heatpath(&["units", "kW", "--format", "json"]);
    let listed: Value = serde_json::from_str(&ran.stdout).expect("JSON");
    assert_eq!(listed.pointer("/units/0/unit").and_then(Value::as_str), Some("W"));
    assert_eq!(listed.get("units").and_then(Value::as_array).map(Vec::len), Some(1));
}

#[test]
fn a_word_that_finds_no_unit_gets_the_nearest() {
    let ran = heatpath(&["units", "kelvim"]);
    assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""));
    assert!(
        ran.stderr.contains("`kelvim`") && ran.stderr.contains("`kelvin` is the nearest"),
        "{}",
        ran.stderr
    );
}

#[test]
fn a_code_is_explained_whatever_the_case_of_its_letter() {
    let ran = heatpath(&["explain", "k301"]);
    assert_eq!(called(&ran), (Some(0), heatpath::diagnostic::Code::UnlikeSum.explanation(), ""));
}

#[test]
fn an_unknown_code_gets_the_nearest() {
    let ran = heatpath(&["explain", "K3001"]);
    assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""));
    assert!(ran.stderr.contains("`K3001`") && ran.stderr.contains("`K301` is the nearest"), "{}", ran.stderr);
}

#[test]
fn codes_are_listed_by_area() {
    let ran = heatpath(&["explain"]);
    let heads: Vec<_> =
        ran.stdout.lines().filter(|line| !line.is_empty() && !line.starts_with(' ')).collect();
    assert_eq!((ran.status, heads.len(), heads.first().copied()), (Some(0), 10, Some("Syntax")));
}

#[test]
fn a_sheet_comes_from_standard_input() {
    let ran = heatpath_reading(&["check", "-"], GOOD.as_bytes());
    assert_eq!(called(&ran), (Some(0), "standard input: no errors\n", ""));
    let ran = heatpath_reading(&["check", "-"], BAD.as_bytes());
    assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""));
    assert!(
        ran.stderr.starts_with("error S103\n") && ran.stderr.contains("standard input:1:"),
        "{}",
        ran.stderr
    );
}

#[test]
fn a_file_with_a_byte_order_mark_is_a_sheet() {
    let ran = heatpath_reading(&["check", "-"], format!("\u{feff}{GOOD}").as_bytes());
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
}

#[test]
fn check_prints_json_on_standard_output() {
    let ran = heatpath_reading(&["check", "--format", "json", "-"], BAD.as_bytes());
    assert_eq!((ran.status, ran.stderr.as_str()), (Some(2), ""));
    let printed: Value = serde_json::from_str(&ran.stdout).expect("JSON");
    assert_eq!(printed.pointer("/diagnostics/0/code").and_then(Value::as_str), Some("S103"));
    let ran = heatpath_reading(&["check", "--format", "json", "-"], GOOD.as_bytes());
    assert_eq!(
        serde_json::from_str::<Value>(&ran.stdout).expect("JSON"),
        serde_json::json!({ "diagnostics": [] })
    );
}

#[test]
fn a_sheet_with_errors_prints_no_report() {
    for format in ["text", "json"] {
        let ran = heatpath_reading(&["run", "--format", format, "-"], BAD.as_bytes());
        assert_eq!((ran.status, ran.stdout.as_str()), (Some(2), ""), "{format}");
        assert!(ran.stderr.starts_with("error S103\n"), "{format}: {}", ran.stderr);
    }
}

#[test]
fn a_requirement_decides_the_exit_status() {
    for (limit, status) in [("400", 1), ("500", 0)] {
        let sheet = format!("basis charge = 450 kg\nresult mass = charge\nrequire mass <= {limit} kg\n");
        for format in ["text", "json"] {
            let ran = heatpath_reading(&["run", "--format", format, "-"], sheet.as_bytes());
            assert_eq!((ran.status, ran.stderr.as_str()), (Some(status), ""), "{limit} {format}");
            assert!(ran.stdout.contains("mass"), "{}", ran.stdout);
        }
    }
}

#[test]
fn warnings_stand_in_the_report_and_not_beside_it() {
    let sheet = "let half = 1/2 kg\nresult x = half * 3 kg\n";
    let ran = heatpath_reading(&["run", "-"], sheet.as_bytes());
    assert_eq!((ran.status, ran.stderr.as_str()), (Some(0), ""));
    assert!(ran.stdout.contains("W102"), "{}", ran.stdout);
    let ran = heatpath_reading(&["run", "--diagnostics", "json", "-"], sheet.as_bytes());
    let printed: Value = serde_json::from_str(&ran.stderr).expect("JSON");
    assert_eq!(printed.pointer("/diagnostics/0/code").and_then(Value::as_str), Some("W102"));
}

/// Members are put in as numbers, those too that the report lists nowhere else.
#[test]
fn every_member_of_a_formula_is_put_in() {
    let sheet = "species steel \"steel\" {\n source \"invented\"\n phase solid {\n cp = 0.63 kJ/(kg K) for 273.15 K to 1200 K\n\
                 density 7850 kg/m3\n }\n}\nstate cold = 785 kg of steel at 20 degC\nstate hot = cold at 120 degC\n\
                 step heat_up: cold -> hot\nresult twice = cold.V * 2 in L\nresult half = heat_up.sensible / 2 in MJ\n";
    let ran = heatpath_reading(&["run", "-"], sheet.as_bytes());
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
    // by hand: 785 kg / 7850 kg/m3 = 0.1 m3; 785 kg * 0.63 kJ/(kg K) * 100 K = 49.455 MJ
    assert!(ran.stdout.contains("= 0.1 m3 * 2"), "{}", ran.stdout);
    assert!(ran.stdout.contains("= 49.455 MJ / 2"), "{}", ran.stdout);
}

/// Two species that melt at one temperature: the heat alone does not say how far each of them is.
#[test]
fn a_plateau_that_is_shared_is_told() {
    let species = |name: &str, latent: f64| {
        format!(
            "species {name} \"{name}\" {{\n source \"invented\"\n phase solid {{\n cp = 1 kJ/(kg K) for 300 K to 500 K\n }}\n\
             melting at 500 K takes {latent} kJ/kg\n phase liquid {{\n cp = 1 kJ/(kg K) for 500 K to 900 K\n }}\n}}\n"
        )
    };
    let sheet = format!(
        "{}{}state a = 1 kg of wax at 400 K\nstate b = 1 kg of salt at 400 K\nstate both = a + b at ?\n\
         step soak: a + b -> both, at constant pressure, taking 300 kJ\nresult T = both.T in K\n",
        species("wax", 100.0),
        species("salt", 200.0)
    );
    let ran = heatpath_reading(&["run", "-"], sheet.as_bytes());
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
    assert!(ran.stdout.contains("wax and salt change at one temperature"), "{}", ran.stdout);
}

/// A pressure drop is neither absolute nor gauge, whatever name it goes by.
#[test]
fn a_difference_of_pressures_is_not_marked_absolute() {
    let sheet = "basis before = 3 bar\nbasis after = 2.5 bar\nlet drop = before - after\nresult fall = drop in mbar\n\
                 table \"Falls\": fall, drop in kPa, before over before from 3 bar to 4 bar by 1 bar\n";
    let ran = heatpath_reading(&["run", "-"], sheet.as_bytes());
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
    let words: Vec<_> =
        ran.stdout.lines().map(|line| line.split_whitespace().collect::<Vec<_>>().join(" ")).collect();
    assert!(words.iter().any(|line| line == "= 500 mbar"), "{}", ran.stdout);
    assert!(words.iter().any(|line| line == "bar abs mbar kPa bar abs"), "{}", ran.stdout);
}

/// Data that begin just above 298.15 K carry an absolute enthalpy from there, and the report says so.
#[test]
fn an_absolute_enthalpy_shows_the_range_that_it_uses() {
    let sheet = "species Ar \"argon\" {\n formula Ar\n source \"invented\"\n formation 0 kJ/mol at 298.15 K\n phase gas {\n\
                 cp = 20.786 J/(mol K) for 300 K to 1000 K\n }\n}\nstate hot = 1 mol of Ar at 400 K\nresult h = hot.H in kJ\n";
    let ran = heatpath_reading(&["run", "-"], sheet.as_bytes());
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
    let text = ran.stdout.split_whitespace().collect::<Vec<_>>().join(" ");
    assert!(text.contains("valid 300 K to 1000 K; used 298.15 K to 400 K"), "{text}");
    assert!(text.contains("no more than 2 K above 298.15 K"), "{text}");
}

#[test]
fn what_is_piped_is_plain_unless_colour_is_asked_for() {
    let escape = '\u{1b}';
    for call in [&["check", "-"][..], &["check", "-", "--color", "never"], &["--color", "auto", "check", "-"]]
    {
        assert!(!heatpath_reading(call, BAD.as_bytes()).stderr.contains(escape), "{call:?}");
    }
    let ran = heatpath_reading(&["check", "-", "--color", "always"], BAD.as_bytes());
    assert!(ran.stderr.contains(escape));
    assert!(!ran.stderr.contains("\u{1b}]8;"), "no links");
}

#[test]
fn the_environment_does_not_colour_what_is_piped() {
    let folder = scratch("environment");
    std::fs::write(folder.join("sheet.heat"), BAD).expect("the folder is ours");
    let mut call = command(&["check", "sheet.heat"]);
    call.current_dir(&folder).env("FORCE_COLOR", "1").env("CLICOLOR_FORCE", "1").env("COLUMNS", "20");
    let stderr = call.output().expect("the program starts").stderr;
    assert_eq!(String::from_utf8_lossy(&stderr), {
        let mut plain = command(&["check", "sheet.heat"]);
        String::from_utf8_lossy(&plain.current_dir(&folder).output().expect("the program starts").stderr)
            .into_owned()
    });
    assert!(!stderr.contains(&0x1b));
}

/// A pipe whose reader is gone, as behind `| head -1`.
fn closed_pipe() -> std::io::PipeWriter {
    let (reader, writer) = std::io::pipe().expect("a pipe");
    drop(reader);
    writer
}

#[test]
fn a_reader_that_has_read_enough_is_no_fault() {
    for call in
        [&["units"][..], &["explain"], &["--help"], &["check", "tests/corpus/kinds/points_added.heat"]]
    {
        let status = heatpath(call).status;
        let output = command(call).stdout(closed_pipe()).output().expect("it starts");
        assert_eq!(output.status.code(), status, "{call:?}");
        assert!(!String::from_utf8_lossy(&output.stderr).contains("standard output"), "{call:?}");
    }
}

#[test]
fn a_closed_pipe_keeps_the_status_that_the_sheet_earned() {
    let call = ["check", "--format", "json", "tests/corpus/syntax/decimal_comma.heat"];
    let output = command(&call).stdout(closed_pipe()).output().expect("it starts");
    assert_eq!((output.status.code(), output.stderr.as_slice()), (Some(2), &b""[..]));
    let output =
        command(&call[..1]).arg("no-such-sheet.heat").stderr(closed_pipe()).output().expect("it starts");
    assert_eq!((output.status.code(), output.stdout.as_slice()), (Some(2), &b""[..]));
}

#[cfg(target_os = "linux")]
#[test]
fn a_full_disk_is_told() {
    let full = std::fs::OpenOptions::new().write(true).open("/dev/full").expect("the device is there");
    let output = command(&["units"]).stdout(full).output().expect("it starts");
    let stderr = String::from_utf8_lossy(&output.stderr);
    assert_eq!(output.status.code(), Some(2));
    assert!(stderr.contains("standard output cannot be written"), "{stderr}");
}

#[test]
fn a_file_beyond_the_limit_is_refused_by_its_size() {
    let path = scratch("too_large").join("sheet.heat");
    let file = std::fs::File::create(&path).expect("the folder is ours");
    // No byte is written: the file is one hole.
    file.set_len(256_000_001).expect("the file is ours");
    let ran = heatpath(&["check".as_ref(), path.as_os_str()]);
    assert_eq!(ran.status, Some(2));
    assert!(ran.stderr.starts_with("error S110\n"), "{}", ran.stderr);
}

#[test]
fn species_lists_a_family_by_its_name() {
    let ran = heatpath(&["species", "Salts"]);
    assert_eq!((ran.status, ran.stderr.as_str()), (Some(0), ""));
    assert!(ran.stdout.contains("NaCl") && !ran.stdout.contains("Zn"), "{}", ran.stdout);
    let json: Value = serde_json::from_str(&heatpath(&["species", "salts", "--format", "json"]).stdout)
        .expect("the list is JSON");
    let families = json["species"].as_array().expect("a list of species").iter().map(|one| &one["family"]);
    assert!(families.clone().count() > 3 && families.clone().all(|family| family == "salts"), "{json}");
    let water = heatpath(&["species", "water"]);
    assert!(water.stdout.starts_with("H2O  water"), "a species comes before a family: {}", water.stdout);
}

/// The liquid of the library's ethanol has data to 390 K, and it boils at 424 K at 10 bar: what is latent is then that
/// of the stated boiling point, and the report says so.
#[test]
fn a_way_over_the_stated_boiling_point_is_told() {
    let sheet = "use C2H5OH from solvents\nstate cold = 1 kg of C2H5OH at 20 degC, 10 bar\nstate hot = cold at 170 degC\n\
        step boil: cold -> hot, at constant pressure\nresult q = boil.Q in kJ\n";
    let path = scratch("over_stated_boiling").join("sheet.heat");
    std::fs::write(&path, sheet).expect("the folder is ours");
    let ran = heatpath(&["run".as_ref(), path.as_os_str()]);
    assert_eq!(ran.status, Some(0), "{}", ran.stderr);
    let words = ran.stdout.split_whitespace().collect::<Vec<_>>().join(" ");
    assert!(words.contains("C2H5OH boils at 424.133 K at 1000 kPa abs"), "{}", ran.stdout);
    assert!(words.contains("the legs go over its stated boiling point"), "{}", ran.stdout);
}

/// A page shows all phases of a species, so that a state symbol picks none; a group of a formula is no symbol.
#[test]
fn a_species_is_found_with_its_state_symbol() {
    for (word, first) in [("CaCO3(s)", "CaCO3  calcium carbonate"), ("Ca(OH)2", "Ca(OH)2  calcium hydroxide")]
    {
        let ran = heatpath(&["species", word]);
        assert_eq!(ran.status, Some(0), "{}", ran.stderr);
        assert!(ran.stdout.starts_with(first), "{}", ran.stdout);
    }
}

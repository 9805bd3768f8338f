//! The sheets of the benches, and how they are lowered.

use heatpath::check::check_sheet;
use heatpath::library::NoFiles;
use heatpath::plan::{Lowered, Slot, lower};
use heatpath::program::Program;
use heatpath::source::Sources;
use std::fmt::Write;

/// The holding pot of the Tern Point works.
pub(crate) const ZINC_POT: &str = include_str!("../../tests/reference/zinc-pot.heat");

/// A sheet with its Program and its Plan.
pub(crate) fn lowered(text: &str) -> (Program, Lowered) {
    let mut sources = Sources::new();
    let file = sources.add("bench.heat", text);
    let checked = check_sheet(&mut sources, file, "", &NoFiles);
    let program = checked.program.expect("the sheet is right");
    let lowered = lower(&program).expect("no unknowns wait for each other");
    (program, lowered)
}

/// The slot of a named quantity.
pub(crate) fn slot((program, lowered): &(Program, Lowered), name: &str) -> Slot {
    let at =
        program.quantities.iter().position(|quantity| quantity.name == name).expect("a name of the sheet");
    lowered.map.quantities[at]
}

/// A sheet of so many lines: a species, then days of seven lines each.
pub(crate) fn long_sheet(lines: usize) -> String {
    let mut text = String::from(
        "species Zn \"zinc\" {
    formula Zn
    source \"invented for this sheet\"
    phase solid {
        cp = 22.40 J/(mol K) + 10.05e-3 J/(mol K2) * T for 273.15 K to 692.68 K
    }
    melting at 692.68 K takes 7.322 kJ/mol
    phase liquid {
        cp = 31.38 J/(mol K) for 692.68 K to 1180 K
    }
}
",
    );
    for day in 0..lines.saturating_sub(11) / 7 {
        let written = write!(
            text,
            "basis charge_{day} = 450 kg ± 2 % source \"weighbridge ticket {day}\"
let spare_{day} = charge_{day} * 5 % + 12.5 kg
# the day's charge
state cold_{day} = charge_{day} of Zn at 18 degC
state melt_{day} = cold_{day} at 460 degC
step heat_{day}: cold_{day} -> melt_{day}, at constant pressure
result need_{day} = (heat_{day}.Q + 1.8 kW * 3.5 h) / 62 % in MJ
"
        );
        written.expect("a text takes what is written");
    }
    text
}

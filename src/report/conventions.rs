//! The conventions that every sheet is worked by.

/// Conventions that hold for every report, in sentences: signs, flows, gases, condensed phases, molar masses. The model's
/// list begins with them; what holds for one sheet alone comes behind.
pub fn standing_conventions() -> Vec<String> {
    SENTENCES.iter().map(|sentence| (*sentence).to_owned()).collect()
}

const SENTENCES: &[&str] = &[
    "Heat Q and work W are positive into the system, ΔU = Q + W (IUPAC Green Book, 3rd ed., 2.11).",
    "For a flow the balance is the open one, ΔH = Q + W with W the shaft work; kinetic and potential energy are \
     neglected.",
    "Gases are ideal: their internal energy and enthalpy depend on temperature alone.",
    "Solids and liquids are incompressible.",
    "Molar masses follow from the formulas and the IUPAC standard atomic weights 2021, unless given.",
];

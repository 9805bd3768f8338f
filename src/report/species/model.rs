//! What a page says.

/// A phase with the temperatures between which it has data.
#[derive(Debug, Clone, PartialEq)]
pub struct PagePhase {
    /// Its name.
    pub name: String,
    /// `solid`, `liquid` or `gas`.
    pub class: &'static str,
    /// The symbol behind the species' name.
    pub symbol: String,
    /// Its data, K.
    pub kelvin: (f64, f64),
    /// Whether it is reached by heating, not by its symbol alone.
    pub linked: bool,
}

/// A transition.
#[derive(Debug, Clone, PartialEq)]
pub struct PageChange {
    /// From which phase to which.
    pub between: (String, String),
    /// Over which temperatures, K; the same twice at a point.
    pub kelvin: (f64, f64),
    /// What it takes, J/kg.
    pub latent: f64,
}

/// Heat capacity and enthalpy of a phase at a temperature.
#[derive(Debug, Clone, PartialEq)]
pub struct PageRow {
    /// The phase, by its place.
    pub phase: usize,
    /// The temperature, K.
    pub kelvin: f64,
    /// The heat capacity, J/(kg K).
    pub heat_capacity: f64,
    /// H(T) − H(298.15 K), J/kg, where 298.15 K is within the data.
    pub above_reference: Option<f64>,
}

/// A datum with its pedigree.
#[derive(Debug, Clone, PartialEq)]
pub struct PageDatum {
    /// The phase; empty for what belongs to the species.
    pub phase: String,
    /// As written.
    pub written: String,
    /// Where it is valid, K.
    pub valid_kelvin: Option<(f64, f64)>,
    /// Its interval, as written.
    pub interval: Option<String>,
    /// How far a second source lies, as written.
    pub spread: Option<String>,
    /// Where it comes from.
    pub source: Option<String>,
}

/// A species on its page.
#[derive(Debug, Clone, PartialEq)]
pub struct SpeciesPage {
    /// Its name.
    pub name: String,
    /// Its plain name.
    pub label: Option<String>,
    /// Its formula.
    pub formula: Option<String>,
    /// Its CAS number.
    pub cas: Option<String>,
    /// Its family.
    pub family: String,
    /// Its molar mass, kg/mol; without one everything is per kilogram.
    pub molar_mass: Option<f64>,
    /// Its phases in the order of heating.
    pub phases: Vec<PagePhase>,
    /// Its transitions.
    pub changes: Vec<PageChange>,
    /// The temperature above which it decomposes, K.
    pub decomposes: Option<f64>,
    /// Whether its enthalpies count from the elements.
    pub absolute: bool,
    /// Heat capacity and enthalpy at some temperatures.
    pub rows: Vec<PageRow>,
    /// Points for curves: phase, K, J/(kg K), J/kg above 298.15 K or above its lowest temperature.
    pub curve: Vec<(usize, f64, f64, f64)>,
    /// Its data.
    pub data: Vec<PageDatum>,
    /// Remarks in its block.
    pub remarks: Vec<String>,
}

impl SpeciesPage {
    /// Whether a word finds it: a part of its name, its plain name or its formula, or its CAS number.
    pub fn matches(&self, word: &str) -> bool {
        let word = word.trim().to_lowercase();
        let holds =
            |text: &Option<String>| text.as_ref().is_some_and(|text| text.to_lowercase().contains(&word));
        self.name.to_lowercase() == word
            || self.formula.as_ref().is_some_and(|formula| formula.to_lowercase() == word)
            || holds(&self.label)
            || self.cas.as_deref() == Some(word.as_str())
    }

    /// Whether a word is exactly its name, formula or CAS number, the case of letters included.
    pub fn is_named(&self, word: &str) -> bool {
        let word = word.trim();
        self.name == word || self.formula.as_deref() == Some(word) || self.cas.as_deref() == Some(word)
    }

    /// By what values per kilogram are multiplied to be shown: per mole where there is a molar mass.
    pub(super) fn basis(&self) -> (f64, &'static str) {
        match self.molar_mass {
            Some(molar_mass) => (molar_mass, "mol"),
            None => (1.0, "kg"),
        }
    }
}

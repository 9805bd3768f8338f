//! The SI prefixes (SI Brochure, 9th ed., table 7, with the four of 2022: 27th CGPM, resolution 3).

/// A decimal prefix.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Prefix {
    /// Its symbol, and other spellings of it.
    pub(crate) symbols: &'static [&'static str],
    /// Its name.
    pub(crate) name: &'static str,
    /// The power of ten that it stands for.
    pub(crate) ten: i32,
}

const fn prefix(symbols: &'static [&'static str], name: &'static str, ten: i32) -> Prefix {
    Prefix { symbols, name, ten }
}

/// All 24, from the largest. Micro is also written with the Greek letter and, in plain ASCII, with `u`.
pub(crate) const PREFIXES: [Prefix; 24] = [
    prefix(&["Q"], "quetta", 30),
    prefix(&["R"], "ronna", 27),
    prefix(&["Y"], "yotta", 24),
    prefix(&["Z"], "zetta", 21),
    prefix(&["E"], "exa", 18),
    prefix(&["P"], "peta", 15),
    prefix(&["T"], "tera", 12),
    prefix(&["G"], "giga", 9),
    prefix(&["M"], "mega", 6),
    prefix(&["k"], "kilo", 3),
    prefix(&["h"], "hecto", 2),
    prefix(&["da"], "deca", 1),
    prefix(&["d"], "deci", -1),
    prefix(&["c"], "centi", -2),
    prefix(&["m"], "milli", -3),
    prefix(&["\u{b5}", "\u{3bc}", "u"], "micro", -6),
    prefix(&["n"], "nano", -9),
    prefix(&["p"], "pico", -12),
    prefix(&["f"], "femto", -15),
    prefix(&["a"], "atto", -18),
    prefix(&["z"], "zepto", -21),
    prefix(&["y"], "yocto", -24),
    prefix(&["r"], "ronto", -27),
    prefix(&["q"], "quecto", -30),
];

/// Which prefixes a unit takes.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) enum Prefixes {
    /// None at all.
    None,
    /// Every SI prefix.
    All,
    /// Those with these names only.
    Only(&'static [&'static str]),
}

impl Prefixes {
    /// Whether this prefix is among them.
    pub(crate) fn admit(self, prefix: &Prefix) -> bool {
        match self {
            Prefixes::None => false,
            Prefixes::All => true,
            Prefixes::Only(names) => names.contains(&prefix.name),
        }
    }
}

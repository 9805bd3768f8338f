//! Names that mean different things to different people, with the spelled-out units that each can stand for.

/// Why a name is refused, and what can be written in its place.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(crate) struct Ambiguity {
    /// The spellings of the name.
    pub(crate) words: &'static [&'static str],
    /// Units that can be written in its place.
    pub(crate) choices: &'static [&'static str],
    /// What it means to whom.
    pub(crate) why: &'static str,
}

const fn ambiguity(
    words: &'static [&'static str],
    choices: &'static [&'static str],
    why: &'static str,
) -> Ambiguity {
    Ambiguity { words, choices, why }
}

const AMBIGUITIES: &[Ambiguity] = &[
    ambiguity(
        &["ton", "tons", "Ton", "TON"],
        &["t", "ton_short", "ton_long"],
        "a ton is 1000 kg, 2000 lb or 2240 lb, and a rate of cooling",
    ),
    ambiguity(
        &["gal", "gals", "gallon", "gallons", "Gal"],
        &["gal_US", "gal_UK"],
        "a gallon is 3.785 L in the United States and 4.546 L in the United Kingdom",
    ),
    ambiguity(
        &["gpm", "GPM"],
        &["gal_US/min", "gal_UK/min"],
        "a gallon is 3.785 L in the United States and 4.546 L in the United Kingdom",
    ),
    ambiguity(
        &["hp", "HP", "Hp", "bhp"],
        &["hp_mech", "hp_metric", "hp_electric"],
        "a horsepower is 745.7 W, 735.5 W or 746 W",
    ),
    ambiguity(
        &["oz", "ounce", "ounces"],
        &["oz_av", "oz_troy", "fl_oz_US", "fl_oz_UK"],
        "an ounce is a mass of 28.35 g, of 31.10 g for precious metals, or a volume",
    ),
    ambiguity(
        &["barrel", "barrels", "bbl", "bbls"],
        &["bbl_oil", "m3"],
        "a barrel is 158.987 L for petroleum, and other volumes for other goods",
    ),
    ambiguity(
        &["scf", "SCF", "scfs"],
        &["scf_60F", "Nm3", "Sm3"],
        "standard cubic feet have several reference temperatures and pressures",
    ),
    ambiguity(
        &["scfm", "SCFM"],
        &["scf_60F/min", "Nm3/h", "Sm3/h"],
        "standard cubic feet have several reference temperatures and pressures",
    ),
    ambiguity(
        &["Mscf", "MSCF", "MMscf", "MMSCF", "Mcf", "MCF"],
        &["kscf_60F", "scf_60F"],
        "M is a thousand in the gas trade and a million in the SI",
    ),
    ambiguity(
        &["MBtu", "MBTU"],
        &["kBtu", "MMBtu"],
        "M is a thousand in the fuel trade and a million in the SI",
    ),
    ambiguity(
        &["Mm3"],
        &["m3", "km3"],
        "Mm3 is a million cubic metres in the gas trade and a cube of 1000 km in the SI",
    ),
    ambiguity(
        &["therm", "therms", "Therm"],
        &["therm_EC", "therm_US", "MMBtu"],
        "a therm rests on one or another British thermal unit",
    ),
    ambiguity(
        &["Cal", "Calorie", "Calories", "calorie", "calories"],
        &["cal", "kcal"],
        "a calorie is 4.184 J, and 4.184 kJ on food",
    ),
    ambiguity(
        &["ppm", "ppmv", "ppmw"],
        &["mg/kg", "umol/mol", "mL/m3"],
        "parts per million are counted by mass, by amount or by volume",
    ),
    ambiguity(
        &["ppb", "ppbv", "ppbw"],
        &["ug/kg", "nmol/mol", "uL/m3"],
        "parts per billion are counted by mass, by amount or by volume",
    ),
    ambiguity(
        &["a", "yr", "year", "years"],
        &["d", "h"],
        "a year has 365, 365.25 or 366 days, and a plant fewer hours",
    ),
    ambiguity(&["month", "months"], &["d", "h"], "a month has 28 to 31 days"),
    ambiguity(&["deg", "degree", "degrees"], &["degC", "degF", "K"], "degrees belong to several scales"),
];

/// Why this name cannot be read, if it has more than one meaning.
pub(crate) fn ambiguous(word: &str) -> Option<&'static Ambiguity> {
    AMBIGUITIES.iter().find(|ambiguity| ambiguity.words.contains(&word))
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::read_unit;

    #[test]
    fn every_choice_can_be_written() {
        for ambiguity in AMBIGUITIES {
            for choice in ambiguity.choices {
                assert!(read_unit(choice).is_ok(), "{choice}");
            }
        }
    }

    #[test]
    fn a_name_stands_once() {
        let mut words: Vec<_> = AMBIGUITIES.iter().flat_map(|ambiguity| ambiguity.words).collect();
        words.sort();
        assert!(words.windows(2).all(|pair| pair[0] != pair[1]));
    }
}

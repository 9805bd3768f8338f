//! Units that are used beside the SI: times, the litre, the tonne, the watt hour.

use super::Entry;
use crate::units::dimension::Dimension;
use crate::units::factor::Factor;
use crate::units::prefix::Prefixes::{All, Only};

const ACCEPTED: &str = "SI Brochure, 9th ed. (2019), table 8";

const MINUTE: Factor = Factor::decimal(60.0, 0);
const HOUR: Factor = MINUTE.times(Factor::decimal(60.0, 0));
const DAY: Factor = HOUR.times(Factor::decimal(24.0, 0));

pub(super) const UNITS: &[Entry] = &[
    Entry::new("min", "minute", Dimension::TIME, MINUTE, ACCEPTED),
    Entry::new("h", "hour", Dimension::TIME, HOUR, ACCEPTED),
    Entry::new("d", "day", Dimension::TIME, DAY, ACCEPTED),
    Entry::new("L", "litre", Dimension::VOLUME, Factor::decimal(1.0, -3), ACCEPTED).or(&["l"]).prefixed(All),
    Entry::new("t", "tonne", Dimension::MASS, Factor::decimal(1.0, 3), ACCEPTED)
        .prefixed(Only(&["kilo", "mega", "giga"])),
    Entry::new("Wh", "watt hour", Dimension::ENERGY, HOUR, ACCEPTED).prefixed(All),
];

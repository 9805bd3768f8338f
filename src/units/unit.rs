//! A unit as it is used on a sheet.

use super::dimension::Dimension;
use super::kind::Kind;

/// Where the zero of a unit's scale lies.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Zero {
    /// At the zero of the quantity, as for almost every unit.
    None,
    /// So many of the unit above 0 K: `degC` has 273.15, `degF` has 459.67. The SI value is (value + zero) * factor.
    Kelvin(f64),
    /// At the site's atmosphere: the SI value of a gauge pressure is value * factor + atmosphere.
    Atmosphere,
}

/// Which calorie, or British thermal unit, an energy unit rests on.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash)]
pub enum Calorie {
    /// The thermochemical calorie, 4.184 J.
    Thermochemical,
    /// The International Table calorie, 4.1868 J, on which `Btu` rests.
    InternationalTable,
    /// One unit that mixes the two, such as `kcal/Btu`.
    Both,
}

impl Calorie {
    /// What a compound of the two rests on.
    pub(crate) fn with(self, other: Calorie) -> Calorie {
        if self == other { self } else { Calorie::Both }
    }
}

/// A unit: its text, its dimension and its way to SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Unit {
    /// The unit as written.
    pub text: String,
    /// Its dimension.
    pub dimension: Dimension,
    /// How many coherent SI units it is.
    pub factor: f64,
    /// Where the zero of its scale lies.
    pub zero: Zero,
    /// The calorie that it rests on, if any.
    pub flavour: Option<Calorie>,
    /// Whether it counts gas by a volume at reference conditions.
    pub(crate) gas_volume: bool,
}

impl Unit {
    /// The coherent SI unit of a dimension, written as a product of base units such as `kg m-1 s-2`.
    pub fn coherent(dimension: Dimension) -> Unit {
        Unit {
            text: dimension.to_string(),
            dimension,
            factor: 1.0,
            zero: Zero::None,
            flavour: None,
            gas_volume: false,
        }
    }

    /// A value in this unit as a value in the coherent SI unit. The site's atmosphere, in Pa, counts for gauge units
    /// only; their result is absolute.
    pub fn to_si(&self, value: f64, atmosphere_pa: f64) -> f64 {
        match self.zero {
            Zero::None => value * self.factor,
            Zero::Kelvin(zero) => (value + zero) * self.factor,
            Zero::Atmosphere => value * self.factor + atmosphere_pa,
        }
    }

    /// A value in the coherent SI unit as a value in this unit. The site's atmosphere, in Pa, counts for gauge units
    /// only.
    pub fn from_si(&self, si: f64, atmosphere_pa: f64) -> f64 {
        match self.zero {
            Zero::None => si / self.factor,
            Zero::Kelvin(zero) => si / self.factor - zero,
            Zero::Atmosphere => (si - atmosphere_pa) / self.factor,
        }
    }

    /// The kind of a literal in this unit.
    pub fn kind(&self) -> Kind {
        match self.zero {
            Zero::None => Kind::unsaid(self.dimension),
            Zero::Kelvin(_) | Zero::Atmosphere => Kind::Point,
        }
    }

    /// Whether it is the percent sign.
    pub fn is_percent(&self) -> bool {
        self.text == "%"
    }

    /// Whether it is a gauge pressure.
    pub fn is_gauge(&self) -> bool {
        self.zero == Zero::Atmosphere
    }

    /// Whether it counts gas by a volume at reference conditions, as `Nm3` and `Sm3/h` do.
    pub fn is_gas_volume(&self) -> bool {
        self.gas_volume
    }
}

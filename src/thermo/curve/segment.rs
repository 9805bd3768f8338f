//! One stretch of a heating curve on which enthalpy has one closed form.

use crate::numeric::find_rising_root;
use crate::thermo::HeatCapacity;

/// A stretch of the curve. Enthalpies are in J/kg, temperatures in K.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Segment {
    /// Lowest temperature.
    pub(super) lo: f64,
    /// Highest temperature; the lowest again on a plateau.
    pub(super) hi: f64,
    /// What is added to the body's own enthalpy.
    pub(super) offset: f64,
    /// Latent heat passed on the way from the curve's first phase to the start of the stretch.
    pub(super) latent: f64,
    /// What goes on in it.
    pub(super) body: Body,
}

/// What goes on in a stretch.
#[derive(Debug, Clone, PartialEq)]
pub(super) enum Body {
    /// One law of one phase.
    Range { phase: usize, law: HeatCapacity, entropy_offset: f64, line: Option<(f64, f64)> },
    /// A transition at one temperature, with its latent heat.
    Plateau { link: usize, height: f64 },
    /// A straight piece of a melting range.
    Melting { link: usize, melting: Melting },
}

/// A piece of a melting range in which the share of the upper phase rises in a straight line.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Melting {
    /// cp of the lower phase at the range's lower end.
    pub(super) cp_lower: f64,
    /// cp of the upper phase at the range's upper end.
    pub(super) cp_upper: f64,
    /// Share of the upper phase at the start of the piece.
    pub(super) share: f64,
    /// How the share rises, per K.
    pub(super) slope: f64,
    /// Latent heat of the whole range.
    pub(super) height: f64,
}

impl Melting {
    /// Share of the upper phase `x` kelvin into the piece.
    #[inline]
    pub(super) fn share_at(&self, x: f64) -> f64 {
        self.share + self.slope * x
    }

    /// cp without the latent heat.
    #[inline]
    pub(super) fn cp(&self, x: f64) -> f64 {
        let share = self.share_at(x);
        (1.0 - share) * self.cp_lower + share * self.cp_upper
    }

    /// `∫ cp dT` from the start of the piece.
    #[inline]
    pub(super) fn sensible(&self, x: f64) -> f64 {
        x * (self.cp_lower + (self.cp_upper - self.cp_lower) * (self.share + 0.5 * self.slope * x))
    }
}

impl Segment {
    /// Enthalpy at `t`, on a plateau at the upper phase's `share`.
    #[inline]
    pub(super) fn enthalpy(&self, t: f64, share: f64) -> f64 {
        match &self.body {
            Body::Range { line: Some((a, b)), .. } => self.offset + t * (a + 0.5 * b * t),
            Body::Range { law, .. } => self.offset + law.enthalpy(t),
            Body::Plateau { height, .. } => self.offset + share * height,
            Body::Melting { melting, .. } => {
                let x = t - self.lo;
                self.offset + melting.sensible(x) + melting.slope * x * melting.height
            }
        }
    }

    /// Latent heat passed from the curve's first phase up to here.
    #[inline]
    pub(super) fn latent_at(&self, t: f64, share: f64) -> f64 {
        match &self.body {
            Body::Range { .. } => self.latent,
            Body::Plateau { height, .. } => self.latent + share * height,
            Body::Melting { melting, .. } => self.latent + melting.slope * (t - self.lo) * melting.height,
        }
    }

    /// cp at `t`, the latent heat of a melting range left out; infinite on a plateau.
    #[inline]
    pub(super) fn cp(&self, t: f64) -> f64 {
        match &self.body {
            Body::Range { line: Some((a, b)), .. } => a + b * t,
            Body::Range { law, .. } => law.value(t),
            Body::Plateau { .. } => f64::INFINITY,
            Body::Melting { melting, .. } => melting.cp(t - self.lo),
        }
    }

    /// How enthalpy rises with temperature, latent heat of a melting range included.
    #[inline]
    pub(super) fn slope(&self, t: f64) -> f64 {
        match &self.body {
            Body::Melting { melting, .. } => melting.cp(t - self.lo) + melting.slope * melting.height,
            Body::Range { .. } | Body::Plateau { .. } => self.cp(t),
        }
    }

    /// Entropy above the phase's lowest temperature, in J/(kg K); `NaN` in a transition.
    #[inline]
    pub(super) fn entropy(&self, t: f64) -> f64 {
        match &self.body {
            Body::Range { law, entropy_offset, .. } => entropy_offset + law.entropy(t),
            Body::Plateau { .. } | Body::Melting { .. } => f64::NAN,
        }
    }

    /// The temperature between `lo` and `hi` at which enthalpy lies `rise` above its value at `lo`, of
    /// `whole` that it rises up to `hi`.
    #[inline]
    pub(super) fn temperature_after(&self, (lo, hi): (f64, f64), rise: f64, whole: f64) -> f64 {
        let (first, second) = match &self.body {
            Body::Plateau { .. } => return lo,
            Body::Range { line: Some((a, b)), .. } => (a + b * lo, *b),
            Body::Melting { melting, .. } => {
                let x = lo - self.lo;
                let turn = (melting.cp_upper - melting.cp_lower) * melting.slope;
                (melting.cp(x) + melting.slope * melting.height, turn)
            }
            Body::Range { law, line: None, .. } => {
                let target = law.enthalpy(lo) + rise;
                let start = lo + (hi - lo) * (rise / whole);
                let f = |t: f64| (law.enthalpy(t) - target, law.value(t));
                return find_rising_root(f, (lo, hi), start).map_or(f64::NAN, |root| root.x);
            }
        };
        // first x + second x²/2 = rise, in the form that loses no digits.
        let root = (first * first + 2.0 * second * rise).sqrt();
        (lo + 2.0 * rise / (first + root)).min(hi)
    }
}

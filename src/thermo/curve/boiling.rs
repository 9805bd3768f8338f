//! Tracks at a pressure: boiling where a vapour-pressure law has it.

use uom::si::f64::{AvailableEnergy, Pressure};

use super::assemble::HeatingCurve;
use super::locate::LocateError;
use super::place::{Allowance, Pin, Place};
use super::saturation::Saturation;
use super::segment::Body;
use super::track::{BOILING_BAND, Course, Piece, Track, lay_track};
use crate::thermo::constants::STANDARD_ATMOSPHERE;
use crate::thermo::si::typed;

/// Where a link boils at a pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
enum Boiling {
    /// Where the curve has it.
    Normal,
    /// Here, and the data of both phases reach it.
    At(f64),
    /// Liquid up to the first temperature, gas from the second; data or law do not lead across.
    Between(Option<f64>, Option<f64>),
}

/// A track as it is at a pressure.
pub(in crate::thermo) enum Moved {
    /// In one piece.
    Whole(Track),
    /// In two that do not meet.
    Parted(Box<Halves>),
}

/// The stretches of a track on both sides of a boiling that cannot be crossed.
pub(in crate::thermo) struct Halves {
    below: Option<Track>,
    above: Option<Track>,
    error: LocateError,
    /// Why the plateau itself is refused, where its place is known.
    short: Option<LocateError>,
    ends: (f64, f64),
}

impl Halves {
    /// The half that holds `t`.
    pub(super) fn at(&self, t: f64) -> Result<&Track, LocateError> {
        let half = if t <= self.ends.0 { self.below.as_ref() } else { None };
        let other = if t >= self.ends.1 { self.above.as_ref() } else { None };
        half.or(other).ok_or(self.error)
    }

    /// Why a state on the plateau is refused.
    pub(super) fn on_plateau(&self) -> LocateError {
        self.short.unwrap_or(self.error)
    }

    /// The half in which a temperature is sought: of the liquid above 101.325 kPa, of the gas below.
    fn sought(self, pressure: f64) -> Option<Track> {
        if pressure >= STANDARD_ATMOSPHERE { self.below.or(self.above) } else { self.above.or(self.below) }
    }
}

impl HeatingCurve {
    /// Whether a vapour-pressure law moves the boiling of a link.
    pub(super) fn boils_by_law(&self, link: usize) -> bool {
        self.saturation.is_some_and(|saturation| saturation.link == link)
    }

    /// Whether a vapour-pressure law moves the boiling of the curve.
    #[inline]
    pub(in crate::thermo) fn follows_law(&self) -> bool {
        self.saturation.is_some()
    }

    /// Whether a link boils at `t`, and that is not where the curve has it.
    pub(super) fn boils_off(&self, link: usize, t: f64) -> bool {
        self.saturation.is_some_and(|saturation| saturation.link == link && saturation.normal != t)
    }

    /// The enthalpies of the phases below and above a link at `t`.
    pub(super) fn enthalpies_beside(&self, link: usize, t: f64) -> (f64, f64) {
        (self.phase_enthalpy(link, t), self.phase_enthalpy(link + 1, t))
    }

    /// The plateau of a link, with the segment it has on the curve, moved to `t`.
    pub(super) fn moved_plateau(&self, link: usize, segment: usize, t: f64) -> Piece {
        let (h_lo, h_hi) = self.enthalpies_beside(link, t);
        Piece { segment, lo: t, hi: t, h_lo, h_hi, plateau: true, melting: false }
    }

    fn boiling(&self, saturation: &Saturation, pressure: f64, allowance: &Allowance) -> Boiling {
        if pressure == STANDARD_ATMOSPHERE {
            return Boiling::Normal;
        }
        let link = saturation.link;
        match saturation.temperature(pressure) {
            Some(t) => {
                let reach = |phase: usize| {
                    let (lo, hi) = self.reach(phase, allowance);
                    t >= lo && t <= hi
                };
                let (below, above) = self.enthalpies_beside(link, t);
                let ends = self.reach(link + 1, allowance).1 <= t;
                if reach(link) && reach(link + 1) && !ends && above > below {
                    Boiling::At(t)
                } else {
                    Boiling::Between(Some(t), Some(t))
                }
            }
            None if (pressure / STANDARD_ATMOSPHERE - 1.0).abs() <= BOILING_BAND => Boiling::Normal,
            None => {
                let (mut below, mut above) = (None, None);
                for (known, t) in saturation.anchors() {
                    if known <= pressure {
                        below = Some(below.map_or(t, |best: f64| best.max(t)));
                    } else {
                        above = Some(above.map_or(t, |best: f64| best.min(t)));
                    }
                }
                Boiling::Between(below, above)
            }
        }
    }

    /// The track as it is at a pressure, where a law makes it another.
    pub(in crate::thermo) fn moved(
        &self,
        track: &Track,
        pressure: f64,
        allowance: &Allowance,
    ) -> Option<Moved> {
        let saturation = self.saturation.as_ref().filter(|_| track.moves)?;
        let link = saturation.link;
        match self.boiling(saturation, pressure, allowance) {
            Boiling::Normal => None,
            Boiling::At(t) => {
                Some(Moved::Whole(lay_track(self, track.first, track.last, Course::Moved(link, t))))
            }
            Boiling::Between(below, above) => {
                let liquid = |t: f64| lay_track(self, track.first, link, Course::Cut(f64::NEG_INFINITY, t));
                let gas = |t: f64| lay_track(self, link + 1, track.last, Course::Cut(t, f64::INFINITY));
                Some(Moved::Parted(Box::new(Halves {
                    below: below.map(liquid).filter(|half| !half.pieces.is_empty()),
                    above: above.map(gas).filter(|half| !half.pieces.is_empty()),
                    error: saturation.outside(below, above),
                    short: below.filter(|_| below == above).map(|t| self.short_of(link, t, allowance)),
                    ends: (below.unwrap_or(f64::NEG_INFINITY), above.unwrap_or(f64::INFINITY)),
                })))
            }
        }
    }

    /// Which phase has no data at the boiling temperature `t`.
    fn short_of(&self, link: usize, t: f64, allowance: &Allowance) -> LocateError {
        let reaches = |phase: usize| {
            let (lo, hi) = self.reach(phase, allowance);
            t >= lo && t <= hi
        };
        let phase = if reaches(link) { link + 1 } else { link };
        let (lo, hi) = self.reach(phase, allowance);
        LocateError::OutsideRange { phase, lo: typed(lo), hi: typed(hi) }
    }

    /// The track along which a temperature is sought at a pressure, where a law makes it another.
    pub(in crate::thermo) fn sought_track(
        &self,
        pin: Pin,
        pressure: f64,
        allowance: &Allowance,
    ) -> Option<Track> {
        self.saturation.as_ref()?;
        match self.moved(self.track(pin)?, pressure, allowance)? {
            Moved::Whole(track) => Some(track),
            Moved::Parted(halves) => halves.sought(pressure),
        }
    }

    /// The boiling link and where it boils at a pressure as far as the data reach by themselves; none where that is
    /// where the curve has it.
    pub(super) fn boiling_moved(&self, pressure: f64) -> Option<(usize, f64)> {
        let saturation = self.saturation.as_ref()?;
        let t = match self.boiling(saturation, pressure, Allowance::none()) {
            Boiling::At(t) => t,
            Boiling::Normal | Boiling::Between(..) => saturation.normal,
        };
        Some((saturation.link, t))
    }

    /// As [`HeatingCurve::latent`], boiling where a vapour-pressure law has it at `pressure`.
    #[inline]
    pub fn latent_at(&self, place: Place, pressure: Pressure) -> AvailableEnergy {
        if self.saturation.is_none() { self.latent(place) } else { self.latent_by_law(place, pressure) }
    }

    #[inline(never)]
    fn latent_by_law(&self, place: Place, pressure: Pressure) -> AvailableEnergy {
        let (Some((link, t)), Some(segment)) =
            (self.boiling_moved(pressure.value), self.segments.get(place.segment))
        else {
            return self.latent(place);
        };
        let joint = self.joints.get(link).map_or(f64::NAN, |joint| joint.latent);
        let (below, above) = self.enthalpies_beside(link, t);
        let height = if self.boils_off(link, t) { above - below } else { joint };
        typed(match segment.body {
            Body::Plateau { link: at, .. } if at == link => segment.latent + place.share * height,
            Body::Range { phase, .. } if phase == link + 1 => segment.latent + (height - joint),
            _ => segment.latent_at(place.temperature, place.share),
        })
    }
}

//! Tracks: the stretches of a heating curve that a pin leads along, as rising pieces from end to end.

use uom::si::f64::{AvailableEnergy, ThermodynamicTemperature};

use super::assemble::HeatingCurve;
use super::data::PhaseClass;
use super::place::{Allowance, Pin};
use super::segment::Body;
use crate::thermo::constants::STANDARD_ATMOSPHERE;
use crate::thermo::si::typed;

/// By how much, relative to 101.325 kPa, the pressure may differ before a boiling point no longer holds.
pub(super) const BOILING_BAND: f64 = 0.02;

/// Part of a segment, with the enthalpies at its ends.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(in crate::thermo) struct Piece {
    pub(in crate::thermo) segment: usize,
    pub(in crate::thermo) lo: f64,
    pub(in crate::thermo) hi: f64,
    pub(in crate::thermo) h_lo: f64,
    pub(in crate::thermo) h_hi: f64,
    pub(in crate::thermo) plateau: bool,
    pub(super) melting: bool,
}

/// Linked phases `first..=last` with the pieces that lead through them, by rising temperature and enthalpy.
#[derive(Debug, Clone, PartialEq, Default)]
pub(in crate::thermo) struct Track {
    pub(super) first: usize,
    pub(super) last: usize,
    pub(in crate::thermo) pieces: Vec<Piece>,
    /// Point transitions on the way: temperature and link.
    pub(super) points: Vec<(f64, usize)>,
    /// The boiling or sublimation point on the way.
    pub(super) boiling: Option<f64>,
    /// Whether a vapour-pressure law moves that point.
    pub(super) moves: bool,
    /// Where boiling cuts the track at the pressure that it was laid for.
    pub(super) cut: Option<(f64, f64)>,
    /// Whether the species' decomposition bounds it.
    pub(super) decomposes: bool,
}

impl Track {
    /// Whether a point transition lies exactly at `t`.
    #[inline]
    pub(in crate::thermo) fn changes_at(&self, t: f64) -> bool {
        self.points.iter().any(|(at, _)| *at == t)
    }

    /// Whether the boiling point on the way, if there is one, holds at the pressure.
    #[inline]
    pub(super) fn boils_at(&self, pressure: f64) -> bool {
        let (least, most) =
            ((1.0 - BOILING_BAND) * STANDARD_ATMOSPHERE, (1.0 + BOILING_BAND) * STANDARD_ATMOSPHERE);
        self.boiling.is_none()
            || (if self.moves {
                pressure == STANDARD_ATMOSPHERE
            } else {
                pressure >= least && pressure <= most
            })
    }
}

/// The tracks of a curve.
#[derive(Debug, Clone, PartialEq, Default)]
pub(super) struct Tracks {
    stable: Track,
    classes: [Option<Track>; 3],
    phases: Vec<Track>,
}

impl Tracks {
    #[inline]
    pub(super) fn get(&self, pin: Pin) -> Option<&Track> {
        let [solid, liquid, gas] = &self.classes;
        match pin {
            Pin::Stable => Some(&self.stable),
            Pin::Class(PhaseClass::Solid) => solid.as_ref(),
            Pin::Class(PhaseClass::Liquid) => liquid.as_ref(),
            Pin::Class(PhaseClass::Gas) => gas.as_ref(),
            Pin::Phase(phase) => self.phases.get(phase),
        }
    }
}

/// Lays every track of a curve.
pub(super) fn lay_tracks(curve: &HeatingCurve) -> Tracks {
    let last = curve.stable.end.saturating_sub(1);
    let lay_track = |curve: &HeatingCurve, first, last| lay_track(curve, first, last, Course::Normal);
    let class = |class| class_phases(curve, class).map(|(first, last)| lay_track(curve, first, last));
    Tracks {
        stable: lay_track(curve, curve.stable.start, last),
        classes: [class(PhaseClass::Solid), class(PhaseClass::Liquid), class(PhaseClass::Gas)],
        phases: (0..curve.phases.len()).map(|phase| lay_track(curve, phase, phase)).collect(),
    }
}

/// The linked phases of a class: those of the stable chain, else the first that are met.
fn class_phases(curve: &HeatingCurve, class: PhaseClass) -> Option<(usize, usize)> {
    let of_class = |phase: &usize| curve.phases.get(*phase).is_some_and(|phase| phase.class == class);
    let first = curve.stable.clone().find(of_class).or_else(|| (0..curve.phases.len()).find(of_class))?;
    let linked = |phase: &usize| curve.joints.get(phase - 1).is_some_and(|joint| joint.span.is_some());
    let last = (first + 1..curve.phases.len()).take_while(|phase| linked(phase) && of_class(phase)).last();
    Some((first, last.unwrap_or(first)))
}

/// How boiling enters a track.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) enum Course {
    /// Where the curve has it.
    Normal,
    /// The plateau of this link moved to this temperature.
    Moved(usize, f64),
    /// Nowhere: the track ends at these temperatures at the latest.
    Cut(f64, f64),
}

pub(super) fn lay_track(curve: &HeatingCurve, first: usize, last: usize, course: Course) -> Track {
    let decomposes = curve.stable.contains(&first) && curve.decomposes_at.is_some();
    let mut track = Track { first, last, decomposes, ..Track::default() };
    let (floor, ceiling) = match course {
        Course::Normal => (f64::NEG_INFINITY, f64::INFINITY),
        Course::Moved(..) => {
            track.cut = Some((f64::NEG_INFINITY, f64::INFINITY));
            (f64::NEG_INFINITY, f64::INFINITY)
        }
        Course::Cut(floor, ceiling) => {
            track.cut = Some((floor, ceiling));
            (floor, ceiling)
        }
    };
    let mut from = curve.phases.get(first).map_or(f64::NAN, |phase| phase.lo.max(floor));
    for index in first..=last {
        let Some(phase) = curve.phases.get(index) else { continue };
        let joint = curve.joints.get(index).filter(|_| index < last);
        let moved = match course {
            Course::Moved(link, t) if link == index => Some(t),
            _ => None,
        };
        let span = moved.map(|t| (t, t)).or(joint.and_then(|joint| joint.span));
        let to = span.map_or(phase.hi.min(ceiling), |(begin, _)| begin);
        lay_pieces(curve, phase.segments.clone(), (from, to), &mut track.pieces);
        if let (Some(joint), Some((begin, end))) = (joint, span) {
            match moved {
                Some(t) => track.pieces.push(curve.moved_plateau(index, joint.segments.start, t)),
                None => lay_pieces(curve, joint.segments.clone(), (begin, end), &mut track.pieces),
            }
            if begin == end {
                track.points.push((begin, index));
            }
            if curve.phases.get(index + 1).is_some_and(|upper| upper.class == PhaseClass::Gas) {
                track.boiling = Some(begin);
                track.moves = moved.is_none() && curve.boils_by_law(index);
            }
            from = end;
        }
    }
    track
}

/// The pieces of `segments` that lie between two temperatures; the outermost reach them exactly.
fn lay_pieces(
    curve: &HeatingCurve,
    segments: std::ops::Range<usize>,
    (from, to): (f64, f64),
    pieces: &mut Vec<Piece>,
) {
    let last = segments.end.saturating_sub(1);
    let begin = segments.start;
    for at in segments {
        let Some(segment) = curve.segments.get(at) else { continue };
        let lo = if at == begin { from } else { segment.lo.max(from) };
        let hi = if at == last { to } else { segment.hi.min(to) };
        let plateau = matches!(segment.body, Body::Plateau { .. });
        if lo < hi || plateau {
            let (h_lo, h_hi) = (segment.enthalpy(lo, 0.0), segment.enthalpy(hi, 1.0));
            let melting = matches!(segment.body, Body::Melting { .. });
            pieces.push(Piece { segment: at, lo, hi, h_lo, h_hi, plateau, melting });
        }
    }
}

/// A breakpoint of a track.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Edge {
    /// Where it is.
    pub temperature: ThermodynamicTemperature,
    /// Enthalpy on its lower side.
    pub below: AvailableEnergy,
    /// Enthalpy on its upper side; larger than `below` on a plateau alone.
    pub above: AvailableEnergy,
}

/// The temperatures between which a track may be used.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(in crate::thermo) struct Limits {
    pub(in crate::thermo) lo: f64,
    pub(in crate::thermo) hi: f64,
    /// The lowest temperature is a boiling point, and only the gas counts.
    pub(in crate::thermo) gas_only: bool,
    /// The highest temperature is a boiling point, and only the liquid counts.
    pub(in crate::thermo) condensed_only: bool,
    /// The highest temperature is where the species decomposes.
    pub(super) decomposes: bool,
}

impl HeatingCurve {
    /// The breakpoints of the track that `pin` leads along, by rising temperature, its two ends among them;
    /// none where the species has no such phase.
    pub fn edges(&self, pin: Pin) -> impl Iterator<Item = Edge> + '_ {
        let pieces = self.track(pin).map_or(&[][..], |track| &track.pieces);
        let inner = pieces.iter().zip(pieces.iter().skip(1)).map(|(a, b)| (a.hi, a.h_hi, b.h_lo));
        let ends = pieces.first().map(|p| (p.lo, p.h_lo, p.h_lo));
        let last = pieces.last().map(|p| (p.hi, p.h_hi, p.h_hi));
        let mut edges: Vec<(f64, f64, f64)> = Vec::with_capacity(pieces.len() + 1);
        for (t, below, above) in ends.into_iter().chain(inner).chain(last) {
            match edges.last_mut() {
                Some((at, _, top)) if *at == t => *top = above,
                _ => edges.push((t, below, above)),
            }
        }
        edges.into_iter().map(|(t, below, above)| Edge {
            temperature: typed(t),
            below: typed(below),
            above: typed(above),
        })
    }

    /// Where a track may be used: its data, widened by what is allowed, cut where the species decomposes.
    #[inline]
    pub(super) fn data_limits(&self, track: &Track, allowance: &Allowance) -> Limits {
        let lo = track.pieces.first().map_or(f64::NAN, |piece| piece.lo);
        let hi = track.pieces.last().map_or(f64::NAN, |piece| piece.hi);
        let mut limits = Limits { lo, hi, gas_only: false, condensed_only: false, decomposes: false };
        if !allowance.is_none() {
            self.widen(&mut limits, track, allowance);
        }
        if track.decomposes {
            self.cut(&mut limits, track, allowance);
        }
        limits
    }

    /// As [`HeatingCurve::data_limits`], and cut at the boiling point when the pressure is not the one it
    /// holds at.
    #[inline]
    pub(in crate::thermo) fn limits(&self, track: &Track, allowance: &Allowance, pressure: f64) -> Limits {
        let mut limits = self.data_limits(track, allowance);
        if let Some((floor, ceiling)) = track.cut {
            if limits.hi >= ceiling {
                (limits.hi, limits.condensed_only) = (ceiling, true);
            }
            if limits.lo <= floor {
                (limits.lo, limits.gas_only) = (floor, true);
            }
        } else if let Some(boiling) = track.boiling {
            if pressure > (1.0 + BOILING_BAND) * STANDARD_ATMOSPHERE && limits.hi >= boiling {
                (limits.hi, limits.condensed_only) = (boiling, true);
            }
            if pressure < (1.0 - BOILING_BAND) * STANDARD_ATMOSPHERE && limits.lo <= boiling {
                (limits.lo, limits.gas_only) = (boiling, true);
            }
        }
        limits
    }

    /// A table ends where it ends: only other laws can be stretched.
    fn widen(&self, limits: &mut Limits, track: &Track, allowance: &Allowance) {
        let (floor, ceiling) = (self.law_span(track.pieces.first()).0, self.law_span(track.pieces.last()).1);
        limits.lo = limits.lo.min(allowance.lowest(track.first).max(floor));
        limits.hi = limits.hi.max(allowance.highest(track.last).min(ceiling));
    }

    /// Between which temperatures the law of a piece can be asked at all.
    fn law_span(&self, piece: Option<&Piece>) -> (f64, f64) {
        let everywhere = (0.0, f64::INFINITY);
        let segment = piece.and_then(|piece| self.segments.get(piece.segment));
        match segment.map(|segment| &segment.body) {
            Some(Body::Range { law, .. }) => law.span().map_or(everywhere, |(lo, hi)| (lo.value, hi.value)),
            _ => everywhere,
        }
    }

    /// The temperatures between which a phase may be used: its data, widened by what is allowed.
    pub(super) fn reach(&self, phase: usize, allowance: &Allowance) -> (f64, f64) {
        let Some(track) = self.track(Pin::Phase(phase)) else { return (f64::NAN, f64::NAN) };
        let lo = track.pieces.first().map_or(f64::NAN, |piece| piece.lo);
        let hi = track.pieces.last().map_or(f64::NAN, |piece| piece.hi);
        let mut limits = Limits { lo, hi, gas_only: false, condensed_only: false, decomposes: false };
        if !allowance.is_none() {
            self.widen(&mut limits, track, allowance);
        }
        (limits.lo, limits.hi)
    }

    fn cut(&self, limits: &mut Limits, track: &Track, allowance: &Allowance) {
        let Some(decomposition) = self.decomposes_at.filter(|t| *t < limits.hi) else { return };
        let allowed = (track.first..=track.last).map(|phase| allowance.highest(phase));
        let end = allowed.fold(decomposition, f64::max);
        if end < limits.hi {
            limits.hi = end;
            limits.decomposes = end == decomposition;
        }
    }
}

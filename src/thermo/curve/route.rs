//! The way from one place to another, leg by leg.

use uom::si::f64::{AvailableEnergy, Pressure, ThermodynamicTemperature};

use super::assemble::{HeatingCurve, segment_at};
use super::place::Place;
use super::segment::Body;
use crate::thermo::constants::{REFERENCE_TEMPERATURE, STANDARD_ATMOSPHERE};
use crate::thermo::si::typed;

/// What happens on a leg.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum LegKind {
    /// One phase, by its index, is heated or cooled.
    Sensible {
        /// The phase.
        phase: usize,
    },
    /// The mush in a melting range is heated or cooled, its latent heat left out.
    SensibleInRange {
        /// The link.
        link: usize,
    },
    /// One phase turns into another, as far as the route goes.
    Transition {
        /// The phase that turns.
        from: usize,
        /// The phase it turns into.
        to: usize,
        /// The link; none between phases apart, where the formation enthalpies say what it takes.
        link: Option<usize>,
    },
}

/// One leg of a route.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Leg {
    /// What happens.
    pub kind: LegKind,
    /// Where it begins.
    pub from: ThermodynamicTemperature,
    /// Where it ends.
    pub to: ThermodynamicTemperature,
    /// What it takes.
    pub enthalpy: AvailableEnergy,
}

impl Leg {
    fn reversed(self) -> Leg {
        let kind = match self.kind {
            LegKind::Transition { from, to, link } => LegKind::Transition { from: to, to: from, link },
            other => other,
        };
        Leg { kind, from: self.to, to: self.from, enthalpy: -self.enthalpy }
    }
}

/// Where a place stands among the phases and links: phase `i` is stop `2 i`, the link above it stop `2 i +
/// 1`.
#[derive(Debug, Clone, Copy, PartialEq)]
struct Stop {
    at: usize,
    temperature: f64,
    /// Share of the upper phase, in a link.
    share: f64,
}

impl Stop {
    fn phase(phase: usize, temperature: f64) -> Stop {
        Stop { at: 2 * phase, temperature, share: 0.0 }
    }
}

/// A boiling link and where it boils, if not where the curve has it.
type Moved = Option<(usize, f64)>;

/// A stop as it is, or on the plateau of a link its lower and its upper phase, by weight.
fn apart(stop: Stop, link: usize) -> Vec<(f64, Stop)> {
    if stop.at != 2 * link + 1 {
        return vec![(1.0, stop)];
    }
    let phase = |phase: usize| Stop::phase(phase, stop.temperature);
    vec![(1.0 - stop.share, phase(link)), (stop.share, phase(link + 1))]
}

impl HeatingCurve {
    /// The legs from one place to another, in order; their sum is the difference of the enthalpies. The way
    /// leads through every phase and transition between; a phase that stands past its transition first goes
    /// back to it. Between phases apart it crosses over at 298.15 K, or at the nearest temperature at which
    /// both have data.
    pub fn route(&self, from: Place, to: Place) -> Vec<Leg> {
        self.route_at(from, to, typed(STANDARD_ATMOSPHERE))
    }

    /// As [`HeatingCurve::route`], boiling where a vapour-pressure law has it at `pressure`. Of a wet vapour that
    /// stands at another pressure, liquid and gas go their ways each.
    pub fn route_at(&self, from: Place, to: Place, pressure: Pressure) -> Vec<Leg> {
        let (Some(start), Some(end)) = (self.stop(from), self.stop(to)) else { return Vec::new() };
        let Some((link, t)) = self.boiling_moved(pressure.value) else { return self.way(start, end, None) };
        let stands_off = |stop: Stop| stop.at == 2 * link + 1 && stop.temperature != t;
        if !stands_off(start) && !stands_off(end) {
            return self.way(start, end, Some((link, t)));
        }
        let mut legs = Vec::new();
        let mut ends = apart(end, link);
        for (weight, start) in apart(start, link) {
            let mut left = weight;
            for (open, end) in &mut ends {
                let share = open.min(left);
                if share > 0.0 {
                    let part = self.way(start, *end, Some((link, t)));
                    legs.extend(part.into_iter().map(|leg| Leg { enthalpy: leg.enthalpy * share, ..leg }));
                    left -= share;
                    *open -= share;
                }
            }
        }
        legs
    }

    fn way(&self, start: Stop, end: Stop, moved: Moved) -> Vec<Leg> {
        let mut legs = Vec::new();
        if self.linked(start.at / 2, end.at.div_ceil(2)) {
            self.along(start, end, moved, &mut legs);
        } else {
            let crossing = self.crossing(start.at / 2, end.at / 2);
            let (leave, enter) = (Stop::phase(start.at / 2, crossing.0), Stop::phase(end.at / 2, crossing.1));
            self.along(start, leave, moved, &mut legs);
            legs.push(self.cross(leave, enter));
            self.along(enter, end, moved, &mut legs);
        }
        legs
    }

    fn stop(&self, place: Place) -> Option<Stop> {
        let at = match &self.segments.get(place.segment)?.body {
            Body::Range { phase, .. } => 2 * phase,
            Body::Plateau { link, .. } | Body::Melting { link, .. } => 2 * link + 1,
        };
        Some(Stop { at, temperature: place.temperature, share: place.share })
    }

    /// Whether transitions link the two phases, in either order.
    fn linked(&self, a: usize, b: usize) -> bool {
        let (low, high) = (a.min(b), a.max(b));
        (low..high).all(|link| self.joints.get(link).is_some_and(|joint| joint.span.is_some()))
    }

    fn along(&self, start: Stop, end: Stop, moved: Moved, legs: &mut Vec<Leg>) {
        let place = |stop: Stop| (stop.at, stop.share, stop.temperature);
        if place(start) <= place(end) {
            self.upwards(start, end, moved, legs);
        } else {
            let first = legs.len();
            self.upwards(end, start, moved, legs);
            if let Some(new) = legs.get_mut(first..) {
                new.reverse();
                new.iter_mut().for_each(|leg| *leg = leg.reversed());
            }
        }
    }

    fn upwards(&self, start: Stop, end: Stop, moved: Moved, legs: &mut Vec<Leg>) {
        let span_of = |link: usize| match moved {
            Some((boils, t)) if boils == link => Some((t, t)),
            _ => self.link_span(link),
        };
        for at in start.at..=end.at {
            let index = at / 2;
            let from = (at == start.at).then_some(start);
            let to = (at == end.at).then_some(end);
            if at % 2 == 0 {
                let below = index.checked_sub(1).and_then(span_of).map_or(f64::NAN, |span| span.1);
                let above = span_of(index).map_or(f64::NAN, |span| span.0);
                let from = from.map_or(below, |stop| stop.temperature);
                let to = to.map_or(above, |stop| stop.temperature);
                self.sensible(index, (from, to), legs);
            } else if let Some((begin, finish)) = span_of(index) {
                let from = from.unwrap_or(Stop { at, temperature: begin, share: 0.0 });
                let to = to.unwrap_or(Stop { at, temperature: finish, share: 1.0 });
                self.through(index, from, to, legs);
            }
        }
    }

    fn link_span(&self, link: usize) -> Option<(f64, f64)> {
        self.joints.get(link).and_then(|joint| joint.span)
    }

    fn sensible(&self, phase: usize, (from, to): (f64, f64), legs: &mut Vec<Leg>) {
        if from != to {
            let rise = self.phase_enthalpy(phase, to) - self.phase_enthalpy(phase, from);
            legs.push(leg(LegKind::Sensible { phase }, (from, to), rise));
        }
    }

    /// Part of a transition: in a melting range the heating of the mush first, then the latent share.
    fn through(&self, link: usize, from: Stop, to: Stop, legs: &mut Vec<Leg>) {
        let Some(joint) = self.joints.get(link) else { return };
        let span = (from.temperature, to.temperature);
        let height = if self.boils_off(link, from.temperature) {
            let (below, above) = self.enthalpies_beside(link, from.temperature);
            above - below
        } else {
            joint.latent
        };
        let latent = (to.share - from.share) * height;
        if from.temperature != to.temperature {
            let rise =
                self.range_sensible(link, to.temperature) - self.range_sensible(link, from.temperature);
            legs.push(leg(LegKind::SensibleInRange { link }, span, rise));
        }
        if from.share != to.share {
            legs.push(leg(LegKind::Transition { from: link, to: link + 1, link: Some(link) }, span, latent));
        }
    }

    /// Enthalpy of a melting range from its start to `t`, its latent heat left out.
    fn range_sensible(&self, link: usize, t: f64) -> f64 {
        let Some(joint) = self.joints.get(link) else { return f64::NAN };
        let pieces = self.segments.get(joint.segments.clone()).unwrap_or(&[]);
        let until = |segment: &super::segment::Segment| match &segment.body {
            Body::Melting { melting, .. } if t > segment.lo => {
                melting.sensible(t.min(segment.hi) - segment.lo)
            }
            _ => 0.0,
        };
        pieces.iter().map(until).sum()
    }

    /// Enthalpy of one phase, its outermost laws stretched where need be.
    pub(super) fn phase_enthalpy(&self, phase: usize, t: f64) -> f64 {
        let own = self.phases.get(phase).and_then(|phase| self.segments.get(phase.segments.clone()));
        own.and_then(|own| segment_at(own, t)).map_or(f64::NAN, |(_, segment)| segment.enthalpy(t, 0.0))
    }

    /// Where a route leaves one phase and enters another that no transition links to it.
    fn crossing(&self, from: usize, to: usize) -> (f64, f64) {
        let span =
            |phase: usize| self.phases.get(phase).map_or((f64::NAN, f64::NAN), |phase| (phase.lo, phase.hi));
        let (a, b) = (span(from), span(to));
        let (lo, hi) = (a.0.max(b.0), a.1.min(b.1));
        if lo <= hi {
            let t = REFERENCE_TEMPERATURE.max(lo).min(hi);
            (t, t)
        } else if a.1 < b.0 {
            (a.1, b.0)
        } else {
            (a.0, b.1)
        }
    }

    fn cross(&self, leave: Stop, enter: Stop) -> Leg {
        let (from, to) = (leave.at / 2, enter.at / 2);
        let rise = self.phase_enthalpy(to, enter.temperature) - self.phase_enthalpy(from, leave.temperature);
        leg(LegKind::Transition { from, to, link: None }, (leave.temperature, enter.temperature), rise)
    }
}

fn leg(kind: LegKind, (from, to): (f64, f64), rise: f64) -> Leg {
    Leg { kind, from: typed(from), to: typed(to), enthalpy: typed(rise) }
}

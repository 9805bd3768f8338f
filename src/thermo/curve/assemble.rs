//! From checked data to segments with their offsets.

use std::ops::Range;

use uom::si::f64::MolarMass;

use super::check::{check_curve, link_span, phase_span};
use super::data::{CurveData, Density, Link, PhaseClass, PhaseData};
use super::error::CurveError;
use super::formation::{Formations, runs, stable_chain};
use super::saturation::Saturation;
use super::segment::{Body, Melting, Segment};
use super::track::{Track, Tracks, lay_tracks};
use crate::thermo::constants::REFERENCE_TEMPERATURE;
use crate::thermo::si::typed;

/// By how much of a latent heat the formation enthalpies beside it may differ from it.
const CONTRADICTION: f64 = 0.01;

/// The heating curve of a species, ready to be asked.
#[derive(Debug, Clone, PartialEq)]
pub struct HeatingCurve {
    pub(super) phases: Vec<Phase>,
    pub(super) joints: Vec<Joint>,
    pub(super) segments: Vec<Segment>,
    pub(super) tracks: Tracks,
    pub(super) saturation: Option<Saturation>,
    pub(super) molar_mass: Option<MolarMass>,
    pub(super) decomposes_at: Option<f64>,
    pub(super) stable: Range<usize>,
    pub(super) has_density: bool,
    absolute: bool,
    formation_extrapolated: bool,
}

/// A phase of the curve, with the segments of its laws.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Phase {
    pub(super) name: String,
    pub(super) class: PhaseClass,
    pub(super) density: Option<Density>,
    pub(super) lo: f64,
    pub(super) hi: f64,
    pub(super) segments: Range<usize>,
}

/// What stands between a phase and the next, with its segments; none where they are apart.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Joint {
    pub(super) span: Option<(f64, f64)>,
    pub(super) latent: f64,
    pub(super) segments: Range<usize>,
}

impl HeatingCurve {
    /// Checks the data and lays out the curve.
    ///
    /// # Errors
    /// [`CurveError`] with the indices of what is wrong.
    pub fn build(data: CurveData) -> Result<HeatingCurve, CurveError> {
        check_curve(&data)?;
        let laid: Vec<Vec<Segment>> =
            data.phases.iter().enumerate().map(|(i, phase)| lay_phase(i, phase)).collect();
        let stable = stable_chain(&data);
        if let Some(t) = data.decomposes_at {
            let lowest = data.phases.get(stable.start).map_or(f64::NAN, |phase| phase_span(phase).0);
            if t.value.is_nan() || t.value <= lowest {
                return Err(CurveError::DecompositionOrder { temperature: t });
            }
        }
        let saturation = Saturation::place(&data).map_err(CurveError::VapourPressure)?;
        let formations = Formations::place(&data, &stable)?;
        let mut links = lay_links(&data, &laid);
        let (shifts, absolute) = shift_runs(&data, &laid, &links, &formations)?;
        settle_latents(&data, &laid, &shifts, &mut links)?;
        let grounds = (absolute, formations.extrapolated);
        Ok(flatten(data, laid, &links, &shifts, stable, (grounds, saturation)))
    }

    /// Whether enthalpies count from the elements at 298.15 K, not from the curve's lowest temperature.
    #[inline]
    pub fn absolute(&self) -> bool {
        self.absolute
    }

    /// Whether a law was stretched by up to 2 K to take the formation enthalpy at 298.15 K.
    #[inline]
    pub fn formation_extrapolated(&self) -> bool {
        self.formation_extrapolated
    }
}

/// The segments of one phase alone: enthalpy and entropy count from its lowest temperature.
fn lay_phase(index: usize, phase: &PhaseData) -> Vec<Segment> {
    let (mut enthalpy, mut entropy) = (0.0, 0.0);
    let lay = |range: &super::LawRange| {
        let (lo, hi) = (range.lo.value, range.hi.value);
        let entropy_offset = entropy - range.law.entropy(lo);
        entropy = entropy_offset + range.law.entropy(hi);
        let line = range.law.straight_line();
        let body = Body::Range { phase: index, law: range.law.clone(), entropy_offset, line };
        let mut segment = Segment { lo, hi, offset: 0.0, latent: 0.0, body };
        segment.offset = enthalpy - segment.enthalpy(lo, 0.0);
        enthalpy = segment.enthalpy(hi, 0.0);
        segment
    };
    phase.ranges.iter().map(lay).collect()
}

/// The segment that holds `t`, or the nearest.
pub(super) fn segment_at(segments: &[Segment], t: f64) -> Option<(usize, &Segment)> {
    let inside = segments.iter().position(|segment| t < segment.hi);
    let at = inside.unwrap_or(segments.len().saturating_sub(1));
    segments.get(at).map(|segment| (at, segment))
}

fn enthalpy_of(laid: &[Vec<Segment>], phase: usize, t: f64) -> f64 {
    let segment = laid.get(phase).and_then(|segments| segment_at(segments, t));
    segment.map_or(f64::NAN, |(_, segment)| segment.enthalpy(t, 0.0))
}

fn cp_of(laid: &[Vec<Segment>], phase: usize, t: f64) -> f64 {
    laid.get(phase)
        .and_then(|segments| segment_at(segments, t))
        .map_or(f64::NAN, |(_, segment)| segment.cp(t))
}

/// A link with its latent heat, which may not be known yet, and the pieces of a melting range.
struct LaidLink {
    span: Option<(f64, f64)>,
    latent: Option<f64>,
    pieces: Vec<(f64, f64, Melting)>,
}

impl LaidLink {
    /// Enthalpy of the whole melting range without its latent heat.
    fn sensible(&self) -> f64 {
        self.pieces.iter().map(|(lo, hi, melting)| melting.sensible(hi - lo)).sum()
    }
}

fn lay_links(data: &CurveData, laid: &[Vec<Segment>]) -> Vec<LaidLink> {
    let lay = |(index, link): (usize, &Link)| match link {
        Link::Apart => LaidLink { span: None, latent: None, pieces: Vec::new() },
        Link::At { latent, .. } => {
            LaidLink { span: link_span(link), latent: Some(latent.value), pieces: Vec::new() }
        }
        Link::AtFromFormations { .. } => LaidLink { span: link_span(link), latent: None, pieces: Vec::new() },
        Link::Over { from, to, latent, along } => {
            let cps = (cp_of(laid, index, from.value), cp_of(laid, index + 1, to.value));
            let ends = [(*from, 0.0), (*to, 1.0)];
            let points = if along.is_empty() { &ends[..] } else { along };
            let pieces = points.iter().zip(points.iter().skip(1)).map(|(a, b)| {
                let (lo, hi) = (a.0.value, b.0.value);
                let slope = (b.1 - a.1) / (hi - lo);
                let melting =
                    Melting { cp_lower: cps.0, cp_upper: cps.1, share: a.1, slope, height: latent.value };
                (lo, hi, melting)
            });
            LaidLink { span: link_span(link), latent: Some(latent.value), pieces: pieces.collect() }
        }
    };
    data.links.iter().enumerate().map(lay).collect()
}

/// What each phase's enthalpy is shifted by, so that links hold and formation enthalpies are met; and whether
/// they are.
///
/// Phases that latent heats link form a run and move together; each run takes its level from the first phase
/// in it with a formation enthalpy. A curve of one run may do without.
fn shift_runs(
    data: &CurveData,
    laid: &[Vec<Segment>],
    links: &[LaidLink],
    formations: &Formations,
) -> Result<(Vec<f64>, bool), CurveError> {
    let runs = runs(data, |link| matches!(link, Link::Apart | Link::AtFromFormations { .. }));
    let several = runs.len() > 1;
    let mut shifts = Vec::with_capacity(data.phases.len());
    let mut absolute = true;
    for run in runs {
        let start = shifts.len();
        let mut shift = 0.0;
        for phase in run.clone() {
            if phase > run.start {
                shift += rise_over_link(laid, links, phase);
            }
            shifts.push(shift);
        }
        let anchor = run.clone().find_map(|phase| formations.get(phase).map(|formation| (phase, formation)));
        match anchor {
            Some((phase, formation)) => {
                let own = shifts.get(phase).copied().unwrap_or(f64::NAN);
                let level = formation - (enthalpy_of(laid, phase, REFERENCE_TEMPERATURE) + own);
                shifts.iter_mut().skip(start).for_each(|shift| *shift += level);
                check_formations(run, laid, links, formations, &shifts)?;
            }
            None if several => return Err(CurveError::FormationMissing { phase: run.start }),
            None => absolute = false,
        }
    }
    Ok((shifts, absolute))
}

/// How much more than its lower neighbour a phase is shifted, given the latent heat between them.
fn rise_over_link(laid: &[Vec<Segment>], links: &[LaidLink], phase: usize) -> f64 {
    let Some(link) = phase.checked_sub(1).and_then(|at| links.get(at)) else { return f64::NAN };
    let (begin, end) = link.span.unwrap_or((f64::NAN, f64::NAN));
    let below = enthalpy_of(laid, phase - 1, begin) + link.sensible() + link.latent.unwrap_or(f64::NAN);
    below - enthalpy_of(laid, phase, end)
}

/// Within a run the given latent heats hold; further formation enthalpies must agree with them.
fn check_formations(
    run: Range<usize>,
    laid: &[Vec<Segment>],
    links: &[LaidLink],
    formations: &Formations,
    shifts: &[f64],
) -> Result<(), CurveError> {
    for phase in run.skip(1) {
        let given = phase.checked_sub(1).and_then(|at| links.get(at)).and_then(|link| link.latent);
        let shift = shifts.get(phase).copied().unwrap_or(f64::NAN);
        if let (Some(formation), Some(given)) = (formations.get(phase), given) {
            let excess = formation - (enthalpy_of(laid, phase, REFERENCE_TEMPERATURE) + shift);
            if excess.abs() > CONTRADICTION * given {
                let (given, follows) = (typed(given), typed(given + excess));
                return Err(CurveError::LatentContradiction { phase, given, follows });
            }
        }
    }
    Ok(())
}

/// Fills in the latent heats that follow from formation enthalpies.
fn settle_latents(
    data: &CurveData,
    laid: &[Vec<Segment>],
    shifts: &[f64],
    links: &mut [LaidLink],
) -> Result<(), CurveError> {
    let level = |phase: usize, t: f64| {
        shifts.get(phase).map_or(f64::NAN, |shift| enthalpy_of(laid, phase, t) + shift)
    };
    for (index, (link, given)) in links.iter_mut().zip(&data.links).enumerate() {
        if let Link::AtFromFormations { temperature } = given {
            let latent = level(index + 1, temperature.value) - level(index, temperature.value);
            if latent.is_nan() || latent <= 0.0 {
                return Err(CurveError::LatentSign { link: index, latent: typed(latent) });
            }
            link.latent = Some(latent);
        }
    }
    Ok(())
}

/// Puts phases and links into one row of segments.
fn flatten(
    data: CurveData,
    laid: Vec<Vec<Segment>>,
    links: &[LaidLink],
    shifts: &[f64],
    stable: Range<usize>,
    ((absolute, formation_extrapolated), saturation): ((bool, bool), Option<Saturation>),
) -> HeatingCurve {
    let (mut segments, mut phases, mut joints) = (Vec::new(), Vec::new(), Vec::new());
    let mut latent = 0.0;
    for (index, ((phase, own), shift)) in data.phases.into_iter().zip(laid).zip(shifts).enumerate() {
        let (lo, hi) = phase_span(&phase);
        let first = segments.len();
        segments.extend(own.into_iter().map(|segment| Segment {
            offset: segment.offset + shift,
            latent,
            ..segment
        }));
        let own = first..segments.len();
        if let Some(link) = links.get(index) {
            let begin = link.span.map_or(f64::NAN, |(begin, _)| begin);
            let start = segments.get(own.clone()).and_then(|own| segment_at(own, begin));
            let start = start.map_or(f64::NAN, |(_, segment)| segment.enthalpy(begin, 0.0));
            let first = segments.len();
            segments.extend(link_segments(index, link, start, latent));
            latent = if link.span.is_some() { latent + link.latent.unwrap_or(0.0) } else { 0.0 };
            joints.push(Joint {
                span: link.span,
                latent: link.latent.unwrap_or(0.0),
                segments: first..segments.len(),
            });
        }
        phases.push(Phase {
            name: phase.name,
            class: phase.class,
            density: phase.density,
            lo,
            hi,
            segments: own,
        });
    }
    let has_density = phases.iter().any(|phase| phase.density.is_some());
    let mut curve = HeatingCurve {
        phases,
        joints,
        segments,
        tracks: Tracks::default(),
        saturation,
        molar_mass: data.molar_mass,
        decomposes_at: data.decomposes_at.map(|t| t.value),
        stable,
        has_density,
        absolute,
        formation_extrapolated,
    };
    curve.tracks = lay_tracks(&curve);
    curve
}

/// The segments of one link that begins at enthalpy `start` with `latent` passed.
fn link_segments(index: usize, link: &LaidLink, start: f64, latent: f64) -> Vec<Segment> {
    let Some((begin, end)) = link.span else { return Vec::new() };
    let height = link.latent.unwrap_or(f64::NAN);
    if link.pieces.is_empty() {
        let body = Body::Plateau { link: index, height };
        return vec![Segment { lo: begin, hi: end, offset: start, latent, body }];
    }
    let mut sensible = 0.0;
    let lay = |&(lo, hi, melting): &(f64, f64, Melting)| {
        let passed = melting.share * height;
        let offset = start + sensible + passed;
        sensible += melting.sensible(hi - lo);
        Segment { lo, hi, offset, latent: latent + passed, body: Body::Melting { link: index, melting } }
    };
    link.pieces.iter().map(lay).collect()
}

impl HeatingCurve {
    /// The stretch of the curve that a pin leads along.
    #[inline]
    pub(in crate::thermo) fn track(&self, pin: super::Pin) -> Option<&Track> {
        self.tracks.get(pin)
    }
}

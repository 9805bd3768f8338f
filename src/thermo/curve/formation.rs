//! Which phase a formation enthalpy belongs to, and which phases hang together.

use std::ops::Range;

use super::check::{link_span, phase_span};
use super::data::{CurveData, Link, PhaseData};
use super::error::CurveError;
use crate::thermo::constants::REFERENCE_TEMPERATURE;

/// By how many kelvin a phase may begin above 298.15 K and still take a formation enthalpy there.
const FORMATION_REACH: f64 = 2.0;

/// The runs of phases that transitions link.
fn chains(data: &CurveData) -> Vec<Range<usize>> {
    runs(data, |link| matches!(link, Link::Apart))
}

/// The phases, cut at every link for which `cut` holds.
pub(super) fn runs(data: &CurveData, cut: impl Fn(&Link) -> bool) -> Vec<Range<usize>> {
    let mut runs = Vec::new();
    let mut start = 0;
    for (at, link) in data.links.iter().enumerate() {
        if cut(link) {
            runs.push(start..at + 1);
            start = at + 1;
        }
    }
    runs.push(start..data.phases.len());
    runs
}

/// The chain that temperature alone leads along: the first, unless that is a lone phase with its own
/// formation enthalpy, which only a state symbol reaches, and another is not.
pub(super) fn stable_chain(data: &CurveData) -> Range<usize> {
    let chains = chains(data);
    let by_symbol = |chain: &Range<usize>| {
        chain.len() == 1 && data.phases.get(chain.start).is_some_and(|phase| phase.formation.is_some())
    };
    let first = chains.first().cloned().unwrap_or(0..data.phases.len());
    chains.into_iter().find(|chain| !by_symbol(chain)).unwrap_or(first)
}

/// The formation enthalpy of each phase that has one, and whether a law is stretched for it.
pub(super) struct Formations {
    by_phase: Vec<Option<f64>>,
    pub(super) extrapolated: bool,
}

impl Formations {
    pub(super) fn place(data: &CurveData, stable: &Range<usize>) -> Result<Formations, CurveError> {
        let mut by_phase = Vec::with_capacity(data.phases.len());
        let mut extrapolated = false;
        for (index, phase) in data.phases.iter().enumerate() {
            if phase.formation.is_some() {
                if !reaches_reference(phase) {
                    return Err(CurveError::FormationOutside { phase: index });
                }
                extrapolated |= phase_span(phase).0 > REFERENCE_TEMPERATURE;
            }
            by_phase.push(phase.formation.map(|formation| formation.value));
        }
        if let Some(formation) = data.formation {
            let phase = stable_at_reference(data, stable).ok_or(CurveError::FormationUnplaced)?;
            let place = by_phase.get_mut(phase).ok_or(CurveError::FormationUnplaced)?;
            if place.is_some() {
                return Err(CurveError::FormationTwice { phase });
            }
            *place = Some(formation.value);
            let span = data.phases.get(phase).map(phase_span);
            extrapolated |= span.is_some_and(|(lo, _)| lo > REFERENCE_TEMPERATURE);
        }
        Ok(Formations { by_phase, extrapolated })
    }

    pub(super) fn get(&self, phase: usize) -> Option<f64> {
        self.by_phase.get(phase).copied().flatten()
    }
}

/// Whether the phase's laws reach 298.15 K, stretched by 2 K at the most; a table cannot be stretched.
fn reaches_reference(phase: &PhaseData) -> bool {
    let (lo, hi) = phase_span(phase);
    let law = phase.ranges.first().map(|range| &range.law);
    let near = lo <= REFERENCE_TEMPERATURE + FORMATION_REACH && hi >= REFERENCE_TEMPERATURE;
    near && (lo <= REFERENCE_TEMPERATURE
        || law.is_some_and(|law| law.enthalpy(REFERENCE_TEMPERATURE).is_finite()))
}

/// The phase of the stable chain that temperature leads to at 298.15 K.
fn stable_at_reference(data: &CurveData, stable: &Range<usize>) -> Option<usize> {
    stable.clone().find(|&index| {
        let span = |at: Option<usize>| at.and_then(|at| data.links.get(at)).and_then(link_span);
        let from = index.checked_sub(1).filter(|_| index > stable.start);
        let from = span(from).map_or(f64::NEG_INFINITY, |(_, end)| end);
        let to = Some(index).filter(|_| index + 1 < stable.end);
        let to = span(to).map_or(f64::INFINITY, |(begin, _)| begin);
        from <= REFERENCE_TEMPERATURE
            && REFERENCE_TEMPERATURE <= to
            && data.phases.get(index).is_some_and(reaches_reference)
    })
}

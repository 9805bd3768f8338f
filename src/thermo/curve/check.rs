//! Whether the data of a species can be a heating curve.

use uom::si::f64::ThermodynamicTemperature;

use super::data::{CurveData, Density, LawRange, Link, PhaseClass, PhaseData};
use super::error::{CurveError, MeltingFault};
use crate::thermo::si::typed;

/// How near two temperatures, relative to the larger, count as touching.
const TOUCH: f64 = 1e-9;

/// How many points of a range are tried for a positive heat capacity or density.
const SAMPLES: u32 = 8;

fn touch(a: f64, b: f64) -> bool {
    (a - b).abs() <= TOUCH * a.abs().max(b.abs())
}

/// Checks everything but what rests on formation enthalpies.
pub(super) fn check_curve(data: &CurveData) -> Result<(), CurveError> {
    if data.phases.is_empty() {
        return Err(CurveError::NoPhase);
    }
    if data.links.len() + 1 != data.phases.len() {
        return Err(CurveError::LinkCount { phases: data.phases.len(), links: data.links.len() });
    }
    if data.molar_mass.is_some_and(|mass| mass.value.is_nan() || mass.value <= 0.0) {
        return Err(CurveError::MolarMass);
    }
    for (index, phase) in data.phases.iter().enumerate() {
        check_ranges(index, &phase.ranges)?;
        check_positive(index, phase)?;
    }
    let mut before = None;
    let pairs = data.phases.iter().zip(data.phases.iter().skip(1));
    for (index, (link, (lower, upper))) in data.links.iter().zip(pairs).enumerate() {
        before = check_link(index, link, lower, upper, before)?;
    }
    Ok(())
}

/// The temperatures between which a phase has data.
pub(super) fn phase_span(phase: &PhaseData) -> (f64, f64) {
    let lo = phase.ranges.first().map_or(f64::NAN, |range| range.lo.value);
    let hi = phase.ranges.last().map_or(f64::NAN, |range| range.hi.value);
    (lo, hi)
}

/// Where a link begins and ends; none where the phases are apart.
pub(super) fn link_span(link: &Link) -> Option<(f64, f64)> {
    match link {
        Link::At { temperature, .. } | Link::AtFromFormations { temperature } => {
            Some((temperature.value, temperature.value))
        }
        Link::Over { from, to, .. } => Some((from.value, to.value)),
        Link::Apart => None,
    }
}

fn check_ranges(phase: usize, ranges: &[LawRange]) -> Result<(), CurveError> {
    if ranges.is_empty() {
        return Err(CurveError::NoLaw { phase });
    }
    let mut end: Option<ThermodynamicTemperature> = None;
    for (range, LawRange { lo, hi, law }) in ranges.iter().enumerate() {
        let rises = lo.value > 0.0 && lo.value < hi.value && hi.value.is_finite();
        if !rises {
            return Err(CurveError::EmptyRange { phase, range });
        }
        if let Some(from) = end.filter(|end| !touch(end.value, lo.value)) {
            return Err(if from < *lo {
                CurveError::Gap { phase, range, from, to: *lo }
            } else {
                CurveError::Overlap { phase, range, from: *lo, to: from }
            });
        }
        if let Some((first, last)) = law.span() {
            let holds = |outer: f64, inner: f64| outer <= inner || touch(outer, inner);
            if !holds(first.value, lo.value) || !holds(hi.value, last.value) {
                return Err(CurveError::TableShort { phase, range, lo: first, hi: last });
            }
        }
        end = Some(*hi);
    }
    Ok(())
}

fn samples(lo: f64, hi: f64) -> impl Iterator<Item = f64> {
    (0..=SAMPLES).map(move |i| lo + (hi - lo) * (f64::from(i) / f64::from(SAMPLES)))
}

fn check_positive(index: usize, phase: &PhaseData) -> Result<(), CurveError> {
    for (range, LawRange { lo, hi, law }) in phase.ranges.iter().enumerate() {
        for t in samples(lo.value, hi.value) {
            let cp = law.value(t);
            if !(cp > 0.0 && cp.is_finite()) {
                return Err(CurveError::HeatCapacityNotPositive {
                    phase: index,
                    range,
                    temperature: typed(t),
                });
            }
        }
        if let Some(t) = phase.density.as_ref().and_then(|density| bad_density(density, lo.value, hi.value)) {
            return Err(CurveError::DensityNotPositive { phase: index, temperature: typed(t) });
        }
    }
    Ok(())
}

fn bad_density(density: &Density, lo: f64, hi: f64) -> Option<f64> {
    samples(lo, hi).find(|t| {
        let value = density.value(*t);
        !(value > 0.0 && value.is_finite())
    })
}

/// Gives back where the link ends, which the next one must lie above.
fn check_link(
    link: usize,
    data: &Link,
    lower: &PhaseData,
    upper: &PhaseData,
    before: Option<f64>,
) -> Result<Option<f64>, CurveError> {
    let Some((begin, end)) = link_span(data) else { return Ok(None) };
    if !(begin > 0.0 && begin.is_finite() && end.is_finite()) {
        return Err(CurveError::TransitionTemperature { link });
    }
    if let Some(before) = before.filter(|before| begin <= *before) {
        return Err(CurveError::TransitionOrder { link, temperature: typed(begin), before: typed(before) });
    }
    if lower.class > upper.class || lower.class == PhaseClass::Gas {
        return Err(CurveError::ClassOrder { link });
    }
    match data {
        Link::At { latent, .. } | Link::Over { latent, .. }
            if latent.value.is_nan() || latent.value <= 0.0 || latent.value.is_infinite() =>
        {
            return Err(CurveError::LatentSign { link, latent: *latent });
        }
        Link::Over { from, to, along, .. } => check_melting(link, (from, to), along, upper.class)?,
        Link::At { .. } | Link::AtFromFormations { .. } | Link::Apart => {}
    }
    check_reach(link, link, lower, begin)?;
    check_reach(link, link + 1, upper, end)?;
    Ok(Some(end))
}

/// The laws of `phase` must hold at the end `transition` of the link beside it.
fn check_reach(link: usize, phase: usize, data: &PhaseData, transition: f64) -> Result<(), CurveError> {
    let (lo, hi) = phase_span(data);
    let short = |reaches: f64| {
        Err(CurveError::RangeShort { phase, link, reaches: typed(reaches), transition: typed(transition) })
    };
    if hi < transition && !touch(hi, transition) {
        short(hi)
    } else if lo > transition && !touch(lo, transition) {
        short(lo)
    } else {
        Ok(())
    }
}

fn check_melting(
    link: usize,
    (from, to): (&ThermodynamicTemperature, &ThermodynamicTemperature),
    along: &[(ThermodynamicTemperature, f64)],
    upper: PhaseClass,
) -> Result<(), CurveError> {
    let wrong = |fault| Err(CurveError::MeltingRange { link, fault });
    if upper == PhaseClass::Gas {
        return wrong(MeltingFault::Gas);
    }
    if from >= to {
        return wrong(MeltingFault::Ends);
    }
    let (Some(first), Some(last)) = (along.first(), along.last()) else { return Ok(()) };
    let corners = touch(first.0.value, from.value) && touch(last.0.value, to.value);
    if along.len() < 2 || !corners || first.1 != 0.0 || last.1 != 1.0 {
        return wrong(MeltingFault::Corners);
    }
    let disorder = along.iter().zip(along.iter().skip(1)).position(|(a, b)| {
        let rises = b.0 > a.0 && b.1 >= a.1;
        !rises
    });
    disorder.map_or(Ok(()), |at| wrong(MeltingFault::Order { at: at + 1 }))
}

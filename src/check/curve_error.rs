//! Errors of a heating curve at their places.

use crate::diagnostic::{Code, Diagnostic};
use crate::span::Span;
use crate::thermo::{CurveError, MeltingFault};

/// Where the parts of a species block stand.
pub(super) struct Places<'a> {
    pub(super) block: Span,
    pub(super) heads: &'a [Span],
    pub(super) ranges: &'a [Vec<Span>],
    pub(super) densities: &'a [Option<Span>],
    pub(super) names: &'a [String],
    pub(super) links: &'a [Span],
    pub(super) vapour_pressure: Option<Span>,
    pub(super) formation: Option<Span>,
}

impl Places<'_> {
    fn phase(&self, phase: usize) -> Span {
        self.heads.get(phase).copied().unwrap_or(self.block)
    }

    fn range(&self, phase: usize, range: usize) -> Span {
        self.ranges
            .get(phase)
            .and_then(|ranges| ranges.get(range))
            .copied()
            .unwrap_or_else(|| self.phase(phase))
    }

    fn link(&self, link: usize) -> Span {
        self.links.get(link).copied().unwrap_or(self.block)
    }

    fn name(&self, phase: usize) -> &str {
        self.names.get(phase).map_or("phase", String::as_str)
    }
}

/// A curve error as a diagnostic.
pub(super) fn explain(error: CurveError, at: &Places<'_>) -> Diagnostic {
    if let CurveError::VapourPressure(fault) = error {
        return super::vapour_pressure::misfit(fault, at.vapour_pressure.unwrap_or(at.block));
    }
    ranges(error, at).or_else(|| transitions(error, at)).unwrap_or_else(|| enthalpies(error, at))
}

fn ranges(error: CurveError, at: &Places<'_>) -> Option<Diagnostic> {
    Some(match error {
        CurveError::EmptyRange { phase, range } => {
            Diagnostic::new(Code::TableOrder, "a range that does not rise, or does not lie above 0 K")
                .label(at.range(phase, range), "from a lower to a higher temperature is wanted")
                .help("write `for 298.15 K to 700 K`")
        }
        CurveError::Gap { phase, range, from, to } => {
            let (a, b) = (kelvin(from.value), kelvin(to.value));
            Diagnostic::new(Code::RangeGap, format!("a gap between two ranges, {a} to {b}"))
                .label(at.range(phase, range), format!("begins at {b}"))
                .label(at.range(phase, range.saturating_sub(1)), format!("ends at {a}"))
                .help(format!("let this range begin at {a}, as the publication does"))
        }
        CurveError::Overlap { phase, range, from, to } => {
            let (a, b) = (kelvin(from.value), kelvin(to.value));
            let (low, high) = if from.value < to.value { (a, b) } else { (b, a) };
            Diagnostic::new(Code::RangeOverlap, format!("two ranges overlap, {low} to {high}"))
                .label(at.range(phase, range), format!("begins at {low}"))
                .label(at.range(phase, range.saturating_sub(1)), format!("ends at {high}"))
                .help(format!("let this range begin at {high}, or the one before it end at {low}"))
        }
        CurveError::TableShort { phase, range, lo, hi } => Diagnostic::new(
            Code::RangeShort,
            format!("a table from {} to {} that ends inside its range", kelvin(lo.value), kelvin(hi.value)),
        )
        .label(at.range(phase, range), "the range goes further than the table")
        .help(format!("write `for {} to {}`", kelvin(lo.value), kelvin(hi.value))),
        CurveError::RangeShort { phase, link, reaches, transition } => Diagnostic::new(
            Code::RangeShort,
            format!(
                "the data of `{}` do not reach its transition at {}",
                at.name(phase),
                kelvin(transition.value)
            ),
        )
        .label(
            at.range(phase, edge_range(at, phase, link)),
            format!("reaches only {}", kelvin(reaches.value)),
        )
        .label(at.link(link), "the transition")
        .help("extend the range as far as the publication admits, or correct the transition"),
        CurveError::HeatCapacityNotPositive { phase, range, temperature } => Diagnostic::new(
            Code::DatumNotPositive,
            format!(
                "the heat capacity of `{}` is not positive at {}",
                at.name(phase),
                kelvin(temperature.value)
            ),
        )
        .label(at.range(phase, range), "in this range")
        .help("check the signs and powers of ten of its coefficients"),
        CurveError::DensityNotPositive { phase, temperature } => {
            let place = at.densities.get(phase).copied().flatten().unwrap_or_else(|| at.phase(phase));
            let name = at.name(phase);
            Diagnostic::new(
                Code::DatumNotPositive,
                format!("the density of `{name}` is not positive at {}", kelvin(temperature.value)),
            )
            .label(place, "not positive everywhere in its phase")
            .help("check the signs and powers of ten of the formula")
        }
        CurveError::NoLaw { phase } => Diagnostic::new(Code::DatumMissing, "a phase without a heat capacity")
            .label(at.phase(phase), "no `cp`")
            .help("add `cp = ... J/(mol K) for ... K to ... K`"),
        CurveError::NoPhase => Diagnostic::new(Code::DatumMissing, "a species without a phase")
            .label(at.block, "no phase")
            .help("add `phase solid { cp = ... for ... to ... }`"),
        _ => return None,
    })
}

/// The range of a phase that lies at the transition of a link: its last below, its first above.
fn edge_range(at: &Places<'_>, phase: usize, link: usize) -> usize {
    if phase == link { at.ranges.get(phase).map_or(0, |ranges| ranges.len().saturating_sub(1)) } else { 0 }
}

fn transitions(error: CurveError, at: &Places<'_>) -> Option<Diagnostic> {
    Some(match error {
        CurveError::TransitionOrder { link, temperature, before } => Diagnostic::new(
            Code::TransitionOrder,
            format!("a transition at {} after one at {}", kelvin(temperature.value), kelvin(before.value)),
        )
        .label(at.link(link), "not above the transition before it")
        .label(at.link(link.saturating_sub(1)), "the transition before it")
        .help("a block is read as a heating curve: put its phases in the order of rising temperature"),
        CurveError::TransitionTemperature { link } => {
            Diagnostic::new(Code::TransitionOrder, "a transition at no temperature")
                .label(at.link(link), "not above 0 K")
                .help("write `at 692.68 K`")
        }
        CurveError::ClassOrder { link } => Diagnostic::new(
            Code::TransitionNames,
            format!("heating does not lead from `{}` to `{}`", at.name(link), at.name(link + 1)),
        )
        .label(at.link(link), "solid, liquid, gas is the order of heating")
        .help("put the phases in the order of heating"),
        CurveError::LatentSign { link, .. } => {
            Diagnostic::new(Code::LatentSign, "a latent heat that is not positive")
                .label(at.link(link), "a transition on heating takes up heat")
                .help("check the enthalpies of the phases on both sides")
        }
        CurveError::MeltingRange { link, fault } => melting(fault, at.link(link)),
        CurveError::LinkCount { .. } => {
            Diagnostic::new(Code::PhasesUnconnected, "phases without transitions between them")
                .label(at.block, "in this species")
                .help("put a transition between each phase and the next")
        }
        _ => return None,
    })
}

fn melting(fault: MeltingFault, span: Span) -> Diagnostic {
    let (label, help) = match fault {
        MeltingFault::Ends => ("its ends do not rise", "write `over 843 K to 893 K`"),
        MeltingFault::Corners => (
            "its shares do not go from 0 % at the lower end to 100 % at the upper",
            "begin with 0 % and finish with 100 % at the ends of the range",
        ),
        MeltingFault::Order { .. } => {
            ("its points do not rise", "sort the points by temperature; the share never falls")
        }
        MeltingFault::Gas => ("it ends in a gas", "boiling takes place `at` one temperature here"),
    };
    Diagnostic::new(Code::MeltingRange, "a transition range that cannot be").label(span, label).help(help)
}

fn enthalpies(error: CurveError, at: &Places<'_>) -> Diagnostic {
    match error {
        CurveError::FormationMissing { phase } => {
            Diagnostic::new(Code::FormationWrong, "a phase that rests on a formation enthalpy which is not given")
                .label(at.phase(phase), "no formation enthalpy to count from")
                .help("give the species a line `formation ... kJ/mol at 298.15 K`, or the transition its `takes`")
        }
        CurveError::FormationUnplaced => {
            Diagnostic::new(Code::FormationWrong, "a formation enthalpy of which no phase takes hold")
                .label(at.formation.unwrap_or(at.block), "no phase of this species has data at 298.15 K")
                .help("begin the phase that is stable at 298.15 K there (up to 300.15 K is admitted), or give a phase its own `formation`")
        }
        CurveError::FormationOutside { phase } => Diagnostic::new(
            Code::FormationWrong,
            format!("the formation enthalpy of `{}` lies outside its data", at.name(phase)),
        )
        .label(at.phase(phase), "its heat capacity does not reach 298.15 K")
        .help("extend the range of its heat capacity to 298.15 K"),
        CurveError::FormationTwice { phase } => {
            Diagnostic::new(Code::DatumTwice, format!("two formation enthalpies for `{}`", at.name(phase)))
                .label(at.phase(phase), "its own, and that of the species")
                .help("keep one of the two")
        }
        CurveError::LatentContradiction { phase, given, follows } => Diagnostic::new(
            Code::LatentContradiction,
            format!(
                "the latent heat, {:.3} kJ/kg, contradicts the formation enthalpies, {:.3} kJ/kg",
                given.value / 1e3,
                follows.value / 1e3
            ),
        )
        .label(at.link(phase.saturating_sub(1)), "more than 1 % apart")
        .help("leave out `takes`: the latent heat follows from the two formation enthalpies"),
        CurveError::DecompositionOrder { temperature } => Diagnostic::new(
            Code::TransitionOrder,
            format!("it decomposes at {}, below all its data", kelvin(temperature.value)),
        )
        .label(at.block, "in this species")
        .help("check the temperature of decomposition"),
        _ => Diagnostic::new(Code::DatumNotPositive, "a molar mass that is not positive")
            .label(at.block, "in this species")
            .help("write such as `molar_mass 65.38 g/mol`"),
    }
}

/// A temperature for a message: at most six digits, no trailing zeros.
fn kelvin(value: f64) -> String {
    let text = format!("{value:.3}");
    format!("{} K", text.trim_end_matches('0').trim_end_matches('.'))
}

//! Warnings that only a worked sheet can give.

use crate::diagnostic::{Code, Diagnostic, and_list};
use crate::program::{DatumKind, Node, StateId, StateMember, StepId, StepMember};
use crate::report::WorkedSheet;
use std::collections::BTreeSet;

pub(super) fn warnings(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut found = extrapolated(sheet);
    found.extend(neglected_volumes(sheet));
    found
}

/// States that lie beyond the data of their phase, as an allowance admits.
fn extrapolated(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut found = Vec::new();
    for (state, slots) in sheet.program.states.iter().zip(&sheet.map.states) {
        for (part, place) in state.constituents.iter().zip(&slots.places) {
            let Some(place) = sheet.frame.placed(*place).filter(|place| place.extrapolated()) else {
                continue;
            };
            let Some(species) = sheet.program.species.get(part.species.0) else { continue };
            let phase = species.curve.phases_at(place).lower.0;
            let allowed = species.allowed(phase, place.temperature().value);
            let why =
                allowed.map_or(String::new(), |allowance| format!(", allowed because {}", allowance.because));
            let message = format!(
                "`{}` uses the data of `{}` beyond their range{why}",
                state.name,
                species.in_phase(phase)
            );
            let mut diagnostic = Diagnostic::new(Code::Extrapolated, message)
                .label(state.span, format!("at {:.2} K", place.temperature().value));
            if let Some(allowance) = allowed {
                diagnostic = diagnostic.label(allowance.span, "allowed here");
            }
            found.push(diagnostic.help("look for data that reach there"));
        }
    }
    found
}

/// States whose volume is asked, and condensed matter in them whose density is not given at their temperature.
pub(super) fn densities_beyond(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut asked: BTreeSet<StateId> = BTreeSet::new();
    sheet.program.each_expression(&mut |expr| match &expr.node {
        Node::State(id, StateMember::Volume | StateMember::Density) => {
            asked.insert(*id);
        }
        Node::Step(id, StepMember::InternalEnergyChange | StepMember::VolumeChange | StepMember::Work) => {
            let states = sheet.program.steps.get(id.0).map(|step| step.from.iter().chain(&step.to));
            asked.extend(states.into_iter().flatten());
        }
        _ => {}
    });
    asked.into_iter().flat_map(|id| density_beyond(sheet, id)).collect()
}

fn density_beyond(sheet: &WorkedSheet<'_>, id: StateId) -> Vec<Diagnostic> {
    let (Some(state), Some(slots)) = (sheet.program.states.get(id.0), sheet.map.states.get(id.0)) else {
        return Vec::new();
    };
    let mut found = Vec::new();
    for (part, place) in state.constituents.iter().zip(&slots.places) {
        let (Some(place), Some(species)) =
            (sheet.frame.placed(*place), sheet.program.species.get(part.species.0))
        else {
            continue;
        };
        let t = place.temperature().value;
        let present = species.curve.phases_at(place);
        for (phase, _) in present.present() {
            let given = species.data.iter().find(|datum| datum.kind == DatumKind::Density { phase });
            let Some((lo, hi)) = given.and_then(|datum| datum.valid) else { continue };
            if t < lo - 1e-9 || t > hi + 1e-9 {
                let message = format!(
                    "the volume of `{}` is asked at {t:.2} K, outside the density of `{}`, {lo} K to {hi} K",
                    state.name,
                    species.in_phase(phase)
                );
                found.push(
                    Diagnostic::new(Code::OutsideRange, message)
                        .label(state.span, format!("at {t:.2} K"))
                        .help("give a density whose range reaches there, with its source"),
                );
            }
        }
    }
    found
}

/// Steps of which ΔU, ΔV or W is asked, with condensed matter whose volume is not known.
fn neglected_volumes(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut asked: BTreeSet<StepId> = BTreeSet::new();
    sheet.program.each_expression(&mut |expr| {
        if let Node::Step(
            id,
            StepMember::InternalEnergyChange | StepMember::VolumeChange | StepMember::Work,
        ) = &expr.node
        {
            asked.insert(*id);
        }
    });
    asked
        .into_iter()
        .filter_map(|id| {
            let step = sheet.program.steps.get(id.0)?;
            let without = sheet.without_density(step);
            (!without.is_empty()).then(|| {
                Diagnostic::new(
                    Code::VolumeNeglected,
                    format!(
                        "`{}` neglects the volume of {}, which has no density",
                        step.name,
                        and_list(&without)
                    ),
                )
                .label(step.span, "ΔU, ΔV or W is asked of this step")
                .help("give the phase a line `density ... kg/m3`")
            })
        })
        .collect()
}

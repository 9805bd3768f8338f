//! Warnings that only a worked sheet can give.

use crate::diagnostic::{Code, Diagnostic, and_list};
use crate::program::{Node, StepId, StepMember};
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

/// Steps of which ΔU, ΔV or W is asked, with condensed matter whose volume is not known.
fn neglected_volumes(sheet: &WorkedSheet<'_>) -> Vec<Diagnostic> {
    let mut asked: BTreeSet<StepId> = BTreeSet::new();
    sheet.each_expression(&mut |expr| {
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

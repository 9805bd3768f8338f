//! Transitions between phases, and phases without one.

use super::checker::Checker;
use crate::diagnostic::{Code, Diagnostic};
use crate::span::Span;
use crate::syntax::tree::{Datum, Row, TransitionEntry, TransitionKind, TransitionPlace};
use crate::thermo::{Link, PhaseClass};
use crate::units::{Dimension, quantity};

/// A phase as far as its neighbours need to know it.
#[derive(Clone)]
pub(super) struct Neighbour {
    pub(super) name: String,
    /// Not known where it is not said.
    pub(super) class: Option<PhaseClass>,
    pub(super) own_formation: bool,
    pub(super) head: Span,
}

/// What a transition's data refer to.
pub(super) struct Material<'a> {
    pub(super) name: &'a str,
    pub(super) molar_mass: Option<f64>,
    pub(super) formation: bool,
}

impl Checker<'_> {
    /// The link between two phases; what stands between them in the block is `entry`.
    pub(super) fn link(
        &mut self,
        entry: Option<&TransitionEntry>,
        below: &Neighbour,
        above: &Neighbour,
        material: &Material<'_>,
    ) -> Option<Link> {
        let Some(entry) = entry else {
            if above.own_formation {
                return Some(Link::Apart);
            }
            self.unconnected(below, above);
            return None;
        };
        self.names_fit(&entry.kind, entry.span, below, above)?;
        match &entry.place {
            TransitionPlace::At(at) => {
                let temperature = quantity(self.datum_temperature(at, "the temperature of a transition")?);
                if let Some(along) = &entry.along {
                    self.along_without_range(along, entry.span);
                }
                match &entry.takes {
                    Some(takes) => {
                        Some(Link::At { temperature, latent: quantity(self.latent(takes, material)?) })
                    }
                    None if above.own_formation && (below.own_formation || material.formation) => {
                        Some(Link::AtFromFormations { temperature })
                    }
                    None => {
                        self.latent_missing(entry.span);
                        None
                    }
                }
            }
            TransitionPlace::Over(low, high) => {
                let from = self.datum_temperature(low, "the lower end of a transition")?;
                let to = self.datum_temperature(high, "the upper end of a transition")?;
                let Some(takes) = &entry.takes else {
                    self.latent_missing(entry.span);
                    return None;
                };
                let latent = quantity(self.latent(takes, material)?);
                let along = self.along(entry.along.as_deref().unwrap_or_default())?;
                Some(Link::Over { from: quantity(from), to: quantity(to), latent, along })
            }
        }
    }

    fn unconnected(&mut self, below: &Neighbour, above: &Neighbour) {
        let word = change_word(below, above);
        self.report(
            Diagnostic::new(
                Code::PhasesUnconnected,
                format!("no transition between the phases `{}` and `{}`", below.name, above.name),
            )
            .label(above.head, "how is this phase reached?")
            .label(below.head, "the phase before it")
            .help(format!(
                "add `{word} at ... K takes ... kJ/mol` between them, or give `{}` its own `formation`",
                above.name
            )),
        );
    }

    fn names_fit(
        &mut self,
        kind: &TransitionKind,
        span: Span,
        below: &Neighbour,
        above: &Neighbour,
    ) -> Option<()> {
        let fits = match kind {
            TransitionKind::Named(word) => match word.text.as_str() {
                "melting" => is(below, PhaseClass::Solid) && is(above, PhaseClass::Liquid),
                "boiling" => is(below, PhaseClass::Liquid) && is(above, PhaseClass::Gas),
                _ => is(below, PhaseClass::Solid) && is(above, PhaseClass::Gas),
            },
            TransitionKind::Between(low, high) => low.text == below.name && high.text == above.name,
        };
        if fits {
            return Some(());
        }
        let (a, b) = (&below.name, &above.name);
        self.report(
            Diagnostic::new(
                Code::TransitionNames,
                format!("this transition does not lead from `{a}` to `{b}`"),
            )
            .label(span, format!("it stands between `{a}` and `{b}`"))
            .help(format!(
                "write `{} at ... takes ...`, or put the phases in the order of heating",
                change_word(below, above)
            )),
        );
        None
    }

    fn latent_missing(&mut self, span: Span) {
        self.report(
            Diagnostic::new(Code::LatentMissing, "a transition without its enthalpy")
                .label(span, "no `takes`")
                .help("add `takes ... kJ/mol`; only between two phases with their own `formation` does it follow"),
        );
    }

    /// A latent heat in J/kg.
    fn latent(&mut self, takes: &Datum, material: &Material<'_>) -> Option<f64> {
        let read = self.datum_value(takes)?;
        let per_kilogram = if read.unit.dimension == Dimension::SPECIFIC_ENERGY {
            read.si
        } else if read.unit.dimension == Dimension::MOLAR_ENERGY {
            let Some(molar_mass) = material.molar_mass else {
                self.molar_datum(takes.span, material.name);
                return None;
            };
            read.si / molar_mass
        } else {
            let wanted = [Dimension::MOLAR_ENERGY, Dimension::SPECIFIC_ENERGY];
            self.wrong_dimension(takes.span, read.unit.dimension, &wanted, "a latent heat");
            return None;
        };
        if per_kilogram > 0.0 {
            return Some(per_kilogram);
        }
        self.report(
            Diagnostic::new(Code::LatentSign, "a latent heat that is not positive")
                .label(takes.span, "a transition on heating takes up heat")
                .help("give it as a positive number; on cooling it is given off by itself"),
        );
        None
    }

    fn along_without_range(&mut self, rows: &[Row], span: Span) {
        let place = rows.first().map_or(span, |row| row.at.span);
        self.report(
            Diagnostic::new(Code::MeltingRange, "`along` for a transition at one temperature")
                .label(place, "shares over a range")
                .help("write `over 843 K to 893 K`, or leave `along` out"),
        );
    }

    fn along(&mut self, rows: &[Row]) -> Option<Vec<(uom::si::f64::ThermodynamicTemperature, f64)>> {
        rows.iter()
            .map(|row| {
                let at = self.datum_temperature(&row.at, "the temperature of a point")?;
                let share = self.datum_of(&row.value, Dimension::ONE, "the share that has changed")?;
                Some((quantity(at), share))
            })
            .collect()
    }
}

/// The words that begin a transition between two phases.
fn change_word(below: &Neighbour, above: &Neighbour) -> String {
    match (below.class, above.class) {
        (Some(PhaseClass::Solid), Some(PhaseClass::Liquid)) => "melting".to_owned(),
        (Some(PhaseClass::Liquid), Some(PhaseClass::Gas)) => "boiling".to_owned(),
        (Some(PhaseClass::Solid), Some(PhaseClass::Gas)) => "sublimation".to_owned(),
        _ => format!("transition {} to {}", below.name, above.name),
    }
}

/// Whether a phase is of a class; of one that is not said nothing is held against it.
fn is(phase: &Neighbour, class: PhaseClass) -> bool {
    phase.class.is_none_or(|known| known == class)
}

//! `allow`: a datum may be used beyond its range, and why.

use super::checker::{Checker, Material};
use crate::diagnostic::{Code, Diagnostic};
use crate::program::Allowance;
use crate::span::Span;
use crate::syntax::tree::Allow;
use crate::thermo::Pin;

impl Checker<'_> {
    pub(super) fn allow(&mut self, allow: &Allow, span: Span) {
        let from =
            allow.from.as_ref().map(|datum| self.datum_temperature(datum, "the lower end of an allowance"));
        let to =
            allow.to.as_ref().map(|datum| self.datum_temperature(datum, "the upper end of an allowance"));
        let Some(because) = &allow.because else {
            self.report(
                Diagnostic::new(Code::Unreadable, "an allowance without its reason")
                    .label(span, "no `because`")
                    .help(format!("add `because \"...\"` to `allow {}`", allow.species.to_text())),
            );
            return;
        };
        if from.is_none() && to.is_none() {
            self.admits_nothing(
                span,
                "neither `from` nor `to`",
                &format!("write `allow {} to 1250 K because \"...\"`", allow.species.to_text()),
            );
            return;
        }
        let (Ok(from), Ok(to)) = (transposed(from), transposed(to)) else { return };
        let Some(material) = self.material(&allow.species) else { return };
        let Material::Species(id) = material else {
            self.admits_nothing(
                allow.species.span,
                "a mixture has no data of its own",
                "name the species, such as `allow Zn(l) to ...`",
            );
            return;
        };
        let Some(pin) = self.pin(id, &allow.species) else { return };
        let Pin::Phase(phase) = pin else {
            let name = allow.species.name.clone();
            self.admits_nothing(
                allow.species.span,
                "which phase?",
                &format!("add the state symbol, such as `{name}(l)`"),
            );
            return;
        };
        let Some(species) = self.program.species.get(id.0) else { return };
        let Some((lo, hi)) = species.curve.phase_span(phase) else { return };
        let helps = from.is_some_and(|from| from < lo.value) || to.is_some_and(|to| to > hi.value);
        let wrong = from.is_some_and(|from| from > hi.value) || to.is_some_and(|to| to < lo.value);
        let decomposes = species.curve.decomposes_at().is_some_and(|at| to.is_some_and(|to| to > at.value));
        if (!helps && !decomposes) || wrong {
            let label = format!("the data hold from {} K to {} K", lo.value, hi.value);
            self.admits_nothing(span, &label, "leave it out, or give an end beyond the data");
            return;
        }
        let again = species.allowances.iter().find(|first| {
            let both = |a: Option<f64>, b: Option<f64>| a.is_some() && b.is_some();
            first.phase == phase && (both(first.from, from) || both(first.to, to))
        });
        if let Some(first) = again.map(|first| first.span) {
            self.allowed_twice(&allow.species.to_text(), first, span);
            return;
        }
        let allowance = Allowance { phase, from, to, because: because.text.clone(), span };
        if let Some(species) = self.program.species.get_mut(id.0) {
            species.allowances.push(allowance);
        }
    }

    /// Two reasons for one end: a report could not say which of them holds.
    fn allowed_twice(&mut self, phase: &str, first: Span, span: Span) {
        self.report(
            Diagnostic::new(
                Code::DatumTwice,
                format!("a second allowance for one end of the data of `{phase}`"),
            )
            .label(span, "allowed again here")
            .label(first, "allowed first here")
            .help("keep one line for each end, with the reason that holds for all of it"),
        );
    }

    fn admits_nothing(&mut self, span: Span, label: &str, help: &str) {
        self.report(
            Diagnostic::new(Code::AllowWrong, "an allowance that admits nothing")
                .label(span, label)
                .help(help),
        );
    }
}

/// An end that is not said, said, or said wrongly (which is reported).
fn transposed(end: Option<Option<f64>>) -> Result<Option<f64>, ()> {
    match end {
        None => Ok(None),
        Some(Some(value)) => Ok(Some(value)),
        Some(None) => Err(()),
    }
}

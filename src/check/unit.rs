//! Units: texts to units, and what is said of those that are none.

use super::checker::Checker;
use crate::diagnostic::{Code, Diagnostic};
use crate::span::Span;
use crate::syntax::tree::UnitText;
use crate::units::{Calorie, Unit, UnitError, read_unit};

impl Checker<'_> {
    /// The unit of a text; one that cannot be read is reported.
    pub(super) fn unit(&mut self, text: &UnitText) -> Option<Unit> {
        match read_unit(&text.text) {
            Ok(unit) => {
                self.note_calorie(&unit, text.span);
                Some(unit)
            }
            Err(error) => {
                self.report(unit_error(&error, text));
                None
            }
        }
    }

    /// Notes on which calorie a unit rests.
    pub(super) fn note_calorie(&mut self, unit: &Unit, span: Span) {
        if let Some(flavour) = unit.flavour
            && !self.calories.iter().any(|(known, _)| *known == flavour)
        {
            self.calories.push((flavour, span));
        }
    }

    /// Thermochemical and International Table units differ by 0.07 %, which nobody sees.
    pub(super) fn warn_of_mixed_calories(&mut self) {
        let first =
            |wanted: Calorie| self.calories.iter().find(|(flavour, _)| *flavour == wanted).map(|(_, at)| *at);
        let (thermochemical, table, both) =
            (first(Calorie::Thermochemical), first(Calorie::InternationalTable), first(Calorie::Both));
        let found = match (thermochemical, table, both) {
            (_, _, Some(place)) => Diagnostic::new(Code::CaloriesMixed, "two calories in one unit")
                .label(place, "a thermochemical and an International Table unit"),
            (Some(one), Some(other), None) => Diagnostic::new(
                Code::CaloriesMixed,
                "thermochemical and International Table units in one sheet",
            )
            .label(one.max(other), "the second sort here")
            .label(one.min(other), "the first sort here"),
            _ => return,
        };
        self.report(found.help("cal and kcal are thermochemical (4.184 J), Btu is International Table (1055.056 J): check the sources"));
    }
}

/// A unit error at its place.
pub(super) fn unit_error(error: &UnitError, text: &UnitText) -> Diagnostic {
    let range = error.range();
    let start = text.span.start + u32::try_from(range.start).unwrap_or(0);
    let end = (text.span.start + u32::try_from(range.end).unwrap_or(0)).max(start + 1);
    let place =
        if range.is_empty() { text.span } else { Span { start, end: end.min(text.span.end), ..text.span } };
    let whole = text.text.trim_start_matches('/');
    match error {
        UnitError::Unknown { word, nearest, .. } => {
            let found = Diagnostic::new(Code::UnknownUnit, format!("unknown unit `{word}`"))
                .label(place, "no unit of this name");
            match nearest {
                Some(near) => {
                    found.help(format!("did you mean `{}`?", whole.replacen(word.as_str(), near, 1)))
                }
                None => found.help("`heatpath units` lists the units"),
            }
        }
        UnitError::Ambiguous { word, choices, why, .. } => {
            Diagnostic::new(Code::AmbiguousUnit, format!("`{word}` has more than one meaning: {why}"))
                .label(place, "which one is meant?")
                .help(format!("write {}", crate::diagnostic::or_list(&quoted(choices))))
        }
        UnitError::ProductBelow { word, choices, .. } => {
            Diagnostic::new(Code::AmbiguousUnit, format!("a product after a solidus in `{word}`"))
                .label(place, "below the solidus or beside it?")
                .help(format!("write `{}` or `{}`", choices[0], choices[1]))
        }
        UnitError::CubicNanometre { word, .. } => {
            Diagnostic::new(Code::CubicNanometre, format!("`{word}` is a cubic nanometre"))
                .label(place, "normal cubic metres were probably meant")
                .help(format!("write `{}`", whole.replacen(word.as_str(), "Nm3", 1)))
        }
        UnitError::Power { word, .. } => {
            Diagnostic::new(Code::UnitPower, format!("the power in `{word}` is out of range"))
                .label(place, "powers from -99 to 99 are read")
                .help("check the exponent")
        }
        UnitError::ReadingInCompound { word, .. } => {
            let plain = word.strip_suffix('g').unwrap_or(word);
            Diagnostic::new(
                Code::ReadingInCompound,
                format!("the gauge unit `{word}` inside a compound unit"),
            )
            .label(place, "a reading above the atmosphere has no place in a product")
            .help(format!("write `{}`", whole.replacen(word.as_str(), plain, 1)))
        }
        UnitError::Malformed { why, .. } => {
            Diagnostic::new(Code::UnknownUnit, format!("the unit `{whole}` cannot be read: {why}"))
                .label(place, "reading stopped here")
                .help("write a unit such as `kJ/(kg K)`")
        }
    }
}

fn quoted(choices: &[&str]) -> Vec<String> {
    choices.iter().map(|choice| format!("`{choice}`")).collect()
}

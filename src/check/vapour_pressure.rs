//! Vapour-pressure entries to laws.

use super::checker::Checker;
use super::wanted::with_dimension;
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::span::Span;
use crate::syntax::tree::{self, Coefficient, Word};
use crate::thermo::vapour_pressure::{WAGNER_25, WAGNER_36, WAGNER_WATER};
use crate::thermo::{SaturationFault, VapourPressure, VapourPressureError, VapourPressureForm};
use crate::units::{Dimension, Zero, quantity};

/// The published forms with the coefficients that each needs, then those that it may have.
const FORMS: &[(&str, &[&str], &[&str])] = &[
    ("antoine", &["A", "B", "C", "p"], &["t0"]),
    ("antoine_ln", &["A", "B", "C", "p"], &["t0"]),
    ("kirchhoff", &["A", "B", "C", "p"], &[]),
    ("wagner", &["a", "b", "c", "d", "Tc", "pc"], &[]),
    ("wagner36", &["a", "b", "c", "d", "Tc", "pc"], &[]),
    ("wagner_water", &["a", "b", "c", "d", "e", "f", "Tc", "pc"], &[]),
];

/// 0 degC in K.
const ICE_POINT: f64 = 273.15;

impl Checker<'_> {
    /// A vapour-pressure entry as a law.
    pub(super) fn vapour_pressure(&mut self, entry: &tree::VapourPressure) -> Option<VapourPressure> {
        let range = entry.range.as_ref().and_then(|(low, high)| {
            Some((
                self.datum_temperature(low, "the lower end of a range")?,
                self.datum_temperature(high, "the upper end of a range")?,
            ))
        });
        let form = self.vapour_pressure_form(&entry.form, &entry.coefficients);
        if entry.range.is_none() {
            self.report(
                Diagnostic::new(Code::DatumMissing, "a vapour pressure without its range")
                    .label(entry.span, "from where to where does it hold?")
                    .help("add `for 280 K to 640 K`"),
            );
        }
        let (lo, hi) = range?;
        match VapourPressure::new(form?, quantity(lo), quantity(hi)) {
            Ok(law) => Some(law),
            Err(error) => {
                self.report(law_error(error, entry.span));
                None
            }
        }
    }

    fn vapour_pressure_form(&mut self, form: &Word, given: &[Coefficient]) -> Option<VapourPressureForm> {
        let Some((name, needed, optional)) = FORMS.iter().find(|(name, ..)| *name == form.text) else {
            let names: Vec<&str> = FORMS.iter().map(|(name, ..)| *name).collect();
            let help = match nearest(&form.text, names.iter().copied()) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("forms: {}", names.join(", ")),
            };
            self.report(
                Diagnostic::new(
                    Code::Coefficients,
                    format!("unknown form of vapour pressure `{}`", form.text),
                )
                .label(form.span, "no published form of this name")
                .help(help),
            );
            return None;
        };
        self.coefficients_fit(form, given, needed, optional)?;
        let find = |wanted: &str| given.iter().find(|coefficient| coefficient.name.text == wanted);
        let mut values = Vec::new();
        for wanted in needed.iter().filter_map(|wanted| find(wanted)) {
            values.push(self.vapour_pressure_coefficient(wanted, name));
        }
        let zero = match find("t0") {
            Some(zero) => self.zero_of_scale(zero)?,
            None => 0.0,
        };
        let values: Vec<f64> = values.into_iter().collect::<Option<_>>()?;
        Some(match (*name, values.as_slice()) {
            ("antoine", &[a, b, c, unit]) => VapourPressureForm::Antoine { a, b, c: c - zero, unit },
            ("antoine_ln", &[a, b, c, unit]) => {
                let to_ten = std::f64::consts::LOG10_E;
                VapourPressureForm::Antoine { a: a * to_ten, b: b * to_ten, c: c - zero, unit }
            }
            ("kirchhoff", &[a, b, c, unit]) => VapourPressureForm::Kirchhoff { a, b, c, unit },
            ("wagner", &[.., tc, pc]) => VapourPressureForm::wagner(values.get(..4)?, &WAGNER_25, tc, pc),
            ("wagner36", &[.., tc, pc]) => VapourPressureForm::wagner(values.get(..4)?, &WAGNER_36, tc, pc),
            (_, &[.., tc, pc]) => VapourPressureForm::wagner(values.get(..6)?, &WAGNER_WATER, tc, pc),
            _ => return None,
        })
    }

    /// A coefficient in its dimension: critical data, the unit of pressure, temperatures of Antoine's and
    /// Kirchhoff's, pure numbers elsewhere.
    fn vapour_pressure_coefficient(&mut self, coefficient: &Coefficient, form: &str) -> Option<f64> {
        let name = coefficient.name.text.as_str();
        let wanted = match (name, form) {
            ("p" | "pc", _) => Dimension::PRESSURE,
            ("Tc", _) | ("B", _) | ("C", "antoine" | "antoine_ln") => Dimension::TEMPERATURE,
            _ => Dimension::ONE,
        };
        let read = self.datum_value(&coefficient.value)?;
        let span = coefficient.value.span;
        if read.unit.dimension != wanted {
            let found = with_dimension(read.unit.dimension);
            let help = match wanted {
                Dimension::PRESSURE if name == "pc" => {
                    "write the critical pressure with its unit, such as `pc = 61.3 bar`"
                }
                Dimension::PRESSURE => "publications differ: write the unit of theirs, such as `p = 1 bar`",
                Dimension::TEMPERATURE => "write it in K; for a publication in degC add `t0 = 0 degC`",
                _ => "take the unit away: the published form fixes it",
            };
            self.bad_coefficient(span, &format!("`{name}` is {} here", with_dimension(wanted)), &found, help);
            return None;
        }
        let reading = read.unit.zero != Zero::None;
        if reading && name != "Tc" {
            let help = if wanted == Dimension::PRESSURE {
                "an absolute pressure is wanted, such as `p = 1 bar`"
            } else {
                "write it in K, as a difference; for a publication in degC add `t0 = 0 degC`"
            };
            self.bad_coefficient(span, &format!("`{name}` is no reading of a scale"), "a reading here", help);
            return None;
        }
        let positive = matches!(name, "p" | "pc" | "Tc");
        if positive && read.si <= 0.0 {
            self.bad_coefficient(
                span,
                &format!("`{name}` is not positive"),
                "not above zero",
                "check its sign",
            );
            return None;
        }
        Some(read.si)
    }

    /// Where the temperatures of a publication are zero: 0 degC, or 0 K.
    fn zero_of_scale(&mut self, coefficient: &Coefficient) -> Option<f64> {
        let kelvin =
            self.datum_temperature(&coefficient.value, "the zero of the publication's temperatures")?;
        if kelvin == 0.0 || (kelvin - ICE_POINT).abs() < 1e-9 {
            return Some(kelvin);
        }
        let help = "write `t0 = 0 degC` for a publication in degC, nothing for one in K";
        self.bad_coefficient(coefficient.value.span, "`t0` is the zero of a temperature scale", "here", help);
        None
    }

    fn bad_coefficient(&mut self, span: Span, message: &str, label: &str, help: &str) {
        self.report(Diagnostic::new(Code::Coefficients, message.to_owned()).label(span, label).help(help));
    }
}

fn law_error(error: VapourPressureError, span: Span) -> Diagnostic {
    let (message, help) = match error {
        VapourPressureError::EmptyRange => (
            "a vapour pressure whose range does not rise, or does not lie above 0 K".to_owned(),
            "write `for 280 K to 640 K`",
        ),
        VapourPressureError::Domain { lo, hi } if hi.value.is_finite() => (
            format!("a vapour pressure whose range leaves {} K to {} K", lo.value, hi.value),
            "above its critical point a substance has no vapour pressure",
        ),
        VapourPressureError::Domain { lo, .. } => (
            format!("a vapour pressure whose range reaches its pole at {} K", lo.value),
            "check the sign of `C`, and whether the publication counts in degC: `t0 = 0 degC`",
        ),
        VapourPressureError::NotFinite { temperature } => (
            format!("a vapour pressure that is no finite number at {} K", temperature.value),
            "check the powers of ten of its coefficients",
        ),
        VapourPressureError::Falls { temperature } => (
            format!("a vapour pressure that does not rise with temperature at {} K", temperature.value),
            "check the signs of its coefficients",
        ),
    };
    Diagnostic::new(Code::VapourPressureWrong, message).label(span, "this law").help(help)
}

/// A law that does not fit its species.
pub(super) fn misfit(fault: SaturationFault, span: Span) -> Diagnostic {
    let (message, help) = match fault {
        SaturationFault::NoBoiling => (
            "a vapour pressure of a species that does not boil".to_owned(),
            "add `boiling at ... takes ...` between a liquid and a gas",
        ),
        SaturationFault::Contradiction { temperature, pressure } => (
            format!(
                "a vapour pressure of {:.1} kPa at the stated boiling point, {} K, where it is 101.325 kPa",
                pressure.value / 1e3,
                temperature.value
            ),
            "check the publication's unit of pressure, its logarithm (`antoine`, `antoine_ln`) and its zero of temperature (`t0`)",
        ),
        SaturationFault::BeyondLiquid { lo, hi } => (
            format!(
                "a vapour pressure whose range does not meet that of its liquid, {} K to {} K",
                lo.value, hi.value
            ),
            "check whether its range is in K or in degC",
        ),
        SaturationFault::BelowMelting => (
            "a vapour pressure whose range lies below the melting of the liquid".to_owned(),
            "give the law of the liquid",
        ),
    };
    Diagnostic::new(Code::VapourPressureWrong, message).label(span, "this law").help(help)
}

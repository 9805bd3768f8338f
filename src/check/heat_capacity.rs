//! Heat-capacity entries to laws.

use super::checker::{Checker, Claim};
use super::law_formula::{as_powers, compiled};
use super::wanted::with_dimension;
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::numeric::{Shape, math};
use crate::span::Span;
use crate::syntax::tree::{
    Coefficient, CoefficientForm, Datum, Expression, HeatCapacityEntry, LawText, Row, Word,
};
use crate::thermo::{Basis, HeatCapacity, HeatCapacityError, LawRange, MaierKelley};
use crate::units::{Dimension, quantity};

/// The published forms with the coefficients that each needs, then those that it may have.
const FORMS: &[(&str, &[&str], &[&str])] = &[
    ("nasa9", &["a1", "a2", "a3", "a4", "a5", "a6", "a7", "R"], &["b1", "b2"]),
    ("nasa7", &["a1", "a2", "a3", "a4", "a5", "R"], &["a6", "a7"]),
    ("shomate", &["A", "B", "C", "D", "E"], &["F", "G", "H"]),
    ("maier_kelley", &["a", "b", "c"], &["d", "e"]),
];

impl Checker<'_> {
    /// A heat-capacity entry as a law with its range; molar data want the molar mass.
    pub(super) fn heat_capacity(
        &mut self,
        entry: &LawText<HeatCapacityEntry>,
        molar_mass: Option<f64>,
        species: &str,
    ) -> Option<LawRange> {
        let range = match &entry.value.range {
            Some((low, high)) => Some((
                self.datum_temperature(low, "the lower end of a range")?,
                self.datum_temperature(high, "the upper end of a range")?,
            )),
            None => None,
        };
        let context = Context { molar_mass, species, span: entry.span, range };
        let law = match &entry.value.form {
            CoefficientForm::Formula(formula) => self.formula_law(formula, &context),
            CoefficientForm::Published(form, coefficients) => {
                self.published_law(form, coefficients, &context)
            }
            CoefficientForm::Table(rows, linear) => self.cp_table(rows, *linear, &context),
            CoefficientForm::EnthalpyTable(from, rows) => self.enthalpy_table(from, rows, &context),
            CoefficientForm::MeanTable(from, rows) => self.mean_table(from, rows, &context),
        }?;
        let (lo, hi) = match range.or_else(|| law.span().map(|(lo, hi)| (lo.value, hi.value))) {
            Some(range) => range,
            None => {
                self.range_missing(entry.span);
                return None;
            }
        };
        Some(LawRange { lo: quantity(lo), hi: quantity(hi), law })
    }

    fn range_missing(&mut self, span: Span) {
        self.report(
            Diagnostic::new(Code::DatumMissing, "a heat capacity without its range")
                .label(span, "from where to where does it hold?")
                .help("add `for 298.15 K to 700 K`"),
        );
    }

    /// Per mole or per kilogram, by the dimension.
    fn basis(
        &mut self,
        dimension: Dimension,
        span: Span,
        context: &Context<'_>,
        kinds: [Dimension; 2],
    ) -> Option<Basis> {
        if dimension == kinds[1] {
            return Some(Basis::Mass);
        }
        if dimension != kinds[0] {
            let text = self.written(span);
            let what =
                if kinds[0] == Dimension::MOLAR_HEAT_CAPACITY { "a heat capacity" } else { "an enthalpy" };
            let example = if kinds[0] == Dimension::MOLAR_HEAT_CAPACITY {
                "J/(mol K) or kJ/(kg K)"
            } else {
                "kJ/mol or kJ/kg"
            };
            self.report(
                Diagnostic::new(
                    Code::HeatCapacityDimension,
                    format!("`{text}` is {}, where {what} is wanted", with_dimension(dimension)),
                )
                .label(span, format!("{} here", with_dimension(dimension)))
                .help(format!("{what} is given per mole or per mass, in {example}")),
            );
            return None;
        }
        let Some(molar_mass) = context.molar_mass else {
            self.molar_datum(span, context.species);
            return None;
        };
        Some(Basis::Molar(quantity(molar_mass)))
    }

    /// A molar datum of a material whose molar mass is not known.
    pub(super) fn molar_datum(&mut self, span: Span, species: &str) {
        self.report(
            Diagnostic::new(Code::MolarDatum, format!("a molar datum, but `{species}` has no molar mass"))
                .label(span, "per mole here")
                .help("add `formula ...` or `molar_mass ... g/mol`, or give the datum per mass"),
        );
    }

    fn formula_law(&mut self, formula: &Expression, context: &Context<'_>) -> Option<HeatCapacity> {
        let checked = self.formula(formula)?;
        let basis = self.basis(checked.dimension, checked.span, context, CP)?;
        let Some((low, _)) = context.range else {
            self.range_missing(context.span);
            return None;
        };
        let law = match as_powers(&checked) {
            Some(terms) => HeatCapacity::powers(&terms, basis),
            None => match compiled(&checked) {
                Some(code) => HeatCapacity::formula(code, quantity(low), basis),
                None => {
                    let text = self.written(checked.span);
                    self.report(
                        Diagnostic::new(
                            Code::Coefficients,
                            format!("the formula `{text}` is too deep, or no function of T"),
                        )
                        .label(checked.span, "cannot be worked as a heat capacity")
                        .help("write it as a sum of terms"),
                    );
                    return None;
                }
            },
        };
        self.law(law, context)
    }

    fn law(
        &mut self,
        law: Result<HeatCapacity, HeatCapacityError>,
        context: &Context<'_>,
    ) -> Option<HeatCapacity> {
        let error = match law {
            Ok(law) => return Some(law),
            Err(error) => error,
        };
        let (code, message, help) = match error {
            HeatCapacityError::NoTerms => {
                (Code::DatumMissing, "no term at all", "give at least one coefficient")
            }
            HeatCapacityError::NotFinite { .. } => {
                (Code::Coefficients, "a coefficient that is no finite number", "check the powers of ten")
            }
            HeatCapacityError::Factor => (
                Code::Coefficients,
                "a gas constant or molar mass that is not positive",
                "write the publication's `R = 8.314510`",
            ),
            HeatCapacityError::Table(_) => (
                Code::TableOrder,
                "a table whose temperatures do not rise, or with fewer than two rows",
                "sort the rows by rising temperature, each temperature once",
            ),
            HeatCapacityError::BelowAbsoluteZero { .. } => (
                Code::BelowAbsoluteZero,
                "a temperature that is not above absolute zero",
                "check the unit of the temperatures",
            ),
        };
        self.report(
            Diagnostic::new(code, format!("the heat capacity has {message}"))
                .label(context.span, "here")
                .help(help),
        );
        None
    }

    fn published_law(
        &mut self,
        form: &Word,
        given: &[Coefficient],
        context: &Context<'_>,
    ) -> Option<HeatCapacity> {
        let Some((name, needed, optional)) = FORMS.iter().find(|(name, ..)| *name == form.text) else {
            let names: Vec<&str> = FORMS.iter().map(|(name, ..)| *name).collect();
            let found =
                Diagnostic::new(Code::Coefficients, format!("unknown form of heat capacity `{}`", form.text))
                    .label(form.span, "no published form of this name");
            let help = match nearest(&form.text, names.iter().copied()) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("forms: {}, or a formula `cp = ...`, or `cp table`", names.join(", ")),
            };
            self.report(found.help(help));
            return None;
        };
        self.coefficients_fit(form, given, needed, optional)?;
        if *name == "maier_kelley" {
            return self.maier_kelley(given, context);
        }
        let value = |wanted: &str| given.iter().find(|coefficient| coefficient.name.text == wanted);
        let mut numbers = Vec::new();
        for wanted in *needed {
            numbers.push(self.pure_coefficient(value(wanted)?)?);
        }
        let Some(molar_mass) = context.molar_mass else {
            self.molar_datum(context.span, context.species);
            return None;
        };
        let molar_mass = quantity(molar_mass);
        if let Some(claim) = self.claim(name, given, &numbers, context) {
            self.claims.push(claim);
        }
        let law = match (*name, numbers.as_slice()) {
            ("nasa9", &[a1, a2, a3, a4, a5, a6, a7, r]) => {
                HeatCapacity::nasa9([a1, a2, a3, a4, a5, a6, a7], quantity(r), molar_mass)
            }
            ("nasa7", &[a1, a2, a3, a4, a5, r]) => {
                HeatCapacity::nasa7([a1, a2, a3, a4, a5], quantity(r), molar_mass)
            }
            (_, &[a, b, c, d, e]) => HeatCapacity::shomate([a, b, c, d, e], molar_mass),
            _ => return None,
        };
        self.law(law, context)
    }

    /// What the form's own enthalpy constant says, in the middle of its range.
    fn claim(
        &mut self,
        form: &str,
        given: &[Coefficient],
        numbers: &[f64],
        context: &Context<'_>,
    ) -> Option<Claim> {
        let (low, high) = context.range?;
        let constant_name = match form {
            "nasa9" => "b1",
            "nasa7" => "a6",
            _ => "F",
        };
        let constant = given.iter().find(|coefficient| coefficient.name.text == constant_name)?;
        let constant = self.pure_coefficient(constant)?;
        let kelvin = 0.5 * (low + high);
        Some(Claim { span: context.span, kelvin, enthalpy: own_enthalpy(form, numbers, constant, kelvin)? })
    }

    pub(super) fn coefficients_fit(
        &mut self,
        form: &Word,
        given: &[Coefficient],
        needed: &[&str],
        optional: &[&str],
    ) -> Option<()> {
        let mut fits = Some(());
        for (at, coefficient) in given.iter().enumerate() {
            let name = coefficient.name.text.as_str();
            let message = if !needed.contains(&name) && !optional.contains(&name) {
                format!("`{}` has no coefficient `{name}`", form.text)
            } else if given[..at].iter().any(|before| before.name.text == name) {
                format!("the coefficient `{name}` is given twice")
            } else {
                continue;
            };
            let help = format!("`{}` takes {}", form.text, needed.join(", "));
            self.report(
                Diagnostic::new(Code::Coefficients, message).label(coefficient.name.span, "here").help(help),
            );
            fits = None;
        }
        let missing: Vec<&str> = needed
            .iter()
            .copied()
            .filter(|name| !given.iter().any(|coefficient| coefficient.name.text == *name))
            .collect();
        if !missing.is_empty() {
            let help = if missing.contains(&"R") {
                "`R` is the gas constant that the publication used, such as `R = 8.314510`".to_owned()
            } else {
                format!("add {}, as 0 where the publication has none", missing.join(", "))
            };
            self.report(
                Diagnostic::new(Code::Coefficients, format!("`{}` lacks {}", form.text, missing.join(", ")))
                    .label(form.span, "coefficients are missing here")
                    .help(help),
            );
            fits = None;
        }
        fits
    }

    /// A coefficient that is a pure number (`R` may carry its unit).
    fn pure_coefficient(&mut self, coefficient: &Coefficient) -> Option<f64> {
        let read = self.datum_value(&coefficient.value)?;
        let gas_constant =
            coefficient.name.text == "R" && read.unit.dimension == Dimension::MOLAR_HEAT_CAPACITY;
        if read.unit.dimension.is_one() || gas_constant {
            return Some(read.si);
        }
        self.report(
            Diagnostic::new(
                Code::Coefficients,
                format!("the coefficient `{}` is a pure number here", coefficient.name.text),
            )
            .label(coefficient.value.span, format!("{} here", with_dimension(read.unit.dimension)))
            .help("take the unit away: the published form fixes it"),
        );
        None
    }

    /// `a + b T + c/T² + d/√T + e T²`, each with its unit; `d`, whose unit has a root, as a number in SI.
    fn maier_kelley(&mut self, given: &[Coefficient], context: &Context<'_>) -> Option<HeatCapacity> {
        let first = given.iter().find(|coefficient| coefficient.name.text == "a")?;
        let a = self.datum_value(&first.value)?;
        let basis = self.basis(a.unit.dimension, first.value.span, context, CP)?;
        let mut values = MaierKelley { a: a.si, b: 0.0, c: 0.0, d: 0.0, e: 0.0 };
        for coefficient in given.iter().filter(|coefficient| coefficient.name.text != "a") {
            let (slot, power) = match coefficient.name.text.as_str() {
                "b" => (&mut values.b, Some(-1)),
                "c" => (&mut values.c, Some(2)),
                "e" => (&mut values.e, Some(-2)),
                _ => (&mut values.d, None),
            };
            let wanted = match power {
                Some(power) => a.unit.dimension.times(Dimension::TEMPERATURE.power(power)?)?,
                None => Dimension::ONE,
            };
            let what = format!("the coefficient `{}`", coefficient.name.text);
            *slot = self.datum_of(&coefficient.value, wanted, &what)?;
        }
        let law = HeatCapacity::maier_kelley(values, basis);
        self.law(law, context)
    }

    fn cp_table(&mut self, rows: &[Row], linear: bool, context: &Context<'_>) -> Option<HeatCapacity> {
        let (points, basis) = self.points(rows, context, CP)?;
        let shape = if linear { Shape::Linear } else { Shape::MonotoneCubic };
        let law = HeatCapacity::table(&points, shape, basis);
        self.law(law, context)
    }

    /// An enthalpy table counts from a temperature at which it is zero.
    fn enthalpy_table(&mut self, from: &Datum, rows: &[Row], context: &Context<'_>) -> Option<HeatCapacity> {
        let from = self.datum_temperature(from, "the temperature that the table counts from")?;
        let (mut points, basis) =
            self.points(rows, context, [Dimension::MOLAR_ENERGY, Dimension::SPECIFIC_ENERGY])?;
        if !points.iter().any(|(t, _)| *t == from) {
            let at = points.partition_point(|(t, _)| *t < from);
            points.insert(at, (from, 0.0));
        }
        let law = HeatCapacity::enthalpy_table(&points, Shape::MonotoneCubic, basis);
        self.law(law, context)
    }

    fn mean_table(&mut self, from: &Datum, rows: &[Row], context: &Context<'_>) -> Option<HeatCapacity> {
        let from = self.datum_temperature(from, "the temperature that the means count from")?;
        let (points, basis) = self.points(rows, context, CP)?;
        let law = HeatCapacity::mean_table(quantity(from), &points, Shape::MonotoneCubic, basis);
        self.law(law, context)
    }

    /// The rows of a table in SI, all of one dimension, rising.
    fn points(
        &mut self,
        rows: &[Row],
        context: &Context<'_>,
        kinds: [Dimension; 2],
    ) -> Option<(Vec<(f64, f64)>, Basis)> {
        let mut points: Vec<(f64, f64)> = Vec::with_capacity(rows.len());
        let mut basis = None;
        for row in rows {
            let at = self.datum_temperature(&row.at, "the temperature of a row")?;
            let read = self.datum_value(&row.value)?;
            let this = self.basis(read.unit.dimension, row.value.span, context, kinds)?;
            if basis.is_some_and(|basis| basis != this) {
                self.report(
                    Diagnostic::new(
                        Code::HeatCapacityDimension,
                        "a table with rows per mole and rows per mass",
                    )
                    .label(row.value.span, "of the other sort")
                    .help("give all rows in one unit"),
                );
                return None;
            }
            basis = Some(this);
            if points.last().is_some_and(|(before, _)| *before >= at) {
                self.report(
                    Diagnostic::new(Code::TableOrder, "the temperatures of a table do not rise")
                        .label(row.at.span, "not above the row before")
                        .help("sort the rows by rising temperature, each temperature once"),
                );
                return None;
            }
            points.push((at, read.si));
        }
        Some((points, basis?))
    }
}

const CP: [Dimension; 2] = [Dimension::MOLAR_HEAT_CAPACITY, Dimension::SPECIFIC_HEAT_CAPACITY];

/// What the entry belongs to.
struct Context<'a> {
    molar_mass: Option<f64>,
    species: &'a str,
    span: Span,
    range: Option<(f64, f64)>,
}

/// The absolute enthalpy of a published form at a temperature by its own constant, J/mol: NASA 9-term
/// (NASA/TP-2002-211556), NASA 7-term (NASA TM-4513), Shomate with t = T/1000 K.
fn own_enthalpy(form: &str, numbers: &[f64], constant: f64, kelvin: f64) -> Option<f64> {
    let t = kelvin;
    match (form, numbers) {
        ("nasa9", &[a1, a2, a3, a4, a5, a6, a7, r]) => {
            let rising = t * (a3 + t * (a4 / 2.0 + t * (a5 / 3.0 + t * (a6 / 4.0 + t * a7 / 5.0))));
            Some(r * (-a1 / t + a2 * math::ln(t) + rising + constant))
        }
        ("nasa7", &[a1, a2, a3, a4, a5, r]) => {
            Some(r * (t * (a1 + t * (a2 / 2.0 + t * (a3 / 3.0 + t * (a4 / 4.0 + t * a5 / 5.0)))) + constant))
        }
        (_, &[a, b, c, d, e]) => {
            let t = t / 1000.0;
            let rising = t * (a + t * (b / 2.0 + t * (c / 3.0 + t * d / 4.0)));
            Some(1e3 * (rising - e / t + constant))
        }
        _ => None,
    }
}

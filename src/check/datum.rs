//! Intervals, sources and spreads: what may follow an input or a datum.

use super::checker::Checker;
use super::wanted::with_dimension;
use crate::diagnostic::{Code, Diagnostic};
use crate::program::{Interval, IntervalShape};
use crate::span::Span;
use crate::syntax::tree::{self, IntervalMark, Literal, Suffixes};
use crate::units::{Dimension, Kind, Zero, read_unit};

/// The value that an interval lies about.
#[derive(Clone, Copy)]
pub(super) struct About {
    pub(super) dimension: Dimension,
    pub(super) kind: Kind,
    /// The value in SI, where it is known before evaluation.
    pub(super) si: f64,
    /// Whether the value is written in `%`.
    pub(super) percent: bool,
    pub(super) span: Span,
}

impl Checker<'_> {
    /// The interval of a value; at most one is written.
    pub(super) fn interval(&mut self, suffixes: &Suffixes, about: About) -> Option<Interval> {
        if let [_, second, ..] = suffixes.intervals.as_slice() {
            self.report(
                Diagnostic::new(Code::DatumTwice, "a second interval for one value")
                    .label(second.span, "one interval is enough")
                    .help("keep one `±`"),
            );
        }
        self.one_source(suffixes);
        if let Some(spread) = suffixes.spreads.first() {
            self.report(
                Diagnostic::new(Code::Unreadable, "a `spread` behind an input")
                    .label(
                        spread.amount.span,
                        "a spread says how far a second source of a species' datum lies",
                    )
                    .help("give the input an interval, `± 2 %`, and name the second source in its `source`"),
            );
        }
        let written = suffixes.intervals.first()?;
        let above = self.half_width(&written.above, written, about);
        let below = if written.above == written.below {
            above
        } else {
            self.half_width(&written.below, written, about)
        };
        let shape = self.shape(written)?;
        let text = self.written(written.span);
        Some(Interval { above: above?, below: below?, shape, text })
    }

    fn one_source(&mut self, suffixes: &Suffixes) {
        if let [_, second, ..] = suffixes.sources.as_slice() {
            self.report(
                Diagnostic::new(Code::DatumTwice, "a second source for one value")
                    .label(second.span, "one source is enough")
                    .help("name both in one text: `source \"first; second\"`"),
            );
        }
    }

    fn shape(&mut self, written: &tree::Interval) -> Option<IntervalShape> {
        match &written.mark {
            Ok(IntervalMark::Rectangular) => Some(IntervalShape::Rectangular),
            Ok(IntervalMark::Triangular) => Some(IntervalShape::Triangular),
            Ok(IntervalMark::Standard) => Some(IntervalShape::Normal(1.0)),
            Ok(IntervalMark::Expanded(k)) if *k > 0.0 => Some(IntervalShape::Normal(*k)),
            Ok(IntervalMark::Expanded(_)) => {
                self.bad_interval(
                    written.span,
                    "the coverage factor is not positive",
                    "write a coverage factor such as `(k=2)`",
                );
                None
            }
            Err(word) => {
                let help = "write `(k=2)`, `(std)` or `(triangular)`, or nothing for limits";
                self.bad_interval(word.span, "not a mark of an interval", help);
                None
            }
        }
    }

    fn bad_interval(&mut self, span: Span, label: &str, help: &str) {
        let text = self.written(span);
        self.report(
            Diagnostic::new(Code::BadInterval, format!("the interval `{text}` cannot be"))
                .label(span, label)
                .help(help),
        );
    }

    /// One side of an interval, in SI.
    fn half_width(&mut self, literal: &Literal, whole: &tree::Interval, about: About) -> Option<f64> {
        let width = self.width(literal, whole, about)?;
        if width > 0.0 {
            return Some(width);
        }
        let help = "leave it out: an input without an interval counts as exact";
        self.bad_interval(whole.span, "an interval is wider than nothing", help);
        None
    }

    fn width(&mut self, literal: &Literal, whole: &tree::Interval, about: About) -> Option<f64> {
        let (number, text) = (literal.value, literal.unit.as_ref());
        match text.map(|unit| unit.text.as_str()) {
            Some("pp") if about.percent => Some(number * 0.01),
            Some("%") => self.percent_width(number, whole, about),
            Some(unit) => {
                let span = literal.span;
                let text = text?;
                if unit == "pp" {
                    let what = with_dimension(about.dimension);
                    self.unlike_interval(
                        span,
                        "percentage points",
                        &what,
                        "percentage points belong to a value in `%`",
                    );
                    return None;
                }
                let read = match read_unit(unit) {
                    Ok(read) => read,
                    Err(error) => {
                        self.report(super::unit::unit_error(&error, text));
                        return None;
                    }
                };
                if read.dimension != about.dimension {
                    let (found, wanted) = (with_dimension(read.dimension), with_dimension(about.dimension));
                    self.unlike_interval(span, &found, &wanted, "give the interval in a unit of the value");
                    return None;
                }
                if read.zero != Zero::None {
                    self.reading_as_width(literal, unit, &read.zero);
                    return None;
                }
                Some(number * read.factor)
            }
            None if about.dimension.is_one() && !about.percent => Some(number),
            None => {
                let wanted = with_dimension(about.dimension);
                self.unlike_interval(literal.span, "a pure number", &wanted, "give the interval its unit");
                None
            }
        }
    }

    fn reading_as_width(&mut self, literal: &Literal, unit: &str, zero: &Zero) {
        let (code, plain) = match zero {
            Zero::Atmosphere => (Code::GaugeForDifference, unit.strip_suffix('g').unwrap_or("bar")),
            _ if unit.contains('F') => (Code::PointForDifference, "degR"),
            _ => (Code::PointForDifference, "K"),
        };
        self.report(
            Diagnostic::new(code, format!("an interval in `{unit}`: a reading where a difference is wanted"))
                .label(literal.span, "the width of an interval is a difference")
                .help(format!("write `± {} {plain}`", literal.value)),
        );
    }

    fn percent_width(&mut self, number: f64, whole: &tree::Interval, about: About) -> Option<f64> {
        let text = self.written(about.span);
        if about.kind == Kind::Point {
            let (sort, width) = if about.dimension == Dimension::PRESSURE {
                ("a gauge reading", "0.1 bar")
            } else {
                ("a temperature", "5 K")
            };
            self.report(
                Diagnostic::new(Code::PercentOfReading, format!("a percentage of {sort}, `{text}`"))
                    .label(whole.span, "a percentage of what? The scale's zero is a convention")
                    .help(format!("give the interval as a difference, such as `± {width}`")),
            );
            return None;
        }
        if about.percent && !whole.relative {
            self.report(
                Diagnostic::new(Code::PercentOfPercent, format!("a percentage of the percentage `{text}`"))
                    .label(whole.span, "percentage points, or relative to the value?")
                    .help(format!("write `± {number} pp` or `± {number} % relative`")),
            );
            return None;
        }
        Some(number * 0.01 * about.si.abs())
    }

    fn unlike_interval(&mut self, span: Span, found: &str, wanted: &str, help: &str) {
        self.report(
            Diagnostic::new(Code::UnlikeInterval, format!("an interval of {found} about {wanted}"))
                .label(span, format!("{found} here"))
                .help(help),
        );
    }
}

//! Functions.

use super::checker::Checker;
use super::wanted::{mass_against_amount, with_dimension};
use crate::diagnostic::{Code, Diagnostic, count, nearest};
use crate::program::{Expr, Function, Node};
use crate::span::Span;
use crate::syntax::tree::{Expression, Word};
use crate::units::{self, Dimension, Kind};

impl Checker<'_> {
    pub(super) fn call(&mut self, word: &Word, arguments: &[Expression], span: Span) -> Option<Expr> {
        let arguments: Vec<Option<Expr>> =
            arguments.iter().map(|argument| self.expression(argument)).collect();
        let Some((_, function)) = Function::NAMED.iter().find(|(name, _)| *name == word.text) else {
            self.unknown_function(word);
            return None;
        };
        let arguments: Vec<Expr> = arguments.into_iter().collect::<Option<_>>()?;
        if !self.count_fits(*function, arguments.len(), word) {
            return None;
        }
        let (dimension, kind) = match function {
            Function::Exp | Function::Ln | Function::Log10 => self.pure(*function, &arguments)?,
            Function::Sqrt => self.root(&arguments[0])?,
            Function::Abs => self.absolute(&arguments[0])?,
            Function::LogMean => self.log_mean(&arguments)?,
            Function::Min | Function::Max | Function::Mean => self.alike(*function, &arguments)?,
        };
        Some(Expr { span, dimension, kind, node: Node::Call(*function, arguments) })
    }

    fn unknown_function(&mut self, word: &Word) {
        let names = Function::NAMED.iter().map(|(name, _)| *name);
        let found = Diagnostic::new(Code::UnknownFunction, format!("unknown function `{}`", word.text))
            .label(word.span, "no function of this name");
        let help = match nearest(&word.text, names.clone().chain(["M"])) {
            Some(near) => format!("did you mean `{near}(...)`?"),
            None if self.names.contains_key(&word.text) => {
                format!("for a product write `{} * (...)`", word.text)
            }
            None => format!("functions: {}, M", names.collect::<Vec<_>>().join(", ")),
        };
        self.report(found.help(help));
    }

    fn count_fits(&mut self, function: Function, given: usize, word: &Word) -> bool {
        let (least, most) = match function {
            Function::Min | Function::Max | Function::Mean => (2, usize::MAX),
            Function::LogMean => (2, 2),
            _ => (1, 1),
        };
        if (least..=most).contains(&given) {
            return true;
        }
        let wants =
            if most == usize::MAX { format!("{least} or more arguments") } else { count(least, "argument") };
        self.report(
            Diagnostic::new(Code::ArgumentCount, format!("`{}` takes {wants}, not {given}", word.text))
                .label(word.span, format!("{} given", count(given, "argument")))
                .help(format!("write `{}({})`", word.text, if least == 1 { "x" } else { "a, b" })),
        );
        false
    }

    fn pure(&mut self, function: Function, arguments: &[Expr]) -> Option<(Dimension, Kind)> {
        let argument = &arguments[0];
        if argument.dimension.is_one() {
            return Some((Dimension::ONE, Kind::Plain));
        }
        let (text, what) = (self.written(argument.span), with_dimension(argument.dimension));
        let name = function.name();
        let unit = units::engineering_unit(argument.dimension, 1.0).text;
        self.report(
            Diagnostic::new(Code::PureNumberWanted, format!("`{name}` of {what}"))
                .label(argument.span, format!("{what} here; `{name}` takes a pure number"))
                .help(format!("divide by a reference: `{name}({text} / (1 {unit}))`")),
        );
        None
    }

    fn root(&mut self, argument: &Expr) -> Option<(Dimension, Kind)> {
        if argument.kind == Kind::Point {
            self.reading_in_product(argument, "put under a root");
            return None;
        }
        let Some(dimension) = argument.dimension.root(2) else {
            let what = with_dimension(argument.dimension);
            self.report(
                Diagnostic::new(Code::OddRoot, format!("the square root of {what} has no dimension"))
                    .label(argument.span, format!("{what} here"))
                    .help("a square root takes a pure number or a quantity of even powers, such as m2/s2"),
            );
            return None;
        };
        Some((dimension, Kind::unsaid(dimension)))
    }

    fn absolute(&mut self, argument: &Expr) -> Option<(Dimension, Kind)> {
        if argument.kind == Kind::Point {
            self.reading_in_product(argument, "made positive");
            return None;
        }
        Some((argument.dimension, argument.kind))
    }

    fn log_mean(&mut self, arguments: &[Expr]) -> Option<(Dimension, Kind)> {
        let (dimension, _) = self.alike(Function::LogMean, arguments)?;
        for argument in arguments {
            self.difference(argument, "a difference for the logarithmic mean")?;
        }
        Some((dimension, if dimension.has_reading() { Kind::Difference } else { Kind::Plain }))
    }

    /// Arguments of one dimension; readings and differences do not mix.
    fn alike(&mut self, function: Function, arguments: &[Expr]) -> Option<(Dimension, Kind)> {
        let first = &arguments[0];
        let mut kind = first.kind;
        for other in &arguments[1..] {
            if other.dimension != first.dimension {
                let (a, b) = (with_dimension(first.dimension), with_dimension(other.dimension));
                let molar = mass_against_amount(first.dimension, other.dimension);
                let code = if molar { Code::MassAgainstAmount } else { Code::UnlikeArguments };
                self.report(
                    Diagnostic::new(code, format!("`{}` of {a} and {b}", function.name()))
                        .label(other.span, format!("{b} here"))
                        .label(first.span, format!("{a} here"))
                        .help("its arguments have one dimension"),
                );
                return None;
            }
            if units::comparable(first.dimension, kind, other.kind).is_err() {
                let what = if kind == Kind::Point { other } else { first };
                self.point(what, "a reading like the other argument")?;
            }
            if kind == Kind::Open {
                kind = other.kind;
            }
        }
        Some((first.dimension, kind))
    }
}

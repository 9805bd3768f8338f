//! The other statements.

use super::builder::{Builder, parts};
use crate::syntax::grammar::Rule;
use crate::syntax::tree::{
    Allow, BalanceEntry, Column, Comparison, Correlate, Expression, Input, InputRole, InputValue, Mixture,
    Participant, Portion, PortionShare, Reaction, Require, Requirement, ResultLine, Settle, Sought,
    Statement, Suffixes, Table, Text, Use, UseFrom, Word,
};
use pest::iterators::Pair;

impl Builder<'_> {
    /// A statement that opens no block; `None` where a part was already reported.
    pub(in crate::syntax) fn statement(&mut self, pair: Pair<'_, Rule>) -> Option<Statement> {
        Some(match pair.as_rule() {
            Rule::use_line => Statement::Use(self.use_line(pair)?),
            Rule::site => self.site(pair)?,
            Rule::input => {
                let assumed = pair.clone().into_inner().any(|part| part.as_rule() == Rule::kw_assume);
                let role = if assumed { InputRole::Assume } else { InputRole::Basis };
                Statement::Input(self.input(pair, role)?)
            }
            Rule::let_line => Statement::Input(self.input(pair, InputRole::Let)?),
            Rule::correlate => Statement::Correlate(self.correlate(pair)?),
            Rule::mixture => Statement::Mixture(self.mixture(pair)?),
            Rule::reaction => Statement::Reaction(self.reaction(pair)?),
            Rule::state => Statement::State(self.state(pair)?),
            Rule::step => Statement::Step(self.step(pair)?),
            Rule::duty => Statement::Duty(self.duty(pair)?),
            Rule::settle => Statement::Settle(self.settle(pair)?),
            Rule::result => Statement::Result(self.result(pair)?),
            Rule::require => Statement::Require(self.require(pair)?),
            Rule::table => Statement::Table(self.table(pair)?),
            _ => Statement::Allow(self.allow(pair)?),
        })
    }

    pub(in crate::syntax) fn head_entry(&mut self, pair: Pair<'_, Rule>) -> Option<(Word, Text)> {
        let mut inner = parts(pair);
        let word = self.word(&inner.next()?);
        Some((word, self.text(&inner.next()?)))
    }

    pub(in crate::syntax) fn balance_entry(&mut self, pair: Pair<'_, Rule>) -> Option<BalanceEntry> {
        let entry = parts(pair).next()?;
        Some(match entry.as_rule() {
            Rule::balance_in => BalanceEntry::In(self.expressions(entry)?),
            Rule::balance_out => BalanceEntry::Out(self.expressions(entry)?),
            Rule::balance_datum => BalanceEntry::Datum(self.only_expression(entry)?),
            _ => BalanceEntry::HeatingValues(self.word(&parts(entry).next()?)),
        })
    }

    fn expressions(&mut self, pair: Pair<'_, Rule>) -> Option<Vec<Expression>> {
        parts(pair).filter(|part| part.as_rule() == Rule::expr).map(|part| self.expression(part)).collect()
    }

    fn use_line(&mut self, pair: Pair<'_, Rule>) -> Option<Use> {
        let mut names = Vec::new();
        let mut from = None;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::species => names.push(self.species_name(part)?),
                Rule::text => from = Some(UseFrom::File(self.text(&part))),
                _ => from = Some(UseFrom::Family(self.word(&part))),
            }
        }
        Some(Use { names, from: from? })
    }

    fn site(&mut self, pair: Pair<'_, Rule>) -> Option<Statement> {
        let mut suffixes = Suffixes::default();
        let mut value = None;
        for part in parts(pair) {
            match part.as_rule() {
                Rule::datum => value = self.datum(part),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(Statement::Site(value?, suffixes))
    }

    fn input(&mut self, pair: Pair<'_, Rule>, role: InputRole) -> Option<Input> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let mut suffixes = Suffixes::default();
        let mut value = None;
        for part in inner {
            match part.as_rule() {
                Rule::unknown => value = Some(InputValue::Unknown(self.span(&part))),
                Rule::datum => value = Some(InputValue::Expression(self.datum_expression(part)?)),
                Rule::expr => value = Some(InputValue::Expression(self.expression(part)?)),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(Input { role, name, value: value?, suffixes })
    }

    fn datum_expression(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        use crate::syntax::tree::ExpressionKind;
        let datum = self.datum(pair)?;
        let inner = Expression { span: datum.literal.span, kind: ExpressionKind::Literal(datum.literal) };
        Some(if datum.negative {
            Expression { span: datum.span, kind: ExpressionKind::Negative(Box::new(inner)) }
        } else {
            inner
        })
    }

    fn correlate(&mut self, pair: Pair<'_, Rule>) -> Option<Correlate> {
        let mut inner = parts(pair);
        let first = self.word(&inner.next()?);
        let second = self.word(&inner.next()?);
        Some(Correlate { names: [first, second], coefficient: self.datum(inner.next()?)? })
    }

    fn mixture(&mut self, pair: Pair<'_, Rule>) -> Option<Mixture> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let by = self.word(&inner.next()?);
        let mut portions = Vec::new();
        let mut suffixes = Suffixes::default();
        for part in inner {
            match part.as_rule() {
                Rule::portion => portions.push(self.portion(part)?),
                _ => self.suffix(part, &mut suffixes),
            }
        }
        Some(Mixture { name, by, portions, suffixes })
    }

    fn portion(&mut self, pair: Pair<'_, Rule>) -> Option<Portion> {
        let span = self.span(&pair);
        let mut inner = pair.into_inner();
        let species = self.species_name(inner.next()?)?;
        let share = inner.next()?;
        let share = match share.as_rule() {
            Rule::datum => {
                let datum = self.datum(share)?;
                let interval = inner.next().and_then(|part| self.interval(part));
                PortionShare::Share(datum, interval)
            }
            _ => PortionShare::Rest,
        };
        Some(Portion { species, share, span })
    }

    fn reaction(&mut self, pair: Pair<'_, Rule>) -> Option<Reaction> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let reactants = self.participants(inner.next()?)?;
        let products = self.participants(inner.next()?)?;
        Some(Reaction { name, reactants, products })
    }

    fn participants(&mut self, pair: Pair<'_, Rule>) -> Option<Vec<Participant>> {
        parts(pair)
            .map(|part| {
                let mut coefficient = 1.0;
                let mut species = None;
                for inner in parts(part) {
                    match inner.as_rule() {
                        Rule::number => coefficient = self.number(&inner),
                        _ => species = self.species_name(inner),
                    }
                }
                Some(Participant { coefficient, species: species? })
            })
            .collect()
    }

    fn settle(&mut self, pair: Pair<'_, Rule>) -> Option<Settle> {
        let (mut sought, mut goals) = (Vec::new(), Vec::new());
        for part in parts(pair) {
            let goal = part.as_rule() == Rule::goal;
            let mut inner = parts(part);
            if goal {
                let left = self.expression(inner.next()?)?;
                goals.push((left, self.expression(inner.next()?)?));
            } else {
                let name = self.word(&inner.next()?);
                let within = match (inner.next(), inner.next()) {
                    (Some(low), Some(high)) => Some((self.expression(low)?, self.expression(high)?)),
                    _ => None,
                };
                sought.push(Sought { name, within });
            }
        }
        Some(Settle { sought, goals })
    }

    fn result(&mut self, pair: Pair<'_, Rule>) -> Option<ResultLine> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let value = self.expression(inner.next()?)?;
        Some(ResultLine { name, value, display: inner.next().and_then(|part| self.display(part)) })
    }

    fn require(&mut self, pair: Pair<'_, Rule>) -> Option<Require> {
        let mut inner = parts(pair);
        let value = self.expression(inner.next()?)?;
        let wanted = inner.next()?;
        let condition = value.span.to(self.span(&wanted));
        let ranged = wanted.as_rule() == Rule::within;
        let mut sides = parts(wanted);
        let requirement = if ranged {
            let low = self.expression(sides.next()?)?;
            Requirement::Within(low, self.expression(sides.next()?)?)
        } else {
            let comparison = comparison(sides.next()?.as_str());
            Requirement::Compared(comparison, self.expression(sides.next()?)?)
        };
        let because = inner.next().and_then(|part| self.first_text(part));
        Some(Require { value, requirement, because, condition })
    }

    fn table(&mut self, pair: Pair<'_, Rule>) -> Option<Table> {
        let mut inner = parts(pair);
        let title = self.text(&inner.next()?);
        let (mut columns, mut over, mut bounds) = (Vec::new(), None, Vec::new());
        for part in inner {
            match part.as_rule() {
                Rule::column => {
                    let mut inner = parts(part);
                    let value = self.expression(inner.next()?)?;
                    columns.push(Column { value, display: inner.next().and_then(|unit| self.display(unit)) });
                }
                Rule::name => over = Some(self.word(&part)),
                Rule::expr => bounds.push(self.expression(part)?),
                _ => {}
            }
        }
        let mut bounds = bounds.into_iter();
        let (from, to, by) = (bounds.next()?, bounds.next()?, bounds.next()?);
        Some(Table { title, columns, over: over?, from, to, by })
    }

    fn allow(&mut self, pair: Pair<'_, Rule>) -> Option<Allow> {
        let mut inner = parts(pair);
        let species = self.species_name(inner.next()?)?;
        let (mut from, mut to, mut because) = (None, None, None);
        for part in inner {
            match part.as_rule() {
                Rule::lower => from = self.datum(parts(part).next()?),
                Rule::upper => to = self.datum(parts(part).next()?),
                _ => because = self.first_text(part),
            }
        }
        Some(Allow { species, from, to, because })
    }
}

fn comparison(sign: &str) -> Comparison {
    match sign {
        "<=" | "≤" => Comparison::AtMost,
        ">=" | "≥" => Comparison::AtLeast,
        "<" => Comparison::Less,
        _ => Comparison::Greater,
    }
}

//! States, steps and duties.

use super::builder::{Builder, parts};
use crate::syntax::grammar::Rule;
use crate::syntax::tree::{
    Clause, ClauseKind, Condition, ConditionKind, Conversion, Duty, DutyClause, Expression, Matter,
    MatterKind, Part, State, Step, Word,
};
use pest::iterators::Pair;

impl Builder<'_> {
    pub(super) fn state(&mut self, pair: Pair<'_, Rule>) -> Option<State> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let matter = self.matter(inner.next()?)?;
        let (mut after, mut conditions) = (Vec::new(), Vec::new());
        for part in inner {
            match part.as_rule() {
                Rule::after => {
                    after = parts(part).map(|part| self.conversion(part)).collect::<Option<_>>()?
                }
                Rule::conditions => {
                    conditions = parts(part).map(|part| self.condition(part)).collect::<Option<_>>()?;
                }
                _ => {}
            }
        }
        Some(State { name, matter, after, conditions })
    }

    fn matter(&mut self, pair: Pair<'_, Rule>) -> Option<Matter> {
        let span = self.span(&pair);
        let mut parcels = parts(pair).map(|part| self.parcel(part)).collect::<Option<Vec<_>>>()?;
        if parcels.len() == 1 {
            return parcels.pop();
        }
        Some(Matter { kind: MatterKind::Sum(parcels), span })
    }

    fn parcel(&mut self, pair: Pair<'_, Rule>) -> Option<Matter> {
        let span = self.span(&pair);
        let kind = match pair.as_rule() {
            Rule::matter => return self.matter(pair),
            Rule::species => MatterKind::Named(self.species_name(pair)?),
            Rule::parted => {
                let mut inner = parts(pair);
                let part = match inner.next()?.as_str() {
                    "solids" => Part::Solids,
                    "liquids" => Part::Liquids,
                    _ => Part::Gases,
                };
                MatterKind::Parted(part, self.word(&inner.next()?))
            }
            _ => {
                let mut inner = parts(pair);
                let amount = inner.next()?;
                let amount = match amount.as_rule() {
                    Rule::unknown => None,
                    _ => Some(self.product(amount)?),
                };
                MatterKind::Measured(amount, Box::new(self.parcel(inner.next()?)?))
            }
        };
        Some(Matter { kind, span })
    }

    fn conversion(&mut self, pair: Pair<'_, Rule>) -> Option<Conversion> {
        let mut inner = parts(pair);
        let reaction = self.word(&inner.next()?);
        let extent = match (inner.next(), inner.next()) {
            (Some(share), Some(species)) => Some((self.product(share)?, self.species_name(species)?)),
            _ => None,
        };
        Some(Conversion { reaction, extent })
    }

    fn condition(&mut self, pair: Pair<'_, Rule>) -> Option<Condition> {
        let span = self.span(&pair);
        let mut inner = parts(pair);
        let first = inner.next()?;
        let kind = match first.as_rule() {
            Rule::unknown => ConditionKind::Unknown,
            Rule::saturated => ConditionKind::Saturated(self.word(&parts(first).next()?)),
            Rule::equilibrium => ConditionKind::Equilibrium(self.species_name(parts(first).next()?)?),
            _ => {
                let value = self.expression(first)?;
                match inner.next() {
                    Some(phase) => ConditionKind::Share(value, self.word(&phase)),
                    None => ConditionKind::Value(value),
                }
            }
        };
        Some(Condition { kind, span })
    }

    pub(super) fn step(&mut self, pair: Pair<'_, Rule>) -> Option<Step> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let from = self.side(inner.next()?);
        let to = self.side(inner.next()?);
        let mut clauses = Vec::new();
        for part in inner {
            self.clause(part, &mut clauses)?;
        }
        Some(Step { name, from, to, clauses })
    }

    fn side(&self, pair: Pair<'_, Rule>) -> Vec<Word> {
        parts(pair).map(|part| self.word(&part)).collect()
    }

    fn clause(&mut self, pair: Pair<'_, Rule>, into: &mut Vec<Clause>) -> Option<()> {
        let span = self.span(&pair);
        let Some(inner) = parts(pair).next() else { return Some(()) };
        let kind = match inner.as_rule() {
            Rule::constant_both => ClauseKind::ConstantTemperatureAndPressure,
            Rule::constant_pressure => ClauseKind::ConstantPressure,
            Rule::constant_volume => ClauseKind::ConstantVolume,
            Rule::isothermal => ClauseKind::IsothermalReversible,
            Rule::no_shaft_work => ClauseKind::NoShaftWork,
            Rule::throttled => ClauseKind::Throttled,
            Rule::adiabatic => ClauseKind::Adiabatic,
            Rule::taking => ClauseKind::Taking(self.only_expression(inner)?),
            Rule::losing => ClauseKind::Losing(self.only_expression(inner)?),
            Rule::working => ClauseKind::Working(self.only_expression(inner)?),
            Rule::efficiency => ClauseKind::IsentropicEfficiency(self.only_expression(inner)?),
            _ => {
                let efficiency = parts(inner).next();
                into.push(Clause { kind: ClauseKind::AdiabaticReversible, span });
                let Some(efficiency) = efficiency else { return Some(()) };
                ClauseKind::IsentropicEfficiency(self.only_expression(efficiency)?)
            }
        };
        into.push(Clause { kind, span });
        Some(())
    }

    pub(super) fn only_expression(&mut self, pair: Pair<'_, Rule>) -> Option<Expression> {
        self.expression(parts(pair).find(|part| part.as_rule() == Rule::expr)?)
    }

    pub(super) fn duty(&mut self, pair: Pair<'_, Rule>) -> Option<Duty> {
        let mut inner = parts(pair);
        let name = inner.next()?;
        let name = self.declared(&name);
        let value = self.expression(inner.next()?)?;
        let mut clauses = Vec::new();
        for part in inner {
            clauses.push(match part.as_rule() {
                Rule::over_time => DutyClause::Over(self.only_expression(part)?),
                Rule::at_efficiency => DutyClause::Efficiency(self.only_expression(part)?),
                _ => DutyClause::Carried(self.word(&parts(part).next()?)),
            });
        }
        Some(Duty { name, value, clauses })
    }
}

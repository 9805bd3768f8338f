//! The parser that pest makes from `grammar/sheet.pest`.

#![allow(missing_docs)]

use pest_derive::Parser;

#[derive(Parser)]
#[grammar = "grammar/sheet.pest"]
pub(super) struct SheetParser;

/// Whether the rule is a keyword, which a builder passes over: keywords stand last in the grammar.
pub(super) fn is_keyword(rule: Rule) -> bool {
    rule >= Rule::kw_adiabatic
}

#[cfg(test)]
mod tests {
    #[test]
    fn keywords_stand_last_in_the_grammar() {
        let grammar = include_str!("../../grammar/sheet.pest");
        let rules: Vec<&str> = grammar
            .lines()
            .filter_map(|line| line.split_once('=').map(|(name, _)| name.trim()))
            .filter(|name| !name.is_empty() && name.chars().all(|c| c.is_ascii_lowercase() || c == '_'))
            .collect();
        let first = rules.iter().position(|name| *name == "kw_adiabatic").expect("the first keyword");
        assert!(rules[first..].iter().all(|name| name.starts_with("kw_")));
        assert!(rules[..first].iter().all(|name| !name.starts_with("kw_")));
    }
}

//! The checker: what is known so far, and the pass over the statements.

pub(super) use super::known::{Blend, Claim, Declared, Entity, FileSpecies, Material};
use crate::diagnostic::Diagnostic;
use crate::library::Loader;
use crate::program::{Entry, Head, Program, Remark, Site};
use crate::source::Sources;
use crate::span::{FileId, Span};
use crate::syntax::tree::{Item, Statement, Word};
use crate::syntax::{Parsed, parse_sheet};
use crate::units::Calorie;
use crate::units::constants::STANDARD_ATMOSPHERE;
use std::collections::{BTreeMap, BTreeSet};

/// What checking a sheet gives.
#[derive(Debug)]
pub struct Checked {
    /// The Program, where there is no error.
    pub program: Option<Program>,
    /// Errors and warnings in the order of the sheet.
    pub diagnostics: Vec<Diagnostic>,
}

/// The checker at work.
pub(super) struct Checker<'a> {
    pub(super) sources: &'a mut Sources,
    pub(super) loader: &'a dyn Loader,
    pub(super) diagnostics: Vec<Diagnostic>,
    pub(super) names: BTreeMap<String, Declared<Entity>>,
    pub(super) materials: BTreeMap<String, Declared<Material>>,
    pub(super) reactions: BTreeMap<String, Span>,
    /// Words of statements that could not be read.
    pub(super) broken: BTreeSet<String>,
    /// Every name that the sheet declares anywhere, with the first place.
    pub(super) ahead: BTreeMap<String, Span>,
    pub(super) program: Program,
    /// Whether `T` is the temperature of a formula here.
    pub(super) in_formula: bool,
    pub(super) calories: Vec<(Calorie, Span)>,
    pub(super) head_seen: Option<Span>,
    pub(super) site_seen: Option<Span>,
    /// Derived values that are not known, `let x = ?`.
    pub(super) open_values: Vec<Word>,
    /// Unknowns that a `settle` names.
    pub(super) settled: BTreeSet<String>,
    /// The species of files already read, by identity.
    pub(super) files: BTreeMap<String, FileSpecies>,
    /// What published forms say of their enthalpies, of the species being read.
    pub(super) claims: Vec<Claim>,
    /// The identities of the files being read, outermost first.
    pub(super) reading: Vec<String>,
}

/// Reads and checks the sheet of this id.
pub fn check_sheet(sources: &mut Sources, file: FileId, identity: &str, loader: &dyn Loader) -> Checked {
    let text = sources.get(file).map(|source| source.text.clone()).unwrap_or_default();
    let Parsed { tree, broken, diagnostics } = parse_sheet(file, &text);
    let mut checker = Checker::new(sources, loader, identity.to_owned());
    checker.broken.extend(broken);
    checker.diagnostics = diagnostics;
    checker.look_ahead(&tree.items);
    for (at, item) in tree.items.iter().enumerate() {
        checker.statement(item, at == 0);
    }
    checker.settle_unknowns();
    checker.warn_of_mixed_calories();
    let Checker { mut diagnostics, program, .. } = checker;
    diagnostics.sort_by_key(|found| found.place().map_or((FileId(0), 0), |span| (span.file, span.start)));
    let failed = diagnostics.iter().any(Diagnostic::is_error);
    Checked { program: (!failed).then_some(program), diagnostics }
}

impl<'a> Checker<'a> {
    pub(super) fn new(sources: &'a mut Sources, loader: &'a dyn Loader, identity: String) -> Self {
        Checker {
            sources,
            loader,
            diagnostics: Vec::new(),
            names: BTreeMap::new(),
            materials: BTreeMap::new(),
            reactions: BTreeMap::new(),
            broken: BTreeSet::new(),
            ahead: BTreeMap::new(),
            program: empty_program(),
            in_formula: false,
            calories: Vec::new(),
            head_seen: None,
            site_seen: None,
            open_values: Vec::new(),
            settled: BTreeSet::new(),
            files: BTreeMap::new(),
            claims: Vec::new(),
            reading: vec![identity],
        }
    }

    pub(super) fn statement(&mut self, item: &Item, first: bool) {
        match &item.statement {
            Statement::Head(head) => self.head(head, item.span, first),
            Statement::Remark(text) => {
                self.program.remarks.push(Remark { text: text.text.clone() });
                self.program.order.push(Entry::Remark(self.program.remarks.len() - 1));
            }
            Statement::Use(line) => self.import(line, item.span),
            Statement::Species(block) => self.species_statement(block),
            Statement::Mixture(mixture) => self.mixture(mixture, item.span),
            Statement::Site(datum, suffixes) => self.site(datum, suffixes, item.span),
            Statement::Input(input) => self.input(input),
            Statement::State(state) => self.state(state, item.span),
            Statement::Step(step) => self.step(step, item.span),
            Statement::Duty(duty) => self.duty(duty, item.span),
            Statement::Result(line) => self.result(line),
            Statement::Require(line) => self.require(line),
            Statement::Table(table) => self.table(table, item.span),
            Statement::Allow(allow) => self.allow(allow, item.span),
            Statement::Reaction(reaction) => self.later_reaction(reaction, item.span),
            Statement::Correlate(_) => self.later_correlate(item.span),
            Statement::Balance(balance) => self.later_balance(balance, item.span),
            Statement::Settle(settle) => self.later_settle(settle, item.span),
        }
    }

    fn head(&mut self, head: &crate::syntax::tree::Head, span: Span, first: bool) {
        use crate::diagnostic::Code;
        if let Some(other) = self.head_seen {
            self.report(
                Diagnostic::new(Code::HeadMisplaced, "a second head in one sheet")
                    .label(span, "this one")
                    .label(other, "the head stands here")
                    .help("keep one `sheet \"...\"` line, at the top"),
            );
            return;
        }
        if !first {
            self.report(
                Diagnostic::new(Code::HeadMisplaced, "the head of a sheet comes first")
                    .label(span, "statements stand before it")
                    .help("move the `sheet` block to the top"),
            );
        }
        self.head_seen = Some(span);
        let entries =
            head.entries.iter().map(|(word, text)| (word.text.clone(), text.text.clone())).collect();
        self.program.head = Head { title: head.title.text.clone(), entries };
    }

    pub(super) fn report(&mut self, diagnostic: Diagnostic) {
        self.diagnostics.push(diagnostic);
    }

    /// The text of a span as one line.
    pub(super) fn written(&self, span: Span) -> String {
        self.sources.line_of(span)
    }
}

fn empty_program() -> Program {
    Program {
        head: Head::default(),
        remarks: Vec::new(),
        site: Site { atmosphere: STANDARD_ATMOSPHERE, text: None, unit: None, source: None, interval: None },
        quantities: Vec::new(),
        species: Vec::new(),
        mixtures: Vec::new(),
        states: Vec::new(),
        steps: Vec::new(),
        duties: Vec::new(),
        requirements: Vec::new(),
        tables: Vec::new(),
        order: Vec::new(),
    }
}

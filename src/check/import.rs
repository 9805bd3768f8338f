//! `use`: species of the library, of a file beside the sheet, and the steam tables.

use super::checker::{Checker, Declared, FileSpecies, Material};
use crate::diagnostic::{Code, Diagnostic, nearest};
use crate::library::{LoadError, Loaded, NoFiles, families, family, family_of, family_species, family_with};
use crate::program::{Entry, Species};
use crate::source::Sources;
use crate::span::{FileId, Span};
use crate::syntax::parse_sheet;
use crate::syntax::tree::{SpeciesName, Statement, Text, Use, UseFrom, Word};

/// How the identity of a shipped family begins; its warnings are answered where it is made.
const LIBRARY: &str = "library:";

impl Checker<'_> {
    pub(super) fn import(&mut self, line: &Use, span: Span) {
        let found = match &line.from {
            UseFrom::Family(word) if word.text == "iapws97" => {
                self.later_steam(span);
                None
            }
            UseFrom::Family(word) => self.family(word, &line.names),
            UseFrom::File(path) => self.file(path),
        };
        for name in &line.names {
            let word = Word { text: name.name.clone(), span: name.span };
            let species = found.as_ref().and_then(|known| self.taken(name, known, line));
            let entered = species.is_some();
            self.enter_species(&word, species);
            if let (true, Some(Declared { what: Material::Species(id), .. })) =
                (entered, self.materials.get(&word.text))
            {
                self.program.order.push(Entry::Species(*id));
            }
        }
    }

    fn taken(&mut self, name: &SpeciesName, known: &[Species], line: &Use) -> Option<Species> {
        if let Some(symbol) = &name.symbol {
            self.report(
                Diagnostic::new(
                    Code::NotInFamily,
                    format!("`{}` with a state symbol cannot be taken", name.to_text()),
                )
                .label(symbol.span, "a species is taken with all its phases")
                .help(format!("write `use {} from ...`", name.name)),
            );
            return None;
        }
        if let Some(species) = known.iter().find(|species| species.name == name.name) {
            return Some(species.clone());
        }
        let place = match &line.from {
            UseFrom::Family(word) => format!("the family `{}`", word.text),
            UseFrom::File(text) => format!("`{}`", text.text),
        };
        let found = Diagnostic::new(Code::NotInFamily, format!("{place} holds no `{}`", name.name))
            .label(name.span, "not there");
        let names: Vec<&str> = match &line.from {
            UseFrom::Family(word) => family_species(&word.text).collect(),
            UseFrom::File(_) => known.iter().map(|species| species.name.as_str()).collect(),
        };
        let help = match (family_of(&name.name), nearest(&name.name, names.iter().copied())) {
            (Some(family), _) => format!("write `use {} from {family}`", name.name),
            (None, Some(near)) => format!("did you mean `{near}`?"),
            (None, None) => format!("it holds {}", all_or_first(&names)),
        };
        self.report(found.help(help));
        None
    }

    /// The species of a family that a line names; the rest of the family is not read.
    fn family(&mut self, word: &Word, names: &[SpeciesName]) -> FileSpecies {
        let wanted: Vec<&str> = names.iter().map(|name| name.name.as_str()).collect();
        let (Some(whole), Some(text)) = (family(&word.text), family_with(&word.text, &wanted)) else {
            let found =
                Diagnostic::new(Code::UnknownFamily, format!("no family `{}` in the library", word.text))
                    .label(word.span, "unknown");
            let known: Vec<&str> = families().collect();
            let help = match nearest(&word.text, known.iter().copied()) {
                Some(near) => format!("did you mean `{near}`?"),
                None => format!("families: {}", known.join(", ")),
            };
            self.report(found.help(help));
            return None;
        };
        let (identity, name) = (format!("{LIBRARY}{}", word.text), format!("{}.heat", word.text));
        let file = self.sources.add(name.clone(), whole);
        self.read_species(file, &text, &identity, &name)
    }

    fn file(&mut self, path: &Text) -> FileSpecies {
        let from = self.reading.last().cloned().unwrap_or_default();
        match self.loader.load(&from, &path.text) {
            Ok(loaded) => self.species_of(&loaded, path.span),
            Err(LoadError::Outside) => {
                self.report(
                    Diagnostic::new(
                        Code::PathOutside,
                        format!("`{}` lies outside the sheet's folder", path.text),
                    )
                    .label(path.span, "a sheet uses files of its own folder only")
                    .help("copy the file beside the sheet and name it without `..` or a leading `/`"),
                );
                None
            }
            Err(LoadError::Unreadable(why)) => {
                self.report(
                    Diagnostic::new(
                        Code::ImportUnreadable,
                        format!("`{}` cannot be opened: {why}", path.text),
                    )
                    .label(path.span, "used here")
                    .help("the path counts from the file that uses it"),
                );
                None
            }
        }
    }

    /// The species of a loaded file; each file is read once.
    fn species_of(&mut self, loaded: &Loaded, span: Span) -> FileSpecies {
        if self.reading.contains(&loaded.identity) {
            self.report(
                Diagnostic::new(
                    Code::ImportCycle,
                    format!("`{}` uses itself, by way of others", loaded.name),
                )
                .label(span, "this closes the circle")
                .help("move the species that both need into a third file"),
            );
            return None;
        }
        if let Some(known) = self.files.get(&loaded.identity) {
            return known.clone();
        }
        let file = self.sources.add(loaded.name.clone(), loaded.text.clone());
        let read = self.read_species(file, &loaded.text, &loaded.identity, &loaded.name);
        self.files.insert(loaded.identity.clone(), read.clone());
        read
    }

    fn read_species(&mut self, file: FileId, text: &str, identity: &str, name: &str) -> FileSpecies {
        let parsed = parse_sheet(file, text);
        let mut inner = Checker::new(self.sources, self.loader, identity.to_owned());
        inner.reading = self.reading.iter().cloned().chain([identity.to_owned()]).collect();
        inner.files = std::mem::take(&mut self.files);
        inner.broken.extend(parsed.broken);
        inner.diagnostics = parsed.diagnostics;
        for item in &parsed.tree.items {
            match &item.statement {
                Statement::Species(block) => {
                    let species = inner.species(block, Some(name.to_owned()));
                    inner.warn_if_read(species.as_ref().filter(|_| !identity.starts_with(LIBRARY)));
                    inner.enter_species(&block.name, species);
                }
                Statement::Use(line) => inner.import(line, item.span),
                _ => {}
            }
        }
        let Checker { diagnostics, materials, program, files, .. } = inner;
        self.files = files;
        let failed = diagnostics.iter().any(Diagnostic::is_error);
        self.diagnostics.extend(diagnostics);
        let usable = |declared: &Declared<Material>| match declared.what {
            Material::Species(id) => program.species.get(id.0).cloned(),
            _ => None,
        };
        let mut declared: Vec<&Declared<Material>> = materials.values().collect();
        declared.sort_by_key(|declared| declared.span);
        (!failed).then(|| declared.into_iter().filter_map(usable).collect())
    }
}

/// The species of a family of the shipped library in the order of its sheet; `None` where there is no such family or
/// it is at fault.
pub fn check_family(name: &str) -> Option<Vec<Species>> {
    let text = family(name)?;
    let mut sources = Sources::new();
    let file_name = format!("{name}.heat");
    let file = sources.add(file_name.clone(), text);
    let mut checker = Checker::new(&mut sources, &NoFiles, String::new());
    checker.read_species(file, text, &format!("{LIBRARY}{name}"), &file_name)
}

/// Some thirty names, and how many more there are.
fn all_or_first(names: &[&str]) -> String {
    let shown = names.iter().take(30).copied().collect::<Vec<_>>().join(", ");
    match names.len().saturating_sub(30) {
        0 => shown,
        more => format!("{shown} and {more} more"),
    }
}

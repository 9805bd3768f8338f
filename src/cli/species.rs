//! `species`: lists the shipped library, or shows what a word finds in it.

use super::arguments::{Format, SpeciesArguments};
use super::status::Status;
use super::streams::{complain, print};
use crate::diagnostic::nearest;
use crate::report::{
    SpeciesPage, render_plot, render_species_json, render_species_list, render_species_list_json,
    render_species_page,
};
use crate::session::library_pages;

/// Prints the list, or the pages that a word finds.
pub(super) fn species(arguments: &SpeciesArguments) -> Status {
    let pages = library_pages();
    let Some(word) = &arguments.word else { return print(&list(&pages, arguments.format), Status::Well) };
    let found = found(&pages, word);
    if found.is_empty() {
        let family = family(&pages, word);
        return if family.is_empty() {
            unknown(&pages, word)
        } else {
            print(&list(&family, arguments.format), Status::Well)
        };
    }
    let text = match arguments.format {
        Format::Json => render_species_json(&found),
        Format::Text => {
            found.iter().map(|page| page_text(page, arguments.plot)).collect::<Vec<_>>().join("\n")
        }
    };
    print(&text, Status::Well)
}

fn list(pages: &[SpeciesPage], format: Format) -> String {
    match format {
        Format::Text => render_species_list(pages),
        Format::Json => render_species_list_json(pages),
    }
}

/// The species of a family that a word names.
fn family(pages: &[SpeciesPage], word: &str) -> Vec<SpeciesPage> {
    pages.iter().filter(|page| page.family.eq_ignore_ascii_case(word.trim())).cloned().collect()
}

fn page_text(page: &SpeciesPage, plot: bool) -> String {
    let mut text = render_species_page(page);
    if plot {
        text.push_str(&render_plot(page));
    }
    text
}

/// Those that are named so exactly, else those that the word finds.
fn found<'a>(pages: &'a [SpeciesPage], word: &str) -> Vec<&'a SpeciesPage> {
    let bare = without_symbol(word);
    let named = |page: &&SpeciesPage| page.is_named(word) || page.is_named(bare);
    let exact: Vec<&SpeciesPage> = pages.iter().filter(named).collect();
    if exact.is_empty() { pages.iter().filter(|page| page.matches(word)).collect() } else { exact }
}

/// `CaCO3` of `CaCO3(s)`: a page shows all phases.
fn without_symbol(word: &str) -> &str {
    let symbol = |inside: &str| inside.starts_with(|c: char| c.is_lowercase());
    match word.trim().strip_suffix(')').and_then(|word| word.rsplit_once('(')) {
        Some((bare, inside)) if symbol(inside) => bare,
        _ => word,
    }
}

fn unknown(pages: &[SpeciesPage], word: &str) -> Status {
    let names =
        pages.iter().flat_map(|page| std::iter::once(page.name.as_str()).chain(page.label.as_deref()));
    let help = match nearest(word.trim(), names) {
        Some(near) => format!("`{near}` is the nearest; `heatpath species` lists all"),
        None => "`heatpath species` lists all; a sheet can bring its own with a `species` block".to_owned(),
    };
    complain(&format!("no species of the library matches `{word}`"), Some(&help));
    Status::Wrong
}

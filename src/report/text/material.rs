//! Species and mixtures.

use super::grid::Grid;
use super::page::{BODY, Page};
use crate::report::model::{MixtureRow, SpeciesRow};
use crate::report::number::{fixed, significant};

/// The digits of a molar mass.
const MOLAR_MASS_DIGITS: usize = 7;

pub(super) fn write_species(page: &mut Page, row: &SpeciesRow) {
    let mark = page.tick();
    let facts = [
        row.label.clone(),
        row.formula.as_ref().map(|formula| format!("formula {formula}")),
        row.cas.as_ref().map(|cas| format!("CAS {cas}")),
        Some(molar_mass(row)),
        row.from.as_ref().map(|from| format!("taken from {from}")),
    ];
    let facts: Vec<_> = facts.into_iter().flatten().collect();
    page.item(&mark, &format!("{}: {}", row.name, facts.join(", ")));
    for remark in &row.remarks {
        page.text(BODY, remark);
    }
}

fn molar_mass(row: &SpeciesRow) -> String {
    let Some(molar_mass) = row.molar_mass else { return "no molar mass, taken by mass".to_owned() };
    let origin = if row.molar_mass_given { "as given" } else { "from the standard atomic weights" };
    format!("M = {} g/mol {origin}", significant(molar_mass * 1e3, MOLAR_MASS_DIGITS))
}

pub(super) fn write_mixture(page: &mut Page, row: &MixtureRow) {
    let mark = page.tick();
    page.item(&mark, &format!("{}: mixture {}", row.name, row.written));
    let percent = |share: f64| format!("{} %", fixed(share * 100.0, 2));
    let head = ["species", "by mass", "by mole"].map(str::to_owned);
    let mut grid = Grid::new().head(head).right([1, 2]);
    for (species, by_mass, by_mole) in &row.portions {
        grid.row([species.clone(), percent(*by_mass), by_mole.map_or_else(|| "–".to_owned(), percent)]);
    }
    page.grid(BODY, grid);
    page.text(BODY, &format!("source: {}", row.source.as_deref().unwrap_or("none given")));
}

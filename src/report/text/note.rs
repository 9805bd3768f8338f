//! The note as a whole: the order of its parts.

use super::change::{write_state, write_step};
use super::closing::write_closing;
use super::given::{write_derived, write_inputs};
use super::ground::write_data;
use super::material::{write_mixture, write_species};
use super::opening::write_opening;
use super::outcome::{write_duty, write_requirement, write_result, write_table};
use super::page::Page;
use super::style::Style;
use crate::report::model::{Item, Report};

/// The report as text, with a line end behind it.
///
/// Lines are wrapped to the style's width; only a single word, or a table with more columns than fit, is wider.
pub fn render_text(report: &Report, style: Style) -> String {
    let mut page = Page::new(style);
    write_opening(&mut page, report);
    let items = in_order(report);
    for chunk in items.chunk_by(|a, b| a.0 == b.0) {
        write_section(&mut page, report, chunk);
    }
    write_data(&mut page, report);
    write_closing(&mut page, report);
    page.finish()
}

/// What stands under one title.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Section {
    Remarks,
    Materials,
    Inputs,
    Derived,
    Changes,
    Duties,
    Results,
    Verdicts,
    Tables,
}

impl Section {
    fn title(self) -> Option<&'static str> {
        Some(match self {
            Section::Remarks => return None,
            Section::Materials => "Materials",
            Section::Inputs => "Inputs and assumptions",
            Section::Derived => "Derived values",
            Section::Changes => "States and steps",
            Section::Duties => "Duties",
            Section::Results => "Results",
            Section::Verdicts => "Verdicts",
            Section::Tables => "Tables",
        })
    }
}

/// The items in the sheet's order, each with its section. A site that the sheet does not mention stands before the
/// first input, since it is an assumption as well.
fn in_order(report: &Report) -> Vec<(Section, Item)> {
    let mut items: Vec<_> = report.order.iter().map(|item| (section_of(report, *item), *item)).collect();
    if !report.order.contains(&Item::Site) {
        let first = |wanted| items.iter().position(|(section, _)| *section == wanted);
        let end =
            items.iter().rposition(|(section, _)| *section == Section::Materials).map_or(0, |last| last + 1);
        items.insert(first(Section::Inputs).unwrap_or(end), (Section::Inputs, Item::Site));
    }
    items
}

fn section_of(report: &Report, item: Item) -> Section {
    match item {
        Item::Remark(_) => Section::Remarks,
        Item::Species(_) | Item::Mixture(_) => Section::Materials,
        Item::Input(index) if report.inputs.get(index).is_some_and(|row| row.role == "let") => {
            Section::Derived
        }
        Item::Site | Item::Input(_) => Section::Inputs,
        Item::State(_) | Item::Step(_) => Section::Changes,
        Item::Duty(_) => Section::Duties,
        Item::Result(_) => Section::Results,
        Item::Requirement(_) => Section::Verdicts,
        Item::Table(_) => Section::Tables,
    }
}

fn write_section(page: &mut Page, report: &Report, chunk: &[(Section, Item)]) {
    let Some((section, _)) = chunk.first() else { return };
    match section.title() {
        Some(title) => page.section(title),
        None => page.gap(),
    }
    if *section == Section::Inputs {
        return write_inputs(page, report, chunk.iter().map(|(_, item)| *item));
    }
    for (_, item) in chunk {
        write_item(page, report, *item);
    }
}

fn write_item(page: &mut Page, report: &Report, item: Item) {
    let written = match item {
        Item::Remark(index) => report.remarks.get(index).map(|text| page.text(0, text)),
        Item::Species(index) => report.species.get(index).map(|row| write_species(page, row)),
        Item::Mixture(index) => report.mixtures.get(index).map(|row| write_mixture(page, row)),
        Item::Input(index) => report.inputs.get(index).map(|row| write_derived(page, row)),
        Item::State(index) => report.states.get(index).map(|row| write_state(page, row)),
        Item::Step(index) => report.steps.get(index).map(|row| write_step(page, row, &report.data)),
        Item::Duty(index) => report.duties.get(index).map(|row| write_duty(page, row)),
        Item::Result(index) => report.results.get(index).map(|row| write_result(page, row)),
        Item::Requirement(index) => report.requirements.get(index).map(|row| write_requirement(page, row)),
        Item::Table(index) => report.tables.get(index).map(|row| write_table(page, row)),
        Item::Site => None,
    };
    debug_assert!(
        written.is_some() || item == Item::Site,
        "the order names a row that is not there: {item:?}"
    );
}

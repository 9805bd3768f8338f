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

/// Writes what the item names; `None` where the report has no such row.
fn write_item(page: &mut Page, report: &Report, item: Item) -> Option<()> {
    match item {
        Item::Remark(index) => page.text(0, report.remarks.get(index)?),
        Item::Species(index) => write_species(page, report.species.get(index)?),
        Item::Mixture(index) => write_mixture(page, report.mixtures.get(index)?),
        Item::Site => write_inputs(page, report, std::iter::once(item)),
        Item::Input(index) => write_derived(page, report.inputs.get(index)?),
        Item::State(index) => write_state(page, report.states.get(index)?),
        Item::Step(index) => write_step(page, report.steps.get(index)?, &report.data),
        Item::Duty(index) => write_duty(page, report.duties.get(index)?),
        Item::Result(index) => write_result(page, report.results.get(index)?),
        Item::Requirement(index) => write_requirement(page, report.requirements.get(index)?),
        Item::Table(index) => write_table(page, report.tables.get(index)?),
    }
    Some(())
}

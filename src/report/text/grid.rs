//! Aligned columns without borders.

use comfy_table::presets::NOTHING;
use comfy_table::{CellAlignment, ContentArrangement, LineStyle, Table};

use super::page::clean;

/// Blanks between two columns.
const BETWEEN: u16 = 2;

/// Rows of cells whose columns are aligned.
pub(super) struct Grid {
    table: Table,
    right: Vec<usize>,
}

impl Grid {
    pub(super) fn new() -> Self {
        let mut table = Table::new();
        table.load_style(NOTHING).set_content_arrangement(ContentArrangement::Dynamic);
        Grid { table, right: Vec::new() }
    }

    /// Sets these columns to the right, as numbers stand.
    pub(super) fn right(mut self, columns: impl IntoIterator<Item = usize>) -> Self {
        self.right.extend(columns);
        self
    }

    /// Sets the names of the columns, with a hairline below.
    pub(super) fn head(mut self, cells: impl IntoIterator<Item = String>) -> Self {
        let style = NOTHING.header_separator(LineStyle::none().fill('─'));
        self.table.load_style(style).set_header(cells.into_iter().map(|cell| clean_lines(&cell)));
        self
    }

    /// Adds a row.
    pub(super) fn row(&mut self, cells: impl IntoIterator<Item = String>) {
        self.table.add_row(cells.into_iter().map(|cell| clean(&cell)));
    }

    /// The lines, none wider than `width` as far as the words allow.
    pub(super) fn lines(mut self, width: usize) -> Vec<String> {
        self.table.set_width(u16::try_from(width).unwrap_or(u16::MAX));
        for (index, column) in self.table.column_iter_mut().enumerate() {
            column.set_padding((0, BETWEEN));
            if self.right.contains(&index) {
                column.set_cell_alignment(CellAlignment::Right);
            }
        }
        self.table.lines().map(|line| line.trim_end().to_owned()).collect()
    }
}

/// The name of a column may stand over its unit.
fn clean_lines(text: &str) -> String {
    text.lines().map(clean).collect::<Vec<_>>().join("\n")
}

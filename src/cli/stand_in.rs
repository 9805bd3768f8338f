//! The text report until its renderer is there.
use crate::report::Report;
pub(super) struct Style {
    pub(super) colour: bool,
    pub(super) width: usize,
}
pub(super) fn render_text(report: &Report, style: Style) -> String {
    format!("{} {} {}\n", report.title, style.colour, style.width)
}

//! Curves drawn with characters: cp and H over T.

use super::model::SpeciesPage;
use crate::report::number::significant;

/// The columns and lines of a drawing.
const COLUMNS: usize = 70;
const LINES: usize = 16;

/// cp and H(T) − H(298.15 K) over T, 80 columns wide, in plain ASCII.
pub fn render_plot(page: &SpeciesPage) -> String {
    let (factor, per) = page.basis();
    let unit = if page.molar_mass.is_some() { "J/(mol K)" } else { "J/(kg K)" };
    let cp: Vec<_> = page.curve.iter().map(|(phase, t, cp, _)| (*phase, *t, cp * factor)).collect();
    let enthalpy: Vec<_> = page.curve.iter().map(|(phase, t, _, h)| (*phase, *t, h * factor / 1e3)).collect();
    let legend: Vec<String> =
        page.phases.iter().enumerate().map(|(at, phase)| format!("{} {}", mark(at), phase.name)).collect();
    format!(
        "\ncp in {unit} over T in K   ({})\n{}\nenthalpy in kJ/{per} over T in K\n{}",
        legend.join("  "),
        drawn(&cp),
        drawn(&enthalpy)
    )
}

fn mark(phase: usize) -> char {
    char::from(b"*o+x#@%&".get(phase).copied().unwrap_or(b'.'))
}

fn drawn(points: &[(usize, f64, f64)]) -> String {
    let ends = |of: fn(&(usize, f64, f64)) -> f64| {
        points
            .iter()
            .map(of)
            .fold((f64::INFINITY, f64::NEG_INFINITY), |(lo, hi), value| (lo.min(value), hi.max(value)))
    };
    let (left, right) = ends(|point| point.1);
    let (mut low, high) = ends(|point| point.2);
    if !(right > left && high.is_finite() && low.is_finite()) {
        return String::new();
    }
    if high - low < 0.05 * high.abs() {
        low = high - 0.05 * high.abs().max(f64::MIN_POSITIVE);
    }
    let mut canvas = vec![vec![' '; COLUMNS]; LINES];
    for (phase, x, y) in points {
        let column = cell((x - left) / (right - left), COLUMNS);
        let line = LINES - 1 - cell((y - low) / (high - low), LINES);
        canvas[line][column] = mark(*phase);
    }
    let mut out = String::new();
    for (at, line) in canvas.iter().enumerate() {
        let label = match at {
            0 => significant(high, 4),
            _ if at == LINES - 1 => significant(low, 4),
            _ => String::new(),
        };
        let text: String = line.iter().collect();
        out.push_str(format!("{label:>8} |{text}").trim_end());
        out.push('\n');
    }
    let (from, to) = (significant(left, 5), significant(right, 5));
    out.push_str(&format!("{:>8} +{}\n", "", "-".repeat(COLUMNS)));
    out.push_str(&format!("{:>10}{from}{:>width$}\n", "", to, width = COLUMNS - from.len()));
    out
}

/// The cell of a share of the way, 0 to 1.
fn cell(share: f64, cells: usize) -> usize {
    #[allow(clippy::cast_precision_loss, clippy::cast_possible_truncation, clippy::cast_sign_loss)]
    // a share from 0 to 1 of some ten cells
    let at = (share.clamp(0.0, 1.0) * (cells - 1) as f64).round() as usize;
    at.min(cells - 1)
}

//! heatpath: a language and interpreter for thermal process sheets.
//!
//! A sheet is a plain text: inputs with their units and sources, species, states, and the steps between them. The
//! program checks every unit and every kind of quantity, works the sheet, and prints a report that can be reviewed
//! line by line. What two engineers could read differently is refused.
//!
//! # The passes
//!
//! ```text
//!  text ──syntax──▶ tree ──check──▶ Program ──plan──▶ Plan ──eval──▶ values ──report──▶ Report
//!                   spans           ids, kinds,       flat operations  f64 in SI         text, JSON
//!                                   dimensions, SI    on slots
//! ```
//!
//! | pass | in | out |
//! |---|---|---|
//! | [`syntax`] | the text of a file | a tree with a place for everything, and the mistakes of form |
//! | [`check`] | the tree, units, files that it uses | a [`program::Program`], or every mistake of meaning |
//! | [`plan`] | the Program | a [`plan::Plan`]: operations on numbered slots, without names or units |
//! | [`eval`] | the Plan and its inputs | values in SI, and what failed, by index |
//! | [`study`] | the Plan at many points | the rows of tables |
//! | [`report`] | Program and values | a [`report::Report`], and its renderers |
//!
//! Beside them stand [`units`] (what a unit means), [`thermo`] (the physics, on typed quantities), [`numeric`]
//! (integrals, roots, interpolation), [`diagnostic`] (what went wrong, as data) and [`library`] (who brings files).
//! [`session`] runs the passes in their order; [`cli`] is the only room that touches files and the terminal.
//!
//! # From Rust
//!
//! [`session::run`] takes a text and a loader and gives back everything that was found. The core touches no file, no
//! environment and no clock, and the same sheet gives the same bits on every machine.
//!
//! ```
//! use heatpath::{library::NoFiles, report, session};
//!
//! let sheet = r#"
//! species N2 "nitrogen" {
//!     source "constant cp for this sheet"
//!     formula N2
//!     phase gas {
//!         cp = 29.10 J/(mol K)   for 250 K to 400 K
//!     }
//! }
//! state cold = 100 mol of N2 at 20 degC
//! state warm = cold at 70 degC
//! step heat_up: cold -> warm, at constant pressure
//! result heat = heat_up.Q in kJ
//! "#;
//!
//! let worked = session::run("warm.heat", "warm.heat", sheet, &NoFiles);
//! assert!(worked.diagnostics.is_empty());
//! let worked = worked.report.expect("nothing is wrong with this sheet");
//!
//! // 100 mol * 29.10 J/(mol K) * 50 K = 145.5 kJ
//! assert!(report::render_text(&worked, report::Style::default()).contains("heat = 145.5 kJ"));
//! ```
//!
//! A sheet that is refused has no report. Its [`Diagnostic`](diagnostic::Diagnostic)s carry a stable code, one line,
//! the places, and a way out:
//!
//! ```
//! use heatpath::{diagnostic::Code, library::NoFiles, session};
//!
//! let worked = session::run("a.heat", "a.heat", "let a = 20 degC + 30 degC\n", &NoFiles);
//! assert!(worked.report.is_none());
//! assert_eq!(worked.diagnostics.first().map(|found| found.code), Some(Code::PointsAdded));
//! ```
//!
//! Figures follow from the sheet's own inputs and data. They do not replace local codes, the makers' limits or a
//! licensed engineer's judgement.

pub mod check;
pub mod cli;
pub mod diagnostic;
pub mod eval;
pub mod library;
pub mod numeric;
pub mod plan;
pub mod program;
pub mod report;
pub mod session;
pub mod source;
pub mod span;
pub mod study;
pub mod syntax;
pub mod thermo;
pub mod units;

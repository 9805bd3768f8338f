//! The report as a note for a reviewer, in plain text.
//!
//! In comes a [`Report`](super::Report), out goes text of 80 to 120 columns that is complete without colour and can be
//! printed. It begins with the answer in short, follows the sheet's own order with the formula, the numbers put in and
//! the value of everything that is worked out, and ends with the data and the conventions that the answers rest on. Each
//! line that a reviewer has to agree to carries a number, `[3]`; data are numbered by themselves, `[D3]`, so that a step
//! can point to them.
//!
//! What is guaranteed: text of the sheet is printed as it stands there, without control characters; beside every
//! pressure that is not a difference stands `abs` or `gauge`; colour adds no information.

mod change;
mod closing;
mod given;
mod grid;
mod ground;
mod material;
mod note;
mod opening;
mod outcome;
mod page;
mod style;
#[cfg(test)]
mod tests;

pub use note::render_text;
pub use style::Style;

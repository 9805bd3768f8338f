//! The driver that front ends share: a text in, a worked sheet out.
//!
//! In comes the text of a sheet with its name for messages, its identity for the loader, and the loader that brings
//! the files it uses. Out comes a [`Worked`]: the sources, everything that was found, and the report where nothing is
//! wrong. Nothing here touches a file, the environment or the clock.

mod fault;
mod outputs;
mod species;
mod warn;
mod work;

pub use species::library_pages;
pub use work::{Worked, check, run};

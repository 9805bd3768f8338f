//! What the cutter makes.

use crate::diagnostic::Diagnostic;
use std::ops::Range;

/// How deep brackets may nest.
pub(super) const DEPTH_LIMIT: usize = 64;
/// How long a joined statement may be, in bytes.
pub(super) const LENGTH_LIMIT: usize = 64 * 1024;

/// A statement or an entry.
#[derive(Debug)]
pub(in crate::syntax) struct Piece {
    /// From its first to its last character; of a block, its opening line.
    pub(in crate::syntax) range: Range<usize>,
    /// The pieces of its block.
    pub(in crate::syntax) block: Option<Vec<Piece>>,
    /// Whether it is a remark.
    pub(in crate::syntax) remark: bool,
    /// Whether it, or something inside, was already reported and must not be parsed.
    pub(in crate::syntax) broken: bool,
}

/// The cut text.
pub(in crate::syntax) struct Cut {
    /// The text with comments and continued line ends blanked; the same length.
    pub(in crate::syntax) text: String,
    /// The pieces in order.
    pub(in crate::syntax) pieces: Vec<Piece>,
    /// What could not be cut.
    pub(in crate::syntax) diagnostics: Vec<Diagnostic>,
}

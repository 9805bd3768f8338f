//! Where something stands: a file and a range of bytes in it.

/// A file of the sheet being read; the index into the session's list of sources.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Default)]
pub struct FileId(pub u32);

/// A range of bytes in a file, `start..end`, always on character borders.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord, Hash, Default)]
pub struct Span {
    /// The file.
    pub file: FileId,
    /// Offset of the first byte.
    pub start: u32,
    /// Offset after the last byte.
    pub end: u32,
}

impl Span {
    /// The range `start..end` of `file`; offsets beyond 4 GiB do not occur, since a file is refused above 256 MB.
    pub fn new(file: FileId, start: usize, end: usize) -> Self {
        let clamp = |at: usize| u32::try_from(at).unwrap_or(u32::MAX);
        Span { file, start: clamp(start), end: clamp(end) }
    }

    /// The smallest span that covers both; both are in the same file.
    pub fn to(self, other: Span) -> Self {
        Span { file: self.file, start: self.start.min(other.start), end: self.end.max(other.end) }
    }

    /// The byte range.
    pub fn range(self) -> std::ops::Range<usize> {
        self.start as usize..self.end as usize
    }
}

//! Reading one file as text.

use std::fs::{File, Metadata};
use std::io::{self, ErrorKind, Read};
use std::path::Path;

/// The largest file that is read, in bytes.
pub(super) const LIMIT: u64 = 256_000_000;

/// Why a file gives no text.
#[derive(Debug)]
pub(super) enum Fault {
    /// It cannot be opened or read; the reason in words.
    Unreadable(String),
    /// It is larger than [`LIMIT`].
    TooLarge,
    /// It is not UTF-8 from this byte on.
    NotUtf8 {
        /// What was read.
        bytes: Vec<u8>,
        /// The offset of the first byte that is no UTF-8.
        offset: usize,
    },
}

/// Which files are read.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub(super) enum Admitted {
    /// Anything that can be read to an end, pipes included.
    Any,
    /// Files proper: a pipe or a device could keep the program waiting for ever.
    FilesOnly,
}

/// The text of a file. A byte order mark at its beginning is left out.
pub(super) fn read_text(path: &Path, admitted: Admitted) -> Result<String, Fault> {
    let metadata = std::fs::metadata(path).map_err(|error| unreadable(&error))?;
    admit(&metadata, admitted)?;
    let file = File::open(path).map_err(|error| unreadable(&error))?;
    text_of(file)
}

/// The text that a stream brings.
pub(super) fn text_of(stream: impl Read) -> Result<String, Fault> {
    text_up_to(stream, LIMIT)
}

fn text_up_to(stream: impl Read, limit: u64) -> Result<String, Fault> {
    let mut bytes = Vec::new();
    stream.take(limit + 1).read_to_end(&mut bytes).map_err(|error| unreadable(&error))?;
    if u64::try_from(bytes.len()).is_ok_and(|length| length > limit) {
        return Err(Fault::TooLarge);
    }
    match String::from_utf8(bytes) {
        Ok(mut text) => {
            if text.starts_with('\u{feff}') {
                text.drain(..'\u{feff}'.len_utf8());
            }
            Ok(text)
        }
        Err(error) => {
            let offset = error.utf8_error().valid_up_to();
            Err(Fault::NotUtf8 { bytes: error.into_bytes(), offset })
        }
    }
}

fn admit(metadata: &Metadata, admitted: Admitted) -> Result<(), Fault> {
    if metadata.is_dir() {
        return Err(Fault::Unreadable("it is a folder".to_owned()));
    }
    if admitted == Admitted::FilesOnly && !metadata.is_file() {
        return Err(Fault::Unreadable("it is a pipe or a device, not a file".to_owned()));
    }
    if metadata.len() > LIMIT { Err(Fault::TooLarge) } else { Ok(()) }
}

fn unreadable(error: &io::Error) -> Fault {
    Fault::Unreadable(reason(error))
}

/// What the system answered, in words.
pub(super) fn reason(error: &io::Error) -> String {
    match error.kind() {
        ErrorKind::NotFound => "there is no such file".to_owned(),
        ErrorKind::PermissionDenied => "it may not be read".to_owned(),
        ErrorKind::IsADirectory => "it is a folder".to_owned(),
        ErrorKind::NotADirectory => "a part of its path is no folder".to_owned(),
        _ => error.to_string(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_byte_order_mark_is_no_text() {
        assert_eq!(text_of("\u{feff}let a = 1".as_bytes()).expect("a text"), "let a = 1");
    }

    #[test]
    fn a_stream_without_end_is_refused_by_its_size() {
        assert!(matches!(text_up_to(io::repeat(b'#'), 5000), Err(Fault::TooLarge)));
        assert_eq!(text_up_to(&b"#####"[..], 5).expect("a text"), "#####");
    }

    #[test]
    fn latin_1_is_refused_at_its_byte() {
        let Err(Fault::NotUtf8 { offset, .. }) = text_of(&b"460 \xb0C"[..]) else { panic!("not refused") };
        assert_eq!(offset, 4);
    }
}

//! Sheets of the corpus with random damage: they are read and checked to an end, and nothing panics.

use crate::sheets::sheets_below;
use heatpath::library::NoFiles;
use heatpath::session;
use proptest::prelude::*;
use proptest::test_runner::{Config, RngSeed};
use std::sync::mpsc;
use std::thread;
use std::time::Duration;

/// Pieces of the language, put where they do not belong.
const TOKENS: &[&str] = &[
    "(", ")", "{", "}", "\n", ",", "->", "=", "+", "-", "^", "±", "?", "\"", "#", "|", ".", " in ", " of ",
    " at ", "T", "Zn(l)", "1e308", "450 kg", "degC", "barg", "species ", "phase ", "state ", "step ",
    "let a = ", "μ", "\0",
];

/// How long one sheet may take; far more than any of these needs.
const LIMIT: Duration = Duration::from_secs(20);
/// The stack of the thread that the command line works on.
const STACK: usize = 256 << 20;

/// A damage. Places are taken modulo the length of the sheet.
#[derive(Debug, Clone)]
enum Damage {
    Flip { at: usize, bit: u8 },
    Delete { at: usize, length: usize },
    Repeat { at: usize, length: usize, times: usize },
    Splice { at: usize, other: usize, from: usize, length: usize },
    Insert { at: usize, token: usize },
}

fn damage() -> impl Strategy<Value = Damage> {
    let place = 0..100_000_usize;
    prop_oneof![
        (place.clone(), 0..8_u8).prop_map(|(at, bit)| Damage::Flip { at, bit }),
        (place.clone(), 1..60_usize).prop_map(|(at, length)| Damage::Delete { at, length }),
        (place.clone(), 1..200_usize, 1..60_usize).prop_map(|(at, length, times)| Damage::Repeat {
            at,
            length,
            times
        }),
        (place.clone(), place.clone(), place.clone(), 1..300_usize)
            .prop_map(|(at, other, from, length)| Damage::Splice { at, other, from, length }),
        (place, 0..TOKENS.len()).prop_map(|(at, token)| Damage::Insert { at, token }),
    ]
}

/// 256 sheets, the same ones on every run; `PROPTEST_CASES` asks for another number, and then for new ones.
fn config() -> Config {
    let more = std::env::var_os("PROPTEST_CASES").is_some();
    let rng_seed = if more { RngSeed::Random } else { RngSeed::Fixed(2026) };
    Config { rng_seed, ..Config::default() }
}

fn slice(bytes: &[u8], from: usize, length: usize) -> Vec<u8> {
    let from = from % (bytes.len() + 1);
    bytes.iter().skip(from).take(length).copied().collect()
}

fn apply(bytes: &mut Vec<u8>, damage: &Damage, others: &[Vec<u8>]) {
    let place = |at: usize| at % (bytes.len() + 1);
    match damage {
        Damage::Flip { at, bit } => {
            let at = place(*at);
            if let Some(byte) = bytes.get_mut(at) {
                *byte ^= 1 << bit;
            }
        }
        Damage::Delete { at, length } => {
            let at = place(*at);
            let end = (at + length).min(bytes.len());
            bytes.drain(at..end);
        }
        Damage::Repeat { at, length, times } => {
            let at = place(*at);
            let again = slice(bytes, at, *length).repeat(*times);
            bytes.splice(at..at, again);
        }
        Damage::Splice { at, other, from, length } => {
            let at = place(*at);
            let other = others.get(other % others.len()).map(|other| slice(other, *from, *length));
            bytes.splice(at..at, other.unwrap_or_default());
        }
        Damage::Insert { at, token } => {
            let at = place(*at);
            bytes.splice(at..at, TOKENS.get(*token).unwrap_or(&"").bytes());
        }
    }
}

/// Checks a sheet on a thread of its own, as the command line does.
fn is_checked_to_an_end(text: String) -> Result<(), TestCaseError> {
    let (done, end) = mpsc::channel();
    let work = move || {
        let worked = session::check("mutated.heat", "mutated.heat", &text, &NoFiles);
        done.send(worked.diagnostics.len()).unwrap_or_default();
    };
    let worker = thread::Builder::new().stack_size(STACK).spawn(work).expect("a thread starts");
    match end.recv_timeout(LIMIT) {
        Ok(_) => Ok(()),
        Err(mpsc::RecvTimeoutError::Disconnected) => {
            prop_assert!(worker.join().is_ok(), "the check panicked");
            Ok(())
        }
        Err(mpsc::RecvTimeoutError::Timeout) => Err(TestCaseError::fail("the check does not end")),
    }
}

#[test]
fn damaged_sheets_are_checked_to_an_end() {
    let sheets: Vec<_> = ["tests/corpus", "tests/reference"].into_iter().flat_map(sheets_below).collect();
    let sheets: Vec<_> = sheets.into_iter().map(|sheet| sheet.bytes).collect();
    let damages = prop::collection::vec(damage(), 1..8);
    proptest!(config(), |(first in 0..sheets.len(), damages in damages)| {
        let mut bytes = sheets.get(first).cloned().unwrap_or_default();
        for damage in &damages {
            apply(&mut bytes, damage, &sheets);
        }
        is_checked_to_an_end(String::from_utf8_lossy(&bytes).into_owned())?;
    });
}

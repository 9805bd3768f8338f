//! From a word to its unit and prefix.

use std::collections::BTreeMap;
use std::sync::OnceLock;

use super::{Entry, FAMILIES};
use crate::units::prefix::{PREFIXES, Prefix};

/// A word that names a unit, with or without a prefix.
#[derive(Debug, Clone, Copy)]
pub(crate) struct Known {
    /// The unit.
    pub(crate) entry: &'static Entry,
    /// The prefix before it.
    pub(crate) prefix: Option<&'static Prefix>,
}

/// The unit of this word. A unit's own spelling goes before a prefixed one: `min` is the minute.
pub(crate) fn find(word: &str) -> Option<Known> {
    let spellings = spellings();
    if let Some(entry) = spellings.get(word) {
        return Some(Known { entry, prefix: None });
    }
    PREFIXES.iter().find_map(|prefix| {
        prefix.symbols.iter().find_map(|symbol| {
            let entry = *spellings.get(word.strip_prefix(symbol)?)?;
            entry.prefixes.admit(prefix).then_some(Known { entry, prefix: Some(prefix) })
        })
    })
}

fn spellings() -> &'static BTreeMap<&'static str, &'static Entry> {
    static SPELLINGS: OnceLock<BTreeMap<&'static str, &'static Entry>> = OnceLock::new();
    SPELLINGS.get_or_init(|| {
        let entries = FAMILIES.iter().flat_map(|family| family.iter());
        entries.flat_map(|entry| entry.spellings().map(move |spelling| (spelling, entry))).collect()
    })
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::units::ambiguous::ambiguous;

    fn every_word() -> Vec<String> {
        let mut words = Vec::new();
        for entry in FAMILIES.iter().flat_map(|family| family.iter()) {
            for spelling in entry.spellings() {
                words.push(spelling.to_owned());
                for prefix in PREFIXES.iter().filter(|prefix| entry.prefixes.admit(prefix)) {
                    words.extend(prefix.symbols.iter().map(|symbol| format!("{symbol}{spelling}")));
                }
            }
        }
        words
    }

    #[test]
    fn no_word_can_be_read_in_two_ways() {
        let mut words = every_word();
        words.sort();
        let twice: Vec<_> = words.windows(2).filter(|pair| pair[0] == pair[1]).map(|pair| &pair[0]).collect();
        assert!(twice.is_empty(), "{twice:?}");
    }

    #[test]
    fn no_ambiguous_name_is_a_unit() {
        let clashes: Vec<_> = every_word().into_iter().filter(|word| ambiguous(word).is_some()).collect();
        assert!(clashes.is_empty(), "{clashes:?}");
    }

    #[test]
    fn a_prefix_is_found_before_its_unit_only() {
        let ten = |word| find(word).map(|known| known.prefix.map_or(0, |prefix| prefix.ten));
        assert_eq!(ten("kJ"), Some(3));
        assert_eq!(ten("min"), Some(0));
        assert_eq!(ten("kg"), Some(3));
        assert_eq!(ten("kkg"), None);
        assert_eq!(ten("kdegC"), None);
        assert_eq!(ten("\u{3bc}m"), ten("\u{b5}m"));
    }
}

//! The known name that a mistyped one was probably meant to be.

/// The candidate nearest to `word` by edits (a swap of neighbours counts as one), if it is near enough to be a
/// slip: at most a third of the word's letters, and always one.
pub fn nearest<'a>(word: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let allowed = (word.chars().count() / 3).max(1);
    let folded = word.to_lowercase();
    candidates
        .into_iter()
        .filter(|candidate| !candidate.is_empty() && *candidate != word)
        .map(|candidate| (strsim::damerau_levenshtein(&folded, &candidate.to_lowercase()), candidate))
        .filter(|(edits, candidate)| *edits <= allowed && *edits < candidate.chars().count())
        .min_by_key(|(edits, candidate)| (*edits, candidate.chars().count().abs_diff(word.chars().count())))
        .map(|(_, candidate)| candidate)
}

#[cfg(test)]
mod tests {
    use super::nearest;

    #[test]
    fn a_slip_finds_its_name() {
        assert_eq!(nearest("charg", ["cold", "charge"]), Some("charge"));
        assert_eq!(nearest("chagre", ["cold", "charge"]), Some("charge"));
        assert_eq!(nearest("kw", ["kW", "W"]), Some("kW"));
    }

    #[test]
    fn a_stranger_finds_none() {
        assert_eq!(nearest("furnace", ["cold", "charge"]), None);
        assert_eq!(nearest("x", ["y"]), None);
    }
}

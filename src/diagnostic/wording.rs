//! Small wordings that every message shares.

/// `1 step`, `2 steps`: a count with its noun, the plural made with `s`.
pub fn count(number: usize, noun: &str) -> String {
    if number == 1 { format!("1 {noun}") } else { format!("{number} {noun}s") }
}

/// `a`, `a or b`, `a, b or c`.
pub fn or_list<S: AsRef<str>>(items: &[S]) -> String {
    joined(items, "or")
}

/// `a`, `a and b`, `a, b and c`.
pub fn and_list<S: AsRef<str>>(items: &[S]) -> String {
    joined(items, "and")
}

fn joined<S: AsRef<str>>(items: &[S], word: &str) -> String {
    match items {
        [] => String::new(),
        [one] => one.as_ref().to_owned(),
        [head @ .., last] => {
            let head: Vec<&str> = head.iter().map(AsRef::as_ref).collect();
            format!("{} {word} {}", head.join(", "), last.as_ref())
        }
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn lists_read_as_english() {
        assert_eq!(or_list(&["a"]), "a");
        assert_eq!(or_list(&["a", "b"]), "a or b");
        assert_eq!(and_list(&["a", "b", "c"]), "a, b and c");
        assert_eq!(or_list::<&str>(&[]), "");
    }

    #[test]
    fn counts_take_the_plural() {
        assert_eq!(count(1, "row"), "1 row");
        assert_eq!(count(0, "row"), "0 rows");
    }
}

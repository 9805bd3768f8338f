//! Fenced blocks of a Markdown page.

use crate::program::path;

/// A fenced block.
#[derive(Debug, Clone, PartialEq, Eq)]
pub(crate) struct Block {
    /// The line of its opening fence, from 1.
    pub(crate) line: usize,
    /// What stands behind the opening fence.
    pub(crate) info: String,
    /// Its text, each line with its end.
    pub(crate) text: String,
}

/// The blocks of a page of the repository, in order.
pub(crate) fn blocks_of(page: &str) -> Vec<Block> {
    let text = std::fs::read_to_string(path(page)).expect("the page is there");
    blocks(&text)
}

fn blocks(page: &str) -> Vec<Block> {
    let mut found = Vec::new();
    let mut open: Option<Block> = None;
    for (line, text) in (1..).zip(page.lines()) {
        match (&mut open, text.strip_prefix("```")) {
            (None, Some(info)) => {
                open = Some(Block { line, info: info.trim().to_owned(), text: String::new() });
            }
            (Some(_), Some(_)) => found.extend(open.take()),
            (Some(block), None) => {
                block.text.push_str(text);
                block.text.push('\n');
            }
            (None, None) => {}
        }
    }
    assert_eq!(open, None, "a block that is not closed");
    found
}

#[test]
fn blocks_are_found_with_their_lines() {
    let found = blocks("a\n```heat file=b.heat\nlet c = 1\n```\nd\n```\ne\n\nf\n```\n");
    let block = |line, info: &str, text: &str| Block { line, info: info.to_owned(), text: text.to_owned() };
    assert_eq!(found, [block(2, "heat file=b.heat", "let c = 1\n"), block(6, "", "e\n\nf\n")]);
}

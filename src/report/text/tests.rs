use super::{Style, render_text};
use crate::report::sample;

#[test]
fn preview() {
    println!("{}", render_text(&sample::report(), Style { colour: false, width: 90 }));
}

//! The whole way from pages to bytes, and what the laid-out pages show.

mod file;
mod sheets;
mod words;

use typst::layout::{Abs, Frame, FrameItem, Point, Transform};
use typst_layout::PagedDocument;

use super::sample::{STAMP, attachments, pages};
use super::*;

fn laid_out(world: &RecordWorld) -> PagedDocument {
    let compiled = typst::compile::<PagedDocument>(world);
    assert!(compiled.warnings.is_empty(), "{:?}", compiled.warnings);
    compiled.output.unwrap()
}

fn sample_world() -> RecordWorld {
    RecordWorld::new(&pages(), &attachments()).unwrap()
}

/// Every piece of text with its left and right edge.
fn texts(document: &PagedDocument) -> Vec<(String, Abs, Abs)> {
    let mut found = Vec::new();
    for page in document.pages() {
        collect(&page.frame, Transform::identity(), &mut found);
    }
    found
}

fn collect(frame: &Frame, outer: Transform, found: &mut Vec<(String, Abs, Abs)>) {
    for (offset, item) in frame.items() {
        let here = outer.pre_concat(Transform::translate(offset.x, offset.y));
        match item {
            FrameItem::Group(group) => {
                collect(&group.frame, here.pre_concat(group.transform), found);
            }
            FrameItem::Text(text) => {
                let edge = |x| Point::with_x(x).transform(here).x;
                found.push((text.text.to_string(), edge(Abs::zero()), edge(text.width())));
            }
            _ => {}
        }
    }
}

fn joined(document: &PagedDocument) -> String {
    texts(document).into_iter().map(|(text, ..)| text).collect()
}

fn overfull(document: &PagedDocument) -> Vec<String> {
    let (left, right) = (Abs::mm(24.9), Abs::mm(190.1));
    texts(document)
        .into_iter()
        .filter(|(_, from, to)| *from < left || *to > right)
        .map(|(text, ..)| text)
        .collect()
}

fn contains(bytes: &[u8], needle: &str) -> bool {
    bytes
        .windows(needle.len())
        .any(|window| window == needle.as_bytes())
}

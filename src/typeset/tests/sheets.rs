//! The sheets: what stands where.

use typst::visualize::Geometry;

use super::*;
use crate::record::{ProseSection, Step, ValueRow};

#[test]
fn every_variant_is_set_without_a_warning_and_within_the_margins() {
    let document = laid_out(&sample_world());
    assert_eq!(overfull(&document), Vec::<String>::new());
    let text = joined(&document);
    for said in [
        "Heat of an invented hydrogenation",
        "FOR CHECK",
        "−552.6 ± 0.8",
        "not worked",
        "H2O(l)",
        "SO42−(aq)",
        "reading of TI-301",
        "Charge confirmed; second source compared.",
        "within the combined expanded uncertainty",
        "equation = \"A + 3 H2(g) -> B + 2 H2O(l)\"",
        "Secondary decomposition is not seen",
        "results.json",
        "Sheet 1 of 4",
    ] {
        assert!(text.contains(said), "{said} is missing");
    }
}

#[test]
fn the_stamp_can_be_read_in_full_and_in_short() {
    let text = joined(&laid_out(&sample_world())).replace(' ', "");
    assert!(text.contains(STAMP));
    assert!(text.contains(&format!("Stamp{}", &STAMP[..16])));
}

/// Left, bottom, right and top of every drawn rectangle of a page, in points from the lower left.
fn rectangles(frame: &Frame, outer: Transform, height: Abs, found: &mut Vec<[f64; 4]>) {
    for (offset, item) in frame.items() {
        let here = outer.pre_concat(Transform::translate(offset.x, offset.y));
        match item {
            FrameItem::Group(group) => {
                let inner = here.pre_concat(group.transform);
                rectangles(&group.frame, inner, height, found);
            }
            FrameItem::Shape(shape, _) => {
                let Geometry::Rect(size) = shape.geometry else {
                    continue;
                };
                let low = Point::new(Abs::zero(), size.y).transform(here);
                let high = Point::new(size.x, Abs::zero()).transform(here);
                found.push([low.x, height - low.y, high.x, height - high.y].map(Abs::to_pt));
            }
            _ => {}
        }
    }
}

fn assert_boxes_are_drawn(pages: &Pages) {
    let document = laid_out(&RecordWorld::new(pages, &[]).unwrap());
    let front = &document.pages()[0].frame;
    let mut drawn = Vec::new();
    rectangles(front, Transform::identity(), front.height(), &mut drawn);
    for place in signature_boxes(pages.title_block.signatures.len()) {
        let wanted = [place.left, place.bottom, place.right, place.top];
        let near = |found: &[f64; 4]| found.iter().zip(wanted).all(|(a, b)| (a - b).abs() < 0.1);
        assert!(drawn.iter().any(near), "{wanted:?} is not among {drawn:?}");
    }
}

#[test]
fn signature_boxes_are_where_they_are_said_to_be() {
    let mut signed = pages();
    for count in [3, 2, 1] {
        signed.title_block.signatures.truncate(count);
        assert_boxes_are_drawn(&signed);
    }
    let one = signed.title_block.signatures[0].clone();
    signed.title_block.signatures = vec![one; 4];
    assert_boxes_are_drawn(&signed);
}

#[test]
fn long_tables_repeat_their_heads_and_stay_links_to_their_rows() {
    let mut many = pages();
    let row = many.values_used[0].clone();
    for number in 5..=150 {
        many.values_used.push(ValueRow {
            number,
            ..row.clone()
        });
    }
    let Step::Table(table) = &mut many.working[0].steps[6] else {
        panic!("the sample's seventh step is a table");
    };
    let first = table.rows[0].clone();
    table.rows = vec![first; 150];
    let world = RecordWorld::new(&many, &[]).unwrap();
    let document = laid_out(&world);
    let text = joined(&document);
    assert!(text.matches("Value as printed").count() > 5);
    assert!(text.matches("Coefficient").count() > 2);
    let bytes = export::pdf(&world, &document, &export::options(&many).unwrap()).unwrap();
    assert!(contains(&bytes, "/Link"));
}

#[test]
fn empty_lists_are_said_in_words() {
    let mut bare = pages();
    bare.title_block.status = "preliminary".to_owned();
    bare.title_block.signatures.clear();
    bare.results.clear();
    bare.basis.holds.clear();
    bare.opening.clear();
    bare.opening.push(ProseSection {
        heading: "Purpose".to_owned(),
        blocks: Vec::new(),
    });
    for section in &mut bare.working {
        section.steps.clear();
    }
    bare.budgets.clear();
    bare.findings.clear();
    bare.comparisons.clear();
    let text = joined(&laid_out(&RecordWorld::new(&bare, &[]).unwrap()));
    for said in [
        "PRELIMINARY",
        "No result is claimed.",
        "None: nothing on which this record rests waits for confirmation.",
        "Checked: not checked",
    ] {
        assert!(text.contains(said), "{said} is missing");
    }
}

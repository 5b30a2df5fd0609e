//! Text from a case is shown as it stands, is never markup, and stays on the page.

use serde_json::Value;

use super::*;
use crate::record::Rich;
use crate::record::Step;

/// What a person might try to smuggle into a page, and what is merely unusual. All of it has to
/// appear as it stands.
const HOSTILE: &str = r##"#panic() $x$ *a* _b_ <label> @ref // not a comment /* nor this */ \u{41} "q" 'r' `raw` = Heading - item [c] {d} ~ --- ... https://example.org/a?b=c e\ &amp; é"##;

/// The sample with another text for each text that a case can say.
fn sample_saying(text: &str) -> RecordWorld {
    let mut data = serde_json::to_value(pages()).unwrap();
    replace(&mut data, "", text);
    let mut world = sample_world();
    world.set_data(serde_json::to_vec(&data).unwrap());
    world
}

fn replace(value: &mut Value, key: &str, text: &str) {
    const STRUCTURE: [&str; 6] = ["as", "block", "step", "node", "kind", "status"];
    match value {
        Value::String(old) if !STRUCTURE.contains(&key) => *old = text.to_owned(),
        Value::Array(items) => items.iter_mut().for_each(|item| replace(item, key, text)),
        Value::Object(fields) => {
            fields
                .iter_mut()
                .for_each(|(key, field)| replace(field, key, text));
        }
        _ => {}
    }
}

#[test]
fn text_is_never_markup() {
    let world = sample_saying(HOSTILE);
    let document = laid_out(&world);
    assert!(joined(&document).contains(HOSTILE));
    export::pdf(&world, &document, &export::options(&pages()).unwrap()).unwrap();
}

#[test]
fn a_word_longer_than_a_page_breaks_wherever_it_stands() {
    let word = "x".repeat(10_000);
    let mut long = pages();
    long.title_block.title = word.clone();
    long.working[0].steps = vec![Step::Text {
        text: Rich::plain(word.as_str()),
    }];
    long.values_used[0].printed = word.clone();
    long.findings[0].code = word;
    let document = laid_out(&RecordWorld::new(&long, &[]).unwrap());
    assert_eq!(overfull(&document), Vec::<String>::new());
}

#[test]
fn long_words_everywhere_stay_within_the_margins() {
    let world = sample_saying(&"W".repeat(60));
    assert_eq!(overfull(&laid_out(&world)), Vec::<String>::new());
}

#[test]
fn other_scripts_and_combining_marks_are_set() {
    let text = "Ωмега שלום سلام e\u{301}o\u{308} Ångström";
    assert_eq!(uncovered(text), None);
    let world = sample_saying(text);
    let document = laid_out(&world);
    export::pdf(&world, &document, &export::options(&pages()).unwrap()).unwrap();
}

#[test]
fn a_character_without_a_glyph_is_refused_by_name() {
    let mut unshown = pages();
    unshown.title_block.title = "熱".to_owned();
    let error = typeset(&unshown, &[]).unwrap_err().to_string();
    assert!(
        error.starts_with("the typesetter refuses the pages: "),
        "{error}"
    );
    assert!(error.contains("熱"), "{error}");
}

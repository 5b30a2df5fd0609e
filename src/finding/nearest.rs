//! Help with words that are not quite right.

/// The candidates that a person most likely meant, best first, at most `most` of them.
pub fn nearest<'a>(
    word: &str,
    candidates: impl IntoIterator<Item = &'a str>,
    most: usize,
) -> Vec<&'a str> {
    let lower = word.to_lowercase();
    let mut scored: Vec<(u32, &str)> = candidates
        .into_iter()
        .map(|candidate| (score(&lower, &candidate.to_lowercase()), candidate))
        .filter(|(score, _)| *score <= 400)
        .collect();
    scored.sort();
    scored.dedup();
    scored.into_iter().take(most).map(|(_, c)| c).collect()
}

/// Edit distance in thousandths of the longer word: 0 is the same word.
fn score(a: &str, b: &str) -> u32 {
    if a.chars().count() > 200 {
        return u32::MAX;
    }
    let longer = a.chars().count().max(b.chars().count()).max(1);
    let edits = strsim::damerau_levenshtein(a, b);
    (edits * 1000 / longer) as u32
}

/// A text of at most `most` characters, the middle replaced where it was longer.
pub fn shorten(text: &str, most: usize) -> String {
    let count = text.chars().count();
    if count <= most {
        return text.to_string();
    }
    let head: String = text.chars().take(most / 2).collect();
    let tail: String = text.chars().skip(count - most / 4).collect();
    format!("{head}…{tail} ({count} characters)")
}

/// A text whose words are at most `most` characters long, so that it can be broken into lines.
pub fn shorten_words(text: &str, most: usize) -> String {
    let parts = text.split_inclusive(char::is_whitespace);
    let short = |part: &str| match part.chars().count() > most + 1 {
        true => shorten(part, most),
        false => part.to_string(),
    };
    parts.map(short).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_slip_is_recognised_and_a_stranger_is_not() {
        let keys = ["equation", "temperature", "per"];
        assert_eq!(nearest("equaton", keys, 3), ["equation"]);
        assert_eq!(nearest("temprature", keys, 3), ["temperature"]);
        assert!(nearest("zzzzzz", keys, 3).is_empty());
    }

    #[test]
    fn long_texts_are_shortened_in_the_middle() {
        assert_eq!(shorten("abc", 8), "abc");
        assert_eq!(shorten(&"1".repeat(4000), 8), "1111…11 (4000 characters)");
    }
}

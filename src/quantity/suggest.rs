//! The nearest known word to a mistyped one.

/// Longest word, in characters, that is compared. Longer ones are no typing slips, and the comparison takes the product
/// of the lengths.
pub const LONGEST_WORD: usize = 64;

/// The candidate that `word` was most likely meant to be, or `None` where nothing is near.
///
/// Candidates that differ by case only come first. Then the Damerau-Levenshtein distance (insertions, deletions,
/// replacements and swaps of neighbours) counts, up to a limit that grows with the length of the word: none for 1 or 2
/// characters, 1 up to 4, 2 up to 7, else 3. Ties go to the candidate with the nearer case, then to the first in
/// alphabetical order, so the answer never depends on the order of the candidates.
#[must_use]
pub fn nearest<'a>(word: &str, candidates: impl IntoIterator<Item = &'a str>) -> Option<&'a str> {
    let length = bounded_length(word)?;
    let limit = match length {
        0 => return None,
        1..=2 => 0,
        3..=4 => 1,
        5..=7 => 2,
        _ => 3,
    };
    let lowered = word.to_lowercase();
    candidates
        .into_iter()
        .filter(|candidate| bounded_length(candidate).is_some_and(|other| other.abs_diff(length) <= limit))
        .filter_map(|candidate| {
            let distance = strsim::damerau_levenshtein(&lowered, &candidate.to_lowercase());
            (distance <= limit).then(|| {
                let by_case = strsim::damerau_levenshtein(word, candidate);
                (distance, by_case, candidate)
            })
        })
        .min()
        .map(|(_, _, candidate)| candidate)
}

/// Length in characters where it is at most [`LONGEST_WORD`]; counts no further than that.
fn bounded_length(word: &str) -> Option<usize> {
    let length = word.chars().take(LONGEST_WORD + 1).count();
    (length <= LONGEST_WORD).then_some(length)
}

#[cfg(test)]
mod tests {
    use super::*;

    const WORDS: [&str; 6] = ["height", "weight", "gravity", "region", "Region", "by"];

    #[test]
    fn finds_the_word_meant() {
        assert_eq!(nearest("hieght", WORDS), Some("height"));
        assert_eq!(nearest("gravty", WORDS), Some("gravity"));
        assert_eq!(nearest("GRAVITY", WORDS), Some("gravity"));
        assert_eq!(nearest("regoin", WORDS), Some("region"));
    }

    #[test]
    fn says_nothing_where_nothing_is_near() {
        assert_eq!(nearest("", WORDS), None);
        assert_eq!(nearest("my", WORDS), None);
        assert_eq!(nearest("temperature", WORDS), None);
    }

    #[test]
    fn ties_do_not_depend_on_the_order() {
        assert_eq!(nearest("qeight", WORDS), Some("height"));
        assert_eq!(nearest("qeight", WORDS.into_iter().rev()), Some("height"));
        assert_eq!(nearest("REGION", WORDS.into_iter().rev()), Some("Region"));
    }

    #[test]
    fn long_words_cost_nothing() {
        let long = "a".repeat(10_000_000);
        assert_eq!(nearest(&long, WORDS), None);
        assert_eq!(nearest("height", [long.as_str(), "height"]), Some("height"));
    }
}

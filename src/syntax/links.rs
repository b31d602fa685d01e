//! The links: words that label arguments, and so name nothing else.

/// Every link, as the grammar has them.
pub const LINKS: [&str; 15] =
    ["along", "and", "at", "because", "by", "for", "from", "in", "of", "over", "step", "to", "until", "with", "within"];

/// Whether a word is a link.
pub fn is_link(word: &str) -> bool {
    LINKS.contains(&word)
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::syntax::parse;

    #[test]
    fn they_are_those_of_the_grammar() {
        let grammar = include_str!("../../grammar/deck.pest");
        let rule = grammar.lines().find(|line| line.starts_with("link_word")).unwrap();
        let quoted: Vec<&str> = rule.split('"').skip(1).step_by(2).filter(|word| *word != "-").collect();
        let mut sorted = quoted.clone();
        sorted.sort_unstable();
        assert_eq!(sorted, LINKS);
        for link in LINKS {
            let tree = parse(&format!("word 1 m {link} 5\n"));
            assert_eq!(&*tree.entries[0].entry.head_phrase().unwrap().links[0].link.text, link);
        }
    }
}

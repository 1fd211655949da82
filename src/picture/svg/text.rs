//! Numbers and words as XML takes them.

use super::super::marks::text_width;

pub(super) fn number(value: f64, decimals: usize) -> String {
    let text = format!("{value:.decimals$}");
    let text = if text.contains('.') {
        text.trim_end_matches('0').trim_end_matches('.')
    } else {
        &text
    };
    // "-0" would be another text for the same place.
    if text == "-0" {
        "0".to_owned()
    } else {
        text.to_owned()
    }
}

/// Text in lines of at most so many heights of text, broken between words.
pub(super) fn wrapped(text: &str, most: f64) -> Vec<String> {
    let mut lines: Vec<String> = Vec::new();
    for word in text
        .split([' ', '\n', '\t'])
        .filter(|word| !word.is_empty())
    {
        match lines.last_mut() {
            Some(line) if text_width(line) + text_width(word) + 0.6 <= most => {
                line.push(' ');
                line.push_str(word);
            }
            _ => lines.push(word.to_owned()),
        }
    }
    lines
}

/// Text that an XML parser takes as it is; what XML cannot hold becomes a blank.
pub(super) fn escaped(text: &str) -> String {
    let mut out = String::with_capacity(text.len());
    for c in text.chars() {
        match c {
            '&' => out.push_str("&amp;"),
            '<' => out.push_str("&lt;"),
            '>' => out.push_str("&gt;"),
            '"' => out.push_str("&quot;"),
            '\n' => out.push('\n'),
            c if c.is_control() || matches!(c, '\u{fffe}' | '\u{ffff}') => out.push(' '),
            c => out.push(c),
        }
    }
    out
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn text_is_escaped_and_numbers_are_short() {
        assert_eq!(
            escaped("a < \"b\" & c\u{1}"),
            "a &lt; &quot;b&quot; &amp; c "
        );
        assert_eq!(number(-1e-9, 3), "0");
        assert_eq!(number(1.5, 3), "1.5");
        assert_eq!(number(100.0, 0), "100");
    }

    #[test]
    fn long_text_is_broken_between_words_and_never_lost() {
        let text = "one two three four five";
        let lines = wrapped(text, 6.0);
        assert!(lines.len() > 2);
        assert_eq!(lines.join(" "), text);
        assert_eq!(wrapped("unbreakable", 1.0), ["unbreakable"]);
    }
}

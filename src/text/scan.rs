//! A light walk over RON text: which value stands where, and the way to it.
//!
//! It knows no types. A value that has been read no longer knows its place; this finds it
//! again. The build script uses the same walk for its index of the fluids, so this file
//! uses nothing but the standard library.

/// Deeper than any file of the program's own; RON itself stops at 128.
const DEEPEST: usize = 128;

/// Calls `visit` with path, byte offset and text of each value, inner ones first.
///
/// A path is `model.critical.temperature_k` or `parts[2].name`; names of variants and
/// `Some(..)` are not part of it. Text that is not RON ends the walk early.
pub fn walk<'a>(text: &'a str, visit: impl FnMut(&str, usize, &'a str)) {
    let mut walker = Walker {
        text,
        at: 0,
        path: String::new(),
        depth: 0,
        visit,
    };
    let _ = walker.value();
}

struct Walker<'a, V> {
    text: &'a str,
    at: usize,
    path: String,
    depth: usize,
    visit: V,
}

impl<'a, V: FnMut(&str, usize, &'a str)> Walker<'a, V> {
    fn value(&mut self) -> Option<()> {
        if self.depth > DEEPEST {
            return None;
        }
        self.depth += 1;
        self.skip_blanks();
        let start = self.at;
        match self.peek()? {
            '"' => self.string()?,
            'r' if self.rest().starts_with("r\"") || self.rest().starts_with("r#") => self.raw()?,
            '(' => self.members(false)?,
            '[' => self.items(']')?,
            '{' => self.map()?,
            _ => {
                self.word()?;
                let end = self.at;
                self.skip_blanks();
                if self.peek() == Some('(') {
                    self.members(true)?;
                } else {
                    self.at = end;
                }
            }
        }
        self.depth -= 1;
        let value = &self.text[start..self.at];
        (self.visit)(&self.path, start, value);
        Some(())
    }

    /// `(key: value, ..)` or `(value, ..)`; the one value of a variant has its path.
    fn members(&mut self, of_variant: bool) -> Option<()> {
        self.at += 1;
        for index in 0.. {
            self.skip_blanks();
            if self.eat(')') {
                break;
            }
            let length = self.path.len();
            if let Some(key) = self.key() {
                if !self.path.is_empty() {
                    self.path.push('.');
                }
                self.path.push_str(key);
            } else if !of_variant {
                self.path.push_str(&format!("[{index}]"));
            }
            self.value()?;
            self.path.truncate(length);
            self.separator(')')?;
        }
        Some(())
    }

    fn items(&mut self, close: char) -> Option<()> {
        self.at += 1;
        for index in 0.. {
            self.skip_blanks();
            if self.eat(close) {
                break;
            }
            let length = self.path.len();
            self.path.push_str(&format!("[{index}]"));
            self.value()?;
            self.path.truncate(length);
            self.separator(close)?;
        }
        Some(())
    }

    /// Keys of a map are values themselves.
    fn map(&mut self) -> Option<()> {
        self.at += 1;
        for index in 0.. {
            self.skip_blanks();
            if self.eat('}') {
                break;
            }
            let length = self.path.len();
            self.path.push_str(&format!("[{index}]"));
            self.value()?;
            self.skip_blanks();
            self.eat(':').then_some(())?;
            self.value()?;
            self.path.truncate(length);
            self.separator('}')?;
        }
        Some(())
    }

    /// A name and its colon, or nothing and no step.
    fn key(&mut self) -> Option<&'a str> {
        let start = self.at;
        let is_name = |c: char| c.is_alphanumeric() || c == '_';
        let rest = self.rest();
        let name = &rest[..rest.find(|c| !is_name(c)).unwrap_or(rest.len())];
        self.at += name.len();
        self.skip_blanks();
        if !name.is_empty() && self.eat(':') {
            return Some(name);
        }
        self.at = start;
        None
    }

    fn string(&mut self) -> Option<()> {
        let mut escaped = false;
        for (offset, c) in self.rest().char_indices().skip(1) {
            match c {
                _ if escaped => escaped = false,
                '\\' => escaped = true,
                '"' => {
                    self.at += offset + 1;
                    return Some(());
                }
                _ => {}
            }
        }
        None
    }

    fn raw(&mut self) -> Option<()> {
        let rest = self.rest();
        let hashes = rest[1..].chars().take_while(|c| *c == '#').count();
        let end = format!("\"{}", "#".repeat(hashes));
        let body = hashes + 2;
        let length = rest.get(body..)?.find(&end)?;
        self.at += body + length + end.len();
        Some(())
    }

    /// A number, a name or a character.
    fn word(&mut self) -> Option<()> {
        let rest = self.rest();
        let ends = |c: char| matches!(c, ',' | ':' | '(' | ')' | '[' | ']' | '{' | '}' | '/' | '"');
        let length = rest
            .find(|c: char| ends(c) || c.is_whitespace())
            .unwrap_or(rest.len());
        self.at += length;
        (length > 0).then_some(())
    }

    fn separator(&mut self, close: char) -> Option<()> {
        self.skip_blanks();
        (self.eat(',') || self.peek() == Some(close)).then_some(())
    }

    /// Blanks, comments, and the `#![enable(..)]` that may stand first.
    fn skip_blanks(&mut self) {
        loop {
            let rest = self.rest();
            let trimmed = rest.trim_start();
            self.at += rest.len() - trimmed.len();
            let skipped = if trimmed.starts_with("//") {
                trimmed.find('\n').unwrap_or(trimmed.len())
            } else if trimmed.starts_with("/*") {
                trimmed.find("*/").map_or(trimmed.len(), |end| end + 2)
            } else if trimmed.starts_with("#!") {
                trimmed.find(']').map_or(trimmed.len(), |end| end + 1)
            } else {
                return;
            };
            self.at += skipped;
        }
    }

    fn rest(&self) -> &'a str {
        &self.text[self.at..]
    }

    fn peek(&self) -> Option<char> {
        self.rest().chars().next()
    }

    fn eat(&mut self, c: char) -> bool {
        let is_next = self.peek() == Some(c);
        if is_next {
            self.at += c.len_utf8();
        }
        is_next
    }
}

#[cfg(test)]
mod tests {
    use crate::text::find;

    #[test]
    fn a_value_is_found_by_the_way_to_it() {
        let text = r##"// head (a: 1)
(
    name: "a, \"b\" (c: 2)", /* [x] */ pair: (1.5, 2.5),
    model: Kind((list: [One(n: 3), Two (n: -4e5)], some: Some((value: "x"))),),
    raw: r#"a " b"#, word: NaN, 
)"##;
        for (path, value) in [
            ("name", r#""a, \"b\" (c: 2)""#),
            ("pair[1]", "2.5"),
            ("pair", "(1.5, 2.5)"),
            ("model.list[0].n", "3"),
            ("model.list[1].n", "-4e5"),
            ("model.some.value", "\"x\""),
            ("raw", "r#\"a \" b\"#"),
            ("word", "NaN"),
        ] {
            let (offset, found) = find(text, path).unwrap_or_else(|| panic!("no {path}"));
            assert_eq!(found, value, "{path}");
            assert!(text[offset..].starts_with(value), "{path}");
        }
        assert_eq!(find(text, "nothing"), None);
    }

    #[test]
    fn text_that_is_not_ron_ends_the_walk() {
        for text in [
            "",
            "(",
            "(a:",
            "(a: 1 b: 2)",
            "[1,,2]",
            "\"",
            "r#\"",
            "{1 2}",
        ] {
            assert_eq!(find(text, "b"), None, "{text}");
        }
        assert_eq!(find(&"(".repeat(1 << 20), "[0]"), None);
    }
}

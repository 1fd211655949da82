//! A page of plain text, 78 characters wide.

/// Widest line.
pub const WIDTH: usize = 78;
/// Width of the label column of a row.
const LABEL: usize = 30;

/// Lines of a sheet, wrapped as they are added.
#[derive(Debug, Default)]
pub struct Page {
    text: String,
}

impl Page {
    /// The finished text, ending in a newline.
    pub fn finish(self) -> String {
        self.text
    }

    pub fn blank(&mut self) {
        self.text.push('\n');
    }

    /// A rule of one character across the page.
    pub fn rule(&mut self, of: char) {
        self.text.extend(std::iter::repeat_n(of, WIDTH));
        self.text.push('\n');
    }

    /// A section heading with a rule below.
    pub fn heading(&mut self, title: &str) {
        self.blank();
        self.wrapped(title, "", "");
        self.rule('-');
    }

    /// A label and its value, the value wrapped in its own column.
    pub fn row(&mut self, label: &str, value: &str) {
        let first = format!("{label:<LABEL$}");
        // A label wider than its column gets a line of its own.
        if label.chars().count() >= LABEL {
            self.wrapped(label, "", "");
            self.wrapped(value, &" ".repeat(LABEL), &" ".repeat(LABEL));
        } else {
            self.wrapped(value, &first, &" ".repeat(LABEL));
        }
    }

    /// A label and a line to write on.
    pub fn blank_row(&mut self, label: &str) {
        let line = "_".repeat(WIDTH - LABEL);
        self.text.push_str(&format!("{label:<LABEL$}{line}\n"));
    }

    /// Several labels with lines to write on, side by side.
    pub fn blanks_side_by_side(&mut self, labels: &[&str]) {
        let cell = WIDTH / labels.len().max(1);
        let mut line = String::new();
        for label in labels {
            let blank = cell.saturating_sub(label.chars().count() + 2);
            line.push_str(&format!("{label} {} ", "_".repeat(blank)));
        }
        self.text.push_str(line.trim_end());
        self.text.push('\n');
    }

    /// A paragraph.
    pub fn paragraph(&mut self, text: &str) {
        self.wrapped(text, "", "");
    }

    /// A paragraph behind a mark, with the following lines indented below it.
    pub fn item(&mut self, mark: &str, text: &str) {
        let first = format!("{mark} ");
        self.wrapped(text, &first, &" ".repeat(first.chars().count()));
    }

    fn wrapped(&mut self, text: &str, first: &str, rest: &str) {
        let mut line = first.to_owned();
        let mut empty = true;
        // A printer or terminal obeys control characters: a title must not command it.
        let plain = text.replace(char::is_control, " ");
        for word in plain.split(' ').filter(|word| !word.is_empty()) {
            let gap = usize::from(!empty);
            if !empty && line.chars().count() + gap + word.chars().count() > WIDTH {
                self.push(&line);
                line = rest.to_owned();
                empty = true;
            }
            if !empty {
                line.push(' ');
            }
            let mut word = word;
            // A word longer than a line is broken: no line is wider than the page.
            while line.chars().count() + word.chars().count() > WIDTH {
                let room = WIDTH - line.chars().count();
                let cut = word
                    .char_indices()
                    .nth(room)
                    .map_or(word.len(), |(at, _)| at);
                line.push_str(&word[..cut]);
                self.push(&line);
                line = rest.to_owned();
                word = &word[cut..];
            }
            line.push_str(word);
            empty = false;
        }
        self.push(&line);
    }

    /// No-break spaces kept lines together until here; a printer wants plain ones.
    fn push(&mut self, line: &str) {
        self.text.push_str(line.replace('\u{a0}', " ").trim_end());
        self.text.push('\n');
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn no_line_is_wider_than_the_page_and_units_stay_with_numbers() {
        let mut page = Page::default();
        page.row("a label", &"12.5\u{a0}°C and more ".repeat(20));
        page.row("a label that is far wider than its column", "value");
        page.paragraph(&"x".repeat(200));
        page.item("[ ]", &"step ".repeat(40));
        page.blanks_side_by_side(&["Date", "Serial", "Lot"]);
        let text = page.finish();
        assert!(
            text.lines().all(|line| line.chars().count() <= WIDTH),
            "{text}"
        );
        assert!(
            !text.lines().any(|line| line.trim_start().starts_with("°C")),
            "{text}"
        );
        assert!(!text.contains('\u{a0}'));
    }
}

//! A picture as a file for browsers, word processors and printers.
//!
//! Standalone SVG 1.1, lengths in mm of the device, the same bytes for the same picture.
//! Light colours, and a pattern of strokes in what would else be alike in grey.

mod style;
mod text;

use std::fmt::Write;

use style::{INK, fill, hatch_colour, pen};
use text::{escaped, number, wrapped};

use super::marks::text_width;
use super::plane::hatched;
use super::{Anchor, Area, Hatch, Paint, Picture, Point, Stroke};

/// Width and height on paper that the picture is fitted into, mm.
const PAPER_MM: (f64, f64) = (180.0, 250.0);
/// Least width for the words below the picture, in heights of text.
const LEAST_WIDTH_EM: f64 = 46.0;

/// The picture with its title above it, its key and what its patterns mean below it.
pub fn svg(picture: &Picture) -> String {
    let em = 1e3 * picture.em_m;
    let bounds = &picture.bounds;
    let margin = 1.5 * em;
    let width = (1e3 * bounds.width()).max(LEAST_WIDTH_EM * em) + 2.0 * margin;
    let columns = ((width - 2.0 * margin) / em) as usize;
    let title = wrapped(&picture.title, columns as f64 / 1.25);
    let top = margin + 1.7 * em * title.len() as f64;
    let drawing_height = 1e3 * bounds.height() + em;
    let mut page = Page {
        text: String::new(),
        // A thousandth of the text's height is finer than any print.
        decimals: (3.0 - em.log10().floor()).clamp(0.0, 9.0) as usize,
        em,
        // The picture stands in the middle of the page's width.
        left: 0.5 * width - 500.0 * (bounds.low.x + bounds.high.x),
        top: top + 1e3 * bounds.high.y,
    };
    for (i, line) in title.iter().enumerate() {
        page.words(
            margin,
            margin + em * (0.5 + 1.7 * i as f64),
            line,
            Anchor::Start,
            1.25,
        );
    }
    page.picture(picture);
    let mut y = top + drawing_height + 1.2 * em;
    y = page.legend(picture, margin, width - margin, y);
    for (number, text) in &picture.key {
        for (i, line) in wrapped(text, columns as f64 - 2.0).iter().enumerate() {
            if i == 0 {
                page.words(margin + 1.4 * em, y, &number.to_string(), Anchor::End, 1.0);
            }
            page.words(margin + 2.0 * em, y, line, Anchor::Start, 1.0);
            y += 1.5 * em;
        }
    }
    let height = y + 0.5 * em;
    let fit = (PAPER_MM.0 / width).min(PAPER_MM.1 / height);
    let n = |value: f64| number(value, page.decimals);
    format!(
        "<?xml version=\"1.0\" encoding=\"UTF-8\"?>\n\
         <svg xmlns=\"http://www.w3.org/2000/svg\" version=\"1.1\" width=\"{:.2}mm\" height=\"{:.2}mm\" viewBox=\"0 0 {} {}\" font-family=\"sans-serif\">\n\
         <title>{}</title>\n\
         <rect width=\"100%\" height=\"100%\" fill=\"#ffffff\"/>\n{}</svg>\n",
        fit * width,
        fit * height,
        n(width),
        n(height),
        escaped(&picture.title),
        page.text,
    )
}

/// What has been written so far, and where the picture's origin lies, mm.
struct Page {
    text: String,
    decimals: usize,
    em: f64,
    left: f64,
    top: f64,
}

impl Page {
    fn picture(&mut self, picture: &Picture) {
        for area in &picture.areas {
            let points = self.points(&area.outline);
            self.put(format_args!(
                "<polygon points=\"{points}\" fill=\"{}\"/>\n",
                fill(area.paint)
            ));
        }
        self.hatches(&picture.hatches);
        for line in &picture.lines {
            let points = self.points(&line.points);
            let (colour, wide, dashes) = pen(line.stroke);
            let (element, ends) = if line.closed {
                ("polygon", "")
            } else {
                ("polyline", " stroke-linecap=\"round\"")
            };
            let dashes = if dashes.is_empty() {
                String::new()
            } else {
                let lengths: Vec<String> = dashes.iter().map(|d| self.n(d * self.em)).collect();
                format!(" stroke-dasharray=\"{}\"", lengths.join(" "))
            };
            let wide = self.n(wide * self.em);
            self.put(format_args!(
                "<{element} points=\"{points}\" fill=\"none\" stroke=\"{colour}\" stroke-width=\"{wide}\" stroke-linejoin=\"round\"{ends}{dashes}/>\n"
            ));
        }
        for label in &picture.labels {
            let [x, y] = self.place(label.at);
            if label.ringed {
                let (cx, cy, r) = (self.n(x), self.n(y), self.n(0.85 * self.em));
                let wide = self.n(pen(Stroke::Dimension).1 * self.em);
                self.put(format_args!(
                    "<circle cx=\"{cx}\" cy=\"{cy}\" r=\"{r}\" fill=\"#ffffff\" stroke=\"{INK}\" stroke-width=\"{wide}\"/>\n"
                ));
            }
            self.words(x, y, &label.text, label.anchor, 1.0);
        }
        // Unseen, over everything: a browser says their titles under the pointer.
        for spot in &picture.spots {
            let points = self.points(&spot.outline);
            let title = escaped(&spot.text);
            self.put(format_args!(
                "<polygon points=\"{points}\" fill=\"none\" pointer-events=\"all\"><title>{title}</title></polygon>\n"
            ));
        }
    }

    fn hatches(&mut self, hatches: &[Hatch]) {
        for paint in Paint::ALL {
            let mut path = String::new();
            for hatch in hatches.iter().filter(|hatch| hatch.paint == paint) {
                let [a, b] = hatch.ends.map(|end| self.place(end));
                let _ = write!(
                    path,
                    "M{} {}L{} {}",
                    self.n(a[0]),
                    self.n(a[1]),
                    self.n(b[0]),
                    self.n(b[1])
                );
            }
            if !path.is_empty() {
                let wide = self.n(0.05 * self.em);
                self.put(format_args!(
                    "<path d=\"{path}\" fill=\"none\" stroke=\"{}\" stroke-width=\"{wide}\"/>\n",
                    hatch_colour(paint)
                ));
            }
        }
    }

    /// A patch and a word for each paint in the picture; gives the height of what follows.
    fn legend(&mut self, picture: &Picture, left: f64, right: f64, y: f64) -> f64 {
        let em = self.em;
        let (mut x, mut y) = (left, y);
        for paint in Paint::ALL {
            let used = picture.areas.iter().any(|area| area.paint == paint);
            if !used || paint == Paint::Outside {
                continue;
            }
            let width = 3.0 * em + text_width(paint.name()) * em;
            if x + width > right && x > left {
                x = left;
                y += 1.6 * em;
            }
            self.patch(paint, x, y);
            self.words(x + 2.4 * em, y, paint.name(), Anchor::Start, 1.0);
            x += width + 0.8 * em;
        }
        y + 1.9 * em
    }

    /// A patch of a paint with its pattern, its left side at a place, mm on the page.
    fn patch(&mut self, paint: Paint, x: f64, y: f64) {
        let em = self.em;
        let (wide, high) = (2.0 * em, 1.0 * em);
        // Back into the picture's metres, for the same pattern.
        let at = |dx: f64, dy: f64| {
            Point::new(1e-3 * (x + dx - self.left), 1e-3 * (self.top - (y + dy)))
        };
        let (up, lo) = (-0.5 * high, 0.5 * high);
        let area = Area {
            outline: vec![at(0.0, lo), at(wide, lo), at(wide, up), at(0.0, up)],
            paint,
        };
        let points = self.points(&area.outline);
        let wide = self.n(pen(Stroke::Joint).1 * em);
        self.put(format_args!(
            "<polygon points=\"{points}\" fill=\"{}\" stroke=\"{INK}\" stroke-width=\"{wide}\"/>\n",
            fill(paint)
        ));
        let strokes: Vec<Hatch> = paint
            .pattern()
            .iter()
            .flat_map(|(angle, distance)| hatched(&area, *angle, 1e-3 * distance * em))
            .collect();
        self.hatches(&strokes);
    }

    /// Words with the middle of their height at a place, mm on the page.
    fn words(&mut self, x: f64, y: f64, text: &str, anchor: Anchor, size: f64) {
        let anchor = match anchor {
            Anchor::Start => "start",
            Anchor::Middle => "middle",
            Anchor::End => "end",
        };
        // Viewers differ in how they centre a line: its foot is set by hand.
        let (x, y) = (self.n(x), self.n(y + 0.35 * size * self.em));
        let size = self.n(size * self.em);
        self.put(format_args!(
            "<text x=\"{x}\" y=\"{y}\" font-size=\"{size}\" text-anchor=\"{anchor}\" fill=\"{INK}\">{}</text>\n",
            escaped(text)
        ));
    }

    fn place(&self, point: Point) -> [f64; 2] {
        [self.left + 1e3 * point.x, self.top - 1e3 * point.y]
    }

    fn points(&self, points: &[Point]) -> String {
        let points: Vec<String> = points
            .iter()
            .map(|point| {
                let [x, y] = self.place(*point);
                format!("{},{}", self.n(x), self.n(y))
            })
            .collect();
        points.join(" ")
    }

    fn n(&self, value: f64) -> String {
        number(value, self.decimals)
    }

    fn put(&mut self, text: std::fmt::Arguments) {
        // Writing into a string cannot fail.
        let _ = self.text.write_fmt(text);
    }
}

//! The device in section, to scale, with the liquid where it is at the scrubbed
//! temperature. It paints a plain [`Picture`] and says what the pointer rests on.

use eframe::egui::{
    Align2, Color32, FontId, Mesh, Pos2, Rect, Role, Sense, Shape, Stroke as Pen, TextStyle, Ui,
    WidgetInfo, pos2, vec2,
};

use super::{CopyAs, Picture as Chosen, PlotState, header_ui, missing_ui};
use crate::assess::{Assessment, LiquidPlace};
use crate::chamber::Chamber;
use crate::design::{Design, Duty};
use crate::picture::{Anchor, Paint, Picture, Point, Stroke, of_design, svg};
use crate::section::NoSection;
use crate::ui::theme::Palette;
use crate::units::{Temperature, Units};
use crate::words;

/// The picture as last made, and what it was made of.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Drawn {
    made_of: MadeOf,
    picture: Result<Picture, NoSection>,
}

/// Everything the picture depends on.
#[derive(Debug, Clone, PartialEq)]
struct MadeOf {
    chamber: Chamber,
    title: String,
    duty: Duty,
    view: View,
}

/// How the design is looked at.
#[derive(Debug, Clone, PartialEq)]
struct View {
    place: Option<LiquidPlace>,
    temperature: Temperature,
    units: Units,
    turn_deg: f64,
}

impl MadeOf {
    fn is(&self, design: &Design, view: &View) -> bool {
        self.view == *view
            && self.duty == design.duty
            && self.title == design.title
            && self.chamber == design.chamber
    }
}

/// Gain of scale for which a picture is turned on its side.
const WORTH_A_TURN: f64 = 1.6;
/// Room for the marks around the device, as they are spaced: heights of text.
const TEXT_PX: (f32, f32) = (9.0, 14.0);

pub fn section_ui(
    ui: &mut Ui,
    design: &Design,
    a: &Assessment,
    units: &Units,
    palette: &Palette,
    scrubber: Temperature,
    state: &mut PlotState,
) {
    if let Err(missing) = &a.named {
        missing_ui(ui, Chosen::Section, missing, units, palette);
        return;
    }
    let said = said_of(a, scrubber, units);
    let copy = header_ui(
        ui,
        Chosen::Section,
        state,
        palette,
        CopyAs::Drawing,
        |ui, _| {
            ui.label(eframe::egui::RichText::new(&said).color(palette.text_faint));
        },
    );
    if copy && let Ok(picture) = of_design(design, a, scrubber, 0.0, units) {
        ui.copy_text(svg(&picture));
    }
    let size = ui.available_size().max(vec2(80.0, 60.0));
    let (rect, response) = ui.allocate_exact_size(size, Sense::click());
    if response.double_clicked() {
        state.toggle_enlarged(Chosen::Section);
    }
    let description = format!("Section of the device, to scale. {said}");
    response.widget_info(|| WidgetInfo::labeled(Role::Image, true, &description));
    let turn_deg = turn(design, rect, units, state);
    let picture = match drawn(design, a, units, scrubber, turn_deg, state) {
        Ok(picture) => picture,
        Err(reason) => {
            let text = format!("Nothing to draw: {reason}.");
            let font = TextStyle::Body.resolve(ui.style());
            let at = rect.left_top() + vec2(0.0, 4.0);
            ui.painter()
                .text(at, Align2::LEFT_TOP, text, font, palette.text_faint);
            return;
        }
    };
    let sheet = Sheet::fit(picture, key_ui(ui, picture, palette, rect));
    sheet.paint(ui, picture, palette);
    if let Some(pointer) = response.hover_pos()
        && let Some(text) = picture.text_at(sheet.point(pointer))
    {
        response.on_hover_text_at_pointer(text);
    }
}

/// Where there is room, what the ringed numbers stand for, at the foot; gives what is
/// left for the picture.
fn key_ui(ui: &Ui, picture: &Picture, palette: &Palette, rect: Rect) -> Rect {
    const ROOM: f32 = 320.0;
    const AT_MOST: f32 = 0.45;
    if rect.height() < ROOM {
        return rect;
    }
    let font = TextStyle::Small.resolve(ui.style());
    let lines: Vec<_> = picture
        .key
        .iter()
        .map(|(number, text)| {
            let text = format!("{number}  {}", text.replace('\n', ", "));
            let width = rect.width() - 12.0;
            ui.painter()
                .layout(text, font.clone(), palette.text_faint, width)
        })
        .collect();
    let height: f32 = lines.iter().map(|line| line.size().y + 3.0).sum();
    if height > AT_MOST * rect.height() {
        return rect;
    }
    let mut at = pos2(rect.left() + 6.0, rect.bottom() - height);
    for line in lines {
        let down = line.size().y + 3.0;
        ui.painter().galley(at, line, palette.text_faint);
        at.y += down;
    }
    Rect::from_min_max(rect.min, pos2(rect.right(), rect.bottom() - height - 8.0))
}

/// Whether the picture lies down: a long upright device in a wide place.
fn turn(design: &Design, rect: Rect, units: &Units, state: &PlotState) -> f64 {
    let tilt_deg = design.chamber.tilt.radian().to_degrees();
    let kept = state.section.as_ref().filter(|drawn| {
        let made = &drawn.made_of;
        made.chamber == design.chamber && made.view.units == *units
    });
    // By the picture at hand, either way up.
    let Some(Ok(picture)) = kept.map(|drawn| drawn.picture.as_ref()) else {
        return 0.0;
    };
    let is_turned = kept.is_some_and(|drawn| drawn.made_of.view.turn_deg != 0.0);
    let (mut w, mut h) = (picture.bounds.width(), picture.bounds.height());
    if is_turned {
        (w, h) = (h, w);
    }
    let (wide, high) = (f64::from(rect.width()), f64::from(rect.height()));
    let (as_it_is, turned) = ((wide / w).min(high / h), (wide / h).min(high / w));
    let wanted = if is_turned { 1.0 } else { WORTH_A_TURN };
    if tilt_deg > 45.0 && turned > wanted * as_it_is {
        -90.0
    } else {
        0.0
    }
}

fn drawn<'a>(
    design: &Design,
    a: &Assessment,
    units: &Units,
    temperature: Temperature,
    turn_deg: f64,
    state: &'a mut PlotState,
) -> Result<&'a Picture, NoSection> {
    let view = View {
        place: a.liquid_place(temperature),
        temperature,
        units: *units,
        turn_deg,
    };
    let fresh = matches!(&state.section, Some(drawn) if drawn.made_of.is(design, &view));
    if !fresh {
        let picture = of_design(design, a, temperature, turn_deg, units);
        let made_of = MadeOf {
            chamber: design.chamber.clone(),
            title: design.title.clone(),
            duty: design.duty,
            view,
        };
        state.section = Some(Box::new(Drawn { made_of, picture }));
    }
    match &state.section {
        Some(drawn) => drawn.picture.as_ref().map_err(|reason| *reason),
        None => Err(NoSection::NothingEnclosed),
    }
}

/// What the picture shows, in a line.
fn said_of(a: &Assessment, at: Temperature, units: &Units) -> String {
    let Some(place) = a.liquid_place(at) else {
        return format!("at {}: no level is told", units.show(at));
    };
    let percent = |share: f64| super::say::percent(share, units, 3);
    let what = if place.frozen { "solid" } else { "liquid" };
    let has_wick = a
        .named
        .as_ref()
        .is_ok_and(|named| named.wick_void.nominal.cubic_metre() > 0.0);
    let text = if has_wick {
        format!(
            "wick {} full, {what} in {} of the core",
            percent(place.wick),
            percent(place.pool)
        )
    } else {
        format!("{what} in {} of the inside", percent(place.pool))
    };
    words::upper(&format!("at {}: {text}", units.show(at)))
}

/// From the picture's metres to the screen.
struct Sheet {
    origin: Pos2,
    px_per_m: f64,
    text_px: f32,
    rect: Rect,
}

impl Sheet {
    fn fit(picture: &Picture, rect: Rect) -> Self {
        let bounds = &picture.bounds;
        let inner = rect.shrink(6.0);
        let px_per_m = (f64::from(inner.width()) / bounds.width())
            .min(f64::from(inner.height()) / bounds.height());
        let middle = [
            0.5 * (bounds.low.x + bounds.high.x),
            0.5 * (bounds.low.y + bounds.high.y),
        ];
        let centre = rect.center();
        Self {
            origin: pos2(
                centre.x - (px_per_m * middle[0]) as f32,
                centre.y + (px_per_m * middle[1]) as f32,
            ),
            px_per_m,
            text_px: ((px_per_m * picture.em_m) as f32).clamp(TEXT_PX.0, TEXT_PX.1),
            rect,
        }
    }

    fn place(&self, point: Point) -> Pos2 {
        pos2(
            self.origin.x + (self.px_per_m * point.x) as f32,
            self.origin.y - (self.px_per_m * point.y) as f32,
        )
    }

    fn point(&self, at: Pos2) -> Point {
        Point::new(
            f64::from(at.x - self.origin.x) / self.px_per_m,
            f64::from(self.origin.y - at.y) / self.px_per_m,
        )
    }

    fn paint(&self, ui: &Ui, picture: &Picture, palette: &Palette) {
        let painter = ui.painter_at(self.rect);
        for area in &picture.areas {
            let mut mesh = Mesh::default();
            let colour = fill(area.paint, palette);
            for point in &area.outline {
                mesh.colored_vertex(self.place(*point), colour);
            }
            for [a, b, c] in area.triangles() {
                mesh.add_triangle(a as u32, b as u32, c as u32);
            }
            painter.add(Shape::mesh(mesh));
        }
        for hatch in &picture.hatches {
            let ends = hatch.ends.map(|end| self.place(end));
            painter.line_segment(ends, Pen::new(0.7, stroke_of(hatch.paint, palette)));
        }
        for line in &picture.lines {
            let mut points: Vec<Pos2> = line.points.iter().map(|p| self.place(*p)).collect();
            if line.closed {
                points.extend(points.first().copied());
            }
            let (pen, dashed) = pen(line.stroke, palette);
            if dashed {
                painter.extend(Shape::dashed_line(&points, pen, 9.0, 4.0));
            } else {
                painter.add(Shape::line(points, pen));
            }
        }
        let font = FontId::proportional(self.text_px);
        for label in &picture.labels {
            let at = self.place(label.at);
            if label.ringed {
                let radius = 0.85 * self.text_px;
                let ring = Pen::new(1.0, palette.text_faint);
                painter.circle(at, radius, palette.ground, ring);
            }
            let align = match label.anchor {
                Anchor::Start => Align2::LEFT_CENTER,
                Anchor::Middle => Align2::CENTER_CENTER,
                Anchor::End => Align2::RIGHT_CENTER,
            };
            painter.text(at, align, &label.text, font.clone(), palette.text);
        }
    }
}

fn fill(paint: Paint, palette: &Palette) -> Color32 {
    match paint {
        Paint::Wall => palette.wall,
        Paint::Vapour => palette.panel,
        Paint::Liquid => palette.liquid_full,
        Paint::Frozen => palette.frozen,
        Paint::Wick => palette.wick,
        Paint::Insert => palette.insert,
        Paint::Outside => palette.ground,
    }
}

fn stroke_of(paint: Paint, palette: &Palette) -> Color32 {
    match paint {
        Paint::Liquid => palette.saturation.gamma_multiply(0.6),
        _ => palette.text_faint,
    }
}

/// Pen, and whether it is dashed.
fn pen(stroke: Stroke, palette: &Palette) -> (Pen, bool) {
    match stroke {
        Stroke::Outline => (Pen::new(1.2, palette.text), false),
        Stroke::Joint => (Pen::new(0.8, palette.text), false),
        Stroke::Centre => (Pen::new(0.8, palette.text_faint), true),
        Stroke::Level => (Pen::new(1.8, palette.saturation), false),
        Stroke::Dimension => (Pen::new(0.9, palette.text_faint), false),
    }
}

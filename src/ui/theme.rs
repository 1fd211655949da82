//! Colours by role, in a light and a dark theme, and the fonts.

use eframe::egui::{
    self, Color32, CornerRadius, FontDefinitions, FontFamily, FontId, Margin, Shadow, Stroke,
    Style, TextStyle, Ui, Visuals, style, vec2,
};
use serde::{Deserialize, Serialize};

/// The user's choice, remembered between starts.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Default, Serialize, Deserialize)]
pub enum Theme {
    #[default]
    Light,
    Dark,
}

/// Colours by what they mean. Fills of areas are faint; lines and text are strong.
///
/// Hues follow Okabe and Ito; neighbours differ in lightness too, so that they
/// stay apart without red or green vision (see the tests).
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Palette {
    pub two_phase: Color32,
    pub all_vapour: Color32,
    pub liquid_full: Color32,
    pub supercritical: Color32,
    pub frozen: Color32,
    pub over_allowable: Color32,
    /// In the section: walls, wicks and solids inside.
    pub wall: Color32,
    pub wick: Color32,
    pub insert: Color32,
    /// Line of the saturation curve.
    pub saturation: Color32,
    /// Line of the sealed unit's own path.
    pub path: Color32,
    pub allowable: Color32,
    pub burst: Color32,
    /// The present charge.
    pub charge: Color32,
    /// Coldest, working and hottest.
    pub condition: Color32,
    pub scrubber: Color32,
    /// Window of allowed charge.
    pub window: Color32,
    pub fit: Color32,
    pub warning: Color32,
    pub error: Color32,
    pub note: Color32,
    pub text: Color32,
    pub text_faint: Color32,
    pub ground: Color32,
    pub panel: Color32,
}

impl Palette {
    /// The colours of a theme.
    pub const fn of(theme: Theme) -> &'static Self {
        match theme {
            Theme::Light => &LIGHT,
            Theme::Dark => &DARK,
        }
    }

    /// The colours of the theme that `ui` is drawn in, for widgets that are not told.
    pub fn in_use(ui: &Ui) -> &'static Self {
        Self::of(if ui.visuals().dark_mode {
            Theme::Dark
        } else {
            Theme::Light
        })
    }
}

/// Dresses the whole window: colours, spacing, text sizes and fonts.
///
/// Nothing moves by itself: hover fades, blinking cursors and scroll easing
/// would ask for frames while nobody does anything.
pub fn apply(ctx: &egui::Context, theme: Theme) {
    ctx.set_fonts(fonts());
    let (egui_theme, visuals) = match theme {
        Theme::Light => (
            egui::Theme::Light,
            visuals(Visuals::light(), &LIGHT, &LIGHT_CHROME),
        ),
        Theme::Dark => (
            egui::Theme::Dark,
            visuals(Visuals::dark(), &DARK, &DARK_CHROME),
        ),
    };
    ctx.set_theme(egui_theme);
    ctx.set_style_of(egui_theme, style_with(visuals));
}

const fn rgb(hex: u32) -> Color32 {
    Color32::from_rgb((hex >> 16) as u8, (hex >> 8) as u8, hex as u8)
}

/// Warm paper, ink, and tints that leave the ink readable.
static LIGHT: Palette = Palette {
    two_phase: rgb(0xE1F2EA),
    all_vapour: rgb(0xFBF0CC),
    liquid_full: rgb(0xC0DAF8),
    supercritical: rgb(0xEAE2F8),
    frozen: rgb(0xD2D5D9),
    over_allowable: rgb(0xF8D3C2),
    wall: rgb(0x8B939C),
    wick: rgb(0xEFD9B0),
    insert: rgb(0xCDD1D5),
    saturation: rgb(0x0B5C9A),
    path: rgb(0x7A2E86),
    allowable: rgb(0x965800),
    burst: rgb(0x8A1A0C),
    charge: rgb(0x5533CC),
    condition: rgb(0x626A74),
    scrubber: rgb(0x20252B),
    window: rgb(0x007158),
    fit: rgb(0x00694E),
    warning: rgb(0x8A5000),
    error: rgb(0xB3261E),
    note: rgb(0x0B5C9A),
    text: rgb(0x20252B),
    text_faint: rgb(0x565E68),
    ground: rgb(0xFCFBF8),
    panel: rgb(0xF4F2EC),
};

/// Blue-grey night, with the same hues lifted.
static DARK: Palette = Palette {
    two_phase: rgb(0x102C27),
    all_vapour: rgb(0x363118),
    liquid_full: rgb(0x163A63),
    supercritical: rgb(0x43264F),
    frozen: rgb(0x3A424D),
    over_allowable: rgb(0x6A311E),
    wall: rgb(0x78828D),
    wick: rgb(0x5C4A26),
    insert: rgb(0x49525C),
    saturation: rgb(0x5DB4F2),
    path: rgb(0xDE9FD6),
    allowable: rgb(0xF0C060),
    burst: rgb(0xF8745A),
    charge: rgb(0xA666FF),
    condition: rgb(0xC6CED7),
    scrubber: rgb(0xEDF1F5),
    window: rgb(0x3CC9A3),
    fit: rgb(0x45C79B),
    warning: rgb(0xEBAF52),
    error: rgb(0xFF8A75),
    note: rgb(0x7BBDF3),
    text: rgb(0xDCE1E7),
    text_faint: rgb(0xA0AAB6),
    ground: rgb(0x12171E),
    panel: rgb(0x1A212A),
};

/// Colours of buttons, fields and frames, which carry no meaning of their own.
struct Chrome {
    accent: Color32,
    selection: Color32,
    field: Color32,
    button: Color32,
    button_hovered: Color32,
    button_pressed: Color32,
    rule: Color32,
    outline: Color32,
    outline_hovered: Color32,
    ink: Color32,
    popup: Color32,
    shadow: Color32,
}

static LIGHT_CHROME: Chrome = Chrome {
    accent: rgb(0x0B5C9A),
    selection: rgb(0xCBE1F4),
    field: rgb(0xFFFFFF),
    button: rgb(0xE8E5DC),
    button_hovered: rgb(0xDEDACF),
    button_pressed: rgb(0xD2CDC0),
    rule: rgb(0xDDD9CE),
    outline: rgb(0xC9C4B7),
    outline_hovered: rgb(0x8C877B),
    ink: rgb(0x0E1216),
    popup: rgb(0xFAF8F3),
    shadow: Color32::from_black_alpha(28),
};

static DARK_CHROME: Chrome = Chrome {
    accent: rgb(0x6CB6F5),
    selection: rgb(0x1F456B),
    field: rgb(0x0F141A),
    button: rgb(0x2A333E),
    button_hovered: rgb(0x343F4C),
    button_pressed: rgb(0x3E4B5A),
    rule: rgb(0x2C3540),
    outline: rgb(0x3A4552),
    outline_hovered: rgb(0x73808F),
    ink: rgb(0xF6F8FA),
    popup: rgb(0x202833),
    shadow: Color32::from_black_alpha(110),
};

const ROUNDING: CornerRadius = CornerRadius::same(4);

fn visuals(base: Visuals, palette: &Palette, chrome: &Chrome) -> Visuals {
    let state = |fill, outline: Color32, width, ink: Color32| style::WidgetVisuals {
        bg_fill: fill,
        weak_bg_fill: fill,
        bg_stroke: Stroke::new(width, outline),
        corner_radius: ROUNDING,
        fg_stroke: Stroke::new(1.0, ink),
        expansion: 0.0,
    };
    let mut visuals = Visuals {
        widgets: style::Widgets {
            noninteractive: state(palette.panel, chrome.rule, 1.0, palette.text),
            inactive: state(chrome.button, chrome.outline, 1.0, palette.text),
            hovered: state(
                chrome.button_hovered,
                chrome.outline_hovered,
                1.0,
                chrome.ink,
            ),
            // egui draws what has the keyboard focus in this state too: the ring.
            active: state(chrome.button_pressed, chrome.accent, 2.0, chrome.ink),
            open: state(
                chrome.button_hovered,
                chrome.outline_hovered,
                1.0,
                chrome.ink,
            ),
        },
        selection: style::Selection {
            bg_fill: chrome.selection,
            stroke: Stroke::new(2.0, chrome.accent),
        },
        weak_text_color: Some(palette.text_faint),
        hyperlink_color: palette.note,
        faint_bg_color: mix(palette.panel, chrome.button, 0.4),
        extreme_bg_color: palette.ground,
        text_edit_bg_color: Some(chrome.field),
        code_bg_color: chrome.button,
        warn_fg_color: palette.warning,
        error_fg_color: palette.error,
        window_corner_radius: CornerRadius::same(6),
        window_shadow: Shadow {
            offset: [0, 6],
            blur: 18,
            spread: 0,
            color: chrome.shadow,
        },
        window_fill: chrome.popup,
        window_stroke: Stroke::new(1.0, chrome.outline),
        menu_corner_radius: ROUNDING,
        panel_fill: palette.panel,
        popup_shadow: Shadow {
            offset: [0, 3],
            blur: 10,
            spread: 0,
            color: chrome.shadow,
        },
        indent_has_left_vline: false,
        slider_trailing_fill: true,
        handle_shape: style::HandleShape::Circle,
        ..base
    };
    visuals.text_cursor.blink = false;
    visuals.text_cursor.stroke = Stroke::new(1.5, chrome.accent);
    visuals
}

fn style_with(visuals: Visuals) -> Style {
    use FontFamily::{Monospace, Proportional};
    let mut style = Style {
        visuals,
        animation_time: 0.0,
        ..Style::default()
    };
    style.scroll_animation = style::ScrollAnimation::none();
    style.text_styles = [
        (TextStyle::Small, FontId::new(12.0, Proportional)),
        (TextStyle::Body, FontId::new(13.5, Proportional)),
        (TextStyle::Button, FontId::new(13.5, Proportional)),
        (TextStyle::Heading, FontId::new(17.0, Proportional)),
        (TextStyle::Monospace, FontId::new(13.0, Monospace)),
    ]
    .into();
    let spacing = &mut style.spacing;
    spacing.item_spacing = vec2(8.0, 5.0);
    spacing.button_padding = vec2(8.0, 2.0);
    spacing.interact_size = vec2(40.0, 22.0);
    spacing.indent = 14.0;
    spacing.icon_width = 15.0;
    spacing.icon_spacing = 6.0;
    spacing.window_margin = Margin::same(12);
    spacing.menu_margin = Margin::same(6);
    spacing.slider_rail_height = 4.0;
    spacing.tooltip_width = 340.0;
    spacing.scroll = style::ScrollStyle::thin();
    style
}

/// The default fonts, with Hack behind the proportional one: it has the arrows
/// and shapes that the proportional font lacks.
fn fonts() -> FontDefinitions {
    let mut fonts = FontDefinitions::default();
    let hack = fonts
        .font_data
        .keys()
        .find(|name| name.as_str() == "Hack")
        .cloned();
    if let (Some(hack), Some(family)) = (hack, fonts.families.get_mut(&FontFamily::Proportional))
        && !family.contains(&hack)
    {
        family.push(hack);
    }
    fonts
}

/// `share` of the way from one colour to another.
fn mix(from: Color32, to: Color32, share: f32) -> Color32 {
    from.lerp_to_gamma(to, share)
}

#[cfg(test)]
#[path = "theme_tests.rs"]
mod tests;

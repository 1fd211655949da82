//! What the palette promises: readable text, and areas that stay apart.

use super::*;

const THEMES: [Theme; 2] = [Theme::Light, Theme::Dark];

/// Linear light of the three channels (sRGB, IEC 61966-2-1).
fn linear(colour: Color32) -> [f64; 3] {
    [colour.r(), colour.g(), colour.b()].map(|c| {
        let c = f64::from(c) / 255.0;
        if c <= 0.04045 {
            c / 12.92
        } else {
            ((c + 0.055) / 1.055).powf(2.4)
        }
    })
}

/// Contrast ratio of WCAG 2.
fn contrast(a: Color32, b: Color32) -> f64 {
    let luminance = |c| {
        let [r, g, b] = linear(c);
        0.2126 * r + 0.7152 * g + 0.0722 * b
    };
    let (a, b) = (luminance(a), luminance(b));
    (a.max(b) + 0.05) / (a.min(b) + 0.05)
}

/// Lightness and two opponent axes in which equal steps look equal (Oklab).
fn oklab([r, g, b]: [f64; 3]) -> [f64; 3] {
    let l = (0.412_221_470_8 * r + 0.536_332_536_3 * g + 0.051_445_992_9 * b)
        .max(0.0)
        .cbrt();
    let m = (0.211_903_498_2 * r + 0.680_699_545_1 * g + 0.107_396_956_6 * b)
        .max(0.0)
        .cbrt();
    let s = (0.088_302_461_9 * r + 0.281_718_837_6 * g + 0.629_978_700_5 * b)
        .max(0.0)
        .cbrt();
    [
        0.210_454_255_3 * l + 0.793_617_785 * m - 0.004_072_046_8 * s,
        1.977_998_495_1 * l - 2.428_592_205 * m + 0.450_593_709_9 * s,
        0.025_904_037_1 * l + 0.782_771_766_2 * m - 0.808_675_766 * s,
    ]
}

/// Full colour vision, and none of the red or of the green cones
/// (Machado, Oliveira and Fernandes 2009, severity 1).
const EYES: [[[f64; 3]; 3]; 3] = [
    [[1.0, 0.0, 0.0], [0.0, 1.0, 0.0], [0.0, 0.0, 1.0]],
    [
        [0.152286, 1.052583, -0.204868],
        [0.114503, 0.786281, 0.099216],
        [-0.003882, -0.048116, 1.051998],
    ],
    [
        [0.367322, 0.860646, -0.227968],
        [0.280085, 0.672501, 0.047413],
        [-0.011820, 0.042940, 0.968881],
    ],
];

fn apart(a: Color32, b: Color32, eye: &[[f64; 3]; 3]) -> f64 {
    let seen = |c| {
        let c = linear(c);
        oklab(eye.map(|row| row[0] * c[0] + row[1] * c[1] + row[2] * c[2]))
    };
    let (a, b) = (seen(a), seen(b));
    (0..3).map(|i| (a[i] - b[i]).powi(2)).sum::<f64>().sqrt()
}

fn pairs<'a>(of: &'a [(&'a str, Color32)]) -> impl Iterator<Item = [(&'a str, Color32); 2]> {
    of.iter()
        .enumerate()
        .flat_map(|(i, a)| of[i + 1..].iter().map(|b| [*a, *b]))
}

#[test]
fn every_text_colour_is_readable_on_ground_and_panel() {
    for theme in THEMES {
        let p = Palette::of(theme);
        for (name, colour) in [
            ("text", p.text),
            ("text_faint", p.text_faint),
            ("error", p.error),
            ("warning", p.warning),
            ("note", p.note),
            ("fit", p.fit),
            ("saturation", p.saturation),
            ("path", p.path),
            ("allowable", p.allowable),
            ("burst", p.burst),
            ("charge", p.charge),
            ("condition", p.condition),
            ("scrubber", p.scrubber),
            ("window", p.window),
        ] {
            for (under, ground) in [("ground", p.ground), ("panel", p.panel)] {
                let ratio = contrast(colour, ground);
                assert!(ratio >= 4.5, "{theme:?}: {name} on {under}: {ratio:.2}");
            }
        }
    }
}

#[test]
fn names_written_into_the_areas_are_readable() {
    for theme in THEMES {
        let p = Palette::of(theme);
        for (name, area) in areas(p) {
            for text in [p.text, p.text_faint] {
                let ratio = contrast(text, area);
                assert!(ratio >= 4.0, "{theme:?}: text on {name}: {ratio:.2}");
            }
            assert!(contrast(p.text, area) >= 7.0, "{theme:?}: text on {name}");
        }
    }
}

#[test]
fn areas_and_lines_stay_apart_for_every_eye() {
    for theme in THEMES {
        let p = Palette::of(theme);
        let lines = [
            ("saturation", p.saturation),
            ("path", p.path),
            ("allowable", p.allowable),
            ("burst", p.burst),
            ("charge", p.charge),
            ("window", p.window),
            ("condition", p.condition),
        ];
        for eye in &EYES {
            for [(a, first), (b, second)] in pairs(&areas(p)).chain(pairs(&lines)) {
                let distance = apart(first, second, eye);
                assert!(distance >= 0.03, "{theme:?}: {a} and {b}: {distance:.3}");
            }
        }
    }
}

#[test]
fn what_is_selected_or_pressed_is_readable() {
    for (palette, chrome) in [(&LIGHT, &LIGHT_CHROME), (&DARK, &DARK_CHROME)] {
        assert!(contrast(palette.text, chrome.selection) >= 4.5);
        assert!(contrast(chrome.accent, chrome.selection) >= 4.5);
        assert!(contrast(palette.text, chrome.button) >= 4.5);
        assert!(contrast(palette.text_faint, chrome.popup) >= 4.5);
        assert!(contrast(palette.error, chrome.popup) >= 4.5);
        // The focus ring (WCAG 2.2, 2.4.13: at least 3 to 1).
        assert!(contrast(chrome.accent, palette.panel) >= 3.0);
    }
}

#[test]
fn nothing_moves_by_itself_and_arrows_are_in_the_fonts() {
    let style = style_with(visuals(Visuals::light(), &LIGHT, &LIGHT_CHROME));
    assert!(!style.visuals.text_cursor.blink);
    assert_eq!(style.animation_time, 0.0);
    let fonts = fonts();
    assert!(
        fonts.families[&FontFamily::Proportional]
            .iter()
            .any(|name| name == "Hack")
    );
}

fn areas(p: &Palette) -> [(&'static str, Color32); 6] {
    [
        ("two_phase", p.two_phase),
        ("all_vapour", p.all_vapour),
        ("liquid_full", p.liquid_full),
        ("supercritical", p.supercritical),
        ("frozen", p.frozen),
        ("over_allowable", p.over_allowable),
    ]
}

//! Colours of the charts; the same as in the style sheet.

use plotters::style::RGBColor;

/// The colours a chart is drawn in.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Ink {
    /// Behind everything.
    pub paper: RGBColor,
    /// Axes, words, the liquid's own pH.
    pub ink: RGBColor,
    /// Tick labels and curves that are not in use.
    pub quiet: RGBColor,
    /// Grid.
    pub rule: RGBColor,
    /// The target.
    pub target: RGBColor,
    /// The company.
    pub company: RGBColor,
    /// The solvent.
    pub solvent: RGBColor,
    /// Cautions and limits.
    pub caution: RGBColor,
}

impl Ink {
    /// Dark on paper.
    pub const LIGHT: Self = Self {
        paper: RGBColor(0xFB, 0xFA, 0xF6),
        ink: RGBColor(0x1E, 0x23, 0x29),
        quiet: RGBColor(0x5C, 0x5F, 0x62),
        rule: RGBColor(0xD8, 0xD4, 0xC8),
        target: RGBColor(0x0B, 0x5A, 0x60),
        company: RGBColor(0x86, 0x5A, 0x06),
        solvent: RGBColor(0x5A, 0x54, 0x91),
        caution: RGBColor(0xA2, 0x38, 0x20),
    };
    /// Light on dark.
    pub const DARK: Self = Self {
        paper: RGBColor(0x16, 0x19, 0x1D),
        ink: RGBColor(0xE7, 0xE4, 0xDB),
        quiet: RGBColor(0xA8, 0xA5, 0x9C),
        rule: RGBColor(0x35, 0x3A, 0x41),
        target: RGBColor(0x62, 0xC4, 0xC6),
        company: RGBColor(0xD9, 0xA9, 0x4E),
        solvent: RGBColor(0xAE, 0xA8, 0xE4),
        caution: RGBColor(0xF0, 0x8F, 0x75),
    };
    /// Black on white, for paper.
    pub const PRINT: Self = Self {
        paper: RGBColor(0xFF, 0xFF, 0xFF),
        ink: RGBColor(0, 0, 0),
        quiet: RGBColor(0x44, 0x44, 0x44),
        rule: RGBColor(0xBB, 0xBB, 0xBB),
        ..Self::LIGHT
    };

    /// The colours for the screen as it is set: dark or light, with more contrast or not.
    pub fn for_screen(dark: bool, more_contrast: bool) -> Self {
        match (dark, more_contrast) {
            (false, false) => Self::LIGHT,
            (true, false) => Self::DARK,
            (false, true) => Self { rule: RGBColor(0x77, 0x77, 0x77), ..Self::PRINT },
            (true, true) => Self {
                paper: RGBColor(0, 0, 0),
                ink: RGBColor(0xFF, 0xFF, 0xFF),
                quiet: RGBColor(0xDD, 0xDD, 0xDD),
                rule: RGBColor(0x88, 0x88, 0x88),
                ..Self::DARK
            },
        }
    }
}

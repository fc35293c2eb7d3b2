//! The whole sheet: titles, panels, events, time axis, notes.

use super::SvgOptions;
use super::describe::described;
use super::layout::{MARGIN, SMALL_ROW, SUBTITLE_ROW, Sheet, TITLE_ROW};
use super::panel::PanelPainter;
use super::pen::{Anchor, Stroke, Text, rectangle};
use super::root::Root;
use super::xml::{Px, Xml};
use crate::plot::Figure;
use crate::style::TextSize;
use crate::theme::Theme;

/// Length of the ticks of the time axis, px.
const TICK: f64 = 5.0;
const MINOR_TICK: f64 = 3.0;

/// From the time axis down to the baseline of its numbers, px.
const TIME_NUMBERS: f64 = 17.0;

/// From the time axis down to the baseline of its name, px.
const TIME_NAME: f64 = 34.0;

/// Length of the ticks of events without a name, px.
const UNNAMED: f64 = 5.0;

/// Dashes of events, px.
const MARK_DASH: [f64; 2] = [1.0, 2.0];

/// The document.
pub(super) fn drawn(sheet: &Sheet<'_>, figure: &Figure, options: &SvgOptions<'_>) -> String {
    let theme = options.theme;
    let mut xml = Xml::default();
    open_root(&mut xml, sheet, figure, options);
    let ground = rectangle((0.0, sheet.width), (0.0, sheet.height));
    xml.empty("path", &[("d", &ground), ("fill", &theme.background)]);
    draw_titles(&mut xml, sheet, theme);
    draw_marks(&mut xml, sheet, theme);
    let painter = PanelPainter {
        sheet,
        theme,
        id: options.id,
    };
    for (index, slot) in sheet.slots.iter().enumerate() {
        let shift = format!("translate(0 {})", Px(slot.top));
        xml.open("g", &[("transform", &shift)]);
        painter.draw(&mut xml, slot, index);
        xml.close();
    }
    draw_time_axis(&mut xml, sheet, figure, theme);
    let rows = sheet.notes.iter().zip(0_u32..);
    for (note, row) in rows {
        let y = sheet.notes_top() + SMALL_ROW * f64::from(row);
        xml.write(
            Text::new((MARGIN, y), TextSize::Small, theme.text.quiet),
            note,
        );
    }
    xml.finish()
}

fn open_root(xml: &mut Xml, sheet: &Sheet<'_>, figure: &Figure, options: &SvgOptions<'_>) {
    let root = Root {
        id: options.id,
        corner: (0.0, 0.0),
        size: (sheet.width, sheet.height),
    };
    root.open(xml, &figure.title, &described(figure));
}

fn draw_titles(xml: &mut Xml, sheet: &Sheet<'_>, theme: &Theme) {
    let mut y = MARGIN;
    for line in &sheet.title {
        y += TITLE_ROW;
        let title = Text::new((MARGIN, y - 6.0), TextSize::Title, theme.text.ink);
        xml.write(title.strong(), line);
    }
    for line in &sheet.subtitle {
        y += SUBTITLE_ROW;
        let subtitle = Text::new((MARGIN, y - 4.0), TextSize::Label, theme.text.quiet);
        xml.write(subtitle, line);
    }
}

fn draw_marks(xml: &mut Xml, sheet: &Sheet<'_>, theme: &Theme) {
    let stroke = Stroke::new(theme.rules.mark, theme.strokes.mark);
    for mark in &sheet.marks {
        let Some(row) = mark.row else {
            // A burst of lines would hide the data: ticks show where they are.
            let foot = sheet.marks_foot;
            xml.line((mark.x, foot), (mark.x, foot + UNNAMED), stroke);
            continue;
        };
        let top = sheet.marks_foot - SMALL_ROW * (row + 1) as f64;
        let (from, to) = ((mark.x, top + 2.0), (mark.x, sheet.plots_foot));
        xml.line(from, to, stroke.dashed(&MARK_DASH));
        let name = Text::new((mark.x + 4.0, top + 10.5), TextSize::Small, theme.text.ink);
        xml.write(name.halo(theme.background), &mark.label);
    }
}

fn draw_time_axis(xml: &mut Xml, sheet: &Sheet<'_>, figure: &Figure, theme: &Theme) {
    let Some(time) = &sheet.time else {
        return;
    };
    let foot = sheet.plots_foot;
    let frame = Stroke::new(theme.rules.frame, theme.strokes.rule);
    let tick = |&tick: &f64, length: f64| {
        let x = time.position(tick);
        [(x, foot), (x, foot + length)]
    };
    let minor = time.ticks.minor.iter().map(|at| tick(at, MINOR_TICK));
    let major = time.ticks.major.iter().map(|at| tick(at, TICK));
    let axis = [(sheet.left, foot), (sheet.right, foot)];
    let lines: Vec<_> = std::iter::once(axis).chain(minor).chain(major).collect();
    xml.rules(&lines, frame);
    let quiet = theme.text.quiet;
    for &tick in &time.ticks.major {
        let at = (time.position(tick), foot + TIME_NUMBERS);
        let number = Text::new(at, TextSize::Small, quiet);
        xml.write(number.anchored(Anchor::Middle), &time.ticks.label(tick));
    }
    let label = Text::new((MARGIN, foot + TIME_NAME), TextSize::Label, theme.text.ink).strong();
    xml.write_with_unit(label, &figure.time.label, &figure.time.unit, quiet);
}

//! Scenes as SVG.

use std::fmt::Write as _;

use kurbo::{BezPath, PathEl};

use super::root::Root;
use super::xml::{Attribute, Px, Xml};
use crate::colour::Colour;
use crate::scene::{Anchor, Line, Paint, Part, Prim, Scene, Stroke, Tone};
use crate::theme::Theme;

/// The scene as a self-contained SVG document with title and description; the same text for the
/// same scene. Each part is a group with its name, which browsers show on pointing. `id` begins
/// the ids inside, so that several drawings can stand in one page: letters, digits, hyphens.
#[must_use]
pub fn svg_from_scene(scene: &Scene, theme: &Theme, id: &str) -> String {
    let mut xml = Xml::default();
    let bounds = scene.bounds;
    let (width, height) = (Px(bounds.width()), Px(bounds.height()));
    let root = Root {
        id,
        corner: (bounds.x0, bounds.y0),
        size: (bounds.width(), bounds.height()),
    };
    root.open(&mut xml, &scene.title, &scene.description);
    let (x, y) = (Px(bounds.x0), Px(bounds.y0));
    xml.empty(
        "rect",
        &[
            ("x", &x),
            ("y", &y),
            ("width", &width),
            ("height", &height),
            ("fill", &theme.background),
        ],
    );
    for part in &scene.parts {
        draw_part(&mut xml, part, theme, id);
    }
    xml.finish()
}

fn draw_part(xml: &mut Xml, part: &Part, theme: &Theme, id: &str) {
    let part_id = format!("{id}-{}", part.id.replace(['.', '_'], "-"));
    xml.open("g", &[("id", &part_id)]);
    xml.text("title", &[], &part.label);
    for prim in &part.prims {
        draw_prim(xml, prim, theme);
    }
    xml.close();
}

fn draw_prim(xml: &mut Xml, prim: &Prim, theme: &Theme) {
    match prim {
        Prim::Path {
            outline,
            stroke,
            fill,
        } => {
            let data = path_data(outline);
            drawn(xml, "path", &[("d", &data)], (*stroke, *fill), theme);
        }
        Prim::Circle {
            centre,
            radius,
            stroke,
            fill,
        } => {
            let (x, y, r) = (Px(centre.x), Px(centre.y), Px(*radius));
            let place: [Attribute<'_>; 3] = [("cx", &x), ("cy", &y), ("r", &r)];
            drawn(xml, "circle", &place, (*stroke, *fill), theme);
        }
        Prim::Text { .. } => draw_text(xml, prim, theme),
        Prim::Arrow { paint, .. } => {
            let Some([tip, left, right]) = prim.arrow_corners() else {
                return;
            };
            let mut outline = BezPath::new();
            outline.move_to(tip);
            outline.line_to(left);
            outline.line_to(right);
            outline.close_path();
            let data = path_data(&outline);
            let stroke = Stroke::plain(Line::Fine);
            drawn(
                xml,
                "path",
                &[("d", &data)],
                (Some(stroke), Some(*paint)),
                theme,
            );
        }
    }
}

fn draw_text(xml: &mut Xml, prim: &Prim, theme: &Theme) {
    let Prim::Text {
        at,
        content,
        size,
        tone,
        anchor,
    } = prim
    else {
        return;
    };
    let (x, y, size) = (Px(at.x), Px(at.y), Px(size.px()));
    let colour = match tone {
        Tone::Ink => theme.text.ink,
        Tone::Quiet => theme.text.quiet,
    };
    let mut attributes: Vec<Attribute<'_>> = vec![
        ("x", &x),
        ("y", &y),
        ("font-size", &size),
        ("fill", &colour),
    ];
    match anchor {
        Anchor::Start => {}
        Anchor::Middle => attributes.push(("text-anchor", &"middle")),
        Anchor::End => attributes.push(("text-anchor", &"end")),
    }
    xml.text("text", &attributes, content);
}

/// One element, or two where the oil inside a line is shaded: a wider line in ink around it, which
/// also keeps that end of the ramp in sight that is near the background.
fn drawn(
    xml: &mut Xml,
    name: &'static str,
    place: &[Attribute<'_>],
    (stroke, fill): (Option<Stroke>, Option<Paint>),
    theme: &Theme,
) {
    let fill = fill.map(|paint| theme.paint(paint));
    let Some(stroke) = stroke else {
        return element(xml, name, place, (None, fill));
    };
    let pen = theme.pen(stroke.line);
    let Some(share) = stroke.oil else {
        return element(xml, name, place, (Some((pen, stroke.line)), fill));
    };
    let casing = (theme.text.ink, theme.casing_width(stroke.line));
    let core = (theme.pressure.at(share), theme.oil_width(stroke.line));
    // Behind dashes the casing is whole, so that colour and ground both have an edge.
    element(xml, name, place, (Some((casing, Line::Working)), fill));
    if stroke.line == Line::Pilot {
        let ground = (theme.background, core.1);
        element(xml, name, place, (Some((ground, Line::Working)), None));
    }
    element(xml, name, place, (Some((core, stroke.line)), None));
}

type Pen = ((Colour, f64), Line);

fn element(
    xml: &mut Xml,
    name: &'static str,
    place: &[Attribute<'_>],
    (pen, fill): (Option<Pen>, Option<Colour>),
) {
    let mut attributes: Vec<Attribute<'_>> = place.to_vec();
    match &fill {
        Some(colour) => attributes.push(("fill", colour)),
        None => attributes.push(("fill", &"none")),
    }
    let (mut width, mut dash) = (Px(0.0), String::new());
    if let Some(((_, thickness), line)) = &pen {
        width = Px(*thickness);
        let lengths = line.dash().iter().map(|&length| Px(length).to_string());
        dash = lengths.collect::<Vec<_>>().join(" ");
    }
    if let Some(((colour, _), _)) = &pen {
        attributes.push(("stroke", colour));
        attributes.push(("stroke-width", &width));
        attributes.push(("stroke-linejoin", &"round"));
        if !dash.is_empty() {
            attributes.push(("stroke-dasharray", &dash));
        }
    }
    xml.empty(name, &attributes);
}

fn path_data(outline: &BezPath) -> String {
    let mut text = String::new();
    for element in outline {
        // Writing into a string cannot fail.
        let _ = match element {
            PathEl::MoveTo(p) => write!(text, "M{} {}", Px(p.x), Px(p.y)),
            PathEl::LineTo(p) => write!(text, "L{} {}", Px(p.x), Px(p.y)),
            PathEl::QuadTo(a, p) => {
                write!(text, "Q{} {} {} {}", Px(a.x), Px(a.y), Px(p.x), Px(p.y))
            }
            PathEl::CurveTo(a, b, p) => write!(
                text,
                "C{} {} {} {} {} {}",
                Px(a.x),
                Px(a.y),
                Px(b.x),
                Px(b.y),
                Px(p.x),
                Px(p.y)
            ),
            PathEl::ClosePath => write!(text, "Z"),
        };
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::scene::PartPen;
    use crate::style::TextSize;
    use crate::theme::BuiltInTheme;

    #[test]
    fn a_small_scene_as_text() {
        let mut line = PartPen::new("priority_line", "Line < \"hose\"");
        let shaded = |line, share| Stroke {
            line,
            oil: Some(share),
        };
        line.line(&[(0.0, 20.0), (60.0, 20.0)], shaded(Line::Working, 1.0));
        line.line(&[(30.0, 20.0), (30.0, 50.0)], shaded(Line::Pilot, 0.25));
        line.junction((30.0, 20.0));
        let mut pump = PartPen::new("pump", "Pump");
        pump.circle((85.0, 20.0), 25.0);
        pump.arrow((85.0, 40.0), (85.0, 2.0));
        pump.area(
            &[(120.0, 0.0), (140.0, 0.0), (140.0, 30.0)],
            Paint::Oil(Some(0.5)),
            Some(Line::Fine),
        );
        let quiet = (TextSize::Small, Tone::Quiet);
        pump.text((85.0, 62.0), "20 cm³/rev", quiet, Anchor::Middle);
        let parts = vec![line.done(), pump.done()];
        let scene = Scene::new("Small & simple".to_owned(), "A pump.".to_owned(), parts);
        let theme = BuiltInTheme::Light.load().unwrap();
        insta::assert_snapshot!(svg_from_scene(&scene, &theme, "small"));
    }
}

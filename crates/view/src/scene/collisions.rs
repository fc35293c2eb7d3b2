//! For tests: texts of a scene that touch a line or each other.

use kurbo::{Line as Straight, Point, Rect, Shape};

use super::{Prim, Scene};

/// Lines are a little wide.
const HALF_LINE: f64 = 1.2;

/// Whether a straight line passes through a frame: what is left of it between the frame's sides.
fn crosses(frame: Rect, line: Straight) -> bool {
    let step = line.p1 - line.p0;
    let (mut from, mut to) = (0.0_f64, 1.0_f64);
    for (start, step, low, high) in [
        (line.p0.x, step.x, frame.x0, frame.x1),
        (line.p0.y, step.y, frame.y0, frame.y1),
    ] {
        if step.abs() < 1e-9 {
            if start <= low || start >= high {
                return false;
            }
            continue;
        }
        let (a, b) = ((low - start) / step, (high - start) / step);
        from = from.max(a.min(b));
        to = to.min(a.max(b));
    }
    from < to
}

/// The drawn lines of a scene, each with its part.
fn lines(scene: &Scene) -> Vec<(&str, Straight)> {
    let mut all = Vec::new();
    for part in &scene.parts {
        for prim in &part.prims {
            let path = match prim {
                Prim::Path {
                    outline,
                    stroke: Some(_),
                    ..
                } => outline.clone(),
                Prim::Circle {
                    centre,
                    radius,
                    stroke: Some(_),
                    ..
                } => kurbo::Circle::new(*centre, *radius).to_path(0.1),
                _ => continue,
            };
            let mut last = Point::ZERO;
            let mut start = Point::ZERO;
            kurbo::flatten(&path, 0.2, |element| match element {
                kurbo::PathEl::MoveTo(p) => (last, start) = (p, p),
                kurbo::PathEl::LineTo(p) => {
                    all.push((part.id.as_str(), Straight::new(last, p)));
                    last = p;
                }
                _ => all.push((part.id.as_str(), Straight::new(last, start))),
            });
        }
    }
    all
}

/// What is wrong with the texts of a scene.
pub(crate) fn collisions(scene: &Scene) -> Vec<String> {
    let texts: Vec<(&str, &str, Rect)> = scene
        .parts
        .iter()
        .flat_map(|part| part.prims.iter().map(|prim| (part.id.as_str(), prim)))
        .filter_map(|(id, prim)| match prim {
            Prim::Text { content, .. } => Some((id, content.as_str(), prim.bounds())),
            _ => None,
        })
        .collect();
    let lines = lines(scene);
    let mut wrong = Vec::new();
    for (index, (id, content, frame)) in texts.iter().enumerate() {
        for (other, text, second) in &texts[index + 1..] {
            let shared = frame.intersect(*second);
            if shared.width() > 0.0 && shared.height() > 0.0 {
                wrong.push(format!("\"{content}\" of {id} on \"{text}\" of {other}"));
            }
        }
        let wide = frame.inflate(HALF_LINE, HALF_LINE);
        for (other, line) in &lines {
            if crosses(wide, *line) {
                wrong.push(format!(
                    "\"{content}\" of {id} on a line of {other}: {line:?}"
                ));
            }
        }
    }
    wrong
}

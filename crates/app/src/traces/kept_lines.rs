//! Numbers on the lines of kept runs, where they part from the run itself.

use egui::{Align2, FontId, Painter, Pos2, Rect, pos2, vec2};
use helmsplit_view::plot::Axis;

use super::drawn::Line;
use crate::look::{Look, SMALL};

/// Lines closer than this cannot be told apart anyway: no number there, points.
const APART: f64 = 7.0;

/// Places along the time axis that are tried.
const PLACES: usize = 24;

/// Width and height of a number with its ground, points.
const SIZE: egui::Vec2 = vec2(9.0, 11.0);

/// A number on a line.
#[derive(Debug, Clone, PartialEq)]
pub(super) struct Tag {
    pub(super) at: Pos2,
    /// Place of the kept run, from 0.
    pub(super) place: usize,
}

/// One number for each line of a kept run: where it is farthest from the run itself and no other
/// number stands.
pub(super) fn tags(lines: &[Line<'_>], time: &Axis, values: &Axis) -> Vec<Tag> {
    let mut tags: Vec<Tag> = Vec::new();
    for line in lines {
        let Some(place) = line.kept else { continue };
        let own = lines
            .iter()
            .find(|own| own.kept.is_none() && own.position == line.position);
        let Some(own) = own else { continue };
        let candidates = (1..PLACES).filter_map(|step| {
            let share = step as f64 / PLACES as f64;
            let moment = time.low + share * (time.high - time.low);
            let kept = line
                .value_at(moment)
                .filter(|value| values.contains(*value))?;
            let y = values.position(kept);
            let away = own
                .value_at(moment)
                .map_or(f64::INFINITY, |own| (values.position(own) - y).abs());
            let at = pos2(time.position(moment) as f32, y as f32);
            (away >= APART).then_some((at, away))
        });
        let free = candidates.filter(|(at, _)| !tags.iter().any(|tag| meet(tag.at, *at)));
        if let Some((at, _)) = free.max_by(|a, b| a.1.total_cmp(&b.1)) {
            tags.push(Tag { at, place });
        }
    }
    tags
}

fn meet(one: Pos2, other: Pos2) -> bool {
    let away = one - other;
    away.x.abs() < SIZE.x + 2.0 && away.y.abs() < SIZE.y
}

/// Paints the numbers.
pub(super) fn paint(painter: &Painter, tags: &[Tag], look: &Look) {
    for tag in tags {
        let ground = Rect::from_center_size(tag.at, SIZE);
        painter.rect_filled(ground, 2.0, look.ground());
        painter.text(
            tag.at,
            Align2::CENTER_CENTER,
            (tag.place + 1).to_string(),
            FontId::proportional(SMALL),
            look.quiet(),
        );
    }
}

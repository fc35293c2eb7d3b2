//! Where texts stand. A drawing that is large enough has them where its scene puts them; in a
//! smaller one letters stay legible, and texts look for a free place beside theirs: names first,
//! then values, then sizes. What finds none is left to pointing.

use std::sync::LazyLock;

use egui::{Pos2, Rect, Vec2, pos2, vec2};
use helmsplit_view::scene::{Anchor, Tone};
use helmsplit_view::style::TextSize;

use super::ink::{Piece, SceneText};

/// Smallest letters, points: of names, and of values and sizes.
const LEAST_NAME: f32 = 11.0;
const LEAST_SMALL: f32 = 10.0;

/// Largest letters, points.
const LARGEST: f32 = 20.0;

/// Above and below the baseline, as shares of the size.
const ASCENT: f32 = 0.76;
const DESCENT: f32 = 0.22;

/// Between baselines of one block, as a share of the size.
const LEADING: f32 = 1.2;

/// Texts of a part at most so far below one another are one block, px of the scene.
const BLOCK: f32 = 36.0;

/// Space kept around a text, points.
const SPACE: f32 = 2.0;

/// Shifts that a text tries, points.
const SIDEWAYS: [f32; 6] = [0.0, 7.0, 14.0, 22.0, 32.0, 44.0];
const UPWARDS: [f32; 6] = [0.0, 4.0, 8.0, 13.0, 20.0, 28.0];

/// A text that found its place.
#[derive(Debug, Clone, Copy, PartialEq)]
pub(super) struct Label {
    /// Start, middle or end of the baseline.
    pub(super) at: Pos2,
    /// Points.
    pub(super) size: f32,
}

/// How important a text is.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Rank {
    /// A letter inside a symbol.
    Fixed,
    Name,
    Value,
    Detail,
}

fn rank(text: &SceneText) -> Rank {
    match (text.size, text.tone) {
        (TextSize::Title, _) => Rank::Fixed,
        (TextSize::Label, _) => Rank::Name,
        (TextSize::Small, Tone::Ink) => Rank::Value,
        (TextSize::Small, Tone::Quiet) => Rank::Detail,
    }
}

/// Whether letters are large enough at their own size.
fn is_large(scale: f32) -> bool {
    TextSize::Small.px() as f32 * scale >= LEAST_SMALL - 0.3
}

/// Half points only, so that a zoom does not fill the font's texture.
fn rounded(size: f32) -> f32 {
    (2.0 * size.min(LARGEST)).round() / 2.0
}

/// Places for texts, in their order; `None` for what has no room. `width` measures a text at a
/// size.
pub(super) fn placed(
    texts: &[SceneText],
    pieces: &[Piece],
    (scale, frame): (f32, Rect),
    width: &mut dyn FnMut(&str, f32) -> f32,
) -> Vec<Option<Label>> {
    if is_large(scale) {
        let own = |text: &SceneText| Label {
            at: text.at,
            size: rounded(text.size.px() as f32 * scale),
        };
        return texts.iter().map(|text| Some(own(text))).collect();
    }
    let mut sheet = Sheet {
        texts,
        pieces,
        scale,
        frame,
        taken: Vec::new(),
        labels: vec![None; texts.len()],
    };
    let mut order: Vec<usize> = (0..texts.len()).collect();
    order.sort_by_key(|&index| rank(&texts[index]));
    for index in order {
        let label = sheet.place(index, width);
        sheet.labels[index] = label;
    }
    sheet.labels
}

struct Sheet<'a> {
    texts: &'a [SceneText],
    pieces: &'a [Piece],
    scale: f32,
    frame: Rect,
    taken: Vec<Rect>,
    labels: Vec<Option<Label>>,
}

impl Sheet<'_> {
    fn place(&mut self, index: usize, width: &mut dyn FnMut(&str, f32) -> f32) -> Option<Label> {
        let text = &self.texts[index];
        let rank = rank(text);
        let size = match rank {
            Rank::Fixed => rounded(text.size.px() as f32 * self.scale.max(0.6)),
            Rank::Name => LEAST_NAME,
            Rank::Value | Rank::Detail => LEAST_SMALL,
        };
        // Values change: room for one more digit, so that nothing has to move.
        let room = if rank == Rank::Value { 0.6 * size } else { 0.0 };
        let wide = width(&text.content, size) + room;
        let free = |sheet: &Self, at: Pos2| sheet.is_free(frame_of(at, text.anchor, wide, size));
        let near = || {
            SHIFTS
                .iter()
                .map(|&by| text.at + by)
                .find(|&at| free(self, at))
        };
        let at = match rank {
            Rank::Fixed => {
                // Its baseline hangs below the middle of its symbol.
                let drop = 0.36 * (size - text.size.px() as f32 * self.scale);
                Some(text.at + vec2(0.0, drop))
            }
            Rank::Name => near(),
            Rank::Value | Rank::Detail => {
                let below = self.foot_of_block(index).map(|foot| {
                    let first = pos2(foot.x, foot.y + LEADING * size);
                    [0.0, 2.0, 4.0].map(|more| first + vec2(0.0, more))
                });
                let below = below.into_iter().flatten().find(|&at| free(self, at));
                match rank {
                    Rank::Value => below.or_else(near),
                    // A size far from its name says nothing.
                    _ => below.or_else(|| Some(text.at).filter(|&at| free(self, at))),
                }
            }
        }?;
        self.taken.push(frame_of(at, text.anchor, wide, size));
        Some(Label { at, size })
    }

    /// Lower end of the texts that were placed of the block of a text: those of the same part, on
    /// the same edge, not far above.
    fn foot_of_block(&self, index: usize) -> Option<Pos2> {
        let text = &self.texts[index];
        let above = self.texts.iter().zip(&self.labels).filter(|(other, _)| {
            let way = text.at.y - other.at.y;
            other.part == text.part
                && other.anchor == text.anchor
                && other.size != TextSize::Title
                && (other.at.x - text.at.x).abs() < 0.5
                && (-0.1..=BLOCK * self.scale).contains(&way)
        });
        let placed = above.filter_map(|(_, label)| label.map(|label| label.at));
        placed.max_by(|a, b| a.y.total_cmp(&b.y))
    }

    fn is_free(&self, frame: Rect) -> bool {
        let frame = frame.expand(SPACE);
        self.frame.contains_rect(frame)
            && !self.taken.iter().any(|other| other.intersects(frame))
            && !self.pieces.iter().any(|(_, piece)| crosses(frame, *piece))
    }
}

/// What a text covers.
fn frame_of(at: Pos2, anchor: Anchor, width: f32, size: f32) -> Rect {
    let left = match anchor {
        Anchor::Start => at.x,
        Anchor::Middle => at.x - 0.5 * width,
        Anchor::End => at.x - width,
    };
    Rect::from_min_max(
        pos2(left, at.y - ASCENT * size),
        pos2(left + width, at.y + DESCENT * size),
    )
}

/// Shifts from the nearest to the furthest.
static SHIFTS: LazyLock<Vec<Vec2>> = LazyLock::new(|| {
    let mut all: Vec<Vec2> = Vec::new();
    for &dx in &SIDEWAYS {
        for &dy in &UPWARDS {
            for (sx, sy) in [(1.0, 1.0), (-1.0, 1.0), (1.0, -1.0), (-1.0, -1.0)] {
                let by = vec2(sx * dx, sy * dy);
                if !all.contains(&by) {
                    all.push(by);
                }
            }
        }
    }
    // Sideways a text stays beside its part for longer.
    let way = |by: &Vec2| 0.6 * by.x * by.x + by.y * by.y;
    all.sort_by(|a, b| way(a).total_cmp(&way(b)));
    all
});

/// Whether a straight line passes through a frame.
fn crosses(frame: Rect, [from, to]: [Pos2; 2]) -> bool {
    let (left, right) = (from.x.min(to.x), from.x.max(to.x));
    let (top, foot) = (from.y.min(to.y), from.y.max(to.y));
    if right < frame.left() || left > frame.right() || foot < frame.top() || top > frame.bottom() {
        return false;
    }
    let step = to - from;
    let (mut start, mut end) = (0.0_f32, 1.0_f32);
    for (at, step, low, high) in [
        (from.x, step.x, frame.left(), frame.right()),
        (from.y, step.y, frame.top(), frame.bottom()),
    ] {
        if step.abs() < 1e-6 {
            continue;
        }
        let (a, b) = ((low - at) / step, (high - at) / step);
        start = start.max(a.min(b));
        end = end.min(a.max(b));
    }
    start <= end
}

#[cfg(test)]
mod tests {
    use super::*;

    fn text(part: usize, at: Pos2, size: TextSize, tone: Tone) -> SceneText {
        SceneText {
            part,
            at,
            content: "Main relief".to_owned(),
            size,
            tone,
            anchor: Anchor::Start,
        }
    }

    fn frame() -> Rect {
        Rect::from_min_size(Pos2::ZERO, vec2(400.0, 300.0))
    }

    fn place(texts: &[SceneText], pieces: &[Piece], scale: f32) -> Vec<Option<Label>> {
        let mut width = |text: &str, size: f32| 0.5 * size * text.chars().count() as f32;
        placed(texts, pieces, (scale, frame()), &mut width)
    }

    #[test]
    fn in_a_large_drawing_texts_stand_where_the_scene_puts_them() {
        let at = pos2(50.0, 50.0);
        let labels = place(&[text(0, at, TextSize::Small, Tone::Quiet)], &[], 2.0);
        assert_eq!(
            labels,
            [Some(Label { at, size: LARGEST })],
            "10.5 px twice, at most 20"
        );
    }

    #[test]
    fn in_a_small_one_they_give_way_to_lines_and_to_each_other() {
        let at = pos2(100.0, 100.0);
        let line = (0, [pos2(0.0, 97.0), pos2(300.0, 97.0)]);
        let texts = [
            text(0, at, TextSize::Label, Tone::Ink),
            text(1, at, TextSize::Label, Tone::Ink),
            text(1, at + vec2(0.0, 14.0), TextSize::Small, Tone::Quiet),
        ];
        let labels = place(&texts, &[line], 0.4);
        let frames: Vec<Rect> = labels
            .iter()
            .flatten()
            .map(|label| frame_of(label.at, Anchor::Start, 5.5 * label.size, label.size))
            .collect();
        assert!(frames.len() >= 2, "both names found a place: {labels:?}");
        for (index, frame) in frames.iter().enumerate() {
            assert!(!crosses(*frame, line.1), "{frame:?} on the line");
            for other in &frames[index + 1..] {
                assert!(!frame.intersects(*other), "{frame:?} on {other:?}");
            }
        }
    }

    #[test]
    fn what_has_no_room_is_left_out() {
        let lines: Vec<Piece> = (0..100_u8)
            .map(|row| f32::from(row) * 3.0)
            .map(|y| (0, [pos2(0.0, y), pos2(400.0, y)]))
            .collect();
        let at = pos2(100.0, 100.0);
        let labels = place(&[text(0, at, TextSize::Label, Tone::Ink)], &lines, 0.4);
        assert_eq!(labels, [None], "a line every 3 points");
    }

    #[test]
    fn lines_cross_frames_only_where_they_pass() {
        let frame = Rect::from_min_max(pos2(10.0, 10.0), pos2(20.0, 20.0));
        for (from, to, hit) in [
            ((0.0, 15.0), (30.0, 15.0), true),
            ((0.0, 0.0), (30.0, 30.0), true),
            ((0.0, 25.0), (8.0, 0.0), false),
            ((12.0, 0.0), (12.0, 9.0), false),
            ((0.0, 24.0), (40.0, 21.0), false),
            ((12.0, 12.0), (13.0, 13.0), true),
        ] {
            let piece = [from, to].map(|(x, y)| pos2(x, y));
            assert_eq!(crosses(frame, piece), hit, "{from:?} to {to:?}");
        }
    }
}

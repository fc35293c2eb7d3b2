//! Everything that the window shows and names, to walk over.

use egui::accesskit::{Action, Role};
use egui::epaint::Shape;
use egui::{Pos2, Rect};
use egui_kittest::Node;
use egui_kittest::kittest::NodeT;

use crate::rig::Rig;

/// One node of the tree that screen readers see.
#[derive(Debug, Clone)]
pub(crate) struct SeenNode {
    pub(crate) role: Role,
    /// The accessible name.
    pub(crate) name: String,
    pub(crate) value: String,
    pub(crate) rect: Rect,
    /// Whether it can be clicked or take the focus.
    pub(crate) interactive: bool,
}

/// One piece of text as it is painted.
#[derive(Debug, Clone)]
pub(crate) struct SeenText {
    pub(crate) text: String,
    /// Around the ink.
    pub(crate) ink: Rect,
    /// What of it may be painted on.
    pub(crate) clip: Rect,
}

/// Every named node.
pub(crate) fn nodes(rig: &Rig) -> Vec<SeenNode> {
    let mut seen = Vec::new();
    walk(&rig.harness.root(), &mut seen);
    seen
}

fn walk(node: &Node<'_>, seen: &mut Vec<SeenNode>) {
    let children: Vec<_> = node.children().collect();
    for child in children {
        let inner = child.accesskit_node();
        if let Some(bounds) = inner.bounding_box() {
            let points = rig_points(&child);
            let at = |x: f64, y: f64| Pos2::new(x as f32 / points, y as f32 / points);
            let acts = |action| inner.data().supports_action(action);
            seen.push(SeenNode {
                role: inner.role(),
                // A label says its text as its value.
                name: inner.label().or(inner.value()).unwrap_or_default(),
                value: inner.value().unwrap_or_default(),
                rect: Rect::from_min_max(at(bounds.x0, bounds.y0), at(bounds.x1, bounds.y1)),
                interactive: acts(Action::Click) || acts(Action::Focus),
            });
        }
        walk(&child, seen);
    }
}

/// Pixels of the tree for one point of the window.
fn rig_points(node: &Node<'_>) -> f32 {
    let bounds = node.accesskit_node().bounding_box();
    let rect = node.rect();
    match bounds {
        Some(bounds) if rect.max.x.abs() > 1e-3 => bounds.x1 as f32 / rect.max.x,
        _ => 1.0,
    }
}

/// Every painted text of which some is seen.
pub(crate) fn texts(rig: &Rig) -> Vec<SeenText> {
    let mut seen = Vec::new();
    for clipped in &rig.harness.output().shapes {
        collect(&clipped.shape, clipped.clip_rect, &mut seen);
    }
    let window = rig.window();
    seen.retain(|text: &SeenText| {
        let visible = text.ink.intersect(text.clip).intersect(window);
        visible.is_positive() && !text.text.trim().is_empty()
    });
    seen
}

fn collect(shape: &Shape, clip: Rect, seen: &mut Vec<SeenText>) {
    match shape {
        Shape::Vec(shapes) => shapes.iter().for_each(|shape| collect(shape, clip, seen)),
        Shape::Text(text) => seen.push(SeenText {
            text: text.galley.text().to_owned(),
            ink: text.visual_bounding_rect(),
            clip,
        }),
        _ => {}
    }
}

/// Everything that is written on the screen or told to a screen reader.
pub(crate) fn words(rig: &Rig) -> Vec<String> {
    let painted = texts(rig).into_iter().map(|text| text.text);
    let told = nodes(rig)
        .into_iter()
        .flat_map(|node| [node.name, node.value]);
    let mut words: Vec<String> = painted.chain(told).collect();
    words.retain(|text| !text.trim().is_empty());
    words
}

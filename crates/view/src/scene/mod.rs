//! Drawings as data: parts with names, made of lines, circles, texts and arrows.
//!
//! A [`Scene`] knows what things are, not how they look: a [`Stroke`] says "working line under
//! this share of the pressure scale", a [`Paint`] says "steel", and a [`crate::Theme`] turns both
//! into colours. Painters draw the parts in order. Every filled path is one simple polygon without
//! holes, so that a painter which can only fill triangles has an easy life.

#[cfg(test)]
mod collisions;
mod hit;
mod part_pen;
mod prim;

#[cfg(test)]
pub(crate) use collisions::collisions;
pub use hit::Hit;
pub(crate) use part_pen::{LINE_SPACING, PartPen, polygon};
pub use prim::{Anchor, Line, Paint, Prim, Stroke, Tone};

use kurbo::Rect;

/// A drawing. Lengths are px at 100 %; `y` grows downwards.
#[derive(Debug, Clone, PartialEq)]
pub struct Scene {
    /// What is drawn, for a heading and for screen readers.
    pub title: String,
    /// The drawing in words, for those who cannot see it.
    pub description: String,
    /// Everything lies inside.
    pub bounds: Rect,
    /// Parts, in the order in which they are painted.
    pub parts: Vec<Part>,
}

/// Something with a name that can be pointed at.
#[derive(Debug, Clone, PartialEq)]
pub struct Part {
    /// The slot and part: `pump`, `main_relief`, `steering.cylinder`. Unique in a scene.
    pub id: String,
    /// What a person calls it.
    pub label: String,
    /// Everything of the part lies inside.
    pub bounds: Rect,
    /// What it is made of, in the order of painting.
    pub prims: Vec<Prim>,
}

/// Space around everything, px.
const MARGIN: f64 = 16.0;

impl Scene {
    /// A scene of these parts, with bounds around them.
    #[must_use]
    pub fn new(title: String, description: String, parts: Vec<Part>) -> Self {
        let mut frames = parts.iter().map(|part| part.bounds);
        let first = frames.next().unwrap_or(Rect::ZERO);
        let bounds = frames.fold(first, |all, frame| all.union(frame));
        Self {
            title,
            description,
            bounds: bounds.inflate(MARGIN, MARGIN),
            parts,
        }
    }

    /// A part by its id.
    #[must_use]
    pub fn part(&self, id: &str) -> Option<&Part> {
        self.parts.iter().find(|part| part.id == id)
    }
}

impl Part {
    /// An empty part; grow it with [`Self::push`].
    #[must_use]
    pub fn new(id: impl Into<String>, label: impl Into<String>) -> Self {
        Self {
            id: id.into(),
            label: label.into(),
            bounds: Rect::ZERO,
            prims: Vec::new(),
        }
    }

    /// Adds a primitive and widens the bounds.
    pub fn push(&mut self, prim: Prim) {
        let frame = prim.bounds();
        self.bounds = if self.prims.is_empty() {
            frame
        } else {
            self.bounds.union(frame)
        };
        self.prims.push(prim);
    }
}

//! The root element of a document: its size, its font, and what a screen reader says of it.

use super::xml::{Px, Xml};
use crate::style::FONT_FAMILY;

/// The root of one document.
pub(super) struct Root<'a> {
    /// Begins the ids inside, so that several documents can stand in one page.
    pub(super) id: &'a str,
    /// Upper left corner of what is seen, px.
    pub(super) corner: (f64, f64),
    /// Width and height, px.
    pub(super) size: (f64, f64),
}

impl Root<'_> {
    /// Opens the element and writes title and description into it.
    pub(super) fn open(&self, xml: &mut Xml, title: &str, description: &str) {
        let (width, height) = (Px(self.size.0), Px(self.size.1));
        let view = format!(
            "{} {} {width} {height}",
            Px(self.corner.0),
            Px(self.corner.1)
        );
        let (title_id, text_id) = (format!("{}-title", self.id), format!("{}-text", self.id));
        let labels = format!("{title_id} {text_id}");
        xml.open(
            "svg",
            &[
                ("xmlns", &"http://www.w3.org/2000/svg"),
                ("viewBox", &view),
                ("width", &width),
                ("height", &height),
                ("role", &"img"),
                ("aria-labelledby", &labels),
                ("font-family", &FONT_FAMILY),
                ("style", &"font-variant-numeric: tabular-nums"),
            ],
        );
        xml.text("title", &[("id", &title_id)], title);
        xml.text("desc", &[("id", &text_id)], description);
    }
}

//! Frames that follow each other: only what changed is painted, and the picture is the same as if
//! all of it had been.

use egui::epaint::{ClippedPrimitive, ImageDelta, Mesh, Primitive, Vertex};
use egui::{Color32, ColorImage, Pos2, Rect, TextureId, TextureOptions, TexturesDelta, pos2, vec2};
use helmsplit_raster::{Area, Canvas, Painter};

const FONT: TextureId = TextureId::Managed(0);
const SIZE: [usize; 2] = [150, 110];

/// Numbers that look random and are the same on every run (Marsaglia 2003, Xorshift RNGs, Journal
/// of Statistical Software 8(14)).
struct Numbers(u32);

impl Numbers {
    /// The next one, 0 to 1.
    fn next(&mut self) -> f32 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 17;
        self.0 ^= self.0 << 5;
        self.0 as f32 / u32::MAX as f32
    }

    fn point(&mut self) -> Pos2 {
        pos2(self.next() * 170.0 - 10.0, self.next() * 130.0 - 10.0)
    }
}

fn triangle(numbers: &mut Numbers) -> ClippedPrimitive {
    let vertices: Vec<_> = (0..3)
        .map(|_| Vertex {
            pos: numbers.point(),
            uv: pos2(numbers.next(), numbers.next()),
            color: Color32::from_rgba_unmultiplied(
                (numbers.next() * 255.0) as u8,
                (numbers.next() * 255.0) as u8,
                90,
                (numbers.next() * 255.0) as u8,
            ),
        })
        .collect();
    let corner = numbers.point();
    let size = vec2(numbers.next() * 90.0, numbers.next() * 90.0);
    ClippedPrimitive {
        clip_rect: Rect::from_min_size(corner, size),
        primitive: Primitive::Mesh(Mesh {
            indices: vec![0, 1, 2],
            vertices,
            texture_id: FONT,
        }),
    }
}

fn square(at: Pos2, side: f32, colour: Color32) -> ClippedPrimitive {
    let mut mesh = Mesh::with_texture(FONT);
    mesh.add_rect_with_uv(
        Rect::from_min_size(at, vec2(side, side)),
        Rect::from_min_size(Pos2::ZERO, vec2(0.0, 0.0)),
        colour,
    );
    ClippedPrimitive {
        clip_rect: Rect::EVERYTHING,
        primitive: Primitive::Mesh(mesh),
    }
}

fn atlas() -> ColorImage {
    let pixels = (0..64_u8)
        .map(|i| Color32::from_rgba_unmultiplied(255, 4 * i, 255 - i, 255))
        .collect();
    ColorImage::new([8, 8], pixels)
}

fn delta() -> TexturesDelta {
    let mut delta = TexturesDelta::default();
    delta.push(FONT, ImageDelta::full(atlas(), TextureOptions::LINEAR));
    delta
}

#[test]
fn frames_on_top_of_each_other_equal_frames_painted_whole() {
    let mut numbers = Numbers(20_261_201);
    let mut canvas = Canvas::new();
    let mut painter = Painter::new();
    canvas.take_textures(&mut delta()).expect("an image");
    painter.take_textures(&mut delta()).expect("an image");
    let mut frame: Vec<_> = (0..60).map(|_| triangle(&mut numbers)).collect();
    for round in 0..40 {
        let place = (numbers.next() * 59.0) as usize;
        match round % 3 {
            0 => frame[place] = triangle(&mut numbers),
            1 => frame.swap(place, 59),
            _ => drop(frame.pop().map(|last| frame.insert(place, last))),
        }
        let scale = if round < 30 { 1.0 } else { 1.25 };
        canvas
            .show(&frame, SIZE, scale, Color32::BLACK)
            .expect("painted");
        let whole = painter
            .paint(&frame, SIZE, scale, Color32::BLACK)
            .expect("painted");
        assert!(*canvas.picture() == whole, "round {round} differs");
    }
}

#[test]
fn only_what_changed_is_painted() {
    let mut canvas = Canvas::new();
    canvas.take_textures(&mut delta()).expect("an image");
    let ground = square(pos2(0.0, 0.0), 150.0, Color32::WHITE);
    let at = |x: f32| vec![ground.clone(), square(pos2(x, 40.0), 8.0, Color32::RED)];
    let mut show = |frame: &[ClippedPrimitive]| {
        canvas
            .show(frame, SIZE, 1.0, Color32::BLACK)
            .expect("painted")
    };
    let whole: usize = show(&at(40.0)).iter().map(|a| a.x.1 - a.x.0).sum();
    assert_eq!(whole, 4 * SIZE[0], "the first frame, four rows of tiles");
    assert_eq!(show(&at(40.0)), [], "the same again");
    let expected = [Area {
        x: (32, 64),
        y: (32, 64),
    }];
    assert_eq!(show(&at(41.0)), expected, "one tile");
}

#[test]
fn new_texels_are_seen_although_no_mesh_changed() {
    let mut canvas = Canvas::new();
    canvas.take_textures(&mut delta()).expect("an image");
    let frame = [square(pos2(0.0, 0.0), 150.0, Color32::WHITE)];
    let show = |canvas: &mut Canvas| {
        canvas
            .show(&frame, SIZE, 1.0, Color32::BLACK)
            .expect("painted")
    };
    assert!(!show(&mut canvas).is_empty(), "the first frame");
    let mut delta = TexturesDelta::default();
    let blue = ColorImage::filled([8, 8], Color32::BLUE);
    delta.push(FONT, ImageDelta::full(blue, TextureOptions::LINEAR));
    canvas.take_textures(&mut delta).expect("an image");
    assert!(!show(&mut canvas).is_empty(), "painted anew");
    assert_eq!(
        canvas.picture().pixel(75, 55),
        Some(Color32::BLUE),
        "with the new texels"
    );
}

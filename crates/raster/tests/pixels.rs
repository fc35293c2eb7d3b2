//! Triangles, opacity, clipping and textures, pixel by pixel.

use egui::epaint::{ClippedPrimitive, ImageDelta, Mesh, Primitive, Vertex};
use egui::{Color32, ColorImage, Pos2, Rect, TextureId, TextureOptions, TexturesDelta, pos2, vec2};
use helmsplit_raster::{Painter, Picture, RasterError, png_bytes};

const FONT: TextureId = TextureId::Managed(0);
const SIZE: [usize; 2] = [20, 20];

fn painter_with(image: ColorImage) -> Painter {
    let mut painter = Painter::new();
    let mut delta = TexturesDelta::default();
    delta.push(FONT, ImageDelta::full(image, TextureOptions::NEAREST));
    painter
        .take_textures(&mut delta)
        .expect("the atlas is an image");
    assert!(delta.is_empty(), "the painter took everything");
    painter
}

fn white() -> Painter {
    painter_with(ColorImage::filled([1, 1], Color32::WHITE))
}

fn mesh(corners: &[Pos2], indices: &[u32], colour: Color32) -> Mesh {
    let corner = |&pos: &Pos2| Vertex {
        pos,
        uv: pos2(0.0, 0.0),
        color: colour,
    };
    Mesh {
        indices: indices.to_vec(),
        vertices: corners.iter().map(corner).collect(),
        texture_id: FONT,
    }
}

fn everything() -> Rect {
    Rect::from_min_size(Pos2::ZERO, vec2(100.0, 100.0))
}

fn draw(painter: &Painter, mesh: Mesh, clip_rect: Rect, scale: f32) -> Picture {
    let primitive = ClippedPrimitive {
        clip_rect,
        primitive: Primitive::Mesh(mesh),
    };
    painter
        .paint(&[primitive], SIZE, scale, Color32::BLACK)
        .expect("its textures are known")
}

fn count(picture: &Picture, colour: Color32) -> usize {
    picture.pixels().iter().filter(|&&p| p == colour).count()
}

#[test]
fn a_triangle_covers_the_pixels_whose_centres_it_holds() {
    let corners = [pos2(2.0, 2.0), pos2(12.0, 2.0), pos2(2.0, 12.0)];
    for indices in [[0, 1, 2], [0, 2, 1], [2, 1, 0]] {
        let picture = draw(
            &white(),
            mesh(&corners, &indices, Color32::RED),
            everything(),
            1.0,
        );
        // Centres with (x - 2) + (y - 2) < 10; those on the slanted edge belong to its far side.
        let inside = |x: usize, y: usize| x >= 2 && y >= 2 && (x - 2) + (y - 2) + 1 < 10;
        for y in 0..20 {
            for x in 0..20 {
                let painted = picture.pixel(x, y) == Some(Color32::RED);
                assert_eq!(painted, inside(x, y), "pixel {x}, {y} with {indices:?}");
            }
        }
    }
}

#[test]
fn triangles_that_share_edges_leave_no_gap_and_paint_no_pixel_twice() {
    // A fan of five around an odd centre, half opaque: a pixel painted twice would be lighter.
    let mut corners = vec![pos2(9.37, 8.91)];
    corners.extend([
        pos2(1.0, 1.0),
        pos2(19.0, 1.0),
        pos2(19.0, 13.3),
        pos2(19.0, 19.0),
        pos2(1.0, 19.0),
    ]);
    let indices = [0, 1, 2, 0, 2, 3, 0, 3, 4, 0, 4, 5, 0, 5, 1];
    let half = Color32::from_rgba_premultiplied(128, 128, 128, 128);
    let picture = draw(&white(), mesh(&corners, &indices, half), everything(), 1.0);
    let once = Color32::from_rgba_premultiplied(128, 128, 128, 255);
    assert_eq!(count(&picture, once), 18 * 18, "each pixel once");
    assert_eq!(
        count(&picture, Color32::BLACK),
        400 - 18 * 18,
        "the rest untouched"
    );
}

#[test]
fn opacity_blends_premultiplied() {
    let quad = [
        pos2(0.0, 0.0),
        pos2(20.0, 0.0),
        pos2(20.0, 20.0),
        pos2(0.0, 20.0),
    ];
    let glass = Color32::from_rgba_premultiplied(100, 0, 20, 51);
    let primitive = ClippedPrimitive {
        clip_rect: everything(),
        primitive: Primitive::Mesh(mesh(&quad, &[0, 1, 2, 0, 2, 3], glass)),
    };
    let ground = Color32::from_rgb(50, 100, 200);
    let picture = white().paint(&[primitive], SIZE, 1.0, ground).unwrap();
    // front + back * (1 - 51/255): 100 + 40, 0 + 80, 20 + 160.
    assert_eq!(
        count(&picture, Color32::from_rgb(140, 80, 180)),
        400,
        "by hand"
    );
}

#[test]
fn nothing_leaves_the_clip_rectangle() {
    let quad = [
        pos2(-50.0, -50.0),
        pos2(90.0, -50.0),
        pos2(90.0, 90.0),
        pos2(-50.0, 90.0),
    ];
    let clip = Rect::from_min_max(pos2(1.5, 2.0), pos2(4.0, 5.0));
    let picture = draw(
        &white(),
        mesh(&quad, &[0, 1, 2, 0, 2, 3], Color32::GREEN),
        clip,
        2.0,
    );
    assert_eq!(count(&picture, Color32::GREEN), 5 * 6, "3..8 by 4..10");
    assert_eq!(picture.pixel(3, 4), Some(Color32::GREEN), "first inside");
    assert_eq!(picture.pixel(8, 4), Some(Color32::BLACK), "first beyond");
}

#[test]
fn textures_are_sampled_and_patched() {
    let mut image = ColorImage::filled([2, 1], Color32::RED);
    image.pixels[1] = Color32::GREEN;
    let mut painter = painter_with(image);
    let mut quad = mesh(
        &[
            pos2(0.0, 0.0),
            pos2(20.0, 0.0),
            pos2(20.0, 20.0),
            pos2(0.0, 20.0),
        ],
        &[0, 1, 2, 0, 2, 3],
        Color32::WHITE,
    );
    for vertex in &mut quad.vertices {
        vertex.uv = pos2(vertex.pos.x / 20.0, vertex.pos.y / 20.0);
    }
    let picture = draw(&painter, quad.clone(), everything(), 1.0);
    assert_eq!(count(&picture, Color32::RED), 200, "left half");
    assert_eq!(count(&picture, Color32::GREEN), 200, "right half");

    let mut delta = TexturesDelta::default();
    let dot = ColorImage::filled([1, 1], Color32::BLUE);
    delta.push(
        FONT,
        ImageDelta::partial([0, 0], dot.clone(), TextureOptions::NEAREST),
    );
    painter.take_textures(&mut delta).unwrap();
    let picture = draw(&painter, quad, everything(), 1.0);
    assert_eq!(count(&picture, Color32::BLUE), 200, "left half patched");

    delta.push(
        FONT,
        ImageDelta::partial([2, 0], dot, TextureOptions::NEAREST),
    );
    let error = painter.take_textures(&mut delta).unwrap_err();
    assert!(
        matches!(error, RasterError::TextureUpdate { .. }),
        "{error}"
    );
}

#[test]
fn a_mesh_without_its_texture_is_refused() {
    let corners = [pos2(0.0, 0.0), pos2(9.0, 0.0), pos2(0.0, 9.0)];
    let primitive = ClippedPrimitive {
        clip_rect: everything(),
        primitive: Primitive::Mesh(mesh(&corners, &[0, 1, 2], Color32::RED)),
    };
    let result = Painter::new().paint(&[primitive], SIZE, 1.0, Color32::BLACK);
    assert!(
        matches!(result, Err(RasterError::NoTexture { .. })),
        "an error"
    );
}

#[test]
fn png_holds_the_pixels() {
    let corners = [pos2(0.0, 0.0), pos2(9.0, 0.0), pos2(0.0, 9.0)];
    let picture = draw(
        &white(),
        mesh(&corners, &[0, 1, 2], Color32::RED),
        everything(),
        1.0,
    );
    let bytes = png_bytes(&picture).unwrap();
    let mut reader = png::Decoder::new(std::io::Cursor::new(&bytes))
        .read_info()
        .unwrap();
    let mut read = vec![0; reader.output_buffer_size().unwrap()];
    reader.next_frame(&mut read).unwrap();
    assert_eq!(read, picture.rgba(), "what was drawn");
    assert_eq!(bytes, png_bytes(&picture).unwrap(), "the same bytes again");
}

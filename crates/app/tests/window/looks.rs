//! What stands on the screen: cautions, keys, and that nothing is cut off.

use helmsplit_app::Appearance;

use crate::rig::Rig;

#[test]
fn about_shows_every_caution() {
    let mut rig = Rig::new();
    rig.menu("Help", "About and cautions");
    for text in [
        "safety-critical",
        "ISO 5010",
        "injects through skin",
        "Release stored energy",
        "Hot oil burns",
        "Never raise a relief setting",
        "Not modelled",
        "MIT or Apache-2.0",
    ] {
        assert!(rig.says(text), "{text}");
    }
    rig.click("Close");
    rig.menu("Help", "Keys and gestures");
    assert!(rig.says("Ctrl+Shift+Z"), "the list of keys");
}

#[test]
fn light_and_dark_are_painted_and_differ() {
    let mut pictures = Vec::new();
    for appearance in [Appearance::Light, Appearance::Dark] {
        let mut rig = Rig::with([1280.0, 720.0], appearance, "orchard carrier");
        let picture = rig.harness.render().expect("a picture");
        let mean = |p: &image::RgbaImage| {
            let sum: u64 = p.pixels().map(|p| u64::from(p.0[1])).sum();
            sum as f64 / f64::from(p.width() * p.height())
        };
        pictures.push(mean(&picture));
    }
    assert!(pictures[0] > 200.0, "light: {}", pictures[0]);
    assert!(pictures[1] < 60.0, "dark: {}", pictures[1]);
}

/// Writes the pages as PNG into the folder named by `HELMSPLIT_SHOTS`.
#[test]
#[ignore = "writes pictures to look at"]
fn screenshots() {
    let Ok(folder) = std::env::var("HELMSPLIT_SHOTS") else {
        panic!("name a folder in HELMSPLIT_SHOTS");
    };
    for (size, [width, height]) in [("small", [1280.0, 720.0]), ("large", [1920.0, 1080.0])] {
        for (name, appearance) in [("light", Appearance::Light), ("dark", Appearance::Dark)] {
            let mut rig = Rig::with([width, height], appearance, "orchard carrier");
            let shoot = |rig: &mut Rig, page: &str| {
                let picture = rig.harness.render().expect("a picture");
                let path = format!("{folder}/{page}-{size}-{name}.png");
                picture.save(&path).expect("written");
            };
            shoot(&mut rig, "response");
            rig.click_beginning("overshoot ");
            shoot(&mut rig, "evidence");
            rig.click("Close");
            rig.keep("as drawn");
            rig.enter("Fixed orifice diameter", "3.3 mm");
            rig.solve();
            rig.keep("fixed orifice 3.3 mm");
            rig.enter("Fixed orifice diameter", "3.9 mm");
            rig.solve();
            rig.click_trace(0.35, egui::Modifiers::NONE);
            shoot(&mut rig, "kept");
            rig.click_trace(0.45, egui::Modifiers::SHIFT);
            rig.press(egui::Modifiers::NONE, egui::Key::T);
            shoot(&mut rig, "table");
        }
    }
}

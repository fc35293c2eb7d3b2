//! The document as a whole: well formed, complete, nothing on top of anything else.

use std::collections::HashSet;

use roxmltree::{Document, Node};

use super::text_width::text_width;
use super::*;
use crate::plot::{Limit, Mark, Panel, Reach, Series, Where};
use crate::style::{Meaning, TextSize};
use crate::theme::BuiltInTheme;

#[path = "../../tests/sample/mod.rs"]
mod sample;

fn svg(figure: &Figure, built_in: BuiltInTheme, width: f64) -> String {
    let theme = built_in.load().unwrap();
    let options = SvgOptions {
        width,
        ..SvgOptions::new(&theme)
    };
    svg_from_figure(figure, &options)
}

fn number(node: Node<'_, '_>, name: &str) -> f64 {
    node.attribute(name)
        .map_or(0.0, |text| text.parse().unwrap())
}

/// A text with its frame on the sheet, from generous widths.
struct Placed {
    content: String,
    left: f64,
    right: f64,
    top: f64,
    bottom: f64,
}

fn texts(document: &Document<'_>) -> Vec<Placed> {
    let nodes = document
        .descendants()
        .filter(|node| node.has_tag_name("text"));
    nodes
        .map(|node| {
            let parts: Vec<_> = node
                .descendants()
                .filter(Node::is_text)
                .map(|n| n.text())
                .collect();
            let content = parts.into_iter().flatten().collect::<String>();
            let shift = node.parent().and_then(|group| group.attribute("transform"));
            let shift = shift.map_or(0.0, |text| {
                let inner = text
                    .trim_start_matches("translate(0 ")
                    .trim_end_matches(')');
                inner.parse::<f64>().unwrap()
            });
            let size = number(node, "font-size");
            // Real faces are narrower by a tenth than what the layout reckons with.
            let width = 0.88 * text_width(&content, TextSize::Label) * size / TextSize::Label.px();
            let (x, y) = (number(node, "x"), number(node, "y") + shift);
            let left = match node.attribute("text-anchor") {
                Some("end") => x - width,
                Some("middle") => x - width / 2.0,
                _ => x,
            };
            Placed {
                content,
                left,
                right: left + width,
                top: y - 0.72 * size,
                bottom: y,
            }
        })
        .collect()
}

#[test]
fn texts_do_not_overlap_and_stay_on_the_sheet() {
    for (figure, width) in [
        (sample::run(), 960.0),
        (sample::run(), 640.0),
        (sample::awkward(), 960.0),
        (sample::awkward(), 1600.0),
    ] {
        let text = svg(&figure, BuiltInTheme::Light, width);
        let document = Document::parse(&text).unwrap();
        let height = number(document.root_element(), "height");
        let placed = texts(&document);
        assert!(placed.len() > 40, "only {} texts", placed.len());
        for (index, one) in placed.iter().enumerate() {
            let is_inside =
                one.left >= 0.0 && one.right <= width && one.top >= 0.0 && one.bottom <= height;
            assert!(is_inside, "{:?} leaves a sheet of {width} px", one.content);
            for other in &placed[..index] {
                let apart = one.left >= other.right
                    || other.left >= one.right
                    || one.top >= other.bottom
                    || other.top >= one.bottom;
                assert!(
                    apart,
                    "{:?} on {:?} at {width} px",
                    one.content, other.content
                );
            }
        }
    }
}

#[test]
fn documents_are_well_formed_whatever_the_data() {
    let empty = Figure::default();
    for figure in [sample::run(), sample::awkward(), empty] {
        for built_in in BuiltInTheme::ALL {
            let text = svg(&figure, built_in, 960.0);
            let document = Document::parse(&text).unwrap();
            let root = document.root_element();
            assert_eq!(
                root.tag_name().namespace(),
                Some("http://www.w3.org/2000/svg"),
                "namespace"
            );
            for word in ["NaN", "inf", "e-", "e+"] {
                let in_numbers = document.descendants().any(|node| {
                    [
                        "d",
                        "x",
                        "y",
                        "x1",
                        "x2",
                        "y1",
                        "y2",
                        "cx",
                        "cy",
                        "transform",
                    ]
                    .iter()
                    .any(|name| {
                        node.attribute(*name)
                            .is_some_and(|value| value.contains(word))
                    })
                });
                assert!(!in_numbers, "{word} in a coordinate of {:?}", figure.title);
            }
            let ids: Vec<_> = document
                .descendants()
                .filter_map(|n| n.attribute("id"))
                .collect();
            let unique: HashSet<_> = ids.iter().collect();
            assert_eq!(unique.len(), ids.len(), "ids of {:?}", figure.title);
            for reference in document
                .descendants()
                .filter_map(|n| n.attribute("clip-path"))
            {
                let id = reference.trim_start_matches("url(#").trim_end_matches(')');
                assert!(ids.contains(&id), "{reference} leads nowhere");
            }
        }
    }
}

#[test]
fn every_name_is_on_the_sheet() {
    let figure = sample::run();
    let text = svg(&figure, BuiltInTheme::Dark, 960.0);
    let document = Document::parse(&text).unwrap();
    let placed: Vec<_> = texts(&document)
        .into_iter()
        .map(|text| text.content)
        .collect();
    let has = |wanted: &str| placed.iter().any(|text| text.starts_with(wanted));
    for panel in &figure.panels {
        let series = panel.series.iter().map(|series| &series.label);
        let shades = panel.shades.iter().map(|shade| &shade.label);
        for name in series.chain(shades).chain([&panel.label]) {
            assert!(has(name), "{name} is missing");
        }
    }
    for name in figure
        .marks
        .iter()
        .map(|mark| &mark.label)
        .chain(&figure.notes)
    {
        assert!(has(name), "{name} is missing");
    }
}

#[test]
fn a_peak_of_one_sample_reaches_its_height() {
    let mut points: Vec<_> = (0..1_000_000)
        .map(|i| [f64::from(i) * 1e-5, 20.0])
        .collect();
    points[333_333][1] = 250.0;
    let mut panel = Panel::new("Pressure", "bar");
    panel
        .series
        .push(Series::new("Pressure", Meaning::Inlet, points));
    panel.range = crate::plot::ValueRange::Fixed(0.0, 250.0);
    let figure = Figure {
        panels: vec![panel],
        ..Figure::default()
    };
    let text = svg(&figure, BuiltInTheme::Light, 960.0);
    let document = Document::parse(&text).unwrap();
    let path = document
        .descendants()
        .find(|node| node.attribute("stroke-linejoin").is_some() && node.has_tag_name("path"));
    let outline = path.unwrap().attribute("d").unwrap();
    let heights = outline
        .split(['M', 'L'])
        .filter_map(|place| place.split_once(' '));
    let highest = heights
        .map(|(_, y)| y.parse::<f64>().unwrap())
        .fold(f64::INFINITY, f64::min);
    assert!(
        highest.abs() < 0.01,
        "the peak ends {highest} px below the top"
    );
}

/// Small on purpose: a person can read the whole file.
#[test]
fn a_small_figure_as_text() {
    let mut panel = Panel::new("Pressure", "bar");
    let inlet = vec![[0.0, 0.0], [1.0, 60.0], [1.0, 90.0], [2.0, 90.0]];
    panel.series = vec![
        Series::new("Inlet", Meaning::Inlet, inlet),
        Series::new(
            "Priority & line",
            Meaning::Priority,
            vec![[0.0, 0.0], [2.0, 40.0]],
        ),
    ];
    panel.limits.push(Limit {
        label: "relief cracks".to_owned(),
        at: Where::Line(75.0),
        reach: Reach::Widen,
    });
    let figure = Figure {
        title: "Run-up".to_owned(),
        subtitle: "50 °C".to_owned(),
        panels: vec![panel],
        marks: vec![Mark {
            time: 1.0,
            label: "wheel starts".to_owned(),
        }],
        notes: vec!["Volume audit 2e-9".to_owned()],
        ..Figure::default()
    };
    insta::assert_snapshot!(svg(&figure, BuiltInTheme::Light, 480.0));
}

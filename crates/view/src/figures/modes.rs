//! Modes in the complex plane, and their damping over a sweep.

use std::f64::consts::TAU;

use helmsplit_scenario::UnitSystem;
use helmsplit_study::{Border, Equilibrium, ModePath, Modes, Part, Pathway};

use crate::chart::{ChartAxis, ChartLine, ChartPanel, ChartPoint, LineRole};
use crate::style::{Dash, Meaning};
use crate::unit_text::unit_text;

/// Heights, px.
const PLANE: f64 = 300.0;
const OVER_SWEEP: f64 = 200.0;

/// Faster modes than this, Hz, are not drawn: they would press all others into a corner.
pub(super) const FASTEST: f64 = 500.0;

/// Damping ratios at which a ray is drawn.
const RAYS: [f64; 3] = [0.1, 0.3, 0.7];

/// The meaning that gives a part's line its colour.
fn meaning(part: Part) -> Meaning {
    match part {
        Part::Spool | Part::HeadEnd | Part::SpringEnd | Part::Bore => Meaning::Spool,
        Part::Inlet | Part::MainRelief => Meaning::Inlet,
        Part::PriorityRelief | Part::PriorityPort | Part::PriorityLine => Meaning::Priority,
        Part::SteeringSupply | Part::SteeringUnit | Part::SteeringCylinder => Meaning::Steering,
        Part::ExcessPort | Part::ExcessRelief => Meaning::Excess,
        Part::ExcessMotor | Part::LiftCylinder | Part::PriorityMotor => Meaning::Consumer,
        Part::Engine | Part::Suction | Part::Return | Part::Other => Meaning::Drive,
    }
}

/// The modes below 500 Hz in the complex plane: growth to the right, frequency upwards; with a
/// sweep the path of each, a ring where it begins and a dot where it ends.
#[must_use]
pub fn plane_panel(modes: &Modes, path: Option<&ModePath>) -> ChartPanel {
    let mut panel = ChartPanel::new(
        ChartAxis::linear("Growth (dies out left of 0)", "1/s"),
        ChartAxis::linear("Frequency of the swing", "Hz"),
        PLANE,
    );
    match path {
        None => {
            for mode in modes
                .oscillations()
                .filter(|m| m.damped_frequency().is_some_and(|f| f < FASTEST))
            {
                let (re, im) = mode.eigenvalue;
                let part = mode.shares.first().map_or(Part::Other, |share| share.part);
                panel.points.push(ChartPoint {
                    label: mode.name(),
                    meaning: meaning(part),
                    at: [re, im / TAU],
                    full: true,
                });
            }
        }
        Some(path) => {
            for pathway in drawn(path) {
                push_pathway(&mut panel, pathway);
            }
        }
    }
    push_rays(&mut panel);
    panel
}

/// Pathways that come below the fastest mode drawn.
fn drawn(path: &ModePath) -> impl Iterator<Item = &Pathway> {
    path.pathways
        .iter()
        .filter(|way| way.frequency().flatten().any(|f| f < FASTEST))
}

fn push_pathway(panel: &mut ChartPanel, pathway: &Pathway) {
    let points: Vec<[f64; 2]> = pathway
        .eigenvalues
        .iter()
        .map(|&(re, im)| [re, im.abs() / TAU])
        .filter(|at| at[1] < FASTEST)
        .collect();
    let meaning = meaning(pathway.part);
    for (at, full) in [(points.first(), false), (points.last(), true)] {
        panel.points.extend(at.map(|&at| ChartPoint {
            label: String::new(),
            meaning,
            at,
            full,
        }));
    }
    panel.lines.push(ChartLine {
        label: pathway.name.clone(),
        role: LineRole::Data(meaning, meaning.dash()),
        points,
    });
}

/// Rays of equal damping ratio, and the axis of no growth.
fn push_rays(panel: &mut ChartPanel) {
    let (Some((left, right)), Some((low, high))) = (panel.x_range(), panel.y_range()) else {
        return;
    };
    let left = left.min(-1.0);
    // The border must be in view.
    panel.x.range = Some((left, right.max(-0.08 * left)));
    panel.y.range = Some((low.min(0.0), high));
    for ratio in RAYS {
        // growth = -ratio / sqrt(1 - ratio^2) times the angular frequency.
        let slope = -ratio / (1.0_f64 - ratio * ratio).sqrt() * TAU;
        let top = high.min(left / slope);
        panel.lines.push(ChartLine {
            label: format!("damping ratio {ratio}"),
            role: LineRole::Guide,
            points: vec![
                [0.0, 0.0],
                [0.45 * slope * top, 0.45 * top],
                [0.92 * slope * top, 0.92 * top],
            ],
        });
    }
}

/// Damping ratio and frequency of the modes below 500 Hz over a sweep, with the borders and the
/// damping that is wanted.
#[must_use]
pub fn damping_panels(
    path: &ModePath,
    borders: &[Border],
    wanted: f64,
    units: UnitSystem,
) -> Vec<ChartPanel> {
    let unit = units.unit(path.variable.quantity());
    let x = || ChartAxis::linear(path.variable.label(), unit_text(unit));
    let values: Vec<f64> = path.values.iter().map(|&v| unit.value_from_si(v)).collect();
    let ends = (values.first().copied(), values.last().copied());
    let mut damping = ChartPanel::new(x(), ChartAxis::linear("Damping ratio", ""), OVER_SWEEP);
    let frequency = ChartAxis::logarithmic("Frequency, undamped", "Hz");
    let mut frequency = ChartPanel::new(x(), frequency, OVER_SWEEP);
    for (pathway, count) in drawn(path).zip(0_usize..) {
        let line = |points: Vec<[f64; 2]>| ChartLine {
            label: pathway.name.clone(),
            role: LineRole::Data(meaning(pathway.part), dash_of(path, pathway, count)),
            points,
        };
        let of = |all: Vec<Option<f64>>| -> Vec<[f64; 2]> {
            let all = all.into_iter().map(|v| v.unwrap_or(f64::NAN));
            values.iter().zip(all).map(|(&x, y)| [x, y]).collect()
        };
        damping.lines.push(line(of(pathway.damping().collect())));
        frequency
            .lines
            .push(line(of(pathway.frequency().collect())));
    }
    if let (Some(from), Some(to)) = ends {
        for (at, label) in [
            (0.0, "hunts below".to_owned()),
            (wanted, "wanted at least".to_owned()),
        ] {
            damping.lines.push(ChartLine {
                label,
                role: LineRole::Guide,
                points: vec![[from, at], [from + 0.9 * (to - from), at], [to, at]],
            });
        }
    }
    for border in borders {
        let at = unit.value_from_si(border.value);
        damping.points.push(ChartPoint {
            label: "border".to_owned(),
            meaning: Meaning::Drive,
            at: [at, 0.0],
            full: true,
        });
        frequency
            .points
            .extend(border.frequency.map(|f| ChartPoint {
                label: "border".to_owned(),
                meaning: Meaning::Drive,
                at: [at, f],
                full: true,
            }));
    }
    vec![damping, frequency]
}

/// The dash of the pathway with that place among those drawn: that of its meaning, or the next one
/// where an earlier pathway has the meaning already.
fn dash_of(path: &ModePath, pathway: &Pathway, place: usize) -> Dash {
    let meaning = meaning(pathway.part);
    let earlier = drawn(path).take(place);
    let alike = earlier
        .filter(|way| self::meaning(way.part) == meaning)
        .count();
    let own = Dash::ALL.iter().position(|dash| *dash == meaning.dash());
    Dash::ALL[(own.unwrap_or(0) + alike) % Dash::ALL.len()]
}

/// A short description of where an equilibrium stands, for a subtitle: "stable, least damping ratio
/// 0.42 at 61 Hz".
#[must_use]
pub fn stability_text(equilibrium: &Equilibrium) -> String {
    let stability = &equilibrium.stability;
    match stability
        .damping_below(FASTEST)
        .or(stability.damping.zip(stability.frequency))
    {
        Some((damping, frequency)) => format!(
            "{}, least damping ratio {damping:.3} at {frequency:.1} Hz",
            stability.word()
        ),
        None => stability.word().to_owned(),
    }
}

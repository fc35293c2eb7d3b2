//! Computing a map: lines in parallel, warm along each line, from both ends.

use std::sync::atomic::{AtomicBool, AtomicUsize, Ordering};
use std::time::{Duration, Instant};

use helmsplit_scenario::Scenario;
use rayon::prelude::*;

use super::axis::MapSpec;
use super::cell::{Cell, Spot};
use super::refine::{refined, value};
use crate::equilibrium::{Equilibrium, SeekFrom};
use crate::error::StudyError;
use crate::frequency::strokes;
use crate::operating::{Frozen, OperatingPoint};

/// Share of the wanted lines that are spread evenly before others are added where it bends.
const COARSE: f64 = 0.6;

/// How a map ended.
#[derive(Debug, Clone, Copy, PartialEq, Eq, serde::Serialize)]
#[serde(rename_all = "snake_case")]
pub enum MapEnd {
    /// Every spot was looked at.
    Finished,
    /// It was cancelled: some spots wait.
    Cancelled,
}

/// Equilibria over two variables.
#[derive(Debug, Clone, PartialEq)]
pub struct OperatingMap {
    /// What it spans.
    pub spec: MapSpec,
    /// Values along x, SI, growing.
    pub xs: Vec<f64>,
    /// Values along y, SI, growing.
    pub ys: Vec<f64>,
    /// What is there, row by row from the lowest y; [`Self::index`] gives the place.
    pub spots: Vec<Spot>,
    /// How it ended.
    pub end: MapEnd,
    /// How long it took.
    pub elapsed: Duration,
}

impl OperatingMap {
    /// Place in [`Self::spots`] of column `x` and row `y`.
    #[must_use]
    pub fn index(&self, x: usize, y: usize) -> usize {
        y * self.xs.len() + x
    }

    /// Every equilibrium with its x and y, SI.
    pub fn cells(&self) -> impl Iterator<Item = (f64, f64, &Cell)> + Clone {
        self.spots.iter().enumerate().filter_map(|(at, spot)| {
            let (x, y) = (at % self.xs.len(), at / self.xs.len());
            Some((self.xs[x], self.ys[y], spot.cell()?))
        })
    }

    /// Number of spots without an equilibrium.
    #[must_use]
    pub fn failed(&self) -> usize {
        let failed = self.spots.iter().filter(|s| matches!(s, Spot::Failed(_)));
        failed.count()
    }

    /// The operating point at column `x` and row `y`.
    ///
    /// # Errors
    /// As [`MapSpec::point_at`].
    pub fn point(
        &self,
        scenario: &Scenario,
        x: usize,
        y: usize,
    ) -> Result<OperatingPoint, StudyError> {
        Ok(self.spec.point_at(scenario, self.xs[x], self.ys[y])?)
    }
}

/// News of a map in the making: one line of spots.
#[derive(Debug)]
pub struct MapNews<'a> {
    /// Values along x of the grid that the line belongs to, SI.
    pub xs: &'a [f64],
    /// Values along y, SI.
    pub ys: &'a [f64],
    /// Places of the spots in that grid, row by row from the lowest y.
    pub places: &'a [usize],
    /// The spots.
    pub spots: &'a [Spot],
    /// Spots looked at so far, over all grids.
    pub done: usize,
    /// Spots that the finished map will have looked at.
    pub total: usize,
}

/// Cancel flag and news of a map; the default has neither.
#[derive(Clone, Copy, Default)]
pub struct MapWatch<'a> {
    cancel: Option<&'a AtomicBool>,
    news: Option<&'a (dyn Fn(&MapNews<'_>) + Sync)>,
}

impl<'a> MapWatch<'a> {
    /// Nobody watches.
    #[must_use]
    pub fn none() -> Self {
        Self::default()
    }

    /// The map stops soon after `flag` becomes true and keeps what it has.
    #[must_use]
    pub fn with_cancel(mut self, flag: &'a AtomicBool) -> Self {
        self.cancel = Some(flag);
        self
    }

    /// `hear` is called for each line as it is done, from several threads.
    #[must_use]
    pub fn with_news(mut self, hear: &'a (dyn Fn(&MapNews<'_>) + Sync)) -> Self {
        self.news = Some(hear);
        self
    }

    fn cancelled(&self) -> bool {
        self.cancel.is_some_and(|flag| flag.load(Ordering::Relaxed))
    }
}

/// What every line needs.
struct Job<'a> {
    scenario: &'a Scenario,
    spec: &'a MapSpec,
    watch: MapWatch<'a>,
    set_flow: f64,
    strokes: f64,
    /// Whether lines run along x; otherwise along y.
    along_x: bool,
    done: AtomicUsize,
    total: usize,
}

/// One grid of the map.
struct Grid {
    xs: Vec<f64>,
    ys: Vec<f64>,
    spots: Vec<Spot>,
}

/// The equilibria of `scenario` over what `spec` spans.
///
/// Lines run along the variable that leaves the circuit as it is, each spot starting from its
/// neighbour; each line is walked back as well, so that where two equilibria live side by side
/// [`Cell::several`] says so. Lines are shared out over the processor's cores, coarse before fine,
/// so that the picture fills in evenly. With [`MapSpec::refine`] six tenths of the lines are spread
/// evenly, and the others are added where the layers bend.
///
/// # Errors
/// [`StudyError::Point`] if an axis does not fit the circuit. A spot without equilibrium is no
/// error: see [`Spot::Failed`].
pub fn operating_map(
    scenario: &Scenario,
    spec: &MapSpec,
    watch: MapWatch<'_>,
) -> Result<OperatingMap, StudyError> {
    let begun = Instant::now();
    spec.check()?;
    // What does not fit at the corners is an error of the spec, not of a spot.
    for (x, y) in [(spec.x.from, spec.y.from), (spec.x.to, spec.y.to)] {
        Frozen::new(scenario, &spec.point_at(scenario, x, y)?)?;
    }
    let job = Job {
        scenario,
        spec,
        watch,
        set_flow: scenario.ratings().set_flow,
        strokes: strokes(scenario)?,
        along_x: !spec.x.variable.changes_circuit() || spec.y.variable.changes_circuit(),
        done: AtomicUsize::new(0),
        total: spec.x.lines * spec.y.lines,
    };
    let first = |wanted: usize| {
        if spec.refine && wanted > 4 {
            ((COARSE * wanted as f64).round() as usize).max(3)
        } else {
            wanted
        }
    };
    let even = |from: f64, to: f64, lines: usize| -> Vec<f64> {
        let last = (lines - 1) as f64;
        (0..lines)
            .map(|i| from + (to - from) * (i as f64 / last))
            .collect()
    };
    let xs = even(spec.x.from, spec.x.to, first(spec.x.lines));
    let ys = even(spec.y.from, spec.y.to, first(spec.y.lines));
    let mut grid = Grid {
        spots: vec![Spot::Waiting; xs.len() * ys.len()],
        xs,
        ys,
    };
    fill(&job, &mut grid);
    if spec.refine && !watch.cancelled() {
        grid = finer(&grid, spec);
        fill(&job, &mut grid);
    }
    let waiting = grid.spots.contains(&Spot::Waiting);
    Ok(OperatingMap {
        spec: spec.clone(),
        xs: grid.xs,
        ys: grid.ys,
        spots: grid.spots,
        end: if waiting {
            MapEnd::Cancelled
        } else {
            MapEnd::Finished
        },
        elapsed: begun.elapsed(),
    })
}

/// The grid with lines added where it bends; what is known is kept.
fn finer(grid: &Grid, spec: &MapSpec) -> Grid {
    let (columns, rows) = (grid.xs.len(), grid.ys.len());
    let at = |x: usize, y: usize| &grid.spots[y * columns + x];
    let xs = refined(&grid.xs, rows, spec.x.lines, &|layer, i, j| {
        value(at(i, j), layer)
    });
    let ys = refined(&grid.ys, columns, spec.y.lines, &|layer, i, j| {
        value(at(j, i), layer)
    });
    let place = |all: &[f64], v: f64| all.iter().position(|&known| known.to_bits() == v.to_bits());
    let mut spots = Vec::with_capacity(xs.len() * ys.len());
    for &y in &ys {
        for &x in &xs {
            spots.push(match (place(&grid.xs, x), place(&grid.ys, y)) {
                (Some(x), Some(y)) => at(x, y).clone(),
                _ => Spot::Waiting,
            });
        }
    }
    Grid { xs, ys, spots }
}

/// Looks at every spot that waits.
fn fill(job: &Job<'_>, grid: &mut Grid) {
    let lines = if job.along_x {
        grid.ys.len()
    } else {
        grid.xs.len()
    };
    let shared: &Grid = grid;
    let found: Vec<(usize, Spot)> = coarse_first(lines)
        .into_par_iter()
        .flat_map_iter(|line| {
            let found = look_along(job, shared, line);
            tell(job, shared, &found);
            found
        })
        .collect();
    for (place, spot) in found {
        grid.spots[place] = spot;
    }
}

fn tell(job: &Job<'_>, grid: &Grid, found: &[(usize, Spot)]) {
    let before = job.done.fetch_add(found.len(), Ordering::Relaxed);
    if let (Some(hear), false) = (job.watch.news, found.is_empty()) {
        let (places, spots): (Vec<usize>, Vec<Spot>) = found.iter().cloned().unzip();
        hear(&MapNews {
            xs: &grid.xs,
            ys: &grid.ys,
            places: &places,
            spots: &spots,
            done: before + found.len(),
            total: job.total,
        });
    }
}

/// The numbers below `count`, every eighth first, then those half way between, and so on.
fn coarse_first(count: usize) -> Vec<usize> {
    let mut all = Vec::with_capacity(count);
    let mut stride = 8;
    while stride >= 1 {
        let fresh = (0..count)
            .step_by(stride)
            .filter(|i| stride == 8 || i % (2 * stride) != 0);
        all.extend(fresh);
        stride /= 2;
    }
    all
}

/// The spots of one line that wait: there, and back again.
fn look_along(job: &Job<'_>, grid: &Grid, line: usize) -> Vec<(usize, Spot)> {
    let columns = grid.xs.len();
    let count = if job.along_x { columns } else { grid.ys.len() };
    let place = |i: usize| {
        if job.along_x {
            line * columns + i
        } else {
            i * columns + line
        }
    };
    let mut equilibria: Vec<Option<Equilibrium>> = Vec::with_capacity(count);
    let mut spots: Vec<(usize, Spot)> = Vec::new();
    let mut last: Option<Equilibrium> = None;
    let mut hint: Option<Vec<f64>> = None;
    for i in 0..count {
        let at = place(i);
        if let Some(cell) = grid.spots[at].cell() {
            hint = Some(cell.state.clone());
            equilibria.push(None);
            continue;
        }
        if grid.spots[at] != Spot::Waiting || job.watch.cancelled() {
            equilibria.push(None);
            continue;
        }
        match look_at(job, grid, at, last.as_ref(), hint.take()) {
            Ok(found) => {
                let cell = Cell::of(&found, job.set_flow, job.strokes);
                spots.push((at, Spot::Solved(Box::new(cell))));
                last = Some(found.clone());
                equilibria.push(Some(found));
            }
            Err(error) => {
                spots.push((at, Spot::Failed(error.to_string())));
                equilibria.push(None);
            }
        }
    }
    mark_several(&equilibria, &mut spots, &place);
    spots
}

/// The equilibrium at one spot, from the one before it on its line.
fn look_at(
    job: &Job<'_>,
    grid: &Grid,
    at: usize,
    last: Option<&Equilibrium>,
    hint: Option<Vec<f64>>,
) -> Result<Equilibrium, StudyError> {
    let columns = grid.xs.len();
    let (x, y) = (grid.xs[at % columns], grid.ys[at / columns]);
    let point = job.spec.point_at(job.scenario, x, y)?;
    let frozen = match last {
        Some(last) => last.frozen.moved(job.scenario, &last.point, &point)?,
        None => Frozen::new(job.scenario, &point)?,
    };
    let guess = hint.or_else(|| last.map(|last| last.state.clone()));
    match guess.filter(|state| state.len() == frozen.circuit().state_count()) {
        Some(state) => Equilibrium::of(frozen, &point, SeekFrom::State(&state)),
        None => Equilibrium::of(frozen, &point, SeekFrom::Shut),
    }
}

/// Walks a line back and marks each spot at which another equilibrium is met than on the way out.
fn mark_several(
    equilibria: &[Option<Equilibrium>],
    spots: &mut [(usize, Spot)],
    place: &dyn Fn(usize) -> usize,
) {
    let mut state: Option<Vec<f64>> = None;
    for (i, equilibrium) in equilibria.iter().enumerate().rev() {
        let Some(here) = equilibrium else {
            state = None;
            continue;
        };
        let Some(guess) = state.take() else {
            state = Some(here.state.clone());
            continue;
        };
        let found = here.searched_from(&guess);
        if let Some(other) = &found
            && !here.is_at(other)
        {
            let at = place(i);
            if let Some((_, Spot::Solved(cell))) = spots.iter_mut().find(|(p, _)| *p == at) {
                cell.several = true;
            }
        }
        state = Some(found.unwrap_or_else(|| here.state.clone()));
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_line_comes_once_and_coarse_ones_first() {
        for count in [1, 2, 7, 8, 9, 40, 41] {
            let all = coarse_first(count);
            let mut sorted = all.clone();
            sorted.sort_unstable();
            assert_eq!(sorted, (0..count).collect::<Vec<_>>(), "{count}: {all:?}");
        }
        assert_eq!(coarse_first(20)[..6], [0, 8, 16, 4, 12, 2], "coarse first");
    }
}

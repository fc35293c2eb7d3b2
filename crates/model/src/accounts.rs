//! Stored volume and energy, for the audits of a run (M12).
//!
//! Volumes are counted at local pressure. A chamber of volume V at pressure p holds
//! `V (1 + G(p))` of volume and `V W(p)` of energy with `G = int dp/B`, `W = int p dp/B`. When a
//! wall moves, `G V'` and `W V'` leave the account without crossing a port; they are summed along
//! the run as the share of the moving walls.

use crate::circuit::Circuit;
use crate::compression::Compression;
use crate::cylinder::Cylinder;
use crate::friction::Friction;
use crate::node::Chamber;
use crate::parts::{ExcessSide, ReturnSide, SteeringSide, Suction};
use crate::real::Real;

/// One volume of the circuit.
#[derive(Debug, Clone)]
struct Account {
    pressure: usize,
    chamber: Chamber,
    /// Growth of the volume with a travel: (m2, position of travel, position of velocity).
    moving: Option<(f64, usize, usize)>,
}

/// A stop that stores energy.
#[derive(Debug, Clone)]
struct Spring {
    travel: usize,
    /// Force at travel 0, N.
    preload: f64,
    /// Rate, N/m.
    rate: f64,
}

/// What a circuit stores, as functions of its state.
#[derive(Debug, Clone)]
pub struct Accounts {
    compression: Compression,
    volumes: Vec<Account>,
    /// Inertias: (position of the speed or flow, inertia in the unit that gives J).
    inertias: Vec<(usize, f64)>,
    springs: Vec<Spring>,
    circuit: Circuit,
}

impl Accounts {
    pub(crate) fn new(circuit: &Circuit) -> Self {
        let mut accounts = Self {
            compression: Compression::new(&circuit.parts.oil),
            volumes: Vec::new(),
            inertias: Vec::new(),
            springs: Vec::new(),
            circuit: circuit.clone(),
        };
        accounts.open_valve();
        accounts.open_line();
        accounts.open_consumers();
        accounts
    }

    fn volume(&mut self, pressure: usize, chamber: Chamber) {
        self.volumes.push(Account {
            pressure,
            chamber,
            moving: None,
        });
    }

    fn open_valve(&mut self) {
        let circuit = self.circuit.clone();
        let (ix, valve) = (&circuit.layout, &circuit.parts.valve);
        let area = valve.end_area();
        self.volume(ix.p_in, valve.inlet);
        self.volume(ix.p_b, valve.bore);
        self.volume(ix.p_c, valve.priority_port);
        self.volume(ix.p_e, valve.excess_port);
        for (pressure, chamber, growth) in
            [(ix.p_h, valve.head, area), (ix.p_s, valve.spring, -area)]
        {
            self.volumes.push(Account {
                pressure,
                chamber,
                moving: Some((growth, ix.x, ix.v)),
            });
        }
        self.inertias.push((ix.v, valve.mass));
        self.springs.push(Spring {
            travel: ix.x,
            preload: valve.preload,
            rate: valve.spring_rate,
        });
        if let Friction::Bristle(law) = &valve.friction {
            self.springs.push(Spring {
                travel: ix.bristle,
                preload: 0.0,
                rate: law.stiffness,
            });
        }
    }

    fn open_line(&mut self) {
        let circuit = self.circuit.clone();
        let (ix, parts) = (&circuit.layout, &circuit.parts);
        let line = &parts.line;
        let inertance = line.line.segment_inertance(&parts.oil);
        for segment in 0..line.line.segments {
            let at = ix.q_line + 2 * segment;
            self.inertias.push((at, inertance));
            let last = segment + 1 == line.line.segments;
            let chamber = if last {
                line.end_chamber()
            } else {
                line.segment_chamber()
            };
            self.volume(at + 1, chamber);
        }
        if let Suction::Line { line, chamber, .. } = &parts.suction {
            self.inertias
                .push((ix.q_suc, line.segment_inertance(&parts.oil)));
            self.volume(ix.p_suc, *chamber);
        }
        if let ReturnSide::Restricted { chamber, .. } = &parts.return_side {
            self.volume(ix.p_ret, *chamber);
        }
    }

    fn open_consumers(&mut self) {
        let circuit = self.circuit.clone();
        let (ix, parts) = (&circuit.layout, &circuit.parts);
        match &parts.steering {
            SteeringSide::Bench(_) => {}
            SteeringSide::Unit(gear) => {
                self.open_cylinder(&gear.cylinder, [ix.p_a, ix.p_bc, ix.y_c, ix.v_c]);
                self.springs.push(Spring {
                    travel: ix.y_c,
                    preload: 0.0,
                    rate: gear.tyre_rate,
                });
                if let Friction::Bristle(law) = &gear.scrub {
                    self.springs.push(Spring {
                        travel: ix.scrub,
                        preload: 0.0,
                        rate: law.stiffness,
                    });
                }
            }
            SteeringSide::Motor(motor) => {
                self.volume(ix.p_pm, motor.chamber);
                self.inertias.push((ix.w_pm, motor.inertia));
            }
        }
        match &parts.excess {
            ExcessSide::Motor(motor) => {
                self.volume(ix.p_m, motor.chamber);
                self.inertias.push((ix.w_m, motor.inertia));
            }
            ExcessSide::Lift(gear) => {
                self.open_cylinder(&gear.cylinder, [ix.p_cap, ix.p_rod, ix.y_l, ix.v_l]);
            }
            ExcessSide::Tank { .. } | ExcessSide::Bench { .. } | ExcessSide::Blocked => {}
        }
    }

    /// Both chambers and the mass of a cylinder; `at` holds the positions of the pressures A and
    /// B, travel and velocity.
    fn open_cylinder(&mut self, cylinder: &Cylinder, at: [usize; 4]) {
        let [p_a, p_b, travel, velocity] = at;
        self.volumes.push(Account {
            pressure: p_a,
            chamber: cylinder.chamber_a(),
            moving: Some((cylinder.area_a, travel, velocity)),
        });
        self.volumes.push(Account {
            pressure: p_b,
            chamber: cylinder.chamber_b(),
            moving: Some((-cylinder.area_b, travel, velocity)),
        });
        self.inertias.push((velocity, cylinder.mass));
    }

    fn size<S: Real>(account: &Account, y: &[S]) -> S {
        match account.moving {
            Some((growth, travel, _)) => y[travel] * growth + account.chamber.volume,
            None => S::constant(account.chamber.volume),
        }
    }

    /// Volume held, m3, counted at 0 gauge for what is compressed.
    pub fn stored_volume<S: Real>(&self, y: &[S]) -> S {
        let mut sum = S::constant(0.0);
        for account in &self.volumes {
            let p = y[account.pressure];
            let packed = self.compression.volume(p) + p * account.chamber.wall_compressibility;
            sum += Self::size(account, y) * (packed + 1.0);
        }
        sum
    }

    /// Energy held, J: compressed oil and walls, springs, stops, bristles, moving masses and oil.
    pub fn stored_energy<S: Real>(&self, y: &[S]) -> S {
        let mut sum = S::constant(0.0);
        for account in &self.volumes {
            let p = y[account.pressure];
            let wall = p * p * (0.5 * account.chamber.wall_compressibility);
            sum += Self::size(account, y) * (self.compression.energy(p) + wall);
        }
        for &(at, inertia) in &self.inertias {
            sum += y[at] * y[at] * (0.5 * inertia);
        }
        for spring in &self.springs {
            let s = y[spring.travel];
            sum += s * s * (0.5 * spring.rate) + s * spring.preload;
        }
        sum + self.stored_in_stops(y)
    }

    fn stored_in_stops<S: Real>(&self, y: &[S]) -> S {
        let (ix, parts) = (&self.circuit.layout, &self.circuit.parts);
        let valve = &parts.valve;
        let x = y[ix.x];
        let mut sum = valve.stop.stored(-x) + valve.stop.stored(x - valve.stroke);
        let mut add = |cylinder: &Cylinder, travel: S| {
            let (below, above) = cylinder.penetrations(travel);
            sum += cylinder.stop.stored(below) + cylinder.stop.stored(above);
        };
        if let SteeringSide::Unit(gear) = &parts.steering {
            add(&gear.cylinder, y[ix.y_c]);
        }
        if let ExcessSide::Lift(gear) = &parts.excess {
            add(&gear.cylinder, y[ix.y_l]);
        }
        sum
    }

    /// Compressed volume (m3/s) and compression energy (W) that moving walls carry: sums of
    /// `G V'` and `W V'`.
    #[must_use]
    pub fn moving_walls(&self, y: &[f64]) -> (f64, f64) {
        let (mut volume, mut energy) = (0.0, 0.0);
        for account in &self.volumes {
            if let Some((growth, _, velocity)) = account.moving {
                let rate = growth * y[velocity];
                let p = y[account.pressure];
                let wall = account.chamber.wall_compressibility;
                volume += rate * (self.compression.volume(p) + p * wall);
                energy += rate * (self.compression.energy(p) + 0.5 * p * p * wall);
            }
        }
        (volume, energy)
    }
}

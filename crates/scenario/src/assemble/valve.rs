//! The priority flow control valve (M5).

use helmsplit_model::{
    Bristle, Chamber, EndStop, Friction, LandShape, MeteringLand, Oil, Orifice, PriorityValve,
};

use crate::choice::{ValveFriction, ValveLand};
use crate::finding::Finding;
use crate::parameter::{excess, valve, valve_edges};
use crate::scenario::Scenario;

impl Scenario {
    pub(super) fn valve(&self, oil: &Oil) -> Result<PriorityValve, Finding> {
        let diameter = self.si(valve::SPOOL_DIAMETER);
        let clearance = self.si(valve::CLEARANCE);
        let mu = oil.dynamic_viscosity();
        let clearance_factor = PriorityValve::clearance_factor(diameter, clearance, mu);
        let film =
            PriorityValve::film_damping(diameter, self.si(valve::LAND_LENGTH), clearance, mu);
        Ok(PriorityValve {
            diameter,
            mass: self.si(valve::SPOOL_MASS),
            preload: self.si(valve::SPRING_PRELOAD),
            spring_rate: self.si(valve::SPRING_RATE),
            friction: self.spool_friction(),
            viscous: film + self.si(valve::EXTRA_DAMPING),
            fixed_orifice: self.fixed_orifice(),
            head_hole: self.head_hole(),
            disc_hole: self.disc_hole(),
            land: self.land()?,
            land_edge: self.edge(valve_edges::LAND_DISCHARGE, valve_edges::LAND_TRANSITION),
            holes_area: self.si(valve_edges::HOLES_OPEN_AREA),
            holes_leak: self.si(valve_edges::HOLES_LEAK_AREA),
            holes_start: self.si(valve_edges::HOLES_THROTTLE_START),
            holes_end: self.si(valve_edges::HOLES_THROTTLE_END),
            holes_edge: self.edge(valve_edges::HOLES_DISCHARGE, valve_edges::HOLES_TRANSITION),
            clearance_factor,
            end_conductance: clearance_factor / self.si(valve::END_LAND_LENGTH),
            land_jet_cosine: self.si(valve::EXCESS_JET_ANGLE).cos(),
            holes_jet_cosine: self.si(valve::PRIORITY_JET_ANGLE).cos(),
            jet_factor: self.si(valve::JET_FORCE_FACTOR),
            damping_length: self.si(valve::DAMPING_LENGTH),
            stop: EndStop {
                stiffness: self.si(valve::STOP_STIFFNESS),
                loss: self.si(valve::STOP_LOSS),
            },
            stroke: self.si(valve::STROKE),
            inlet: self.chamber(valve::INLET_VOLUME, valve::INLET_WALL_MODULUS),
            bore: Chamber::rigid(self.si(valve::BORE_VOLUME)),
            head: Chamber::rigid(self.si(valve::HEAD_VOLUME)),
            spring: Chamber::rigid(self.si(valve::SPRING_VOLUME)),
            priority_port: Chamber::rigid(self.si(valve::PRIORITY_VOLUME)),
            excess_port: self.chamber(excess::PORT_VOLUME, excess::PORT_WALL_MODULUS),
        })
    }

    pub(crate) fn fixed_orifice(&self) -> Orifice {
        Orifice::round(
            self.si(valve_edges::FIXED_ORIFICE_DIAMETER),
            self.si(valve_edges::FIXED_ORIFICE_DISCHARGE),
            self.si(valve_edges::FIXED_ORIFICE_TRANSITION),
        )
    }

    fn head_hole(&self) -> Orifice {
        Orifice::damping_hole(
            self.si(valve_edges::HEAD_HOLE_DIAMETER),
            self.si(valve_edges::HEAD_HOLE_LENGTH),
            self.si(valve_edges::HEAD_HOLE_DISCHARGE),
            self.si(valve_edges::HEAD_HOLE_TRANSITION),
        )
    }

    fn disc_hole(&self) -> Orifice {
        Orifice::damping_hole(
            self.si(valve_edges::DISC_HOLE_DIAMETER),
            self.si(valve_edges::DISC_HOLE_LENGTH),
            self.si(valve_edges::DISC_HOLE_DISCHARGE),
            self.si(valve_edges::DISC_HOLE_TRANSITION),
        )
    }

    /// The excess land.
    pub(crate) fn land(&self) -> Result<MeteringLand, Finding> {
        let shape = match self.chosen::<ValveLand>() {
            ValveLand::Chamfer => LandShape::Chamfer {
                angle: self.si(valve::CHAMFER_ANGLE),
                length: self.si(valve::CHAMFER_LENGTH),
            },
            ValveLand::SharpEdge => LandShape::Sharp,
            ValveLand::RoundHoles => LandShape::RoundHoles {
                count: self.si(valve::LAND_HOLE_COUNT),
                diameter: self.si(valve::LAND_HOLE_DIAMETER),
            },
            ValveLand::Notches => LandShape::Notches {
                count: self.si(valve::NOTCH_COUNT),
                angle: self.si(valve::NOTCH_ANGLE),
                length: self.si(valve::NOTCH_LENGTH),
            },
            ValveLand::Table => LandShape::Table(self.land_table.curve()?),
        };
        Ok(MeteringLand {
            shape,
            diameter: self.si(valve::SPOOL_DIAMETER),
            overlap: self.si(valve::OVERLAP),
            port_area: self.si(valve::PORT_AREA),
        })
    }

    fn spool_friction(&self) -> Friction {
        let coulomb = self.si(valve::COULOMB_FRICTION);
        match self.chosen::<ValveFriction>() {
            ValveFriction::Smooth => Friction::Smooth {
                coulomb,
                velocity: self.si(valve::FRICTION_VELOCITY),
            },
            ValveFriction::Bristle => Friction::Bristle(Bristle {
                coulomb,
                breakaway: self.si(valve::BREAKAWAY_FRICTION),
                stribeck_velocity: self.si(valve::STRIBECK_VELOCITY),
                stiffness: self.si(valve::BRISTLE_STIFFNESS),
                damping: self.si(valve::BRISTLE_DAMPING),
                viscous: self.si(valve::BRISTLE_VISCOUS),
            }),
        }
    }
}

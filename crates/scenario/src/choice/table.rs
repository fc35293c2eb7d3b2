//! The table of choices.

use super::{Choice, ChoiceOption, Condition, Options, when};

/// Writes the enum of ids, one enum of options for each choice, and the table.
macro_rules! choices {
    ($(
        $name:ident $path:literal $label:literal, default $default:ident, when $when:expr,
        $note:literal
        { $( $variant:ident $key:literal $option_label:literal $option_note:literal; )* }
    )*) => {
        /// Every choice of the circuit file.
        #[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
        pub enum ChoiceId { $( #[doc = $label] $name ),* }

        /// The table of choices, in the order of [`ChoiceId`].
        pub static CHOICES: &[Choice] = &[ $( Choice {
            id: ChoiceId::$name,
            path: $path,
            label: $label,
            note: $note,
            options: &[ $( ChoiceOption {
                key: $key, label: $option_label, note: $option_note,
            } ),* ],
            default: $name::$default as u8,
            when: $when,
        } ),* ];

        $(
            #[doc = $note]
            #[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
            #[repr(u8)]
            pub enum $name { $( #[doc = $option_note] $variant ),* }

            impl Options for $name {
                const ID: ChoiceId = ChoiceId::$name;
                const ALL: &'static [Self] = &[ $( Self::$variant ),* ];
            }
        )*
    };
}

const ALWAYS: &[Condition] = &[];
const WITH_STEERING_UNIT: &[Condition] = &[when(
    ChoiceId::SteeringKind,
    &[SteeringKind::SteeringUnit as u8],
)];

choices! {
    PrimeMoverKind "prime_mover.kind" "Prime mover", default SpeedProfile, when ALWAYS,
    "What turns the pump." {
        SpeedProfile "speed profile" "Speed profile"
            "The manoeuvre gives the speed, whatever the pump asks for.";
        Governed "governed" "Governed engine"
            "The manoeuvre gives the set speed; the speed sags under load and may stall.";
    }
    OilViscosity "oil.viscosity" "Viscosity given by", default TwoPoints, when ALWAYS,
    "How the oil's viscosity over temperature is given." {
        TwoPoints "two points" "Two points" "Viscosity at 40 degC and at 100 degC.";
        IsoGrade "ISO grade" "ISO grade"
            "Viscosity grade of ISO 3448 and viscosity index of ASTM D2270.";
    }
    PumpCondition "pump.condition" "Pump condition", default WearFactor, when ALWAYS,
    "How the present slip of the pump is given." {
        WearFactor "wear factor" "Wear factor" "The slip of the new pump times a factor.";
        MeasuredEfficiency "measured efficiency" "Measured efficiency"
            "A volumetric efficiency measured on the machine, with the point of measurement.";
    }
    PumpRipple "pump.ripple" "Delivery ripple", default None, when ALWAYS,
    "Ripple of the delivery; costs about ten times the steps of a run." {
        None "none" "None" "The mean delivery.";
        Gear "gear" "Gear pump" "Parabolic arcs of an external gear pump.";
        Piston "piston" "Piston pump" "Half-sine strokes of a piston pump.";
    }
    PumpInlet "pump.inlet" "Pump inlet", default Flooded, when ALWAYS,
    "What feeds the pump." {
        Flooded "flooded" "Flooded" "Tank pressure at the inlet, always filled.";
        SuctionLine "suction line" "Suction line"
            "A hose with strainer; the pump fills less when its inlet pressure falls.";
    }
    ValveLand "valve.land" "Shape of the excess land", default Chamfer, when ALWAYS,
    "How the opening to the excess port grows with travel." {
        Chamfer "chamfer" "Chamfer" "A conical chamfer, then the sharp edge.";
        SharpEdge "sharp edge" "Sharp edge" "The sharp edge around the whole spool.";
        RoundHoles "round holes" "Round holes" "Round holes in the sleeve.";
        Notches "notches" "Notches" "V-shaped notches, then the sharp edge.";
        Table "table" "Table" "Area over opening travel from a table.";
    }
    ValveFriction "valve.friction" "Spool friction", default Smooth, when ALWAYS,
    "The law of the spool's dry friction." {
        Smooth "smooth" "Smooth" "Cheap; creeps under a steady load, so it hides no hysteresis.";
        Bristle "bristle" "Bristle" "Really sticks: shows the hysteresis that gauges see.";
    }
    MainReliefKind "main_relief.kind" "Main relief", default Direct, when ALWAYS,
    "Relief valve at the inlet." {
        None "none" "None" "No relief at the inlet.";
        Direct "direct" "Direct-acting" "A direct-acting relief from inlet to tank.";
    }
    PriorityReliefKind "priority_relief.kind" "Priority relief", default OnPort, when ALWAYS,
    "Relief valve of the steering side." {
        None "none" "None" "The main relief limits the steering as well.";
        OnPort "on the priority port" "On the priority port"
            "A direct-acting relief from priority port to tank.";
        Pilot "pilot on the spring chamber" "Pilot on the spring chamber"
            "A small relief on the spring chamber; the disc hole is its metering restriction.";
    }
    SteeringKind "steering.kind" "Steering side", default SteeringUnit, when ALWAYS,
    "What the priority port feeds." {
        BenchThrottle "bench throttle" "Bench throttle"
            "A throttle behind a check valve into a given pressure, as on a test bench.";
        SteeringUnit "steering unit" "Steering unit"
            "Hydrostatic steering unit, open centre, with cylinder and tyre load.";
        Motor "motor" "Hydraulic motor" "A hydraulic motor with load as priority consumer.";
    }
    ShockReliefs "steering.shock_reliefs" "Shock reliefs", default None,
    when WITH_STEERING_UNIT,
    "Relief valves on both cylinder ports of the steering unit." {
        None "none" "None" "Not fitted.";
        Fitted "fitted" "Fitted" "One on each cylinder port, to tank.";
    }
    TyreFriction "steering.tyre_friction" "Tyre scrub friction", default Smooth,
    when WITH_STEERING_UNIT,
    "The law of the tyres' dry scrub friction." {
        Smooth "smooth" "Smooth" "Cheap; creeps under a steady load.";
        Bristle "bristle" "Bristle" "Really sticks and winds up.";
    }
    ExcessKind "excess.kind" "Excess side", default Motor, when ALWAYS,
    "What the excess port feeds." {
        Tank "tank" "To tank" "An orifice to the return.";
        BenchThrottle "bench throttle" "Bench throttle"
            "A throttle behind a check valve into a given pressure, as on a test bench.";
        Motor "motor" "Hydraulic motor" "A hydraulic motor with load behind an on/off valve.";
        LiftCylinder "lift cylinder" "Lift cylinder"
            "A double-acting cylinder with a load behind a directional valve.";
        Blocked "blocked" "Blocked" "Nothing: the port is plugged.";
    }
    ExcessReliefKind "excess_relief.kind" "Excess relief", default None, when ALWAYS,
    "Relief valve at the excess port." {
        None "none" "None" "No relief at the excess port.";
        Direct "direct" "Direct-acting" "A direct-acting relief from excess port to tank.";
    }
    ReturnKind "return_line.kind" "Return line", default Constant, when ALWAYS,
    "The way back to tank." {
        Constant "constant" "Constant back pressure" "One back pressure, whatever flows.";
        Restricted "restricted" "Filter and cooler"
            "A node behind filter and cooler; back pressure follows the flow.";
    }
    StartKind "start.kind" "Start of the run", default Settled, when ALWAYS,
    "The state that a run starts from." {
        Settled "settled" "Settled" "At rest under the first inputs, as on a machine that idles.";
        Cold "cold" "Cold" "All pressures zero, spool sprung shut, everything standing still.";
        FromState "from state" "From a saved state" "A state that an earlier run saved.";
    }
    SolverMethod "solver.method" "Solver method", default Bdf, when ALWAYS,
    "The method of integration." {
        Bdf "bdf" "BDF" "Backward differentiation, orders 1 to 5: the quickest in most runs.";
        Esdirk34 "esdirk34" "ESDIRK 3(4)"
            "Singly diagonally implicit Runge-Kutta: better where the circuit rings.";
    }
}

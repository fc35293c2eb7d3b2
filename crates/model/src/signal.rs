//! Signals: every flow, force, opening and power that the equations compute on the way.
//!
//! The equations hand each signal to an [`Observer`] at the place where they use it, so a plotted
//! flow can never differ from the integrated one. The right-hand side passes [`Unobserved`],
//! which compiles to nothing.

use crate::quantity::Quantity;
use crate::real::Real;

macro_rules! signals {
    ($($variant:ident $name:literal $quantity:ident $label:literal),* $(,)?) => {
        /// A named result of the equations beside the states.
        #[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord)]
        pub enum Signal {
            $(#[doc = $label] $variant),*
        }

        impl Signal {
            /// Every signal, in order.
            pub const ALL: &'static [Self] = &[$(Self::$variant),*];

            /// Short unique name, used in files: `q_pump`.
            #[must_use]
            pub fn name(self) -> &'static str {
                match self { $(Self::$variant => $name),* }
            }

            /// What a person calls it.
            #[must_use]
            pub fn label(self) -> &'static str {
                match self { $(Self::$variant => $label),* }
            }

            /// Its kind of quantity.
            #[must_use]
            pub fn quantity(self) -> Quantity {
                match self { $(Self::$variant => Quantity::$quantity),* }
            }
        }
    };
}

signals! {
    EngineSpeed "n_engine" AngularVelocity "Engine speed",
    EngineSetSpeed "n_set" AngularVelocity "Set speed of the prime mover",
    WheelRate "w_wheel" AngularVelocity "Steering wheel rate, commanded",
    WheelRateEffective "w_eff" AngularVelocity "Steering wheel rate, reached",
    WheelShortfall "w_short" AngularVelocity "Steering wheel shortfall",
    ExternalForce "f_ext" Force "External force on the steering cylinder",
    ExcessCommand "u_ex" Ratio "Command of the excess consumer",
    PriorityCommand "u_pri" Ratio "Command of the priority consumer",
    BenchArea "a_bench" Area "Bench throttle area on the priority port",
    BenchPressure "p_bench" Pressure "Pressure behind the bench throttle, priority port",
    ExcessBenchPressure "p_ex_bench" Pressure "Pressure behind the bench throttle, excess port",

    PumpFlow "q_pump" Flow "Pump flow",
    PumpSlip "q_slip" Flow "Pump slip",
    PumpFill "pump_fill" Ratio "Filling of the pump",
    SuctionFlow "q_suction" Flow "Suction line flow",
    FixedOrificeFlow "q_o" Flow "Fixed orifice flow",
    PriorityHolesFlow "q_c" Flow "Priority holes flow",
    PriorityFlow "q_priority" Flow "Priority flow",
    ExcessFlow "q_excess" Flow "Excess flow",
    LandLeakage "q_land_leak" Flow "Leakage over the closed land",
    HeadHoleFlow "q_head" Flow "Head hole flow",
    DiscHoleFlow "q_disc" Flow "Disc hole flow",
    HeadEndLeakage "q_lh" Flow "Leakage into the head end",
    SpringEndLeakage "q_ls" Flow "Leakage into the spring end",
    MainReliefFlow "q_main" Flow "Main relief flow",
    PriorityReliefFlow "q_pri_relief" Flow "Priority relief flow",
    PilotReliefFlow "q_pilot" Flow "Pilot relief flow",
    ExcessReliefFlow "q_ex_relief" Flow "Excess relief flow",
    LineFlow "q_line" Flow "Priority line flow, valve end",
    LineEndFlow "q_line_end" Flow "Priority line flow, steering end",
    BenchFlow "q_bench" Flow "Bench throttle flow",
    NeutralBypassFlow "q_bypass" Flow "Steering unit neutral bypass flow",
    MeterFlow "q_meter" Flow "Steering unit metered flow",
    SteeringDemand "q_demand" Flow "Flow that the wheel asks for",
    SteeringReturnFlow "q_st_return" Flow "Return flow of the steering cylinder",
    SteeringUnitLeakage "q_su_leak" Flow "Internal leakage of the steering unit",
    SuctionCheckFlow "q_suction_checks" Flow "Flow through the steering suction checks",
    ShockReliefFlow "q_shock" Flow "Flow through the steering shock reliefs",
    PistonLeakage "q_piston" Flow "Leakage across the steering piston",
    PriorityMotorFlow "q_pri_motor" Flow "Flow through the priority motor",
    ExcessOutFlow "q_ex_out" Flow "Flow from the excess port to its consumer",
    MotorFlow "q_motor" Flow "Flow through the excess motor",
    AntiCavitationFlow "q_anti_cav" Flow "Anti-cavitation flow of the excess motor",
    LiftFlow "q_lift" Flow "Flow into the lift cylinder, cap end",
    ReturnFlow "q_return" Flow "Return flow to tank",

    LandArea "a_land" Area "Excess land opening",
    HolesArea "a_holes" Area "Priority holes opening",
    BypassArea "a_bypass" Area "Steering unit neutral bypass opening",
    MeterArea "a_meter" Area "Steering unit metering opening",
    MainReliefOpening "o_main" Ratio "Main relief opening",
    PriorityReliefOpening "o_pri" Ratio "Priority relief opening",
    ExcessReliefOpening "o_ex" Ratio "Excess relief opening",

    PressureMargin "p_margin" Pressure "Pressure margin over the fixed orifice",
    LinePressureDrop "p_line_drop" Pressure "Priority line pressure drop",
    SteeringLoadPressure "p_load" Pressure "Steering load pressure",

    SpringForce "f_spring" Force "Spring force",
    EndPressureForce "f_ends" Force "Pressure force on the spool ends",
    ExcessJetForce "f_jet_ex" Force "Jet force of the excess land",
    PriorityJetForce "f_jet_pri" Force "Jet force of the priority holes",
    TransientJetForce "f_jet_dyn" Force "Transient jet force",
    SpoolFriction "f_fric" Force "Spool dry friction",
    SpoolViscous "f_visc" Force "Spool viscous force",
    StopForce "f_stop" Force "Spool end stop force",
    SpoolForce "f_spool" Force "Resultant force on the spool",
    CylinderForce "f_cyl" Force "Steering cylinder force",
    TyreForce "f_tyre" Force "Tyre and friction force on the steering cylinder",
    LiftForce "f_lift" Force "Lift cylinder force",

    PumpTorque "t_pump" Torque "Pump torque",
    EngineTorque "t_engine" Torque "Prime mover torque",
    MotorTorque "t_motor" Torque "Excess motor torque",
    MotorLoadTorque "t_load" Torque "Load torque on the excess motor",

    PumpShaftPower "w_shaft" Power "Pump shaft power",
    PumpPower "w_pump" Power "Pump hydraulic power",
    SteeringPower "w_steering" Power "Power at the priority port",
    ExcessPower "w_excess" Power "Power at the excess port",
    FixedOrificeLoss "l_orifice" Power "Loss in the fixed orifice",
    HolesLoss "l_holes" Power "Loss in the priority holes",
    LandLoss "l_land" Power "Loss over the excess land",
    DampingLoss "l_damping" Power "Loss in damping holes and end lands",
    ReliefLoss "l_relief" Power "Loss in the relief valves",
    LineLoss "l_line" Power "Loss in the priority line",
    SteeringLoss "l_steering" Power "Loss on the steering side",
    ConsumerLoss "l_consumer" Power "Loss on the excess side",
    ReturnLoss "l_return" Power "Loss in suction and return",
    FrictionLoss "l_friction" Power "Mechanical friction",
    JetExchange "l_jet" Power "Work of jet forces on the spool",
    WorkOut "w_out" Power "Work done on loads",
    HeatPower "w_heat" Power "Power turned to heat",

    VolumeIn "audit_v_in" Flow "Audit: volume in",
    VolumeOut "audit_v_out" Flow "Audit: volume out",
    EnergyIn "audit_e_in" Power "Audit: power in",
    EnergyLost "audit_e_lost" Power "Audit: power lost",
}

/// Takes the signals as the equations compute them.
pub trait Observer<S: Real> {
    /// Whether anything is kept; equations skip work that only signals need when this is false.
    const ACTIVE: bool;

    /// Takes the value of one signal, replacing an earlier one.
    fn put(&mut self, signal: Signal, value: S);

    /// Adds to a signal that several parts contribute to.
    fn add(&mut self, signal: Signal, value: S);
}

/// Keeps nothing.
#[derive(Debug, Clone, Copy, Default)]
pub struct Unobserved;

impl<S: Real> Observer<S> for Unobserved {
    const ACTIVE: bool = false;

    #[inline(always)]
    fn put(&mut self, _signal: Signal, _value: S) {}

    #[inline(always)]
    fn add(&mut self, _signal: Signal, _value: S) {}
}

/// Keeps every signal of one evaluation, SI.
#[derive(Debug, Clone, PartialEq)]
pub struct Readings {
    values: Vec<f64>,
    seen: Vec<bool>,
}

impl Default for Readings {
    fn default() -> Self {
        Self {
            values: vec![0.0; Signal::ALL.len()],
            seen: vec![false; Signal::ALL.len()],
        }
    }
}

impl Readings {
    /// The value of a signal; 0 where the circuit has no such part.
    #[must_use]
    pub fn get(&self, signal: Signal) -> f64 {
        self.values[signal as usize]
    }

    /// Whether the circuit has such a part.
    #[must_use]
    pub fn has(&self, signal: Signal) -> bool {
        self.seen[signal as usize]
    }

    /// Forgets the values, keeps the memory.
    pub fn clear(&mut self) {
        self.values.fill(0.0);
        self.seen.fill(false);
    }
}

impl Observer<f64> for Readings {
    const ACTIVE: bool = true;

    #[inline(always)]
    fn put(&mut self, signal: Signal, value: f64) {
        self.values[signal as usize] = value;
        self.seen[signal as usize] = true;
    }

    #[inline(always)]
    fn add(&mut self, signal: Signal, value: f64) {
        self.values[signal as usize] += value;
        self.seen[signal as usize] = true;
    }
}

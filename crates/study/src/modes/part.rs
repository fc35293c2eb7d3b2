//! Parts of a circuit that take part in a mode.

use serde::Serialize;

/// A part of a circuit, as far as states belong to it.
#[derive(Debug, Clone, Copy, PartialEq, Eq, Hash, PartialOrd, Ord, Serialize)]
#[serde(rename_all = "kebab-case")]
#[allow(missing_docs, reason = "`label` says what each is")]
pub enum Part {
    Spool,
    HeadEnd,
    SpringEnd,
    Bore,
    Inlet,
    MainRelief,
    PriorityRelief,
    PriorityPort,
    PriorityLine,
    SteeringSupply,
    SteeringUnit,
    SteeringCylinder,
    PriorityMotor,
    ExcessPort,
    ExcessMotor,
    LiftCylinder,
    ExcessRelief,
    Return,
    Suction,
    Engine,
    Other,
}

impl Part {
    /// The part that a state belongs to, by the state's short name.
    #[must_use]
    pub fn of_state(name: &str) -> Self {
        match name {
            "x" | "v" | "z" => Self::Spool,
            "p_h" => Self::HeadEnd,
            "p_s" => Self::SpringEnd,
            "p_b" => Self::Bore,
            "p_in" => Self::Inlet,
            "y_main" => Self::MainRelief,
            "y_pri" => Self::PriorityRelief,
            "p_c" => Self::PriorityPort,
            "p_su" => Self::SteeringSupply,
            "d" => Self::SteeringUnit,
            "p_A" | "p_B" | "y_c" | "v_c" | "z_t" => Self::SteeringCylinder,
            "p_pm" | "w_pm" => Self::PriorityMotor,
            "p_e" => Self::ExcessPort,
            "p_m" | "w_m" => Self::ExcessMotor,
            "p_cap" | "p_rod" | "y_l" | "v_l" => Self::LiftCylinder,
            "y_exr" => Self::ExcessRelief,
            "p_ret" => Self::Return,
            "p_suc" | "q_suc" => Self::Suction,
            "w_eng" => Self::Engine,
            _ if name.starts_with("q_l") || name.starts_with("p_l") => Self::PriorityLine,
            _ => Self::Other,
        }
    }

    /// What a person calls it.
    #[must_use]
    pub fn label(self) -> &'static str {
        match self {
            Self::Spool => "spool",
            Self::HeadEnd => "head-end chamber",
            Self::SpringEnd => "spring-end chamber",
            Self::Bore => "bore",
            Self::Inlet => "inlet volume",
            Self::MainRelief => "main relief",
            Self::PriorityRelief => "priority relief",
            Self::PriorityPort => "priority port",
            Self::PriorityLine => "priority line",
            Self::SteeringSupply => "steering supply",
            Self::SteeringUnit => "steering unit",
            Self::SteeringCylinder => "steering cylinder",
            Self::PriorityMotor => "priority motor",
            Self::ExcessPort => "excess port volume",
            Self::ExcessMotor => "excess motor",
            Self::LiftCylinder => "lift cylinder",
            Self::ExcessRelief => "excess relief",
            Self::Return => "return line",
            Self::Suction => "suction line",
            Self::Engine => "prime mover",
            Self::Other => "other states",
        }
    }
}

/// How much a part takes part in a mode.
#[derive(Debug, Clone, Copy, PartialEq, Serialize)]
pub struct Share {
    /// The part.
    pub part: Part,
    /// Its share; the shares of a mode add up to 1.
    pub share: f64,
}

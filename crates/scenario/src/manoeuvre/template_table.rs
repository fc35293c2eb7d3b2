//! The table of templates. Defaults are invented to suit the orchard carrier.

use helmsplit_model::Input;
use helmsplit_model::Quantity::{self, AngularVelocity, Count, Force, Ratio, Time};

use super::{Template, TemplateParameter};
use crate::parameter::{Range, over, within};

macro_rules! templates {
    ($( $kind:ident $key:literal $label:literal drives $input:ident, $note:literal,
        [ $( $row:expr ),* $(,)? ]; )*) => {
        /// Which ready manoeuvre.
        #[derive(Debug, Clone, Copy, PartialEq, Eq, Hash)]
        pub enum TemplateKind { $( #[doc = $note] $kind ),* }

        /// Every template.
        pub static TEMPLATES: &[Template] = &[ $( Template {
            kind: TemplateKind::$kind,
            key: $key,
            label: $label,
            note: $note,
            drives: Input::$input,
            parameters: &[ AT, $( $row ),* ],
        } ),* ];
    };
}

const fn row(
    name: &'static str,
    label: &'static str,
    quantity: Quantity,
    default: &'static str,
    allowed: Range,
    note: &'static str,
) -> TemplateParameter {
    TemplateParameter {
        name,
        label,
        quantity,
        default,
        allowed,
        note,
    }
}

const AT: TemplateParameter = row(
    "at",
    "Starts at",
    Time,
    "1 s",
    within(0.0, 3600.0),
    "Time at which it begins.",
);
const WHEEL: Range = within(-400.0, 400.0);
const WHEEL_RAMP: TemplateParameter = row(
    "ramp",
    "Ramp",
    Time,
    "50 ms",
    over(0.0, 60_000.0),
    "Time in which the rate changes.",
);
const ENGINE: Range = within(0.0, 20000.0);

templates! {
    WheelStep "wheel step" "Wheel step" drives WheelRate,
    "Turns the wheel at a steady rate, then stops.", [
        row("rate", "Wheel rate", AngularVelocity, "90 rpm", WHEEL,
            "Rate of turning; negative the other way."),
        row("turn", "Turning time", Time, "1 s", over(0.0, 3600.0),
            "From the start of the first ramp to the start of the last."),
        WHEEL_RAMP,
    ];
    WheelReversal "wheel reversal" "Wheel reversal" drives WheelRate,
    "Turns the wheel one way, then at once the other way.", [
        row("rate", "Wheel rate", AngularVelocity, "90 rpm", WHEEL, "Rate of the first turn."),
        row("turn", "Turning time each way", Time, "0.8 s", over(0.0, 3600.0),
            "Time for each way, its first ramp included."),
        WHEEL_RAMP,
    ];
    SlowLockToLock "slow lock to lock" "Slow lock to lock" drives WheelRate,
    "From the middle slowly to one lock, across to the other, and back to the middle.", [
        row("rate", "Wheel rate", AngularVelocity, "20 rpm", WHEEL, "Rate of turning."),
        row("turns", "Turns from lock to lock", Ratio, "4", over(0.0, 20.0),
            "Turns of the wheel from one lock to the other."),
        row("rest", "Rest at the locks", Time, "0.5 s", within(0.0, 600.0),
            "Pause before the wheel turns back."),
        WHEEL_RAMP,
    ];
    HoldAtLock "hold at the lock" "Hold at the lock" drives WheelRate,
    "Turns the wheel to the lock and keeps pulling on it.", [
        row("rate", "Wheel rate", AngularVelocity, "90 rpm", WHEEL, "Rate on the way to the lock."),
        row("to_lock", "Time to the lock", Time, "1.5 s", over(0.0, 3600.0),
            "Time of turning before the lock should be met."),
        row("pull", "Pull on the wheel", AngularVelocity, "30 rpm", WHEEL,
            "Rate that the driver keeps asking for at the lock."),
        row("hold", "Holding time", Time, "2 s", over(0.0, 3600.0),
            "Time for which the driver pulls at the lock."),
        WHEEL_RAMP,
    ];
    SineSteering "sine steering" "Sine steering" drives WheelRate,
    "Swings the wheel to and fro.", [
        row("rate", "Greatest wheel rate", AngularVelocity, "60 rpm", WHEEL,
            "Amplitude of the wheel rate."),
        row("period", "Period", Time, "2 s", over(0.0, 600.0), "Time of one swing to and fro."),
        row("cycles", "Cycles", Count, "3", within(1.0, 1000.0), "Number of swings."),
        row("points", "Breakpoints in a cycle", Count, "24", within(8.0, 200.0),
            "Straight pieces that draw one swing."),
    ];
    EngineRunUp "engine run-up" "Engine run-up" drives EngineSpeed,
    "Brings the engine to a higher speed.", [
        row("to", "To speed", AngularVelocity, "2400 rpm", ENGINE, "Speed at the end."),
        row("ramp", "Ramp", Time, "1 s", over(0.0, 600.0), "Time in which the speed changes."),
    ];
    LugDown "lug-down to idle" "Lug-down to idle" drives EngineSpeed,
    "Lets the engine drop to idle.", [
        row("to", "To speed", AngularVelocity, "900 rpm", ENGINE, "Speed at the end."),
        row("ramp", "Ramp", Time, "0.5 s", over(0.0, 600.0), "Time in which the speed changes."),
    ];
    ConsumerOn "excess consumer on" "Excess consumer on" drives ExcessCommand,
    "Switches the excess consumer on.", [
        row("command", "Command", Ratio, "1", within(-1.0, 1.0), "Command once it is on."),
        row("ramp", "Ramp", Time, "20 ms", over(0.0, 60_000.0), "Time of switching."),
    ];
    ConsumerOff "excess consumer off" "Excess consumer off" drives ExcessCommand,
    "Switches the excess consumer off.", [
        row("ramp", "Ramp", Time, "20 ms", over(0.0, 60_000.0), "Time of switching."),
    ];
    PortBlocked "excess port blocked" "Excess port blocked" drives ExcessCommand,
    "Shuts the excess consumer off suddenly and opens it again.", [
        row("hold", "Blocked for", Time, "1 s", over(0.0, 3600.0), "Time until it opens again."),
        row("ramp", "Ramp", Time, "5 ms", over(0.0, 60_000.0), "Time of shutting and opening."),
    ];
    KerbStrike "kerb strike" "Kerb strike" drives ExternalForce,
    "A sudden force on the steering cylinder.", [
        row("force", "Force", Force, "20 kN", within(-5000.0, 5000.0),
            "Greatest force, against positive travel."),
        row("rise", "Rise", Time, "10 ms", over(0.0, 60_000.0), "Time of rising."),
        row("hold", "Hold", Time, "40 ms", within(0.0, 60_000.0), "Time at the greatest force."),
        row("fall", "Fall", Time, "100 ms", over(0.0, 60_000.0), "Time of falling back."),
    ];
    ColdStart "cold start" "Cold start" drives EngineSpeed,
    "Cranks the engine from standstill and lets it catch; the oil's temperature is set there.", [
        row("cranking", "Cranking speed", AngularVelocity, "180 rpm", ENGINE,
            "Speed on the starter."),
        row("crank_for", "Cranking time", Time, "0.8 s", over(0.0, 600.0),
            "Time on the starter, its ramp included."),
        row("idle", "Idle speed", AngularVelocity, "900 rpm", ENGINE, "Speed once it runs."),
        row("ramp", "Ramp", Time, "0.4 s", over(0.0, 600.0),
            "Time of each change of speed."),
    ];
}

impl TemplateKind {
    /// The row of the table.
    #[must_use]
    pub fn template(self) -> &'static Template {
        &TEMPLATES[self as usize]
    }

    /// How the circuit file spells it.
    #[must_use]
    pub fn key(self) -> &'static str {
        self.template().key
    }

    /// The template that the circuit file spells so.
    #[must_use]
    pub fn from_key(key: &str) -> Option<Self> {
        TEMPLATES
            .iter()
            .find(|t| t.key == key.trim())
            .map(|t| t.kind)
    }
}

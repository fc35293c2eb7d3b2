//! Frequency response of an equilibrium: how a small steady vibration at one place shows at
//! another, and where the ripple of the pump falls.

mod excitation;
mod outputs;
mod response;
mod ripple;

pub use excitation::Excitation;
pub use response::{FrequencyResponse, frequency_response, spread_frequencies};
pub use ripple::{LIGHT, RippleBand, RippleClearance, ripple_bands, ripple_clearance};

pub(crate) use ripple::{clearance, strokes};

//! A circuit's hash: equal for equal circuits, however they are written.

use std::fmt::Write as _;

use helmsplit_model::Input;
use sha2::{Digest, Sha256};

use crate::choice::{CHOICES, ValveLand};
use crate::parameter::parameters;
use crate::scenario::Scenario;

/// Told apart from hashes of later versions of this scheme.
const SCHEME: &str = "helmsplit circuit 1";

impl Scenario {
    /// SHA-256 over everything that a run and its checks depend on, in hexadecimal: the choices
    /// that matter, the bits of every value in use, and the inputs over time.
    ///
    /// Units, comments, notes, unused values and the way a manoeuvre is written do not count.
    #[must_use]
    pub fn hash(&self) -> String {
        let mut sum = Sum(Sha256::new());
        sum.text(SCHEME);
        for choice in CHOICES.iter().filter(|choice| self.uses_choice(choice.id)) {
            sum.text(choice.path);
            sum.text(self.option_key(choice.id));
        }
        sum.text(self.start_state.as_deref().unwrap_or(""));
        for row in parameters().iter().filter(|row| self.uses(row.id)) {
            sum.text(row.path);
            sum.number(self.si(row.id));
        }
        if self.chosen::<ValveLand>() == ValveLand::Table {
            sum.pairs(self.land_table.points.iter().map(|(z, a)| (z.si(), a.si())));
        }
        // A manoeuvre that does not expand is no circuit to run; its error text stands for it.
        match self.manoeuvre.profiles() {
            Ok(profiles) => {
                for input in Input::ALL {
                    sum.pairs(profiles.get(input).points().iter().copied());
                }
            }
            Err(findings) => sum.text(&findings.to_string()),
        }
        sum.hexadecimal()
    }
}

/// Takes parts with their lengths, so that no two lists of parts look the same.
struct Sum(Sha256);

impl Sum {
    fn text(&mut self, text: &str) {
        self.0.update((text.len() as u64).to_le_bytes());
        self.0.update(text.as_bytes());
    }

    fn number(&mut self, number: f64) {
        // Both zeros are one number.
        self.0.update((number + 0.0).to_bits().to_le_bytes());
    }

    fn pairs(&mut self, pairs: impl Iterator<Item = (f64, f64)> + Clone) {
        self.0.update((pairs.clone().count() as u64).to_le_bytes());
        for (first, second) in pairs {
            self.number(first);
            self.number(second);
        }
    }

    fn hexadecimal(self) -> String {
        let mut text = String::with_capacity(64);
        for byte in self.0.finalize() {
            // Writing to a string cannot fail.
            let _ = write!(text, "{byte:02x}");
        }
        text
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::UnitSystem;

    #[test]
    fn units_and_words_do_not_count_but_values_do() {
        let mut scenario = Scenario::default();
        let before = scenario.hash();
        assert_eq!(before.len(), 64, "sha-256 in hexadecimal");
        scenario.rewrite_units(UnitSystem::Us);
        scenario.notes = "looked at again".to_owned();
        assert_eq!(scenario.hash(), before, "same circuit in other units");
        scenario.set("pump.teeth", "10").unwrap();
        assert_eq!(scenario.hash(), before, "a value without effect");
        scenario.set("pump.displacement", "21 cm3/rev").unwrap();
        let other = scenario.hash();
        assert_ne!(other, before, "another pump");
        scenario.set("priority_relief.kind", "none").unwrap();
        assert_ne!(scenario.hash(), other, "another choice");
    }
}

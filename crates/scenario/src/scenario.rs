//! A scenario: every value of a circuit file, with the choices and the manoeuvre.

use std::sync::LazyLock;

use crate::choice::{CHOICES, ChoiceId, Condition, Options};
use crate::finding::Finding;
use crate::land_table::LandTable;
use crate::manoeuvre::Manoeuvre;
use crate::nearest;
use crate::parameter::{Parameter, ParameterId, parameters};
use crate::value::{Allowed, Value};

/// One circuit with its manoeuvre, limits and settings.
///
/// Holds a value for every parameter of the table, used or not, so that switching a choice keeps
/// what was entered for the others.
#[derive(Debug, Clone, PartialEq)]
pub struct Scenario {
    /// Name for people.
    pub name: String,
    /// What to look at, in the user's words.
    pub notes: String,
    /// Inputs over time.
    pub manoeuvre: Manoeuvre,
    values: Vec<Value>,
    options: Vec<u8>,
    pub(crate) land_table: LandTable,
    /// File with the state to start from, relative to the circuit file; for `start.kind`
    /// "from state".
    pub start_state: Option<String>,
}

/// Every parameter at its default.
static DEFAULTS: LazyLock<Vec<Value>> = LazyLock::new(|| {
    let default = |row: &&'static Parameter| {
        Value::from_text(row.path, row.default, row.quantity)
            .unwrap_or_else(|finding| unreachable!("a test holds that defaults read: {finding}"))
    };
    parameters().iter().map(default).collect()
});

impl Default for Scenario {
    /// Every parameter and choice at its documented default, inputs at their resting level.
    fn default() -> Self {
        Self {
            name: "Unnamed circuit".to_owned(),
            notes: String::new(),
            manoeuvre: Manoeuvre::default(),
            values: DEFAULTS.clone(),
            options: CHOICES.iter().map(|choice| choice.default).collect(),
            land_table: LandTable::default(),
            start_state: None,
        }
    }
}

impl Scenario {
    /// The value of a parameter in SI.
    #[must_use]
    pub fn si(&self, id: ParameterId) -> f64 {
        self.values[id.index()].si()
    }

    /// The value of a parameter with its text.
    #[must_use]
    pub fn value(&self, id: ParameterId) -> &Value {
        &self.values[id.index()]
    }

    /// Sets a parameter in SI. It keeps the unit it was written in.
    ///
    /// # Errors
    /// A finding when the value is not allowed; nothing is changed then.
    pub fn set_si(&mut self, id: ParameterId, si: f64) -> Result<(), Finding> {
        let value = Value::from_si(si, self.values[id.index()].unit());
        self.put(id, value)
    }

    /// Sets a parameter from text such as `3.5 mm`.
    ///
    /// # Errors
    /// A finding when the text is no quantity of the right kind or not allowed; nothing is
    /// changed then.
    pub fn set_text(&mut self, id: ParameterId, text: &str) -> Result<(), Finding> {
        let row = id.parameter();
        let value = Value::from_text(row.path, text, row.quantity)?;
        self.put(id, value)
    }

    fn put(&mut self, id: ParameterId, value: Value) -> Result<(), Finding> {
        let row = id.parameter();
        let allowed = Allowed {
            range: row.allowed,
            unit: row.unit(),
        };
        self.values[id.index()] = value.within(row.path, &allowed)?;
        Ok(())
    }

    /// Puts a parameter back to its default.
    pub fn reset(&mut self, id: ParameterId) {
        self.values[id.index()] = DEFAULTS[id.index()].clone();
    }

    /// Whether a parameter stands at its default.
    #[must_use]
    pub fn is_default(&self, id: ParameterId) -> bool {
        self.values[id.index()] == DEFAULTS[id.index()]
    }

    /// Position of the option that a choice stands at.
    #[must_use]
    pub fn option(&self, id: ChoiceId) -> u8 {
        self.options[id as usize]
    }

    /// The key of the option that a choice stands at, as the circuit file spells it.
    #[must_use]
    pub fn option_key(&self, id: ChoiceId) -> &'static str {
        id.choice().options[usize::from(self.option(id))].key
    }

    /// The option that a choice stands at, to `match` on.
    #[must_use]
    pub fn chosen<T: Options>(&self) -> T {
        T::ALL[usize::from(self.option(T::ID))]
    }

    /// Takes an option of a choice by its position.
    ///
    /// # Errors
    /// A finding when there is no such option.
    pub fn choose(&mut self, id: ChoiceId, option: u8) -> Result<(), Finding> {
        let choice = id.choice();
        if usize::from(option) >= choice.options.len() {
            let message = format!("option {option} does not exist");
            return Err(Finding::error(choice.path, message, options_hint(id)));
        }
        self.options[id as usize] = option;
        Ok(())
    }

    /// Takes an option of a choice by its key, such as `pilot on the spring chamber`.
    ///
    /// # Errors
    /// A finding that names the options.
    pub fn choose_key(&mut self, id: ChoiceId, key: &str) -> Result<(), Finding> {
        let choice = id.choice();
        match choice
            .options
            .iter()
            .position(|option| option.key == key.trim())
        {
            Some(place) => {
                // A choice has a handful of options.
                self.options[id as usize] = place as u8;
                Ok(())
            }
            None => {
                let near = nearest(key, choice.options.iter().map(|option| option.key));
                let hint = match near {
                    Some(near) => format!("did you mean \"{near}\"? {}", options_hint(id)),
                    None => options_hint(id),
                };
                Err(Finding::error(choice.path, "no such option", hint).with_value(key))
            }
        }
    }

    /// Travel and area of the land, for `valve.land` "table".
    #[must_use]
    pub fn land_table(&self) -> &LandTable {
        &self.land_table
    }

    /// The same, to edit: its own edits keep it a curve.
    pub fn land_table_mut(&mut self) -> &mut LandTable {
        &mut self.land_table
    }

    /// Whether all conditions hold under the present choices.
    #[must_use]
    pub fn meets(&self, conditions: &[Condition]) -> bool {
        conditions
            .iter()
            .all(|c| c.any_of.contains(&self.option(c.choice)))
    }

    /// Whether a parameter is used under the present choices.
    #[must_use]
    pub fn uses(&self, id: ParameterId) -> bool {
        self.meets(id.parameter().when)
    }

    /// Whether a choice matters under the present choices.
    #[must_use]
    pub fn uses_choice(&self, id: ChoiceId) -> bool {
        self.meets(id.choice().when)
    }

    /// Writes every parameter in the given unit system's units from now on; values stay.
    pub fn rewrite_units(&mut self, system: crate::UnitSystem) {
        for (value, row) in self.values.iter_mut().zip(parameters()) {
            *value = value.in_unit(crate::convert::display_unit(row, system));
        }
        self.land_table.rewrite_units(system);
        self.manoeuvre.rewrite_units(system);
    }
}

fn options_hint(id: ChoiceId) -> String {
    let keys: Vec<_> = id
        .choice()
        .options
        .iter()
        .map(|o| format!("\"{}\"", o.key))
        .collect();
    format!("options: {}", keys.join(", "))
}

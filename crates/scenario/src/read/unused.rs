//! Values of the file that the present choices do not use.

use std::collections::BTreeMap;

use super::Reader;
use crate::choice::ChoiceId;
use crate::finding::Finding;
use crate::parameter::ParameterId;

/// Names listed in a message; the rest is counted.
const LISTED: usize = 3;

impl Reader<'_> {
    /// One warning for each choice that leaves values of the file without effect.
    pub(super) fn unused(&mut self) {
        let mut idle: BTreeMap<ChoiceId, Vec<(usize, &'static str)>> = BTreeMap::new();
        for (path, at) in &self.places {
            let Some(id) = ParameterId::from_path(path) else {
                continue;
            };
            let row = id.parameter();
            let unmet = row
                .when
                .iter()
                .find(|condition| !self.scenario.meets(&[**condition]));
            if let Some(condition) = unmet {
                idle.entry(condition.choice)
                    .or_default()
                    .push((*at, row.path));
            }
        }
        for (choice, mut fields) in idle {
            fields.sort_unstable();
            let (at, first) = fields[0];
            let names: Vec<_> = fields.iter().take(LISTED).map(|(_, path)| *path).collect();
            let mut list = names.join(", ");
            if fields.len() > LISTED {
                list = format!("{list} and {} more", fields.len() - LISTED);
            }
            let verb = if fields.len() == 1 { "has" } else { "have" };
            let message = format!(
                "{list} {verb} no effect while {} is \"{}\"",
                choice.choice().path,
                self.scenario.option_key(choice)
            );
            let hint = "kept in case you switch back";
            self.push_at(Finding::warning(first, message, hint), at);
        }
    }
}

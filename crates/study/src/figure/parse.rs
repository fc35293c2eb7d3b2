//! Ids of figures.

use helmsplit_model::Circuit;
use helmsplit_scenario::nearest;

use super::{Figure, MAP_CHECKS, REST, REST_DAMPING, RUN_CHECKS, Statistic, trace_columns};
use crate::check::CheckId;

/// Why a text is no figure of a circuit.
#[derive(Debug, Clone, PartialEq, Eq, thiserror::Error)]
pub enum FigureError {
    /// There is no such figure.
    #[error("there is no figure \"{text}\"{}", did_you_mean(nearest))]
    Unknown {
        /// As written.
        text: String,
        /// The nearest figure, if one is near.
        nearest: Option<String>,
    },
    /// The balance of a run is no figure of a circuit.
    #[error("the check {0} is about the solver, not the circuit; `--figures` lists the figures")]
    NotOfTheCircuit(&'static str),
}

fn did_you_mean(nearest: &Option<String>) -> String {
    match nearest {
        Some(near) => format!("; did you mean {near}?"),
        None => "; `--figures` lists them".to_owned(),
    }
}

impl Figure {
    /// Reads an id: the name of a check (`overshoot`), or a state or signal with a statistic
    /// (`p_in.largest`), or at the equilibrium (`rest.p_in`, `rest.damping`).
    ///
    /// # Errors
    /// [`FigureError`] names the nearest id.
    pub fn parse(text: &str, circuit: &Circuit) -> Result<Self, FigureError> {
        let text = text.trim();
        if let Some(id) = CheckId::ALL.into_iter().find(|id| id.name() == text) {
            return if RUN_CHECKS.contains(&id) || MAP_CHECKS.contains(&id) {
                Ok(Self::Check(id))
            } else {
                Err(FigureError::NotOfTheCircuit(id.name()))
            };
        }
        if let Some(column) = text.strip_prefix(REST) {
            return at_rest(text, column, circuit);
        }
        let found = text.rsplit_once('.').and_then(|(column, statistic)| {
            let statistic = Statistic::ALL
                .into_iter()
                .find(|known| known.name() == statistic)?;
            trace_columns(circuit)
                .any(|(name, _, _)| name == column)
                .then(|| Self::Trace {
                    column: column.to_owned(),
                    statistic,
                })
        });
        found.ok_or_else(|| FigureError::Unknown {
            text: text.to_owned(),
            nearest: near(text, circuit),
        })
    }
}

fn at_rest(text: &str, column: &str, circuit: &Circuit) -> Result<Figure, FigureError> {
    if column == REST_DAMPING {
        return Ok(Figure::RestDamping);
    }
    let names = || trace_columns(circuit).map(|(name, _, _)| name);
    if names().any(|name| name == column) {
        return Ok(Figure::Rest {
            column: column.to_owned(),
        });
    }
    let near = nearest(column, names().chain([REST_DAMPING]));
    Err(FigureError::Unknown {
        text: text.to_owned(),
        nearest: near.map(|near| format!("{REST}{near}")),
    })
}

/// The nearest id. Of a trace, name and statistic are compared each alone.
fn near(text: &str, circuit: &Circuit) -> Option<String> {
    let columns = || trace_columns(circuit).map(|(name, _, _)| name);
    let (column, statistic) = text.rsplit_once('.').unwrap_or((text, "largest"));
    if !text.contains('.')
        && let Some(check) = nearest(
            text,
            RUN_CHECKS.iter().chain(&MAP_CHECKS).map(|id| id.name()),
        )
    {
        return Some(check.to_owned());
    }
    let column = nearest(column, columns())?;
    let statistic = nearest(statistic, Statistic::ALL.iter().map(|s| s.name()));
    Some(format!("{column}.{}", statistic.unwrap_or("largest")))
}

#[cfg(test)]
mod tests {
    use super::*;
    use helmsplit_scenario::Scenario;

    #[test]
    fn ids_are_read_back() {
        let circuit = Scenario::default().circuit().unwrap();
        for id in RUN_CHECKS.into_iter().chain(MAP_CHECKS) {
            let figure = Figure::parse(id.name(), &circuit).unwrap();
            assert_eq!(figure, Figure::Check(id), "{id:?}");
        }
        for (name, _, _) in trace_columns(&circuit) {
            let text = format!("rest.{name}");
            assert_eq!(
                Figure::parse(&text, &circuit).unwrap().to_string(),
                text,
                "at rest"
            );
            for statistic in Statistic::ALL {
                let text = format!("{name}.{}", statistic.name());
                let figure = Figure::parse(&text, &circuit).unwrap();
                assert_eq!(figure.to_string(), text, "{figure:?}");
            }
        }
    }

    #[test]
    fn slips_name_the_nearest() {
        let circuit = Scenario::default().circuit().unwrap();
        for (text, near) in [
            ("overshot", "overshoot"),
            ("p_inn.largest", "p_in.largest"),
            ("p_in.larges", "p_in.largest"),
            ("q_prioritty.mean", "q_priority.mean"),
            ("regulatoin", "regulation"),
            ("rest.dampin", "rest.damping"),
            ("rest.p_inn", "rest.p_in"),
        ] {
            let error = Figure::parse(text, &circuit).unwrap_err();
            assert!(error.to_string().contains(near), "{text}: {error}");
        }
        let error = Figure::parse("colour", &circuit).unwrap_err();
        assert!(error.to_string().contains("--figures"), "{error}");
    }
}

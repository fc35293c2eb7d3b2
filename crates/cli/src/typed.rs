//! What a person types on the command line beside the circuit: quantities, parameters, figures.

use helmsplit_model::{Circuit, Quantity};
use helmsplit_scenario::quantity_text::parse;
use helmsplit_scenario::{ParameterId, Scenario};
use helmsplit_study::figure::Figure;

use crate::exit::Failure;

/// A quantity of an option, SI.
pub(crate) fn quantity(text: &str, option: &str, quantity: Quantity) -> Result<f64, Failure> {
    let parsed = parse(text, quantity).map_err(|error| {
        let hint = error.hint();
        let hint = if hint.is_empty() {
            hint
        } else {
            format!("; {hint}")
        };
        Failure::Input(format!("{option} \"{text}\": {error}{hint}"))
    })?;
    Ok(parsed.si)
}

/// A quantity of an option, SI, or what stands in for it.
pub(crate) fn quantity_or(
    text: Option<&String>,
    option: &str,
    kind: Quantity,
    default: f64,
) -> Result<f64, Failure> {
    text.map_or(Ok(default), |text| quantity(text, option, kind))
}

/// A parameter by its path; an unknown one names the nearest.
pub(crate) fn parameter(path: &str, scenario: &Scenario) -> Result<ParameterId, Failure> {
    if let Some(id) = ParameterId::from_path(path.trim()) {
        return Ok(id);
    }
    // Asking for the value gives the finding with the nearest path; a choice has one, but is no
    // number.
    match scenario.get(path.trim()) {
        Err(finding) => Err(finding.into()),
        Ok(_) => Err(Failure::Input(format!(
            "{path} is no number; name a parameter with a quantity"
        ))),
    }
}

/// A figure by its id; an unknown one names the nearest.
pub(crate) fn figure(text: &str, circuit: &Circuit) -> Result<Figure, Failure> {
    Figure::parse(text, circuit).map_err(|error| Failure::Input(error.to_string()))
}

#[cfg(test)]
mod tests {
    use std::ffi::OsString;

    use super::*;
    use crate::exit::ExitStatus;

    /// Exit status of `helmsplit` with arguments.
    fn status(arguments: &[&str]) -> ExitStatus {
        let all = ["helmsplit"].iter().chain(arguments);
        crate::run(all.map(OsString::from), None)
    }

    #[test]
    fn slips_name_what_is_meant() {
        let scenario = Scenario::default();
        let circuit = scenario.circuit().unwrap();
        let error = figure("overshot", &circuit).unwrap_err().to_string();
        assert!(error.contains("did you mean overshoot"), "{error}");
        let error = parameter("valve.disc_hole_diametre", &scenario).unwrap_err();
        let error = error.to_string();
        assert!(error.contains("valve.disc_hole_diameter"), "{error}");
        let error = parameter("valve.land", &scenario).unwrap_err().to_string();
        assert!(error.contains("no number"), "{error}");
        let error = quantity("3 bar", "--target", Quantity::Flow).unwrap_err();
        let error = error.to_string();
        assert!(error.contains("--target \"3 bar\""), "{error}");
    }

    #[test]
    fn bad_input_ends_with_its_own_status() {
        let solve = ["solve-for", "frost_pruner", "--parameter"];
        let orifice = "valve.fixed_orifice_diameter";
        for rest in [
            &[
                "valve.fixed_orifice",
                "--figure",
                "overshoot",
                "--target",
                "20 %",
            ][..],
            &[orifice, "--figure", "overshot", "--target", "20 %"],
            &[orifice, "--figure", "audit", "--target", "0.3"],
            &[orifice, "--figure", "overshoot", "--target", "20 bar"],
            &[
                orifice,
                "--figure",
                "overshoot",
                "--target",
                "20 %",
                "--from",
                "5 mm",
                "--to",
                "4 mm",
            ],
            &[
                orifice,
                "--figure",
                "overshoot",
                "--target",
                "20 %",
                "--to",
                "4 m",
            ],
            &[
                "valve.notch_angle",
                "--figure",
                "overshoot",
                "--target",
                "20 %",
            ],
        ] {
            let all = [&solve[..], rest].concat();
            assert_eq!(status(&all), ExitStatus::BadInput, "{rest:?}");
        }
    }

    #[test]
    fn bad_demands_checks_and_figures_end_so_too() {
        for all in [
            &["size", "frost_pruner", "--turns", "0"][..],
            &["size", "frost_pruner", "--spring-drop", "6 mm"],
            &["size", "frost_pruner", "--axle-load", "20 kN"],
            &["mend", "frost_pruner", "--check", "overshot"],
            &["mend", "frost_pruner", "--check", "audit"],
            &[
                "mend",
                "frost_pruner",
                "--check",
                "overshoot",
                "--largest-factor",
                "1",
            ],
            &["influence", "frost_pruner", "--figure", "p_inn.largest"],
        ] {
            assert_eq!(status(all), ExitStatus::BadInput, "{all:?}");
        }
    }

    #[test]
    fn a_target_out_of_reach_is_bad_input() {
        let all = [
            "solve-for",
            "frost_pruner",
            "--set",
            "manoeuvre.duration=0.2 s",
            "--parameter",
            "valve.fixed_orifice_diameter",
            "--figure",
            "p_in.largest",
            "--target",
            "2000 bar",
            "--points",
            "3",
        ];
        assert_eq!(status(&all), ExitStatus::BadInput, "no root");
    }

    #[test]
    fn a_sizing_is_adopted_and_read_back() {
        let folder = tempfile::tempdir().unwrap();
        let file = folder.path().join("sized.circuit.ron");
        let path = file.to_str().unwrap();
        let all = ["size", "frost_pruner", "--turns", "4.5", "--adopt", path];
        assert_eq!(status(&all), ExitStatus::Done, "adopted");
        let (scenario, findings) = Scenario::load(&file);
        assert!(!findings.has_errors(), "{findings}");
        assert!(scenario.is_some(), "a circuit");
        assert_eq!(
            status(&all),
            ExitStatus::BadInput,
            "not over a file that is there"
        );
        let forced = [&all[..], &["--force"]].concat();
        assert_eq!(status(&forced), ExitStatus::Done, "unless told");
    }
}

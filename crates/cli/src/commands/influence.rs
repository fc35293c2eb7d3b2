//! Ranks the parameters by their influence on figures.

use helmsplit_model::Circuit;
use helmsplit_scenario::convert::display_unit;
use helmsplit_scenario::quantity_text::{Digits, text_from_si};
use helmsplit_scenario::write::save_atomically;
use helmsplit_study::Measure;
use helmsplit_study::figure::Figure;
use helmsplit_study::influence::{
    Influence, InfluenceError, Influences, influence as study, varied_parameters,
};
use helmsplit_view::{Column, TextTable, influence_scene, sensitivity_text, svg_from_scene};

use super::solve_for::ask;
use crate::exit::{ExitStatus, Failure};
use crate::input::{Loaded, load};
use crate::measure_text::measure;
use crate::output::print;
use crate::progress::studied;
use crate::study_args::InfluenceArguments;
use crate::study_json;
use crate::typed::{figure, parameter};
use crate::verdict::width;

pub(super) fn influence(arguments: &InfluenceArguments) -> Result<ExitStatus, Failure> {
    let loaded = load(&arguments.circuit)?;
    let scenario = &loaded.scenario;
    let circuit = scenario.circuit().map_err(Failure::Findings)?;
    let figures: Vec<Figure> = arguments
        .figures
        .iter()
        .map(|text| figure(text, &circuit))
        .collect::<Result<_, _>>()?;
    let mut parameters = Vec::new();
    for path in &arguments.parameters {
        parameters.push(parameter(path, scenario)?);
    }
    if parameters.is_empty() {
        parameters = varied_parameters(scenario);
    }
    let ask = ask(&loaded, arguments.at.as_deref())?;
    let found = studied(|watch| study(&ask, &figures, &parameters, watch));
    if found.cancelled {
        return Ok(ExitStatus::Cancelled);
    }
    if let [Err(error)] = found.figures.as_slice() {
        return Err(Failure::Input(error.to_string()));
    }
    let mut text = if arguments.json {
        study_json::influences(&scenario.name, &circuit, &found, arguments.circuit.units)?
    } else {
        report(&loaded, &circuit, &found, arguments)
    };
    if let Some(file) = &arguments.svg {
        let first = found.figures.first().and_then(|f| f.as_ref().ok());
        if let Some(first) = first {
            let title = format!("{}: {}", scenario.name, first.figure.label(&circuit));
            let scene = influence_scene(first, &title, arguments.most, arguments.circuit.units);
            let theme = arguments.theme.theme().load()?;
            save_atomically(file, &svg_from_scene(&scene, &theme, "influence"))?;
            if !arguments.json {
                text.push_str(&format!("\nWrote {}.\n", file.display()));
            }
        }
    }
    print(&text)?;
    Ok(ExitStatus::Done)
}

fn report(
    loaded: &Loaded,
    circuit: &Circuit,
    found: &Influences,
    arguments: &InfluenceArguments,
) -> String {
    let mut text = format!(
        "{} ({}), {} runs\nInfluence: per cent of the figure for one per cent of the parameter; of \
         its usual range where it says so.\n",
        loaded.scenario.name, loaded.source, found.runs
    );
    for one in &found.figures {
        text.push('\n');
        text.push_str(&table(one, circuit, arguments));
    }
    text
}

fn table(
    one: &Result<Influence, InfluenceError>,
    circuit: &Circuit,
    arguments: &InfluenceArguments,
) -> String {
    let units = arguments.circuit.units;
    let influence = match one {
        Ok(influence) => influence,
        Err(error) => return format!("{error}\n"),
    };
    let kind = influence.figure.quantity(circuit);
    let mut text = format!(
        "{} = {}: {}\n\n",
        influence.figure,
        measure(Measure::new(influence.base, kind), units),
        influence.figure.label(circuit)
    );
    let mut table = TextTable::new(vec![
        Column::left("parameter"),
        Column::right("value"),
        Column::right("influence"),
        Column::right("+-"),
        Column::wrapped("what"),
    ]);
    for row in influence.rows.iter().take(arguments.most) {
        let parameter = row.parameter.parameter();
        let unit = display_unit(parameter, units);
        let (uncertainty, what) = match &row.missing {
            Some(missing) => (String::new(), missing.to_string()),
            None => (
                format!("{:.2}", row.uncertainty),
                parameter.label.to_owned(),
            ),
        };
        table.push([
            parameter.path.to_owned(),
            text_from_si(row.value, unit, Digits::Significant(4)),
            sensitivity_text(row),
            uncertainty,
            what,
        ]);
    }
    text.push_str(&table.to_text(width()));
    let hidden = influence.rows.len().saturating_sub(arguments.most);
    if hidden > 0 {
        text.push_str(&format!("and {hidden} more, with less influence or none\n"));
    }
    text.push_str(&format!(
        "noise of the figure: {:.1e} of its value\n",
        influence.noise
    ));
    text
}

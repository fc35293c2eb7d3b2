//! Commands that can be found: those of the menus.

use helmsplit_scenario::UnitSystem;

use super::thing::{Findable, Thing, plain};
use crate::action::Action;
use crate::dialogs::Dialog;
use crate::drawing::Export;
use crate::export::{COPY_TABLE, COPY_VALUES, ExportKind};
use crate::kept::KeptAction;
use crate::menu;
use crate::settings::{Appearance, SCALES, Settings, units_name};

const GROUP: &str = "Command";

/// Every command, in the order of the menus.
pub(super) fn commands(findable: &Findable<'_>) -> Vec<Thing> {
    let (document, settings) = (findable.document, findable.settings);
    let mut commands: Vec<Thing> = menu::NAMED_PRESETS
        .iter()
        .map(|(preset, name)| {
            let label = format!("New circuit from preset, {name}");
            plain(&label, GROUP, Action::New(preset))
        })
        .collect();
    commands.push(plain("Open a circuit", GROUP, menu::open()));
    commands.push(plain("Save the circuit", GROUP, Action::Save));
    commands.push(plain("Save the circuit as", GROUP, menu::save_as(document)));
    for export in Export::ALL {
        let label = format!("Export, {}", export.name());
        commands.push(plain(&label, GROUP, menu::write_drawing(document, export)));
    }
    for kind in ExportKind::ALL {
        let label = format!("Export, {}", kind.item().trim_end_matches('.'));
        commands.push(plain(&label, GROUP, Action::AskExport(kind)));
    }
    commands.push(plain(COPY_VALUES, GROUP, Action::CopyValues));
    commands.push(plain(COPY_TABLE, GROUP, Action::CopyTable));
    let keep = Action::Kept(KeptAction::AskToKeep);
    commands.push(plain("Keep this run", GROUP, keep));
    for (label, step, action) in [
        ("Undo", document.undo_name(), Action::Undo),
        ("Redo", document.redo_name(), Action::Redo),
    ] {
        commands.push(Thing {
            shown: step.map_or_else(|| "nothing".to_owned(), str::to_owned),
            in_use: step.is_some(),
            ..plain(label, GROUP, action)
        });
    }
    commands.extend(view(settings));
    commands.push(plain("First steps", GROUP, Action::FirstSteps));
    let keys = Action::Show(Dialog::Keys);
    commands.push(plain("Keys and gestures", GROUP, keys));
    let about = Action::Show(Dialog::About);
    commands.push(plain("About and cautions", GROUP, about));
    commands.push(plain("Quit", GROUP, Action::Quit));
    commands
}

/// Units, appearance and scale.
fn view(settings: &Settings) -> Vec<Thing> {
    let now = |is_now: bool| if is_now { "now" } else { "" }.to_owned();
    let mut commands = Vec::new();
    for units in UnitSystem::ALL {
        let label = format!("Units, {}", units_name(units));
        commands.push(Thing {
            shown: now(settings.units == units),
            ..plain(&label, GROUP, Action::Units(units))
        });
    }
    for (appearance, name) in Appearance::ALL {
        let label = format!("Appearance, {}", name.to_lowercase());
        commands.push(Thing {
            shown: now(settings.appearance == appearance),
            ..plain(&label, GROUP, Action::Appearance(appearance))
        });
    }
    for scale in SCALES {
        let label = format!("Scale of the window, {scale} %");
        commands.push(Thing {
            shown: now(settings.scale == scale),
            ..plain(&label, GROUP, Action::Scale(scale))
        });
    }
    commands
}

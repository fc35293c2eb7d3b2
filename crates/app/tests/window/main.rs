//! The window, driven by the names of its controls, without display and GPU.

mod around_files;
mod cpu_renderer;
mod drawing;
mod editing;
mod exports;
mod files;
mod finding;
mod hints;
mod kept_runs;
mod keyboard;
mod lists;
mod looks;
mod manoeuvre;
mod menus;
mod names;
mod recovery;
mod rig;
mod seen;
mod states;
mod traces;
mod unit_words;
mod verdicts;

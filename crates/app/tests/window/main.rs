//! The window, driven by the names of its controls, without display and GPU.

mod around_files;
mod cpu_renderer;
mod drawing;
mod editing;
mod exports;
mod files;
mod kept_runs;
mod lists;
mod looks;
mod manoeuvre;
mod recovery;
mod rig;
mod traces;
mod verdicts;

//! The window, driven by the names of its controls, without display and GPU.

mod cpu_renderer;
mod drawing;
mod editing;
mod files;
mod looks;
mod rig;
mod verdicts;

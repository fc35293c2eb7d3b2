//! The order of the crates: each may use what stands before it and nothing behind it.

use std::collections::{BTreeMap, BTreeSet};
use std::process::Command;

use cargo_metadata::{DependencyKind, Metadata, MetadataCommand, PackageId};

/// Our crates in their order; a crate may use any before it. A new crate finds its place here.
const ORDER: [&str; 10] = [
    "helmsplit-model",
    "helmsplit-scenario",
    "helmsplit-sim",
    "helmsplit-study",
    "helmsplit-view",
    "helmsplit-raster",
    "helmsplit-app",
    "helmsplit-cli",
    "helmsplit",
    "helmsplit-acceptance",
];

/// Outside crates that name a decision which must stay in few hands, and who may depend on them
/// directly: the solver in `sim` alone, argument parsing in `cli` alone, windows in `app` alone,
/// which the command line never sees.
const RESERVED: [(&str, &[&str]); 4] = [
    ("diffsol", &["helmsplit-sim"]),
    ("clap", &["helmsplit-cli"]),
    ("eframe", &["helmsplit-app"]),
    ("helmsplit-app", &["helmsplit"]),
];

/// The platform that the tests run on, as cargo names it.
fn host() -> String {
    let cargo = std::env::var_os("CARGO").unwrap_or_else(|| "cargo".into());
    let output = Command::new(cargo)
        .arg("-vV")
        .output()
        .expect("cargo tells its version");
    String::from_utf8_lossy(&output.stdout)
        .lines()
        .find_map(|line| line.strip_prefix("host: "))
        .expect("cargo names its host")
        .to_owned()
}

/// The workspace as locked. Only this platform's crates: those of others need not be on the
/// machine.
fn metadata() -> Metadata {
    let options = ["--locked", "--filter-platform", &host()];
    MetadataCommand::new()
        .manifest_path(concat!(env!("CARGO_MANIFEST_DIR"), "/../Cargo.toml"))
        .other_options(options.map(str::to_owned).to_vec())
        .exec()
        .expect("cargo reads its own workspace")
}

/// Position of one of our crates in the order.
fn place(name: &str) -> Option<usize> {
    ORDER.iter().position(|&ours| ours == name)
}

#[test]
fn every_crate_has_its_place() {
    for package in metadata().workspace_packages() {
        assert!(
            place(&package.name).is_some(),
            "{} has no place in the order of the crates; name it in tests/tests/arrows.rs",
            package.name
        );
    }
}

#[test]
fn crates_use_only_what_stands_before_them() {
    for package in metadata().workspace_packages() {
        let own = place(&package.name);
        for dependency in &package.dependencies {
            if let Some(theirs) = place(&dependency.name) {
                assert!(
                    Some(theirs) < own,
                    "{} may not use {}: {} stands behind it or is itself",
                    package.name,
                    dependency.name,
                    dependency.name
                );
            }
        }
    }
}

#[test]
fn reserved_crates_stay_where_they_belong() {
    for package in metadata().workspace_packages() {
        for dependency in &package.dependencies {
            for (reserved, owners) in RESERVED {
                assert!(
                    dependency.name != reserved || owners.contains(&package.name.as_str()),
                    "{} may not depend on {reserved}; only {owners:?} may",
                    package.name
                );
            }
        }
    }
}

/// Names of all crates that `name` reaches by normal and build dependencies.
fn reached(metadata: &Metadata, name: &str) -> BTreeSet<String> {
    let resolve = metadata.resolve.as_ref().expect("cargo resolved");
    let names: BTreeMap<&PackageId, &str> = metadata
        .packages
        .iter()
        .map(|package| (&package.id, package.name.as_str()))
        .collect();
    let mut open: Vec<&PackageId> = names
        .iter()
        .filter(|(_, found)| **found == name)
        .map(|(id, _)| *id)
        .collect();
    let mut seen: BTreeSet<&PackageId> = open.iter().copied().collect();
    while let Some(id) = open.pop() {
        let node = resolve.nodes.iter().find(|node| node.id == *id);
        for dependency in node.iter().flat_map(|node| &node.deps) {
            let for_tests_only = dependency
                .dep_kinds
                .iter()
                .all(|kind| kind.kind == DependencyKind::Development);
            if !for_tests_only && seen.insert(&dependency.pkg) {
                open.push(&dependency.pkg);
            }
        }
    }
    seen.iter()
        .filter_map(|id| names.get(*id))
        .filter(|found| **found != name)
        .map(|found| (*found).to_owned())
        .collect()
}

/// The equations know no file and no solver; in fact they know nothing but the language.
#[test]
fn model_reaches_neither_serde_nor_diffsol() {
    let metadata = metadata();
    let reached = reached(&metadata, "helmsplit-model");
    for forbidden in ["serde", "serde_core", "diffsol", "nalgebra", "egui"] {
        assert!(
            !reached.contains(forbidden),
            "helmsplit-model reaches {forbidden}"
        );
    }
    assert!(reached.is_empty(), "helmsplit-model depends on {reached:?}");
}

#[test]
fn scenario_reaches_no_solver() {
    let metadata = metadata();
    let reached = reached(&metadata, "helmsplit-scenario");
    // The walk itself is sound only if it finds what is known to be there.
    assert!(
        reached.contains("helmsplit-model"),
        "the walk finds nothing"
    );
    assert!(reached.contains("serde"), "the walk finds nothing");
    for forbidden in ["helmsplit-sim", "diffsol", "egui"] {
        assert!(
            !reached.contains(forbidden),
            "helmsplit-scenario reaches {forbidden}"
        );
    }
}

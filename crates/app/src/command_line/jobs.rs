//! `report`, `check` and `export`.

use std::{fs, path::Path};

use super::{refusal::uncapitalised, say};
use crate::{
    document::{Design, read_design, write_whole},
    report::{Report, any_stop, findings_to_json, findings_to_text, report as work_out},
};

fn read(file: &Path) -> Result<Design, String> {
    read_design(file).map_err(|error| error.to_string())
}

/// Prints the readouts.
pub(super) fn report(file: &Path, json: bool) -> Result<(), String> {
    let report = work_out(&read(file)?);
    say(&if json {
        report.to_json() + "\n"
    } else {
        report.to_text()
    })
}

/// Prints the findings; whether one of them says stop.
pub(super) fn check(file: &Path, json: bool) -> Result<bool, String> {
    let report: Report = work_out(&read(file)?);
    say(&if json {
        findings_to_json(&report) + "\n"
    } else {
        findings_to_text(&report)
    })?;
    Ok(any_stop(&report))
}

/// Writes the files that are asked for, or all.
pub(super) fn export(file: &Path, to: &Path, only: &[String]) -> Result<(), String> {
    let report = work_out(&read(file)?);
    if report.shell.panels.is_empty() {
        return Err(format!(
            "cannot export {}: it has no panels; lay a course",
            file.display()
        ));
    }
    let only: Vec<&str> = only.iter().map(String::as_str).collect();
    let files = zonewright_shop::export(&report.shell, &report.parts, &only)
        .map_err(|error| uncapitalised(&error.to_string()))?;
    let unwritten =
        |path: &Path, cause: std::io::Error| format!("cannot write {}: {cause}; choose another place", path.display());
    fs::create_dir_all(to).map_err(|cause| unwritten(to, cause))?;
    for (name, bytes) in files {
        let path = to.join(name);
        write_whole(&path, &bytes).map_err(|cause| unwritten(&path, cause))?;
    }
    Ok(())
}

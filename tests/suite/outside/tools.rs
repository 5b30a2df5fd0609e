//! The outside tools: Python with the packages of `tests/outside/requirements.txt`, and the
//! readers of PDF. A test that lacks its tool fails; nothing is skipped.

use std::path::{Path, PathBuf};
use std::process::Command;

/// Names the Python that has the packages; `tests/run` makes it and sets this.
const PYTHON: &str = "HESSWRIGHT_OUTSIDE_PYTHON";

/// `tests/outside` and what is in it.
pub fn outside(path: &str) -> PathBuf {
    Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("tests/outside")
        .join(path)
}

/// What a Python script of `tests/outside` prints, as JSON.
pub fn python(script: &str) -> serde_json::Value {
    let python = std::env::var_os(PYTHON).unwrap_or_else(|| {
        panic!("{PYTHON} is not set: run tests/run, which makes that Python with its packages")
    });
    let printed = tool(Command::new(python).arg("-B").arg(outside(script)));
    serde_json::from_slice(&printed).unwrap_or_else(|error| panic!("{script}: {error}"))
}

/// What a command prints on standard output. It must be there and must succeed.
pub fn tool(command: &mut Command) -> Vec<u8> {
    let name = command.get_program().to_string_lossy().into_owned();
    let output = command.output().unwrap_or_else(|error| {
        panic!("{name} does not start ({error}): run tests/run, which installs what is missing")
    });
    let said = String::from_utf8_lossy(&output.stderr);
    assert!(output.status.success(), "{name}: {}\n{said}", output.status);
    output.stdout
}

//! Links the program at a fixed address on Linux. The typesetter brings a hundred thousand
//! relocations, which a position-independent program applies at every start: a third of the time
//! that `compute` takes.
//!
//! And names the very source that the program is built from: two builds of one version can differ,
//! and a record has to say by which of them it was made.

use std::fs;
use std::path::{Path, PathBuf};

use sha2::{Digest, Sha256};

fn main() {
    println!("cargo:rerun-if-changed=build.rs");
    println!("cargo:rerun-if-changed=src");
    println!("cargo:rerun-if-changed=Cargo.lock");
    if std::env::var("CARGO_CFG_TARGET_OS").as_deref() == Ok("linux") {
        println!("cargo:rustc-link-arg-bins=-no-pie");
    }
    println!("cargo:rustc-env=HESSWRIGHT_SOURCE={}", source_hash());
}

/// The SHA-256 of all files of the source with their names, in the order of the names.
fn source_hash() -> String {
    let mut files = vec![PathBuf::from("Cargo.lock")];
    gather(Path::new("src"), &mut files);
    files.sort();
    let mut digest = Sha256::new();
    for file in files {
        let name = file.to_string_lossy().replace('\\', "/");
        // A file that was listed a moment ago can be read, or the build fails rightly.
        let bytes = fs::read(&file).expect("a file of the source");
        digest.update(format!("{name} {}\n", bytes.len()));
        digest.update(&bytes);
    }
    let bytes = digest.finalize();
    bytes.iter().map(|byte| format!("{byte:02x}")).collect()
}

fn gather(folder: &Path, files: &mut Vec<PathBuf>) {
    for entry in fs::read_dir(folder)
        .expect("a folder of the source")
        .flatten()
    {
        let path = entry.path();
        match path.is_dir() {
            true => gather(&path, files),
            false => files.push(path),
        }
    }
}

//! Running the program as a user does: in a folder, with arguments, through a pipe.

use std::fs;
use std::path::{Path, PathBuf};
use std::process::{Command, Output};

use serde_json::Value;
use tempfile::TempDir;

/// The folder that the repository's own cases and texts stand in.
pub fn repository() -> &'static Path {
    Path::new(env!("CARGO_MANIFEST_DIR"))
}

/// What a run said, and how it ended.
pub struct Ran {
    pub status: i32,
    pub out: String,
    pub err: String,
}

impl Ran {
    /// The one JSON document that standard output holds.
    pub fn json(&self) -> Value {
        serde_json::from_str(&self.out)
            .unwrap_or_else(|error| panic!("{error}: {}\n{}", self.out, self.err))
    }
}

/// The program in a folder, not yet started.
pub fn program(folder: &Path) -> Command {
    let mut command = Command::new(env!("CARGO_BIN_EXE_hesswright"));
    command.current_dir(folder);
    command
}

/// Runs the program in a folder to its end.
pub fn run(folder: &Path, arguments: &[&str]) -> Ran {
    let output = program(folder).args(arguments).output();
    ran(output.expect("the program starts"))
}

/// Takes the output of a finished run apart.
pub fn ran(output: Output) -> Ran {
    let text = |bytes| String::from_utf8(bytes).expect("the program writes UTF-8");
    Ran {
        status: output.status.code().expect("the program ends by itself"),
        out: text(output.stdout),
        err: text(output.stderr),
    }
}

/// A folder of its own for one test, gone afterwards.
pub struct Folder(TempDir);

impl Folder {
    pub fn new() -> Folder {
        Folder(tempfile::tempdir().expect("a temporary folder"))
    }

    pub fn path(&self) -> &Path {
        self.0.path()
    }

    pub fn at(&self, name: &str) -> PathBuf {
        self.path().join(name)
    }

    /// Writes a file, with the folders that lead to it.
    pub fn write(&self, name: &str, bytes: impl AsRef<[u8]>) -> &Folder {
        let path = self.at(name);
        fs::create_dir_all(path.parent().expect("a file stands in a folder")).expect("a folder");
        fs::write(&path, bytes).unwrap_or_else(|error| panic!("{name}: {error}"));
        self
    }

    pub fn read(&self, name: &str) -> Vec<u8> {
        fs::read(self.at(name)).unwrap_or_else(|error| panic!("{name}: {error}"))
    }

    pub fn text(&self, name: &str) -> String {
        String::from_utf8(self.read(name)).expect("text in UTF-8")
    }

    pub fn has(&self, name: &str) -> bool {
        self.at(name).symlink_metadata().is_ok()
    }

    /// The names in a folder below, sorted; empty where there is none.
    pub fn names(&self, folder: &str) -> Vec<String> {
        let entries = fs::read_dir(self.at(folder)).into_iter().flatten();
        let name = |entry: fs::DirEntry| entry.file_name().to_string_lossy().into_owned();
        let mut names: Vec<String> = entries.flatten().map(name).collect();
        names.sort();
        names
    }

    pub fn run(&self, arguments: &[&str]) -> Ran {
        run(self.path(), arguments)
    }

    /// Copies a folder of the repository into this one, under its own name.
    pub fn copy(&self, from: &str, to: &str) -> &Folder {
        copy_all(&repository().join(from), &self.at(to));
        self
    }
}

fn copy_all(from: &Path, to: &Path) {
    fs::create_dir_all(to).expect("a folder");
    for entry in fs::read_dir(from)
        .expect("a folder of the repository")
        .flatten()
    {
        let target = to.join(entry.file_name());
        match entry.path().is_dir() {
            true => copy_all(&entry.path(), &target),
            false => drop(fs::copy(entry.path(), target).expect("a copy")),
        }
    }
}

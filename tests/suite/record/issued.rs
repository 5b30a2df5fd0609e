//! Records to look at: the shipped cases, issued once for all tests.

use std::fs;
use std::path::Path;
use std::sync::OnceLock;

use hayro_syntax::Pdf;
use hesswright::calculation::Calculation;
use hesswright::finding::Text;
use hesswright::folder::CaseFolder;
use hesswright::issue::{Issue, issue};
use hesswright::pdf::RecordFile;
use hesswright::record::{MANIFEST_NAME, Manifest};
use hesswright::source::SourceFiles;

use crate::laws::support::Files;

/// A calculation and what was issued of it.
pub struct Issued {
    pub calculation: Calculation,
    pub issue: Issue,
}

impl Issued {
    pub fn of(text: Text, files: &dyn SourceFiles) -> Issued {
        let calculation = Calculation::of(text, files).unwrap_or_else(|f| panic!("{f:#?}"));
        let issue = issue(&calculation, files).unwrap_or_else(|e| panic!("{e:?}"));
        Issued { calculation, issue }
    }

    pub fn pdf(&self) -> Pdf {
        Pdf::new(self.issue.pdf.clone()).expect("an issued record is a PDF")
    }
}

/// The records of the cases that come with the program.
pub fn shipped() -> &'static [Issued; 2] {
    static SHIPPED: OnceLock<[Issued; 2]> = OnceLock::new();
    SHIPPED.get_or_init(|| {
        [
            "nitrobenzene-hydrogenation.toml",
            "acid-neutralisation.toml",
        ]
        .map(of_case)
    })
}

fn of_case(name: &str) -> Issued {
    let path = Path::new(env!("CARGO_MANIFEST_DIR"))
        .join("cases")
        .join(name);
    let text = Text::new(
        "case.toml",
        fs::read_to_string(&path).expect("a shipped case"),
    );
    let folder = CaseFolder::of(&path, &text);
    Issued::of(text, &folder)
}

/// Issues a record again from what its PDF carries, and nothing else.
pub fn reissued(pdf: &[u8]) -> Vec<u8> {
    let file = RecordFile::read(pdf.to_vec()).expect("a record");
    let text = |name: &str| {
        let bytes = file
            .get(name)
            .unwrap_or_else(|| panic!("{name} is not attached"));
        String::from_utf8(bytes.to_vec()).expect("attachments are text")
    };
    let manifest: Manifest = serde_json::from_str(&text(MANIFEST_NAME)).expect("a manifest");
    let sources = manifest.consult.iter().map(|(name, file)| {
        (
            name.clone(),
            text(file.as_str().expect("the name of an attachment")),
        )
    });
    let files = Files::extracted(sources);
    Issued::of(Text::new("case.toml", text("case.toml")), &files)
        .issue
        .pdf
}

#[test]
fn a_record_is_issued_again_from_its_own_attachments_to_the_byte() {
    for record in shipped() {
        assert!(reissued(&record.issue.pdf) == record.issue.pdf);
    }
}

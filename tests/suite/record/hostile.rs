//! A case that says what a typesetter might take for its own, and what readers are fooled with.

use hesswright::finding::Text;

use super::issued::{Issued, reissued};
use super::words::{body, pages, plain};
use crate::laws::support::Files;

const MARKUP: &str = r##"#panic() $x^2$ *a* _b_ <label> @ref // c /* d */ \u{41} \n "q" 'r' `raw` = H - i [c] {d} ~ --- ... &amp; %PDF- </x:xmpmeta> ]]> <<>> endstream (\))"##;

/// Hebrew, a letter with a mark that has a composed form, and one with a mark that has none.
const HEBREW: &str = "שלום";
const COMPOSED: &str = "e\u{301}";
const MARKED: &str = "x\u{304}";

fn literal(text: &str) -> String {
    toml::Value::String(text.to_string()).to_string()
}

fn word() -> String {
    ('a'..='z').cycle().take(10_000).collect()
}

fn hostile() -> Issued {
    let markup = literal(MARKUP);
    let word = literal(&word());
    let scripts = literal(&format!("{HEBREW} {COMPOSED} {MARKED}"));
    let case = format!(
        "[record]\nnumber = \"T-1\"\nrevision = \"A\"\ntitle = {markup}\nfacility = {scripts}\n\
         equipment = [{markup}]\ndate = 2026-01-02\npreparer = \"#N. *N.* $x$ <a> @b\"\nstatus = \"preliminary\"\n\
         history = [{{ revision = \"A\", date = 2026-01-02, change = {markup} }}]\n\
         [[assumptions]]\ntext = {markup}\nbasis = {word}\nconfirmed = true\n\
         [sources]\nconsult = [\"own.toml\"]\n\
         [inputs]\nwidth = {{ value = \"2.0 m\", source = {markup}, confirmed = true }}\n\
         [reactions.a]\nequation = \"H2(g) + 1/2 O2(g) -> H2O(l)\"\n"
    );
    let source = format!(
        "[source]\nid = \"own\"\ntitle = {markup}\nauthors = {markup}\ntemperature = \"298.15 K\"\n\
         energy-unit = \"kJ/mol\"\n[[entry]]\nsubstance = \"H2O(l)\"\nname = {markup}\n\
         locator = {markup}\nformation-enthalpy = \"-285.8\"\n"
    );
    Issued::of(
        Text::new("case.toml", case),
        &Files::of(&[("own.toml", &source)]),
    )
}

#[test]
fn what_a_case_says_stands_on_the_pages_as_it_was_written() {
    let record = hostile();
    let pdf = record.pdf();
    let body = body(&pdf);
    // Title, equipment, change, assumption, source of the input, title and authors of the
    // source, name and locator of its entry.
    assert!(body.matches(&plain(MARKUP)).count() >= 9, "{body}");
    assert!(body.contains(&word()));
    let backwards: String = HEBREW.chars().rev().collect();
    // Text that runs to the left may be stored in the order of the page.
    assert!(body.contains(HEBREW) || body.contains(&backwards), "{body}");
    assert!(body.contains(COMPOSED) || body.contains('é'), "{body}");
    assert!(body.contains(MARKED), "{body}");
    for sheet in pages(&pdf) {
        assert!(sheet.sheet.contains("PRELIMINARY"));
        assert!(
            sheet
                .sheet
                .contains(&plain("Prepared: #N. *N.* $x$ <a> @b")),
            "{}",
            sheet.sheet
        );
    }
    assert!(reissued(&record.issue.pdf) == record.issue.pdf);
}

#[test]
fn what_a_case_says_cannot_break_out_of_the_metadata() {
    let record = hostile();
    let text = String::from_utf8_lossy(&record.issue.pdf).into_owned();
    let start = text.find("<x:xmpmeta").expect("metadata");
    let end = text[start..].find("</x:xmpmeta>").expect("an end") + start;
    let metadata = &text[start..end];
    assert!(metadata.contains("&lt;/x:xmpmeta&gt;"), "{metadata}");
    assert!(metadata.contains("<pdfuaid:part>1</pdfuaid:part>"));
}

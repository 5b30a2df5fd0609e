//! The text of the pages by way of /ToUnicode, without the typesetter's help.

use std::collections::BTreeMap;

use hayro_syntax::Pdf;
use hayro_syntax::content::TypedIter;
use hayro_syntax::content::ops::TypedInstruction;
use hayro_syntax::object::{Dict, Object, Stream, String as PdfString};
use hayro_syntax::page::Page;

use super::reader::{decoded, stream, utf16};

/// The text of one page, blanks and invisible hyphens left out.
#[derive(Clone, Debug, Default)]
pub struct PageText {
    /// What belongs to the record.
    pub body: String,
    /// What belongs to the sheet: artifacts (ISO 32000-1, 14.8.2.2).
    pub sheet: String,
}

pub fn pages(pdf: &Pdf) -> Vec<PageText> {
    pdf.pages().iter().map(page).collect()
}

/// The body of all pages in one.
pub fn body(pdf: &Pdf) -> String {
    pages(pdf).into_iter().map(|page| page.body).collect()
}

/// A text as it can be looked for among those of pages.
pub fn plain(text: &str) -> String {
    let kept = |c: &char| !c.is_whitespace() && !matches!(c, '\u{ad}' | '\u{200b}' | '\u{2060}');
    text.chars().filter(kept).collect()
}

fn page(page: &Page<'_>) -> PageText {
    let fonts = fonts(page.raw());
    let mut walk = Walk::default();
    let mut instructions: TypedIter<'_> = page.typed_operations();
    while let Some(instruction) = instructions.next() {
        walk.step(&instruction, &fonts);
    }
    walk.text
}

/// From codes of two bytes to text.
type Coding = BTreeMap<u16, String>;

fn fonts(page: &Dict<'_>) -> BTreeMap<String, Coding> {
    let resources = page.get::<Dict<'_>>("Resources");
    let Some(fonts) = resources.and_then(|r| r.get::<Dict<'_>>("Font")) else {
        return BTreeMap::new();
    };
    let coding = |name: &str| {
        let font = fonts.get::<Dict<'_>>(name).expect("a font");
        let map = font
            .get::<Stream<'_>>("ToUnicode")
            .expect("every font says its text");
        coding(&String::from_utf8_lossy(&stream(&map)))
    };
    let names = fonts.keys().map(|name| name.as_str().to_string());
    names.map(|name| (name.clone(), coding(&name))).collect()
}

/// The `bfchar` lines of a CMap; the typesetter writes no ranges.
fn coding(map: &str) -> Coding {
    assert!(!map.contains("beginbfrange"), "ranges are not read here");
    let mut coding = Coding::new();
    for block in map.split("beginbfchar").skip(1) {
        let block = block.split("endbfchar").next().unwrap_or_default();
        for line in block.lines() {
            let hex: Vec<&str> = line.split(['<', '>']).collect();
            if let [_, code, _, text, ..] = hex[..] {
                let code = u16::from_str_radix(code, 16).expect("a code");
                coding.insert(code, utf16(&bytes(text)));
            }
        }
    }
    coding
}

fn bytes(hex: &str) -> Vec<u8> {
    let digits: Vec<char> = hex.chars().filter(char::is_ascii_hexdigit).collect();
    let byte = |pair: &[char]| {
        let text: String = pair.iter().collect();
        u8::from_str_radix(&text, 16).expect("two hexadecimal digits")
    };
    digits.chunks_exact(2).map(byte).collect()
}

/// Marked content that is open.
enum Mark {
    Artifact,
    /// Its text stands for whatever is shown inside.
    Replaced,
    Other,
}

#[derive(Default)]
struct Walk {
    marks: Vec<Mark>,
    font: String,
    text: PageText,
}

impl Walk {
    fn step(&mut self, instruction: &TypedInstruction<'_, '_>, fonts: &BTreeMap<String, Coding>) {
        match instruction {
            TypedInstruction::TextFont(font) => self.font = font.0.as_str().to_string(),
            TypedInstruction::BeginMarkedContent(mark) => self.begin(mark.0.as_str(), None),
            TypedInstruction::BeginMarkedContentWithProperties(mark) => {
                let text = match mark.1 {
                    Object::Dict(properties) => properties.get::<PdfString<'_>>("ActualText"),
                    _ => None,
                };
                self.begin(mark.0.as_str(), text.map(|text| decoded(text.as_bytes())));
            }
            TypedInstruction::EndMarkedContent(_) => {
                self.marks.pop();
            }
            TypedInstruction::ShowText(text) => self.show(text.0.as_bytes(), fonts),
            TypedInstruction::ShowTexts(texts) => {
                for part in texts.0.iter::<Object<'_>>() {
                    if let Object::String(text) = part {
                        self.show(text.as_bytes(), fonts);
                    }
                }
            }
            TypedInstruction::NextLineAndShowText(_)
            | TypedInstruction::ShowTextWithParameters(_)
            | TypedInstruction::XObject(_) => panic!("text may stand where it is not looked for"),
            _ => {}
        }
    }

    fn begin(&mut self, tag: &str, text: Option<String>) {
        if let Some(text) = &text {
            self.push(text);
        }
        self.marks.push(match (tag, text) {
            (_, Some(_)) => Mark::Replaced,
            ("Artifact", None) => Mark::Artifact,
            _ => Mark::Other,
        });
    }

    fn show(&mut self, codes: &[u8], fonts: &BTreeMap<String, Coding>) {
        if self.marks.iter().any(|mark| matches!(mark, Mark::Replaced)) {
            return;
        }
        let coding = fonts.get(&self.font).expect("a font that the page has");
        for code in codes.chunks_exact(2) {
            let code = u16::from_be_bytes([code[0], code[1]]);
            let text = coding
                .get(&code)
                .unwrap_or_else(|| panic!("no text for {code:04x}"));
            self.push(text);
        }
    }

    fn push(&mut self, text: &str) {
        let artifact = self.marks.iter().any(|mark| matches!(mark, Mark::Artifact));
        let into = if artifact {
            &mut self.text.sheet
        } else {
            &mut self.text.body
        };
        into.push_str(&plain(text));
    }
}

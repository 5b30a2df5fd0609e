//! Small steps through a PDF's objects (ISO 32000-1).

use hayro_syntax::Pdf;
use hayro_syntax::object::{Array, Dict, Name, Object, Stream, String as PdfString};

pub fn catalogue(pdf: &Pdf) -> Dict<'_> {
    pdf.xref().get(pdf.xref().root_id()).expect("a catalogue")
}

/// The dictionary of a key; a missing one is a failed test that names the key.
pub fn dict<'a>(of: &Dict<'a>, key: &str) -> Dict<'a> {
    of.get(key)
        .unwrap_or_else(|| panic!("no dictionary /{key}"))
}

pub fn array<'a, T>(of: &Dict<'a>, key: &str) -> Vec<T>
where
    Object<'a>: Into<Object<'a>>,
    T: TryFrom<Object<'a>>,
{
    let array: Array<'a> = of.get(key).unwrap_or_else(|| panic!("no array /{key}"));
    let items = array.iter::<Object<'a>>();
    items.filter_map(|item| T::try_from(item).ok()).collect()
}

pub fn name(of: &Dict<'_>, key: &str) -> String {
    let name = of.get::<Name<'_>>(key);
    name.map_or_else(String::new, |name| name.as_str().to_string())
}

/// A text string: UTF-16 with its mark, or characters that ASCII and PDFDocEncoding share.
pub fn string(of: &Dict<'_>, key: &str) -> String {
    let text = of.get::<PdfString<'_>>(key);
    text.map_or_else(String::new, |text| decoded(text.as_bytes()))
}

pub fn decoded(bytes: &[u8]) -> String {
    match bytes {
        [0xfe, 0xff, rest @ ..] => utf16(rest),
        other => other.iter().map(|byte| char::from(*byte)).collect(),
    }
}

pub fn utf16(bytes: &[u8]) -> String {
    let units = bytes
        .chunks_exact(2)
        .map(|pair| u16::from_be_bytes([pair[0], pair[1]]));
    String::from_utf16(&units.collect::<Vec<_>>()).expect("UTF-16")
}

pub fn stream(stream: &Stream<'_>) -> Vec<u8> {
    stream.decoded().expect("a stream that decodes").to_vec()
}

/// The pairs of a name tree or a number tree, `leaf` being /Names or /Nums.
pub fn tree<'a>(root: &Dict<'a>, leaf: &str) -> Vec<(Object<'a>, Object<'a>)> {
    let mut pairs = Vec::new();
    if root.contains_key(leaf) {
        let items: Vec<Object<'a>> = array(root, leaf);
        let mut items = items.into_iter();
        while let (Some(key), Some(value)) = (items.next(), items.next()) {
            pairs.push((key, value));
        }
    }
    if root.contains_key("Kids") {
        for kid in array::<Dict<'a>>(root, "Kids") {
            pairs.extend(tree(&kid, leaf));
        }
    }
    pairs
}

/// Every dictionary of the file, those of streams and those inside others among them.
pub fn all_dicts(pdf: &Pdf) -> Vec<Dict<'_>> {
    let mut found = Vec::new();
    for object in pdf.objects() {
        collect(object, &mut found);
    }
    found
}

fn collect<'a>(object: Object<'a>, found: &mut Vec<Dict<'a>>) {
    use hayro_syntax::object::MaybeRef;
    match object {
        Object::Array(array) => {
            for item in array.raw_iter() {
                if let MaybeRef::NotRef(item) = item {
                    collect(item, found);
                }
            }
        }
        Object::Dict(dict) => collect_dict(dict, found),
        Object::Stream(stream) => collect_dict(stream.dict().clone(), found),
        _ => {}
    }
}

fn collect_dict<'a>(dict: Dict<'a>, found: &mut Vec<Dict<'a>>) {
    use hayro_syntax::object::MaybeRef;
    for (_, value) in dict.entries() {
        if let MaybeRef::NotRef(value) = value {
            collect(value, found);
        }
    }
    found.push(dict);
}

//! The structure tree (ISO 32000-1, 14.7).

use hayro_syntax::Pdf;
use hayro_syntax::object::{Array, Dict, Object};

use super::reader::{catalogue, dict, name};

/// An element of the structure tree.
pub struct Element<'a> {
    /// /S, as written.
    pub role: String,
    pub dict: Dict<'a>,
    /// Position of the element above, none for the topmost.
    pub parent: Option<usize>,
}

/// All elements in the order of reading.
pub fn elements(pdf: &Pdf) -> Vec<Element<'_>> {
    let root = dict(&catalogue(pdf), "StructTreeRoot");
    let mut found = Vec::new();
    walk(&root, None, &mut found);
    found
}

fn walk<'a>(of: &Dict<'a>, parent: Option<usize>, found: &mut Vec<Element<'a>>) {
    for kid in kids(of) {
        let Object::Dict(kid) = kid else { continue };
        // Dictionaries without /S are references to marked content or to annotations.
        if !kid.contains_key("S") {
            continue;
        }
        let role = name(&kid, "S");
        found.push(Element {
            role,
            dict: kid.clone(),
            parent,
        });
        let here = found.len() - 1;
        walk(&kid, Some(here), found);
    }
}

pub fn kids<'a>(of: &Dict<'a>) -> Vec<Object<'a>> {
    match of.get::<Object<'a>>("K") {
        Some(Object::Array(kids)) => kids.iter().collect(),
        Some(kid) => vec![kid],
        None => Vec::new(),
    }
}

/// The value of an attribute (/A) of an owner (/O).
pub fn attribute(element: &Dict<'_>, owner: &str, key: &str) -> Option<String> {
    let of = |attributes: &Dict<'_>| {
        (name(attributes, "O") == owner && attributes.contains_key(key))
            .then(|| name(attributes, key))
    };
    match element.get::<Object<'_>>("A")? {
        Object::Dict(attributes) => of(&attributes),
        Object::Array(all) => attributes(&all).iter().find_map(of),
        _ => None,
    }
}

fn attributes<'a>(all: &Array<'a>) -> Vec<Dict<'a>> {
    all.iter::<Dict<'a>>().collect()
}

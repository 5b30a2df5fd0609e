//! PDF/UA-1 (ISO 14289-1:2014), as far as a reader of objects can tell. Whether a text is a good
//! one is for people to judge.

use std::collections::BTreeMap;

use hayro_syntax::Pdf;
use hayro_syntax::object::{Dict, Object};
use hesswright::record::Step;

use super::issued::shipped;
use super::reader::{array, catalogue, dict, name, string, tree};
use super::tree::{attribute, elements};

/// Structure types of ISO 32000-1, 14.8.4.
const STANDARD: [&str; 49] = [
    "Document",
    "Part",
    "Art",
    "Sect",
    "Div",
    "BlockQuote",
    "Caption",
    "TOC",
    "TOCI",
    "Index",
    "NonStruct",
    "Private",
    "P",
    "H",
    "H1",
    "H2",
    "H3",
    "H4",
    "H5",
    "H6",
    "L",
    "LI",
    "Lbl",
    "LBody",
    "Table",
    "TR",
    "TH",
    "TD",
    "THead",
    "TBody",
    "TFoot",
    "Span",
    "Quote",
    "Note",
    "Reference",
    "BibEntry",
    "Code",
    "Link",
    "Annot",
    "Ruby",
    "RB",
    "RT",
    "RP",
    "Warichu",
    "WT",
    "WP",
    "Figure",
    "Formula",
    "Form",
];

#[test]
fn the_catalogue_says_language_title_and_that_it_is_tagged() {
    for record in shipped() {
        let pdf = record.pdf();
        let catalogue = catalogue(&pdf);
        assert_eq!(string(&catalogue, "Lang"), "en-GB");
        let marks = dict(&catalogue, "MarkInfo");
        assert_eq!(marks.get::<bool>("Marked"), Some(true));
        assert_ne!(marks.get::<bool>("Suspects"), Some(true));
        let preferences = dict(&catalogue, "ViewerPreferences");
        assert_eq!(preferences.get::<bool>("DisplayDocTitle"), Some(true));
        assert!(catalogue.contains_key("Outlines"));
    }
}

/// What each key of the parent tree leads to.
fn parents(pdf: &Pdf) -> BTreeMap<i32, Object<'_>> {
    let root = dict(&catalogue(pdf), "StructTreeRoot");
    let pairs = tree(&dict(&root, "ParentTree"), "Nums").into_iter();
    pairs
        .map(|(key, value)| (key.into_i32().expect("a number"), value))
        .collect()
}

#[test]
fn every_page_is_in_the_structure_and_is_read_in_its_order() {
    for record in shipped() {
        let pdf = record.pdf();
        let parents = parents(&pdf);
        for page in pdf.pages().iter() {
            let page = page.raw();
            assert_eq!(name(page, "Tabs"), "S");
            let key = page
                .get::<i32>("StructParents")
                .expect("a key of the parent tree");
            let Some(Object::Array(owners)) = parents.get(&key) else {
                panic!("the parent tree has no page {key}")
            };
            let owners: Vec<Dict<'_>> = owners.iter().collect();
            assert!(!owners.is_empty() && owners.iter().all(|owner| owner.contains_key("S")));
        }
    }
}

#[test]
fn roles_are_standard_or_mapped_to_standard_ones() {
    for record in shipped() {
        let pdf = record.pdf();
        let root = dict(&catalogue(&pdf), "StructTreeRoot");
        let map = dict(&root, "RoleMap");
        for element in elements(&pdf) {
            let role = match STANDARD.contains(&element.role.as_str()) {
                true => {
                    assert!(
                        !map.contains_key(&element.role),
                        "{} is remapped",
                        element.role
                    );
                    continue;
                }
                false => name(&map, &element.role),
            };
            assert!(
                STANDARD.contains(&role.as_str()),
                "{} is {role:?}",
                element.role
            );
        }
    }
}

#[test]
fn formulas_and_figures_have_a_text_and_equations_their_spoken_one() {
    for record in shipped() {
        let pdf = record.pdf();
        let elements = elements(&pdf);
        let alternative = |role: &str| -> Vec<String> {
            let of_role = elements.iter().filter(|e| e.role == role);
            of_role.map(|e| string(&e.dict, "Alt")).collect()
        };
        assert!(alternative("Figure").iter().all(|alt| !alt.is_empty()));
        let steps = record
            .issue
            .record
            .pages
            .working
            .iter()
            .flat_map(|section| &section.steps);
        let spoken: Vec<String> = steps
            .filter_map(|step| match step {
                Step::Equation { alt, .. } => Some(alt.clone()),
                _ => None,
            })
            .collect();
        assert!(!spoken.is_empty() && spoken.iter().all(|alt| !alt.is_empty()));
        assert_eq!(alternative("Formula"), spoken);
    }
}

#[test]
fn tables_have_heads_with_a_scope_and_rows_of_cells() {
    for record in shipped() {
        let pdf = record.pdf();
        let elements = elements(&pdf);
        let parent = |i: usize| elements[i].parent.map_or("", |p| elements[p].role.as_str());
        let tables = elements.iter().filter(|e| e.role == "Table").count();
        let mut heads = vec![false; elements.len()];
        for (i, element) in elements.iter().enumerate() {
            match element.role.as_str() {
                "TR" => assert!(["Table", "THead", "TBody", "TFoot"].contains(&parent(i))),
                "TD" => assert_eq!(parent(i), "TR"),
                "TH" => {
                    assert_eq!(parent(i), "TR");
                    let scope = attribute(&element.dict, "Table", "Scope").unwrap_or_default();
                    assert!(
                        ["Column", "Row", "Both"].contains(&scope.as_str()),
                        "{scope}"
                    );
                    let mut above = Some(i);
                    while let Some(at) = above.filter(|at| elements[*at].role != "Table") {
                        above = elements[at].parent;
                    }
                    heads[above.expect("a head stands in a table")] = true;
                }
                _ => {}
            }
        }
        assert!(tables > 0 && heads.iter().filter(|head| **head).count() == tables);
    }
}

#[test]
fn headings_skip_no_level() {
    for record in shipped() {
        let pdf = record.pdf();
        let levels: Vec<usize> = elements(&pdf)
            .iter()
            .filter_map(|e| e.role.strip_prefix('H')?.parse().ok())
            .collect();
        assert_eq!(levels.first(), Some(&1));
        assert!(
            levels.windows(2).all(|pair| pair[1] <= pair[0] + 1),
            "{levels:?}"
        );
    }
}

#[test]
fn links_say_where_they_lead_and_stand_in_the_structure() {
    for record in shipped() {
        let pdf = record.pdf();
        let parents = parents(&pdf);
        let mut links = 0;
        for page in pdf.pages().iter() {
            if !page.raw().contains_key("Annots") {
                continue;
            }
            for annotation in array::<Dict<'_>>(page.raw(), "Annots") {
                assert_eq!(name(&annotation, "Subtype"), "Link");
                assert!(!string(&annotation, "Contents").is_empty());
                // Printed, and none of the flags that hide it (ISO 32000-1, table 165).
                assert_eq!(annotation.get::<i32>("F"), Some(4));
                let key = annotation.get::<i32>("StructParent").expect("a key");
                let Some(Object::Dict(owner)) = parents.get(&key) else {
                    panic!("the parent tree has no annotation {key}")
                };
                assert_eq!(name(owner, "S"), "Link");
                links += 1;
            }
        }
        assert!(links > 0);
    }
}

#[test]
fn lists_are_made_of_items_with_bodies() {
    for record in shipped() {
        let pdf = record.pdf();
        let elements = elements(&pdf);
        for element in &elements {
            let above = element.parent.map_or("", |p| elements[p].role.as_str());
            match element.role.as_str() {
                "LI" => assert_eq!(above, "L"),
                "LBody" => assert_eq!(above, "LI"),
                _ => {}
            }
        }
    }
}

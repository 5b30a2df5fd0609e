//! The fonts that records are set in: six files that come with the program, and no others.

use std::sync::LazyLock;

use typst::foundations::Bytes;
use typst::text::{Font, FontBook};
use typst::utils::LazyHash;

/// Name and hash of an embedded font file.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub struct FontIdentity {
    /// PostScript name.
    pub name: &'static str,
    /// SHA-256 of the font file, 64 lower-case hexadecimal digits.
    pub sha256: &'static str,
}

struct Offered {
    /// Position among the files that the font package lists.
    position: usize,
    identity: FontIdentity,
}

const fn offered(position: usize, name: &'static str, sha256: &'static str) -> Offered {
    Offered {
        position,
        identity: FontIdentity { name, sha256 },
    }
}

/// Number of the serif faces at the head of [`OFFERED`]: text comes in all four of them.
pub(super) const SERIF_FACES: usize = 4;

// The hashes are constants because hashing three megabytes at each run would be felt;
// a test holds them against the bytes.
const OFFERED: [Offered; 6] = [
    offered(
        0,
        "LibertinusSerif-Regular",
        "fcf06307a77367394fcb0ccb241e59eea70dba3d732be309647611224679c733",
    ),
    offered(
        1,
        "LibertinusSerif-Bold",
        "0264914210ed51b3231ebc92ce529e9f2e166ba9eebf0cd4a579558690a27b64",
    ),
    offered(
        2,
        "LibertinusSerif-Italic",
        "9a393d63d6e05f620d3dc0190dfd35a8ede58c0808cf0fc9de7fcb9c723e4c24",
    ),
    offered(
        3,
        "LibertinusSerif-BoldItalic",
        "47a665259f09f554f5d133d7718cdad43ff462c6a6b2328f38023465e62d57ce",
    ),
    offered(
        8,
        "NewCMMath-Regular",
        "d66ac1cc91c55c24d3636ae2df1238076debdff51841f9893fc5419cc2df3df7",
    ),
    offered(
        16,
        "DejaVuSansMono",
        "b4a6c3e4faab8773f4ff761d56451646409f29abedd68f05d38c2df667d3c582",
    ),
];

/// The fonts that a record may be set in, in the order in which they are offered.
pub fn fonts() -> Vec<FontIdentity> {
    OFFERED.iter().map(|font| font.identity).collect()
}

/// The offered fonts, parsed once.
pub(super) static FACES: LazyLock<Vec<Font>> = LazyLock::new(|| {
    let files: Vec<&'static [u8]> = typst_assets::fonts().collect();
    OFFERED
        .iter()
        .filter_map(|font| files.get(font.position))
        .flat_map(|file| Font::iter(Bytes::new(*file)))
        .collect()
});

/// What the typesetter looks fonts up in.
pub(super) static BOOK: LazyLock<LazyHash<FontBook>> =
    LazyLock::new(|| LazyHash::new(FontBook::from_fonts(FACES.iter())));

#[cfg(test)]
mod tests {
    use super::*;
    use crate::typeset::template::hex;
    use sha2::{Digest, Sha256};

    #[test]
    fn names_and_hashes_are_those_of_the_embedded_files() {
        assert_eq!(FACES.len(), OFFERED.len());
        for (face, font) in FACES.iter().zip(&OFFERED) {
            let name = face.post_script_name();
            assert_eq!(name.as_deref(), Some(font.identity.name));
            assert_eq!(hex(&Sha256::digest(face.data())), font.identity.sha256);
        }
    }

    #[test]
    fn the_serif_faces_stand_first() {
        let serif = fonts()
            .iter()
            .take_while(|font| font.name.starts_with("LibertinusSerif-"))
            .count();
        assert_eq!(serif, SERIF_FACES);
    }
}

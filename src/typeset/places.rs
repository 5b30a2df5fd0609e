//! Where the front sheet has its places for signatures, for whoever puts form fields there.

/// A rectangle on the first page, in PDF units (1/72 inch) from its lower left corner.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct SignatureBox {
    pub left: f64,
    pub bottom: f64,
    pub right: f64,
    pub top: f64,
}

const MILLIMETRE: f64 = 72.0 / 25.4;

// The template's measures (`sheet.typ`, `front.typ`), in millimetres.
const LEFT_MARGIN: f64 = 25.0;
const BOTTOM_MARGIN: f64 = 27.0;
const TEXT_WIDTH: f64 = 210.0 - 25.0 - 20.0;
const HEIGHT: f64 = 26.0;
const GUTTER: f64 = 4.0;
const ACROSS: usize = 3;

/// The places for `count` signatures, in the order of the title block's roles: three in a row,
/// the last row at the foot of the page.
pub fn signature_boxes(count: usize) -> Vec<SignatureBox> {
    let rows = count.div_ceil(ACROSS);
    (0..count)
        .map(|index| at(index % ACROSS, rows - 1 - index / ACROSS))
        .collect()
}

/// The place in a column from the left and a row from below.
fn at(column: usize, row: usize) -> SignatureBox {
    let width = (TEXT_WIDTH - GUTTER * (ACROSS - 1) as f64) / ACROSS as f64;
    let left = LEFT_MARGIN + column as f64 * (width + GUTTER);
    let bottom = BOTTOM_MARGIN + row as f64 * (HEIGHT + GUTTER);
    SignatureBox {
        left: left * MILLIMETRE,
        bottom: bottom * MILLIMETRE,
        right: (left + width) * MILLIMETRE,
        top: (bottom + HEIGHT) * MILLIMETRE,
    }
}

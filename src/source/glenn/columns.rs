//! The fixed columns of `thermo.inp`: what stands where in a record, and nothing of its meaning.

/// Lines that each temperature range takes.
const LINES_PER_RANGE: usize = 3;
/// Bytes of a line with all its 80 columns, its line end included.
const FULL_LINE: usize = 82;

/// The columns `from..to` of a line, counted from 0, without the blanks around the text.
///
/// Empty where the line is shorter or does not consist of ASCII there.
pub(super) fn field(line: &str, from: usize, to: usize) -> &str {
    line.get(from..to.min(line.len()))
        .unwrap_or("")
        .trim_ascii()
}

/// Where one record of the file begins.
#[derive(Debug, Clone, Copy)]
pub(super) struct Place {
    /// Line of the record's name, counted from 1.
    pub line: u32,
    /// Byte at which that line begins.
    pub offset: usize,
}

/// The places of all records, in the order of the file.
///
/// Ends at the first record whose count of ranges cannot be read, since nothing tells where the
/// next one would begin.
pub(super) fn places(text: &str) -> Vec<Place> {
    let mut lines = Lines::new(text);
    while lines.next().is_some_and(|line| line.trim() != "thermo") {}
    lines.next();
    let mut places = Vec::with_capacity(2200);
    loop {
        let place = lines.place();
        let Some(name) = lines.next() else { break };
        if name.trim().is_empty() || name.starts_with("END") {
            continue;
        }
        let Some(count) = lines.next().and_then(range_count) else {
            break;
        };
        places.push(place);
        // A record without ranges has one line that states a temperature.
        lines.skip_lines((count * LINES_PER_RANGE).max(1));
    }
    places
}

/// The number of ranges that the second line of a record announces.
pub(super) fn range_count(second: &str) -> Option<usize> {
    field(second, 0, 2).parse::<u8>().ok().map(usize::from)
}

/// A walk over the lines of a text that knows where it is.
struct Lines<'t> {
    text: &'t str,
    place: Place,
}

impl<'t> Lines<'t> {
    fn new(text: &'t str) -> Self {
        let place = Place { line: 1, offset: 0 };
        Lines { text, place }
    }

    /// Where the line that comes next begins.
    fn place(&self) -> Place {
        self.place
    }

    fn next(&mut self) -> Option<&'t str> {
        let rest = self.text.get(self.place.offset..)?;
        if rest.is_empty() {
            return None;
        }
        let length = rest.find('\n').unwrap_or(rest.len());
        self.place.offset += length + 1;
        self.place.line += 1;
        rest.get(..length)
    }

    /// Passes over lines unread. Nearly all are full, which saves the search for their end.
    fn skip_lines(&mut self, count: usize) {
        for _ in 0..count {
            let full = self.place.offset.saturating_add(FULL_LINE);
            if self.text.as_bytes().get(full - 1) == Some(&b'\n') {
                self.place.offset = full;
                self.place.line += 1;
            } else {
                self.next();
            }
        }
    }
}

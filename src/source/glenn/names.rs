//! The lines of `names.tsv`: which records are served, under which species, name and CAS number.

use super::record::GlennEnthalpy;

/// What our own table says of one entry.
#[derive(Debug, Clone, Copy)]
pub(super) struct Named {
    pub glenn_name: &'static str,
    pub species: &'static str,
    pub name: &'static str,
    pub cas: &'static str,
    holds_at: &'static str,
    lines: &'static str,
}

impl Named {
    /// Reads one row; `None` for the heading and for a row that lacks a column.
    pub fn read(row: &'static str) -> Option<Self> {
        let mut cells = row.split('\t');
        let named = Named {
            glenn_name: cells.next()?,
            species: cells.next()?,
            name: cells.next()?,
            cas: cells.next()?,
            holds_at: cells.next()?,
            lines: cells.next()?,
        };
        named.lines().next().is_some().then_some(named)
    }

    /// The lines at which the file's records of this form begin, in its order.
    pub fn lines(&self) -> impl Iterator<Item = u32> + use<> {
        self.lines.split(',').filter_map(|line| line.parse().ok())
    }

    /// What the enthalpy that the record prints stands for.
    pub fn enthalpy(&self, printed: &str) -> GlennEnthalpy {
        let printed = printed.to_owned();
        match self.holds_at {
            "298.15" => GlennEnthalpy::At298 { printed },
            "other form" => GlennEnthalpy::NotAt298 { printed },
            temperature => GlennEnthalpy::AtOther {
                temperature: temperature.to_owned(),
                printed,
            },
        }
    }
}

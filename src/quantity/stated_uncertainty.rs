//! The uncertainty that stands beside a value, and the coverage that it is read with.
//!
//! Leaves to others: combining uncertainties.

use num_traits::Signed;

use super::decimal::Decimal;
use super::exact::Exact;
use super::message::{explained_error, quoted};
use super::nearest_float::to_f64;

/// An uncertainty as stated, in the unit of the value that it belongs to (for `°C` and `°F`
/// in degrees of difference).
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum StatedUncertainty {
    /// `± 0.040`: an expanded uncertainty; its coverage is stated by the source or the case.
    Expanded { half_width: Exact, printed: String },
    /// `(40)`: a standard uncertainty in the last digits (IUPAC Green Book, from memory).
    StandardLastDigits { standard: Exact, printed: String },
    /// A tolerance: any value within ±`half_width` is as likely (JCGM 100:2008 4.3.7).
    Tolerance { half_width: Exact },
}

impl StatedUncertainty {
    /// The half-width or the standard uncertainty as it is stated, in the unit of the value.
    pub fn width(&self) -> &Exact {
        match self {
            Self::Expanded { half_width, .. } | Self::Tolerance { half_width } => half_width,
            Self::StandardLastDigits { standard, .. } => standard,
        }
    }

    /// The standard uncertainty, in the unit of the value. `coverage` is that of the source; it
    /// touches only uncertainties printed with ±.
    pub fn standard(&self, coverage: &Coverage) -> f64 {
        match (self, coverage) {
            (Self::StandardLastDigits { standard, .. }, _) => to_f64(standard),
            (Self::Expanded { half_width, .. }, Coverage::Factor(factor)) => {
                to_f64(&(half_width / factor))
            }
            (Self::Expanded { half_width, .. }, Coverage::Bounds)
            | (Self::Tolerance { half_width }, _) => rectangular(half_width),
        }
    }
}

/// a/√3, the standard uncertainty of a rectangular distribution (JCGM 100:2008 4.3.7).
fn rectangular(half_width: &Exact) -> f64 {
    to_f64(half_width) / libm::sqrt(3.0)
}

/// What the uncertainties that a source prints with ± mean.
#[derive(Debug, Clone, PartialEq, Eq)]
pub enum Coverage {
    /// k standard uncertainties; positive.
    Factor(Exact),
    /// Bounds of a rectangular distribution (JCGM 100:2008 4.3.7).
    Bounds,
}

impl Default for Coverage {
    /// k = 2, about 95 %: what a case states, and what most tables do.
    fn default() -> Self {
        Self::Factor(Exact::from_integer(2.into()))
    }
}

impl Coverage {
    /// Reads `2`, `1.96` or `bounds`.
    ///
    /// # Errors
    /// Anything else; a factor that is not positive.
    pub fn parse(text: &str) -> Result<Self, CoverageError> {
        if text == "bounds" {
            return Ok(Self::Bounds);
        }
        match Decimal::parse(text) {
            Ok(factor) if factor.value().is_positive() => Ok(Self::Factor(factor.value())),
            _ => Err(CoverageError(text.to_owned())),
        }
    }
}

/// A text that states no coverage.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct CoverageError(String);

impl CoverageError {
    /// What stands there.
    pub fn found(&self) -> String {
        quoted(&self.0)
    }

    /// What should stand there.
    pub fn expected(&self) -> String {
        "a positive coverage factor, or bounds".to_owned()
    }

    /// What to do about it.
    pub fn advice(&self) -> String {
        "write 2 for k = 2, 1 for standard uncertainties, bounds for limits of error".to_owned()
    }
}

explained_error!(CoverageError);

#[cfg(test)]
mod tests {
    use super::*;

    fn expanded() -> StatedUncertainty {
        StatedUncertainty::Expanded {
            half_width: Exact::new(4.into(), 100.into()),
            printed: "0.04".to_owned(),
        }
    }

    #[test]
    fn standard_uncertainties() {
        let standard = |coverage| expanded().standard(&Coverage::parse(coverage).unwrap());
        assert_eq!(standard("2"), 0.02);
        assert_eq!(standard("1"), 0.04);
        // 0.04/√3 by hand.
        assert!((standard("bounds") - 0.023_094_011).abs() < 1e-9);
        let tolerance = StatedUncertainty::Tolerance {
            half_width: Exact::from_integer(12.into()),
        };
        // 12/√3 = 6.928203 by hand; the source's coverage has no say.
        let k2 = Coverage::parse("2").unwrap();
        assert!((tolerance.standard(&k2) - 6.928_203).abs() < 1e-6);
    }

    #[test]
    fn coverage_must_be_positive() {
        for text in ["0", "-2", "k=2", "", "95 %"] {
            assert!(Coverage::parse(text).is_err(), "{text}");
        }
        assert_eq!(
            Coverage::parse("-2").unwrap_err().to_string(),
            "found “-2”; expected a positive coverage factor, or bounds; \
             write 2 for k = 2, 1 for standard uncertainties, bounds for limits of error"
        );
    }
}

//! The units there are, with their exact factors, and the words that are refused because they
//! mean several things.
//!
//! Leaves to others: prefixes and compound units.
//!
//! Sources: SI brochure, 9th edition (2019), tables 4, 7 and 8, for SI units and those accepted
//! beside them; the international yard and pound agreement of 1959 for the foot (0.3048 m) and
//! the pound (0.453 592 37 kg); ISO 31-4:1992 for the calories (from memory): cal_th = 4.184 J,
//! cal_IT = 4.1868 J. A Btu raises one pound by one degree Fahrenheit where the calorie of the
//! same name raises one gram by one kelvin, so Btu = cal × 453.592 37 × 5/9.

use super::dimension::Dimension;
use super::unit::{FractionBasis, UnitKind};

/// A unit with a symbol of its own.
pub(super) struct TableUnit {
    /// The spelling that the program writes.
    pub symbol: &'static str,
    /// Other spellings that it reads.
    pub also: &'static [&'static str],
    pub dimension: Dimension,
    /// Numerator and denominator of the factor to the coherent SI unit.
    pub factor: (u64, u64),
    /// Where its zero lies in SI, as numerator and denominator.
    pub offset: Option<(u64, u64)>,
    pub kind: UnitKind,
    /// Whether SI prefixes are usual with it.
    pub prefixed: bool,
}

/// A unit without prefixes.
const fn unit(symbol: &'static str, dimension: Dimension, factor: (u64, u64)) -> TableUnit {
    TableUnit {
        symbol,
        also: &[],
        dimension,
        factor,
        offset: None,
        kind: UnitKind::Plain,
        prefixed: false,
    }
}

impl TableUnit {
    const fn prefixed(mut self) -> Self {
        self.prefixed = true;
        self
    }

    const fn also(mut self, also: &'static [&'static str]) -> Self {
        self.also = also;
        self
    }

    const fn kind(mut self, kind: UnitKind) -> Self {
        self.kind = kind;
        self
    }

    const fn offset(mut self, offset: (u64, u64)) -> Self {
        self.offset = Some(offset);
        self.kind(UnitKind::Reading)
    }
}

use Dimension as D;

/// Pound in kilograms, 0.453 592 37.
const LB: (u64, u64) = (45_359_237, 100_000_000);
/// Btu per calorie, 453.592 37 × 5/9.
const BTU_PER_CAL: (u64, u64) = (45_359_237 * 5, 100_000 * 9);
/// Pounds-force per square inch: 0.453 592 37 kg × 9.806 65 m/s² / (0.0254 m)².
const PSI: (u64, u64) = (45_359_237 * 980_665, 254 * 254 * 100_000);
/// Millimetre of conventional mercury: 13 595.1 kg/m³ × 9.806 65 m/s² × 0.001 m.
const MMHG: (u64, u64) = (135_951 * 980_665, 1_000_000_000);

/// Every unit with a symbol of its own.
pub(super) const UNITS: &[TableUnit] = &[
    unit("1", D::ONE, (1, 1)),
    unit("J", D::ENERGY, (1, 1)).prefixed(),
    unit("cal_th", D::ENERGY, (4_184, 1_000)).prefixed(),
    unit("cal_IT", D::ENERGY, (41_868, 10_000)).prefixed(),
    unit(
        "Btu_th",
        D::ENERGY,
        (4_184 * BTU_PER_CAL.0, 1_000 * BTU_PER_CAL.1),
    ),
    unit(
        "Btu_IT",
        D::ENERGY,
        (41_868 * BTU_PER_CAL.0, 10_000 * BTU_PER_CAL.1),
    ),
    unit("Wh", D::ENERGY, (3_600, 1)).prefixed(),
    unit("W", D::POWER, (1, 1)).prefixed(),
    unit("g", D::MASS, (1, 1_000)).prefixed(),
    unit("t", D::MASS, (1_000, 1)).also(&["tonne"]),
    unit("lb", D::MASS, LB).also(&["lbm"]),
    unit("mol", D::AMOUNT, (1, 1)).prefixed(),
    unit("lbmol", D::AMOUNT, (45_359_237, 100_000)),
    unit("s", D::TIME, (1, 1)).prefixed(),
    unit("min", D::TIME, (60, 1)),
    unit("h", D::TIME, (3_600, 1)),
    unit("d", D::TIME, (86_400, 1)),
    unit("K", D::TEMPERATURE, (1, 1)).prefixed(),
    unit("°R", D::TEMPERATURE, (5, 9)),
    unit("°C", D::TEMPERATURE, (1, 1))
        .offset((27_315, 100))
        .also(&["℃"]),
    unit("°F", D::TEMPERATURE, (5, 9))
        .offset((45_967 * 5, 900))
        .also(&["℉"]),
    unit("Δ°C", D::TEMPERATURE, (1, 1))
        .kind(UnitKind::Difference)
        .also(&["∆°C"]),
    unit("Δ°F", D::TEMPERATURE, (5, 9))
        .kind(UnitKind::Difference)
        .also(&["∆°F"]),
    unit("Pa", D::PRESSURE, (1, 1)).prefixed(),
    unit("bar", D::PRESSURE, (100_000, 1)).prefixed(),
    unit("atm", D::PRESSURE, (101_325, 1)),
    unit("Torr", D::PRESSURE, (101_325, 760)),
    unit("mmHg", D::PRESSURE, MMHG),
    unit("psia", D::PRESSURE, PSI),
    unit("N", D::FORCE, (1, 1)).prefixed(),
    unit("m", D::LENGTH, (1, 1)).prefixed(),
    unit("ft", D::LENGTH, (3_048, 10_000)),
    unit("in", D::LENGTH, (254, 10_000)),
    unit("L", D::VOLUME, (1, 1_000)).prefixed(),
    unit("l", D::VOLUME, (1, 1_000)).prefixed(),
    unit("wt%", D::ONE, (1, 100)).kind(UnitKind::Fraction(FractionBasis::Mass)),
    unit("mol%", D::ONE, (1, 100)).kind(UnitKind::Fraction(FractionBasis::Amount)),
    unit("vol%", D::ONE, (1, 100)).kind(UnitKind::Fraction(FractionBasis::Volume)),
];

/// SI prefixes that the field uses, with their powers of ten (SI brochure table 7).
pub(super) const PREFIXES: &[(&str, i64)] = &[
    ("n", -9),
    ("µ", -6),
    ("μ", -6),
    ("m", -3),
    ("c", -2),
    ("d", -1),
    ("k", 3),
    ("M", 6),
    ("G", 9),
    ("T", 12),
];

/// Words that mean several things, and what to write instead.
pub(super) const SEVERAL_MEANINGS: &[(&[&str], &str)] = &[
    (
        &["kcal", "Kcal"],
        "kcal_th (4.184 kJ) or kcal_IT (4.1868 kJ)",
    ),
    (
        &["cal", "Cal", "Mcal", "Gcal"],
        "cal_th (4.184 J) or cal_IT (4.1868 J)",
    ),
    (
        &[
            "Btu", "BTU", "btu", "MBtu", "MMBtu", "MBTU", "MMBTU", "therm",
        ],
        "Btu_IT (1055.05585262 J) or Btu_th (1054.35026… J), with a power of ten in the number",
    ),
    (
        &["Nm", "Sm", "NCM", "SCM"],
        "m3 for a gas volume and state its reference temperature and pressure beside it \
         (newton metre is N m)",
    ),
    (
        &["scf", "SCF", "Mscf", "MMscf", "MMSCF"],
        "ft3 and state the reference temperature and pressure beside it",
    ),
    (&["%"], "wt%, mol% or vol%, or a plain number"),
    (
        &["ppm", "ppb", "ppmv", "ppmw"],
        "the fraction with its basis: 1 ppm is 1e-4 wt%, mol% or vol%",
    ),
    (
        &["ton", "tons", "TR"],
        "t (1000 kg), or lb: a short ton is 2000 lb, a long ton 2240 lb",
    ),
    (
        &["psi", "psig", "barg", "bara", "kPag", "kPaa"],
        "an absolute pressure in psia, bar or kPa: a gauge reading needs its barometric pressure",
    ),
    (
        &["gal", "gallon"],
        "L: a US gallon is 3.785411784 L, an imperial one 4.54609 L",
    ),
    (
        &["hp", "HP"],
        "W: a mechanical horsepower is about 745.7 W, a metric one 735.49875 W",
    ),
    (
        &["C", "degC", "ºC"],
        "°C for a temperature, K or Δ°C for a difference",
    ),
    (
        &["F", "degF", "ºF"],
        "°F for a temperature, K or Δ°F for a difference",
    ),
    (
        &["M"],
        "mol/L for a concentration, or the unit after the prefix",
    ),
];

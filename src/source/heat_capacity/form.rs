//! The forms of a heat-capacity function, and what their coefficients mean.

/// The form of a heat-capacity function. Cp is molar, at constant pressure and in the standard
/// state, in J/(mol K); T is in K.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub enum Form {
    /// Cp = c. Fair over some tens of kelvin.
    Constant,
    /// Cp = Σ ai·T^i, from i = 0. Good inside its range, and worthless soon outside it.
    Polynomial,
    /// Cp = a + b·T + c·T⁻² (C. G. Maier, K. K. Kelley, J. Am. Chem. Soc. 54 (1932) 3243). Made
    /// for solids above 298 K; c is mostly negative, and the form fails at low temperatures.
    MaierKelley,
    /// Cp = A + B·t + C·t² + D·t³ + E·t⁻² with t = T/1000 K, and
    /// H°(T) - H°(298.15 K) = A·t + B·t²/2 + C·t³/3 + D·t⁴/4 - E/t + F - H in kJ/mol
    /// (C. H. Shomate, J. Phys. Chem. 58 (1954) 368; as the NIST Chemistry WebBook writes it).
    /// G belongs to the entropy. H is the formation enthalpy that the fit was made with, so that
    /// the sum without it is on the formation scale.
    Shomate,
    /// Cp/R = a1 + a2·T + a3·T² + a4·T³ + a5·T⁴ and
    /// H°(T)/R = a1·T + a2·T²/2 + a3·T³/3 + a4·T⁴/4 + a5·T⁵/5 + a6
    /// (B. J. McBride, S. Gordon, M. A. Reno, NASA TM-4513, 1993). H° is on the formation scale;
    /// a7 belongs to the entropy. Most ranges are 200 K or 300 K to 1000 K, and 1000 K to 6000 K.
    Nasa7,
    /// Cp/R = a1·T⁻² + a2·T⁻¹ + a3 + a4·T + a5·T² + a6·T³ + a7·T⁴ and
    /// H°(T)/R = -a1·T⁻¹ + a2·ln T + a3·T + a4·T²/2 + a5·T³/3 + a6·T⁴/4 + a7·T⁵/5 + b1
    /// (B. J. McBride, M. J. Zehe, S. Gordon, NASA/TP-2002-211556, 2002). H° is on the
    /// formation scale; b2 belongs to the entropy. Ranges meet at 1000 K and 6000 K for gases,
    /// and at transitions for condensed forms.
    Nasa9,
    /// Straight lines between printed points.
    Table,
}

impl Form {
    pub const ALL: [Form; 7] = [
        Form::Constant,
        Form::Polynomial,
        Form::MaierKelley,
        Form::Shomate,
        Form::Nasa7,
        Form::Nasa9,
        Form::Table,
    ];

    pub fn word(self) -> &'static str {
        match self {
            Form::Constant => "constant",
            Form::Polynomial => "polynomial",
            Form::MaierKelley => "maier-kelley",
            Form::Shomate => "shomate",
            Form::Nasa7 => "nasa-7",
            Form::Nasa9 => "nasa-9",
            Form::Table => "table",
        }
    }

    pub fn from_word(word: &str) -> Option<Form> {
        Form::ALL.into_iter().find(|form| form.word() == word)
    }

    /// How many coefficients the form has; none where the number is free.
    pub fn coefficients(self) -> Option<usize> {
        match self {
            Form::Constant => Some(1),
            Form::MaierKelley => Some(3),
            Form::Shomate => Some(8),
            Form::Nasa7 => Some(7),
            Form::Nasa9 => Some(9),
            Form::Polynomial | Form::Table => None,
        }
    }

    /// Whether the coefficients are those of Cp/R, so that the R of the fit goes with them.
    pub fn needs_gas_constant(self) -> bool {
        matches!(self, Form::Nasa7 | Form::Nasa9)
    }

    /// Whether the form carries integration constants, so that it gives enthalpies on a scale
    /// that goes on from range to range.
    pub fn has_enthalpy_scale(self) -> bool {
        matches!(self, Form::Shomate | Form::Nasa7 | Form::Nasa9)
    }

    /// The powers of the temperature in Cp, in the order of the coefficients; none for a table.
    pub(super) fn powers(self) -> &'static [i32] {
        match self {
            Form::Constant => &[0],
            Form::Polynomial => &POLYNOMIAL,
            Form::MaierKelley => &[0, 1, -2],
            Form::Shomate => &[0, 1, 2, 3, -2],
            Form::Nasa7 => &[0, 1, 2, 3, 4],
            Form::Nasa9 => &[-2, -1, 0, 1, 2, 3, 4],
            Form::Table => &[],
        }
    }

    /// Which coefficient is the integration constant of the enthalpy.
    pub(in crate::source) fn integration_constant(self) -> Option<usize> {
        match self {
            Form::Shomate | Form::Nasa7 => Some(5),
            Form::Nasa9 => Some(7),
            Form::Constant | Form::Polynomial | Form::MaierKelley | Form::Table => None,
        }
    }

    /// What the coefficients take as the unit of temperature, K.
    pub(super) fn kelvin_per_unit(self) -> i32 {
        match self {
            Form::Shomate => 1000,
            _ => 1,
        }
    }
}

/// The most coefficients of a polynomial, far beyond what anybody publishes; it bounds the work.
pub const MOST_POWERS: usize = 20;

const POLYNOMIAL: [i32; MOST_POWERS] = {
    let mut powers = [0; MOST_POWERS];
    let mut i = 0;
    while i < MOST_POWERS {
        powers[i] = i as i32;
        i += 1;
    }
    powers
};

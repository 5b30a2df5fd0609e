//! How far an entry was verified.

/// The standing of an entry, from the weakest to the strongest.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq, PartialOrd, Ord)]
pub enum Standing {
    FromMemory,
    EnteredOnce,
    DoubleEntered,
    ComparedWithOriginal,
    /// Not measured but agreed: reference states, exact constants.
    ByDefinition,
    /// Stated by the case itself; what confirms it stands among the inputs and assumptions.
    #[default]
    Stated,
}

impl Standing {
    /// Those that an entry of a source can have.
    pub const ALL: [Standing; 5] = [
        Standing::FromMemory,
        Standing::EnteredOnce,
        Standing::DoubleEntered,
        Standing::ComparedWithOriginal,
        Standing::ByDefinition,
    ];

    pub fn word(self) -> &'static str {
        match self {
            Standing::FromMemory => "from memory",
            Standing::EnteredOnce => "entered once",
            Standing::DoubleEntered => "double-entered",
            Standing::ComparedWithOriginal => "compared with the original",
            Standing::ByDefinition => "by definition",
            Standing::Stated => "stated in the case",
        }
    }

    pub fn from_word(word: &str) -> Option<Standing> {
        Standing::ALL.into_iter().find(|s| s.word() == word)
    }

    /// Whether a result may rest on the value without a caution.
    pub fn is_compared(self) -> bool {
        self >= Standing::ComparedWithOriginal
    }
}

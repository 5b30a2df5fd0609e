//! How far an entry was verified.

/// The standing of an entry, from the weakest to the strongest.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Standing {
    FromMemory,
    EnteredOnce,
    DoubleEntered,
    ComparedWithOriginal,
    /// Not measured but agreed: reference states, exact constants.
    ByDefinition,
}

impl Standing {
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

//! Sentences that stand in every record.

/// What a heat of reaction does not say (requirement T5 of the project's ledger).
pub(super) const ALWAYS: [&str; 7] = [
    "The heat holds for the phases and states named. A change of phase, dissolution, dilution or \
     mixing that the equation does not name adds its own heat.",
    "The heat holds for complete conversion by the equation as written. Side reactions and \
     products that are not in the equation are not covered.",
    "Gas that is evolved or consumed moves heat and pressure with it. This record does not assess \
     either.",
    "Decomposition and other secondary reactions cannot be seen in formation enthalpies. Onset \
     temperatures and times come from tests alone.",
    "A heat from tables does not replace calorimetry. Measure where heat release governs safety.",
    "An uncertainty that no source states is not zero. Where a result covers fewer values than it \
     uses, its uncertainty is a lower bound.",
    "Local codes, the authority that has jurisdiction and the judgement of a licensed professional \
     govern the use of this record.",
];

/// How the program is verified, and within which limits.
pub(super) const VERIFICATION: [&str; 3] = [
    "Sums are worked in exact rational arithmetic; nothing is rounded before a result is stated \
     (ASTM E29, half to even). Uncertainty is combined to first order with the correlations that \
     sources state (JCGM 100:2008, 5.1.2 and 5.2.2).",
    "The test suite of this version compares it with published heats of reaction, tables of \
     enthalpies over temperature, calorific values of ISO 6976 (as transcribed), measured heats, an \
     independent thermochemistry library on the same data, and worked examples of ASTM E29 and \
     JCGM 100; each source stands beside its test.",
    "Limits: heats between standard states, at temperatures inside the ranges of the heat \
     capacities cited. The pressure has no part in them. Balances of plant and safety figures are \
     outside this version.",
];

/// What it takes to run the record again.
pub(super) const RERUN: &str = "The attachments hold the case, every source entry that decided \
    something, the results and the manifest. The command “hesswright extract” writes them out; \
    “hesswright compute case.toml” works them again there.";

//! From a case and its sources to a problem: what is known so far, and the order of the work.
//!
//! Leaves to others: reactions, participants, cycles and fuels, and what each looks up.

use std::cell::OnceCell;
use std::collections::{BTreeMap, BTreeSet};
use std::rc::Rc;

use crate::case::Case;
use crate::finding::{Faults, Finding, Text};
use crate::notation::Element;
use crate::quantity::{Correlations, Exact};

use super::builtin::{ATOMIC_WEIGHTS, CONSTANTS, KOPP};
use super::consult::{Consultation, SourceFiles, load_built_in};
use super::cycle::ProblemCycle;
use super::heating_value::ProblemHeatingValue;
use super::matching::Wanted;
use super::model::Entry;
use super::path::Material;
use super::problem::{BoundedPath, EnthalpyPath, Problem, ProblemReaction, Substance, ValueUsed};
use super::reference_states::ReferenceStates;
use super::store::Source;

/// Resolves every substance of a case. All faults are reported; the problem is there only where
/// there are none.
pub fn resolve(
    case: &Case,
    text: &Text,
    consultation: Consultation,
    files: &dyn SourceFiles,
) -> (Option<Problem>, Faults) {
    let mut resolver = Resolver::new(case, text, consultation);
    if case
        .reactions
        .values()
        .any(|reaction| reaction.per.is_some())
        || resolver.gives_specific_heat_capacity()
    {
        resolver.add_built_in(ATOMIC_WEIGHTS, files);
    }
    if resolver.estimates_heat_capacity() {
        resolver.add_built_in(KOPP, files);
    }
    resolver.add_for_cycles(files);
    if !case.heating_values.is_empty() {
        resolver.add_built_in(ATOMIC_WEIGHTS, files);
        resolver.add_built_in(CONSTANTS, files);
    }
    let reactions = case.reactions.values();
    let reactions: Vec<_> = reactions
        .map(|reaction| resolver.reaction(reaction))
        .collect();
    let cycles = resolver.cycles();
    let fuels = case.heating_values.values();
    let fuels: Vec<_> = fuels.map(|fuel| resolver.heating_value(fuel)).collect();
    resolver.check_choices();
    resolver.check_allowances();
    resolver.check_correlations();
    let faults = std::mem::take(&mut resolver.faults);
    let problem = faults
        .is_empty()
        .then(|| resolver.problem(reactions, cycles, fuels));
    (problem, faults)
}

/// What is known so far.
pub(super) struct Resolver<'a> {
    pub(super) case: &'a Case,
    pub(super) text: &'a Text,
    pub(super) sources: Vec<Source>,
    pub(super) consulted: usize,
    pub(super) became: Vec<(String, usize)>,
    /// By the label of the case; none where it could not be resolved, so that the fault is
    /// reported once.
    pub(super) known: BTreeMap<(String, Option<Exact>), Option<usize>>,
    pub(super) substances: Vec<Substance>,
    /// For each substance the entry that serves, and what was asked for.
    pub(super) serving: Vec<Serving>,
    /// What the paths of each substance are made from, once a path was asked for.
    pub(super) materials: BTreeMap<usize, Rc<Material>>,
    pub(super) paths: Vec<EnthalpyPath>,
    pub(super) bounded: Vec<BoundedPath>,
    pub(super) known_paths: BTreeMap<(usize, Exact), Option<usize>>,
    /// The formulas of substances that were looked for in the sources, found or not.
    pub(super) named_formulas: BTreeSet<String>,
    pub(super) values: Vec<ValueUsed>,
    /// Values that were entered, by source, kind and what tells them apart.
    pub(super) entered: BTreeMap<(usize, &'static str, String), usize>,
    /// What was said, so that it is said once.
    pub(super) said: BTreeSet<String>,
    pub(super) case_source: usize,
    /// Correlations that the case states between values used.
    pub(super) stated_correlations: Correlations,
    /// Participants that are looked up beside reactions, by their label.
    pub(super) looked_up: BTreeSet<String>,
    pub(super) atomic_weights: BTreeMap<String, usize>,
    pub(super) findings: Vec<Finding>,
    pub(super) faults: Faults,
    /// All entries of the sources, gathered at the first unknown substance.
    pub(super) listed: OnceCell<Vec<Entry>>,
}

/// What serves for a substance.
#[derive(Clone, Debug)]
pub(super) struct Serving {
    pub(super) source: usize,
    pub(super) entry: Entry,
    pub(super) wanted: Wanted,
}

impl<'a> Resolver<'a> {
    fn new(case: &'a Case, text: &'a Text, consultation: Consultation) -> Resolver<'a> {
        let mut sources = consultation.sources;
        let consulted = sources.len();
        sources.push(Source::case(text, &case.record.preparer));
        Resolver {
            case,
            text,
            consulted,
            case_source: consulted,
            sources,
            serving: Vec::new(),
            materials: BTreeMap::new(),
            paths: Vec::new(),
            bounded: Vec::new(),
            known_paths: BTreeMap::new(),
            named_formulas: BTreeSet::new(),
            entered: BTreeMap::new(),
            said: BTreeSet::new(),
            stated_correlations: Correlations::default(),
            looked_up: BTreeSet::new(),
            became: consultation.became,
            known: BTreeMap::new(),
            substances: Vec::new(),
            values: Vec::new(),
            atomic_weights: BTreeMap::new(),
            findings: Vec::new(),
            faults: Faults::default(),
            listed: OnceCell::new(),
        }
    }

    /// Whether the case names a substance in what it works.
    pub(super) fn is_participant(&self, label: &str) -> bool {
        self.looked_up.contains(label) || self.known.keys().any(|(known, _)| known == label)
    }

    /// The substances that the case names in what it works, each as it writes it.
    pub(super) fn participants(&self) -> impl Iterator<Item = &str> {
        let looked_up = self.looked_up.iter().map(String::as_str);
        looked_up.chain(self.known.keys().map(|(known, _)| known.as_str()))
    }

    /// All entries of the sources.
    pub(super) fn listed(&self) -> &[Entry] {
        let gathered = || self.sources.iter().flat_map(Source::all).collect();
        self.listed.get_or_init(gathered)
    }

    /// A built-in source that results need beyond those consulted.
    pub(super) fn add_built_in(&mut self, id: &str, files: &dyn SourceFiles) {
        if self.sources.iter().any(|source| source.id() == id) {
            return;
        }
        let (source, faults) = load_built_in(id, files);
        self.faults.extend(faults);
        if let Some(source) = source {
            self.became.push((id.to_string(), self.sources.len()));
            self.sources.push(source);
        }
    }

    pub(super) fn problem(
        self,
        reactions: Vec<ProblemReaction>,
        cycles: Vec<ProblemCycle>,
        heating_values: Vec<ProblemHeatingValue>,
    ) -> Problem {
        let correlations = self.correlations();
        let counts = self.substances.iter().map(|s| s.species.formula.counts());
        let elements: BTreeSet<Element> = counts.flat_map(|c| c.keys().copied()).collect();
        Problem {
            // The conventions are always the first source.
            reference_states: ReferenceStates::of(&self.sources[0], elements),
            consulted: self.consulted,
            case_source: self.case_source,
            paths: self.paths,
            bounded: self.bounded,
            became: self.became,
            substances: self.substances,
            values: self.values,
            reactions,
            cycles,
            heating_values,
            correlations,
            findings: self.findings,
            sources: self.sources,
            named_formulas: self.named_formulas,
        }
    }
}

//! From a case and its sources to a problem.

use std::cell::OnceCell;
use std::collections::{BTreeMap, BTreeSet};

use crate::case::{Case, DeclaredKind, Reaction};
use crate::finding::{Fault, FaultCode, Faults, Finding, Span, Text};
use crate::notation::{Element, Participant, Species};
use crate::quantity::{Correlations, Exact, Quantity, to_f64};

use super::builtin::ATOMIC_WEIGHTS;
use super::choose::{Chosen, choose};
use super::compare::compare;
use super::consult::{Consultation, SourceFiles, load_built_in};
use super::matching::Wanted;
use super::model::{Digits, Entry, SourceHead, Subject};
use super::problem::{Problem, ProblemReaction, ProblemTerm, Substance, ValueKind, ValueUsed};
use super::reference_states::ReferenceStates;
use super::store::Source;
use crate::quantity::{InputUncertainty, Significance};

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
    {
        resolver.add_atomic_weights(files);
    }
    let reactions = case.reactions.values();
    let reactions: Vec<_> = reactions
        .map(|reaction| resolver.reaction(reaction))
        .collect();
    resolver.check_choices();
    resolver.check_allowances();
    resolver.check_correlations();
    let faults = std::mem::take(&mut resolver.faults);
    let problem = faults.is_empty().then(|| resolver.problem(reactions));
    (problem, faults)
}

/// What is known so far.
pub(super) struct Resolver<'a> {
    pub(super) case: &'a Case,
    pub(super) text: &'a Text,
    pub(super) sources: Vec<Source>,
    consulted: usize,
    became: Vec<(String, usize)>,
    /// By the label of the case; none where it could not be resolved, so that the fault is
    /// reported once.
    known: BTreeMap<String, Option<usize>>,
    pub(super) substances: Vec<Substance>,
    pub(super) values: Vec<ValueUsed>,
    pub(super) atomic_weights: BTreeMap<String, usize>,
    pub(super) findings: Vec<Finding>,
    pub(super) faults: Faults,
    /// All entries of the sources, gathered at the first unknown substance.
    listed: OnceCell<Vec<Entry>>,
}

impl<'a> Resolver<'a> {
    fn new(case: &'a Case, text: &'a Text, consultation: Consultation) -> Resolver<'a> {
        Resolver {
            case,
            text,
            consulted: consultation.sources.len(),
            sources: consultation.sources,
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
        self.known.contains_key(label)
    }

    /// The substances that the case names in what it works, each as it writes it.
    pub(super) fn participants(&self) -> impl Iterator<Item = &str> {
        self.known.keys().map(String::as_str)
    }

    /// All entries of the sources.
    pub(super) fn listed(&self) -> &[Entry] {
        let gathered = || self.sources.iter().flat_map(Source::all).collect();
        self.listed.get_or_init(gathered)
    }

    fn add_atomic_weights(&mut self, files: &dyn SourceFiles) {
        if self
            .sources
            .iter()
            .any(|source| source.id() == ATOMIC_WEIGHTS)
        {
            return;
        }
        let (source, faults) = load_built_in(ATOMIC_WEIGHTS, files);
        self.faults.extend(faults);
        if let Some(source) = source {
            self.became
                .push((ATOMIC_WEIGHTS.to_string(), self.sources.len()));
            self.sources.push(source);
        }
    }

    fn problem(self, reactions: Vec<Option<ProblemReaction>>) -> Problem {
        let correlations = self.correlations();
        let counts = self.substances.iter().map(|s| s.species.formula.counts());
        let elements: BTreeSet<Element> = counts.flat_map(|c| c.keys().copied()).collect();
        Problem {
            // The conventions are always the first source.
            reference_states: ReferenceStates::of(&self.sources[0], elements),
            consulted: self.consulted,
            became: self.became,
            substances: self.substances,
            values: self.values,
            reactions: reactions.into_iter().flatten().collect(),
            correlations,
            findings: self.findings,
            sources: self.sources,
        }
    }

    fn reaction(&mut self, reaction: &Reaction) -> Option<ProblemReaction> {
        let equation = &reaction.equation;
        self.check_balance(reaction);
        let sides = [(&equation.value.left, -1), (&equation.value.right, 1)];
        let mut terms = Vec::new();
        let mut complete = true;
        for (term, sign) in sides
            .iter()
            .flat_map(|(side, sign)| side.iter().map(move |t| (t, sign)))
        {
            let place = self.text.inside(&equation.span, &term.span);
            let Some(substance) = self.participant(&term.participant, &place) else {
                complete = false;
                continue;
            };
            let nu = &term.coefficient * Exact::from_integer((*sign).into());
            terms.push(ProblemTerm { substance, nu });
        }
        if !complete {
            return None;
        }
        let all = equation.value.left.iter().chain(&equation.value.right);
        let names: Vec<String> = all.map(|term| term.participant.to_string()).collect();
        let per = reaction.per.as_ref();
        let per = per.and_then(|per| names.iter().position(|name| *name == per.value));
        let molar_mass = per.map_or_else(Vec::new, |index| {
            let species = self.substances[terms[index].substance].species.clone();
            self.molar_mass(reaction, &species)
        });
        Some(ProblemReaction {
            id: reaction.id.value.clone(),
            equation: equation.value.clone(),
            terms,
            per,
            molar_mass,
            temperature: reaction.temperature.clone().map(|t| (t.value, t.span)),
            span: equation.span.clone(),
        })
    }

    fn participant(&mut self, participant: &Participant, span: &Span) -> Option<usize> {
        let label = participant.to_string();
        if let Some(known) = self.known.get(&label) {
            return *known;
        }
        let found = self
            .wanted(participant)
            .and_then(|wanted| self.substance(&wanted, span));
        self.known.insert(label, found);
        found
    }

    /// What the case asks for; none where the reading of the case has reported it already.
    pub(super) fn wanted(&self, participant: &Participant) -> Option<Wanted> {
        match participant {
            Participant::Species(species) => Some(Wanted {
                label: species.to_string(),
                species: species.clone(),
                names: Vec::new(),
                cas: None,
            }),
            Participant::Declared(id) => {
                let declared = self.case.substances.get(id)?;
                let DeclaredKind::Compound { formula, phase } = &declared.kind else {
                    return None;
                };
                // A name that the case gives goes before the id, which is often a short form.
                let name = declared.name.clone().unwrap_or_else(|| id.clone());
                Some(Wanted {
                    label: id.clone(),
                    species: Species {
                        formula: formula.clone(),
                        phase: Some(phase.clone()),
                    },
                    names: vec![name],
                    cas: declared.cas.clone(),
                })
            }
        }
    }

    fn substance(&mut self, wanted: &Wanted, span: &Span) -> Option<usize> {
        let chosen = choose(self, wanted, span)?;
        let value = self.value_used(&chosen, span);
        let comparisons = compare(self, wanted, &chosen, &self.values[value].clone(), span);
        // `choose` returns entries of species alone.
        let species = chosen
            .entry
            .species()
            .cloned()
            .unwrap_or(wanted.species.clone());
        self.substances.push(Substance {
            label: wanted.label.clone(),
            species,
            name: chosen.entry.name.clone(),
            value,
            comparisons,
            because: chosen.because.clone(),
        });
        Some(self.substances.len() - 1)
    }

    /// The same entry under two labels is one value.
    fn value_used(&mut self, chosen: &Chosen, span: &Span) -> usize {
        let printed = chosen.value.clone();
        let entry = &chosen.entry;
        let substance = entry.species().map_or_else(String::new, Species::to_string);
        let same = |v: &ValueUsed| {
            v.source == chosen.source
                && v.substance == substance
                && (&v.name, &v.cas, &v.locator) == (&entry.name, &entry.cas, &entry.locator)
        };
        if let Some(index) = self.values.iter().position(same) {
            return index;
        }
        let head = &self.sources[chosen.source].head;
        let significance = match (printed.exact, head.digits) {
            (true, _) => Significance::Exact,
            (false, Digits::FixedDecimals) => Significance::Unlimited,
            (false, Digits::Significant) => printed.significance(),
        };
        let value = ValueUsed {
            significance,
            ..value_of(
                chosen.source,
                head,
                ValueKind::FormationEnthalpy,
                entry,
                printed,
                span,
            )
        };
        self.values.push(value);
        self.values.len() - 1
    }

    /// A choice for a substance that no reaction names is a slip that should not pass.
    fn check_choices(&mut self) {
        for choice in &self.case.choices {
            let label = Species::parse(&choice.substance.value)
                .map_or(choice.substance.value.clone(), |species| {
                    species.to_string()
                });
            if !self.is_participant(&label) {
                let known: Vec<&str> = self.participants().collect();
                self.faults.push(Fault::new(
                    FaultCode::UnknownId,
                    self.text,
                    &choice.substance.span,
                    format!("a choice for `{}`", choice.substance.value),
                    format!("a participant of a reaction: {}", known.join(", ")),
                    "write the substance as it stands in the equation",
                ));
            }
        }
    }

    /// Correlations that cannot all be true would make a variance negative.
    fn check_correlations(&mut self) {
        let used: Vec<usize> = (0..self.values.len()).collect();
        let (found, expected, advice) = match self.correlations().is_consistent(&used) {
            Ok(true) => return,
            Err(error) => (error.found(), error.expected(), error.advice()),
            Ok(false) => (
                "correlations that contradict each other".to_string(),
                "coefficients that can all be true together (JCGM 100:2008, 5.2)".to_string(),
                "compare the coefficients with the source".to_string(),
            ),
        };
        let with_any = self
            .sources
            .iter()
            .filter(|source| !source.correlations.is_empty());
        let ids: Vec<&str> = with_any.map(Source::id).collect();
        let span = self
            .case
            .consult
            .first()
            .map_or(0..0, |name| name.span.clone());
        self.faults.push(Fault::new(
            FaultCode::Source,
            self.text,
            &span,
            format!("{found} ({})", ids.join(", ")),
            expected,
            advice,
        ));
    }

    /// Correlations that the sources state, between values used.
    fn correlations(&self) -> Correlations {
        let mut correlations = Correlations::default();
        for (index, source) in self.sources.iter().enumerate() {
            for stated in &source.correlations {
                let of = |wanted: &Species| {
                    let name = wanted.to_string();
                    self.values
                        .iter()
                        .position(|v| v.source == index && v.substance == name)
                };
                if let (Some(a), Some(b)) = (of(&stated.between[0]), of(&stated.between[1])) {
                    // The reader of sources has checked that the coefficient is one.
                    let _ = correlations.state(a, b, to_f64(&stated.coefficient.value()));
                }
            }
        }
        correlations
    }
}

/// An entry's value with its origin; its digits are those that it prints.
pub(super) fn value_of(
    source: usize,
    head: &SourceHead,
    kind: ValueKind,
    entry: &Entry,
    printed: Quantity,
    span: &Span,
) -> ValueUsed {
    ValueUsed {
        source,
        kind,
        substance: match &entry.subject {
            Subject::Species(species) => species.to_string(),
            Subject::Symbol(symbol) => symbol.clone(),
        },
        species: entry.species().cloned(),
        name: entry.name.clone(),
        cas: entry.cas.clone(),
        significance: printed.significance(),
        uncertainty: input_uncertainty(&printed, head),
        printed,
        locator: entry.locator.clone(),
        note: entry.note.clone(),
        standing: entry.standing,
        used_at: span.clone(),
    }
}

fn input_uncertainty(printed: &Quantity, head: &SourceHead) -> InputUncertainty {
    match &printed.uncertainty {
        _ if printed.exact => InputUncertainty::Exact,
        None => InputUncertainty::NotStated,
        Some(stated) => InputUncertainty::Standard(stated.standard(&head.coverage)),
    }
}

//! From a case and its sources to a problem.

use std::cell::OnceCell;
use std::collections::{BTreeMap, BTreeSet};
use std::rc::Rc;

use crate::case::{Case, DeclaredKind, Given, Reaction};
use crate::finding::{Fault, FaultCode, Faults, Finding, Span, Text};
use crate::notation::{Element, Participant, Species};
use crate::quantity::{Correlations, Decimal, Exact, Quantity, to_f64};

use super::builtin::{ATOMIC_WEIGHTS, CONSTANTS, KOPP};
use super::choose::choose;
use super::compare::compare;
use super::consult::{Consultation, SourceFiles, load_built_in};
use super::cycle::ProblemCycle;
use super::heating_value::ProblemHeatingValue;
use super::matching::Wanted;
use super::model::{Entry, SourceHead, Subject};
use super::path::{Candidate, Material, reference_kelvin};
use super::problem::{
    BoundedPath, EnthalpyPath, Problem, ProblemReaction, ProblemTerm, Substance, ValueKind,
    ValueUsed,
};
use super::reference_states::ReferenceStates;
use super::stable::is_stable;
use super::store::Source;
use crate::quantity::InputUncertainty;

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
    became: Vec<(String, usize)>,
    /// By the label of the case; none where it could not be resolved, so that the fault is
    /// reported once.
    known: BTreeMap<(String, Option<Exact>), Option<usize>>,
    pub(super) substances: Vec<Substance>,
    /// For each substance the entry that serves, and what was asked for.
    pub(super) serving: Vec<Serving>,
    /// What the paths of each substance are made from, once a path was asked for.
    pub(super) materials: BTreeMap<usize, Rc<Material>>,
    pub(super) paths: Vec<EnthalpyPath>,
    pub(super) bounded: Vec<BoundedPath>,
    pub(super) known_paths: BTreeMap<(usize, Exact), Option<usize>>,
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
    listed: OnceCell<Vec<Entry>>,
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

    fn problem(
        self,
        reactions: Vec<Option<ProblemReaction>>,
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
            reactions: reactions.into_iter().flatten().collect(),
            cycles,
            heating_values,
            correlations,
            findings: self.findings,
            sources: self.sources,
        }
    }

    fn reaction(&mut self, reaction: &Reaction) -> Option<ProblemReaction> {
        let equation = &reaction.equation;
        self.check_balance(equation);
        let (kelvin, temperature_value) = self.temperature(reaction.temperature.as_ref());
        let sides = [(&equation.value.left, -1), (&equation.value.right, 1)];
        let mut terms = Vec::new();
        let mut complete = true;
        for (term, sign) in sides
            .iter()
            .flat_map(|(side, sign)| side.iter().map(move |t| (t, sign)))
        {
            let place = self.text.inside(&equation.span, &term.span);
            let Some(substance) = self.participant(&term.participant, &kelvin, &place) else {
                complete = false;
                continue;
            };
            let nu = &term.coefficient * Exact::from_integer((*sign).into());
            let path = self.path(substance, &kelvin, &place);
            terms.push(ProblemTerm {
                substance,
                nu,
                path,
            });
        }
        if !complete {
            // A fault says why, and then there is no problem; or a `stop`.
            terms.clear();
        }
        self.check_vapours(reaction, &terms, &kelvin);
        let left_out = self.dissolve(reaction, &mut terms);
        let all = equation.value.left.iter().chain(&equation.value.right);
        let names: Vec<String> = all.map(|term| term.participant.to_string()).collect();
        let per = reaction.per.as_ref();
        let per = per.and_then(|per| names.iter().position(|name| *name == per.value));
        let per = per.filter(|_| complete);
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
            kelvin,
            temperature_value,
            left_out,
            span: equation.span.clone(),
        })
    }

    /// The temperature of a heat in K, and the input that states it where there is one.
    pub(super) fn temperature(&mut self, given: Option<&Given>) -> (Exact, Option<usize>) {
        let quantity = given.and_then(|given| given.quantity(&self.case.inputs));
        let kelvin = quantity.map_or_else(reference_kelvin, Quantity::value_in_si);
        let value = match given {
            // An exact temperature is the question, not a value that the answer rests on.
            Some(Given::Input(id)) if quantity.is_some_and(|q| !q.exact) => {
                self.input_value(&id.value)
            }
            _ => None,
        };
        (kelvin, value)
    }

    /// A participant as the case writes it, in the form that it has at a temperature in K.
    pub(super) fn participant(
        &mut self,
        participant: &Participant,
        kelvin: &Exact,
        span: &Span,
    ) -> Option<usize> {
        let label = participant.to_string();
        let wanted = self.wanted(participant);
        // Which form is stable depends on the temperature.
        let stable = wanted.as_ref().is_some_and(is_stable);
        let key = (label, stable.then(|| kelvin.clone()));
        if let Some(known) = self.known.get(&key) {
            return *known;
        }
        let found = wanted.and_then(|wanted| self.substance(&wanted, kelvin, span));
        self.known.insert(key, found);
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

    fn substance(&mut self, wanted: &Wanted, kelvin: &Exact, span: &Span) -> Option<usize> {
        let chosen = choose(self, wanted, kelvin, span)?;
        let candidate = Candidate {
            source: chosen.source,
            entry: Rc::new(chosen.entry.clone()),
        };
        let value = self.formation_value(&candidate, span);
        let comparisons = match value {
            Some(value) => compare(self, wanted, &chosen, &self.values[value].clone(), span),
            None => Vec::new(),
        };
        self.serving.push(Serving {
            source: chosen.source,
            entry: chosen.entry.clone(),
            wanted: wanted.clone(),
        });
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
            source: chosen.source,
            value,
            comparisons,
            because: chosen.because.clone(),
        });
        Some(self.substances.len() - 1)
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
        let mut correlations = self.stated_correlations.clone();
        for (index, source) in self.sources.iter().enumerate() {
            for stated in &source.correlations {
                let of = |wanted: &Species| {
                    let name = wanted.to_string();
                    self.values.iter().position(|v| {
                        v.source == index
                            && v.substance == name
                            && v.kind == ValueKind::FormationEnthalpy
                    })
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
        function: None,
        made_of: Vec::new(),
        locator: entry.locator.clone(),
        note: entry.note.clone(),
        standing: entry.standing,
        used_at: span.clone(),
    }
}

/// The R that the functions of a source were fitted with, J/(mol K); where it states none it has
/// no function that needs one.
pub(super) fn gas_constant(head: &SourceHead) -> Exact {
    let stated = head.gas_constant.as_ref();
    stated.map_or_else(|| Exact::from_integer(0.into()), Decimal::value)
}

fn input_uncertainty(printed: &Quantity, head: &SourceHead) -> InputUncertainty {
    match &printed.uncertainty {
        _ if printed.exact => InputUncertainty::Exact,
        None => InputUncertainty::NotStated,
        Some(stated) => InputUncertainty::Standard(stated.standard(&head.coverage)),
    }
}

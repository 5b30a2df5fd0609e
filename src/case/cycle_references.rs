//! Which cycles rest on which: the order in which they are worked, and that none rests on itself.

use indexmap::IndexMap;

use crate::document::Reader;
use crate::finding::{FaultCode, Located};

use super::cycle::{Cycle, StepHeat};
use super::given::Given;

/// The results that a cycle's steps name.
fn named(cycle: &Cycle) -> impl Iterator<Item = &Located<String>> {
    cycle.steps.iter().filter_map(|step| match &step.heat {
        StepHeat::Given(Given::Result(name)) => Some(name),
        _ => None,
    })
}

fn id_of(name: &Located<String>) -> &str {
    name.value.split_once('.').map_or("", |(id, _)| id)
}

/// Reports each ring of cycles once, where its first cycle names another one of it.
pub(super) fn report_rings(reader: &Reader<'_>, cycles: &IndexMap<String, Cycle>) {
    for ring in &Order::of(cycles).rings {
        let ids: Vec<&str> = ring.iter().map(|index| id_at(cycles, *index)).collect();
        let first = ids.first().copied().unwrap_or_default();
        let shown: Vec<&str> = ids.iter().copied().chain([first]).collect();
        let mut names = cycles.get(first).into_iter().flat_map(named);
        let Some(name) = names.find(|name| ids.contains(&id_of(name))) else {
            continue;
        };
        reader.fault(
            FaultCode::Value,
            &name.span,
            format!("cycles that rest on each other: {}", shown.join(" → ")),
            "a cycle that rests on measured heats, on reactions or on cycles that do not rest on it",
            "give one of them a measured heat",
        );
    }
}

fn id_at(cycles: &IndexMap<String, Cycle>, index: usize) -> &str {
    cycles.get_index(index).map_or("", |(id, _)| id)
}

/// The order in which cycles can be worked.
#[derive(Debug, Default)]
pub(crate) struct Order {
    /// Each after those that it rests on.
    pub(crate) worked: Vec<usize>,
    /// Cycles that rest on themselves through each other.
    rings: Vec<Vec<usize>>,
}

/// How far the search for the order has come with a cycle.
#[derive(Clone, Copy, PartialEq, Eq)]
enum Mark {
    New,
    OnTheWay,
    Done,
}

impl Order {
    /// A search in depth, without recursion: a chain of cycles can be long.
    pub(crate) fn of(cycles: &IndexMap<String, Cycle>) -> Order {
        let rests = |cycle: &Cycle| -> Vec<usize> {
            named(cycle)
                .filter_map(|name| cycles.get_index_of(id_of(name)))
                .collect()
        };
        let rests: Vec<Vec<usize>> = cycles.values().map(rests).collect();
        let mut order = Order::default();
        let mut marks = vec![Mark::New; rests.len()];
        for start in 0..rests.len() {
            if marks[start] == Mark::New {
                order.search(start, &rests, &mut marks);
            }
        }
        order
    }

    fn search(&mut self, start: usize, rests: &[Vec<usize>], marks: &mut [Mark]) {
        marks[start] = Mark::OnTheWay;
        // The way to where the search is, with how many of each one's cycles were looked at.
        let mut way = vec![(start, 0)];
        while let Some((at, looked)) = way.pop() {
            let Some(next) = rests[at].get(looked).copied() else {
                marks[at] = Mark::Done;
                self.worked.push(at);
                continue;
            };
            way.push((at, looked + 1));
            match marks[next] {
                Mark::New => {
                    marks[next] = Mark::OnTheWay;
                    way.push((next, 0));
                }
                Mark::OnTheWay => {
                    let on_the_way = way.iter().map(|(index, _)| *index);
                    self.rings
                        .push(on_the_way.skip_while(|index| *index != next).collect());
                }
                Mark::Done => {}
            }
        }
    }
}

//! The case's prose: Markdown as data, with results bound to their places.
//!
//! Markdown becomes blocks and runs, never markup of the typesetter. Raw HTML is shown as the
//! text that it is; pictures are replaced by their descriptions.

use pulldown_cmark::{Alignment, CodeBlockKind, Event, HeadingLevel, Parser, Tag, TagEnd};

use crate::calculation::Calculation;
use crate::case::{MARKDOWN, ProsePart, bindings};

use super::numerals::printed;
use super::pages::{Block, ProseSection};
use super::result_rows::in_words;
use super::rich::{Rich, Run};

/// Purpose, scope and method: what stands before the working.
pub(super) fn opening(calculation: &Calculation) -> Vec<ProseSection> {
    let parts = [ProsePart::Purpose, ProsePart::Scope, ProsePart::Method];
    sections(calculation, &parts)
}

/// Discussion and conclusion: what stands after the results.
pub(super) fn closing(calculation: &Calculation) -> Vec<ProseSection> {
    sections(calculation, &[ProsePart::Discussion, ProsePart::Conclusion])
}

fn sections(calculation: &Calculation, parts: &[ProsePart]) -> Vec<ProseSection> {
    let prose = calculation.case.prose.iter();
    let prose = prose.filter(|text| parts.contains(&text.part));
    prose
        .map(|text| ProseSection {
            heading: heading(text.part).to_string(),
            blocks: blocks(&text.markdown.value, &|name| bound(calculation, name)),
        })
        .collect()
}

fn heading(part: ProsePart) -> &'static str {
    match part {
        ProsePart::Purpose => "Purpose",
        ProsePart::Scope => "Scope",
        ProsePart::Method => "Method",
        ProsePart::Discussion => "Discussion",
        ProsePart::Conclusion => "Conclusion",
    }
}

/// What stands in the place of a binding: a stated result or an input as given.
fn bound(calculation: &Calculation, name: &str) -> String {
    if let Some(outcome) = calculation.working.outcome(name) {
        return format!("{} ({})", in_words(outcome), outcome.direction().word());
    }
    match calculation.case.inputs.get(name) {
        Some(input) => {
            let tolerance = input.tolerance.as_ref();
            let tolerance =
                tolerance.map_or(String::new(), |t| format!(" (tolerance ±{})", printed(t)));
            format!("{}{tolerance}", printed(&input.value.value))
        }
        None => format!("({name}: not worked)"),
    }
}

/// Markdown as blocks. `bind` gives the text for a binding.
pub(super) fn blocks(markdown: &str, bind: &dyn Fn(&str) -> String) -> Vec<Block> {
    let mut builder = Builder {
        markdown,
        bind,
        open: vec![Open::new(Kind::Root)],
        emphasis: Vec::new(),
    };
    for (event, range) in Parser::new_ext(markdown, MARKDOWN).into_offset_iter() {
        builder.take(event, range);
    }
    builder.finish()
}

/// What kind of element is being built.
enum Kind {
    Root,
    Paragraph,
    Heading(u8),
    List {
        ordered: bool,
        start: u64,
        items: Vec<Vec<Block>>,
    },
    Item,
    Quote,
    Code,
    Table {
        head: Vec<Rich>,
        rows: Vec<Vec<Rich>>,
    },
    Row,
    Cell,
    /// An element whose content goes to the one around it.
    Through,
}

/// An element that is open: its finished blocks, cells and runs.
struct Open {
    kind: Kind,
    blocks: Vec<Block>,
    cells: Vec<Rich>,
    runs: Vec<Run>,
}

impl Open {
    fn new(kind: Kind) -> Open {
        Open {
            kind,
            blocks: Vec::new(),
            cells: Vec::new(),
            runs: Vec::new(),
        }
    }

    /// Runs that stand outside a paragraph (as in a tight list) become one.
    fn settle(&mut self) {
        if !self.runs.is_empty() {
            let text = Rich(std::mem::take(&mut self.runs));
            self.blocks.push(Block::Paragraph { text });
        }
    }
}

struct Builder<'a> {
    markdown: &'a str,
    bind: &'a dyn Fn(&str) -> String,
    /// Never empty: the root stays open to the end.
    open: Vec<Open>,
    emphasis: Vec<Emphasis>,
}

#[derive(Clone, Copy, PartialEq)]
enum Emphasis {
    Weak,
    Strong,
}

impl Builder<'_> {
    fn take(&mut self, event: Event<'_>, range: std::ops::Range<usize>) {
        match event {
            Event::Start(tag) => self.start(tag),
            Event::End(tag) => self.end(tag),
            Event::Text(text) if self.in_code() => self.run(Run::Code(text.to_string())),
            Event::Text(text) => self.text(&text, range.start),
            Event::Code(text) => self.run(Run::Code(text.to_string())),
            Event::Html(text) | Event::InlineHtml(text) => self.run(Run::Plain(text.to_string())),
            Event::SoftBreak | Event::HardBreak => self.run(Run::Plain(" ".to_string())),
            Event::Rule => self.block(Block::Rule),
            other => self.run(Run::Plain(verbatim(&other))),
        }
    }

    fn start(&mut self, tag: Tag<'_>) {
        let kind = match tag {
            Tag::Paragraph => Kind::Paragraph,
            Tag::Heading { level, .. } => Kind::Heading(prose_level(level)),
            Tag::List(start) => Kind::List {
                ordered: start.is_some(),
                start: start.unwrap_or(1),
                items: Vec::new(),
            },
            Tag::Item => Kind::Item,
            Tag::BlockQuote(_) => Kind::Quote,
            Tag::CodeBlock(CodeBlockKind::Indented | CodeBlockKind::Fenced(_)) => Kind::Code,
            Tag::Table(columns) => self.table(&columns),
            Tag::TableHead | Tag::TableRow => Kind::Row,
            Tag::TableCell => Kind::Cell,
            Tag::Strong => return self.emphasis.push(Emphasis::Strong),
            Tag::Emphasis => return self.emphasis.push(Emphasis::Weak),
            _ => Kind::Through,
        };
        if !matches!(kind, Kind::Through | Kind::Cell | Kind::Row) {
            self.last().settle();
        }
        self.open.push(Open::new(kind));
    }

    /// Columns are set flush left: their alignment in Markdown is layout.
    fn table(&self, _columns: &[Alignment]) -> Kind {
        Kind::Table {
            head: Vec::new(),
            rows: Vec::new(),
        }
    }

    fn end(&mut self, tag: TagEnd) {
        if matches!(tag, TagEnd::Strong | TagEnd::Emphasis) {
            self.emphasis.pop();
            return;
        }
        if self.open.len() < 2 {
            return;
        }
        if let Some(done) = self.open.pop() {
            self.close(done, tag);
        }
    }

    fn close(&mut self, mut done: Open, tag: TagEnd) {
        let text = |done: &mut Open| Rich(std::mem::take(&mut done.runs));
        match done.kind {
            Kind::Paragraph => {
                let text = text(&mut done);
                self.block(Block::Paragraph { text });
            }
            Kind::Heading(level) => {
                let text = text(&mut done);
                self.block(Block::Heading { level, text });
            }
            Kind::List {
                ordered,
                start,
                items,
            } => self.block(Block::List {
                ordered,
                start,
                items,
            }),
            Kind::Item => {
                done.settle();
                if let Kind::List { items, .. } = &mut self.last().kind {
                    items.push(done.blocks);
                }
            }
            Kind::Quote => {
                done.settle();
                self.block(Block::Quote {
                    blocks: done.blocks,
                });
            }
            Kind::Code => self.block(Block::Code {
                text: plain(&done.runs),
            }),
            Kind::Cell => {
                let text = text(&mut done);
                self.last().cells.push(text);
            }
            Kind::Row => self.row(done.cells, tag == TagEnd::TableHead),
            Kind::Table { head, rows } => self.block(Block::Table { head, rows }),
            Kind::Through | Kind::Root => self.last().runs.append(&mut done.runs),
        }
    }

    fn row(&mut self, cells: Vec<Rich>, is_head: bool) {
        if let Kind::Table { head, rows } = &mut self.last().kind {
            match is_head {
                true => *head = cells,
                false => rows.push(cells),
            }
        }
    }

    fn in_code(&self) -> bool {
        self.open
            .last()
            .is_some_and(|open| matches!(open.kind, Kind::Code))
    }

    fn last(&mut self) -> &mut Open {
        let last = self.open.len() - 1;
        &mut self.open[last]
    }

    fn block(&mut self, block: Block) {
        self.last().blocks.push(block);
    }

    fn run(&mut self, run: Run) {
        self.last().runs.push(run);
    }

    /// Running text: bindings are replaced, except where the brace is escaped.
    fn text(&mut self, text: &str, start: usize) {
        let escaped = self.markdown[..start].ends_with('\\') && text.starts_with('{');
        let mut from = 0;
        for binding in bindings(text) {
            if escaped && binding.span.start == 0 {
                continue;
            }
            self.words(&text[from..binding.span.start]);
            let bound = (self.bind)(&binding.name);
            self.words(&bound);
            from = binding.span.end;
        }
        self.words(&text[from..]);
    }

    fn words(&mut self, text: &str) {
        if text.is_empty() {
            return;
        }
        let text = text.to_string();
        let run = match self.emphasis.last() {
            Some(Emphasis::Strong) => Run::Strong(text),
            Some(Emphasis::Weak) => Run::Emphasis(text),
            None => Run::Plain(text),
        };
        self.run(run);
    }

    fn finish(mut self) -> Vec<Block> {
        self.last().settle();
        self.open.swap_remove(0).blocks
    }
}

/// Headings in prose are below those of the record.
fn prose_level(level: HeadingLevel) -> u8 {
    match level {
        HeadingLevel::H1 => 1,
        HeadingLevel::H2 => 2,
        _ => 3,
    }
}

fn plain(runs: &[Run]) -> String {
    let text = |run: &Run| match run {
        Run::Code(text) | Run::Plain(text) => text.clone(),
        _ => String::new(),
    };
    runs.iter().map(text).collect()
}

/// Events that the enabled extensions do not produce are shown as the text they carry.
fn verbatim(event: &Event<'_>) -> String {
    match event {
        Event::InlineMath(text) | Event::DisplayMath(text) | Event::FootnoteReference(text) => {
            text.to_string()
        }
        _ => String::new(),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn read(markdown: &str) -> Vec<Block> {
        blocks(markdown, &|name| format!("<{name}>"))
    }

    fn paragraph(runs: Vec<Run>) -> Block {
        Block::Paragraph { text: Rich(runs) }
    }

    #[test]
    fn bindings_are_replaced_in_running_text_alone() {
        let blocks = read("Heat {a.heat} and `{b.heat}` and \\{c}");
        let Block::Paragraph { text } = &blocks[0] else {
            panic!("{blocks:?}")
        };
        let words: Vec<&str> = text
            .0
            .iter()
            .map(|run| match run {
                Run::Plain(text) | Run::Code(text) => text.as_str(),
                other => panic!("{other:?}"),
            })
            .collect();
        assert_eq!(words.concat(), "Heat <a.heat> and {b.heat} and {c}");
    }

    #[test]
    fn markup_of_a_typesetter_stays_text() {
        assert_eq!(
            read("#panic() $x$"),
            [paragraph(vec![Run::Plain("#panic() $x$".into())])]
        );
        assert_eq!(
            read("a <b>c</b>"),
            [paragraph(vec![
                Run::Plain("a ".into()),
                Run::Plain("<b>".into()),
                Run::Plain("c".into()),
                Run::Plain("</b>".into()),
            ])]
        );
    }

    #[test]
    fn lists_tables_and_code_keep_their_structure() {
        let blocks =
            read("1. one\n2. **two**\n\n| a | b |\n|---|---|\n| c | d |\n\n```\nx {y}\n```\n");
        assert_eq!(
            blocks[0],
            Block::List {
                ordered: true,
                start: 1,
                items: vec![
                    vec![paragraph(vec![Run::Plain("one".into())])],
                    vec![paragraph(vec![Run::Strong("two".into())])],
                ],
            }
        );
        let cell = |text: &str| Rich::plain(text);
        assert_eq!(
            blocks[1],
            Block::Table {
                head: vec![cell("a"), cell("b")],
                rows: vec![vec![cell("c"), cell("d")]],
            }
        );
        assert_eq!(
            blocks[2],
            Block::Code {
                text: "x {y}\n".into()
            }
        );
    }

    #[test]
    fn an_unknown_result_is_said_to_be_missing() {
        assert_eq!(
            blocks("{a.heat}", &|_| "(a.heat: not worked)".into()),
            [paragraph(vec![Run::Plain("(a.heat: not worked)".into())])]
        );
    }
}

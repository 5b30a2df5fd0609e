//! Displayed equations in words, for readers who do not see them.

use super::math::Math;

/// The equation as it would be read aloud; complete and in the order of the tree.
pub(super) fn speak(math: &Math) -> String {
    let words = said(math);
    words.split_whitespace().collect::<Vec<_>>().join(" ")
}

fn said(math: &Math) -> String {
    match math {
        Math::Symbol { text } | Math::Upright { text } => word(text),
        Math::Attach { base, sub, sup } => {
            let sub = sub
                .as_ref()
                .map_or(String::new(), |s| format!(" sub {}", said(s)));
            let sup = sup.as_ref().map_or(String::new(), |s| power(s));
            format!("{}{sub}{sup}", said(base))
        }
        Math::Fraction { over, under } => {
            format!(
                "the fraction {} over {}, end of fraction",
                said(over),
                said(under)
            )
        }
        Math::Sum { index } => format!("the sum over {} of", said(index)),
        Math::Integral { from, to } => {
            format!("the integral from {} to {} of", said(from), said(to))
        }
        Math::Root { of } => format!("the square root of {}, end of root", said(of)),
        Math::Row { of } => of.iter().map(said).collect::<Vec<_>>().join(" "),
    }
}

fn power(sup: &Math) -> String {
    match sup {
        Math::Upright { text } if text == "2" => " squared".to_string(),
        Math::Upright { text } if text == "°" => " standard".to_string(),
        other => format!(" to the {}", said(other)),
    }
}

fn word(text: &str) -> String {
    match text.trim() {
        "Δ" => "Delta".to_string(),
        "ν" => "nu".to_string(),
        "=" => "equals".to_string(),
        "+" => "plus".to_string(),
        "\u{2212}" => "minus".to_string(),
        "·" => "times".to_string(),
        "(" => "open bracket".to_string(),
        ")" => "close bracket".to_string(),
        other => other.replace('\u{2212}', "minus "),
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn symbol(text: &str) -> Math {
        Math::Symbol { text: text.into() }
    }

    #[test]
    fn an_equation_is_spoken_in_the_order_of_its_tree() {
        let math = Math::Row {
            of: vec![
                symbol("U"),
                Math::Upright { text: "=".into() },
                Math::Root {
                    of: Box::new(Math::Attach {
                        base: Box::new(symbol("u")),
                        sub: Some(Box::new(symbol("i"))),
                        sup: Some(Box::new(Math::Upright { text: "2".into() })),
                    }),
                },
            ],
        };
        assert_eq!(
            speak(&math),
            "U equals the square root of u sub i squared, end of root"
        );
    }
}

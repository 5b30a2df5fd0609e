//! Exact numbers read from text by the tests themselves, not by the program's reader.

use num_bigint::BigInt;
use num_rational::BigRational;

/// An exact number from `-552.56`, `22875/2092` or `7`.
pub fn rational(text: &str) -> BigRational {
    match text.split_once('/') {
        Some((over, under)) => BigRational::new(integer(over), integer(under)),
        None => decimal(text),
    }
}

fn decimal(text: &str) -> BigRational {
    let (whole, part) = text.split_once('.').unwrap_or((text, ""));
    let places = u32::try_from(part.len()).expect("a short number");
    BigRational::new(
        integer(&format!("{whole}{part}")),
        BigInt::from(10).pow(places),
    )
}

fn integer(text: &str) -> BigInt {
    text.parse()
        .unwrap_or_else(|_| panic!("{text:?} is no integer"))
}

#[test]
fn text_becomes_the_number_it_says() {
    let fraction = |over: i64, under: i64| BigRational::new(over.into(), under.into());
    assert_eq!(rational("-0.25"), fraction(-1, 4));
    assert_eq!(rational("45.7500"), fraction(183, 4));
    assert_eq!(rational("-6/4"), fraction(-3, 2));
    assert_eq!(rational("12"), fraction(12, 1));
}

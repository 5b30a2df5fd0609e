//! Resolving the conditions that a volume of a fuel refers to.

use crate::case::{Compression, Given, HeatingValue, Metering};
use crate::finding::Located;
use crate::notation::Participant;

use super::heating_value::{FuelComponent, ProblemCompression, ProblemMetering};
use super::problem::ValueKind;
use super::resolve::Resolver;
use super::resolve_heating_value::located;

impl Resolver<'_> {
    pub(super) fn metering(
        &mut self,
        fuel: &HeatingValue,
        metering: &Metering,
        components: &[FuelComponent],
    ) -> Option<ProblemMetering> {
        let source = metering.source.as_deref();
        let mut value = |given: &Given, label: String, key: &str| {
            let locator = located(fuel, &format!("metering.{key}"), source);
            let kind = ValueKind::CompressionData;
            self.stated_or_input(given, kind, label, None, locator, given.span())
        };
        let compression = match &metering.compression {
            None => None,
            Some(Compression::Factor(given)) => Some(ProblemCompression::Factor(value(
                given,
                "compression factor".into(),
                "compression-factor",
            )?)),
            Some(Compression::SecondVirial(given)) => Some(ProblemCompression::SecondVirial(
                value(given, "second virial coefficient".into(), "second-virial")?,
            )),
            Some(Compression::Summation(factors)) => {
                let values = components.iter().map(|component| {
                    let of = |(name, _): &&(Located<Participant>, Given)| {
                        name.value.to_string() == component.label
                    };
                    let (_, given) = factors.iter().find(of)?;
                    let label = format!("summation factor of {}", component.label);
                    value(given, label, "summation-factors")
                });
                Some(ProblemCompression::Summation(
                    values.collect::<Option<_>>()?,
                ))
            }
        };
        Some(ProblemMetering {
            kelvin: self.si(&metering.temperature),
            pascal: self.si(&metering.pressure),
            compression,
            span: metering.pressure.span().clone(),
        })
    }
}

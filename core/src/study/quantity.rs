//! A number with what is known about it.

use serde::de::{self, MapAccess, Visitor};
use serde::ser::SerializeStruct;
use serde::{Deserialize, Deserializer, Serialize, Serializer};
use std::fmt;

/// A number that may carry a standard uncertainty or a range, and a source.
///
/// In a file it is a bare number, or an object with `value` and any of `standard_uncertainty`,
/// `range` and `source`. The unit is in the name of the field that holds it.
#[derive(Clone, Debug, Default, PartialEq)]
pub struct Quantity {
    /// The value, in the unit of the field's name.
    pub value: f64,
    /// Standard uncertainty, same unit.
    pub standard_uncertainty: Option<f64>,
    /// Lowest and highest value thought possible, same unit.
    pub range: Option<Range>,
    /// Where the number comes from.
    pub source: String,
}

/// A closed range; a quantity known only by its range is taken as uniform within it.
#[derive(Clone, Copy, Debug, PartialEq, Serialize, Deserialize)]
#[cfg_attr(feature = "schema", derive(schemars::JsonSchema))]
#[serde(deny_unknown_fields)]
pub struct Range {
    /// Lowest value.
    pub low: f64,
    /// Highest value.
    pub high: f64,
}

impl Quantity {
    /// A value taken as exact.
    pub fn exact(value: f64) -> Self {
        Self { value, ..Self::default() }
    }

    /// A value with its standard uncertainty.
    pub fn with_u(value: f64, standard_uncertainty: f64) -> Self {
        Self { value, standard_uncertainty: Some(standard_uncertainty), ..Self::default() }
    }

    /// A value with the range it may lie in.
    pub fn within(value: f64, low: f64, high: f64) -> Self {
        Self { value, range: Some(Range { low, high }), ..Self::default() }
    }

    /// The same quantity with its source.
    pub fn from_source(mut self, source: &str) -> Self {
        self.source = source.to_owned();
        self
    }

    /// Standard uncertainty, in the unit of the value: the stated one, else from the range as
    /// `(high − low)/√12`, else 0.
    ///
    /// Reference: JCGM 100:2008 4.3.7 (a quantity uniform between two bounds).
    pub fn standard_uncertainty(&self) -> f64 {
        match (self.standard_uncertainty, self.range) {
            (Some(u), _) => u,
            (None, Some(r)) => (r.high - r.low) / 12f64.sqrt(),
            (None, None) => 0.0,
        }
    }
}

impl From<f64> for Quantity {
    fn from(value: f64) -> Self {
        Self::exact(value)
    }
}

impl Serialize for Quantity {
    fn serialize<S: Serializer>(&self, s: S) -> Result<S::Ok, S::Error> {
        if self.standard_uncertainty.is_none() && self.range.is_none() && self.source.is_empty() {
            return s.serialize_f64(self.value);
        }
        let mut out = s.serialize_struct("Quantity", 4)?;
        out.serialize_field("value", &self.value)?;
        if let Some(u) = self.standard_uncertainty {
            out.serialize_field("standard_uncertainty", &u)?;
        }
        if let Some(r) = &self.range {
            out.serialize_field("range", r)?;
        }
        if !self.source.is_empty() {
            out.serialize_field("source", &self.source)?;
        }
        out.end()
    }
}

impl<'de> Deserialize<'de> for Quantity {
    fn deserialize<D: Deserializer<'de>>(d: D) -> Result<Self, D::Error> {
        struct Read;
        impl<'de> Visitor<'de> for Read {
            type Value = Quantity;
            fn expecting(&self, f: &mut fmt::Formatter) -> fmt::Result {
                f.write_str("a number, or an object with \"value\"")
            }
            fn visit_f64<E: de::Error>(self, v: f64) -> Result<Quantity, E> {
                Ok(Quantity::exact(v))
            }
            fn visit_i64<E: de::Error>(self, v: i64) -> Result<Quantity, E> {
                Ok(Quantity::exact(v as f64))
            }
            fn visit_u64<E: de::Error>(self, v: u64) -> Result<Quantity, E> {
                Ok(Quantity::exact(v as f64))
            }
            fn visit_map<A: MapAccess<'de>>(self, mut map: A) -> Result<Quantity, A::Error> {
                let mut q = Quantity::default();
                let mut seen_value = false;
                while let Some(key) = map.next_key::<String>()? {
                    match key.as_str() {
                        "value" => {
                            q.value = map.next_value()?;
                            seen_value = true;
                        }
                        "standard_uncertainty" => q.standard_uncertainty = map.next_value()?,
                        "range" => q.range = map.next_value()?,
                        "source" => q.source = map.next_value()?,
                        _ => {
                            const KNOWN: &[&str] = &["value", "standard_uncertainty", "range", "source"];
                            return Err(de::Error::unknown_field(&key, KNOWN));
                        }
                    }
                }
                if seen_value { Ok(q) } else { Err(de::Error::missing_field("value")) }
            }
        }
        d.deserialize_any(Read)
    }
}

#[cfg(feature = "schema")]
impl schemars::JsonSchema for Quantity {
    fn schema_name() -> std::borrow::Cow<'static, str> {
        "Quantity".into()
    }
    fn json_schema(g: &mut schemars::SchemaGenerator) -> schemars::Schema {
        let range = g.subschema_for::<Range>();
        schemars::json_schema!({
            "description": "A bare number, or an object with what is known about it. The unit is in the field's name.",
            "oneOf": [
                { "type": "number" },
                {
                    "type": "object",
                    "properties": {
                        "value": { "type": "number" },
                        "standard_uncertainty": { "type": ["number", "null"], "minimum": 0 },
                        "range": { "anyOf": [range, { "type": "null" }] },
                        "source": { "type": "string" }
                    },
                    "required": ["value"],
                    "additionalProperties": false
                }
            ]
        })
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_quantity_is_bare_or_an_object() {
        let bare: Quantity = serde_json::from_str("3.4").unwrap();
        assert_eq!(bare, Quantity::exact(3.4));
        let full = Quantity::within(9.5, 4.6, 10.2).from_source("a table");
        let text = serde_json::to_string(&full).unwrap();
        assert_eq!(serde_json::from_str::<Quantity>(&text).unwrap(), full);
        assert_eq!(serde_json::to_string(&bare).unwrap(), "3.4");
    }

    #[test]
    fn a_misspelt_part_is_named() {
        let e = serde_json::from_str::<Quantity>(r#"{"value": 1, "uncertanty": 2}"#).unwrap_err();
        assert!(e.to_string().contains("uncertanty"), "{e}");
    }

    /// JCGM 100:2008 4.3.7, with numbers of its example: half-width 0.40e-6 gives 0.23e-6.
    #[test]
    fn a_range_is_uniform() {
        let q = Quantity::within(20e-6, 19.6e-6, 20.4e-6);
        assert!((q.standard_uncertainty() - 0.23e-6).abs() < 0.005e-6);
    }
}

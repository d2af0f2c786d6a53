//! The demo studies: invented scenarios that show one lesson each.

/// One demo study.
pub struct Demo {
    /// What it shows.
    pub title: &'static str,
    /// Text of the study file.
    pub text: &'static str,
}

/// All demo studies.
pub const DEMOS: [Demo; 3] = [
    Demo {
        title: "Neutral alkaloid, crude isolate far below plan",
        text: include_str!("../../../tests/data/studies/neutral-alkaloid.json"),
    },
    Demo {
        title: "Base charged at the liquid's own pH",
        text: include_str!("../../../tests/data/studies/charged-base.json"),
    },
    Demo {
        title: "Weak-acid preservative near its pKa",
        text: include_str!("../../../tests/data/studies/weak-acid-preservative.json"),
    },
];

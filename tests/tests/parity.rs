//! Native code and the page give the same digits: one hash of everything three studies print and
//! of a grid of the functions that use transcendental mathematics, checked in both.

#[cfg(target_arch = "wasm32")]
use wasm_bindgen_test::wasm_bindgen_test as test;

use unstir_core::math;
use unstir_core::solution::water;
use unstir_core::solve::solve_text;

/// FNV-1a, 64 bit: small, and not a function of the platform.
fn hash(bytes: &[u8], seed: u64) -> u64 {
    bytes.iter().fold(seed, |h, b| (h ^ u64::from(*b)).wrapping_mul(0x0100_0000_01b3))
}

const SEED: u64 = 0xcbf2_9ce4_8422_2325;
/// Changes whenever a result changes in any digit; then say so in CHANGELOG.
const GOLDEN: u64 = 0xf8cc_6727_8546_fcd4;

#[test]
fn the_same_digits_everywhere() {
    let mut h = SEED;
    for text in [
        include_str!("../data/studies/neutral-alkaloid.json"),
        include_str!("../data/studies/charged-base.json"),
        include_str!("../data/studies/weak-acid-preservative.json"),
    ] {
        h = hash(solve_text(text).expect("a plan").as_bytes(), h);
    }
    for i in 0..20_000 {
        let x = f64::from(i) * 0.001 + 1e-3;
        for y in [math::exp(-x), math::ln(x), math::log10(x), math::exp10(x - 10.0), math::ln_1p(x), math::pow(x, 0.37)]
        {
            h = hash(&y.to_bits().to_le_bytes(), h);
        }
        h = hash(&water::pkw(x * 5.0).to_bits().to_le_bytes(), h);
    }
    assert_eq!(h, GOLDEN, "{h:#x}");
}

//! The only user of transcendental functions: `libm`, so that native code and the page agree to
//! the bit (platform `powf` and `exp` differ in the last digits).

/// `e^x` [-].
pub fn exp(x: f64) -> f64 {
    libm::exp(x)
}

/// Natural logarithm [-].
pub fn ln(x: f64) -> f64 {
    libm::log(x)
}

/// `ln(1 + x)` without loss of digits for small `x` [-].
pub fn ln_1p(x: f64) -> f64 {
    libm::log1p(x)
}

/// Decimal logarithm [-].
pub fn log10(x: f64) -> f64 {
    libm::log10(x)
}

/// `10^x` [-].
pub fn exp10(x: f64) -> f64 {
    libm::pow(10.0, x)
}

/// `x^y` [-].
pub fn pow(x: f64, y: f64) -> f64 {
    libm::pow(x, y)
}

/// Square root [-].
pub fn sqrt(x: f64) -> f64 {
    libm::sqrt(x)
}

/// Arc tangent [rad].
pub fn atan(x: f64) -> f64 {
    libm::atan(x)
}

/// `ln 10` [-].
pub const LN_10: f64 = core::f64::consts::LN_10;

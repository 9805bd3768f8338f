//! What one would write by hand for the zinc sheet alone: no units, no sheet, no report.

/// Molar mass of zinc, kg/mol.
const MOLAR_MASS: f64 = 65.38e-3;
/// Melting point, K.
pub(crate) const MELTING: f64 = 692.68;
/// Latent heat of melting, J/mol.
const LATENT: f64 = 7322.0;

/// What the zinc sheet takes as given.
#[derive(Clone, Copy)]
pub(crate) struct Inputs {
    pub(crate) charge: f64,
    pub(crate) store: f64,
    pub(crate) pour: f64,
    pub(crate) time: f64,
    pub(crate) efficiency: f64,
    pub(crate) wall: f64,
}

/// The inputs as the sheet has them, in SI.
pub(crate) const ZINC_POT: Inputs =
    Inputs { charge: 450.0, store: 291.15, pour: 733.15, time: 12600.0, efficiency: 0.62, wall: 1800.0 };

fn solid(kelvin: f64) -> f64 {
    kelvin * (22.40 + 0.5 * 10.05e-3 * kelvin)
}

/// Molar enthalpy of zinc above 0 K of the fitted law, J/mol; liquid above the melting point.
fn zinc(kelvin: f64) -> f64 {
    if kelvin < MELTING { solid(kelvin) } else { solid(MELTING) + LATENT + 31.38 * (kelvin - MELTING) }
}

/// The rating of the burner, W.
pub(crate) fn rating(of: Inputs) -> f64 {
    let heat = of.charge / MOLAR_MASS * (zinc(of.pour) - zinc(of.store));
    (heat + of.wall * of.time) / of.time / of.efficiency
}

/// The temperature at which `charge` kilograms from `store` have taken `heat`, and what has melted there: by the same
/// search over the whole curve, K.
pub(crate) fn settled(charge: f64, store: f64, heat: f64) -> f64 {
    let target = zinc(store) + heat * MOLAR_MASS / charge;
    let miss = |kelvin: f64| zinc(kelvin) - target;
    if miss(MELTING) > 0.0 && solid(MELTING) < target { MELTING } else { brent(miss, 273.15, 1180.0) }
}

/// Brent's root (Algorithms for Minimization without Derivatives, 1973, chapter 4): bracket, secant and inverse
/// quadratic interpolation, bisection where they stray.
fn brent(f: impl Fn(f64) -> f64, mut a: f64, mut b: f64) -> f64 {
    let (mut fa, mut fb) = (f(a), f(b));
    let (mut c, mut fc) = (a, fa);
    let mut before = b - a;
    let mut step = before;
    for _ in 0..100 {
        if fb * fc > 0.0 {
            (c, fc, before) = (a, fa, b - a);
            step = before;
        }
        if fc.abs() < fb.abs() {
            (a, b, c) = (b, c, b);
            (fa, fb, fc) = (fb, fc, fb);
        }
        let tolerance = 2.0 * f64::EPSILON * b.abs();
        let half = 0.5 * (c - b);
        if half.abs() <= tolerance || fb == 0.0 {
            return b;
        }
        if before.abs() >= tolerance && fa.abs() > fb.abs() {
            let s = fb / fa;
            let (mut p, mut q) = if a == c {
                (2.0 * half * s, 1.0 - s)
            } else {
                let (q, r) = (fa / fc, fb / fc);
                (s * (2.0 * half * q * (q - r) - (b - a) * (r - 1.0)), (q - 1.0) * (r - 1.0) * (s - 1.0))
            };
            if p > 0.0 {
                q = -q;
            } else {
                p = -p;
            }
            if 2.0 * p < (3.0 * half * q - (tolerance * q).abs()).min((before * q).abs()) {
                (before, step) = (step, p / q);
            } else {
                (before, step) = (half, half);
            }
        } else {
            (before, step) = (half, half);
        }
        (a, fa) = (b, fb);
        b += if step.abs() > tolerance { step } else { tolerance.copysign(half) };
        fb = f(b);
    }
    b
}

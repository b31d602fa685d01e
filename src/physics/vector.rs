//! Directions in space.

/// Scalar product.
pub fn dot(a: [f64; 3], b: [f64; 3]) -> f64 {
    let [ax, ay, az] = a;
    let [bx, by, bz] = b;
    ax * bx + ay * by + az * bz
}

/// A vector times a number.
pub fn scaled(a: [f64; 3], factor: f64) -> [f64; 3] {
    a.map(|component| component * factor)
}

/// Sum.
pub fn sum(a: [f64; 3], b: [f64; 3]) -> [f64; 3] {
    let [ax, ay, az] = a;
    let [bx, by, bz] = b;
    [ax + bx, ay + by, az + bz]
}

/// Length.
pub fn length(a: [f64; 3]) -> f64 {
    dot(a, a).sqrt()
}

/// The unit vector along a vector; `None` for one without a direction.
pub fn unit(a: [f64; 3]) -> Option<[f64; 3]> {
    let size = length(a);
    (size.is_finite() && size > 1e-12).then(|| scaled(a, 1.0 / size))
}

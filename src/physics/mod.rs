//! What a case implies: arrangement, temperatures reached, characteristic numbers, scales, correlations.

pub mod model;

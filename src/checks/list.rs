//! The list of the checks. Adding one is a file and a line here.

use super::check::Check;

/// Every check, by family.
pub const CHECKS: &[&Check] = &[];

//! What the deck records: requirements, waivers, and what rests on estimates.

//! What an editor asks about a deck: one file a feature. Each is a plain function of a deck, a file of it and a byte
//! offset, and gives plain data; nothing here knows a protocol, or reads a file.

pub mod amount;
pub mod completion;
pub mod half_line;
pub mod hover;
pub mod hover_entity;
pub mod library;
pub mod names_here;
pub mod navigate;
pub mod numbers;
pub mod rename;
pub mod snippet;
pub mod spot;
#[cfg(test)]
pub mod testing;
pub mod wanted;

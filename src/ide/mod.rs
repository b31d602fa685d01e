//! What an editor asks about a deck: one file a feature. Each is a plain function of a deck, a file of it and a byte
//! offset, and gives plain data; nothing here knows a protocol, or reads a file.

pub mod actions;
pub mod amount;
pub mod completion;
pub mod folding;
pub mod format;
pub mod half_line;
pub mod hover;
pub mod hover_entity;
pub mod inlay;
pub mod library;
pub mod links;
pub mod name_value;
pub mod names_here;
pub mod navigate;
pub mod numbers;
pub mod offers;
pub mod remedies;
pub mod rename;
pub mod selection;
pub mod signature;
pub mod snippet;
pub mod spot;
pub mod symbols;
#[cfg(test)]
pub mod testing;
pub mod tokens;
pub mod wanted;

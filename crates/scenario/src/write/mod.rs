//! Writing circuit files: changes in place that keep every comment, fresh files with comments of
//! our own, and saving that never leaves half a file.

mod edit;
mod emit;
mod literal;
mod save;

pub use edit::{Edit, EditError, added_field, replace_values};
pub use emit::{Entry, Value, emit};
pub use literal::{is_key, text_literal};
pub use save::{save_atomically, save_bytes_atomically};

#[cfg(test)]
mod tests;

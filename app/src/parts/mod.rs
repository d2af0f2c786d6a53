//! The parts that the sections are put together from: fields, cautions, tables, the working of a
//! number, the column, and what follows the state.
//!
//! Fields show what was typed and report what is typed; they never parse, rewrite or keep it.

mod caution_box;
mod choice_field;
mod column;
mod data_table;
mod decimal;
mod field;
mod live;
mod number_field;
mod text_field;
mod working;

pub use caution_box::{CautionBox, CautionText};
pub use choice_field::{ChoiceField, ChoiceFieldProps};
pub use column::{Column, ColumnLevel};
pub use data_table::DataTable;
pub use field::field_id;
pub use live::{each_row, live, live_view};
pub use number_field::NumberField;
pub use text_field::TextField;
pub use working::Working;

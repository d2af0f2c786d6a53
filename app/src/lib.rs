//! The page of Unstir.
//!
//! | to find | look in |
//! | --- | --- |
//! | what the user typed, the shelf, the pipeline to a plan | [`state`] |
//! | plan to words and rows | [`view_model`] |
//! | one step of the flow each | [`sections`] |
//! | fields, cautions, tables, the column | [`parts`] |
//! | charts | [`charts`] |
//! | storage and files | [`browser`] |
//!
//! Markup and classes (all styled in `public/style.css`):
//!
//! ```text
//! .page                      everything
//!   header.top               name, shelf, answer
//!     .top-line              study name, .saved (word), shelf button
//!     .shelf                 list of studies with its buttons (details/summary)
//!       .shelf-row           one study: open button, .shelf-buttons
//!     .limits                the "local rules decide" line, small
//!     .answer[role=status]   .answer-sentence, .figures; .stale when the text has problems
//!       .figure              .figure-label, .figure-value, .interval, .figure-note
//!     .notices > .notice     one notice each; .notice-where (link to the step)
//!     .problems              list of links to fields with problems
//!   .flow                    two columns
//!     aside.liquid           the column
//!     .steps
//!       section.step         h2, .step-sum (one line of results, .stale), content
//!         .fields            fields side by side, wrapping
//!         .row               one ingredient, portion, loss …; .row-head (name, buttons), .row-body
//!         .choice            one solvent in the list; .choice.chosen; .facts (dl), .codes (ul), .cautions
//!         .pick              published values offered; .pick-row
//!         .quiet             small, grey; also details.quiet and button.quiet
//!         .buttons           a line of buttons
//!         .side-by-side      two blocks beside each other
//!         .words             a list of sentences (inverse answers)
//!         .verdict           a verdict word
//!         .table-wrap        scrolls sideways
//!   footer.foot              limits of the model
//! button.main (one per place), button.danger (delete), .stale, .sr-only
//! ```
#![forbid(unsafe_code)]

pub mod browser;
pub mod charts;
pub mod parts;
pub mod sections;
pub mod state;
pub mod view_model;

pub use sections::App;

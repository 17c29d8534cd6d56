//! The engine: pure functions from a survey to a design.
//!
//! Survey → demand → inverter → bank → charger → cables → starts → ventilation, life. Each stage
//! sees the ones before it and the assumptions, writes its figures on the sheet and never looks
//! ahead. It always answers; what is unsafe or doubtful comes back as findings.

pub mod assumptions;
pub mod battery_bank;
pub mod cables;
pub mod charger;
pub mod design;
pub mod finding;
pub mod inverter;
pub mod life;
pub mod load_survey;
pub mod protection;
pub mod sheet;
pub mod surge;
pub mod survey;
pub mod tables;
pub mod ventilation;

pub use assumptions::Assumptions;
pub use design::Design;
pub use finding::{Finding, Severity};
pub use sheet::Sheet;
pub use survey::Survey;

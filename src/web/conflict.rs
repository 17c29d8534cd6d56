//! Two people on one job: what each of them entered, side by side, and nothing lost.

/// What the second to save is shown.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Conflict {
    /// Where the two differ.
    pub rows: Vec<Difference>,
    /// Whether there is a conflict at all.
    pub is_there: bool,
}

/// A field in which what was typed and what is stored by now differ.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Difference {
    /// The field.
    pub label: String,
    /// What was typed here.
    pub typed: String,
    /// What is stored by now.
    pub stored: String,
}

impl Conflict {
    /// The differences between two lists of fields, label by label.
    pub fn between(typed: &[(&'static str, String)], stored: &[(&'static str, String)]) -> Self {
        let differs = |(typed, stored): (&(&'static str, String), &(&'static str, String))| {
            let (label, typed, stored) = (typed.0.to_owned(), typed.1.clone(), stored.1.clone());
            (typed.trim() != stored.trim()).then_some(Difference { label, typed, stored })
        };
        Self { rows: typed.iter().zip(stored).filter_map(differs).collect(), is_there: true }
    }
}

//! How a command ended.

use std::process::ExitCode;

/// The exit status; of several inputs the worst counts.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub enum Exit {
    /// All is well.
    Well,
    /// The work was done and something does not hold.
    DoesNotHold,
    /// It could not be done.
    NotDone,
}

impl From<Exit> for ExitCode {
    fn from(exit: Exit) -> ExitCode {
        ExitCode::from(match exit {
            Exit::Well => 0,
            Exit::DoesNotHold => 1,
            Exit::NotDone => 2,
        })
    }
}

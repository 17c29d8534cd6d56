//! The addresses of all pages; nothing else makes one.

use std::borrow::Borrow;

use crate::jobs::JobId;
use crate::quotes::{LinkId, VersionId};

/// Makes addresses below a base path.
#[derive(Clone, Debug, Default, PartialEq, Eq)]
pub struct Paths {
    base: String,
}

/// Declares addresses without and with a job.
macro_rules! addresses {
    ($($(#[$doc:meta])* $name:ident = $path:literal;)*) => {
        impl Paths { $($(#[$doc])* pub fn $name(&self) -> String { format!(concat!("{}", $path), self.base) })* }
    };
}

macro_rules! job_addresses {
    ($($(#[$doc:meta])* $name:ident = $path:literal;)*) => {
        impl Paths { $($(#[$doc])* pub fn $name(&self, id: impl Borrow<JobId>) -> String { format!(concat!("{}/job/{}", $path), self.base, id.borrow()) })* }
    };
}

addresses! {
    /// The job book.
    book = "/";
    /// Starts a job.
    start_job = "/job/new";
    /// Signing in.
    sign_in = "/in";
    /// Signing out.
    sign_out = "/out";
    /// The first day.
    begin = "/begin";
    /// My firm.
    firm = "/firm";
    /// Back room.
    back = "/back";
    /// Makes a backup.
    backup = "/back/backup";
    /// The bin.
    bin = "/?binned=yes";
}

job_addresses! {
    /// The first step that is not done.
    job = "";
    /// Site.
    site = "/site";
    /// Stay-on list.
    list = "/list";
    /// Power cut.
    cut = "/cut";
    /// Cable runs.
    runs = "/runs";
    /// What it needs.
    needs = "/needs";
    /// Hour by hour.
    hours = "/hours";
    /// Weeks and years.
    weeks = "/weeks";
    /// Stops playing years.
    stop_weeks = "/weeks/stop";
    /// Try a change.
    try_change = "/try";
    /// The working.
    working = "/working";
    /// Assumptions of the job.
    assumptions = "/assumptions";
    /// Price up.
    price = "/price";
    /// Send.
    send = "/send";
    /// Past sheets.
    past = "/past";
    /// Makes a copy.
    copy = "/copy";
    /// Sets how far it has come.
    state = "/state";
    /// Puts it into the bin.
    to_bin = "/bin";
    /// Takes it out of the bin.
    restore = "/restore";
}

impl Paths {
    /// Below a base path, such as `/power`, or none.
    pub fn new(base: &str) -> Self {
        Self { base: base.to_owned() }
    }

    /// Signing in, and where to go afterwards.
    pub fn sign_in_and_go_to(&self, next: &str) -> String {
        #[derive(serde::Serialize)]
        struct Query<'a> {
            next: &'a str,
        }
        let config = serde_qs::Config::new().use_form_encoding(true);
        format!("{}?{}", self.sign_in(), config.serialize_string(&Query { next }).unwrap_or_default())
    }

    /// A file that is embedded, by its checksum.
    pub fn asset(&self, name: &str) -> String {
        format!("{}/static/{name}", self.base)
    }

    /// The customer's sheet.
    pub fn offer(&self, key: &str) -> String {
        format!("{}/o/{key}", self.base)
    }

    /// The customer's receipt.
    pub fn kept(&self, key: &str) -> String {
        format!("{}/o/{key}/kept", self.base)
    }

    /// A version, as the customer sees it.
    pub fn preview(&self, job: JobId, version: VersionId) -> String {
        format!("{}/job/{job}/sheet/{version}", self.base)
    }

    /// Cancels a link.
    pub fn cancel(&self, job: JobId, link: LinkId) -> String {
        format!("{}/job/{job}/link/{link}/cancel", self.base)
    }

    /// Whether an address stays in this service: nobody is sent elsewhere after signing in.
    pub fn is_own(&self, address: &str) -> bool {
        let rest = address.strip_prefix(&self.base);
        let own = rest.is_some_and(|rest| rest.starts_with('/') && !rest.starts_with("//"));
        own && !address.contains(['\\', '\r', '\n', '\t'])
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn a_base_path_stands_before_every_address() {
        let paths = Paths::new("/power");
        assert_eq!(paths.site(JobId(3)), "/power/job/3/site");
        assert_eq!(paths.book(), "/power/");
        assert_eq!(Paths::default().needs(JobId(3)), "/job/3/needs");
    }

    #[test]
    fn an_address_elsewhere_is_not_own() {
        let paths = Paths::default();
        for (address, own) in [
            ("/job/3/site", true),
            ("/?search=oka", true),
            ("//evil.example", false),
            ("/\\evil.example", false),
            ("https://evil.example", false),
            ("javascript:alert(1)", false),
            ("", false),
        ] {
            assert_eq!(paths.is_own(address), own, "{address}");
        }
        assert!(!Paths::new("/power").is_own("/elsewhere"));
    }
}

//! A made-up firm to look at: three jobs of different kinds, one of them sent and answered.
//!
//! Firm, people, places and prices are invented, and every page says so.

use anyhow::Context;

use crate::accounts::{Firm, NewPerson, Profile};
use crate::documents::Draft;
use crate::jobs::{Contact, JobId};
use crate::keys::OneTimeKey;
use crate::money::Money;
use crate::passwords;
use crate::quotes::price::{PriceDraft, PricedLine};
use crate::quotes::share_key::ShareKey;
use crate::quotes::{Answer, Said};
use crate::store::{Once, Store};
use crate::web::Case;

/// With what the made-up person signs in.
pub const EMAIL: &str = "ana@lantern.example";

const PERSON: &str = "Ana Lindqvist-Moyo";
const DAY: i64 = 24 * 3600;

/// A made-up job.
struct Story {
    survey: &'static str,
    customer: &'static str,
    place: &'static str,
    phone: &'static str,
    note: &'static str,
    /// How many days ago it began.
    days_ago: i64,
    goes: Goes,
}

/// How far a made-up job goes.
#[derive(Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
enum Goes {
    Surveyed,
    Priced,
    Answered,
}

const STORIES: [Story; 3] = [
    Story {
        survey: include_str!("demo/flat.json"),
        customer: "Ivo Brandt",
        place: "Flat 3, Weaver's Row",
        phone: "01632 960 301",
        note: "Battery to stand on the balcony cupboard floor.",
        days_ago: 1,
        goes: Goes::Surveyed,
    },
    Story {
        survey: include_str!("demo/house.json"),
        customer: "Rosalind Achterberg",
        place: "Stone House, Upper Lane",
        phone: "01632 960 302",
        note: "Pump is in the well house, 12 m from the board.",
        days_ago: 4,
        goes: Goes::Priced,
    },
    Story {
        survey: include_str!("demo/shop.json"),
        customer: "Mirembe Oyelaran",
        place: "Corner shop, 14 Harbour Street",
        phone: "01632 960 303",
        note: "Closes at eight. Freezer must not thaw.",
        days_ago: 9,
        goes: Goes::Answered,
    },
];

/// Fills an empty store; the password is drawn by whoever starts the program and is stored nowhere.
pub async fn fill(store: &Store, now: i64, password: &str, salt: [u8; 16], secret: [u8; 32]) -> anyhow::Result<()> {
    let password_hash = passwords::hash(password, salt).map_err(|error| anyhow::anyhow!("{error}"))?;
    let person = NewPerson { name: PERSON.to_owned(), email: EMAIL.to_owned(), password_hash };
    let teller = Teller { store: store.clone(), secret };
    store.begin(teller.once("firm", now), profile(), true, person).await?;
    let person = store.person_by_email(EMAIL).await?.context("the made-up person is gone")?;
    let firm = store.firm(person.firm).await?;
    for story in &STORIES {
        teller.tell(&firm, story, now).await?;
    }
    Ok(())
}

fn profile() -> Profile {
    Profile {
        name: "Lantern Lane Electrics".to_owned(),
        phone: "01632 960 300".to_owned(),
        email: "hello@lantern.example".to_owned(),
        address: "4 Mill Yard, Thornby".to_owned(),
        licence: "EL-20417".to_owned(),
        tax_basis_points: 2000,
        ..Profile::default()
    }
}

struct Teller {
    store: Store,
    secret: [u8; 32],
}

impl Teller {
    /// A submit with a key of its own, made from a name.
    fn once(&self, name: &str, now: i64) -> Once {
        let mut bits = [0; 16];
        bits.copy_from_slice(&ShareKey::mint(&self.secret, name).hash()[..16]);
        Once { key: OneTimeKey::from_random(bits), now }
    }

    async fn tell(&self, firm: &Firm, story: &Story, now: i64) -> anyhow::Result<()> {
        let began = now - story.days_ago * DAY;
        let draft = Draft::read(story.survey).map_err(|faults| anyhow::anyhow!("{faults:?}"))?;
        let contact = Contact {
            customer: story.customer.to_owned(),
            place: story.place.to_owned(),
            phone: story.phone.to_owned(),
            note: story.note.to_owned(),
        };
        let job = self.store.start_job(firm.id, self.once(story.customer, began), contact, &draft).await?;
        if story.goes >= Goes::Priced {
            self.price(firm, job, began + DAY).await?;
        }
        if story.goes >= Goes::Answered {
            self.send_and_answer(firm, job, story, began + 2 * DAY).await?;
        }
        Ok(())
    }

    async fn price(&self, firm: &Firm, id: JobId, at: i64) -> anyhow::Result<()> {
        let case = Case::of(firm, self.store.job(firm.id, id).await?);
        let draft = priced(case.draft(at));
        let once = self.once(&format!("price {id}"), at);
        Ok(self.store.save_price(firm.id, once, id, case.job.revision, &draft).await?)
    }

    async fn send_and_answer(&self, firm: &Firm, id: JobId, story: &Story, at: i64) -> anyhow::Result<()> {
        let case = Case::of(firm, self.store.job(firm.id, id).await?);
        let draft = case.draft(at);
        let version = case.version(&draft, PERSON, at);
        let version = version.with_context(|| format!("no sheet: {:?}", case.obstacles(&draft, at)))?;
        let once = self.once(&format!("sheet {id}"), at);
        let version = self.store.make_version(firm.id, once, id, case.job.revision, version).await?;
        let once = self.once(&format!("link {id}"), at);
        let hash = ShareKey::mint(&self.secret, once.key.as_str()).hash();
        self.store.make_link(firm.id, once, version, hash, at + 90 * DAY, PERSON.to_owned()).await?;
        let answer = Answer {
            said: Said::Yes,
            name: story.customer.to_owned(),
            words: "Thank you. Mornings before ten suit me best.".to_owned(),
            at: at + DAY,
        };
        Ok(self.store.answer(hash, self.once(&format!("answer {id}"), at + DAY), answer).await?)
    }
}

/// Invented prices: so much for each kind of part.
fn priced(draft: PriceDraft) -> PriceDraft {
    let currency = draft.currency;
    let money = |minor| Money { minor, currency };
    let price = |line: PricedLine| {
        let minor = invented(line.from_design.as_deref().unwrap_or_default());
        PricedLine { unit_price: Some(money(minor)), cost: Some(money(minor * 7 / 10)), ..line }
    };
    PriceDraft {
        lines: draft.lines.into_iter().map(price).collect(),
        labour: Some(money(38_000)),
        note: "We need the mains off for about two hours on the day.".to_owned(),
        left_off: "The oven and the water heater.".to_owned(),
        ..draft
    }
}

/// In hundredths of a coin.
fn invented(part: &str) -> i64 {
    match part {
        "battery" => 21_900,
        "links" => 2_450,
        "inverter" => 48_500,
        "labels" => 1_200,
        part if part.starts_with("cable.") => 640,
        part if part.starts_with("device.") => 2_890,
        _ => 1_000,
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::documents::survey;
    use crate::simulation;
    use crate::sizing::Severity;

    #[test]
    fn no_made_up_design_is_stopped_by_a_finding() {
        for story in &STORIES {
            let (draft, survey) = survey::read(story.survey).unwrap();
            let design = simulation::design(&survey, draft.assumptions(&[]));
            let stops: Vec<_> = design.findings.iter().filter(|finding| finding.severity() == Severity::Stop).collect();
            assert!(stops.is_empty(), "{}: {stops:?}", story.place);
        }
    }

    #[test]
    fn the_made_up_jobs_stand_on_twelve_twenty_four_and_forty_eight_volts() {
        let volts = STORIES.each_ref().map(|story| {
            let (draft, survey) = survey::read(story.survey).unwrap();
            simulation::design(&survey, draft.assumptions(&[])).bank.bus.volts().0
        });
        assert_eq!(volts, [12.0, 48.0, 24.0]);
    }
}

//! Versions, links and answers: final, and only for whom they are meant.

use keeplit::jobs::{JobId, JobState};
use keeplit::keys::Revision;
use keeplit::quotes::{Answer, LinkState, NewVersion, Said, VersionId};
use keeplit::store::Error;
use sqlx::Connection;

use crate::helpers::{NOW, Shelf, submit};

const KEY: [u8; 32] = [7; 32];

fn sheet(text: &str) -> NewVersion {
    NewVersion {
        sheet: text.as_bytes().to_vec(),
        survey: "{}".to_owned(),
        design: "{}".to_owned(),
        program_version: "0.1.0",
        made_by: "Ana".to_owned(),
    }
}

fn yes(name: &str) -> Answer {
    Answer { said: Said::Yes, name: name.to_owned(), words: String::new(), at: NOW }
}

/// A job of Ana's with one version and a link to it.
async fn shared(shelf: &Shelf) -> (JobId, VersionId) {
    let job = shelf.job("Mrs Okafor").await;
    let version = shelf.store.make_version(shelf.ana, submit(), job, Revision(1), sheet("{}")).await.unwrap();
    shelf.store.make_link(shelf.ana, submit(), version, KEY, NOW + 100, "Ana".to_owned()).await.unwrap();
    (job, version)
}

#[tokio::test]
async fn sheet_numbers_run_on_and_versions_count_by_job() {
    let shelf = Shelf::new().await;
    let (first, second) = (shelf.job("One").await, shelf.job("Two").await);
    for job in [first, second, first] {
        shelf.store.make_version(shelf.ana, submit(), job, Revision(1), sheet("{}")).await.unwrap();
    }
    let numbers = |versions: Vec<keeplit::quotes::FrozenVersion>| {
        versions.into_iter().map(|version| (version.number, version.version)).collect::<Vec<_>>()
    };
    assert_eq!(numbers(shelf.store.versions(shelf.ana, first).await.unwrap()), [(3, 2), (1, 1)]);
    assert_eq!(numbers(shelf.store.versions(shelf.ana, second).await.unwrap()), [(2, 1)]);
    assert!(shelf.store.versions(shelf.ben, first).await.unwrap().is_empty());
}

#[tokio::test]
async fn a_version_of_an_old_revision_is_stale() {
    let shelf = Shelf::new().await;
    let job = shelf.job("One").await;
    let made = shelf.store.make_version(shelf.ana, submit(), job, Revision(9), sheet("{}")).await;
    assert!(matches!(made, Err(Error::Stale)), "{made:?}");
}

#[tokio::test]
async fn opening_a_link_changes_nothing_and_the_answer_is_final() {
    let shelf = Shelf::new().await;
    let (job, _) = shared(&shelf).await;
    let store = &shelf.store;
    for _ in 0..20 {
        let shared = store.shared(KEY, NOW).await.unwrap().unwrap();
        assert_eq!((shared.state, shared.version.answer), (LinkState::Open, None));
    }
    let once = submit();
    store.answer(KEY, once.clone(), yes("Grace Okafor")).await.unwrap();
    store.answer(KEY, once, yes("Grace Okafor")).await.unwrap();
    let second = store.answer(KEY, submit(), yes("Someone else")).await;
    assert!(matches!(second, Err(Error::Taken)), "{second:?}");
    let shared = store.shared(KEY, NOW).await.unwrap().unwrap();
    assert_eq!(shared.version.answer.unwrap().name, "Grace Okafor");
    assert_eq!(store.job(shelf.ana, job).await.unwrap().state, JobState::Agreed);
}

#[tokio::test]
async fn a_link_dies_by_time_by_hand_and_by_a_newer_version() {
    let shelf = Shelf::new().await;
    let (job, _) = shared(&shelf).await;
    let store = &shelf.store;
    assert_eq!(store.shared(KEY, NOW + 100).await.unwrap().unwrap().state, LinkState::Ended);
    store.make_version(shelf.ana, submit(), job, Revision(1), sheet("{\"new\":1}")).await.unwrap();
    assert_eq!(store.shared(KEY, NOW).await.unwrap().unwrap().state, LinkState::Replaced);
    let late = store.answer(KEY, submit(), yes("Grace")).await;
    assert!(matches!(late, Err(Error::Stale)), "{late:?}");
    let link = store.links(shelf.ana, job).await.unwrap()[0].id;
    assert!(matches!(store.cancel_link(shelf.ben, submit(), link, "Ben".to_owned()).await, Err(Error::NotFound)));
    store.cancel_link(shelf.ana, submit(), link, "Ana".to_owned()).await.unwrap();
    assert_eq!(store.shared(KEY, NOW).await.unwrap().unwrap().state, LinkState::Cancelled);
    assert!(store.shared([8; 32], NOW).await.unwrap().is_none());
    let did: Vec<_> = store.audit(shelf.ana, job).await.unwrap().into_iter().map(|done| done.did).collect();
    assert_eq!(did, ["cancelled a link", "made a sheet", "made a link", "made a sheet"]);
}

#[tokio::test]
async fn an_agreed_sheet_is_not_replaced_by_a_newer_one() {
    let shelf = Shelf::new().await;
    let (job, _) = shared(&shelf).await;
    shelf.store.answer(KEY, submit(), yes("Grace Okafor")).await.unwrap();
    shelf.store.make_version(shelf.ana, submit(), job, Revision(1), sheet("{\"new\":1}")).await.unwrap();
    let shared = shelf.store.shared(KEY, NOW).await.unwrap().unwrap();
    assert_eq!((shared.state, shared.version.sheet.as_slice()), (LinkState::Open, b"{}".as_slice()));
}

#[tokio::test]
async fn what_is_final_cannot_be_changed_by_sql_either() {
    let shelf = Shelf::new().await;
    shared(&shelf).await;
    shelf.store.answer(KEY, submit(), yes("Grace Okafor")).await.unwrap();
    shelf.store.close().await;
    let file = shelf.folder.path().join("keeplit.db");
    let mut connection = sqlx::SqliteConnection::connect(&format!("sqlite://{}", file.display())).await.unwrap();
    for change in [
        "update quote_version set sheet = x'00'",
        "delete from quote_version",
        "update answer set said = 'no'",
        "delete from answer",
        "update audit set did = 'nothing'",
        "delete from audit",
    ] {
        assert!(sqlx::query(change).execute(&mut connection).await.is_err(), "{change}");
    }
}

//! Jobs: owners, revisions, one-time keys, search, the bin.

use keeplit::documents::Draft;
use keeplit::jobs::{DAYS_IN_BIN, Filter, JobState};
use keeplit::keys::Revision;
use keeplit::store::Error;
use keeplit::units::Metres;

use crate::helpers::{NOW, Shelf, contact, submit};

fn search(letters: &str) -> Filter {
    Filter { search: letters.to_owned(), ..Filter::default() }
}

#[tokio::test]
async fn another_firm_never_sees_or_changes_a_job() {
    let shelf = Shelf::new().await;
    let id = shelf.job("Mrs Okafor").await;
    let draft = Draft::default();
    let store = &shelf.store;
    assert!(matches!(store.job(shelf.ben, id).await, Err(Error::NotFound)));
    assert!(store.jobs(shelf.ben, &Filter::default()).await.unwrap().is_empty());
    let saved = store.save_draft(shelf.ben, submit(), id, Revision(1), &draft).await;
    assert!(matches!(saved, Err(Error::NotFound)), "{saved:?}");
    assert!(matches!(store.copy_job(shelf.ben, submit(), id).await, Err(Error::NotFound)));
    assert!(matches!(store.bin_job(shelf.ben, submit(), id).await, Err(Error::NotFound)));
    assert!(matches!(store.set_state(shelf.ben, submit(), id, JobState::Fitted).await, Err(Error::NotFound)));
    assert_eq!(store.job(shelf.ana, id).await.unwrap().revision, Revision(1));
}

#[tokio::test]
async fn a_survey_comes_back_as_it_was_saved() {
    let shelf = Shelf::new().await;
    let id = shelf.job("Mrs Okafor").await;
    let mut draft = Draft::default();
    draft.runs.bank_to_inverter = Metres(3.25);
    shelf.store.save_draft(shelf.ana, submit(), id, Revision(1), &draft).await.unwrap();
    let job = shelf.store.job(shelf.ana, id).await.unwrap();
    assert_eq!((job.draft.runs, job.revision), (draft.runs, Revision(2)));
    assert_eq!(job.contact, contact("Mrs Okafor"));
}

#[tokio::test]
async fn a_save_on_an_old_revision_is_stale_and_changes_nothing() {
    let shelf = Shelf::new().await;
    let id = shelf.job("Mrs Okafor").await;
    let store = &shelf.store;
    store.save_draft(shelf.ana, submit(), id, Revision(1), &Draft::default()).await.unwrap();
    let late = store.save_site(shelf.ana, submit(), id, Revision(1), contact("Someone else"), &Draft::default()).await;
    assert!(matches!(late, Err(Error::Stale)), "{late:?}");
    assert_eq!(store.job(shelf.ana, id).await.unwrap().contact.customer, "Mrs Okafor");
}

#[tokio::test]
async fn the_same_form_sent_five_times_at_once_makes_one_job() {
    let shelf = Shelf::new().await;
    let once = submit();
    let sends = (0..5).map(|_| {
        let (store, once, firm) = (shelf.store.clone(), once.clone(), shelf.ana);
        tokio::spawn(async move { store.start_job(firm, once, contact("Mrs Okafor"), &Draft::default()).await })
    });
    let mut ids = Vec::new();
    for send in sends.collect::<Vec<_>>() {
        ids.push(send.await.unwrap().unwrap());
    }
    ids.dedup();
    assert_eq!(ids.len(), 1, "{ids:?}");
    assert_eq!(shelf.store.jobs(shelf.ana, &Filter::default()).await.unwrap().len(), 1);
}

#[tokio::test]
async fn three_letters_find_a_job_by_name_place_or_phone() {
    let shelf = Shelf::new().await;
    shelf.job("Ágnes Szűcs").await;
    shelf.job("100% Tailors").await;
    for (letters, found) in
        [("szű", 1), ("SZŰ", 1), ("ágn", 1), ("hil", 2), ("960123", 2), ("960 1", 2), ("0% t", 1), ("%", 1), ("zzz", 0)]
    {
        assert_eq!(shelf.store.jobs(shelf.ana, &search(letters)).await.unwrap().len(), found, "{letters}");
    }
}

#[tokio::test]
async fn a_binned_job_comes_back_whole_or_goes_after_thirty_days() {
    let shelf = Shelf::new().await;
    let id = shelf.job("Mrs Okafor").await;
    let store = &shelf.store;
    let bin = Filter { binned: true, ..Filter::default() };
    store.bin_job(shelf.ana, submit(), id).await.unwrap();
    assert!(store.jobs(shelf.ana, &Filter::default()).await.unwrap().is_empty());
    assert_eq!(store.jobs(shelf.ana, &bin).await.unwrap().len(), 1);
    let saved = store.save_draft(shelf.ana, submit(), id, Revision(1), &Draft::default()).await;
    assert!(matches!(saved, Err(Error::NotFound)), "{saved:?}");
    store.restore_job(shelf.ana, submit(), id).await.unwrap();
    assert_eq!(store.job(shelf.ana, id).await.unwrap().contact, contact("Mrs Okafor"));
    store.bin_job(shelf.ana, submit(), id).await.unwrap();
    let late = NOW + DAYS_IN_BIN * 24 * 3600;
    assert_eq!(store.empty_bin(late).await.unwrap(), 0);
    assert_eq!(store.empty_bin(late + 1).await.unwrap(), 1);
}

#[tokio::test]
async fn a_copy_takes_the_survey_and_not_the_state() {
    let shelf = Shelf::new().await;
    let id = shelf.job("Mrs Okafor").await;
    shelf.store.set_state(shelf.ana, submit(), id, JobState::Fitted).await.unwrap();
    let copy = shelf.store.copy_job(shelf.ana, submit(), id).await.unwrap();
    let job = shelf.store.job(shelf.ana, copy).await.unwrap();
    assert_eq!((job.contact.customer.as_str(), job.state), ("Copy of Mrs Okafor", JobState::BeingSized));
}

#[tokio::test]
async fn sixteen_at_once_are_all_saved() {
    let shelf = Shelf::new().await;
    let saves = (0..16).map(|n| {
        let (store, firm) = (shelf.store.clone(), shelf.ana);
        tokio::spawn(async move {
            for _ in 0..10 {
                store.start_job(firm, submit(), contact(&format!("Customer {n}")), &Draft::default()).await.unwrap();
            }
        })
    });
    for save in saves.collect::<Vec<_>>() {
        save.await.unwrap();
    }
    assert_eq!(shelf.store.jobs(shelf.ana, &Filter::default()).await.unwrap().len(), 160);
}

//! Firms, people, sessions, tries to sign in.

use keeplit::keys::Revision;
use keeplit::store::Error;

use crate::helpers::{NOW, Shelf, person, profile, submit};

#[tokio::test]
async fn the_first_day_closes_for_good_after_the_first_account() {
    let folder = tempfile::tempdir().unwrap();
    let store = keeplit::store::Store::open(folder.path()).await.unwrap();
    assert!(store.is_first_day().await.unwrap());
    store.begin(submit(), profile("First"), false, person("ana@example.org")).await.unwrap();
    assert!(!store.is_first_day().await.unwrap());
    let second = store.begin(submit(), profile("Second"), false, person("ben@example.org")).await;
    assert!(matches!(second, Err(Error::Taken)), "{second:?}");
}

#[tokio::test]
async fn two_spellings_of_an_address_are_one_person() {
    let shelf = Shelf::new().await;
    let id = shelf.store.add_person(shelf.ana, person("Ana@Example.org"), NOW).await.unwrap();
    let again = shelf.store.add_person(shelf.ben, person("ana@example.ORG "), NOW).await;
    assert!(matches!(again, Err(Error::Taken)), "{again:?}");
    let found = shelf.store.person_by_email(" ANA@example.org").await.unwrap().unwrap();
    assert_eq!((found.id, found.email.as_str()), (id, "Ana@Example.org"));
}

#[tokio::test]
async fn a_session_ends_at_its_end_and_at_sign_out_and_with_the_password() {
    let shelf = Shelf::new().await;
    let id = shelf.store.add_person(shelf.ana, person("ana@example.org"), NOW).await.unwrap();
    for hash in [[1; 32], [2; 32], [3; 32]] {
        shelf.store.start_session(id, hash, NOW, NOW + 100).await.unwrap();
    }
    assert_eq!(shelf.store.session([1; 32], NOW + 99).await.unwrap().unwrap().firm.id, shelf.ana);
    assert!(shelf.store.session([1; 32], NOW + 100).await.unwrap().is_none());
    shelf.store.end_session([2; 32]).await.unwrap();
    assert!(shelf.store.session([2; 32], NOW).await.unwrap().is_none());
    shelf.store.set_password(id, "$argon2id$new".to_owned()).await.unwrap();
    assert!(shelf.store.session([3; 32], NOW).await.unwrap().is_none());
}

#[tokio::test]
async fn a_profile_saved_on_an_old_revision_is_stale() {
    let shelf = Shelf::new().await;
    shelf.store.save_firm(shelf.ana, submit(), Revision(1), profile("Renamed")).await.unwrap();
    let late = shelf.store.save_firm(shelf.ana, submit(), Revision(1), profile("Late")).await;
    assert!(matches!(late, Err(Error::Stale)), "{late:?}");
    assert_eq!(shelf.store.firm(shelf.ana).await.unwrap().profile.name, "Renamed");
    assert_eq!(shelf.store.firm(shelf.ben).await.unwrap().profile.name, "Ben's firm");
}

#[tokio::test]
async fn tries_are_counted_by_address_and_forgotten() {
    let shelf = Shelf::new().await;
    shelf.store.note_attempt("Ana@example.org", NOW - 100, 0).await.unwrap();
    shelf.store.note_attempt("ana@example.org", NOW, 0).await.unwrap();
    assert_eq!(shelf.store.attempts_since("ANA@example.org", NOW - 100).await.unwrap(), 2);
    assert_eq!(shelf.store.attempts_since("ben@example.org", 0).await.unwrap(), 0);
    shelf.store.note_attempt("ana@example.org", NOW + 1, NOW).await.unwrap();
    assert_eq!(shelf.store.attempts_since("ana@example.org", 0).await.unwrap(), 2);
}

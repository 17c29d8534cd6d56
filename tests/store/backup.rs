//! Copies: consistent while others write, put back only when sound, refused when newer.

use keeplit::jobs::Filter;
use keeplit::store::{Error, Store, backup};
use sqlx::Connection;

use crate::helpers::{NOW, Shelf, profile};

#[tokio::test]
async fn a_copy_made_during_writes_restores_to_equal_counts() {
    let shelf = Shelf::new().await;
    for n in 0..20 {
        shelf.job(&format!("Customer {n}")).await;
    }
    let copy = shelf.folder.path().join("copy.db");
    let writing = {
        let (store, firm) = (shelf.store.clone(), shelf.ben);
        tokio::spawn(async move {
            for n in 0..50 {
                store.add_firm(profile(&format!("Firm {n} beside {firm}")), false, NOW).await.unwrap();
            }
        })
    };
    let report = shelf.store.backup(&copy).await.unwrap();
    writing.await.unwrap();
    assert_eq!((report.jobs, report.faults.len()), (20, 0));
    let elsewhere = tempfile::tempdir().unwrap();
    backup::restore(&copy, elsewhere.path()).await.unwrap();
    let restored = Store::open(elsewhere.path()).await.unwrap();
    assert_eq!(restored.jobs(shelf.ana, &Filter::default()).await.unwrap().len(), 20);
}

#[tokio::test]
async fn a_second_copy_of_the_program_is_refused_and_so_is_a_restore_under_it() {
    let shelf = Shelf::new().await;
    let second = Store::open(shelf.folder.path()).await.err();
    assert!(matches!(second, Some(Error::InUse(_))), "{second:?}");
    let copy = shelf.folder.path().join("copy.db");
    shelf.store.backup(&copy).await.unwrap();
    let restored = backup::restore(&copy, shelf.folder.path()).await;
    assert!(matches!(restored, Err(Error::InUse(_))), "{restored:?}");
}

#[tokio::test]
async fn restoring_keeps_the_old_file_beside_the_new_one() {
    let shelf = Shelf::new().await;
    shelf.job("Mrs Okafor").await;
    let copy = shelf.folder.path().join("copy.db");
    shelf.store.backup(&copy).await.unwrap();
    shelf.job("Written after the copy").await;
    let Shelf { store, folder, ana, .. } = shelf;
    store.close().await;
    drop(store);
    let (_, kept) = backup::restore(&copy, folder.path()).await.unwrap();
    assert!(kept.unwrap().exists());
    let store = Store::open(folder.path()).await.unwrap();
    assert_eq!(store.jobs(ana, &Filter::default()).await.unwrap().len(), 1);
}

#[tokio::test]
async fn a_database_of_a_newer_program_is_refused() {
    let shelf = Shelf::new().await;
    let Shelf { store, folder, .. } = shelf;
    store.close().await;
    drop(store);
    let file = format!("sqlite://{}", folder.path().join("keeplit.db").display());
    let mut connection = sqlx::SqliteConnection::connect(&file).await.unwrap();
    sqlx::query("insert into _sqlx_migrations select 9999, description, installed_on, success, checksum, execution_time from _sqlx_migrations limit 1")
        .execute(&mut connection)
        .await
        .unwrap();
    connection.close().await.unwrap();
    let opened = Store::open(folder.path()).await.err();
    assert!(matches!(opened, Some(Error::Newer { found: 9999, .. })), "{opened:?}");
}

#[tokio::test]
async fn what_is_no_database_of_ours_is_refused() {
    let folder = tempfile::tempdir().unwrap();
    std::fs::write(folder.path().join("keeplit.db"), "this is a letter, not a database, and long enough to be read")
        .unwrap();
    let opened = Store::open(folder.path()).await.err();
    assert!(matches!(opened, Some(Error::Damaged(_))), "{opened:?}");
}

#[cfg(unix)]
#[tokio::test]
async fn only_its_owner_can_read_the_file() {
    use std::os::unix::fs::PermissionsExt;
    let shelf = Shelf::new().await;
    let mode = std::fs::metadata(shelf.folder.path().join("keeplit.db")).unwrap().permissions().mode();
    assert_eq!(mode & 0o777, 0o600);
}

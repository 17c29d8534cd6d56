//! The one writer: it drains its queue into one transaction, so that one flush serves many saves.
//!
//! Each request has a savepoint of its own: one that fails does not spoil the others. Nobody hears
//! of success before the commit.

use std::pin::Pin;
use std::sync::{Arc, Mutex};

use sqlx::{Connection, SqliteConnection};
use tokio::sync::{mpsc, oneshot};

use super::error::{Error, Result};

/// Most saves in one transaction.
const GROUP: usize = 64;

/// A write in progress on the connection.
pub type Writing<'c, T> = Pin<Box<dyn Future<Output = Result<T>> + Send + 'c>>;

type Work = Box<dyn for<'c> FnOnce(&'c mut SqliteConnection) -> Writing<'c, ()> + Send>;

struct Request {
    work: Work,
    done: oneshot::Sender<Result<()>>,
}

/// Hands writes to the one connection that writes.
#[derive(Clone)]
pub struct Writer {
    queue: Arc<Mutex<Option<mpsc::Sender<Request>>>>,
    stopped: Arc<tokio::sync::Mutex<Option<tokio::task::JoinHandle<()>>>>,
}

impl Writer {
    /// Starts the task that owns the connection.
    pub fn start(connection: SqliteConnection) -> Self {
        let (queue, requests) = mpsc::channel(1024);
        let task = tokio::spawn(serve(connection, requests));
        Self { queue: Arc::new(Mutex::new(Some(queue))), stopped: Arc::new(tokio::sync::Mutex::new(Some(task))) }
    }

    /// Runs a write and answers after its commit.
    ///
    /// A caller that stops waiting does not stop the write: its outcome is then unknown to the
    /// caller, and only the one-time key makes a second try safe.
    pub async fn write<T: Send + 'static>(
        &self,
        work: impl for<'c> FnOnce(&'c mut SqliteConnection) -> Writing<'c, T> + Send + 'static,
    ) -> Result<T> {
        let slot = Arc::new(Mutex::new(None));
        let result = Arc::clone(&slot);
        let work: Work = Box::new(move |connection| {
            Box::pin(async move {
                let value = work(connection).await?;
                *result.lock().map_err(|_| Error::Busy)? = Some(value);
                Ok(())
            })
        });
        let (done, answer) = oneshot::channel();
        let queue = self.queue.lock().map_err(|_| Error::Busy)?.clone().ok_or(Error::Busy)?;
        queue.send(Request { work, done }).await.map_err(|_| Error::Busy)?;
        drop(queue);
        answer.await.map_err(|_| Error::Busy)??;
        slot.lock().map_err(|_| Error::Busy)?.take().ok_or(Error::Busy)
    }

    /// Finishes what is queued and closes the connection.
    pub async fn stop(&self) {
        if let Ok(mut queue) = self.queue.lock() {
            queue.take();
        }
        if let Some(task) = self.stopped.lock().await.take() {
            let _ = task.await;
        }
    }
}

async fn serve(mut connection: SqliteConnection, mut requests: mpsc::Receiver<Request>) {
    let mut group = Vec::with_capacity(GROUP);
    while requests.recv_many(&mut group, GROUP).await > 0 {
        write_group(&mut connection, group.drain(..)).await;
    }
    let _ = connection.close().await;
}

/// One transaction for all; each is told its own result, or all of them that the commit failed.
async fn write_group(connection: &mut SqliteConnection, group: impl Iterator<Item = Request>) {
    let mut told = Vec::new();
    let mut begun = connection.begin_with("BEGIN IMMEDIATE").await;
    for Request { work, done } in group {
        let result = match &mut begun {
            Ok(transaction) => write_one(transaction, work).await,
            Err(_) => Err(Error::Busy),
        };
        told.push((done, result));
    }
    let committed = match begun {
        Ok(transaction) => transaction.commit().await.map_err(Error::from),
        Err(error) => Err(Error::from(error)),
    };
    let failed = committed.is_err();
    if let Err(error) = committed {
        tracing::error!(error = %error, "a group of saves could not be committed");
    }
    for (done, result) in told {
        let _ = done.send(if failed { Err(Error::Busy) } else { result });
    }
}

async fn write_one(connection: &mut SqliteConnection, work: Work) -> Result<()> {
    let mut savepoint = connection.begin().await?;
    work(&mut savepoint).await?;
    Ok(savepoint.commit().await?)
}

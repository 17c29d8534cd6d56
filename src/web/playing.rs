//! Years of cuts played on threads of their own: few at a time, one for each person, stopped at once when
//! nobody waits any more.

use std::collections::HashMap;
use std::sync::atomic::{AtomicBool, AtomicU32, Ordering};
use std::sync::{Arc, Mutex};
use std::time::Duration;

use tokio::sync::{Semaphore, mpsc};

use crate::accounts::PersonId;
use crate::simulation::day::Day;
use crate::simulation::year::Years;
use crate::sizing::proof::Year;
use crate::sizing::{Design, Survey};

/// Years that are played for a page.
pub const YEARS: u32 = 1000;
/// The seed of every page: a job gets the same answer whenever it is asked.
pub const SEED: u64 = 1;
/// Time between two words on how far it is.
const TELL: Duration = Duration::from_millis(80);

/// Who is playing, and how many may.
#[derive(Debug)]
pub struct Playing {
    places: Arc<Semaphore>,
    running: Mutex<HashMap<PersonId, Arc<AtomicBool>>>,
}

impl Default for Playing {
    /// One core stays free for pages, if there is more than one.
    fn default() -> Self {
        let cores = std::thread::available_parallelism().map_or(1, usize::from);
        Self { places: Arc::new(Semaphore::new(cores.saturating_sub(1).max(1))), running: Mutex::default() }
    }
}

/// What a page hears of its years.
#[derive(Clone, Debug, PartialEq)]
pub enum Heard {
    /// All places are taken; it waits.
    Waiting,
    /// So many are over.
    Done(u32),
    /// All are over.
    Over(Box<Year>),
    /// It was stopped.
    Stopped,
}

impl Playing {
    /// Stops what a person has running.
    pub fn stop(&self, person: PersonId) {
        if let Some(flag) = self.running.lock().ok().and_then(|mut running| running.remove(&person)) {
            flag.store(true, Ordering::Relaxed);
        }
    }

    /// Begins anew for a person; what ran before is stopped.
    fn begin(&self, person: PersonId) -> Arc<AtomicBool> {
        self.stop(person);
        let flag = Arc::new(AtomicBool::new(false));
        if let Ok(mut running) = self.running.lock() {
            running.insert(person, flag.clone());
        }
        flag
    }

    /// Forgets a run that is over, unless a newer one has taken its place.
    fn end(&self, person: PersonId, flag: &Arc<AtomicBool>) {
        if let Ok(mut running) = self.running.lock()
            && running.get(&person).is_some_and(|now| Arc::ptr_eq(now, flag))
        {
            running.remove(&person);
        }
    }

    /// How many runs have a place now; for tests.
    pub fn free_places(&self) -> usize {
        self.places.available_permits()
    }

    /// Plays the years of a design for a person. What is heard comes out of the channel; when its end is
    /// dropped, the playing stops before the next year.
    pub fn play(self: &Arc<Self>, person: PersonId, survey: Survey, design: Design) -> mpsc::Receiver<Heard> {
        let (tell, heard) = mpsc::channel(4);
        let playing = self.clone();
        let stop = self.begin(person);
        tokio::spawn(async move {
            playing.run(&stop, &tell, survey, design).await;
            playing.end(person, &stop);
        });
        heard
    }

    async fn run(&self, stop: &Arc<AtomicBool>, tell: &mpsc::Sender<Heard>, survey: Survey, design: Design) {
        let place = match self.places.clone().try_acquire_owned() {
            Ok(place) => place,
            Err(_) => {
                let _ = tell.send(Heard::Waiting).await;
                tokio::select! {
                    place = self.places.clone().acquire_owned() => match place { Ok(place) => place, Err(_) => return },
                    () = tell.closed() => return,
                }
            }
        };
        let done = Arc::new(AtomicU32::new(0));
        let (flag, count) = (stop.clone(), done.clone());
        let mut played = tokio::task::spawn_blocking(move || {
            let _place = place;
            let day = Day::of(&design.demand.day, &design.inverter.losses);
            let years = Years::new(&survey, &design, &day, SEED);
            years.play(0..YEARS, &flag, &count).map(|tallies| years.told(&tallies))
        });
        loop {
            tokio::select! {
                year = &mut played => {
                    let heard = year.ok().flatten().map_or(Heard::Stopped, |year| Heard::Over(Box::new(year)));
                    let _ = tell.send(heard).await;
                    return;
                }
                () = tell.closed() => {
                    stop.store(true, Ordering::Relaxed);
                    let _ = played.await;
                    return;
                }
                () = tokio::time::sleep(TELL) => {
                    let _ = tell.try_send(Heard::Done(done.load(Ordering::Relaxed)));
                }
            }
        }
    }
}

//! Sine or square wave.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::Waveform;
use crate::sizing::finding::Finding;
use crate::sizing::sheet::Sheet;
use crate::sizing::survey::{NeedsSine, Survey};

/// A sine, unless a square wave is on offer or there already and every load bears it.
pub fn waveform(survey: &Survey, sheet: &mut Sheet) -> Waveform {
    let reused = survey.reuse.is_some_and(|unit| !unit.sine);
    let offered = survey.reuse.is_none() && survey.choice.square_wave_offered;
    if !reused && !offered {
        return Waveform::Sine;
    }
    let refused = survey.loads.iter().any(|load| load.needs_sine == NeedsSine::Yes);
    for load in &survey.loads {
        let load_name = load.name.clone();
        match load.needs_sine {
            NeedsSine::Yes => sheet.find(Finding::SquareWaveRefused { load: load_name, reused }),
            NeedsSine::Prefers if reused || !refused => sheet.find(Finding::SquareWaveDisliked { load: load_name }),
            NeedsSine::Prefers | NeedsSine::No => {}
        }
    }
    if refused && !reused { Waveform::Sine } else { Waveform::Square }
}

/// What the waveform leaves of a start: the harmonics of a square wave make heat and no torque.
pub fn surge_share(waveform: Waveform, assumptions: &Assumptions) -> f64 {
    match waveform {
        Waveform::Sine => 1.0,
        Waveform::Square => assumptions.square_wave_surge_share,
    }
}

//! Names of choices, for people.

use crate::sizing::Severity;
use crate::sizing::design::{MainsWindow, RulingMethod, Run, StartVerdict, Waveform};
use crate::sizing::proof::EndedBy;
use crate::sizing::sheet::Checked;
use crate::sizing::survey::{
    Chemistry, Code, Conductor, Insulation, LifeSupport, Method, Mostly, NeedsSine, StartKind,
};

/// A choice that has a name for people.
pub trait Labelled: Copy {
    /// Its name, in lower case but for proper names.
    fn label(self) -> &'static str;
}

macro_rules! labels {
    ($type:ty { $($value:ident = $label:literal),* $(,)? }) => {
        impl Labelled for $type {
            fn label(self) -> &'static str {
                match self { $(Self::$value => $label),* }
            }
        }
    };
}

labels!(Chemistry {
    FloodedTubular = "lead-acid, flooded, tubular plates",
    FloodedFlatPlate = "lead-acid, flooded, flat plates",
    VrlaAgm = "lead-acid, sealed, AGM",
    VrlaGel = "lead-acid, sealed, gel",
    Lfp = "lithium iron phosphate",
});
labels!(StartKind {
    Resistive = "plain heater or filament",
    Electronic = "electronic supply",
    MotorPsc = "motor with run capacitor",
    MotorCapStart = "motor with start capacitor",
    MotorSplitPhase = "split-phase motor",
    Compressor = "compressor",
    UniversalMotor = "motor with brushes",
    Transformer = "transformer or choke",
    HeaterPtc = "PTC heater",
});
labels!(EndedBy {
    CutEnds = "the end of the week",
    EmptyWell = "no charge at hand",
    CutOff = "low-voltage cut-off",
    Overload = "a load it cannot carry",
});
labels!(Mostly {
    AnyTime = "any time alike",
    Daytime = "by day, 6 to 18 h",
    Afternoon = "afternoon, 12 to 20 h",
    Evening = "evening, 17 to 23 h",
    Night = "night, 22 to 6 h",
});
labels!(NeedsSine { Yes = "needs a sine", Prefers = "prefers a sine", No = "bears a square wave" });
labels!(LifeSupport {
    No = "nothing hangs on it",
    Yes = "a life hangs on it",
    Clinical = "a treatment hangs on it",
    ProductCritical = "a product hangs on it",
});
labels!(Code { Iec = "IEC 60364", Nec = "NEC" });
labels!(Conductor { Copper = "copper", Aluminium = "aluminium" });
labels!(Insulation { Pvc70 = "PVC, 70 °C", Xlpe90 = "XLPE, 90 °C" });
labels!(Method {
    B1 = "in conduit or trunking on a wall (B1)",
    C = "clipped to a wall (C)",
    E = "two-core cable in free air (E)",
    F = "single cores side by side in free air (F)",
});
labels!(Run {
    BankToInverter = "bank to inverter",
    StringLead = "string to busbar",
    InverterToBoard = "inverter to board",
    MainsToInverter = "mains to inverter",
    ChargerToBank = "charger to bank",
});
labels!(Waveform { Sine = "sine wave", Square = "square wave" });
labels!(MainsWindow { Narrow = "narrow", Wide = "wide" });
labels!(RulingMethod { Peukert = "Peukert's step sum over the depth of discharge", Section = "the section method with ageing", Kibam = "playing the cut through" });
labels!(StartVerdict { Starts = "starts", Marginal = "marginal", WillNotStart = "will not start" });
labels!(Checked {
    Read = "source read",
    FromMemory = "source from memory",
    CommonPractice = "common practice, no source",
    Derived = "follows by arithmetic",
    OurRule = "our own rule",
});

/// How much a finding weighs, as its key and its word.
pub fn severity(severity: Severity) -> (&'static str, &'static str) {
    match severity {
        Severity::Stop => ("stop", "Stop"),
        Severity::Warn => ("warn", "Look at this"),
        Severity::Note => ("note", "Good to know"),
    }
}

//! How choices are written in a file: one table for reading and writing.

use crate::sizing::survey::{
    Chemistry, Code, Conductor, Insulation, LifeSupport, Method, Mostly, NeedsSine, StartKind,
};

/// A choice with a fixed list of names.
pub trait Named: Copy + PartialEq + 'static {
    /// Every value with its name, in the order of the form.
    const NAMES: &'static [(Self, &'static str)];

    /// The name of a value.
    fn name(self) -> &'static str {
        Self::NAMES.iter().find(|(value, _)| *value == self).map_or("", |(_, name)| name)
    }

    /// The value of a name.
    fn named(name: &str) -> Option<Self> {
        Self::NAMES.iter().find(|(_, known)| *known == name).map(|(value, _)| *value)
    }

    /// What to give instead of an unknown name.
    fn told() -> String {
        let names: Vec<_> = Self::NAMES.iter().map(|(_, name)| *name).collect();
        format!("give one of {}", names.join(", "))
    }
}

macro_rules! named {
    ($type:ty { $($value:ident = $name:literal),* $(,)? }) => {
        impl Named for $type {
            const NAMES: &'static [(Self, &'static str)] = &[$((Self::$value, $name)),*];
        }
    };
}

named!(StartKind {
    Resistive = "resistive",
    Electronic = "electronic",
    MotorPsc = "motor_psc",
    MotorCapStart = "motor_cap_start",
    MotorSplitPhase = "motor_split_phase",
    Compressor = "compressor",
    UniversalMotor = "universal_motor",
    Transformer = "transformer",
    HeaterPtc = "heater_ptc",
});
named!(NeedsSine { Yes = "yes", Prefers = "prefers", No = "no" });
named!(LifeSupport { No = "no", Yes = "yes", Clinical = "clinical", ProductCritical = "product_critical" });
named!(Chemistry {
    FloodedTubular = "flooded_tubular",
    FloodedFlatPlate = "flooded_flat_plate",
    VrlaAgm = "vrla_agm",
    VrlaGel = "vrla_gel",
    Lfp = "lfp",
});
named!(Mostly {
    AnyTime = "any",
    Daytime = "daytime",
    Afternoon = "afternoon",
    Evening = "evening",
    Night = "night",
});
named!(Code { Iec = "iec", Nec = "nec" });
named!(Conductor { Copper = "copper", Aluminium = "aluminium" });
named!(Insulation { Pvc70 = "pvc_70", Xlpe90 = "xlpe_90" });
named!(Method { B1 = "B1", C = "C", E = "E", F = "F" });

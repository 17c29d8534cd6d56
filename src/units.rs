//! Physical quantities, one type each, so that what the trade keeps apart cannot be mixed up.
//!
//! Watts and volt-amperes are two types, and so are the volts of the bank and those of the supply.
//! Only the products that the engine uses exist. Inside the program nothing is rounded; a bare
//! number appears only where a value leaves, and there its name carries the unit.

use std::cmp::Ordering;
use std::iter::Sum;
use std::ops::{Add, Div, Mul, Sub};

use serde::{Deserialize, Serialize};

/// Declares a quantity: addition, subtraction, scaling, ratio and its symbol.
macro_rules! quantity {
    ($(#[$doc:meta])* $name:ident, $symbol:literal) => {
        $(#[$doc])*
        #[derive(Clone, Copy, Debug, Default, PartialEq, PartialOrd, Serialize, Deserialize)]
        #[serde(transparent)]
        pub struct $name(pub f64);

        impl $name {
            /// The SI symbol, as printed behind the number.
            pub const SYMBOL: &'static str = $symbol;
            /// Nothing of it.
            pub const ZERO: Self = Self(0.0);

            /// The larger of two.
            pub fn max(self, other: Self) -> Self { Self(self.0.max(other.0)) }
            /// The smaller of two.
            pub fn min(self, other: Self) -> Self { Self(self.0.min(other.0)) }
            /// Order for sorting; every value that entered through a checked door is finite.
            pub fn order(&self, other: &Self) -> Ordering { self.0.total_cmp(&other.0) }
        }

        impl Add for $name { type Output = Self; fn add(self, other: Self) -> Self { Self(self.0 + other.0) } }
        impl Sub for $name { type Output = Self; fn sub(self, other: Self) -> Self { Self(self.0 - other.0) } }
        impl Mul<f64> for $name { type Output = Self; fn mul(self, factor: f64) -> Self { Self(self.0 * factor) } }
        impl Div<f64> for $name { type Output = Self; fn div(self, divisor: f64) -> Self { Self(self.0 / divisor) } }
        impl Div for $name { type Output = f64; fn div(self, other: Self) -> f64 { self.0 / other.0 } }
        impl Mul<Fraction> for $name { type Output = Self; fn mul(self, share: Fraction) -> Self { Self(self.0 * share.0) } }
        impl Div<Fraction> for $name { type Output = Self; fn div(self, share: Fraction) -> Self { Self(self.0 / share.0) } }
        impl Sum for $name { fn sum<I: Iterator<Item = Self>>(items: I) -> Self { Self(items.map(|item| item.0).sum()) } }
    };
}

quantity!(/// Real power: what the bank must deliver.
    Watts, "W");
quantity!(/// Apparent power: what an inverter is rated in.
    VoltAmps, "VA");
quantity!(/// Reactive power of the fundamental, lagging positive.
    Vars, "var");
quantity!(/// Distortion power: the part of the apparent power that harmonics make.
    DistortionVoltAmps, "VA");
quantity!(/// Volts of the supply and of the inverter's output, rms.
    AcVolts, "V");
quantity!(/// Volts of the bank.
    DcVolts, "V");
quantity!(/// Current; rms on the supply side.
    Amps, "A");
quantity!(/// Charge.
    AmpHours, "Ah");
quantity!(/// Energy.
    WattHours, "Wh");
quantity!(/// Resistance.
    Ohms, "Ω");
quantity!(/// Resistance of a conductor per kilometre of its length, one way.
    OhmsPerKilometre, "Ω/km");
quantity!(/// Length.
    Metres, "m");
quantity!(/// Length of gaps and openings.
    Millimetres, "mm");
quantity!(/// Cross-section of a conductor.
    SquareMillimetres, "mm²");
quantity!(/// Area of an opening.
    SquareCentimetres, "cm²");
quantity!(/// Flow of air.
    CubicMetresPerHour, "m³/h");
quantity!(/// Temperature; differences in kelvin have the same size.
    Celsius, "°C");
quantity!(/// Time as the job counts it.
    Hours, "h");
quantity!(/// Time as a motor start counts it.
    Seconds, "s");
quantity!(/// Time as a changeover counts it.
    Milliseconds, "ms");
quantity!(/// Years of service.
    Years, "years");
quantity!(/// Frequency.
    Hertz, "Hz");
quantity!(/// Fault current a device can break.
    Kiloamps, "kA");
quantity!(/// Mass.
    Kilograms, "kg");

/// Declares `left × right = product` together with both quotients.
macro_rules! law {
    ($left:ident * $right:ident = $product:ident) => {
        impl Mul<$right> for $left {
            type Output = $product;
            fn mul(self, other: $right) -> $product {
                $product(self.0 * other.0)
            }
        }
        impl Mul<$left> for $right {
            type Output = $product;
            fn mul(self, other: $left) -> $product {
                $product(self.0 * other.0)
            }
        }
        impl Div<$left> for $product {
            type Output = $right;
            fn div(self, other: $left) -> $right {
                $right(self.0 / other.0)
            }
        }
        impl Div<$right> for $product {
            type Output = $left;
            fn div(self, other: $right) -> $left {
                $left(self.0 / other.0)
            }
        }
    };
}

law!(DcVolts * Amps = Watts);
law!(AcVolts * Amps = VoltAmps);
law!(Amps * Hours = AmpHours);
law!(Watts * Hours = WattHours);
law!(Amps * Ohms = DcVolts);
law!(OhmsPerKilometre * Metres = Milliohms);

quantity!(/// A thousandth of an ohm: ohms per kilometre times metres.
    Milliohms, "mΩ");

impl Milliohms {
    /// The same in ohms.
    pub fn ohms(self) -> Ohms {
        Ohms(self.0 / 1000.0)
    }
}

impl Watts {
    /// The apparent power that carries this real power at a power factor.
    pub fn apparent(self, power_factor: Fraction) -> VoltAmps {
        VoltAmps(self.0 / power_factor.0)
    }
}

impl VoltAmps {
    /// The real power in this apparent power at a power factor.
    pub fn real(self, power_factor: Fraction) -> Watts {
        Watts(self.0 * power_factor.0)
    }
}

/// A share of one, `0 ≤ x ≤ 1`: a depth of discharge, an efficiency, a duty, a power factor.
#[derive(Clone, Copy, Debug, Default, PartialEq, PartialOrd, Serialize)]
#[serde(transparent)]
pub struct Fraction(f64);

/// A number that is no share of one.
#[derive(Clone, Copy, Debug, PartialEq, thiserror::Error)]
#[error("{given} is not between 0 and 1")]
pub struct OutOfRange {
    /// What was given.
    pub given: f64,
}

impl Fraction {
    /// The whole.
    pub const ONE: Self = Self(1.0);
    /// Nothing.
    pub const ZERO: Self = Self(0.0);

    /// Checks that the number is a share; NaN is none.
    pub fn new(share: f64) -> Result<Self, OutOfRange> {
        if (0.0..=1.0).contains(&share) { Ok(Self(share)) } else { Err(OutOfRange { given: share }) }
    }

    /// A share known when the program is built; anything else does not compile.
    pub const fn constant(share: f64) -> Self {
        assert!(share >= 0.0 && share <= 1.0);
        Self(share)
    }

    /// The bare number.
    pub const fn get(self) -> f64 {
        self.0
    }

    /// What is left of the whole.
    pub fn complement(self) -> Self {
        Self(1.0 - self.0)
    }
}

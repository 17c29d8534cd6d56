//! P, Q and D of a load: three numbers that add, where VA do not.

use crate::sizing::survey::{Load, StartKind};
use crate::units::{DistortionVoltAmps, Fraction, Vars, VoltAmps, Watts};

/// Real, reactive and distortion power of what runs together.
#[derive(Clone, Copy, Debug, Default, PartialEq)]
pub struct Power {
    /// Real power (P).
    pub real: Watts,
    /// Reactive power of the fundamental (Q).
    pub reactive: Vars,
    /// Distortion power (D). Adding it arithmetically is slightly high: third harmonics of
    /// rectifiers are in phase, higher ones partly cancel.
    pub distortion: DistortionVoltAmps,
}

impl Power {
    /// Splits a real power by its true power factor.
    ///
    /// `S = P / λ`; the shortfall `√(S² − P²)` is Q for motors and chokes, D for electronic supplies
    /// and nothing for plain resistances.
    ///
    /// Source (from memory): IEEE 1459-2010, the same definitions; which part the shortfall is, is
    /// our own rule.
    pub fn split(real: Watts, power_factor: Fraction, start: StartKind) -> Self {
        let apparent = real.apparent(power_factor);
        let shortfall = (apparent.0.powi(2) - real.0.powi(2)).max(0.0).sqrt();
        let (reactive, distortion) = match start {
            StartKind::Electronic => (0.0, shortfall),
            StartKind::Resistive | StartKind::HeaterPtc => (0.0, 0.0),
            _ => (shortfall, 0.0),
        };
        Self { real, reactive: Vars(reactive), distortion: DistortionVoltAmps(distortion) }
    }

    /// What one piece of a load draws while it really works.
    pub fn of_one(load: &Load) -> Self {
        Self::split(load.running, load.power_factor, load.start)
    }

    /// `S = √(P² + Q² + D²)`.
    ///
    /// Source (from memory): IEEE 1459-2010, arithmetic of the powers of one phase.
    pub fn apparent(self) -> VoltAmps {
        VoltAmps(self.square().sqrt())
    }
}

impl Power {
    /// `S²`, which is enough to say which of two is larger.
    pub(crate) fn square(self) -> f64 {
        self.real.0.powi(2) + self.reactive.0.powi(2) + self.distortion.0.powi(2)
    }
}

impl std::ops::Add for Power {
    type Output = Self;
    fn add(self, other: Self) -> Self {
        Self {
            real: self.real + other.real,
            reactive: self.reactive + other.reactive,
            distortion: self.distortion + other.distortion,
        }
    }
}

impl std::ops::Sub for Power {
    type Output = Self;
    fn sub(self, other: Self) -> Self {
        Self {
            real: self.real - other.real,
            reactive: self.reactive - other.reactive,
            distortion: self.distortion - other.distortion,
        }
    }
}

impl std::ops::Mul<f64> for Power {
    type Output = Self;
    fn mul(self, factor: f64) -> Self {
        Self { real: self.real * factor, reactive: self.reactive * factor, distortion: self.distortion * factor }
    }
}

impl std::iter::Sum for Power {
    fn sum<I: Iterator<Item = Self>>(items: I) -> Self {
        items.fold(Self::default(), |sum, item| sum + item)
    }
}

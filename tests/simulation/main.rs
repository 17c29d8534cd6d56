//! The proof: closed form against stepping, against a physics model, against published figures.

mod agreement;
mod calibration;
mod laws;
mod physics;
mod recharge;
mod samples;
mod stepper;

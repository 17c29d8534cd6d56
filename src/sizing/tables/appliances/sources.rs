//! Where the running watts come from, and what shape the currents have.

pub const TAMIL_NADU: &str = "load table of the Tamil Nadu electricity utility";
pub const ANDAMAN: &str = "load table of the Andaman and Nicobar electricity department";
pub const US_UTILITY: &str = "wattage table of an electricity utility in New York State";
pub const DOE: &str = "US Department of Energy, list of appliance wattages, read as republished by a university";
pub const CO_OP: &str = "running and starting watts, table of a US rural electric co-operative";
pub const FSEC: &str = "Florida Solar Energy Center, metering report PF-344-98, table 1";
pub const WHO: &str = "WHO and UNICEF: no more than 70 W for each l/min of oxygen";
pub const NEC_AND_PLATES: &str = "typical plates; starting multiple beside NEC 430.248 and 430.251(A)";
pub const PLATES: &str = "typical plates";

/// Rectifier without correction.
pub const PULSED: &str = "short pulses at the crest: crest factor 2.5 to 5, distortion often above 80 %";
/// Rectifier with correction, or a drive with a choke.
pub const CORRECTED: &str = "nearly a sine: crest factor about 1.5";
/// Induction motor.
pub const LAGGING: &str = "a lagging sine; after a break of more than 0.1 s it starts anew";
/// Motor with brushes.
pub const BRUSHED: &str = "nearly a sine, distortion about 26 %";
/// Transformer or choke.
pub const IRON: &str = "a lagging sine; magnetising current of 5 to 15 times for the first cycles";
/// Plain resistance.
pub const PLAIN: &str = "a sine in phase with the volts";

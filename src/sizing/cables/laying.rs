//! How a run is laid, and what each size carries there.

use crate::sizing::assumptions::Assumptions;
use crate::sizing::design::{CrossSection, Run};
use crate::sizing::survey::{Code, Conductor, Insulation, Method, Survey};
use crate::sizing::tables::ampacity::{self, NEC_ALUMINIUM, NEC_COPPER, NEC_DEVICE_CAPS, Nec};
use crate::sizing::tables::conductors::{
    ALUMINIUM_PER_KELVIN, AWG, AWG_AT_C, Awg, COPPER_PER_KELVIN, METRIC, METRIC_AT_C, Metric,
};
use crate::sizing::tables::{ambient, grouping};
use crate::units::{Amps, Celsius, OhmsPerKilometre, SquareMillimetres};

/// Temperature at which the factors of resistance per kelvin hold.
const RESISTANCE_FACTORS_AT_C: f64 = 20.0;

/// How a run is laid.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Laying {
    /// Wiring code.
    pub code: Code,
    /// Metal; flexible leads are made of copper alone.
    pub conductor: Conductor,
    /// Insulation.
    pub insulation: Insulation,
    /// Method of IEC 60364-5-52.
    pub method: Method,
    /// Flexible (class 5) or stranded for fixed wiring (class 2).
    pub flexible: bool,
    /// Air around the cable.
    pub ambient: Celsius,
    /// Circuits that lie together, this one included.
    pub circuits: u32,
}

/// One size as laid.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Size {
    /// Its name.
    pub cross_section: CrossSection,
    /// Its area.
    pub area: SquareMillimetres,
    /// Capacity in the table, before any correction.
    pub tabled: Amps,
    /// What its terminals bear; the IEC's tables have no such bound.
    pub terminals: Option<Amps>,
    /// Resistance at the working temperature, one way.
    pub warm: OhmsPerKilometre,
    /// Highest rating of the device before it, where the code caps it.
    pub device_cap: Option<Amps>,
}

impl Laying {
    /// As the survey says; battery leads are flexible and of copper.
    pub fn of(run: Run, survey: &Survey, assumptions: &Assumptions) -> Self {
        let choice = &survey.choice;
        let flexible = run.is_dc();
        Self {
            code: choice.code,
            conductor: if flexible { Conductor::Copper } else { choice.conductor },
            insulation: choice.insulation,
            method: if flexible { choice.method } else { choice.ac_method },
            flexible,
            ambient: survey.site.inverter_ambient,
            circuits: assumptions.grouped_circuits.ceil() as u32,
        }
    }

    /// Temperature the conductor is taken to have: the limit of its insulation, or of its terminals under the NEC.
    pub fn working_temperature(&self) -> Celsius {
        match (self.code, self.insulation) {
            (Code::Nec, _) => Celsius(AWG_AT_C),
            (Code::Iec, Insulation::Pvc70) => Celsius(70.0),
            (Code::Iec, Insulation::Xlpe90) => Celsius(90.0),
        }
    }

    /// Factor for the air around it.
    pub fn ambient_factor(&self) -> f64 {
        ambient::factor(self.code, self.insulation, self.ambient)
    }

    /// Circuits that lie together once this run has several conductors per pole, each set counting as one.
    pub fn circuits_with(&self, parallel: u32) -> u32 {
        self.circuits.saturating_add(parallel - 1)
    }

    /// Factor for the circuits that lie together.
    pub fn grouping_factor(&self, parallel: u32) -> f64 {
        grouping::factor(self.code, self.method, self.circuits_with(parallel))
    }

    /// Capacity of some conductors per pole after all corrections (I_z).
    ///
    /// `I_z = I_t · C_a · C_g · n`; under the NEC each conductor's share is bounded by its terminals.
    /// Source: IEC 60364-5-52, NEC 310.15 (read in reproductions); NEC 110.14(C) (from memory).
    pub fn capacity(&self, size: &Size, parallel: u32) -> Amps {
        let one = size.tabled * self.ambient_factor() * self.grouping_factor(parallel);
        size.terminals.map_or(one, |terminals| one.min(terminals)) * f64::from(parallel)
    }

    /// Every size the tables have for it, thinnest first.
    pub fn sizes(&self) -> Vec<Size> {
        match self.code {
            Code::Iec => self.metric_sizes(),
            Code::Nec => self.american_sizes(),
        }
    }

    fn metric_sizes(&self) -> Vec<Size> {
        let capacities = ampacity::iec(self.conductor, self.insulation, self.method);
        METRIC.iter().zip(capacities).filter_map(|(row, tabled)| self.metric_size(row, Amps(*tabled))).collect()
    }

    fn metric_size(&self, row: &Metric, tabled: Amps) -> Option<Size> {
        let at_20 = match self.conductor {
            Conductor::Copper if self.flexible => row.copper_class5,
            Conductor::Copper => row.copper_class2,
            Conductor::Aluminium => row.aluminium?,
        };
        let cross_section = CrossSection::Metric(row.area);
        let warm = self.warmed(at_20, METRIC_AT_C);
        let size = Size { cross_section, area: row.area, tabled, terminals: None, warm, device_cap: None };
        (tabled > Amps::ZERO).then_some(size)
    }

    fn american_sizes(&self) -> Vec<Size> {
        let capacities = match self.conductor {
            Conductor::Copper => &NEC_COPPER,
            Conductor::Aluminium => &NEC_ALUMINIUM,
        };
        AWG.iter().zip(capacities).filter_map(|(row, capacity)| self.american_size(row, capacity)).collect()
    }

    fn american_size(&self, row: &Awg, capacity: &Nec) -> Option<Size> {
        let at_75 = match self.conductor {
            Conductor::Copper => row.copper,
            Conductor::Aluminium => row.aluminium?,
        };
        Some(Size {
            cross_section: CrossSection::Awg(row.name),
            area: row.area,
            tabled: match self.insulation {
                Insulation::Pvc70 => capacity.at_75,
                Insulation::Xlpe90 => capacity.at_90,
            },
            terminals: Some(capacity.at_75),
            warm: self.warmed(at_75, AWG_AT_C),
            device_cap: NEC_DEVICE_CAPS.iter().find(|cap| cap.0 == row.name).map(|cap| cap.1),
        })
    }

    /// `r(T) = r · (1 + α·(T − 20)) / (1 + α·(T_table − 20))`.
    fn warmed(&self, tabled: OhmsPerKilometre, tabled_at: f64) -> OhmsPerKilometre {
        let per_kelvin = match self.conductor {
            Conductor::Copper => COPPER_PER_KELVIN,
            Conductor::Aluminium => ALUMINIUM_PER_KELVIN,
        };
        let rise = |celsius: f64| 1.0 + per_kelvin * (celsius - RESISTANCE_FACTORS_AT_C);
        tabled * (rise(self.working_temperature().0) / rise(tabled_at))
    }
}

/// Copper in XLPE, clipped direct at 30 °C, alone; for tests.
#[cfg(test)]
pub(crate) fn laid() -> Laying {
    Laying {
        code: Code::Iec,
        conductor: Conductor::Copper,
        insulation: Insulation::Xlpe90,
        method: Method::C,
        flexible: false,
        ambient: Celsius(30.0),
        circuits: 1,
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    fn size(laying: &Laying, area: f64) -> Size {
        laying.sizes().into_iter().find(|size| (size.area.0 - area).abs() < 0.01).expect("a size of the table")
    }

    #[test]
    fn heat_and_company_are_multiplied() {
        // Our own vector: PVC, method C, 16 mm², 40 °C, three circuits: 85·0.87·0.79 A.
        let laying = Laying { insulation: Insulation::Pvc70, ambient: Celsius(40.0), circuits: 3, ..laid() };
        assert!((laying.capacity(&size(&laying, 16.0), 1).0 - 58.42).abs() < 0.01);
    }

    #[test]
    fn the_terminals_bound_what_better_insulation_could_carry() {
        let laying = Laying { code: Code::Nec, ..laid() };
        let six = size(&laying, 13.30);
        // NEC Table 310.16, 6 AWG: 65 A at 75 °C, 75 A at 90 °C; 0.82 at 46 to 50 °C.
        assert_eq!(laying.capacity(&six, 1), Amps(65.0));
        let hot = Laying { ambient: Celsius(50.0), ..laying };
        assert!((hot.capacity(&six, 1).0 - 75.0 * 0.82).abs() < 1e-9);
    }

    #[test]
    fn conductors_in_parallel_crowd_each_other() {
        let laying = laid();
        let size = size(&laying, 70.0);
        assert!((laying.capacity(&size, 2).0 - 2.0 * 269.0 * 0.85).abs() < 1e-9, "two circuits on a wall");
    }

    #[test]
    fn aluminium_begins_where_it_is_made() {
        let aluminium = Laying { conductor: Conductor::Aluminium, ..laid() };
        assert_eq!(aluminium.sizes()[0].area.0, 10.0);
        let american = Laying { code: Code::Nec, ..aluminium };
        assert_eq!(american.sizes()[0].cross_section, CrossSection::Awg("8"));
    }

    #[test]
    fn small_american_conductors_cap_their_device() {
        let caps: Vec<_> = Laying { code: Code::Nec, ..laid() }.sizes().iter().map(|size| size.device_cap).collect();
        assert_eq!(caps[..4], [Some(Amps(15.0)), Some(Amps(20.0)), Some(Amps(30.0)), None]);
    }
}

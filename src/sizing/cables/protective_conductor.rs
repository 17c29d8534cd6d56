//! The protective conductor of a run on the supply's side.

use super::laying::{Laying, Size};
use crate::sizing::design::CrossSection;
use crate::sizing::survey::Code;
use crate::sizing::tables::conductors::METRIC;
use crate::units::{Amps, SquareMillimetres};

/// NEC 250.122: highest rating of the device in A, copper AWG. Read in one reproduction.
const BY_DEVICE: [(f64, &str); 14] = [
    (15.0, "14"),
    (20.0, "12"),
    (60.0, "10"),
    (100.0, "8"),
    (200.0, "6"),
    (300.0, "4"),
    (400.0, "3"),
    (500.0, "2"),
    (600.0, "1"),
    (800.0, "1/0"),
    (1000.0, "2/0"),
    (1200.0, "3/0"),
    (1600.0, "4/0"),
    (2000.0, "250 kcmil"),
];

/// Its size: under the IEC by the line conductor and of the same metal, under the NEC by the device and of copper.
///
/// Sources: IEC 60364-5-54 Table 54.2, read in a reproduction; NEC 250.122, its last two rows from memory.
/// `None` above the table's last device, or where there is no device to go by.
pub fn protective_conductor(laying: &Laying, line: &Size, device: Option<Amps>) -> Option<CrossSection> {
    match laying.code {
        Code::Iec => Some(CrossSection::Metric(by_line(line.area))),
        Code::Nec => by_device(device?),
    }
}

fn by_device(rating: Amps) -> Option<CrossSection> {
    BY_DEVICE.iter().find(|row| rating.0 <= row.0).map(|row| CrossSection::Awg(row.1))
}

/// `S` up to 16 mm², 16 mm² up to 35 mm², then half of `S` and up to the next size.
fn by_line(line: SquareMillimetres) -> SquareMillimetres {
    let least = match line.0 {
        area if area <= 16.0 => area,
        area if area <= 35.0 => 16.0,
        area => area / 2.0,
    };
    METRIC.iter().map(|row| row.area).find(|area| area.0 >= least).unwrap_or(line)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_protective_conductor_follows_table_54_2() {
        let cases = [
            // line, protective, mm²; IEC 60364-5-54 Table 54.2, read in a reproduction
            (1.5, 1.5),
            (16.0, 16.0),
            (25.0, 16.0),
            (35.0, 16.0),
            (50.0, 25.0),
            (70.0, 35.0),
            (95.0, 50.0),
            (120.0, 70.0),
            (150.0, 95.0),
            (185.0, 95.0),
            (240.0, 120.0),
        ];
        for (line, protective) in cases {
            assert_eq!(by_line(SquareMillimetres(line)).0, protective, "line {line} mm²");
        }
    }

    #[test]
    fn the_equipment_ground_follows_the_device() {
        // NEC 250.122, copper; read in one reproduction. In between, the next listed device counts.
        let cases = [
            (15.0, "14"),
            (20.0, "12"),
            (25.0, "10"),
            (60.0, "10"),
            (70.0, "8"),
            (110.0, "6"),
            (225.0, "4"),
            (400.0, "3"),
        ];
        for (rating, name) in cases {
            assert_eq!(by_device(Amps(rating)), Some(CrossSection::Awg(name)), "device {rating} A");
        }
        assert_eq!(by_device(Amps(2500.0)), None);
    }
}

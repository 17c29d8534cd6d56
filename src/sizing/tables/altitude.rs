//! What height leaves of an air-cooled unit's rating.

use crate::sizing::finding::Finding;
use crate::sizing::sheet::Sheet;
use crate::units::Metres;

/// Height in m, share of the rating; highest first.
///
/// Source (from memory): IEC 62040-3, altitude table for UPS.
const ALTITUDE: [(f64, f64); 7] =
    [(4000.0, 0.74), (3500.0, 0.78), (3000.0, 0.82), (2500.0, 0.86), (2000.0, 0.91), (1500.0, 0.95), (1000.0, 1.00)];

/// Share of the rating at a height; above the table the last row holds and a finding says so.
pub fn altitude_share(altitude: Metres, sheet: &mut Sheet) -> f64 {
    let highest = ALTITUDE[0].0;
    if altitude.0 > highest {
        let given = altitude.0;
        sheet.find(Finding::OutsideMethod { what: "derating by height", given, lowest: 0.0, highest, unit: "m" });
    }
    super::between(&ALTITUDE, altitude.0)
}

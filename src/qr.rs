//! A link as a square of dark and light modules, for a camera to read.
//!
//! Source (from memory): ISO/IEC 18004. Error correction level M, which bears about 15 % of damage,
//! and a clear edge of four modules.

use std::fmt::Write;

use qrcodegen::{QrCode, QrCodeEcc};

/// Modules that stay light on each side.
const EDGE: i32 = 4;

/// The square, ready to be drawn.
#[derive(Clone, Debug, PartialEq, Eq)]
pub struct Qr {
    /// Modules on a side, clear edge included.
    pub side: i32,
    /// The dark modules as one SVG path; a module is one unit.
    pub path: String,
}

impl Qr {
    /// The square for a text; `None` if the text is longer than a square can hold.
    pub fn of(text: &str) -> Option<Self> {
        let code = QrCode::encode_text(text, QrCodeEcc::Medium).ok()?;
        let mut path = String::new();
        for y in 0..code.size() {
            for (x, length) in dark_stretches(&code, y) {
                // Writing into a string cannot fail.
                let _ = write!(path, "M{} {}h{length}v1h-{length}z", x + EDGE, y + EDGE);
            }
        }
        Some(Self { side: code.size() + 2 * EDGE, path })
    }
}

/// Beginning and length of each dark stretch in a row.
fn dark_stretches(code: &QrCode, y: i32) -> Vec<(i32, i32)> {
    let mut stretches: Vec<(i32, i32)> = Vec::new();
    for x in (0..code.size()).filter(|&x| code.get_module(x, y)) {
        match stretches.last_mut() {
            Some((from, length)) if *from + *length == x => *length += 1,
            _ => stretches.push((x, 1)),
        }
    }
    stretches
}

#[cfg(test)]
mod tests {
    use super::*;

    const LINK: &str = "https://jobs.example.com/power/o/abcdefghijklmnopqrstuvwxyz";

    /// Paints the path back into modules, as a screen would.
    fn painted(qr: &Qr) -> Vec<Vec<bool>> {
        let mut grid = vec![vec![false; qr.side as usize]; qr.side as usize];
        for stretch in qr.path.split('M').skip(1) {
            let (from, rest) = stretch.split_once('h').unwrap();
            let (x, y) = from.split_once(' ').unwrap();
            let (x, y): (usize, usize) = (x.parse().unwrap(), y.parse().unwrap());
            let length: usize = rest.split_once('v').unwrap().0.parse().unwrap();
            grid[y][x..x + length].fill(true);
        }
        grid
    }

    #[test]
    fn a_camera_reads_the_link_back() {
        let qr = Qr::of(LINK).unwrap();
        let grid = painted(&qr);
        let scale = 5;
        let side = grid.len() * scale;
        let dark = |x: usize, y: usize| if grid[y / scale][x / scale] { 0 } else { 255 };
        let mut picture = rqrr::PreparedImage::prepare_from_greyscale(side, side, dark);
        let squares = picture.detect_grids();
        assert_eq!(squares.len(), 1);
        let (meta, text) = squares[0].decode().unwrap();
        assert_eq!(text, LINK);
        assert_eq!(meta.ecc_level, 0, "level M is written as 00");
    }

    #[test]
    fn four_modules_stay_clear_on_each_side() {
        let grid = painted(&Qr::of(LINK).unwrap());
        let last = grid.len() - 1;
        for (y, row) in grid.iter().enumerate() {
            for (x, dark) in row.iter().enumerate() {
                let edge = x < 4 || y < 4 || x > last - 4 || y > last - 4;
                assert!(!(edge && *dark), "dark module at {x}, {y}");
            }
        }
        assert!(grid[4][4], "the corner mark begins right after the edge");
    }

    #[test]
    fn a_text_that_no_square_holds_gives_none() {
        assert_eq!(Qr::of(&"x".repeat(5000)), None);
    }
}

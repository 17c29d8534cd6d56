//! How often the mains fails, and for how long, by country: the fallback where nobody on site can say.
//!
//! Averages over a network or over firms; a customer at the end of a rural feeder may see ten times the
//! figure. Each row names the year it is of, and an answer that rests on it says so.
//!
//! Source: firms' cuts in a typical month, World Bank Enterprise Surveys, indicator IC.ELC.OUTG, read in a
//! public copy; durations as said beside each row.

use crate::units::Hours;

/// A country's or region's cuts.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Region {
    /// Its name.
    pub name: &'static str,
    /// The year or years of its figures.
    pub year: &'static str,
    /// Kinds of cut; at least one.
    pub cuts: &'static [Kind],
}

/// One kind of cut: how often, and a lognormal length where it is known.
#[derive(Clone, Copy, Debug, PartialEq)]
pub struct Kind {
    /// In a year.
    pub per_year: f64,
    /// Mean and spread of the logarithm; unknown where only the number was asked for.
    pub length: Option<(Hours, f64)>,
}

/// The figures of a name; `None` where there are none.
pub fn region(name: &str) -> Option<&'static Region> {
    REGIONS.iter().find(|region| region.name == name)
}

/// Every region, by name.
pub static REGIONS: &[Region] = &[
    Region { name: "Afghanistan", year: "2014", cuts: &[Kind { per_year: 138.0, length: None }] },
    Region { name: "Algeria", year: "2007", cuts: &[Kind { per_year: 38.4, length: None }] },
    Region { name: "Angola", year: "2010", cuts: &[Kind { per_year: 56.4, length: None }] },
    Region { name: "Armenia", year: "2020", cuts: &[Kind { per_year: 30.0, length: None }] },
    Region { name: "Azerbaijan", year: "2019", cuts: &[Kind { per_year: 25.2, length: None }] },
    Region { name: "Bangladesh", year: "2013", cuts: &[Kind { per_year: 774.0, length: None }] },
    Region { name: "Benin", year: "2016", cuts: &[Kind { per_year: 336.0, length: None }] },
    Region { name: "Botswana", year: "2010", cuts: &[Kind { per_year: 49.2, length: None }] },
    Region { name: "Burkina Faso", year: "2009", cuts: &[Kind { per_year: 117.6, length: None }] },
    Region { name: "Burundi", year: "2014", cuts: &[Kind { per_year: 199.2, length: None }] },
    Region { name: "Cameroon", year: "2016", cuts: &[Kind { per_year: 91.2, length: None }] },
    Region { name: "Central African Republic", year: "2011", cuts: &[Kind { per_year: 348.0, length: None }] },
    Region { name: "Congo Dem. Rep.", year: "2013", cuts: &[Kind { per_year: 147.6, length: None }] },
    Region { name: "Congo Rep.", year: "2009", cuts: &[Kind { per_year: 258.0, length: None }] },
    Region { name: "Cote d'Ivoire", year: "2016", cuts: &[Kind { per_year: 42.0, length: None }] },
    Region { name: "Dominican Republic", year: "2016", cuts: &[Kind { per_year: 88.8, length: None }] },
    Region { name: "Eswatini", year: "2016", cuts: &[Kind { per_year: 44.4, length: None }] },
    Region { name: "Ethiopia", year: "2015", cuts: &[Kind { per_year: 98.4, length: None }] },
    Region { name: "Georgia", year: "2019", cuts: &[Kind { per_year: 26.4, length: None }] },
    // 700 h a year reported by firms over 8.4 a month: development economics centre, survey of 2013. Spread: our choice.
    Region { name: "Ghana", year: "2013", cuts: &[Kind { per_year: 100.8, length: Some((Hours(6.94), 0.8)) }] },
    // 87.4 interruptions per 100 customers, 95.8 min each: Trade and Industry Committee 2004-05, paragraph 74. Spread: our choice.
    Region {
        name: "Great Britain",
        year: "2001-02",
        cuts: &[Kind { per_year: 0.874, length: Some((Hours(1.597), 1.2)) }],
    },
    Region { name: "Guyana", year: "2010", cuts: &[Kind { per_year: 102.0, length: None }] },
    Region { name: "Honduras", year: "2016", cuts: &[Kind { per_year: 28.8, length: None }] },
    Region { name: "India", year: "2014", cuts: &[Kind { per_year: 165.6, length: None }] },
    Region { name: "Iraq", year: "2011", cuts: &[Kind { per_year: 490.8, length: None }] },
    Region { name: "Jamaica", year: "2010", cuts: &[Kind { per_year: 30.0, length: None }] },
    Region { name: "Kenya", year: "2018", cuts: &[Kind { per_year: 45.6, length: None }] },
    Region { name: "Lesotho", year: "2016", cuts: &[Kind { per_year: 26.4, length: None }] },
    Region { name: "Liberia", year: "2017", cuts: &[Kind { per_year: 54.0, length: None }] },
    Region { name: "Madagascar", year: "2013", cuts: &[Kind { per_year: 80.4, length: None }] },
    Region { name: "Malawi", year: "2014", cuts: &[Kind { per_year: 80.4, length: None }] },
    Region { name: "Mali", year: "2016", cuts: &[Kind { per_year: 50.4, length: None }] },
    Region { name: "Mauritania", year: "2014", cuts: &[Kind { per_year: 63.6, length: None }] },
    Region { name: "Myanmar", year: "2016", cuts: &[Kind { per_year: 132.0, length: None }] },
    Region { name: "Nepal", year: "2013", cuts: &[Kind { per_year: 104.4, length: None }] },
    Region { name: "Niger", year: "2017", cuts: &[Kind { per_year: 264.0, length: None }] },
    // Almost 6 h each: press report of 2015 that cites the same survey. Spread: our choice.
    Region { name: "Nigeria", year: "2014", cuts: &[Kind { per_year: 393.6, length: Some((Hours(6.0), 0.8)) }] },
    Region { name: "Pakistan", year: "2013", cuts: &[Kind { per_year: 902.4, length: None }] },
    Region { name: "Papua New Guinea", year: "2015", cuts: &[Kind { per_year: 502.8, length: None }] },
    Region { name: "Paraguay", year: "2017", cuts: &[Kind { per_year: 20.4, length: None }] },
    Region { name: "Rwanda", year: "2019", cuts: &[Kind { per_year: 28.8, length: None }] },
    Region { name: "Senegal", year: "2014", cuts: &[Kind { per_year: 72.0, length: None }] },
    Region { name: "Sierra Leone", year: "2017", cuts: &[Kind { per_year: 109.2, length: None }] },
    Region { name: "South Africa", year: "2020", cuts: &[Kind { per_year: 92.4, length: None }] },
    Region { name: "Sri Lanka", year: "2011", cuts: &[Kind { per_year: 49.2, length: None }] },
    Region { name: "Sudan", year: "2014", cuts: &[Kind { per_year: 40.8, length: None }] },
    Region { name: "Tanzania", year: "2013", cuts: &[Kind { per_year: 106.8, length: None }] },
    Region { name: "The Gambia", year: "2018", cuts: &[Kind { per_year: 253.2, length: None }] },
    Region { name: "Togo", year: "2016", cuts: &[Kind { per_year: 66.0, length: None }] },
    Region { name: "Uganda", year: "2013", cuts: &[Kind { per_year: 75.6, length: None }] },
    // Two-part law fitted to 5.6 h and 1.4 interruptions a year (Form EIA-861, 2022, as cited) and to the households
    // with a cut of 6 h or more (American Housing Survey 2023): derived.
    Region {
        name: "United States",
        year: "2022",
        cuts: &[
            Kind { per_year: 1.0, length: Some((Hours(2.0), 1.0)) },
            Kind { per_year: 0.4, length: Some((Hours(9.0), 1.2)) },
        ],
    },
    Region { name: "Uzbekistan", year: "2019", cuts: &[Kind { per_year: 22.8, length: None }] },
    Region { name: "Venezuela", year: "2010", cuts: &[Kind { per_year: 31.2, length: None }] },
    Region { name: "Yemen", year: "2013", cuts: &[Kind { per_year: 465.6, length: None }] },
    Region { name: "Zambia", year: "2019", cuts: &[Kind { per_year: 159.6, length: None }] },
    Region { name: "Zimbabwe", year: "2016", cuts: &[Kind { per_year: 54.0, length: None }] },
];

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn every_region_has_one_row_in_order_and_sane_figures() {
        assert!(REGIONS.windows(2).all(|pair| pair[0].name < pair[1].name));
        for region in REGIONS {
            for kind in region.cuts {
                assert!((0.1..1000.0).contains(&kind.per_year), "{}", region.name);
                assert!(kind.length.is_none_or(|(mean, spread)| mean.0 > 0.0 && spread > 0.0), "{}", region.name);
            }
        }
        assert_eq!(region("Kenya").map(|kenya| kenya.cuts[0].per_year), Some(45.6));
        assert_eq!(region("Atlantis"), None);
    }
}

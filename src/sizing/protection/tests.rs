use proptest::prelude::*;

use super::*;

const AT_50_HZ: Hertz = Hertz(50.0);

fn device(kind: Kind, rating: f64) -> Device {
    Device { kind, name: "device", rating: Some(Amps(rating)), breaks: Kiloamps(6.0) }
}

#[test]
fn a_gg_fuse_protects_only_what_its_conventional_current_allows() {
    let cases = [
        // rating, capacity, protects; our own vector, then the shares 0.9, 0.75, 0.69 read in one reproduction
        (50.0, 58.4, true),
        (63.0, 58.4, false),
        (16.0, 17.7, false),
        (16.0, 17.8, true),
        (10.0, 13.3, false),
        (10.0, 13.4, true),
        (4.0, 5.7, false),
        (4.0, 5.8, true),
    ];
    for (rating, capacity, protects) in cases {
        assert_eq!(device(Kind::GgFuse, rating).protects(Amps(capacity)), protects, "{rating} A on {capacity} A");
    }
}

#[test]
fn a_breaker_protects_a_cable_of_its_own_rating() {
    for kind in [Kind::MiniatureBreaker, Kind::BatteryFuse] {
        assert!(device(kind, 20.0).protects(Amps(20.0)));
        assert!(!device(kind, 20.0).protects(Amps(19.9)));
    }
}

#[test]
fn the_nec_allows_the_next_size_up_to_800_amperes() {
    let cases = [
        // rating, capacity, protects: NEC 240.4(B) as quoted
        (60.0, 55.0, true),
        (60.0, 50.0, false),
        (70.0, 55.0, false),
        (60.0, 60.0, true),
        (800.0, 720.0, true),
        (1000.0, 900.0, false),
    ];
    for (rating, capacity, protects) in cases {
        assert_eq!(device(Kind::NecDevice, rating).protects(Amps(capacity)), protects, "{rating} A on {capacity} A");
    }
}

#[test]
fn the_plainest_battery_fuse_that_breaks_the_fault_is_taken() {
    let cases = [
        // carried A, volts, fault kA, rating A, word in its name, breaks kA
        (45.0, 14.4, 1.5, 50.0, "SF30", 2.0),
        (260.0, 28.8, 2.0, 300.0, "SF51", 2.0),
        (90.0, 13.8, 8.0, 90.0, "terminal fuse", 10.0),
        (90.0, 14.8, 6.0, 100.0, "ANL", 6.0),
        (120.0, 57.6, 4.0, 125.0, "class T", 20.0),
        (60.0, 57.6, 22.0, 63.0, "NH", 25.0),
    ];
    for (carried, volts, fault, rating, word, breaks) in cases {
        let fuse = for_battery(Amps(carried), DcVolts(volts), Kiloamps(fault));
        assert_eq!((fuse.rating, fuse.breaks.0), (Some(Amps(rating)), breaks), "{carried} A, {fault} kA: {fuse:?}");
        assert!(fuse.name.contains(word), "{fuse:?}");
    }
}

#[test]
fn a_fault_above_every_fuse_gets_the_one_that_breaks_most() {
    let fuse = for_battery(Amps(200.0), DcVolts(28.8), Kiloamps(60.0));
    assert_eq!((fuse.rating, fuse.breaks), (Some(Amps(200.0)), Kiloamps(25.0)));
}

#[test]
fn a_current_above_every_fuse_has_no_rating() {
    assert_eq!(for_battery(Amps(700.0), DcVolts(14.4), Kiloamps(2.0)).rating, None);
    assert_eq!(for_battery(Amps(50.0), DcVolts(400.0), Kiloamps(2.0)).rating, None);
    assert!(!for_battery(Amps(700.0), DcVolts(14.4), Kiloamps(2.0)).protects(Amps(9999.0)));
}

#[test]
fn the_supply_gets_a_breaker_until_current_or_fault_ask_for_a_fuse() {
    let cases = [
        // code, carried A, fault kA, kind, rating A, breaks kA
        (Code::Iec, 8.7, 6.0, Kind::MiniatureBreaker, 10.0, 6.0),
        (Code::Iec, 21.0, 9.0, Kind::MiniatureBreaker, 25.0, 10.0),
        (Code::Iec, 130.0, 6.0, Kind::GgFuse, 160.0, 50.0),
        (Code::Iec, 20.0, 30.0, Kind::GgFuse, 20.0, 50.0),
        (Code::Nec, 12.0, 6.0, Kind::NecDevice, 15.0, 10.0),
        (Code::Nec, 51.0, 18.0, Kind::NecDevice, 60.0, 22.0),
    ];
    for (code, carried, fault, kind, rating, breaks) in cases {
        let device = for_supply(code, Amps(carried), Kiloamps(fault));
        let got = (device.kind, device.rating, device.breaks);
        assert_eq!(got, (kind, Some(Amps(rating)), Kiloamps(breaks)), "{code:?} {carried} A {fault} kA");
    }
}

#[test]
fn a_battery_fuse_lets_through_the_fault_for_its_clearing_time() {
    let energy = device(Kind::BatteryFuse, 200.0).lets_through(Kiloamps(8.0), Seconds(0.05), AT_50_HZ);
    assert_eq!(energy, 8000.0 * 8000.0 * 0.05);
}

#[test]
fn a_breaker_lets_through_its_class_half_a_cycle_or_the_clearing_time() {
    let cases = [
        // rating A, fault kA, A²s: EN 60898-1 energy class 3 (from memory), half of 20 ms, 0.1 s below ten times the rating
        (16.0, 6.0, 42_000.0),
        (32.0, 6.0, 55_000.0),
        (16.0, 9.0, 84_000.0),
        (63.0, 6.0, 360_000.0),
        (16.0, 1.0, 10_000.0),
        (63.0, 0.5, 25_000.0),
    ];
    for (rating, fault, expected) in cases {
        let energy = device(Kind::MiniatureBreaker, rating).lets_through(Kiloamps(fault), Seconds(0.1), AT_50_HZ);
        assert!((energy - expected).abs() < 1e-6, "{rating} A, {fault} kA: {energy}");
    }
}

proptest! {
    #[test]
    fn what_a_device_protects_it_protects_by_both_conditions(carried in 0.1..600.0_f64, fault in 0.5..50.0_f64, capacity in 0.1..900.0_f64) {
        let device = for_supply(Code::Iec, Amps(carried), Kiloamps(fault));
        let Some(rating) = device.rating else { return Ok(()) };
        prop_assert!(rating.0 >= carried);
        if device.protects(Amps(capacity)) {
            prop_assert!(rating.0 <= capacity);
            let opens = device.opens_surely_at().expect("both kinds have a conventional current");
            prop_assert!(opens.0 <= 1.45 * capacity, "{device:?} on {capacity} A");
        }
    }

    #[test]
    fn more_current_never_gets_a_smaller_device(low in 0.1..500.0_f64, more in 0.0..200.0_f64, volts in 12.0..60.0_f64, fault in 0.1..40.0_f64) {
        let rating = |carried: f64| {
            [for_battery(Amps(carried), DcVolts(volts), Kiloamps(fault)), for_supply(Code::Iec, Amps(carried), Kiloamps(fault)), for_supply(Code::Nec, Amps(carried), Kiloamps(fault))]
                .map(|device| device.rating.map_or(f64::INFINITY, |rating| rating.0))
        };
        for (small, large) in rating(low).into_iter().zip(rating(low + more)) {
            prop_assert!(small <= large);
        }
    }
}

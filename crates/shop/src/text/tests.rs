use super::*;
use proptest::prelude::*;

fn mm(text: &str) -> f64 {
    parse_length(text, Units::Mm).unwrap_or_else(|e| panic!("{text}: {e}"))
}

fn refused(text: &str) -> ParseError {
    parse_length(text, Units::Mm).unwrap_err()
}

fn near(a: f64, b: f64) -> bool {
    (a - b).abs() <= 1e-9 * b.abs().max(1.0)
}

#[test]
fn lengths_in_every_unit() {
    // An inch is 25.4 mm by definition; the rest is arithmetic (derived).
    for (text, expected) in [
        ("300", 300.0),
        ("300mm", 300.0),
        (" 300 mm ", 300.0),
        ("30cm", 300.0),
        ("0.3m", 300.0),
        (".3m", 300.0),
        ("-5", -5.0),
        ("11 3/4in", 298.45),
        ("11 3/4\"", 298.45),
        ("11.75 inches", 298.45),
        ("3' 11 1/4\"", 1200.15),
        ("3ft11in", 1193.8),
        ("3' 11", 1193.8),
        ("-3' 11\"", -1193.8),
        ("1/2 in", 12.7),
        ("1/2", 0.5),
        ("2*300+5mm", 605.0),
        ("(1m - 20cm) / 4", 200.0),
        ("300mm/100mm*2", 6.0),
        ("300/2mm", 150.0),
        ("2 * 1 1/2in", 76.2),
        ("10-1/2", 9.5),
        ("11in - 3/4in", 260.35),
        ("1e3mm", 1000.0),
        ("5 \u{2212} 2", 3.0),
        ("--5", 5.0),
        ("12/3/2", 2.0),
    ] {
        assert!(near(mm(text), expected), "{text}: {} instead of {expected}", mm(text));
    }
    assert!(near(parse_length("11 3/4", Units::Inch).unwrap(), 298.45));
    assert!(near(parse_length("2*3+5mm", Units::Inch).unwrap(), 157.4));
}

#[test]
fn angles_in_both_units() {
    assert_eq!(parse_angle("38").unwrap().degrees().to_bits(), 38_f64.to_bits());
    assert_eq!(parse_angle("38deg").unwrap().degrees().to_bits(), 38_f64.to_bits());
    assert_eq!(parse_angle("38\u{b0}").unwrap().degrees().to_bits(), 38_f64.to_bits());
    assert!(near(parse_angle("0.66rad").unwrap().radians(), 0.66));
    assert!(near(parse_angle("360/7").unwrap().degrees(), 360.0 / 7.0));
    assert!(parse_angle("38mm").is_err());
}

#[test]
fn refusals_say_what_and_where() {
    for (text, at) in [
        ("", 0),
        ("3,5", 1),
        ("3 , 5", 2),
        ("300 furlongs", 4),
        ("2m*3m", 2),
        ("2/3m/(1m)/1mm", 9),
        ("5/0", 0),
        ("5mm/0", 3),
        ("1e999", 0),
        ("1e200*1e200", 5),
        ("(5", 0),
        ("5)", 1),
        ("5 5", 2),
        ("3'-11\"", 2),
        ("11-3/4\"", 0),
        ("5'3m", 2),
        (".", 0),
        ("5+", 2),
        ("\u{1f980}", 0),
    ] {
        match parse_length(text, Units::Mm) {
            Ok(value) => panic!("{text} was read as {value}"),
            Err(e) => assert_eq!(e.at, at, "{text}: {e}"),
        }
    }
    assert_eq!(
        refused("3,5").to_string(),
        "A comma at column 2. Write the decimal sign as a point, for instance 3.5."
    );
    assert!(parse_length(&"(".repeat(900), Units::Mm).is_err());
    assert!(parse_length(&"-".repeat(900), Units::Mm).is_err());
    assert!(parse_length(&"1+".repeat(4000), Units::Mm).is_err());
}

#[test]
fn numbers_for_reading() {
    assert_eq!(fixed(-0.0004, 3), "0.000");
    assert_eq!(trimmed(-0.0004, 3), "0");
    assert_eq!(trimmed(300.0, 3), "300");
    assert_eq!(trimmed(1200.150, 3), "1200.15");
    assert_eq!(trimmed(1e21, 3), "1000000000000000000000");
    assert_eq!(trimmed(100.0, 0), "100");
    assert_eq!(exact(-0.0), "0");
    assert_eq!(exact(1e-7), "0.0000001");
    assert_eq!(count(0), "0");
    assert_eq!(count(10_203), "10203");
    assert_eq!(millimetres(565.685_42, 1), "565.7 mm");
    assert_eq!(degrees(-7.3453, 2), "-7.35\u{b0}");
    assert_eq!(square_metres(5_457_909.131), "5.458 m\u{b2}");
    assert_eq!(cubic_metres(1_148_574_542.5), "1.149 m\u{b3}");
    // A 2440 x 1220 sheet, 18 mm at 685 kg/m3: a published data sheet.
    assert_eq!(kilograms(2.44 * 1.22 * 0.018 * 685.0), "36.7 kg");
    assert_eq!(metres(1200.15), "1.200 m");
}

#[test]
fn inches_for_reading() {
    let s = |v: f64| inches(v * MM_PER_INCH, Fraction::Sixteenth);
    assert_eq!(s(11.75), "11 3/4\"");
    assert_eq!(s(0.5), "1/2\"");
    assert_eq!(s(-0.5), "-1/2\"");
    assert_eq!(s(12.0), "12\"");
    assert_eq!(s(-0.01), "0\"");
    // 31.5 / 32 is half way between 31/32 and 1: it goes away from zero.
    assert_eq!(inches(31.5 / 32.0 * MM_PER_INCH, Fraction::ThirtySecond), "1\"");
    assert_eq!(inches(31.0 / 32.0 * MM_PER_INCH, Fraction::ThirtySecond), "31/32\"");
    assert_eq!(Units::Inch.length(298.45), "11 3/4\"");
    assert_eq!(
        Units::Mm.length(298.45),
        "298.4 mm".replace("298.4", &trimmed(298.45, 1))
    );
}

proptest! {
    #[test]
    fn parsing_never_panics(text in ".{0,60}") {
        let _ = parse_length(&text, Units::Mm);
        let _ = parse_angle(&text);
    }

    #[test]
    fn parsing_near_sense_never_panics(text in r#"[-+*/(). 0-9eEminfta'",°]{0,60}"#) {
        match parse_length(&text, Units::Inch) {
            Ok(value) => prop_assert!(value.is_finite()),
            Err(e) => prop_assert!(e.at <= text.len() && text.is_char_boundary(e.at)),
        }
    }

    #[test]
    fn exact_numbers_come_back(bits in any::<u64>()) {
        let value = f64::from_bits(bits);
        prop_assume!(value.is_finite());
        let text = exact(value);
        prop_assert!(!text.contains(['e', 'E', ',']));
        prop_assert_eq!(text.parse::<f64>().unwrap(), value);
    }

    #[test]
    fn lengths_come_back_within_their_rounding(value in -1e6..1e6_f64) {
        prop_assert!((mm(&millimetres(value, 3)) - value).abs() <= 0.000_500_1);
        prop_assert!((mm(&inches(value, Fraction::ThirtySecond)) - value).abs() <= 25.4 / 64.0 + 1e-6);
        prop_assert!((mm(&metres(value)) - value).abs() <= 0.500_001);
        for units in [Units::Mm, Units::Inch] {
            let back = parse_length(&units.field(value), units).unwrap();
            prop_assert!((back - value).abs() <= 0.00128);
        }
    }

    #[test]
    fn angles_come_back_within_their_rounding(value in -720.0..720.0_f64) {
        let back = parse_angle(&degrees(value, 4)).unwrap().degrees();
        prop_assert!((back - value).abs() <= 0.000_050_1);
    }

    #[test]
    fn sums_are_right(a in -1000..1000_i32, b in 1..1000_i32, c in 1..99_i32) {
        let (fa, fb, fc) = (f64::from(a), f64::from(b), f64::from(c));
        let text = format!("({a}+{b}mm)*{c} - {b}cm/{c}");
        prop_assert!(near(mm(&text), (fa + fb) * fc - fb * 10.0 / fc));
    }
}

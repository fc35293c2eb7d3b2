//! Every way to refuse a text, with the words a person gets to read.

use helmsplit_model::Quantity::*;

use super::super::parse;

#[test]
#[allow(clippy::too_many_lines, reason = "a table")]
fn refusals_say_what_is_wrong_and_what_would_do() {
    for (text, wanted, message, hint) in [
        (
            "3.7",
            Length,
            "a length needs a unit, such as m, mm, um, cm or in",
            "write \"3.7 mm\" if that is meant",
        ),
        (
            "20 bar",
            Length,
            "bar is a pressure, but a length is wanted",
            "write a length such as \"20 mm\"",
        ),
        (
            "20 mm",
            Area,
            "mm is a length, but an area is wanted",
            "write an area such as \"12 mm2\"",
        ),
        (
            "16 cm3",
            Displacement,
            "cm3 is a volume, but a displacement is wanted",
            "write a displacement such as \"16 cm3/rev\"",
        ),
        (
            "3.7 mn",
            Length,
            "mn is not a unit of length",
            "did you mean mm?",
        ),
        (
            "3 psj",
            Pressure,
            "psj is not a unit of pressure",
            "did you mean psi?",
        ),
        (
            "3 furlongs",
            Length,
            "furlongs is not a unit of length",
            "units of length: m, mm, um, cm or in",
        ),
        (
            "175 mpa",
            Pressure,
            "mpa is not a unit of pressure",
            "did you mean MPa?",
        ),
        (
            "mm",
            Length,
            "a length must begin with a number",
            "write a length such as \"20 mm\"",
        ),
        (
            "about 3 mm",
            Length,
            "a length must begin with a number",
            "write a length such as \"20 mm\"",
        ),
        (
            "",
            Length,
            "length is missing",
            "write a length such as \"20 mm\"",
        ),
        (
            " \t",
            Flow,
            "flow is missing",
            "write a flow such as \"15 L/min\"",
        ),
        (
            "inf bar",
            Pressure,
            "a pressure must be a finite number",
            "write a pressure such as \"175 bar\"",
        ),
        (
            "-Infinity",
            Ratio,
            "a ratio must be a finite number",
            "write a ratio such as \"90 %\"",
        ),
        (
            "NaN mm",
            Length,
            "a length must be a finite number",
            "write a length such as \"20 mm\"",
        ),
        (
            "3,7 mm",
            Length,
            "a comma stands in the number",
            "use a point for decimals and nothing between thousands: 3.7 mm",
        ),
        (
            ",7 mm",
            Length,
            "a comma stands in the number",
            "use a point for decimals and nothing between thousands: 0.7 mm",
        ),
        (
            "1 000 mm",
            Length,
            "the number has a gap",
            "write the number in one piece: 1000 mm",
        ),
        (
            "1_000 mm",
            Length,
            "the number has a gap",
            "write the number in one piece: 1000 mm",
        ),
        (
            "3/8 in",
            Length,
            "a fraction is not read as a number",
            "write it as a decimal number, such as \"20 mm\"",
        ),
        (
            "1e400 m",
            Length,
            "the number is too large for a length",
            "write a length such as \"20 mm\"",
        ),
        (
            "1e999999999 m",
            Length,
            "the number is too large for a length",
            "write a length such as \"20 mm\"",
        ),
        (
            "1e306 kN",
            Force,
            "the number is too large for a force",
            "write a force such as \"120 N\"",
        ),
        (
            "1e-400 m",
            Length,
            "the number is too near zero for a length",
            "write a length such as \"20 mm\"",
        ),
        (
            "1e-999999999 degC",
            Temperature,
            "the number is too near zero for a temperature",
            "write a temperature such as \"50 degC\"",
        ),
        (
            "1e-999999 degC",
            Temperature,
            "the number is too near zero for a temperature",
            "write a temperature such as \"50 degC\"",
        ),
        (
            "2.5",
            Count,
            "a count is a whole number",
            "leave out the part behind the point",
        ),
        (
            "-300 degC",
            Temperature,
            "the temperature lies below absolute zero",
            "absolute zero is -273.15 degC, -459.67 degF or 0 K",
        ),
        (
            "5 %",
            Count,
            "% is a ratio, but a count is wanted",
            "write a count such as \"13\"",
        ),
    ] {
        let error = parse(text, wanted).expect_err(text);
        assert_eq!(error.to_string(), message, "message for {text:?}");
        assert_eq!(error.hint(), hint, "hint for {text:?}");
    }
    let long = format!("1{} mm", "0".repeat(200));
    let error = parse(&long, Length).expect_err("too long");
    assert_eq!(
        error.to_string(),
        "the text is too long for a length",
        "a long text"
    );
}

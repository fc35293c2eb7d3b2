//! Oil by its grade: ISO 3448 and the viscosity index of ASTM D2270.

/// Grades of ISO 3448 and their mid-point viscosity at 40 degC, mm2/s. Those below 22 and above
/// 1500 are values from memory.
const GRADES: [(u32, f64); 20] = [
    (2, 2.2),
    (3, 3.2),
    (5, 4.6),
    (7, 6.8),
    (10, 10.0),
    (15, 15.0),
    (22, 22.0),
    (32, 32.0),
    (46, 46.0),
    (68, 68.0),
    (100, 100.0),
    (150, 150.0),
    (220, 220.0),
    (320, 320.0),
    (460, 460.0),
    (680, 680.0),
    (1000, 1000.0),
    (1500, 1500.0),
    (2200, 2200.0),
    (3200, 3200.0),
];

/// Viscosity at 100 degC from which on the viscosity index is defined, mm2/s.
const LEAST_AT_100: f64 = 2.0;

/// Far above the viscosity at 100 degC of any grade, mm2/s.
const GREATEST_AT_100: f64 = 1000.0;

/// One row of the quadratic equations for L and H: up to this `Y`, then a to f.
type Row = (f64, [f64; 3], [f64; 3]);

/// Coefficients of `L = a Y^2 + b Y + c` and `H = d Y^2 + e Y + f` of ASTM D2270, appendix X2
/// (values from memory). They reproduce all of the standard's table 1 to 0.12 %; a test holds some
/// of it.
const QUADRATICS: [Row; 16] = [
    (3.8, [1.14673, 1.7576, -0.109], [0.84155, 1.5521, -0.077]),
    (4.4, [3.38095, -15.4952, 33.196], [0.78571, 1.7929, -0.183]),
    (5.0, [2.5, -7.2143, 13.812], [0.82143, 1.5679, 0.119]),
    (6.4, [0.101, 16.635, -45.469], [0.04985, 9.1613, -18.557]),
    (7.0, [3.35714, -23.5643, 78.466], [0.22619, 7.7369, -16.656]),
    (7.7, [0.01191, 21.475, -72.870], [0.79762, -0.7321, 14.610]),
    (
        9.0,
        [0.41858, 16.1558, -56.040],
        [0.05794, 10.5156, -28.240],
    ),
    (12.0, [0.88779, 7.5527, -16.600], [0.26665, 6.7015, -10.810]),
    (15.0, [0.7672, 10.7972, -38.180], [0.20073, 8.4658, -22.490]),
    (18.0, [0.97305, 5.3135, -2.200], [0.28889, 5.9741, -4.930]),
    (22.0, [0.97256, 5.25, -0.980], [0.24504, 7.416, -16.730]),
    (28.0, [0.91413, 7.4759, -21.820], [0.20323, 9.1267, -34.230]),
    (
        40.0,
        [0.87031, 9.7157, -50.770],
        [0.18411, 10.1015, -46.750],
    ),
    (
        55.0,
        [0.84703, 12.6752, -133.310],
        [0.17029, 11.4866, -80.620],
    ),
    (70.0, [0.85921, 11.1009, -83.190], [0.1713, 11.368, -76.940]),
    (
        f64::INFINITY,
        [0.83531, 14.6731, -216.246],
        [0.16841, 11.8493, -96.947],
    ),
];

/// The grades of ISO 3448.
pub(crate) fn grades() -> impl Iterator<Item = u32> {
    GRADES.iter().map(|(grade, _)| *grade)
}

/// Mid-point viscosity at 40 degC of a grade, m2/s; `None` for a number that is no grade.
///
/// # Source
/// ISO 3448: the small grades' mid-points are not round numbers.
#[must_use]
pub fn viscosity_of_grade(grade: f64) -> Option<f64> {
    let row = GRADES
        .iter()
        .find(|(number, _)| (f64::from(*number) - grade).abs() < 0.5);
    row.map(|(_, viscosity)| viscosity * 1e-6)
}

/// Viscosity index from the viscosities at 40 and 100 degC, m2/s; `None` below 2 mm2/s at
/// 100 degC, where it is not defined.
///
/// # Source
/// ASTM D2270: procedure A up to 100, procedure B above; L and H by the quadratic equations of
/// its appendix X2.
#[must_use]
pub fn viscosity_index(at_40: f64, at_100: f64) -> Option<f64> {
    let (u, y) = (at_40 * 1e6, at_100 * 1e6);
    if y < LEAST_AT_100 {
        return None;
    }
    let (l, h) = references(y);
    if u >= h {
        Some((l - u) / (l - h) * 100.0)
    } else {
        let n = (h / u).log10() / y.log10();
        Some((10f64.powf(n) - 1.0) / 0.00715 + 100.0)
    }
}

/// Viscosity at 100 degC, m2/s, of an oil with that viscosity at 40 degC (m2/s) and viscosity
/// index; `None` where it would fall below 2 mm2/s and the index is not defined.
///
/// # Source
/// ASTM D2270, solved for the viscosity at 100 degC by bisection.
#[must_use]
pub fn viscosity_at_100(at_40: f64, index: f64) -> Option<f64> {
    let below = |y: f64| viscosity_index(at_40, y * 1e-6).is_some_and(|v| v < index);
    let (mut low, mut high) = (LEAST_AT_100, GREATEST_AT_100.min(at_40 * 1e6));
    // No oil is thicker at 100 degC than at 40 degC, and a thin one has no index.
    if high <= low || !below(low) || below(high) {
        return None;
    }
    // Halving the logarithm: 60 times leaves less than rounding.
    for _ in 0..60 {
        let middle = (low * high).sqrt();
        if below(middle) {
            low = middle;
        } else {
            high = middle;
        }
    }
    Some((low * high).sqrt() * 1e-6)
}

/// Viscosities at 40 degC of the two reference oils with viscosity `y` at 100 degC, mm2/s: L with
/// index 0 and H with index 100.
fn references(y: f64) -> (f64, f64) {
    let row = QUADRATICS.iter().find(|(up_to, _, _)| y <= *up_to);
    let (_, l, h) = row.unwrap_or(&QUADRATICS[QUADRATICS.len() - 1]);
    let at = |c: &[f64; 3]| (c[0] * y + c[1]) * y + c[2];
    (at(l), at(h))
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Worked examples of ASTM D2270: 73.30 and 8.86 mm2/s give 92; 22.83 and 5.05 give 156.
    #[test]
    fn examples_of_the_standard() {
        for (at_40, at_100, expected) in [(73.30, 8.86, 92.0), (22.83, 5.05, 156.0)] {
            let index = viscosity_index(at_40 * 1e-6, at_100 * 1e-6).unwrap();
            assert!(
                (index - expected).abs() < 0.75,
                "{at_40} and {at_100}: {index}"
            );
        }
    }

    /// Table 1 of ASTM D2270: L and H at some viscosities at 100 degC; the quadratics reproduce
    /// it to 0.12 %.
    #[test]
    fn reference_oils_of_the_standard() {
        let table = [
            (2.0, 7.994, 6.394),
            (3.0, 15.49, 12.15),
            (4.0, 25.32, 19.56),
            (5.0, 40.23, 28.49),
            (6.0, 57.97, 38.19),
            (7.0, 78.0, 48.57),
            (8.0, 100.0, 59.60),
            (10.0, 147.7, 82.87),
            (12.0, 201.9, 108.0),
        ];
        for (y, l, h) in table {
            let (got_l, got_h) = references(y);
            assert!((got_l / l - 1.0).abs() < 1.2e-3, "L at {y}: {got_l}");
            assert!((got_h / h - 1.0).abs() < 1.2e-3, "H at {y}: {got_h}");
        }
    }

    #[test]
    fn solving_for_the_hot_viscosity_gives_the_index_back() {
        for grade in [10.0, 22.0, 32.0, 46.0, 68.0, 150.0, 680.0, 3200.0] {
            let at_40 = viscosity_of_grade(grade).unwrap();
            for index in [60.0, 95.0, 100.0, 140.0, 200.0] {
                let at_100 = viscosity_at_100(at_40, index).unwrap();
                let back = viscosity_index(at_40, at_100).unwrap();
                // Where two quadratics meet, L and H jump by up to 0.1 %.
                assert!((back - index).abs() < 1.0, "VG {grade}, VI {index}: {back}");
            }
        }
    }

    #[test]
    fn thin_oils_have_no_index() {
        let vg2 = viscosity_of_grade(2.0).unwrap();
        assert_eq!(
            viscosity_at_100(vg2, 100.0),
            None,
            "VG 2 is below 2 mm2/s when hot"
        );
        assert_eq!(viscosity_of_grade(40.0), None, "40 is no grade");
    }
}

//! Oil at its temperature (M1).

use helmsplit_model::{ICE_POINT, LEAST_AIR, Oil, WaltherLine, density_at};

use crate::choice::OilViscosity;
use crate::finding::Finding;
use crate::parameter::oil;
use crate::scenario::Scenario;
use crate::viscosity_grade::{grades, viscosity_at_100, viscosity_of_grade};

impl Scenario {
    /// The oil at its temperature.
    ///
    /// # Errors
    /// A finding when grade and viscosity index give no oil.
    pub fn oil(&self) -> Result<Oil, Finding> {
        let temperature = self.si(oil::TEMPERATURE);
        let line = self.viscosity_line()?;
        Ok(Oil {
            density: density_at(self.si(oil::DENSITY_AT_15C), temperature),
            kinematic_viscosity: line.viscosity(temperature),
            air: self.si(oil::ENTRAINED_AIR).max(LEAST_AIR),
            polytropic_exponent: self.si(oil::POLYTROPIC_EXPONENT),
            liquid_bulk_modulus: self.si(oil::LIQUID_BULK_MODULUS),
        })
    }

    /// The line of viscosity over temperature (M1.1).
    ///
    /// # Errors
    /// A finding when grade and viscosity index give no oil, or the hot viscosity is not below
    /// the cold one.
    pub fn viscosity_line(&self) -> Result<WaltherLine, Finding> {
        let (at_40, at_100) = match self.chosen::<OilViscosity>() {
            OilViscosity::TwoPoints => {
                let points = (
                    self.si(oil::VISCOSITY_AT_40C),
                    self.si(oil::VISCOSITY_AT_100C),
                );
                if points.1 >= points.0 {
                    return Err(self.finding_at(
                        oil::VISCOSITY_AT_100C,
                        "an oil is thinner at 100 degC than at 40 degC",
                        &format!(
                            "give less than {}",
                            self.value(oil::VISCOSITY_AT_40C).text()
                        ),
                    ));
                }
                points
            }
            OilViscosity::IsoGrade => self.points_of_grade()?,
        };
        Ok(WaltherLine::through(
            (at_40, 40.0 + ICE_POINT),
            (at_100, 100.0 + ICE_POINT),
        ))
    }

    fn points_of_grade(&self) -> Result<(f64, f64), Finding> {
        let Some(at_40) = viscosity_of_grade(self.si(oil::ISO_GRADE_NUMBER)) else {
            let known: Vec<_> = grades().map(|grade| grade.to_string()).collect();
            return Err(self.finding_at(
                oil::ISO_GRADE_NUMBER,
                "ISO 3448 has no such grade",
                &format!("grades: {}", known.join(", ")),
            ));
        };
        let Some(at_100) = viscosity_at_100(at_40, self.si(oil::VISCOSITY_INDEX)) else {
            return Err(self.finding_at(
                oil::VISCOSITY_INDEX,
                "with this grade the oil would fall below 2 mm2/s at 100 degC, where ASTM D2270 \
                 defines no viscosity index",
                "give two points of viscosity instead",
            ));
        };
        Ok((at_40, at_100))
    }
}

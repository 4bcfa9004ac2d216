//! How much liquid nitrogen or dry ice a part takes, and how much gas that sets free.

use super::boiling::NITROGEN;
use super::conduction::Substance;
use super::error::{AssemblyError, not_negative, positive, require};
use super::property::Property;
use super::thermal::DRY_ICE_TEMPERATURE;

/// A coolant that boils or sublimes at atmospheric pressure.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Coolant {
    /// Temperature at which it boils or sublimes, K.
    pub temperature: f64,
    /// Heat of vaporisation or sublimation, J/kg.
    pub latent_heat: f64,
    /// Density of the liquid or solid, kg/m³.
    pub density: f64,
    /// Mean specific heat of the gas up to room temperature, J/(kg·K).
    pub gas_specific_heat: f64,
    /// Density of the gas at 20 °C and 1 atm, kg/m³.
    pub gas_density: f64,
    /// Where the numbers come from.
    pub source: &'static str,
}

/// Liquid nitrogen.
pub const LIQUID_NITROGEN: Coolant = Coolant {
    temperature: NITROGEN.boiling_temperature,
    latent_heat: NITROGEN.latent_heat,
    density: NITROGEN.liquid_density,
    gas_specific_heat: 1040.0,
    gas_density: 1.165,
    source: "NIST: boiling point 77.36 K, 199.2 kJ/kg; densities and specific heat of the gas from memory of \
             NIST REFPROP tables",
};

/// Dry ice: solid carbon dioxide in pieces; the density is that of the solid block.
pub const DRY_ICE: Coolant = Coolant {
    temperature: DRY_ICE_TEMPERATURE,
    latent_heat: 571e3,
    density: 1600.0,
    gas_specific_heat: 790.0,
    gas_density: 1.84,
    source: "heat of sublimation 571 kJ/kg and 0.54 m³ of gas per kg, dry-ice makers' tables; specific heat of \
             the gas from memory",
};

/// Practical amounts are this many times the amount by latent heat: cooling the vessel, splashing, idle boil-off in
/// an open box (common practice, from memory).
pub const PRACTICAL_FACTOR: (f64, f64) = (1.2, 2.0);

/// Amount of coolant.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Amount {
    /// Mass, kg.
    pub mass: f64,
    /// Volume of the liquid or solid, m³.
    pub volume: f64,
    /// Volume of the gas at 20 °C and 1 atm, m³.
    pub gas_volume: f64,
}

impl Coolant {
    /// A mass (kg, not negative) of this coolant with its volumes.
    pub fn amount(&self, mass: f64) -> Amount {
        Amount { mass, volume: mass / self.density, gas_volume: mass / self.gas_density }
    }

    /// Coolant that cools a part from `from` (K) to the coolant's temperature by its latent heat alone.
    ///
    /// m = M ∫ c dT / L, with M the mass of the part, c its specific heat and L the latent heat: all cold gas is
    /// lost, as in an open tank. It is the figure to plan with, times [`PRACTICAL_FACTOR`].
    ///
    /// Source: heat balance; the same figures are tabulated as kilograms of nitrogen per kilogram of metal in the
    /// cryogenic literature (0.83 for aluminium, 0.43 for stainless steel, 0.37 for copper from 300 K).
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] when the part is not warmer than the coolant; [`AssemblyError::Table`] when
    /// the specific heat does not reach down to it.
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::cryogen::LIQUID_NITROGEN;
    /// use hubgrip::assembly::property::Property;
    /// let steel = Property::constant(400.0).unwrap();
    /// let amount = LIQUID_NITROGEN.latent_only(10.0, &steel, 293.15).unwrap();
    /// assert!((amount.mass - 4.333_132_53).abs() < 1e-8);
    /// assert!((amount.gas_volume - 3.719_427_06).abs() < 1e-8);
    /// ```
    pub fn latent_only(
        &self,
        mass: f64,
        specific_heat: &Property,
        from: f64,
    ) -> Result<Amount, AssemblyError> {
        self.check(mass, from)?;
        let heat = mass * specific_heat.integral(self.temperature, from)?;
        Ok(self.amount(heat / self.latent_heat))
    }

    /// Coolant when the cold gas leaves at the temperature of the part: the least that can be.
    ///
    /// m = M ∫ c(T) / (L + c_gas (T − T_b)) dT from T_b to the start, summed by Simpson's rule.
    ///
    /// # Errors
    /// As [`Coolant::latent_only`].
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::cryogen::LIQUID_NITROGEN;
    /// use hubgrip::assembly::property::Property;
    /// let steel = Property::constant(400.0).unwrap();
    /// let least = LIQUID_NITROGEN.with_cold_gas(10.0, &steel, 293.15).unwrap();
    /// assert!(least.mass < LIQUID_NITROGEN.latent_only(10.0, &steel, 293.15).unwrap().mass);
    /// ```
    pub fn with_cold_gas(
        &self,
        mass: f64,
        specific_heat: &Property,
        from: f64,
    ) -> Result<Amount, AssemblyError> {
        self.check(mass, from)?;
        specific_heat.covers(self.temperature, from)?;
        const INTERVALS: usize = 400;
        let width = (from - self.temperature) / INTERVALS as f64;
        let share = |temperature: f64| {
            specific_heat.value_held(temperature)
                / (self.latent_heat + self.gas_specific_heat * (temperature - self.temperature))
        };
        let sum: f64 = (0..INTERVALS)
            .map(|i| self.temperature + i as f64 * width)
            .map(|low| share(low) + 4.0 * share(low + 0.5 * width) + share(low + width))
            .sum();
        Ok(self.amount(mass * sum * width / 6.0))
    }

    /// Coolant for a whole job in an open vessel.
    ///
    /// It has to cover the part when the part is cold, to cool part and vessel, and to make up what the vessel boils
    /// off meanwhile. What covers the part stays over and can be used again.
    ///
    /// # Errors
    /// [`AssemblyError::OutsideRange`] for negative numbers or a part larger than the space it lies in; as
    /// [`Coolant::latent_only`].
    pub fn job(&self, job: &ColdJob) -> Result<JobAmounts, AssemblyError> {
        positive("space to fill (m³)", job.space)?;
        require(
            job.part_volume > 0.0 && job.part_volume < job.space,
            "volume of the part (m³)",
            job.part_volume,
            "greater than zero and less than the space it lies in",
        )?;
        not_negative("idle boil-off (kg/s)", job.idle_rate)?;
        not_negative("time in the bath (s)", job.time)?;
        let part_mass = job.part_volume * job.substance.density;
        let part = self.latent_only(part_mass, &job.substance.specific_heat, job.from)?;
        let vessel = match &job.vessel {
            Some((mass, specific_heat)) => self.latent_only(*mass, specific_heat, job.from)?.mass,
            None => 0.0,
        };
        let cover = (job.space - job.part_volume) * self.density;
        let idle = job.idle_rate * job.time;
        let boiled = part.mass + vessel + idle;
        Ok(JobAmounts {
            cover: self.amount(cover),
            part,
            vessel: self.amount(vessel),
            idle: self.amount(idle),
            boiled: self.amount(boiled),
            total: self.amount(cover + boiled),
        })
    }

    fn check(&self, mass: f64, from: f64) -> Result<(), AssemblyError> {
        not_negative("mass of the part (kg)", mass)?;
        positive("temperature of the part above the coolant (K)", from - self.temperature)?;
        Ok(())
    }
}

/// A part chilled in an open vessel.
#[derive(Debug, Clone, PartialEq)]
pub struct ColdJob {
    /// Volume of the part, m³.
    pub part_volume: f64,
    /// Its material.
    pub substance: Substance,
    /// Temperature of part and vessel at the start, K.
    pub from: f64,
    /// Volume of the vessel up to the level that covers the part, m³.
    pub space: f64,
    /// Mass (kg) and specific heat (J/(kg·K)) of the inner wall that becomes cold; none when it is cold already.
    pub vessel: Option<(f64, Property)>,
    /// Boil-off of the filled vessel at rest, kg/s.
    pub idle_rate: f64,
    /// Time in the bath, s.
    pub time: f64,
}

/// What a cold job takes.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct JobAmounts {
    /// To cover the cold part; stays over.
    pub cover: Amount,
    /// Boiled off by the part.
    pub part: Amount,
    /// Boiled off by the vessel wall.
    pub vessel: Amount,
    /// Boiled off at rest.
    pub idle: Amount,
    /// All that boils off.
    pub boiled: Amount,
    /// To bring to the job.
    pub total: Amount,
}

/// Specific heat of a metal from cold to room temperature after Debye, as a curve from `coldest` to 300 K.
///
/// c(T) = c_room · D(Θ/T) / D(Θ/293.15),  D(x) = (3/x³) ∫₀^x t⁴ eᵗ/(eᵗ − 1)² dt
///
/// | symbol | meaning | unit | valid |
/// |---|---|---|---|
/// | c_room | specific heat at 20 °C | J/(kg·K) | > 0 |
/// | Θ | Debye temperature: iron 470, aluminium 428, copper 343, nickel 450, titanium 420, magnesium 400 | K | 100 … 800 |
///
/// Within 2 % of NIST's fits for the heat of copper and aluminium between 77 K and room temperature; with the Debye temperature of
/// iron it is 6 % low for austenitic stainless steel. Without it, a constant
/// room-temperature value overstates the coolant needed by a quarter to a third.
///
/// Source: P. Debye, *Zur Theorie der spezifischen Wärmen*, Annalen der Physik 39 (1912) 789–839; Debye temperatures
/// from C. Kittel, *Introduction to Solid State Physics*, chapter 5, table 1.
///
/// # Errors
/// [`AssemblyError::OutsideRange`]; the coldest temperature must lie from 20 K to 290 K.
///
/// # Example
/// ```
/// use hubgrip::assembly::cryogen::{LIQUID_NITROGEN, debye_specific_heat};
/// let aluminium = debye_specific_heat(896.0, 428.0, 77.0).unwrap();
/// let per_kilogram = LIQUID_NITROGEN.latent_only(1.0, &aluminium, 300.0).unwrap();
/// assert!((per_kilogram.mass - 0.83).abs() < 0.03);
/// ```
pub fn debye_specific_heat(
    room: f64,
    debye_temperature: f64,
    coldest: f64,
) -> Result<Property, AssemblyError> {
    positive("specific heat at 20 °C (J/(kg·K))", room)?;
    require(
        (100.0..=800.0).contains(&debye_temperature),
        "Debye temperature (K)",
        debye_temperature,
        "between 100 and 800",
    )?;
    require((20.0..=290.0).contains(&coldest), "coldest temperature (K)", coldest, "between 20 and 290")?;
    let scale = room / debye_function(debye_temperature / crate::material::REFERENCE_TEMPERATURE);
    const POINTS: usize = 57;
    let points: Vec<(f64, f64)> = (0..POINTS)
        .map(|i| coldest + (300.0 - coldest) * i as f64 / (POINTS - 1) as f64)
        .map(|temperature| (temperature, scale * debye_function(debye_temperature / temperature)))
        .collect();
    Property::curve(&points)
}

/// D(x) of [`debye_specific_heat`], 1 for x → 0, by Simpson's rule.
fn debye_function(x: f64) -> f64 {
    const INTERVALS: usize = 200;
    let width = x / INTERVALS as f64;
    let integrand = |t: f64| {
        if t < 1e-8 {
            return t * t;
        }
        let grown = t.exp_m1();
        t.powi(4) * (grown + 1.0) / (grown * grown)
    };
    let sum: f64 = (0..INTERVALS)
        .map(|i| i as f64 * width)
        .map(|low| integrand(low) + 4.0 * integrand(low + 0.5 * width) + integrand(low + width))
        .sum();
    3.0 / x.powi(3) * sum * width / 6.0
}

#[cfg(test)]
mod tests {
    use super::*;
    use approx::assert_relative_eq;
    use proptest::prelude::*;

    /// NIST Cryogenic Materials Properties: log₁₀ c = Σ a_n (log₁₀ T)^n.
    fn nist_specific_heat(coefficients: &[f64]) -> Property {
        let points: Vec<(f64, f64)> = (70..=300)
            .step_by(2)
            .map(f64::from)
            .map(|t| (t, 10f64.powf(coefficients.iter().rev().fold(0.0, |sum, c| sum * t.log10() + c))))
            .collect();
        Property::curve(&points).unwrap()
    }

    fn aluminium() -> Property {
        nist_specific_heat(&[
            46.6467, -314.292, 866.662, -1298.3, 1162.27, -637.795, 210.351, -38.3094, 2.96344,
        ])
    }

    fn stainless() -> Property {
        nist_specific_heat(&[
            22.0061, -127.5528, 303.647, -381.0098, 274.0328, -112.9212, 24.7593, -2.239153, 0.0,
        ])
    }

    fn copper() -> Property {
        nist_specific_heat(&[-1.91844, -0.15973, 8.61013, -18.996, 21.9661, -12.7328, 3.54322, -0.3797, 0.0])
    }

    /// 10 kg, mean c 400 J/(kg·K), 293.15 K: heat balance by hand.
    #[test]
    fn nitrogen_for_ten_kilograms_of_steel() {
        let amount = LIQUID_NITROGEN.latent_only(10.0, &Property::constant(400.0).unwrap(), 293.15).unwrap();
        assert_relative_eq!(amount.mass, 4.333_132_53, max_relative = 1e-9);
        assert_relative_eq!(amount.volume, 5.372_095_87e-3, max_relative = 1e-9);
        assert_relative_eq!(amount.gas_volume, 3.719_427_06, max_relative = 2e-9);
    }

    /// Kilograms of nitrogen per kilogram of metal from 300 K, table 2 of an open-access cryogenics paper (2022):
    /// latent heat only 0.83, 0.43, 0.37, and 0.51, 0.27, 0.23 with the cold gas used. The NIST specific heats give
    /// up to 3 % and, with the gas, up to 6 % more than the table (NIST reuses one aluminium fit, stated to 5 %).
    #[test]
    fn amounts_agree_with_the_published_table() {
        for (metal, latent, used) in
            [(aluminium(), 0.83, 0.51), (stainless(), 0.43, 0.27), (copper(), 0.37, 0.23)]
        {
            let latent_only = LIQUID_NITROGEN.latent_only(1.0, &metal, 300.0).unwrap();
            assert_relative_eq!(latent_only.mass, latent, max_relative = 0.03);
            let with_gas = LIQUID_NITROGEN.with_cold_gas(1.0, &metal, 300.0).unwrap();
            assert_relative_eq!(with_gas.mass, used, max_relative = 0.06);
        }
    }

    #[test]
    fn debye_s_curve_stands_in_for_the_measured_one() {
        // The last column is what was found: within it, not to it.
        for (measured, room, theta, within) in [
            (copper(), 387.0, 343.0, 0.02),
            (aluminium(), 943.0, 428.0, 0.02),
            (stainless(), 470.0, 470.0, 0.06),
        ] {
            let curve = debye_specific_heat(room, theta, 77.0).unwrap();
            let (debye, fit) =
                (curve.integral(77.36, 293.0).unwrap(), measured.integral(77.36, 293.0).unwrap());
            assert_relative_eq!(debye, fit, max_relative = within);
        }
        // Iron from 293 K: 0.37 kg per kg, as usually stated for carbon steel.
        let iron = debye_specific_heat(450.0, 470.0, 77.0).unwrap();
        let amount = LIQUID_NITROGEN.latent_only(1.0, &iron, 293.0).unwrap();
        assert_relative_eq!(amount.mass, 0.37, max_relative = 0.03);
    }

    #[test]
    fn debye_function_has_its_known_limits() {
        // Kittel: D → 1 − x²/20 for small x and (4π⁴/5)/x³ for large x.
        assert_relative_eq!(debye_function(0.1), 1.0 - 0.01 / 20.0, max_relative = 1e-6);
        let law = 0.8 * std::f64::consts::PI.powi(4) / 30.0_f64.powi(3);
        assert_relative_eq!(debye_function(30.0), law, max_relative = 1e-4);
    }

    #[test]
    fn a_job_adds_up() {
        let job = ColdJob {
            part_volume: 1e-3,
            substance: Substance::constant(50.0, 7800.0, 400.0).unwrap(),
            from: 293.15,
            space: 6e-3,
            vessel: Some((2.0, Property::constant(400.0).unwrap())),
            idle_rate: 1e-4,
            time: 1800.0,
        };
        let amounts = LIQUID_NITROGEN.job(&job).unwrap();
        assert_relative_eq!(amounts.part.mass, 7.8 * 0.433_313_253, max_relative = 1e-9);
        assert_relative_eq!(amounts.cover.mass, 5e-3 * 806.6, max_relative = 1e-12);
        assert_relative_eq!(amounts.idle.mass, 0.18, max_relative = 1e-12);
        let sum = amounts.cover.mass + amounts.part.mass + amounts.vessel.mass + amounts.idle.mass;
        assert_relative_eq!(amounts.total.mass, sum, max_relative = 1e-12);
        assert!(LIQUID_NITROGEN.job(&ColdJob { space: 1e-3, ..job }).is_err());
    }

    #[test]
    fn dry_ice_for_ten_kilograms() {
        // 10 kg · 450 J/(kg·K) · 98.5 K / 571 kJ/kg = 0.776 kg; gas 0.54 m³/kg (dry-ice makers).
        let amount = DRY_ICE.latent_only(10.0, &Property::constant(450.0).unwrap(), 293.15).unwrap();
        assert_relative_eq!(amount.mass, 10.0 * 450.0 * 98.5 / 571e3, max_relative = 1e-12);
        assert_relative_eq!(amount.gas_volume / amount.mass, 0.54, max_relative = 0.01);
        assert!(DRY_ICE.latent_only(10.0, &Property::constant(450.0).unwrap(), 190.0).is_err());
    }

    proptest! {
        #[test]
        fn amounts_scale_with_mass(mass in 0.1..500.0_f64, factor in 1.1..20.0_f64) {
            let metal = debye_specific_heat(460.0, 470.0, 77.0).unwrap();
            for at in [Coolant::latent_only, Coolant::with_cold_gas] {
                let one = at(&LIQUID_NITROGEN, mass, &metal, 293.15).unwrap().mass;
                let more = at(&LIQUID_NITROGEN, factor * mass, &metal, 293.15).unwrap().mass;
                prop_assert!((more / one / factor - 1.0).abs() < 1e-12);
            }
        }
    }
}

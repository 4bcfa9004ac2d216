//! Usual heat transfer of ovens and baths, when nothing better is known.

use super::film::Film;
use super::handling::HUB_EMISSIVITY;
use super::thermal::{DRY_ICE_TEMPERATURE, LIQUID_NITROGEN_TEMPERATURE};
use crate::material::Range;

/// What a part is heated or chilled in.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Medium {
    /// Oven with moved air.
    Oven,
    /// Bath of hot oil.
    OilBath,
    /// Freezer.
    Freezer,
    /// Dry ice packed round the part.
    DryIcePacked,
    /// Dry ice in alcohol or acetone, stirred by its own gas.
    DryIceBath,
    /// Nitrogen vapour blown over the part.
    NitrogenVapour,
    /// Pool of liquid nitrogen.
    NitrogenPool,
}

/// Usual film coefficient of a medium.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct UsualFilm {
    /// Typical coefficient, convection only, W/(m²·K).
    pub typical: f64,
    /// From low to high, W/(m²·K).
    pub range: Range,
    /// Emissivity that adds radiation; zero in liquids and where cold walls make it small.
    pub emissivity: f64,
    /// Where the numbers come from.
    pub source: &'static str,
}

impl Medium {
    /// Temperature that the medium keeps by itself, K; none when it is set by the user, or by the liquid.
    pub fn temperature(self) -> Option<f64> {
        match self {
            Self::Oven | Self::OilBath | Self::Freezer | Self::NitrogenVapour | Self::DryIceBath => None,
            Self::DryIcePacked => Some(DRY_ICE_TEMPERATURE),
            Self::NitrogenPool => Some(LIQUID_NITROGEN_TEMPERATURE),
        }
    }

    /// Its usual coefficient; soak times computed with it are good to the width of its range, no better.
    ///
    /// For the pool of nitrogen it is the mean over the whole cooling, for rough figures; [`Medium::film`] follows
    /// the boiling curve.
    pub fn usual(self) -> UsualFilm {
        let film = |typical, low, high, emissivity, source| UsualFilm {
            typical,
            range: Range { low, high },
            emissivity,
            source,
        };
        match self {
            Self::Oven => film(
                40.0,
                25.0,
                100.0,
                HUB_EMISSIVITY,
                "forced convection of gases 25 to 250 W/(m²·K), heat-transfer textbooks; the typical figure is judgement",
            ),
            Self::OilBath => film(150.0, 50.0, 300.0, 0.0, "free convection of oil near 120 °C, from memory"),
            Self::Freezer => film(
                8.0,
                5.0,
                15.0,
                0.0,
                "free convection of gases 2 to 25 W/(m²·K), heat-transfer textbooks; the typical figure is judgement",
            ),
            Self::DryIcePacked => film(20.0, 10.0, 50.0, 0.0, "common practice, from memory"),
            Self::DryIceBath => film(200.0, 100.0, 400.0, 0.0, "common practice, from memory"),
            Self::NitrogenVapour => film(
                30.0,
                15.0,
                80.0,
                0.0,
                "forced convection of gases 25 to 250 W/(m²·K), heat-transfer textbooks; the typical figure is judgement",
            ),
            Self::NitrogenPool => film(
                150.0,
                120.0,
                250.0,
                0.0,
                "mean over the cooling from 20 °C, from the boiling curve of nitrogen",
            ),
        }
    }

    /// Film of a part of `diameter` (m) in this medium.
    ///
    /// # Example
    /// ```
    /// use hubgrip::assembly::film::Film;
    /// use hubgrip::assembly::media::Medium;
    /// assert_eq!(Medium::NitrogenPool.film(0.05), Film::NitrogenPool(0.05));
    /// assert_eq!(Medium::Oven.film(0.05), Film::Gas { coefficient: 40.0, emissivity: 0.8 });
    /// ```
    pub fn film(self, diameter: f64) -> Film {
        let usual = self.usual();
        match self {
            Self::NitrogenPool => Film::NitrogenPool(diameter),
            _ if usual.emissivity > 0.0 => {
                Film::Gas { coefficient: usual.typical, emissivity: usual.emissivity }
            }
            _ => Film::Constant(usual.typical),
        }
    }
}

#[cfg(test)]
mod tests {
    use super::super::boiling::nitrogen_heat_flux;
    use super::*;

    #[test]
    fn typical_figures_lie_in_their_ranges() {
        for medium in [
            Medium::Oven,
            Medium::OilBath,
            Medium::Freezer,
            Medium::DryIcePacked,
            Medium::DryIceBath,
            Medium::NitrogenVapour,
            Medium::NitrogenPool,
        ] {
            let usual = medium.usual();
            assert!(usual.range.low < usual.typical && usual.typical < usual.range.high, "{medium:?}");
        }
    }

    /// A lump cooled from 20 °C to −190 °C along the boiling curve takes the time of a constant film within the range:
    /// the mean of 1/h weighted by the fall of ln ΔT.
    #[test]
    fn mean_film_of_the_pool_follows_from_its_boiling_curve() {
        let (from, to) = (293.15 - 77.36, 83.15 - 77.36_f64);
        let steps = 20_000;
        let width = (from / to).ln() / f64::from(steps);
        let time: f64 = (0..steps)
            .map(|i| to * (width * (f64::from(i) + 0.5)).exp())
            .map(|superheat| width * superheat / nitrogen_heat_flux(0.05, 77.36 + superheat))
            .sum();
        let mean = (from / to).ln() / time;
        let range = Medium::NitrogenPool.usual().range;
        assert!(range.low < mean && mean < range.high, "{mean}");
    }
}

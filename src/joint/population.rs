//! How the parts scatter, as the joint file says it.

/// The population of parts; what is silent is taken from the joint.
#[derive(Debug, Clone, PartialEq, Default)]
pub struct PopulationPlan {
    /// Size of the hole, m.
    pub hole: Option<Variation>,
    /// Size of the shaft, m.
    pub shaft: Option<Variation>,
    /// Roughness Rz of the hub's bore, m.
    pub hub_roughness: Option<Variation>,
    /// Roughness Rz of the shaft, m.
    pub shaft_roughness: Option<Variation>,
    /// Friction against slip.
    pub friction: Option<Variation>,
    /// Friction while pressing in.
    pub pressing_friction: Option<Variation>,
    /// Young's modulus of the hub, Pa.
    pub hub_youngs_modulus: Option<Variation>,
    /// Young's modulus of the shaft, Pa.
    pub shaft_youngs_modulus: Option<Variation>,
    /// Temperature of the hub above that of each state, K.
    pub hub_temperature: Option<Variation>,
    /// Temperature of the shaft above that of each state, K.
    pub shaft_temperature: Option<Variation>,
}

impl PopulationPlan {
    /// The files of measurements it names, as written.
    pub fn measured(&self) -> impl Iterator<Item = &str> {
        let all = [
            &self.hole,
            &self.shaft,
            &self.hub_roughness,
            &self.shaft_roughness,
            &self.friction,
            &self.pressing_friction,
            &self.hub_youngs_modulus,
            &self.shaft_youngs_modulus,
            &self.hub_temperature,
            &self.shaft_temperature,
        ];
        all.into_iter().filter_map(|variation| match variation {
            Some(Variation::Measured(name)) => Some(name.as_str()),
            _ => None,
        })
    }
}

/// How one quantity scatters.
#[derive(Debug, Clone, PartialEq)]
pub enum Variation {
    /// Always the same.
    Fixed(f64),
    /// Normal, cut or skewed when that is said.
    Normal {
        /// Mean; silent: the middle of the limits, the value of the joint, or no offset.
        mean: Option<f64>,
        /// Standard deviation.
        sd: f64,
        /// Where inspection cuts it.
        cut: Option<Bounds>,
        /// Third standardised moment.
        skewness: Option<f64>,
    },
    /// Normal by process capability against the limits of the fit.
    Capable {
        /// Cp = tolerance/(6 s).
        cp: f64,
        /// Cpk; Cp when the mean is in the middle.
        cpk: f64,
        /// Limit to which the mean has moved; silent: the least-material limit.
        toward_upper: Option<bool>,
        /// Whether inspection cuts it at the limits.
        cut: bool,
    },
    /// Every value alike.
    Uniform(Bounds),
    /// A CSV file of measurements, as named in the joint file.
    Measured(String),
}

/// Two bounds.
#[derive(Debug, Clone, Copy, PartialEq)]
pub enum Bounds {
    /// The limits of the fit.
    Limits,
    /// Given values.
    Given {
        /// Lower.
        low: f64,
        /// Upper.
        high: f64,
    },
}

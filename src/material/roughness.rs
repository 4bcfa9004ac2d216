//! Roughness of the seats: usual values, Ra and Rz, and the interference lost as the peaks are smoothed.

use super::friction::FrictionMethod;
use super::{Range, Sourced};

/// The member of a fit whose surface is meant.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum Member {
    /// The inner part.
    Shaft,
    /// The outer part.
    Hub,
}

/// Usual Rz of a press-fit seat, m: shaft 4 to 6.3 µm, bore 6.3 to 10 µm.
///
/// Source: from memory.
pub fn usual_rz(member: Member) -> Sourced<Range> {
    let (low, high) = match member {
        Member::Shaft => (4.0e-6, 6.3e-6),
        Member::Hub => (6.3e-6, 10.0e-6),
    };
    Sourced::new(Range { low, high }, "usual roughness of press-fit seats (from memory)")
}

/// Rz taken when a joint file is silent, m: the rough end of [`usual_rz`], which loses most interference.
///
/// # Example
/// ```
/// use hubgrip::material::roughness::{Member, default_rz};
/// assert_eq!(default_rz(Member::Shaft).value, 6.3e-6);
/// assert_eq!(default_rz(Member::Hub).value, 10.0e-6);
/// ```
pub fn default_rz(member: Member) -> Sourced<f64> {
    let usual = usual_rz(member);
    Sourced { value: usual.value.high, source: usual.source }
}

/// Rz over Ra that is taken for a conversion.
///
/// No exact factor exists. 6 is that of ISO 6336-2 for ground and honed gears (from memory) and the middle of
/// [`RZ_OVER_RA_BAND`].
pub const RZ_OVER_RA: f64 = 6.0;

/// Band of Rz over Ra, 4 to 8, that machined surfaces show.
///
/// Source: 4 to 7 for typical machined profiles (surface-finish guide); 4 to 8 between the two Rz columns of a
/// table of ISO N grades; 7.2 in a roughness conversion note of 2015.
pub const RZ_OVER_RA_BAND: Range = Range { low: 4.0, high: 8.0 };

/// Rz (m) of a surface whose Ra (m) is known: Rz = 6 Ra.
///
/// Valid within the band 4 Ra to 8 Ra, that is −33 % to +33 %: state Rz where it matters.
///
/// # Example
/// Ra 1.6 µm is taken as Rz 9.6 µm.
/// ```
/// let rz = hubgrip::material::roughness::rz_from_ra(1.6e-6);
/// assert!((rz.value - 9.6e-6).abs() < 1e-18);
/// ```
pub fn rz_from_ra(ra: f64) -> Sourced<f64> {
    Sourced::new(RZ_OVER_RA * ra, "Rz = 6 Ra, ISO 6336-2 (from memory); 4 to 8 is found")
}

/// Range of Ra that a process gives.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct Process {
    /// Its name.
    pub name: &'static str,
    /// Common range of Ra, m.
    pub ra: Range,
    /// Where the range comes from.
    pub source: &'static str,
}

const CHART: &str = "process chart of ASME B46.1 (from memory)";
const CHECKED: &str = "process chart of ASME B46.1 (from memory), like a published chart of ISO N grades";

/// Common ranges of Ra by machining process.
pub const PROCESSES: [Process; 10] = [
    process("rough turning, boring", 3.2, 25.0, CHART),
    process("finish turning, boring", 0.8, 6.3, CHART),
    process("fine turning, hard turning", 0.2, 1.6, CHART),
    process("drilling", 1.6, 12.5, CHART),
    process("reaming", 0.8, 3.2, CHECKED),
    process("broaching", 0.8, 3.2, CHART),
    process("cylindrical grinding", 0.1, 1.6, CHECKED),
    process("honing", 0.1, 0.8, CHART),
    process("roller burnishing", 0.1, 0.8, CHART),
    process("lapping", 0.05, 0.4, CHART),
];

const fn process(name: &'static str, low_um: f64, high_um: f64, source: &'static str) -> Process {
    Process { name, ra: Range { low: low_um * 1e-6, high: high_um * 1e-6 }, source }
}

/// A published rule for the interference lost by smoothing.
///
/// Any fixed share of the roughness is empirical: the loss depends on elasticity, on the whole spectrum of the
/// roughness and on how the diameter was measured (B. N. J. Persson, Influence of Surface Roughness on Press
/// Fits, Tribology Letters, 2023).
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub enum SmoothingRule {
    /// DIN 7190:2001, 0.8 of the sum of Rz.
    Din7190Of2001,
    /// DIN 7190-1:2017, 0.4 of the sum of Rz.
    Din7190Part1Of2017,
    /// GB/T 5371, pressed joints only.
    GbT5371,
    /// NF E 22-621, three times the sum of Ra.
    NfE22621,
}

impl SmoothingRule {
    /// Every rule; the first is the default, on the safe side for holding among those of DIN 7190.
    pub const ALL: [Self; 4] = [Self::Din7190Of2001, Self::Din7190Part1Of2017, Self::GbT5371, Self::NfE22621];

    /// The rule called `name`; case, blanks, hyphens and underscores are forgiven.
    ///
    /// # Example
    /// ```
    /// use hubgrip::material::roughness::SmoothingRule;
    /// assert_eq!(SmoothingRule::named("din 7190-1:2017"), Some(SmoothingRule::Din7190Part1Of2017));
    /// assert_eq!(SmoothingRule::named("DIN 7190"), None); // which edition?
    /// ```
    pub fn named(name: &str) -> Option<Self> {
        let plain = |text: &str| -> String {
            let kept = text.chars().filter(|c| c.is_alphanumeric() || *c == ':');
            kept.flat_map(char::to_lowercase).collect()
        };
        let wanted = plain(name);
        Self::ALL.into_iter().find(|rule| plain(rule.name()) == wanted)
    }

    /// The name, as a joint file has it.
    pub fn name(self) -> &'static str {
        match self {
            Self::Din7190Of2001 => "DIN 7190:2001",
            Self::Din7190Part1Of2017 => "DIN 7190-1:2017",
            Self::GbT5371 => "GB/T 5371",
            Self::NfE22621 => "NF E 22-621",
        }
    }

    /// The rule as a formula.
    pub fn formula(self) -> &'static str {
        match self {
            Self::Din7190Of2001 => "0.8 (Rz shaft + Rz hub)",
            Self::Din7190Part1Of2017 => "0.4 (Rz shaft + Rz hub)",
            Self::GbT5371 => "2 (S shaft + S hub), S = 0.4 Rz, pressed; no loss when shrunk",
            Self::NfE22621 => "3 (Ra shaft + Ra hub), Ra = Rz/6",
        }
    }

    /// Where the rule comes from.
    pub fn source(self) -> &'static str {
        match self {
            Self::Din7190Of2001 => "DIN 7190:2001, second-hand: B. N. J. Persson, Tribology Letters, 2023",
            Self::Din7190Part1Of2017 => {
                "DIN 7190-1:2017, second-hand, not confirmed: B. N. J. Persson, Tribology Letters, 2023"
            }
            Self::GbT5371 => "GB/T 5371:2004, least interference, as printed in an engineering handbook",
            Self::NfE22621 => {
                "NF E 22-621 as summarised in the course book Systèmes mécaniques, théorie et dimensionnement; \
                 Rz = 6 Ra of ISO 6336-2 (from memory)"
            }
        }
    }

    /// Loss on the diameter.
    ///
    /// G = k (Rz_s + Rz_h)
    ///
    /// | symbol | meaning | unit | valid |
    /// |---|---|---|---|
    /// | G | loss of diametral interference | m | |
    /// | Rz_s, Rz_h | roughness of shaft and hub | m | ≥ 0 |
    /// | k | DIN 7190:2001 0.8; DIN 7190-1:2017 0.4; GB/T 5371 0.8 pressed, 0 shrunk; NF E 22-621 3/6 | – | |
    ///
    /// Assumes: machined metal seats, joined for the first time.
    /// Source: [`SmoothingRule::source`].
    ///
    /// # Example
    /// 50 µm of interference with Rz 4 and 6.3 µm keep 41.76 µm by DIN 7190:2001.
    /// ```
    /// use hubgrip::material::friction::FrictionMethod::Pressed;
    /// use hubgrip::material::roughness::SmoothingRule;
    /// let loss = SmoothingRule::Din7190Of2001.loss(4.0e-6, 6.3e-6, Pressed);
    /// assert!((50e-6 - loss - 41.76e-6).abs() < 1e-15);
    /// ```
    pub fn loss(self, rz_shaft: f64, rz_hub: f64, method: FrictionMethod) -> f64 {
        self.factor(method) * (rz_shaft + rz_hub)
    }

    /// Share of (Rz shaft + Rz hub) that is lost.
    pub fn factor(self, method: FrictionMethod) -> f64 {
        match (self, method) {
            (Self::Din7190Of2001, _) | (Self::GbT5371, FrictionMethod::Pressed) => 0.8,
            (Self::Din7190Part1Of2017, _) => 0.4,
            (Self::GbT5371, FrictionMethod::Shrunk) => 0.0,
            (Self::NfE22621, _) => 3.0 / RZ_OVER_RA,
        }
    }
}

#[cfg(test)]
mod tests {
    use super::FrictionMethod::{Pressed, Shrunk};
    use super::*;

    const UM: f64 = 1e-6;

    fn left_of_50_um(rule: SmoothingRule) -> f64 {
        (50.0 * UM - rule.loss(4.0 * UM, 6.3 * UM, Pressed)) / UM
    }

    #[test]
    fn what_is_left_by_both_editions_of_din_7190() {
        // 50 − 0.8 · 10.3 = 41.76 and 50 − 0.4 · 10.3 = 45.88, by hand.
        assert!((left_of_50_um(SmoothingRule::Din7190Of2001) - 41.76).abs() < 1e-9);
        assert!((left_of_50_um(SmoothingRule::Din7190Part1Of2017) - 45.88).abs() < 1e-9);
    }

    #[test]
    fn gb_t_5371_takes_nothing_from_a_shrunk_joint() {
        assert_eq!(SmoothingRule::GbT5371.loss(4.0 * UM, 6.3 * UM, Shrunk), 0.0);
        // 2 (0.4 · 4 + 0.4 · 6.3) = 8.24 µm.
        assert!((SmoothingRule::GbT5371.loss(4.0 * UM, 6.3 * UM, Pressed) / UM - 8.24).abs() < 1e-9);
    }

    #[test]
    fn nf_e_22_621_gives_the_rounded_values_of_its_table() {
        // NF E 22-621: 5 µm for Ra 0.8 on both seats, 10 µm for Ra 1.6, rounded up.
        for (ra, printed) in [(0.8, 5.0), (1.6, 10.0)] {
            let rz = rz_from_ra(ra * UM).value;
            let loss = SmoothingRule::NfE22621.loss(rz, rz, Pressed) / UM;
            assert_eq!((loss - 1e-9).ceil(), printed);
        }
    }

    #[test]
    fn rules_are_found_by_their_own_names_only() {
        for rule in SmoothingRule::ALL {
            assert_eq!(SmoothingRule::named(rule.name()), Some(rule));
        }
        assert_eq!(SmoothingRule::named("nf e22-621"), Some(SmoothingRule::NfE22621));
        assert_eq!(SmoothingRule::named("ISO 286"), None);
    }

    #[test]
    fn the_band_holds_the_ratios_of_a_published_table() {
        // Table of ISO N grades, Ra and the rougher of its two Rz columns, µm.
        for (ra, rz) in [(0.1, 0.8), (0.2, 1.6), (0.4, 2.5), (0.8, 4.0), (1.6, 8.0), (3.2, 16.0)] {
            let band = RZ_OVER_RA_BAND.low..=RZ_OVER_RA_BAND.high;
            assert!(band.contains(&(rz / ra)), "Ra {ra}: {}", rz / ra);
        }
    }

    #[test]
    fn usual_seats_are_within_what_grinding_and_turning_give() {
        for (member, name) in
            [(Member::Shaft, "cylindrical grinding"), (Member::Hub, "finish turning, boring")]
        {
            let process = PROCESSES.iter().find(|process| process.name == name).unwrap();
            let rz = default_rz(member).value;
            assert!(
                rz >= RZ_OVER_RA_BAND.low * process.ra.low && rz <= RZ_OVER_RA_BAND.high * process.ra.high
            );
        }
    }
}

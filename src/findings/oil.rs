//! Oil injection: the pressure that floats the hub at both extremes, and what it leaves of both parts' strength.

use super::kernel::{Kernel, PairInterference};
use super::{FindingsError, PairFindings, PlasticFindings, RingStress};
use crate::assembly::oil::{OIL_OVER_CONTACT, OIL_PLANNED, film_opening};
use crate::joint::Joint;
use crate::material::Range;
use crate::numerics::root;
use crate::tolerance::Extremes;

/// Oil injection at both extremes; none for a pair that does not grip.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct OilFindings {
    /// The loosest pair.
    pub loosest: Option<OilPair>,
    /// The tightest pair.
    pub tightest: OilPair,
}

/// Oil injection of one pair, at rest and at the shop temperature; Pa and m.
#[derive(Debug, Clone, Copy, PartialEq)]
pub struct OilPair {
    /// Least pressure that floats the hub: that of contact, the greatest along a stepped seat.
    pub least: f64,
    /// What practice needs.
    pub usual: Range,
    /// What is planned with.
    pub planned: f64,
    /// How far the seats then part on the diameter; the least along a stepped seat.
    pub film: f64,
    /// Safety of the shaft at the planned pressure; none without a strength.
    pub shaft_safety: Option<f64>,
    /// Safety of the hub at the planned pressure.
    pub hub_safety: Option<f64>,
    /// Oil pressure at which the shaft reaches its strength.
    pub shaft_limit: Option<f64>,
    /// Oil pressure at which the hub reaches its strength.
    pub hub_limit: Option<f64>,
}

impl OilPair {
    /// A hub that has yielded, in assembly or at work, stands the pressure that it carries already, and yields further above it.
    fn of_yielded_hub(self, has_yielded: bool) -> Self {
        if !has_yielded {
            return self;
        }
        Self { hub_limit: Some(self.least), hub_safety: Some(self.least / self.planned), ..self }
    }

    /// The lower limit of both parts, Pa.
    pub fn limit(&self) -> Option<f64> {
        [self.shaft_limit, self.hub_limit].into_iter().flatten().min_by(f64::total_cmp)
    }
}

/// Oil injection of the joint; none when even the tightest pair does not grip.
pub(super) fn oil(
    joint: &Joint,
    kernel: &Kernel<'_>,
    pairs: &Extremes<PairInterference>,
    extremes: &Extremes<PairFindings>,
    plastic: Option<&PlasticFindings>,
) -> Result<Option<OilFindings>, FindingsError> {
    let work = Work { joint, kernel };
    let yielded = plastic.and_then(|plastic| plastic.worn.as_ref());
    let yielded = yielded.map_or((false, false), |worn| (worn.loosest > 0.0, worn.tightest > 0.0));
    let Some(tightest) = work.pair(&pairs.tightest, &extremes.tightest)? else { return Ok(None) };
    let loosest = work.pair(&pairs.loosest, &extremes.loosest)?;
    Ok(Some(OilFindings {
        loosest: loosest.map(|pair| pair.of_yielded_hub(yielded.0)),
        tightest: tightest.of_yielded_hub(yielded.1),
    }))
}

struct Work<'a> {
    joint: &'a Joint,
    kernel: &'a Kernel<'a>,
}

impl Work<'_> {
    fn pair(&self, pair: &PairInterference, found: &PairFindings) -> Result<Option<OilPair>, FindingsError> {
        if found.pressure <= 0.0 || found.shop_interference <= 0.0 {
            return Ok(None);
        }
        if found.slices.is_empty() {
            self.one_section(pair, found).map(Some)
        } else {
            Ok(Some(stepped(found)?))
        }
    }

    /// The oil stresses the rings as a larger interference would: one that makes its pressure.
    fn one_section(&self, pair: &PairInterference, found: &PairFindings) -> Result<OilPair, FindingsError> {
        let (last, shop) = (self.joint.last_interface(), &self.kernel.shop);
        let with = |more: f64| {
            let mut interference = pair.effective.clone();
            interference.iter_mut().skip(last).take(1).for_each(|own| *own += more);
            interference
        };
        let elastic = self.kernel.pressure(&pair.effective, shop)?;
        let unit = found.shop_interference;
        let give = unit / (self.kernel.pressure(&with(unit), shop)? - elastic);
        let rings = |oil: f64| self.kernel.ring_stresses(&with((oil - elastic) * give), shop);
        let least = found.pressure;
        let planned = OIL_PLANNED * least;
        let (at_least, at_planned) = (rings(least)?, rings(planned)?);
        let safety = |rings: &[RingStress], ring: usize| rings.get(ring).and_then(|ring| ring.safety);
        let limit = |ring: usize| -> Option<f64> {
            let own = safety(&at_planned, ring)?;
            if self.joint.rings.len() == 2 {
                return Some(own * planned);
            }
            // What the other joints press in counts as well, so that the stress is no longer proportional.
            safety(&at_least, ring).filter(|safety| *safety >= 1.0)?;
            let miss = |oil: f64| {
                rings(oil)
                    .ok()
                    .and_then(|rings| safety(&rings, ring))
                    .map_or(1.0, |safety| 1.0 / safety - 1.0)
            };
            let mut high = planned.max(own * planned);
            while miss(high) < 0.0 && high < 1e3 * planned {
                high *= 2.0;
            }
            root::bracketed(miss, least, high, 1e-9 * least).ok()
        };
        Ok(OilPair {
            least,
            usual: Range { low: OIL_OVER_CONTACT.low * least, high: OIL_OVER_CONTACT.high * least },
            planned,
            film: film_opening(least, planned, give)?,
            shaft_safety: safety(&at_planned, last),
            hub_safety: safety(&at_planned, last + 1),
            shaft_limit: limit(last),
            hub_limit: limit(last + 1),
        })
    }
}

/// One oil pressure along a seat whose slices press unlike: it must lift the hardest, and loads every slice.
fn stepped(found: &PairFindings) -> Result<OilPair, FindingsError> {
    let least = found.slices.iter().map(|slice| slice.pressure).fold(0.0, f64::max);
    let planned = OIL_PLANNED * least;
    let give = found.shop_interference / least;
    // The stress of a slice is proportional to its pressure.
    let limit = |ring: usize| {
        let slices = found.slices.iter();
        slices
            .filter_map(|slice| Some(slice.rings.get(ring)?.safety? * slice.pressure))
            .min_by(f64::total_cmp)
    };
    let (shaft_limit, hub_limit) = (limit(0), limit(1));
    Ok(OilPair {
        least,
        usual: Range { low: OIL_OVER_CONTACT.low * least, high: OIL_OVER_CONTACT.high * least },
        planned,
        film: film_opening(least, planned, give)?,
        shaft_safety: shaft_limit.map(|limit| limit / planned),
        hub_safety: hub_limit.map(|limit| limit / planned),
        shaft_limit,
        hub_limit,
    })
}

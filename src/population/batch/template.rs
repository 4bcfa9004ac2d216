//! A joint that was read once, into which the cells of further rows are put straight.
//!
//! Rows that agree in every key that is not put in straight, and in which cells are empty, share one template. It
//! was read by the reader of joint files, so everything in it is checked; a row puts its numbers in, and what
//! depends on them is derived again by the rules of the reader. A cell that the rules would refuse is left to the
//! reader, who tells why.

use super::cell;
use super::field::{End, Field, put};
use super::header::Column;
use crate::joint::{Allow, COARSEST, Joint, ROUGHEST, Ring};
use crate::material::Range;
use crate::material::roughness::rz_from_ra;
use crate::quantity::unit::Unit;
use crate::quantity::{Kind, parse, parse_number_range};
use crate::tolerance::{FitCallout, FitLimits, Limits, Member, MemberCallout, ToleranceError};

/// A joint into which cells are put.
#[derive(Debug, Clone)]
pub(super) struct Template {
    joint: Joint,
    puts: Vec<Put>,
    fit: FitOf,
    /// Whether the ruling section of shaft and hub follows their size.
    sections_follow: (bool, bool),
    clearance_follows: bool,
}

/// One column that is put in.
#[derive(Debug, Clone, Copy)]
struct Put {
    column: usize,
    field: Field,
    unit: Option<&'static Unit>,
}

/// Where the limits of a row come from.
#[derive(Debug, Clone)]
enum FitOf {
    /// They stay those of the template.
    Template,
    /// The callout of the template, at the row's diameter.
    Callout(FitCallout),
    /// The callout in this column; the last one that was read is kept.
    Column(usize, Option<(String, FitCallout)>),
    /// Each member for itself.
    Members { hole: MemberCallout, shaft: MemberCallout },
    /// Two measured parts, m.
    Measured { hole: f64, shaft: f64, uncertainty: f64 },
}

/// Clearance while joining as a share of the diameter, when the file is silent; as the reader has it.
const CLEARANCE_SHARE: f64 = 1e-3;

impl Template {
    /// A template from a joint that was read with these columns filled.
    ///
    /// None when a number of the joint would have to change with the row in a way that is not followed here.
    pub(super) fn of(joint: &Joint, columns: &[Column], filled: &[usize]) -> Option<Self> {
        let followed = joint.rings.len() == 2
            && joint.slices.is_empty()
            && joint.require.allow == Allow::Elastic
            && joint.duty.iter().all(|state| state.temperature_rises.is_empty());
        if !followed {
            return None;
        }
        let mut puts = Vec::new();
        for &index in filled {
            let column = columns.get(index)?;
            let key = column.key.as_deref()?;
            if Field::has(key) {
                let field = Field::of(key, &joint.duty)?;
                let unit = field.kind().and_then(|kind| cell::unit_of(kind, column));
                puts.push(Put { column: index, field, unit });
            }
        }
        let fit = fit_of(joint, &puts)?;
        let default = |key: &str| joint.defaults.iter().any(|default| default.key == key);
        Some(Self {
            puts,
            fit,
            sections_follow: (default("shaft.section"), default("hub.section")),
            clearance_follows: default("assembly.clearance"),
            joint: joint.clone(),
        })
    }

    /// The joint of a row; none when the reader of joint files has to look at it.
    pub(super) fn row(&mut self, cells: &[&str], columns: &[Column]) -> Option<&Joint> {
        for index in 0..self.puts.len() {
            let Put { column, field, unit } = *self.puts.get(index)?;
            let (text, column) = (*cells.get(column)?, columns.get(column)?);
            self.put(field, text, column, unit)?;
        }
        self.derive(cells)?;
        Some(&self.joint)
    }

    fn put(&mut self, field: Field, text: &str, column: &Column, unit: Option<&'static Unit>) -> Option<()> {
        let joint = &mut self.joint;
        match field {
            Field::Fit => {}
            Field::ShaftRoughness => joint.rings.first_mut()?.roughness.value = roughness(text, column)?,
            Field::HubRoughness => joint.rings.get_mut(1)?.roughness.value = roughness(text, column)?,
            Field::Holding => joint.friction.holding.value = friction(text)?,
            Field::Pressing => joint.friction.pressing.value = friction(text)?,
            Field::Release => joint.friction.release.value = friction(text)?,
            Field::Limit(member, end) => {
                let value = cell::quantity(Kind::Length, text, column, unit)?;
                let FitOf::Members { hole, shaft } = &mut self.fit else { return None };
                put_limit(if member == Member::Hole { hole } else { shaft }, end, value)?;
            }
            Field::MeasuredHole | Field::MeasuredShaft | Field::MeasuredUncertainty => {
                let value = cell::quantity(Kind::Length, text, column, unit)?;
                let FitOf::Measured { hole, shaft, uncertainty } = &mut self.fit else { return None };
                match field {
                    Field::MeasuredHole => *hole = value,
                    Field::MeasuredShaft => *shaft = value,
                    _ => *uncertainty = value,
                }
            }
            _ => put(joint, field, cell::quantity(field.kind()?, text, column, unit)?)?,
        }
        Some(())
    }

    /// What follows from the numbers of the row, by the rules of the reader.
    fn derive(&mut self, cells: &[&str]) -> Option<()> {
        let joint = &mut self.joint;
        let diameter = joint.diameter;
        let [shaft, hub] = joint.rings.as_mut_slice() else { return None };
        shaft.outer_diameter = diameter;
        hub.inner_diameter = diameter;
        let in_order = shaft.inner_diameter < diameter && hub.outer_diameter > diameter;
        if !in_order || joint.relief >= joint.length {
            return None;
        }
        let seat = joint.length - joint.relief;
        let chilled = joint.assembly.practice.chilled_length;
        let too_wide = joint.bearing.as_ref().is_some_and(|bearing| joint.length - bearing.width > 1e-9);
        if too_wide || chilled.is_some_and(|chilled| seat - chilled > 1e-9) {
            return None;
        }
        if self.sections_follow.0 {
            let section = tidy(shaft.outer_diameter);
            take_section(shaft, section)?;
        }
        if self.sections_follow.1 {
            let section = tidy(0.5 * (hub.outer_diameter - hub.inner_diameter));
            take_section(hub, section)?;
        }
        if let (Some(factor), [loss]) = (joint.smoothing.factor, joint.smoothing.loss.as_mut_slice()) {
            *loss = factor * (shaft.roughness.value + hub.roughness.value);
        }
        if self.clearance_follows {
            joint.assembly.clearance.value = CLEARANCE_SHARE * diameter;
        }
        let limits = match &mut self.fit {
            FitOf::Template => return Some(()),
            FitOf::Callout(callout) => limits(callout, diameter),
            FitOf::Column(column, kept) => {
                let text = *cells.get(*column)?;
                if kept.as_ref().is_none_or(|(known, _)| known != text) {
                    *kept = Some((text.to_owned(), FitCallout::parse(text).ok()?));
                }
                limits(&kept.as_ref()?.1, diameter)
            }
            FitOf::Members { hole, shaft } => limits(&FitCallout::members(*hole, *shaft), diameter),
            FitOf::Measured { hole, shaft, uncertainty } => {
                if *uncertainty < 0.0 || *uncertainty >= COARSEST * *hole {
                    return None;
                }
                limits(&FitCallout::measured(*hole, *shaft, *uncertainty), diameter)
            }
        };
        joint.fits.first_mut()?.limits = limits.ok()?;
        Some(())
    }
}

/// Where the limits come from when these columns are put in.
fn fit_of(joint: &Joint, puts: &[Put]) -> Option<FitOf> {
    let has = |wanted: Field| puts.iter().find(|put| put.field == wanted);
    if let Some(put) = has(Field::Fit) {
        return Some(FitOf::Column(put.column, None));
    }
    let fit = joint.fits.first()?;
    if puts.iter().any(|put| put.field.is_measured()) {
        // The template's own sizes are kept only for the columns that do not give them.
        has(Field::MeasuredHole)?;
        has(Field::MeasuredShaft)?;
        let uncertainty = match has(Field::MeasuredUncertainty) {
            Some(_) => 0.0,
            None => {
                let (_, written) = fit.callout.rsplit_once("± ")?;
                parse(Kind::Length, written).ok()?
            }
        };
        return Some(FitOf::Measured { hole: 0.0, shaft: 0.0, uncertainty });
    }
    let moves = puts.iter().any(|put| put.field.moves_diameter());
    if puts.iter().any(|put| matches!(put.field, Field::Limit(..))) {
        let kept = |limits: Limits| (!moves).then_some(MemberCallout::Deviations(limits));
        return Some(FitOf::Members {
            hole: member_of(Member::Hole, puts, kept(fit.limits.hole))?,
            shaft: member_of(Member::Shaft, puts, kept(fit.limits.shaft))?,
        });
    }
    if !moves {
        return Some(FitOf::Template);
    }
    match FitCallout::parse(&fit.callout) {
        Ok(callout @ (FitCallout::Iso { .. } | FitCallout::Ansi(_))) => Some(FitOf::Callout(callout)),
        _ => None,
    }
}

/// How the columns give a member: by both deviations or by both sizes; the kept one when they do not give it.
fn member_of(member: Member, puts: &[Put], kept: Option<MemberCallout>) -> Option<MemberCallout> {
    let has = |end: End| puts.iter().any(|put| put.field == Field::Limit(member, end));
    match [End::Lower, End::Upper, End::Minimum, End::Maximum].map(has) {
        [false, false, false, false] => kept,
        [true, true, false, false] => Some(MemberCallout::Deviations(Limits { lower: 0.0, upper: 0.0 })),
        [false, false, true, true] => Some(MemberCallout::Sizes { minimum: 0.0, maximum: 0.0 }),
        _ => None,
    }
}

fn put_limit(callout: &mut MemberCallout, end: End, value: f64) -> Option<()> {
    match (callout, end) {
        (MemberCallout::Deviations(limits), End::Lower) => limits.lower = value,
        (MemberCallout::Deviations(limits), End::Upper) => limits.upper = value,
        (MemberCallout::Sizes { minimum, .. }, End::Minimum) if value > 0.0 => *minimum = value,
        (MemberCallout::Sizes { maximum, .. }, End::Maximum) if value > 0.0 => *maximum = value,
        _ => return None,
    }
    Some(())
}

/// The limits of a fit without the sources that nobody reads here.
fn limits(callout: &FitCallout, nominal: f64) -> Result<FitLimits, ToleranceError> {
    match callout {
        FitCallout::Iso { hole, shaft } => {
            Ok(FitLimits { nominal, hole: hole.limits(nominal)?, shaft: shaft.limits(nominal)? })
        }
        FitCallout::Ansi(class) => class.limits(nominal),
        other => other.resolve(nominal).map(|resolved| resolved.limits),
    }
}

fn take_section(ring: &mut Ring, section: f64) -> Option<()> {
    let strength = ring.material.strength_for(section)?;
    if ring.strength != *strength {
        ring.strength = strength.clone();
    }
    ring.section = section;
    Some(())
}

/// A computed length without the noise of its last digits, to the picometre; as the reader has it.
fn tidy(length: f64) -> f64 {
    (length * 1e12).round() / 1e12
}

/// A roughness Rz, m.
fn roughness(text: &str, column: &Column) -> Option<f64> {
    let written = cell::written(text, column);
    let start = written.find(|c: char| !c.is_ascii_alphabetic())?;
    let (symbol, depth) = written.split_at(start);
    let depth = parse(Kind::Length, depth).ok().filter(|depth| (0.0..=ROUGHEST).contains(depth))?;
    match symbol {
        "Rz" => Some(depth),
        "Ra" => Some(rz_from_ra(depth).value),
        _ => None,
    }
}

/// A coefficient of friction or a range of it.
fn friction(text: &str) -> Option<Range> {
    let (low, high) = parse_number_range(text).ok()?;
    (low > 0.0 && low <= high && high <= 1.0).then_some(Range { low, high })
}

//! `hubgrip limits`: limits and extreme interferences of a fit, or the limits of one member.

use clap::{Args, ValueEnum};
use hubgrip::diagnostic::Diagnostic;
use hubgrip::quantity::{self, Kind, UnitSystem};
use hubgrip::report::{json, limits};
use hubgrip::tolerance::{FitCallout, Member, MemberCallout, ToleranceError};

use super::exit::{Ending, Failure};
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip limits 60mm H7/s6
  hubgrip limits 2in FN 4
  hubgrip limits 60mm H7";

/// Limits and extreme interferences of a fit, or of one class alone
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// Nominal diameter with its unit, such as 60mm or 2-3/16in
    #[arg(value_name = "DIAMETER")]
    pub diameter: String,
    /// A fit such as H7/s6 or FN 4, or one class such as H7
    #[arg(value_name = "FIT", required = true)]
    pub fit: Vec<String>,
    /// Limits as JSON, fixed names, full precision
    #[arg(long)]
    pub json: bool,
    /// Units shown; without it inch when the diameter is given in inches
    #[arg(long, value_enum)]
    pub display: Option<Display>,
}

/// Units shown.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub enum Display {
    Metric,
    Inch,
}

pub fn run(arguments: &Arguments, output: &Output) -> Result<Ending, Failure> {
    let nominal = quantity::parse(Kind::Length, &arguments.diameter).map_err(|error| {
        let diagnostic = Diagnostic::new(format!("diameter: {error}"));
        match error.help() {
            Some(help) => diagnostic.with_help(help),
            None => diagnostic.with_help("write the diameter with its unit, such as 60mm or 2in"),
        }
    })?;
    let system = system(arguments);
    let fit = arguments.fit.join(" ");
    let text = match single_member(&fit) {
        Some(member) => {
            let callout = MemberCallout::parse(&fit, member).map_err(refused)?;
            let resolved = callout.resolve(member, nominal).map_err(refused)?;
            if arguments.json {
                json::member_limits(nominal, member, &resolved)
            } else {
                limits::member_text(&fit, nominal, member, &resolved, system)
            }
        }
        None => {
            let callout = FitCallout::parse(&fit).map_err(refused)?;
            let resolved = callout.resolve_given_in(nominal, system).map_err(refused)?;
            if arguments.json {
                json::fit_limits(&callout.to_string(), &resolved)
            } else {
                limits::fit_text(&callout.to_string(), &resolved, system)
            }
        }
    };
    output.result(&text)?;
    Ok(Ending::Met)
}

fn refused(error: ToleranceError) -> Failure {
    let diagnostic = Diagnostic::new(error.to_string());
    match help(&error) {
        Some(help) => diagnostic.with_help(help).into(),
        None => diagnostic.into(),
    }
}

/// The way out: without a joint file there is no place to write limits into.
fn help(error: &ToleranceError) -> Option<String> {
    const AGREED: &str = "a joint file takes limits as numbers";
    match error {
        ToleranceError::NominalOutOfRange { nominal, .. } if *nominal > 0.0 => Some(format!(
            "nothing is extrapolated: beyond the tables limits are agreed with the maker, and {AGREED}"
        )),
        ToleranceError::NotCarried { .. } => Some(format!("look it up in a printed copy; {AGREED}")),
        other => other.help(),
    }
}

fn system(arguments: &Arguments) -> UnitSystem {
    match arguments.display {
        Some(Display::Metric) => UnitSystem::Metric,
        Some(Display::Inch) => UnitSystem::Inch,
        None if arguments.diameter.trim_end().ends_with("in") => UnitSystem::Inch,
        None => UnitSystem::Metric,
    }
}

/// A class alone, such as `H7`: its letters tell the member. None when the text is a fit.
fn single_member(fit: &str) -> Option<Member> {
    let class = fit.trim();
    [Member::Hole, Member::Shaft].into_iter().find(|member| MemberCallout::parse(class, *member).is_ok())
}

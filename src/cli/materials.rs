//! `hubgrip materials`: search the library, print a material with its sources.

use std::path::Path;

use clap::Args;
use hubgrip::diagnostic::Diagnostic;
use hubgrip::report::materials;

use super::exit::{Ending, Failure};
use super::input;
use super::output::Output;

const EXAMPLE: &str = "\
Example:
  hubgrip materials            all of them
  hubgrip materials bronze     those that have the word
  hubgrip materials C45+N      one, with every number and its source
  hubgrip materials 1.0503     by any common designation";

/// Search the material library, or print one material with its sources
#[derive(Debug, Args)]
#[command(after_help = EXAMPLE)]
pub struct Arguments {
    /// An id or designation, or words to search for
    #[arg(value_name = "WORDS")]
    pub words: Vec<String>,
}

pub fn run(arguments: &Arguments, folder: Option<&Path>, output: &Output) -> Result<Ending, Failure> {
    let library = input::library(folder, output)?;
    let words = arguments.words.join(" ");
    let text = match library.find(&words) {
        Ok(material) => materials::sheet(&material),
        Err(not_found) => {
            let found = library.search(&words);
            if found.is_empty() {
                return Err(Diagnostic::new(not_found.to_string()).with_help(not_found.help()).into());
            }
            materials::list(&found)
        }
    };
    output.result(&text)?;
    Ok(Ending::Met)
}

//! The hubgrip command line: what was typed becomes one command, which runs and ends with one exit code.

mod cli;

fn main() -> std::process::ExitCode {
    cli::main()
}

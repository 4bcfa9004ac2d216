//! The hubgrip command line.

fn main() {}

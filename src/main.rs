//! The command line: arguments in, exit code out.

fn main() {}

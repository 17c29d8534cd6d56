//! The command line: arguments in, exit code out.

fn main() -> std::process::ExitCode {
    keeplit::cli::run()
}

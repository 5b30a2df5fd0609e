use std::process::ExitCode;

fn main() -> ExitCode {
    hesswright::cli::run().into()
}

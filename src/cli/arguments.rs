//! What may be asked on the command line.

use clap::{ColorChoice, Parser, Subcommand, ValueEnum};

/// The text below the list of commands.
const STATUS: &str = "\
Exit status: 0 all well; 1 a requirement is not met; 2 the sheet or the call is wrong.";

/// Works thermal process sheets: unit-checked heat, work and duties, reviewable line by line
#[derive(Debug, Parser)]
#[command(name = "heatpath", version, after_help = STATUS, color = ColorChoice::Never)]
#[command(arg_required_else_help = true)]
pub(super) struct Arguments {
    /// Whether to colour what is printed; `auto` colours on a terminal unless NO_COLOR is set
    #[arg(
        long,
        global = true,
        value_name = "auto|always|never",
        default_value = "auto",
        hide_possible_values = true
    )]
    pub(super) color: When,
    /// What to do
    #[command(subcommand)]
    pub(super) command: Command,
}

/// What to do.
#[derive(Debug, Subcommand)]
pub(super) enum Command {
    /// Works a sheet and prints its report
    Run(RunArguments),
    /// Reads and unit-checks a sheet without working it
    Check(CheckArguments),
    /// Lists the species of the shipped library, or shows those that a word finds
    Species(SpeciesArguments),
    /// Lists the units that sheets may use
    Units(UnitsArguments),
    /// Says more about the code of a diagnostic
    Explain(ExplainArguments),
}

/// What `run` takes.
#[derive(Debug, clap::Args)]
pub(super) struct RunArguments {
    /// The sheet; `-` reads standard input
    pub(super) sheet: std::path::PathBuf,
    /// How to print the report
    #[arg(long, value_name = "text|json", default_value = "text", hide_possible_values = true)]
    pub(super) format: Format,
    /// How to print diagnostics on standard error; `json` prints all of them, warnings and cautions included
    #[arg(long, value_name = "text|json", default_value = "text", hide_possible_values = true)]
    pub(super) diagnostics: Format,
}

/// What `check` takes.
#[derive(Debug, clap::Args)]
pub(super) struct CheckArguments {
    /// The sheet; `-` reads standard input
    pub(super) sheet: std::path::PathBuf,
    /// How to print what is found: drawn on standard error, or as JSON on standard output
    #[arg(long, value_name = "text|json", default_value = "text", hide_possible_values = true)]
    pub(super) format: Format,
}

/// What `species` takes.
#[derive(Debug, clap::Args)]
pub(super) struct SpeciesArguments {
    /// A name, a formula or a CAS number; without it all species are listed
    pub(super) word: Option<String>,
    /// Draw heat capacity and enthalpy over temperature as well
    #[arg(long)]
    pub(super) plot: bool,
    /// How to print what is found
    #[arg(long, value_name = "text|json", default_value = "text", hide_possible_values = true)]
    pub(super) format: Format,
}

/// What `units` takes.
#[derive(Debug, clap::Args)]
pub(super) struct UnitsArguments {
    /// A symbol, a part of a name or a dimension; without it all units are listed
    pub(super) word: Option<String>,
    /// How to print the list
    #[arg(long, value_name = "text|json", default_value = "text", hide_possible_values = true)]
    pub(super) format: Format,
}

/// What `explain` takes.
#[derive(Debug, clap::Args)]
pub(super) struct ExplainArguments {
    /// The code, such as K301; without it all codes are listed
    pub(super) code: Option<String>,
}

/// A form of output.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(super) enum Format {
    /// For people.
    Text,
    /// For programs.
    Json,
}

/// When to colour.
#[derive(Debug, Clone, Copy, PartialEq, Eq, ValueEnum)]
pub(super) enum When {
    /// On a terminal, unless NO_COLOR is set.
    Auto,
    /// Always.
    Always,
    /// Never.
    Never,
}

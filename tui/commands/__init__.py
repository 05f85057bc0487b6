"""One module for each subcommand: `parser()` and `run(arguments) -> exit status`."""

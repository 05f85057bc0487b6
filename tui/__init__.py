"""Shows and asks: the command line and the terminal interface."""

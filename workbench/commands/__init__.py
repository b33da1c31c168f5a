"""One module per headless command."""

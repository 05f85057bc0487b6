"""Wood: what a piece may be trusted with and on what basis; knows nothing of buildings."""

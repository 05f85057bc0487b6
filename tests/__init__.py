"""The proof: published tables, outside references, properties, and the interface through its own keys."""

"""Members: from what was read to a finding; knows nothing of screens."""

"""The Register desk: what the shop has for all its jobs, a leaf for each kind."""

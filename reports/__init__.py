"""Paper, drawings and exports."""

"""What happens beside the mounting: told in a plain form, and listed."""

"""What frames the work on every desk: title block, keys, prompts, verdicts and messages."""

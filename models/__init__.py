"""What is known of rotors, rules and records; nothing of Qt, nothing of paper."""

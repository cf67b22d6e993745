"""Fields that take readings and answers from a keyboard, an indicator or a glove."""

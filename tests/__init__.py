"""The tests; a package so that one test module can borrow a helper or a table from another."""

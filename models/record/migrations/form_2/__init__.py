"""What the second form adds, a module for each subject; `lay` of each is called by its step."""

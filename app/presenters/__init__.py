"""One object per page: state, signals, calls into models; no widgets."""

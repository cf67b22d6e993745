"""The rotor's drawing as a display list: plain facts in; lines, areas, words and marks out."""

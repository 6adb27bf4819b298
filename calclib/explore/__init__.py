"""What if: strength swept over one input, drawn so that the governing limit state and the headroom can be read."""

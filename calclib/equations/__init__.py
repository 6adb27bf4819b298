"""The equations: one function is one equation of one clause. Straight-line arithmetic on plain numbers or arrays.

The same lines are computed (floats), swept (arrays) and shown (through handcalcs). The renderer shows only
straight-line arithmetic truthfully, so `equation` refuses everything else when the module is imported: see
`calclib.equations.form`. An argument's unit, meaning and valid range stand once, in the docstring, and are read
from there.
"""

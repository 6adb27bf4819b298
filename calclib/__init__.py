"""Calcs of steel tension members: equations, limit states, detailing rules, and the document that says so."""

__version__ = "0.1.0"

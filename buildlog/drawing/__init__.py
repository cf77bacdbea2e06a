"""Drawings as SVG, from numbers and words: charts, gauges, envelopes, codes. No Django, no rows."""

"""Dates as 14 Mar 2026. Typed dates are read in one spelling only: 3/4/2026 is two days, depending on who reads it."""

DATE_FORMAT = "j M Y"
DATETIME_FORMAT = "j M Y H:i"
SHORT_DATE_FORMAT = "j M Y"
SHORT_DATETIME_FORMAT = "j M Y H:i"
TIME_FORMAT = "H:i"
DATE_INPUT_FORMATS = ["%Y-%m-%d"]

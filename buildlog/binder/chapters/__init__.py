"""The chapters of the binder, one file each; found by their CHAPTER."""

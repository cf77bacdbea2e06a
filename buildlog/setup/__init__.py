"""What stands in front of Django: standard library only."""

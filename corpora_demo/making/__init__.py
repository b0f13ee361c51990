"""What ``make.py`` needs to write the invented manuscripts."""

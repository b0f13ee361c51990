"""The version, in the one place that the build, the command and the JSON read it from."""

__version__ = "0.1.0"

"""What holds for all tests."""

from hypothesis import settings

# How long an example takes says how busy the machine is; speed is measured in tests/benchmarks.
settings.register_profile("crossfoot", deadline=None)
settings.load_profile("crossfoot")

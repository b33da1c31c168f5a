"""Numbers, dates and messages in words."""

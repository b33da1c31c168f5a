"""What a grid's model hands to its view besides texts."""

from PySide6.QtCore import Qt

KIND = int(Qt.ItemDataRole.UserRole) + 1
"""How a cell is painted: the kind of its content, a word of `sheet.Kind`."""
MARK = KIND + 1
"""`draft`, `issue` or nothing."""
COPIED = KIND + 2
"""The text for the clipboard."""
CHOICES = KIND + 3
"""What can be chosen in a cell, a list of texts; None where it is typed."""
UNIT = KIND + 4
"""What stands behind a label, such as `%`."""

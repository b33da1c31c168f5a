"""The open deal: its history, its file and its figures. QtCore alone, no widgets."""

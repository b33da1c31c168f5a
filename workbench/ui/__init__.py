"""The window: pages, grids, forms and the wall, over a session."""

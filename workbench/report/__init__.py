"""Documents: first a plain Document, then the PDF."""

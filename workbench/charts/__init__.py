"""Layout of every picture into plain shapes; no drawing toolkit is imported here."""

"""What the user says: frozen records, checks and changes. Imports nothing of ours."""

"""What happened, kept for good; SQLAlchemy lives here and nowhere else."""

"""What is told of an answer, in whatever language: which points, rows, sides and cautions."""

__all__: list[str] = []

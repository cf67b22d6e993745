"""What a formula says when an input lies outside the range in which it holds."""

__all__ = ["OutOfRangeError"]


class OutOfRangeError(ValueError):
    """An input lies outside the range in which the formula holds.

    The message names the input, its value and what it must do, so that a screen can show it at the
    field that caused it.
    """

    def __init__(self, name: str, value: object, requirement: str) -> None:
        self.name = name
        self.value = value
        self.requirement = requirement
        super().__init__(f"{name} = {value!r} must {requirement}")

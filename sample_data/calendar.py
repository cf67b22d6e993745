"""Working hours of the invented shops: a clock that only the story moves."""

import datetime

__all__ = ["ShopClock"]

_DAY = datetime.timedelta(days=1)
_SATURDAY = 5


class ShopClock:
    """The time at one shop, with its offset, which changes once in autumn."""

    def __init__(
        self, start: datetime.datetime, *, offset_hours: int, clocks_back_on: datetime.date
    ) -> None:
        self._now = start
        self._summer_hours = offset_hours
        self._clocks_back_on = clocks_back_on

    def wait(self, minutes: float) -> str:
        """Let minutes pass and tell the time."""
        self._now += datetime.timedelta(minutes=minutes)
        return self.told

    def next_working_day(self, hour: int, minute: int = 0) -> str:
        """Wait for a time on the next day that is no Saturday or Sunday."""
        self._now = self._now.replace(hour=hour, minute=minute, second=0) + _DAY
        while self._now.weekday() >= _SATURDAY:
            self._now += _DAY
        return self.told

    @property
    def told(self) -> str:
        """The time as the record writes it, with its offset."""
        hours = self._summer_hours - (self._now.date() >= self._clocks_back_on)
        zone = datetime.timezone(datetime.timedelta(hours=hours))
        return self._now.replace(tzinfo=zone).isoformat(timespec="seconds")

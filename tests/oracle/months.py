"""The calendar of a deal: months from closing, year rows, discount factors."""

from datetime import date, timedelta

LAST_YEAR = 41
MONTHS = 12 * LAST_YEAR

Row = dict[str, float]


def day_of(text: str) -> int:
    """Number of the day written as YYYY-MM-DD."""
    return date.fromisoformat(text).toordinal()


def add_months(day: int, months: int) -> int:
    """The same day of a later month; days past that month's end clip to its last day."""
    start = date.fromordinal(day)
    whole = start.year * 12 + (start.month - 1) + months
    year, month = divmod(whole, 12)
    next_first = date(year + (month == 11), (month + 1) % 12 + 1, 1)
    last = next_first - timedelta(days=1)
    return date(year, month + 1, min(start.day, last.day)).toordinal()


def month_starts(closing: int) -> list[int]:
    """First day of month 0, 1, …, MONTHS; the last entry closes the last month."""
    return [add_months(closing, m) for m in range(MONTHS + 1)]


def first_whole_month_after(starts: list[int], last_day: int) -> int:
    """First month that begins after the day; MONTHS where none does; 0 before closing."""
    for month in range(MONTHS):
        if starts[month] > last_day:
            return month
    return MONTHS


def month_holding(starts: list[int], day: int) -> int | None:
    """The month a day falls in, or None outside the 41 years."""
    for month in range(MONTHS):
        if starts[month] <= day < starts[month + 1]:
            return month
    return None


def year_of(month: int) -> int:
    """Deal year 1, 2, … of month 0, 1, …"""
    return month // 12 + 1


def row_value(row: Row | None, year: int) -> float:
    """An absent year follows the last one typed; an absent row is nought."""
    if not row:
        return 0.0
    while str(year) not in row:
        year -= 1
    return float(row[str(year)])


def growth_index(growth: Row | None, wear: Row | None = None) -> list[float]:
    """I(1) = 1, I(t+1) = I(t)(1+g_t)(1−δ_t), up to year 42; entry 0 is not used."""
    index = [0.0, 1.0]
    for year in range(1, LAST_YEAR + 1):
        up = (1 + row_value(growth, year)) * (1 - row_value(wear, year))
        index.append(index[year] * up)
    return index


def flow_date(timing: str, month: int) -> int:
    """Months after closing at which the property flow of a month counts."""
    year_begin = month // 12 * 12
    passed = {
        "month_end": month % 12 + 1,
        "month_start": month % 12,
        "year_end": 12,
        "mid_year": 6,
        "year_start": 0,
    }
    return year_begin + passed[timing]


def discount_table(returns: Row | None) -> list[float]:
    """D after 0, 1, …, MONTHS months: D(t−1)(1+r_t)^(−j/12)."""
    table = [1.0]
    for year in range(1, LAST_YEAR + 1):
        rate = row_value(returns, year)
        begin = table[12 * (year - 1)]
        for j in range(1, 12):
            table.append(begin * (1 + rate) ** (-j / 12))
        table.append(begin / (1 + rate))
    return table


def exit_discount(returns: Row | None, extra: float, hold: int) -> float:
    """Π 1/(1 + r_t + x) over the years of the hold."""
    factor = 1.0
    for year in range(1, hold + 1):
        factor /= 1 + row_value(returns, year) + extra
    return factor


def sum_years(monthly: list[float], years: int) -> list[float]:
    """Sums over deal years 1 … years."""
    return [sum(monthly[12 * t : 12 * t + 12]) for t in range(years)]


def nil() -> list[float]:
    """Nought in each month."""
    return [0.0] * MONTHS

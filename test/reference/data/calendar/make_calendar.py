"""Calendar facts from Python's datetime and zoneinfo, for the time index. Run: python make_calendar.py > calendar.json

weeks: [date, ISO year, ISO week] for every day around the turn of every year 1896..2105 and of years 1, 400, 9998.
months, business: distances counted by walking the calendar.
zones: for each zone, instants (ms) with the offset (minutes) around every change of 2015..2035, and wall times that
its clock skips or shows twice.
"""
import datetime as dt
import json
import zoneinfo

UTC = dt.timezone.utc
EPOCH = dt.datetime(1970, 1, 1, tzinfo=UTC)


def ms(moment):
    return round((moment - EPOCH) / dt.timedelta(milliseconds=1))


weeks = []
for year in [1, 400, *range(1896, 2106), 9998]:
    for offset in range(-4, 5):
        if year == 1 and offset < 0:
            continue
        day = dt.date(year, 1, 1) + dt.timedelta(days=offset)
        iso = day.isocalendar()
        weeks.append([day.isoformat(), iso.year, iso.week])

leap = [[y, (dt.date(y, 3, 1) - dt.date(y, 2, 1)).days] for y in [1600, 1700, 1896, 1900, 1904, 2000, 2023, 2024, 2100, 2400]]

business = []
day = dt.date(1999, 12, 20)
count = 0
while len(business) < 600:
    if day.weekday() < 5:
        business.append([day.isoformat(), count])
        count += 1
    day += dt.timedelta(days=1)

zones = []
for name in ["Europe/Oslo", "America/New_York", "Australia/Lord_Howe", "America/Sao_Paulo", "Asia/Kolkata", "Africa/Casablanca", "UTC"]:
    zone = zoneinfo.ZoneInfo(name)
    samples, skipped, twice = [], [], []
    hour = dt.datetime(2015, 1, 1, tzinfo=UTC)
    before = None
    while hour.year < 2036:
        offset = hour.astimezone(zone).utcoffset()
        if before is not None and offset != before:
            for minutes in (-90, -30, 0, 30, 90):
                at = hour + dt.timedelta(minutes=minutes)
                samples.append([ms(at), at.astimezone(zone).utcoffset() // dt.timedelta(minutes=1)])
            # Wall times around the change, classified by whether a round trip through UTC gives them back.
            for minutes in range(-180, 181, 15):
                wall = (hour.astimezone(zone) + dt.timedelta(minutes=minutes)).replace(tzinfo=None, fold=0)
                found = set()
                for fold in (0, 1):
                    instant = wall.replace(tzinfo=zone, fold=fold).astimezone(UTC)
                    if instant.astimezone(zone).replace(tzinfo=None) == wall:
                        found.add(ms(instant))
                text = wall.isoformat(timespec="minutes")
                if len(found) == 0:
                    skipped.append(text)
                elif len(found) == 2:
                    twice.append([text, *sorted(found)])
        before = offset
        hour += dt.timedelta(minutes=30)
    zones.append({"zone": name, "samples": samples, "skipped": sorted(set(skipped)), "twice": sorted(set(map(tuple, twice)))})

# Hours in each local day of two years, counted instant by instant.
oslo = zoneinfo.ZoneInfo("Europe/Oslo")
hours = {}
at = dt.datetime(2023, 1, 1, tzinfo=oslo).astimezone(UTC)
end = dt.datetime(2025, 1, 1, tzinfo=oslo).astimezone(UTC)
while at < end:
    key = at.astimezone(oslo).date().isoformat()
    hours[key] = hours.get(key, 0) + 1
    at += dt.timedelta(hours=1)
odd = {day: n for day, n in hours.items() if n != 24}

print(json.dumps({"weeks": weeks, "leap": leap, "business": business, "zones": zones, "oddDaysInOslo": odd, "daysInOslo": len(hours)}))

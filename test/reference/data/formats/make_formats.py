"""One table of 10 days in each binary format, written by the formats' usual Python libraries (pyarrow, openpyxl, sqlite3).

Columns: day (date), at (time stamp in UTC), x (double, one missing), n (64-bit integer), cents (decimal, two places),
flag (truth value, one missing), place (text, one missing). expected.json has the same values, doubles as shortest
decimals. Run: python make_formats.py (in this folder; needs pyarrow and openpyxl).
"""
import datetime as dt
import decimal
import json
import math
import sqlite3

import openpyxl
import pyarrow as pa
import pyarrow.feather as feather
import pyarrow.parquet as parquet

N = 10
days = [dt.date(2023, 12, 27) + dt.timedelta(days=i) for i in range(N)]
at = [dt.datetime(2023, 12, 27, 6, 30, tzinfo=dt.timezone.utc) + dt.timedelta(days=i) for i in range(N)]
x = [None if i == 4 else math.sqrt(i + 1) * 10 ** (i - 5) for i in range(N)]
n = [i * 1_000_003 - 7 for i in range(N)]
cents = [decimal.Decimal(i * 37 - 11).scaleb(-2) for i in range(N)]
flag = [None if i == 2 else i % 3 == 0 for i in range(N)]
place = [None if i == 7 else ["Quay", "Pier, west", 'the "Mole"', "größe"][i % 4] for i in range(N)]

table = pa.table({
    "day": pa.array(days, pa.date32()),
    "at": pa.array(at, pa.timestamp("us", tz="UTC")),
    "x": pa.array(x, pa.float64()),
    "n": pa.array(n, pa.int64()),
    "cents": pa.array(cents, pa.decimal128(9, 2)),
    "flag": pa.array(flag, pa.bool_()),
    "place": pa.array(place, pa.string()),
})
parquet.write_table(table, "days.parquet")
feather.write_feather(table, "days.arrow", compression="uncompressed")
feather.write_feather(table, "days-lz4.arrow", compression="lz4")
feather.write_feather(table, "days-zstd.arrow", compression="zstd")
long = pa.table({"t": pa.array(range(12_000), pa.int32()), "x": pa.array([7.0 if i % 1000 < 500 else i / 3 for i in range(12_000)])})
feather.write_feather(long, "long-lz4.arrow", compression="lz4", chunksize=12_000)
with pa.OSFile("days-stream.arrow", "wb") as sink, pa.ipc.new_stream(sink, table.schema) as writer:
    writer.write_table(table)

with open("days.jsonl", "w", encoding="utf-8") as out:
    for i in range(N):
        row = {"day": days[i].isoformat(), "at": at[i].isoformat(), "x": x[i], "n": n[i], "cents": float(cents[i]), "flag": flag[i], "place": place[i]}
        out.write(json.dumps(row, ensure_ascii=False) + "\n")

book = openpyxl.Workbook()
sheet = book.active
sheet.title = "notes"
sheet.append(["about", "this"])
sheet.append(["two", "sheets"])
sheet = book.create_sheet("days")
sheet.append(["day", "x", "n", "cents", "flag", "place"])
for i in range(N):
    sheet.append([days[i], x[i], n[i], float(cents[i]), flag[i], place[i]])
book.save("days.xlsx")

database = sqlite3.connect("days.sqlite")
database.execute("drop table if exists days")
database.execute("create table days (day text, x real, n integer, cents real, flag integer, place text)")
database.executemany("insert into days values (?, ?, ?, ?, ?, ?)",
                     [(days[i].isoformat(), x[i], n[i], float(cents[i]), None if flag[i] is None else int(flag[i]), place[i]) for i in range(N)])
database.commit()
database.execute("vacuum")
database.close()

json.dump({
    "day": [d.isoformat() for d in days], "x": x, "n": n, "cents": [float(c) for c in cents],
    "flag": [None if f is None else int(f) for f in flag], "place": place,
}, open("expected.json", "w", encoding="utf-8"), ensure_ascii=False, indent=1)

# Times in a workbook are fractions of a day; blank rows, a title above the names, an error value.
book = openpyxl.Workbook()
sheet = book.active
sheet.append(["Counts at the quay"])
sheet.append([])
sheet.append(["hour", "count"])
for i in range(8):
    sheet.append([dt.datetime(2024, 10, 26, i + 16), i])
    if i == 4:
        sheet.append([None, None])
sheet["B6"] = "#N/A"
sheet.append([dt.datetime(2024, 10, 27, 0), "eight"])
book.save("hours.xlsx")

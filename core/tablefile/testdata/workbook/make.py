"""Writes the workbooks that LibreOffice cannot be made to write, with openpyxl.

Usage: python3 make.py FOLDER. All data are invented.
"""
import datetime
import sys

import openpyxl

folder = sys.argv[1]


def save(name, rows, change=None):
    book = openpyxl.Workbook()
    sheet = book.active
    sheet.title = "data"
    for row in rows:
        sheet.append(row)
    if change:
        change(book, sheet)
    stamp = datetime.datetime(2024, 1, 1)
    book.properties.created = book.properties.modified = stamp
    book.save(f"{folder}/{name}.xlsx")


def epoch(book, sheet):
    book.epoch = openpyxl.utils.datetime.CALENDAR_MAC_1904
    sheet["B3"] = datetime.datetime(2024, 3, 2)


# openpyxl stores formulas and never their results.
save("formula-no-value", [["x [mm]", "cp"], [1, 0.5], [2, "=B2*2"], [3, 0.25]])
# A date in the system of 1904: the same day has another number.
save("date-1904", [["x [mm]", "ratio"], [1, 0.5], [2, 0.75], [3, 0.25]], epoch)

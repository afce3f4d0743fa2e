"""Writes the sources of the workbooks as flat OpenDocument sheets.

Usage: python3 sources.py FOLDER. LibreOffice turns them into xlsx and csv.
All data are invented. A cell is a number, a text, None for a blank, or one of
the forms below.
"""
import sys
from xml.sax.saxutils import escape, quoteattr

folder = sys.argv[1]

HEAD = """<?xml version="1.0" encoding="UTF-8"?>
<office:document xmlns:office="urn:oasis:names:tc:opendocument:xmlns:office:1.0"
 xmlns:table="urn:oasis:names:tc:opendocument:xmlns:table:1.0" xmlns:text="urn:oasis:names:tc:opendocument:xmlns:text:1.0"
 xmlns:style="urn:oasis:names:tc:opendocument:xmlns:style:1.0" xmlns:number="urn:oasis:names:tc:opendocument:xmlns:datastyle:1.0"
 xmlns:of="urn:oasis:names:tc:opendocument:xmlns:of:1.2" office:version="1.2"
 office:mimetype="application/vnd.oasis.opendocument.spreadsheet">
<office:automatic-styles>
<number:number-style style:name="N2"><number:number number:decimal-places="2" number:min-integer-digits="1"/></number:number-style>
<style:style style:name="two" style:family="table-cell" style:data-style-name="N2"/>
<number:date-style style:name="ND"><number:day/><number:text>. </number:text><number:month number:textual="true"/></number:date-style>
<style:style style:name="date" style:family="table-cell" style:data-style-name="ND"/>
</office:automatic-styles>
<office:body><office:spreadsheet>
"""
TAIL = "</office:spreadsheet></office:body></office:document>\n"


class Form:
    """A cell written out: attributes and the text shown."""

    def __init__(self, attributes, shown=""):
        self.attributes, self.shown = attributes, shown


def formula(text):
    return Form(f'table:formula="of:={escape(text)}" office:value-type="float"')


def date(iso):
    return Form(f'table:style-name="date" office:value-type="date" office:date-value="{iso}"')


def truth(value):
    return Form(f'office:value-type="boolean" office:boolean-value="{value}"')


def shown(value):
    return Form(f'table:style-name="two" office:value-type="float" office:value="{value}"')


def span(text, columns, rows=1):
    return Form(f'office:value-type="string" table:number-columns-spanned="{columns}" table:number-rows-spanned="{rows}"', text)


COVERED = "covered"


def cell(value):
    if value is None:
        return "<table:table-cell/>"
    if value is COVERED:
        return "<table:covered-table-cell/>"
    if isinstance(value, Form):
        return f"<table:table-cell {value.attributes}>" + (f"<text:p>{escape(value.shown)}</text:p>" if value.shown else "") + "</table:table-cell>"
    if isinstance(value, str):
        lines = "".join(f"<text:p>{escape(line)}</text:p>" for line in value.split("\n"))
        return f'<table:table-cell office:value-type="string">{lines}</table:table-cell>'
    return f'<table:table-cell office:value-type="float" office:value="{value!r}"/>'


def sheet(name, rows, hidden_rows=(), hidden_columns=()):
    width = max(len(row) for row in rows)
    text = f"<table:table table:name={quoteattr(name)}>\n"
    for column in range(width):
        text += '<table:table-column%s/>' % (' table:visibility="collapse"' if column in hidden_columns else "")
    for i, row in enumerate(rows):
        text += '\n<table:table-row%s>' % (' table:visibility="collapse"' if i in hidden_rows else "")
        text += "".join(cell(c) for c in row) or cell(None)
        text += "</table:table-row>"
    return text + "\n</table:table>\n"


def save(name, *sheets):
    with open(f"{folder}/{name}.fods", "w") as f:
        f.write(HEAD + "".join(sheets) + TAIL)


save("digits", sheet("data", [
    ["x [mm]", "Cp", "p [Pa]"],
    [0.1, shown(0.123456789012345), 101325.25],
    [0.2, shown(-1.5e-07), 1.23456789e+300],
    [0.333333333333333, shown(12345678.9012345), 0],
]))
save("kinds", sheet("data", [
    ["x", "flag", "value", "note"],
    [1, truth("true"), formula("[.A2]*2.5"), "a, \"b\""],
    [2, truth("false"), formula("1/0"), "#3 tap"],
    [3, truth("true"), formula("[.A4]+0.125"), "two\nlines"],
    [4, truth("false"), None, "last"],
]))
save("hash-label", sheet("data", [
    ["tap", "cp"],
    ["#1", 0.5],
    ["#2", 0.25],
    ["%3", -0.5],
]))
save("metadata", sheet("run", [
    ["Rig: channel 2"],
    ["Re:", 36000],
    ["U_ref:", 12.5, "m/s"],
    [],
    ["y [mm]", "U [m/s]", "k [m2/s2]"],
    [0.5, 3.25, 0.5],
    [1, 6.5, 0.75],
    [2, 9.75, 0.875],
]))
save("hidden", sheet("data", [
    ["x", "a", "b"],
    [1, 10, 100],
    [2, 20, 200],
    [3, 30, 300],
    [4, 40, 400],
], hidden_rows=(2, 3), hidden_columns=(1,)))
save("date", sheet("data", [[None, None, None], [None, "x [mm]", "ratio"]] + [
    [None, x, date("2024-03-02") if x == 12 else x / 8] for x in range(1, 14)
]))
save("sheets", sheet("upper", [["x", "cp"], [0, 1], [0.5, -0.75]]), sheet("lower, aft", [["x", "cp"], [0, 1], [0.5, 0.25]]), sheet("empty", [[]] * 1 + [[None]]))
save("ranges", sheet("both", [
    ["Two lines of one run"],
    [],
    ["x", "u", None, "x", "v"],
    [1, 10, None, 1.5, 0.1],
    [2, 20, None, 2.5, 0.2],
    [],
    ["y", "w"],
    [5, 50],
    [6, 60],
]))
save("merged", sheet("data", [
    [span("Taps of the second run", 5), COVERED, COVERED, COVERED, COVERED],
    [span("x [mm]", 1, 2), span("upper", 2), COVERED, span("lower", 2), COVERED],
    [COVERED, "Cp", "Cf", "Cp", "Cf"],
    [1, 0.5, 0.001, 0.25, 0.002],
    [2, 0.75, 0.003, 0.125, 0.004],
]))
save("gap-column", sheet("data", [
    [None, None, None, None],
    [None, "x", "y", "z"],
    [None, 1, None, 3.5],
    [None, 2, 5, None],
]))

#!/bin/sh
# Makes the workbooks of this folder anew: sources.py and LibreOffice write
# xlsx, and csv of the same data; make.py and openpyxl write the others.
# Archives hold the time of their writing, so the bytes differ each time.
set -e
cd "$(dirname "$0")"
python=${PYTHON:-/usr/bin/python3}
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
"$python" sources.py "$work"
soffice --headless -env:UserInstallation="file://$work/profile" --convert-to xlsx:"Calc MS Excel 2007 XML" --outdir "$work" "$work"/*.fods >/dev/null
soffice --headless -env:UserInstallation="file://$work/profile" --convert-to csv:"Text - txt - csv (StarCalc)":44,34,76,1,,0,false,false,false,false,false,-1 --outdir "$work" "$work"/*.xlsx >/dev/null
"$python" make.py "$work"
cp "$work"/*.xlsx "$work"/*.csv .

package main

import (
	"archive/zip"
	"bytes"
	"fmt"
	"strings"
)

// balanceBook is the workbook of the balance. Its parts are stored, not
// deflated, and carry no time, so that its bytes are the same everywhere.
func balanceBook() []byte {
	var rows strings.Builder
	row := func(n int, attributes string, cells ...string) {
		fmt.Fprintf(&rows, `<row r="%d"%s>`, n, attributes)
		for i, c := range cells {
			fmt.Fprintf(&rows, strings.Replace(c, "<c", `<c r="%c%d"`, 1), 'A'+i, n)
		}
		rows.WriteString("</row>")
	}
	text := func(t string) string { return `<c t="inlineStr"><is><t>` + t + `</t></is></c>` }
	number := func(t string) string { return "<c><v>" + t + "</v></c>" }
	row(1, "", text("run"), text("setting"), text("Cd"), text("Cl"), text("Cm"))
	for i := range balanceDrag {
		setting := number("1.5")
		if i == 2 {
			setting = `<c s="1"><v>46083</v></c>` // 3/2 that became 2 March 2026
		}
		row(i+2, "", number(integer(i+1)), setting, number(fixed(balanceDrag[i], 5)), number(fixed(balanceLift[i], 4)), number(fixed(balanceMoment[i], 4)))
	}
	row(7, ` hidden="1"`, number("6"), number("1.5"), number("0.03311"), number("0.3902"), number("-0.0377"))
	return archive([][2]string{
		{"[Content_Types].xml", declaration + `<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types"><Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/><Default Extension="xml" ContentType="application/xml"/><Override PartName="/xl/workbook.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml"/><Override PartName="/xl/worksheets/sheet1.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.worksheet+xml"/><Override PartName="/xl/styles.xml" ContentType="application/vnd.openxmlformats-officedocument.spreadsheetml.styles+xml"/></Types>`},
		{"_rels/.rels", declaration + `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/officeDocument" Target="xl/workbook.xml"/></Relationships>`},
		{"xl/workbook.xml", declaration + `<workbook xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main" xmlns:r="http://schemas.openxmlformats.org/officeDocument/2006/relationships"><sheets><sheet name="balance" sheetId="1" r:id="rId1"/></sheets></workbook>`},
		{"xl/_rels/workbook.xml.rels", declaration + `<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships"><Relationship Id="rId1" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/worksheet" Target="worksheets/sheet1.xml"/><Relationship Id="rId2" Type="http://schemas.openxmlformats.org/officeDocument/2006/relationships/styles" Target="styles.xml"/></Relationships>`},
		{"xl/styles.xml", declaration + `<styleSheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><fonts count="1"><font/></fonts><fills count="1"><fill/></fills><borders count="1"><border/></borders><cellStyleXfs count="1"><xf/></cellStyleXfs><cellXfs count="2"><xf/><xf numFmtId="14" applyNumberFormat="1"/></cellXfs></styleSheet>`},
		{"xl/worksheets/sheet1.xml", declaration + `<worksheet xmlns="http://schemas.openxmlformats.org/spreadsheetml/2006/main"><sheetData>` + rows.String() + `</sheetData></worksheet>`},
	})
}

const declaration = `<?xml version="1.0" encoding="UTF-8" standalone="yes"?>` + "\n"

// archive stores parts in order.
func archive(parts [][2]string) []byte {
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for _, part := range parts {
		w, err := z.CreateHeader(&zip.FileHeader{Name: part[0], Method: zip.Store})
		if err == nil {
			_, err = w.Write([]byte(part[1]))
		}
		if err != nil {
			panic(err) // a buffer takes everything
		}
	}
	if err := z.Close(); err != nil {
		panic(err)
	}
	return b.Bytes()
}

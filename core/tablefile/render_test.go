package tablefile

import (
	"fmt"
	"strings"
)

// render writes what was read in the form the corpus table uses: for each
// table its name and first line, its columns with units, and its rows, in
// which text follows NaN; then the notices as code:line.
func render(f File) (tables, notices string) {
	var text strings.Builder
	for _, t := range f.Tables {
		fmt.Fprintf(&text, "%q %d:", t.Name, t.Line)
		for c, column := range t.Columns {
			if c > 0 {
				text.WriteByte(';')
			}
			text.WriteString(" " + column.Name)
			if column.Unit != "" {
				text.WriteString(" [" + column.Unit + "]")
			}
		}
		for i := range t.Rows() {
			text.WriteString(" |")
			for _, column := range t.Columns {
				text.WriteString(" " + formatValue(column.Values[i]))
				if column.Text != nil {
					fmt.Fprintf(&text, "%q", column.Text[i])
				}
			}
		}
		text.WriteByte('\n')
	}
	var codes []string
	for _, n := range f.Notices {
		codes = append(codes, fmt.Sprintf("%s:%d", n.Code, n.Line))
	}
	return strings.TrimSuffix(text.String(), "\n"), strings.Join(codes, " ")
}

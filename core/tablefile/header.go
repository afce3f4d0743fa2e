package tablefile

import (
	"bytes"
	"fmt"
	"strconv"
	"strings"

	"weirmark/core/notice"
)

// numbered returns n columns without names from the file: c1, c2, ...
func numbered(n int) []Column {
	columns := make([]Column, n)
	for c := range columns {
		columns[c].Name = "c" + strconv.Itoa(c+1)
	}
	return columns
}

// named returns columns with the names, and units, that headers give. line is
// where they stand. A blank header leaves the number of the column as name;
// of equal names the later ones are renamed.
func (r *reader) named(headers []string, line int) []Column {
	columns := numbered(len(headers))
	taken := map[string]int{}
	blanks := 0
	for c, header := range headers {
		column := &columns[c]
		column.Header = strings.TrimSpace(header)
		name, unit, guess := splitUnit(column.Header)
		column.Unit = unit
		if name == "" {
			blanks++
		} else {
			column.Name = name
		}
		if guess {
			r.add(notice.New("unit-guessed", unit, name).At(line))
		}
		taken[column.Name]++
	}
	if blanks > 0 {
		r.add(notice.New("header-blank", blanks).At(line))
	}
	r.makeUnique(columns, taken, line)
	return columns
}

// makeUnique renames the later columns of equal names.
func (r *reader) makeUnique(columns []Column, taken map[string]int, line int) {
	renamed := map[string][]string{}
	var order []string
	seen, number := map[string]bool{}, map[string]int{}
	for c := range columns {
		name := columns[c].Name
		if !seen[name] {
			seen[name] = true
			continue
		}
		fresh := name
		for taken[fresh] > 0 {
			number[name]++
			fresh = fmt.Sprintf("%s (%d)", name, number[name]+1)
		}
		taken[fresh]++
		seen[fresh] = true
		columns[c].Name = fresh
		if renamed[name] == nil {
			order = append(order, name)
		}
		renamed[name] = append(renamed[name], fresh)
	}
	for _, name := range order {
		r.add(notice.New("header-duplicate", name, listNames(renamed[name])).At(line))
	}
}

// listNames quotes names for a notice, at most twenty of them.
func listNames(names []string) string {
	var list strings.Builder
	for i, name := range names {
		if i == 20 {
			fmt.Fprintf(&list, " and %d more", len(names)-i)
			break
		}
		if i > 0 {
			list.WriteString(", ")
		}
		list.WriteString(strconv.Quote(name))
	}
	return list.String()
}

// splitNames splits a line of names into n of them, or returns nil. It tries
// the separator of the rows, then the others: names are often written with
// another one, above all in comments.
func splitNames(line []byte, separator byte, n int) []string {
	for _, s := range []byte{separator, '\t', ';', ','} {
		if s != spaces {
			if names := namesBetween(line, s); len(names) == n {
				return names
			}
		}
	}
	if names := namesApart(line); len(names) == n {
		return names
	}
	if names := bareNames(line); len(names) == n {
		return names
	}
	return nil
}

// namesBetween splits at every separator outside quotes.
func namesBetween(line []byte, separator byte) []string {
	split := splitter{data: line, separator: separator}
	split.split(0)
	if split.openQuote >= 0 {
		return nil
	}
	names := make([]string, len(split.cells))
	for i, c := range split.cells {
		names[i] = string(split.bytes(c))
	}
	return names
}

// namesApart splits where at least two blanks or a tab stand.
func namesApart(line []byte) []string {
	text := strings.ReplaceAll(string(line), "\t", "  ")
	var names []string
	for _, part := range strings.Split(text, "  ") {
		if part = strings.TrimSpace(part); part != "" {
			names = append(names, strings.Trim(part, `"`))
		}
	}
	return names
}

// bareNames splits at blanks and commas. Quotes keep a name together, and a
// bracket that follows a name belongs to it.
func bareNames(line []byte) []string {
	var names []string
	for i := 0; i < len(line); {
		if i = skipSeparators(line, i); i == len(line) {
			break
		}
		name, end := bareName(line, i)
		if last := len(names) - 1; last >= 0 && isBracketed(name) && !isBracketed(names[last]) {
			names[last] += " " + name
		} else {
			names = append(names, name)
		}
		i = end
	}
	return names
}

func isBracketed(name string) bool {
	return strings.HasPrefix(name, "[") || strings.HasPrefix(name, "(")
}

// bareName returns the name that begins at i and the offset behind it.
func bareName(line []byte, i int) (name string, end int) {
	open := line[i]
	if open == '"' || open == '\'' {
		if n := bytes.IndexByte(line[i+1:], open); n >= 0 {
			return string(line[i+1 : i+1+n]), i + n + 2
		}
	}
	depth := 0
	for end = i; end < len(line); end++ {
		switch c := line[end]; {
		case c == '[' || c == '(':
			depth++
		case c == ']' || c == ')':
			depth--
		case depth <= 0 && end > i && (c == ',' || blankAt(line, end) > 0 || c == '"'):
			return string(line[i:end]), end
		}
	}
	return string(line[i:end]), end
}

// plausibleNames reports whether names can be names: most of them are text.
func plausibleNames(names []string) bool {
	numbers := 0
	for _, name := range names {
		if _, kind, _ := readCell([]byte(name)); kind == cellNumber {
			numbers++
		}
	}
	return len(names) > 0 && 2*numbers < len(names)
}

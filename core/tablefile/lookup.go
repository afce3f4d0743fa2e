package tablefile

import (
	"fmt"
	"strconv"
	"strings"

	"weirmark/core/notice"
)

// Table returns the table that ref names: the only one where ref is empty,
// else by exact name, then by number counted from one. The error is a
// notice.Notice: the stop notice of a refused file or of a zone left out, or
// table-needed, table-unknown, table-ambiguous.
func (f File) Table(ref string) (Table, error) {
	if len(f.Tables) == 0 {
		for _, n := range f.Notices {
			if n.Severity == notice.Stop {
				return Table{}, n
			}
		}
		return Table{}, notice.New("table-unknown", ref, "none").In(f.Name)
	}
	if ref == "" {
		if len(f.Tables) == 1 {
			return f.Tables[0], nil
		}
		return Table{}, notice.New("table-needed", len(f.Tables), f.listTables()).In(f.Name)
	}
	var found []int
	for i, t := range f.Tables {
		if t.Name == ref {
			found = append(found, i)
		}
	}
	switch len(found) {
	case 1:
		return f.Tables[found[0]], nil
	case 0:
		return f.tableByNumber(ref)
	}
	numbers := make([]string, len(found))
	for i, at := range found {
		numbers[i] = strconv.Itoa(at + 1)
	}
	return Table{}, notice.New("table-ambiguous", len(found), ref, strings.Join(numbers, ", ")).In(f.Name)
}

func (f File) tableByNumber(ref string) (Table, error) {
	for _, left := range f.leftOut {
		if left.name == ref {
			return Table{}, left.stop
		}
	}
	if n, err := strconv.Atoi(ref); err == nil && n >= 1 && n <= len(f.Tables) {
		return f.Tables[n-1], nil
	}
	return Table{}, notice.New("table-unknown", ref, f.listTables()).In(f.Name)
}

// listTables lists names and numbers of the tables, at most twenty.
func (f File) listTables() string {
	var list strings.Builder
	for i, t := range f.Tables {
		if i == 20 {
			fmt.Fprintf(&list, " and %d more", len(f.Tables)-i)
			break
		}
		if i > 0 {
			list.WriteString(", ")
		}
		if t.Name == "" {
			fmt.Fprintf(&list, "%d", i+1)
		} else {
			fmt.Fprintf(&list, "%q (%d)", t.Name, i+1)
		}
	}
	return list.String()
}

// Column returns the column that ref names: by exact name or header, then in
// any case, then with blanks and underscores left out, then by number counted
// from one, as #3. The error is a notice.Notice, column-unknown or
// column-ambiguous.
func (t Table) Column(ref string) (Column, error) {
	same := []func(name string) bool{
		func(name string) bool { return name == ref },
		func(name string) bool { return strings.EqualFold(name, ref) },
		func(name string) bool { return bare(name) == bare(ref) },
	}
	if strings.TrimSpace(ref) != "" {
		for _, is := range same {
			switch found := t.matching(is); len(found) {
			case 0:
			case 1:
				return t.Columns[found[0]], nil
			default:
				return Column{}, notice.New("column-ambiguous", ref, listNames(t.names(found)))
			}
		}
	}
	if number, ok := strings.CutPrefix(ref, "#"); ok {
		if n, err := strconv.Atoi(number); err == nil && n >= 1 && n <= len(t.Columns) {
			return t.Columns[n-1], nil
		}
	}
	return Column{}, notice.New("column-unknown", ref, listNames(t.names(nil)))
}

// matching returns the columns whose name satisfies is, or, where none does,
// those whose header as written does.
func (t Table) matching(is func(string) bool) []int {
	var byName, byHeader []int
	for i, c := range t.Columns {
		if is(c.Name) {
			byName = append(byName, i)
		}
		if c.Header != "" && is(c.Header) {
			byHeader = append(byHeader, i)
		}
	}
	if byName != nil {
		return byName
	}
	return byHeader
}

// names returns the names of some columns, of all for nil.
func (t Table) names(some []int) []string {
	var names []string
	if some == nil {
		for _, c := range t.Columns {
			names = append(names, c.Name)
		}
	}
	for _, i := range some {
		names = append(names, t.Columns[i].Name)
	}
	return names
}

// bare returns a name in lower case without blanks and underscores.
func bare(name string) string {
	return strings.ToLower(strings.Join(strings.FieldsFunc(name, func(c rune) bool {
		return c == ' ' || c == '_' || c == '\t' || c == '\u00a0'
	}), ""))
}

package message

import (
	"cmp"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// names lays out how the names of files are read.
func names(s *study.Study) Names {
	n := Names{Notices: []string{}, Pattern: Entry{Target: study.Target{Kind: "study", Field: "pattern"}, Label: "names are read as", Value: s.Pattern,
		By: study.Entered, Options: []Option{}, Hint: "the words case, model, grid, quantity, station where they stand in the names, * for anything: case-model-grid-*"}}
	for _, c := range s.Collisions() {
		n.Notices = append(n.Notices, notice.New("names-collide", strings.Join(c.Files, " and "), c.Run).Text)
	}
	lines := s.Names()
	if lines == nil {
		return n
	}
	parts := s.NameParts()
	n.Table = &Table{Title: "What the names say: " + quantity.Counted(len(lines), "file"), Head: append([]string{"file"}, parts...), Rows: [][]string{}}
	var strangers []string
	for _, l := range lines {
		row := []string{l.File}
		for _, part := range parts {
			row = append(row, cmp.Or(l.Said[part], "–"))
		}
		n.Table.Rows = append(n.Table.Rows, row)
		if l.Said == nil {
			strangers = append(strangers, l.File)
		}
	}
	if len(strangers) > 0 {
		n.Notices = append(n.Notices, notice.New("names-unfit", len(strangers), len(lines), strings.Join(strangers, ", ")).Text)
	}
	return n
}

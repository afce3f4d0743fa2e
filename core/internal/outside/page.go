package main

import (
	"bytes"
	_ "embed"
	"fmt"
	"slices"
	"strings"
	"text/template"
)

//go:embed page.md
var pageText string

var pageTemplate = template.Must(template.New("page.md").Parse(pageText))

// markRow is one row of the table of marks.
type markRow struct {
	Name, Meaning  string
	Checks, Passed int
}

// checkRow is one row of the table of checks.
type checkRow struct {
	check
	State state
}

// render returns the bytes of the page; states has one entry a check.
func render(checks []check, states []state) ([]byte, error) {
	if len(checks) != len(states) {
		return nil, fmt.Errorf("%d checks and %d states", len(checks), len(states))
	}
	content := struct {
		Summary string
		Marks   []markRow
		Rows    []checkRow
	}{Summary: summary(checks, states)}
	for _, m := range marks {
		row := markRow{Name: m.name, Meaning: m.meaning}
		for i, c := range checks {
			if slices.Contains(c.marks(), m.name) {
				row.Checks++
				if states[i] == passed {
					row.Passed++
				}
			}
		}
		content.Marks = append(content.Marks, row)
	}
	for i, c := range checks {
		content.Rows = append(content.Rows, checkRow{c, states[i]})
	}
	var page bytes.Buffer
	if err := pageTemplate.Execute(&page, content); err != nil {
		return nil, err
	}
	return page.Bytes(), nil
}

// summary returns the line of counts.
func summary(checks []check, states []state) string {
	shared, differ, memory := 0, 0, 0
	for _, c := range checks {
		if c.Shared != "" {
			shared++
		}
		if c.differs() {
			differ++
		}
		if c.Mark == "memory" {
			memory++
		}
	}
	text := fmt.Sprintf("%d checks: %d passed, %d failed", len(checks), count(states, passed), count(states, failed))
	if missing := count(states, notMade); missing > 0 {
		text += fmt.Sprintf(", %d not made", missing)
	}
	return text + fmt.Sprintf("; %d need the folder shared, %d rest on memory alone, %d state a known difference or limit.", shared, memory, differ)
}

// count returns how many of the states are the one given.
func count(states []state, one state) int {
	n := 0
	for _, s := range states {
		if s == one {
			n++
		}
	}
	return n
}

// difference returns the lines of want that are nowhere in got, marked "-",
// then those of got that are nowhere in want, marked "+". The summary and the
// rows it counts lie far apart; what is the same between them is not shown.
// Where only the order of lines differs, or how often one stands, it says so.
func difference(want, got string) string {
	old, now := strings.Split(want, "\n"), strings.Split(got, "\n")
	var b strings.Builder
	for _, line := range old {
		if !slices.Contains(now, line) {
			fmt.Fprintf(&b, "- %s\n", line)
		}
	}
	for _, line := range now {
		if !slices.Contains(old, line) {
			fmt.Fprintf(&b, "+ %s\n", line)
		}
	}
	if b.Len() == 0 {
		return "the same lines, in another order or number\n"
	}
	return b.String()
}

package main

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"path"
	"regexp"
	"slices"
	"strings"

	"github.com/gocarina/gocsv"
)

// check is one row of checks.csv.
type check struct {
	What       string `csv:"what"`
	Printed    string `csv:"printed"`
	Here       string `csv:"here"`
	Difference string `csv:"difference"`
	Source     string `csv:"source"`
	Mark       string `csv:"mark"`
	// Shared is "yes" where the test reads the folder shared, else empty.
	Shared string `csv:"shared"`
	// File is the test's file, from the root with slashes; Test is its function.
	File string `csv:"file"`
	Test string `csv:"test"`
}

// marks are the words for how far a source reaches, the farthest first.
var marks = []struct{ name, meaning string }{
	{"seen", "read in the primary source"},
	{"quoted", "read in a text that quotes the published number"},
	{"memory", "written from memory; the test says so beside it"},
	{"exact", "no published number: a published formula on a case that can be solved exactly"},
	{"scipy", "computed by reference.py; the versions stand in the head of the file"},
}

var (
	testFile = regexp.MustCompile(`^core/[\w/]+_test\.go$`)
	testName = regexp.MustCompile(`^Test\w+$`)
)

// read returns the rows of checks.csv. A row that the page could not show as it
// is, or whose test could not be run, is refused by its number.
func read(data []byte) ([]check, error) {
	reader := csv.NewReader(bytes.NewReader(data))
	reader.Comment = '#'
	var checks []check
	if err := gocsv.UnmarshalCSV(reader, &checks); err != nil {
		return nil, fmt.Errorf("checks.csv: %w", err)
	}
	if len(checks) == 0 {
		return nil, fmt.Errorf("checks.csv: no rows")
	}
	for i, c := range checks {
		if fault := c.fault(); fault != "" {
			return nil, fmt.Errorf("checks.csv: row %d (%s): %s", i+1, c.What, fault)
		}
	}
	return checks, nil
}

// fault says what is wrong with a row, or returns "".
func (c check) fault() string {
	for _, cell := range []string{c.What, c.Printed, c.Here, c.Difference, c.Source, c.Mark} {
		if cell == "" {
			return "an empty cell"
		}
		if strings.ContainsAny(cell, "|\n\r") {
			return fmt.Sprintf("a bar or a line break in %q", cell)
		}
	}
	for _, mark := range c.marks() {
		if !slices.ContainsFunc(marks, func(m struct{ name, meaning string }) bool { return m.name == mark }) {
			return fmt.Sprintf("unknown mark %q", mark)
		}
	}
	switch {
	case c.Shared != "" && c.Shared != "yes":
		return fmt.Sprintf("shared is %q, neither yes nor empty", c.Shared)
	case !testFile.MatchString(c.File):
		return fmt.Sprintf("no test file of the core: %q", c.File)
	case !testName.MatchString(c.Test):
		return fmt.Sprintf("no name of a test: %q", c.Test)
	}
	return ""
}

// marks returns the marks of a row, which are separated by ", ".
func (c check) marks() []string { return strings.Split(c.Mark, ", ") }

// folder returns the folder of the test, from the root with slashes.
func (c check) folder() string { return path.Dir(c.File) }

// differs says whether the row states a difference: one that is "none", with
// or without a remark after it, does not.
func (c check) differs() bool { return !strings.HasPrefix(c.Difference, "none") }

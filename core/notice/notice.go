// Package notice holds findings: what was seen, what was done or not done,
// and what to do about it. A notice travels with the result it qualifies.
//
// Every notice is built from one row of the message table, so a code has one
// severity and one wording wherever it appears.
package notice

import (
	"fmt"
	"slices"
	"strings"
)

// Severity says what a notice asks of the reader.
type Severity string

// The three severities, from blocking to recorded.
const (
	Stop Severity = "stop" // the input or result cannot be used
	Ask  Severity = "ask"  // an answer is needed before a statement is made
	Note Severity = "note" // recorded in the memo
)

// Notice is one finding. File, Line and Column say where it was seen; Line
// and Column count from one, and zero means "the whole file".
type Notice struct {
	Code     string   `json:"code"`
	Severity Severity `json:"severity"`
	Text     string   `json:"text"`
	File     string   `json:"file,omitempty"`
	Line     int      `json:"line"`
	Column   int      `json:"column,omitempty"`
}

// New returns the notice of code with its wording filled from args. An
// unknown code is a fault of our own and panics.
func New(code string, args ...any) Notice {
	row, ok := table[code]
	if !ok {
		panic("notice: no message for code " + code)
	}
	return Notice{Code: code, Severity: row.severity, Text: singular(fmt.Sprintf(row.format, args...))}
}

// counted are the nouns that messages count.
var counted = []string{"stations", "rows", "columns", "cells", "lines", "numbers", "grids", "values", "readings", "points", "names", "places", "bytes", "files", "independent samples"}

// singular writes "1 row" for "1 rows".
func singular(text string) string {
	for _, noun := range counted {
		plural, one := "1 "+noun, "1 "+strings.TrimSuffix(noun, "s")
		for from := 0; ; {
			i := strings.Index(text[from:], plural)
			if i < 0 {
				break
			}
			at := from + i
			from = at + len(one)
			if at > 0 && strings.ContainsAny(text[at-1:at], "0123456789.") || letterAt(text, at+len(plural)) {
				continue
			}
			text = text[:at] + one + text[at+len(plural):]
		}
	}
	return text
}

// letterAt reports whether a small letter goes on at a place of a text.
func letterAt(text string, at int) bool {
	return at < len(text) && text[at] >= 'a' && text[at] <= 'z'
}

// At returns n placed at a line of its file.
func (n Notice) At(line int) Notice {
	n.Line = line
	return n
}

// AtColumn returns n placed at a line and column of its file.
func (n Notice) AtColumn(line, column int) Notice {
	n.Line, n.Column = line, column
	return n
}

// In returns n placed in a file.
func (n Notice) In(file string) Notice {
	n.File = file
	return n
}

// Error makes a notice usable as an error: file, line and column first.
func (n Notice) Error() string {
	return n.Place() + n.Text
}

// Place returns "file:line:column: " as far as known, else "".
func (n Notice) Place() string {
	switch {
	case n.File == "" && n.Line == 0:
		return ""
	case n.Line == 0:
		return n.File + ": "
	case n.Column == 0:
		return fmt.Sprintf("%s:%d: ", n.File, n.Line)
	}
	return fmt.Sprintf("%s:%d:%d: ", n.File, n.Line, n.Column)
}

// Any reports whether one of list has severity s.
func Any(list []Notice, s Severity) bool {
	return slices.ContainsFunc(list, func(n Notice) bool { return n.Severity == s })
}

// Has reports whether one of list has the code.
func Has(list []Notice, code string) bool {
	return slices.ContainsFunc(list, func(n Notice) bool { return n.Code == code })
}

// Codes returns every code of the message table, sorted.
func Codes() []string {
	codes := make([]string, 0, len(table))
	for code := range table {
		codes = append(codes, code)
	}
	slices.Sort(codes)
	return codes
}

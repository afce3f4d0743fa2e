package memo

import "weirmark/core/study"

// Input is all that a memo is made of.
type Input struct {
	Report     study.Report
	Statements []Statement
	Figures    []Figure
	Product    string // name and version of the program
	Edition    string // edition of the methods; "" takes the report's
	Made       string // time handed over by the host, may be empty
	Hash       string // SHA-256 of the study, may be empty
}

// Statement is the careful sentence of one cell. Status is a word for its
// state; "" takes "withheld", "provisional" or "stated" from the cell.
type Statement struct {
	Case, Quantity, Model, Status string
	Phrases                       []study.Phrase
}

// Figure is a drawing with its numbers. An empty Model stands for all models
// of the case and quantity and is printed with the first of them; a figure of
// no case belongs to the summary. SVG is a whole svg element.
type Figure struct {
	Case, Quantity, Model string
	ID                    string
	Title, Caption, Alt   string
	SVG                   string
	Head                  []string
	Rows                  [][]string
}

// key names a cell for statements and figures.
type key struct{ Case, Quantity, Model string }

func keyOf(c study.Cell) key { return key{c.Case, c.Quantity, c.Model} }

// statementsOf returns the statements by cell; the first one of a cell counts.
func statementsOf(list []Statement) map[key]Statement {
	all := make(map[key]Statement, len(list))
	for _, s := range list {
		k := key{s.Case, s.Quantity, s.Model}
		if _, taken := all[k]; !taken {
			all[k] = s
		}
	}
	return all
}

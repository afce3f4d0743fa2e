package message

import (
	"cmp"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// ReadReply says what a file holds; values are as written.
type ReadReply struct {
	File   string `json:"file"`
	SHA256 string `json:"sha256"`
	// Where the request's value is "card": what the file states of itself, and
	// of each table what was read and what it looks like, in words.
	Stated  []Stated    `json:"stated,omitempty"`
	Cards   []string    `json:"cards,omitempty"`
	Tables  []ReadTable `json:"tables"`
	Notices []Finding   `json:"notices"`
}

// Stated is a line "key: value" of a file.
type Stated struct {
	Key   string `json:"key"`
	Value string `json:"value"`
	Table string `json:"table,omitempty"` // the table it stands above
	Line  int    `json:"line"`
}

// Finding is a notice as the command prints it.
type Finding struct {
	Code     string          `json:"code"`
	Severity notice.Severity `json:"severity"`
	Text     string          `json:"text"`
	Line     int             `json:"line"` // 0 where it is of the whole file
}

// findings returns notices as the command prints them; with several files
// the text begins with the name of its own.
func findings(list []notice.Notice, named bool) []Finding {
	out := []Finding{}
	for _, n := range list {
		text := n.Text
		if named && n.File != "" {
			text = n.File + ": " + text
		}
		out = append(out, Finding{n.Code, n.Severity, text, n.Line})
	}
	return out
}

// ReadTable is one table.
type ReadTable struct {
	Name    string       `json:"name"`
	Rows    int          `json:"rows"`
	Columns []ReadColumn `json:"columns"`
}

// ReadColumn is one column; a cell that holds no number is null.
type ReadColumn struct {
	Name   string             `json:"name"`
	Unit   string             `json:"unit"`
	Values []quantity.Written `json:"values"`
}

// readFile reads one attached file.
func readFile(_ *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	name, data, err := attachedFile(q, attached, 0)
	if err != nil {
		return nil, err
	}
	f := tablefile.Read(name, data, tablefile.Options{})
	reply := &ReadReply{File: f.Name, SHA256: f.SHA256, Tables: []ReadTable{}, Notices: findings(f.Notices, false)}
	if q.Value == "card" {
		for _, m := range f.Meta {
			reply.Stated = append(reply.Stated, Stated{m.Key, m.Value, m.Table, m.Line})
		}
		reply.Cards = readCards(name, data, f)
	}
	for _, t := range f.Tables {
		table := ReadTable{Name: t.Name, Rows: t.Rows(), Columns: []ReadColumn{}}
		for _, c := range t.Columns {
			values := make([]quantity.Written, len(c.Values))
			for i, v := range c.Values {
				values[i] = quantity.Written(v)
			}
			table.Columns = append(table.Columns, ReadColumn{c.Name, c.Unit, values})
		}
		reply.Tables = append(reply.Tables, table)
	}
	r.Read = reply
	switch {
	case f.Refused():
		r.Status = Refused
	case notice.Any(f.Notices, notice.Stop):
		r.Status = Incomplete // a part of the file could not be read
	}
	return nil, nil
}

// readCards says of each table what the page's slip would say.
func readCards(name string, data []byte, f tablefile.File) []string {
	n := study.New()
	var cards []string
	for i, p := range n.Add(name, data, f, "") {
		t := f.Tables[i]
		text := readWords(t, "") + " It"
		for j, e := range slipEntries(n, p, t) {
			if e.Value == "" && !needed(p, e.Target.Field) {
				continue
			}
			if j > 0 {
				text += ","
			}
			text += " " + e.Label + " " + cmp.Or(labelOf(e), "not given")
			if e.By == study.Guessed {
				text += " (guessed)"
			}
		}
		cards = append(cards, text+".")
	}
	return cards
}

// labelOf is the value of an entry as its options word it.
func labelOf(e Entry) string {
	for _, o := range e.Options {
		if o.Value == e.Value {
			return o.Label
		}
	}
	return e.Value
}

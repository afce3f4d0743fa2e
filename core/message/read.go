package message

import (
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// ReadReply says what a file holds; values are as written.
type ReadReply struct {
	File    string      `json:"file"`
	SHA256  string      `json:"sha256"`
	Tables  []ReadTable `json:"tables"`
	Notices []Finding   `json:"notices"`
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

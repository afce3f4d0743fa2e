package message

import (
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// ReadReply says what a file holds; values are as written.
type ReadReply struct {
	File    string          `json:"file"`
	SHA256  string          `json:"sha256"`
	Tables  []ReadTable     `json:"tables"`
	Notices []notice.Notice `json:"notices"`
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
	reply := &ReadReply{File: f.Name, SHA256: f.SHA256, Tables: []ReadTable{}, Notices: append([]notice.Notice{}, f.Notices...)}
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

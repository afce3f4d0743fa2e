package tablefile

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
	"unicode/utf8"

	"weirmark/core/notice"
)

// The form of a profile that other programs may write:
//
//	{"format": "weirmark profile", "version": 1, "name": "tunnel, x/H = 2",
//	 "columns": [{"name": "y", "unit": "mm", "values": [0.5, 1, null]},
//	             {"name": "U", "unit": "m/s", "values": [1.2, 3.4, 5.6]}],
//	 "conditions": {"Re": 36000, "rig": "channel 2"}}
//
// format and version come first. Columns have equal lengths; null is a missing
// value and a text is a label. name, unit and conditions may be left out.
const (
	profileFormat  = "weirmark profile"
	profileVersion = 1
)

// isObject reports whether text begins as a JSON object.
func isObject(text []byte) bool {
	text = bytes.TrimLeft(text, " \t\r\n")
	return len(text) > 0 && text[0] == '{'
}

// profileReader walks the JSON text of a profile.
type profileReader struct {
	*reader
	d        *json.Decoder
	table    Table
	gathers  []gather
	lines    []int32 // of the values of the first column
	seen     map[string]bool
	counted  int // offset up to which lines are counted
	lineThen int // line of that offset
}

// profile reads the text as a profile.
func (r *reader) profile() {
	p := &profileReader{reader: r, d: json.NewDecoder(bytes.NewReader(r.data)), seen: map[string]bool{}, lineThen: 1}
	p.d.UseNumber()
	err := p.read()
	var told notice.Notice
	switch {
	case err == nil:
		p.finish()
	case errors.As(err, &told):
		r.refuse(told)
	default:
		at := int(p.d.InputOffset())
		var syntax *json.SyntaxError
		if errors.As(err, &syntax) {
			at = max(0, int(syntax.Offset)-1)
		}
		if errors.Is(err, io.EOF) || errors.Is(err, io.ErrUnexpectedEOF) {
			at, err = len(r.data), errors.New("it ends early")
		}
		line, column := p.place(at)
		r.refuse(notice.New("profile-damaged", err.Error()).AtColumn(line, column))
	}
}

// place returns the line and the character of the line at an offset.
func (p *profileReader) place(at int) (line, column int) {
	before := p.data[:min(at, len(p.data))]
	return 1 + bytes.Count(before, []byte("\n")), 1 + utf8.RuneCount(before[bytes.LastIndexByte(before, '\n')+1:])
}

// lineHere returns the line of the token just read. It counts on from where it
// was asked before, so that all calls together walk the text once.
func (p *profileReader) lineHere() int {
	at := int(p.d.InputOffset())
	p.lineThen += bytes.Count(p.data[p.counted:at], []byte("\n"))
	p.counted = at
	return p.lineThen
}

func (p *profileReader) read() error {
	if err := p.delim('{'); err != nil {
		return err
	}
	for i := 0; p.d.More(); i++ {
		key, err := p.key("")
		if err != nil {
			return err
		}
		if i == 0 && key != "format" || i == 1 && key != "version" {
			return notice.New("json-form", key)
		}
		if err := p.field(key); err != nil {
			return err
		}
	}
	if err := p.delim('}'); err != nil {
		return err
	}
	if !p.seen["version"] {
		return notice.New("json-form", "nothing")
	}
	if _, err := p.d.Token(); err != io.EOF {
		return errors.New("something follows the profile")
	}
	return p.check()
}

// field reads the value of a field of the profile.
func (p *profileReader) field(key string) (err error) {
	switch key {
	case "format":
		var format string
		if format, err = p.text(key); err == nil && format != profileFormat {
			return notice.New("json-form", fmt.Sprintf("format %q", format))
		}
	case "version":
		var number json.Number
		if number, err = p.number(key); err == nil {
			if version, bad := number.Int64(); bad != nil || version != profileVersion {
				return notice.New("profile-newer", number.String(), profileVersion)
			}
		}
	case "name":
		p.table.Name, err = p.text(key)
	case "columns":
		err = p.columns()
	case "conditions":
		err = p.conditions()
	default:
		return p.unknown(key)
	}
	return err
}

// unknown passes over a field that profiles do not have.
func (p *profileReader) unknown(key string) error {
	p.add(notice.New("profile-field", key).At(p.lineHere()))
	var value json.RawMessage
	return p.d.Decode(&value)
}

func (p *profileReader) columns() error {
	if err := p.delim('['); err != nil {
		return err
	}
	for p.d.More() {
		if len(p.table.Columns) == maxColumns {
			return notice.New("columns-many", maxColumns+1, maxColumns)
		}
		if err := p.column(); err != nil {
			return err
		}
	}
	return p.delim(']')
}

func (p *profileReader) column() error {
	if err := p.delim('{'); err != nil {
		return err
	}
	var c Column
	var g gather
	where := fmt.Sprintf("column %d: ", len(p.table.Columns)+1)
	for p.d.More() {
		key, err := p.key(where)
		if err != nil {
			return err
		}
		switch key {
		case "name":
			c.Name, err = p.text(where + key)
			c.Header = c.Name
		case "unit":
			c.Unit, err = p.text(where + key)
		case "values":
			err = p.values(&c, &g)
		default:
			err = p.unknown(key)
		}
		if err != nil {
			return err
		}
	}
	p.table.Columns, p.gathers = append(p.table.Columns, c), append(p.gathers, g)
	for _, key := range []string{"name", "values"} {
		if !p.seen[where+key] || c.Name == "" {
			return fmt.Errorf("%sno %s", where, key)
		}
	}
	return p.delim('}')
}

// values reads the values of a column.
func (p *profileReader) values(c *Column, g *gather) error {
	if err := p.delim('['); err != nil {
		return err
	}
	first := len(p.table.Columns) == 0
	for p.d.More() {
		token, err := p.d.Token()
		if err != nil {
			return err
		}
		line := p.lineHere()
		if line == 0 || line > math.MaxInt32 {
			return errors.New("too many lines")
		}
		if first {
			p.lines = append(p.lines, int32(line))
		}
		if err := p.value(c, g, token, line); err != nil {
			return err
		}
	}
	return p.delim(']')
}

// value adds one value to a column.
func (p *profileReader) value(c *Column, g *gather, token json.Token, line int) error {
	value, label := math.NaN(), ""
	switch v := token.(type) {
	case json.Number:
		label = v.String()
		number, kind, _ := readCell([]byte(label))
		if kind == cellNumber {
			value = number
		} else {
			g.overflow.tell(line, []byte(label))
			g.missing.tell(line, []byte(label))
		}
	case nil:
		g.missing.tell(line, []byte("null"))
	case string:
		label = v
		g.text = true
		if isDate([]byte(v)) {
			g.date.tell(line, []byte(v))
		}
		g.missing.tell(line, []byte(v))
	default:
		return fmt.Errorf("a value is %v where a number, a text or null is expected", token)
	}
	if g.text && c.Text == nil {
		c.Text = make([]string, len(c.Values), len(c.Values)+8)
		for i, v := range c.Values {
			if !math.IsNaN(v) {
				c.Text[i] = formatValue(v)
			}
		}
	}
	if g.text {
		c.Text = append(c.Text, label)
	}
	c.Values = append(c.Values, value)
	return nil
}

// conditions reads an object of numbers and texts.
func (p *profileReader) conditions() error {
	if err := p.delim('{'); err != nil {
		return err
	}
	for p.d.More() {
		key, err := p.key("conditions: ")
		if err != nil {
			return err
		}
		token, err := p.d.Token()
		if err != nil {
			return err
		}
		switch v := token.(type) {
		case json.Number:
			p.state(key, v.String(), p.lineHere())
		case string:
			p.state(key, v, p.lineHere())
		default:
			return fmt.Errorf("condition %q is no number and no text", key)
		}
	}
	return p.delim('}')
}

// key reads the next key of an object, which must be new in it.
func (p *profileReader) key(where string) (string, error) {
	token, err := p.d.Token()
	if err != nil {
		return "", err
	}
	key := token.(string) // the decoder takes nothing else for a key
	if p.seen[where+key] {
		return "", fmt.Errorf("%q is given twice", key)
	}
	p.seen[where+key] = true
	return key, nil
}

func (p *profileReader) delim(want json.Delim) error {
	token, err := p.d.Token()
	if err != nil {
		return err
	}
	if token != want {
		return fmt.Errorf("%v where %v is expected", token, want)
	}
	return nil
}

func (p *profileReader) text(key string) (string, error) {
	token, err := p.d.Token()
	if err != nil {
		return "", err
	}
	text, ok := token.(string)
	if !ok {
		return "", fmt.Errorf("%s is no text", key)
	}
	return text, nil
}

func (p *profileReader) number(key string) (json.Number, error) {
	token, err := p.d.Token()
	if err != nil {
		return "", err
	}
	number, ok := token.(json.Number)
	if !ok {
		return "", fmt.Errorf("%s is no number", key)
	}
	return number, nil
}

// check holds the columns to the form.
func (p *profileReader) check() error {
	names := map[string]bool{}
	for _, c := range p.table.Columns {
		if names[c.Name] {
			return fmt.Errorf("two columns are named %q", c.Name)
		}
		names[c.Name] = true
		if n := p.table.Rows(); len(c.Values) != n {
			return fmt.Errorf("column %q has %d values and the first has %d", c.Name, len(c.Values), n)
		}
	}
	return nil
}

// finish adds the table with its notices.
func (p *profileReader) finish() {
	if p.table.Rows() == 0 {
		p.add(notice.New("file-empty", plural(len(p.table.Columns), "column")))
		return
	}
	p.table.Line = int(p.lines[0])
	p.table.runs = runsOf(p.lines, 1)
	b := &builder{r: p.reader, columns: p.gathers}
	for c, column := range p.table.Columns {
		b.describe(&p.table, c, column)
	}
	p.addTable(p.table, b)
}

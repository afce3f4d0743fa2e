package study

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"maps"
	"reflect"
	"slices"
	"sort"
	"strings"

	"weirmark/core/notice"
)

// New returns an empty study.
func New() *Study {
	return &Study{Format: Format, Version: Version, Files: []File{}, Slips: []Slip{}, Questions: []Question{}, Log: []Entry{}}
}

// Load reads a study document. The error is a notice that says why nothing
// was loaded; notices name what was kept but not understood.
func Load(data []byte) (*Study, []notice.Notice, error) {
	var fields map[string]json.RawMessage
	if err := json.Unmarshal(data, &fields); err != nil {
		return nil, nil, placed(notice.New("study-format"), data, err)
	}
	var head struct {
		Format  string `json:"format"`
		Version int    `json:"version"`
	}
	if err := json.Unmarshal(data, &head); err != nil || head.Format != Format {
		return nil, nil, placed(notice.New("study-format"), data, err)
	}
	if head.Version > Version {
		return nil, nil, notice.New("study-newer", head.Version, Version)
	}
	s := New()
	if err := json.Unmarshal(data, s); err != nil {
		return nil, nil, placed(notice.New("study-damaged", reason(err)), data, err)
	}
	s.fillGaps()
	return s, s.keepUnknown(fields), nil
}

// reason says a JSON error without the names of Go types.
func reason(err error) string {
	if wrong, ok := err.(*json.UnmarshalTypeError); ok {
		return "field " + wrong.Field + " holds a " + wrong.Value
	}
	return err.Error()
}

// placed gives a notice the line and column at which JSON went wrong.
func placed(n notice.Notice, data []byte, err error) notice.Notice {
	offset := int64(-1)
	switch e := err.(type) {
	case *json.SyntaxError:
		offset = e.Offset
	case *json.UnmarshalTypeError:
		offset = e.Offset
	}
	if offset < 0 || offset > int64(len(data)) {
		return n
	}
	before := data[:offset]
	line := 1 + bytes.Count(before, []byte("\n"))
	column := len(before) - bytes.LastIndexByte(before, '\n') - 1
	n.Line, n.Column = line, max(column, 1)
	return n
}

// fillGaps gives a hand-written document the choices it leaves out.
func (s *Study) fillGaps() {
	for i := range s.Questions {
		c := &s.Questions[i].Choices
		d := DefaultChoices()
		if c.K == 0 {
			c.K = d.K
		}
		if c.KNum == 0 {
			c.KNum = d.KNum
		}
		if c.Formal == 0 {
			c.Formal = d.Formal
		}
		if c.Dimension == 0 {
			c.Dimension = d.Dimension
		}
		if c.Interpolation == "" {
			c.Interpolation = d.Interpolation
		}
		if c.Gap == 0 {
			c.Gap = d.Gap
		}
	}
}

// keepUnknown keeps the top fields of a document that this edition does not
// know, so that saving loses nothing.
func (s *Study) keepUnknown(fields map[string]json.RawMessage) []notice.Notice {
	known := map[string]bool{}
	t := reflect.TypeOf(*s)
	for i := range t.NumField() {
		name, _, _ := strings.Cut(t.Field(i).Tag.Get("json"), ",")
		known[name] = true
	}
	names := []string{}
	for name := range fields {
		if !known[name] {
			names = append(names, name)
		}
	}
	sort.Strings(names)
	var notices []notice.Notice
	for _, name := range names {
		if s.unknown == nil {
			s.unknown = map[string]json.RawMessage{}
		}
		s.unknown[name] = fields[name]
		notices = append(notices, notice.New("study-field", name))
	}
	return notices
}

// Save returns the study document: indented JSON, the same bytes for the same
// study.
func (s *Study) Save() ([]byte, error) {
	var b bytes.Buffer
	enc := json.NewEncoder(&b)
	enc.SetEscapeHTML(false)
	if len(s.unknown) == 0 {
		enc.SetIndent("", " ")
		err := enc.Encode(s)
		return b.Bytes(), err
	}
	if err := enc.Encode(s); err != nil {
		return nil, err
	}
	whole := bytes.TrimSpace(b.Bytes())
	rest, err := json.Marshal(s.unknown)
	if err != nil {
		return nil, err
	}
	joined := append(whole[:len(whole)-1:len(whole)-1], ',')
	joined = append(joined, rest[1:]...)
	var out bytes.Buffer
	if err := json.Indent(&out, joined, "", " "); err != nil {
		return nil, err
	}
	out.WriteByte('\n')
	return out.Bytes(), nil
}

// Hash returns the SHA-256 of data in hexadecimal.
func Hash(data []byte) string {
	sum := sha256.Sum256(data)
	return hex.EncodeToString(sum[:])
}

// Clone returns a copy that shares only the bytes of files.
func (s *Study) Clone() *Study {
	c := *s
	c.Files = append([]File{}, s.Files...)
	c.Slips = append([]Slip{}, s.Slips...)
	c.Log = append([]Entry{}, s.Log...)
	c.Application = append([]Condition{}, s.Application...)
	c.Quality = append([]Quality(nil), s.Quality...)
	c.Cases = append([]Card{}, s.Cases...)
	for i := range c.Cases {
		c.Cases[i].References = append([]ReferenceQuantity{}, c.Cases[i].References...)
		c.Cases[i].Axes = append([]Axes(nil), c.Cases[i].Axes...)
	}
	if s.Code != nil {
		code := *s.Code
		c.Code = &code
	}
	c.Questions = append([]Question{}, s.Questions...)
	for i := range c.Questions {
		q := &c.Questions[i]
		q.Sources = append([]Source{}, q.Sources...)
		q.Excluded = append([]Exclusion{}, q.Excluded...)
		q.Conditions = append([]Matching{}, q.Conditions...)
		q.Regions = append([]Region{}, q.Regions...)
		q.Runs = append([]RunEntry(nil), q.Runs...)
		if q.StandIn != nil {
			other := *q.StandIn
			q.StandIn = &other
		}
		q.Anchors = append([]Anchor{}, q.Anchors...)
		if q.Scores != nil {
			scores := *q.Scores
			scores.Criteria = slices.Clone(scores.Criteria)
			q.Scores = &scores
		}
		if q.Family != nil {
			family := *q.Family
			q.Family = &family
		}
		q.Answers = maps.Clone(q.Answers)
		if q.Requirement != nil {
			r := *q.Requirement
			q.Requirement = &r
		}
	}
	return &c
}

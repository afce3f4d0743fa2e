package study

import (
	"encoding/json"
	"strconv"
	"strings"

	"weirmark/core/tablefile"
)

// readingText tells apart the ways one file can be read.
func (f *File) readingText() string {
	if f == nil || f.Reading == nil {
		return ""
	}
	text, err := json.Marshal(f.Reading)
	if err != nil {
		panic("study: reading options cannot be written: " + err.Error()) // texts and whole numbers only
	}
	return string(text)
}

// Key names a file with the way it is read, for hosts that keep what they
// read.
func (f File) Key() string { return f.SHA256 + " " + f.Name + " " + f.readingText() }

// ReadingFields are the answers a person can give about a file.
var ReadingFields = []string{"decimal", "delimiter", "sentinels", "data", "hidden", "uneven", "zones", "range", "guides"}

// ReadingValue returns an answer as text, lists with commas.
func (f *File) ReadingValue(field string) string {
	if f.Reading == nil {
		return ""
	}
	o := f.Reading
	switch field {
	case "decimal":
		return o.Decimal
	case "delimiter":
		return o.Delimiter
	case "sentinels":
		return strings.Join(o.Sentinels, " ")
	case "data":
		return strings.Join(o.Data, " ")
	case "hidden":
		return o.Hidden
	case "uneven":
		return o.Uneven
	case "zones":
		return o.Zones
	case "range":
		return o.Range
	case "guides":
		texts := make([]string, len(o.Guides))
		for i, g := range o.Guides {
			texts[i] = strconv.Itoa(g)
		}
		return strings.Join(texts, " ")
	}
	return ""
}

// enterReading records an answer; the file is read anew with it. The reader
// says what it cannot follow.
func (s *Study) enterReading(t Target, value string) (string, error) {
	f := s.File(t.ID)
	if f == nil {
		return "", refuse("the reading of a file", t.ID)
	}
	if code, isAnswer := strings.CutPrefix(t.Field, "answer."); isAnswer {
		return f.answer(code, value), nil
	}
	before := f.ReadingValue(t.Field)
	o := tablefile.Options{}
	if f.Reading != nil {
		o = *f.Reading
	}
	words := strings.Fields(value)
	switch t.Field {
	case "decimal":
		o.Decimal = value
	case "delimiter":
		o.Delimiter = value
	case "sentinels":
		o.Sentinels = words
	case "data":
		o.Data = words
	case "hidden":
		o.Hidden = value
	case "uneven":
		o.Uneven = value
	case "zones":
		o.Zones = value
	case "range":
		o.Range = value
	case "guides":
		o.Guides = nil
		for _, w := range words {
			n, err := strconv.Atoi(w)
			if err != nil || n < 1 {
				return before, refuse("the guides, numbers of characters,", value)
			}
			o.Guides = append(o.Guides, n)
		}
	default:
		return before, refuse("the reading of a file", t.Field)
	}
	f.Reading = &o
	return before, nil
}

// answer records an answer to a question of the reader; an empty one opens
// the question again.
func (f *File) answer(code, value string) (before string) {
	before = f.Answers[code]
	answers := map[string]string{}
	for k, v := range f.Answers {
		answers[k] = v
	}
	answers[code] = value
	if value == "" {
		delete(answers, code)
	}
	f.Answers = answers
	return before
}

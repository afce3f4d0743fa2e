package study

import (
	"regexp"
	"slices"
	"strings"
)

// A pattern of names says how the names of files are read: the words case,
// model, grid, quantity and station stand for a part of letters, digits, dots
// and signs, a star for anything, every other character for itself. Endings
// of names do not take part where the pattern has none.

// nameParts are the words of a pattern, in the order in which they are shown.
var nameParts = []string{"case", "model", "grid", "quantity", "station"}

// namePart is what a word of a pattern stands for: as few characters as the
// rest of the pattern leaves.
const namePart = `([\p{L}\p{N}.+=]+?)`

// Naming is a pattern made ready.
type Naming struct {
	parts []string // the word behind each group
	whole *regexp.Regexp
	ended bool // the pattern has an ending of its own
}

// ParseNaming reads a pattern. ok is false where it names no part, names one
// twice, or sets two parts side by side, so that no name tells where one ends.
func ParseNaming(pattern string) (n Naming, ok bool) {
	text := "^"
	for at, beside := 0, false; at < len(pattern); {
		word := wordAt(pattern[at:])
		switch {
		case word != "":
			if beside || n.has(word) {
				return Naming{}, false
			}
			n.parts = append(n.parts, word)
			text += namePart
			at, beside = at+len(word), true
		case pattern[at] == '*':
			text += ".*?"
			at, beside = at+1, false
		default:
			text += regexp.QuoteMeta(pattern[at : at+1])
			n.ended = n.ended || pattern[at] == '.'
			at, beside = at+1, false
		}
	}
	whole, err := regexp.Compile("(?is)" + text + "$")
	n.whole = whole
	return n, err == nil && len(n.parts) > 0
}

func wordAt(text string) string {
	for _, word := range nameParts {
		if strings.HasPrefix(text, word) {
			return word
		}
	}
	return ""
}

func (n Naming) has(word string) bool {
	for _, have := range n.parts {
		if have == word {
			return true
		}
	}
	return false
}

// Of returns what a name says, by the words of the pattern; nil where the
// name does not fit.
func (n Naming) Of(name string) map[string]string {
	if cut := strings.LastIndexByte(name, '.'); cut > 0 && !n.ended {
		name = name[:cut]
	}
	found := n.whole.FindStringSubmatch(name)
	if found == nil {
		return nil
	}
	said := map[string]string{}
	for i, word := range n.parts {
		said[word] = found[i+1]
	}
	return said
}

// NameLine is what one name says under the pattern of the study.
type NameLine struct {
	File string            // its name
	Said map[string]string // by word; nil where the name does not fit
}

// Names lists the files with what their names say under the pattern; nil where
// there is no pattern.
func (s *Study) Names() []NameLine {
	n, ok := ParseNaming(s.Pattern)
	if !ok {
		return nil
	}
	lines := make([]NameLine, len(s.Files))
	for i, f := range s.Files {
		lines[i] = NameLine{File: f.Name, Said: n.Of(f.Name)}
	}
	return lines
}

// Collision is one run that several files claim to be.
type Collision struct {
	Run   string // e.g. Cp at C1, model A, grid G2
	Files []string
}

// Collisions lists the runs that more than one table in use claims to be, in
// the order of the slips.
func (s *Study) Collisions() []Collision {
	var list []Collision
	at := map[string]int{}
	for i := range s.Slips {
		p := &s.Slips[i]
		if p.Role.Value != Simulation && p.Role.Value != Monitor || !p.Grid.Given() || !p.Quantity.Given() {
			continue
		}
		run := p.Quantity.Value + " at " + p.Case.Value + ", model " + p.Model.Value + ", grid " + p.Grid.Value
		key := p.Role.Value + run + "|" + p.Branch.Value + "|" + p.Derive.Value
		n, known := at[key]
		if !known {
			n, at[key] = len(list), len(list)
			list = append(list, Collision{Run: run})
		}
		list[n].Files = append(list[n].Files, s.fileName(p))
	}
	return slices.DeleteFunc(list, func(c Collision) bool { return len(c.Files) < 2 })
}

// NameParts returns the words of the pattern of the study, in their order.
func (s *Study) NameParts() []string {
	n, _ := ParseNaming(s.Pattern)
	var used []string
	for _, word := range nameParts {
		if n.has(word) {
			used = append(used, word)
		}
	}
	return used
}

// enterPattern changes the pattern and guesses anew, by it, what no person has
// entered or accepted and no file states.
func (s *Study) enterPattern(value string) (string, error) {
	before := s.Pattern
	if strings.TrimSpace(value) == "" {
		s.Pattern = ""
		return before, nil
	}
	n, ok := ParseNaming(value)
	if !ok {
		return before, refuse("a pattern of names without one of the words case, model, grid, quantity, station, each once and not side by side,", value)
	}
	s.Pattern = value
	for i := range s.Slips {
		p := &s.Slips[i]
		left := s.Question(p.Case.Value, p.Quantity.Value)
		p.named(n.Of(s.fileName(p)))
		s.follow(left, p)
		s.askOf(p)
	}
	return before, nil
}

// named guesses the parts that a name says. A station is told with the
// quantity, so that profiles at different stations are different questions.
func (p *Slip) named(said map[string]string) {
	set := func(f *Field, value string) {
		if value != "" && (!f.Given() || f.Open()) {
			*f = guess(value)
		}
	}
	set(&p.Case, said["case"])
	if p.Role.Value != Reference {
		set(&p.Model, said["model"])
		set(&p.Grid, said["grid"])
	}
	set(&p.Quantity, nameQuantity(said, p.Quantity.Value))
}

// nameQuantity is the quantity that a name says, with its station; where it
// says a station alone, that of the quantity as it stands. It is empty where
// the name says neither.
func nameQuantity(said map[string]string, now string) string {
	quantity, station := said["quantity"], said["station"]
	if station == "" {
		return quantity
	}
	if quantity == "" {
		quantity, _, _ = strings.Cut(now, " at ")
	}
	return quantity + " at " + station
}

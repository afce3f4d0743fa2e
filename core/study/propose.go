package study

import (
	"regexp"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/tablefile"
)

// Add takes a file into the study and proposes how its tables may be used.
// Every proposal is a guess that a person has to accept; what the file itself
// states, such as a unit in a header, is stated.
func (s *Study) Add(name string, data []byte, read tablefile.File, at string) []*Slip {
	id := s.freeID("f", func(id string) bool { return s.File(id) != nil })
	s.Files = append(s.Files, File{ID: id, Name: name, SHA256: read.SHA256, Data: data})
	s.log(at, "File "+name+" added", "", false)
	var added []*Slip
	for i, t := range read.Tables {
		ref := ""
		if len(read.Tables) > 1 {
			ref = strconv.Itoa(i + 1)
		}
		p := propose(name, t)
		if naming, ok := ParseNaming(s.Pattern); ok {
			p.named(naming.Of(name))
		}
		kind := statedKind(read, t.Name)
		if kind != "" {
			p.Role, p.Model = Field{Value: Reference, By: Guessed}, Field{}
		}
		p.ID = s.freeID("s", func(id string) bool { return s.slip(id) != nil })
		p.File, p.Table = id, ref
		p.Digitised = statedDigitising(read, t.Name)
		s.Slips = append(s.Slips, p)
		s.askOf(&p)
		if q := s.Question(p.Case.Value, p.Quantity.Value); q != nil && kind != "" && !q.Kind.Given() {
			q.Kind = Field{Value: kind, By: Stated}
		}
		added = append(added, &s.Slips[len(s.Slips)-1])
		if p.Role.Value == Residual {
			s.addResiduals(p, t)
		}
	}
	return added
}

// mostResiduals is the number of columns of one table that are proposed.
const mostResiduals = 8

// addResiduals proposes the further columns of a table of residuals.
func (s *Study) addResiduals(first Slip, t tablefile.Table) {
	n := 1
	for _, c := range t.Columns {
		if c.Name == first.X.Column.Value || c.Name == first.Y.Column.Value || !anyKnown(c.Values) || n == mostResiduals {
			continue
		}
		n++
		p := first
		p.ID, p.Y.Column = s.freeID("s", func(id string) bool { return s.slip(id) != nil }), guess(c.Name)
		s.Slips = append(s.Slips, p)
	}
}

// statedKind is the kind of reference that a file states of itself in a line
// such as "# kind: law".
func statedKind(read tablefile.File, table string) string {
	for _, m := range read.Meta {
		if strings.EqualFold(m.Key, "kind") && (m.Table == "" || m.Table == table) {
			switch kind := strings.ToLower(m.Value); kind {
			case KindTest, KindLaw, KindCorrelation, KindSimulation:
				return kind
			}
		}
	}
	return ""
}

// Remove takes a file and its slips out of the study.
func (s *Study) Remove(id, at, why string) error {
	f := s.File(id)
	if f == nil {
		return refuse("removal of a file", id)
	}
	name := f.Name
	files, slips := []File{}, []Slip{}
	for _, f := range s.Files {
		if f.ID != id {
			files = append(files, f)
		}
	}
	for _, p := range s.Slips {
		if p.File != id {
			slips = append(slips, p)
		}
	}
	s.Files, s.Slips = files, slips
	s.log(at, "File "+name+" removed", why, false)
	return nil
}

// Double adds a second slip for the same table, for a second model or
// quantity in other columns.
func (s *Study) Double(id, at string) error {
	p := s.slip(id)
	if p == nil {
		return refuse("a second use of a table", id)
	}
	second := *p
	second.ID = s.freeID("s", func(id string) bool { return s.slip(id) != nil })
	s.Slips = append(s.Slips, second)
	s.log(at, "A second use of "+s.fileName(p)+" added", "", false)
	return nil
}

func (s *Study) freeID(prefix string, taken func(string) bool) string {
	for n := 1; ; n++ {
		if id := prefix + strconv.Itoa(n); !taken(id) {
			return id
		}
	}
}

var (
	caseInName  = regexp.MustCompile(`(?:^|[^A-Za-z0-9])(C\d{1,3})(?:[^0-9]|$)`)
	gridInName  = regexp.MustCompile(`(?:^|[^A-Za-z0-9])((?:G|grid)\d{1,3})(?:[^0-9]|$)`)
	modelInName = regexp.MustCompile(`(?:^|[_\-. ])([A-Z])(?:[_\-. ]|$)`)
	measured    = regexp.MustCompile(`(?i)(?:^|[^a-z])(exp|expt|exp ?data|exp ?new|experiment|experimental|test|meas|measured|measurement|data|tunnel|taps|rig)(?:[^a-z]|$)`)
	uncertain   = regexp.MustCompile(`(?i)^(u|u[_ ].*|u\(.*|unc.*|err.*|.*error.*|.*uncert.*|sigma.*|std.*|\+/?-.*|±.*)$`)
	history     = regexp.MustCompile(`(?i)^(iter.*|it|its|step.*|time.*|t)$`)
	residuals   = regexp.MustCompile(`(?i)(?:^|[^a-z])(resid.*|res|continuity)(?:[^a-z]|$)`)
	timing      = regexp.MustCompile(`(?i)^t(ime.*)?$`)
	counting    = regexp.MustCompile(`(?i)^(n|cells|n_?cells|cell ?count|grid ?size|points|nodes|elements)$`)
	spacingName = regexp.MustCompile(`(?i)^(h|h ?[\^=].*|\(?1/n\)?.*|sqrt.*|n\^.*|spacing)$`)
	coordinate  = regexp.MustCompile(`(?i)^(log\()?[xyzsr](\d|plus|[ _+/*\-(].*)?\)?$`)
	coefficient = regexp.MustCompile(`(?i)^c_?[pfdlm]([ _,].*)?$`)
	numbering   = regexp.MustCompile(`(?i)^(id|no\.?|nr\.?|number|index|row|tap|port)$`)
)

func guess(value string) Field {
	if value == "" {
		return Field{}
	}
	return Field{Value: value, By: Guessed}
}

// propose guesses the use of one table from its names.
func propose(file string, t tablefile.Table) Slip {
	p := Slip{Case: guess(firstMatch(caseInName, file)), Grid: guess(firstMatch(gridInName, file))}
	if !p.Case.Given() {
		p.Case = guess("C1")
	}
	var size, x, y, u = -1, -1, -1, -1
	for i, c := range t.Columns {
		switch {
		case c.Text != nil && !anyKnown(c.Values):
		case counting.MatchString(c.Name) && size < 0:
			size = i
		case spacingName.MatchString(c.Name):
		case uncertain.MatchString(c.Name) && y >= 0:
			if u < 0 {
				u = i
			}
		case x < 0 && size < 0 && fixed(t, i):
		case x < 0 && size < 0:
			x = i
		case y < 0:
			y = i
		}
	}
	if x >= 0 && y >= 0 && drawn(t.Columns[x].Name, t.Columns[y].Name) {
		x, y = y, x
	}
	p.Role = guess(role(file, t, size, u))
	if p.Role.Value == Monitor {
		p.Axis = guess(AxisIterations)
		if timing.MatchString(t.Columns[0].Name) {
			p.Axis = guess(AxisTime)
		}
	}
	if p.Role.Value == GridValues {
		p.Size.Column = guess(t.Columns[size].Name)
		x = -1
	}
	if y < 0 && x >= 0 {
		x, y = -1, x
	}
	if y >= 0 {
		p.Y = columnUse(t.Columns[y])
		p.Quantity = guess(t.Columns[y].Name)
	}
	if x >= 0 {
		p.X = columnUse(t.Columns[x])
	}
	if u >= 0 && p.Role.Value == Reference {
		p.U = columnUse(t.Columns[u])
		if !p.U.Unit.Given() {
			p.U.Unit = p.Y.Unit
		}
	}
	if p.Role.Value != Reference {
		p.Model = guess(modelOf(file, p))
	}
	if p.Role.Value == Residual {
		p.Quantity, p.Y.Unit, p.X.Unit = Field{}, Field{}, Field{} // of the run as a whole, whatever their unit
	}
	return p
}

// fixed reports whether a column before a coordinate is none along the curve:
// the place of a profile, which is the same in all rows, or a running number.
func fixed(t tablefile.Table, i int) bool {
	c := t.Columns[i]
	_, constant := c.Constant()
	if !numbering.MatchString(c.Name) && !(constant && t.Rows() > 2 && coordinate.MatchString(c.Name)) {
		return false
	}
	return slices.ContainsFunc(t.Columns[i+1:], func(o tablefile.Column) bool {
		_, constant := o.Constant()
		return coordinate.MatchString(o.Name) && !constant
	})
}

// drawn reports whether the first column is the value by its name and the
// second the station, as in profiles that are written as they are drawn.
func drawn(first, second string) bool {
	if coordinate.MatchString(first) || history.MatchString(first) {
		return false
	}
	return coordinate.MatchString(second) || coefficient.MatchString(first) && !coefficient.MatchString(second)
}

// modelOf guesses the model from the file's name, else from the name without
// its ending.
func modelOf(file string, p Slip) string {
	if m := firstMatch(modelInName, file); m != "" {
		return m
	}
	name := file
	if cut := strings.LastIndexByte(name, '.'); cut > 0 {
		name = name[:cut]
	}
	if p.Grid.Given() {
		name = strings.Trim(strings.Replace(name, p.Grid.Value, "", 1), "._- ")
	}
	return name
}

func role(file string, t tablefile.Table, size, u int) string {
	switch {
	case len(t.Columns) > 0 && history.MatchString(t.Columns[0].Name) && t.Rows() >= 50:
		if residuals.MatchString(strings.ReplaceAll(file, "_", " ")) || len(t.Columns) > 1 && residuals.MatchString(t.Columns[1].Name) {
			return Residual
		}
		return Monitor
	case size >= 0 && t.Rows() <= 12:
		return GridValues
	case u >= 0 || measured.MatchString(strings.ReplaceAll(file, "_", " ")):
		return Reference
	}
	return Simulation
}

// columnUse proposes a column; a unit that the file states is stated, one
// that it does not state is left open.
func columnUse(c tablefile.Column) ColumnUse {
	use := ColumnUse{Column: guess(c.Name)}
	if c.Unit != "" {
		use.Unit = Field{Value: c.Unit, By: Stated}
		return use
	}
	if pure(c.Name) {
		use.Unit = Field{Value: "1", By: Guessed}
	}
	return use
}

// pure reports whether a name is that of a pure number by custom, such as
// x/c, Cp or Cf.
func pure(name string) bool {
	if _, err := quantity.Parse(name); err == nil && strings.Contains(name, "/") {
		return false
	}
	lower := strings.ToLower(name)
	for _, known := range []string{"cp", "cf", "cd", "cl", "cm", "c_p", "c_f", "c_d", "c_l", "c_m", "x/c", "x/h", "y/h", "x/d", "y/d", "x/l", "y/l", "u/u", "y+", "u+"} {
		if lower == known || strings.HasPrefix(lower, known+"_") || strings.HasPrefix(lower, known+",") || strings.HasPrefix(lower, known+" ") {
			return true
		}
	}
	return false
}

func firstMatch(re *regexp.Regexp, text string) string {
	if m := re.FindStringSubmatch(text); m != nil {
		return m[1]
	}
	return ""
}

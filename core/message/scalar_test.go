package message

import (
	"strings"
	"testing"

	"weirmark/core/derived"
	"weirmark/core/memo"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// enterAt enters a value as a list of the page offers it.
func enterAt(t *testing.T, s *study.Study, l EntryList, field, value string) {
	t.Helper()
	for _, item := range l.Items {
		for _, e := range item.Entries {
			if e.Target.Field != field {
				continue
			}
			offered := len(e.Options) == 0
			for _, o := range e.Options {
				offered = offered || o.Value == value
			}
			if err := s.Set(e.Target, value, "", ""); err != nil || !offered {
				t.Fatalf("%s = %q: offered %v, %v", field, value, offered, err)
			}
			return
		}
	}
	t.Fatalf("the page does not offer %s: %+v", field, l)
}

// The suction peak of the demo's pressures, asked for beside the curves as the
// page does it: a question of its own with the sources of the curve, a
// budget, a sentence, tables and a memo.
func TestScalarOfTheDemosCurves(t *testing.T) {
	s := DemoWorked()
	var q *study.Question
	for i := range s.Questions {
		if len(s.Questions[i].Regions) > 0 || strings.Contains(s.Questions[i].Quantity, "pressure coefficient") {
			q = &s.Questions[i]
			break
		}
	}
	if q == nil {
		t.Fatal("the demo has no curve of pressures")
	}
	caseName, curve := q.Case, q.Quantity
	before := study.Evaluate(s, study.Options{})
	if err := s.AddItem(*derivation(q).Add, ""); err != nil {
		t.Fatal(err)
	}
	asked := s.Question(caseName, curve+", scalar")
	if asked == nil || asked.Derive == nil {
		t.Fatalf("no question was added: %+v", s.Questions)
	}
	enterAt(t, s, derivation(asked), "derive.kind", "least value")
	// What the page saved is what it opens.
	data, err := s.Save()
	if err != nil {
		t.Fatal(err)
	}
	s, notices, err := study.Load(data)
	if err != nil || len(notices) > 0 {
		t.Fatal(err, notices)
	}
	r := study.Evaluate(s, study.Options{})
	for i := range before.Cells {
		if b := before.Cells[i]; b.Case == caseName && b.Quantity == curve {
			after := cellAt(t, r, caseName, curve, b.Model)
			if len(after.Stations) != len(b.Stations) || after.Joint.Statistic != b.Joint.Statistic {
				t.Errorf("asking for a scalar changed the curve of model %s", b.Model)
			}
		}
	}
	c := cellAt(t, r, caseName, curve+", scalar", "A")
	if c.Derived == nil || !c.Scalar || len(c.Stations) != 1 || !c.Stations[0].UD.Known() || !c.Stations[0].UNum.Known() {
		t.Fatalf("%+v\n%+v", c.Open, c.Notices)
	}
	carried := 0
	for _, l := range c.Sources {
		if strings.Contains(l.Text, "carried through the curve") {
			carried++
		}
	}
	if carried < 2 || c.Derived.Propagation == "" {
		t.Errorf("%d sources carried: %+v", carried, c.Sources)
	}
	titles := ""
	for _, table := range agreeTables(c) {
		titles += table.Title + "|"
	}
	if !strings.Contains(titles, "The least value: "+c.Derived.Formula) || !strings.HasPrefix(agreeAnswer(c), "The least value was taken from the curves; E is ") {
		t.Errorf("%s\n%s", titles, agreeAnswer(c))
	}
	statement := sentence.Of(c)
	if text := statement.Text(); !strings.Contains(text, "scalar") {
		t.Errorf("the sentence does not name the scalar: %s", text)
	}
	page := string(memo.HTML(memo.Document(memo.Input{Report: r})))
	if !strings.Contains(page, "Taken from the curves") {
		t.Error("the memo does not say how the scalar was taken")
	}
	// Every kind can be chosen, and each either is taken or says why not.
	for _, name := range derived.Names() {
		asked = s.Question(caseName, curve+", scalar")
		enterAt(t, s, derivation(asked), "derive.kind", name)
		r := study.Evaluate(s, study.Options{})
		c := cellAt(t, r, caseName, curve+", scalar", "A")
		if len(c.Stations) != 1 && !c.Withheld {
			t.Errorf("%s: neither taken nor withheld", name)
		}
		if len(c.Stations) != 1 && !notice.Has(c.Notices, "derive-refused") && !notice.Has(c.Notices, "derive-parameter") && !notice.Has(c.Notices, "derive-unit") && !notice.Has(c.Notices, "derive-edge") && !notice.Has(c.Notices, "loop-contour") {
			t.Errorf("%s: no reason: %+v", name, c.Notices)
		}
		if text := strings.Join(slicesOf(agreeTables(c)), " "); strings.Contains(text, "NaN") {
			t.Errorf("%s: %s", name, text)
		}
	}
	// And back: the question compares the values as they are.
	enterAt(t, s, derivation(s.Question(caseName, curve+", scalar")), "derive.kind", "")
	if c := cellAt(t, study.Evaluate(s, study.Options{}), caseName, curve+", scalar", "A"); c.Scalar || c.Derived != nil {
		t.Error("the scalar was not taken back")
	}
}

func slicesOf(tables []Table) []string {
	var all []string
	for _, table := range tables {
		for _, row := range table.Rows {
			all = append(all, row...)
		}
	}
	return all
}

// Parameters are entered and refused as the page offers them.
func TestParametersOfAScalar(t *testing.T) {
	s := DemoWorked()
	q := &s.Questions[0]
	enterAt(t, s, derivation(q), "derive.kind", "friction velocity from the log law")
	enterAt(t, s, derivation(q), "derive.viscosity", "1.5e-5")
	enterAt(t, s, derivation(q), "derive.kappa", "0.4")
	if q.Derive.Parameters["kappa"] != "0.4" || q.Derive.Parameters["viscosity"] != "1.5e-5" {
		t.Errorf("%+v", q.Derive)
	}
	target := study.Target{Kind: "question", ID: questionID(q)}
	for field, value := range map[string]string{"derive.kappa": "zero", "derive.kind": "sum of all", "derive.colour": "red"} {
		target.Field = field
		if err := s.Set(target, value, "", ""); err == nil {
			t.Errorf("%s = %q was taken", field, value)
		}
	}
	enterAt(t, s, derivation(q), "derive.kind", "friction velocity from a composite profile")
	if q.Derive.Parameters["kappa"] != "0.4" {
		t.Errorf("what the new kind asks for too was lost: %+v", q.Derive)
	}
	enterAt(t, s, derivation(q), "derive.kind", "crossing of a level")
	if len(q.Derive.Parameters) != 0 {
		t.Errorf("what the new kind does not ask for was kept: %+v", q.Derive)
	}
}

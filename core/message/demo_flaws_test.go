package message

import (
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// Reports of the two states, evaluated once.
type demoReports struct{ received, worked study.Report }

func demoStates(t *testing.T) demoReports {
	t.Helper()
	return demoReports{study.Evaluate(DemoReceived(study.Read), study.Options{}), study.Evaluate(DemoWorked(), study.Options{})}
}

// cellAt returns the cell of a question and model.
func cellAt(t *testing.T, r study.Report, caseName, quantity, model string) *study.Cell {
	t.Helper()
	for i := range r.Cells {
		if c := &r.Cells[i]; c.Case == caseName && c.Quantity == quantity && c.Model == model {
			return c
		}
	}
	t.Fatalf("no cell %s, %s, %q", caseName, quantity, model)
	return nil
}

// says reports whether a notice of a code holds all texts.
func says(list []notice.Notice, code string, texts ...string) bool {
	for _, n := range list {
		all := n.Code == code
		for _, text := range texts {
			all = all && strings.Contains(n.Text, text)
		}
		if all {
			return true
		}
	}
	return false
}

func codesOf(list []notice.Notice) string {
	var codes []string
	for _, n := range list {
		codes = append(codes, n.Code+": "+n.Text)
	}
	return strings.Join(codes, "\n  ")
}

// TestPlantedFlaws: every planted mistake (design, demo campaign, 6.2) is
// found, with the finding that 3-bad-inputs numbers. A
// row with no quantity is a finding of reading a file.
func TestPlantedFlaws(t *testing.T) {
	states := demoStates(t)
	rows := []struct {
		flaw                      string
		report                    study.Report
		caseName, quantity, model string
		code                      string
		texts                     []string
	}{
		{"F1", states.received, "C3", demoZoneName(2), "A", "range-scaled", []string{"with a factor 0.001"}},
		{"F1", states.received, "C3", demoZoneName(2), "A", "station-none", nil},
		{"F2", states.received, "C1", demoLineName, "A", "columns-swapped", []string{"C1-A-G2-line.dat"}},
		{"F3", states.received, "C3", demoZoneName(0), "B", "wall-units", []string{"y+", "u_tau"}},
		{"F4", states.received, "C2", demoRowName, "B", "ratio-constant", []string{"0.836", "divided by density"}},
		{"F5", evaluateAfter(t, "OR26_C1_taps_old.csv alone"), "C1", demoLoopName, "A", "curve-shuffled", []string{"OR26_C1_taps_old.csv"}},
		{"F6", states.received, "C1", demoLoopName, "A", "curve-outlier", []string{"line 21"}},
		{"F6", states.received, "C1", demoLoopName, "A", "rows-repeated", nil},
		{"F7", states.received, "C1", demoLoopName, "A", "u-basis", []string{"u(p)"}},
		{"F10", states.received, "C2", demoDragName, "A", "grid-wall", []string{"38, 27, 12, 0.90"}},
		{"F7", states.received, "C1", demoLoopName, "A", "u-coverage", []string{"u(p)"}},
		{"F7", states.received, "C3", demoZoneName(0), "A", "u-coverage", []string{"u_95"}},
		{"F7", states.received, "C3", demoTracerName, "A", "u-coverage", []string{"u(C/C0)"}},
		{"F7", states.received, "C2", demoRowName, "A", "u-coverage", []string{"full scale"}},
		{"F8", states.received, "C3", demoZoneName(0), "A", "station-outside", []string{"4 of 26"}},
		{"F9", states.worked, "C1", demoLiftName, "A", "grid-oscillatory", []string{"−0.556", "0.00225"}},
		{"F9", states.worked, "C3", demoLeastName, "B", "grid-diverging", []string{"1.93", "2.30"}},
		{"F11", states.received, "C2", demoRowName, "B", "grid-identical", []string{"C2-B-G2-p.csv", "C2-B-G3-p.csv"}},
		{"F12", states.received, "C1", demoDragName, "B", "monitor-drift", []string{"0.60 % per 200 iterations"}},
		{"F13", states.received, "C2", demoDragName, "A", "monitor-cycle", []string{"every 140 iterations", "±1.1 %"}},
		{"F14", states.received, "C3", demoLengthName, "B", "balance-open", []string{"1.3 %", "G3"}},
		{"F15", states.received, "", "", "", "decimal-comma", nil},
		{"F15", states.received, "", "", "", "value-sentinel", []string{"2 values equal -999"}},
		{"F15", states.received, "C3", demoTracerName, "A", "u-blank", []string{"8 stations"}},
		{"F16", states.received, "C2", demoDragName, "A", "readings-ratio", []string{"One of 5", "7.7"}},
		{"F17", states.received, "C1", demoLiftName, "B", "condition-differs", []string{"4°", "4.2°", "0.020"}},
		{"F18", evaluateAfter(t, "pattern unset"), "C1", demoCpName, "A", "correlation-unset", []string{"51.0", "27.0"}},
		{"F19", states.received, "C3", demoFrictionName, "A", "curve-magnitude", []string{"C3-A-G4-cf.csv"}},
		{"F20", states.worked, "C1", demoLegacyName, "A", "u-missing", nil},
		{"F20", states.worked, "C1", demoLegacyName, "A", "reference-tuning", nil},
		{"F21", states.worked, "C3", demoZoneName(3), "A", "station-excluded-late", []string{"3 stations"}},
		{"F21", states.worked, "C3", demoZoneName(3), "A", "station-excluded", []string{"3 of 26"}},
		{"F22", states.worked, "C1", demoLiftName, "A", "references-differ", []string{"0.412", "0.4359", "5.8 %"}},
		{"F23", states.received, "C2", demoDragName, "A", "monitor-missing", []string{"G2"}},
		{"F24", states.worked, "C3", demoZoneName(2), "A", "scores-signed", []string{"FB"}},
		{"F25", states.received, "", "", "", "value-date", []string{"B4", "2 March"}},
		{"F25", states.received, "", "", "", "hidden-cells", []string{"1 row"}},
		{"F26", states.worked, "C1", demoDragName, "B", "application-outside", []string{"11°", "4.2° to 9°"}},
	}
	found := map[string]bool{}
	for _, row := range rows {
		found[row.flaw] = true
		list := row.report.Notices
		if row.quantity != "" {
			list = cellAt(t, row.report, row.caseName, row.quantity, row.model).Notices
		}
		if !says(list, row.code, row.texts...) {
			t.Errorf("%s: no %s with %q in\n  %s", row.flaw, row.code, row.texts, codesOf(list))
		}
	}
	for n := 1; n <= 26; n++ {
		if name := "F" + itoa(n); !found[name] {
			t.Errorf("%s has no row", name)
		}
	}
}

// evaluateAfter evaluates a state after one entry was taken back.
func evaluateAfter(t *testing.T, what string) study.Report {
	t.Helper()
	s := DemoReceived(study.Read)
	switch what {
	case "OR26_C1_taps_old.csv alone": // the other copy of the taps is set aside
		for i := range s.Slips {
			if p := &s.Slips[i]; s.File(p.File).Name == "OR26_C1_taps_r1.csv" {
				p.Role.Value = study.Unused
			}
		}
	case "pattern unset": // no one said whether the error is common
		s = DemoWorked()
		q := s.Question("C1", demoCpName)
		q.Sources[0].Pattern = ""
	default:
		t.Fatalf("no state %q", what)
	}
	return study.Evaluate(s, study.Options{})
}

// TestWorkedThroughIsQuiet: with the second delivery and the entries of the
// worked state, what pointed at a mistake is gone; what is kept is declared.
func TestWorkedThroughIsQuiet(t *testing.T) {
	r := demoStates(t).worked
	for i := range r.Cells {
		c := &r.Cells[i]
		for _, n := range c.Notices {
			if mistakes[n.Code] {
				t.Errorf("%s, %s, %s: %s", c.Case, c.Quantity, c.Model, n.Text)
			}
		}
		for _, o := range c.Open {
			if strings.HasPrefix(o.Missing, "acceptance of") {
				t.Errorf("%s, %s, %s: a guess is left: %s", c.Case, c.Quantity, c.Model, o.Text)
			}
		}
	}
	for _, f := range r.Files {
		if !f.Matches {
			t.Errorf("%s differs from its hash", f.Name)
		}
	}
}

// mistakes are the codes of findings that point at a mistake in a file.
var mistakes = map[string]bool{
	"range-scaled": true, "ratio-constant": true, "offset-constant": true, "curve-shuffled": true, "curve-outlier": true, "curve-magnitude": true,
	"curve-constant": true, "curve-jump": true, "curve-loop": true, "readings-ratio": true, "correlation-unset": true, "condition-differs": true,
	"grid-identical": true, "monitor-drift": true, "monitor-broken": true, "balance-open": true, "station-none": true, "unit-dimension": true, "unit-unknown": true, "u-zero": true, "u-negative": true,
}

// TestCleanFilesStaySilent: ten files without a planted mistake raise no
// question when they are read, and none of the findings that point at a
// mistake where they are compared.
func TestCleanFilesStaySilent(t *testing.T) {
	clean := []string{
		"second/C1-taps-upper.csv", "second/C1-A-G4-cp.csv", "second/C1-B-G4-cp.csv", "second/C1-balance.csv", "second/C1-forces.csv",
		"first/OR26_C1_wake.txt", "first/C1-A-G4-wake.dat", "first/C1-B-G4-wake.dat", "second/C3-A-G4-cf.csv", "first/OR26_C3_oilfilm.csv",
	}
	names := map[string]bool{}
	for _, path := range clean {
		f := demoFile(path)
		names[f.Name] = true
		for _, n := range tablefile.Read(f.Name, f.Data, tablefile.Options{}).Notices {
			if n.Severity != notice.Note {
				t.Errorf("%s: %s", path, n.Text)
			}
		}
	}
	s := DemoWorked()
	r := study.Evaluate(s, study.Options{})
	compared := 0
	for i := range r.Cells {
		c := &r.Cells[i]
		only := true
		for _, id := range c.FilesUsed {
			name := s.File(id).Name
			only = only && (names[name] || strings.HasSuffix(name, ".mon"))
		}
		if !only {
			continue
		}
		compared++
		for _, n := range c.Notices {
			if mistakes[n.Code] || n.Code == "monitor-cycle" || n.Code == "monitor-stalled" || n.Code == "monitor-constant" {
				t.Errorf("%s, %s, %s: %s", c.Case, c.Quantity, c.Model, n.Text)
			}
		}
	}
	if compared < 7 { // the lift cells also hold the taps, whose disagreement is planted
		t.Errorf("only %d cells compare clean files alone", compared)
	}
}

// TestReviewCopy: one byte of profile P2 is altered, and the check of the
// hashes names that file and no other.
func TestReviewCopy(t *testing.T) {
	s := DemoReview()
	r := study.Evaluate(s, study.Options{})
	same := 0
	for _, f := range r.Files {
		switch {
		case f.Matches:
			same++
		case f.Name != "OR26_C1_wake.txt":
			t.Errorf("%s differs", f.Name)
		}
	}
	if same != len(r.Files)-1 {
		t.Errorf("%d of %d files are identical, want all but one", same, len(r.Files))
	}
	if !says(r.Notices, "hash-changed", "OR26_C1_wake.txt") {
		t.Error("no notice names the altered file")
	}
	worked := DemoWorked()
	altered := 0
	for i, f := range s.Files {
		for j := range f.Data {
			if f.Data[j] != worked.Files[i].Data[j] {
				altered++
			}
		}
	}
	if altered != 1 {
		t.Errorf("%d bytes are altered, want 1", altered)
	}
	if c := cellAt(t, r, "C1", demoWakeName, "A"); !c.Withheld {
		t.Error("the altered profile is still stated")
	}
	if c := cellAt(t, r, "C1", demoDragName, "B"); c.Withheld {
		t.Error("the drag is withheld because of another file")
	}
}

// TestReceivedStatesNothing: as received no statement is made, and what makes
// it so is listed.
func TestReceivedStatesNothing(t *testing.T) {
	s := DemoReceived(study.Read)
	r := study.Evaluate(s, study.Options{})
	for i := range r.Cells {
		c := &r.Cells[i]
		if status := sentence.Of(c).Status; status != sentence.Withheld || len(c.Open) == 0 {
			t.Errorf("%s, %s, %s: %s with %d open points", c.Case, c.Quantity, c.Model, status, len(c.Open))
		}
	}
	guesses := 0
	for _, p := range s.Slips {
		for _, f := range []study.Field{p.X.Column, p.Y.Column, p.U.Column} {
			if f.Open() {
				guesses++
			}
		}
		if p.UFactor.Given() {
			t.Errorf("%s: a coverage was stated by no one", s.File(p.File).Name)
		}
	}
	if guesses < 20 {
		t.Errorf("only %d columns are guesses", guesses)
	}
}

// TestDemoRequest: the three states by name, and a name that is none.
func TestDemoRequest(t *testing.T) {
	for _, row := range []struct {
		value  string
		status int
		title  string
	}{{"received", Done, "campaign OR-26"}, {"worked", Done, "campaign OR-26"}, {"review", Done, "campaign OR-26"}, {"", Done, "case C1"}, {"lost", Refused, ""}} {
		s := &Session{}
		reply, _ := s.Handle([]byte(`{"protocol":1,"kind":"demo","value":"`+row.value+`"}`), nil)
		if got := replyStatus(t, reply); got != row.status {
			t.Errorf("%q: status %d, want %d", row.value, got, row.status)
		}
		if row.status == Done && !strings.Contains(s.study.Title, row.title) {
			t.Errorf("%q opens %q", row.value, s.study.Title)
		}
	}
}

// TestDemoStatesAreDeterministic: the same document every time, and one that
// reads back as it was.
func TestDemoStatesAreDeterministic(t *testing.T) {
	for name, state := range map[string]func() *study.Study{"received": func() *study.Study { return DemoReceived(study.Read) }, "worked": DemoWorked, "review": DemoReview} {
		first, err := state().Save()
		if err != nil {
			t.Fatal(err)
		}
		second, err := state().Save()
		if err != nil || string(first) != string(second) {
			t.Errorf("%s: two documents differ (%v)", name, err)
		}
		opened, notices, err := study.Load(first)
		if err != nil || len(notices) > 0 {
			t.Fatalf("%s: %v, %v", name, err, notices)
		}
		if third, err := opened.Save(); err != nil || string(third) != string(first) {
			t.Errorf("%s does not read back as it was (%v)", name, err)
		}
	}
}

func BenchmarkDemoReceived(b *testing.B) { benchmarkDemo(b, "received") }
func BenchmarkDemoWorked(b *testing.B)   { benchmarkDemo(b, "worked") }

// benchmarkDemo opens a state as the page does: the view of all cells with
// their alternatives.
func benchmarkDemo(b *testing.B, value string) {
	for b.Loop() {
		s := &Session{}
		s.Handle([]byte(`{"protocol":1,"kind":"demo","value":"`+value+`"}`), nil)
	}
}

package message

import (
	"encoding/json"
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/study"
)

// inTime is a monitor of an unsteady run: a fixed series of independent
// samples about the drag of model B on G4, a long one.
func inTime() []byte {
	var b strings.Builder
	b.WriteString("time Cd\n")
	state := uint32(7)
	for i := range 2000 {
		state = state*1664525 + 1013904223
		fmt.Fprintf(&b, "%.2f %.8f\n", .01*float64(i), .02995+.0004*(float64(state>>8)/float64(1<<24)-.5))
	}
	return []byte(b.String())
}

// settlingSession holds the demo with evidence of course 1 of B's drag on G4:
// an unsteady monitor, a residual that stalls, an open balance, and a second
// run in single precision.
func settlingSession() *Session {
	var residual strings.Builder
	residual.WriteString("iteration,continuity\n")
	for i := range 200 {
		fmt.Fprintf(&residual, "%d,%.6e\n", i+1, math.Pow(10, -2*math.Min(float64(i), 100)/100))
	}
	s := &Session{}
	s.start(Demo(), nil)
	add := func(id string, data []byte, p study.Slip) {
		s.study.Files = append(s.study.Files, study.File{ID: id, Name: id, SHA256: study.Hash(data), Data: data})
		p.ID, p.File, p.Case, p.Model, p.Grid = id, id, entered("C1"), entered("B"), entered("G4")
		s.study.Slips = append(s.study.Slips, p)
	}
	drag := entered(demoDragName)
	add("unsteady.dat", inTime(), study.Slip{Role: entered(study.Monitor), Quantity: drag, Axis: entered(study.AxisTime), X: study.ColumnUse{Column: entered("time")}, Y: pureColumn("Cd")})
	add("residual.csv", []byte(residual.String()), study.Slip{Role: entered(study.Residual), X: study.ColumnUse{Column: entered("iteration")}, Y: study.ColumnUse{Column: entered("continuity")}})
	add("mass.csv", []byte("in,out\n1,0.987\n"), study.Slip{Role: entered(study.Balance), X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}})
	add("single.csv", []byte("grid,Cd\nG4,0.02998\n"), study.Slip{Role: entered(study.Precision), Quantity: drag, Y: pureColumn("Cd")})
	return s
}

// TestSettledOnThePage: course 1 has its answer, three numbers at most, its two
// pictures, its tables, and the entries that answer its doubts.
func TestSettledOnThePage(t *testing.T) {
	s := settlingSession()
	v := ask(t, s, `{"kind":"select","cell":"c2"}`).View
	k := v.Courses[0]
	if k.Answer != "Unsteady: G4; 1 balance, 1 not closed; 1 residual, fallen by 2.0 decades, 1 stall." || k.State != study.Blocked {
		t.Errorf("%s: %q", k.State, k.Answer)
	}
	var numbers, titles, figures []string
	for _, n := range k.Numbers {
		numbers = append(numbers, n.Name)
	}
	for _, table := range k.Tables {
		titles = append(titles, table.Title)
		for _, row := range table.Rows {
			if len(row) != len(table.Head) {
				t.Errorf("%s: %d cells under %d heads", table.Title, len(row), len(table.Head))
			}
		}
	}
	for _, f := range k.Figures {
		figures = append(figures, f.Figure.ID)
	}
	if got := strings.Join(numbers, "|"); got != "U of the mean of G4, k = 2|of the grid uncertainty; aim at 0.1 or less|independent samples" {
		t.Errorf("numbers %q", got)
	}
	if got := strings.Join(titles, "|"); got != "Monitors|Averages in time|Balances|Residuals" {
		t.Errorf("tables %q", got)
	}
	if got := strings.Join(figures, "|"); got != "c2-monitors|c2-balances" {
		t.Errorf("figures %q", got)
	}
	if grid := v.Courses[1]; !strings.Contains(grid.Answer, "Precision or platform alone changes it by 0.000030.") {
		t.Errorf("course 2: %q", grid.Answer)
	}
	for _, d := range k.Doubts { // every doubt that an entry answers leads to one that is there
		if d.Target.Kind == study.ItemRun && !hasEntry(v, d.Target) {
			t.Errorf("nothing answers %+v", d.Target)
		}
	}
	target := study.Target{Kind: study.ItemRun, ID: "C1|" + demoDragName, Field: "effect|B|G4"}
	if !hasEntry(v, target) {
		t.Fatal("the effect of the imbalance cannot be entered")
	}
	for _, entry := range [][2]string{{"effect", "0.0003"}, {"effect_why", "two runs"}} {
		target.Field = entry[0] + "|B|G4"
		at, err := json.Marshal(target)
		if err != nil {
			t.Fatal(err)
		}
		v = ask(t, s, `{"kind":"set","target":`+string(at)+`,"value":"`+entry[1]+`"}`).View
		if !hasEntry(v, study.Target{Kind: study.ItemRun, ID: target.ID, Field: "effect_why|B|G4"}) {
			t.Errorf("after %v no reason can be entered", entry)
		}
	}
	if v.Courses[0].State == study.Blocked {
		t.Errorf("course 1 is still blocked: %+v", v.Courses[0].Doubts)
	}
}

func hasEntry(v *View, target study.Target) bool {
	for _, l := range v.Lists {
		for _, item := range l.Items {
			for _, e := range item.Entries {
				if e.Target == target {
					return true
				}
			}
		}
	}
	return false
}

// TestSettledHeadlessly: the results that the command writes hold the same
// numbers.
func TestSettledHeadlessly(t *testing.T) {
	r := ask(t, settlingSession(), `{"kind":"results"}`).Results
	if r == nil {
		t.Fatal("no results")
	}
	c := r.Report.Cells[1]
	if len(c.Monitors) != 1 || c.Monitors[0].Sampling == nil || c.Monitors[0].Sampling.Rows < 1500 || len(c.Residuals) != 1 || len(c.Balances) != 1 || c.RoundOff == nil || c.NumSums == nil {
		t.Errorf("%+v", c.Monitors)
	}
}

// TestStandInOnThePage: the pressure may take the monitors of the drag.
func TestStandInOnThePage(t *testing.T) {
	s := settlingSession()
	v := ask(t, s, `{"kind":"select","cell":"c4"}`).View
	target := study.Target{Kind: study.ItemRun, ID: "C1|" + demoCpName, Field: "stand_in||"}
	if !hasEntry(v, target) {
		t.Fatal("no stand-in is offered")
	}
	for field, value := range map[string]string{"stand_in||": demoDragName, "stand_in_why||": "its pressure makes the drag"} {
		target.Field = field
		if err := s.study.Set(target, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	v = ask(t, s, `{"kind":"view"}`).View
	if k := v.Courses[0]; !strings.HasPrefix(k.Answer, "By the drag coefficient, unsteady: G4") || k.Tables[0].Rows[0][0] != "G4 ("+demoDragName+")" {
		t.Errorf("%q, %v", k.Answer, k.Tables)
	}
}

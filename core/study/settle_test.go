package study_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// history is a monitor of 600 iterations.
func history(f func(i float64) float64) string {
	var b strings.Builder
	b.WriteString("iteration Cd\n")
	for i := range 600 {
		fmt.Fprintf(&b, "%d %.8f\n", i+1, f(float64(i+1)))
	}
	return b.String()
}

// monitored adds monitors of grids of model B's drag to the demo.
func monitored(texts map[string]string) *study.Study {
	s := message.Demo()
	for _, grid := range []string{"G2", "G3", "G4"} {
		text, there := texts[grid]
		if !there {
			continue
		}
		id := "m" + grid
		s.Files = append(s.Files, study.File{ID: id, Name: "C1-B-" + grid + "-monitor.dat", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
		s.Slips = append(s.Slips, study.Slip{ID: id, File: id, Role: entered(study.Monitor), Case: entered("C1"), Quantity: entered("drag coefficient"), Model: entered("B"), Grid: entered(grid),
			X: study.ColumnUse{Column: entered("iteration")}, Y: study.ColumnUse{Column: entered("Cd"), Unit: entered("1")}, Axis: entered(study.AxisIterations)})
	}
	return s
}

func settled(end float64) func(float64) float64 {
	return func(i float64) float64 { return end + .004*math.Exp(-i/40) + 2e-7*math.Sin(i*1.7) }
}

func TestMonitors(t *testing.T) {
	all := func(last func(float64) float64) map[string]string {
		return map[string]string{"G2": history(settled(.03068)), "G3": history(settled(.03021)), "G4": history(last)}
	}
	for _, row := range []struct {
		name   string
		texts  map[string]string
		code   string // of a finding that must be there
		held   bool   // withheld
		doubts bool   // an open point of course 1 remains
		state  study.State
	}{
		{"all settled", all(settled(.02995)), "", false, false, study.Settled},
		{"one missing", map[string]string{"G3": history(settled(.03021)), "G4": history(settled(.02995))}, "monitor-missing", false, true, study.Doubts},
		{"drifting", all(func(i float64) float64 { return .02995 * (1 + .00003*(600-i)) }), "monitor-drift", true, true, study.Blocked},
		{"cycling", all(func(i float64) float64 { return .02995 * (1 + .011*math.Sin(2*math.Pi*i/70)) }), "monitor-cycle", false, true, study.Doubts},
	} {
		c := study.Evaluate(monitored(row.texts), study.Options{}).Cells[1]
		if row.code != "" && !notice.Has(c.Notices, row.code) {
			t.Errorf("%s: no %s in %+v", row.name, row.code, c.Notices)
		}
		doubts := false
		for _, o := range c.Open {
			doubts = doubts || o.Course == 0
		}
		if c.Withheld != row.held || doubts != row.doubts || c.Courses[0] != row.state {
			t.Errorf("%s: withheld %v, doubts %v, course 1 %s; open %+v", row.name, c.Withheld, doubts, c.Courses[0], c.Open)
		}
		text := sentence.Of(&c).Text()
		if provisional := strings.Contains(text, "Provisional"); provisional == (row.name == "all settled" || row.held) {
			t.Errorf("%s: %s", row.name, text)
		}
	}
}

// A monitor that settles beside the value of its grid is asked about; one
// that settles at it is not.
func TestMonitorValue(t *testing.T) {
	for _, row := range []struct {
		end   float64
		found bool
	}{{.02995, false}, {.02955, true}} {
		c := study.Evaluate(monitored(map[string]string{"G4": history(settled(row.end))}), study.Options{}).Cells[1]
		if found := notice.Has(c.Notices, "monitor-value"); found != row.found {
			t.Errorf("settling at %v: found %v", row.end, found)
		}
	}
}

// What iteration leaves open in the finest run counts in u_num.
func TestIterationCounts(t *testing.T) {
	quiet := study.Evaluate(monitored(map[string]string{"G4": history(settled(.02995))}), study.Options{}).Cells[1]
	cycling := study.Evaluate(monitored(map[string]string{"G4": history(func(i float64) float64 { return .02995 * (1 + .011*math.Sin(2*math.Pi*i/70)) })}), study.Options{}).Cells[1]
	var u float64
	for _, s := range cycling.Sources {
		if s.Name == "iteration" {
			u = float64(s.U)
		}
	}
	// Half-range over sqrt 3 of a sine of amplitude 1.1 %.
	if want := .02995 * .011 / math.Sqrt(3); math.Abs(u/want-1) > .01 {
		t.Errorf("u of iteration %v, want %v", u, want)
	}
	grid := float64(quiet.Stations[0].UNum)
	if got, want := float64(cycling.Stations[0].UNum), math.Hypot(grid, u); math.Abs(got/want-1) > 1e-3 {
		t.Errorf("u_num %v, want %v", got, want)
	}
	if !notice.Has(cycling.Notices, "iteration-ratio") {
		t.Error("an iterative uncertainty as large as the grid uncertainty is not told")
	}
}

func TestBalances(t *testing.T) {
	for _, row := range []struct {
		out    string
		closed bool
	}{{"1.0000", true}, {"0.987", false}} {
		s := message.Demo()
		text := "in,out\n1.0,0.5\n1.0," + row.out + "\n"
		s.Files = append(s.Files, study.File{ID: "b", Name: "C1-B-G4-mass.csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
		s.Slips = append(s.Slips, study.Slip{ID: "b", File: "b", Role: entered(study.Balance), Case: entered("C1"), Quantity: entered("drag coefficient"), Model: entered("B"), Grid: entered("G4"),
			X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}})
		c := study.Evaluate(s, study.Options{}).Cells[1]
		if len(c.Balances) != 1 || c.Balances[0].Closed != row.closed || c.Withheld == row.closed {
			t.Errorf("%s: balances %+v, withheld %v", row.out, c.Balances, c.Withheld)
		}
	}
}

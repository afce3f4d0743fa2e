package study_test

import (
	"fmt"
	"math"
	"math/rand/v2"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/study"
)

// dragID is the question of the demo's drag; its cell of model B is number 1.
const dragID = "C1|drag coefficient"

func runTarget(field, grid string) study.Target {
	return study.Target{Kind: study.ItemRun, ID: dragID, Field: field + "|B|" + grid}
}

func set(t *testing.T, s *study.Study, target study.Target, value string) {
	t.Helper()
	if err := s.Set(target, value, "", ""); err != nil {
		t.Fatal(err)
	}
}

func dragOf(s *study.Study) study.Cell { return study.Evaluate(s, study.Options{}).Cells[1] }

func sourceOf(c study.Cell, name string) (study.SourceLine, bool) {
	for _, l := range c.Sources {
		if l.Name == name {
			return l, true
		}
	}
	return study.SourceLine{}, false
}

func opened(c study.Cell, field string) bool {
	for _, o := range c.Open {
		if strings.HasPrefix(o.Target.Field, field) {
			return true
		}
	}
	return false
}

// addTable adds a table and one use of it.
func addTable(s *study.Study, name, text string, p study.Slip) {
	id := "t" + name
	s.Files = append(s.Files, study.File{ID: id, Name: name, SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	p.ID, p.File, p.Case = id, id, entered("C1")
	s.Slips = append(s.Slips, p)
}

func drifting(end float64) string {
	return history(func(i float64) float64 { return end * (1 + .00003*(600-i)) })
}

// A drift stops the statement until U_iter is entered with its reason; words
// alone do not do, and the entered number counts in u_num at k = 2.
func TestEnteredIteration(t *testing.T) {
	s := monitored(map[string]string{"G2": history(settled(.03068)), "G3": history(settled(.03021)), "G4": drifting(.02995)})
	s.Questions[0].Answers = map[string]string{"monitor-drift": "it looks flat to me"}
	if c := dragOf(s); !c.Withheld || !opened(c, "u_iter|B|G4") || c.Courses[0] != study.Blocked {
		t.Errorf("words resolve a drift: %+v", c.Open)
	}
	set(t, s, runTarget("u_iter", "G4"), "0.0002")
	if c := dragOf(s); !c.Withheld || !opened(c, "u_iter_why|B|G4") || !notice.Has(c.Notices, "iteration-reason") {
		t.Errorf("a number without a reason resolves a drift: %+v", c.Open)
	}
	set(t, s, runTarget("u_iter_why", "G4"), "from a longer run")
	c := dragOf(s)
	line, found := sourceOf(c, "iteration")
	if c.Withheld || c.Courses[0] != study.Settled || !found || math.Abs(float64(line.U)-.0001) > 1e-12 || line.Origin != "from a longer run" {
		t.Errorf("withheld %v, course 1 %s, %+v", c.Withheld, c.Courses[0], line)
	}
	m := c.Monitors[2]
	if u, k := m.UIter(); m.Entered != "from a longer run" || math.Abs(float64(u)-.0002) > 1e-12 || k != 2 || math.Abs(float64(m.OfGrid)-.0002/.000411) > .001 || !notice.Has(c.Notices, "iteration-ratio") || !notice.Has(c.Notices, "iteration-entered") {
		t.Errorf("%+v, %v at %v", m, u, k)
	}
	if !strings.HasPrefix(s.Log[len(s.Log)-1].What, "reason of U_iter of B G4, drag coefficient at C1") {
		t.Errorf("logged %q", s.Log[len(s.Log)-1].What)
	}
	set(t, s, runTarget("u_iter", "G4"), "")
	set(t, s, runTarget("u_iter_why", "G4"), "")
	if c := dragOf(s); !c.Withheld || len(s.Questions[0].Runs) != 0 {
		t.Errorf("an entry that was taken back is still used: %+v", s.Questions[0].Runs)
	}
}

// A run without a monitor is shown by an entered U_iter too.
func TestEnteredIterationWithoutMonitor(t *testing.T) {
	s := monitored(map[string]string{"G2": history(settled(.03068)), "G3": history(settled(.03021))})
	if c := dragOf(s); c.Courses[0] != study.Doubts || !notice.Has(c.Notices, "monitor-missing") {
		t.Fatalf("course 1 %s", c.Courses[0])
	}
	set(t, s, runTarget("u_iter", "G4"), "0.00003")
	set(t, s, runTarget("u_iter_why", "G4"), "last 500 iterations of its log")
	c := dragOf(s)
	if line, found := sourceOf(c, "iteration"); !found || math.Abs(float64(line.U)-.000015) > 1e-12 || c.Courses[0] != study.Settled || notice.Has(c.Notices, "monitor-missing") {
		t.Errorf("course 1 %s, %+v, %+v", c.Courses[0], line, c.Open)
	}
}

func TestRunRefusals(t *testing.T) {
	for _, row := range [][2]string{{"u_iter|B|G4", "-1"}, {"u_iter|B|G4", "much"}, {"effect|B|G4", "-0.1"}, {"period|B|G4", "0"}, {"u_iter", "1"}, {"mood|B|G4", "1"}, {"stand_in||", "drag coefficient"}} {
		s := message.Demo()
		if err := s.Set(study.Target{Kind: study.ItemRun, ID: dragID, Field: row[0]}, row[1], "", ""); err == nil || len(s.Questions[0].Runs) > 0 || s.Questions[0].StandIn != nil {
			t.Errorf("%v was taken: %+v", row, s.Questions[0])
		}
	}
}

// Row 39: the change from medium to fine grid is .00026; a cycle of half-range
// .00036 hides it. The ratio to U of the grids is printed.
func TestIterationHidesTheGrids(t *testing.T) {
	c := dragOf(monitored(map[string]string{"G4": history(func(i float64) float64 { return .02995 + .00036*math.Sin(2*math.Pi*i/70) })}))
	if !notice.Has(c.Notices, "iteration-noise") || math.Abs(float64(c.Monitors[0].OfGrid)-.00036/.000411) > .01 {
		t.Errorf("ratio %v, %+v", c.Monitors[0].OfGrid, c.Notices)
	}
	if c := dragOf(monitored(map[string]string{"G4": history(settled(.02995))})); notice.Has(c.Notices, "iteration-noise") || notice.Has(c.Notices, "iteration-ratio") || !(c.Monitors[0].OfGrid < .1) {
		t.Errorf("a settled run is told to be noisy: %v", c.Monitors[0].OfGrid)
	}
}

// A restart leaves a gap in the iterations: it is told, and what lies behind
// it is judged.
func TestRestartIsTold(t *testing.T) {
	var b strings.Builder
	b.WriteString("iteration Cd\n")
	f := settled(.02995)
	for i := range 600 {
		at := i + 1
		if i >= 300 {
			at += 4000
		}
		fmt.Fprintf(&b, "%d %.8f\n", at, f(float64(i+1)))
	}
	c := dragOf(monitored(map[string]string{"G4": b.String()}))
	if !notice.Has(c.Notices, "monitor-restart") || !(c.Monitors[0].From > 4300) {
		t.Errorf("window from %v, %+v", c.Monitors[0].From, c.Notices)
	}
}

// What geometric extrapolation leaves to come is in the report: rows
// .02995 + .002 q^i with q = exp(-1/400) stand .002 exp(-600/400) above their limit.
func TestRemainingIsTold(t *testing.T) {
	c := dragOf(monitored(map[string]string{"G4": history(func(i float64) float64 { return .02995 + .002*math.Exp(-i/400) })}))
	want := -.002 * math.Exp(-1.5)
	if m := c.Monitors[0]; m.Class != "drifting" || math.Abs(float64(m.Remaining)/want-1) > .02 || !(m.Change < 0) {
		t.Errorf("%s, to come %v, want %v", m.Class, m.Remaining, want)
	}
}

// unsteady is a run in time: a start-up of 100 samples, then a first-order
// Markov series of correlation .9 (correlation time 19 steps) and standard
// deviation sd about mean.
func unsteady(n int, mean, sd float64) string {
	r := rand.New(rand.NewPCG(4, 4))
	var b strings.Builder
	b.WriteString("time Cd\n")
	y := r.NormFloat64()
	for i := range n {
		y = .9*y + math.Sqrt(1-.81)*r.NormFloat64()
		v := mean + sd*y
		if i < 100 {
			v += 20 * sd
		}
		fmt.Fprintf(&b, "%.3f %.9f\n", .01*float64(i), v)
	}
	return b.String()
}

func inTime(text string) *study.Study {
	s := monitored(map[string]string{"G4": text})
	p := &s.Slips[len(s.Slips)-1]
	p.X.Column, p.Axis = entered("time"), entered(study.AxisTime)
	return s
}

// The mean of an unsteady run: its statistical uncertainty is a source of its
// own. Theory: sd sqrt(19/n); a quarter covers the scatter of one series.
func TestUnsteadyRun(t *testing.T) {
	const n, sd = 6100, .002
	c := dragOf(inTime(unsteady(n, .02995, sd)))
	line, found := sourceOf(c, "averaging in time")
	want := sd * math.Sqrt(19./6000)
	m := c.Monitors[0]
	if !found || math.Abs(float64(line.U)/want-1) > .25 || m.Class != "unsteady" || m.Sampling == nil {
		t.Fatalf("u %v, want %v; %+v", line.U, want, m)
	}
	g := m.Sampling
	if g.StartUp < 95 || g.StartUp > 200 || g.Rows+g.StartUp != n || math.Abs(float64(g.Tau)/.19-1) > .3 || math.Abs(float64(g.Independent)*19/6000-1) > .3 || math.Abs(float64(g.UBatches)/want-1) > .6 || math.Abs(float64(g.UMarkov)/want-1) > .25 {
		t.Errorf("%+v, u %v", g, want)
	}
	whole := math.Hypot(float64(line.U), float64(c.Grids.UNum))
	if math.Abs(float64(c.Stations[0].UNum)/whole-1) > 1e-6 || math.Abs(float64(g.Share)-float64(line.U)/whole) > 1e-6 {
		t.Errorf("u_num %v, share %v", c.Stations[0].UNum, g.Share)
	}
	if _, iteration := sourceOf(c, "iteration"); iteration {
		t.Error("the mean counts as iteration too")
	}
}

// Row 45: few independent samples are told with their part of u_num.
func TestShortAverageIsTold(t *testing.T) {
	c := dragOf(inTime(unsteady(500, .02995, .002)))
	m := c.Monitors[0]
	if m.Sampling == nil || !m.U.Known() {
		t.Fatalf("%+v", m)
	}
	told := ""
	for _, n := range c.Notices {
		if n.Code == "sampling-short" {
			told += n.Text
		}
	}
	if strings.Count(told, "independent samples") != 1 || !strings.Contains(told, "% of u_num") {
		t.Errorf("%q", told)
	}
}

// A declared start takes the place of the rule; one that leaves too little is
// not judged.
func TestDeclaredStartOfAverage(t *testing.T) {
	s := inTime(unsteady(6100, .02995, .002))
	set(t, s, runTarget("start", "G4"), "20")
	if m := dragOf(s).Monitors[0]; m.Sampling == nil || m.Sampling.StartUp != 2000 || m.From != 20 || !strings.Contains(m.Rule, "declared start") {
		t.Errorf("%+v", m)
	}
	set(t, s, runTarget("start", "G4"), "60.9")
	if c := dragOf(s); c.Monitors[0].Class != "short" || !notice.Has(c.Notices, "monitor-short") {
		t.Errorf("%+v", c.Monitors[0])
	}
}

// A declared period: whole cycles of it are averaged.
func TestDeclaredPeriod(t *testing.T) {
	s := inTime(unsteady(6100, .02995, .002))
	set(t, s, runTarget("start", "G4"), "1")
	set(t, s, runTarget("period", "G4"), "0.7")
	m := dragOf(s).Monitors[0]
	if m.Cycles != 85 || math.Abs(float64(m.Period)-.7) > 1e-9 || math.Abs(float64(m.To-m.From)-85*.7) > .021 || !strings.Contains(m.Rule, "declared period") {
		t.Errorf("%+v", m)
	}
}

// balanced adds a balance of model B on G4 to a demo that has settled.
func balanced(text string, p study.Slip) *study.Study {
	s := monitored(map[string]string{"G2": history(settled(.03068)), "G3": history(settled(.03021)), "G4": history(settled(.02995))})
	p.Role, p.Model, p.Grid = entered(study.Balance), entered("B"), entered("G4")
	addTable(s, "balance.csv", text, p)
	return s
}

// The kind, the sign and the flux that matters of a balance, by hand. A tenth
// of U_grid is .0000411 of .02995, so .137 % is small.
func TestBalanceKinds(t *testing.T) {
	both := study.Slip{X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}}
	with := func(p study.Slip, kind, scale, name string) study.Slip {
		p.BalanceOf, p.Scale, p.ScaleName = entered(kind), entered(scale), entered(name)
		if scale == "" {
			p.Scale = study.Field{}
		}
		return p
	}
	net := study.Slip{Y: study.ColumnUse{Column: entered("left")}}
	for _, row := range []struct {
		what, text string
		slip       study.Slip
		fraction   float64
		of         string
		closed     bool
		code       string
	}{
		{"mass", "in,out\n1,1.0013\n", both, -.0013, "inflow", true, ""},
		{"more leaves", "in,out\n1,1.0015\n", both, -.0015, "inflow", false, "balance-open"},
		{"energy by all that enters", "in,out\n500,499.5\n", with(both, "energy", "", ""), .001, "inflow", true, "balance-gross"},
		{"energy by what is exchanged", "in,out\n500,499.5\n", with(both, "energy", "20", "the heat exchanged"), .025, "the heat exchanged", false, "balance-open"},
		{"species", "in,out\n2,1.999\n", with(both, "species", "", ""), .0005, "inflow", true, ""},
		{"forces by the measured one", "in,out\n10,10.004\n", with(both, "force", "5", "the measured force"), -.0008, "the measured force", true, ""},
		{"what is left over", "left\n-0.01\n", with(net, "mass", "0.5", "what the inlet carries"), -.02, "what the inlet carries", false, "balance-open"},
	} {
		c := dragOf(balanced(row.text, row.slip))
		if len(c.Balances) != 1 {
			t.Errorf("%s: %+v", row.what, c.Open)
			continue
		}
		b := c.Balances[0]
		if math.Abs(float64(b.Fraction)-row.fraction) > 1e-9 || b.ScaleOf != row.of || b.Closed != row.closed || c.Withheld == row.closed || row.code != "" && !notice.Has(c.Notices, row.code) || math.Abs(float64(b.Limit)-.1*.000411/.02995) > 2e-6 || b.LimitOf != "a tenth of U_grid" {
			t.Errorf("%s: %+v, withheld %v", row.what, b, c.Withheld)
		}
		if want := math.Abs(row.fraction) * .02995; math.Abs(float64(b.OfGrid)-want/.000411) > .01*want/.000411 || math.Abs(float64(b.OfE)-want/.00035) > .03*want/.00035 {
			t.Errorf("%s: of U_grid %v, of |E| %v", row.what, b.OfGrid, b.OfE)
		}
	}
}

func TestBalanceRefusals(t *testing.T) {
	both := study.Slip{X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}}
	kind, scale := both, both
	kind.BalanceOf, scale.Scale = entered("luck"), entered("much")
	for _, row := range []struct {
		what, text string
		slip       study.Slip
		code       string
	}{
		{"no scale of a remainder", "left\n0.01\n", study.Slip{Y: study.ColumnUse{Column: entered("left")}}, "balance-scale-missing"},
		{"a kind that is none", "in,out\n1,1\n", kind, "field-bad"},
		{"a flux that is no number", "in,out\n1,1\n", scale, "field-bad"},
	} {
		if c := dragOf(balanced(row.text, row.slip)); len(c.Balances) != 0 || !notice.Has(c.Notices, row.code) || !c.Withheld && row.code == "field-bad" {
			t.Errorf("%s: %+v, %+v", row.what, c.Balances, c.Open)
		}
	}
}

// Row 44: an imbalance stops the statement until its effect is entered with a
// reason; that is a bound in u_num, the reason its origin.
func TestEffectOfAnImbalance(t *testing.T) {
	s := balanced("in,out\n1,0.987\n", study.Slip{X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}})
	if c := dragOf(s); !c.Withheld || !opened(c, "effect|B|G4") || c.Courses[0] != study.Blocked {
		t.Fatalf("%+v", c.Open)
	}
	set(t, s, runTarget("effect", "G4"), "0.0003")
	if c := dragOf(s); !c.Withheld || !opened(c, "effect_why|B|G4") {
		t.Errorf("an effect without a reason is enough: %+v", c.Open)
	}
	set(t, s, runTarget("effect_why", "G4"), "leak varied in two runs")
	c := dragOf(s)
	line, found := sourceOf(c, "imbalance")
	if c.Withheld || c.Courses[0] != study.Settled || !found || math.Abs(float64(line.U)-.0003/math.Sqrt(3)) > 1e-12 || line.Origin != "leak varied in two runs" || !notice.Has(c.Notices, "balance-effect") || c.Balances[0].Effect != .0003 {
		t.Errorf("withheld %v, course 1 %s, %+v", c.Withheld, c.Courses[0], line)
	}
}

// A balance without a quantity is one of the whole run: it counts for every
// quantity of its case and model.
func TestBalanceOfTheWholeRun(t *testing.T) {
	s := balanced("in,out\n1,0.987\n", study.Slip{X: study.ColumnUse{Column: entered("in")}, Y: study.ColumnUse{Column: entered("out")}})
	for i, c := range study.Evaluate(s, study.Options{Memory: &study.Memory{}}).Cells {
		if want := c.Model == "B"; want != (len(c.Balances) == 1) {
			t.Errorf("cell %d, %s of %s: %d balances", i, c.Quantity, c.Model, len(c.Balances))
		}
	}
}

// Residuals: how far they fell, and a stall.
func TestResiduals(t *testing.T) {
	var b strings.Builder
	b.WriteString("iteration,continuity,momentum\n")
	for i := range 600 {
		// Two decades in 300 iterations and then nothing; five in 600.
		fmt.Fprintf(&b, "%d,%.6e,%.6e\n", i+1, math.Pow(10, -2*math.Min(float64(i), 300)/300), math.Pow(10, -5*float64(i)/600))
	}
	s := monitored(map[string]string{"G4": history(settled(.02995))})
	for _, name := range []string{"continuity", "momentum"} {
		addTable(s, name+".csv", b.String(), study.Slip{Role: entered(study.Residual), Model: entered("B"), Grid: entered("G4"),
			X: study.ColumnUse{Column: entered("iteration")}, Y: study.ColumnUse{Column: entered(name)}})
	}
	c := dragOf(s)
	if len(c.Residuals) != 2 {
		t.Fatalf("%+v", c.Residuals)
	}
	one, two := c.Residuals[0], c.Residuals[1]
	if !one.Stalled || math.Abs(float64(one.Decades)-2) > .01 || math.Abs(float64(one.PerLast)) > 1e-6 || two.Stalled || math.Abs(float64(two.PerLast)-5./3) > .01 || math.Abs(float64(two.Decades)-4.87) > .02 {
		t.Errorf("%+v\n%+v", one, two)
	}
	if !notice.Has(c.Notices, "residual-stalled") || !strings.Contains(c.SettledText(), "2 residuals, fallen by 2.0 decades at the least, 1 stall") {
		t.Errorf("%q, %+v", c.SettledText(), c.Notices)
	}
	if len(one.X) == 0 || one.Y[0] != 0 || math.Abs(float64(one.Y[len(one.Y)-1])+2) > 1e-6 {
		t.Errorf("points %v", one.Y)
	}
}

// A residual that is written as zero at the end, or in between, is no run that
// broke down: these rows are left out, and that is told.
func TestResidualOfZero(t *testing.T) {
	var b strings.Builder
	b.WriteString("iteration,continuity\n")
	for i := range 200 {
		v := math.Pow(10, -float64(i)/40)
		if i > 180 || i == 50 {
			v = 0
		}
		fmt.Fprintf(&b, "%d,%.6e\n", i+1, v)
	}
	s := monitored(map[string]string{"G4": history(settled(.02995))})
	addTable(s, "zero.csv", b.String(), study.Slip{Role: entered(study.Residual), Model: entered("B"), Grid: entered("G4"),
		X: study.ColumnUse{Column: entered("iteration")}, Y: study.ColumnUse{Column: entered("continuity")}})
	r := study.Evaluate(s, study.Options{})
	c := r.Cells[1]
	if len(c.Residuals) != 1 || math.Abs(float64(c.Residuals[0].Decades)-180./40) > .15 || !notice.Has(c.Notices, "residual-zero") || notice.Has(c.Notices, "monitor-broken") || c.Withheld {
		t.Errorf("%+v, %+v", c.Residuals, c.Open)
	}
	if uses := r.Files[len(r.Files)-1].Uses; len(uses) != 1 || uses[0] != "residual: all quantities, model B, grid G4" {
		t.Errorf("uses %q", uses)
	}
}

func TestResidualsAreProposed(t *testing.T) {
	var b strings.Builder
	b.WriteString("iteration,continuity,momentum\n")
	for i := range 60 {
		fmt.Fprintf(&b, "%d,%.6e,%.6e\n", i+1, 1/float64(i+1), 2/float64(i+1))
	}
	s := study.New()
	f := study.File{Name: "C1-B-G4-residuals.csv", Data: []byte(b.String())}
	s.Add(f.Name, f.Data, study.Read(f), "")
	if len(s.Slips) != 2 || len(s.Questions) != 0 {
		t.Fatalf("%d slips, %d questions", len(s.Slips), len(s.Questions))
	}
	for i, name := range []string{"continuity", "momentum"} {
		if p := s.Slips[i]; p.Role.Value != study.Residual || p.Y.Column.Value != name || p.X.Column.Value != "iteration" || p.Quantity.Given() || p.Grid.Value != "G4" {
			t.Errorf("%+v", p)
		}
	}
}

// precise adds the drag of G4 from a run in single precision.
func precise(value float64, grid string) *study.Study {
	s := message.Demo()
	addTable(s, "single.csv", fmt.Sprintf("grid,Cd\n%s,%.9f\n", grid, value), study.Slip{Role: entered(study.Precision), Quantity: entered("drag coefficient"), Model: entered("B"), Grid: entered(grid),
		Y: study.ColumnUse{Column: entered("Cd"), Unit: entered("1")}})
	return s
}

// N11: what two runs of other precision differ by is a source of its own, and
// where the two finest grids differ by no more than twice that, it is told.
func TestRoundOff(t *testing.T) {
	before := dragOf(message.Demo())
	for _, row := range []struct {
		value float64
		doubt bool
	}{{.02995 + .00004, false}, {.02995 - .00013, true}} {
		c := dragOf(precise(row.value, "G4"))
		d := math.Abs(row.value - .02995)
		line, found := sourceOf(c, "round-off")
		if r := c.RoundOff; r == nil || !found || math.Abs(float64(r.Max)-d) > 1e-12 || math.Abs(float64(r.RMS)-d) > 1e-12 || r.N != 1 || r.Doubt != row.doubt || math.Abs(float64(line.U)-d) > 1e-12 {
			t.Errorf("%v: %+v, %+v", row.value, c.RoundOff, line)
		}
		if want := math.Hypot(float64(before.Stations[0].UNum), d); math.Abs(float64(c.Stations[0].UNum)-want) > 1e-9 || notice.Has(c.Notices, "grid-noise") != row.doubt {
			t.Errorf("%v: u_num %v, want %v", row.value, c.Stations[0].UNum, want)
		}
	}
	if c := dragOf(precise(.02995, "G4")); c.RoundOff == nil || c.RoundOff.Max != 0 || !notice.Has(c.Notices, "precision-equal") || c.Stations[0].UNum != before.Stations[0].UNum {
		t.Errorf("equal runs: %+v", c.RoundOff)
	}
	if c := dragOf(precise(.03, "G2")); c.RoundOff != nil || !notice.Has(c.Notices, "precision-grid") {
		t.Errorf("another grid: %+v", c.RoundOff)
	}
}

// Along a curve the floor is the root mean square over the stations, also
// where the two runs happen to agree.
func TestRoundOffAlongACurve(t *testing.T) {
	s := message.Demo()
	var run study.Slip
	for _, p := range s.Slips {
		if p.Role.Value == study.Simulation && p.Quantity.Value == "pressure coefficient, upper branch" && p.Model.Value == "B" {
			run = p
		}
	}
	if run.ID == "" {
		t.Fatal("the demo has no curve of B")
	}
	again := run
	again.ID, again.Role = "again", entered(study.Precision)
	s.Slips = append(s.Slips, again)
	c := study.Evaluate(s, study.Options{}).Cells[3]
	if c.RoundOff == nil || c.RoundOff.N != 24 || c.RoundOff.Max != 0 {
		t.Errorf("the run itself: %+v, %+v", c.RoundOff, c.Notices)
	}
	// The same run, higher by a thousandth everywhere but for the first half.
	table, err := study.Read(*s.File(run.File)).Table(run.Table)
	if err != nil {
		t.Fatal(err)
	}
	var text strings.Builder
	text.WriteString("x/c,Cp\n")
	x, _ := table.Column(run.X.Column.Value)
	y, _ := table.Column(run.Y.Column.Value)
	for i := range y.Values {
		fmt.Fprintf(&text, "%v,%.9f\n", x.Values[i], y.Values[i]+.001*math.Round(x.Values[i]))
	}
	s.Slips = s.Slips[:len(s.Slips)-1]
	again.X.Column, again.Y.Column = entered("x/c"), entered("Cp")
	addTable(s, "single.csv", text.String(), again)
	c = study.Evaluate(s, study.Options{}).Cells[3]
	line, found := sourceOf(c, "round-off")
	if r := c.RoundOff; r == nil || r.N != 24 || math.Abs(float64(r.Max)-.001) > 1e-9 || !(r.RMS > .0005 && r.RMS < .001) || !found || math.Abs(float64(r.RMS)-.001*math.Sqrt(10./24)) > 1e-9 || math.Abs(float64(line.U-r.RMS)) > 1e-15 {
		t.Errorf("higher by a thousandth: %+v, %+v", c.RoundOff, line)
	}
}

// N13: both sums of the parts of u_num. They differ by 41 % for two equal
// parts, and by a choice the larger is used; its parts then make up the whole.
func TestSumsOfNumericalParts(t *testing.T) {
	grid := float64(dragOf(message.Demo()).Stations[0].UNum)
	for _, row := range []struct {
		u     float64
		apart bool
	}{{grid, true}, {.1 * grid, false}} {
		s := monitored(map[string]string{"G4": history(settled(.02995))})
		set(t, s, runTarget("u_iter", "G4"), fmt.Sprintf("%.12g", 2*row.u))
		set(t, s, runTarget("u_iter_why", "G4"), "by hand")
		c := dragOf(s)
		root, sum := math.Hypot(grid, row.u), grid+row.u
		if n := c.NumSums; n == nil || math.Abs(float64(n.Root)/root-1) > 1e-6 || math.Abs(float64(n.Linear)/sum-1) > 1e-6 || n.Apart != row.apart || notice.Has(c.Notices, "num-sums") != row.apart {
			t.Fatalf("%v: %+v", row.u, c.NumSums)
		}
		if math.Abs(float64(c.Stations[0].UNum)/root-1) > 1e-6 {
			t.Errorf("u_num %v, want %v", c.Stations[0].UNum, root)
		}
		set(t, s, study.Target{Kind: "question", ID: dragID, Field: "choices.num_linear"}, "yes")
		c = dragOf(s)
		line, _ := sourceOf(c, "iteration")
		if math.Abs(float64(c.Stations[0].UNum)/sum-1) > 1e-6 || math.Abs(float64(line.U)/row.u-1) > 1e-6 {
			t.Errorf("u_num %v, want %v; u of iteration %v", c.Stations[0].UNum, sum, line.U)
		}
		shares := 0.
		for _, l := range c.Sources {
			shares += float64(l.Share)
		}
		if math.Abs(shares-1) > 1e-6 {
			t.Errorf("the shares add up to %v", shares)
		}
	}
	if c := dragOf(message.Demo()); c.NumSums != nil {
		t.Errorf("one part has no sums: %+v", c.NumSums)
	}
}

// Monitors of the drag stand for the pressure where a person says why; the
// drag's own uncertainty is not in that of the pressure.
func TestStandIn(t *testing.T) {
	pressure := func(s *study.Study) study.Cell { return study.Evaluate(s, study.Options{}).Cells[3] }
	s := monitored(map[string]string{"G2": history(settled(.03068)), "G3": history(settled(.03021)), "G4": history(settled(.02995))})
	before := pressure(s)
	id := before.Case + "|" + before.Quantity
	if before.Courses[0] != study.Empty && before.Courses[0] != study.Doubts || len(before.Monitors) != 0 {
		t.Fatalf("course 1 %s", before.Courses[0])
	}
	stand := func(field, value string) {
		set(t, s, study.Target{Kind: study.ItemRun, ID: id, Field: field + "||"}, value)
	}
	stand("stand_in", "drag coefficient")
	if c := pressure(s); len(c.Monitors) != 0 || !opened(c, "stand_in_why") {
		t.Errorf("no reason is needed: %+v", c.Open)
	}
	stand("stand_in_why", "the drag is mostly that of the pressure")
	c := pressure(s)
	if len(c.Monitors) != 3 || c.Monitors[0].Quantity != "drag coefficient" || !notice.Has(c.Notices, "monitor-stands") || c.Courses[0] != study.Settled {
		t.Errorf("%d monitors, course 1 %s, %+v", len(c.Monitors), c.Courses[0], c.Open)
	}
	if c.Stations[0].UNum != before.Stations[0].UNum {
		t.Errorf("u_num %v became %v", before.Stations[0].UNum, c.Stations[0].UNum)
	}
	// The memory of an evaluation sees that a monitor of the other quantity changes.
	m := &study.Memory{}
	study.Evaluate(s, study.Options{Memory: m})
	s = s.Clone()
	for i := range s.Files {
		if f := &s.Files[i]; f.Name == "C1-B-G4-monitor.dat" {
			f.Data = []byte(drifting(.02995))
			f.SHA256 = study.Hash(f.Data)
		}
	}
	if c := study.Evaluate(s, study.Options{Memory: m}).Cells[3]; !c.Withheld || !notice.Has(c.Notices, "monitor-drift") {
		t.Errorf("a drift of the drag does not stop the pressure: %+v", c.Open)
	}
}

// What was entered of runs is in the document and comes back from it.
func TestRunsAreKept(t *testing.T) {
	s := message.Demo()
	set(t, s, runTarget("u_iter", "G4"), "0.0002")
	set(t, s, study.Target{Kind: study.ItemRun, ID: "C1|pressure coefficient, upper branch", Field: "stand_in||"}, "drag coefficient")
	data, err := s.Save()
	if err != nil {
		t.Fatal(err)
	}
	back, notices, err := study.Load(data)
	if err != nil || len(notices) > 0 || *back.Questions[0].Runs[0].UIter != .0002 || back.Questions[1].StandIn.Quantity != "drag coefficient" {
		t.Errorf("%v, %v, %+v", err, notices, back.Questions[0].Runs)
	}
	clean, err := message.Demo().Save()
	for _, name := range []string{`"runs"`, `"stand_in"`, `"balance_of"`, `"num_linear"`} {
		if err != nil || strings.Contains(string(clean), name) {
			t.Errorf("%s is in a document that does not use it (%v)", name, err)
		}
	}
}

package study_test

import (
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/study"
)

// table writes columns under their names.
func table(names string, columns ...[]float64) string {
	var b strings.Builder
	b.WriteString(names + "\n")
	for i := range columns[0] {
		for k, c := range columns {
			if k > 0 {
				b.WriteByte(',')
			}
			fmt.Fprintf(&b, "%.12g", c[i])
		}
		b.WriteByte('\n')
	}
	return b.String()
}

// steps returns n numbers from lo to hi.
func steps(n int, lo, hi float64) []float64 {
	out := make([]float64, n)
	for i := range out {
		out[i] = lo + (hi-lo)*float64(i)/float64(n-1)
	}
	return out
}

func each(x []float64, f func(float64) float64) []float64 {
	out := make([]float64, len(x))
	for i, v := range x {
		out[i] = f(v)
	}
	return out
}

// of makes a pair of two functions on two sets of stations.
func of(sx, dx []float64, s, d func(float64) float64) *study.Study {
	return pair(table("x,y", sx, each(sx, s)), table("x,y", dx, each(dx, d)), "m", "m")
}

func setQuestion(t *testing.T, s *study.Study, field, value string) {
	t.Helper()
	if err := s.Set(study.Target{Kind: "question", ID: "C|q", Field: field}, value, "10:00", ""); err != nil {
		t.Fatal(err)
	}
}

func wave(x float64) float64 { return 2 + math.Sin(6*x) }

func raised(x float64) float64 { return wave(x) + .02*math.Cos(9*x) }

// The file order is told by its hash: a sorted copy is compared, the same
// numbers in another order have another hash and the same comparison.
func TestOrderOfRowsIsTold(t *testing.T) {
	x := steps(40, 0, 1)
	falling := slices.Clone(x)
	slices.Reverse(falling)
	a, b := only(t, of(x, steps(9, .1, .9), raised, wave)), only(t, of(falling, steps(9, .1, .9), raised, wave))
	read := study.Read(of(x, x, raised, wave).Files[0])
	oa, ob := a.Treatment.Orders, b.Treatment.Orders
	if len(oa) != 2 || oa[0].File != "sim.csv" || oa[0].Sorted || !ob[0].Sorted || oa[0].Hash == ob[0].Hash || oa[1].Hash != ob[1].Hash || oa[0].Hash != study.OrderHash(read.Tables[0].Columns[0].Values) {
		t.Errorf("orders %+v and %+v", oa, ob)
	}
	if !notice.Has(b.Notices, "curve-unsorted") || a.Summary.RMSE != b.Summary.RMSE {
		t.Errorf("RMSE %v and %v, notices %+v", a.Summary.RMSE, b.Summary.RMSE, b.Notices)
	}
	if study.OrderHash([]float64{1, 2}) == study.OrderHash([]float64{2, 1}) {
		t.Error("the hash does not see the order")
	}
}

// A closed section, written any way round, gives one comparison of its upper
// side.
func TestBranchesAnyWayRound(t *testing.T) {
	var x, y, cp []float64
	for i := range 81 {
		at := math.Abs(1 - float64(i)/40)
		side := 1.0
		if i > 40 {
			side = -1
		}
		x, y, cp = append(x, at), append(y, side*.1*math.Sqrt(at)*(1-at)), append(cp, -side*math.Sqrt(at)*(1.05-at))
	}
	turned := func(v []float64, k int) []float64 { v = v[:len(v)-1]; return append(slices.Clone(v[k:]), v[:k]...) }
	reversed := func(v []float64) []float64 { w := slices.Clone(v); slices.Reverse(w); return w }
	taps := steps(12, .06, .93)
	measured := each(taps, func(x float64) float64 { return -math.Sqrt(x)*(1.05-x) + .01*x })
	want := study.Number(0)
	for _, row := range []struct {
		name  string
		write func([]float64) []float64
		blunt bool
	}{
		{"as made", slices.Clone[[]float64], false}, {"reversed", reversed, false}, {"from row 13", func(v []float64) []float64 { return turned(v, 13) }, false},
		{"from the leading edge", func(v []float64) []float64 { return turned(v, 40) }, false}, {"trailing edge once", func(v []float64) []float64 { return v[:len(v)-1] }, false},
		{"trailing edge twice", func(v []float64) []float64 { return append(slices.Clone(v), v[0]) }, false}, {"blunt", slices.Clone[[]float64], true},
	} {
		sx, sy, sp := row.write(x), row.write(y), row.write(cp)
		if row.blunt {
			sx, sy, sp = append([]float64{1}, sx...), append([]float64{-.002}, sy...), append([]float64{.05}, sp...)
		}
		s := pair(table("x,y,h", sx, sp, sy), table("x,y", taps, measured), "m", "m")
		s.Slips[0].Branch, s.Slips[0].Contour = entered(profile.Upper), study.ColumnUse{Column: entered("h"), Unit: entered("m")}
		c := only(t, s)
		if c.Summary == nil || c.Summary.N != len(taps) {
			t.Fatalf("%s: %+v", row.name, c.Notices)
		}
		if want == 0 {
			want = c.Summary.RMSE
		}
		if math.Abs(float64(c.Summary.RMSE-want)) > 1e-12 {
			t.Errorf("%s: RMSE %v, want %v", row.name, c.Summary.RMSE, want)
		}
	}
}

// Along a circle both sides are compared by arc length: the pressure of the
// whole loop has one value at every length. Without the second coordinate x is
// used and told; a length is never compared with a coordinate.
func TestArcLengthIsAnAbscissa(t *testing.T) {
	ring := func(n int, add float64) string {
		at := steps(n, 0, 2*math.Pi)
		return table("x,y,h", each(at, math.Cos), each(at, func(a float64) float64 { return 1 - 4*math.Pow(math.Sin(a), 2) + add }), each(at, math.Sin))
	}
	make := func(abscissa string, contour bool) *study.Study {
		s := pair(ring(1001, .1), ring(37, 0), "m", "m")
		for i := range s.Slips {
			s.Slips[i].Abscissa = entered(abscissa)
			if contour {
				s.Slips[i].Contour = study.ColumnUse{Column: entered("h"), Unit: entered("m")}
			}
		}
		return s
	}
	for abscissa, whole := range map[string]float64{study.AlongArc: 2 * math.Pi, study.AlongArcPart: 1} {
		c := only(t, make(abscissa, true))
		if c.Summary == nil || c.Summary.N < 36 || math.Abs(float64(c.Summary.Bias)-.1) > 1e-3 || !notice.Has(c.Notices, "arc-taken") {
			t.Fatalf("%s: %+v %+v", abscissa, c.Summary, c.Notices)
		}
		if last := float64(c.Curve.X[len(c.Curve.X)-1]); math.Abs(last/whole-1) > 1e-6 {
			t.Errorf("%s: length %.9f, want %.9f", abscissa, last, whole)
		}
		if want := map[string]string{study.AlongArc: "s m", study.AlongArcPart: "s/s_max 1"}[abscissa]; c.XName+" "+c.XUnit != want {
			t.Errorf("%s: stations are %s %s", abscissa, c.XName, c.XUnit)
		}
	}
	if c := only(t, make(study.AlongArc, false)); !notice.Has(c.Notices, "arc-missing") {
		t.Errorf("no word of the missing coordinate: %+v", c.Notices)
	}
	mixed := make(study.AlongArc, true)
	mixed.Slips[1].Abscissa = study.Field{}
	if c := only(t, mixed); !notice.Has(c.Notices, "arc-mixed") || c.Summary != nil || !c.Withheld {
		t.Errorf("a length was compared with a coordinate: %+v", c.Notices)
	}
}

// Each cause of two values at one station is asked about in its own words, and
// the answer acts and stays in the study.
func TestRepeatedStations(t *testing.T) {
	sx := steps(60, 0, 1)
	with := func(at float64, first, second float64) ([]float64, []float64) {
		x, y := []float64{}, []float64{}
		for _, v := range steps(21, 0, 1) {
			if math.Abs(v-at) < 1e-9 {
				x, y = append(x, v, v), append(y, first, second)
				continue
			}
			value := wave(v)
			if first < second && v > at && second-first > .5 {
				value += second - first
			}
			x, y = append(x, v), append(y, value)
		}
		return x, y
	}
	readX, readY := with(.5, wave(.5)+.04, wave(.5)-.02)
	stepX, stepY := with(.5, wave(.5), wave(.5)+1)
	zoneX := append(steps(11, 0, .5), steps(13, .4, 1)...)
	zoneY := each(zoneX, wave)
	zoneY[11] += .05 // the second part begins at .4 with its own values
	for _, row := range []struct {
		name, code string
		x, y       []float64
	}{{"read again", "rows-repeated", readX, readY}, {"jump", "rows-jump", stepX, stepY}, {"zones", "rows-zones", zoneX, zoneY}} {
		s := pair(table("x,y", sx, each(sx, raised)), table("x,y", row.x, row.y), "m", "m")
		c := only(t, s)
		codes := []string{}
		var target study.Target
		for _, n := range c.Notices {
			if strings.HasPrefix(n.Code, "rows-") {
				codes = append(codes, n.Code)
			}
		}
		for _, o := range c.Open {
			if o.Target.Field == "repeats" {
				target = o.Target
			}
		}
		if fmt.Sprint(codes) != "["+row.code+"]" || target.ID != "r" {
			t.Errorf("%s: told %v, open %+v", row.name, codes, c.Open)
			continue
		}
		all, merged := len(row.x), len(row.x)-1
		if row.name == "zones" {
			merged -= 2 // two rows more that are written twice with equal values
		}
		for answer, n := range map[string]int{study.KeptBoth: all, study.Averaged: merged, study.FirstKept: merged} {
			if err := s.Set(target, answer, "10:00", "as the log of the test says"); err != nil {
				t.Fatal(err)
			}
			data, err := s.Save()
			if err != nil {
				t.Fatal(err)
			}
			after := only(t, mustLoad(t, data))
			if after.Summary.N != n || notice.Has(after.Notices, row.code) || notice.Has(after.Notices, "station-missing") || slices.ContainsFunc(after.Open, func(o study.Open) bool { return o.Target.Field == "repeats" }) {
				t.Errorf("%s, %s: n %d, want %d, open %+v", row.name, answer, after.Summary.N, n, after.Open)
			}
			if row.name == "read again" && answer == study.Averaged {
				at := slices.IndexFunc(after.Stations, func(s study.Station) bool { return s.X == .5 })
				if math.Abs(float64(after.Stations[at].D)-wave(.5)-.01) > 1e-9 || !notice.Has(after.Notices, "rows-averaged") {
					t.Errorf("averaged D %v, want %v", after.Stations[at].D, wave(.5)+.01)
				}
			}
		}
	}
	// Where the curve goes out and back it is two places, by any answer.
	loop := pair(table("x,y", sx, each(sx, raised)), table("x,y", append(steps(11, 1, 0), steps(11, .1, 1)...), each(steps(22, 0, 5), math.Sin)), "m", "m")
	if c := only(t, loop); !notice.Has(c.Notices, "rows-sides") {
		t.Errorf("out and back: %+v", c.Notices)
	}
	// Equal rows of a simulation are used once, different ones stop nothing but are asked about.
	twice := of(append(slices.Clone(sx[:30]), sx[29:]...), steps(9, .1, .9), raised, wave)
	if c := only(t, twice); !notice.Has(c.Notices, "curve-duplicate") || notice.Has(c.Notices, "rows-repeated") {
		t.Errorf("equal rows: %+v", c.Notices)
	}
}

// A hole wider than m median spacings is a gap by choice: stations inside are
// not compared, m is in the report and the notice.
func TestGapByChoice(t *testing.T) {
	sx := append(steps(31, 0, .3), steps(31, .5, .8)...) // spacing 0.01, a hole of 20 of them
	s := of(sx, steps(17, 0, .8), raised, wave)
	c := only(t, s)
	if c.Choices.Gap != 10 || c.Summary.N != 14 || !notice.Has(c.Notices, "curve-gap") || c.StationsAll != 17 {
		t.Errorf("m %v, n %d of %d, %+v", c.Choices.Gap, c.Summary.N, c.StationsAll, c.Notices)
	}
	if in := c.Treatment.Integral; in.Pieces != 2 || math.Abs(float64(in.Length)-.6) > 1e-9 || math.Abs(float64(in.Whole)-.8) > 1e-9 {
		t.Errorf("the integral runs over the gap: %+v", in)
	}
	setQuestion(t, s, "choices.gap", "25")
	if c := only(t, s); c.Summary.N != 17 || notice.Has(c.Notices, "curve-gap") || c.Treatment.Integral.Pieces != 1 {
		t.Errorf("m = 25: n %d, %+v", c.Summary.N, c.Notices)
	}
}

// The integral of E is that of the difference where both have values, by the
// trapezoid: of E = 0.1 + 0.3 x over 0.2 to 1, within the simulated 0.2 to 1.4,
// it is 0.1 · 0.8 + 0.15 · 0.96 = 0.224. Stations outside and excluded ones
// part it; a common u of 0.01 gives 0.01 times the length.
func TestIntegralOverSupports(t *testing.T) {
	s := of(steps(200, .2, 1.4), steps(11, 0, 1), func(x float64) float64 { return wave(x) + .1 + .3*x }, wave)
	s.Questions[0].Sources = []study.Source{
		{Name: "zero", Of: study.OfData, Value: .01, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Common},
		{Name: "grid", Of: study.OfNumerical, Value: 1e-9, Basis: study.Absolute, Coverage: entered("1"), Pattern: study.Independent},
	}
	setQuestion(t, s, "choices.u_interp", "no")
	in := only(t, s).Treatment.Integral
	if math.Abs(float64(in.E)-.224) > 2e-4 || math.Abs(float64(in.Length)-.8) > 1e-9 || math.Abs(float64(in.Whole)-1) > 1e-9 || math.Abs(float64(in.U)-.008) > 1e-8 || in.Pieces != 1 {
		t.Errorf("%+v", in)
	}
	if math.Abs(float64(in.S-in.D-in.E)) > 1e-9 {
		t.Errorf("S %v less D %v is not E %v", in.S, in.D, in.E)
	}
	if err := s.Exclude(study.Target{Kind: "question", ID: "C|q", Field: "8"}, "probe broken", ""); err != nil { // x = 0.6
		t.Fatal(err)
	}
	in = only(t, s).Treatment.Integral
	if in.Pieces != 2 || math.Abs(float64(in.Length)-.6) > 1e-9 {
		t.Errorf("an excluded station was bridged: %+v", in)
	}
}

// The weights that the measures use are told for every station with the sum
// one, and act in bias, MAE and RMSE, never in the joint statistic: clustered
// taps count by the length they stand for, along the contour where it is known.
func TestWeightsOfStations(t *testing.T) {
	dx := append(steps(20, 0, .1), steps(10, .19, 1)...)
	s := of(steps(300, -.1, 1.1), dx, func(x float64) float64 { return wave(x) + x*x }, wave)
	equal := only(t, s)
	setQuestion(t, s, "scores.weights", study.WeightSpacing)
	c := only(t, s)
	sum, bias := 0.0, 0.0
	for _, p := range c.Stations {
		sum += float64(*p.Weight)
		bias += float64(*p.Weight * p.E)
	}
	told := 0.0
	for _, line := range c.Scores {
		if line.Name == "weighted mean E" {
			told = float64(line.Value)
		}
	}
	// The integral of x² over 0 to 1 is 1/3, by the trapezoid a little more.
	if math.Abs(sum-1) > 1e-9 || math.Abs(told-bias) > 1e-9 || math.Abs(bias-1./3) > 2e-3 || math.Abs(float64(equal.Summary.Bias)-1./3) < .1 || c.Treatment.Weights == "" {
		t.Errorf("sum %v, bias %v and %v, equal weights %v", sum, told, bias, equal.Summary.Bias)
	}
	if equal.Stations[0].Weight != nil || equal.Treatment.Weights != "" || c.Joint.Statistic != equal.Joint.Statistic {
		t.Errorf("joint %v and %v", c.Joint.Statistic, equal.Joint.Statistic)
	}
	// A quarter of a circle: equal steps of angle are equal lengths, but not equal steps of x.
	at := steps(10, 0, math.Pi/2)
	x := each(at, math.Cos)
	slices.Reverse(x)
	y := each(at, math.Sin)
	slices.Reverse(y)
	arc := pair(table("x,y", steps(50, -.1, 1.1), each(steps(50, -.1, 1.1), wave)), table("x,y,h", x, each(x, raised), y), "m", "m")
	setQuestion(t, arc, "scores.weights", study.WeightSpacing)
	arc.Slips[1].Contour = study.ColumnUse{Column: entered("h"), Unit: entered("m")}
	for i, p := range only(t, arc).Stations {
		want := 1. / 9
		if i == 0 || i == 9 {
			want /= 2
		}
		if math.Abs(float64(*p.Weight)-want) > 1e-6 {
			t.Errorf("station %d of the arc weighs %v, want %v", i, *p.Weight, want)
		}
	}
	w := make([]float64, len(dx))
	w[29] = 5 // the last station alone
	own := pair(table("x,y", steps(50, 0, 1), each(steps(50, 0, 1), raised)), table("x,y,w", dx, each(dx, wave), w), "m", "m")
	setQuestion(t, own, "scores.weights", "w")
	if c := only(t, own); *c.Stations[29].Weight != 1 || *c.Stations[0].Weight != 0 {
		t.Errorf("weights %v and %v", *c.Stations[0].Weight, *c.Stations[29].Weight)
	}
}

// A suction peak between two taps is told; where a tap stands in it, not.
func TestUnseenPeak(t *testing.T) {
	peak := func(x float64) float64 { return wave(x) - 3*math.Exp(-math.Pow((x-.34)/.02, 2)) }
	if c := only(t, of(steps(400, 0, 1), steps(11, 0, 1), peak, wave)); !notice.Has(c.Notices, "station-unseen") {
		t.Errorf("the peak was not told: %+v", c.Notices)
	}
	if c := only(t, of(steps(400, 0, 1), append(steps(4, 0, .3), append([]float64{.34}, steps(7, .4, 1)...)...), peak, peak)); notice.Has(c.Notices, "station-unseen") {
		t.Errorf("a peak with a tap in it was told: %+v", c.Notices)
	}
}

// The uncertainty of the place acts by the slope: twice the one is twice the
// other, at a slope of 3 it is 3 u_x.
func TestPositionUncertainty(t *testing.T) {
	term := func(value float64, pattern string) *study.Cell {
		s := of(steps(50, 0, 1), steps(11, 0, 1), func(x float64) float64 { return 1 - 3*x + .01 }, func(x float64) float64 { return 1 - 3*x })
		s.Questions[0].Sources[0] = study.Source{Name: "place", Of: study.OfData, Value: value, Basis: study.OfPosition, Coverage: entered("2"), Pattern: pattern}
		return only(t, s)
	}
	one, two := term(.004, study.Independent), term(.008, study.Independent)
	for i := range one.Stations {
		if a, b := float64(one.Stations[i].UD), float64(two.Stations[i].UD); math.Abs(a-.006) > 1e-9 || math.Abs(b/a-2) > 1e-9 {
			t.Errorf("station %d: u_D %v and %v", i, a, b)
		}
	}
	if common := term(.004, study.Common); common.Sources[0].Pattern != study.Common || common.Joint == nil || common.Joint.Statistic == one.Joint.Statistic {
		t.Errorf("a common shift: %+v", common.Sources)
	}
	if !strings.Contains(one.Sources[0].Text, "0.004 m of the place") {
		t.Errorf("text %q", one.Sources[0].Text)
	}
}

// A probe of a width averages S: a straight line is unchanged, a parabola
// gains h²/24 f”.
func TestProbeWidth(t *testing.T) {
	for _, row := range []struct {
		f    func(float64) float64
		gain float64
	}{{func(x float64) float64 { return 1 + 2*x }, 0}, {func(x float64) float64 { return 5 * x * x }, .2 * .2 / 24 * 10}} {
		s := of(steps(2001, -.2, 1.2), steps(11, 0, 1), row.f, row.f)
		setQuestion(t, s, "choices.probe", "0.2")
		c := only(t, s)
		if c.Summary == nil || c.Summary.N != 11 || math.Abs(float64(c.Summary.Bias)-row.gain) > 1e-5+1e-3*row.gain {
			t.Errorf("gain %v, want %v", c.Summary, row.gain)
		}
	}
}

// Phases on either side of the seam are inside a declared period.
func TestPeriodicStations(t *testing.T) {
	f := func(x float64) float64 { return math.Sin(x * math.Pi / 180) }
	s := of(steps(36, 5, 355), []float64{0, 90, 180, 270, 359, 361}, f, f)
	if c := only(t, s); c.Summary.N != 3 || len(c.Outside) != 3 {
		t.Errorf("without a period n = %d", c.Summary.N)
	}
	setQuestion(t, s, "choices.period", "360")
	if c := only(t, s); c.Summary.N != 6 || len(c.Outside) != 0 || c.Summary.MaxAbs > .005 {
		t.Errorf("with a period %+v", c.Summary)
	}
}

// A support point is used only where its physics is stated, is marked in the
// report, and answers stations between it and the first row.
func TestSupportPoints(t *testing.T) {
	u := func(y float64) float64 { return y * (2 - y) }
	s := of(steps(40, .02, .96), steps(21, 0, 1), u, u)
	before := only(t, s)
	anchor := study.Target{Kind: study.ItemAnchor, ID: "C|q"}
	add := func(kind, x, why string) {
		t.Helper()
		n := len(s.Questions[0].Anchors)
		if err := s.AddItem(anchor, ""); err != nil {
			t.Fatal(err)
		}
		for field, value := range map[string]string{"kind": kind, "x": x, "why": why} {
			if err := s.Set(study.Target{Kind: study.ItemAnchor, ID: "C|q", Field: fmt.Sprintf("%d.%s", n, field)}, value, "", ""); err != nil {
				t.Fatal(err)
			}
		}
	}
	add(study.AtWall, "0", "")
	if c := only(t, s); c.Summary.N != before.Summary.N || !notice.Has(c.Notices, "anchor-reason") {
		t.Errorf("a support point without a reason was used: n %d", c.Summary.N)
	}
	set := study.Target{Kind: study.ItemAnchor, ID: "C|q", Field: "0.why"}
	if err := s.Set(set, "no slip at the wall", "", ""); err != nil {
		t.Fatal(err)
	}
	add(study.AtSymmetry, "1", "plane of symmetry")
	add(study.AtWall, "0.5", "inside the line")
	c := only(t, s)
	if before.Summary.N != 19 || c.Summary.N != 21 || c.Summary.MaxAbs > .002 || !notice.Has(c.Notices, "anchor-inside") {
		t.Errorf("n %d and %d, %+v", before.Summary.N, c.Summary.N, c.Notices)
	}
	a := c.Treatment.Anchors
	if len(a) != 2 || a[0].X != 0 || a[0].Value != 0 || a[0].Why != "no slip at the wall" || math.Abs(float64(a[1].X)-1.04) > 1e-9 || math.Abs(float64(a[1].Value)-u(.96)) > 1e-9 {
		t.Errorf("support points %+v", a)
	}
}

// The place of the values is recorded with the simulation.
func TestSamplingIsRecorded(t *testing.T) {
	s := of(steps(40, 0, 1), steps(9, .1, .9), raised, wave)
	before := only(t, s)
	if err := s.Set(study.Target{Kind: "slip", ID: "s", Field: "sampling"}, study.AtCellCentres, "", ""); err != nil {
		t.Fatal(err)
	}
	if c := only(t, s); c.Treatment.Sampling != study.AtCellCentres || c.Summary.RMSE != before.Summary.RMSE || before.Treatment.Sampling != "" {
		t.Errorf("sampling %q", c.Treatment.Sampling)
	}
}

// Stations locked before the comparison was seen stand in the log before the
// showing; what changes after is told.
func TestStationPlan(t *testing.T) {
	s := of(steps(40, 0, 1), steps(9, .1, .9), raised, wave)
	if err := s.RevealPlanned("C|q", "10:00"); err != nil {
		t.Fatal(err)
	}
	if n := len(s.Log); n != 2 || !strings.Contains(s.Log[0].What, "locked: all used") || s.Log[0].Why != "requirement not set" || s.Log[0].Shown || !strings.Contains(s.Log[1].What, "shown") {
		t.Errorf("log %+v", s.Log)
	}
	p := only(t, s).Treatment.Plan
	if p == nil || p.At != "10:00" || p.Late || len(p.Changes) != 0 {
		t.Fatalf("plan %+v", p)
	}
	if err := s.Exclude(study.Target{Kind: "question", ID: "C|q", Field: "4"}, "leak", "10:10"); err != nil {
		t.Fatal(err)
	}
	setQuestion(t, s, "choices.gap", "20")
	c := only(t, s)
	if got := strings.Join(c.Treatment.Plan.Changes, "; "); got != "the choices that decide which stations are compared; 1 station excluded" || !notice.Has(c.Notices, "plan-changed") {
		t.Errorf("changes %q", got)
	}
	if last := s.Log[len(s.Log)-1]; !last.Shown {
		t.Errorf("a change after the showing is not logged as such: %+v", last)
	}
	setQuestion(t, s, "plan", study.Locked)
	if c := only(t, s); !c.Treatment.Plan.Late || len(c.Treatment.Plan.Changes) != 0 || !notice.Has(c.Notices, "plan-late") || notice.Has(c.Notices, "plan-changed") {
		t.Errorf("locked again: %+v", c.Treatment.Plan)
	}
	setQuestion(t, s, "plan", "")
	if c := only(t, s); c.Treatment.Plan != nil {
		t.Error("opened stations are locked")
	}
}

// A scatter above what is stated as random is offered, never entered.
func TestNoiseIsOffered(t *testing.T) {
	noisy := func(x float64) float64 { return wave(x) + .1*math.Sin(1e5*x*x+3*x) }
	s := of(steps(200, 0, 1), steps(101, 0, 1), wave, noisy)
	c := only(t, s)
	// The amplitude .1 of a sine has the standard deviation .0707.
	if n := c.Treatment.Noise; n == nil || math.Abs(float64(n.S)-.0707) > .02 || math.Abs(float64(n.Stated)-.01) > 1e-12 || !notice.Has(c.Notices, "noise-more") || c.Stations[0].UD != .01 {
		t.Errorf("noise %+v, u_D %v", n, c.Stations[0].UD)
	}
	s.Questions[0].Sources[0].Value = .2
	if c := only(t, s); notice.Has(c.Notices, "noise-more") {
		t.Error("a stated scatter that is larger was doubted")
	}
	s.Questions[0].Sources[0].Pattern = study.Common
	if c := only(t, s); !notice.Has(c.Notices, "noise-unstated") || c.Treatment.Noise.Stated.Known() {
		t.Errorf("without a random source: %+v", c.Treatment.Noise)
	}
	if c := only(t, of(steps(200, 0, 1), steps(31, 0, 1), raised, wave)); c.Treatment.Noise != nil {
		t.Errorf("a smooth curve scatters: %+v", c.Treatment.Noise)
	}
}

// A shift and a scale are reported and change nothing.
func TestDisplacementIsReportedOnly(t *testing.T) {
	f := func(x float64) float64 { return 2 + math.Exp(-50*(x-.5)*(x-.5)) }
	c := only(t, of(steps(2001, -.5, 1.5), steps(41, 0, 1), func(x float64) float64 { return f(x + .03) }, f))
	fit := c.Treatment.Fit
	if fit == nil || math.Abs(float64(fit.Shift)-.03) > 1e-3 || fit.ShiftRMS > .01*fit.RMS || fit.RMS != c.Summary.RMSE {
		t.Errorf("fit %+v, RMSE %v", fit, c.Summary.RMSE)
	}
}

// Smoothing acts on changes of sign alone, by a declared window.
func TestSmoothingOfChangesOfSign(t *testing.T) {
	rough := func(x float64) float64 { return x - .5 + .06*math.Sin(180*x) }
	s := of(steps(101, 0, 1), steps(11, 0, 1), rough, func(x float64) float64 { return x - .52 })
	raw := only(t, s)
	setQuestion(t, s, "choices.smooth", "21")
	c := only(t, s)
	if len(raw.Crossings.Simulation) < 3 || len(c.Crossings.Simulation) != 1 || math.Abs(float64(c.Crossings.Simulation[0].X)-.5) > .02 || c.Summary.RMSE != raw.Summary.RMSE || c.Choices.Smooth != 21 {
		t.Errorf("%d crossings as read, %+v smoothed", len(raw.Crossings.Simulation), c.Crossings.Simulation)
	}
	if !slices.Equal(raw.Curve.Y, c.Curve.Y) {
		t.Error("the drawn curve was smoothed")
	}
	for _, value := range []string{"4", "2.5", "-3", "1001", "x"} {
		if err := s.Set(study.Target{Kind: "question", ID: "C|q", Field: "choices.smooth"}, value, "", ""); err == nil {
			t.Errorf("a window of %s was taken", value)
		}
	}
}

// A spline is refused, in an operation and in a document.
func TestSplineIsRefused(t *testing.T) {
	s := of(steps(40, 0, 1), steps(9, .1, .9), raised, wave)
	if err := s.Set(study.Target{Kind: "question", ID: "C|q", Field: "choices.interpolation"}, "spline", "", ""); err == nil {
		t.Error("a spline was taken")
	}
	s.Questions[0].Choices.Interpolation = "spline"
	if c := only(t, s); !notice.Has(c.Notices, "interpolation-unknown") || c.Summary != nil {
		t.Errorf("a spline in a document: %+v", c.Notices)
	}
}

package study_test

import (
	"math"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/study"
)

// The correlation of the pressure reference turns the conclusion where the
// design of the demo (6.1) prints it: .0215 for A, .684 for B; the joint
// parts sum to the statistic.
func TestTurnings(t *testing.T) {
	r := study.Evaluate(message.Demo(), study.Options{Alternatives: true})
	for i, want := range map[int]float64{2: .0215, 3: .684} {
		j := r.Cells[i].Joint
		if len(j.Turns) != 1 || math.Abs(float64(j.Turns[0].Rho)-want) > .0005 {
			t.Errorf("cell %d: turns %+v, want %v", i, j.Turns, want)
		}
		whole := float64(j.OffsetPart + j.ScalePart + j.ShapePart)
		if math.Abs(whole-float64(j.Statistic)) > 1e-8*whole {
			t.Errorf("cell %d: parts sum to %v of %v", i, whole, j.Statistic)
		}
		if !j.AtLeast.Known() || j.AtLeast != 1 { // none was found beyond
			t.Errorf("cell %d: probability of at least none is %v", i, j.AtLeast)
		}
	}
}

// Every basis and pattern of a source on one small curve, u by hand.
func TestSourceBases(t *testing.T) {
	ref := "x,y,half\n0.1,2,1\n0.4,-3,1\n0.8,4,2\n"
	base := func(s study.Source) *study.Cell {
		p := pair(rows(30, even, func(x float64) float64 { return 2 + x }), ref, "m", "m")
		s.Name, s.Of, s.Coverage = "source", study.OfData, entered("2")
		p.Questions[0].Sources[0] = s
		return only(t, p)
	}
	for _, row := range []struct {
		name string
		s    study.Source
		want [3]float64
	}{
		{"absolute", study.Source{Value: .2, Basis: study.Absolute, Pattern: study.Independent}, [3]float64{.1, .1, .1}},
		{"reading", study.Source{Value: 10, Basis: study.OfReading, Pattern: study.Common}, [3]float64{.1, .15, .2}},
		{"full scale", study.Source{Value: .25, Basis: study.OfFullScale, FullScale: 80, Pattern: study.Independent}, [3]float64{.1, .1, .1}},
		{"group", study.Source{Value: .2, Basis: study.Absolute, Pattern: study.Grouped, Group: "half"}, [3]float64{.1, .1, .1}},
		{"length", study.Source{Value: .2, Basis: study.Absolute, Pattern: study.Length, Length: .3}, [3]float64{.1, .1, .1}},
	} {
		c := base(row.s)
		for i, want := range row.want {
			if got := float64(c.Stations[i].UD); math.Abs(got-want) > 1e-12 {
				t.Errorf("%s: u_D[%d] = %v, want %v", row.name, i, got, want)
			}
		}
		if c.Joint == nil {
			t.Errorf("%s: no joint statistic: %+v", row.name, c.Notices)
		}
	}
	for name, s := range map[string]study.Source{
		"no full scale": {Value: 1, Basis: study.OfFullScale, Pattern: study.Independent},
		"no length":     {Value: 1, Basis: study.Absolute, Pattern: study.Length},
		"no group":      {Value: 1, Basis: study.Absolute, Pattern: study.Grouped, Group: "nothing"},
	} {
		if c := base(s); !c.Withheld {
			t.Errorf("%s: the statement is not withheld", name)
		}
	}
}

// A common scale error acts with the sign of the reading: with readings of
// both signs the statistic differs from that of a common offset of the same
// size.
func TestCommonScaleHasSigns(t *testing.T) {
	statistic := func(basis string, value float64) float64 {
		p := pair(rows(30, even, func(x float64) float64 { return 1.1 * (x - .5) }), rows(11, func(i int) float64 { return float64(i) / 10 }, func(x float64) float64 { return x - .5 }), "m", "m")
		p.Questions[0].Sources = append(p.Questions[0].Sources, study.Source{Name: "scale", Of: study.OfData, Value: value, Basis: basis, Coverage: entered("1"), Pattern: study.Common})
		return float64(only(t, p).Joint.Statistic)
	}
	if scale, offset := statistic(study.OfReading, 10), statistic(study.Absolute, .03); scale > 2 || offset < 5*scale {
		t.Errorf("a scale error explains a scale difference: %v with a common scale, %v with a common offset", scale, offset)
	}
}

// Three readings need t = 4.30 (Student, 2 degrees of freedom; table value of
// published-examples.md, section 7: 4.303).
func TestFewReadings(t *testing.T) {
	s := message.Demo()
	text := "run,Cd\n1,0.02951\n2,0.02968\n3,0.02958\n"
	for i := range s.Files {
		if s.Files[i].Name == "C1-balance.csv" {
			s.Files[i].Data, s.Files[i].SHA256 = []byte(text), study.Hash([]byte(text))
		}
	}
	s.Questions[0].Sources = nil
	c := study.Evaluate(s, study.Options{}).Cells[1]
	told := false
	for _, n := range c.Notices {
		told = told || n.Code == "readings-few" && n.Text == "3 readings: 95 % needs a factor 4.30, not 2."
	}
	if !told {
		t.Errorf("notices %+v", c.Notices)
	}
	if notice.Has(study.Evaluate(message.Demo(), study.Options{}).Cells[1].Notices, "readings-few") {
		t.Error("five readings are told as few")
	}
}

// Leaving out the region that carries the difference turns the conclusion,
// and that is among the alternatives.
func TestLeavingOutRegions(t *testing.T) {
	s := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return float64(i) / 19 }, func(x float64) float64 {
		if x > .8 {
			return smooth(x) + .08
		}
		return smooth(x) + .004
	}), "m", "m")
	s.Questions[0].Regions = []study.Region{{Name: "rear", From: .8, To: 1}, {Name: "front", From: 0, To: .4}}
	c := only(t, s)
	if len(c.Joint.Without) != 2 || !c.Joint.Exceeds || c.Joint.Without[0].Exceeds || !c.Joint.Without[1].Exceeds {
		t.Fatalf("joint %+v", c.Joint)
	}
	told := false
	for _, f := range c.Fragile {
		told = told || f.Change == "without rear"
	}
	if !told {
		t.Errorf("alternatives %+v", c.Fragile)
	}
}

// The place of a crossing carries the uncertainty of the values over the
// slope: y = x - 0.41 with u_num = u_D = 0.01 has u = 0.01 in x.
func TestCrossingUncertainty(t *testing.T) {
	f := func(x float64) float64 { return x - .41 }
	c := only(t, pair(rows(30, even, f), rows(20, func(i int) float64 { return float64(i) / 19 }, f), "m", "m"))
	for name, list := range map[string][]study.Crossing{"simulation": c.Crossings.Simulation, "reference": c.Crossings.Reference} {
		if len(list) != 1 || math.Abs(float64(list[0].X)-.41) > 1e-6 || math.Abs(float64(list[0].U)-.01) > 1e-5 {
			t.Errorf("%s: %+v", name, list)
		}
	}
}

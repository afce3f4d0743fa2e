package study_test

import (
	"bytes"
	"crypto/sha256"
	"encoding/binary"
	"encoding/json"
	"math"
	"math/rand/v2"
	"slices"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// numbersOf lists the paths of all numbers of the cells of a report as it is
// written, in order.
func numbersOf(t *testing.T, r *study.Report) (values map[string]float64, paths []string, seed uint64) {
	t.Helper()
	data, err := json.Marshal(r)
	if err != nil {
		t.Fatal(err)
	}
	var tree map[string]any
	d := json.NewDecoder(bytes.NewReader(data))
	d.UseNumber()
	if err := d.Decode(&tree); err != nil {
		t.Fatal(err)
	}
	values = map[string]float64{}
	var walk func(any, string)
	walk = func(v any, path string) {
		switch v := v.(type) {
		case map[string]any:
			for name, inner := range v {
				walk(inner, path+"."+name)
			}
		case []any:
			for i, inner := range v {
				walk(inner, path+"."+strconv.Itoa(i))
			}
		case json.Number:
			values[path], _ = v.Float64()
			paths = append(paths, path)
		}
	}
	walk(tree["cells"], "cells")
	slices.Sort(paths)
	hash := sha256.Sum256(data)
	return values, paths, binary.BigEndian.Uint64(hash[:])
}

// walked follows a number to the files and entries it comes from.
type walked struct {
	t                          *testing.T
	s                          *study.Study
	walk                       *study.Walk
	values                     map[string]float64 // of the report, as printed
	draw                       *rand.Rand
	seen                       map[string]bool
	steps, formulas, leaves    int
	inFiles, entries, reasoned int
}

func (w *walked) follow(path string, depth int) {
	if w.seen[path] {
		return
	}
	w.seen[path] = true
	if depth > 12 {
		w.t.Errorf("%s: the walk does not end", path)
		return
	}
	step, err := w.walk.Step(path)
	if err != nil {
		w.t.Errorf("%s: %v", path, err)
		return
	}
	w.steps++
	if v, ok := w.values[path]; ok && quantity.Round(float64(step.Value), 10) != quantity.Round(v, 10) {
		w.t.Errorf("%s: the walk has %v, the report %v", path, step.Value, v)
	}
	if !strings.Contains(path, "*") {
		switch {
		case step.Origin != nil:
			w.leaf(path, step)
		case len(step.Inputs) == 0 && step.Why == "":
			w.t.Errorf("%s: the walk ends without a place or a reason: %+v", path, step)
		case step.Why != "":
			w.reasoned++
		case !step.Agrees:
			w.t.Errorf("%s: the formula %q gives %v from its inputs, the report has %v: %+v", path, step.Formula, step.Again, step.Value, step.Inputs)
		default:
			w.formulas++
		}
	}
	next := step.Inputs
	if strings.Contains(path, "*") && len(next) > 3 { // of a list a few members
		next = []study.StepInput{}
		for range 3 {
			next = append(next, step.Inputs[w.draw.IntN(len(step.Inputs))])
		}
	}
	for _, in := range next {
		if in.N != 0 && (in.N > 1 || in.Value.Known()) {
			w.follow(in.Path, depth+1)
		}
	}
}

// leaf holds the text at the end of a walk against the file itself.
func (w *walked) leaf(path string, step study.Step) {
	w.leaves++
	o := step.Origin
	if o.File == "" {
		w.entries++
		if v, err := strconv.ParseFloat(o.Text, 64); err != nil || math.Abs(v-float64(step.Value)) > 1e-12*math.Abs(v) {
			w.t.Errorf("%s: entered %q, value %v", path, o.Text, step.Value)
		}
		return
	}
	if step.Why != "" { // a derived value of all rows
		return
	}
	w.inFiles++
	if !step.Agrees {
		w.t.Errorf("%s: %+v reads as %v, the report uses %v", path, *o, step.Again, step.Value)
	}
	for _, f := range w.s.Files {
		if f.Name != o.File || bytes.HasPrefix(f.Data, []byte("PK")) {
			continue
		}
		lines := strings.Split(string(f.Data), "\n")
		if o.Line < 1 || o.Line > len(lines) || o.Text == "" || !strings.Contains(lines[o.Line-1], o.Text) || o.Column < 1 {
			w.t.Errorf("%s: %q does not stand on line %d of %s", path, o.Text, o.Line, o.File)
		}
		return
	}
}

// Hundreds of numbers drawn at random from the worked demo campaign and from a
// study of curves walk back to the files and entries they come from, and every
// formula on the way gives its number again from what it was printed from.
func TestNumbersWalkBackToTheirFiles(t *testing.T) {
	curves := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return 1000 * float64(i) / 19 }, func(x float64) float64 { return smooth(x/1000) + .02*math.Sin(x/50) }), "m", "mm")
	q := &curves.Questions[0]
	q.Sources = append(q.Sources,
		study.Source{Name: "offset", Of: study.OfData, Value: .03, Basis: study.Absolute, Coverage: entered("2"), Pattern: study.Common},
		study.Source{Name: "scale", Of: study.OfData, Value: 1, Basis: study.OfReading, Coverage: entered("95 %"), Pattern: study.Common},
		study.Source{Name: "range", Of: study.OfInput, Value: .25, Basis: study.OfFullScale, FullScale: 3, Coverage: entered("limits"), Pattern: study.Length, Length: 200})
	q.Regions = []study.Region{{Name: "front", From: 0, To: 300}}
	q.Requirement = &study.Requirement{Value: 6, Percent: true, Who: "someone", Date: "2026-01-02"}
	q.Scores = &study.Scoring{Dispersion: true, Threshold: .1, Fraction: .05, Allowance: .01}
	// Scores and weights of all kinds, and a scalar taken from curves.
	scored := pair(rows(30, even, smooth), rows(20, func(i int) float64 { return 1000 * float64(i) / 19 }, func(x float64) float64 { return smooth(x/1000) + .02*math.Cos(x/40) }), "m", "mm")
	scored.Questions[0].Scores = &study.Scoring{Correlation: true, Distribution: true, Percent: true, Weights: study.WeightSpacing, Scale: study.ScaleMean, Fraction: .1, AllowanceK: 2}
	crossing := scalarPair("crossing of a level", nil, rows(30, even, func(x float64) float64 { return 4 * (x - .5) }), rows(10, func(i int) float64 { return .05 + float64(i)/10 }, func(x float64) float64 { return 4 * (x - .52) }), "m", "1")
	crossing.Questions[0].Requirement = &study.Requirement{Value: .021}
	for name, row := range map[string]struct {
		s                       *study.Study
		draw, formulas, inFiles int
	}{"campaign": {message.DemoWorked(), 400, 700, 500}, "curves": {curves, 250, 150, 40}, "scores": {scored, 200, 120, 30}, "scalar of curves": {crossing, 120, 40, 10}} {
		r := study.Evaluate(row.s, study.Options{Alternatives: true})
		values, paths, seed := numbersOf(t, &r)
		w := &walked{t: t, s: row.s, walk: study.NewWalk(row.s, study.Options{}, &r), values: values, draw: rand.New(rand.NewPCG(seed, 1)), seen: map[string]bool{}}
		// By kind first, so that a few long lists do not take all draws.
		kinds := map[string][]string{}
		for _, p := range paths {
			kind := strings.Join(slices.DeleteFunc(strings.Split(p, "."), func(s string) bool { _, err := strconv.Atoi(s); return err == nil }), ".")
			kinds[kind] = append(kinds[kind], p)
		}
		var names []string
		for k := range kinds {
			names = append(names, k)
		}
		slices.Sort(names)
		for i := range row.draw {
			of := kinds[names[i%len(names)]]
			w.follow(of[w.draw.IntN(len(of))], 0)
		}
		if w.formulas < row.formulas || w.inFiles < row.inFiles || w.entries < 3 || w.reasoned > w.steps/5 {
			t.Errorf("%s: %d steps, of these %d formulas, %d places in files, %d entries, %d reasons", name, w.steps, w.formulas, w.inFiles, w.entries, w.reasoned)
		}
	}
}

// A number that its formula does not give is told, wherever the difference is
// more than the printed digits of the inputs explain.
func TestAWalkCannotLie(t *testing.T) {
	s := message.Demo()
	r := study.Evaluate(s, study.Options{Alternatives: true})
	altered := []struct {
		path  string
		alter func(*study.Cell)
	}{
		{"cells.3.stations.5.e", func(c *study.Cell) { c.Stations[5].E *= 1 + 3e-7 }},
		{"cells.3.summary.rmse", func(c *study.Cell) { c.Summary.RMSE *= 1 + 1e-7 }},
		{"cells.3.joint.statistic", func(c *study.Cell) { c.Joint.Statistic += 1e-5 }},
		{"cells.3.joint.offset", func(c *study.Cell) { c.Joint.Offset = -c.Joint.Offset }},
		{"cells.1.grids.order", func(c *study.Cell) { c.Grids.Order += 1e-6 }},
		{"cells.1.sources.0.share", func(c *study.Cell) { c.Sources[0].Share += 1e-6 }},
		{"cells.1.requirement.limit", func(c *study.Cell) { c.Requirement.Limit *= 1.001 }},
	}
	for _, row := range altered {
		if step, err := study.NewWalk(s, study.Options{}, &r).Step(row.path); err != nil || !step.Agrees || !step.Again.Known() {
			t.Errorf("%s: %+v, %v", row.path, step, err)
		}
		other := study.Evaluate(s, study.Options{Alternatives: true})
		row.alter(&other.Cells[row.path[6]-'0'])
		if step, err := study.NewWalk(s, study.Options{}, &other).Step(row.path); err != nil || step.Agrees {
			t.Errorf("%s altered: %+v, %v", row.path, step, err)
		}
	}
}

// A path that leads nowhere is refused by name, whatever it is made of.
func TestWalkRefuses(t *testing.T) {
	s := message.Demo()
	r := study.Evaluate(s, study.Options{})
	for _, path := range []string{"", "cells", "cells.9.stations.0.e", "cells.-1.degrees", "cells.0.stations.1.e", "cells.0.nothing", "cells.0.case", "cells.2.read.sim.y.999", "cells.2.read.nothing.y.0",
		"cells.2.entered.sources.99.value", "cells.2.sources.0.at.24", "cells.2.stations.*.nothing", "files.9.bytes", "title", "cells.0.choices.k.", "cells.0.stations.-1.e", "cells.2.read.sim.y.-1"} {
		if step, err := study.NewWalk(s, study.Options{}, &r).Step(path); err == nil || !strings.Contains(err.Error(), "no number at") {
			t.Errorf("%q: %+v, %v", path, step, err)
		}
	}
	if step, err := study.NewWalk(s, study.Options{}, &r).Step("files.0.bytes"); err != nil || step.Why == "" {
		t.Errorf("bytes of a file: %+v, %v", step, err)
	}
}

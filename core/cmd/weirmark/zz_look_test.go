package main

import (
	"fmt"
	"math"
	"os"
	"strings"
	"testing"

	"weirmark/core/chart"
	"weirmark/core/message"
	"weirmark/core/study"
)

func lookStudy() *study.Study {
	s := message.Demo()
	e := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	hist := func(f func(float64) float64) string {
		var b strings.Builder
		b.WriteString("iteration Cd\n")
		for i := range 600 {
			fmt.Fprintf(&b, "%d %.8f\n", i+1, f(float64(i+1)))
		}
		return b.String()
	}
	set := func(end float64) func(float64) float64 {
		return func(i float64) float64 { return end + .004*math.Exp(-i/40) + 2e-7*math.Sin(i*1.7) }
	}
	for g, text := range map[string]string{"G2": hist(set(.03068)), "G3": hist(set(.03021)), "G4": hist(func(i float64) float64 { return .02995 * (1 + .0041*math.Sin(2*math.Pi*i/70) + .3*math.Exp(-i/20)) })} {
		id := "m" + g
		s.Files = append(s.Files, study.File{ID: id, Name: "C1-B-" + g + "-monitor.dat", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
		s.Slips = append(s.Slips, study.Slip{ID: id, File: id, Role: e(study.Monitor), Case: e("C1"), Quantity: e("drag coefficient"), Model: e("B"), Grid: e(g),
			X: study.ColumnUse{Column: e("iteration")}, Y: study.ColumnUse{Column: e("Cd"), Unit: e("1")}, Axis: e(study.AxisIterations)})
	}
	text := "in out\n1.204 1.2038\n"
	s.Files = append(s.Files, study.File{ID: "bal", Name: "C1-B-mass.dat", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	s.Slips = append(s.Slips, study.Slip{ID: "bal", File: "bal", Role: e(study.Balance), Case: e("C1"), Quantity: e("drag coefficient"), Model: e("B"), Grid: e("G4"),
		X: study.ColumnUse{Column: e("in")}, Y: study.ColumnUse{Column: e("out")}})
	one := 0.0021
	q := &s.Questions[0]
	q.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4.2, Data: 4.1, Sensitivity: &one, Handling: study.Corrected, Why: "balance zero shift"}, {Name: "U", Unit: "m/s", Simulation: 30, Data: 30.4, Model: "B"}}
	q2 := &s.Questions[1]
	q2.Excluded = []study.Exclusion{{Line: 8, Why: "blocked tap"}, {Line: 14, Why: "leak found after the test", Late: true}}
	q2.Requirement = &study.Requirement{Value: .03, Who: "decision owner", Date: "2026-09-14"}
	q2.Conditions = []study.Matching{{Name: "α", Unit: "°", Simulation: 4.2, Data: 4.2}}
	s.Application = []study.Condition{{Name: "α", Unit: "°", Value: 11}}
	return s
}

func TestZZLook(t *testing.T) {
	r := study.Evaluate(lookStudy(), study.Options{Alternatives: true})
	pen, _ := newRenderer()
	dir := "/tmp/mm18/look"
	os.MkdirAll(dir, 0o755)
	for _, theme := range []chart.Theme{chart.Light, chart.Dark, chart.Mono} {
		var html strings.Builder
		html.WriteString(`<meta charset=utf8><body style="background:#777;font:13px sans-serif;width:1540px;display:grid;grid-template-columns:1fr 1fr;gap:10px;margin:8px;align-items:start">`)
		put := func(f chart.Figure, err error) {
			if err != nil {
				t.Log(err)
				return
			}
			svg, err := pen.SVG(f, string(theme)+f.ID)
			if err != nil {
				t.Fatal(err)
			}
			html.WriteString(`<div style="background:#fff;margin-bottom:12px;break-inside:avoid">` + svg + `<p style="margin:4px">` + f.Caption + `<br><i>` + f.Alt + `</i></p></div>`)
		}
		put(chart.Overview(r.Cells, theme))
		for i := range r.Cells {
			fs, err := chart.Figures(r.Cells[i], fmt.Sprint("c", i), theme)
			if err != nil {
				t.Fatal(err)
			}
			for _, f := range fs {
				put(f, nil)
			}
		}
		os.WriteFile(dir+"/"+string(theme)+".html", []byte(html.String()), 0o644)
	}
	data, err := lookStudy().Save()
	if err != nil {
		t.Fatal(err)
	}
	os.WriteFile(dir+"/study.json", data, 0o644)
}

package message

import (
	"fmt"
	"testing"

	"weirmark/core/chart"
	"weirmark/core/study"
)

func TestFiguresOfTheDemo(t *testing.T) {
	report := study.Evaluate(Demo(), study.Options{})
	figures, err := figuresOf(&report, chart.Light)
	if err != nil {
		t.Fatal(err)
	}
	var ids []string
	for _, f := range figures {
		ids = append(ids, f.Figure.ID)
	}
	if first := figures[0]; first.Figure.ID != "overview" || first.Case+first.Quantity+first.Model != "" {
		t.Errorf("the first figure is %s of %q", first.Figure.ID, first.Case+first.Quantity+first.Model)
	}
	// The models of a scalar share one picture of intervals.
	if want := "[overview c1-compared c1-grids c1-budget c2-grids c2-budget c3-compared c3-overlay c3-residuals c3-budget c4-overlay c4-residuals c4-budget]"; fmt.Sprint(ids) != want {
		t.Errorf("figures %v, want %s", ids, want)
	}
	one := study.Report{Cells: report.Cells[:1]}
	if figures, err = figuresOf(&one, chart.Light); err != nil || figures[0].Figure.ID == "overview" {
		t.Errorf("an overview of one cell, or %v", err)
	}
}

func TestCourseOfFigure(t *testing.T) {
	for id, want := range map[string]int{"c1-monitors": 0, "c12-grids": 1, "c1-budget": 2, "c1-overlay": 3, "c1-intervals": 3, "c1-compared": 3, "c1-residuals": 3, "c1-correlation": 3} {
		if got := courseOfFigure(chart.Figure{ID: id}); got != want {
			t.Errorf("%s belongs to course %d, want %d", id, got, want)
		}
	}
}

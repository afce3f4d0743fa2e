package message

import (
	"encoding/json"
	"math"
	"strconv"
	"strings"
	"testing"

	"weirmark/core/study"
)

// placed returns the number at a path of a decoded report.
func placed(t *testing.T, tree any, path string) float64 {
	t.Helper()
	for _, step := range strings.Split(path, ".") {
		switch v := tree.(type) {
		case map[string]any:
			tree = v[step]
		case []any:
			i, err := strconv.Atoi(step)
			if err != nil || i >= len(v) {
				t.Fatalf("%s is no place of the report", path)
			}
			tree = v[i]
		default:
			t.Fatalf("%s is no place of the report", path)
		}
	}
	v, ok := tree.(float64)
	if !ok {
		t.Fatalf("%s is no number of the report", path)
	}
	return v
}

// shown reads a printed number and how far rounding may have moved it.
func shown(t *testing.T, text string) (v, room float64) {
	t.Helper()
	text, percent := strings.CutSuffix(text, " %")
	text = strings.TrimPrefix(strings.ReplaceAll(text, "−", "-"), "+")
	v, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatalf("%q is no number", text)
	}
	mantissa, exponent, _ := strings.Cut(text, "e")
	e, _ := strconv.Atoi(exponent)
	_, decimals, _ := strings.Cut(mantissa, ".")
	room = 0.5 * math.Pow10(e-len(decimals)) * (1 + 1e-9)
	if percent {
		return v / 100, room / 100
	}
	return v, room
}

// Every number of a statement that names its place is the report's, rounded to
// the digits it shows; and the statement names the places of its numbers.
func TestNumbersOfStatementsAreTheReports(t *testing.T) {
	report := study.Evaluate(Demo(), study.Options{Alternatives: true})
	data, err := json.Marshal(report)
	if err != nil {
		t.Fatal(err)
	}
	var tree any
	if err := json.Unmarshal(data, &tree); err != nil {
		t.Fatal(err)
	}
	for i, s := range statements(&report) {
		named := 0
		for _, p := range s.Sentence.Phrases {
			if p.Value == nil {
				// What is left are counts that the report does not hold, and the
				// names of other choices.
				if p.Mark == study.FigureOf && p.Target.Field != "fragility" && p.Text != "0" {
					t.Errorf("%s, model %s: %q names no place", s.Quantity, s.Model, p.Text)
				}
				continue
			}
			named++
			at := "cells." + strconv.Itoa(i) + "."
			want := placed(t, tree, at+p.Path)
			if p.Over != "" {
				want = 100 * want / math.Abs(placed(t, tree, at+p.Over))
			}
			if v := float64(*p.Value); math.Abs(v-want) > 1e-9*math.Abs(want) {
				t.Errorf("%s, model %s, %s: value %v, the report has %v", s.Quantity, s.Model, p.Path, v, want)
			}
			if v, room := shown(t, p.Text); math.Abs(v-want) > room {
				t.Errorf("%s, model %s, %s: %q does not round %v", s.Quantity, s.Model, p.Path, p.Text, want)
			}
		}
		if named < 6 {
			t.Errorf("%s, model %s: only %d numbers name their place", s.Quantity, s.Model, named)
		}
	}
}

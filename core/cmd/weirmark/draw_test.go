package main

import (
	"encoding/xml"
	"errors"
	"io"
	"math"
	"regexp"
	"strconv"
	"strings"
	"testing"
	"testing/fstest"

	"weirmark/core/chart"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// ramp is an invented cell of five stations and a curve that is wider than
// its axis, so that the line is clipped.
func ramp(model string) study.Cell {
	c := study.Cell{
		Case: "C1", Quantity: "pressure coefficient", Symbol: "C_p", Model: model, Reference: "test <1> & \"2\"", Unit: "1",
		XName: "x", XUnit: "mm", Choices: study.Choices{K: 2}, StationsAll: 5,
		Curve: study.Curve{
			X: []quantity.Written{-50, 0, 100}, Y: []quantity.Written{-0.4, 0.1, 1.1}, UNum: []quantity.Number{0.01, 0.02, 0.01},
		},
	}
	for i := range 5 {
		c.Stations = append(c.Stations, study.Station{
			X: quantity.Written(10 * i), S: quantity.Number(0.1 + 0.1*float64(i)), D: quantity.Written(0.1 * float64(i)), E: 0.1,
			UD: quantity.Number(0.01 + 0.01*float64(i)), UVal: 0.05, Ratio: 2, Line: i + 1,
		})
	}
	return c
}

// bump is an invented scalar with a grid study and a requirement.
func bump() study.Cell {
	return study.Cell{
		Quantity: "drag coefficient", Symbol: "C_D", Model: "B", Unit: "1", Scalar: true, Choices: study.Choices{K: 2}, StationsAll: 1,
		Stations:    []study.Station{{D: 0.03, S: 0.031, E: 0.001, UD: 0.0004, UVal: 0.0005, Ratio: 2}},
		Requirement: &study.Judgement{Limit: 0.002, Percent: quantity.None, Outcome: study.Shown},
		Grids: &study.Grids{
			Order: 2, Formal: 2, Extrapolated: 0.0306, U: 0.0005,
			Points: []study.GridPoint{{Name: "G1", H: 4, Value: 0.037, Used: true}, {Name: "G2", H: 2, Value: 0.0322, Used: true}, {Name: "G3", H: 1, Value: 0.031, Used: true}},
		},
	}
}

func started(t *testing.T) *renderer {
	t.Helper()
	r, err := newRenderer()
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func figuresOf(t *testing.T) []chart.Figure {
	t.Helper()
	figures := []chart.Figure{}
	for id, c := range []study.Cell{ramp("A"), bump()} {
		some, err := chart.Figures(c, "cell"+strconv.Itoa(id), chart.Light)
		if err != nil {
			t.Fatal(err)
		}
		figures = append(figures, some...)
	}
	compared, err := chart.Compared([]study.Cell{ramp("A"), ramp("B")}, "both", chart.Mono)
	if err != nil {
		t.Fatal(err)
	}
	return append(figures, compared)
}

func svgOf(t *testing.T, r *renderer, f chart.Figure, prefix string) string {
	t.Helper()
	svg, err := r.SVG(f, prefix)
	if err != nil {
		t.Fatal(err)
	}
	return svg
}

// elements reads an SVG strictly and returns its elements and its text.
func elements(t *testing.T, svg string) (elements []xml.StartElement, text string) {
	t.Helper()
	decoder := xml.NewDecoder(strings.NewReader(svg))
	for {
		token, err := decoder.Token()
		if errors.Is(err, io.EOF) {
			return elements, text
		}
		if err != nil {
			t.Fatalf("not an XML document: %v\n%s", err, svg)
		}
		switch e := token.(type) {
		case xml.StartElement:
			elements = append(elements, e.Copy())
		case xml.CharData:
			text += string(e)
		}
	}
}

func attribute(e xml.StartElement, name string) string {
	for _, a := range e.Attr {
		if a.Name.Local == name {
			return a.Value
		}
	}
	return ""
}

func TestSVGIsTheSameWhateverWasDrawnBefore(t *testing.T) {
	r, other := started(t), started(t)
	figures := figuresOf(t)
	if len(figures) != 4 {
		t.Fatalf("%d figures, want 4", len(figures))
	}
	for i := range figures {
		last := figures[len(figures)-1-i]
		svgOf(t, other, last, "before")
	}
	for _, f := range figures {
		if svgOf(t, r, f, "p") != svgOf(t, other, f, "p") {
			t.Errorf("%s: a renderer that drew others before draws it differently", f.ID)
		}
	}
}

func TestSVGIsADocumentOfItsOwn(t *testing.T) {
	r := started(t)
	reference := regexp.MustCompile(`url\(#([^)]*)\)`)
	clipped := 0
	for i, f := range figuresOf(t) {
		prefix := "fig" + strconv.Itoa(i)
		svg := svgOf(t, r, f, prefix)
		all, text := elements(t, svg)
		if root := all[0]; root.Name.Local != "svg" || attribute(root, "width") != strconv.Itoa(f.Width) || attribute(root, "height") != strconv.Itoa(f.Height) {
			t.Errorf("%s begins with %v", f.ID, root)
		}
		ids := map[string]bool{}
		for _, e := range all {
			if id := attribute(e, "id"); id != "" {
				ids[id] = true
				if !strings.HasPrefix(id, prefix+"-") {
					t.Errorf("%s: the id %q does not begin with %q", f.ID, id, prefix)
				}
			}
			if e.Name.Local == "script" || e.Name.Local == "image" || e.Name.Local == "foreignObject" {
				t.Errorf("%s holds an element %s", f.ID, e.Name.Local)
			}
		}
		for _, m := range reference.FindAllStringSubmatch(svg, -1) {
			clipped++
			if !ids[m[1]] {
				t.Errorf("%s: %q is referred to and not there", f.ID, m[1])
			}
		}
		for _, mark := range []string{"NaN", "undefined", "Infinity", "_{"} {
			if strings.Contains(svg, mark) {
				t.Errorf("%s: %q is in the drawing", f.ID, mark)
			}
		}
		if strings.Contains(f.ID, "overlay") && !strings.Contains(text, `D, test <1> & "2", ± 2 uD`) {
			t.Errorf("%s: the key of D is not among its texts: %s", f.ID, text)
		}
	}
	if clipped == 0 {
		t.Error("nothing is clipped, so that no reference was looked at")
	}
}

// The bar of station i is 2 k u_D long on the axis of the option.
func TestBarsHaveTheirLength(t *testing.T) {
	figures, err := chart.Figures(ramp("A"), "x", chart.Light)
	if err != nil {
		t.Fatal(err)
	}
	all, _ := elements(t, svgOf(t, started(t), figures[0], "x"))
	// Bars are paths of an upright stroke, then two short ones.
	bar := regexp.MustCompile(`^M([\d.]+) ([\d.]+)L[\d.]+ ([\d.]+)M.*M`)
	var lengths []float64
	for _, e := range all {
		if m := bar.FindStringSubmatch(attribute(e, "d")); m != nil && attribute(e, "fill") == "none" {
			low, _ := strconv.ParseFloat(m[2], 64)
			high, _ := strconv.ParseFloat(m[3], 64)
			lengths = append(lengths, low-high)
		}
	}
	if len(lengths) != 5 {
		t.Fatalf("%d bars, want 5", len(lengths))
	}
	for i, length := range lengths {
		// u_D of station i is i + 1 times that of the first; the library rounds places to 0.1 px.
		if want := lengths[0] * float64(i+1); math.Abs(length-want) > 0.1*float64(i+2) {
			t.Errorf("bar %d is %g px long, want %g", i, length, want)
		}
	}
}

// The strokes of a hatched area stay inside it, at the distance asked for.
func TestHatchingStaysInItsArea(t *testing.T) {
	c := bump()
	c.Sources = []study.SourceLine{{Name: "balance", Of: study.OfData, Share: 0.25}, {Name: "angle", Of: study.OfInput, Share: 0.5}, {Name: "grid", Of: study.OfNumerical, Share: 0.25}}
	f, err := chart.Budget(c, "x", chart.Light)
	if err != nil {
		t.Fatal(err)
	}
	all, _ := elements(t, svgOf(t, started(t), f, "x"))
	place := regexp.MustCompile(`([\d.]+) ([\d.]+)`)
	points := func(d string) (list [][2]float64) {
		for _, m := range place.FindAllStringSubmatch(d, -1) {
			x, _ := strconv.ParseFloat(m[1], 64)
			y, _ := strconv.ParseFloat(m[2], 64)
			list = append(list, [2]float64{x, y})
		}
		return list
	}
	// The library rounds places to 0.1 px.
	const room = 0.11
	hatched := 0
	for i, e := range all[1:] {
		area, strokes := points(attribute(all[i], "points")), points(attribute(e, "d"))
		if e.Name.Local != "path" || len(area) == 0 || len(strokes) == 0 {
			continue
		}
		hatched++
		low, high := area[0], area[0]
		for _, a := range area {
			for k := range a {
				low[k], high[k] = min(low[k], a[k]), max(high[k], a[k])
			}
		}
		for _, s := range strokes {
			if s[0] < low[0]-room || s[0] > high[0]+room || s[1] < low[1]-room || s[1] > high[1]+room {
				t.Errorf("a stroke at %v leaves its area %v to %v", s, low, high)
			}
		}
		// Level strokes lie 4 px apart.
		for k := 2; strokes[0][1] == strokes[1][1] && k < len(strokes); k += 2 {
			if step := strokes[k][1] - strokes[k-2][1]; math.Abs(step-4) > room {
				t.Errorf("strokes lie %v px apart, want 4", step)
			}
		}
	}
	if hatched != 2 {
		t.Errorf("%d hatched areas, want 2: input and numerical", hatched)
	}
}

func TestSVGRefuses(t *testing.T) {
	r := started(t)
	f := figuresOf(t)[0]
	for _, row := range []struct{ name, old, now, want string }{
		{"an unknown draw function", `"errorBar"`, `"constructor"`, `no draw function "constructor"`},
		{"an unknown print function", `"decimals:`, `"words:`, `no print function "words:`},
		{"an option cut off", `}]}`, ``, "reading the option"},
	} {
		broken := f
		broken.Option = []byte(strings.Replace(string(f.Option), row.old, row.now, -1))
		if string(broken.Option) == string(f.Option) {
			t.Fatalf("%s: the option has no %s", row.name, row.old)
		}
		if _, err := r.SVG(broken, "x"); err == nil || !strings.Contains(err.Error(), row.want) {
			t.Errorf("%s: error %v, want %q", row.name, err, row.want)
		}
	}
	// It goes on after a refusal.
	svgOf(t, r, f, "x")
}

func TestRendererWithoutItsScript(t *testing.T) {
	for _, row := range []struct {
		name  string
		files fstest.MapFS
		want  string
	}{
		{"not built", fstest.MapFS{"renderer/README.md": {}}, "make run"},
		{"not a script", fstest.MapFS{"renderer/figures.js": {Data: []byte("{")}}, "starting the drawing part"},
		{"another script", fstest.MapFS{"renderer/figures.js": {Data: []byte("var x = 1")}}, "offers nothing"},
		{"without draw", fstest.MapFS{"renderer/figures.js": {Data: []byte("var weirmarkFigures = {}")}}, "no function draw"},
	} {
		if _, err := rendererFrom(row.files); err == nil || !strings.Contains(err.Error(), row.want) {
			t.Errorf("%s: error %v, want %q", row.name, err, row.want)
		}
	}
}

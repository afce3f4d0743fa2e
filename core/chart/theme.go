package chart

import "fmt"

// Theme is a set of colours. Line patterns, markers and lightness alone tell
// the models apart; hues only repeat it.
type Theme string

// The themes. Mono is for grey print.
const (
	Light Theme = "light"
	Dark  Theme = "dark"
	Mono  Theme = "mono"
)

// palette holds the colours of a theme, as CSS colours.
type palette struct {
	paper  string
	ink    string // data, text
	quiet  string // axis numbers
	line   string // axes
	faint  string // grid lines
	models [8]string
}

// palettes: the three hues (green-blue, ochre, plum) differ for the common
// kinds of colour blindness in lightness as well; the fourth model onward
// repeats them at another lightness.
var palettes = map[Theme]palette{
	Light: {
		paper: "#fcfbf8", ink: "#1b222a", quiet: "#55606b", line: "#a9a79f", faint: "#ebe8e0",
		models: [8]string{"#0b6a5f", "#b4730a", "#6b2460", "#45a596", "#7d4f08", "#a768a0", "#08473f", "#5b6672"},
	},
	Dark: {
		paper: "#14191e", ink: "#eceae4", quiet: "#a9b3bd", line: "#66717b", faint: "#272f37",
		models: [8]string{"#56c7b6", "#f0bd62", "#c07fb6", "#2e9384", "#b98a3a", "#e4b5de", "#9be3d7", "#9aa5b0"},
	},
	Mono: {
		paper: "#ffffff", ink: "#000000", quiet: "#444444", line: "#999999", faint: "#e6e6e6",
		models: [8]string{"#333333", "#777777", "#111111", "#999999", "#555555", "#888888", "#222222", "#666666"},
	},
}

func (t Theme) palette() (palette, error) {
	p, known := palettes[t]
	if !known {
		return palette{}, fmt.Errorf("choosing colours: there is no theme %q", string(t))
	}
	return p, nil
}

// looks are the line pattern (px drawn, px left out) and the marker of each
// model; no two are alike without their colours.
var looks = [8]struct {
	dash []int
	marker
}{
	{nil, triangle},
	{[]int{9, 4}, square},
	{[]int{2, 3}, diamond},
	{[]int{10, 3, 2, 3}, pointDown},
	{[]int{5, 3}, star},
	{[]int{14, 4}, bar},
	{[]int{10, 3, 2, 3, 2, 3}, plus},
	{[]int{1, 4}, hourglass},
}

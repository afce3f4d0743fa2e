package chart

import (
	"math"
	"strconv"

	"github.com/go-echarts/go-echarts/v2/opts"
	"github.com/go-echarts/go-echarts/v2/types"

	"weirmark/core/quantity"
)

// fonts are asked for in this order; none is embedded.
const fonts = "system-ui, Segoe UI, Helvetica Neue, Arial, sans-serif"

// Sizes of text in px.
const (
	textSize = 12
	nameSize = 12
)

// option is what the drawing library takes. The library's own structs are used
// where they have the field; ours add what those leave out.
type option struct {
	Animation       bool            `json:"animation"`
	BackgroundColor string          `json:"backgroundColor"`
	TextStyle       *opts.TextStyle `json:"textStyle"`
	Grid            []grid          `json:"grid"`
	XAxis           []axis          `json:"xAxis"`
	YAxis           []axis          `json:"yAxis"`
	Legend          []legend        `json:"legend"`
	Series          []series        `json:"series"`
}

// grid is the frame of a panel. Its place is exact: axis texts lie outside it
// and never move it.
type grid struct {
	opts.Grid
	OuterBoundsMode string `json:"outerBoundsMode"`
}

// axis has its numbers, ticks and lines at the places that its scale says.
type axis struct {
	opts.XAxis
	AxisLabel     *axisLabel      `json:"axisLabel"`
	AxisTick      *axisTick       `json:"axisTick"`
	SplitLine     *splitLine      `json:"splitLine"`
	NameTextStyle *opts.TextStyle `json:"nameTextStyle"`
}

type axisLabel struct {
	opts.AxisLabel
	CustomValues []float64 `json:"customValues"`
}

type axisTick struct {
	opts.AxisTick
	CustomValues []float64 `json:"customValues"`
}

type splitLine struct {
	opts.SplitLine
	CustomValues []float64 `json:"customValues"`
}

type legend struct {
	opts.Legend
	ItemGap int `json:"itemGap"`
}

// entry is one key of a legend, named as its series.
type entry struct {
	Name      string          `json:"name"`
	Icon      string          `json:"icon,omitempty"`
	ItemStyle *opts.ItemStyle `json:"itemStyle,omitempty"`
}

type lineStyle struct {
	opts.LineStyle
	Type []int `json:"type,omitempty"` // px drawn, px left out; absent: solid
}

// series is a set of marks. Data rows hold quantity.Number, quantity.Written
// or nil, so that a value that is not there becomes null.
type series struct {
	Type        string            `json:"type"`
	Name        string            `json:"name"`
	XAxisIndex  int               `json:"xAxisIndex,omitempty"`
	YAxisIndex  int               `json:"yAxisIndex,omitempty"`
	RenderItem  string            `json:"renderItem,omitempty"` // name of a draw function
	Thick       float64           `json:"thick,omitempty"`      // of the draw function's lines, px
	Cap         float64           `json:"cap,omitempty"`        // half length of the end strokes, px
	Hatch       []float64         `json:"hatch,omitempty"`      // of a band: direction right and down, distance of the lines in px
	Encode      *encode           `json:"encode,omitempty"`
	Symbol      string            `json:"symbol,omitempty"`
	SymbolSize  float64           `json:"symbolSize,omitempty"`
	KeepAspect  bool              `json:"symbolKeepAspect,omitempty"`
	LineStyle   *lineStyle        `json:"lineStyle,omitempty"`
	ItemStyle   *opts.ItemStyle   `json:"itemStyle,omitempty"`
	Label       *label            `json:"label,omitempty"`
	LabelLayout *opts.LabelLayout `json:"labelLayout,omitempty"`
	Z           int               `json:"z"`
	Clip        bool              `json:"clip"`
	Silent      bool              `json:"silent,omitempty"`
	Data        any               `json:"data"`
}

type label struct {
	opts.Label
	Position []int `json:"position"` // px right of and below the upper left of the mark
}

// encode says which columns of a row lie along which axis.
type encode struct {
	X []int `json:"x"`
	Y []int `json:"y"`
}

// named is a point that carries its name.
type named struct {
	Name  string `json:"name"`
	Value []any  `json:"value"`
}

func px(v int) string { return strconv.Itoa(v) }

// picture collects the panels of one figure.
type picture struct {
	option
	palette
}

func newPicture(t Theme) (*picture, error) {
	p, err := t.palette()
	if err != nil {
		return nil, err
	}
	return &picture{palette: p, option: option{
		BackgroundColor: p.paper,
		TextStyle:       &opts.TextStyle{FontFamily: fonts, FontSize: textSize, Color: p.ink},
	}}, nil
}

// panel is a frame with its two axes, in px from the figure's left and top.
type panel struct {
	left, right, top, height int
	x, y                     scale
	xName, yName             string
	bare                     bool // the x numbers stand below another panel
	inverse                  bool // smaller y values upward
}

// add puts the panel into the picture and returns its number.
func (p *picture) add(a panel) int {
	n := len(p.Grid)
	p.Grid = append(p.Grid, grid{
		Grid:            opts.Grid{Left: px(a.left), Right: px(a.right), Top: px(a.top), Height: px(a.height)},
		OuterBoundsMode: "none",
	})
	x := p.axis(a.x, n)
	x.AxisLine = &opts.AxisLine{Show: opts.Bool(!a.bare), OnZero: opts.Bool(false), LineStyle: &opts.LineStyle{Color: p.line, Width: 1}}
	x.AxisTick.Show = opts.Bool(!a.bare)
	x.SplitLine.Show = opts.Bool(false)
	x.AxisLabel.Show = opts.Bool(!a.bare)
	x.AxisLabel.HideOverlap = opts.Bool(true)
	x.Name, x.NameLocation, x.NameGap = a.xName, "middle", 26
	p.XAxis = append(p.XAxis, x)

	y := p.axis(a.y, n)
	y.AxisLine = &opts.AxisLine{Show: opts.Bool(false), OnZero: opts.Bool(false)}
	y.AxisTick.Show = opts.Bool(false)
	y.SplitLine.Show = opts.Bool(true)
	y.Name, y.NameLocation, y.NameGap = a.yName, "end", 12
	y.NameTextStyle.Align = "left"
	y.NameTextStyle.Padding = []int{0, 0, 0, 12 - a.left}
	if a.inverse {
		y.Inverse, y.NameLocation = opts.Bool(true), "start"
	}
	p.YAxis = append(p.YAxis, y)
	return n
}

// axis returns the parts that both axes of panel n share.
func (p *picture) axis(s scale, n int) axis {
	at := s.numbers()
	return axis{
		XAxis: opts.XAxis{Type: "value", GridIndex: n, Min: s.Min, Max: s.Max},
		AxisLabel: &axisLabel{CustomValues: at, AxisLabel: opts.AxisLabel{
			Color: p.quiet, FontSize: textSize, Formatter: types.FuncStr(s.formatter()),
			ShowMinLabel: opts.Bool(true), ShowMaxLabel: opts.Bool(true),
		}},
		AxisTick:      &axisTick{CustomValues: at, AxisTick: opts.AxisTick{LineStyle: &opts.LineStyle{Color: p.line, Width: 1}}},
		SplitLine:     &splitLine{CustomValues: at, SplitLine: opts.SplitLine{LineStyle: &opts.LineStyle{Color: p.faint, Width: 1}}},
		NameTextStyle: &opts.TextStyle{Color: p.ink, FontSize: nameSize},
	}
}

// draw adds marks to panel n, in the order of painting.
func (p *picture) draw(n, z int, s series) {
	s.XAxisIndex, s.YAxisIndex, s.Z = n, n, z
	s.KeepAspect = s.Type == "scatter"
	p.Series = append(p.Series, s)
}

// keys adds legends, one for each row, with the first at left and top in px, and
// returns how many rows there are. The rows are parted here, since their
// number decides where the panels stand.
func (p *picture) keys(left, top int, entries []entry) int {
	rows := keyRows(entries, width-left-rightEdge)
	for i, row := range rows {
		p.Legend = append(p.Legend, legend{
			Legend: opts.Legend{
				Left: px(left), Top: px(top + i*keyRow), Padding: 0, ItemWidth: keyWidth, ItemHeight: keyHeight,
				Orient: "horizontal", Align: "left", Width: px(2 * width), Data: row,
				TextStyle: &opts.TextStyle{Color: p.ink, FontSize: textSize},
			},
			ItemGap: keyGap,
		})
	}
	return len(rows)
}

// Measures of legends in px.
const (
	keyGap  = 18
	keyRow  = 20
	keyText = 5 // between key and text
)

// keyRows parts keys into rows that fit a room of so many px.
func keyRows(entries []entry, room int) [][]entry {
	rows, x := [][]entry{}, 0.0
	for _, e := range entries {
		w := keyWidth + keyText + textWidth(e.Name)
		if len(rows) == 0 || x+w > float64(room) {
			rows, x = append(rows, nil), 0
		}
		rows[len(rows)-1] = append(rows[len(rows)-1], e)
		x += w + keyGap
	}
	return rows
}

// filled, hollow and shade are the looks of marks.
func filled(color string) *opts.ItemStyle {
	return &opts.ItemStyle{Color: color, Opacity: opts.Float(1)}
}

func (p *picture) hollow(color string) *opts.ItemStyle {
	return &opts.ItemStyle{Color: p.paper, BorderColor: color, BorderWidth: 1.2, Opacity: opts.Float(1)}
}

func shade(color string, opacity float32) *opts.ItemStyle {
	return &opts.ItemStyle{Color: color, Opacity: opts.Float(opacity)}
}

// rule is a straight line from one point to another across panel n.
func (p *picture) rule(n int, name string, dash []int, width float32, x0, y0, x1, y1 float64) {
	p.draw(n, 2, series{
		Type: "line", Name: name, Symbol: "none", Silent: true,
		LineStyle: &lineStyle{LineStyle: opts.LineStyle{Color: p.ink, Width: width}, Type: dash},
		ItemStyle: filled(p.ink),
		Data:      [][]any{{quantity.Number(x0), quantity.Number(y0)}, {quantity.Number(x1), quantity.Number(y1)}},
	})
}

// words writes the names of points so many px right of them.
func (p *picture) words(n int, rows []named, right int) {
	p.draw(n, 5, series{
		Type: "scatter", Name: "words", Symbol: disc, SymbolSize: 1, Silent: true, ItemStyle: filled("transparent"), Data: rows,
		Label: &label{Label: opts.Label{Show: opts.Bool(true), Formatter: "{b}", Color: p.ink, FontSize: textSize}, Position: []int{right, -6}},
	})
}

// bounds collects the least and the greatest of finite values.
type bounds struct{ lo, hi float64 }

func newBounds() bounds { return bounds{math.Inf(1), math.Inf(-1)} }

func (b *bounds) take(values ...float64) {
	for _, v := range values {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			continue
		}
		b.lo, b.hi = math.Min(b.lo, v), math.Max(b.hi, v)
	}
}

// around takes v and, where u is known, v - u and v + u.
func (b *bounds) around(v, u float64) { b.take(v, v-u, v+u) }

// empty reports whether no finite value was taken.
func (b bounds) empty() bool { return b.lo > b.hi }

// padded returns the bounds widened on both sides by a share of their length.
func (b bounds) padded(share float64) bounds {
	pad := float64(share * (b.hi - b.lo))
	return bounds{b.lo - pad, b.hi + pad}
}

package study

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
)

// What a person can state of the similarity of grids.
const (
	SimilarYes = "similar"
	SimilarNo  = "not similar"
)

// How the runs of a family treat time.
const (
	RegimeSteady = "steady"
	RegimeTime   = "time-accurate"
	RegimeScales = "scale-resolving"
)

// Family is what a person states of the grids behind a question.
type Family struct {
	Similar      string   `json:"similar,omitempty"` // SimilarYes, SimilarNo, or empty: not stated
	Wall         string   `json:"wall,omitempty"`    // wall treatment
	Scheme       string   `json:"scheme,omitempty"`  // of the discretization
	Regime       string   `json:"regime,omitempty"`
	CostExponent *float64 `json:"cost_exponent,omitempty"` // cost of a run ~ cells to this power; null: refinement.CostExponent
	Target       *float64 `json:"target,omitempty"`        // a standard u_num to reach, in the unit of the data; null: none

	// Steps is Apart, or empty: grid and time step are fitted together where a
	// table of time steps holds several grids.
	Steps      string     `json:"steps,omitempty"`
	FormalTime *float64   `json:"formal_time,omitempty"` // order of the scheme in time; null: 2
	Borrow     *Borrowing `json:"borrow,omitempty"`      // a grid uncertainty of another question
}

// FamilyCard says of a family of grids what they have in common.
type FamilyCard struct {
	Ratios   []GridRatio   `json:"ratios"` // of all pairs
	Similar  string        `json:"similar"`
	Wall     string        `json:"wall"`
	Scheme   string        `json:"scheme"`
	Regime   string        `json:"regime"`
	Settings []SettingLine `json:"settings"`
}

// GridRatio is the ratio of the spacings of two grids.
type GridRatio struct {
	Fine   string `json:"fine"`
	Coarse string `json:"coarse"`
	R      Number `json:"r"`
}

// SettingLine is one setting over the grids, in the order of the points; empty
// where a run does not state it.
type SettingLine struct {
	Key     string   `json:"key"`
	Values  []string `json:"values"`
	Differs bool     `json:"differs"` // so that the grids may not be one family
}

// RuleLine is what another rule makes of the same values.
type RuleLine struct {
	Rule string `json:"rule"`
	U    Number `json:"u"` // expanded, 95 %; null where the rule gives a bound
	UNum Number `json:"u_num"`
}

// FitLine is the line behind U: Base + sum of Coefficient h^Power, h relative
// to the finest grid.
type FitLine struct {
	Base  Number    `json:"base"`
	Terms []FitTerm `json:"terms"`
}

// FitTerm is one term of a FitLine.
type FitTerm struct {
	Coefficient Number `json:"coefficient"`
	Power       Number `json:"power"`
}

// StatedNext is the grid that would bring u_num to a stated value.
type StatedNext struct {
	U     Number `json:"u"` // standard, as stated
	Cells Number `json:"cells"`
	Cost  Number `json:"cost"`
	Met   bool   `json:"met"` // the family has it already
}

// KNumReason says why a factor brings U of a grid study to u_num.
func KNumReason(k float64) string {
	switch k {
	case 1.15:
		return "the error of the fine grid is taken as a Gaussian shifted from zero (common practice, no source)"
	case 2:
		return "U is taken as 95 % of a normal distribution about zero"
	}
	return "as entered"
}

// familyCard describes the family and asks about what sets its grids apart.
func (w *work) familyCard() {
	g := w.cell.Grids
	if g == nil {
		return
	}
	card := &FamilyCard{Ratios: []GridRatio{}, Settings: []SettingLine{}}
	for i := range g.Points {
		for j := range i {
			fine, coarse := g.Points[i], g.Points[j]
			if fine.Cells != coarse.Cells {
				card.Ratios = append(card.Ratios, GridRatio{Fine: fine.Name, Coarse: coarse.Name, R: Number(spacing(float64(fine.Cells/coarse.Cells), g.Dimension))})
			}
		}
	}
	g.Card = card
	w.firstCells()
	w.settings()
	f := w.q.Family
	if f == nil {
		return
	}
	card.Similar, card.Wall, card.Scheme, card.Regime = f.Similar, f.Wall, f.Scheme, f.Regime
	if f.Similar == SimilarNo {
		w.ask(1, "similar grids", "grid-not-similar")
	}
	if f.Regime == RegimeScales {
		w.tell(notice.New("grid-scales"))
	}
}

// heightTolerance is how far the first cell may be off the spacing, as a part,
// before it is told (no source).
const heightTolerance = 0.25

// firstCells gives the points their y+ and tells where it does not follow the
// spacing.
func (w *work) firstCells() {
	g := w.cell.Grids
	known := 0
	for i := range g.Points {
		if y := w.wallDistance(g.Points[i]); y > 0 {
			g.Points[i].YPlus = Number(y)
			known++
		}
	}
	finest := g.Points[len(g.Points)-1]
	if known < len(g.Points) || known < 2 {
		return
	}
	for _, p := range g.Points {
		off := quantity.Round(float64(p.YPlus/finest.YPlus)/float64(p.H), 10)
		if off > 1+heightTolerance || off < 1/(1+heightTolerance) {
			w.tell(notice.New("grid-first-cell", pointTexts(g, func(p GridPoint) Number { return p.YPlus }, 2), pointTexts(g, func(p GridPoint) Number { return p.H }, 3)))
			return
		}
	}
}

func pointTexts(g *Grids, of func(GridPoint) Number, digits int) string {
	var texts []string
	for _, p := range g.Points {
		texts = append(texts, quantity.Text(float64(of(p)), digits))
	}
	return strings.Join(texts, ", ")
}

// wallDistance returns y+ of a grid, from the table over grids or as entered
// beside its run, or NaN.
func (w *work) wallDistance(p GridPoint) float64 {
	if w.grids != nil {
		for _, c := range w.grids.table.Columns {
			if wallUnits(c.Name) {
				return c.Values[w.gridRow(p)]
			}
		}
		return math.NaN()
	}
	for _, r := range w.runs {
		if Number(r.cells) == p.Cells && r.curve.slip.Grid.Value == p.Name {
			if y, err := strconv.ParseFloat(r.curve.slip.YPlus.Value, 64); err == nil {
				return y
			}
		}
	}
	return math.NaN()
}

// gridRow returns the row of a grid in the table over grids.
func (w *work) gridRow(p GridPoint) int {
	for i, n := range w.sizes {
		if Number(n) == p.Cells {
			return i
		}
	}
	return 0
}

// personal are the statements of a file that belong to one run by nature.
var personal = []string{"grid", "mesh", "cells", "nodes", "points", "elements", "n", "h", "spacing", "y+", "yplus", "date", "time", "file", "run", "case", "name", "title", "cpu", "wall time", "iterations", "kind", "note", "author", "host"}

// setting is one statement of a run.
type setting struct {
	key, value string
	entered    bool
}

// settings lists the settings of the grids and asks where they differ: any
// difference that a person entered, and of those that files state one that sets
// some runs apart while others agree.
func (w *work) settings() {
	g := w.cell.Grids
	var keys []string
	values, entered := map[string][]string{}, map[string]bool{}
	for i, p := range g.Points {
		for _, s := range w.settingsOf(p) {
			if values[s.key] == nil {
				keys = append(keys, s.key)
				values[s.key] = make([]string, len(g.Points))
			}
			values[s.key][i] = s.value
			entered[s.key] = entered[s.key] || s.entered
		}
	}
	var apart []string
	for _, key := range keys {
		line := SettingLine{Key: key, Values: values[key]}
		if text, differs := differing(g, values[key], entered[key]); differs {
			line.Differs = true
			apart = append(apart, key+" is "+text)
		}
		g.Card.Settings = append(g.Card.Settings, line)
	}
	if len(apart) > 0 {
		w.ask(1, "one set of settings over the grids", "grid-settings", strings.Join(apart, "; "))
	}
}

// differing says which grids have which value, where they differ as settings
// do: two grids or more agree and others do not, or any where a person entered
// them. What differs on every grid, as a number of cells does, is of the grid.
func differing(g *Grids, values []string, entered bool) (text string, differs bool) {
	holders := map[string][]string{}
	var order []string
	stated := 0
	for i, v := range values {
		if v == "" {
			continue
		}
		stated++
		if holders[v] == nil {
			order = append(order, v)
		}
		name := g.Points[i].Name
		if name == "" {
			name = "grid " + strconv.Itoa(i+1)
		}
		holders[v] = append(holders[v], name)
	}
	if len(order) < 2 || !entered && len(order) == stated {
		return "", false
	}
	slices.SortStableFunc(order, func(a, b string) int { return len(holders[a]) - len(holders[b]) }) // those set apart first
	var parts []string
	for _, v := range order {
		parts = append(parts, "“"+v+"” on "+strings.Join(holders[v], ", "))
	}
	return strings.Join(parts, " and "), true
}

// settingsOf returns what is stated of the run of a grid: the columns of text
// of a table over grids, or the statements of its file and what was entered.
func (w *work) settingsOf(p GridPoint) []setting {
	var list []setting
	if w.grids != nil {
		for _, c := range w.grids.table.Columns {
			if c.Text != nil && !anyKnown(c.Values) && c.Name != w.grids.slip.Grid.Value && !isPersonal(c.Name) {
				list = append(list, setting{key: c.Name, value: c.Text[w.gridRow(p)]})
			}
		}
		return list
	}
	for _, r := range w.runs {
		slip := r.curve.slip
		if Number(r.cells) != p.Cells || slip.Grid.Value != p.Name {
			continue
		}
		for _, m := range w.e.files[slip.File].Meta {
			if (m.Table == "" || m.Table == slip.Table) && !isPersonal(m.Key) {
				list = append(list, setting{key: m.Key, value: m.Value})
			}
		}
		return append(list, enteredSettings(slip.Settings.Value)...)
	}
	return list
}

// isPersonal reports whether a statement belongs to one run by nature.
func isPersonal(key string) bool { return slices.Contains(personal, strings.ToLower(key)) }

// enteredSettings reads "key: value; key: value".
func enteredSettings(text string) []setting {
	var list []setting
	for _, part := range strings.Split(text, ";") {
		key, value, found := strings.Cut(part, ":")
		if key, value = strings.TrimSpace(key), strings.TrimSpace(value); found && key != "" && value != "" {
			list = append(list, setting{key, value, true})
		}
	}
	return list
}

// otherRules lists what every rule makes of one value.
func (w *work) otherRules(counts, values []float64) []RuleLine {
	var list []RuleLine
	for _, rule := range refinement.Rules {
		if rule == refinement.RuleLeastSquares && len(w.cell.Grids.Points) < 4 {
			continue
		}
		opt := w.choices.rule()
		opt.Rule = rule
		r := refinement.Study(counts, values, w.choices.dimension(), opt)
		if u := r.StandardUncertainty(w.choices.KNum); !math.IsNaN(u) {
			name := RuleName(rule)
			switch rule {
			case refinement.RuleThree:
				name += ", " + map[bool]string{true: "bounded", false: "plain"}[opt.Bounded]
			case refinement.RuleLeastSquares:
				name += " (implemented from its description)"
			case refinement.RuleCorrection, refinement.RuleFactor:
				name += " (coefficients from memory)"
			}
			list = append(list, RuleLine{Rule: name, U: w.step(r.U), UNum: w.step(u)})
		}
	}
	return list
}

// fitLine returns the line behind U in the unit of the cell.
func (w *work) fitLine(f *refinement.Fit) *FitLine {
	if f == nil {
		return nil
	}
	line := &FitLine{Base: w.yNumber(f.Base), Terms: []FitTerm{}}
	for _, t := range f.Terms {
		line.Terms = append(line.Terms, FitTerm{w.step(t.Coefficient), Number(t.Power)})
	}
	return line
}

// coarseTriple says beside a family that does not converge monotonically what
// the three grids before the finest do: a coarse triple can mislead.
func (w *work) coarseTriple(r refinement.Result, counts, values []float64) {
	switch r.Class {
	case refinement.Oscillatory, refinement.Diverging, refinement.OscillatoryDiverging:
	default:
		return
	}
	before := ""
	var coarser, their []float64
	for i, n := range counts {
		if n < r.Counts[0] {
			coarser, their = append(coarser, n), append(their, values[i])
		}
	}
	if len(coarser) >= 3 {
		class := refinement.Three(coarser, their, w.choices.dimension(), w.choices.rule()).Class
		before = " (without the finest grid the three next are " + string(class) + ")"
	}
	w.tell(notice.New("grid-coarse-triple", before))
}

// statedNext tells the grid that would bring u_num of the grid study to the
// value that a person stated.
func (w *work) statedNext(r refinement.Result, u float64) {
	f := w.q.Family
	if f == nil || f.Target == nil || !(*f.Target > 0) || math.IsNaN(u) {
		return
	}
	target := w.yUnit.StepToSI(*f.Target)
	next := refinement.NextGrid(r, w.choices.dimension(), w.choices.rule(), u, target, w.q.costExponent())
	w.cell.Grids.CostExponent = Number(w.q.costExponent())
	w.cell.Grids.Stated = &StatedNext{U: Number(*f.Target), Cells: Number(quantity.Round(next.Cells, 3)), Cost: Number(next.Cost), Met: quantity.Round(u, 10) <= quantity.Round(target, 10)}
}

// costExponent returns the power of the cells that the cost of a run follows.
func (q *Question) costExponent() float64 {
	if q.Family != nil && q.Family.CostExponent != nil && *q.Family.CostExponent > 0 {
		return *q.Family.CostExponent
	}
	return refinement.CostExponent
}

// enterFamily changes what is stated of the grids.
func (q *Question) enterFamily(path, value string) (string, error) {
	f := Family{}
	if q.Family != nil {
		f = *q.Family
	}
	var before string
	var err error
	if key, of := strings.CutPrefix(path, "borrow."); of {
		before, err = f.enterBorrow(key, value)
		path = "borrow"
	}
	switch path {
	case "borrow":
	case "steps":
		before, err = oneOf(&f.Steps, value, "", Apart)
	case "formal_time":
		before, err = optional(&f.FormalTime, value, 0.1)
	case "similar":
		before, err = oneOf(&f.Similar, value, "", SimilarYes, SimilarNo)
	case "regime":
		before, err = oneOf(&f.Regime, value, "", RegimeSteady, RegimeTime, RegimeScales)
	case "wall":
		before, err = exchange(&f.Wall, value)
	case "scheme":
		before, err = exchange(&f.Scheme, value)
	case "cost_exponent":
		before, err = optional(&f.CostExponent, value, 0.1)
	case "target":
		before, err = optional(&f.Target, value, 1e-300)
	default:
		err = refuse("family."+path, value)
	}
	if err != nil {
		return before, err
	}
	if q.Family = &f; f == (Family{}) {
		q.Family = nil
	}
	return before, nil
}

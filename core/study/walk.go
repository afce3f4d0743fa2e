package study

import (
	"encoding/json"
	"math"
	"reflect"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// Step is one number of the report walked back: what it is, the formula behind
// it, and the numbers that the formula takes, each with a path to walk further.
// At the end stands where the number is written.
type Step struct {
	Path    string      `json:"path"`
	Name    string      `json:"name"`
	Value   Number      `json:"value"` // as in the report; null of a list
	Unit    string      `json:"unit"`
	Formula string      `json:"formula"` // in symbols; empty where the number is not computed
	Words   string      `json:"words"`
	Inputs  []StepInput `json:"inputs"`
	// Again is the value of the formula for the inputs; null where there is
	// none. Agrees reports whether it is the value, but for rounding.
	Again  Number  `json:"again"`
	Agrees bool    `json:"agrees"`
	Origin *Origin `json:"origin"` // where it is written; null of a computed number
	Why    string  `json:"why"`    // why the walk ends here, where nothing is written
}

// StepInput is a number, or a list of numbers of one kind, that a formula takes.
type StepInput struct {
	Path  string `json:"path"` // with * for the places of a list
	Name  string `json:"name"`
	Value Number `json:"value"` // null of a list
	N     int    `json:"n"`     // how many; 1 of a number
}

// Origin is the place where a number is written: in a file, or entered.
type Origin struct {
	File   string `json:"file"`   // empty where it was entered
	Line   int    `json:"line"`   // counted from one
	Column int    `json:"column"` // of the separated fields, counted from one; 0 where it cannot be told
	Text   string `json:"text"`   // what is written there
	Unit   string `json:"unit"`   // in which it is read
	Of     string `json:"of"`     // the column, or the entry
}

// mostListed bounds the members of a list that one step names.
const mostListed = 200

// Walk leads from the numbers of a report of a study to where they come from.
// It evaluates a cell once for all steps in it.
type Walk struct {
	study   *Study
	options Options
	report  *Report
	works   map[int]*work // by cell
}

// NewWalk prepares walks in a report of the study.
func NewWalk(s *Study, options Options, r *Report) *Walk {
	return &Walk{study: s, options: options, report: r, works: map[int]*work{}}
}

func unknownPath(path string) error { return notice.New("walk-unknown", path) }

// Step walks one number one step back. The path is that of the report, such as
// cells.3.stations.5.e, or one that an earlier step named. It fails with the
// notice walk-unknown. The formula is evaluated again from its inputs, so that
// a step cannot say what was not done.
func (t *Walk) Step(path string) (Step, error) {
	rest, inCell := strings.CutPrefix(path, "cells.")
	if !inCell {
		return t.ofReport(path)
	}
	number, rest, _ := strings.Cut(rest, ".")
	i, err := strconv.Atoi(number)
	if err != nil || i < 0 || i >= len(t.report.Cells) {
		return Step{}, unknownPath(path)
	}
	if t.works[i] == nil {
		t.works[i] = t.evaluated(i)
	}
	if t.works[i] == nil {
		return Step{}, unknownPath(path)
	}
	p, ok := t.works[i].walk(rest)
	if !ok {
		return Step{}, unknownPath(path)
	}
	prefix := "cells." + number + "."
	p.Path = path
	for k := range p.Inputs {
		p.Inputs[k].Path = prefix + p.Inputs[k].Path
	}
	return p, nil
}

// evaluated evaluates the cell again and keeps what it was computed with.
func (t *Walk) evaluated(i int) *work {
	c := &t.report.Cells[i]
	q := t.study.Question(c.Case, c.Quantity)
	if q == nil {
		return nil
	}
	o := t.options
	o.Alternatives = true
	e := begin(t.study, o)
	e.readFiles(&Report{})
	w := &work{e: e, q: q, model: c.Model, choices: q.Choices}
	e.workWith(w)
	w.cell = *c // the numbers are those of the report that is walked
	return w
}

// spot is a path that a rule fits: the places its wildcards stand for, and the
// path of the object around it.
type spot struct {
	*work
	path string
	at   []int
}

// around returns the path of the object that holds the number.
func (p spot) around() string { return p.path[:max(0, strings.LastIndex(p.path, "."))] }

// args are the values of the inputs of a rule.
type args struct {
	spot
	v [][]float64
}

// n returns a single input.
func (a args) n(i int) float64 {
	if i >= len(a.v) || len(a.v[i]) == 0 {
		return math.NaN()
	}
	return a.v[i][0]
}

// walkRule says how the numbers of a path come about: by a formula from
// inputs, or why there is none.
type walkRule struct {
	path    string
	name    string
	formula string
	words   string
	say     func(spot) string // words that depend on the place, instead of words
	in      func(spot) []string
	calc    func(args) float64
	why     string
	search  float64 // of a direct one, the part to which a search finds it again, where that is more than 1e-8
	direct  bool    // from the inputs as they are: of draws, or of a function that is found by steps, the rounding of an input cannot be followed
}

// from lists inputs by their paths in the cell; @ stands for the object that
// holds the number.
func from(paths ...string) func(spot) []string {
	return func(p spot) []string {
		list := make([]string, len(paths))
		for i, path := range paths {
			list[i] = path
			if rest, beside := strings.CutPrefix(path, "@."); beside {
				list[i] = p.around() + "." + rest
			}
		}
		return list
	}
}

// fits reports whether a path is of a pattern, and the places its wildcards
// stand for.
func fits(pattern, path string) ([]int, bool) {
	want, have := strings.Split(pattern, "."), strings.Split(path, ".")
	if len(want) != len(have) {
		return nil, false
	}
	at := []int{}
	for i, step := range want {
		if step != "*" {
			if step != have[i] {
				return nil, false
			}
			continue
		}
		n, err := strconv.Atoi(have[i])
		if err != nil {
			return nil, false
		}
		at = append(at, n)
	}
	return at, true
}

// ruleOf returns the rule of a path: its own, else that of a group whose
// pattern ends in two stars.
func ruleOf(path string) (*walkRule, []int) {
	for i := range walkRules {
		if at, ok := fits(walkRules[i].path, path); ok {
			return &walkRules[i], at
		}
	}
	for i := range walkRules {
		if group, ok := strings.CutSuffix(walkRules[i].path, "**"); ok && strings.HasPrefix(path, group) {
			return &walkRules[i], nil
		}
	}
	return nil, nil
}

// called is the name of a number: in a group, with the number's own.
func (r *walkRule) called(path string) string {
	if !strings.HasSuffix(r.path, "**") {
		return r.name
	}
	steps := strings.Split(path, ".")
	own := ""
	for _, step := range steps[1:] {
		if _, err := strconv.Atoi(step); err != nil {
			own += " " + strings.ReplaceAll(step, "_", " ")
		}
	}
	return r.name + "," + own
}

// walk returns the step of a path of the cell; a path with * is a list.
func (w *work) walk(path string) (Step, bool) {
	if strings.Contains(path, "*") {
		return w.walkList(path)
	}
	if rest, ok := strings.CutPrefix(path, "read."); ok {
		return w.walkRead(rest)
	}
	if _, _, ok := w.document(path); ok {
		return w.walkEntered(path)
	}
	v, ok := w.valueAt(path)
	rule, at := ruleOf(path)
	if !ok || rule == nil {
		return Step{}, false
	}
	p := spot{w, path, at}
	if math.IsNaN(v) {
		return Step{Name: rule.called(path), Value: None, Again: None, Inputs: []StepInput{}, Why: "The report has no number there."}, true
	}
	s := Step{Name: rule.called(path), Value: Number(v), Unit: w.unitOfPath(path), Formula: rule.formula, Words: rule.words, Why: rule.why, Inputs: []StepInput{}, Again: None}
	if rule.say != nil {
		s.Words = rule.say(p)
	}
	if rule.in == nil {
		return s, true
	}
	inputs := rule.in(p)
	for _, in := range inputs {
		values := w.valuesAt(in)
		line := StepInput{Path: in, Name: w.nameOf(in), N: len(values), Value: None}
		if !strings.Contains(in, "*") && len(values) == 1 {
			line.Value = Number(values[0])
		}
		s.Inputs = append(s.Inputs, line)
	}
	if rule.calc != nil {
		again, agrees := rule.again(p, v, w.allValues(inputs))
		s.Again, s.Agrees = Number(again), agrees
		if math.IsNaN(again) {
			s.Why = "No single formula tells the step back from this number; what it is made of stands in its words."
		}
	}
	return s, true
}

// mostVaried bounds the inputs whose rounding is followed one by one.
const mostVaried = 400

// again evaluates a formula from its inputs as they are printed, and reports
// whether it gives the value within its last printed digit and what the
// rounding of the inputs explains. From more than mostVaried inputs it is
// evaluated as they are, and so is what is direct.
func (r *walkRule) again(p spot, v float64, inputs [][]float64) (got float64, agrees bool) {
	n := 0
	for _, list := range inputs {
		n += len(list)
	}
	if n > mostVaried || r.direct { // only compared as they are
		got = r.calc(args{p, inputs})
		return got, math.Abs(got-v) <= max(1e-8, r.search)*math.Abs(v)
	}
	printed := make([][]float64, len(inputs))
	for i, list := range inputs {
		printed[i] = make([]float64, len(list))
		for j, x := range list {
			printed[i][j] = quantity.Round(x, 10)
		}
	}
	got = r.calc(args{p, printed})
	room := halfDigit(v)
	for _, list := range printed {
		for j, x := range list {
			if math.IsNaN(x) || x == 0 {
				continue
			}
			list[j] = x + halfDigit(x)
			moved := r.calc(args{p, printed})
			if math.IsNaN(moved) { // beyond the end of a range
				list[j] = x - halfDigit(x)
				moved = r.calc(args{p, printed})
			}
			room += math.Abs(moved - got)
			list[j] = x
		}
	}
	return got, math.Abs(got-v) <= 1.01*room
}

// halfDigit is half a unit of the tenth digit, the last that is printed.
func halfDigit(v float64) float64 {
	if v == 0 {
		return 0
	}
	return 0.5 * math.Pow(10, math.Floor(math.Log10(math.Abs(v)))-9)
}

// walkList returns a list with its members.
func (w *work) walkList(path string) (Step, bool) {
	paths := w.placesOf(path)
	if len(paths) == 0 {
		return Step{}, false
	}
	if _, ok := w.valueAt(paths[0]); !ok {
		return Step{}, false
	}
	s := Step{Name: w.nameOf(path), Value: None, Again: None, Unit: w.unitOfPath(paths[0]), Inputs: []StepInput{}, Words: quantity.Counted(len(paths), "number")}
	for i, p := range paths {
		if i == mostListed {
			s.Words += ", the first " + strconv.Itoa(mostListed)
			break
		}
		v, _ := w.valueAt(p)
		s.Inputs = append(s.Inputs, StepInput{Path: p, Name: w.nameOf(p) + w.placeOf(p), Value: Number(v), N: 1})
	}
	return s, true
}

// placeOf tells the members of a list apart: by their station, or their line.
func (w *work) placeOf(path string) string {
	if at, ok := fits("stations.*."+path[strings.LastIndex(path, ".")+1:], path); ok && !w.cell.Scalar {
		return " at " + w.place(w.x[at[0]])
	}
	if at, ok := fits("sources.*.at.*", path); ok && !w.cell.Scalar {
		return " at " + w.place(w.x[at[1]])
	}
	if rest, ok := strings.CutPrefix(path, "read."); ok {
		if _, _, row, c := w.readPath(rest); c != nil && !c.taken {
			return ", line " + strconv.Itoa(c.table.RowLine(row))
		}
	}
	return ""
}

// nameOf names what a path leads to.
func (w *work) nameOf(path string) string {
	if rest, ok := strings.CutPrefix(path, "read."); ok {
		side, _, _ := strings.Cut(rest, ".")
		if c := w.curveOf(side); c != nil {
			return columnOf(c, strings.Split(rest, ".")[1]) + " of " + w.e.study.fileName(c.slip)
		}
		return rest
	}
	if _, rest, ok := w.document(path); ok {
		return strings.ReplaceAll(rest, "_", " ") + ", entered"
	}
	rule, at := ruleOf(strings.ReplaceAll(path, "*", "0"))
	if rule == nil {
		return path
	}
	name := rule.called(path)
	if strings.HasPrefix(path, "sources.") && len(at) > 0 && at[0] < len(w.parts) && !strings.HasPrefix(path, "sources.*") {
		name += ", " + w.parts[at[0]].line.Name
	}
	return name
}

// allValues returns the values of every input.
func (w *work) allValues(paths []string) [][]float64 {
	all := make([][]float64, len(paths))
	for i, p := range paths {
		all[i] = w.valuesAt(p)
	}
	return all
}

// valuesAt returns the value of a path, or those of a list.
func (w *work) valuesAt(path string) []float64 {
	if !strings.Contains(path, "*") {
		if v, ok := w.valueAt(path); ok {
			return []float64{v}
		}
		return nil
	}
	var list []float64
	for _, p := range w.placesOf(path) {
		v, _ := w.valueAt(p)
		list = append(list, v)
	}
	return list
}

// placesOf returns the paths that a path with * stands for, in order.
func (w *work) placesOf(path string) []string {
	before, after, more := strings.Cut(path, "*")
	if !more {
		return []string{path}
	}
	var list []string
	for i := range w.lengthAt(strings.TrimSuffix(before, ".")) {
		list = append(list, w.placesOf(before+strconv.Itoa(i)+after)...)
	}
	return list
}

// lengthAt returns the number of members of the list at a path.
func (w *work) lengthAt(path string) int {
	if at, ok := fits("sources.*.at", path); ok {
		if at[0] < 0 || at[0] >= len(w.parts) { // kept apart from u_val
			return 0
		}
		return len(w.x)
	}
	for _, column := range []string{"x", "y", "second"} {
		if at, ok := fits("taken.*."+column, path); ok {
			values, _ := w.takenPart(at[0], column)
			return len(values)
		}
	}
	if rest, ok := strings.CutPrefix(path, "read."); ok {
		side, _, _ := strings.Cut(rest, ".")
		if c := w.curveOf(side); c != nil {
			return len(c.y)
		}
		return 0
	}
	v, ok := reach(reflect.ValueOf(w.cell), path)
	if !ok || v.Kind() != reflect.Slice {
		return 0
	}
	return v.Len()
}

// valueAt returns the number at a path of the cell: one of the report, or one
// that stands between the report and the files.
func (w *work) valueAt(path string) (float64, bool) {
	if rest, ok := strings.CutPrefix(path, "read."); ok {
		return w.readAt(rest)
	}
	if document, rest, ok := w.document(path); ok {
		return numberOf(reach(document, rest))
	}
	if at, ok := fits("sources.*.at.*", path); ok {
		if at[0] < 0 || at[0] >= len(w.parts) || at[1] < 0 || at[1] >= len(w.x) {
			return 0, false
		}
		return float64(w.step(w.parts[at[0]].source.U[at[1]])), true
	}
	for _, column := range []string{"x", "y", "second"} {
		if at, ok := fits("taken.*."+column+".*", path); ok {
			return w.takenAt(at[0], column, at[1])
		}
	}
	return numberOf(reach(reflect.ValueOf(w.cell), path))
}

// numberOf returns a value that is a number.
func numberOf(v reflect.Value, ok bool) (float64, bool) {
	switch {
	case !ok:
		return 0, false
	case v.CanFloat():
		return v.Float(), true
	case v.CanInt():
		return float64(v.Int()), true
	}
	return 0, false
}

// reach follows a path of JSON names into a value.
func reach(v reflect.Value, path string) (reflect.Value, bool) {
	for _, step := range strings.Split(path, ".") {
		for v.Kind() == reflect.Pointer {
			if v.IsNil() {
				return v, false
			}
			v = v.Elem()
		}
		switch v.Kind() {
		case reflect.Struct:
			at := -1
			for i := range v.NumField() {
				name, _, _ := strings.Cut(v.Type().Field(i).Tag.Get("json"), ",")
				if name == step {
					at = i
				}
			}
			if at < 0 {
				return v, false
			}
			v = v.Field(at)
		case reflect.Slice, reflect.Array:
			n, err := strconv.Atoi(step)
			if err != nil || n < 0 || n >= v.Len() {
				return v, false
			}
			v = v.Index(n)
		default:
			return v, false
		}
	}
	for v.Kind() == reflect.Pointer && !v.IsNil() {
		v = v.Elem()
	}
	return v, true
}

// ofReport walks a number that is of no cell.
func (t *Walk) ofReport(path string) (Step, error) {
	v, ok := numberOf(reach(reflect.ValueOf(*t.report), path))
	if !ok {
		return Step{}, unknownPath(path)
	}
	s := Step{Path: path, Name: "number of the study", Value: Number(v), Inputs: []StepInput{}, Again: None,
		Why: "It describes the file or the log itself; nothing stands behind it."}
	at, ok := fits("differences.*."+path[strings.LastIndex(path, ".")+1:], path)
	if !ok {
		return s, nil
	}
	d := t.report.Differences[at[0]]
	s.Name, s.Unit, s.Why = "difference of model "+d.A+" from model "+d.B, d.Unit, "Of the stations of both cells; the data cancel. Its formula stands in the methods."
	for i, c := range t.report.Cells {
		if c.Case == d.Case && c.Quantity == d.Quantity && (c.Model == d.A || c.Model == d.B) {
			s.Inputs = append(s.Inputs, StepInput{Path: "cells." + strconv.Itoa(i) + ".stations.*.s", Name: "S of model " + c.Model, N: len(c.Stations), Value: None})
		}
	}
	return s, nil
}

// document parts a path of what a person entered: in the question of the cell
// after "entered.", in the study after "stated.".
func (w *work) document(path string) (reflect.Value, string, bool) {
	if rest, ok := strings.CutPrefix(path, "entered."); ok {
		return reflect.ValueOf(*w.q), rest, true
	}
	if rest, ok := strings.CutPrefix(path, "stated."); ok {
		return reflect.ValueOf(*w.e.study), rest, true
	}
	return reflect.Value{}, "", false
}

// walkEntered ends a walk at what a person entered.
func (w *work) walkEntered(path string) (Step, bool) {
	document, rest, _ := w.document(path)
	v, ok := numberOf(reach(document, rest))
	if !ok {
		return Step{}, false
	}
	text, err := json.Marshal(v)
	if err != nil {
		return Step{}, false
	}
	of := "entry " + rest + " of the study"
	if strings.HasPrefix(path, "entered.") {
		of = "entry " + rest + " of " + w.q.label()
	}
	return Step{Name: "entered", Value: Number(v), Again: Number(v), Agrees: true, Inputs: []StepInput{}, Words: "as entered",
		Origin: &Origin{Text: string(text), Of: of}}, true
}

package sentence

import (
	"strconv"
	"strings"

	"weirmark/core/adequacy"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// Status of a statement.
const (
	Withheld    = "withheld"    // a blank that no statement can do without
	Provisional = "provisional" // stated, resting on open points
	Stated      = "stated"
)

// Statement is the sentence of one cell.
type Statement struct {
	Status  string         `json:"status"`
	Phrases []study.Phrase `json:"phrases"`
}

// Text joins the phrases; a blank is written in square brackets.
func (s Statement) Text() string {
	var b strings.Builder
	for _, p := range s.Phrases {
		if p.Mark == study.Missing {
			b.WriteString("[" + p.Text + "]")
			continue
		}
		b.WriteString(p.Text)
	}
	return b.String()
}

// Of returns the statement of a cell.
func Of(c *study.Cell) Statement {
	w := &writer{cell: c}
	w.subject()
	switch {
	case c.Withheld:
		w.withheld()
		return Statement{Withheld, w.phrases}
	case c.Scalar:
		w.scalar()
	default:
		w.curve()
	}
	w.requirement()
	w.kind()
	w.application()
	w.changes()
	w.rests()
	w.end()
	if c.Provisional {
		return Statement{Provisional, w.phrases}
	}
	return Statement{Stated, w.phrases}
}

// end takes the space away that a further sentence would have needed.
func (w *writer) end() {
	if n := len(w.phrases); n > 0 {
		w.phrases[n-1].Text = strings.TrimRight(w.phrases[n-1].Text, " ")
	}
}

// Veiled returns what may be said before a comparison is looked at: its
// subject, and what is to be recorded first.
func Veiled(c *study.Cell) Statement {
	w := &writer{cell: c}
	w.subject()
	w.say(": the comparison is covered until a requirement is recorded, or until it is asked for, which the log will say. ")
	w.blank("", "an accuracy requirement")
	return Statement{Withheld, w.phrases}
}

// writer collects phrases; neighbouring plain words are one phrase, numbers
// stand apart.
type writer struct {
	cell    *study.Cell
	phrases []study.Phrase
}

func (w *writer) say(text string) {
	if n := len(w.phrases); n > 0 && w.phrases[n-1].Mark == study.Plain && w.phrases[n-1].Target == nil && w.phrases[n-1].Value == nil {
		w.phrases[n-1].Text += text
		return
	}
	w.phrases = append(w.phrases, study.Phrase{Text: text})
}

func (w *writer) mark(text, mark string, target study.Target) {
	w.phrases = append(w.phrases, study.Phrase{Text: text, Mark: mark, Target: &target})
}

// figure is a number of the report: its place in the cell, its value, and its
// text. Over is the place of what a percentage is taken of.
type figure struct {
	path, over string
	value      study.Number
	text       string
}

// of returns a figure that is a value of the report itself.
func of(path string, value study.Number, text string) figure { return figure{path, "", value, text} }

// counted returns a whole number of the report.
func counted(path string, n int) figure { return of(path, study.Number(n), strconv.Itoa(n)) }

// number says a computed number and the part of the page that shows it.
func (w *writer) number(f figure, where string) {
	w.mark(f.text, study.FigureOf, w.result(where))
	w.holds(f)
}

// value says a number of the report as plain words.
func (w *writer) value(f figure) {
	w.phrases = append(w.phrases, study.Phrase{Text: f.text})
	w.holds(f)
}

// holds notes that the last phrase is a number of the report.
func (w *writer) holds(f figure) {
	p := &w.phrases[len(w.phrases)-1]
	p.Path, p.Over, p.Value = f.path, f.over, &f.value
}

// blank says a missing item, or the text where it is there. The open point
// that asks for it is the target.
func (w *writer) blank(text, missing string) {
	for _, o := range w.cell.Open {
		if o.Missing == missing {
			w.mark(missing, study.Missing, o.Target)
			return
		}
	}
	w.say(text)
}

// item says a value that a person may have to accept; a guess keeps its mark.
func (w *writer) item(text, acceptance string) {
	for _, o := range w.cell.Open {
		if o.Missing == acceptance {
			w.mark(text, study.Guess, o.Target)
			return
		}
	}
	w.say(text)
}

// subject says what is compared with what.
func (w *writer) subject() {
	c := w.cell
	w.say("For ")
	w.item(c.Quantity, "acceptance of the quantity")
	if c.Derived != nil {
		w.say(" (" + c.Derived.Kind + ", taken from the curves)")
	}
	w.say(" at ")
	w.item(c.Case, "acceptance of the case")
	if c.Condition != "" {
		w.say(", " + c.Condition)
	}
	w.say(", ")
	if w.open("a simulation") {
		w.blank("", "a simulation")
	} else {
		w.item(modelName(c), "acceptance of the model")
		if grid := c.Grid; grid != "" {
			w.say(" on grid ")
			w.item(grid, "acceptance of the grid")
		}
	}
	if w.open("reference data") {
		w.say(" against ")
		w.blank("", "reference data")
	} else {
		w.say(" against " + kindWord(c) + " ")
		w.item(c.Reference, "acceptance of the role")
	}
}

func (w *writer) open(missing string) bool {
	for _, o := range w.cell.Open {
		if o.Missing == missing {
			return true
		}
	}
	return false
}

func modelName(c *study.Cell) string {
	if c.Model == "" {
		return "the simulation"
	}
	return "model " + c.Model
}

// kindWord names the reference by its kind.
func kindWord(c *study.Cell) string {
	switch c.Kind {
	case study.KindTest:
		return "test"
	case study.KindLaw:
		return "law"
	case study.KindCorrelation:
		return "correlation"
	case study.KindSimulation:
		return "another simulation"
	}
	return "reference"
}

// withheld says what was found so far and why nothing is stated.
func (w *writer) withheld() {
	c := w.cell
	switch {
	case c.Summary == nil:
		w.say(": nothing is compared yet. ")
	case w.open("the uncertainty of the data"):
		w.say(": E = ")
		w.difference()
		w.say(", without ")
		w.blank("", "the uncertainty of the data")
		w.say(". Comparison only. Experimental uncertainty is not available; no validation statement is made. ")
	default:
		w.say(": E = ")
		w.difference()
		w.say(". ")
	}
	if c.Summary != nil {
		w.kind()
	}
	w.say("No statement: ")
	if len(c.Open) == 0 {
		w.say("no station has a known uncertainty.")
		return
	}
	first := c.Open[0]
	w.mark(first.Missing, study.Missing, first.Target)
	w.say(" is open. " + further(len(c.Open)-1))
}

func further(n int) string {
	switch n {
	case 0:
		return "No further open point."
	case 1:
		return "1 further open point."
	}
	return strconv.Itoa(n) + " further open points."
}

// difference says E: of the one value, or the mean over the stations.
func (w *writer) difference() {
	c := w.cell
	if c.Scalar && len(c.Stations) == 1 {
		s := c.Stations[0]
		e := of("stations.0.e", s.E, quantity.Signed(float64(s.E), 3))
		if c.InPercent() {
			e = w.scaled("e", s.E, true)
		}
		w.number(e, "agreement")
		w.say(w.unit())
		return
	}
	w.number(of("summary.bias", c.Summary.Bias, quantity.Signed(float64(c.Summary.Bias), 3)), "agreement")
	w.say(c.UnitSuffix() + " on average over ")
	w.value(counted("summary.n", c.Summary.N))
	w.say(stationsWord(c.Summary.N))
}

func stationsWord(n int) string {
	if n == 1 {
		return " station"
	}
	return " stations"
}

func absolute(v float64) float64 {
	if v < 0 {
		return -v
	}
	return v
}

// scalar states the comparison of one value.
func (w *writer) scalar() {
	c := w.cell
	s := c.Stations[0]
	e := w.scaled("e", s.E, true)
	w.say(": E = ")
	w.number(e, "agreement")
	w.say(w.unit() + " against u_val = ")
	w.number(w.scaled("u_val", s.UVal, false), "uncertainty")
	w.say(w.unit())
	w.kNum()
	w.say(". ")
	k := quantity.Typed(c.Choices.K)
	switch s.Reading {
	case study.SignResolved:
		side := "above"
		if s.E < 0 {
			side = "below"
		}
		w.say("|E| exceeds " + k + " u_val")
		w.interval(" and the interval ± ", " of what is known by its limits only, together")
		w.say(". Under the stated uncertainties the simulation is ")
		w.mark(side, study.WordOf, w.result("agreement"))
		w.say(" the data by more than they account for; E ± " + k + " u_val")
		w.interval(" ± ", "")
		w.say(" spans ")
	case study.Between:
		w.say("|E|")
		w.interval(" less the interval ± ", " of what is known by its limits only")
		w.say(" lies between u_val and " + k + " u_val; its sign is not resolved; the model error lies within ")
	default:
		w.say("|E| = " + strings.TrimLeft(e.text, "+−") + w.unit() + " does not exceed u_val")
		w.interval(" and the interval ± ", " of what is known by its limits only, together")
		w.say(". The model error is not distinguishable from the combined " + combined(s) + " uncertainty. This does not show that it is small; it lies within ")
	}
	w.number(w.scaled("lo", s.Lo, true), "agreement")
	if c.InPercent() {
		w.say(w.unit())
	}
	w.say(" to ")
	w.number(w.scaled("hi", s.Hi, true), "agreement")
	w.say(w.unit() + " (k = " + k + "). ")
}

// interval says the half-width that sources known as intervals add to the ends,
// where there is one.
func (w *writer) interval(before, after string) {
	b := w.cell.Bound
	if b == nil || !(b.Half > 0) {
		return
	}
	w.say(before)
	half := of("bound.half", b.Half, quantity.Text(float64(b.Half), 2))
	if w.cell.InPercent() {
		f := float64(b.Half) / absolute(float64(w.cell.Stations[0].D))
		half = figure{"bound.half", "stations.0.d", study.Number(100 * f), quantity.Percent(f)}
	}
	w.value(half)
	w.say(w.unit() + after)
}

// combined names the parts that u_val has: one that is not known is not said.
func combined(s study.Station) string {
	if s.UInput.Known() {
		return "numerical, input and experimental"
	}
	return "numerical and experimental"
}

func (w *writer) result(field string) study.Target {
	return study.Target{Kind: "result", ID: w.cell.Case + "|" + w.cell.Quantity + "|" + w.cell.Model, Field: field}
}

// scaled returns a difference of a scalar in percent of |D| or in its unit,
// without the unit.
func (w *writer) scaled(name string, v study.Number, signed bool) figure {
	c := w.cell
	s := c.Stations[0]
	path := "stations.0." + name
	switch {
	case c.InPercent() && signed:
		f := float64(v) / absolute(float64(s.D))
		return figure{path, "stations.0.d", study.Number(100 * f), quantity.SignedPercent(f)}
	case c.InPercent():
		f := float64(v) / absolute(float64(s.D))
		return figure{path, "stations.0.d", study.Number(100 * f), quantity.Percent(f)}
	case signed:
		return of(path, v, quantity.SignedLike(float64(v), float64(s.UVal), 2))
	}
	return of(path, v, quantity.Text(float64(v), 2))
}

// unit returns what stands behind a scaled difference.
func (w *writer) unit() string {
	if w.cell.InPercent() {
		return " %"
	}
	return w.cell.UnitSuffix()
}

// kNum says that the grid uncertainty is borrowed, or the factor between the grid uncertainty and u_num, an assumption
// that the statement can turn on. The bound of an oscillatory family has none.
func (w *writer) kNum() {
	if b := w.cell.Borrowed; b != nil && b.U.Known() {
		w.say(" (grid uncertainty borrowed from " + b.From + ", not computed for this case)")
		return
	}
	g := w.cell.Grids
	if g == nil || !g.UNum.Known() || !g.Along && !g.U.Known() {
		return
	}
	w.say(" (k_num = ")
	w.mark(quantity.Typed(w.cell.Choices.KNum), study.Assumed, study.Target{Kind: "question", ID: w.cell.Case + "|" + w.cell.Quantity, Field: "choices.k_num"})
	w.holds(of("choices.k_num", study.Number(w.cell.Choices.KNum), ""))
	w.say(")")
}

// curve states the comparison of a curve: counts, then all stations together.
func (w *writer) curve() {
	c := w.cell
	s := c.Summary
	k := quantity.Typed(c.Choices.K)
	w.say(" at ")
	w.number(counted("summary.n", s.N), "stations")
	w.say(" of ")
	w.value(counted("stations_all", c.StationsAll))
	w.say(stationsWord(c.StationsAll) + ": mean E = ")
	w.number(of("summary.bias", s.Bias, quantity.Signed(float64(s.Bias), 3)), "agreement")
	w.say(c.UnitSuffix() + ", root mean square ")
	w.number(of("summary.rmse", s.RMSE, quantity.Text(float64(s.RMSE), 3)), "agreement")
	w.say(c.UnitSuffix())
	w.kNum()
	w.say("; |E| exceeds " + k + " u_val at ")
	w.mark(strconv.Itoa(s.Tested-s.WithinKUVal), study.FigureOf, w.result("agreement"))
	w.say(" of ")
	w.value(counted("summary.tested", s.Tested))
	w.say(" (")
	w.value(of("summary.beyond_chance", s.BeyondChance, quantity.Text(float64(s.BeyondChance), 2)))
	w.say(" expected by chance), largest |E|/u_val ")
	w.number(of("summary.max_ratio", s.MaxRatio, quantity.Text(float64(s.MaxRatio), 3)), "agreement")
	w.interval("; what is known by its limits only, up to ± ", ", is not in u_val, these counts and the joint statistic")
	w.say(". ")
	w.joint(k)
}

// joint states the statistic of all stations, always with its parts.
func (w *writer) joint(k string) {
	c := w.cell
	j := c.Joint
	if j == nil {
		w.say("No joint statistic is available. ")
		return
	}
	w.say("Over n = ")
	w.value(counted("joint.n", j.N))
	w.say(" the joint statistic is ")
	w.number(of("joint.statistic", j.Statistic, quantity.Text(float64(j.Statistic), 3)), "joint")
	w.say(" (95 % point ")
	w.value(of("joint.reference", j.Reference, quantity.Text(float64(j.Reference), 3)))
	w.say(") with " + j.Pattern + " sources: it ")
	w.mark(exceedsWord(j.Exceeds), study.WordOf, w.result("joint"))
	w.say(" its 95 % point. ")
	if !j.Offset.Known() {
		return
	}
	w.say("Offset ")
	u := float64(j.UOffset)
	w.number(of("joint.offset", j.Offset, quantity.SignedLike(float64(j.Offset), u, 3)), "joint")
	w.say(" ± ")
	w.value(of("joint.u_offset", j.UOffset, quantity.Like(u, u, 3)))
	resolved := " (standard), not resolved at k = "
	if j.OffsetResolved {
		resolved = " (standard), resolved at k = "
	}
	w.say(c.UnitSuffix() + resolved + k + "; the remainder, ")
	w.number(of("joint.remainder", j.Remainder, quantity.Text(float64(j.Remainder), 3)), "joint")
	w.say(" on ")
	w.value(counted("joint.remainder_n", j.RemainderN))
	w.say(", ")
	w.mark(exceedsWord(j.RemainderExceeds), study.WordOf, w.result("joint"))
	w.say(" its 95 % point. ")
}

func exceedsWord(yes bool) string {
	if yes {
		return "exceeds"
	}
	return "does not exceed"
}

// requirement states adequacy in one of three words.
func (w *writer) requirement() {
	c := w.cell
	r := c.Requirement
	if r == nil {
		w.say("Adequacy is not judged without ")
		w.blank("", "an accuracy requirement")
		w.say(". ")
		return
	}
	if r.Outcome == "" {
		return
	}
	limit, unit := of("requirement.limit", r.Limit, quantity.Text(float64(r.Limit), 4)), c.UnitSuffix()
	if r.Percent.Known() {
		limit, unit = of("requirement.percent", r.Percent, quantity.Typed(float64(r.Percent))), " %"
	}
	if by := strings.Join(nonEmpty(r.Who, r.Date), ", "); by != "" {
		unit += " (" + by + ")"
	}
	words := map[string]string{study.Shown: "shown", study.NotMet: "refuted", study.NotResolved: "neither shown nor refuted"}
	w.say("That the model error stays within ±")
	w.value(limit)
	w.say(unit + " is ")
	w.mark(words[r.Outcome], study.WordOf, w.result("adequacy"))
	w.say(" at k = " + quantity.Typed(c.Choices.K) + ", under the stated uncertainties, at " + setPoints(c) + " only. ")
	w.resolve(r)
}

func setPoints(c *study.Cell) string {
	if c.Summary.Tested == 1 {
		return "this set point"
	}
	return "these " + strconv.Itoa(c.Summary.Tested) + " set points"
}

// resolve says what would resolve an open outcome.
func (w *writer) resolve(r *study.Judgement) {
	if r.Outcome != study.NotResolved || !r.UValNeeded.Known() {
		return
	}
	sign := "≤ "
	if r.Toward == study.NotMet {
		sign = "< " // then it would be refuted
	}
	w.say("To resolve, with E unchanged: u_val " + sign)
	w.number(of("requirement.u_val_needed", r.UValNeeded, quantity.Text(float64(r.UValNeeded), 3)), "adequacy")
	w.say(w.cell.UnitSuffix())
	if r.UNumNeeded.Known() {
		w.say(", e.g. u_num reduced by ")
		w.number(of("requirement.u_num_reduction", r.UNumReduction, quantity.Percent(float64(r.UNumReduction))+" %"), "adequacy")
	}
	w.say(". ")
}

// kind says what the kind and the use of the reference do to the claim.
func (w *writer) kind() {
	switch w.cell.Use {
	case study.UseTuning:
		w.say("These data were used to set the model; agreement here is fit quality. ")
	case study.UseBoth:
		w.say("A part of these data was used to set the model; agreement there is fit quality. ")
	}
	switch w.cell.Kind {
	case study.KindSimulation:
		w.say("Code-to-code comparison: it says nothing of the error against measurement. ")
	case study.KindLaw:
		w.say("The reference is a law: this says how the simulation follows it in its range, and nothing of a measurement. ")
	case study.KindCorrelation:
		w.say("The reference is a correlation: the scatter of the data behind it belongs to its uncertainty. ")
	}
	switch w.cell.Known {
	case study.Blind:
		w.say("The simulation was made without the data being known, as stated. ")
	case study.Aware:
		w.say("The data were known when the simulation was made. ")
	}
}

// application says where no statement is made.
func (w *writer) application() {
	if a := w.cell.Application; a != nil && a.Outside {
		w.say("The application point (" + a.Text + ") lies outside the compared conditions (" + a.Range + "). No statement is made there. ")
	} else if a != nil && a.Place != nil && a.Place.State == adequacy.Edge {
		w.say("The application point (" + a.Text + ") lies at the edge of the compared conditions. ")
	}
}

// changes lists the choices that would change a word of the statement.
func (w *writer) changes() {
	if len(w.cell.Fragile) == 0 {
		return
	}
	w.say("Changes if: ")
	for i, f := range w.cell.Fragile {
		if i > 0 {
			w.say("; ")
		}
		w.mark(f.Change, study.FigureOf, w.result("fragility"))
		w.say(" (" + f.What + " → ")
		w.mark(f.Outcome, study.WordOf, w.result("fragility"))
		if f.Detail != "" {
			w.say(", " + f.Detail)
		}
		if f.At != nil {
			w.say("; it turns at ")
			w.number(of("fragile."+strconv.Itoa(i)+".at", *f.At, quantity.Text(float64(*f.At), 3)), "fragility")
		}
		w.say(")")
	}
	w.say(". ")
}

// rests lists the open points a provisional statement rests on.
func (w *writer) rests() {
	if !w.cell.Provisional {
		return
	}
	w.say("Provisional while these are open: ")
	for i, o := range w.cell.Open {
		if i > 0 {
			w.say(", ")
		}
		w.mark(o.Missing, study.Missing, o.Target)
	}
	w.say(".")
}

func nonEmpty(texts ...string) []string {
	var all []string
	for _, t := range texts {
		if t != "" {
			all = append(all, t)
		}
	}
	return all
}

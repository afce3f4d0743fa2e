package sentence

import (
	"strconv"
	"strings"

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
	if c.Provisional {
		return Statement{Provisional, w.phrases}
	}
	return Statement{Stated, w.phrases}
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

// writer collects phrases; neighbouring plain words are one phrase.
type writer struct {
	cell    *study.Cell
	phrases []study.Phrase
}

func (w *writer) say(text string) {
	if n := len(w.phrases); n > 0 && w.phrases[n-1].Mark == study.Plain && w.phrases[n-1].Target == nil {
		w.phrases[n-1].Text += text
		return
	}
	w.phrases = append(w.phrases, study.Phrase{Text: text})
}

func (w *writer) mark(text, mark string, target study.Target) {
	w.phrases = append(w.phrases, study.Phrase{Text: text, Mark: mark, Target: &target})
}

// number says a computed number and the part of the page that shows it.
func (w *writer) number(text, where string) {
	w.mark(text, study.FigureOf, study.Target{Kind: "result", ID: w.cell.Case + "|" + w.cell.Quantity + "|" + w.cell.Model, Field: where})
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
		w.say(" against an experimental uncertainty of ")
		w.blank("", "the uncertainty of the data")
		w.say(". Comparison only. Experimental uncertainty is not available; no validation statement is made. ")
	default:
		w.say(": E = ")
		w.difference()
		w.say(". ")
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
		if c.InPercent() {
			w.number(quantity.SignedPercent(float64(s.E)/absolute(float64(s.D)))+" %", "agreement")
			return
		}
		w.number(quantity.Signed(float64(s.E), 3)+c.UnitSuffix(), "agreement")
		return
	}
	w.number(quantity.Signed(float64(c.Summary.Bias), 3)+c.UnitSuffix(), "agreement")
	w.say(" on average over " + stations(c.Summary.N))
}

func stations(n int) string {
	if n == 1 {
		return "1 station"
	}
	return strconv.Itoa(n) + " stations"
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
	e, u := w.scaled(s.E, true), w.scaled(s.UVal, false)
	w.say(": E = ")
	w.number(e, "agreement")
	w.say(" against u_val = ")
	w.number(u, "uncertainty")
	w.kNum()
	w.say(". ")
	k := entered(c.Choices.K)
	e = strings.TrimLeft(e, "+−")
	switch s.Reading {
	case study.SignResolved:
		side := "above"
		if s.E < 0 {
			side = "below"
		}
		w.say("|E| exceeds " + k + " u_val. Under the stated uncertainties the simulation is ")
		w.mark(side, study.WordOf, w.result("agreement"))
		w.say(" the data by more than they account for; E ± " + k + " u_val spans ")
	case study.Between:
		w.say("E lies between u_val and " + k + " u_val; its sign is not resolved; the model error lies within ")
	default:
		w.say("|E| = " + e + " does not exceed u_val. The model error is not distinguishable from the combined numerical, input and experimental uncertainty. This does not show that it is small; it lies within ")
	}
	w.number(study.IntervalText(c, s), "agreement")
	w.say(" (k = " + k + "). ")
}

func (w *writer) result(field string) study.Target {
	return study.Target{Kind: "result", ID: w.cell.Case + "|" + w.cell.Quantity + "|" + w.cell.Model, Field: field}
}

// scaled prints a difference of a scalar in percent or in its unit.
func (w *writer) scaled(v study.Number, signed bool) string {
	c := w.cell
	s := c.Stations[0]
	if c.InPercent() {
		f := float64(v) / absolute(float64(s.D))
		if signed {
			return quantity.SignedPercent(f) + " %"
		}
		return quantity.Percent(f) + " %"
	}
	if signed {
		return quantity.SignedLike(float64(v), float64(s.UVal), 2) + c.UnitSuffix()
	}
	return quantity.Text(float64(v), 2) + c.UnitSuffix()
}

// kNum says the factor between the grid uncertainty and u_num, an assumption
// that the statement can turn on.
func (w *writer) kNum() {
	if w.cell.Grids == nil || !w.cell.Grids.UNum.Known() {
		return
	}
	w.say(" (k_num = ")
	w.mark(entered(w.cell.Choices.KNum), study.Assumed, study.Target{Kind: "question", ID: w.cell.Case + "|" + w.cell.Quantity, Field: "choices.k_num"})
	w.say(")")
}

// curve states the comparison of a curve: counts, then all stations together.
func (w *writer) curve() {
	c := w.cell
	s := c.Summary
	k := entered(c.Choices.K)
	w.say(" at ")
	w.number(strconv.Itoa(s.N)+" of "+stations(c.StationsAll), "stations")
	w.say(": mean E = ")
	w.number(quantity.Signed(float64(s.Bias), 3)+c.UnitSuffix(), "agreement")
	w.say(", root mean square ")
	w.number(quantity.Text(float64(s.RMSE), 3)+c.UnitSuffix(), "agreement")
	w.kNum()
	w.say("; |E| exceeds " + k + " u_val at ")
	w.number(strconv.Itoa(s.Tested-s.WithinKUVal)+" of "+strconv.Itoa(s.Tested), "agreement")
	w.say(" (" + quantity.Text(float64(s.BeyondChance), 2) + " expected by chance), largest |E|/u_val ")
	w.number(quantity.Text(float64(s.MaxRatio), 3), "agreement")
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
	w.say("Over n = " + strconv.Itoa(j.N) + " the joint statistic is ")
	w.number(quantity.Text(float64(j.Statistic), 3), "joint")
	w.say(" (95 % point " + quantity.Text(float64(j.Reference), 3) + ") with " + j.Pattern + " correlation: it ")
	w.mark(exceedsWord(j.Exceeds), study.WordOf, w.result("joint"))
	w.say(" its 95 % point. ")
	if !j.Offset.Known() {
		return
	}
	w.say("Offset ")
	u := float64(j.UOffset)
	w.number(quantity.SignedLike(float64(j.Offset), u, 3)+" ± "+quantity.Like(u, u, 3)+c.UnitSuffix(), "joint")
	resolved := " (standard), not resolved at k = "
	if j.OffsetResolved {
		resolved = " (standard), resolved at k = "
	}
	w.say(resolved + k + "; the remainder, ")
	w.number(quantity.Text(float64(j.Remainder), 3)+" on "+strconv.Itoa(j.RemainderN), "joint")
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
		w.say("Adequacy is not judged: ")
		w.blank("", "an accuracy requirement")
		w.say(". ")
		return
	}
	if r.Outcome == "" {
		return
	}
	limit := "±" + quantity.Text(float64(r.Limit), 4) + c.UnitSuffix()
	if r.Percent.Known() {
		limit = "±" + entered(float64(r.Percent)) + " %"
	}
	if by := strings.Join(nonEmpty(r.Who, r.Date), ", "); by != "" {
		limit += " (" + by + ")"
	}
	words := map[string]string{study.Shown: "shown", study.NotMet: "refuted", study.NotResolved: "neither shown nor refuted"}
	w.say("That the model error stays within " + limit + " is ")
	w.mark(words[r.Outcome], study.WordOf, w.result("adequacy"))
	w.say(" at k = " + entered(c.Choices.K) + ", under the stated uncertainties, at " + setPoints(c) + " only. ")
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
	w.say("To resolve, with E unchanged: u_val ≤ ")
	w.number(quantity.Text(float64(r.UValNeeded), 3)+w.cell.UnitSuffix(), "adequacy")
	if r.UNumNeeded.Known() {
		w.say(", e.g. u_num reduced by ")
		w.number(quantity.Percent(float64(r.UNumReduction))+" %", "adequacy")
	}
	w.say(". ")
}

// kind says what the kind and the use of the reference do to the claim.
func (w *writer) kind() {
	switch {
	case w.cell.Use == study.UseTuning:
		w.say("These data were used to set the model; agreement here is fit quality. ")
	case w.cell.Kind == study.KindSimulation:
		w.say("Code-to-code comparison: it says nothing of the error against measurement. ")
	}
}

// application says where no statement is made.
func (w *writer) application() {
	if a := w.cell.Application; a != nil && a.Outside {
		w.say("The application point (" + a.Text + ") lies outside the compared conditions (" + a.Range + "). No statement is made there. ")
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
		w.number(f.Change, "fragility")
		w.say(" (" + f.What + " → ")
		w.mark(f.Outcome, study.WordOf, w.result("fragility"))
		if f.Detail != "" {
			w.say(", " + f.Detail)
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
	w.say("Provisional: rests on ")
	for i, o := range w.cell.Open {
		if i > 0 {
			w.say(", ")
		}
		w.mark(o.Missing, study.Missing, o.Target)
	}
	w.say(".")
}

// entered prints a number as a person typed it.
func entered(v float64) string { return strconv.FormatFloat(v, 'g', -1, 64) }

func nonEmpty(texts ...string) []string {
	var all []string
	for _, t := range texts {
		if t != "" {
			all = append(all, t)
		}
	}
	return all
}

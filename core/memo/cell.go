package memo

import (
	"fmt"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// comparisons prints every cell.
func (b *builder) comparisons() Node {
	s := b.open(1, "comparisons", "Comparisons")
	if len(b.in.Report.Cells) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("None.")))
		return s
	}
	for i, c := range b.in.Report.Cells {
		s.Nodes = append(s.Nodes, b.cell(i, c))
	}
	return s
}

func (b *builder) cell(i int, c study.Cell) Node {
	s := b.openWith(2, cellID(i), names(c)...)
	b.lacking = nil
	for _, part := range [][]Node{
		b.compared(i, c), b.reference(i, c), b.conditions(i, c), b.place(i, c), b.treatment(i, c), b.measures(i, c), b.ordering(i, c), b.trend(i, c), b.scores(i, c), b.joint(i, c), b.crossings(i, c), b.derived(i, c),
		b.figuresOf(c, ""), b.stations(i, c), b.excluded(i, c), b.settling(i, c), b.grids(i, c), b.sources(i, c), b.reduction(i, c), b.evidence(i, c), b.requirement(i, c), b.recorded(i, c), b.expected(c), b.openPoints(c),
	} {
		s.Nodes = append(s.Nodes, part...)
	}
	if len(b.lacking) > 0 {
		s.Nodes = append(s.Nodes, note(typeset(strings.Join(b.lacking, " "))...))
	}
	return s
}

// lacks notes what a cell has not.
func (b *builder) lacks(sentence string) []Node {
	b.lacking = append(b.lacking, sentence)
	return nil
}

var kinds = map[string]string{
	study.KindTest:        "test",
	study.KindLaw:         "reference law",
	study.KindCorrelation: "correlation",
	study.KindSimulation:  "another simulation (comparison of codes)",
}

var uses = map[string]string{
	study.UseValidation: "kept apart from the setting of the model",
	study.UseTuning:     "used to set the model",
	study.UseBoth:       "used in part to set the model",
}

var courses = [5]string{"Run settled", "Grid fine enough", "Same thing compared", "Agreement", "What can be said"}

var states = map[study.State]string{
	study.Empty: "nothing given", study.Doubts: "given, with open points", study.Settled: "settled", study.Blocked: "contradicted or blocked",
}

// word returns the wording of a key, or the key itself.
func word[K ~string](words map[K]string, k K) string {
	if w, ok := words[k]; ok {
		return w
	}
	return string(k)
}

// compared says what stands against what.
func (b *builder) compared(i int, c study.Cell) []Node {
	at := func(name string) string { return fmt.Sprintf("cells.%d.%s", i, name) }
	evidence := make([]string, len(courses))
	for j, name := range courses {
		evidence[j] = name + ": " + word(states, c.Courses[j])
	}
	of := quantity.Counted(len(c.Stations), "station")
	if c.Scalar {
		of = quantity.Counted(len(c.Stations), "value")
	}
	points := say("{} of {}", text(of), count(c.StationsAll, at("stations_all")))
	if c.StationsAll == 0 {
		points = []Node{text(of)}
	}
	if lines := linesOf(c.Stations); lines != "" {
		points = append(points, text(", "+lines+" of the reference file"))
	}
	files := "Not provided"
	if len(c.FilesUsed) > 0 {
		files = strings.Join(b.fileNames(c.FilesUsed), ", ")
	}
	nodes := []Node{sheet(
		line(say("Simulation"), say("model {}, grid {}; condition {}; unit: {}", given(c.Model), given(c.Grid), given(c.Condition), text(unitOf(c.Unit)))...),
		line(say("Reference"), append(say("{}; kind: {}; use: {}; ", given(c.Reference), given(word(kinds, c.Kind)), given(word(uses, c.Use))), points...)...),
		line(say("Files"), text(files)),
		line(say("Evidence"), text(strings.Join(evidence, "; "))),
	)}
	if words := strings.TrimSpace(claim(c) + " " + inputWords[c.InputForm]); words != "" {
		nodes = append(nodes, note(typeset(words)...))
	}
	return nodes
}

// claim says what the kind and the use of the reference do to the claim.
func claim(c study.Cell) string {
	words := ""
	switch c.Kind {
	case study.KindLaw:
		words = "The reference is a law: it holds in its own range, and its uncertainty is that of the law there."
	case study.KindCorrelation:
		words = "The reference is a correlation: the scatter of the data behind it belongs to its uncertainty."
	case study.KindSimulation:
		words = "The reference is another simulation: this says nothing of the error against measurement."
	}
	if c.Use == study.UseBoth {
		words = strings.TrimSpace(words + " A part of these data was used to set the model: agreement there is fit quality.")
	}
	switch c.Known {
	case study.Blind:
		words = strings.TrimSpace(words + " The simulation was made without the data being known, as stated.")
	case study.Aware:
		words = strings.TrimSpace(words + " The data were known when the simulation was made.")
	}
	if c.Use == study.UseTuning {
		words = strings.TrimSpace(words + " These data were used to set the model: agreement here is fit quality.")
	}
	return words
}

// linesOf returns the span of the reference lines.
func linesOf(stations []study.Station) string {
	first, last := 0, 0
	for _, s := range stations {
		if s.Line > 0 && (first == 0 || s.Line < first) {
			first = s.Line
		}
		last = max(last, s.Line)
	}
	switch {
	case first == 0:
		return ""
	case first == last:
		return fmt.Sprintf("line %d", first)
	}
	return fmt.Sprintf("lines %d to %d", first, last)
}

func (b *builder) fileNames(ids []string) []string {
	names := make([]string, len(ids))
	for i, id := range ids {
		names[i] = id
		for _, f := range b.in.Report.Files {
			if f.ID == id {
				names[i] = f.Name
			}
		}
	}
	return names
}

// excluded prints the stations a person took out, with the reasons.
func (b *builder) excluded(i int, c study.Cell) []Node {
	if len(c.Excluded) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Excluded))
	for j, e := range c.Excluded {
		at := func(name string) string { return fmt.Sprintf("cells.%d.excluded.%d.%s", i, j, name) }
		seen := "no"
		if e.Late {
			seen = "yes"
		}
		rows[j] = row(figureCell(written(e.X, quantity.Text(float64(e.X), 4), at("x"))), figureCell(writtenBeside(e.D, quantity.None, at("d"))),
			figureCell(count(e.Line, at("line"))), cell(given(e.Why)), cell(text(seen)))
	}
	head := block(Row, "head", block(Head, "number", given(c.XName)), block(Head, "number", say("*D*")...), block(Head, "number", text("Line")), block(Head, "", text("Reason")), block(Head, "", text("Comparison seen before")))
	return []Node{b.table("plain", say("Stations excluded by a person, not in any number of this cell ({}).", text(unitOf(c.Unit))), head, rows...)}
}

// measures prints the difference measures of a curve.
func (b *builder) measures(i int, c study.Cell) []Node {
	m := c.Summary
	if m == nil || c.Scalar {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.summary.%s", i, name) }
	scale := quantity.None
	if low, _ := extremes(c.Stations, func(s study.Station) quantity.Number { return s.UVal }); low >= 0 {
		scale = c.Stations[low].UVal
	}
	where := []Node(nil)
	if m.MaxAt.Known() {
		where = append(say(" at {} = ", given(c.XName)), withUnit(trimmed(m.MaxAt, 4, at("max_at")), c.XUnit)...)
	}
	rows := []Node{
		line(say("Stations compared"), count(m.N, at("n"))),
		line(say("Mean of *E* (bias)"), withUnit(signedBeside(m.Bias, scale, at("bias")), c.Unit)...),
		line(say("Mean of |*E*|"), withUnit(beside(m.MAE, scale, at("mae")), c.Unit)...),
		line(say("Root mean square of *E*"), withUnit(beside(m.RMSE, scale, at("rmse")), c.Unit)...),
		line(say("Largest |*E*|"), append(withUnit(beside(m.MaxAbs, scale, at("max_abs")), c.Unit), where...)...),
	}
	if m.MaxRatio.Known() {
		rows = append(rows,
			line(say("Largest |*E*|/*u*_{val}"), digits(m.MaxRatio, 3, at("max_ratio"))),
			line(say("Stations with |*E*| ≤ *u*_{val}"), say("{} of {}", count(m.WithinUVal, at("within_u_val")), count(m.Tested, at("tested")))...),
			line(say("Stations with |*E*| ≤ *k* *u*_{val}"), say("{} of {}", count(m.WithinKUVal, at("within_k_u_val")), count(m.Tested, at("tested")))...),
			line(say("Expected beyond *k* *u*_{val} by chance"), digits(m.BeyondChance, 3, at("beyond_chance")), text(", for normal errors")))
	} else {
		rows = append(rows, line(say("Against the uncertainty"), say("not available: *u*_{val} is not known")...))
	}
	return []Node{heading("Difference measures"), pairs(rows...)}
}

// joint prints the statistic of all stations together and its parts.
func (b *builder) joint(i int, c study.Cell) []Node {
	if c.Scalar {
		return nil
	}
	title := heading("All stations together")
	j := c.Joint
	if j == nil {
		return b.lacks("No joint statistic is available for this cell.")
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.joint.%s", i, name) }
	against := func(exceeds bool) Node {
		if exceeds {
			return text("exceeds it")
		}
		return text("does not exceed it")
	}
	rows := []Node{row(cell(say("Joint statistic *E*^{T}*V*^{−1}*E*")...), figureCell(hundredths(j.Statistic, at("statistic"))), figureCell(count(j.N, at("n"))),
		figureCell(hundredths(j.Reference, at("reference"))), cell(against(j.Exceeds)))}
	if known(j.Remainder) {
		rows = append(rows,
			row(cell(text("\u2003of which a common offset")), figureCell(hundredths(j.OffsetPart, at("offset_part"))), figureCell(text("1")), figureCell(text("")), cell()),
			row(cell(text("\u2003remainder")), figureCell(hundredths(j.Remainder, at("remainder"))), figureCell(count(j.RemainderN, at("remainder_n"))),
				figureCell(hundredths(j.RemainderReference, at("remainder_reference"))), cell(against(j.RemainderExceeds))))
	}
	if known(j.ScalePart) {
		rows = append(rows,
			row(cell(text("\u2003\u2003of which a scale")), figureCell(hundredths(j.ScalePart, at("scale_part"))), figureCell(text("1")), figureCell(text("")), cell()),
			row(cell(text("\u2003\u2003shape")), figureCell(hundredths(j.ShapePart, at("shape_part"))), figureCell(count(j.ShapeN, at("shape_n"))), figureCell(text("")), cell()))
	}
	nodes := []Node{title, b.table("plain", say("Joint statistic over {} with correlation: {}.", text(quantity.Counted(j.N, "station")), given(j.Pattern)),
		headRow("", "#Value", "#Degrees of freedom", "#95 % point", "Reading"), rows...)}
	words := say("The tail probability at the stated uncertainties is {}.", digits(j.P, 2, at("p_value")))
	resolution := func(yes bool) string {
		if yes {
			return "resolved"
		}
		return "not resolved"
	}
	if known(j.Offset) {
		words = append(words, say(" The common offset of *E* is ")...)
		words = append(words, withUnit(signedBeside(j.Offset, j.UOffset, at("offset")), c.Unit)...)
		words = append(words, text(" ± "))
		words = append(words, withUnit(digits(j.UOffset, 2, at("u_offset")), c.Unit)...)
		words = append(words, text(" (standard), "+resolution(j.OffsetResolved)+" at this level."))
	}
	if known(j.Scale) {
		words = append(words, say(" With a scale beside it, *E* = *a* + *b* *S*, *b* is {} ± {}, {}.",
			signedBeside(j.Scale, j.UScale, at("scale")), digits(j.UScale, 2, at("u_scale")), text(resolution(j.ScaleResolved)))...)
	}
	if m := c.Summary; known(j.AtLeast) && m != nil && m.WithinKUVal < m.Tested {
		chance := []Node{text(" of "), digits(j.AtLeast, 2, at("at_least"))}
		if j.AtLeast == 0 {
			chance = []Node{text(" too small for the draws to show: "), digits(j.AtLeast, 2, at("at_least")), text(" of them reached it")}
		}
		words = append(append(append(words, say(" At least as many stations beyond *k* *u*_{val} as found have a probability")...), chance...), text(", by sampling."))
	}
	if known(j.Independent, j.NumShared) {
		words = append(words, say(" Other correlations: {} with every source independent between stations, {} with the numerical uncertainty fully shared.",
			hundredths(j.Independent, at("independent")), hundredths(j.NumShared, at("num_shared")))...)
	}
	for n, turn := range j.Turns {
		of := func(name string) string { return fmt.Sprintf(at("turns.%d.%s"), n, name) }
		words = append(words, say(" The reading turns where the correlation of {} is {} ({} when independent, {} when fully shared).",
			text(turn.Source), digits(turn.Rho, 3, of("rho")), hundredths(turn.At0, of("at_0")), hundredths(turn.At1, of("at_1")))...)
	}
	for n, left := range j.Without {
		of := func(name string) string { return fmt.Sprintf(at("without.%d.%s"), n, name) }
		words = append(words, say(" Without {}: {} on {}, 95 % point {}, {}.", text(left.Region), hundredths(left.Statistic, of("statistic")), count(left.N, of("n")),
			hundredths(left.Reference, of("reference")), against(left.Exceeds))...)
	}
	nodes = append(nodes, paragraph(words...))
	return append(nodes, b.around(i, c)...)
}

// crossings lists the changes of sign of a curve.
func (b *builder) crossings(i int, c study.Cell) []Node {
	if len(c.Crossings.Simulation)+len(c.Crossings.Reference) == 0 {
		return nil
	}
	side := func(key string, list []study.Crossing) []Node {
		if len(list) == 0 {
			return []Node{text("none")}
		}
		var nodes []Node
		for j, x := range list {
			if j > 0 {
				nodes = append(nodes, text("; "))
			}
			way := " (falling)"
			if x.Rising {
				way = " (rising)"
			}
			at := fmt.Sprintf("cells.%d.crossings.%s.%d.", i, key, j)
			place := trimmed(x.X, 5, at+"x")
			if x.U.Known() {
				nodes = append(nodes, place, text(" ± "))
				place = trimmed(x.U, 2, at+"u")
			}
			nodes = append(append(nodes, withUnit(place, c.XUnit)...), text(way))
		}
		return nodes
	}
	words := append([]Node{strong("Zero crossings")}, say(", linear between neighbours, ± the standard uncertainty of the values (*u*_{num} of the simulation, *u*_{D} of the data) over the slope there: simulation ")...)
	words = append(words, side("sim", c.Crossings.Simulation)...)
	words = append(append(words, text(", reference ")), side("ref", c.Crossings.Reference)...)
	return []Node{paragraph(append(words, text("."))...)}
}

// sources prints the uncertainty budget.
func (b *builder) sources(i int, c study.Cell) []Node {
	figures := b.figuresOf(c, "budget")
	if len(c.Sources) == 0 {
		b.lacks("No source is recorded. Blank is not zero.")
		return figures
	}
	rows := make([]Node, len(c.Sources))
	for j, s := range c.Sources {
		at := func(name string) string { return fmt.Sprintf("cells.%d.sources.%d.%s", i, j, name) }
		name := text(s.Name)
		if s.Open {
			name = Node{Kind: Mark, Role: study.Guess, Text: s.Name}
		}
		rows[j] = row(cell(name), cell(text(s.Of)), cell(text(s.Text)), figureCell(digits(s.U, 2, at("u"))), figureCell(percent(s.Share, at("share"))), cell(text(s.Pattern)), cell(text(s.Origin)))
	}
	caption := say("Uncertainty sources, {}. *u* is standard, for curves its root mean square over the stations; the share is of the mean *u*_{val}^{2}.", text(unitOf(c.Unit)))
	nodes := []Node{heading("Uncertainty sources"), b.table("plain", caption, headRow("Source", "Of", "As entered", "#*u*", "#Share", "Pattern", "Origin"), rows...)}
	if sums := c.NumSums; sums != nil {
		used := "the root"
		if c.Choices.NumLinear {
			used = "the sum"
		}
		nodes = append(nodes, paragraph(say("*u*_{num} is {} by the root of the squares of its parts, {} by their sum, as where they depend on each other; {} is used.",
			digits(sums.Root, 3, fmt.Sprintf("cells.%d.num_sums.root", i)), digits(sums.Linear, 3, fmt.Sprintf("cells.%d.num_sums.linear", i)), text(used))...))
	}
	return append(nodes, figures...)
}

// requirement prints the requirement, its outcome, what would resolve it, and
// the choices that change a word.
func (b *builder) requirement(i int, c study.Cell) []Node {
	q := c.Requirement
	if q == nil {
		b.lacks("No requirement is recorded: adequacy is not judged.")
		return b.fragility(i, c)
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.requirement.%s", i, name) }
	words := append(b.requirementWords(i, c), text("."+late(c)))
	if !c.Scalar && q.At.Known() {
		words = append(words, say(" The deciding station is {} = ", given(c.XName))...)
		words = append(words, withUnit(trimmed(q.At, 4, at("at")), c.XUnit)...)
		words = append(words, text("."))
	}
	var needed []Node
	if q.UValNeeded.Known() {
		toward := "With *E* unchanged it would be shown at *u*_{val} ≤ "
		if q.Toward == study.NotMet {
			toward = "With *E* unchanged it would be refuted at *u*_{val} < "
		}
		needed = append(needed, say(toward)...)
		needed = append(needed, withUnit(digits(q.UValNeeded, 3, at("u_val_needed")), c.Unit)...)
		if q.UNumNeeded.Known() {
			needed = append(needed, say(", which *u*_{num} = ")...)
			needed = append(needed, withUnit(digits(q.UNumNeeded, 3, at("u_num_needed")), c.Unit)...)
			if q.UNumReduction.Known() {
				needed = append(needed, say(" (reduced by {})", percent(q.UNumReduction, at("u_num_reduction")))...)
			}
			needed = append(needed, text(" would give"))
		}
		needed = append(needed, text("."))
	}
	if len(needed) > 0 {
		words = append(append(words, text(" "), strong("To resolve: ")), needed...)
	}
	nodes := []Node{heading("Requirement"), paragraph(words...)}
	if len(q.Ways) > 0 {
		nodes = append(nodes, b.ways(i, c))
	}
	return append(nodes, b.fragility(i, c)...)
}

// fragility prints the alternatives that change the outcome word.
func (b *builder) fragility(i int, c study.Cell) []Node {
	tried := strings.Join(c.Tried, ", ")
	if len(c.Fragile) == 0 {
		words := "None of the alternatives that were tried changes an outcome word"
		if tried != "" {
			words += " (" + tried + ")"
		}
		return b.lacks(words + ".")
	}
	rows := make([]Node, len(c.Fragile))
	for j, f := range c.Fragile {
		at := cell()
		if f.At != nil {
			at = figureCell(trimmed(*f.At, 3, fmt.Sprintf("cells.%d.fragile.%d.at", i, j)))
		}
		rows[j] = row(cell(typeset(f.Change)...), cell(text(f.What)), cell(text(f.From)), cell(strong(f.Outcome)), cell(text(f.Detail)), at)
	}
	nodes := []Node{b.table("plain", say("Choices that change an outcome word."), headRow("If", "Word of", "Now", "Then", "Detail", "#From"), rows...)}
	if tried != "" {
		nodes = append(nodes, note(typeset("Tried: "+tried+".")...))
	}
	return nodes
}

// ways prints what alone would resolve a requirement.
func (b *builder) ways(i int, c study.Cell) Node {
	rows := make([]Node, len(c.Requirement.Ways))
	for j, w := range c.Requirement.Ways {
		at := func(name string) string { return fmt.Sprintf("cells.%d.requirement.ways.%d.%s", i, j, name) }
		var cost []Node
		if w.Cells != nil {
			cost = say("about {} cells, {} times the cost of the finest run", cellCount(*w.Cells, at("cells")), digits(*w.Cost, 2, at("cost")))
		}
		if w.Readings > 0 {
			cost = say("{} readings in all", count(w.Readings, at("readings")))
		}
		rows[j] = row(cell(text(w.Source)), cell(text(w.Of)), figureCell(digits(w.Now, 3, at("now"))), figureCell(digits(w.Needed, 3, at("needed"))), figureCell(percent(w.Reduction, at("reduction"))), cell(cost...))
	}
	return b.table("plain", say("Each of these alone would bring *u*_{val} to what is needed, *E* unchanged ({}, standard).", text(unitOf(c.Unit))),
		headRow("Source", "Of", "#Now", "#Needed", "#Less by", "Cost"), rows...)
}

// openPoints lists open points and notices of a cell.
func (b *builder) openPoints(c study.Cell) []Node {
	var items []Node
	told := map[string]bool{}
	for _, o := range c.Open {
		told[o.Text] = true
		kind := "open"
		if o.Blocks {
			kind = "open, withholds the statement"
		}
		course := ""
		if o.Course >= 0 && o.Course < len(courses) {
			course = ", " + strings.ToLower(courses[o.Course])
		}
		items = append(items, item(append(say("{}{}: ", strong(kind), text(course)), typeset(sentenceEnd(o.Text))...)...))
	}
	for _, n := range c.Notices {
		if !told[n.Text] {
			items = append(items, noticeItem(n))
		}
	}
	if len(items) == 0 {
		return b.lacks("There are no open points and no notices.")
	}
	return []Node{heading("Open points and notices"), list(items...)}
}

func noticeItem(n notice.Notice) Node {
	return item(append(say("{} {}: {}", strong(string(n.Severity)), code(n.Code), text(n.Place())), typeset(n.Text)...)...)
}

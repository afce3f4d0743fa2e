package message

import (
	"cmp"
	"strconv"
	"strings"

	"weirmark/core/adequacy"
	"weirmark/core/chart"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
	"weirmark/core/study"
)

// courses lays out the five courses of evidence of a cell. Under the veil the
// comparison and what follows from it are left out.
func courses(c *study.Cell, figures []CellFigure, veiled bool) []Course {
	if veiled {
		c = covered(c)
	}
	list := []Course{
		{Question: "Has each run settled?", Answer: settledAnswer(c), Numbers: settledNumbers(c), Tables: settledTables(c)},
		{Question: "Is the grid fine enough for this quantity?", Answer: gridAnswer(c), Numbers: gridNumbers(c), Tables: gridTables(c)},
		{Question: "Is it the same thing?", Answer: sameAnswer(c), Tables: append(sameTables(c), treatmentTables(c)...)},
		{Question: "Do they agree?", Answer: agreeAnswer(c), Numbers: agreeNumbers(c), Tables: agreeTables(c)},
		{Question: "What can be said?", Answer: sayAnswer(c), Numbers: sayNumbers(c), Tables: sayTables(c)},
	}
	list[2].Tables = append(list[2].Tables, evidenceTables(c)...)
	list[3].Tables = append(list[3].Tables, furtherTables(c)...)
	for _, f := range figures {
		at := courseOfFigure(f.Figure)
		list[at].Figures = append(list[at].Figures, f)
	}
	if veiled {
		for _, i := range []int{3, 4} {
			list[i] = Course{Question: list[i].Question, Answer: "Covered until a requirement is recorded or the comparison is asked for."}
		}
	}
	for i := range list {
		k := &list[i]
		k.State = c.Courses[i]
		k.Doubts = []study.Open{}
		for _, o := range c.Open {
			if o.Course == i {
				k.Doubts = append(k.Doubts, o)
			}
		}
		k.Notes = notes(c, i, k.Doubts)
		if k.Numbers == nil {
			k.Numbers = []Headline{}
		}
		if k.Figures == nil {
			k.Figures = []CellFigure{}
		}
		if k.Tables == nil {
			k.Tables = []Table{}
		}
	}
	return list
}

// courseOfFigure tells the course of a figure by the end of its name.
func courseOfFigure(f chart.Figure) int {
	switch _, kind, _ := strings.Cut(f.ID, "-"); kind {
	case "monitors", "balances":
		return 0
	case "grids":
		return 1
	case "budget":
		return 2
	}
	return 3
}

// covered leaves out what an error that acts on both sides leaves in E: of a
// percentage of the reading that is this percentage of E.
func covered(c *study.Cell) *study.Cell {
	less := *c
	less.Shared, less.Notices = nil, nil
	for _, n := range c.Notices {
		if n.Code != "source-shared" {
			less.Notices = append(less.Notices, n)
		}
	}
	return &less
}

// notes are the notices of a course that are not open points already.
func notes(c *study.Cell, course int, doubts []study.Open) []string {
	told := map[string]bool{}
	for _, o := range doubts {
		told[o.Text] = true
	}
	list := []string{}
	for _, n := range c.Notices {
		if courseOf(n) != course || told[n.Text] {
			continue
		}
		told[n.Text] = true
		list = append(list, n.Error())
	}
	return list
}

// courseOf tells a notice's course from the stage that its code names.
func courseOf(n notice.Notice) int {
	stage, _, _ := strings.Cut(n.Code, "-")
	switch stage {
	case "monitor", "balance", "sampling", "iteration", "residual":
		return 0
	case "grid", "dimension", "precision", "num":
		return 1
	case "covariance", "joint", "crossing":
		return 3
	case "requirement":
		return 4
	}
	if n.Code == "u-num-missing" || n.Code == "u-num-column" {
		return 1
	}
	return 2
}

func capitalised(text string) string { return strings.ToUpper(text[:1]) + text[1:] }

func gridAnswer(c *study.Cell) string { return familyAnswer(c) + roundOffWords(c) }

// roundOffWords says what rounding alone changes.
func roundOffWords(c *study.Cell) string {
	r := c.RoundOff
	if r == nil {
		return ""
	}
	words := " Precision or platform alone changes it by " + text(r.RMS, 2) + c.UnitSuffix()
	if r.Doubt {
		words += ", too much to tell the two finest grids apart"
	}
	return words + "."
}

func familyAnswer(c *study.Cell) string {
	if c.Grids == nil && c.Borrowed != nil {
		return borrowedAnswer(c)
	}
	g := c.Grids
	if g == nil {
		for _, s := range c.Sources {
			if s.Of == study.OfNumerical && !strings.HasPrefix(s.Origin, "computed") {
				return "No grid family; u_num was entered (" + s.Origin + ")."
			}
		}
		return "One grid, or none: the grid uncertainty is unknown."
	}
	if g.Along {
		all := g.Monotone + g.NonMonotone
		if !g.R32.Known() && g.UNum.Known() {
			return "Two grids: whether the curve converges cannot be told; rms u_num " + text(g.UNum, 3) + c.UnitSuffix() + " by factor 3 and the formal order " + text(g.Formal, 2) + "."
		}
		return strconv.Itoa(g.Monotone) + " of " + quantity.Counted(all, "station") + " converge monotonically; common order " + text(g.Order, 3) + ", rms u_num " + text(g.UNum, 3) + c.UnitSuffix() + "."
	}
	switch g.Class {
	case string(refinement.Monotone):
		order := "no order is given"
		if g.Order.Known() {
			order = "observed order " + text(g.Order, 3) + " against " + text(g.Formal, 2)
		}
		return "Monotone over the three finest of " + quantity.Counted(len(g.Points), "grid") + "; " + order + "; grid uncertainty " + quantity.Percent(float64(g.GCI)) + " % at 95 %" + ruleWords(c) + "."
	case string(refinement.Oscillatory):
		if g.U.Known() {
			return "The three finest grids oscillate; no order is given; grid uncertainty " + text(g.U, 2) + c.UnitSuffix() + " at 95 %" + ruleWords(c) + "."
		}
		return "The three finest grids oscillate; a bound is taken from their range, no order is given."
	case string(refinement.Insufficient):
		if g.U.Known() {
			return "Two grids: whether the value converges cannot be told; grid uncertainty " + text(g.U, 2) + c.UnitSuffix() + " at 95 % by factor 3 and the formal order " + text(g.Formal, 2) + "."
		}
		return "Too few usable grids: the order cannot be observed."
	}
	return "The three finest grids are " + g.Class + ": there is no grid uncertainty."
}

// ruleWords names a rule other than that of the three finest grids.
func ruleWords(c *study.Cell) string {
	if c.Choices.Rule == "" {
		return ""
	}
	return " (" + c.Choices.RuleName() + ")"
}

func gridNumbers(c *study.Cell) []Headline {
	g := c.Grids
	if g == nil {
		return nil
	}
	var list []Headline
	add := func(n study.Number, digits int, name string) {
		if n.Known() {
			list = append(list, Headline{text(n, digits), name})
		}
	}
	if g.Along {
		add(g.Order, 3, "common order")
		if g.UNum.Known() {
			list = append(list, Headline{text(g.UNum, 3) + c.UnitSuffix(), "u_num, root mean square"})
		}
		return list
	}
	add(g.Order, 3, "observed order")
	if g.U.Known() {
		if g.Extrapolated.Known() {
			list = append(list, Headline{quantity.Like(float64(g.Extrapolated), float64(g.U), 2) + c.UnitSuffix(), "extrapolated " + cmp.Or(c.Symbol, c.Quantity)})
		}
		list = append(list, Headline{"± " + quantity.Text(float64(g.U), 2) + c.UnitSuffix(), "grid uncertainty, 95 %"})
	} else if g.UNum.Known() {
		list = append(list, Headline{quantity.Text(float64(g.UNum), 2) + c.UnitSuffix(), "u_num, standard"})
	}
	return list
}

func gridTables(c *study.Cell) []Table {
	return append(append(familyTables(c), stepTables(c)...), sumTables(c)...)
}

// sumTables shows u_num by both sums of its parts, and the round-off floor.
func sumTables(c *study.Cell) []Table {
	var tables []Table
	if s := c.NumSums; s != nil && (s.Apart || c.Choices.NumLinear) {
		used := [2]string{"yes", ""}
		if c.Choices.NumLinear {
			used = [2]string{"", "yes"}
		}
		tables = append(tables, Table{Title: "Parts of u_num together", Head: []string{"", "u_num", "used"}, Rows: [][]string{
			{"root of the squares: independent", text(s.Root, 3) + c.UnitSuffix(), used[0]}, {"sum: dependent", text(s.Linear, 3) + c.UnitSuffix(), used[1]}}})
	}
	if r := c.RoundOff; r != nil {
		tables = append(tables, Table{Title: "Round-off floor", Head: []string{"grid", "second run", "values", "root mean square", "most"}, Rows: [][]string{
			{cmp.Or(r.Grid, "–"), r.File, strconv.Itoa(r.N), text(r.RMS, 2) + c.UnitSuffix(), text(r.Max, 2) + c.UnitSuffix()}}})
	}
	return tables
}

func familyTables(c *study.Cell) []Table {
	g := c.Grids
	if g == nil {
		return nil
	}
	heights := false
	for _, p := range g.Points {
		heights = heights || p.YPlus > 0
	}
	t := Table{Title: "Grids, coarse to fine", Head: []string{"grid", "cells", "h / h(finest)", cmp.Or(c.Symbol, "value"), "used"}, Rows: [][]string{}}
	if heights {
		t.Head = append(t.Head, "y+")
	}
	for _, p := range g.Points {
		used := ""
		if p.Used {
			used = "yes"
		}
		t.Rows = append(t.Rows, []string{cmp.Or(p.Name, "–"), strconv.FormatFloat(float64(p.Cells), 'f', 0, 64), text(p.H, 4), quantity.Text(float64(p.Value), 6), used})
		if last := len(t.Rows) - 1; heights {
			height := "–"
			if p.YPlus > 0 {
				height = text(p.YPlus, 3)
			}
			t.Rows[last] = append(t.Rows[last], height)
		}
	}
	return append([]Table{t}, gridTablesBeside(c)...)
}

func sameAnswer(c *study.Cell) string {
	if c.Summary == nil {
		return "Not compared yet: " + firstBlocking(c)
	}
	unit := "in " + c.Unit
	switch c.Unit {
	case "":
		unit = "without a stated unit"
	case "1":
		unit = "pure numbers"
	}
	answer := "Both sides are " + unit + "; " + stationsOf(c) + " compared against " + cmp.Or(c.Reference, "the reference")
	if c.Kind != "" {
		answer += " (" + c.Kind + ")"
	}
	return answer + "."
}

func firstBlocking(c *study.Cell) string {
	for _, o := range c.Open {
		if o.Blocks {
			return o.Missing + " is open."
		}
	}
	return "nothing is common to both sides."
}

func agreeAnswer(c *study.Cell) string {
	s := c.Summary
	switch {
	case s == nil:
		return "Nothing is compared yet."
	case s.Tested == 0:
		return "Differences only: u_val is not available."
	case c.Scalar && c.Derived != nil:
		return "The " + c.Derived.Kind + " was taken from the curves; E is " + text(c.Stations[0].Ratio, 2) + " u_val: " + c.Stations[0].Reading + "."
	case c.Scalar:
		return "E is " + text(c.Stations[0].Ratio, 2) + " u_val: " + c.Stations[0].Reading + "."
	}
	answer := "|E| exceeds " + quantity.Typed(c.Choices.K) + " u_val at " + strconv.Itoa(s.Tested-s.WithinKUVal) + " of " + quantity.Counted(s.Tested, "station") + " (" + text(s.BeyondChance, 2) + " expected by chance" + chanceWords(c.Joint) + ")"
	if j := c.Joint; j != nil {
		answer += "; together the statistic " + exceedsWord(j.Exceeds) + " its 95 % point"
		if j.Remainder.Known() {
			answer += ", and without a common offset it " + exceedsWord(j.RemainderExceeds) + " it"
		}
	}
	return answer + "."
}

// chanceWords is the probability of at least the found number, where it was
// sampled.
func chanceWords(j *study.Joint) string {
	if j == nil || !j.AtLeast.Known() {
		return ""
	}
	return "; at least so many with probability " + text(j.AtLeast, 2)
}

func exceedsWord(yes bool) string {
	if yes {
		return "exceeds"
	}
	return "does not exceed"
}

func agreeNumbers(c *study.Cell) []Headline {
	s := c.Summary
	if s == nil {
		return nil
	}
	if c.Scalar {
		x := c.Stations[0]
		list := []Headline{{quantity.Signed(float64(x.E), 3) + c.UnitSuffix(), "E = S − D"}}
		if x.UVal.Known() {
			list = append(list, Headline{text(x.UVal, 3) + c.UnitSuffix(), "u_val"}, Headline{text(x.Ratio, 2), "|E| / u_val"})
		}
		return list
	}
	list := []Headline{{quantity.Signed(float64(s.Bias), 3) + c.UnitSuffix(), "mean E"}, {text(s.RMSE, 3) + c.UnitSuffix(), "root mean square E"}}
	if j := c.Joint; j != nil {
		list = append(list, Headline{text(j.Statistic, 3), "joint statistic, 95 % point " + text(j.Reference, 3)})
	}
	return list
}

func agreeTables(c *study.Cell) []Table {
	if c.Summary == nil {
		return nil
	}
	name := cmp.Or(c.XName, "x")
	if c.XUnit != "" && c.XUnit != "1" {
		name += " [" + c.XUnit + "]"
	}
	t := Table{Title: "Stations", Head: []string{name, "S", "D", "E", "u_D", "u_num", "u_input", "u_val", "|E|/u_val", "whitened", "shares of u_val²", "line"}, Rows: [][]string{}}
	if len(c.Stations) > 0 && c.Stations[0].Percent != nil {
		t.Head = append(t.Head, "E in % of |D|")
	}
	if len(c.Stations) > 0 && c.Stations[0].Weight != nil {
		t.Head = append(t.Head, "weight")
	}
	for i, s := range c.Stations {
		if i == maxTableRows {
			t.Title += ", the first " + strconv.Itoa(maxTableRows) + " (all are in the exported table)"
			break
		}
		row := []string{written(s.X), text(s.S, 5), written(s.D), quantity.Signed(float64(s.E), 3), text(s.UD, 3), text(s.UNum, 3), text(s.UInput, 3), text(s.UVal, 3), text(s.Ratio, 3), quantity.Signed(float64(s.Whitened), 3), stationShares(s), strconv.Itoa(s.Line)}
		if s.Percent != nil {
			row = append(row, quantity.Signed(float64(*s.Percent), 3))
		}
		if s.Weight != nil {
			row = append(row, text(*s.Weight, 3))
		}
		t.Rows = append(t.Rows, row)
	}
	tables := []Table{t}
	if j := c.Joint; j != nil && !c.Scalar {
		tables = append(tables, jointTable(j))
	}
	tables = append(tables, orderingTables(c)...)
	tables = append(tables, scoreTables(c)...)
	tables = append(tables, derivedTables(c)...)
	tables = append(tables, curveTables(c)...)
	if x := c.Crossings; len(x.Simulation)+len(x.Reference) > 0 {
		tables = append(tables, Table{Title: "Changes of sign", Head: []string{"side", name, "u", "direction"}, Rows: append(crossingRows("simulation", x.Simulation), crossingRows("reference", x.Reference)...)})
	}
	return tables
}

// stationShares says what each side makes of u_val² at a station.
func stationShares(s study.Station) string {
	if !s.UVal.Known() || s.UVal == 0 {
		return "–"
	}
	list := []string{}
	for _, part := range []struct {
		name string
		u    study.Number
	}{{"D", s.UD}, {"num", s.UNum}, {"interp", s.UInterp}, {"input", s.UInput}} {
		if part.u.Known() {
			share := float64(part.u) / float64(s.UVal)
			list = append(list, part.name+" "+quantity.Percent(share*share)+" %")
		}
	}
	return strings.Join(list, ", ")
}

// jointTable is the statistic as declared, under other patterns, and in parts.
func jointTable(j *study.Joint) Table {
	t := Table{Title: "All stations together", Head: []string{"", "statistic", "on", "95 % point"}, Rows: [][]string{
		{j.Pattern + " correlation, as declared", text(j.Statistic, 4), strconv.Itoa(j.N), text(j.Reference, 3)},
		{"every source independent", text(j.Independent, 4), strconv.Itoa(j.N), text(j.Reference, 3)},
		{"u_num shared by all stations", text(j.NumShared, 4), strconv.Itoa(j.N), text(j.Reference, 3)},
		{"offset " + quantity.SignedLike(float64(j.Offset), float64(j.UOffset), 3) + " ± " + text(j.UOffset, 3), text(j.OffsetPart, 3), "1", "3.84"},
		{"remainder without the offset", text(j.Remainder, 4), strconv.Itoa(j.RemainderN), text(j.RemainderReference, 3)},
	}}
	if j.Scale.Known() {
		t.Rows = append(t.Rows,
			[]string{"scale beside an offset " + quantity.SignedLike(float64(j.Scale), float64(j.UScale), 2) + " ± " + text(j.UScale, 2), text(j.ScalePart, 3), "1", "3.84"},
			[]string{"shape, without offset and scale", text(j.ShapePart, 4), strconv.Itoa(j.ShapeN), ""})
	}
	for _, w := range j.Without {
		t.Rows = append(t.Rows, []string{"without " + w.Region, text(w.Statistic, 4), strconv.Itoa(w.N), text(w.Reference, 3)})
	}
	if left := j.Station; left != nil {
		t.Rows = append(t.Rows, []string{"without the station at " + left.Region + ", the one that changes it most (leaving one out turns the conclusion at " + strconv.Itoa(j.Turning) + ")", text(left.Statistic, 4), strconv.Itoa(left.N), text(left.Reference, 3)})
	}
	if j.Worst.Known() {
		t.Rows = append(t.Rows, []string{"largest whitened residual " + quantity.Signed(float64(j.Worst), 3) + ", at " + text(j.WorstAt, 4), "", "", ""})
	}
	if j.Condition.Known() {
		t.Rows = append(t.Rows, []string{"condition of the matrix behind it " + text(j.Condition, 3) + eigenvalueWords(j), "", "", ""})
	}
	for _, turn := range j.Turns {
		t.Rows = append(t.Rows, []string{"the conclusion turns where the correlation of " + turn.Source + " is " + text(turn.Rho, 3), "", "", ""})
	}
	return t
}

// eigenvalueWords lists the eigenvalues of a covariance that was treated whole.
func eigenvalueWords(j *study.Joint) string {
	if len(j.Eigenvalues) == 0 {
		return ""
	}
	list := make([]string, len(j.Eigenvalues))
	for i, v := range j.Eigenvalues {
		list[i] = text(v, 3)
	}
	return "; eigenvalues of V on the unit diagonal " + strings.Join(list, ", ")
}

// orderingTables lists the six orders of |E|, U_V and the requirement, and the
// change from another case.
func orderingTables(c *study.Cell) []Table {
	var tables []Table
	if m := c.Marine; m != nil {
		t := Table{Title: "|E|, U_V = " + text(m.K, 3) + " u_val and the requirement U_reqd, all at 95 %; E = S − D", Head: []string{"order", "stations", "what it says"}, Rows: [][]string{}}
		if m.E.Known() {
			t.Title += ": E " + quantity.Signed(float64(m.E), 3) + ", U_V " + text(m.UV, 3) + ", U_reqd " + text(m.Required, 3) + c.UnitSuffix()
		}
		for _, o := range m.Orderings {
			t.Rows = append(t.Rows, []string{o.Order, strconv.Itoa(o.N), o.Words})
		}
		tables = append(tables, t)
	}
	if r := c.Trend; r != nil {
		common := "none"
		if len(r.Common) > 0 {
			common = strings.Join(r.Common, ", ")
		}
		u := float64(r.U)
		t := Table{Title: "Change from case " + r.From + " (this case less that)", Head: []string{"", ""}, Rows: [][]string{
			{"ΔS", quantity.Signed(float64(r.S), 3) + c.UnitSuffix()}, {"ΔD", quantity.Signed(float64(r.D), 3) + c.UnitSuffix()}, {"ΔS − ΔD", quantity.Signed(float64(r.E), 3) + c.UnitSuffix()},
			{"its u", text(r.U, 3)}, {"its u, if no source were common to both cases", text(r.Apart, 3)}, {"one error in both cases", common}}}
		if r.Lo.Known() {
			t.Rows = append(t.Rows, []string{"± " + quantity.Typed(c.Choices.K) + " u", quantity.SignedLike(float64(r.Lo), u, 2) + " to " + quantity.SignedLike(float64(r.Hi), u, 2) + c.UnitSuffix()}, []string{"reading", r.Reading})
		}
		tables = append(tables, t)
	}
	return tables
}

// scoreTables lists the measures with their scales and criteria, and the
// regions.
func scoreTables(c *study.Cell) []Table {
	var tables []Table
	if len(c.Scores) > 0 {
		t := Table{Title: "Measures", Head: []string{"measure", "value", "scale", "criterion", "limits", "met", "scope and source"}, Rows: [][]string{}}
		for _, s := range c.Scores {
			value := text(s.Value, 3)
			if s.Word != "" {
				value += " (" + s.Word + ")"
			}
			if len(s.Criteria) == 0 {
				t.Rows = append(t.Rows, []string{s.Name, value, s.Scale, "", "", "", ""})
			}
			for i, k := range s.Criteria {
				row := []string{"", "", "", k.Name, text(k.Low, 3) + " to " + text(k.High, 3), map[bool]string{true: "yes", false: "no"}[k.Met], k.Scope + "; " + k.Source}
				if i == 0 {
					row[0], row[1], row[2] = s.Name, value, s.Scale
				}
				t.Rows = append(t.Rows, row)
			}
		}
		tables = append(tables, t)
	}
	if len(c.Measured) > 0 {
		t := Table{Title: "Measures with their uncertainty, by sampling with the covariance of u_val", Head: []string{"measure", "value", "u", "the stated errors alone make", "95 % of them stay below", "the value lies"}, Rows: [][]string{}}
		for _, m := range c.Measured {
			t.Rows = append(t.Rows, []string{m.Name, text(m.Value, 3), text(m.U, 2), text(m.Floor, 3), text(m.FloorHi, 3), map[bool]string{true: "above", false: "not above"}[m.Above]})
		}
		tables = append(tables, t)
	}
	if len(c.Regions) > 0 {
		t := Table{Title: "Regions; weighted by n they make the whole where they do not overlap", Head: []string{"region", "from", "to", "D", "n", "mean E", "RMSE", "hit rate", "beyond k u_val"}, Rows: [][]string{}}
		for _, r := range c.Regions {
			t.Rows = append(t.Rows, []string{r.Name, text(r.From, 4), text(r.To, 4), r.Sign, strconv.Itoa(r.N), quantity.Signed(float64(r.Bias), 3), text(r.RMSE, 3), text(r.HitRate, 2), strconv.Itoa(r.Beyond)})
		}
		tables = append(tables, t)
	}
	return tables
}

// maxTableRows is the number of stations above which the page shows the first
// of them only.
const maxTableRows = 200

func crossingRows(side string, list []study.Crossing) [][]string {
	rows := [][]string{}
	for _, x := range list {
		direction := "falling"
		if x.Rising {
			direction = "rising"
		}
		rows = append(rows, []string{side, text(x.X, 4), text(x.U, 2), direction})
	}
	return rows
}

// written prints a value as a file states it.
func written(w study.Written) string {
	if v := quantity.Number(w); !v.Known() {
		return "–"
	}
	return strings.ReplaceAll(strconv.FormatFloat(quantity.Round(float64(w), 10), 'g', -1, 64), "-", "−")
}

func sayAnswer(c *study.Cell) string {
	r := c.Requirement
	switch {
	case c.Withheld:
		return "No statement: " + firstBlocking(c)
	case r == nil:
		return "No accuracy requirement is recorded: adequacy is not judged."
	case r.Outcome == "":
		return "The requirement cannot be judged without u_val."
	}
	answer := "The requirement is " + r.Outcome + " at k = " + quantity.Typed(c.Choices.K) + "."
	if g := c.Grids; g != nil && g.NextCells.Known() {
		answer += " With E unchanged, about " + cellWords(float64(g.NextCells)) + " cells would resolve it, at " + text(g.NextCost, 2) + " times the cost of the finest run."
	}
	if len(c.Fragile) > 0 {
		answer += " " + quantity.Counted(len(c.Fragile), "other choice") + " would change a word."
	}
	return answer
}

// cellWords prints a number of cells, in millions from there on.
func cellWords(n float64) string {
	if n < 1e6 {
		return quantity.Text(n, 3)
	}
	return quantity.Text(n/1e6, 3) + " million"
}

func sayNumbers(c *study.Cell) []Headline {
	r := c.Requirement
	if c.Withheld || c.Summary == nil {
		return nil
	}
	var list []Headline
	if c.Scalar {
		list = append(list, Headline{study.IntervalText(c, c.Stations[0]), "E ± " + quantity.Typed(c.Choices.K) + " u_val"})
	}
	if r != nil && r.Outcome != "" {
		limit := "± " + text(r.Limit, 3) + c.UnitSuffix()
		if r.Percent.Known() {
			limit = "± " + quantity.Typed(float64(r.Percent)) + " %"
		}
		list = append(list, Headline{limit, "requirement"})
		if r.UValNeeded.Known() {
			list = append(list, Headline{text(r.UValNeeded, 3) + c.UnitSuffix(), "u_val that would resolve it"})
		}
	}
	return list
}

func sayTables(c *study.Cell) []Table {
	var tables []Table
	if len(c.Recorded) > 0 {
		t := Table{Title: "Order of recording", Head: []string{"", "log entry", "time"}, Rows: [][]string{}}
		for _, r := range c.Recorded {
			t.Rows = append(t.Rows, []string{r.What, strconv.Itoa(r.In), r.At})
		}
		tables = append(tables, t)
	}
	if a := c.Application; a != nil && a.Place != nil {
		tables = append(tables, placeTable(a.Place))
	}
	if len(c.Evidence) > 0 {
		t := Table{Title: "Evidence expected for the recorded use (common practice, no source)", Head: []string{"evidence", "expected from", ""}, Rows: [][]string{}}
		for _, e := range c.Evidence {
			t.Rows = append(t.Rows, []string{e.What, e.From, map[bool]string{true: "given", false: "missing"}[e.Given]})
		}
		tables = append(tables, t)
	}
	if r := c.Requirement; r != nil && len(r.Ways) > 0 {
		tables = append(tables, waysTable(c, r))
	}
	if len(c.Fragile) > 0 {
		t := Table{Title: "Choices that change a word, of " + strconv.Itoa(len(c.Tried)) + " that were tried", Head: []string{"choice", "of", "from", "to", "", "turns at"}, Rows: [][]string{}}
		for _, f := range c.Fragile {
			at := ""
			if f.At != nil {
				at = text(*f.At, 3)
			}
			t.Rows = append(t.Rows, []string{f.Change, f.What, f.From, f.Outcome, f.Detail, at})
		}
		tables = append(tables, t)
	}
	return tables
}

// placeTable sets the point of application among the comparisons.
func placeTable(p *study.AppliedPlace) Table {
	t := Table{Title: "The application point lies " + map[string]string{adequacy.Inside: "inside", adequacy.Edge: "at the edge of", adequacy.Outside: "outside"}[p.State] + " the compared conditions", Head: append([]string{""}, p.Names...), Rows: [][]string{}}
	line := func(name string, at []study.Number) {
		row := []string{name}
		for j, v := range at {
			unit := ""
			if u := p.Units[j]; u != "" && u != "1" {
				unit = " " + u
			}
			row = append(row, quantity.Typed(float64(v))+unit)
		}
		t.Rows = append(t.Rows, row)
	}
	line("application point", p.At)
	for _, q := range p.Points {
		line(q.Case, q.At)
	}
	for _, l := range []Headline{{text(p.Beyond, 2), "from their hull, in parts of their span"}, {text(p.Distance, 2), "from the nearest, " + p.Nearest}} {
		t.Rows = append(t.Rows, append([]string{l.Name, l.Value}, make([]string, len(p.Names)-1)...))
	}
	return t
}

// waysTable lists what alone would resolve a requirement.
func waysTable(c *study.Cell, r *study.Judgement) Table {
	outcome := "show it"
	if r.Toward == study.NotMet {
		outcome = "refute it"
	}
	t := Table{Title: "Each alone would " + outcome + ", E unchanged (standard" + c.UnitSuffix() + ")", Head: []string{"source", "of", "now", "needed", "less by", "cost"}, Rows: [][]string{}}
	for _, w := range r.Ways {
		cost := ""
		switch {
		case w.Cells != nil:
			cost = "about " + cellWords(float64(*w.Cells)) + " cells, " + text(*w.Cost, 2) + " times the finest run"
		case w.Readings > 0:
			cost = quantity.Counted(w.Readings, "reading") + " in all"
		}
		t.Rows = append(t.Rows, []string{w.Source, w.Of, text(w.Now, 3), text(w.Needed, 3), quantity.Percent(float64(w.Reduction)) + " %", cost})
	}
	return t
}

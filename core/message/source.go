package message

import (
	"slices"
	"strconv"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
	"weirmark/core/uncertainty"
)

// commonScale is the pattern of one unknown factor on all readings, as the
// curves beside a source are drawn.
const commonScale = "scale"

// sourceCards are the lines of the budget: first those that a person entered,
// each with its entries, then those that were computed.
func sourceCards(q *study.Question, c *study.Cell) []SourceCard {
	cards := []SourceCard{}
	used := map[string]study.SourceLine{}
	for _, l := range c.Sources {
		used[l.Of+l.Name] = l
	}
	for i, s := range q.Sources {
		card := SourceCard{Target: study.Target{Kind: "source", ID: questionID(q), Field: strconv.Itoa(i)}, Of: s.Of, Pattern: s.Pattern, Text: s.Name}
		card.Entries, card.Leads = sourceEntries(q, i, s)
		if l, ok := used[s.Of+s.Name]; ok {
			card.Text, card.Share, card.Pattern = l.Name+" · "+l.Text+" · "+patternWords(l.Pattern)+" · "+l.Origin, shareWords(l.Share), l.Pattern
			delete(used, s.Of+s.Name)
		}
		if card.Pattern == study.Common && s.Basis == study.OfReading {
			card.Pattern = commonScale
		}
		cards = append(cards, card)
	}
	for _, l := range c.Sources {
		if _, left := used[l.Of+l.Name]; left {
			cards = append(cards, SourceCard{Of: l.Of, Pattern: l.Pattern, Share: shareWords(l.Share), Entries: []Entry{}, Leads: []string{},
				Text: l.Name + " · " + l.Text + " · " + patternWords(l.Pattern) + " · " + l.Origin})
		}
	}
	return cards
}

func shareWords(n study.Number) string {
	if !n.Known() {
		return ""
	}
	if n < 0.001 {
		return "below 0.1 % of u_val²"
	}
	return quantity.Text(float64(n)*100, 2) + " % of u_val²"
}

func patternWords(pattern string) string {
	switch pattern {
	case study.Common:
		return "the same error at all stations"
	case study.Grouped:
		return "the same error within groups of stations"
	case study.Length:
		return "correlated over a length"
	case study.Members:
		return "with the covariance of the runs"
	case study.Interval:
		return "in neither u_val nor the joint statistic"
	}
	return "independent between stations"
}

// forms are the answers to how a source is distributed.
func forms() []Option {
	return []Option{{"", "as the coverage says"}, {string(uncertainty.Normal), "normal"}, {string(uncertainty.Rectangular), "rectangular"}, {string(uncertainty.Triangular), "triangular"},
		{string(uncertainty.ArcSine), "arc sine"}, {string(uncertainty.Student), "Student’s t"}, {study.Interval, "only within these limits"}}
}

// sourceLine collects the entries of a source with the words before each.
type sourceLine struct {
	target  study.Target
	entries []Entry
	leads   []string
}

func (l *sourceLine) add(lead, field, label, value string, options []Option, hint string) {
	t := l.target
	t.Field += "." + field
	l.entries = append(l.entries, Entry{Target: t, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint})
	l.leads = append(l.leads, lead)
}

// sourceEntries are the entries of a source in the order of a sentence, and the
// words before each of them.
func sourceEntries(q *study.Question, i int, s study.Source) ([]Entry, []string) {
	l := &sourceLine{target: study.Target{Kind: "source", ID: questionID(q), Field: strconv.Itoa(i)}}
	none := []Option{}
	l.add("", "name", "source", s.Name, none, "")
	l.add(", of ", "of", "of", s.Of, []Option{{study.OfData, "the data"}, {study.OfInput, "the inputs"}, {study.OfNumerical, "the numerics"}}, "")
	if s.Column != "" {
		l.add(": column ", "column", "column with its values", s.Column, none, "")
	} else {
		l.add(": ", "value", "value", s.ValueText(), none, "a half-width, or unknown")
		if s.Of == study.OfData {
			l.add(", above the data ", "upper", "half-width above", study.OptionalText(s.Upper), none, "empty: the same on both sides")
		}
		l.basis(s)
	}
	if s.Of == study.OfInput {
		l.input(s)
	}
	if q.Derive != nil {
		l.add(", ", "of_scalar", "value of", map[bool]string{true: "yes", false: "no"}[s.OfScalar], []Option{{"no", "of the curve, carried to the scalar"}, {"yes", "of the scalar itself"}}, "where one side is a value, inputs and numerics are of the scalar")
	}
	l.coverage(s)
	if s.Input == "" {
		l.pattern(s)
	}
	l.shared(s)
	l.add("; from ", "origin", "where it comes from", s.Origin, none, "")
	for i := range l.entries {
		e := &l.entries[i]
		_, field, _ := strings.Cut(e.Target.Field, ".")
		e.Aside = !e.Open && e.Value == "" && !slices.Contains([]string{"name", "value", "coverage", "origin"}, field)
	}
	return l.entries, l.leads
}

// basis is what the value is a number of.
func (l *sourceLine) basis(s study.Source) {
	options := []Option{{study.Absolute, "in the unit of the data"}, {study.OfReading, "% of reading"}, {study.OfFullScale, "% of full scale"}, {study.OfCounts, "counts"}, {study.OfPosition, "of the place, times the slope of D"}}
	if s.Input != "" {
		options = []Option{{study.Absolute, "in the unit of the input"}, {study.OfReading, "% of its value"}}
	}
	l.add(" ", "basis", "basis", s.Basis, options, "")
	switch s.Basis {
	case study.OfFullScale:
		l.add(" ", "full_scale", "full scale, in the unit of the data", quantity.Typed(s.FullScale), []Option{}, "")
	case study.OfCounts:
		l.add(" of ", "per_count", "size of one count, in the unit of the data", quantity.Typed(s.PerCount), []Option{}, "")
	}
}

// input is which input a source is an uncertainty of, and what that does.
func (l *sourceLine) input(s study.Source) {
	l.add(", of the input ", "input", "input", s.Input, []Option{}, "e.g. U; empty: stated for the quantity itself")
	if s.Input == "" {
		return
	}
	l.add(" = ", "nominal", "value of the input", quantity.Typed(s.Nominal), []Option{}, "in the compared run")
	l.add(" ", "unit", "unit of the input", s.Unit, []Option{}, "e.g. m/s")
	l.add(", one unit of which changes the simulation by ", "sensitivity", "change of the simulation", study.OptionalText(s.Sensitivity), []Option{}, "empty: from the runs with it changed")
}

// coverage is what the half-width means. Its being open keeps the statement
// back.
func (l *sourceLine) coverage(s study.Source) {
	if s.Form != study.Interval {
		l.add(", ", "coverage", "coverage", s.Coverage.Value, coverages(), "")
		e := &l.entries[len(l.entries)-1]
		e.By, e.Open = s.Coverage.By, s.Coverage.Open() || s.Coverage.Value == ""
	}
	l.add(", ", "form", "distribution", s.Form, forms(), "")
	random := map[bool]string{true: "yes", false: "no"}[s.Random]
	l.add(", ", "random", "random", random, []Option{{"no", "systematic"}, {"yes", "random"}}, "")
	l.add(", ", "type", "type of evaluation", s.Type, []Option{{"", "type not stated"}, {study.TypeA, "type A"}, {study.TypeB, "type B"}}, "A: from readings")
	if s.Random || s.Type == study.TypeA || s.Form == string(uncertainty.Student) {
		l.add(" with degrees of freedom ", "degrees", "degrees of freedom", quantity.Typed(s.Degrees), []Option{}, "0: taken as known")
	}
}

// pattern is how the errors of the stations belong together.
func (l *sourceLine) pattern(s study.Source) {
	l.add(", ", "pattern", "between stations", s.Pattern, []Option{{study.Independent, "independent between stations"}, {study.Common, "the same at all stations"}, {study.Grouped, "the same within groups"}, {study.Length, "correlated over a length"}}, "")
	switch s.Pattern {
	case study.Grouped:
		l.add(" of column ", "group", "column with group numbers", s.Group, []Option{}, "")
	case study.Length:
		l.add(" of ", "length", "correlation length, in the unit of the stations", quantity.Typed(s.Length), []Option{}, "")
	}
}

// shared is whether the same error acts on the other side.
func (l *sourceLine) shared(s study.Source) {
	shared := map[bool]string{true: "yes", false: "no"}[s.Shared]
	switch {
	case s.Of == study.OfData:
		l.add("; also in the simulation? ", "shared", "acts on the simulation too", shared, []Option{{"no", "no"}, {"yes", "yes"}}, "what is common to both sides is no part of E")
		if s.Shared {
			l.add(", there times ", "sensitivity", "its error there for one here", study.OptionalText(s.Sensitivity), []Option{}, "empty: the same error, or the same part of the reading")
		}
	case s.Input != "":
		l.add("; also in the data? ", "shared", "acts on the data too", shared, []Option{{"no", "no"}, {"yes", "yes"}}, "what is common to both sides is no part of E")
		if s.Shared {
			l.add(", one unit changing them by ", "data_sensitivity", "change of the data", study.OptionalText(s.DataSensitivity), []Option{}, "")
		}
	}
}

// qualityList is the data-quality card of a case.
func qualityList(s *study.Study, caseName string) EntryList {
	list := EntryList{Course: 2, Title: "Data of case " + caseName, Hint: "what the test tells for a simulation to repeat it", Items: []EntryItem{}}
	for i, item := range study.QualityItems {
		q := s.QualityOf(caseName, item)
		entry := func(field, label, value string, options []Option, hint string) Entry {
			return Entry{Target: study.Target{Kind: "quality", ID: caseName, Field: strconv.Itoa(i) + "." + field}, Label: label, Value: value, By: study.Entered, Options: options, Hint: hint}
		}
		list.Items = append(list.Items, EntryItem{Entries: []Entry{
			entry("state", item, q.State, []Option{{"", "not stated"}, {study.QualityKnown, "known"}, {study.QualityUnknown, "unknown"}}, ""),
			entry("note", "documented in", q.Note, []Option{}, "")}})
	}
	return list
}

// furtherTables hold what follows from the sources together with E.
func furtherTables(c *study.Cell) []Table {
	rows := furtherRows(c)
	if rows == nil {
		return nil
	}
	return []Table{{Title: "Further numbers of the uncertainty", Head: []string{"", "value", ""}, Rows: rows}}
}

// evidenceTables list what stands behind the sources of a cell; none of it
// tells E, which may be veiled.
func evidenceTables(c *study.Cell) []Table {
	var tables []Table
	add := func(title string, head []string, rows [][]string) {
		if len(rows) > 0 {
			tables = append(tables, Table{Title: title, Head: head, Rows: rows})
		}
	}
	var inputs, consistency, quality, repeats [][]string
	for _, in := range c.Inputs {
		inputs = append(inputs, []string{in.Name, unitText(in.Nominal, 6, in.Unit), text(in.U, 2), text(in.Sensitivity, 3), in.Method, map[bool]string{true: "yes, " + text(in.DataSensitivity, 3), false: "no"}[in.Shared], in.Text})
	}
	add("Inputs", []string{"input", "value", "u", "sensitivity", "from", "acts on the data", "as entered"}, inputs)
	if r := c.Replicates; r != nil {
		for _, l := range r.Levels {
			counts := map[bool]string{true: "counts", false: ""}[l.Name == r.Counts]
			repeats = append(repeats, []string{l.Name, strconv.Itoa(l.Groups), text(l.Degrees, 3), text(l.Deviation, 2), counts})
		}
		add("Repeated readings by level: s "+text(r.S, 2)+", u "+text(r.U, 2)+"; without levels "+text(r.Plain, 2), []string{"level", "groups", "degrees of freedom", "deviation", ""}, repeats)
	}
	for _, l := range c.Consistency {
		consistency = append(consistency, []string{l.Name, text(l.Value, 4), text(l.Expected, 4), text(l.U, 2), text(l.Ratio, 2), map[bool]string{true: "agree", false: "do not agree"}[l.Holds]})
	}
	add("Tests of the data against themselves", []string{"test", "value", "held against", "u", "ratio", ""}, consistency)
	for _, q := range c.Quality {
		state := q.State
		if state == "" {
			state = "not stated"
		}
		quality = append(quality, []string{q.Item, state, q.Note})
	}
	add("What the test tells", []string{"item", "state", "where"}, quality)
	return tables
}

// furtherRows are the single numbers behind the sources.
func furtherRows(c *study.Cell) [][]string {
	var rows [][]string
	add := func(name, value, words string) { rows = append(rows, []string{name, value, words}) }
	for _, s := range c.Shared {
		add(s.Source+", on both sides", text(s.U, 2)+c.UnitSuffix(), text(s.Left, 2)+" is left in E")
	}
	if m := c.Members; m != nil {
		add("deviation of "+quantity.Counted(m.N, "run")+" with sampled inputs", text(m.U, 2)+c.UnitSuffix(), "their mean differs by up to "+quantity.Signed(float64(m.Mean), 2)+"; rank "+strconv.Itoa(m.Rank)+" at most")
	}
	if l := c.Distributions; l != nil {
		add("area between the distributions of S and D", text(l.Area, 2)+c.UnitSuffix(), quantity.Counted(l.Runs, "run")+" against "+quantity.Counted(l.Readings, "reading")+"; their means differ by "+quantity.Signed(float64(l.Shift), 2))
	}
	if b := c.Bound; b != nil {
		add("half-width of sources known as intervals", text(b.Half, 2)+c.UnitSuffix(), "widens the interval of the model error; not in u_val")
	}
	if r := c.Resolution; r != nil {
		add("step of the data", text(r.Step, 3)+c.UnitSuffix(), "u "+text(r.U, 2)+map[bool]string{true: ", counted", false: ", not counted"}[r.Counted])
	}
	if c.Degrees.Known() {
		add("effective degrees of freedom", text(c.Degrees, 3), "95 % needs k = "+text(c.K95, 3))
	}
	if s := c.Sampled; s != nil {
		words := strconv.Itoa(s.Draws) + " draws"
		if s.Shift.Known() {
			words += "; sides −" + text(s.Minus, 2) + " +" + text(s.Plus, 2) + ", mean of the data " + quantity.Signed(float64(s.Shift), 2) + " off their value"
		}
		add("model error by sampling, 95 %", quantity.Signed(float64(s.Lo), 3)+" to "+quantity.Signed(float64(s.Hi), 3)+c.UnitSuffix(), words)
	}
	if k := c.Bounding; k != nil {
		words := "no u_D changes it"
		if k.UD.Known() {
			words = "while u_D stays below " + text(k.UD, 2) + c.UnitSuffix() + ", then " + k.After
		}
		add("the "+k.What+" without u_D", k.Word, words)
	}
	return rows
}

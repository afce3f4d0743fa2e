package memo

import (
	"fmt"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// inputWords say what E means by what is known of the inputs.
var inputWords = map[string]string{
	study.InputsCounted: "Strong form: the uncertainty of the inputs is in u_val, and E tells of the model with its inputs as far as they are known.",
	study.InputsNominal: "Weak form: the inputs are taken at their nominal values, and E tells of the model and its inputs together.",
}

// evidence prints what stands behind the sources of a cell.
func (b *builder) evidence(i int, c study.Cell) []Node {
	var nodes []Node
	for _, part := range []func(int, study.Cell) []Node{b.inputs, b.members, b.distributions, b.shared, b.bound, b.replicates, b.resolution, b.consistency, b.sampled, b.bounding, b.quality, b.degrees} {
		nodes = append(nodes, part(i, c)...)
	}
	return nodes
}

// inputs prints the inputs of the simulation with what they do.
func (b *builder) inputs(i int, c study.Cell) []Node {
	if len(c.Inputs) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Inputs))
	for j, in := range c.Inputs {
		at := func(name string) string { return fmt.Sprintf("cells.%d.inputs.%d.%s", i, j, name) }
		name := []Node{text(in.Name)}
		if in.Unit != "" && in.Unit != "1" {
			name = say("{} [{}]", text(in.Name), text(in.Unit))
		}
		shared := "no"
		if in.Shared {
			shared = "yes"
		}
		rows[j] = row(cell(name...), figureCell(trimmed(in.Nominal, 8, at("nominal"))), figureCell(digits(in.U, 2, at("u"))), cell(text(in.Text)),
			figureCell(digits(in.Sensitivity, 3, at("sensitivity"))), cell(given(in.Method)), cell(text(shared)), figureCell(digits(in.DataSensitivity, 3, at("data_sensitivity"))), cell(given(in.Origin)))
	}
	caption := say("Inputs of the simulation. *u* is standard, of an interval its half-width; a sensitivity is the change of the quantity ({}) for one unit of the input, along a curve its root mean square. A shared input acts on the data too.", text(unitOf(c.Unit)))
	return []Node{b.table("plain", caption, headRow("Input", "#Value", "#*u*", "As entered", "#Sensitivity", "From", "Shared", "#Of the data", "Origin"), rows...)}
}

func (b *builder) members(i int, c study.Cell) []Node {
	m := c.Members
	if m == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.members.%s", i, name) }
	words := say("{}: {} runs; their deviation is ", strong("Runs with sampled inputs"), count(m.N, at("n")))
	words = append(words, withUnit(digits(m.U, 2, at("u")), c.Unit)...)
	words = append(words, say(" (root mean square), their mean differs from the compared run by up to ")...)
	words = append(words, withUnit(signed(m.Mean, 2, at("mean")), c.Unit)...)
	return []Node{paragraph(append(words, say(". Their covariance, of rank {} at most, is in *V* as it is.", count(m.Rank, at("rank")))...)...)}
}

func (b *builder) distributions(i int, c study.Cell) []Node {
	l := c.Distributions
	if l == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.distributions.%s", i, name) }
	words := say("{}: between the distribution functions of *S* ({} of the simulation) and of *D* ({} of the data) lies an area of ", strong("As distributions"), count(l.Runs, at("runs")), count(l.Readings, at("readings")))
	words = append(words, withUnit(digits(l.Area, 2, at("area")), c.Unit)...)
	words = append(words, say("; their means differ by ")...)
	words = append(words, withUnit(signed(l.Shift, 2, at("shift")), c.Unit)...)
	along := "."
	if !c.Scalar {
		along = " (means over the stations)."
	}
	return []Node{paragraph(append(words, say(along+" An area that is the difference of the means tells of a shift alone; a larger one of another scatter too. No form of the distributions is taken.")...)...)}
}

func (b *builder) shared(i int, c study.Cell) []Node {
	var words []Node
	for j, s := range c.Shared {
		at := func(name string) string { return fmt.Sprintf("cells.%d.shared.%d.%s", i, j, name) }
		words = append(words, say(" The error of {} acts on both sides: of ", text(s.Source))...)
		words = append(words, withUnit(digits(s.U, 2, at("u")), c.Unit)...)
		words = append(words, say(" in the data, ")...)
		words = append(words, withUnit(digits(s.Left, 2, at("left")), c.Unit)...)
		words = append(words, say(" is left in *E*.")...)
	}
	if words == nil {
		return nil
	}
	return []Node{paragraph(append([]Node{strong("Shared sources.")}, words...)...)}
}

func (b *builder) bound(i int, c study.Cell) []Node {
	if c.Bound == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.bound.%s", i, name) }
	words := say("{} are in neither *u*_{val} nor *V*: they widen the interval of the model error at both ends, by ", strong("Sources known as intervals"))
	words = append(words, withUnit(digits(c.Bound.Half, 2, at("half")), c.Unit)...)
	words = append(words, b.station(c, c.Bound.At, at("at"), " at most")...)
	return []Node{paragraph(append(words, text("."))...)}
}

// station says at which station a number of a curve holds.
func (b *builder) station(c study.Cell, x quantity.Number, field, before string) []Node {
	if !x.Known() {
		return nil
	}
	words := append([]Node{text(before)}, say(" at {} = ", given(c.XName))...)
	return append(words, withUnit(trimmed(x, 4, field), c.XUnit)...)
}

// replicates prints repeated readings by their levels.
func (b *builder) replicates(i int, c study.Cell) []Node {
	r := c.Replicates
	if r == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.replicates.%s", i, name) }
	rows := make([]Node, len(r.Levels))
	for j, l := range r.Levels {
		of := func(name string) string { return fmt.Sprintf("cells.%d.replicates.levels.%d.%s", i, j, name) }
		name := text(l.Name)
		if l.Name == r.Counts {
			name = strong(l.Name)
		}
		rows[j] = row(cell(name), figureCell(count(l.Groups, of("groups"))), figureCell(trimmed(l.Degrees, 6, of("degrees"))), figureCell(digits(l.Deviation, 2, of("deviation"))))
	}
	caption := say("Repeated readings by level, {} at so many stations: {}. The outermost level that varies counts: {}.", count(r.Readings, at("readings")), count(r.Stations, at("stations")), strong(r.Counts))
	words := say("The data are a {} of the readings; *u* = ", text(r.Of))
	words = append(words, withUnit(digits(r.U, 2, at("u")), c.Unit)...)
	words = append(words, say(" with {} degrees of freedom. All readings together deviate by *s* = ", trimmed(r.Degrees, 6, at("degrees")))...)
	words = append(words, withUnit(digits(r.S, 2, at("s")), c.Unit)...)
	words = append(words, say("; without levels *s*/√*n* would be ")...)
	words = append(words, withUnit(digits(r.Plain, 2, at("plain")), c.Unit)...)
	return []Node{b.table("plain", caption, headRow("Level", "#Groups", "#Degrees of freedom", "#Deviation"), rows...), paragraph(append(words, text("."))...)}
}

func (b *builder) resolution(i int, c study.Cell) []Node {
	r := c.Resolution
	if r == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.resolution.%s", i, name) }
	words := say("{}: all values are multiples of ", strong("Resolution of the data"))
	words = append(words, withUnit(digits(r.Step, 3, at("step")), c.Unit)...)
	words = append(words, say(", which is a standard uncertainty of ")...)
	words = append(words, withUnit(digits(r.U, 2, at("u")), c.Unit)...)
	if r.Counted {
		return []Node{paragraph(append(words, text("; it is counted."))...)}
	}
	return []Node{paragraph(append(words, text("; it is not counted, and the stated uncertainty is smaller at some stations."))...)}
}

// consistency prints the tests of the data against themselves.
func (b *builder) consistency(i int, c study.Cell) []Node {
	if len(c.Consistency) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Consistency))
	for j, l := range c.Consistency {
		at := func(name string) string { return fmt.Sprintf("cells.%d.consistency.%d.%s", i, j, name) }
		holds := strong("do not agree")
		if l.Holds {
			holds = text("agree")
		}
		rows[j] = row(cell(text(l.Name)), figureCell(digits(l.Value, 4, at("value"))), figureCell(digits(l.Expected, 4, at("expected"))), figureCell(digits(l.U, 2, at("u"))), figureCell(digits(l.Ratio, 2, at("ratio"))), cell(holds))
	}
	return []Node{b.table("plain", say("Tests of the data against themselves. The ratio is that of the difference to its standard uncertainty *u*."), headRow("Test", "#Value", "#Held against", "#*u*", "#Ratio", "Within the limit"), rows...)}
}

func (b *builder) sampled(i int, c study.Cell) []Node {
	s := c.Sampled
	if s == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.sampled.%s", i, name) }
	words := append([]Node{strong("By sampling")}, b.station(c, s.At, at("at"), "")...)
	words = append(words, say(" ({} draws): the model error lies within ", count(s.Draws, at("draws")))...)
	scale := s.U
	if !scale.Known() {
		scale = (s.Hi - s.Lo) / 4
	}
	words = append(words, interval(signedBeside(s.Lo, scale, at("lo")), signedBeside(s.Hi, scale, at("hi")))...)
	if c.Unit != "" && c.Unit != "1" {
		words = append(words, text("\u202f"+c.Unit))
	}
	words = append(words, say(" at {}, the shortest such interval, about {}", percent(s.Level, at("level")), signedBeside(s.Value, scale, at("value")))...)
	if s.U.Known() {
		words = append(words, say(" with *u* = ")...)
		words = append(words, withUnit(digits(s.U, 2, at("u")), c.Unit)...)
	} else {
		words = append(words, say("; three readings or fewer have no standard uncertainty")...)
	}
	words = append(words, text("."))
	if s.Shift.Known() {
		words = append(words, say(" The bars have the two sides −{} and +{}, a two-piece normal distribution, whose mean lies off the value by √(2/π)(*u*_{+} − *u*_{−}) = ", digits(s.Minus, 2, at("minus")), digits(s.Plus, 2, at("plus")))...)
		words = append(words, withUnit(signed(s.Shift, 2, at("shift")), c.Unit)...)
		words = append(words, text("."))
	}
	if !s.Settled {
		words = append(words, text(" The last digit may still change: the most draws were made."))
	}
	return []Node{paragraph(words...)}
}

func (b *builder) bounding(i int, c study.Cell) []Node {
	k := c.Bounding
	if k == nil {
		return nil
	}
	at := func(name string) string { return fmt.Sprintf("cells.%d.bounding.%s", i, name) }
	words := say("{} With an unknown *u*_{D} there is no *u*_{val} and no statement. ", strong("Bounding study."))
	if !k.UD.Known() {
		return []Node{paragraph(append(words, say("Without any *u*_{D} the {} would be {}, and no *u*_{D} changes that.", text(k.What), strong(k.Word))...)...)}
	}
	words = append(words, say("The {} would be {} as long as *u*_{D} stays below ", text(k.What), strong(k.Word))...)
	words = append(words, withUnit(digits(k.UD, 2, at("u_d")), c.Unit)...)
	words = append(words, b.station(c, k.At, at("at"), " (decided")...)
	if k.At.Known() {
		words = append(words, text(")"))
	}
	return []Node{paragraph(append(words, say(", and {} from there on.", text(k.After))...)...)}
}

// quality prints the data-quality card with its gaps.
func (b *builder) quality(_ int, c study.Cell) []Node {
	if len(c.Quality) == 0 {
		return nil
	}
	rows := make([]Node, len(c.Quality))
	var gaps []string
	for j, q := range c.Quality {
		state := text(q.State)
		if q.State != study.QualityKnown {
			gaps = append(gaps, q.Item)
			state = strong("unknown")
		}
		if q.State == "" {
			state = strong("not stated")
		}
		rows[j] = row(cell(text(q.Item)), cell(state), cell(given(q.Note)))
	}
	nodes := []Node{b.table("plain", say("What the test tells for a simulation to repeat it."), headRow("Item", "State", "Where"), rows...)}
	if gaps != nil {
		nodes = append(nodes, paragraph(say("{} {}. What they do to the comparison is in no number of this cell.", strong("Gaps of the data:"), text(strings.Join(gaps, ", ")))...))
	}
	return nodes
}

// degrees prints what few degrees of freedom would need at the stations of a
// curve.
func (b *builder) degrees(i int, c study.Cell) []Node {
	if c.Scalar || !known(c.Degrees, c.K95) {
		return nil
	}
	return []Node{paragraph(append([]Node{text("The station with the fewest degrees of freedom counts. ")}, needs(i, c)...)...)}
}

// needs says the factor that 95 % needs with the effective degrees of freedom.
func needs(i int, c study.Cell) []Node {
	return say("With {} effective degrees of freedom, 95 % needs *k* = {}.", digits(c.Degrees, 2, fmt.Sprintf("cells.%d.degrees", i)), digits(c.K95, 3, fmt.Sprintf("cells.%d.k_95", i)))
}

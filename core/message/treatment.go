package message

import (
	"strconv"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// treatmentTables say what was done with the curves of a cell.
func treatmentTables(c *study.Cell) []Table {
	t := c.Treatment
	if t == nil {
		return nil
	}
	table := Table{Title: "Curves and stations", Head: []string{"", ""}, Rows: [][]string{}}
	add := func(name, value string) { table.Rows = append(table.Rows, []string{name, value}) }
	for _, o := range t.Orders {
		words := "column " + o.Column + ", hash of its order " + o.Hash + ", kept as in the file"
		if o.Sorted {
			words += "; a copy in order of stations is compared"
		}
		add("rows of "+o.File, words)
	}
	if t.Sampling != "" {
		add("the simulation holds its values at", t.Sampling)
	}
	for _, a := range t.Anchors {
		add("support point", strings.TrimSpace(text(a.X, 6)+" "+xUnitOf(c))+", value "+text(a.Value, 6)+c.UnitSuffix()+": "+a.Why)
	}
	if p := t.Plan; p != nil {
		words := "locked " + p.At
		if p.Late {
			words += ", after the comparison was seen"
		}
		if len(p.Changes) > 0 {
			words += "; changed since: " + strings.Join(p.Changes, ", ")
		}
		add("stations", words)
	}
	return []Table{table}
}

// curveTables say what the curves show beside the measures.
func curveTables(c *study.Cell) []Table {
	t := c.Treatment
	if t == nil {
		return nil
	}
	table := Table{Title: "Along the stations", Head: []string{"", ""}, Rows: [][]string{}}
	add := func(name, value string) { table.Rows = append(table.Rows, []string{name, value}) }
	if t.Weights != "" {
		add("weights of the stations", t.Weights+", sum one, in mean E, mean |E| and its root mean square")
	}
	if l := t.Integral; l != nil {
		unit := study.ProductUnit(c.Unit, c.XUnit)
		if unit == "1" {
			unit = ""
		}
		words := quantity.SignedLike(float64(l.E), float64(l.U), 2)
		if l.U.Known() {
			words += " ± " + text(l.U, 2)
		} else {
			words = quantity.Signed(float64(l.E), 3)
		}
		add("integral of E", strings.TrimSpace(words+" "+unit)+", over "+text(l.Length, 4)+" of "+text(l.Whole, 4)+" "+xUnitOf(c)+"in "+quantity.Counted(l.Pieces, "unbroken piece")+"; of S "+text(l.S, 4)+", of D "+text(l.D, 4))
	}
	if n := t.Noise; n != nil {
		words := text(n.S, 2) + c.UnitSuffix() + " between neighbours, from " + strconv.Itoa(n.Rows) + " differences"
		if n.Stated.Known() {
			words += "; stated as random: " + text(n.Stated, 2)
		} else {
			words += "; nothing is stated as random"
		}
		add("scatter of D, a lower bound", words)
	}
	if f := t.Fit; f != nil {
		rms := func(v study.Number) string { return ": root mean square E " + text(v, 3) + c.UnitSuffix() }
		edge := ""
		if f.AtEdge {
			edge = ", the largest tried"
		}
		add("S as compared, "+quantity.Counted(f.N, "station"), strings.TrimPrefix(rms(f.RMS), ": "))
		add("S shifted", "by "+quantity.Signed(float64(f.Shift), 2)+strings.TrimRight(" "+xUnitOf(c), " ")+edge+rms(f.ShiftRMS))
		add("S scaled", "by "+text(f.Scale, 4)+rms(f.ScaleRMS))
		add("S shifted and scaled", "by "+quantity.Signed(float64(f.BothShift), 2)+" "+xUnitOf(c)+"and "+text(f.BothScale, 4)+edge+rms(f.BothRMS)+"; a diagnosis, nothing was moved")
	}
	if len(table.Rows) == 0 {
		return nil
	}
	return []Table{table}
}

// xUnitOf is the unit of the stations with a space behind it, or nothing.
func xUnitOf(c *study.Cell) string {
	if c.XUnit == "" || c.XUnit == "1" {
		return ""
	}
	return c.XUnit + " "
}

package memo

import (
	"fmt"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// summarySection prints one row for every cell, and figures of no case.
func (b *builder) summarySection() Node {
	s := b.open(1, "summary", "Summary of all cells")
	cells := b.in.Report.Cells
	if len(cells) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("The study holds no comparison yet.")))
		return s
	}
	rows := make([]Node, len(cells))
	for i, c := range cells {
		rows[i] = b.summaryRow(i, c)
	}
	s.Nodes = append(s.Nodes,
		b.table("summary", say("Comparison error *E* = *S* − *D*, validation uncertainty *u*_{val} and interval of the model error by cell."),
			headRow("Case", "Quantity", "Model", "#*n*", "#*E*", "#*u*_{val}", "#|*E*|/*u*_{val}", "#Model error within", "Requirement", "Outcome"), rows...),
		note(say("For curves, *E* is the mean over the stations, *u*_{val} runs from its smallest to its largest value, |*E*|/*u*_{val} is the largest, and the interval is the envelope of all stations. The interval is *E* ± *k* *u*_{val}. “{}” stands where the study has no value; it is never a zero.", text(absent))...))
	s.Nodes = append(s.Nodes, b.figuresOf(study.Cell{}, "")...)
	s.Nodes = append(s.Nodes, b.differences()...)
	s.Nodes = append(s.Nodes, b.application()...)
	return s
}

func (b *builder) summaryRow(i int, c study.Cell) Node {
	at := func(name string) string { return fmt.Sprintf("cells.%d.%s", i, name) }
	n, e, u, ratio, within := text(absent), text(absent), []Node{text(absent)}, text(absent), []Node{text(absent)}
	switch {
	case len(c.Stations) == 0:
	case c.Scalar:
		st := c.Stations[0]
		n = text("1")
		e = signedBeside(st.E, st.UVal, at("stations.0.e"))
		u = []Node{digits(st.UVal, 2, at("stations.0.u_val"))}
		ratio = digits(st.Ratio, 2, at("stations.0.ratio"))
		if known(st.Lo, st.Hi) {
			within = interval(signedBeside(st.Lo, st.UVal, at("stations.0.lo")), signedBeside(st.Hi, st.UVal, at("stations.0.hi")))
		}
	default:
		low, high := extremes(c.Stations, func(s study.Station) quantity.Number { return s.UVal })
		if low >= 0 {
			u = []Node{digits(c.Stations[low].UVal, 2, fmt.Sprintf(at("stations.%d.u_val"), low))}
			if top := digits(c.Stations[high].UVal, 2, fmt.Sprintf(at("stations.%d.u_val"), high)); top.Text != u[0].Text {
				u = interval(u[0], top)
			}
		}
		first, _ := extremes(c.Stations, func(s study.Station) quantity.Number { return s.Lo })
		_, last := extremes(c.Stations, func(s study.Station) quantity.Number { return s.Hi })
		if first >= 0 && last >= 0 {
			within = interval(signedBeside(c.Stations[first].Lo, c.Stations[first].UVal, fmt.Sprintf(at("stations.%d.lo"), first)),
				signedBeside(c.Stations[last].Hi, c.Stations[last].UVal, fmt.Sprintf(at("stations.%d.hi"), last)))
		}
		if m := c.Summary; m != nil {
			n = count(m.N, at("summary.n"))
			scale := quantity.None
			if low >= 0 {
				scale = c.Stations[low].UVal
			}
			e = signedBeside(m.Bias, scale, at("summary.bias"))
			ratio = digits(m.MaxRatio, 2, at("summary.max_ratio"))
		}
	}
	requirement, outcome := []Node{text("none recorded")}, text(absent)
	if q := c.Requirement; q != nil {
		requirement = append(say("±"), trimmed(q.Limit, 5, at("requirement.limit")))
		if q.Percent.Known() {
			requirement = say("±{}\u202f%", asWritten(float64(q.Percent), at("requirement.percent")))
		}
		outcome = strong(q.Outcome)
	}
	if c.Withheld {
		outcome = text("withheld")
	}
	name := []Node{text(c.Quantity)}
	if c.Unit != "" && c.Unit != "1" {
		name = say("{} [{}]", text(c.Quantity), text(c.Unit))
	}
	return row(cell(text(c.Case)), cell(name...), cell(Node{Kind: Link, ID: cellID(i), Text: c.Model}), figureCell(n), figureCell(e),
		figureCell(u...), figureCell(ratio), figureCell(within...), cell(requirement...), cell(outcome))
}

// extremes returns the stations of the smallest and the largest known value,
// or -1.
func extremes(stations []study.Station, value func(study.Station) quantity.Number) (low, high int) {
	low, high = -1, -1
	for i, s := range stations {
		v := value(s)
		if !v.Known() {
			continue
		}
		if low < 0 || v < value(stations[low]) {
			low = i
		}
		if high < 0 || v > value(stations[high]) {
			high = i
		}
	}
	return low, high
}

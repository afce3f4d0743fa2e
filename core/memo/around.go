package memo

import (
	"fmt"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// around prints what stands around the joint statistic: where it comes from,
// how near V is to singular, what leaving out and correlation do to it.
func (b *builder) around(i int, c study.Cell) []Node {
	j := c.Joint
	at := func(name string) string { return fmt.Sprintf("cells.%d.joint.%s", i, name) }
	var words []Node
	if j.Merged > 0 {
		words = append(words, say("Readings that the file repeats are counted once: {} left out. ", count(j.Merged, at("merged")))...)
	}
	if known(j.Worst) {
		words = append(words, say("The largest part of the statistic comes from {} = ", given(c.XName))...)
		words = append(words, withUnit(trimmed(j.WorstAt, 4, at("worst_at")), c.XUnit)...)
		words = append(words, say(", where *E* is {} standard uncertainties once its covariance is taken out.", signed(j.Worst, 3, at("worst")))...)
	}
	words = append(words, b.whitened(i, c)...)
	if known(j.Condition) {
		words = append(words, say(" The matrix behind it has the condition {}.", digits(j.Condition, 3, at("condition")))...)
	}
	if len(j.Eigenvalues) > 0 {
		words = append(words, say(" *V* was treated whole; eigenvalues on the unit diagonal: ")...)
		for n, v := range j.Eigenvalues {
			if n > 0 {
				words = append(words, text(", "))
			}
			words = append(words, digits(v, 3, fmt.Sprintf(at("eigenvalues.%d"), n)))
		}
		words = append(words, text("."))
	}
	if left := j.Station; left != nil {
		of := func(name string) string { return at("station." + name) }
		words = append(words, say(" Of single stations, leaving out the one at {} changes it most: {} on {}, 95 % point {}; ", text(left.Region),
			hundredths(left.Statistic, of("statistic")), count(left.N, of("n")), hundredths(left.Reference, of("reference")))...)
		words = append(words, say("leaving out one turns the reading at {} of the stations.", count(j.Turning, at("turning")))...)
	}
	var nodes []Node
	if len(words) > 0 {
		nodes = append(nodes, paragraph(words...))
	}
	for n, line := range j.Correlations {
		nodes = append(nodes, b.correlation(fmt.Sprintf(at("correlations.%d."), n), line))
	}
	return nodes
}

// whitened lists the whitened residuals in the order of the stations.
func (b *builder) whitened(i int, c study.Cell) []Node {
	if !anyKnown(c.Stations, func(s study.Station) quantity.Number { return s.Whitened }) {
		return nil
	}
	rows := spread(len(c.Stations), rowLimit)
	words := say(" In the order of the stations these parts, whose squares sum to the statistic, are ")
	if len(rows) < len(c.Stations) {
		words = say(" At {} of the stations, evenly spaced, these parts, whose squares sum to the statistic, are ", text(fmt.Sprint(len(rows))))
	}
	for n, r := range rows {
		if n > 0 {
			words = append(words, text("; "))
		}
		v := c.Stations[r].Whitened
		words = append(words, number(v, quantity.SignedLike(float64(v), 0.1, 2), fmt.Sprintf("cells.%d.stations.%d.whitened", i, r)))
	}
	return append(words, text("."))
}

// correlation prints the statistic against the correlation of one source.
func (b *builder) correlation(at string, line study.CorrelationLine) Node {
	rows := make([]Node, len(line.Points))
	for n, p := range line.Points {
		of := fmt.Sprintf("%spoints.%d.", at, n)
		rows[n] = row(figureCell(trimmed(p.Rho, 3, of+"rho")), figureCell(hundredths(p.Statistic, of+"statistic")))
	}
	caption := say("Joint statistic against the correlation of {} between stations (a part of its variance shared by all, the rest independent), on {}; 1 % point {}, 95 % point {}.",
		text(line.Source), count(line.N, at+"n"), hundredths(line.Low, at+"low"), hundredths(line.Top, at+"reference"))
	for n, f := range line.Flips {
		caption = append(caption, say(" The reading turns at {}.", digits(f, 3, fmt.Sprintf("%sflips.%d", at, n)))...)
	}
	head, rows := beside4(headRow("#Correlation", "#Statistic"), rows)
	return b.table("plain", caption, head, rows...)
}

// beside4 lays a long table of few columns out as four tables side by side,
// read down and then to the right.
func beside4(head Node, rows []Node) (Node, []Node) {
	const parts = 4
	if len(rows) <= parts {
		return head, rows
	}
	height := (len(rows) + parts - 1) / parts
	laid := make([]Node, height)
	wide := block(Row, "head")
	for p := range parts {
		wide.Nodes = append(wide.Nodes, head.Nodes...)
		for n := range height {
			cells := make([]Node, len(head.Nodes))
			for k := range cells {
				cells[k] = cell()
			}
			if at := p*height + n; at < len(rows) {
				cells = rows[at].Nodes
			}
			laid[n] = row(append(laid[n].Nodes, cells...)...)
		}
	}
	return wide, laid
}

package main

import (
	"fmt"
	"strings"
	"text/tabwriter"

	"weirmark/core/message"
	"weirmark/core/quantity"
)

// read prints what a file holds.
func read(v *invocation) (int, error) {
	path, err := v.file("file")
	if err != nil {
		return message.Refused, err
	}
	name, data, err := load(path)
	if err != nil {
		return message.Refused, err
	}
	q := message.Request{Kind: "read", Names: []string{name}}
	if _, card := v.flags["card"]; card || !v.json() {
		q.Value = "card"
	}
	r, _, err := ask(&message.Session{}, q, data)
	if err != nil {
		return r.Status, err
	}
	if v.json() {
		return r.Status, v.printJSON(r.Read)
	}
	fmt.Fprintf(v.out, "%s  SHA-256 %s\n", r.Read.File, r.Read.SHA256)
	for _, m := range r.Read.Stated {
		fmt.Fprintf(v.out, "stated in line %d: %s: %s\n", m.Line, m.Key, m.Value)
	}
	for i, t := range r.Read.Tables {
		fmt.Fprintf(v.out, "\ntable %d %s: %d rows\n%s\n", i+1, t.Name, t.Rows, r.Read.Cards[i])
		w := tabwriter.NewWriter(v.out, 0, 0, 2, ' ', 0)
		fmt.Fprintln(w, "column\tunit\tfirst\tlast")
		for _, c := range t.Columns {
			first, last := "", ""
			if n := len(c.Values); n > 0 {
				first, last = quantity.Text(float64(c.Values[0]), 6), quantity.Text(float64(c.Values[n-1]), 6)
			}
			fmt.Fprintf(w, "%s\t%s\t%s\t%s\n", c.Name, c.Unit, first, last)
		}
		if err := w.Flush(); err != nil {
			return message.Refused, err
		}
	}
	v.notices(r.Read.Notices)
	return r.Status, nil
}

// grids prints the grid study of every value.
func grids(v *invocation) (int, error) {
	path, err := v.file("file")
	if err != nil {
		return message.Refused, err
	}
	limits, err := v.onOff("limits")
	if err != nil {
		return message.Refused, err
	}
	q := message.GridsRequest{Size: v.flags["size"], Value: v.flags["value"], Limits: limits, Rule: v.flags["rule"]}
	switch text := v.flags["dim"]; text {
	case "":
	case "1", "2", "3":
		q.Dim = int(text[0] - '0')
	default:
		return message.Refused, fmt.Errorf("--dim is 1, 2 or 3, not %q", text)
	}
	if text := v.flags["formal"]; text != "" {
		if q.Formal, err = number(text); err != nil || !(q.Formal >= 0.5 && q.Formal <= 10) {
			return message.Refused, fmt.Errorf("--formal is a number from 0.5 to 10, not %q", text)
		}
	}
	name, data, err := load(path)
	if err != nil {
		return message.Refused, err
	}
	r, _, err := ask(&message.Session{}, message.Request{Kind: "grids", Names: []string{name}, Grids: &q}, data)
	if err != nil {
		return r.Status, err
	}
	if v.json() {
		return r.Status, v.printJSON(r.Grids)
	}
	w := tabwriter.NewWriter(v.out, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "table\tvalue\tclass\torder\textrapolated\te_a\te_ext\tGCI\tU (95 %)\trule")
	for _, c := range *r.Grids {
		fmt.Fprintf(w, "%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\t%s\n", c.Table, c.Value, c.Class, quantity.Text(float64(c.Order), 3), quantity.Text(float64(c.Extrapolated), 6),
			percent(float64(c.Ea)), percent(float64(c.Eext)), percent(float64(c.GCI)), quantity.Text(float64(c.U), 3), c.Rule)
	}
	if err := w.Flush(); err != nil {
		return message.Refused, err
	}
	v.gridNotices(*r.Grids)
	return r.Status, nil
}

// gridNotices writes every notice once: with the names of its cases where it
// does not hold for all.
func (v *invocation) gridNotices(cases []message.GridsCase) {
	holders := map[string][]string{}
	var order []message.Finding
	for _, c := range cases {
		for _, n := range c.Notices {
			if holders[n.Text] == nil {
				order = append(order, n)
			}
			holders[n.Text] = append(holders[n.Text], c.Table+" "+c.Value)
		}
	}
	for _, n := range order {
		if of := holders[n.Text]; len(of) < len(cases) {
			n.Text = strings.Join(of, "; ") + ": " + n.Text
		}
		v.notices([]message.Finding{n})
	}
}

func percent(fraction float64) string {
	if text := quantity.Percent(fraction); text != "–" {
		return text + " %"
	}
	return "–"
}

// compare prints one comparison.
func compare(v *invocation) (int, error) {
	for _, needed := range []string{"sim", "ref", "x", "y"} {
		if v.flags[needed] == "" {
			return message.Refused, fmt.Errorf("--%s is needed", needed)
		}
	}
	if len(v.plain) > 0 {
		return message.Refused, fmt.Errorf("%q is one argument too many", strings.Join(v.plain, " "))
	}
	interp, err := v.onOff("u-interp")
	if err != nil {
		return message.Refused, err
	}
	q := message.CompareRequest{X: v.flags["x"], Y: v.flags["y"], RefX: v.flags["ref-x"], RefY: v.flags["ref-y"], U: v.flags["u"], UK: v.flags["u-k"],
		UCommon: v.flags["u-common"], UNum: v.flags["u-num"], UInput: v.flags["u-input"], UInterp: interp, Interp: v.flags["interp"]}
	if text := v.flags["k"]; text != "" {
		if q.K, err = number(text); err != nil || !(q.K > 0) {
			return message.Refused, fmt.Errorf("--k is a number above zero, not %q", text)
		}
	}
	if q.UK != "" {
		if k, err := number(q.UK); err != nil || !(k > 0) {
			return message.Refused, fmt.Errorf("--u-k is a number above zero, not %q", q.UK)
		}
	}
	if q.UInput != "" {
		if _, err := number(q.UInput); err != nil {
			return message.Refused, fmt.Errorf("--u-input: %w", err)
		}
	}
	if q.Interp != "" && q.Interp != "linear" && q.Interp != "monotone" {
		return message.Refused, fmt.Errorf("--interp is linear or monotone, not %q", q.Interp)
	}
	var attached [][]byte
	var names []string
	for _, side := range []struct {
		flag  string
		table *string
	}{{"sim", &q.SimTable}, {"ref", &q.RefTable}} {
		path, table := splitTable(v.flags[side.flag])
		*side.table = table
		name, data, err := load(path)
		if err != nil {
			return message.Refused, err
		}
		names, attached = append(names, name), append(attached, data)
	}
	r, _, err := ask(&message.Session{}, message.Request{Kind: "compare", Names: names, Compare: &q}, attached...)
	if err != nil {
		return r.Status, err
	}
	if v.json() {
		return r.Status, v.printJSON(r.Compare)
	}
	return r.Status, v.printCompare(r.Compare)
}

func (v *invocation) printCompare(c *message.CompareReply) error {
	w := tabwriter.NewWriter(v.out, 0, 0, 2, ' ', tabwriter.AlignRight)
	fmt.Fprintln(w, "x\tS\tD\tE\tu_D\tu_num\tu_input\tu_val\t|E|/u_val\t")
	for _, s := range c.Stations {
		for _, n := range []float64{float64(s.X), float64(s.S), float64(s.D), float64(s.E), float64(s.UD), float64(s.UNum), float64(s.UInput), float64(s.UVal), float64(s.Ratio)} {
			fmt.Fprintf(w, "%s\t", quantity.Text(n, 5))
		}
		fmt.Fprintln(w)
	}
	if err := w.Flush(); err != nil {
		return err
	}
	s := c.Summary
	fmt.Fprintf(v.out, "\nn = %d, bias %s, MAE %s, RMSE %s, largest |E| %s\n", s.N, number5(s.Bias), number5(s.MAE), number5(s.RMSE), number5(s.MaxAbs))
	if c.Joint != nil {
		fmt.Fprintf(v.out, "|E| within u_val at %d, within k u_val at %d; joint statistic %s on %d, upper tail %s\n", s.WithinUVal, s.WithinKUVal, number5(c.Joint.Statistic), c.Joint.N, number5(c.Joint.P))
	}
	for _, x := range c.Crossings.Sim {
		fmt.Fprintf(v.out, "simulation changes sign at %s\n", number5(x))
	}
	for _, x := range c.Crossings.Ref {
		fmt.Fprintf(v.out, "reference changes sign at %s\n", number5(x))
	}
	if len(c.Outside) > 0 {
		fmt.Fprintf(v.out, "%d stations lie outside the simulation and were not compared\n", len(c.Outside))
	}
	v.notices(c.Notices)
	return nil
}

func number5(n quantity.Number) string { return quantity.Text(float64(n), 5) }

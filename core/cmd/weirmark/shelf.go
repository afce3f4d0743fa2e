package main

import (
	"fmt"
	"math"
	"strconv"
	"strings"
	"text/tabwriter"

	"weirmark/core/dataset"
	"weirmark/core/flow"
	"weirmark/core/message"
	"weirmark/datasets/shelf"
)

// lawStations is the number of stations of a law where none are asked for.
const lawStations = 101

// runShelf lists the reference curves, or prints one as a table that the
// reader takes: comments with its source, then stations, values and, where
// there is one, their uncertainty.
func runShelf(v *invocation) (int, error) {
	switch len(v.plain) {
	case 0:
		return message.Done, v.listShelf()
	case 1:
	default:
		return message.Refused, fmt.Errorf("give one name of the shelf; there are %d", len(v.plain))
	}
	if law, err := flow.Find(v.plain[0]); err == nil {
		return v.printLaw(law)
	}
	entry, err := dataset.Open(shelf.Files, v.plain[0])
	if err != nil {
		return message.Refused, fmt.Errorf("%q is neither a law nor a table of the shelf; weirmark shelf lists both", v.plain[0])
	}
	return v.printEntry(entry)
}

func (v *invocation) listShelf() error {
	w := tabwriter.NewWriter(v.out, 0, 0, 2, ' ', 0)
	fmt.Fprintln(w, "name\tkind\twhat")
	for _, l := range flow.Laws() {
		fmt.Fprintf(w, "%s\t%s\t%s\n", l.ID, l.Kind, l.Name)
	}
	names, err := dataset.Names(shelf.Files)
	if err != nil {
		return err
	}
	for _, name := range names {
		e, err := dataset.Open(shelf.Files, name)
		if err != nil {
			return err
		}
		fmt.Fprintf(w, "%s\t%s\t%s\n", name, e.Kind, e.Title)
	}
	return w.Flush()
}

// printLaw evaluates a law at the stations asked for.
func (v *invocation) printLaw(l flow.Law) (int, error) {
	parameters, err := pairs(v.flags["set"])
	if err != nil {
		return message.Refused, err
	}
	var stations []float64
	if text := v.flags["at"]; text != "" {
		stations, err = numbers(text)
	} else {
		stations, err = l.Stations(parameters, lawStations)
	}
	if err != nil {
		return message.Refused, err
	}
	c, err := l.Evaluate(parameters, stations)
	if err != nil {
		return message.Refused, err
	}
	fmt.Fprintf(v.out, "# law: %s\n# kind: %s\n# formula: %s\n# source: %s (%s)\n# uncertainty: %s\n", l.Name, l.Kind, l.Formula, l.Source, l.Reach, l.Uncertainty)
	if l.Caveat != "" {
		fmt.Fprintf(v.out, "# caveat: %s\n", l.Caveat)
	}
	fmt.Fprintf(v.out, "%s,%s\n", heading(l.Station.Name, l.Station.Unit), heading(l.Value.Name, l.Value.Unit))
	left := 0
	for i, x := range stations {
		if math.IsNaN(c.Values[i]) {
			left++
			continue
		}
		fmt.Fprintf(v.out, "%s,%s\n", digits10(x), digits10(c.Values[i]))
	}
	for _, n := range c.Notices {
		fmt.Fprintf(v.errs, "%s: %s [%s]\n", n.Severity, n.Text, n.Code)
	}
	if left == len(stations) {
		return message.Refused, fmt.Errorf("no station lies inside the range of %s", l.ID)
	}
	if left > 0 {
		return message.Incomplete, nil
	}
	return message.Done, nil
}

// printEntry prints one curve of a table, without the rows that must not be
// used.
func (v *invocation) printEntry(e dataset.Entry) (int, error) {
	curve := v.flags["curve"]
	if curve == "" && len(e.Curves) == 1 {
		curve = e.Curves[0].Name
	}
	rows := e.Curve(curve)
	if len(rows) == 0 {
		names := make([]string, len(e.Curves))
		for i, c := range e.Curves {
			names[i] = strconv.Quote(c.Name)
		}
		return message.Refused, fmt.Errorf("name a curve with --curve: %s", strings.Join(names, ", "))
	}
	fmt.Fprintf(v.out, "# table: %s, %s\n# kind: %s\n# source: %s (%s)\n# licence: %s\n# uncertainty: %s\n# coverage: %s\n", e.Title, curve, e.Kind, e.Source, e.Reach, e.Licence, e.Uncertainty, e.Coverage)
	for _, text := range e.Caveats {
		fmt.Fprintf(v.out, "# caveat: %s\n", text)
	}
	fmt.Fprintf(v.out, "%s,%s,u(%s)\n", heading(e.Station.Name, e.Station.Unit), heading(e.Value.Name, e.Value.Unit), e.Value.Name)
	for _, r := range rows {
		if r.Flag != dataset.Good {
			fmt.Fprintf(v.errs, "note: %s = %s left out (%s): %s\n", e.Station.Name, r.X.Text, r.Flag, r.Remark)
			continue
		}
		fmt.Fprintf(v.out, "%s,%s,%s\n", r.X.Text, r.Value.Text, r.U.Text)
	}
	return message.Done, nil
}

// heading names a column, with its unit unless it is a pure number.
func heading(name, unit string) string {
	if unit == "" || unit == "1" {
		return name
	}
	return name + " [" + unit + "]"
}

func digits10(v float64) string { return strconv.FormatFloat(v, 'g', 10, 64) }

// pairs reads NAME=VALUE,NAME=VALUE.
func pairs(text string) (map[string]float64, error) {
	all := map[string]float64{}
	if text == "" {
		return all, nil
	}
	for _, part := range strings.Split(text, ",") {
		name, value, found := strings.Cut(part, "=")
		v, err := number(strings.TrimSpace(value))
		if !found || err != nil {
			return nil, fmt.Errorf("--set is NAME=VALUE,NAME=VALUE; %q is not", part)
		}
		all[strings.TrimSpace(name)] = v
	}
	return all, nil
}

// numbers reads numbers parted by commas.
func numbers(text string) ([]float64, error) {
	var all []float64
	for _, part := range strings.Split(text, ",") {
		v, err := number(strings.TrimSpace(part))
		if err != nil {
			return nil, fmt.Errorf("--at: %w", err)
		}
		all = append(all, v)
	}
	return all, nil
}

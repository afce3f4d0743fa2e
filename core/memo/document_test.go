package memo

import (
	"fmt"
	"regexp"
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// words that a memo must not use of its own (wording 4.2).
var avoided = regexp.MustCompile(`(?i)\b(validated|validates|proves?|proven|guarantees?|certif\w+|confirms?|pass|passes|passed|fails?|failed|agrees well|good agreement|excellent|good|within error bars|grid[- ]independent|fully converged|exact|true value|over-?predicts?|under-?predicts?|better|safe|conservative|significant|significantly|robust|auto-?validated|approved by|outliers?|confident|accurate|correct)\b`)

func TestOwnWording(t *testing.T) {
	for name, in := range map[string]Input{"sample": sample(), "nothing": {}, "checked": checked()} {
		content := parse(t, HTML(Document(in))).all("main")[0].content
		if len(content) < 5000 {
			t.Errorf("%s: only %d characters were looked at", name, len(content))
		}
		for _, at := range avoided.FindAllStringIndex(content, -1) {
			t.Errorf("%s: %q in …%s…", name, content[at[0]:at[1]], content[max(at[0]-40, 0):min(at[1]+40, len(content))])
		}
	}
	for _, sentence := range []string{"the model is validated", "This PASS is good", "grid-independent result", "it proves nothing"} {
		if !avoided.MatchString(sentence) {
			t.Errorf("the list does not find the word in %q", sentence)
		}
	}
}

func checked() Input {
	in := sample()
	in.Report.Checked = study.Signature{Name: "Checker", Date: "2026-03-10"}
	in.Report.Approved = study.Signature{Name: "Test lead", Date: "2026-03-11"}
	in.Report.Cells[2].Use, in.Report.Cells[2].Kind = study.UseTuning, study.KindSimulation
	return in
}

func TestSections(t *testing.T) {
	titles := []string{"1\u2002Statements", "2\u2002Summary of all cells", "3\u2002Comparisons", "4\u2002Methods", "5\u2002Assumptions, guesses and choices", "6\u2002Evidence this memo does not hold",
		"7\u2002Code verification evidence", "8\u2002Findings in the files and the study"}
	rest := []string{"Files", "Log", "Limits of use", "Roles"}
	for name, row := range map[string]struct {
		in   Input
		more []string
	}{"sample": {withData(), []string{"Data of the figures"}}, "nothing": {Input{}, nil}} {
		root := parse(t, HTML(Document(row.in)))
		var got []string
		for _, h := range root.all("h2") {
			got = append(got, h.content)
		}
		want := append([]string{}, titles...)
		for _, title := range append(append([]string{}, row.more...), rest...) {
			want = append(want, fmt.Sprintf("%d\u2002%s", len(want)+1, title))
		}
		if fmt.Sprint(got) != fmt.Sprint(want) {
			t.Errorf("%s: sections %q, want %q", name, got, want)
		}
		for _, s := range root.all("section") {
			if len(s.children) < 2 {
				t.Errorf("%s: section %s is empty", name, s.attr["id"])
			}
		}
	}
	var cells []string
	for _, h := range parse(t, HTML(Document(sample()))).all("h3") {
		cells = append(cells, h.content)
	}
	if len(cells) != 4 || cells[2] != "3.3\u2002Case C1 · drag coefficient Cd · model B" {
		t.Errorf("cells %q", cells)
	}
}

// withData is the sample with a table behind the figure of no cell.
func withData() Input {
	in := sample()
	in.Figures[2].Head, in.Figures[2].Rows = []string{"cell", "from", "to"}, [][]string{{"Cd, B", "−0.6", "+1.0"}}
	return in
}

// What limits a statement stands inside its box; what the sentence says is not
// said twice, unless there is no sentence.
func TestLimitsStandInTheBox(t *testing.T) {
	in := checked()
	in.Statements = append(in.Statements, Statement{Case: "C9", Quantity: "q", Model: "m", Phrases: []study.Phrase{{Text: "Stray."}}})
	in.Report.Cells[2].Requirement.Outcome = study.NotMet
	alone := in
	alone.Statements = nil
	always := []string{
		"2 of 26 stations lie outside the simulated range",
		"2 stations excluded by a person; the reasons are in the details. Of these, 1 after the comparison had been seen.",
		"recorded after the comparison had been seen",
		"Open: No experimental uncertainty was given. Further open points: 1.",
		"This memo is supporting evidence only.",
	}
	withSentence := []string{"The report holds no results for this statement.", "Items marked guessed or assumed: 3."}
	withoutSentence := []string{
		"set by decision owner, 2026-03-02: not met",
		"Open: The grid factor 1.15 is assumed. State why it may be used.",
		"No accuracy requirement is recorded",
		"The application point (α = 11°) lies outside the compared conditions (α 4.2° to 9°).",
		"No statement was made of this cell.",
		"The joint statistic 125.03 exceeds its 95 % point 36.41.",
		"Changes if: k_num = 2 (requirement: shown).",
		"These data were used to set the model",
		"The reference is another simulation",
		"Items marked guessed or assumed: 1.",
	}
	box := parse(t, HTML(Document(in))).byID("statements")
	for _, row := range []struct {
		name, content string
		want, no      []string
	}{
		{"with sentences", box.content, append(withSentence, always...), append(withoutSentence, "not been independently reviewed")},
		{"without", parse(t, HTML(Document(alone))).byID("statements").content, append(withoutSentence, always...), withSentence},
		{"draft", parse(t, HTML(Document(sample()))).byID("statements").content, []string{"not been independently reviewed"}, nil},
	} {
		for _, want := range row.want {
			if !strings.Contains(row.content, want) {
				t.Errorf("%s: the box does not say %q", row.name, want)
			}
		}
		for _, no := range row.no {
			if strings.Contains(row.content, no) {
				t.Errorf("%s: the box says %q", row.name, no)
			}
		}
	}
	marks := map[string]string{}
	for _, s := range box.all("span") {
		marks[s.attr["class"]] += s.content + "|"
	}
	for mark, want := range map[string]string{"missing": "experimental uncertainty", "guessed": "reference pressure common", "assumed": "1.15", "outcome": "not resolved", "number": "+1.2"} {
		if !strings.Contains(marks[mark], want+"|") {
			t.Errorf("%q is not marked %s: %q", want, mark, marks[mark])
		}
	}
}

func TestStatusOfTheMemo(t *testing.T) {
	for _, row := range []struct {
		in   Input
		want string
	}{{sample(), "draft, not checked"}, {checked(), "recorded as approved"}} {
		page := string(HTML(Document(row.in)))
		if !strings.Contains(page, "<td>"+row.want+"</td>") || !strings.Contains(page, strings.ReplaceAll(row.want, ",", "\\00002c ")) {
			t.Errorf("the title block or the running head does not say %q", row.want)
		}
	}
}

// Without u_D nothing that needs it is printed, and its absence is named.
func TestUnknownIsNotZero(t *testing.T) {
	in := sample()
	c := &in.Report.Cells[0]
	for i := range c.Stations {
		s := &c.Stations[i]
		s.UD, s.UVal, s.Ratio, s.Lo, s.Hi, s.Reading = quantity.None, quantity.None, quantity.None, quantity.None, quantity.None, ""
	}
	c.Joint, c.Summary.MaxRatio, c.Sources = nil, quantity.None, nil
	content := parse(t, HTML(Document(in))).byID("cell-1").content
	for _, want := range []string{"Not known at any station, and not zero: uD, uin, uval, |E|/uval, from, to.", "No joint statistic is available", "No source is recorded. Blank is not zero.", "not available: uval is not known"} {
		if !strings.Contains(content, want) {
			t.Errorf("the cell does not say %q", want)
		}
	}
}

func TestStationTables(t *testing.T) {
	tables := func(in Input, id string) []*element {
		var found []*element
		for _, e := range parse(t, HTML(Document(in))).byID(id).all("table") {
			if strings.HasPrefix(e.attr["class"], "stations") {
				found = append(found, e)
			}
		}
		return found
	}
	one := tables(sample(), "cell-1")
	if len(one) != 1 || len(one[0].all("tr")) != 25 || len(one[0].all("th")) != 13 {
		t.Fatalf("one table of 24 stations and 13 columns was expected")
	}
	wide := sample()
	for i := range wide.Report.Cells[0].Stations {
		s := &wide.Report.Cells[0].Stations[i]
		s.S, s.D, s.E, s.Lo, s.Hi = s.S*1e6, s.D*1e6, s.E*1e6, s.Lo*1e6, s.Hi*1e6
	}
	if two := tables(wide, "cell-1"); len(two) != 2 || len(two[0].all("th"))+len(two[1].all("th")) != 14 {
		t.Errorf("a table too wide for the page is not parted in two")
	}
	long := sample()
	c := &long.Report.Cells[0]
	for len(c.Stations) < 1000 {
		c.Stations = append(c.Stations, c.Stations[:24]...)
	}
	last := len(c.Stations) - 1
	cut := tables(long, "cell-1")[0]
	if n := len(cut.all("tr")); n != rowLimit+1 {
		t.Errorf("a long table has %d rows", n)
	}
	if content := parse(t, HTML(Document(long))).byID("cell-1").content; !strings.Contains(content, fmt.Sprintf("prints 120 of %d stations", last+1)) {
		t.Error("a shortened table does not say so")
	}
	rows := cut.all("tr")
	if f := rows[len(rows)-1].all("data")[0].attr["data-field"]; f != fmt.Sprintf("cells.0.stations.%d.x", last) {
		t.Errorf("the last row is %s", f)
	}
}

func TestSpread(t *testing.T) {
	for _, row := range []struct {
		n, limit int
		want     string
	}{{0, 5, "[]"}, {1, 5, "[0]"}, {5, 5, "[0 1 2 3 4]"}, {9, 5, "[0 2 4 6 8]"}, {100, 2, "[0 99]"}} {
		if got := fmt.Sprint(spread(row.n, row.limit)); got != row.want {
			t.Errorf("spread(%d, %d) = %s, want %s", row.n, row.limit, got, row.want)
		}
	}
}

func TestRunsConditionsAndApplication(t *testing.T) {
	root := parse(t, HTML(Document(sample())))
	for _, row := range []struct {
		id   string
		want []string
		no   []string
	}{
		{"cell-3", []string{
			"G3c1-g3-monitor.datsettled401 to 6000.030210002.0e−74.0e−7mean over the last third; drift −0.0001\u202f% per 100 iterations (−3.6e−8); small is 0.000041; to come by geometric extrapolation −1.5e−8; Uiter/Ugrid 0.00097 (aim 0.1 or less)",
			"G4 (lift coefficient, pure number)c1-g4-monitor.datcycling111 to 6000.0299510.0000710.00014mean over whole cycles; small is 0.000041; period 70, 7 in the window; half-range 0.00012; Uiter/Ugrid 0.35 (aim 0.1 or less); U_iter entered, not computed: from a longer run on the same grid",
			"150 rows left out in front, 1051 averaged, standard deviation 0.00061, correlation time 0.39, independent samples 26.9; u by 5 batches 0.00013; u from successive rows alone 0.00012; u is 31.8\u202f% of unum",
			"mass1.2041.2038+0.000201.204 (inflow)+0.017\u202f%closed; small is 0.14\u202f%, a tenth of U_grid; as a part of the quantity 0.012 of Ugrid; 0.014 of |E|",
			"energy1010.4−0.408 (heat exchanged)−5.0\u202f%not closed; small is 0.10\u202f%, a thousandth, by habit; effect of at most ±0.00007 entered: two runs with and without the source",
			"continuity2.10.710.021 decades per 200 over 401 to 601 (stalled)", "(c1-g4-single.dat) differ by 3.1e−7 (root mean square) and 3.3e−7 (most)",
			"unum is 0.000364 by the root of the squares of its parts, 0.000479 by their sum, as where they depend on each other; the root is used.", "With 7.3 effective degrees of freedom, 95\u202f% needs k = 2.34",
		}, []string{"Tu"}},
		{"cell-1", []string{
			"α [°]4.254.2−0.0021simulation moved to the condition of the data: run at the setting of the sheet", "Re11000001200000–differs, not handled", "Tu [%]0.40.4–the same on both sides",
			"house limit: 0 to 0.0500, met", "narrow: 0 to 0.0200, not met", "nose0.02 to 0.39+0.0123", "tap leaked, see the log of the testyes",
			"The reading turns where the correlation of reference pressure is 0.684 (50.98 when independent, 27.05 when fully shared). Without nose: 14.20 on 15, 95 % point 25.00, does not exceed it.",
		}, []string{"Runs settled"}},
		{"summary", []string{"Application point α = 11°: outside the compared conditions (α 4.2° to 9°).", "A − B24+0.0286 ± 0.0013resolved0.0310 to 0.0165"}, nil},
	} {
		content := strings.ReplaceAll(root.byID(row.id).content, "\n", "")
		for _, want := range row.want {
			if !strings.Contains(content, strings.ReplaceAll(want, "95\u202f%", "95 %")) {
				t.Errorf("%s does not say %q", row.id, want)
			}
		}
		for _, no := range row.no {
			if strings.Contains(content, no) {
				t.Errorf("%s says %q", row.id, no)
			}
		}
	}
}

func TestKindAndUseOfTheReference(t *testing.T) {
	for _, row := range []struct{ kind, use, want string }{
		{study.KindTest, study.UseValidation, ""},
		{study.KindLaw, study.UseValidation, "The reference is a law"},
		{study.KindCorrelation, "", "The reference is a correlation"},
		{study.KindSimulation, "", "another simulation: this says nothing of the error against measurement."},
		{study.KindTest, study.UseTuning, "agreement here is fit quality."},
	} {
		in := sample()
		in.Report.Cells[2].Kind, in.Report.Cells[2].Use = row.kind, row.use
		content := parse(t, HTML(Document(in))).byID("cell-3").content
		if row.want == "" && (strings.Contains(content, "The reference is a") || strings.Contains(content, "fit quality")) || !strings.Contains(content, row.want) {
			t.Errorf("kind %q, use %q: %q is missing, or said of a test kept apart", row.kind, row.use, row.want)
		}
	}
}

// Figures stand where their matter is told.
func TestFiguresStandByTheirMatter(t *testing.T) {
	in := sample()
	for _, kind := range []string{"budget", "grids", "monitors", "intervals"} {
		in.Figures = append(in.Figures, Figure{Case: "C1", Quantity: "drag coefficient", Model: "B", ID: "c3-" + kind, Caption: "picture of " + kind, SVG: "<svg/>"})
	}
	content := parse(t, HTML(Document(in))).byID("cell-3").content
	last := 0
	for _, part := range []string{"picture of intervals", "Runs settled", "picture of monitors", "Grid study", "picture of grids", "Uncertainty sources", "picture of budget", "Requirement"} {
		at := strings.Index(content, part)
		if at < last {
			t.Errorf("%q stands at %d, after %d was expected", part, at, last)
		}
		last = at
	}
}

func TestFiguresOfNoCellAreNamed(t *testing.T) {
	in := sample()
	in.Figures = append(in.Figures, Figure{Case: "C7", Title: "Lost picture", SVG: "<svg/>"})
	root := parse(t, HTML(Document(in)))
	if n := len(root.all("figure")); n != 3 {
		t.Errorf("%d figures", n)
	}
	if !strings.Contains(root.byID("figure-data").content, "Lost picture") {
		t.Error("a figure vanished without a word")
	}
}

func TestSay(t *testing.T) {
	got := say("a *b*_{c}^{d} {} * e", text("{}*x*"))
	want := []Node{{Kind: Text, Text: "a "}, {Kind: Italic, Text: "b"}, {Kind: Sub, Text: "c"}, {Kind: Sup, Text: "d"}, {Kind: Text, Text: " "}, {Kind: Text, Text: "{}*x*"}, {Kind: Text, Text: " "}, {Kind: Italic, Text: " e"}}
	if fmt.Sprint(got) != fmt.Sprint(want) {
		t.Errorf("got %v\nwant %v", got, want)
	}
}

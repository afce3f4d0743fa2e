package message

import (
	"math"
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

// demoReport evaluates the demo study.
func demoReport(t *testing.T) study.Report {
	t.Helper()
	r := study.Evaluate(Demo(), study.Options{Alternatives: true})
	if len(r.Cells) != 4 {
		t.Fatalf("the demo has %d cells, want 4", len(r.Cells))
	}
	return r
}

func cellOf(t *testing.T, r study.Report, symbol, model string) *study.Cell {
	t.Helper()
	for i := range r.Cells {
		if r.Cells[i].Symbol == symbol && r.Cells[i].Model == model {
			return &r.Cells[i]
		}
	}
	t.Fatalf("no cell %s of model %s", symbol, model)
	return nil
}

// half returns half a unit of the last of n decimals, the tolerance of a
// value that is printed with n decimals.
func half(n int) float64 { return 0.5*math.Pow(10, -float64(n)) + 1e-12 }

type printed struct {
	name     string
	got      study.Number
	want     float64
	decimals int
}

func check(t *testing.T, rows []printed) {
	t.Helper()
	for _, r := range rows {
		if math.Abs(float64(r.got)-r.want) > half(r.decimals) {
			t.Errorf("%s = %v, want %v to %d decimals", r.name, r.got, r.want, r.decimals)
		}
	}
}

// The numbers of the invented campaign, as its design prints them (6.1); the
// design computed them apart from this program.
func TestDemoDrag(t *testing.T) {
	r := demoReport(t)
	a, b := cellOf(t, r, "Cd", "A"), cellOf(t, r, "Cd", "B")
	d := .02960
	check(t, []printed{
		{"order A", a.Grids.Order, 1.99, 2}, {"order B", b.Grids.Order, 2.01, 2},
		{"U A", a.Grids.U, .000627, 6}, {"U B", b.Grids.U, .000411, 6},
		{"GCI A", a.Grids.GCI, .0197, 4}, {"GCI B", b.Grids.GCI, .0137, 4},
		{"extrapolated A", a.Grids.Extrapolated, .03128, 5}, {"extrapolated B", b.Grids.Extrapolated, .02962, 5},
		{"D", study.Number(a.Stations[0].D), d, 5},
		{"scatter", a.Sources[0].U, .000073, 6},
		{"u_D", a.Stations[0].UD, .00040, 5},
		{"E A", a.Stations[0].E, .00218, 5}, {"E B", b.Stations[0].E, .00035, 5},
		{"u_num A", a.Stations[0].UNum, .000545, 6}, {"u_num B", b.Stations[0].UNum, .000357, 6},
		{"u_val A", a.Stations[0].UVal, .000721, 6}, {"u_val B", b.Stations[0].UVal, .000592, 6},
		{"ratio A", a.Stations[0].Ratio, 3.0, 1}, {"ratio B", b.Stations[0].Ratio, .59, 2},
		{"lower end A", a.Stations[0].Lo / study.Number(d), .025, 3}, {"upper end A", a.Stations[0].Hi / study.Number(d), .122, 3},
		{"lower end B", b.Stations[0].Lo / study.Number(d), -.028, 3}, {"upper end B", b.Stations[0].Hi / study.Number(d), .052, 3},
		{"u_val that resolves B", b.Requirement.UValNeeded, .000565, 6}, {"u_num that resolves B", b.Requirement.UNumNeeded, .000311, 6},
	})
	if a.Requirement.Outcome != study.NotResolved || b.Requirement.Outcome != study.NotResolved {
		t.Errorf("outcomes %q and %q, want both not resolved", a.Requirement.Outcome, b.Requirement.Outcome)
	}
	if a.Stations[0].Reading != study.SignResolved || b.Stations[0].Reading != study.WithinNoise {
		t.Errorf("readings %q and %q", a.Stations[0].Reading, b.Stations[0].Reading)
	}
	shares := map[string]float64{}
	for _, s := range b.Sources {
		shares[s.Of] += float64(s.Share)
	}
	check(t, []printed{{"share num", study.Number(shares[study.OfNumerical]), .36, 2}, {"share input", study.Number(shares[study.OfInput]), .18, 2}, {"share D", study.Number(shares[study.OfData]), .46, 2}})
	flips := false
	for _, f := range b.Fragile {
		if f.Change == "k_num = 2" && f.Outcome == study.Shown && f.Detail == "−2.3 % to +4.7 %" {
			flips = true
			// U of the grids over the u_num that resolves it: .000411/.000311.
			at := float64(b.Grids.U) / float64(b.Requirement.UNumNeeded)
			if f.At == nil || math.Abs(float64(*f.At)-at) > .005 || math.Abs(at-.000411/.000311) > .005 {
				t.Errorf("Cd of B turns at k_num = %v, want %v", f.At, at)
			}
		}
	}
	if !flips {
		t.Errorf("Cd of B does not become shown with k_num = 2: %+v", b.Fragile)
	}
}

func TestDemoPressure(t *testing.T) {
	r := demoReport(t)
	a, b := cellOf(t, r, "Cp", "A"), cellOf(t, r, "Cp", "B")
	check(t, []printed{
		{"u_val", a.Stations[7].UVal, .0213, 4},
		{"largest ratio A", a.Summary.MaxRatio, 1.92, 2}, {"largest ratio B", b.Summary.MaxRatio, 1.29, 2},
		{"RMS A", a.Summary.RMSE, .0310, 4}, {"RMS B", b.Summary.RMSE, .0165, 4},
		{"statistic A", a.Joint.Statistic, 27.0, 1}, {"statistic B", b.Joint.Statistic, 125.0, 1},
		{"independent A", a.Joint.Independent, 51.0, 1}, {"independent B", b.Joint.Independent, 14.5, 1},
		{"u_num shared A", a.Joint.NumShared, 38.0, 1}, {"u_num shared B", b.Joint.NumShared, 180.6, 1},
		{"offset A", a.Joint.Offset, .0301, 4}, {"offset B", b.Joint.Offset, .0016, 4},
		{"u of offset", a.Joint.UOffset, .0201, 4},
		// The design prints 2.26, the difference of its rounded 27.05 and 24.79;
		// (offset/u)² with all digits is 2.2547.
		{"offset part A", a.Joint.OffsetPart, 2.2547, 4}, {"offset part B", b.Joint.OffsetPart, .006, 3},
		{"remainder A", a.Joint.Remainder, 24.79, 2}, {"remainder B", b.Joint.Remainder, 125.03, 2},
		{"95 % point", a.Joint.Reference, 36.4, 1},
	})
	if a.Summary.Tested-a.Summary.WithinKUVal != 0 || b.Summary.Tested-b.Summary.WithinKUVal != 0 {
		t.Error("a tap lies beyond 2 u_val")
	}
	if a.Joint.Exceeds || !b.Joint.Exceeds || !b.Joint.RemainderExceeds || a.Joint.OffsetResolved {
		t.Errorf("joint words: A %+v, B %+v", a.Joint, b.Joint)
	}
}

// Each way to resolve a requirement, entered as the uncertainty it asks for,
// gives the outcome it promises: D3 of the design closes its loop.
func TestWaysResolve(t *testing.T) {
	b := cellOf(t, demoReport(t), "Cd", "B")
	ways := b.Requirement.Ways
	if len(ways) < 2 || ways[0].Reduction > ways[len(ways)-1].Reduction {
		t.Fatalf("ways %+v", ways)
	}
	for i, way := range ways {
		s := Demo()
		q := &s.Questions[0]
		switch way.Of {
		case study.OfNumerical:
			q.Choices.KNum *= float64(way.Now) / float64(way.Needed)
		default:
			found := false
			for j := range q.Sources {
				if q.Sources[j].Name == way.Source {
					q.Sources[j].Value *= float64(way.Needed) / float64(way.Now)
					found = true
				}
			}
			if !found {
				t.Fatalf("%s is no source", way.Source)
			}
		}
		if got := cellOf(t, study.Evaluate(s, study.Options{}), "Cd", "B").Requirement.Outcome; got != study.Shown {
			t.Errorf("way %d, %s to %v: %s", i, way.Source, way.Needed, got)
		}
	}
}

// What removes or doubts a piece of evidence, and the blank that must appear.
func TestStatementNeedsItsEvidence(t *testing.T) {
	rows := []struct {
		name    string
		mutate  func(*study.Study)
		blank   string
		stated  bool // still stated, provisionally
		symbol  string
		outcome bool // the requirement is still judged in the text
	}{
		{"no reference", func(s *study.Study) { s.Slips[0].Role.Value = study.Unused }, "reference data", false, "Cd", false},
		{"no grids", func(s *study.Study) { s.Slips[1].Size.Column.Value = ""; s.Slips[2].Size.Column.Value = "" }, "the number of cells", false, "Cd", false},
		{"role guessed", func(s *study.Study) { s.Slips[0].Role.By = study.Guessed }, "acceptance of the role", false, "Cd", false},
		{"unit guessed", func(s *study.Study) { s.Slips[2].Y.Unit.By = study.Guessed }, "acceptance of the unit of Cd B", false, "Cd", false},
		{"unit missing", func(s *study.Study) { s.Slips[2].Y.Unit = study.Field{} }, "the unit of Cd B", false, "Cd", false},
		{"coverage of a source missing", func(s *study.Study) { s.Questions[0].Sources[0].Coverage = study.Field{} }, "the coverage of balance calibration and corrections", false, "Cd", false},
		{"coverage unknown", func(s *study.Study) { s.Slips[3].UFactor.Value = "unknown" }, "the coverage of u_D", false, "Cp", false},
		{"coverage guessed", func(s *study.Study) { s.Slips[3].UFactor.By = study.Guessed }, "acceptance of the coverage of u(Cp)", false, "Cp", false},
		{"no u_num", func(s *study.Study) { s.Questions[1].Sources = s.Questions[1].Sources[:1] }, "the numerical uncertainty", false, "Cp", false},
		{"no u_D", func(s *study.Study) {
			s.Questions[1].Sources = s.Questions[1].Sources[1:]
			s.Slips[3].U.Column = study.Field{}
		}, "the uncertainty of the data", false, "Cp", false},
		{"case guessed", func(s *study.Study) { s.Slips[0].Case.By = study.Guessed }, "acceptance of the case", false, "Cd", false},
		{"no requirement", func(s *study.Study) { s.Questions[0].Requirement = nil }, "an accuracy requirement", true, "Cd", false},
		{"late requirement", func(s *study.Study) { s.Questions[0].Requirement.Late = true }, "a requirement recorded before results were seen", true, "Cd", true},
		{"no input uncertainty", func(s *study.Study) { s.Questions[0].Sources = s.Questions[0].Sources[:1] }, "the input uncertainty", true, "Cd", true},
		{"kind unknown", func(s *study.Study) { s.Questions[0].Kind = study.Field{} }, "the kind of reference", true, "Cd", true},
		{"use unknown", func(s *study.Study) { s.Questions[0].Use = study.Field{} }, "what the data were used for", true, "Cd", true},
		{"changed byte", func(s *study.Study) { s.Files[0].Data = append([]byte{}, append(s.Files[0].Data, ' ')...) }, "the unaltered file C1-balance.csv", false, "Cd", false},
	}
	plain := demoReport(t)
	for _, row := range rows {
		s := Demo()
		row.mutate(s)
		r := study.Evaluate(s, study.Options{})
		c := cellOf(t, r, row.symbol, "B")
		text := sentence.Of(c).Text()
		if !strings.Contains(text, "["+row.blank+"]") {
			found := false
			for _, o := range c.Open {
				found = found || o.Missing == row.blank
			}
			if !found || row.stated {
				t.Errorf("%s: no blank %q in %q", row.name, row.blank, text)
			}
		}
		if c.Withheld == row.stated {
			t.Errorf("%s: withheld %v, open %+v", row.name, c.Withheld, c.Open)
		}
		if before := sentence.Of(cellOf(t, plain, row.symbol, "B")).Text(); before == text {
			t.Errorf("%s: the sentence did not change", row.name)
		}
		judged := strings.Contains(text, "neither shown nor refuted") || strings.Contains(text, " is shown")
		if judged != row.outcome && row.symbol == "Cd" {
			t.Errorf("%s: judged %v in %q", row.name, judged, text)
		}
	}
}

// The words that say more than numbers can must not come from us.
func TestStatementsKeepTheirWords(t *testing.T) {
	r := demoReport(t)
	for i := range r.Cells {
		text := strings.ToLower(sentence.Of(&r.Cells[i]).Text())
		for _, word := range []string{"validated", "proves", "guarantee", "certif", "passes", "passed", "fails", "failed", "agrees well", "excellent", "good", "exact", "accurate", "robust", "conservative", "significant", "outlier", "better"} {
			if strings.Contains(text, word) {
				t.Errorf("the statement says %q: %s", word, text)
			}
		}
	}
	simulation := Demo()
	simulation.Questions[0].Kind.Value = study.KindSimulation
	tuned := Demo()
	tuned.Questions[0].Use.Value = study.UseTuning
	for want, s := range map[string]*study.Study{"Code-to-code comparison": simulation, "agreement here is fit quality": tuned} {
		r := study.Evaluate(s, study.Options{})
		if text := sentence.Of(cellOf(t, r, "Cd", "A")).Text(); !strings.Contains(text, want) {
			t.Errorf("%q is missing in %q", want, text)
		}
	}
}

// Every number of a report is the same, as printed, whichever way it was
// evaluated: alone or with the alternatives beside it.
func TestEvaluateIsDeterministic(t *testing.T) {
	first := encode(demoReport(t))
	for range 3 {
		if again := encode(demoReport(t)); string(again) != string(first) {
			t.Fatal("two evaluations of the demo differ")
		}
	}
	if !strings.Contains(string(first), `"statistic":`) || quantity.None.Known() {
		t.Fatal("the report holds no statistic")
	}
}

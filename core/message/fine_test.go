package message

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"weirmark/core/study"
)

// tableOf returns the table of a course by the start of its title.
func tableOf(t *testing.T, v *View, course int, title string) Table {
	t.Helper()
	for _, table := range v.Courses[course].Tables {
		if strings.HasPrefix(table.Title, title) {
			return table
		}
	}
	t.Fatalf("no table %q in course %d", title, course+1)
	return Table{}
}

func (t Table) cells() string {
	rows := []string{strings.Join(t.Head, " | ")}
	for _, r := range t.Rows {
		rows = append(rows, strings.Join(r, " | "))
	}
	return strings.Join(rows, "\n")
}

func viewOf(t *testing.T, s *study.Study) *View {
	t.Helper()
	v, err := (&Session{study: s}).view()
	if err != nil {
		t.Fatal(err)
	}
	return v
}

// TestFineEnoughOnThePage: the second course answers in one line with at most
// three numbers and one picture, and shows the family, every rule and what is
// entered of the grids.
func TestFineEnoughOnThePage(t *testing.T) {
	s := family([4]float64{2.64, 2.16, 2.04, 2.01}, "")
	for field, value := range map[string]string{"family.similar": study.SimilarYes, "family.regime": study.RegimeScales, "family.target": "0.005", "family.wall": "wall functions"} {
		if err := s.Set(study.Target{Kind: "question", ID: "C1|drag", Field: field}, value, "", ""); err != nil {
			t.Fatal(err)
		}
	}
	v := viewOf(t, s)
	c := v.Courses[1]
	if c.Question != "Is the grid fine enough for this quantity?" || strings.Count(c.Answer, ". ") > 0 || len(c.Numbers) != 3 || len(c.Figures) != 1 {
		t.Errorf("%q, %+v, %d figures", c.Answer, c.Numbers, len(c.Figures))
	}
	rows := tableOf(t, v, 1, "The family").cells()
	// u_num 0.0125/1.15 to 0.005: (0.0109/0.005)^(3/2) of 512 000 cells, and 4/3 of that.
	cells := 512e3 * math.Pow(0.0125/1.15/0.005, 1.5)
	for _, want := range []string{"similarity | similar", "wall treatment | wall functions", "runs | scale-resolving", "G3 to G4 2.000", "divided by 1.15: the error of the fine grid", "to bring u_num to 0.00500", fmt.Sprintf("about %.2f million cells", cells/1e6)} {
		if !strings.Contains(rows, want) {
			t.Errorf("no %q in\n%s", want, rows)
		}
	}
	if !strings.Contains(strings.Join(c.Notes, " "), "Re^3 (common practice, no source)") {
		t.Errorf("%q", c.Notes)
	}
	if n := len(tableOf(t, v, 1, "The same values by every rule").Rows); n != 7 {
		t.Errorf("%d rules", n)
	}
	entered := 0
	for _, l := range v.Lists {
		if l.Course == 1 {
			for _, item := range l.Items {
				entered += len(item.Entries)
			}
		}
	}
	if entered < 14 {
		t.Errorf("%d entries of the second course", entered)
	}
}

// TestStepsAndCodeOnThePage: the study of the time step and the evidence on the
// code are tables of the second course, and stand in the memo.
func TestStepsAndCodeOnThePage(t *testing.T) {
	s := family([4]float64{2.64, 2.16, 2.04, 2.01}, "")
	yes := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	for id, text := range map[string]string{"dt": "dt,Cd\n1,2.01\n2,2.02\n4,2.04\n", "e": "h,e\n0.1,0.01\n0.05,0.0025\n0.025,0.000625\n"} {
		s.Files = append(s.Files, study.File{ID: id, Name: id + ".csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	}
	one := yes("1")
	s.Slips = append(s.Slips,
		study.Slip{ID: "s8", File: "dt", Role: yes(study.StepValues), Case: yes("C1"), Quantity: yes("drag"), Model: yes("A"), Step: study.ColumnUse{Column: yes("dt"), Unit: yes("s")}, Y: study.ColumnUse{Column: yes("Cd"), Unit: one}},
		study.Slip{ID: "s9", File: "e", Role: yes(study.ExactErrors), Case: yes("V1"), Quantity: yes("u"), Model: yes("A"), X: study.ColumnUse{Column: yes("h"), Unit: yes("m")}, Y: study.ColumnUse{Column: yes("e"), Unit: yes("m/s")}})
	v := viewOf(t, s)
	if got := tableOf(t, v, 1, "Time steps: monotone, observed order 1.00 against 2.0").cells(); !strings.Contains(got, "4.000 | – | 2.04000") {
		t.Errorf("%s", got)
	}
	if got := tableOf(t, v, 1, "Uncertainty of the time step").cells(); !strings.Contains(got, "U, 95 % | 0.0125") || !strings.Contains(got, "extrapolated | 2.00000") {
		t.Errorf("%s", got)
	}
	if got := tableOf(t, v, 1, "Code verification: u at V1, e error, observed order 2.00").cells(); !strings.Contains(got, "0.02500 | 0.0006250 | 2.00") {
		t.Errorf("%s", got)
	}
	pages, err := writeMemo(&Session{study: s}, &Request{}, nil, &Reply{})
	if err != nil {
		t.Fatal(err)
	}
	memo := plainText(string(pages[0]))
	for _, want := range []string{"Code verification evidence", "Observed order over all grids: 2.00", "Time step", "Observed order in time"} {
		if !strings.Contains(memo, want) {
			t.Errorf("the memo does not say %q", want)
		}
	}
}

// TestBorrowedOnThePage: the answer says that the grid uncertainty is borrowed
// and not computed, from whom, and with which penalty.
func TestBorrowedOnThePage(t *testing.T) {
	s := family([4]float64{2.64, 2.16, 2.04, 2.01}, "")
	yes := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	y := study.ColumnUse{Column: yes("Cd"), Unit: yes("1")}
	for id, text := range map[string]string{"one": "Cd\n3.01\n", "data": "Cd\n3\n"} {
		s.Files = append(s.Files, study.File{ID: id, Name: id + ".csv", SHA256: study.Hash([]byte(text)), Data: []byte(text)})
	}
	s.Slips = append(s.Slips,
		study.Slip{ID: "s8", File: "one", Role: yes(study.Simulation), Case: yes("C2"), Quantity: yes("drag"), Model: yes("A"), Grid: yes("G4"), Cells: yes("512000"), Y: y},
		study.Slip{ID: "s9", File: "data", Role: yes(study.Reference), Case: yes("C2"), Quantity: yes("drag"), Y: y})
	penalty := 1.5
	q := s.Questions[0]
	q.Case, q.Family = "C2", &study.Family{Borrow: &study.Borrowing{Case: "C1", Quantity: "drag", Penalty: &penalty, Why: "the same grids"}}
	s.Questions = append(s.Questions, q)
	c := cellAt(t, study.Evaluate(s, study.Options{}), "C2", "drag", "A")
	u := 0.0125 / 1.15 / 2.01 * 1.5 * 3.01
	if math.Abs(float64(c.Borrowed.U)-u) > 1e-9 {
		t.Errorf("%+v, want %v", c.Borrowed, u)
	}
	if answer := gridAnswer(c); !strings.Contains(answer, "borrowed from drag at C1 with the penalty 1.50, not computed") {
		t.Errorf("%q", answer)
	}
	if n := len(gridTables(c)); n != 0 {
		t.Errorf("%d tables of grids that there are not", n)
	}
}

// TestEnteredIsNotComputed: without grids the answer names what was entered,
// not what was computed of the iteration.
func TestEnteredIsNotComputed(t *testing.T) {
	c := cellAt(t, study.Evaluate(DemoWorked(), study.Options{}), "C2", demoDragName, "A")
	if answer := gridAnswer(c); !strings.HasPrefix(answer, "No grid family; u_num was entered (three times the range") {
		t.Errorf("%q", answer)
	}
}

package memo

import (
	"strings"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// The six orders, a change from another case and the order of recording stand
// in the memo with every number.
func TestOrderingTrendAndRecording(t *testing.T) {
	in := sample()
	c := &in.Report.Cells[0]
	c.Marine = &study.MarineLine{K: 2.13, E: .0311, UV: .0427, Required: .0553, Orderings: []study.OrderingLine{{Order: "|E| ≤ U_V ≤ U_reqd", Words: "within", N: 17}, {Order: "U_reqd < U_V < |E|", Words: "larger", N: 7}}}
	c.Trend = &study.TrendLine{From: "C0", S: .312, D: .287, E: .0251, U: .0081, Apart: .0193, Lo: .0089, Hi: .0413, Reading: study.SignResolved, Common: []string{"zero", "angle"}}
	c.Recorded = []study.RecordedLine{{What: "comparison shown, requirement not set", In: 41, At: "09:05"}, {What: "requirement recorded", In: 43}}
	text := string(Markdown(Document(in)))
	for _, want := range []string{"2.13", "0.0427", "0.0553", "17", "larger", "Change from case C0", "+0.312", "+0.287", "0.0081", "0.0193", "sign resolved", "zero, angle", "comparison shown, requirement not set (log entry 41, 09:05); then requirement recorded (log entry 43)"} {
		if !strings.Contains(text, want) {
			t.Errorf("the memo lacks %q", want)
		}
	}
	c.Trend.U = quantity.None
	if text := string(Markdown(Document(in))); !strings.Contains(text, "its uncertainty is not known") || strings.Contains(text, "sign resolved:") {
		t.Error("a change without an uncertainty is not told as such")
	}
}

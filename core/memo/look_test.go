package memo

import (
	"fmt"
	"os"
	"testing"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

func TestLook(t *testing.T) {
	d := os.Getenv("MEMO_LOOK")
	if d == "" {
		t.Skip()
	}
	os.WriteFile(d+"/memo.html", HTML(Document(sample())), 0o644)
	os.WriteFile(d+"/memo.md", Markdown(Document(sample())), 0o644)
	for _, f := range []float64{10, 100, 1000, 1e4, 1e6, 1e-4} {
		in := sample()
		for j := range in.Report.Cells {
			c := &in.Report.Cells[j]
			c.Unit = "m^2/s^2"
			c.Quantity = "kinematic_pressure_difference_over_density_at_upper_branch"
			c.Model = "Reynolds-stress-transport-with-long-name"
			for i := range c.Stations {
				s := &c.Stations[i]
				for _, p := range []*quantity.Number{&s.S, &s.E, &s.UD, &s.UNum, &s.UInterp, &s.UVal, &s.Lo, &s.Hi} {
					*p *= quantity.Number(f)
				}
				s.UInput = s.UD
				s.D *= quantity.Written(f)
			}
		}
		for i := range in.Statements {
			in.Statements[i].Phrases = append(in.Statements[i].Phrases, study.Phrase{Text: "averyveryverylongblankthatcannotbebrokenanywhereandgoesonandonandonandonandonandonuntilitdoesnotfit", Mark: study.Missing})
		}
		os.WriteFile(fmt.Sprintf("%s/wide-%g.html", d, f), HTML(Document(in)), 0o644)
	}
}

package message

import (
	"fmt"
	"os"
	"testing"
	"time"
	"weirmark/core/sentence"
	"weirmark/core/study"
)

func TestZZDump(t *testing.T) {
	which := os.Getenv("WHICH")
	var s *study.Study
	t0 := time.Now()
	if which == "received" {
		s = DemoReceived(study.Read)
	} else if which == "review" {
		s = DemoReview()
	} else {
		s = DemoWorked()
	}
	t1 := time.Now()
	r := study.Evaluate(s, study.Options{Alternatives: true})
	fmt.Println("made", t1.Sub(t0), "evaluated", time.Since(t1), len(s.Files), len(s.Slips), len(r.Cells))
	targets := map[string]bool{}
	for i := range r.Cells {
		c := &r.Cells[i]
		fmt.Println("##", c.Case, c.Quantity, c.Model, c.Courses)
		fmt.Println("   ", sentence.Of(c).Text())
		for _, o := range c.Open {
			k := fmt.Sprint(o.Target)
			fmt.Println("     ?", o.Course, o.Blocks, o.Missing, "|", o.Text)
			targets[k] = true
		}
		for _, n := range c.Notices {
			fmt.Println("     !", n.Code, n.Text)
		}
	}
	fmt.Println("targets", len(targets))
	for _, n := range r.Notices {
		if n.Code != "delimiter-guessed" && n.Code != "header-guessed" {
			fmt.Println("!", n.Code, n.Text)
		}
	}
}

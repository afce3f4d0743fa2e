package study_test

import (
	"testing"

	"weirmark/core/internal/reference"
	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/study"
)

// The pressure round the NACA 0012 section (NASA Turbulence Modeling
// Resource): as a whole the simulated loop is refused, branch by branch it is
// compared with the measured upper side of Gregory and O'Reilly.
func TestBranchesOfAnAirfoil(t *testing.T) {
	s := pair("x,y\n0,0\n1,1\n", "x,y\n0,0\n1,1\n", "1", "1")
	for i, name := range []string{"n0012cp_cfl3d_sa.dat", "CP_Gregory_expdata.dat"} {
		data := reference.Shared(t, "nasa-tmr/naca0012/"+name)
		s.Files[i].Name, s.Files[i].Data, s.Files[i].SHA256 = name, data, study.Hash(data)
	}
	read := study.Read(s.Files[0])
	s.Slips[0].Table, s.Slips[1].Table = "2", "2"
	s.Slips[0].X.Column, s.Slips[0].Y.Column = entered(read.Tables[1].Columns[0].Name), entered(read.Tables[1].Columns[1].Name)
	measured := study.Read(s.Files[1]).Tables[1]
	s.Slips[1].X.Column, s.Slips[1].Y.Column = entered(measured.Columns[0].Name), entered(measured.Columns[1].Name)
	whole := only(t, s)
	if !notice.Has(whole.Notices, "curve-loop") || whole.Summary != nil {
		t.Errorf("the whole loop was compared: %+v", whole.Notices)
	}
	best := 1e9
	for _, branch := range []string{profile.First, profile.Second} {
		s.Slips[0].Branch = entered(branch)
		c := only(t, s)
		if !notice.Has(c.Notices, "branch-taken") || c.Summary == nil || c.Summary.N < 10 {
			t.Errorf("%s: %+v", branch, c.Notices)
			continue
		}
		best = min(best, float64(c.Summary.RMSE))
	}
	// At ten degrees the suction side reaches Cp = -5: the right branch lies
	// close, the wrong one units away.
	if best > .3 {
		t.Errorf("no branch lies near the measured side: RMSE %v", best)
	}
	s.Slips[0].Branch = entered(profile.Upper)
	if c := only(t, s); !notice.Has(c.Notices, "branch-name") || !c.Withheld {
		t.Errorf("an upper branch without a second coordinate: %+v", c.Notices)
	}
	s.Slips[0].Branch, s.Slips[1].Branch = study.Field{}, entered(profile.First)
	if c := only(t, s); !notice.Has(c.Notices, "branch-none") {
		t.Errorf("a branch of a curve that does not turn: %+v", c.Notices)
	}
}

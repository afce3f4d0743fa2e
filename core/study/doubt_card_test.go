package study_test

import (
	"math"
	"testing"

	"weirmark/core/notice"
	"weirmark/core/study"
)

// Each injected fault is asked about, and the clean study is not.
func TestCardDoubts(t *testing.T) {
	codes := []string{"cp-high", "absolute-negative", "speed-high", "friction-two"}
	speeds := func(u float64) *study.Study {
		s := pair(rows(30, even, func(x float64) float64 { return u * smooth(x) }), rows(12, func(i int) float64 { return float64(i) / 29 }, smooth), "m", "m")
		for i := range s.Slips {
			s.Slips[i].Y.Unit = entered("m/s")
		}
		s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{{Symbol: study.RefSpeed, Value: 1, Unit: "m/s"}, {Symbol: "ν", Value: 1e-5, Unit: "m^2/s"},
			{Symbol: study.FrictionSpeed, Value: 1.31, Unit: "m/s", Side: study.Simulation}, {Symbol: study.FrictionSpeed, Value: 1.24, Unit: "m/s", Side: study.OfData}}}}
		return s
	}
	high := pressures(0)
	high.Cases[0].References[1].Value = 400
	negative := pressures(0)
	negative.Questions[0].Form = study.Form{}
	negative.Slips[1].Datum = entered(study.DatumAbsolute)
	friction := speeds(1)
	friction.Questions[0].XForm = study.Form{Name: "y⁺", Simulation: study.FormTurned, Data: study.FormTurned}
	for _, row := range []struct {
		study *study.Study
		code  string
	}{{pressures(0), ""}, {speeds(1), ""}, {high, "cp-high"}, {negative, "absolute-negative"}, {speeds(2), "speed-high"}, {friction, "friction-two"}} {
		c := only(t, row.study)
		for _, code := range codes {
			if found := notice.Has(c.Notices, code); found != (code == row.code) {
				t.Errorf("%q: %s found %v", row.code, code, found)
			}
		}
	}
}

// A frontal area in place of the planform shows as the ratio of the two.
func TestAreaRatioIsNamed(t *testing.T) {
	s := pair(rows(30, even, func(x float64) float64 { return 7.69 * smooth(x) }), rows(12, func(i int) float64 { return float64(i) / 29 }, smooth), "m", "m")
	s.Cases = []study.Card{{Name: "C", References: []study.ReferenceQuantity{
		{Symbol: study.RefArea, Value: .0864, Unit: "m^2", Side: study.OfData, Kind: study.AreaKinds[0]}, {Symbol: study.RefArea, Value: 864 / 7.69, Unit: "cm^2", Side: study.Simulation, Kind: study.AreaKinds[1]}}}}
	if c := only(t, s); !told(c, "ratio-constant", "one reference area against the other") || math.Abs(float64(c.Stations[0].S)-7.69) > .1 {
		t.Errorf("%+v", c.Notices)
	}
}

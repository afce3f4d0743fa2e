package chart

import (
	"math"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// The cells of these tests are invented: smooth functions and round numbers,
// shaped like the cases the figures are for.

type (
	number = quantity.Number
	file   = quantity.Written
)

// rounded leaves no digits in which hosts differ.
func rounded(v float64) float64 { return math.Round(1e7*v) / 1e7 }

// taps is a pressure coefficient at 24 stations, negative values upward.
func taps(model string, shift float64) study.Cell {
	shape := func(t float64) float64 { return 0.55 - 1.9*math.Exp(-6*(t-0.2)*(t-0.2)) - 0.5*(1-t) }
	c := study.Cell{
		Case: "C1", Condition: "α = 4.2°", Quantity: "pressure coefficient", Symbol: "Cp", Model: model, Grid: "G4",
		Reference: "test OR-26/5", Kind: study.KindTest, Unit: "1", XName: "x/c", XUnit: "1", Downward: true,
		Choices: study.Choices{K: 2}, StationsAll: 24,
		Summary: &study.Summary{N: 24, MaxAbs: 0.0275, MaxAt: 0.62, MaxRatio: 1.29, WithinUVal: 20, WithinKUVal: 24},
	}
	for i := range 24 {
		t := 0.02 + 0.96*float64(i)/23
		d := math.Round(1000*shape(t)) / 1000
		e := math.Round(1e4*(shift+0.018*math.Sin(9*t)-0.006*math.Cos(31*t))) / 1e4
		uval := 0.0205 + 0.004*t
		c.Stations = append(c.Stations, study.Station{
			X: file(math.Round(1e4*t) / 1e4), D: file(d), S: number(d + e), E: number(e), UD: 0.02, UNum: 0.004, UInput: 0.003,
			UVal: number(uval), Ratio: number(math.Abs(e) / uval), Lo: number(e - 2*uval), Hi: number(e + 2*uval), Line: i + 2,
		})
	}
	c.Joint = &study.Joint{Statistic: 31.4, N: 24, Pattern: "independent and common", Worst: 3.1, WorstAt: 0.6, Correlations: []study.CorrelationLine{{Source: "reference pressure", N: 24, Top: 36.41502850, Low: 10.85636148}}}
	for i := range c.Stations {
		c.Stations[i].Whitened = number(rounded(0.4 + 2.7*math.Sin(7*float64(c.Stations[i].X))))
	}
	for i := range 11 {
		rho := float64(i) / 10
		c.Joint.Correlations[0].Points = append(c.Joint.Correlations[0].Points, study.CorrelationPoint{Rho: number(rho), Statistic: number(rounded(52 - 60*rho + 42*rho*rho))})
	}
	c.Joint.Correlations[0].Flips = []number{0.3218}
	for i := range 121 {
		t := float64(i) / 120
		c.Curve.X = append(c.Curve.X, file(rounded(t)))
		c.Curve.Y = append(c.Curve.Y, file(rounded(shape(t)+shift+0.018*math.Sin(9*t))))
		c.Curve.UNum = append(c.Curve.UNum, number(0.004+0.02*math.Exp(-60*(t-0.2)*(t-0.2))))
	}
	return c
}

// friction is a friction coefficient that crosses zero, with small numbers, a
// long name, a gap in u_val, stations outside the simulation and one value
// that was not compared; a grid study along the curve stands behind u_num.
func friction() study.Cell {
	shape := func(x float64) float64 { return 0.0021 - 0.0034*math.Exp(-(x-3.2)*(x-3.2)/5) }
	c := study.Cell{
		Case: "C3 ramp", Quantity: "skin friction coefficient", Symbol: "C_f", Model: "two-equation, curvature corrected", Grid: "fine",
		Reference: "oil film survey, both tunnel entries", Unit: "1", XName: "x/H", XUnit: "1",
		Choices: study.Choices{K: 1.96}, StationsAll: 34, Outside: []number{-3.4, 21.5, 22},
		Summary:     &study.Summary{N: 30, MaxAbs: 0.00061, MaxAt: 5.5, MaxRatio: 3.1, WithinUVal: 17, WithinKUVal: 24},
		Requirement: &study.Judgement{Limit: 0.0004, Percent: quantity.None, Outcome: study.NotMet},
	}
	for i := range 31 {
		x := -2 + 0.75*float64(i)
		d := shape(x)
		e := 0.0003*math.Sin(x) + 0.0003*math.Exp(-(x-5.5)*(x-5.5))
		s := study.Station{
			X: file(x), D: file(math.Round(1e6*d) / 1e6), S: number(d + e), E: number(e), UD: number(0.00012 + 0.05*math.Abs(d)),
			UNum: 0.00005, UInput: quantity.None, UVal: number(0.00014 + 0.05*math.Abs(d)), Line: i + 4,
		}
		if i == 12 {
			s.UVal = quantity.None
		}
		if i == 20 {
			s.S, s.E, s.UVal = quantity.None, quantity.None, quantity.None
		}
		s.Ratio = number(math.Abs(float64(s.E)) / float64(s.UVal))
		c.Stations = append(c.Stations, s)
	}
	for i := range 200 {
		x := -40 + 60.8*float64(i)/199
		c.Curve.X = append(c.Curve.X, file(rounded(x)))
		c.Curve.Y = append(c.Curve.Y, file(rounded(shape(x)+0.0003*math.Sin(x)+0.0003*math.Exp(-(x-5.5)*(x-5.5)))))
	}
	c.Sources = frictionSources()
	c.Grids = &study.Grids{
		Along: true, Points: make([]study.GridPoint, 3), Dimension: 2, Formal: 2, Order: 1.87, Monotone: 25, NonMonotone: 6,
		OrderLow: 0.31, OrderHigh: 11.2, Extrapolated: quantity.None, U: quantity.None,
	}
	for i := range 31 {
		l := study.LocalGrid{X: number(c.Stations[i].X), Class: "monotone convergent", Order: number(1.9 + 0.8*math.Sin(float64(2*i))), U: number(0.00005 + 0.00002*math.Cos(float64(i)))}
		if i%5 == 2 {
			l.Class, l.Order, l.U = "oscillatory convergent", quantity.None, 0.00016
		}
		if i == 9 {
			l.Order = 11.2
		}
		c.Grids.Local = append(c.Grids.Local, l)
	}
	return c
}

// frictionSources is the budget of friction: shares of the mean u_val squared.
func frictionSources() []study.SourceLine {
	return []study.SourceLine{
		{Name: "reading of the oil film", Of: study.OfData, U: 0.00016, Share: 0.82},
		{Name: "wall shear balance", Of: study.OfData, U: 0.00005, Share: 0.08},
		{Name: "grid", Of: study.OfNumerical, U: 0.00005, Share: 0.1},
		{Name: "interpolation to the stations", Of: study.OfNumerical, U: 0, Share: 0},
	}
}

// history is a monitor of 400 iterations that comes from a far start and then
// swings about its mean.
func history(grid, class string, mean, half float64) study.MonitorLine {
	m := study.MonitorLine{
		Grid: grid, File: grid + ".dat", Axis: study.AxisIterations, XName: "iteration", Class: class, Mean: number(mean), U: number(half / 1.7),
		From: 201, To: 400, HalfRange: number(half),
	}
	for i := range 400 {
		m.X = append(m.X, number(float64(i+1)))
		m.Y = append(m.Y, number(rounded(mean+0.02*math.Exp(-float64(i)/15)+half*math.Sin(float64(i)/4))))
	}
	return m
}

// run is drag with the monitors of its three finest grids and its sources.
func run() study.Cell {
	c := drag("B", 0.00035)
	c.Monitors = []study.MonitorLine{
		history("G4", "settled", 0.02995, 0.00002), history("G2", "settled", 0.03068, 0.00002), history("G3", "cycling", 0.03021, 0.00012),
	}
	c.Sources = []study.SourceLine{
		{Name: "balance", Of: study.OfData, U: 0.0004, Share: 0.46}, {Name: "angle, speed, turbulence", Of: study.OfInput, U: 0.00025, Share: 0.18},
		{Name: "grid", Of: study.OfNumerical, U: 0.00036, Share: 0.35}, {Name: "iteration", Of: study.OfNumerical, U: 0.00006, Share: 0.01},
	}
	return c
}

// drag is a scalar with four grids and a requirement.
func drag(model string, e float64) study.Cell {
	return study.Cell{
		Case: "C1", Condition: "α = 4.2°", Quantity: "drag coefficient", Symbol: "C_D", Model: model, Grid: "G4",
		Reference: "test OR-26/5", Unit: "1", Scalar: true, Choices: study.Choices{K: 2}, StationsAll: 1,
		Stations: []study.Station{{
			X: file(math.NaN()), D: 0.0296, S: number(0.0296 + e), E: number(e), UD: 0.0004, UNum: 0.00036, UInput: 0.0002,
			UVal: 0.000574, Ratio: 0.61, Lo: number(e - 0.001148), Hi: number(e + 0.001148),
		}},
		Requirement: &study.Judgement{Limit: 0.00148, Percent: 5, Outcome: study.NotResolved},
		Grids: &study.Grids{
			Dimension: 3, Class: "monotone convergent", Ratio: 1.34, Order: 2.01, Formal: 2, Extrapolated: 0.02962, Ea: 0.0078,
			U: 0.00041, UNum: 0.00036, KNum: 1.15,
			Points: []study.GridPoint{
				{Name: "G1", Cells: 1200000, H: 2.4, Value: 0.03152}, {Name: "G2", Cells: 2800000, H: 1.79, Value: 0.03068, Used: true},
				{Name: "G3", Cells: 6700000, H: 1.34, Value: 0.03021, Used: true}, {Name: "G4", Cells: 16000000, H: 1, Value: 0.02995, Used: true},
			},
		},
	}
}

package memo

import (
	"fmt"
	"math"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
)

// The sample is invented: the taps, the drag and the grids of the design's
// demo campaign (6.1), typed here. What it says about the joint statistic is
// typed too: this package prints and does not compute.
var (
	errorsA = []float64{.0382, .0245, .0315, .0160, .0294, .0392, .0409, .0226, .0264, .0282, .0124, .0409, .0345, .0334, .0368, .0278, .0315, .0355, .0349, .0268, .0218, .0340, .0326, .0229}
	errorsB = []float64{.0046, .0150, .0230, .0243, .0219, .0153, -.0045, -.0092, -.0216, -.0218, -.0114, -.0056, .0083, .0154, .0235, .0233, .0131, .0006, -.0058, -.0152, -.0275, -.0239, -.0092, .0047}
)

func pointer(v float64) *quantity.Number {
	n := quantity.Number(v)
	return &n
}

func number10(v float64) quantity.Number { return quantity.Number(v) }

func taps(model string, e []float64, joint study.Joint, requirement *study.Judgement) study.Cell {
	c := study.Cell{
		Case: "C1", Condition: "α = 4.2°", Quantity: "upper-branch pressure coefficient", Symbol: "Cp", Model: model, Grid: "G4",
		Reference: "OR-26 taps", Kind: study.KindTest, Use: study.UseValidation, Unit: "1", XName: "x/c", XUnit: "1", Downward: true,
		Degrees: quantity.None, K95: quantity.None,
		Conditions: []study.Compared{
			{Name: "α", Unit: "°", Simulation: 4.25, Data: 4.2, Effect: -.0021, Handling: study.Corrected, Why: "run at the setting of the sheet"},
			{Name: "Re", Simulation: 1.1e6, Data: 1.2e6, Effect: quantity.None},
			{Name: "Tu", Unit: "%", Simulation: .4, Data: .4, Effect: quantity.None},
		},
		Application: &study.Application{Text: "α = 11°", Outside: true, Range: "α 4.2° to 9°", Place: &study.AppliedPlace{State: "outside", Names: []string{"α"}, Units: []string{"°"}, At: []study.Number{11}, Beyond: .4166667, Nearest: "C2", Distance: .4166667,
			Points: []study.ComparedPoint{{Case: "C1", At: []study.Number{4.2}}, {Case: "C2", At: []study.Number{9}}}}},
		Evidence: []study.EvidenceLine{{What: "an input uncertainty", From: "medium", Given: true}, {What: "a recorded independent check", From: "high"}},
		Scores: []study.ScoreLine{
			{Name: "RMSE / range of D", Value: .0213, Scale: "range of D 1.53", Criteria: []study.CriterionLine{{Name: "house limit", Low: 0, High: .05, Met: true, Scope: "upper branch", Source: "common practice, no source"}, {Name: "narrow", Low: 0, High: .02, Scope: "upper branch", Source: "common practice, no source"}}},
			{Name: "hit rate", Value: .875, Scale: "25 %", Word: "of the stations"},
		},
		Regions:  []study.RegionLine{{Name: "nose", From: .02, To: .3, N: 9, Bias: .0123, RMSE: .0177, HitRate: .777, Beyond: 1}, {Name: "suction", Sign: study.SignNegative, From: quantity.None, To: quantity.None, N: 7, Bias: -.0045, RMSE: .0166, HitRate: .714, Beyond: 2}},
		Measured: []study.MeasureLine{{Name: "RMSE", Value: .031, U: .0062, Floor: .0203, FloorHi: .0377}, {Name: "largest |E|", Value: .0409, U: .0101, Floor: .0291, FloorHi: .0401, Above: true}},
		Mapping:  []string{"c1-taps.csv: column 2 = p in Pa, gauge; becomes Cp = (p − p_ref)/q∞ with p_ref = 0 Pa, q∞ = 574.7 Pa ± 4.3; over column 1 = x in mm; becomes x/L with L = 0.24 m."},
		References: []study.ReferenceLine{
			{Symbol: "ρ", Words: "density", Value: 1.196, U: .003, Unit: "kg/m³", Origin: "sheet of the test"},
			{Symbol: "A_ref", Words: "reference area", Side: study.OfData, Kind: "planform", Value: .0864, U: quantity.None, Unit: "m^2", Origin: "drawing"},
			{Symbol: "q∞", Words: "dynamic pressure", Value: 574.6780123, U: 4.310512, Unit: "Pa", Origin: "computed", Formula: "q∞ = ρ U_ref²/2"},
		},
		Axes:      []study.Axes{{Side: study.OfData, Origin: "leading edge", Up: study.UpZ, Flow: study.AgainstX}},
		Corrected: study.Correction{State: study.Corrected, How: "blockage by 1.2 %"},
		Reduction: &study.Reduction{Text: "Cp = (p − p_ref)/q∞", X: .16, Line: 9, Value: -1.3012, U: .0112, Low: -1.3232, High: -1.2792, Sampled: -1.30134, SU: .01121, SLow: -1.32351, SHigh: -1.27961, Draws: 100000, Agrees: true,
			Inputs: []study.ReducedInput{{Name: "p", Part: .0052}, {Name: "q∞", Part: .00976, Common: true}}},
		Provisional: true, StationsAll: 26, Outside: []study.Number{0.981, 0.995},
		Excluded:  []study.Excluded{{X: .55, D: -.12, Line: 30, Why: "tap leaked, see the log of the test", Late: true}, {X: .56, D: -.1, Line: 31, Why: "tap leaked"}},
		Open:      []study.Open{{Course: 0, Missing: "monitor", Text: "No monitor of the run on grid G4: that it has settled is not shown"}},
		Courses:   [5]study.State{study.Empty, study.Settled, study.Settled, study.Doubts, study.Doubts},
		Choices:   study.DefaultChoices(),
		Joint:     &joint,
		InputForm: study.InputsCounted,
		Members:   &study.MemberLine{N: 12, U: .0031, Mean: -.00123, Rank: 11},

		Distributions: &study.DistributionLine{Runs: 12, Readings: 7, Area: .00147, Shift: -.00123},
		Shared:        []study.SharedLine{{Source: "dynamic pressure", U: .0075, Left: .00021}},
		Bound:         &study.BoundLine{Half: .0042, At: .43},
		Replicates: &study.ReplicateLine{Readings: 72, Stations: 24, Of: "mean", Counts: "day", U: .0061, Degrees: 2, S: .0044, Plain: .0025,
			Levels: []study.LevelLine{{Name: "day", Groups: 3, Degrees: 2, Deviation: .0101}, {Name: "repeated reading", Groups: 15, Degrees: 12, Deviation: .0034}}},
		Resolution:  &study.ResolutionLine{Step: .0125, U: .0036084392},
		Consistency: []study.ConsistencyLine{{Name: "integral over the stations against the stated flow rate", Value: 12.41, Expected: 12.9, U: .11, Ratio: 4.4545}, {Name: "overlap of repeats", Value: .01, Expected: 0, U: .009, Ratio: 1.111, Holds: true}},
		Quality:     []study.QualityLine{{Item: "inlet profiles", State: study.QualityKnown, Note: "station 2 of the traverse"}, {Item: "wall temperature", State: study.QualityUnknown}, {Item: "wall roughness"}},
		Requirement: requirement,
		Sources: []study.SourceLine{
			{Name: "tap reading", Of: study.OfData, Text: "0.006, absolute, standard", U: .006, Share: .0796460177, Pattern: study.Independent, Origin: "repeat readings"},
			{Name: "reference pressure", Of: study.OfData, Text: "0.020, absolute, standard", U: .020, Share: .8849557522, Pattern: study.Common, Origin: "calibration sheet of the duct"},
			{Name: "grid", Of: study.OfNumerical, Text: "from the grid study, per station", U: .004, Share: .0353982301, Pattern: study.Independent, Origin: "computed", Open: model == "B"},
		},
		Grids: &study.Grids{
			Dimension: 3, Along: true, Monotone: 19, NonMonotone: 5, OrderLow: .62, OrderHigh: 2.9, Ratio: quantity.None, NextCells: quantity.None, NextCost: quantity.None, Order: 1.71, Formal: 2,
			Extrapolated: quantity.None, Ea: quantity.None, Eext: quantity.None, GCI: quantity.None, U: quantity.None, UNum: .004, KNum: 1.15,
			Rule: "three finest grids, common order along the curve", R21: 1.336, R32: 1.338,
			Points: gridPoints(quantity.None, quantity.None, quantity.None, quantity.None),
		},
		Notices:   []notice.Notice{notice.New("station-outside", 2, 26, "0.01", "0.975"), notice.New("curve-unsorted", "run C1-A-G4", "x").In("c1-taps.csv").At(12)},
		FilesUsed: []string{"f1", "f2"},
	}
	sum, absolute, squares := 0.0, 0.0, 0.0
	for i, ei := range e {
		x := math.Round((0.02+0.95*math.Pow(float64(i)/23, 1.25))*1e4) / 1e4
		s := math.Round((-1.05*math.Exp(-math.Pow((x-0.16)/0.2, 2))-0.35*(1-x)+0.28*x*x)*1e4) / 1e4
		d := s - errorsB[i]
		const uVal = .0212602916
		c.Stations = append(c.Stations, study.Station{
			X: quantity.Written(x), S: number10(d + ei), D: quantity.Written(math.Round(d*1e4) / 1e4), E: number10(ei), UD: .0208806130, UNum: .004, UInterp: number10(.0001 + .00002*float64(i%5)),
			UInput: quantity.None, UVal: uVal, Ratio: number10(math.Abs(ei) / uVal), Lo: number10(ei - 2*uVal), Hi: number10(ei + 2*uVal), Line: 5 + i, Whitened: number10(ei/uVal - .3),
			Reading: map[bool]string{true: study.Between, false: study.WithinNoise}[math.Abs(ei) > uVal],
		})
		c.Grids.Local = append(c.Grids.Local, study.LocalGrid{X: number10(x), Class: map[bool]string{true: "oscillatory", false: "monotone"}[i%5 == 3], Order: map[bool]study.Number{true: quantity.None, false: number10(1.2 + .05*float64(i))}[i%5 == 3], U: .0046})
		sum, absolute, squares = sum+ei, absolute+math.Abs(ei), squares+ei*ei
	}
	m := study.Summary{N: 24, Tested: 24, Bias: number10(sum / 24), MAE: number10(absolute / 24), RMSE: number10(math.Sqrt(squares / 24)), MaxAbs: 0, WithinKUVal: 23, BeyondChance: 1.0920063}
	for i, s := range c.Stations {
		if math.Abs(e[i]) > float64(m.MaxAbs) {
			m.MaxAbs, m.MaxAt, m.MaxRatio = number10(math.Abs(e[i])), study.Number(s.X), s.Ratio
		}
		if s.Ratio <= 1 {
			m.WithinUVal++
		}
	}
	c.Summary = &m
	if model == "B" { // asked for percentages
		for i := range c.Stations {
			p := number10(100 * e[i] / math.Abs(float64(c.Stations[i].D)))
			if i%7 == 6 {
				p = quantity.None
			}
			c.Stations[i].Percent = &p
		}
	}
	c.Joint.Scale, c.Joint.UScale, c.Joint.ScalePart, c.Joint.ShapePart, c.Joint.ShapeN, c.Joint.AtLeast = .0123, .0091, 1.8265, 22.9633, 22, .0514
	c.Joint.Turns = []study.Turning{{Source: "reference pressure", Rho: .6842, At0: 50.98, At1: 27.05}}
	c.Joint.Without = []study.Leaving{{Region: "nose", Statistic: 14.2, N: 15, Reference: 24.9958}}
	c.Joint.Merged, c.Joint.Worst, c.Joint.WorstAt, c.Joint.Condition, c.Joint.Turning = 2, -2.3456, .61, 277.8, 3
	c.Joint.Eigenvalues = []study.Number{0, .0451, 21.3}
	c.Joint.Station = &study.Leaving{Region: "0.61", Statistic: 21.54, N: 23, Reference: 35.17}
	c.Joint.Correlations = []study.CorrelationLine{{Source: "reference pressure", N: 24, Top: 36.415, Low: 10.856, Points: []study.CorrelationPoint{{Rho: 0, Statistic: 50.98}, {Rho: .5, Statistic: 9.42}, {Rho: 1, Statistic: 27.05}}, Flips: []study.Number{.0215}}}
	if model == "B" {
		c.Choices.Gap, c.Choices.Period, c.Choices.Probe, c.Choices.Smooth = 12, 360, .004, 5
		for i := range c.Stations {
			w := study.Number(.03 + .001*float64(i))
			c.Stations[i].Weight = &w
		}
		c.Treatment = &study.Treatment{
			Orders:   []study.OrderLine{{File: "c1-pressure-both-models.dat", Column: "x/c", Hash: "84222325cbf29ce4", Sorted: true}, {File: "c1-taps.csv", Column: "x/c", Hash: "af63dc4c8601ec8c"}},
			Sampling: study.AtCellCentres,
			Anchors:  []study.AnchorLine{{Kind: study.AtWall, X: -.01, Value: .0123, Why: "stagnation"}},
			Plan:     &study.PlanLine{At: "2026-03-03 10:00", Changes: []string{"1 station excluded"}},
			Noise:    &study.NoiseLine{S: .00712, Rows: 22, Stated: .006},
			Fit:      &study.DisplacementLine{N: 20, RMS: .0171, Shift: .0031, ShiftRMS: .0162, Scale: 1.021, ScaleRMS: .0165, BothShift: .0029, BothScale: 1.018, BothRMS: .0158, AtEdge: true},
			Integral: &study.IntegralLine{E: .00411, S: -.4212, D: -.42531, U: .0151, Length: .93, Whole: .975, Pieces: 2}, Weights: "the length each station stands for",
		}
	}
	c.Crossings = study.Crossings{Simulation: []study.Crossing{{X: .7123456789, Rising: true}}, Reference: []study.Crossing{{X: .6987654321, Rising: true}, {X: .95, Rising: false}}}
	return c
}

func gridPoints(values ...study.Number) []study.GridPoint {
	cells := []float64{410000, 980000, 2350000, 5600000}
	var all []study.GridPoint
	for i, v := range values {
		all = append(all, study.GridPoint{YPlus: []study.Number{38, 27, 12, .9}[i], Name: fmt.Sprintf("G%d", i+1), Cells: number10(cells[i]), H: number10(math.Cbrt(5600000 / cells[i])), Value: v, Used: i > 0})
	}
	return all
}

func drag() study.Cell {
	choices := study.DefaultChoices()
	choices.Gap = 0
	return study.Cell{
		Case: "C1", Condition: "α = 4.2°", Quantity: "drag coefficient", Symbol: "Cd", Model: "B", Grid: "G4",
		Derived: &study.Derived{Kind: "drag coefficient of a wake", Formula: "Cd = (2/L) ∫u/U (1 − u/U) dy", Settings: []study.DerivedSetting{{Name: "reference length L", Value: "0.2 m"}}, Effect: -.000021, Propagation: "first order",
			Sides: []study.DerivedSide{
				{Side: "reference", File: "c1-wake.csv", Rows: 31, Value: .0296, U: .000212, At: .0123, AtUnit: "m", Edge: 21.34, EdgeUnit: "m/s", Overshoot: .0123, Gap: quantity.None, Bound: true,
					Effects: []study.DerivedEffect{{Name: "every second row left out", Change: -.00017, U: .0002125}},
					Places:  []study.DerivedPlace{{X: .4567, U: .0032, Rising: true, Chosen: true}, {X: .7654, U: quantity.None}}},
				{Side: "simulation at the stations", File: "c1-g4.dat", Rows: 31, Value: .02995, U: .000198, At: quantity.None, Edge: quantity.None, Overshoot: quantity.None, Gap: .00011},
			},
			Others: []study.DerivedOther{{Change: "edge at the plateau", Simulation: .0312, Reference: .0309, E: .0003}, {Change: "edge at the last row", Simulation: .0298, Reference: quantity.None, E: quantity.None}}},
		Reference: "OR-26 balance", Kind: study.KindTest, Use: study.UseValidation, Unit: "1", Scalar: true,
		Courses: [5]study.State{study.Settled, study.Settled, study.Settled, study.Settled, study.Doubts},
		Choices: choices, StationsAll: 1, Provisional: true, Degrees: 7.3, K95: 2.34, InputForm: study.InputsNominal,
		Inputs:  []study.InputLine{{Name: "U", Unit: "m/s", Nominal: 31, U: .155, Sensitivity: .00161, DataSensitivity: .0004, Method: "central, two runs", Shared: true, Text: "0.5 % of U = 31 m/s, 95 %", Origin: "traverse"}},
		Sampled: &study.SampledLine{At: quantity.None, Value: .00031, U: .0006, Lo: -.00087, Hi: .00149, Level: .95, Draws: 230000, Minus: .0003, Plus: .00045, Shift: .00012},
		Monitors: []study.MonitorLine{
			{Grid: "G3", File: "c1-g3-monitor.dat", Axis: study.AxisIterations, Class: "settled", Rule: "mean over the last third", Mean: .03021, U: 2e-7, From: 401, To: 600, Drift: -1.2e-6, Change: -3.6e-8, Per: 100, Limit: 4.1e-5, Remaining: -1.5e-8, Period: quantity.None, HalfRange: quantity.None, OfGrid: .00097},
			{Grid: "G4", File: "c1-g4-monitor.dat", Axis: study.AxisIterations, Class: "cycling", Rule: "mean over whole cycles", Mean: .0299512, U: .0000712, From: 111, To: 600, Drift: quantity.None, Change: quantity.None, Per: quantity.None, Limit: 4.1e-5, Remaining: quantity.None, Period: 70, Cycles: 7, HalfRange: .000123, OfGrid: .35,
				Entered: "from a longer run on the same grid", Quantity: "lift coefficient", Unit: "1"},
			{Grid: "G2", File: "c1-g2-monitor.dat", Axis: study.AxisTime, Class: "unsteady", Rule: "mean behind the start-up", Mean: .0306, U: .00012, From: 1.5, To: 12, Drift: .001, Change: .00003, Per: 10.5, Limit: 4.1e-5, Remaining: quantity.None, Period: .81, Cycles: 12, HalfRange: .0011, OfGrid: quantity.None,
				Sampling: &study.Sampling{StartUp: 150, Rows: 1051, SD: .00061, Tau: .39, Independent: 26.9, Batches: 5, UBatches: .000131, UMarkov: .000118, Share: .318}},
		},
		Balances: []study.BalanceLine{
			{Grid: "G4", File: "c1-mass.dat", Kind: "mass", In: 1.204, Out: 1.2038, Net: .0002, Scale: 1.204, ScaleOf: "inflow", Fraction: .000166113, Limit: .00137, LimitOf: "a tenth of U_grid", OfGrid: .0121, OfE: .0142, Closed: true, Effect: quantity.None},
			{File: "c1-heat.dat", Kind: "energy", In: 10, Out: 10.4, Net: -.4, Scale: 8, ScaleOf: "heat exchanged", Fraction: -.05, Limit: .001, LimitOf: "a thousandth, by habit", OfGrid: quantity.None, OfE: quantity.None, Effect: .00007, EffectWhy: "two runs with and without the source"},
		},
		Residuals: []study.ResidualLine{{Grid: "G4", File: "c1-g4-residuals.dat", Name: "continuity", Decades: 2.13, PerFirst: .71, PerLast: .021, Per: 200, From: 401, To: 601, Stalled: true}},
		RoundOff:  &study.RoundOffLine{Grid: "G4", File: "c1-g4-single.dat", RMS: 3.1e-7, Max: 3.3e-7, N: 17},
		NumSums:   &study.NumSums{Root: .000364, Linear: .000479, Apart: true},
		Open:      []study.Open{{Course: 4, Missing: "second requirement", Text: "The grid factor 1.15 is assumed. State why it may be used", Target: study.Target{Kind: "question", ID: "C1", Field: "k_num"}}},
		Stations: []study.Station{{
			X: quantity.Written(quantity.None), S: .02995, D: .0296, E: .00035, UD: .0004, UNum: .000357391304, UInterp: quantity.None, UInput: .00025, UVal: .000591741, Ratio: .5914751, Lo: -.000833482, Hi: .001533482, Line: 7, Whitened: quantity.None, Reading: study.WithinNoise,
		}},
		Grids: &study.Grids{
			Points: gridPoints(.03155, .03068, .03021, .02995), Dimension: 3, Class: "monotone", Ratio: .5531914894, Order: 2.0149, Formal: 2, Extrapolated: .02962,
			Ea: .0086811352, Eext: .0111411209, GCI: .013723, U: .000411, UNum: .000357391304, KNum: 1.15, Rule: "three finest grids, bounded rule", R21: 1.336, R32: 1.338,
			OrderLow: quantity.None, OrderHigh: quantity.None, NextCells: 6880000, NextCost: 1.316, CostExponent: 1.3333333333,
			Card: &study.FamilyCard{Ratios: []study.GridRatio{{Fine: "G4", Coarse: "G3", R: 1.3357}, {Fine: "G4", Coarse: "G2", R: 1.7877}}, Similar: study.SimilarYes, Wall: "wall functions", Scheme: "second order", Regime: study.RegimeSteady,
				Settings: []study.SettingLine{{Key: "limiter", Values: []string{"none", "none", "", "minmod"}, Differs: true}, {Key: "scheme", Values: []string{"a", "a", "a", ""}}, {Key: "seed", Values: []string{"1", "2", "3", "4"}}}},
			Rules:  []study.RuleLine{{Rule: "three finest grids, bounded", U: .000411, UNum: .000357391}, {Rule: "a bound of some kind", U: quantity.None, UNum: .0003}},
			Fit:    &study.FitLine{Base: .02962, Terms: []study.FitTerm{{Coefficient: .00033, Power: 2}, {Coefficient: -.00001, Power: 1}}},
			Stated: &study.StatedNext{U: .0002, Cells: 13500000, Cost: 3.23},
		},
		Sources: []study.SourceLine{
			{Name: "balance", Of: study.OfData, Text: "0.00040, absolute, standard", U: .0004, Share: .4569, Pattern: study.Common, Origin: "five runs over three days and the calibration"},
			{Name: "angle, speed, turbulence", Of: study.OfInput, Text: "0.00025, absolute, standard", U: .00025, Share: .1785, Pattern: study.Common, Origin: "run pairs"},
			{Name: "grid", Of: study.OfNumerical, Text: "U = 0.000411, 95 %, divided by 1.15", U: .000357391304, Share: .3646, Pattern: study.Independent, Origin: "computed"},
		},
		Steps: &study.StepStudy{File: "c1-steps.csv", StepUnit: "s", Class: "monotone", Order: 1.87, Formal: 2, Space: quantity.None, Extrapolated: .02991, SpaceError: quantity.None, TimeError: quantity.None, Scatter: quantity.None, U: .0000512, UNum: .0000445, Rule: "three finest steps",
			Points: []study.StepPoint{{Step: .002, Cells: quantity.None, Value: .02993}, {Step: .001, Cells: 5600000, Value: .02995}}},
		Requirement: &study.Judgement{Limit: .00148, Percent: 5, Who: "decision owner", Date: "2026-03-02", Outcome: study.NotResolved, At: quantity.None, UValNeeded: .000565, UNumNeeded: .000310926, UNumReduction: .13, Ways: []study.Way{
			{Source: "grid", Of: study.OfNumerical, Now: .000357391304, Needed: .000310926, Reduction: .13, Cells: pointer(6880000), Cost: pointer(1.316)},
			{Source: "scatter of repeated readings", Of: study.OfData, Now: .000073, Needed: .00002, Reduction: .726, Readings: 67}}},
		Fragile:   []study.Fragility{{Change: "k_num = 2", What: "requirement", From: study.NotResolved, Outcome: study.Shown, Detail: "upper limit 4.7 % instead of 5.2 %", At: pointer(1.32)}},
		Tried:     []string{"k_num = 2", "plain rule of the grid study"},
		FilesUsed: []string{"f1", "f3"},
	}
}

func oscillating() study.Cell {
	c := drag()
	c.Quantity, c.Symbol, c.Model, c.Unit = "lift force", "L", "A", "N"
	c.Withheld, c.Provisional, c.Fragile, c.Requirement = true, false, nil, nil
	c.Open = []study.Open{
		{Course: 2, Blocks: true, Missing: "experimental uncertainty", Text: "No experimental uncertainty was given"},
		{Course: 4, Missing: "requirement", Text: "No accuracy requirement is recorded"},
	}
	s := &c.Stations[0]
	s.S, s.D, s.E, s.UD, s.UVal, s.Ratio, s.Lo, s.Hi, s.Reading = 36.172, 35.31, .862, quantity.None, quantity.None, quantity.None, quantity.None, quantity.None, ""
	s.UNum, s.UInput = .1075, quantity.None
	none := quantity.None
	c.Grids = &study.Grids{Stated: &study.StatedNext{U: .05, Cells: none, Cost: none}, Points: gridPoints(35.68, 36.34, 35.96, 36.172), Dimension: 3, Class: "oscillatory", Ratio: -.5578947, Order: none, Formal: 2, Extrapolated: none, Ea: none, Eext: none, GCI: none, U: none, UNum: .1075, KNum: 1.15, Rule: "half-range of the three finest as a bound", R21: 1.336, R32: 1.338, OrderLow: none, OrderHigh: none, NextCells: none, NextCost: none}
	c.Steps = &study.StepStudy{Joint: true, File: "l-steps.csv", Formal: 2, Space: 1.5, Order: none, Extrapolated: 36.1, SpaceError: .0421, TimeError: -.0133, Scatter: .0021, U: .0714, UNum: .0621, Points: []study.StepPoint{}}
	c.Borrowed = &study.Borrowed{From: "drag at C2", Relative: .0123, Penalty: 2, U: .045, Why: "the same grids at another angle"}
	c.Sources, c.Sampled, c.InputForm = c.Sources[2:], nil, ""
	c.Bounding = &study.Bounding{What: "sign", Word: study.SignResolved, UD: .4173, At: quantity.None, After: study.NotResolved}
	c.Sources[0].Share = none
	c.Degrees, c.K95, c.Monitors, c.Balances, c.Residuals, c.RoundOff, c.NumSums = quantity.None, quantity.None, nil, nil, nil, nil, nil
	c.Notices = []notice.Notice{notice.New("u-missing"), notice.New("grid-oscillatory", "−0.56", "0.19")}
	return c
}

func sample() Input {
	numShared := study.Joint{Statistic: 27.0451, N: 24, P: .3029, Reference: 36.415, Pattern: "reference pressure common, the rest independent", Independent: 50.98, NumShared: 38.0, Offset: .0301, UOffset: .0201, OffsetPart: 2.2553, Remainder: 24.7898, RemainderN: 23, RemainderReference: 35.1725}
	shape := study.Joint{Statistic: 125.0344, N: 24, P: 1.2e-15, Reference: 36.415, Exceeds: true, Pattern: "reference pressure common, the rest independent", Independent: 14.53, NumShared: 180.6, Offset: .0016, UOffset: .0201, OffsetPart: .0063, Remainder: 125.0281, RemainderN: 23, RemainderReference: 35.1725, RemainderExceeds: true}
	report := study.Report{
		Code: &study.CodeEvidence{Statement: "order 2 on three manufactured flows", Link: "report 7, page 12"},
		CodeChecks: []study.CodeCheck{
			{Case: "V1", Quantity: "u", Model: "A", File: "v1.csv", Norm: "root mean square", Unit: "m/s", Points: []study.CodePoint{{Grid: "G1", H: .125, Error: .0129}, {Grid: "G2", H: .0625, Error: .00321}, {H: .03125, Error: .000803}}, Order: 2.0031, Orders: []study.Number{2.0067, 1.9991}},
			{Case: "V1", Quantity: "v", File: "v1.csv", Norm: "e", Points: []study.CodePoint{{H: .125, Error: .01}}, Order: quantity.None, Notices: []notice.Notice{notice.New("grid-verify-none")}},
		},
		Title: "Quillet strut fairing: comparison with campaign OR-26", Purpose: "Choose the fairing setting for a duct retrofit. The decision needs the drag coefficient within ±5 % and the shape of the pressure distribution.", Edition: "2026-1",
		Files: []study.FileLine{
			{ID: "f1", Name: "c1-taps.csv", SHA256: strings.Repeat("0123456789abcdef", 4), Bytes: 2104, Matches: true, Uses: []string{"reference of Cp, case C1"}},
			{ID: "f2", Name: "c1-pressure-both-models.dat", SHA256: strings.Repeat("fedcba9876543210", 4), Bytes: 181234, Matches: true, Uses: []string{"simulation A", "simulation B"}},
			{ID: "f3", Name: "c1-drag.csv", SHA256: strings.Repeat("00112233445566778899aabbccddeeff", 2), Bytes: 388, Matches: false, Uses: []string{"grid values"}},
		},
		Cells: []study.Cell{
			taps("A", errorsA, numShared, nil),
			taps("B", errorsB, shape, &study.Judgement{Limit: .03, Percent: quantity.None, Who: "decision owner", Date: "2026-03-02", Late: true, Outcome: study.NotResolved, At: .8123, UValNeeded: .00125, UNumNeeded: quantity.None, UNumReduction: quantity.None}),
			drag(), oscillating(),
		},
		Differences: []study.Difference{{Case: "C1", Quantity: "upper-branch pressure coefficient", A: "A", B: "B", Unit: "1", N: 24, Mean: .0286, U: .0013, Resolved: true, RMSA: .031, RMSB: .0165}},
		Notices:     []notice.Notice{notice.New("header-guessed", 4).In("c1-taps.csv"), notice.New("files-identical", "c1-g2.dat", "c1-g3.dat")},
		Prepared:    study.Signature{Name: "Analyst", Date: "2026-03-09"},
		Log: []study.Entry{
			{Number: 1, At: "2026-03-02 09:10", What: "requirement of the drag coefficient recorded: ±5 %", Why: "decision meeting"},
			{Number: 2, At: "2026-03-04 14:02", What: "file c1-taps.csv added"},
			{Number: 3, At: "2026-03-05 08:30", What: "requirement of Cp recorded: ±0.03", Shown: true},
		},
	}
	target := &study.Target{Kind: "question", ID: "C1", Field: "k_num"}
	plain := func(s string) study.Phrase { return study.Phrase{Text: s} }
	marked := func(s, mark string) study.Phrase { return study.Phrase{Text: s, Mark: mark, Target: target} }
	holds := func(p study.Phrase, path, over string, v float64) study.Phrase {
		value := quantity.Number(v)
		p.Path, p.Over, p.Value = path, over, &value
		return p
	}
	cp := "upper-branch pressure coefficient"
	return Input{
		Report: report, Product: "Weirmark 0.1", Made: "2026-03-09 16:20", Hash: strings.Repeat("89abcdef01234567", 4),
		Statements: []Statement{
			{Case: "C1", Quantity: cp, Model: "A", Phrases: []study.Phrase{plain("Over n = "), holds(plain("24"), "joint.n", "", 24), plain(" stations the joint statistic is "), holds(marked("27.0", study.FigureOf), "joint.statistic", "", 27.0451), plain(" (reference 36.4) with "), marked("reference pressure common", study.Guess), plain(" correlation. The statistic does not exceed its 95 % point. Offset 0.030 ± 0.020 not resolved.")}},
			{Case: "C1", Quantity: cp, Model: "B", Phrases: []study.Phrase{plain("Over n = "), marked("24", study.FigureOf), plain(" stations the joint statistic is "), marked("125", study.FigureOf), plain(" (reference 36.4) with common correlation. The statistic exceeds its 95 % point. That the model error stays within ±0.03 (decision owner, 2026-03-02) is "), marked("not resolved", study.WordOf), plain(" at k = 2.")}},
			{Case: "C1", Quantity: "drag coefficient", Model: "B", Phrases: []study.Phrase{plain("For drag coefficient at case C1, α = 4.2°, model B on grid G4 differs from test OR-26 by "), holds(marked("+1.2", study.FigureOf), "stations.0.e", "stations.0.d", 100*.00035/.0296), plain(" % against u_val "), marked("2.0 %", study.FigureOf), plain(" (k_num "), holds(marked("1.15", study.Assumed), "choices.k_num", "", 1.15), plain("). The model error lies within −2.8 % to +5.2 %. Requirement ±5 % is "), marked("not resolved", study.WordOf), plain(".")}},
			{Case: "C1", Quantity: "lift force", Model: "A", Phrases: []study.Phrase{plain("Comparison only: E is "), marked("+0.86 N", study.FigureOf), plain(" against "), marked("experimental uncertainty", study.Missing), plain("; no statement is made.")}},
		},
		Figures: []Figure{
			overlay("A", report.Cells[0]), overlay("B", report.Cells[1]),
			{Title: "Intervals of the model error", Caption: "E ± k u_val of every cell against its requirement, k = 2.", Alt: "Four intervals drawn as lines.", SVG: `<svg xmlns="http://www.w3.org/2000/svg" width="640" height="120"><path d="M40 30H500M40 60H420M180 90H300" stroke="#16181a" fill="none"/></svg>`},
		},
	}
}

func overlay(model string, c study.Cell) Figure {
	var marks, line strings.Builder
	f := Figure{Case: c.Case, Quantity: c.Quantity, Model: model, Title: "Pressure coefficient along the upper branch, model " + model, Caption: "Circles: reference with ± u_D (k = 1), 24 of 26 stations; line: simulation on G4. Negative values upward.", Alt: "Reference taps and simulated curve.", Head: []string{"x/c", "S", "D"}}
	for i, s := range c.Stations {
		x, y, d := 60+float64(s.X)*540, 60+float64(s.S+1.4)*110, 60+(float64(s.D)+1.4)*110
		fmt.Fprintf(&marks, `<circle cx="%.1f" cy="%.1f" r="3.4" fill="#fff" stroke="#16181a"/>`, x, d)
		fmt.Fprintf(&line, "%s%.1f %.1f", map[bool]string{true: "M", false: "L"}[i == 0], x, y)
		f.Rows = append(f.Rows, []string{fmt.Sprint(float64(s.X)), quantity.Text(float64(s.S), 4), fmt.Sprint(float64(s.D))})
	}
	f.SVG = `<svg xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink" width="640" height="300"><defs><clipPath id="c0"><rect x="50" y="10" width="570" height="260"/></clipPath></defs><style>.a{fill:red}</style><g clip-path="url(#c0)"><path d="` + line.String() + `" fill="none" stroke="#16181a"/>` + marks.String() + `</g><path d="M50 10V270H620" fill="none" stroke="#555"/><text x="330" y="292" font-size="12" font-family="sans-serif">x/c</text></svg>`
	return f
}

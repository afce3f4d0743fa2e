package study

import (
	"math"
	"slices"
	"strconv"

	"gonum.org/v1/gonum/stat/distuv"

	"weirmark/core/adequacy"
	"weirmark/core/comparison"
	"weirmark/core/derived"
	"weirmark/core/metric"
	"weirmark/core/plausibility"
	"weirmark/core/profile"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
	"weirmark/core/settling"
	"weirmark/core/uncertainty"
)

// Inputs that many rules share.
var (
	allE             = from("stations.*.e")
	allSD            = from("stations.*.s", "stations.*.d")
	allJoint         = from("stations.*.e", "sources.*.at.*", "stations.*.s")
	gridPoints       = from("grids.points.*.value", "grids.points.*.cells", "choices.formal", "choices.dimension")
	errorsAndSources = from("stations.*.e", "sources.*.at.*")
	judgedWhy        = "The judgement of the run gives it together with the class; the monitor's file and window stand beside it, the rule in the methods."
)

// walkRules holds every number of a cell: how it is computed from which others,
// or why the walk ends there. The order does not matter.
var walkRules = []walkRule{
	{path: "choices.k", name: "coverage factor k", in: coverageInputs, calc: func(a args) float64 {
		if a.q.Choices.KStudent {
			return quantity.Round(a.n(0), 3)
		}
		return a.n(0)
	}, words: "chosen, or that of the degrees of freedom with three digits"},
	{path: "choices.k_num", name: "factor from U_num to u_num", in: from("entered.choices.k_num"), calc: first, words: "chosen"},
	{path: "choices.formal", name: "formal order", in: from("entered.choices.formal"), calc: first, words: "chosen"},
	{path: "choices.dimension", name: "dimension of the grids", in: from("entered.choices.dimension"), calc: first, words: "chosen"},

	{path: "stations.*.x", name: "station", words: "place of the reading", in: atRow("x"), calc: first},
	{path: "stations.*.s", name: "simulation S", formula: "S = S₁ + t (S₂ − S₁), t = (x − x₁)/(x₂ − x₁)", words: "the simulation between its neighbouring rows, with the corrections of conditions", in: simulationRows, calc: simulationAt},
	{path: "stations.*.d", name: "data D", formula: "D, or the mean of the readings", words: "the reading, or the mean of repeated readings", in: readings, calc: func(a args) float64 { return mean(slices.Concat(a.v...)) }},
	{path: "stations.*.e", name: "comparison error E", formula: "E = S − D", words: "simulation less data", in: from("@.s", "@.d"), calc: func(a args) float64 { return a.n(0) - a.n(1) }},
	{path: "stations.*.u_d", name: "u_D", formula: "u_D = √Σ u²", words: "root sum of squares of the sources of the data", in: partsOf(OfData, false), calc: rootSum},
	{path: "stations.*.u_num", name: "u_num", formula: "u_num = √Σ u²", words: "root sum of squares of the numerical sources", in: partsOf(OfNumerical, false), calc: rootSum},
	{path: "stations.*.u_interp", name: "u_interp", formula: "u_interp", words: "interpolation of the simulation to the station", in: partsOf(OfNumerical, true), calc: rootSum},
	{path: "stations.*.u_input", name: "u_input", formula: "u_input = √Σ u²", words: "root sum of squares of the input sources", in: partsOf(OfInput, false), calc: rootSum},
	{path: "stations.*.u_val", name: "u_val", formula: "u_val = √(u_D² + u_num² + u_interp² + u_input²)", words: "root sum of squares of its parts, or of all sources where one acts on both sides; a part that is not known is left out", in: uValInputs, calc: rootSum},
	{path: "stations.*.ratio", name: "|E|/u_val", formula: "|E| / u_val", in: from("@.e", "@.u_val"), calc: func(a args) float64 { return math.Abs(a.n(0)) / a.n(1) }},
	{path: "stations.*.lo", name: "lower end of the interval of the model error", formula: "E − k u_val", in: from("@.e", "choices.k", "@.u_val"), calc: func(a args) float64 { return a.n(0) - float64(a.n(1)*a.n(2)) }},
	{path: "stations.*.hi", name: "upper end of the interval of the model error", formula: "E + k u_val", in: from("@.e", "choices.k", "@.u_val"), calc: func(a args) float64 { return a.n(0) + float64(a.n(1)*a.n(2)) }},
	{path: "stations.*.line", name: "line of the reference file", why: "It is the place itself."},
	{path: "stations.*.whitened", name: "whitened residual", formula: "(V^−½ E) at the station", words: "E with the covariance of all stations taken out", in: allJoint, calc: func(a args) float64 {
		n := slices.Index(a.joined, a.at[0])
		if r, ok := a.residuals(); ok && n >= 0 {
			return r.Whitened[n]
		}
		return math.NaN()
	}},
	{path: "sources.*.at.*", name: "standard uncertainty at the station", formula: "as its source says", say: func(p spot) string {
		line := p.parts[p.at[0]].line
		return line.Name + ": " + line.Text + "; " + line.Origin
	}, in: sourceInputs, calc: sourceAt},

	{path: "outside.*", name: "station outside the simulation", in: func(p spot) []string { return p.rowOf(float64(p.cell.Outside[p.at[0]])) }, calc: first, words: "as read"},
	{path: "stations_all", name: "stations of the reference", why: "The rows of the reference that hold a place and a value, those that a person excluded among them."},
	{path: "excluded.*.x", name: "excluded station", words: "as read", in: excludedRow("x"), calc: first},
	{path: "excluded.*.d", name: "value of the excluded station", words: "as read", in: excludedRow("y"), calc: first},
	{path: "excluded.*.line", name: "line of the reference file", why: "It is the place itself."},
	{path: "conditions.*.simulation", name: "condition of the simulation", words: "as entered", in: conditionEntry("simulation"), calc: first},
	{path: "conditions.*.data", name: "condition of the data", words: "as entered", in: conditionEntry("data"), calc: first},
	{path: "conditions.*.effect", name: "effect of the difference of conditions", formula: "sensitivity · (data − simulation)", in: func(p spot) []string {
		return append(conditionEntry("sensitivity")(p), from("@.data", "@.simulation")(p)...)
	}, calc: func(a args) float64 { return a.n(0) * (a.n(1) - a.n(2)) }},

	{path: "summary.n", name: "stations compared", formula: "count of E", in: allE, calc: func(a args) float64 { return float64(len(a.v[0])) }},
	{path: "summary.tested", name: "stations with a known u_val", formula: "count of u_val > 0", in: from("stations.*.u_val"), calc: func(a args) float64 { return count(a.v[0], func(u float64) bool { return u > 0 }) }},
	{path: "summary.bias", name: "mean of E", formula: "Σ E / n", in: allE, calc: func(a args) float64 { return metric.Summarise(a.v[0]).Bias }},
	{path: "summary.mae", name: "mean of |E|", formula: "Σ |E| / n", in: allE, calc: func(a args) float64 { return metric.Summarise(a.v[0]).MAE }},
	{path: "summary.rmse", name: "root mean square of E", formula: "√(Σ E² / n)", in: allE, calc: func(a args) float64 { return metric.Summarise(a.v[0]).RMSE }},
	{path: "summary.max_abs", name: "largest |E|", formula: "max |E|", in: allE, calc: func(a args) float64 { return metric.Summarise(a.v[0]).MaxAbs }},
	{path: "summary.max_at", name: "station of the largest |E|", in: from("stations.*.e", "stations.*.x"), calc: func(a args) float64 { return a.v[1][metric.Summarise(a.v[0]).MaxAt] }, formula: "x where |E| is largest"},
	{path: "summary.max_ratio", name: "largest |E|/u_val", formula: "max |E|/u_val", in: from("stations.*.ratio"), calc: func(a args) float64 { return slices.Max(known(a.v[0])) }},
	{path: "summary.within_u_val", name: "stations with |E| ≤ u_val", formula: "count of |E|/u_val ≤ 1", in: from("stations.*.ratio"), calc: func(a args) float64 { return float64(metric.Within(known(a.v[0]), 1)) }},
	{path: "summary.within_k_u_val", name: "stations with |E| ≤ k u_val", formula: "count of |E|/u_val ≤ k", in: from("stations.*.ratio", "choices.k"), calc: func(a args) float64 { return float64(metric.Within(known(a.v[0]), a.n(1))) }},
	{path: "summary.beyond_chance", name: "number beyond k u_val expected by chance", formula: "n P(|z| > k)", words: "for normal errors", in: from("summary.tested", "choices.k"), calc: func(a args) float64 { return a.n(0) * 2 * distuv.UnitNormal.Survival(a.n(1)) }},

	{path: "joint.statistic", name: "joint statistic", formula: "EᵀV⁻¹E = Σ w²", words: "sum of the squared whitened residuals", in: jointParts, calc: sumOfSquares},
	{path: "joint.n", name: "degrees of freedom of the joint statistic", formula: "rank of V", in: allJoint, calc: func(a args) float64 { r, _ := a.residuals(); return float64(r.Rank) }},
	{path: "joint.p_value", name: "tail probability", formula: "P(χ²_n ≥ statistic)", in: from("@.statistic", "@.n"), calc: func(a args) float64 { return comparison.Joint{Statistic: a.n(0), Rank: int(a.n(1))}.P() }},
	{path: "joint.reference", name: "95 % point", formula: "χ²_n, 95 %", in: from("@.n"), calc: chi95},
	{path: "joint.independent", name: "statistic with every source independent", formula: "Σ (E/u_val)²", in: from("stations.*.ratio"), calc: func(a args) float64 {
		kept := []float64{}
		for _, i := range a.joined {
			kept = append(kept, a.v[0][i])
		}
		return sumOfSquares(args{v: [][]float64{kept}})
	}},
	{path: "joint.num_shared", name: "statistic with u_num shared by all stations", formula: "EᵀV⁻¹E with every numerical source common", in: allJoint, calc: func(a args) float64 {
		return float64(a.with(func(p *part) {
			if p.line.Of == OfNumerical && !p.interp {
				p.source = uncertainty.Source{U: p.source.U, Common: true}
			}
		}))
	}},
	{path: "joint.offset", name: "common offset of E", formula: "1ᵀV⁻¹E / 1ᵀV⁻¹1", in: allJoint, calc: func(a args) float64 { s := a.offset(); return s.Offset }},
	{path: "joint.u_offset", name: "standard uncertainty of the offset", formula: "(1ᵀV⁻¹1)^−½", in: allJoint, calc: func(a args) float64 { s := a.offset(); return s.U }},
	{path: "joint.offset_part", name: "part of the statistic by the offset", formula: "(offset / u(offset))²", in: from("@.offset", "@.u_offset"), calc: squaredRatio},
	{path: "joint.remainder", name: "remainder without the offset", formula: "statistic − part of the offset", in: from("@.statistic", "@.offset_part"), calc: func(a args) float64 { return a.n(0) - a.n(1) }},
	{path: "joint.remainder_n", name: "degrees of freedom of the remainder", formula: "n − 1", in: from("@.n"), calc: func(a args) float64 { return ifKnown(a.cell.Joint.Offset, a.n(0)-1) }},
	{path: "joint.remainder_reference", name: "95 % point of the remainder", formula: "χ²_(n−1), 95 %", in: from("@.remainder_n"), calc: chi95},
	{path: "joint.scale", name: "scale b of E = a + b S", formula: "(XᵀV⁻¹X)⁻¹XᵀV⁻¹E, X = (1 S)", in: allJoint, calc: func(a args) float64 { return a.decomposed().Scale }},
	{path: "joint.u_scale", name: "standard uncertainty of the scale", formula: "√ of the second diagonal element of (XᵀV⁻¹X)⁻¹", in: allJoint, calc: func(a args) float64 { return a.decomposed().UScale }},
	{path: "joint.scale_part", name: "part of the statistic by the scale", formula: "(scale / u(scale))²", in: from("@.scale", "@.u_scale"), calc: squaredRatio},
	{path: "joint.shape_part", name: "part of the statistic by shape", formula: "remainder − part of the scale", in: from("@.remainder", "@.scale_part"), calc: func(a args) float64 { return a.n(0) - a.n(1) }},
	{path: "joint.shape_n", name: "degrees of freedom of the shape", formula: "n − 2", in: from("@.n"), calc: func(a args) float64 { return ifKnown(a.cell.Joint.Scale, a.n(0)-2) }},
	{path: "joint.at_least", name: "probability of at least the found number beyond k u_val", formula: "part of 10 000 draws with V", words: "by sampling from a fixed seed; 1 where none was found", in: from("stations.*.ratio", "choices.k", "sources.*.at.*"), calc: (args).chance, direct: true},
	{path: "joint.turns.*.rho", name: "correlation at which the conclusion turns", in: ofTurn("flips", ""), calc: first, words: "the last turn of the curve of the source"},
	{path: "joint.turns.*.at_0", name: "statistic with the source independent", in: ofTurn("points.0", ".statistic"), calc: first, words: "the first point of the curve of the source"},
	{path: "joint.turns.*.at_1", name: "statistic with the source fully shared", in: ofTurn("points", ".statistic"), calc: first, words: "the last point of the curve of the source"},
	{path: "joint.without.*.statistic", name: "statistic without the region", formula: "EᵀV⁻¹E without the stations of the region", in: allJoint, calc: func(a args) float64 { return a.withoutRegion(a.at[0]).Statistic }},
	{path: "joint.without.*.n", name: "degrees of freedom without the region", formula: "rank of V without them", in: allJoint, calc: func(a args) float64 { return float64(a.withoutRegion(a.at[0]).Rank) }},
	{path: "joint.without.*.reference", name: "95 % point", formula: "χ²_n, 95 %", in: from("@.n"), calc: chi95},
	{path: "joint.merged", name: "repeated readings", formula: "stations tested − readings counted", in: from("summary.tested", "stations.*.whitened"), calc: func(a args) float64 { return ifScalar(a, a.n(0)-float64(len(known(a.v[1])))) }},
	{path: "joint.worst", name: "largest whitened residual", formula: "w with the largest |w|", in: from("stations.*.whitened"), calc: func(a args) float64 { return a.v[0][largest(a.v[0])] }},
	{path: "joint.worst_at", name: "station of the largest whitened residual", formula: "x where |w| is largest", in: from("stations.*.whitened", "stations.*.x"), calc: func(a args) float64 { return a.v[1][largest(a.v[0])] }},
	{path: "joint.condition", name: "condition of the matrix of the statistic", formula: "largest over smallest eigenvalue that counts", in: allJoint, calc: func(a args) float64 {
		c, err := comparison.Condition(a.budget(nil))
		if err != nil {
			return math.NaN()
		}
		return c.Condition
	}},
	{path: "joint.eigenvalues.*", name: "eigenvalue of V on the unit diagonal", why: "From V of all sources and stations together; values that count as zero are printed as zero."},
	{path: "joint.correlations.*.n", name: "degrees of freedom", in: from("joint.n"), formula: "rank of V", calc: first},
	{path: "joint.correlations.*.reference", name: "95 % point", formula: "χ²_n, 95 %", in: from("@.n"), calc: chi95},
	{path: "joint.correlations.*.low", name: "1 % point", formula: "χ²_n, 1 %", in: from("@.n"), calc: func(a args) float64 { return comparison.ChiSquare(lowTail, int(a.n(0))) }},
	{path: "joint.correlations.*.points.*.rho", name: "assumed correlation", formula: "step / 20", why: "The range 0 to 1 in twenty steps."},
	{path: "joint.correlations.*.points.*.statistic", name: "statistic at the assumed correlation", formula: "EᵀV⁻¹E with u²(1−ρ) independent and u²ρ shared", in: from("stations.*.e", "sources.*.at.*", "@.rho"), calc: (args).atCorrelation},
	{path: "joint.correlations.*.flips.*", name: "correlation at which the conclusion turns", why: "The place where the curve of the statistic meets its 95 % point, by halving between the two points around it."},
	{path: "joint.station.statistic", name: "statistic without the station that changes it most", formula: "EᵀV⁻¹E without the station", in: allJoint, calc: func(a args) float64 { return a.withoutStation().Statistic }},
	{path: "joint.station.n", name: "degrees of freedom without it", formula: "rank of V without it", in: allJoint, calc: func(a args) float64 { return float64(a.withoutStation().Rank) }},
	{path: "joint.station.reference", name: "95 % point", formula: "χ²_n, 95 %", in: from("@.n"), calc: chi95},
	{path: "joint.turning", name: "stations that turn the conclusion when left out alone", in: allJoint, formula: "count", calc: (args).turning},

	{path: "scores.*.value", name: "measure", words: "of S and D at the stations", formula: "as its name says; see the methods", in: scoreInputs, calc: (args).score},
	{path: "scores.*.criteria.*.low", name: "lower limit of a criterion", why: "A limit of the field; its source stands beside it."},
	{path: "scores.*.criteria.*.high", name: "upper limit of a criterion", why: "A limit of the field; its source stands beside it."},
	{path: "regions.*.from", name: "beginning of the region", words: "as entered", in: regionEntry("from"), calc: first},
	{path: "regions.*.to", name: "end of the region", words: "as entered", in: regionEntry("to"), calc: first},
	{path: "regions.*.n", name: "stations of the region", formula: "count", in: from("stations.*.x", "stations.*.d"), calc: func(a args) float64 { return float64(len(a.regionAt(a.spot.at[0]))) }},
	{path: "regions.*.bias", name: "mean of E in the region", formula: "Σ E / n", in: allE, calc: func(a args) float64 { return metric.Summarise(a.regionOf(a.v[0])).Bias }},
	{path: "regions.*.rmse", name: "root mean square of E in the region", formula: "√(Σ E² / n)", in: allE, calc: func(a args) float64 { return metric.Summarise(a.regionOf(a.v[0])).RMSE }},
	{path: "regions.*.hit_rate", name: "hit rate in the region", formula: "part with |E| within the fraction of D or the allowance", in: allSD, calc: (args).hitRate},
	{path: "regions.*.beyond", name: "stations of the region beyond k u_val", formula: "count of |E|/u_val > k", in: from("stations.*.ratio", "choices.k"), calc: func(a args) float64 {
		return count(a.regionOf(a.v[0]), func(r float64) bool { return exceeds(r, a.n(1)) })
	}},

	{path: "crossings.sim.*.x", name: "change of sign of the simulation", formula: "x₁ + (x₂ − x₁) y₁/(y₁ − y₂)", words: "by a straight line between the two rows", in: crossingRows("sim"), calc: crossingAt},
	{path: "crossings.ref.*.x", name: "change of sign of the data", formula: "x₁ + (x₂ − x₁) y₁/(y₁ − y₂)", words: "by a straight line between the two rows", in: crossingRows("ref"), calc: crossingAt},
	{path: "crossings.sim.*.u", name: "standard uncertainty of the crossing", why: "u_num of the neighbouring stations, brought to the place by a straight line, over the slope of the simulation there."},
	{path: "crossings.ref.*.u", name: "standard uncertainty of the crossing", why: "u_D of the neighbouring stations, brought to the place by a straight line, over the slope of the data there."},

	judgedBy("mean", "mean of the monitor", "Σ y / n over its window", func(m settling.Monitor) float64 { return m.Mean }),
	judgedBy("u", "standard uncertainty that the monitor leaves", "by its class: s/√n_eff, half-range/√3, or U_iter/2", func(m settling.Monitor) float64 { return m.U }),
	judgedBy("from", "beginning of the window", "first row behind the start-up, or of the whole cycles", func(m settling.Monitor) float64 { return m.Window[0] }),
	judgedBy("to", "end of the window", "last row", func(m settling.Monitor) float64 { return m.Window[1] }),
	judgedBy("drift", "drift", "slope of a straight fit over the end, times the length it is stated for, over the scale", func(m settling.Monitor) float64 { return m.Drift }),
	judgedBy("change", "drift in the unit of the values", "slope times the length it is stated for", func(m settling.Monitor) float64 { return m.Drift * m.Scale }),
	judgedBy("per", "length over which the drift is stated", "power of ten", func(m settling.Monitor) float64 { return m.Per }),
	judgedBy("limit", "change that counts as small", "U_grid/10, or a thousandth of the scale", func(m settling.Monitor) float64 { return m.Limit }),
	judgedBy("remaining", "change that remains", "by geometric extrapolation of the end", func(m settling.Monitor) float64 { return m.Remaining }),
	judgedBy("period", "period of a cycle", "largest autocorrelation, or as entered", func(m settling.Monitor) float64 { return m.Period }),
	judgedBy("cycles", "whole cycles in the window", "count", func(m settling.Monitor) float64 { return float64(m.Cycles) }),
	judgedBy("half_range", "half of the range in the window", "(max y − min y)/2", func(m settling.Monitor) float64 { return m.HalfRange }),
	sampledBy("start_up", "rows left out in front", "count", func(s *settling.Stat) float64 { return float64(s.StartUp) }),
	sampledBy("rows", "rows averaged", "count", func(s *settling.Stat) float64 { return float64(s.Rows) }),
	sampledBy("sd", "standard deviation of one row", "√(Σ (y − mean)² / (n − 1))", func(s *settling.Stat) float64 { return s.SD }),
	sampledBy("tau", "correlation time", "step times the factor on the variance of the mean", func(s *settling.Stat) float64 { return s.Tau }),
	sampledBy("independent", "independent samples", "n / τ", func(s *settling.Stat) float64 { return s.Independent }),
	sampledBy("batches", "batches", "count", func(s *settling.Stat) float64 { return float64(s.Batch.Count) }),
	sampledBy("u_batches", "standard uncertainty of the mean by batches", "s_batch / √batches", func(s *settling.Stat) float64 { return s.Batch.U }),
	sampledBy("u_markov", "the same from successive rows alone", "s √((1 + r₁)/((1 − r₁) n))", func(s *settling.Stat) float64 { return s.UMarkov }),
	{path: "monitors.*.sampling.share", name: "part of u_num that the averaging is", formula: "u / u_num, root mean square over the stations", in: from("stations.*.u_num"), why: "From u of the monitor above it."},
	{path: "monitors.*.of_grid", name: "iteration over the grid", formula: "U_iter / U", words: "U_iter: 2 u, of iterates that keep changing half their range", in: func(p spot) []string { return from("@.u", "@.half_range", "grids.u")(p) }, calc: ofGrid},
	{path: "monitors.*.x.*", name: "place of a drawn row", words: "as read", in: monitorRow("x"), calc: first},
	{path: "monitors.*.y.*", name: "drawn value", words: "as read", in: monitorRow("y"), calc: first},
	{path: "balances.*.in", name: "what enters", words: "last row of the balance", in: balanceRow("x"), calc: first},
	{path: "balances.*.out", name: "what leaves", words: "last row of the balance", in: balanceRow("y"), calc: first},
	{path: "balances.*.net", name: "in less out", formula: "in − out", in: from("@.in", "@.out"), calc: func(a args) float64 { return a.n(0) - a.n(1) }},
	{path: "balances.*.fraction", name: "imbalance", formula: "(in − out) / scale", in: from("@.net", "@.scale"), calc: func(a args) float64 { return a.n(0) / a.n(1) }},
	{path: "balances.**", name: "balance", why: "The judgement of the balance; what it is taken of stands beside it, the rule in the methods."},

	{path: "grids.points.*.cells", name: "cells of the grid", words: "as stated", in: gridCells, calc: first},
	{path: "grids.points.*.h", name: "spacing relative to the finest", formula: "(N_finest / N)^(1/dimension)", in: from("grids.points.*.cells", "@.cells", "choices.dimension"), calc: func(a args) float64 { return spacing(slices.Max(a.v[0])/a.n(1), int(a.n(2))) }},
	{path: "grids.points.*.value", name: "value on the grid", words: "as read", in: gridValue, calc: first},
	{path: "grids.dimension", name: "dimension of the grids", in: from("choices.dimension"), calc: first, words: "chosen"},
	{path: "grids.formal", name: "formal order", in: from("choices.formal"), calc: first, words: "chosen"},
	{path: "grids.k_num", name: "factor from U_num to u_num", in: from("choices.k_num"), calc: first, words: "chosen"},
	ofGrids("ratio", "ratio of changes R", "(f₁ − f₂)/(f₂ − f₃)", func(_ args, r refinement.Result) float64 { return r.Ratio }, nil),
	ofGrids("r21", "refinement ratio of the two finest grids", "(N₁/N₂)^(1/dimension)", func(_ args, r refinement.Result) float64 { return r.R21 }, func(_ args, l refinement.Local) float64 { return l.R21 }),
	ofGrids("r32", "refinement ratio of the next two", "(N₂/N₃)^(1/dimension)", func(_ args, r refinement.Result) float64 { return r.R32 }, func(_ args, l refinement.Local) float64 { return l.R32 }),
	ofGrids("order", "observed order p", "p of the values on the grids; along a curve the median of the local orders, kept between 0.5 and the formal order", func(_ args, r refinement.Result) float64 { return r.Order }, func(_ args, l refinement.Local) float64 { return l.Common }),
	ofGrids("extrapolated", "extrapolated value", "(r^p f₁ − f₂)/(r^p − 1), or that of the rule", func(a args, r refinement.Result) float64 { return a.yUnit.FromSI(r.Extrapolated) }, nil),
	ofGrids("ea", "relative change of the two finest", "|f₁ − f₂| / |f₁|", func(_ args, r refinement.Result) float64 { return r.Ea }, nil),
	ofGrids("eext", "relative distance to the extrapolated value", "|f₁ − f_ext| / |f_ext|", func(_ args, r refinement.Result) float64 { return r.Eext }, nil),
	ofGrids("gci", "grid index", "U / |f₁|", func(_ args, r refinement.Result) float64 { return r.GCI }, nil),
	ofGrids("u", "grid uncertainty U, 95 %", "1.25 |f₁ − f₂|/(r^p − 1), or U of the rule", func(a args, r refinement.Result) float64 { return float64(a.step(r.U)) }, nil),
	ofGrids("u_num", "u_num of the grid study", "U / k_num, of oscillating values half their range / √3; along a curve root mean square over the stations", func(a args, r refinement.Result) float64 {
		return float64(a.step(r.StandardUncertainty(float64(a.cell.Grids.KNum))))
	}, alongStandard),
	ofGrids("monotone", "stations that converge monotonically", "count", nil, func(_ args, l refinement.Local) float64 { return float64(l.Monotone) }),
	ofGrids("non_monotone", "stations that do not", "count", nil, func(_ args, l refinement.Local) float64 { return float64(l.NonMonotone) }),
	ofGrids("order_low", "lower quartile of the local orders", "quartile", nil, func(_ args, l refinement.Local) float64 { return l.Low }),
	ofGrids("order_high", "upper quartile of the local orders", "quartile", nil, func(_ args, l refinement.Local) float64 { return l.High }),
	ofGrids("local.*.order", "observed order at the station", "p of the three values there", nil, localGrid(func(_ args, p refinement.LocalPoint) float64 { return p.Order })),
	ofGrids("local.*.u", "grid uncertainty U at the station", "1.25 |f₁ − f₂|/(r^p − 1) with the common p, or as the class there asks", nil, localGrid(func(a args, p refinement.LocalPoint) float64 { return float64(a.step(p.U)) })),
	ofGrids("rules.*.u", "U by the rule", "by the rule that stands beside it", func(a args, _ refinement.Result) float64 { return float64(a.step(a.otherRule().U)) }, nil),
	ofGrids("rules.*.u_num", "u_num by the rule", "U / k_num", func(a args, _ refinement.Result) float64 {
		return float64(a.step(a.otherRule().StandardUncertainty(float64(a.cell.Grids.KNum))))
	}, nil),
	ofGrids("fit.base", "value at zero spacing", "f₀ of f = f₀ + Σ a h^p", func(a args, r refinement.Result) float64 {
		if r.Fit == nil {
			return math.NaN()
		}
		return a.yUnit.FromSI(r.Fit.Base)
	}, nil),
	ofGrids("fit.terms.*.coefficient", "coefficient of the line behind U", "a of f = f₀ + Σ a h^p", fitTerm(func(a args, t refinement.Term) float64 { return float64(a.step(t.Coefficient)) }), nil),
	ofGrids("fit.terms.*.power", "power of the line behind U", "p of f = f₀ + Σ a h^p", fitTerm(func(_ args, t refinement.Term) float64 { return t.Power }), nil),
	{path: "grids.next_cells", name: "cells of a grid that would resolve the requirement", formula: "N (u/u_needed)^(dimension/p)", words: "u_needed: √(u_val,needed² − u_val² + u_num²); three digits", in: nextInputs, calc: func(a args) float64 { return quantity.Round(a.nextAgain().Cells, 3) }, direct: true},
	{path: "grids.next_cost", name: "its cost relative to the finest run", formula: "(cells/N)^exponent", words: "from the cells before they are rounded", in: nextInputs, calc: func(a args) float64 { return a.nextAgain().Cost }},
	{path: "grids.stated.u", name: "stated u_num", words: "as entered", in: from("entered.family.target"), calc: first},
	{path: "grids.stated.cells", name: "cells of a grid that would reach it", formula: "N (u_num/u)^(dimension/p)", words: "three digits", in: nextInputs, calc: func(a args) float64 { return quantity.Round(a.nextAgain().Cells, 3) }, direct: true},
	{path: "grids.stated.cost", name: "its cost relative to the finest run", formula: "(cells/N)^exponent", words: "from the cells before they are rounded", in: nextInputs, calc: func(a args) float64 { return a.nextAgain().Cost }},
	{path: "grids.card.ratios.*.r", name: "ratio of the spacings of two grids", formula: "(N_fine/N_coarse)^(1/dimension)", in: ratioCells, calc: func(a args) float64 { return spacing(a.n(0)/a.n(1), int(a.n(2))) }},
	{path: "grids.local.*.x", name: "station", in: func(p spot) []string { return from("stations." + strconv.Itoa(p.at[0]) + ".x")(p) }, calc: first, words: "the station"},

	{path: "sources.*.u", name: "standard uncertainty of the source", formula: "√(Σ u² / n)", words: "root mean square over the tested stations", in: func(p spot) []string { return from("sources." + strconv.Itoa(p.at[0]) + ".at.*")(p) }, calc: func(a args) float64 {
		rows := a.averaged()
		if len(a.v[0]) < len(a.x) { // it is kept apart from u_val
			return math.NaN()
		}
		return math.Sqrt(squares(a.v[0], rows) / float64(len(rows)))
	}},
	{path: "sources.*.share", name: "share of the mean u_val²", formula: "Σ u² / Σ u_val²", in: func(p spot) []string {
		return from("sources."+strconv.Itoa(p.at[0])+".at.*", "stations.*.u_val")(p)
	}, calc: func(a args) float64 { return squares(a.v[0], a.averaged()) / squares(a.v[1], a.averaged()) }},
	{path: "degrees", name: "effective degrees of freedom", formula: "u_val⁴ / Σ (u⁴/ν)", words: "the least over the stations", in: from("sources.*.at.*"), calc: (args).leastDegrees},
	{path: "k_95", name: "factor for 95 % with them", formula: "Student's t, 97.5 %", in: from("degrees"), calc: func(a args) float64 { k, _ := uncertainty.StudentFactor(0.95, a.n(0)); return k }, direct: true},

	{path: "requirement.limit", name: "limit of the requirement", formula: "as entered, or percent of |D| at the deciding station", in: requirementInputs, calc: func(a args) float64 {
		if len(a.v) > 1 {
			return math.Abs(a.n(1)) * a.n(0) / 100
		}
		return a.n(0)
	}},
	{path: "requirement.percent", name: "requirement in percent", words: "as entered", in: from("entered.requirement.value"), calc: first},
	{path: "requirement.at", name: "deciding station", words: "where the outcome is decided", in: deciding("x"), calc: first},
	{path: "requirement.u_val_needed", name: "u_val that would resolve the requirement", formula: "(limit − |E|)/k, or (|E| − limit)/k", in: func(p spot) []string { return append(deciding("e")(p), "requirement.limit", "choices.k") }, calc: func(a args) float64 {
		if needed, ok := adequacy.Needed(a.n(0), a.n(2), a.n(1)); ok {
			return needed
		}
		return (math.Abs(a.n(0)) - a.n(1)) / a.n(2)
	}},
	{path: "requirement.u_num_needed", name: "u_num that would resolve it", formula: "√(u_val,needed² − u_val² + u_num²)", in: func(p spot) []string {
		return append(append(deciding("u_val")(p), deciding("u_num")(p)...), "requirement.u_val_needed")
	}, calc: func(a args) float64 {
		if u, ok := adequacy.PartNeeded(a.n(0), a.n(1), a.n(2)); ok {
			return u
		}
		return math.NaN()
	}},
	{path: "requirement.u_num_reduction", name: "reduction of u_num", formula: "1 − u_num,needed / u_num", in: func(p spot) []string { return append(deciding("u_num")(p), "requirement.u_num_needed") }, calc: func(a args) float64 { return 1 - a.n(1)/a.n(0) }},

	{path: "requirement.ways.*.now", name: "standard uncertainty of the source", words: "at the deciding station", formula: "|u|", in: wayNow, calc: func(a args) float64 {
		if len(a.v) == 0 {
			return math.NaN()
		}
		return math.Abs(a.n(0))
	}},
	{path: "requirement.ways.*.needed", name: "what it alone would have to be", formula: "√(u_val,needed² − u_val² + u²)", in: func(p spot) []string {
		return append(deciding("u_val")(p), from("@.now", "requirement.u_val_needed")(p)...)
	}, calc: func(a args) float64 {
		u, _ := adequacy.PartNeeded(a.n(0), a.n(1), a.n(2))
		return u
	}},
	{path: "requirement.ways.*.reduction", name: "reduction of the source", formula: "1 − needed / now", in: from("@.needed", "@.now"), calc: func(a args) float64 { return 1 - a.n(0)/a.n(1) }},
	{path: "requirement.ways.*.readings", name: "readings that would do", formula: "⌈n (now/needed)²⌉", words: "0 where the source is no mean of readings", in: from("@.now", "@.needed"), calc: wayReadings, direct: true},
	{path: "requirement.ways.*.cells", name: "cells of the grid that would do", words: "of the grid study", in: from("grids.next_cells"), calc: first},
	{path: "requirement.ways.*.cost", name: "cost of its run", words: "of the grid study", in: from("grids.next_cost"), calc: first},

	{path: "stations.*.percent", name: "E in percent of |D|", formula: "100 E / |D|", in: from("@.e", "@.d"), calc: func(a args) float64 { return 100 * a.n(0) / math.Abs(a.n(1)) }},
	{path: "stations.*.weight", name: "weight of the station", formula: "weight / Σ weights", words: "as the file states it, or the length that the station stands for", in: weightInputs, calc: weightAt},
	{path: "treatment.anchors.*.x", name: "place of the support point", formula: "as entered; beyond a plane of symmetry 2 x_plane − x", in: anchorInputs("x"), calc: anchorAt},
	{path: "treatment.anchors.*.value", name: "value of the support point", words: "as entered; beyond a plane of symmetry that of the row nearest to it", in: anchorInputs("y"), calc: first},
	{path: "treatment.noise.s", name: "scatter of the data between stations", formula: "√(Σ δ²/n), or 1.4826 median |δ| where that is less", words: "δ: a reading less the straight line between its neighbours, scaled to one reading", in: xAndD, calc: func(a args) float64 { s, _, _ := plausibility.Noise(ascending(a.v[0], a.v[1])); return s }},
	{path: "treatment.noise.rows", name: "readings between two others", formula: "count", in: xAndD, calc: func(a args) float64 { _, n, _ := plausibility.Noise(ascending(a.v[0], a.v[1])); return float64(n) }},
	{path: "treatment.noise.stated", name: "stated uncertainty that is independent between stations", formula: "√(Σ u² / n)", in: randomParts, calc: func(a args) float64 { return math.Sqrt(allSquares(a.v) / float64(len(a.x))) }},
	{path: "treatment.fit.n", name: "stations inside the curve at every shift", formula: "count", in: fitInputs, calc: func(a args) float64 { return float64(a.displaced().N) }, direct: true, search: 1e-5},
	{path: "treatment.fit.rms", name: "root mean square of E there", formula: "√(Σ E² / n)", in: fitInputs, calc: func(a args) float64 { return float64(a.step(a.displaced().RMS)) }, direct: true, search: 1e-5},
	{path: "treatment.fit.shift", name: "shift nearest to the data", formula: "Δ with the least Σ (S(x − Δ) − D)²", in: fitInputs, calc: func(a args) float64 { return a.xUnit.StepFromSI(a.displaced().Shift) }, direct: true, search: 1e-5},
	{path: "treatment.fit.shift_rms", name: "root mean square with that shift", formula: "√(Σ (S(x − Δ) − D)² / n)", in: fitInputs, calc: func(a args) float64 { return float64(a.step(a.displaced().ShiftRMS)) }, direct: true, search: 1e-5},
	{path: "treatment.fit.scale", name: "scale nearest to the data", formula: "Σ S D / Σ S²", in: fitInputs, calc: func(a args) float64 { return a.displaced().Scale }, direct: true, search: 1e-5},
	{path: "treatment.fit.scale_rms", name: "root mean square with that scale", formula: "√(Σ (a S − D)² / n)", in: fitInputs, calc: func(a args) float64 { return float64(a.step(a.displaced().ScaleRMS)) }, direct: true, search: 1e-5},
	{path: "treatment.fit.both_shift", name: "shift of the nearest with both", formula: "Δ with the least Σ (a S(x − Δ) − D)²", in: fitInputs, calc: func(a args) float64 { return a.xUnit.StepFromSI(a.displaced().BothShift) }, direct: true, search: 1e-5},
	{path: "treatment.fit.both_scale", name: "scale of the nearest with both", formula: "Σ S D / Σ S² at that shift", in: fitInputs, calc: func(a args) float64 { return a.displaced().BothScale }, direct: true, search: 1e-5},
	{path: "treatment.fit.both_rms", name: "root mean square with both", formula: "√(Σ (a S(x − Δ) − D)² / n)", in: fitInputs, calc: func(a args) float64 { return float64(a.step(a.displaced().BothRMS)) }, direct: true, search: 1e-5},
	{path: "treatment.integral.e", name: "integral of E", formula: "∫ E dx by the trapezoid", in: integralOf("e"), calc: (args).integral},
	{path: "treatment.integral.s", name: "integral of S", formula: "∫ S dx by the trapezoid", in: integralOf("s"), calc: (args).integral},
	{path: "treatment.integral.d", name: "integral of D", formula: "∫ D dx by the trapezoid", in: integralOf("d"), calc: (args).integral},
	{path: "treatment.integral.u", name: "standard uncertainty of the integral of E", formula: "√(wᵀVw), w the length a station stands for", in: from("stations.*.x", "sources.*.at.*"), calc: (args).uIntegral},
	{path: "treatment.integral.length", name: "length of the integral", formula: "Σ of the lengths that the stations stand for", in: from("stations.*.x"), calc: (args).integral},
	{path: "treatment.integral.whole", name: "length of all stations of the data", formula: "largest − least x", in: from("read.ref.x.*"), calc: func(a args) float64 { lo, hi := profile.Limits(a.v[0]); return hi - lo }},
	{path: "treatment.integral.pieces", name: "pieces of the integral", formula: "count of runs of two and more stations without a gap", in: from("stations.*.x"), calc: func(a args) float64 {
		return count(pieceLengths(a.segments()), func(n float64) bool { return n > 1 })
	}},
	{path: "application.place.at.*", name: "point of application", words: "as entered", in: func(p spot) []string { return []string{"stated.application." + strconv.Itoa(p.at[0]) + ".value"} }, calc: first},
	{path: "application.place.points.*.at.*", name: "compared condition", words: "as entered", in: comparedAt, calc: first},
	{path: "application.place.beyond", name: "distance of the point from what was compared", formula: "least distance to the hull of the comparisons, each condition as a part of its span", in: placeInputs, calc: func(a args) float64 { return a.located().Beyond }, direct: true},
	{path: "application.place.distance", name: "distance to the nearest comparison", formula: "√Σ ((x − x_nearest)/span)²", in: placeInputs, calc: func(a args) float64 { return a.located().Distance }, direct: true},
	{path: "measured.*.value", name: "measure of E", formula: "as its name says, over the tested stations", in: allE, calc: func(a args) float64 {
		return summaryOf(a.cell.Measured[a.spot.at[0]].Name, pick(a.v[0], a.tested))
	}},
	{path: "measured.*.u", name: "standard uncertainty of the measure", formula: "deviation of draws with V", words: "by sampling from a fixed seed", in: errorsAndSources, calc: measuredSpread(func(s metric.Spread) float64 { return s.U }), direct: true},
	{path: "measured.*.floor", name: "floor of the measure", formula: "mean of the measure of draws about zero with V", words: "what the stated errors alone make", in: errorsAndSources, calc: measuredSpread(func(s metric.Spread) float64 { return s.Floor }), direct: true},
	{path: "measured.*.floor_hi", name: "95 % point of the floor", formula: "quantile of the measure of draws about zero with V", in: errorsAndSources, calc: measuredSpread(func(s metric.Spread) float64 { return s.FloorHi }), direct: true},
	takenBy("value", "scalar of the side", "as its kind says", func(t *taking, _ args, s derived.Scalar) float64 { return float64(t.value(s.Value)) }),
	takenBy("u", "standard uncertainty of what the method leaves open", "√Σ u² of its choices", func(t *taking, _ args, s derived.Scalar) float64 { return float64(t.step(s.U())) }),
	takenBy("rows", "rows that it was taken from", "count", func(_ *taking, _ args, s derived.Scalar) float64 { return float64(s.Rows) }),
	takenBy("at", "place that it stands for", "as its kind says", func(t *taking, _ args, s derived.Scalar) float64 { return t.x.FromSI(s.At * t.length) }),
	takenBy("edge", "velocity at the edge", "by the rule of the edge", func(t *taking, _ args, s derived.Scalar) float64 { return t.y.FromSI(s.Edge) }),
	takenBy("overshoot", "overshoot over the edge", "(max u − u_e)/u_e", func(_ *taking, _ args, s derived.Scalar) float64 { return s.Overshoot }),
	takenBy("gap", "gap of the contour", "distance of its ends, in lengths", func(_ *taking, _ args, s derived.Scalar) float64 { return s.Gap }),
	takenBy("effects.*.change", "change by another choice of the method", "scalar with the other choice less the scalar", func(t *taking, a args, s derived.Scalar) float64 {
		return float64(t.step(s.Effects[a.spot.at[1]].Change))
	}),
	takenBy("effects.*.u", "standard uncertainty that it stands for", "part of the change", func(t *taking, a args, s derived.Scalar) float64 {
		return float64(t.step(s.Effects[a.spot.at[1]].Part()))
	}),
	takenBy("places.*.x", "candidate of the event", "x₁ + (x₂ − x₁) y₁/(y₁ − y₂)", func(t *taking, a args, s derived.Scalar) float64 { return t.x.FromSI(s.Places[a.spot.at[1]].X) }),
	{path: "derived.sides.*.places.*.u", name: "standard uncertainty of the candidate", why: "That of the values there over the slope."},
	{path: "derived.effect", name: "effect of the stations on the simulation", formula: "at all rows − at the stations", in: func(p spot) []string {
		return append(p.takenFrom("simulation at all its rows"), p.takenFrom("simulation at the stations")...)
	}, calc: func(a args) float64 { return a.n(0) - a.n(1) }},
	{path: "taken.*.x.*", name: "place of the curve", words: "a row, or a station of the data", in: takenRow, calc: first},
	{path: "taken.*.y.*", name: "value of the curve", words: "a row, or between rows", in: takenRow, calc: takenValue},
	{path: "taken.*.second.*", name: "second column of the curve", why: "As read from the second column, between rows where the place is none."},
	{path: "derived.**", name: "derived value", why: "From the rows of the curves of both sides by the definition that stands beside it, by the same code."},
	{path: "inputs.**", name: "input", why: "Entered, or from pairs of runs; where it comes from stands beside it."},
	{path: "members.**", name: "sampled runs", why: "From the runs of the sample, each a file of its own."},
	{path: "distributions.runs", name: "runs of the simulation", why: "One, or the runs with sampled inputs."},
	{path: "distributions.readings", name: "readings of the data", formula: "count", in: distributionInputs, calc: func(a args) float64 {
		if len(a.v) < 2 {
			return math.NaN()
		}
		return float64(len(a.v) - 1)
	}},
	{path: "distributions.area", name: "area between the distributions of S and D", formula: "∫ |F_S − F_D|", in: distributionInputs, calc: func(a args) float64 {
		if len(a.v) < 2 {
			return math.NaN()
		}
		return metric.Area(a.v[0], slices.Concat(a.v[1:]...))
	}},
	{path: "distributions.shift", name: "difference of the means", formula: "mean S − mean D", in: distributionInputs, calc: func(a args) float64 {
		if len(a.v) < 2 {
			return math.NaN()
		}
		return mean(a.v[0]) - mean(slices.Concat(a.v[1:]...))
	}},
	{path: "shared.**", name: "source that acts on both sides", why: "Root mean squares over the stations of the source, and of what is left of it in E."},
	{path: "bound.**", name: "interval beside u_val", why: "The sum of the sources that are known as an interval only."},
	{path: "sampled.**", name: "sampled model error", why: "By draws from the stated distributions from a fixed seed; it stands beside the interval E ± k u_val."},
	{path: "bounding.**", name: "u_D that would make |E| = k u_val", why: "From |E| and the other parts of u_val; no statement rests on it."},
	{path: "residuals.**", name: "residual of the run", why: judgedWhy},
	{path: "round_off.**", name: "effect of round-off", why: "From the two runs that are set against each other."},
	{path: "num_sums.root", name: "u_num as root sum of squares", formula: "√(Σ u²)", words: "root mean square over the stations", in: numericalParts, calc: summedBy(math.Hypot)},
	{path: "num_sums.linear", name: "u_num as plain sum", formula: "Σ u", words: "root mean square over the stations", in: numericalParts, calc: summedBy(func(a, b float64) float64 { return a + b })},

	{path: "marine.**", name: "order of |E|, U_V and the requirement", why: "From |E|, u_val and the limit of each station, all at 95 %; how often each order occurs is counted."},
	{path: "trend.**", name: "change from another case", why: "From S, D and the sources of this case and of the other; the sources that cancel stand beside it."},
	{path: "recorded.*.in", name: "entry of the log", why: "It is the place itself."},
	{path: "choices.**", name: "choice", why: "Chosen by a person; the log says when."},
	{path: "grids.**", name: "grid study", why: "From the grids and values above it by the rule, or the entry, that stands beside it; its formula in the methods."},
	{path: "requirement.**", name: "requirement", why: "From the requirement, E and the parts of u_val, with all else unchanged; what it is for stands beside it."},
	{path: "replicates.**", name: "repeated readings", why: "From the readings that the file lists more than once, by the levels that stand beside it."},
	{path: "consistency.**", name: "consistency of the data", why: "From the data alone, by the relation that stands beside it."},
	{path: "resolution.**", name: "resolution of the data", why: "From the smallest step between the values as they are written."},
	{path: "steps.**", name: "joint study of grid and time step", why: "From the runs of the study of grid and time step, by the fit that stands beside it."},
	{path: "borrowed.**", name: "grid uncertainty taken over", why: "From the grid study that it was taken over from, with the reason entered."},
	{path: "references.**", name: "reference quantity of the case", why: "Stated on the card of the case, with its origin."},
	{path: "reduction.**", name: "reduction of the data", why: "From the columns of the file by the formula that stands beside it."},
	{path: "fragile.**", name: "choice that changes a word", why: "From the cell evaluated again with the other choice."},

	{path: "open.*.course", name: "course of an open point", why: "It is a place on the page."},
	{path: "notices.*.line", name: "line of a notice", why: "It is the place itself."},
	{path: "notices.*.column", name: "column of a notice", why: "It is the place itself."},
	{path: "curve.x.*", name: "place of the drawn curve", words: "as read", in: drawnRow("x"), calc: first},
	{path: "curve.y.*", name: "value of the drawn curve", words: "as read", in: drawnRow("y"), calc: first},
	{path: "curve.u_num.*", name: "u_num of the drawn band", why: "u_num of the stations, brought to the rows of the curve by straight lines for the picture; no number rests on it."},
}

func first(a args) float64 { return a.n(0) }

func mean(values []float64) float64 { m, _, _ := uncertainty.Replicates(values); return m }

func count(values []float64, is func(float64) bool) float64 {
	n := 0.0
	for _, v := range values {
		if is(v) {
			n++
		}
	}
	return n
}

// rootSum leaves out what is not known; nothing known gives nothing.
func rootSum(a args) float64 {
	sum, any := 0.0, false
	for _, list := range a.v {
		for _, u := range known(list) {
			sum, any = sum+float64(u*u), true
		}
	}
	if !any {
		return math.NaN()
	}
	return math.Sqrt(sum)
}

func sumOfSquares(a args) float64 {
	sum := 0.0
	for _, v := range known(a.v[0]) {
		sum += float64(v * v)
	}
	return sum
}

func squaredRatio(a args) float64 { r := a.n(0) / a.n(1); return r * r }

func chi95(a args) float64 {
	if a.n(0) < 1 {
		return math.NaN()
	}
	return comparison.ChiSquare95(int(a.n(0)))
}

func ifKnown(n Number, v float64) float64 {
	if !n.Known() {
		return 0
	}
	return v
}

// ifScalar is 0 for a scalar, which has no residuals to count.
func ifScalar(a args, v float64) float64 {
	if a.cell.Scalar {
		return 0
	}
	return v
}

// largest returns the place of the largest magnitude, the first of equal ones.
func largest(values []float64) int {
	best, most := 0, -1.0
	for i, v := range values {
		if math.Abs(v) > most {
			best, most = i, math.Abs(v)
		}
	}
	return best
}

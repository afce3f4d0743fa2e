package memo

import (
	"strconv"

	"weirmark/core/quantity"
	"weirmark/core/uncertainty"
)

// formula is a display formula with what it is called.
func formula(template string) Node { return block(Paragraph, "formula", say(template)...) }

// methods states how the numbers were made. The texts are fixed; the choices
// of a study are in the assumptions.
func (b *builder) methods() Node {
	s := b.open(1, "methods", "Methods")
	s.Nodes = append(s.Nodes,
		note(say("Edition of the methods: {}. Published methods are named from professional knowledge; no clause is quoted and no conformity to a standard is claimed.", given(b.in.Edition))...))
	for _, part := range []func() []Node{signs, budgetMethod, jointMethod, settlingMethod, gridMethod, stationPolicy, adequacyMethod, coverageMethod, printing} {
		s.Nodes = append(s.Nodes, part()...)
	}
	return s
}

func signs() []Node {
	return []Node{
		heading("Comparison error and validation uncertainty"),
		paragraph(say("*S* is the simulation, *D* the reference at the same station. The sign convention is *S* minus *D*: a positive *E* says that the simulation lies above the reference.")...),
		formula("*E* = *S* − *D*"),
		formula("*u*_{val} = √( *u*_{num}^{2} + *u*_{int}^{2} + *u*_{input}^{2} + *u*_{D}^{2} )"),
		formula("model error within  *E* − *k* *u*_{val}  to  *E* + *k* *u*_{val}"),
		paragraph(say("All *u* are standard uncertainties; *U* is expanded. The parts are taken as independent of each other. Readings: |*E*| ≤ *u*_{val}, within noise; |*E*| > *k* *u*_{val}, sign resolved; between the two, the sign is not resolved. A part that is not known is left out and named; it is not zero. Without *u*_{D} there is a comparison only. Source: ASME V&V 20 (from professional knowledge; no clause is quoted).")...),
	}
}

func budgetMethod() []Node {
	return []Node{
		heading("Uncertainty sources and correlation"),
		paragraph(say("A source is entered as a half-width with its basis and coverage and divided by its coverage factor: 1 for standard, *k* as stated, the normal quantile for a level in percent, √3 for limits of a rectangular distribution. A source is independent between stations or common to all of them; the covariance of the stations is")...),
		formula("*V* = diag( Σ *u*^{2} of independent sources ) + Σ *c* *c*^{T} of common sources"),
		paragraph(text("Source: JCGM 100:2008, Guide to the expression of uncertainty in measurement (from professional knowledge; no clause is quoted).")),
	}
}

func jointMethod() []Node {
	return []Node{
		heading("Joint statistic"),
		formula("*χ*^{2} = *E*^{T} *V*^{−1} *E*,  with the rank of *V* as degrees of freedom"),
		formula("offset *a* = ( 1^{T}*V*^{−1}*E* ) / ( 1^{T}*V*^{−1}1 ),   *u*(*a*) = ( 1^{T}*V*^{−1}1 )^{−1/2}"),
		formula("*χ*^{2} = ( *a*/*u*(*a*) )^{2} + ( *E* − *a* )^{T} *V*^{−1} ( *E* − *a* )"),
		paragraph(say("The statistic is held against the 95 % point of the *χ*^{2} distribution for normal errors. It says whether the stated uncertainties account for the difference, not why there is one. Generalised least squares and the use of *χ*^{2} are textbook methods.")...),
	}
}

func settlingMethod() []Node {
	return []Node{
		heading("Settling of a run"),
		paragraph(say("A monitor is classified before it is given an uncertainty. A change is small where it is at most a tenth of *U*_{grid}, or a thousandth of the value where that is not known (no source). Iterates that cycle or keep changing take half their range as a bound, *u* = bound/√3; those that drift, or of which geometric extrapolation leaves more than a small change to come, have no uncertainty until one is entered with its reason. *U*_{iter} is counted in *u*_{num}, and its ratio to *U*_{grid} should be 0.1 or less. Integrated forces must stop changing with the iterations, and what enters must leave (both common practice, no source). The depth of a residual is no uncertainty of a quantity.")...),
		paragraph(say("The mean of an unsteady run is taken behind its start-up, found or declared, over whole cycles where there is one. With the correlation time τ of *n* rows, of standard deviation *s*_{n},")...),
		formula("*u*^{2} = *s*_{n}^{2} / ( *N*_{eff} − 1 ),   *N*_{eff} = *n*/τ,   τ = 1 + 2 Σ *r*_{k}"),
		paragraph(say("the sum taken over pairs of lags as long as they stay positive and fall. Batch means and the correlation of successive rows give two further values, to compare. Sources: White, Simulation 69, 323 (1997) (start-up); Geyer, Statistical Science 7, 473 (1992) (sum), from memory.")...),
		paragraph(say("An imbalance is a part of the flux that matters: the named one, or what enters. It is small where the same part of the quantity is at most a tenth of *U*_{grid}, or of |*E*| where no grid uncertainty is known. An entered effect is a bound, *u* = bound/√3. Two runs that differ in precision or platform only give the floor of rounding, a source of its own. Where parts of *u*_{num} depend on each other their sum takes the place of the root of the sum of their squares; both are printed where they differ by more than a fifth.")...),
	}
}

func gridMethod() []Node {
	return []Node{
		heading("Grid study"),
		paragraph(say("*f*_{1}, *f*_{2}, *f*_{3} are the values on the three finest grids, 1 the finest; *h* is (1/cells)^{1/dimensions}; *r*_{21} = *h*_{2}/*h*_{1}, *r*_{32} = *h*_{3}/*h*_{2}. The behaviour is found first, with its sign:")...),
		formula("ε_{21} = *f*_{2} − *f*_{1},  ε_{32} = *f*_{3} − *f*_{2},  *R* = ε_{21}/ε_{32},  *R*^{′} = *R* · ln *r*_{32} / ln *r*_{21}"),
		paragraph(say("0 < *R*^{′} < 1 is monotone, −1 < *R*^{′} < 0 oscillatory, *R*^{′} > 1 diverging, *R*^{′} ≤ −1 oscillatory and diverging; without differences the values are flat. An order is given for monotone behaviour only:")...),
		formula("*p* = | ln( ε_{32}/ε_{21} ) + *q*(*p*) | / ln *r*_{21},   *q*(*p*) = ln( ( *r*_{21}^{p} − 1 ) / ( *r*_{32}^{p} − 1 ) )"),
		formula("*f*_{ext} = ( *r*_{21}^{p} *f*_{1} − *f*_{2} ) / ( *r*_{21}^{p} − 1 ),   *e*_{a} = |( *f*_{1} − *f*_{2} )/*f*_{1}|,   *e*_{ext} = |( *f*_{ext} − *f*_{1} )/*f*_{ext}|"),
		formula("GCI = 1.25 *e*_{a} / ( *r*_{21}^{p} − 1 ),   *U* = GCI · |*f*_{1}|,   *u*_{num} = *U*/*k*_{num}"),
		paragraph(say("The bounded rule limits the index where the order is far from what a scheme can give: for *p* < 0.95 it is at most 1.25 Δ/|*f*_{1}|, Δ being the largest difference among the three values; for *p* > 3.05 order 3 is used, and the index is at least 1.25 Δ/|*f*_{1}|. For oscillatory behaviour half the range of the three values is taken as a bound and *u*_{num} = bound/√3. For diverging and flat behaviour there is no grid uncertainty. An index from an order far from the formal one is indicative only.")...),
		paragraph(say("Other rules, on request, for one value; what diverges or is flat has no uncertainty by any of them. *Two finest grids*: *U* = 3 |ε_{21}| / ( *r*_{21}^{q} − 1 ), *q* the formal order; with no third grid nothing shows that the value converges. *Order at most the formal one*: as above with the lesser of *p* and *q*. *Three times the range* of the three values, where they oscillate.")...),
		paragraph(say("With *d* = |ε_{21}| / ( *r*_{21}^{p} − 1 ), *correction factor*, *C* = ( *r*_{21}^{p} − 1 ) / ( *r*_{21}^{q} − 1 ): *U* = ( 9.6 ( 1 − *C* )^{2} + 1.1 ) *d* for |1 − *C*| < 0.125, else ( 2 |1 − *C*| + 1 ) *d*. *Factor of safety*, *P* = *p*/*q*: *U* = ( 2.45 − 0.85 *P* ) *d* for *P* ≤ 1, else ( 16.4 *P* − 14.8 ) *d*.")...),
		paragraph(say("*Least squares* over four or more grids fits *f*_{0} + *a* *h*^{p}, *f*_{0} + *a* *h*, *f*_{0} + *a* *h*^{2} and *f*_{0} + *a* *h* + *b* *h*^{2}, with equal weights and with weights in proportion to 1/*h*. The first is used for 0.5 ≤ *p* ≤ 2; above, the second or third; below, any but the first, whichever scatters least. With the fitted error *e* and distance *c* of the finest grid, scatter *s* and Δ_{n} = range/( *n* − 1 ): *U* = *F* *e* + *s* + *c* for *s* < Δ_{n}, *F* = 1.25 for 0.5 ≤ *p* < 2.1 and 3 otherwise; else *U* = 3 ( *s*/Δ_{n} )( *e* + *s* + *c* ). It is implemented from a description of the procedure and was not held against its paper.")...),
		paragraph(say("The grid that would resolve a requirement follows from *u*_{num} ~ *h*^{p}, with *E* and the other uncertainties unchanged and where *p* lies within half of the formal order about it. Its cost takes the power 4/3 of the cells, as for a run in time in three dimensions, or the power that was entered; resolving all scales of turbulence costs of order *Re*^{3} (both common practice, no source).")...),
		paragraph(say("*Time steps* take the part of *h* in the same rules, with the formal order in time. Over grids and steps together *f*_{0} + *a* *h*^{p} + *b* Δ*t*^{q} is fitted by least squares with the formal orders; *U* = 1.25 times the sum of the magnitudes of both errors of the finest run, plus the scatter of the fit, since errors that cancel in one run need not in the next (no source). A *borrowed* grid uncertainty is the relative *u*_{num} of another question, of its value or of its range along a curve, times the penalty that was stated (no source); it is never computed from runs of the case.")...),
		paragraph(say("Along a curve the local orders of the monotone stations give one common order, their median, kept between 0.5 and the formal order; other stations take three times their data range as *U*. The other rules act there with the common order, least squares at every station that converges.")...),
		paragraph(text("Sources: P. J. Roache (grid convergence index); Celik, Ghia, Roache, Freitas, Coleman, Raad, J. Fluids Eng. 130, 078001 (2008); the bounded rule as used by the NASA Langley Turbulence Modeling Resource; Eça, Hoekstra, J. Comput. Phys. 262, 104 (2014) (least squares); Wilson, Shao, Stern, J. Fluids Eng. 126, 704 (2004) (correction factor); Xing, Stern, J. Fluids Eng. 132, 061403 (2010) (factor of safety) (all from professional knowledge; no clause is quoted).")),
	}
}

func stationPolicy() []Node {
	return []Node{
		heading("Stations and interpolation"),
		paragraph(say("The stations are those of the reference, whose values stay as they are. The simulation is interpolated to them, with straight lines or with a cubic that keeps monotone data monotone, as chosen. Nothing is extrapolated: a station outside the simulated range is listed and not compared. Gaps are not bridged. A blank is not read as zero. A spacing of the simulation more than *m* times the median spacing, of the eight around it and of the whole line, is a gap as well. A support point is added beyond the line only where physics declares one. A simulation is averaged over the width of a probe where one is stated. Where weights of the stations are chosen they have the sum one and act in the means of *E*, |*E*| and *E*^{2}, never in the joint statistic. The integral of *E* runs by the trapezoid between stations that have values on both sides, never across a gap or a station that is not compared. The interpolation uncertainty is a line of the budget:")...),
		formula("linear: bound = 1.05 · ½ ( *x* − *x*_{i} )( *x*_{i+1} − *x* ) · max |*f*″| from divided differences;   monotone: bound = |linear − monotone|;   *u*_{int} = bound/√3"),
	}
}

func adequacyMethod() []Node {
	return []Node{
		heading("Requirement"),
		paragraph(say("The requirement ±*a* belongs to the decision; it is not the result of the comparison. It is *shown* where |*E*| + *k* *u*_{val} ≤ *a*, *not met* where |*E*| − *k* *u*_{val} > *a*, and *not resolved* otherwise. A curve is shown where all its stations are, and not met where one is not.")...),
	}
}

// coverageMethod says how often stated 95 % intervals hold the true value.
func coverageMethod() []Node {
	few := ""
	for i, row := range uncertainty.FewReadings {
		if i > 0 {
			few += ", "
		}
		few += quantity.Percent(row.Covers) + " % for " + strconv.Itoa(row.Readings) + " readings"
		if row.Common > 0 {
			few += " with a common error of " + quantity.Typed(row.Common) + " standard deviations"
		}
	}
	return []Node{
		heading("How often intervals hold"),
		paragraph(typeset("In 10,000 seeded trials, repeated by the tests of the program, stated 95 % intervals hold the value sought in 93 to 97 % where their assumptions are met and there are five readings or more: means by Student's factor and effective degrees of freedom, E ± k_95 u_val at a station, the offset and scale of E, crossings where the error is shared by the neighbouring rows, the mean of an unsteady series. Of fewer readings they hold it in " + few + ". The grid index is a convention, and no such part is stated of it.")...),
	}
}

func printing() []Node {
	return []Node{
		heading("How numbers are printed"),
		paragraph(say("Computed numbers are carried with ten digits beside the rounded text, with the place they stand at in the report. From that place each number can be walked back to its formula, the numbers that the formula takes, and the file and row or the entry they come from, or to the stated reason why the way ends earlier: on the page by the key w, from a command line by weirmark run STUDY --why PLACE; each step is computed again and told where it does not give the number. Values read from files keep all their digits. The text shows uncertainties with two digits and values with the decimals of their uncertainty. Percentages are of the reference value where they state *E*, and of *f*_{1} or *f*_{ext} in the grid study.")...),
	}
}

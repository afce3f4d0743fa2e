package main

import (
	"math"
	"sort"
	"strings"
)

const campaign = "Orrowby 0.6 m closed-return duct, campaign OR-26"

// laboratory writes what the test side hands over.
func (d delivery) laboratory() {
	d.taps()
	d.legacy()
	d.wake()
	d.laser()
	d.oilFilm()
	d.balance()
	d.tracer()
}

// taps writes profile P1: pressures round the fairing in C1, three repeats,
// and of the upper row in C2.
func (d delivery) taps() {
	for repeat := 1; repeat <= 3; repeat++ {
		d["first/OR26_C1_taps_r"+integer(repeat)+".csv"] = tapRepeat(repeat, loop(), repeat == 1).Bytes()
	}
	// The corrected file: tap 9 once, tap 17 without the slip.
	d["second/OR26_C1_taps_r1.csv"] = tapRepeat(1, loop(), false).Bytes()
	d.sortedLoop()
	upper := newTable(",", "# Orrowby duct, campaign OR-26, Quillet strut fairing, upper branch (invented)", "x/c,Cp,u(Cp)")
	for _, t := range upperTaps() {
		upper.row(fixed(t.x, 4), fixed(t.d, 4), "0.0060")
	}
	d["second/C1-taps-upper.csv"] = upper.Bytes()
	steep := newTable(",", invented(campaign+", C2, upper row of taps, u = 0.25 % of full scale"), "tap,x [mm],p-p_ref [Pa]")
	r := rng(12)
	for i, t := range upperC2() {
		steep.row(integer(i+1), fixed(chord*t.x, 2), fixed(dynamic*t.d+2*r.NormFloat64(), 1))
	}
	d["first/OR26_C2_taps.csv"] = steep.Bytes()
}

// tapRepeat is one traverse of all taps. A flawed one holds two mistakes of the
// laboratory: tap 9 stands twice with two values, and tap 17 slipped by a
// factor of ten.
func tapRepeat(repeat int, taps []tap, flawed bool) *table {
	t := newTable(",", invented(campaign+", C1, pressure taps, repeat "+integer(repeat)), "# u is 0.25 % of full scale ("+integer(fullSpan)+" Pa)", "tap,x [mm],y [mm],p-p_ref [Pa],u(p) [%]")
	r := rng(uint64(repeat))
	for i, at := range taps {
		p := dynamic*at.d + 3*r.NormFloat64()
		row := func(p float64) {
			t.row(integer(i+1), fixed(chord*at.x, 2), fixed(chord*at.y, 2), fixed(p, 1), "0.25")
		}
		if flawed && i+1 == 17 {
			p *= 10
		}
		row(p)
		if flawed && i+1 == 9 {
			row(p + 31.4)
		}
	}
	return t
}

// sortedLoop writes an old copy of P1 that someone sorted by x.
func (d delivery) sortedLoop() {
	taps := loop()
	sort.SliceStable(taps, func(i, j int) bool { return taps[i].x < taps[j].x })
	t := newTable(",", invented(campaign+", C1, pressure taps, copy for the report"), "x [mm],p-p_ref [Pa]")
	r := rng(5)
	for _, at := range taps {
		t.row(fixed(chord*at.x, 2), fixed(dynamic*at.d+3*r.NormFloat64(), 1))
	}
	d["first/OR26_C1_taps_old.csv"] = t.Bytes()
}

// legacy writes a curve digitised from an older report.
func (d delivery) legacy() {
	t := newTable(",", invented("upper branch of a similar fairing, digitised from a printed figure"), "# use: tuning", "x/c,Cp")
	r := rng(20)
	for i := 0; i < 19; i++ {
		x := 0.03 + 0.05*float64(i)
		cp := -1.02*math.Exp(-math.Pow((x-0.165)/0.205, 2)) - 0.36*(1-x) + 0.27*x*x + 0.008*r.NormFloat64()
		t.row(fixed(x, 3), fixed(cp, 3))
	}
	d["first/legacy_Cp_digitised.csv"] = t.Bytes()
}

// wake writes profile P2, a hot film across the wake at x/c = 1.5.
func (d delivery) wake() {
	t := newTable("  ", invented(campaign+", C1, hot film, x/c = 1.5"), "y[mm]  U[m/s]  u_95[m/s]")
	r := rng(2)
	for i := 0; i < 31; i++ {
		y := -75 + 5*float64(i)
		u := wakeSpeed(y, 0.262, 11.6) + 0.08*r.NormFloat64()
		t.row(fixed(y, 1), fixed(u, 2), halfWidth(u))
	}
	d["first/OR26_C1_wake.txt"] = t.Bytes()
}

// halfWidth is the uncertainty of a velocity at 95 %, in m/s.
func halfWidth(u float64) string { return fixed(0.30+0.004*math.Abs(u), 2) }

func wakeSpeed(y, depth, width float64) float64 {
	return speed * (1 - depth*math.Exp(-(y+4)*(y+4)/(2*width*width)))
}

// stationsAlong are the places of profile P3 over the ramp height.
var stationsAlong = [4]string{"-2", "0", "2", "5"}

// laser writes profile P3 with its two replicates, and the line of C1.
func (d delivery) laser() {
	for replicate := 1; replicate <= 2; replicate++ {
		t := newTable(" ", invented(campaign+", C3, point laser, probe 0.35 mm long, replicate "+integer(replicate)), `TITLE = "P3"`, `VARIABLES = "y [m]" "u [m/s]" "u_95 [m/s]" "uu [m2/s2]"`)
		r := rng(30 + uint64(replicate))
		for s, at := range stationsAlong {
			t.WriteString(`ZONE T="x/H=` + at + `", I=26` + "\n")
			for j := 0; j < 26; j++ {
				y := laserHeight(j)
				u := profile(s, y, 0) + 0.12*r.NormFloat64()
				height := fixed(y/1000, 6)
				if s == 2 && replicate == 1 {
					height = fixed(y, 3) // millimetres under the header of metres
				}
				t.row(height, fixed(u, 3), halfWidth(u), fixed(stress(s, y, 0)*(1+0.02*r.NormFloat64()), 3))
			}
		}
		d["first/OR26_C3_laser_r"+integer(replicate)+".dat"] = t.Bytes()
	}
	line := newTable(",", invented(campaign+", C1, point laser, x/H = 2, coverage 95 %"), "y [mm],u [m/s],u_95 [m/s]")
	r := rng(33)
	for j := 0; j < 26; j++ {
		y := laserHeight(j)
		u := profile(1, y, 0) + 0.12*r.NormFloat64()
		line.row(fixed(y, 3), fixed(u, 3), halfWidth(u))
	}
	d["first/OR26_C1_laser.csv"] = line.Bytes()
}

// laserHeight is the height of a point of P3 in mm, 0.2 to 60; four lie below
// the first point of the simulations.
func laserHeight(j int) float64 { return 0.2 * math.Pow(300, float64(j)/25) }

// profile is the streamwise velocity over the floor at a station of P3, y in
// mm. Change is how far a model is off, 0 for the test.
func profile(station int, y, change float64) float64 {
	attached := func(depth float64) float64 {
		n := y / (depth * (1 + 0.3*change))
		return speed * math.Pow(n, 1./7) / math.Pow(1+math.Pow(n, 6), 1./42)
	}
	shear := func(centre, width, back, at float64) float64 {
		n := y / at
		outer := speed * 0.5 * (1 + math.Tanh((y-centre*(1+0.1*change))/width))
		return outer - back*(1-change)*n*math.Exp(1-n)
	}
	switch station {
	case 0:
		return attached(18)
	case 1:
		return attached(21)
	case 2:
		return shear(28, 9, 4.6, 7)
	}
	return shear(24, 12, 2.2, 4) - speed*0.5*(1+math.Tanh(-2*(1+0.1*change)))*math.Exp(-y/3)
}

// stress is the mean square of the streamwise fluctuation.
func stress(station int, y, change float64) float64 {
	centre, width, peak := [4]float64{2, 3, 28, 24}[station], [4]float64{10, 12, 12, 15}[station], [4]float64{6, 7, 27, 24}[station]
	return 0.3 + peak*(1-0.4*change)*math.Exp(-math.Pow((y-centre)/width, 2))
}

// oilFilm writes profile P4 and the two numbers the laboratory took from it.
func (d delivery) oilFilm() {
	t := newTable(",", invented(campaign+", C3, oil film, coverage 95 %"), "x/H,Cf x 10^3,u x 10^3")
	r := rng(4)
	for i := 0; i < 15; i++ {
		x := -3 + 1.07*float64(i)
		f := 1000*friction(x, 5.70, .00118) + 0.05*r.NormFloat64()
		t.row(fixed(x, 2), fixed(f, 2), fixed(0.16+0.05*math.Abs(f), 2))
	}
	d["first/OR26_C3_oilfilm.csv"] = t.Bytes()
	d.text("first/OR26_C3_reattachment.csv", invented(campaign+", C3, from the oil film, u standard")+"\nx_r/H,u(x_r/H)\n5.70,0.11\n")
	d.text("first/OR26_C3_Cf_min.csv", invented(campaign+", C3, from the oil film, u standard")+"\nCf_min,u(Cf_min)\n-0.00118,0.00006\n")
}

// friction is the friction of the floor that changes sign at x/H = 0.4 and at
// the reattachment, with its least value between.
func friction(x, reattached, least float64) float64 {
	shape := func(x float64) float64 { return math.Tanh((x-0.4)/1.2) * math.Tanh((x-reattached)/3) }
	v := shape(x)
	if v >= 0 {
		return .0029 * v
	}
	lowest := 0.
	for i := 0; i <= 1000; i++ {
		lowest = math.Min(lowest, shape(0.4+(reattached-0.4)*float64(i)/1000))
	}
	return -least * v / lowest
}

// balance writes P5: a workbook for C1, in which a setting of 3/2 became a
// date and the row of an aborted run is hidden, and its repaired text; a text
// table for C2, in which one run was divided by the frontal area.
func (d delivery) balance() {
	d["first/OR26_C1_balance.xlsx"] = balanceBook()
	c1 := newTable(",", "# Orrowby duct, campaign OR-26, balance, five runs over three days (invented)", "run,Cd,Cl,Cm")
	for i := range balanceDrag {
		c1.row(integer(i+1), fixed(balanceDrag[i], 5), fixed(balanceLift[i], 4), fixed(balanceMoment[i], 4))
	}
	d["second/C1-balance.csv"] = c1.Bytes()
	for _, part := range []struct {
		name   string
		factor float64
	}{{"first/OR26_C2_balance.csv", frontal}, {"second/OR26_C2_balance.csv", 1}} {
		t := newTable(",", invented(campaign+", C2, balance, five runs"), "run,Cd,Cl")
		for i := range balanceDrag2 {
			v := balanceDrag2[i]
			if i == 3 {
				v *= part.factor
			}
			t.row(integer(i+1), fixed(v, 5), fixed(balanceLift2[i], 4))
		}
		d[part.name] = t.Bytes()
	}
}

// tracer writes P6 with decimal commas: two ports hold −999, eight have no
// uncertainty.
func (d delivery) tracer() {
	t := newTable(";", invented(campaign+"; C3; tracer behind the slot; u is standard"), "port;x/H;row;C/C0;u(C/C0)")
	comma := func(v float64, n int) string { return strings.ReplaceAll(fixed(v, n), ".", ",") }
	for i, c := range tracerTest {
		value, u := comma(c, 3), comma(0.01+0.05*c, 4)
		if i+1 == 12 || i+1 == 31 {
			value = "-999"
		}
		if i+1 >= 29 {
			u = ""
		}
		t.row(integer(i+1), comma(1+0.5*float64(i%12), 1), integer(i/12+1), value, u)
	}
	d["first/OR26_C3_tracer.csv"] = t.Bytes()
}

package main

import "math"

// solvers writes what the two simulation teams hand over, monitors apart.
func (d delivery) solvers() {
	d.forces()
	d.floor()
	d.surfaces()
	d.wallRows()
	d.wakes()
	d.lines()
	d.profiles()
	d.frictions()
	d.tracers()
}

// grid rows of a table over the grids.
func overGrids(head []string, columns ...func(grid int) string) *table {
	t := newTable(",", head...)
	for g, name := range grids {
		row := []string{name, integer(cells[g])}
		for _, column := range columns {
			row = append(row, column(g))
		}
		t.row(row...)
	}
	return t
}

func column(values [4]float64, decimals int) func(int) string {
	return func(g int) string { return fixed(values[g], decimals) }
}

func moved(values [4]float64, by float64, decimals int) func(int) string {
	return func(g int) string { return fixed(values[g]+by, decimals) }
}

// forces writes the force coefficients over the grids: of C1 first at
// α = 4.0° and with a run of model B that had not settled, then at the angle
// of the test.
func (d delivery) forces() {
	head := "grid,cells,Cd A,Cd B,Cl A,Cl B,Cm A,Cm B"
	early := dragC1[1]
	early[3] = driftDrag + dragSlope*angleLack
	d["first/C1-forces.csv"] = overGrids([]string{"# C1, alpha = 4.0 deg (invented)", head},
		moved(dragC1[0], -dragSlope*angleLack, 5), moved(early, -dragSlope*angleLack, 5),
		moved(liftC1[0], -liftSlope*angleLack, 4), moved(liftC1[1], -liftSlope*angleLack, 4),
		column(momentC1[0], 4), column(momentC1[1], 4)).Bytes()
	d["second/C1-forces.csv"] = overGrids([]string{"# C1, moved to alpha = 4.2 deg with run pairs (invented)", head},
		column(dragC1[0], 5), column(dragC1[1], 5), column(liftC1[0], 4), column(liftC1[1], 4),
		column(momentC1[0], 4), column(momentC1[1], 4)).Bytes()
	for m, model := range models {
		d["first/C2-"+model+"-forces.csv"] = overGrids([]string{"# C2, alpha = 9.0 deg (invented)", "grid,cells,Cd,Cl,y+"},
			column(dragC2[m], 5), column(liftC2[m], 4), column(wallDistance[m], 1)).Bytes()
	}
	// The finest grid of model A alone, since the four are no family.
	d.text("second/C2-A-G4-forces.csv", "Cd,Cl\n"+fixed(dragC2[0][3], 5)+","+fixed(liftC2[0][3], 4)+"\n")
}

// floor writes reattachment and least friction over the grids.
func (d delivery) floor() {
	d["first/C3-floor.csv"] = overGrids([]string{"grid,cells,x_r/H A,x_r/H B,Cf_min A,Cf_min B"},
		column(reattachment[0], 3), column(reattachment[1], 3), column(frictionMin[0], 5), column(frictionMin[1], 5)).Bytes()
}

// surfaces writes P1 of the finest grids of C1: the whole loop in Pa, and the
// upper branch as a coefficient.
func (d delivery) surfaces() {
	for m, model := range models {
		t := newTable(",", "x [mm],y [mm],p [Pa]")
		for _, at := range loop() {
			t.row(fixed(chord*at.x, 2), fixed(chord*at.y, 2), fixed(dynamic*at.s[m], 2))
		}
		d["first/C1-"+model+"-G4-surface.csv"] = t.Bytes()
		cp := newTable(",", "x/c,Cp")
		for _, at := range upperTaps() {
			cp.row(fixed(at.x, 4), fixed(at.s[m], 4))
		}
		d["second/C1-"+model+"-G4-cp.csv"] = cp.Bytes()
	}
}

// upperC2 are the taps of the upper row at the larger angle.
func upperC2() []tap {
	taps := make([]tap, 24)
	for i := range taps {
		x := 0.02 + 0.95*math.Pow(float64(i)/23, 1.25)
		cp := -1.9*math.Exp(-math.Pow((x-0.09)/0.17, 2)) - 0.42*(1-x) + 0.2*x*x
		taps[i] = tap{x: x, d: cp, s: [2]float64{cp*1.01 + 0.03*math.Sin(3*x), cp*(1.001+0.002*math.Sin(11*x)) + 0.001}}
	}
	return taps
}

// wallRows writes P1 of C2 over the grids. Model B exports pressure divided by
// density under the header of a pressure, and its third file is a copy of the
// second by mistake.
func (d delivery) wallRows() {
	row := func(m, g int) []byte {
		t := newTable(",", "x [mm],p [Pa]")
		h := math.Cbrt(float64(cells[3]) / float64(cells[g]))
		scale := [2]float64{1, 1 / density}[m]
		for _, at := range upperC2() {
			coarse := 0.004 * (h*h - 1) * math.Exp(-at.x/0.3)
			t.row(fixed(chord*at.x, 2), fixed(dynamic*scale*(at.s[m]+coarse), 2))
		}
		return t.Bytes()
	}
	for m, model := range models {
		for g, grid := range grids {
			d["first/"+runName("C2", model, grid)+"-p.csv"] = row(m, g)
		}
	}
	d["first/C2-B-G3-p.csv"] = row(1, 1)
	d["second/C2-B-G3-p.csv"] = row(1, 2)
}

// wakes writes P2 of the finest grids.
func (d delivery) wakes() {
	for m, model := range models {
		t := newTable(" ", "y[mm] U[m/s]")
		depth, width := [2]float64{.243, .258}[m], [2]float64{12.9, 11.9}[m]
		for i := 0; i <= 64; i++ {
			y := -80 + 2.5*float64(i)
			t.row(fixed(y, 2), fixed(wakeSpeed(y, depth, width), 3))
		}
		d["first/C1-"+model+"-G4-wake.dat"] = t.Bytes()
	}
}

// runHeight is the height in mm of a point of a simulated line.
func runHeight(j, n int) float64 { return 0.41 * math.Pow(160, float64(j)/float64(n-1)) }

// offModel is how far a model is off the test.
var offModel = [2]float64{0.25, 0.08}

// lines writes the line of C1 over all grids. In one file the headers of the
// two components are swapped.
func (d delivery) lines() {
	for m, model := range models {
		for g, grid := range grids {
			h := math.Cbrt(float64(cells[3]) / float64(cells[g]))
			head := `VARIABLES = "y [m]" "u [m/s]" "v [m/s]"`
			if model == "A" && grid == "G2" {
				head = `VARIABLES = "y [m]" "v [m/s]" "u [m/s]"`
			}
			t := newTable(" ", head, `ZONE T="x/H=2", I=40`)
			for j := 0; j < 40; j++ {
				y := runHeight(j, 40)
				u := profile(1, y, offModel[m]+0.02*(h*h-1))
				v := -1.1 * y / 12 * math.Exp(-y/24) * (1 + 0.05*float64(m) + 0.01*h)
				t.row(fixed(y/1000, 6), fixed(u, 4), fixed(v, 4))
			}
			d["first/"+runName("C1", model, grid)+"-line.dat"] = t.Bytes()
		}
	}
}

// profiles writes P3 of the finest grids of C3. Model B exports y⁺ without its
// friction velocity.
func (d delivery) profiles() {
	for m, model := range models {
		head := `VARIABLES = "y [m]" "u [m/s]" "v [m/s]" "uu [m2/s2]"`
		if model == "B" {
			head = `VARIABLES = "y+" "u [m/s]" "v [m/s]" "uu [m2/s2]"`
		}
		t := newTable(" ", head)
		for s, at := range stationsAlong {
			t.WriteString(`ZONE T="x/H=` + at + `", I=48` + "\n")
			friction := [4]float64{1.31, 1.24, .74, .31}[s] // m/s, not told in the file
			for j := 0; j < 48; j++ {
				y := runHeight(j, 48)
				height := fixed(y/1000, 6)
				if model == "B" {
					height = fixed(y/1000*friction/1.52e-5, 2)
				}
				v := -0.9 * y / 14 * math.Exp(-y/26)
				t.row(height, fixed(profile(s, y, offModel[m]), 4), fixed(v, 4), fixed(stress(s, y, offModel[m]), 3))
			}
		}
		d["first/C3-"+model+"-G4-profiles.dat"] = t.Bytes()
	}
}

// frictions writes P4 of the finest grids. Model A first exports the
// magnitude.
func (d delivery) frictions() {
	curve := func(m int, sign func(float64) float64) []byte {
		t := newTable(",", "x/H,Cf")
		for i := 0; i <= 90; i++ {
			x := -4 + 0.2*float64(i)
			t.row(fixed(x, 2), fixed(sign(friction(x, reattachment[m][3], -frictionMin[m][3])), 6))
		}
		return t.Bytes()
	}
	signed := func(v float64) float64 { return v }
	d["first/C3-A-G4-cf.csv"] = curve(0, math.Abs)
	d["second/C3-A-G4-cf.csv"] = curve(0, signed)
	d["first/C3-B-G4-cf.csv"] = curve(1, signed)
}

// tracers writes P6 of the finest grids; model B lies between model A and the
// test.
func (d delivery) tracers() {
	for m, model := range models {
		t := newTable(",", "port,C/C0")
		for i := range tracerA {
			c := tracerA[i]
			if m == 1 {
				c = math.Sqrt(c * tracerTest[i])
			}
			t.row(integer(i+1), fixed(c, 3))
		}
		d["first/C3-"+model+"-G4-tracer.csv"] = t.Bytes()
	}
}

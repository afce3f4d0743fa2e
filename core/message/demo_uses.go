package message

import "weirmark/core/study"

// Quantities of the campaign.
const (
	demoDragName     = "drag coefficient"
	demoLiftName     = "lift coefficient"
	demoCpName       = "pressure coefficient, upper branch"
	demoLoopName     = "pressure round the fairing"
	demoLegacyName   = "pressure coefficient, older curve"
	demoWakeName     = "wake velocity at x/c = 1.5"
	demoLineName     = "velocity at x/H = 2"
	demoRowName      = "pressure of the upper row"
	demoLengthName   = "reattachment length"
	demoLeastName    = "least skin friction"
	demoFrictionName = "skin friction of the floor"
	demoTracerName   = "tracer concentration"
)

// demoZones are the places of profile P3, in the order of the zones.
var demoZones = []string{"−2", "0", "2", "5"}

func demoZoneName(zone int) string { return "velocity at x/H = " + demoZones[zone] }

var (
	demoModels = []string{"A", "B"}
	demoGrids  = []string{"G1", "G2", "G3", "G4"}
	demoCells  = map[string]string{"G1": "410000", "G2": "980000", "G3": "2350000", "G4": "5600000"}
)

// demoUse is one use of one table of the campaign. Columns without a unit are
// pure numbers.
type demoUse struct {
	file, table                 string // file with the folder of its delivery
	role, case_, quantity       string
	model, grid                 string
	x, xUnit, y, yUnit, u, size string
	uFactor                     string
	contour                     string // second coordinate of a section whose lift is taken
}

// slip returns a use as a person enters it.
func (use demoUse) slip() study.Slip {
	p := study.Slip{Table: use.table, Role: entered(use.role), Case: entered(use.case_), Quantity: entered(use.quantity), Y: demoColumn(use.y, use.yUnit)}
	if use.role == study.Unused {
		return study.Slip{Table: use.table, Role: p.Role, Case: p.Case, Quantity: p.Quantity}
	}
	if use.model != "" {
		p.Model = entered(use.model)
	}
	if use.grid != "" {
		p.Grid = entered(use.grid)
	}
	if n := demoCells[use.grid]; n != "" {
		p.Cells = entered(n)
	}
	if use.x != "" {
		p.X = demoColumn(use.x, use.xUnit)
	}
	if use.u != "" {
		p.U, p.UFactor = demoColumn(use.u, use.yUnit), entered(use.uFactor)
	}
	if use.size != "" {
		p.Size.Column = entered(use.size)
	}
	if use.contour != "" {
		p.Derive, p.Contour = entered(study.DeriveLift), demoColumn(use.contour, use.xUnit)
	}
	if use.role == study.Monitor {
		p.Axis = entered(study.AxisIterations)
	}
	return p
}

func demoColumn(name, unit string) study.ColumnUse {
	if unit == "" {
		unit = "1"
	}
	return study.ColumnUse{Column: entered(name), Unit: entered(unit)}
}

// demoFamily are the uses of one column a model in a table over the grids.
func demoFamily(file, caseName, quantity, symbol string) []demoUse {
	var uses []demoUse
	for _, m := range demoModels {
		uses = append(uses, demoUse{file: file, role: study.GridValues, case_: caseName, quantity: quantity, model: m, grid: "grid", size: "cells", y: symbol + " " + m})
	}
	return uses
}

// demoMonitors are the monitors of one quantity of a case, each from the
// delivery in which its file is the last.
func demoMonitors(caseName, quantity, column string, latest func(string) string) []demoUse {
	var uses []demoUse
	for _, m := range demoModels {
		for _, g := range demoGrids {
			if caseName == "C2" && m == "A" && g == "G2" {
				continue // the file is lost
			}
			uses = append(uses, demoUse{file: latest(caseName + "-" + m + "-" + g + ".mon"), role: study.Monitor, case_: caseName, quantity: quantity, model: m, grid: g, x: "iter", y: column})
		}
	}
	return uses
}

// demoFluxes are the mass balances of the runs of C3.
func demoFluxes(latest func(string) string) []demoUse {
	var uses []demoUse
	for _, m := range demoModels {
		for _, g := range demoGrids {
			uses = append(uses, demoUse{file: latest("C3-" + m + "-" + g + ".flux"), role: study.Balance, case_: "C3", quantity: demoLengthName, model: m, grid: g, x: "in", xUnit: "kg/s", y: "out", yUnit: "kg/s"})
		}
	}
	return uses
}

// demoRuns are curves of one quantity on some grids of both models.
func demoRuns(caseName, quantity, ending string, grids []string, latest func(string) string, x, xUnit, y, yUnit string) []demoUse {
	var uses []demoUse
	for _, m := range demoModels {
		for _, g := range grids {
			uses = append(uses, demoUse{file: latest(caseName + "-" + m + "-" + g + "-" + ending), role: study.Simulation, case_: caseName, quantity: quantity, model: m, grid: g, x: x, xUnit: xUnit, y: y, yUnit: yUnit})
		}
	}
	return uses
}

var demoFinest = []string{"G4"}

// demoProfiles are the zones of P3 of the laboratory and of both models.
func demoProfiles(zones []int, models []string, heightOf func(zone int) string) []demoUse {
	var uses []demoUse
	for _, z := range zones {
		table := string(rune('1' + z))
		uses = append(uses, demoUse{file: "first/OR26_C3_laser_r1.dat", table: table, role: study.Reference, case_: "C3", quantity: demoZoneName(z), x: "y", xUnit: heightOf(z), y: "u", yUnit: "m/s", u: "u_95", uFactor: "95 %"})
		for _, m := range models {
			height := "y"
			if m == "B" {
				height = "y+"
			}
			uses = append(uses, demoUse{file: "first/C3-" + m + "-G4-profiles.dat", table: table, role: study.Simulation, case_: "C3", quantity: demoZoneName(z), model: m, grid: "G4", x: height, xUnit: "m", y: "u", yUnit: "m/s"})
		}
	}
	return uses
}

// firstOnly takes every file from the first delivery.
func firstOnly(name string) string { return "first/" + name }

// join puts lists of uses one behind the other.
func join(lists ...[]demoUse) []demoUse {
	var all []demoUse
	for _, l := range lists {
		all = append(all, l...)
	}
	return all
}

package message

import (
	"io/fs"
	"strconv"

	"weirmark/core/study"
	"weirmark/datasets/duct"
)

func itoa(n int) string { return strconv.Itoa(n) }

// DemoWorked returns the campaign worked through: the second delivery is in,
// roles, columns and units are entered, exclusions have their reasons, and
// what cannot be settled is declared.
func DemoWorked() *study.Study {
	s := Demo()
	demoSetting(s)
	s.Questions[0].Conditions, s.Questions[1].Conditions = demoAngle(4.2, 4.2, 0), demoAngle(4.2, 4.2, 0)
	s.Questions[0].Answers = map[string]string{"monitor-value": movedForces}
	s.Questions = append(s.Questions, workedQuestions()...)
	for _, use := range workedUses() {
		addUse(s, use)
	}
	for _, kept := range workedUnused() {
		addUse(s, demoUse{file: kept.file, role: study.Unused, case_: kept.caseName, quantity: kept.quantity})
	}
	leaveOut(s, demoTracerName, "holds −999: no sample was drawn", false, 14, 33)
	leaveOut(s, demoZoneName(3), "probe window wet from the tracer", true, 95, 96, 97)
	for i, line := range demoLog {
		s.Log = append(s.Log, study.Entry{Number: i + 1, At: "2026-09-21", What: line.what, Why: line.why, Shown: line.shown})
	}
	return s
}

// movedForces answers why the monitors of C1 settle beside the values that
// are used.
const movedForces = "the runs are at 4.0°; the forces of the second delivery were moved to 4.2°, by 0.0004 in Cd and 0.020 in Cl, except those of B on G4, which was run at 4.2°"

// DemoReview returns the campaign as a checker gets it, with one byte of
// profile P2 altered after its hash was recorded.
func DemoReview() *study.Study {
	s := DemoWorked()
	for i := range s.Files {
		f := &s.Files[i]
		if f.Name != "OR26_C1_wake.txt" {
			continue
		}
		data := append([]byte{}, f.Data...)
		data[len(data)-2] ^= 1 // the last digit of the last row
		f.Data = data
	}
	return s
}

// addUse adds a slip, and its file where it is not in the study yet.
func addUse(s *study.Study, use demoUse) {
	id := ""
	for _, f := range s.Files {
		if f.Name == base(use.file) {
			id = f.ID
		}
	}
	if id == "" {
		f := demoFile(use.file)
		id = "f" + itoa(len(s.Files)+1)
		f.ID = id
		s.Files = append(s.Files, f)
	}
	p := use.slip()
	p.ID, p.File = "s"+itoa(len(s.Slips)+1), id
	s.Slips = append(s.Slips, p)
}

// latest takes a file from the second delivery where it is there.
func latest(name string) string {
	if _, err := fs.Stat(duct.Files, "second/"+name); err == nil {
		return "second/" + name
	}
	return "first/" + name
}

// leaveOut takes lines of the reference of a question out.
func leaveOut(s *study.Study, quantity, why string, late bool, lines ...int) {
	for i := range s.Questions {
		q := &s.Questions[i]
		if q.Quantity != quantity {
			continue
		}
		q.Revealed = q.Revealed || late
		for _, line := range lines {
			q.Excluded = append(q.Excluded, study.Exclusion{Line: line, Why: why, Late: late})
		}
	}
}

// workedUses are the uses beyond those of Demo.
func workedUses() []demoUse {
	forces := "second/C1-forces.csv"
	height := func(zone int) string {
		if zone == 2 {
			return "mm" // the header says m
		}
		return "m"
	}
	lines := demoRuns("C1", demoLineName, "line.dat", demoGrids, latest, "y", "m", "u", "m/s")
	for i := range lines {
		if lines[i].model == "A" && lines[i].grid == "G2" {
			lines[i].y = "v" // the headers are swapped
		}
	}
	rows := demoRuns("C2", demoRowName, "p.csv", demoGrids, latest, "x", "mm", "p", "Pa")
	for i := range rows {
		if rows[i].model == "B" {
			rows[i].yUnit = "m²/s²" // pressure divided by density
		}
	}
	return join(
		demoMonitors("C1", demoDragName, "Cd", latest),
		[]demoUse{{file: "second/C1-balance.csv", role: study.Reference, case_: "C1", quantity: demoLiftName, y: "Cl"},
			{file: "second/OR26_C1_taps_r1.csv", role: study.Reference, case_: "C1", quantity: demoLiftName, x: "x", xUnit: "mm", contour: "y", y: "p-p_ref", yUnit: "Pa"}},
		demoFamily(forces, "C1", demoLiftName, "Cl"),
		demoMonitors("C1", demoLiftName, "Cl", latest),
		[]demoUse{{file: "first/legacy_Cp_digitised.csv", role: study.Reference, case_: "C1", quantity: demoLegacyName, x: "x/c", y: "Cp"}},
		demoRuns("C1", demoLegacyName, "cp.csv", demoFinest, latest, "x/c", "1", "Cp", "1"),
		[]demoUse{{file: "first/OR26_C1_wake.txt", role: study.Reference, case_: "C1", quantity: demoWakeName, x: "y", xUnit: "mm", y: "U", yUnit: "m/s", u: "u_95", uFactor: "95 %"}},
		demoRuns("C1", demoWakeName, "wake.dat", demoFinest, latest, "y", "mm", "U", "m/s"),
		[]demoUse{{file: "first/OR26_C1_laser.csv", role: study.Reference, case_: "C1", quantity: demoLineName, x: "y", xUnit: "mm", y: "u", yUnit: "m/s", u: "u_95", uFactor: "95 %"}},
		lines,
		[]demoUse{{file: "second/OR26_C2_balance.csv", role: study.Reference, case_: "C2", quantity: demoDragName, y: "Cd"},
			{file: "second/C2-A-G4-forces.csv", role: study.Simulation, case_: "C2", quantity: demoDragName, model: "A", grid: "G4", y: "Cd"},
			{file: "first/C2-B-forces.csv", role: study.GridValues, case_: "C2", quantity: demoDragName, model: "B", grid: "grid", size: "cells", y: "Cd"}},
		demoMonitors("C2", demoDragName, "Cd", latest),
		[]demoUse{{file: "first/OR26_C2_taps.csv", role: study.Reference, case_: "C2", quantity: demoRowName, x: "x", xUnit: "mm", y: "p-p_ref", yUnit: "Pa"}},
		rows,
		[]demoUse{{file: "first/OR26_C3_reattachment.csv", role: study.Reference, case_: "C3", quantity: demoLengthName, y: "x_r/H", u: "u(x_r/H)", uFactor: "standard"}},
		demoFamily("first/C3-floor.csv", "C3", demoLengthName, "x_r/H"),
		demoMonitors("C3", demoLengthName, "x_r/H", latest),
		demoFluxes(latest),
		[]demoUse{{file: "first/OR26_C3_Cf_min.csv", role: study.Reference, case_: "C3", quantity: demoLeastName, y: "Cf_min", u: "u(Cf_min)", uFactor: "standard"}},
		demoFamily("first/C3-floor.csv", "C3", demoLeastName, "Cf_min")[1:],
		demoMonitors("C3", demoLeastName, "Cf_min", latest)[4:],
		[]demoUse{{file: "first/OR26_C3_oilfilm.csv", role: study.Reference, case_: "C3", quantity: demoFrictionName, x: "x/H", y: "Cf x 10^3", yUnit: "‰", u: "u x 10^3", uFactor: "95 %"}},
		demoRuns("C3", demoFrictionName, "cf.csv", demoFinest, latest, "x/H", "1", "Cf", "1"),
		demoProfiles([]int{0, 1, 2, 3}, demoModels[:1], height),
		[]demoUse{{file: "first/OR26_C3_tracer.csv", role: study.Reference, case_: "C3", quantity: demoTracerName, x: "port", y: "C/C0", u: "u(C/C0)", uFactor: "standard"}},
		demoRuns("C3", demoTracerName, "tracer.csv", demoFinest, latest, "port", "1", "C/C0", "1"),
	)
}

// unusedFile is a file that is kept and not used, with the reason in demoLog.
type unusedFile struct{ file, caseName, quantity string }

func workedUnused() []unusedFile {
	return []unusedFile{
		{"first/OR26_C1_balance.xlsx", "C1", demoDragName},
		{"first/OR26_C1_taps_old.csv", "C1", demoLoopName},
		{"first/OR26_C1_taps_r2.csv", "C1", demoLoopName},
		{"first/OR26_C1_taps_r3.csv", "C1", demoLoopName},
		{"first/C1-A-G4-surface.csv", "C1", demoLoopName},
		{"first/C1-B-G4-surface.csv", "C1", demoLoopName},
		{"first/C2-A-forces.csv", "C2", demoDragName},
		{"first/OR26_C3_laser_r2.dat", "C3", demoZoneName(0)},
		{"first/C3-B-G4-profiles.dat", "C3", demoZoneName(0)},
	}
}

// demoLog is what was decided on the way, in order.
var demoLog = []struct {
	what, why string
	shown     bool
}{
	{"Files of the first delivery added", "", false},
	{"Files of the second delivery added; the ones they replace removed", "corrected or missing files", false},
	{"OR26_C1_balance.xlsx left out", "a setting of 3/2 became a date; the laboratory sent text instead", false},
	{"OR26_C1_taps_old.csv left out", "a loop sorted by x; its order cannot be recovered", false},
	{"OR26_C1_taps_r1.csv: its lift held against the balance", "a check of the data with themselves", false},
	{"The other taps of the whole loop left out", "the laboratory and the solvers reduced the upper branch: C1-taps-upper.csv and the cp files", false},
	{"OR26_C3_laser_r1.dat, x/H = 2: unit of y set to mm", "0.2 to 60 under a header of m", false},
	{"C1-A-G2-line.dat: column v taken as u", "the headers are swapped: it follows u of the other seven runs", false},
	{"C3-B-G4-profiles.dat left out", "y⁺ without its friction velocity", false},
	{"C2-B-…-p.csv: unit of p set to m²/s²", "pressure divided by density, ratio 0.836", false},
	{"C2-A-forces.csv left out, C2-A-G4-forces.csv used", "the wall treatment changes between G3 and G4: no family", false},
	{"C2-A-G4.mon: cycle accepted", "the mean over whole cycles is what the decision needs", false},
	{"OR26_C3_tracer.csv: ports 12 and 31 excluded", "−999 marks a missing sample", false},
	{"OR26_C3_laser_r1.dat, x/H = 5: three stations excluded", "probe window wet from the tracer", true},
}

// workedQuestions are the questions beyond those of Demo.
func workedQuestions() []study.Question {
	lift := demoQuestion("C1", demoLiftName, "Cl", "OR-26/5",
		demoSource(study.OfData, "balance calibration and corrections", .0031, study.Common, demoSheet),
		demoSource(study.OfInput, "inputs (α, U, turbulence)", .010, study.Common, "run pairs of the analyst"))
	lift.Condition, lift.Conditions = "α = 4.2°", demoAngle(4.2, 4.2, 0)
	lift.Answers = map[string]string{"monitor-value": movedForces, "references-differ": "the balance holds: 48 taps miss the suction peak and the ends; data consistency stays open with the laboratory"}
	legacy := demoQuestion("C1", demoLegacyName, "Cp", "older report",
		demoSource(study.OfNumerical, "grid, from a study at other taps", .004, study.Independent, "borrowed from a study of the same family"))
	legacy.Use, legacy.Downward = entered(study.UseTuning), true
	wake := demoQuestion("C1", demoWakeName, "U", "OR-26 hot film",
		demoSource(study.OfNumerical, "grid, from the runs of the drag", .10, study.Independent, "borrowed from a study of the same family"),
		demoSource(study.OfInput, "inputs (α, U, turbulence)", .05, study.Common, "run pairs of the analyst"))
	wake.Conditions = demoAngle(4.2, 4.2, 0)
	line := demoQuestion("C1", demoLineName, "u", "OR-26 laser", demoSource(study.OfInput, "inputs (α, U, turbulence)", .05, study.Common, "run pairs of the analyst"))
	line.Conditions = demoAngle(4.2, 4.2, 0)
	drag := demoQuestion("C2", demoDragName, "Cd", "OR-26/5",
		demoSource(study.OfData, "balance calibration and corrections", .00055, study.Common, demoSheet),
		demoSource(study.OfInput, "inputs (α, U, turbulence)", .0004, study.Common, "run pairs of the analyst"),
		ofModel("A", demoSource(study.OfNumerical, "grid, no family", .0103, study.Independent, "three times the range of the four grids at 95 %, halved")))
	drag.Condition, drag.Requirement, drag.Conditions = "α = 9°", demoLimit(5), demoAngle(9, 9, 0)
	drag.Answers = map[string]string{"monitor-cycle": "The mean flow is asked for; the half-range is counted as U_iter."}
	scanner := demoSource(study.OfData, demoScanner, demoScannerHalf, study.Independent, demoSheet)
	scanner.Coverage = entered("limits")
	row := demoQuestion("C2", demoRowName, "p", "OR-26 taps", scanner,
		demoSource(study.OfData, demoPressureRef, .020*574.7, study.Common, demoSheet),
		demoSource(study.OfInput, "inputs (α, U)", 6, study.Common, "run pairs of the analyst"))
	row.Condition, row.Conditions, row.Downward = "α = 9°", demoAngle(9, 9, 0), true
	length := demoQuestion("C3", demoLengthName, "x_r/H", "OR-26 oil film", demoSource(study.OfInput, "inputs (U, turbulence)", .06, study.Common, demoSheet))
	length.Requirement = demoLimit(6)
	least := demoQuestion("C3", demoLeastName, "Cf,min", "OR-26 oil film", demoSource(study.OfInput, "inputs (U, turbulence)", .00003, study.Common, "run pairs of the analyst"))
	friction := demoQuestion("C3", demoFrictionName, "Cf", "OR-26 oil film",
		ofModel("A", demoSource(study.OfNumerical, "grid, from the least value", .04, study.Independent, "borrowed from a study of the same family")),
		demoSource(study.OfInput, "inputs (U, turbulence)", .03, study.Common, "run pairs of the analyst"))
	all := []study.Question{lift, legacy, wake, line, drag, row, length, least, friction}
	for z := range demoZones {
		q := demoQuestion("C3", demoZoneName(z), "u", "OR-26 laser",
			demoSource(study.OfNumerical, "grid, from the line of C1", .15, study.Independent, "borrowed from a study of the same family"),
			demoSource(study.OfInput, "inputs (U, turbulence)", .05, study.Common, "run pairs of the analyst"))
		if z == 2 {
			q.Scores = &study.Scoring{Dispersion: true} // the preset of the tracer, asked of a signed velocity
		}
		all = append(all, q)
	}
	tracer := demoQuestion("C3", demoTracerName, "C/C0", "OR-26 ports",
		demoSource(study.OfNumerical, "grid, from two runs", .006, study.Independent, "borrowed from a study of the same family"),
		demoSource(study.OfInput, "inputs (U, source)", .01, study.Common, "run pairs of the analyst"))
	tracer.Scores = &study.Scoring{Dispersion: true, Fraction: .25, Allowance: .03}
	tracer.Regions = []study.Region{{Name: "third row", From: 25, To: 36}}
	return append(all, tracer)
}

func ofModel(model string, s study.Source) study.Source {
	s.Model = model
	return s
}

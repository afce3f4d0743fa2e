package message

import (
	"io/fs"
	"strings"

	"weirmark/core/study"
	"weirmark/core/tablefile"
	"weirmark/datasets/duct"
)

// DemoReceived returns the campaign as it came: every file of the first
// delivery was dropped. What the campaign sheet states (which file is what,
// requirements, conditions, some uncertainties) is stated; columns of the
// laboratory are guesses, and what no one stated is open.
func DemoReceived(read func(study.File) tablefile.File) *study.Study {
	s := study.New()
	entries, err := fs.ReadDir(duct.Files, "first")
	if err != nil {
		panic("message: the demo lacks its first delivery")
	}
	files := map[string]tablefile.File{}
	for _, entry := range entries {
		f := demoFile("first/" + entry.Name())
		files[f.Name] = read(f)
		s.Add(f.Name, f.Data, files[f.Name], "")
	}
	proposed := s.Slips
	s.Slips, s.Questions = nil, receivedQuestions()
	demoSetting(s)
	taken := map[string]bool{}
	for _, use := range receivedUses() {
		for _, p := range proposed {
			if name := s.File(p.File).Name; name == base(use.file) && p.Table == use.table {
				table, err := files[name].Table(p.Table)
				if err != nil {
					panic("message: the demo lacks a table of " + name)
				}
				taken[p.ID] = true
				use.state(&p, table)
				s.Slips = append(s.Slips, p)
			}
		}
	}
	for _, p := range proposed { // tables the sheet says nothing of
		if !taken[p.ID] {
			p.Role = study.Field{Value: study.Unused, By: study.Stated}
			s.Slips = append(s.Slips, p)
		}
	}
	numberSlips(s)
	return s
}

// state sets what the sheet states of a use. Columns stay as they were
// proposed unless another one is meant; of the solvers' tables the sheet names
// them. A unit is stated where the file states it, or where a solver's column
// is a pure number.
func (use demoUse) state(p *study.Slip, table tablefile.Table) {
	stated := func(text string) study.Field {
		if text == "" {
			return study.Field{}
		}
		return study.Field{Value: text, By: study.Stated}
	}
	p.Role, p.Case, p.Quantity = stated(use.role), stated(use.case_), stated(use.quantity)
	p.Model, p.Grid, p.Cells = stated(use.model), stated(use.grid), stated(demoCells[use.grid])
	solver := use.role != study.Reference
	aim := func(c *study.ColumnUse, column string) {
		if c.Column.Value != column {
			*c = study.ColumnUse{}
			if column != "" {
				c.Column = study.Field{Value: column, By: study.Guessed}
				if found, err := table.Column(column); err == nil {
					c.Unit = stated(found.Unit)
				}
			}
		}
		if c.Column.Given() && solver {
			c.Column.By = study.Stated
			if !c.Unit.Given() || c.Unit.Open() {
				c.Unit = stated("1")
			}
		}
	}
	aim(&p.X, use.x)
	aim(&p.Y, use.y)
	aim(&p.U, use.u)
	if p.U.Column.Given() && !p.U.Unit.Given() {
		p.U.Unit = p.Y.Unit
	}
	p.Size = study.ColumnUse{Column: stated(use.size)}
	p.Axis = study.Field{}
	if use.role == study.Monitor {
		p.Axis = stated(study.AxisIterations)
	}
}

// numberSlips numbers the slips anew, in order.
func numberSlips(s *study.Study) {
	for i := range s.Slips {
		s.Slips[i].ID = "s" + itoa(i+1)
	}
}

// demoFile returns a file of the campaign by its path.
func demoFile(path string) study.File {
	data, err := duct.Files.ReadFile(path)
	if err != nil {
		panic("message: the demo lacks " + path)
	}
	return study.File{Name: base(path), SHA256: study.Hash(data), Data: data}
}

func base(path string) string { return path[strings.LastIndexByte(path, '/')+1:] }

// receivedUses says what the sheet says of the files of the first delivery.
func receivedUses() []demoUse {
	metres := func(int) string { return "m" }
	uses := join(
		demoFamily("first/C1-forces.csv", "C1", demoDragName, "Cd"),
		demoMonitors("C1", demoDragName, "Cd", firstOnly),
		demoFamily("first/C1-forces.csv", "C1", demoLiftName, "Cl"),
		[]demoUse{{file: "first/OR26_C1_taps_r1.csv", role: study.Reference, case_: "C1", quantity: demoLoopName, x: "x", y: "p-p_ref", u: "u(p)"}},
		[]demoUse{{file: "first/OR26_C1_taps_old.csv", role: study.Reference, case_: "C1", quantity: demoLoopName, x: "x", y: "p-p_ref"}},
		demoRuns("C1", demoLoopName, "surface.csv", demoFinest, firstOnly, "x", "mm", "p", "Pa"),
		[]demoUse{{file: "first/legacy_Cp_digitised.csv", role: study.Reference, case_: "C1", quantity: demoLegacyName, x: "x/c", y: "Cp"}},
		[]demoUse{{file: "first/OR26_C1_wake.txt", role: study.Reference, case_: "C1", quantity: demoWakeName, x: "y", y: "U", u: "u_95"}},
		demoRuns("C1", demoWakeName, "wake.dat", demoFinest, firstOnly, "y", "mm", "U", "m/s"),
		[]demoUse{{file: "first/OR26_C1_laser.csv", role: study.Reference, case_: "C1", quantity: demoLineName, x: "y", y: "u", u: "u_95"}},
		demoRuns("C1", demoLineName, "line.dat", demoGrids, firstOnly, "y", "m", "u", "m/s"),
	)
	uses = append(uses, demoUse{file: "first/OR26_C2_balance.csv", role: study.Reference, case_: "C2", quantity: demoDragName, y: "Cd"})
	for _, m := range demoModels {
		uses = append(uses, demoUse{file: "first/C2-" + m + "-forces.csv", role: study.GridValues, case_: "C2", quantity: demoDragName, model: m, grid: "grid", size: "cells", y: "Cd"})
	}
	return join(uses,
		demoMonitors("C2", demoDragName, "Cd", firstOnly),
		[]demoUse{{file: "first/OR26_C2_taps.csv", role: study.Reference, case_: "C2", quantity: demoRowName, x: "x", y: "p-p_ref"}},
		demoRuns("C2", demoRowName, "p.csv", demoGrids, firstOnly, "x", "mm", "p", "Pa"),
		[]demoUse{{file: "first/OR26_C3_reattachment.csv", role: study.Reference, case_: "C3", quantity: demoLengthName, y: "x_r/H", u: "u(x_r/H)"}},
		demoFamily("first/C3-floor.csv", "C3", demoLengthName, "x_r/H"),
		demoMonitors("C3", demoLengthName, "x_r/H", firstOnly),
		demoFluxes(firstOnly),
		[]demoUse{{file: "first/OR26_C3_Cf_min.csv", role: study.Reference, case_: "C3", quantity: demoLeastName, y: "Cf_min", u: "u(Cf_min)"}},
		demoFamily("first/C3-floor.csv", "C3", demoLeastName, "Cf_min")[1:],
		[]demoUse{{file: "first/OR26_C3_oilfilm.csv", role: study.Reference, case_: "C3", quantity: demoFrictionName, x: "x/H", y: "Cf x 10^3", u: "u x 10^3"}},
		demoRuns("C3", demoFrictionName, "cf.csv", demoFinest, firstOnly, "x/H", "1", "Cf", "1"),
		demoProfiles([]int{0, 1, 2, 3}, demoModels, metres),
		[]demoUse{{file: "first/OR26_C3_tracer.csv", role: study.Reference, case_: "C3", quantity: demoTracerName, x: "port", y: "C/C0", u: "u(C/C0)"}},
		demoRuns("C3", demoTracerName, "tracer.csv", demoFinest, firstOnly, "port", "1", "C/C0", "1"),
	)
}

// receivedQuestions are the questions of the campaign with what the sheet
// states of them.
func receivedQuestions() []study.Question {
	unset := demoSource(study.OfData, demoPressureRef, .020*574.7, "", demoSheet)
	scanner := demoSource(study.OfData, demoScanner, demoScannerHalf, study.Independent, demoSheet)
	scanner.Coverage = study.Field{} // the sheet does not say what it covers
	drag := demoQuestion("C1", demoDragName, "Cd", "OR-26/5",
		demoSource(study.OfData, "balance calibration and corrections", .000393, study.Common, demoSheet),
		demoSource(study.OfInput, "inputs (α, U, turbulence)", .00025, study.Common, demoSheet))
	drag.Requirement, drag.Conditions = demoLimit(5), demoAngle(4, 4.2, .0020)
	lift := demoQuestion("C1", demoLiftName, "Cl", "OR-26/5")
	lift.Conditions = demoAngle(4, 4.2, .10)
	loop := demoQuestion("C1", demoLoopName, "p", "OR-26 taps", unset, scanner)
	loop.Conditions = demoAngle(4, 4.2, 0)
	legacy := demoQuestion("C1", demoLegacyName, "Cp", "older report")
	legacy.Use.Value = study.UseTuning
	drag2 := demoQuestion("C2", demoDragName, "Cd", "OR-26/5")
	drag2.Requirement, drag2.Conditions = demoLimit(5), demoAngle(9, 9, 0)
	row := demoQuestion("C2", demoRowName, "p", "OR-26 taps", unset, scanner)
	row.Conditions = demoAngle(9, 9, 0)
	length := demoQuestion("C3", demoLengthName, "x_r/H", "OR-26 oil film", demoSource(study.OfInput, "inputs (U, turbulence)", .06, study.Common, demoSheet))
	length.Requirement = demoLimit(6)
	all := []study.Question{drag, lift, loop, legacy,
		demoQuestion("C1", demoWakeName, "U", "OR-26 hot film"), demoQuestion("C1", demoLineName, "u", "OR-26 laser"), drag2, row, length,
		demoQuestion("C3", demoLeastName, "Cf,min", "OR-26 oil film"), demoQuestion("C3", demoFrictionName, "Cf", "OR-26 oil film")}
	for z := range demoZones {
		all = append(all, demoQuestion("C3", demoZoneName(z), "u", "OR-26 laser"))
	}
	all = append(all, demoQuestion("C3", demoTracerName, "C/C0", "OR-26 ports"))
	for i := range all {
		all[i].Kind.By, all[i].Use.By = study.Stated, study.Stated
		for j := range all[i].Sources {
			if c := &all[i].Sources[j].Coverage; c.Given() {
				c.By = study.Stated
			}
		}
		if all[i].Sources == nil {
			all[i].Sources = []study.Source{}
		}
	}
	return all
}

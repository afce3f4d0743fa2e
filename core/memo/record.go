package memo

import (
	"fmt"
	"strings"

	"weirmark/core/quantity"
	"weirmark/core/study"
)

// notProvided names what reviewers ask for and a study cannot hold.
func (b *builder) notProvided() Node {
	s := b.open(1, "not-provided", "Evidence this memo does not hold")
	lines := []Node{
		item(text("Description of the facility, geometry as built and instruments: not provided.")),
		item(text("Equations, closures, constants and wall treatment of the models: not provided.")),
		item(text("Program, schemes, precision, time step and stopping rule of the simulations: not provided.")),
	}
	for _, missing := range []struct {
		lacks func(study.Cell) bool
		what  string
	}{
		{func(c study.Cell) bool { return c.Corrected.State == "" }, "Whether the data are corrected for walls and supports"},
		{func(c study.Cell) bool { return len(c.Conditions) == 0 }, "Conditions of simulation and reference side by side"},
		{func(c study.Cell) bool { return len(c.Monitors) == 0 }, "Monitors of the runs"},
		{func(c study.Cell) bool { return len(c.Balances) == 0 }, "Balances of the runs"},
	} {
		n := 0
		for _, c := range b.in.Report.Cells {
			if missing.lacks(c) {
				n++
			}
		}
		switch {
		case n == len(b.in.Report.Cells):
			lines = append(lines, item(text(missing.what+": not provided.")))
		case n > 0:
			lines = append(lines, item(text(fmt.Sprintf("%s: not provided for %d of %s.", missing.what, n, quantity.Counted(len(b.in.Report.Cells), "cell")))))
		}
	}
	s.Nodes = append(s.Nodes, paragraph(text("The statements do not rest on the following and do not replace it.")), list(lines...))
	return s
}

// findings prints the notices of the files and of the study as a whole.
func (b *builder) findings() Node {
	s := b.open(1, "findings", "Findings in the files and the study")
	if len(b.in.Report.Notices) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("None.")))
		return s
	}
	items := make([]Node, len(b.in.Report.Notices))
	for i, n := range b.in.Report.Notices {
		items[i] = noticeItem(n)
	}
	s.Nodes = append(s.Nodes, list(items...))
	return s
}

// files prints the sources with their hashes.
func (b *builder) files() Node {
	s := b.open(1, "files", "Files")
	if len(b.in.Report.Files) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("None.")))
		return s
	}
	rows := make([]Node, len(b.in.Report.Files))
	for i, f := range b.in.Report.Files {
		matches := text("as recorded")
		if !f.Matches {
			matches = strong("differs from the record, not used")
		}
		rows[i] = row(cell(text(f.Name)), figureCell(count(f.Bytes, fmt.Sprintf("files.%d.bytes", i))), cell(code(f.SHA256)), cell(matches), cell(text(strings.Join(f.Uses, "; "))))
	}
	s.Nodes = append(s.Nodes,
		b.table("files", say("Files of the study. A changed byte changes the SHA-256."), headRow("File", "#Bytes", "SHA-256", "Check", "Used for"), rows...),
		note(text("To recompute: open the study with these files and the named edition of the methods, and compare the numbers of the two reports.")))
	return s
}

// log prints the operations in the order they were made.
func (b *builder) log() Node {
	s := b.open(1, "log", "Log")
	if len(b.in.Report.Log) == 0 {
		s.Nodes = append(s.Nodes, paragraph(text("No operation is recorded.")))
		return s
	}
	rows := make([]Node, len(b.in.Report.Log))
	for i, e := range b.in.Report.Log {
		shown := "not yet"
		if e.Shown {
			shown = "yes"
		}
		rows[i] = row(figureCell(count(e.Number, fmt.Sprintf("log.%d.number", i))), cell(text(e.At)), cell(text(e.What)), cell(text(e.Why)), cell(text(shown)))
	}
	s.Nodes = append(s.Nodes, b.table("plain", say("Operations in order. Times are given by the host and are not verified."),
		headRow("#No.", "Time", "What", "Reason", "Comparison seen before"), rows...))
	return s
}

// limits says where the memo ends and other duties begin.
func (b *builder) limits() Node {
	s := b.open(1, "limits", "Limits of use")
	product := "The software"
	if b.in.Product != "" {
		product = "The software (" + b.in.Product + ")"
	}
	s.Nodes = append(s.Nodes, list(
		item(text("The cautions printed with the statements in section 1 apply to every page of this memo.")),
		item(text("This memo defers to the responsible organisation's process, to the codes, standards and authority that govern at the place of use, and to licensed practice. It does not replace the judgement of a qualified engineer.")),
		item(text("The numbers were computed by the program from the entries listed here. A computation is not a review.")),
		item(text(product+" is provided with its own test evidence; users remain responsible for checking its fitness for their use.")),
	))
	return s
}

// signatures is the block of roles, kept whole in print.
func (b *builder) signatures() Node {
	s := b.open(1, "signatures", "Roles")
	s.Role = "whole"
	r := b.in.Report
	role := func(name string, g study.Signature) Node {
		who, date := text("not recorded"), text("not recorded")
		if g.Name != "" {
			who = text(g.Name)
		}
		if g.Date != "" {
			date = text(g.Date)
		}
		return row(cell(text(name)), cell(who), cell(date), cell())
	}
	table := block(Table, "signatures", headRow("Role", "Name", "Date", "Signature"), role("Prepared", r.Prepared), role("Checked", r.Checked), role("Approved", r.Approved))
	s.Nodes = append(s.Nodes, table, note(text("Recorded roles are statements by users, not authenticated signatures.")))
	return s
}

package main

import (
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"

	"weirmark/core/message"
)

// runStudy evaluates a study file into a folder.
func runStudy(v *invocation) (int, error) {
	path, err := v.file("study")
	if err != nil {
		return message.Refused, err
	}
	why := v.flags["why"]
	if v.flags["out"] == "" && why == "" {
		return message.Refused, fmt.Errorf("--out is needed, the folder to write into, or --why, the path of a number")
	}
	name, data, err := load(path)
	if err != nil {
		return message.Refused, err
	}
	s := &message.Session{}
	r, _, err := ask(s, message.Request{Kind: "open", Names: []string{name}}, data)
	if err != nil {
		return r.Status, err
	}
	if why != "" {
		return v.walkBack(s, why)
	}
	return v.write(s, v.flags["out"])
}

// walkBack prints one step from a number of the report to where it comes from.
func (v *invocation) walkBack(s *message.Session, path string) (int, error) {
	r, _, err := ask(s, message.Request{Kind: "walk", Value: path})
	if err != nil {
		return r.Status, err
	}
	if v.json() {
		return r.Status, v.printJSON(r.Walk)
	}
	fmt.Fprintf(v.out, "%s\n%s: %s\n", path, r.Walk.Step.Name, r.Walk.Shown)
	for _, text := range r.Walk.Said {
		fmt.Fprintf(v.out, "  %s\n", text)
	}
	for _, in := range r.Walk.Ways {
		fmt.Fprintf(v.out, "    %-40s %s\n", in.Path, in.Text)
	}
	return r.Status, nil
}

// runDemo evaluates the bundled demo study into a folder: one case of the
// campaign, or the whole of it in one of its states.
func runDemo(v *invocation) (int, error) {
	dir, err := v.file("folder")
	if err != nil {
		return message.Refused, err
	}
	s := &message.Session{}
	if r, _, err := ask(s, message.Request{Kind: "demo", Value: v.flags["state"]}); err != nil {
		return r.Status, err
	}
	return v.write(s, dir)
}

// write evaluates the study of a session and writes the memo, the figures,
// the stations, the report and the study itself.
func (v *invocation) write(s *message.Session, dir string) (int, error) {
	r, _, err := ask(s, message.Request{Kind: "results"})
	if err != nil {
		return r.Status, err
	}
	if err := os.MkdirAll(filepath.Join(dir, "figures"), 0o755); err != nil {
		return message.Refused, err
	}
	drawings, err := v.drawAll(r.Results.Figures, filepath.Join(dir, "figures"))
	if err != nil {
		return internal, err
	}
	report, err := json.MarshalIndent(r.Results.Report, "", " ")
	if err != nil {
		return internal, err
	}
	if err := os.WriteFile(filepath.Join(dir, "report.json"), append(report, '\n'), 0o644); err != nil {
		return message.Refused, err
	}
	for _, part := range []struct{ kind, file string }{{"memo", "memo.html"}, {"stations", "stations.csv"}, {"save", "study.json"}} {
		q := message.Request{Kind: part.kind}
		if part.kind == "memo" {
			q.Drawings = drawings
		}
		answer, files, err := ask(s, q)
		if err != nil {
			return answer.Status, err
		}
		if err := os.WriteFile(filepath.Join(dir, part.file), files[0], 0o644); err != nil {
			return message.Refused, err
		}
	}
	v.tell(r.Results, dir)
	return r.Status, nil
}

// drawAll draws the figures into files and returns them by ID.
func (v *invocation) drawAll(figures []message.CellFigure, dir string) (map[string]string, error) {
	drawings := map[string]string{}
	if len(figures) == 0 {
		return drawings, nil
	}
	pen, err := newRenderer()
	if err != nil {
		return nil, err
	}
	for _, f := range figures {
		svg, err := pen.SVG(f.Figure, f.Figure.ID)
		if err != nil {
			return nil, err
		}
		drawings[f.Figure.ID] = svg
		if err := os.WriteFile(filepath.Join(dir, f.Figure.ID+".svg"), []byte(svg), 0o644); err != nil {
			return nil, err
		}
	}
	return drawings, nil
}

// tell prints the statements and where everything is.
func (v *invocation) tell(r *message.Results, dir string) {
	for _, s := range r.Statements {
		fmt.Fprintf(v.out, "%s, %s, model %s (%s)\n  %s\n\n", s.Case, s.Quantity, s.Model, s.Sentence.Status, s.Text)
	}
	if len(r.Statements) == 0 {
		fmt.Fprintln(v.out, "No statement: the study asks no question yet.")
	}
	for _, f := range r.Report.Files {
		if !f.Matches {
			fmt.Fprintf(v.errs, "stop: %s differs from its recorded SHA-256 and was not used\n", f.Name)
		}
	}
	for _, line := range []struct{ file, what string }{
		{"memo.html", "the memo: open it in a browser, print it to PDF"},
		{"figures", "the figures as SVG"},
		{"stations.csv", "every number of every station"},
		{"report.json", "the whole report"},
		{"study.json", "the study with its files inside"},
	} {
		fmt.Fprintf(v.out, "%-32s %s\n", filepath.Join(dir, line.file), line.what)
	}
}

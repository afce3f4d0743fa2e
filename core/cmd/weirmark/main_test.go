package main

import (
	"bytes"
	"encoding/json"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"sort"
	"strings"
	"testing"
)

// call runs the command in this process on files written for it; arguments
// that name one of the files are replaced by its path.
func call(t *testing.T, files map[string]string, args ...string) (status int, out, errs string) {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o644); err != nil {
			t.Fatal(err)
		}
	}
	for i, a := range args {
		name, table, at := strings.Cut(a, "@")
		if _, ours := files[name]; ours {
			args[i] = filepath.Join(dir, name)
			if at {
				args[i] += "@" + table
			}
		}
		if a == "DIR" {
			args[i] = filepath.Join(dir, "out")
		}
	}
	var o, e bytes.Buffer
	status = run(args, &o, &e)
	return status, o.String(), e.String()
}

// keys returns the sorted keys of an object.
func keys(t *testing.T, v any) string {
	t.Helper()
	m, ok := v.(map[string]any)
	if !ok {
		t.Fatalf("%v is no object", v)
	}
	var list []string
	for k := range m {
		list = append(list, k)
	}
	sort.Strings(list)
	return strings.Join(list, " ")
}

func decode(t *testing.T, text string) any {
	t.Helper()
	var v any
	if err := json.Unmarshal([]byte(text), &v); err != nil {
		t.Fatalf("output is no JSON: %v\n%s", err, text)
	}
	return v
}

const (
	sim = "x,y\n0,0\n1,2\n2,4\n3,6\n"
	ref = "x,y,u,common\n0.5,1.1,0.1,0.2\n1.5,2.8,0.1,0.2\n2.5,5.3,0.2,0.2\n9,1,0.1,0.2\n"
)

func TestReadShape(t *testing.T) {
	status, out, errs := call(t, map[string]string{"a.csv": "x [mm],p\n1,2.50\n2,n.a.\n"}, "--json", "read", "a.csv")
	if status != 3 {
		t.Errorf("a flag before the command: status %d, %q", status, errs)
	}
	status, out, errs = call(t, map[string]string{"a.csv": "x [mm],p\n1,2.50\n2,n.a.\n"}, "read", "--json", "a.csv")
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	v := decode(t, out).(map[string]any)
	if got := keys(t, v); got != "file notices sha256 tables" {
		t.Errorf("keys %s", got)
	}
	table := v["tables"].([]any)[0].(map[string]any)
	if got := keys(t, table); got != "columns name rows" {
		t.Errorf("table keys %s", got)
	}
	column := table["columns"].([]any)[1].(map[string]any)
	if got := keys(t, column); got != "name unit values" {
		t.Errorf("column keys %s", got)
	}
	if values := column["values"].([]any); values[0] != 2.5 || values[1] != nil {
		t.Errorf("values %v", values)
	}
	if unit := table["columns"].([]any)[0].(map[string]any)["unit"]; unit != "mm" {
		t.Errorf("unit %v: values and units are as written", unit)
	}
	for _, n := range v["notices"].([]any) {
		m := n.(map[string]any)
		if got := keys(t, m); got != "code line severity text" {
			t.Errorf("notice keys %s", got)
		}
		if s := m["severity"]; s != "stop" && s != "ask" && s != "note" {
			t.Errorf("severity %v", s)
		}
	}
}

// TestReadCard asks for the reading card: what the file states, and what each
// table looks like, with its guesses marked.
func TestReadCard(t *testing.T) {
	file := map[string]string{"C2-B-G3.csv": "# U_ref: 12.5 m/s\nx [mm],p\n1,2.50\n2,n.a.\n3,4\n"}
	status, out, errs := call(t, file, "read", "C2-B-G3.csv", "--card", "--json")
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	v := decode(t, out).(map[string]any)
	if got := keys(t, v); got != "cards file notices sha256 stated tables" {
		t.Fatalf("keys %s", got)
	}
	if m := v["stated"].([]any)[0].(map[string]any); m["key"] != "U_ref" || m["value"] != "12.5 m/s" || m["line"] != 1.0 {
		t.Errorf("stated %v", m)
	}
	card := v["cards"].([]any)[0].(string)
	for _, part := range []string{"3 rows, 2 columns, order kept.", "p: 2.500 to 4.000, 1 missing.", "looks like a simulation (guessed)", "case C2 (guessed)", "model B (guessed)", "grid G3 (guessed)", "unit of stations mm,", "unit of values not given"} {
		if !strings.Contains(card, part) {
			t.Errorf("the card lacks %q: %s", part, card)
		}
	}
	if _, text, _ := call(t, file, "read", "C2-B-G3.csv"); !strings.Contains(text, card) || !strings.Contains(text, "stated in line 1: U_ref: 12.5 m/s") {
		t.Errorf("the text lacks the card:\n%s", text)
	}
}

func TestReadRefusals(t *testing.T) {
	for _, row := range []struct {
		name, text string
		status     int
	}{{"empty.csv", "", 3}, {"bytes.bin", "\x00\x01\x02\x00\x00", 3}, {"quote.csv", "a,b\n1,2\n1,\"2\n3,4\n", 3},
		{"part.dat", "VARIABLES = \"x\" \"y\"\nZONE T=\"one\"\n0 0\n1 1\nZONE T=\"two\", N=3, E=1, F=FEPOINT, ET=TRIANGLE\n0 0\n1 0\n0 1\n1 2 3\n", 2}} {
		status, out, _ := call(t, map[string]string{row.name: row.text}, "read", row.name, "--json")
		if status != row.status || !strings.Contains(out, `"severity": "stop"`) {
			t.Errorf("%s: status %d, %s", row.name, status, out)
		}
	}
	if status, _, errs := call(t, nil, "read", "/nowhere/at/all.csv"); status != 3 || errs == "" {
		t.Errorf("a file that is not there: status %d, %q", status, errs)
	}
}

func TestGridsShape(t *testing.T) {
	// Celik et al. 2008, table 1, column 1: p 1.53, extrapolated 6.1685, e_a 0.015
	// (fraction), GCI 2.2 %; the counts are theirs.
	file := map[string]string{"g.csv": "N,phi\n18000,6.063\n8000,5.972\n4500,5.863\n"}
	status, out, errs := call(t, file, "grids", "g.csv", "--dim=2", "--json")
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	list := decode(t, out).([]any)
	if len(list) != 1 {
		t.Fatalf("%d cases", len(list))
	}
	c := list[0].(map[string]any)
	if got := keys(t, c); got != "class ea eext extrapolated gci notices order rule table u value" {
		t.Errorf("keys %s", got)
	}
	for key, want := range map[string][2]float64{"order": {1.53, .01}, "extrapolated": {6.1685, .0005}, "ea": {.015, .0005}, "gci": {.022, .0005}} {
		if got := c[key].(float64); math.Abs(got-want[0]) > want[1] {
			t.Errorf("%s = %v, want %v", key, got, want[0])
		}
	}
	// Two grids cannot show an order: evidence is incomplete, and says so.
	status, out, _ = call(t, map[string]string{"g.csv": "N,phi\n18000,6.063\n8000,5.972\n"}, "grids", "g.csv", "--json")
	c = decode(t, out).([]any)[0].(map[string]any)
	if status != 2 || c["class"] != "insufficient" || c["order"] != nil {
		t.Errorf("two grids: status %d, %v", status, c)
	}
	if u := c["u"].(float64); math.Abs(u-3*0.091/(math.Pow(2.25, 2./3)-1)) > 1e-9 || !strings.Contains(c["rule"].(string), "assumed and not observed") {
		t.Errorf("two grids: %v", c)
	}
	// A diverging family has no order, index or extrapolate.
	status, out, _ = call(t, map[string]string{"g.csv": "N,phi\n400,1.39\n200,1.12\n100,0.98\n"}, "grids", "--json", "g.csv")
	c = decode(t, out).([]any)[0].(map[string]any)
	if status != 0 || c["class"] != "diverging" || c["order"] != nil || c["extrapolated"] != nil || c["gci"] != nil || c["eext"] != nil {
		t.Errorf("diverging: status %d, %v", status, c)
	}
}

// TestGridsByRule: the command takes every rule, the dimension and the formal
// order. Grids 2 and 3 of the family are those of Celik et al. as above; U of
// each rule is that of its formula.
func TestGridsByRule(t *testing.T) {
	file := map[string]string{"g.csv": "N,phi\n18000,6.063\n8000,5.972\n4500,5.863\n"}
	p, r := 1.5339690, 1.5
	d := 0.091 / (math.Pow(r, p) - 1)
	for _, row := range []struct {
		flags []string
		want  float64
	}{
		{nil, 1.25 * d},
		{[]string{"--rule", "three"}, 1.25 * d},
		{[]string{"--rule", "two"}, 3 * 0.091 / (r*r - 1)},
		{[]string{"--rule", "two", "--formal", "1"}, 3 * 0.091 / (r - 1)},
		{[]string{"--rule", "formal-order", "--formal", "1"}, 1.25 * 0.091 / (r - 1)},
		{[]string{"--rule", "factor-of-safety"}, (2.45 - 0.85*p/2) * d},
		{[]string{"--rule", "data range"}, 1.25 * d},
	} {
		status, out, errs := call(t, file, append([]string{"grids", "g.csv", "--dim=2", "--json"}, row.flags...)...)
		if status != 0 {
			t.Fatalf("%v: status %d, %s", row.flags, status, errs)
		}
		if u := decode(t, out).([]any)[0].(map[string]any)["u"].(float64); math.Abs(u-row.want) > 1e-6*row.want {
			t.Errorf("%v: U %v, want %v", row.flags, u, row.want)
		}
	}
	for _, flags := range [][]string{{"--rule", "best"}, {"--formal", "0"}, {"--formal", "x"}, {"--dim", "4"}} {
		if status, _, errs := call(t, file, append([]string{"grids", "g.csv"}, flags...)...); status != 3 || errs == "" {
			t.Errorf("%v: status %d, %q", flags, status, errs)
		}
	}
}

func TestCompareShape(t *testing.T) {
	files := map[string]string{"s.csv": sim, "r.csv": ref}
	status, out, errs := call(t, files, "compare", "--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y", "--u", "u", "--u-k", "2", "--u-common", "common", "--u-num", "0.05", "--u-input", "0.02", "--json")
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	v := decode(t, out).(map[string]any)
	if got := keys(t, v); got != "crossings joint notices outside stations summary" {
		t.Errorf("keys %s", got)
	}
	if got := keys(t, v["summary"]); got != "bias mae max_abs n rmse within_k_u_val within_u_val" {
		t.Errorf("summary keys %s", got)
	}
	if got := keys(t, v["joint"]); got != "n p_value statistic" {
		t.Errorf("joint keys %s", got)
	}
	if got := keys(t, v["crossings"]); got != "ref sim" {
		t.Errorf("crossings keys %s", got)
	}
	if o := v["outside"].([]any); len(o) != 1 || o[0] != 9.0 {
		t.Errorf("outside %v", o)
	}
	stations := v["stations"].([]any)
	if len(stations) != 3 {
		t.Fatalf("%d stations", len(stations))
	}
	s := stations[2].(map[string]any)
	if got := keys(t, s); got != "d e ratio s u_d u_input u_num u_val x" {
		t.Errorf("station keys %s", got)
	}
	// By hand: u_d = sqrt((0.2/2)² + 0.2²), u_val adds 0.05² and 0.02².
	ud := math.Hypot(.1, .2)
	uval := math.Sqrt(ud*ud + .05*.05 + .02*.02)
	for key, want := range map[string]float64{"x": 2.5, "s": 5, "d": 5.3, "e": -.3, "u_d": ud, "u_num": .05, "u_input": .02, "u_val": uval, "ratio": .3 / uval} {
		if got := s[key].(float64); math.Abs(got-want) > 1e-9 {
			t.Errorf("%s = %v, want %v", key, got, want)
		}
	}
}

// What is missing is told, shown as null, and ends with status 2.
func TestCompareIncomplete(t *testing.T) {
	files := map[string]string{"s.csv": sim, "r.csv": ref}
	base := []string{"compare", "--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y", "--json"}
	run := func(more ...string) (int, map[string]any) {
		status, out, errs := call(t, files, append(slices.Clone(base), more...)...)
		if out == "" {
			t.Fatalf("%v: no output: %s", more, errs)
		}
		return status, decode(t, out).(map[string]any)
	}
	codes := func(v map[string]any) string {
		var list []string
		for _, n := range v["notices"].([]any) {
			list = append(list, n.(map[string]any)["code"].(string))
		}
		return strings.Join(list, " ")
	}
	status, v := run("--u-num", "0.1")
	s := v["stations"].([]any)[0].(map[string]any)
	if status != 2 || s["u_d"] != nil || s["u_val"] != nil || s["ratio"] != nil || v["joint"] != nil || !strings.Contains(codes(v), "u-missing") {
		t.Errorf("no --u: status %d, %v, %s", status, s, codes(v))
	}
	status, v = run("--u", "0.1")
	s = v["stations"].([]any)[0].(map[string]any)
	if status != 2 || math.Abs(s["u_d"].(float64)-.1) > 1e-12 || !strings.Contains(codes(v), "coverage-assumed") || s["u_num"] != nil {
		t.Errorf("no --u-k: status %d, %v, %s", status, s, codes(v))
	}
	status, v = run("--u", "10%", "--u-k", "1")
	s = v["stations"].([]any)[1].(map[string]any)
	if status != 0 || math.Abs(s["u_d"].(float64)-.28) > 1e-12 || !strings.Contains(codes(v), "u-num-missing") {
		t.Errorf("--u 10%%: status %d, %v, %s", status, s, codes(v))
	}
	status, v = run("--u-common", "0.1")
	if s = v["stations"].([]any)[0].(map[string]any); status != 2 || s["u_d"] != nil || v["joint"] != nil {
		t.Errorf("--u-common without --u: status %d, %v", status, s)
	}
}

func TestCompareRefusals(t *testing.T) {
	files := map[string]string{"s.csv": sim, "r.csv": ref,
		"loop.csv": "x,y\n1,0\n0.8,1\n0.6,2\n0.4,2\n0.2,1\n0,0\n0.2,-1\n0.4,-2\n0.6,-2\n0.8,-1\n1,0\n", "pa.csv": "x,y [Pa]\n0,1\n4,2\n", "kin.csv": "x,y [m^2/s^2]\n0,1\n4,2\n",
		"negative.csv": "x,y,u\n1,1,0.1\n2,2,-0.1\n", "far.csv": "x,y\n100,1\n200,2\n"}
	for _, row := range []struct {
		args []string
		want string
	}{
		{[]string{"--sim", "s.csv", "--ref", "r.csv", "--x", "nothing", "--y", "y"}, "No column named"},
		{[]string{"--sim", "loop.csv", "--ref", "r.csv", "--x", "x", "--y", "y"}, "branches"},
		{[]string{"--sim", "pa.csv", "--ref", "kin.csv", "--x", "x", "--y", "y"}, "density"},
		{[]string{"--sim", "s.csv", "--ref", "negative.csv", "--x", "x", "--y", "y", "--u", "u", "--u-k", "1"}, "negative.csv:3"},
		{[]string{"--sim", "s.csv", "--ref", "far.csv", "--x", "x", "--y", "y"}, "No station"},
		{[]string{"--sim", "s.csv@2", "--ref", "r.csv", "--x", "x", "--y", "y"}, "No table"},
		{[]string{"--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y", "--u-interp", "maybe"}, "on or off"},
		{[]string{"--sim", "s.csv", "--ref", "r.csv", "--x", "x"}, "--y is needed"},
		{[]string{"--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y", "--k", "-1"}, "above zero"},
		{[]string{"--sim", "s.csv", "--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y"}, "twice"},
		{[]string{"--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "y", "--colour", "red"}, "no flag"},
	} {
		status, out, errs := call(t, files, append([]string{"compare"}, row.args...)...)
		if status != 3 || !strings.Contains(errs, row.want) || out != "" {
			t.Errorf("%v: status %d, %q on stderr, %q on stdout", row.args, status, errs, out)
		}
	}
}

func TestZonesByName(t *testing.T) {
	zones := "VARIABLES = \"x\" \"y\"\nZONE T=\"one\"\n0 0\n1 1\nZONE T=\"two\"\n0 5\n1 6\n"
	files := map[string]string{"s.dat": zones, "r.csv": "x,y\n0.5,5.0\n"}
	for _, table := range []string{"two", "2"} {
		status, out, errs := call(t, files, "compare", "--sim", "s.dat@"+table, "--ref", "r.csv", "--x", "x", "--y", "y", "--u", "0.1", "--u-k", "1", "--json")
		if status != 0 {
			t.Fatalf("%s: status %d, %s", table, status, errs)
		}
		s := decode(t, out).(map[string]any)["stations"].([]any)[0].(map[string]any)
		if s["s"] != 5.5 {
			t.Errorf("%s: s = %v", table, s["s"])
		}
	}
}

func TestUnitsAreBrought(t *testing.T) {
	files := map[string]string{"s.csv": "x [m],p [kPa]\n0,1\n1,2\n", "r.csv": "x [mm],p [Pa]\n500,1400\n"}
	status, out, errs := call(t, files, "compare", "--sim", "s.csv", "--ref", "r.csv", "--x", "x", "--y", "p", "--u", "10", "--u-k", "1", "--json")
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	s := decode(t, out).(map[string]any)["stations"].([]any)[0].(map[string]any)
	if s["x"] != 500.0 || s["s"] != 1500.0 || s["d"] != 1400.0 || s["e"] != 100.0 || s["u_d"] != 10.0 {
		t.Errorf("station %v", s)
	}
}

func TestUsage(t *testing.T) {
	for _, row := range []struct {
		args   []string
		status int
	}{{nil, 3}, {[]string{"dance"}, 3}, {[]string{"help"}, 0}, {[]string{"run"}, 3}, {[]string{"run", "x"}, 3}, {[]string{"demo"}, 3}, {[]string{"read"}, 3}, {[]string{"read", "a", "b"}, 3}} {
		if status, _, _ := call(t, nil, row.args...); status != row.status {
			t.Errorf("%v: status %d, want %d", row.args, status, row.status)
		}
	}
}

// The demo writes everything, and its study evaluates to the same bytes again.
func TestDemoAndRun(t *testing.T) {
	dir := t.TempDir()
	first, second := filepath.Join(dir, "demo"), filepath.Join(dir, "again")
	status, out, errs := call(t, nil, "demo", first)
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	if !strings.Contains(out, "drag coefficient at C1") || !strings.Contains(out, "memo.html") {
		t.Errorf("the demo prints %q", out)
	}
	status, _, errs = call(t, nil, "run", "--out", second, filepath.Join(first, "study.json"))
	if status != 0 {
		t.Fatalf("status %d, %s", status, errs)
	}
	// A number of the report is walked back to where it is written.
	status, out, errs = call(t, nil, "run", filepath.Join(first, "study.json"), "--why", "cells.3.read.ref.y.5")
	if status != 0 || !strings.Contains(out, "Written in C1-taps-upper.csv, line 8, field 2") {
		t.Errorf("status %d, %s%s", status, out, errs)
	}
	status, out, _ = call(t, nil, "run", filepath.Join(first, "study.json"), "--why", "cells.3.stations.5.e", "--json")
	if step := decode(t, out).(map[string]any)["step"].(map[string]any); status != 0 || step["agrees"] != true || len(step["inputs"].([]any)) != 2 {
		t.Errorf("status %d, %s", status, out)
	}
	if status, _, errs = call(t, nil, "run", filepath.Join(first, "study.json"), "--why", "cells.3.nothing"); status != 3 || !strings.Contains(errs, "no number at") {
		t.Errorf("a path that leads nowhere: status %d, %s", status, errs)
	}
	var names []string
	err := filepath.Walk(first, func(path string, info os.FileInfo, err error) error {
		if err != nil || info.IsDir() {
			return err
		}
		name, err := filepath.Rel(first, path)
		names = append(names, name)
		return err
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(names) < 8 {
		t.Fatalf("only %v were written", names)
	}
	for _, name := range names {
		a, errA := os.ReadFile(filepath.Join(first, name))
		b, errB := os.ReadFile(filepath.Join(second, name))
		if errA != nil || errB != nil {
			t.Errorf("%s: %v, %v", name, errA, errB)
			continue
		}
		if !bytes.Equal(a, b) {
			t.Errorf("%s differs between demo and run", name)
		}
	}
}

// A study with an altered file, a newer one, and something else are refused
// with a reason; an incomplete one ends with 2.
func TestRunRefusals(t *testing.T) {
	dir := t.TempDir()
	if status, _, errs := call(t, nil, "demo", dir); status != 0 {
		t.Fatal(errs)
	}
	data, err := os.ReadFile(filepath.Join(dir, "study.json"))
	if err != nil {
		t.Fatal(err)
	}
	for _, row := range []struct {
		name, from, to string
		status         int
		want           string
	}{
		{"altered", `"sha256": "`, `"sha256": "0`, 3, "differs from its recorded SHA-256"},
		{"newer", `"version": 1`, `"version": 99`, 3, "newer"},
		{"other", `"format": "weirmark study"`, `"format": "shopping list"`, 3, "not a study"},
		{"broken", `"title"`, `"title`, 3, "broken.json:"},
		{"incomplete", `"value": "reference"`, `"value": "unused"`, 2, ""},
	} {
		text := strings.Replace(string(data), row.from, row.to, 1)
		if text == string(data) {
			t.Fatalf("%s: the study holds no %s", row.name, row.from)
		}
		status, _, errs := call(t, map[string]string{row.name + ".json": text}, "run", row.name+".json", "--out", "DIR")
		if status != row.status || !strings.Contains(errs, row.want) {
			t.Errorf("%s: status %d, %q", row.name, status, errs)
		}
	}
}

// The shelf prints tables that the reader takes as they are: a law with its
// source, a table without its misprints; outside its range a law refuses.
func TestShelf(t *testing.T) {
	status, out, errs := call(t, nil, "shelf")
	if status != 0 || !strings.Contains(out, "backstep-cf-test") || strings.Count(out, "\n") < 50 {
		t.Fatalf("status %d, %d lines, %s", status, strings.Count(out, "\n"), errs)
	}
	// ITTC-57 at 1e6, 1e7: 0.0046875 and 0.003 exactly (0.075/(log10 Re - 2)²).
	id := ""
	for line := range strings.Lines(out) {
		if strings.Contains(line, "ITTC") {
			id = strings.Fields(line)[0]
		}
	}
	status, table, errs := call(t, nil, "shelf", id, "--at", "1e6,1e7")
	if status != 0 || !strings.Contains(table, "# source:") || !strings.Contains(table, "1000000,0.0046875\n") || !strings.Contains(table, "10000000,0.003\n") {
		t.Errorf("%s: status %d, %s%s", id, status, table, errs)
	}
	status, table, _ = call(t, map[string]string{"law.csv": table}, "read", "law.csv", "--json")
	if status != 0 || !strings.Contains(table, "0.0046875") {
		t.Errorf("the law is not read back: status %d, %s", status, table)
	}
	if status, _, errs := call(t, nil, "shelf", id, "--at", "-1"); status != 3 || errs == "" {
		t.Errorf("outside the range: status %d, %s", status, errs)
	}
	status, table, errs = call(t, nil, "shelf", "cavity-v-ghia", "--curve", "Re = 400")
	if status != 0 || strings.Contains(table, "-0.23827") || !strings.Contains(errs, "misprint") {
		t.Errorf("a known misprint is on the shelf: status %d, %s%s", status, table, errs)
	}
	for _, args := range [][]string{{"shelf", "nothing"}, {"shelf", "cavity-v-ghia"}, {"shelf", id, "--set", "x"}, {"shelf", id, "--at", "many"}, {"shelf", "a", "b"}} {
		if status, _, errs := call(t, nil, args...); status != 3 || errs == "" {
			t.Errorf("%v: status %d, %q", args, status, errs)
		}
	}
}

// A fault of our own ends with 4, not with a stack that looks like usage.
func TestFaultsAreInternal(t *testing.T) {
	status := run([]string{"read", "x"}, nil, panicking{})
	if status != internal {
		t.Errorf("status %d, want %d", status, internal)
	}
}

// panicking is a stream whose first write is a fault.
type panicking struct{}

var written int

func (panicking) Write(p []byte) (int, error) {
	if written++; written == 1 {
		panic(fmt.Sprintf("cannot write %d bytes", len(p)))
	}
	return len(p), nil
}

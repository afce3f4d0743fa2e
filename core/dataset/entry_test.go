package dataset

import (
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"errors"
	"math"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
)

const sample = heading + "\n" +
	"a,1,2.50,.1,,\n" +
	"a,2,-3e-3,,misprint,\"should be 3e-3, says a neighbour\"\n" +
	"b,1,7,,,\n"

// described is a complete manifest of a table; change alters it.
func described(table string, change func(m map[string]any)) fstest.MapFS {
	sum := sha256.Sum256([]byte(table))
	m := map[string]any{
		"title": "t", "kind": "test", "source": "s", "reach": "seen", "licence": "l", "transcribed": "2026-12-01", "selection": "all",
		"uncertainty": "none stated", "coverage": "not stated", "caveats": []string{},
		"station": map[string]string{"name": "x", "meaning": "distance", "unit": "mm"},
		"value":   map[string]string{"name": "p", "meaning": "pressure", "unit": "Pa"},
		"curves":  []map[string]any{{"name": "a"}, {"name": "b"}},
		"table":   "e.csv", "sha256": hex.EncodeToString(sum[:]),
	}
	if change != nil {
		change(m)
	}
	text, err := json.Marshal(m)
	if err != nil {
		panic(err)
	}
	return fstest.MapFS{"e.json": {Data: text}, "e.csv": {Data: []byte(table)}}
}

func TestOpen(t *testing.T) {
	e, err := Open(described(sample, nil), "e")
	if err != nil {
		t.Fatal(err)
	}
	if e.Kind != Test || len(e.Rows) != 3 || len(e.Curve("a")) != 2 || e.Curve("c") != nil {
		t.Errorf("%+v", e)
	}
	if r := e.Rows[0]; r.Value.Text != "2.50" || r.Value.Value != 2.5 || r.U.Value != 0.1 {
		t.Errorf("first row %+v", r)
	}
	if r := e.Rows[1]; r.Flag != Misprint || !math.IsNaN(r.U.Value) || r.U.Text != "" {
		t.Errorf("second row %+v", r)
	}
	x, v, u := e.Usable("a")
	if !slices.Equal(x, []float64{1}) || !slices.Equal(v, []float64{2.5}) || !slices.Equal(u, []float64{0.1}) {
		t.Errorf("usable %v %v %v", x, v, u)
	}
	names, err := Names(described(sample, nil))
	if err != nil || !slices.Equal(names, []string{"e"}) {
		t.Errorf("names %v, %v", names, err)
	}
	if _, err := Open(described(sample, nil), "none"); err == nil {
		t.Error("an entry that is not there was opened")
	}
}

// TestRefusedManifests breaks each promise of a manifest once.
func TestRefusedManifests(t *testing.T) {
	for _, row := range []struct {
		field, reason string
		change        func(m map[string]any)
	}{
		{"title", "is blank", func(m map[string]any) { m["title"] = " " }},
		{"source", "is blank", func(m map[string]any) { delete(m, "source") }},
		{"licence", "is blank", func(m map[string]any) { m["licence"] = "" }},
		{"selection", "is blank", func(m map[string]any) { m["selection"] = "" }},
		{"uncertainty", "is blank", func(m map[string]any) { m["uncertainty"] = "" }},
		{"coverage", "is blank", func(m map[string]any) { m["coverage"] = "" }},
		{"station.name", "is blank", func(m map[string]any) { m["station"] = map[string]string{"meaning": "m", "unit": "1"} }},
		{"value.meaning", "is blank", func(m map[string]any) { m["value"] = map[string]string{"name": "m", "unit": "1"} }},
		{"value.unit", "unknown unit", func(m map[string]any) { m["value"] = map[string]string{"name": "m", "meaning": "m", "unit": "furlong"} }},
		{"kind", `is "guess"`, func(m map[string]any) { m["kind"] = "guess" }},
		{"kind", `is ""`, func(m map[string]any) { delete(m, "kind") }},
		{"reach", `is "heard"`, func(m map[string]any) { m["reach"] = "heard" }},
		{"transcribed", "not a date", func(m map[string]any) { m["transcribed"] = "2026-13-01" }},
		{"sha256", "64", func(m map[string]any) { m["sha256"] = "ab" }},
		{"table", "not a file of the folder", func(m map[string]any) { m["table"] = "../e.csv" }},
		{"caveats", "is missing", func(m map[string]any) { delete(m, "caveats") }},
		{"curves", "is empty", func(m map[string]any) { m["curves"] = []string{} }},
		{"curves", "blank or twice", func(m map[string]any) { m["curves"] = []map[string]any{{"name": "a"}, {"name": "a"}} }},
		{"curves", "incomplete origin", func(m map[string]any) {
			m["curves"] = []map[string]any{{"name": "a", "origin": map[string]any{"file": "f", "table": 0}}, {"name": "b"}}
		}},
		{"", "unknown field", func(m map[string]any) { m["colour"] = "red" }},
		{"", "cannot unmarshal", func(m map[string]any) { m["title"] = 3 }},
	} {
		e, err := Open(described(sample, row.change), "e")
		var refused *ManifestError
		if !errors.As(err, &refused) || refused.Field != row.field || refused.Entry != "e" || !strings.Contains(err.Error(), row.reason) || e.Rows != nil {
			t.Errorf("%s %s: %v", row.field, row.reason, err)
		}
	}
	folder := described(sample, nil)
	folder["e.json"].Data = append(folder["e.json"].Data, []byte("{}")...)
	var refused *ManifestError
	if _, err := Open(folder, "e"); !errors.As(err, &refused) || !strings.Contains(err.Error(), "behind its end") {
		t.Errorf("two documents in a manifest: %v", err)
	}
}

// TestOneByte: a table altered by one byte is refused, wherever it is.
func TestOneByte(t *testing.T) {
	for i := range len(sample) {
		folder := described(sample, nil)
		data := slices.Clone(folder["e.csv"].Data)
		data[i] ^= 1
		folder["e.csv"].Data = data
		var changed *HashError
		if _, err := Open(folder, "e"); !errors.As(err, &changed) || changed.Table != "e.csv" || changed.Found == changed.Recorded {
			t.Fatalf("byte %d: %v", i, err)
		}
	}
	folder := described(sample, nil)
	delete(folder, "e.csv")
	if _, err := Open(folder, "e"); err == nil {
		t.Error("an entry without its table was opened")
	}
}

// TestRefusedRows breaks the form of a table once each; the hash is right.
func TestRefusedRows(t *testing.T) {
	for _, row := range []struct {
		table, reason string
		line          int
	}{
		{"curve,x,value,u,flag\na,1,2,,\n", "the first line", 1},
		{"", "the first line", 1},
		{heading + "\na,1,2,,,\nb,1,2,,,", "line feed", 0},
		{heading + "\r\na,1,2,,,\r\nb,1,2,,,\r\n", "the first line", 1},
		{heading + "\na,1,2,,\nb,1,2,,,\n", "number of fields", 2},
		{heading + "\na,1,2,,,\"two\nlines\"\nb,1,2,,,\n", "4 lines hold 3 rows", 0},
		{heading + "\na,1,2,,,\n\nb,1,2,,,\n", "4 lines hold 3 rows", 0},
		{heading + "\n,1,2,,,\nb,1,2,,,\n", "no curve", 2},
		{heading + "\na,,2,,,\nb,1,2,,,\n", "blank", 2},
		{heading + "\na,1,2,,,\nb,1,,,,\n", "blank", 3},
		{heading + "\na,1,two,,,\nb,1,2,,,\n", "no number", 0},
		{heading + "\na,1,NaN,,,\nb,1,2,,,\n", "no number", 0},
		{heading + "\na,1,0x1p-2,,,\nb,1,2,,,\n", "no number", 0},
		{heading + "\na,1,2,0,,\nb,1,2,,,\n", "not above zero", 2},
		{heading + "\na,1,2,,wrong,why\nb,1,2,,,\n", "unknown flag", 2},
		{heading + "\na,1,2,,doubtful,\nb,1,2,,,\n", "without a remark", 2},
		{heading + "\na,1,2,,,\nc,1,2,,,\n", "not in the manifest", 3},
		{heading + "\na,1,2,,,\nb,1,2,,,\na,2,2,,,\n", "goes on behind", 4},
		{heading + "\na,1,2,,,\n", `"b" has no rows`, 0},
	} {
		_, err := Open(described(row.table, nil), "e")
		var refused *RowError
		if !errors.As(err, &refused) || refused.Line != row.line || !strings.Contains(err.Error(), row.reason) {
			t.Errorf("%q: %v, want line %d: %s", row.table, err, row.line, row.reason)
		}
	}
}

func TestKinds(t *testing.T) {
	for _, k := range []Kind{Law, Correlation, Simulation, Test} {
		if k.Noun() == "" || k.Measured() != (k == Test) {
			t.Errorf("%s: noun %q, measured %v", k, k.Noun(), k.Measured())
		}
	}
	if Kind("guess").Noun() != "" {
		t.Error("an unknown kind has a noun")
	}
}

// FuzzRows: any bytes give rows that keep their promises, or a *RowError.
func FuzzRows(f *testing.F) {
	f.Add([]byte(sample))
	f.Add([]byte(heading + "\n"))
	f.Add([]byte(heading + "\na,0x1p-2,1_0,,,\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		rows, err := readRows("t", data)
		var refused *RowError
		if err != nil && (!errors.As(err, &refused) || rows != nil) {
			t.Fatalf("%v with %d rows", err, len(rows))
		}
		for _, r := range rows {
			if r.fault() != "" || math.IsNaN(r.X.Value) || math.IsInf(r.Value.Value, 0) || math.IsNaN(r.Value.Value) {
				t.Fatalf("row %+v", r)
			}
		}
	})
}

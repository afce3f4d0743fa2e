package memo

import (
	"bytes"
	"encoding/csv"
	"strings"
	"testing"

	"weirmark/core/quantity"
)

func TestStationsCSV(t *testing.T) {
	cells := sample().Report.Cells
	cells[1].Model = `=HYPERLINK("x")`
	cells[1].Reference = "a,\"b\"\nc"
	cells[0].Stations[0].X = 0.12345678901234
	cells[0].Stations[0].E = quantity.Number(1.0 / 3)
	data, err := Stations(cells)
	if err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(bytes.NewReader(data)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if want := "case,quantity,model,x,x_unit,s,d,e,u_d,u_num,u_interp,u_input,u_val,ratio,lo,hi,whitened,unit,reference,line"; strings.Join(rows[0], ",") != want {
		t.Errorf("columns %q", rows[0])
	}
	if len(rows) != 1+24+24+2 {
		t.Fatalf("%d rows", len(rows))
	}
	at := func(r int, name string) string {
		for i, title := range rows[0] {
			if title == name {
				return rows[r][i]
			}
		}
		t.Fatalf("no column %s", name)
		return ""
	}
	for _, row := range []struct {
		r          int
		name, want string
	}{
		{1, "x", "0.12345678901234"}, {1, "e", "0.3333333333"}, {1, "u_input", ""}, {1, "line", "5"}, {1, "unit", "1"}, {1, "lo", "-0.0043205832"},
		{25, "model", `'=HYPERLINK("x")`}, {25, "reference", "a,\"b\"\nc"}, {49, "x", ""}, {50, "unit", "N"},
	} {
		if got := at(row.r, row.name); got != row.want {
			t.Errorf("row %d, %s: %q, want %q", row.r, row.name, got, row.want)
		}
	}
}

func TestGuarded(t *testing.T) {
	for in, want := range map[string]string{"=1": "'=1", "+1": "'+1", "-1": "'-1", "@a": "'@a", "\t=1": "'\t=1", " =1": "' =1", "a=1": "a=1", "": "", "α": "α"} {
		if got := guarded(in); got != want {
			t.Errorf("guarded(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestStationsOfNothing(t *testing.T) {
	data, err := Stations(nil)
	if err != nil || !strings.HasPrefix(string(data), "case,quantity,") {
		t.Errorf("%q, %v", data, err)
	}
}

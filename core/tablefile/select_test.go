package tablefile

import (
	"errors"
	"testing"

	"pgregory.net/rapid"
)

// TestWhere takes the rows of one line out of a surface: with their lines, in
// their order, and with their texts.
func TestWhere(t *testing.T) {
	f := Read("surface.csv", []byte("x,z,Cp,mark\n0,0.1,1.0,a\n1,0.1,0.5,b\n0,0.2,0.9,c\n# a remark\n1,0.2,0.4,d\n2,n.a.,0.3,e\n2,0.2,0.2,f\n"), Options{})
	whole, err := f.Table("")
	if err != nil {
		t.Fatal(err)
	}
	line, err := whole.Where("z", 0.15, 0.25)
	if err != nil {
		t.Fatal(err)
	}
	cp, _ := line.Column("Cp")
	mark, _ := line.Column("mark")
	if line.Rows() != 3 || cp.Values[0] != 0.9 || cp.Values[2] != 0.2 || mark.Text[1] != "d" {
		t.Fatalf("rows %d, Cp %v, marks %v", line.Rows(), cp.Values, mark.Text)
	}
	for n, want := range []int{4, 6, 8} {
		if got := line.RowLine(n); got != want {
			t.Errorf("row %d stands in line %d, want %d", n, got, want)
		}
	}
	if _, err := whole.Where("z", 5, 6); !errors.Is(err, ErrNoRows) {
		t.Errorf("nothing between 5 and 6: %v", err)
	}
	if _, err := whole.Where("w", 0, 1); err == nil {
		t.Error("a column that is not there was taken")
	}
}

// TestWhereProperty: what is kept lies between the values, what is left out
// does not, and every kept row keeps its line.
func TestWhereProperty(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		values := rapid.SliceOfN(rapid.IntRange(0, 9), 2, 40).Draw(t, "values")
		text := "x,v\n"
		for i, v := range values {
			text += string(rune('0'+i%10)) + "," + string(rune('0'+v)) + "\n"
		}
		whole, err := Read("v.csv", []byte(text), Options{}).Table("")
		if err != nil || whole.Rows() != len(values) {
			t.Fatalf("%q: %d rows (%v)", text, whole.Rows(), err)
		}
		from := rapid.IntRange(0, 9).Draw(t, "from")
		to := rapid.IntRange(from, 9).Draw(t, "to")
		part, err := whole.Where("v", float64(from), float64(to))
		n := 0
		for i, v := range values {
			if v < from || v > to {
				continue
			}
			if err != nil || part.RowLine(n) != whole.RowLine(i) {
				t.Fatalf("row %d: %v", i, err)
			}
			n++
		}
		if err == nil && part.Rows() != n || err != nil && n > 0 {
			t.Fatalf("%d rows kept of %d (%v)", part.Rows(), n, err)
		}
	})
}

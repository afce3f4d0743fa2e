package study

import (
	"encoding/binary"
	"encoding/hex"
	"hash/fnv"
	"math"

	"weirmark/core/notice"
	"weirmark/core/profile"
	"weirmark/core/quantity"
)

// OrderHash tells the order of rows in a file: the 64 bits of FNV-1a over the
// eight bytes of every number of a column, least byte first, in hexadecimal.
// It changes with every change of the order or of a number.
func OrderHash(values []float64) string {
	h := fnv.New64a()
	var number [8]byte
	for _, v := range values {
		if math.IsNaN(v) {
			v = math.NaN() // one of the many
		}
		binary.LittleEndian.PutUint64(number[:], math.Float64bits(v))
		h.Write(number[:])
	}
	return hex.EncodeToString(h.Sum(nil))
}

// takeLength replaces the stations of a curve by the length along its contour.
func (l *loader) takeLength(c *curve) {
	along := c.slip.Abscissa.Value
	if along != AlongArc && along != AlongArcPart {
		l.tell(notice.New("arc-unknown", along, l.file))
		return
	}
	if !c.slip.Contour.Column.Given() {
		near, all := nearFirst(c.x)
		l.tell(notice.New("arc-missing", l.file, c.slip.X.Column.Value, near, all))
		return
	}
	second, unit := l.column(c.slip.Contour)
	if second == nil {
		return
	}
	if c.xUnit.known && unit.known && !c.xUnit.unit.Same(unit.unit) {
		l.tell(notice.New("unit-dimension", c.slip.X.Column.Value, c.slip.X.Unit.Value, c.slip.Contour.Column.Value, c.slip.Contour.Unit.Value))
		return
	}
	s := arcOf(c.x, second)
	own := *c.slip
	own.X.Column.Value = "s"
	if along == AlongArcPart {
		_, whole := profile.Limits(s)
		for i := range s {
			s[i] /= whole
		}
		own.X = ColumnUse{Column: Field{Value: "s/s_max"}, Unit: Field{Value: "1"}}
		c.xUnit = axis{unit: quantity.One, known: true, symbol: "1"}
	}
	c.xUnit.name = own.X.Column.Value
	c.slip, c.x, c.along = &own, s, along
	l.tell(notice.New("arc-taken", l.file, own.X.Column.Value))
}

// arcOf returns the length along a contour. One that was taken as a branch
// runs from its least station, whichever way the file runs.
func arcOf(x, y []float64) []float64 {
	first, last := profile.Ends(x)
	if !(first > last) || profile.Loop(x) {
		return profile.Arc(x, y)
	}
	s := profile.Arc(reversed(x), reversed(y))
	return reversed(s)
}

func reversed(values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[len(out)-1-i] = v
	}
	return out
}

// nose is the part of the range of x in which a contour is steep.
const nose = 0.02

// nearFirst counts the rows in the first part of the range of x, where x does
// not part the places on a steep contour.
func nearFirst(x []float64) (near, all int) {
	lo, hi := profile.Limits(x)
	for _, v := range x {
		if !math.IsNaN(v) {
			all++
			if v <= lo+float64(nose*(hi-lo)) {
				near++
			}
		}
	}
	return near, all
}

// mixedAbscissae stops a comparison of a length with a coordinate, or of two
// lengths of different kinds. It reports whether it did.
func (w *work) mixedAbscissae(s, d *curve) bool {
	if s.scalar() || d.scalar() || s.along == d.along {
		return false
	}
	n := notice.New("arc-mixed", w.e.study.fileName(s.slip), s.slip.X.Column.Value, w.e.study.fileName(d.slip), d.slip.X.Column.Value)
	w.tell(n)
	w.stop(2, "one abscissa for both sides", slipTarget(s.slip, "abscissa"), n)
	return true
}

package study

import (
	"math"
	"strconv"
	"strings"

	"weirmark/core/tablefile"
	"weirmark/core/uncertainty"
)

// record lists the record of a digitised curve as its lines are named.
func (d *Digitising) record() []slipField {
	return []slipField{
		{path: "digitised.x_scale", name: "scale of the x axis", field: d.XScale},
		{path: "digitised.x_zero", name: "zero of the x axis", field: d.XZero},
		{path: "digitised.y_scale", name: "scale of the y axis", field: d.YScale},
		{path: "digitised.y_zero", name: "zero of the y axis", field: d.YZero},
		{path: "digitised.line", name: "thickness of the line", field: d.Line},
		{path: "digitised.pixel", name: "size of a pixel", field: d.Pixel},
	}
}

// statedDigitising is the record that a file states of itself in lines such as
// "# digitised: yes" and "# y scale: 0.5".
func statedDigitising(read tablefile.File, table string) Digitising {
	stated := map[string]Field{}
	for _, m := range read.Meta {
		if m.Table == "" || m.Table == table {
			stated[strings.ToLower(m.Key)] = Field{Value: m.Value, By: Stated}
		}
	}
	if is := stated["digitised"]; !strings.EqualFold(is.Value, "yes") {
		return Digitising{}
	}
	return Digitising{Is: Field{Value: "yes", By: Stated}, XScale: stated["x scale"], XZero: stated["x zero"], YScale: stated["y scale"], YZero: stated["y zero"], Line: stated["line"], Pixel: stated["pixel"]}
}

// digitised adds what reading a curve off a figure brings: the calibrations of
// the axes are one error of all stations, those of x by the slope of the data;
// line and pixel are independent. Without the whole record nothing is added and
// no statement is made.
func (w *work) digitised() {
	if w.reference == nil || w.cell.Scalar || w.reference.slip.Digitised.Is.Value != "yes" {
		return
	}
	p := w.reference.slip
	var values []float64
	for _, f := range p.Digitised.record() {
		v, err := strconv.ParseFloat(f.field.Value, 64)
		if err != nil || v < 0 || math.IsInf(v, 0) {
			w.need(2, true, "the "+f.name+" of the figure", slipTarget(p, f.path), "digitised-record", w.e.study.fileName(p), f.name)
			return
		}
		values = append(values, v)
	}
	slope := slopes(w.x, w.d)
	line := func(name, text string, source uncertainty.Source) {
		w.addSource(OfData, "digitising: "+name, text, "record of the digitising of "+w.e.study.fileName(p), source, false)
	}
	signed := func(f func(i int) float64) uncertainty.Source {
		u := make([]float64, len(w.x))
		for i := range u {
			u[i] = f(i)
		}
		return uncertainty.Source{U: u, Common: true}
	}
	written := func(i int, unit string) string {
		return p.Digitised.record()[i].field.Value + " " + unit + ", standard"
	}
	line("scale of x", written(0, "%")+", by the slope of the data", signed(func(i int) float64 { return slope[i] * w.x[i] * values[0] / 100 }))
	line("zero of x", written(1, w.xUnit.symbol)+", by the slope of the data", signed(func(i int) float64 { return slope[i] * w.xUnit.StepToSI(values[1]) }))
	line("scale of y", written(2, "%"), uncertainty.OfScale(w.fromZero(w.d), values[2]/100))
	line("zero of y", written(3, w.yUnit.symbol), uncertainty.Source{U: uncertainty.Constant(len(w.x), w.yUnit.StepToSI(values[3])), Common: true})
	width := func(i int) uncertainty.Source {
		return uncertainty.Source{U: uncertainty.Constant(len(w.x), uncertainty.OfResolution(w.yUnit.StepToSI(values[i])))}
	}
	line("line", p.Digitised.Line.Value+" "+w.yUnit.symbol+" wide, rectangular", width(4))
	line("pixel", p.Digitised.Pixel.Value+" "+w.yUnit.symbol+", rectangular", width(5))
}

// slopes returns the slope of a curve at its stations: of the parabola through
// the neighbours, at the ends of the line to the one there; 0 where two stations
// are one place.
func slopes(x, y []float64) []float64 {
	order := uncertainty.Along(x)
	out := make([]float64, len(x))
	for j, i := range order {
		lo, hi := order[max(j-1, 0)], order[min(j+1, len(order)-1)]
		below, above := x[i]-x[lo], x[hi]-x[i]
		switch {
		case below > 0 && above > 0:
			out[i] = uncertainty.Between(y[lo:lo+1], y[i:i+1], y[hi:hi+1], below, above)[0]
		case below+above > 0:
			out[i] = (y[hi] - y[lo]) / (below + above)
		}
	}
	return out
}

// fromZero returns values from the zero of their own unit, in SI steps: the
// scale of an axis in °C stretches from 0 °C, not from 0 K.
func (w *work) fromZero(values []float64) []float64 {
	out := make([]float64, len(values))
	for i, v := range values {
		out[i] = v - w.yUnit.Offset
	}
	return out
}

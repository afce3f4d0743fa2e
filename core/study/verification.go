package study

import (
	"math"
	"strconv"

	"weirmark/core/notice"
	"weirmark/core/refinement"
	"weirmark/core/station"
)

// Roles of evidence on the code, apart from any comparison with data.
const (
	ExactErrors   = "errors"         // a table of error norms against an exact solution: columns of spacing or cells, and of the norm
	ExactSolution = "known solution" // values of an exact solution along stations; the runs of its case and quantity are held against it
)

// CodeCheck is the order at which a code approaches an exact solution, by one
// norm of its error.
type CodeCheck struct {
	Case     string          `json:"case"`
	Quantity string          `json:"quantity"`
	Model    string          `json:"model"`
	File     string          `json:"file"`
	Norm     string          `json:"norm"`
	Unit     string          `json:"unit"`
	Points   []CodePoint     `json:"points"` // coarse to fine
	Order    Number          `json:"order"`  // over all grids; null where the error does not fall with every refinement
	Orders   []Number        `json:"orders"` // between neighbours, coarse to fine
	Notices  []notice.Notice `json:"notices"`
}

// CodePoint is the error on one grid.
type CodePoint struct {
	Grid  string `json:"grid"`
	H     Number `json:"h"`
	Error Number `json:"error"`
}

// CodeEvidence is what a person states of the verification of the code.
type CodeEvidence struct {
	Statement string `json:"statement,omitempty"`
	Link      string `json:"link,omitempty"` // where the evidence is, in words
}

// codeChecks evaluates the evidence on the code.
func (e *evaluation) codeChecks(r *Report) {
	if c := e.study.Code; c != nil {
		evidence := *c
		r.Code = &evidence
	}
	for i := range e.study.Slips {
		p := &e.study.Slips[i]
		switch p.Role.Value {
		case ExactErrors:
			r.CodeChecks = append(r.CodeChecks, e.errorTable(p))
		case ExactSolution:
			for _, model := range e.study.modelsOf(p) {
				r.CodeChecks = append(r.CodeChecks, e.againstExact(p, model)...)
			}
		}
	}
}

// modelsOf lists the models with runs in the case and quantity of a slip.
func (s *Study) modelsOf(p *Slip) []string {
	q := Question{Case: p.Case.Value, Quantity: p.Quantity.Value}
	return s.models(&q)
}

// exactOnly reports whether a question is one of an exact solution, with no
// reference to be compared: it is evidence on the code and has no cell.
func (s *Study) exactOnly(q *Question) bool {
	exact := false
	for i := range s.Slips {
		p := &s.Slips[i]
		if q.belongs(p, Reference) {
			return false
		}
		exact = exact || q.belongs(p, ExactSolution)
	}
	return exact
}

// check begins the evidence of a slip.
func (e *evaluation) check(p *Slip, model string) CodeCheck {
	c := CodeCheck{Case: p.Case.Value, Quantity: p.Quantity.Value, Model: model, File: e.study.fileName(p), Unit: p.Y.Unit.Value, Points: []CodePoint{}, Order: None, Orders: []Number{}, Notices: []notice.Notice{}}
	for _, f := range []slipField{{name: "Role", field: p.Role}, {name: "Column of values", field: p.Y.Column}, {name: "Column of stations", field: p.X.Column}, {name: "Column of cell counts", field: p.Size.Column}} {
		if f.field.Open() {
			c.Notices = append(c.Notices, notice.New("guess-open", f.name, c.File, f.field.Value))
		}
	}
	return c
}

// errorTable takes error norms as a table states them: over the spacing of the
// column of stations, or over cell counts and the number of dimensions.
func (e *evaluation) errorTable(p *Slip) CodeCheck {
	c := e.check(p, p.Model.Value)
	c.Norm = p.Y.Column.Value
	curve, notices := e.load(p)
	c.Notices = append(c.Notices, notices...)
	if curve == nil {
		return c
	}
	h := curve.x
	if h == nil {
		size, err := curve.table.Column(p.Size.Column.Value)
		dim, wrong := strconv.Atoi(p.Dimensions.Value)
		if err != nil || wrong != nil || dim < 1 || dim > 3 {
			c.Notices = append(c.Notices, notice.New("grid-verify-spacing", c.File))
			return c
		}
		h = make([]float64, len(size.Values))
		for i, n := range size.Values {
			h[i] = math.Pow(n, -1/float64(dim))
		}
	}
	c.verify(nil, h, curve.y, curve.yUnit)
	return c
}

// againstExact holds the runs of a model against an exact solution at its
// stations, by three norms.
func (e *evaluation) againstExact(p *Slip, model string) []CodeCheck {
	exact, notices := e.load(p)
	first := e.check(p, model)
	first.Notices = append(first.Notices, notices...)
	if exact == nil || exact.x == nil {
		first.Notices = append(first.Notices, notice.New("grid-verify-spacing", first.File))
		return []CodeCheck{first}
	}
	q := Question{Case: p.Case.Value, Quantity: p.Quantity.Value, Choices: DefaultChoices()}
	if asked := e.study.Question(q.Case, q.Quantity); asked != nil {
		q.Choices = asked.Choices
	}
	var names []string
	var h []float64
	var norms []refinement.Norms
	for i := range e.study.Slips {
		s := &e.study.Slips[i]
		if s.Model.Value != model || !q.belongs(s, Simulation) {
			continue
		}
		run, more := e.load(s)
		first.Notices = append(first.Notices, more...)
		n, err := strconv.ParseFloat(s.Cells.Value, 64)
		if run == nil || run.x == nil || err != nil || !(n > 0) {
			first.Notices = append(first.Notices, notice.New("grid-verify-spacing", e.study.fileName(s)))
			continue
		}
		got := station.Resample(e.study.fileName(s), s.X.Column.Value, run.x, run.y, exact.x, station.Options{Method: q.Choices.Interpolation})
		first.Notices = append(first.Notices, got.Notices...)
		var errors []float64
		for j, at := range got.Kept {
			if d := got.S[j] - exact.y[at]; !math.IsNaN(d) {
				errors = append(errors, d)
			}
		}
		names, h, norms = append(names, s.Grid.Value), append(h, 1/spacing(n, q.Choices.dimension())), append(norms, refinement.NormsOf(errors))
	}
	var checks []CodeCheck
	for _, norm := range []struct {
		name string
		of   func(refinement.Norms) float64
	}{{"mean", func(n refinement.Norms) float64 { return n.Mean }}, {"root mean square", func(n refinement.Norms) float64 { return n.RMS }}, {"largest", func(n refinement.Norms) float64 { return n.Max }}} {
		c := first
		c.Norm, c.Points, c.Orders = norm.name, []CodePoint{}, []Number{}
		c.Notices = append([]notice.Notice{}, first.Notices...)
		errors := make([]float64, len(norms))
		for i, n := range norms {
			errors[i] = norm.of(n)
		}
		c.verify(names, h, errors, exact.yUnit)
		checks = append(checks, c)
	}
	return checks
}

// verify fills in the errors, coarse to fine, and their order.
func (c *CodeCheck) verify(names []string, h, errors []float64, unit axis) {
	usedH, usedE, order := []float64{}, []float64{}, []int{}
	for i := range h {
		if math.IsNaN(h[i]) || math.IsNaN(errors[i]) {
			continue
		}
		at := len(order)
		for at > 0 && h[order[at-1]] < h[i] {
			at--
		}
		order = append(order[:at:at], append([]int{i}, order[at:]...)...)
	}
	for _, i := range order {
		name := ""
		if i < len(names) {
			name = names[i]
		}
		usedH, usedE = append(usedH, h[i]), append(usedE, errors[i])
		c.Points = append(c.Points, CodePoint{Grid: name, H: Number(h[i]), Error: Number(unit.unit.StepFromSI(errors[i]))})
	}
	v := refinement.Verify(usedH, usedE)
	c.Order, c.Notices = Number(v.Order), append(c.Notices, v.Notices...)
	for _, p := range v.Orders {
		c.Orders = append(c.Orders, Number(p))
	}
}

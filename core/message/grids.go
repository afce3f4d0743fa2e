package message

import (
	"math"
	"slices"
	"strconv"
	"strings"

	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/refinement"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// GridsRequest asks for the grid study of values over cell counts. Empty
// texts take the defaults: the first column of numbers, all other columns.
type GridsRequest struct {
	Size   string `json:"size,omitempty"`
	Value  string `json:"value,omitempty"`
	Dim    int    `json:"dim,omitempty"` // 1, 2 or 3; 0 is not stated
	Limits bool   `json:"limits"`        // the bounded rule
	// Rule is a name of refinement.Rules, its blanks written as hyphens or not.
	Rule   string  `json:"rule,omitempty"`
	Formal float64 `json:"formal,omitempty"` // order of the scheme; 0 is not stated
}

// GridsCase is the grid study of one column of one table.
type GridsCase struct {
	Table        string       `json:"table"`
	Value        string       `json:"value"`
	Class        string       `json:"class"`
	Order        study.Number `json:"order"`
	Extrapolated study.Number `json:"extrapolated"`
	Ea           study.Number `json:"ea"`
	Eext         study.Number `json:"eext"`
	GCI          study.Number `json:"gci"`
	U            study.Number `json:"u"`    // expanded, in the unit of the values
	Rule         string       `json:"rule"` // what was done
	Notices      []Finding    `json:"notices"`
}

// grids makes the grid study of every value column of every table.
func grids(_ *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	name, data, err := attachedFile(q, attached, 0)
	if err != nil {
		return nil, err
	}
	ask := GridsRequest{}
	if q.Grids != nil {
		ask = *q.Grids
	}
	ask.Rule = strings.ReplaceAll(ask.Rule, "-", " ")
	if ask.Rule != "" && !slices.Contains(refinement.Rules, ask.Rule) {
		return nil, notice.New("operation-refused", "a rule of the grid study", ask.Rule+" (known are: "+strings.Join(refinement.Rules, ", ")+")")
	}
	if ask.Formal == 0 {
		ask.Formal = study.DefaultChoices().Formal
	}
	f := tablefile.Read(name, data, tablefile.Options{})
	if _, err := f.Table("1"); err != nil {
		return nil, err
	}
	cases := []GridsCase{}
	for i, t := range f.Tables {
		found, err := gridCases(f.Name, t, ask)
		if err != nil {
			return nil, err
		}
		for j := range found {
			if found[j].Table == "" {
				found[j].Table = strconv.Itoa(i + 1)
			}
		}
		cases = append(cases, found...)
	}
	for _, c := range cases {
		if c.Class == string(refinement.Insufficient) {
			r.Status = Incomplete
		}
	}
	r.Grids = &cases
	return nil, nil
}

// gridCases makes the grid studies of one table.
func gridCases(file string, t tablefile.Table, ask GridsRequest) ([]GridsCase, error) {
	size := t.Columns[0]
	for _, c := range t.Columns {
		if len(finite(c.Values)) > 0 { // names of grids are no sizes
			size = c
			break
		}
	}
	if ask.Size != "" {
		c, err := t.Column(ask.Size)
		if err != nil {
			return nil, asNotice(err).In(file)
		}
		size = c
	}
	values, spacing, err := gridColumns(file, t, size, ask.Value)
	if err != nil {
		return nil, err
	}
	dim, notices := ask.Dim, []notice.Notice{}
	if dim == 0 {
		dim = 3
		why := ""
		if len(spacing) > 0 {
			dim, why = spacing[0].dim, " from column "+spacing[0].name
		}
		notices = append(notices, notice.New("dimension-assumed", dim, why))
	}
	for _, s := range spacing {
		if ask.Value == "" {
			notices = append(notices, notice.New("grid-spacing-column", s.name))
		}
	}
	var cases []GridsCase
	for _, c := range values {
		res := refinement.Study(size.Values, c.Values, dim, refinement.Options{Rule: ask.Rule, Bounded: ask.Limits, Formal: ask.Formal})
		cases = append(cases, GridsCase{Table: t.Name, Value: c.Name, Class: string(res.Class),
			Order: study.Number(res.Order), Extrapolated: study.Number(res.Extrapolated), Ea: study.Number(res.Ea), Eext: study.Number(res.Eext), GCI: study.Number(res.GCI), U: study.Number(res.U), Rule: res.Rule,
			Notices: findings(append(append([]notice.Notice{}, notices...), res.Notices...), false)})
	}
	return cases, nil
}

// spacingColumn is a column that follows the cell count as a grid spacing.
type spacingColumn struct {
	name string
	dim  int
}

// gridColumns returns the columns to study: the one asked for, or all but the
// sizes and the spacings, as long as another remains.
func gridColumns(file string, t tablefile.Table, size tablefile.Column, value string) (values []tablefile.Column, spacing []spacingColumn, err error) {
	var kept, spaced []tablefile.Column
	for _, c := range t.Columns {
		if c.Name == size.Name || c.Text != nil && len(finite(c.Values)) == 0 {
			continue
		}
		if dim := spacingDimension(size.Values, c.Values); dim > 0 {
			spacing, spaced = append(spacing, spacingColumn{c.Name, dim}), append(spaced, c)
			continue
		}
		kept = append(kept, c)
	}
	if value != "" {
		c, err := t.Column(value)
		if err != nil {
			return nil, nil, asNotice(err).In(file)
		}
		return []tablefile.Column{c}, spacing, nil
	}
	if len(kept) == 0 {
		kept, spacing = spaced, nil
	}
	return kept, spacing, nil
}

// spacingDimension returns d where the column is proportional to n^(-1/d),
// within a part in a thousand, over at least three rows; else 0. Of d = 1,
// which is a count per cell, the dimension of the grid is not known and 2 is
// taken.
func spacingDimension(n, h []float64) int {
	for _, d := range []int{2, 3, 1} {
		if follows(n, h, d) {
			return max(d, 2)
		}
	}
	return 0
}

func follows(n, h []float64, d int) bool {
	rows, first := 0, 0.0
	for i := range n {
		if math.IsNaN(n[i]) || math.IsNaN(h[i]) {
			continue
		}
		root := n[i]
		switch d {
		case 2:
			root = math.Sqrt(n[i])
		case 3:
			root = math.Cbrt(n[i])
		}
		product := root * h[i]
		if !(product > 0) {
			return false
		}
		if rows == 0 {
			first = product
		}
		if math.Abs(product-first) > 1e-3*first {
			return false
		}
		rows++
	}
	return rows >= 3
}

func finite(values []float64) []float64 {
	var all []float64
	for _, v := range values {
		if !math.IsNaN(v) {
			all = append(all, v)
		}
	}
	return all
}

// text prints a number for the command.
func text(n study.Number, digits int) string { return quantity.Text(float64(n), digits) }

package message

import (
	"cmp"
	"math"
	"strconv"
	"strings"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
	"weirmark/core/study"
	"weirmark/core/tablefile"
)

// CompareRequest names the columns of two attached files, the simulation and
// the reference, and what is known of their uncertainties.
type CompareRequest struct {
	SimTable string  `json:"sim_table,omitempty"`
	RefTable string  `json:"ref_table,omitempty"`
	X        string  `json:"x"`
	Y        string  `json:"y"`
	RefX     string  `json:"ref_x,omitempty"`
	RefY     string  `json:"ref_y,omitempty"`
	U        string  `json:"u,omitempty"`        // column, number, or number%
	UK       string  `json:"u_k,omitempty"`      // coverage factor of U
	UCommon  string  `json:"u_common,omitempty"` // column or number
	UNum     string  `json:"u_num,omitempty"`    // column or number
	UInput   string  `json:"u_input,omitempty"`  // number
	UInterp  bool    `json:"u_interp"`
	Interp   string  `json:"interp,omitempty"`
	K        float64 `json:"k,omitempty"` // 0 is 2
}

// CompareReply is one comparison.
type CompareReply struct {
	Stations  []CompareStation `json:"stations"`
	Outside   []study.Number   `json:"outside"`
	Summary   CompareSummary   `json:"summary"`
	Joint     *CompareJoint    `json:"joint"`
	Crossings CompareCrossings `json:"crossings"`
	Notices   []Finding        `json:"notices"`
}

// CompareStation is one common station.
type CompareStation struct {
	X      study.Written `json:"x"`
	S      study.Number  `json:"s"`
	D      study.Written `json:"d"`
	E      study.Number  `json:"e"`
	UD     study.Number  `json:"u_d"`
	UNum   study.Number  `json:"u_num"`
	UInput study.Number  `json:"u_input"`
	UVal   study.Number  `json:"u_val"`
	Ratio  study.Number  `json:"ratio"`
}

// CompareSummary counts and averages.
type CompareSummary struct {
	N           int          `json:"n"`
	Bias        study.Number `json:"bias"`
	MAE         study.Number `json:"mae"`
	RMSE        study.Number `json:"rmse"`
	MaxAbs      study.Number `json:"max_abs"`
	WithinUVal  int          `json:"within_u_val"`
	WithinKUVal int          `json:"within_k_u_val"`
}

// CompareJoint is the statistic of all stations.
type CompareJoint struct {
	Statistic study.Number `json:"statistic"`
	N         int          `json:"n"`
	P         study.Number `json:"p_value"`
}

// CompareCrossings lists where each side changes sign.
type CompareCrossings struct {
	Sim []study.Number `json:"sim"`
	Ref []study.Number `json:"ref"`
}

// refusing are the stop notices that leave nothing to compare.
var refusing = map[string]bool{
	"column-unknown": true, "column-ambiguous": true, "column-empty": true, "table-unknown": true, "table-needed": true, "table-ambiguous": true,
	"file-empty": true, "file-not-text": true, "file-too-large": true, "columns-many": true, "quote-open": true, "decimal-mixed": true, "zone-layout": true,
	"curve-loop": true, "curve-short": true, "unit-dimension": true, "density-needed": true, "u-negative": true, "station-none": true, "scalar-curve": true,
}

// compare evaluates a study of one question made of the request.
func compare(s *Session, q *Request, attached [][]byte, r *Reply) ([][]byte, error) {
	ask := q.Compare
	if ask == nil || ask.X == "" || ask.Y == "" {
		return nil, notice.New("request-columns")
	}
	one := study.New()
	for i, id := range []string{"sim", "ref"} {
		name, data, err := attachedFile(q, attached, i)
		if err != nil {
			return nil, err
		}
		one.Files = append(one.Files, study.File{ID: id, Name: name, Data: data})
	}
	read, err := readBoth(one, ask)
	if err != nil {
		return nil, err
	}
	extra, err := compareStudy(one, ask, read)
	if err != nil {
		return nil, err
	}
	report := study.Evaluate(one, study.Options{Partial: true, Read: func(f study.File) tablefile.File { return read[f.ID] }})
	c := &report.Cells[0]
	for _, n := range c.Notices {
		if n.Severity == notice.Stop && refusing[n.Code] {
			return nil, n
		}
	}
	unitless := true
	for _, p := range one.Slips {
		unitless = unitless && !p.X.Unit.Given() && !p.Y.Unit.Given()
	}
	reply := compareReply(c, ask)
	notices := append(append(append([]notice.Notice{}, report.Notices...), extra...), compareNotices(c, ask, unitless)...)
	reply.Notices = findings(notices, true)
	r.Compare = reply
	if ask.U == "" || ask.UK == "" || len(reply.Stations) == 0 {
		r.Status = Incomplete
	}
	for _, n := range notices {
		if n.Severity != notice.Note { // a question is open, or a part was refused
			r.Status = Incomplete
		}
	}
	return nil, nil
}

// readBoth reads the two files once. Their hashes are those of the bytes that
// came with the request.
func readBoth(one *study.Study, ask *CompareRequest) (map[string]tablefile.File, error) {
	read := map[string]tablefile.File{}
	tables := map[string]string{"sim": ask.SimTable, "ref": ask.RefTable}
	for i := range one.Files {
		f := &one.Files[i]
		read[f.ID] = study.Read(*f)
		f.SHA256 = read[f.ID].SHA256
		if _, err := read[f.ID].Table(tables[f.ID]); err != nil {
			return nil, asNotice(err).In(f.Name)
		}
	}
	return read, nil
}

// compareStudy fills the study of one comparison: what a command line states
// is entered, not guessed.
func compareStudy(one *study.Study, ask *CompareRequest, read map[string]tablefile.File) (extra []notice.Notice, err error) {
	const caseName, quantity = "1", "value"
	enter := func(v string) study.Field { return study.Field{Value: v, By: study.Entered} }
	slip := func(id, table, x, y string, role string) study.Slip {
		return study.Slip{ID: id, File: id, Table: table, Role: enter(role), Case: enter(caseName), Quantity: enter(quantity),
			X: study.ColumnUse{Column: enter(x)}, Y: study.ColumnUse{Column: enter(y)}}
	}
	sim := slip("sim", ask.SimTable, ask.X, ask.Y, study.Simulation)
	ref := slip("ref", ask.RefTable, cmp.Or(ask.RefX, ask.X), cmp.Or(ask.RefY, ask.Y), study.Reference)
	for _, p := range []*study.Slip{&sim, &ref} {
		statedUnits(read[p.File], p)
	}
	choices := study.DefaultChoices()
	choices.UInterp = ask.UInterp
	if ask.K != 0 {
		choices.K = ask.K
	}
	if ask.Interp != "" {
		choices.Interpolation = interpolate.Method(ask.Interp)
	}
	question := study.Question{Case: caseName, Quantity: quantity, Choices: choices, Kind: enter(study.KindTest), Use: enter(study.UseValidation)}
	if ask.U != "" {
		coverage := ask.UK
		if coverage == "" {
			coverage = "1"
			extra = append(extra, notice.New("coverage-assumed"))
		}
		source, err := sourceOf("uncertainty of the data", study.OfData, study.Independent, ask.U, coverage)
		if err != nil {
			return nil, err
		}
		question.Sources = append(question.Sources, source)
	}
	for _, s := range []struct{ name, of, pattern, value string }{
		{"common uncertainty of the data", study.OfData, study.Common, ask.UCommon},
		{"numerical uncertainty", study.OfNumerical, study.Independent, ask.UNum},
		{"input uncertainty", study.OfInput, study.Common, ask.UInput},
	} {
		if s.value == "" {
			continue
		}
		if strings.HasSuffix(s.value, "%") {
			return nil, notice.New("request-number", s.name, s.value)
		}
		source, err := sourceOf(s.name, s.of, s.pattern, s.value, "1")
		if err != nil {
			return nil, err
		}
		question.Sources = append(question.Sources, source)
	}
	one.Slips, one.Questions = []study.Slip{sim, ref}, []study.Question{question}
	return extra, nil
}

// statedUnits takes the units that the file itself states.
func statedUnits(f tablefile.File, p *study.Slip) {
	table, err := f.Table(p.Table)
	if err != nil {
		return // told by the evaluation
	}
	for _, use := range []*study.ColumnUse{&p.X, &p.Y} {
		if c, err := table.Column(use.Column.Value); err == nil && c.Unit != "" {
			if _, err := quantity.Parse(c.Unit); err == nil {
				use.Unit = study.Field{Value: c.Unit, By: study.Stated}
			}
		}
	}
}

// sourceOf reads a column name, a number, or a number with a percent sign.
func sourceOf(name, of, pattern, value, coverage string) (study.Source, error) {
	s := study.Source{Name: name, Of: of, Pattern: pattern, Basis: study.Absolute, Coverage: study.Field{Value: coverage, By: study.Entered}, Origin: "command"}
	number, percent := strings.CutSuffix(value, "%")
	v, err := strconv.ParseFloat(strings.TrimSpace(number), 64)
	switch {
	case err != nil && percent:
		return s, notice.New("request-number", name, value)
	case err != nil:
		s.Column = value
	case math.IsNaN(v) || math.IsInf(v, 0):
		return s, notice.New("request-number", name, value)
	case v < 0:
		return s, notice.New("u-negative", value, name)
	case percent:
		s.Value, s.Basis = v, study.OfReading
	default:
		s.Value = v
	}
	return s, nil
}

// pageOnly are told by the page, not by a command that has no page.
var pageOnly = map[string]bool{"field-missing": true, "guess-open": true, "monitor-missing": true, "requirement-missing": true, "grid-one": true, "station-common": true, "curve-envelope": true}

// compareNotices are the notices of the cell that a command line can answer.
// Where neither file states a unit, both are in the same one: a command line
// has no other way to say so.
func compareNotices(c *study.Cell, ask *CompareRequest, unitless bool) []notice.Notice {
	list := []notice.Notice{}
	for _, n := range c.Notices {
		if !pageOnly[n.Code] && !(unitless && n.Code == "unit-missing") {
			list = append(list, n)
		}
	}
	if ask.UNum == "" {
		list = append(list, notice.New("u-num-missing"))
	}
	if ask.U == "" && !notice.Has(list, "u-missing") {
		list = append(list, notice.New("u-missing"))
	}
	return list
}

// compareReply lays out the cell.
func compareReply(c *study.Cell, ask *CompareRequest) *CompareReply {
	reply := &CompareReply{Stations: []CompareStation{}, Outside: c.Outside,
		Crossings: CompareCrossings{Sim: at(c.Crossings.Simulation), Ref: at(c.Crossings.Reference)},
		Summary:   CompareSummary{Bias: study.None, MAE: study.None, RMSE: study.None, MaxAbs: study.None}}
	for _, s := range c.Stations {
		line := CompareStation{X: s.X, S: s.S, D: s.D, E: s.E, UD: s.UD, UNum: s.UNum, UInput: s.UInput, UVal: s.UVal, Ratio: s.Ratio}
		if ask.UInterp {
			line.UNum = rootSum(s.UNum, s.UInterp)
		}
		reply.Stations = append(reply.Stations, line)
	}
	if ask.U == "" {
		reply.withoutU()
	}
	if s := c.Summary; s != nil {
		reply.Summary = CompareSummary{N: s.N, Bias: s.Bias, MAE: s.MAE, RMSE: s.RMSE, MaxAbs: s.MaxAbs}
		if ask.U != "" {
			reply.Summary.WithinUVal, reply.Summary.WithinKUVal = s.WithinUVal, s.WithinKUVal
		}
	}
	if j := c.Joint; j != nil && ask.U != "" {
		reply.Joint = &CompareJoint{j.Statistic, j.N, j.P}
	}
	return reply
}

// withoutU withholds what rests on the uncertainty of the data: a common part
// alone is not all of it.
func (r *CompareReply) withoutU() {
	for i := range r.Stations {
		s := &r.Stations[i]
		s.UD, s.UVal, s.Ratio = study.None, study.None, study.None
	}
}

func at(list []study.Crossing) []study.Number {
	out := []study.Number{}
	for _, c := range list {
		out = append(out, c.X)
	}
	return out
}

// rootSum adds an interpolation uncertainty to a numerical one that may be
// unknown.
func rootSum(a, b study.Number) study.Number {
	if !a.Known() {
		return b
	}
	return study.Number(math.Sqrt(float64(a*a) + float64(b*b)))
}

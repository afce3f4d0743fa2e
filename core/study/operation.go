package study

import (
	"fmt"
	"strconv"
	"strings"

	"weirmark/core/interpolate"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// refuse is the error of an operation that was not done.
func refuse(what, value string) error { return notice.New("operation-refused", what, value) }

// Set enters a value at a target and logs it. The empty value takes the entry
// back.
func (s *Study) Set(t Target, value, at, why string) error {
	if t.Kind == "question" && t.Field == "plan" {
		return s.setPlan(t.ID, value, at, why)
	}
	before, err := s.enter(t, value)
	if err != nil {
		return err
	}
	s.log(at, fmt.Sprintf("%s: %s → %s", s.Name(t), shown(before), shown(value)), why, s.revealed(t))
	if q := s.questionOf(t.ID); t.Kind == "question" && q != nil && q.Requirement != nil && (t.Field == "requirement.value" || t.Field == "requirement.percent") {
		q.Requirement.In = len(s.Log)
	}
	return nil
}

func shown(value string) string {
	if value == "" {
		return "(none)"
	}
	return value
}

// Accept accepts the guess at a target and logs it.
func (s *Study) Accept(t Target, at string) error {
	f := s.field(t)
	if f == nil || !f.Given() {
		return refuse("acceptance of "+s.Name(t), "no guess")
	}
	f.By = Accepted
	s.log(at, fmt.Sprintf("%s: %s accepted", s.Name(t), f.Value), "", s.revealed(t))
	return nil
}

// Reveal records that the comparison of a question was looked at, and what was
// not recorded by then.
func (s *Study) Reveal(id, at string) error {
	q := s.questionOf(id)
	if q == nil {
		return refuse("the showing of a comparison", id)
	}
	if !q.Revealed {
		s.log(at, "Comparison of "+q.label()+" shown", q.lacks(), false)
		q.Revealed, q.RevealedIn = true, len(s.Log)
	}
	return nil
}

// newSource begins the name of a source until a person names it.
const newSource = "source "

// AddSource adds a line to the budget of a question.
func (s *Study) AddSource(t Target, of, at string) error {
	q := s.questionOf(t.ID)
	if q == nil || (of != OfData && of != OfInput && of != OfNumerical) {
		return refuse("a source of uncertainty", of)
	}
	q.Sources = append(q.Sources, Source{Name: newSource + strconv.Itoa(len(q.Sources)+1), Of: of, Basis: Absolute, Pattern: map[string]string{OfData: Common, OfInput: Common, OfNumerical: Independent}[of]})
	s.log(at, "A source of "+of+" uncertainty of "+q.label()+" added", "", q.Revealed)
	return nil
}

// RemoveSource removes a line from the budget of a question.
func (s *Study) RemoveSource(t Target, at, why string) error {
	q := s.questionOf(t.ID)
	i, err := strconv.Atoi(t.Field)
	if q == nil || err != nil || i < 0 || i >= len(q.Sources) {
		return refuse("removal of a source", t.Field)
	}
	name := q.Sources[i].Name
	q.Sources = append(q.Sources[:i:i], q.Sources[i+1:]...)
	s.log(at, "Source "+name+" of "+q.label()+" removed", why, q.Revealed)
	return nil
}

// Exclude takes a station of the reference, named by its line, out of the
// comparison; an empty reason is refused.
func (s *Study) Exclude(t Target, why, at string) error {
	q := s.questionOf(t.ID)
	line, err := strconv.Atoi(t.Field)
	if q == nil || err != nil || strings.TrimSpace(why) == "" {
		return refuse("an exclusion without a reason", t.Field)
	}
	for _, e := range q.Excluded {
		if e.Line == line {
			return refuse("a second exclusion of line", t.Field)
		}
	}
	q.Excluded = append(q.Excluded, Exclusion{Line: line, Why: why, Late: q.Revealed})
	s.log(at, "Station at line "+t.Field+" of "+q.label()+" excluded", why, q.Revealed)
	return nil
}

// Include takes an excluded station back.
func (s *Study) Include(t Target, at string) error {
	q := s.questionOf(t.ID)
	line, err := strconv.Atoi(t.Field)
	if q == nil || err != nil {
		return refuse("an inclusion", t.Field)
	}
	for i, e := range q.Excluded {
		if e.Line == line {
			q.Excluded = append(q.Excluded[:i:i], q.Excluded[i+1:]...)
			s.log(at, "Station at line "+t.Field+" of "+q.label()+" included again", "", q.Revealed)
			return nil
		}
	}
	return refuse("an inclusion", t.Field)
}

// Answer records what a person says to a finding; an empty answer opens it
// again.
func (s *Study) Answer(t Target, answer, at string) error {
	q := s.questionOf(t.ID)
	if q == nil || t.Field == "" {
		return refuse("an answer", t.Field)
	}
	if q.Answers == nil {
		q.Answers = map[string]string{}
	}
	if answer == "" {
		delete(q.Answers, t.Field)
	} else {
		q.Answers[t.Field] = answer
	}
	s.log(at, "Finding "+t.Field+" of "+q.label()+" answered", answer, q.Revealed)
	return nil
}

// log appends an entry.
func (s *Study) log(at, what, why string, shown bool) {
	s.Log = append(s.Log, Entry{Number: len(s.Log) + 1, At: at, What: what, Why: why, Shown: shown})
}

// Note logs something done by a host, such as undoing an entry.
func (s *Study) Note(what, at string) { s.log(at, what, "", false) }

// revealed reports whether the comparison a target belongs to was shown.
func (s *Study) revealed(t Target) bool {
	if p := s.slip(t.ID); p != nil && t.Kind == "slip" {
		if q := s.Question(p.Case.Value, p.Quantity.Value); q != nil {
			return q.Revealed
		}
	}
	if q := s.questionOf(t.ID); q != nil {
		return q.Revealed
	}
	return false
}

func (s *Study) slip(id string) *Slip {
	for i := range s.Slips {
		if s.Slips[i].ID == id {
			return &s.Slips[i]
		}
	}
	return nil
}

func (s *Study) questionOf(id string) *Question {
	for i := range s.Questions {
		if s.Questions[i].id() == id {
			return &s.Questions[i]
		}
	}
	return nil
}

// Name names a target for a reader.
func (s *Study) Name(t Target) string {
	switch t.Kind {
	case "slip":
		if p := s.slip(t.ID); p != nil {
			return fieldName(t.Field) + " of " + s.fileName(p)
		}
	case "file":
		if f := s.File(t.ID); f != nil {
			return "reading of " + f.Name + ", " + t.Field
		}
	case "quality":
		if i, field, ok := sourceField(t.Field); ok && i < len(QualityItems) {
			return field + " of " + QualityItems[i] + ", case " + t.ID
		}
	case ItemReference, ItemAxes:
		_, field, _ := sourceField(t.Field)
		return field + " of " + s.itemName(t) + " of case " + t.ID
	case ItemCondition, ItemRegion, ItemCriterion, ItemAnchor:
		if q := s.questionOf(t.ID); q != nil {
			_, field, _ := sourceField(t.Field)
			return field + " of a " + t.Kind + ", " + q.label()
		}
	case ItemRun:
		if q := s.questionOf(t.ID); q != nil {
			field, run, _ := strings.Cut(t.Field, "|")
			name := fieldName(field)
			if run = strings.Trim(strings.ReplaceAll(run, "|", " "), " "); run != "" {
				name += " of " + run
			}
			return name + ", " + q.label()
		}
	case ItemApplication:
		_, field, _ := sourceField(t.Field)
		return field + " of the application point"
	case "question", "source":
		if q := s.questionOf(t.ID); q != nil {
			if i, field, ok := sourceField(t.Field); t.Kind == "source" && ok && i < len(q.Sources) {
				return field + " of " + q.Sources[i].Name + ", " + q.label()
			}
			return fieldName(t.Field) + " of " + q.label()
		}
	}
	return fieldName(t.Field)
}

var fieldNames = map[string]string{
	"y.column": "column of values", "y.unit": "unit of values", "x.column": "column of stations", "x.unit": "unit of stations",
	"u.column": "column of uncertainty", "u.unit": "unit of uncertainty", "u_factor": "coverage", "u_basis": "basis of the uncertainty", "size.column": "column of cell counts", "cells": "number of cells",
	"choices.k": "k", "choices.k_num": "k_num", "choices.bounded": "bounded rule", "choices.rule": "rule of the grid study", "choices.safety": "safety factor of the grid study", "choices.common_set": "models at different stations", "known": "whether the data were known", "context.influence": "influence of the simulation on the decision", "context.consequence": "consequence of a wrong decision", "choices.formal": "formal order", "choices.dimension": "dimension",
	"choices.interpolation": "interpolation", "choices.u_interp": "interpolation uncertainty", "choices.num_shared": "u_num shared", "choices.k_student": "k by degrees of freedom", "choices.sampled": "interval by sampling",
	"choices.num_linear": "sum of the parts of u_num",
	"balance_of":         "kind of balance", "scale": "flux that matters", "scale_name": "name of the flux that matters",
	"start": "start of averaging", "period": "period", "u_iter": "U_iter", "u_iter_why": "reason of U_iter", "effect": "effect of an open balance", "effect_why": "reason of the effect", "stand_in": "quantity whose monitors are taken", "stand_in_why": "reason why monitors of another quantity are taken",
	"y_plus": "y+ of the first cells", "settings": "settings", "step.column": "column of time steps", "step.unit": "unit of time steps", "dimensions": "dimensions of the grids",
	"family.steps": "grid and time step", "family.formal_time": "formal order in time", "code.statement": "statement on the verification of the code", "code.link": "where the evidence on the code is",
	"family.borrow.case": "case that lends its grid uncertainty", "family.borrow.quantity": "quantity that lends its grid uncertainty", "family.borrow.penalty": "penalty of the borrowed grid uncertainty", "family.borrow.why": "reason of the borrowed grid uncertainty",
	"family.similar": "similarity of the grids", "family.wall": "wall treatment", "family.scheme": "scheme", "family.regime": "kind of the runs", "family.cost_exponent": "exponent of the cost", "family.target": "u_num to reach",
	"requirement.value": "requirement", "requirement.percent": "basis of the requirement", "requirement.who": "who set the requirement", "requirement.date": "date of the requirement",
	"derive.kind":       "scalar taken from the curves",
	"scores.dispersion": "scores of the dispersion field", "scores.threshold": "threshold of the scores", "scores.fraction": "fraction of the hit rate", "scores.allowance": "allowance of the hit rate",
	"scores.allowance_k": "allowance of the hit rate in u_D", "scores.scale": "scale of the measures", "scores.scale_value": "entered scale of the measures", "scores.percent": "E in percent of |D|",
	"scores.percent_above": "least |D| of a percentage", "scores.weights": "weights of the stations", "scores.correlation": "correlation and slope", "scores.distribution": "limits of agreement and area",
	"pattern": "pattern of the names",
	"input":   "input of the run", "input_at": "value of the input", "upper.column": "column of the upper bar", "upper.unit": "unit of the upper bar", "bars_as": "what the bars hold",
	"levels.facility": "column of the facility", "levels.day": "column of the day", "levels.rig": "column of the set-up", "levels.run": "column of the run",
	"digitised": "record of the digitising", "baseline": "case from which the change is compared", "scores.marine": "order of |E|, U_V and the requirement", "no_input": "why the inputs have no uncertainty", "resolution": "resolution of the data", "flow_rate": "stated flow rate", "flow_rate_u": "uncertainty of the stated flow rate",
	"y.formula": "formula of values", "x.formula": "formula of stations", "datum": "datum of the pressure",
	"force.as": "what is made of the force", "force.normal": "column of the normal force", "force.axial": "column of the axial force", "force.unit": "unit of the forces", "force.half": "factor of a half model",
	"form.name": "form of the values", "form.simulation": "form of the simulation", "form.data": "form of the data", "x_form.name": "form of the stations", "x_form.simulation": "stations of the simulation", "x_form.data": "stations of the data",
	"corrected.state": "corrections of the data", "corrected.how": "how the data were corrected",
	"choices.gap": "spacing that is a gap", "choices.period": "period of the stations", "choices.probe": "width of the probe", "choices.smooth": "smoothing before changes of sign",
	"rows.column": "column that selects rows", "rows.from": "least value of the rows used", "rows.to": "greatest value of the rows used", "abscissa": "abscissa", "repeats": "different values at one station", "sampling": "place of the values", "plan": "stations",
	"reference_id": "name of the reference", "prepared.name": "prepared by", "prepared.date": "prepared on", "checked.name": "checked by", "checked.date": "checked on",
	"approved.name": "approved by", "approved.date": "approved on",
}

func fieldName(path string) string {
	if name, ok := fieldNames[path]; ok {
		return name
	}
	return path
}

// sourceField splits "2.value".
func sourceField(path string) (int, string, bool) {
	head, field, found := strings.Cut(path, ".")
	i, err := strconv.Atoi(head)
	return i, field, found && err == nil && i >= 0
}

// field returns the entry with an origin at a target, or nil.
func (s *Study) field(t Target) *Field {
	switch t.Kind {
	case "slip":
		if p := s.slip(t.ID); p != nil {
			return p.entry(t.Field)
		}
	case "question":
		if q := s.questionOf(t.ID); q != nil {
			switch t.Field {
			case "kind":
				return &q.Kind
			case "use":
				return &q.Use
			case "known":
				return &q.Known
			}
		}
	case "source":
		if q := s.questionOf(t.ID); q != nil {
			if i, field, ok := sourceField(t.Field); ok && i < len(q.Sources) && field == "coverage" {
				return &q.Sources[i].Coverage
			}
		}
	}
	return nil
}

func (p *Slip) entry(path string) *Field {
	return map[string]*Field{
		"role": &p.Role, "case": &p.Case, "quantity": &p.Quantity, "model": &p.Model, "grid": &p.Grid, "cells": &p.Cells, "y_plus": &p.YPlus, "settings": &p.Settings, "step.column": &p.Step.Column, "step.unit": &p.Step.Unit, "dimensions": &p.Dimensions,
		"x.column": &p.X.Column, "x.unit": &p.X.Unit, "y.column": &p.Y.Column, "y.unit": &p.Y.Unit,
		"x.formula": &p.X.Formula, "y.formula": &p.Y.Formula, "datum": &p.Datum,
		"force.as": &p.Force.As, "force.normal": &p.Force.Normal, "force.axial": &p.Force.Axial, "force.unit": &p.Force.Unit, "force.half": &p.Force.Half,
		"u.column": &p.U.Column, "u.unit": &p.U.Unit, "u_factor": &p.UFactor, "size.column": &p.Size.Column, "size.unit": &p.Size.Unit, "axis": &p.Axis, "branch": &p.Branch, "derive": &p.Derive, "contour.column": &p.Contour.Column, "contour.unit": &p.Contour.Unit, "u_basis": &p.UBasis,
		"input": &p.Input, "input_at": &p.InputAt, "upper.column": &p.Upper.Column, "upper.unit": &p.Upper.Unit, "bars_as": &p.BarsAs, "flow_rate": &p.FlowRate, "flow_rate_u": &p.FlowRateU,
		"levels.facility": &p.Levels.Facility, "levels.day": &p.Levels.Day, "levels.rig": &p.Levels.Rig, "levels.run": &p.Levels.Run,
		"digitised": &p.Digitised.Is, "digitised.x_scale": &p.Digitised.XScale, "digitised.x_zero": &p.Digitised.XZero, "digitised.y_scale": &p.Digitised.YScale,
		"digitised.y_zero": &p.Digitised.YZero, "digitised.line": &p.Digitised.Line, "digitised.pixel": &p.Digitised.Pixel,
		"balance_of": &p.BalanceOf, "scale": &p.Scale, "scale_name": &p.ScaleName,
		"rows.column": &p.Rows.Column, "rows.from": &p.Rows.From, "rows.to": &p.Rows.To,
		"abscissa": &p.Abscissa, "repeats": &p.Repeats, "sampling": &p.Sampling,
	}[path]
}

// enter changes one entry and returns the text it had.
func (s *Study) enter(t Target, value string) (string, error) {
	if f := s.field(t); f != nil {
		before := f.Value
		var left *Question
		if t.Kind == "slip" {
			p := s.slip(t.ID)
			left = s.Question(p.Case.Value, p.Quantity.Value)
		}
		*f = Field{Value: value, By: Entered}
		if value == "" {
			f.By = ""
		}
		if t.Kind == "slip" {
			s.follow(left, s.slip(t.ID))
			s.askOf(s.slip(t.ID))
		}
		return before, nil
	}
	switch t.Kind {
	case "file":
		return s.enterReading(t, value)
	case "study":
		switch t.Field {
		case "pattern":
			return s.enterPattern(value)
		case "context.influence":
			return enterWeight(&s.Context.Influence, value)
		case "context.consequence":
			return enterWeight(&s.Context.Consequence, value)
		}
	case "quality":
		return s.enterQuality(t.ID, t.Field, value)
	case ItemCondition, ItemRegion, ItemCriterion, ItemAnchor, ItemApplication, ItemReference, ItemAxes:
		return s.enterItem(t, value)
	case ItemRun:
		if q := s.questionOf(t.ID); q != nil {
			return q.enterRun(t.Field, value)
		}
	}
	if text := s.text(t); text != nil {
		before := *text
		*text = value
		return before, nil
	}
	if q := s.questionOf(t.ID); q != nil {
		switch t.Kind {
		case "question":
			return q.enter(t.Field, value)
		case "source":
			return q.enterSource(t.Field, value)
		}
	}
	return "", refuse(s.Name(t), value)
}

// text returns the plain text at a target, or nil.
func (s *Study) text(t Target) *string {
	if field, of := strings.CutPrefix(t.Field, "code."); of && t.Kind == "study" && (field == "statement" || field == "link") {
		if s.Code == nil {
			s.Code = &CodeEvidence{}
		}
		return map[string]*string{"statement": &s.Code.Statement, "link": &s.Code.Link}[field]
	}
	if t.Kind == "study" {
		return map[string]*string{
			"title": &s.Title, "purpose": &s.Purpose,
			"prepared.name": &s.Prepared.Name, "prepared.date": &s.Prepared.Date, "checked.name": &s.Checked.Name, "checked.date": &s.Checked.Date,
			"approved.name": &s.Approved.Name, "approved.date": &s.Approved.Date,
		}[t.Field]
	}
	q := s.questionOf(t.ID)
	if q == nil {
		return nil
	}
	if t.Kind == "source" {
		i, field, ok := sourceField(t.Field)
		if !ok || i >= len(q.Sources) {
			return nil
		}
		return map[string]*string{"name": &q.Sources[i].Name, "origin": &q.Sources[i].Origin, "model": &q.Sources[i].Model, "column": &q.Sources[i].Column, "group": &q.Sources[i].Group,
			"input": &q.Sources[i].Input, "unit": &q.Sources[i].Unit}[field]
	}
	if t.Kind == "question" {
		return map[string]*string{"symbol": &q.Symbol, "condition": &q.Condition, "reference_id": &q.ReferenceID, "no_input": &q.NoInput, "baseline": &q.Baseline}[t.Field]
	}
	return nil
}

// askOf makes the question a slip belongs to, where there is none.
func (s *Study) askOf(p *Slip) {
	if !p.Case.Given() || !p.Quantity.Given() || p.Role.Value == Unused || p.Role.Value == ExactErrors || s.Question(p.Case.Value, p.Quantity.Value) != nil {
		return
	}
	s.Questions = append(s.Questions, Question{Case: p.Case.Value, Quantity: p.Quantity.Value, Sources: []Source{}, Choices: DefaultChoices()})
}

// follow lets a question take the new name when the last slip that belonged
// to it has got one, so that its requirement and sources are not left behind.
func (s *Study) follow(q *Question, p *Slip) {
	if q == nil || s.asked(q) || !p.Case.Given() || !p.Quantity.Given() || s.Question(p.Case.Value, p.Quantity.Value) != nil {
		return
	}
	q.Case, q.Quantity = p.Case.Value, p.Quantity.Value
}

// asked reports whether any slip in use belongs to a question.
func (s *Study) asked(q *Question) bool {
	for i := range s.Slips {
		if q.belongs(&s.Slips[i], Simulation, GridValues, Reference) {
			return true
		}
	}
	return false
}

// enter changes a number or switch of a question.
func (q *Question) enter(path, value string) (string, error) {
	if strings.HasPrefix(path, "requirement.") {
		return q.enterRequirement(strings.TrimPrefix(path, "requirement."), value)
	}
	if strings.HasPrefix(path, "family.") {
		return q.enterFamily(strings.TrimPrefix(path, "family."), value)
	}
	if strings.HasPrefix(path, "scores.") {
		return q.enterScoring(strings.TrimPrefix(path, "scores."), value)
	}
	if key, of := strings.CutPrefix(path, "derive."); of {
		return q.enterDerive(key, value)
	}
	if field, found := strings.CutPrefix(path, "form."); found {
		return q.Form.enter(field, value, false)
	}
	if field, found := strings.CutPrefix(path, "x_form."); found {
		return q.XForm.enter(field, value, true)
	}
	c := &q.Choices
	switch path {
	case "corrected.state":
		return oneWord(&q.Corrected.State, value, "", Corrected, Uncorrected)
	case "corrected.how":
		return exchange(&q.Corrected.How, value)
	case "choices.k":
		return number(&c.K, value, 0.1, 10)
	case "choices.k_num":
		return number(&c.KNum, value, 0.1, 10)
	case "choices.formal":
		return number(&c.Formal, value, 0.5, 10)
	case "choices.safety":
		return number(&c.Safety, value, 1, 10)
	case "choices.dimension":
		d := float64(c.Dimension)
		before, err := number(&d, value, 2, 3)
		if d != 2 && d != 3 {
			return before, refuse("dimension", value)
		}
		c.Dimension = int(d)
		return before, err
	case "choices.rule":
		return c.enterRule(value)
	case "choices.gap":
		return number(&c.Gap, value, 2, 1e9)
	case "choices.period":
		return orNone(&c.Period, value)
	case "choices.probe":
		return orNone(&c.Probe, value)
	case "choices.smooth":
		return c.enterSmooth(value)
	case "choices.bounded":
		return yesNo(&c.Bounded, value)
	case "choices.k_student":
		return yesNo(&c.KStudent, value)
	case "choices.sampled":
		return yesNo(&c.Sampled, value)
	case "choices.common_set":
		return yesNo(&c.CommonSet, value)
	case "choices.u_interp":
		return yesNo(&c.UInterp, value)
	case "choices.num_shared":
		return yesNo(&c.NumShared, value)
	case "choices.num_linear":
		return yesNo(&c.NumLinear, value)
	case "choices.interpolation":
		if value != string(interpolate.Linear) && value != string(interpolate.Monotone) {
			return "", refuse("interpolation", value)
		}
		before := string(c.Interpolation)
		c.Interpolation = interpolate.Method(value)
		return before, nil
	case "downward":
		return yesNo(&q.Downward, value)
	case "resolution":
		return oneOf(&q.Resolution, value, "", Counted)
	}
	return "", refuse(path, value)
}

func (q *Question) enterRequirement(path, value string) (string, error) {
	if q.Requirement == nil {
		q.Requirement = &Requirement{Percent: true, Late: q.Revealed}
	}
	r := q.Requirement
	switch path {
	case "value":
		if strings.TrimSpace(value) == "" {
			before := quantity.Typed(r.Value)
			q.Requirement = nil
			return before, nil
		}
		before, err := number(&r.Value, strings.TrimSuffix(strings.TrimPrefix(value, "±"), "%"), 0, 1e30)
		if err != nil && before == "0" {
			q.Requirement = nil
		}
		if err == nil {
			r.Late = q.Revealed
		}
		return before, err
	case "percent":
		before, err := yesNo(&r.Percent, value)
		if err == nil && before != value {
			r.Late = q.Revealed
		}
		return before, err
	case "who":
		before := r.Who
		r.Who = value
		return before, nil
	case "date":
		before := r.Date
		r.Date = value
		return before, nil
	}
	return "", refuse("requirement."+path, value)
}

// number reads a number between two bounds.
func number(into *float64, value string, lo, hi float64) (string, error) {
	before := quantity.Typed(*into)
	v, err := strconv.ParseFloat(strings.TrimSpace(value), 64)
	if err != nil || !(v >= lo && v <= hi) {
		return before, refuse("a number from "+quantity.Typed(lo)+" to "+quantity.Typed(hi), value)
	}
	*into = v
	return before, nil
}

// orNone reads a positive number, or nothing as zero.
func orNone(into *float64, value string) (string, error) {
	if strings.TrimSpace(value) == "" {
		value = "0"
	}
	return number(into, value, 0, 1e30)
}

// enterSmooth reads an odd number of rows, or nothing as none.
func (c *Choices) enterSmooth(value string) (string, error) {
	rows := float64(c.Smooth)
	before, err := orNone(&rows, value)
	if err != nil {
		return before, err
	}
	n := int(rows)
	if float64(n) != rows || n > 999 || n != 0 && (n < 3 || n%2 == 0) {
		return before, refuse("a window of 3, 5, 7 or more rows", value)
	}
	c.Smooth = n
	return before, nil
}

func yesNo(into *bool, value string) (string, error) {
	before := word(*into)
	switch value {
	case "yes":
		*into = true
	case "no":
		*into = false
	default:
		return before, refuse("yes or no", value)
	}
	return before, nil
}

func word(yes bool) string {
	if yes {
		return "yes"
	}
	return "no"
}

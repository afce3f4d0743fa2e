// Package study is the document a person works on: files, how each was read,
// what is asked of them, and what was done in which order. Evaluate turns it
// into one Report; nothing else computes.
package study

import (
	"cmp"
	"encoding/json"

	"weirmark/core/interpolate"
	"weirmark/core/metric"
	"weirmark/core/tablefile"
)

// Format and Version name the study file.
const (
	Format  = "weirmark study"
	Version = 1
)

// Certainty says who stands behind an entry.
type Certainty string

// The four origins of an entry. A guess shows until a person accepts it.
const (
	Stated   Certainty = "stated"
	Guessed  Certainty = "guessed"
	Accepted Certainty = "accepted"
	Entered  Certainty = "entered"
)

// Field is an entry with its origin. An empty value is "not given".
type Field struct {
	Value string    `json:"value"`
	By    Certainty `json:"by,omitempty"`
}

// Given reports whether the entry has a value.
func (f Field) Given() bool { return f.Value != "" }

// Open reports whether the entry is a guess no one has accepted.
func (f Field) Open() bool { return f.Given() && f.By == Guessed }

// Study is the whole document.
type Study struct {
	Format    string        `json:"format"`
	Version   int           `json:"version"`
	Title     string        `json:"title"`
	Code      *CodeEvidence `json:"code,omitempty"` // on the verification of the code
	Purpose   string        `json:"purpose"`
	Prepared  Signature     `json:"prepared"`
	Checked   Signature     `json:"checked"`
	Approved  Signature     `json:"approved"`
	Files     []File        `json:"files"`
	Slips     []Slip        `json:"slips"`
	Questions []Question    `json:"questions"`
	Cases     []Card        `json:"cases,omitempty"`
	// Application is the point the result is meant for, in the conditions of
	// the questions; empty when it is not stated.
	Application []Condition `json:"application,omitempty"`
	Context     Context     `json:"context,omitzero"`
	Log         []Entry     `json:"log"`
	Quality     []Quality   `json:"quality,omitempty"` // data-quality cards of the cases
	// Pattern says how names of files are read; see Naming.
	Pattern string `json:"pattern,omitempty"`

	unknown map[string]json.RawMessage // fields of the document this edition does not know, kept as they came
}

// Context is what hangs on the result, beside its purpose: Low, Medium or High,
// or empty where it is not stated.
type Context struct {
	Influence   string `json:"influence,omitempty"`   // of the simulation on the decision, beside other evidence
	Consequence string `json:"consequence,omitempty"` // of a wrong decision
}

// Weights of a context.
const (
	Low    = "low"
	Medium = "medium"
	High   = "high"
)

// Signature is a recorded statement of a role, not an authenticated one.
type Signature struct {
	Name string `json:"name"`
	Date string `json:"date"`
}

// File is a source with its raw bytes and their SHA-256 in hexadecimal.
type File struct {
	ID     string `json:"id"`
	Name   string `json:"name"`
	SHA256 string `json:"sha256"`
	Data   []byte `json:"data"`
	// Reading holds the answers to what the reader asked about the file, such
	// as its decimal sign; nil where nothing was asked or answered.
	Reading *tablefile.Options `json:"reading,omitempty"`
	// Answers holds what a person answered to other questions of the reader,
	// by the code of the question.
	Answers map[string]string `json:"answers,omitempty"`
}

// Roles of a slip.
const (
	Simulation = "simulation"  // a curve, or one scalar, of one run
	GridValues = "grid values" // scalars of several grids: size and value columns
	Reference  = "reference"   // measured or other reference data
	InputRun   = "input run"   // a simulation with one input changed
	Members    = "members"     // simulations with sampled inputs: a column each from the column of values on, or a row each of a scalar
	Replicates = "replicates"  // repeated readings at the stations of a reference
	Monitor    = "monitor"     // a quantity of one run over iterations or time
	Balance    = "balance"     // what enters a run (column of stations) and what leaves it (column of values); without the former, what is left over
	Residual   = "residual"    // of the equations of one run over iterations
	Precision  = "precision"   // the quantity from a second run that differs in precision or platform only
	Unused     = "unused"
)

// What the stations of a monitor are.
const (
	AxisIterations = "iterations"
	AxisTime       = "time"
)

// Slip says how one table of a file is used. The same table may stand behind
// several slips (two models in two columns).
type Slip struct {
	ID         string    `json:"id"`
	File       string    `json:"file"`  // File.ID
	Table      string    `json:"table"` // name or number as tablefile.File.Table takes it
	Role       Field     `json:"role"`
	Case       Field     `json:"case"`
	Quantity   Field     `json:"quantity"`
	Model      Field     `json:"model"`
	Grid       Field     `json:"grid"`
	YPlus      Field     `json:"y_plus,omitzero"`     // of the first cells of Grid
	Step       ColumnUse `json:"step,omitzero"`       // time steps, for step values
	Dimensions Field     `json:"dimensions,omitzero"` // of the grids, of a table of errors over cell counts
	Settings   Field     `json:"settings,omitzero"`   // of the run: "key: value; key: value"
	Cells      Field     `json:"cells"`               // number of cells of Grid
	X          ColumnUse `json:"x"`                   // abscissa; not given for scalars
	Y          ColumnUse `json:"y"`                   // the quantity
	U          ColumnUse `json:"u"`                   // uncertainty of the quantity, independent between stations
	UFactor    Field     `json:"u_factor"`            // coverage of U: "1", "2", "95 %", "limits"
	UBasis     Field     `json:"u_basis"`             // of U in percent: "reading", or the full scale in the unit of Y
	Branch     Field     `json:"branch"`              // of a curve that goes out and back: a name of package profile, or empty
	Derive     Field     `json:"derive"`              // DeriveLift, or empty: the values as they are
	Contour    ColumnUse `json:"contour"`             // second coordinate of a section, for branches and DeriveLift
	Size       ColumnUse `json:"size"`                // cell counts, for grid values
	Axis       Field     `json:"axis"`                // of a monitor: iterations or samples in time

	Rows      RowsUse    `json:"rows,omitzero"`        // the rows that are used, where not all are
	Abscissa  Field      `json:"abscissa,omitzero"`    // AlongArc, AlongArcPart, or empty: the column of stations
	Repeats   Field      `json:"repeats,omitzero"`     // what is done with different values at one station: Averaged, KeptBoth, FirstKept, or empty
	Sampling  Field      `json:"sampling,omitzero"`    // of a simulation: AtNodes, AtCellCentres, AtFaces, or empty
	BalanceOf Field      `json:"balance_of,omitzero"`  // kind of a balance, of package settling; mass where it is not given
	Scale     Field      `json:"scale,omitzero"`       // of a balance: the flux that matters, in the unit of the file; what enters where it is not given
	ScaleName Field      `json:"scale_name,omitzero"`  // what Scale is
	Input     Field      `json:"input,omitzero"`       // of an input run: the name of the input
	InputAt   Field      `json:"input_at,omitzero"`    // and its value in this run
	Upper     ColumnUse  `json:"upper,omitzero"`       // column of the upper half-width, or upper limit; U is then the lower
	BarsAs    Field      `json:"bars_as,omitzero"`     // BarsWidths or BarsLimits
	Levels    Levels     `json:"levels,omitzero"`      // of repeated readings
	Digitised Digitising `json:"digitised,omitzero"`   // of a curve read off a figure
	FlowRate  Field      `json:"flow_rate,omitzero"`   // what the integral of the reference over its stations should be, in the units of its columns
	Datum     Field      `json:"datum,omitzero"`       // of a pressure: one of Datums, or empty
	Force     Forces     `json:"force,omitzero"`       // what is made of a force or a moment
	FlowRateU Field      `json:"flow_rate_u,omitzero"` // standard uncertainty of it
}

// What two columns of bars hold.
const (
	BarsWidths = "half-widths"
	BarsLimits = "limits"
)

// Levels are the columns that tell the levels of replication apart, from the
// outermost inwards; readings with the same entries are repeats.
type Levels struct {
	Facility Field `json:"facility,omitzero"`
	Day      Field `json:"day,omitzero"`
	Rig      Field `json:"rig,omitzero"` // set-up: the model mounted anew
	Run      Field `json:"run,omitzero"`
}

// Digitising is the record of a curve read off a figure: standard
// uncertainties of the calibration of both axes, the scales in percent, and the
// widths of line and pixel, all in the units of the slip.
type Digitising struct {
	Is     Field `json:"is,omitzero"` // "yes"
	XScale Field `json:"x_scale,omitzero"`
	XZero  Field `json:"x_zero,omitzero"`
	YScale Field `json:"y_scale,omitzero"`
	YZero  Field `json:"y_zero,omitzero"`
	Line   Field `json:"line,omitzero"`
	Pixel  Field `json:"pixel,omitzero"`
}

// Abscissae of a curve beside its column of stations. Both need the second
// coordinate; the length begins at the first row, or at the least station of a
// branch.
const (
	AlongArc     = "arc length"
	AlongArcPart = "arc length over the whole"
)

// What is done with different values at one station.
const (
	Averaged  = "averaged"
	KeptBoth  = "kept as a jump"
	FirstKept = "first kept"
)

// Where a simulation holds its values.
const (
	AtNodes       = "nodes"
	AtCellCentres = "cell centres"
	AtFaces       = "faces"
)

// RowsUse takes the rows whose value in a column lies between two values, both
// included, as the file writes them: one line out of a surface.
type RowsUse struct {
	Column Field `json:"column"`
	From   Field `json:"from"`
	To     Field `json:"to"`
}

// ColumnUse is a column and the unit its numbers are in.
type ColumnUse struct {
	Column Field `json:"column"`
	Unit   Field `json:"unit"`
	// Formula, where it is given, makes the values from columns of the table and
	// the case card (see quantity.Formula); Unit is then that of the result.
	Formula Field `json:"formula,omitzero"`
}

// Given reports whether there is a column or a formula.
func (u ColumnUse) Given() bool { return u.Column.Given() || u.Formula.Given() }

// Name is the column, or the formula in its place.
func (u ColumnUse) Name() string { return cmp.Or(u.Formula.Value, u.Column.Value) }

// Kinds of reference; the kind drives the wording of the claim.
const (
	KindTest        = "test"
	KindLaw         = "law"
	KindCorrelation = "correlation"
	KindSimulation  = "simulation"
)

// Uses of the reference data.
const (
	UseValidation = "validation"
	UseTuning     = "tuning"
	UseBoth       = "both" // a part of them set the model
)

// Whether the data were known when the simulation was made.
const (
	Blind = "blind"
	Aware = "open"
)

// Question is one quantity of one case: what is asked, and with which choices.
type Question struct {
	Case        string       `json:"case"`
	Quantity    string       `json:"quantity"`
	Symbol      string       `json:"symbol"`
	Family      *Family      `json:"family,omitempty"` // of grids
	Condition   string       `json:"condition"`        // e.g. "α = 4.2°"
	Requirement *Requirement `json:"requirement"`
	Sources     []Source     `json:"sources"`
	Kind        Field        `json:"kind"`
	Use         Field        `json:"use"`
	Known       Field        `json:"known,omitzero"` // Blind or Aware
	ReferenceID string       `json:"reference_id"`   // what the data are called
	Choices     Choices      `json:"choices"`
	Downward    bool         `json:"downward"`              // draw with negative values upward, as is usual for Cp
	Revealed    bool         `json:"revealed"`              // the comparison was looked at
	RevealedIn  int          `json:"revealed_in,omitempty"` // the log entry of that; 0 where the log does not have it
	Excluded    []Exclusion  `json:"excluded,omitempty"`
	Conditions  []Matching   `json:"conditions,omitempty"`
	Form        Form         `json:"form,omitzero"`   // of the values
	XForm       Form         `json:"x_form,omitzero"` // of the stations
	Corrected   Correction   `json:"corrected,omitzero"`
	Scores      *Scoring     `json:"scores,omitempty"`
	Regions     []Region     `json:"regions,omitempty"`
	NoInput     string       `json:"no_input,omitempty"`   // why the inputs are taken to have no uncertainty; empty: not decided
	Resolution  string       `json:"resolution,omitempty"` // Counted: the resolution seen in the data is a source
	Runs        []RunEntry   `json:"runs,omitempty"`
	StandIn     *StandIn     `json:"stand_in,omitempty"`
	// Baseline is a case with the same quantity: the change of a scalar from there
	// is compared; empty: none.
	Baseline string `json:"baseline,omitempty"`
	// Derive asks for a scalar taken from the curves of the slips; nil compares
	// the values as they are.
	Derive  *Derivation  `json:"derive,omitempty"`
	Anchors []Anchor     `json:"anchors,omitempty"`
	Plan    *StationPlan `json:"plan,omitempty"` // null while the stations are not locked
	// Answers holds, by the code of a finding, what a person answered to it.
	// An answered finding is no open point any more; the memo prints both.
	Answers map[string]string `json:"answers,omitempty"`
}

// Counted is the choice to make a source of what was found.
const Counted = "counted"

// RunEntry is what a person enters about the settling of one run. Numbers that
// are absent were not entered; a U_iter and an effect need their reason.
type RunEntry struct {
	Model     string   `json:"model"`
	Grid      string   `json:"grid"`
	Start     *float64 `json:"start,omitempty"`  // where averaging begins, in the unit of the monitor's axis
	Period    *float64 `json:"period,omitempty"` // of a cycle, in the same unit
	UIter     *float64 `json:"u_iter,omitempty"` // expanded, k = 2, in the unit of the data
	UIterWhy  string   `json:"u_iter_why,omitempty"`
	Effect    *float64 `json:"effect,omitempty"` // greatest effect of an open balance on the quantity, in the unit of the data
	EffectWhy string   `json:"effect_why,omitempty"`
}

// StandIn names another quantity of the case whose monitors stand for those of
// this one, such as a force for the pressure that makes it. It needs a reason.
type StandIn struct {
	Quantity string `json:"quantity"`
	Why      string `json:"why"`
}

// Correction says what was done to the data for the walls and the supports of
// the facility.
type Correction struct {
	State string `json:"state,omitempty"` // Corrected, Uncorrected, or "" where it is not known
	How   string `json:"how,omitempty"`
}

// Uncorrected says that the data are as they were measured.
const Uncorrected = "uncorrected"

// Datums of a pressure.
const (
	DatumAbsolute   = "absolute"
	DatumGauge      = "gauge"
	DatumDifference = "difference"
)

// Scoring asks for the measures of a field beside the usual ones.
type Scoring struct {
	Dispersion bool    `json:"dispersion"` // FB, NMSE, FAC2, NAD, MG, VG: only for values that are not negative
	Threshold  float64 `json:"threshold"`  // below it a ratio says nothing; in the unit of the data
	Fraction   float64 `json:"fraction"`   // of the hit rate
	Allowance  float64 `json:"allowance"`  // of the hit rate, in the unit of the data
	// AllowanceK takes the allowance of the hit rate from the data: AllowanceK
	// u_D of each station, in place of Allowance.
	AllowanceK   float64 `json:"allowance_k,omitempty"`
	Scale        string  `json:"scale,omitempty"`         // of the normalised measures: ScaleRange and so on; empty: the range, for the RMSE alone
	ScaleValue   float64 `json:"scale_value,omitempty"`   // of ScaleEntered, in the unit of the data
	Percent      bool    `json:"percent,omitempty"`       // E in percent of |D| at each station
	PercentAbove float64 `json:"percent_above,omitempty"` // the part of the largest |D|, in percent, that |D| must exceed for it; 0: 2
	Weights      string  `json:"weights,omitempty"`       // WeightSpacing, a column of the reference, or empty: all alike
	Correlation  bool    `json:"correlation,omitempty"`   // R, R², slope and intercept
	Distribution bool    `json:"distribution,omitempty"`  // limits of agreement, and the area between the distributions
	Marine       bool    `json:"marine,omitempty"`        // the order of |E|, U_V and the requirement at 95 %
	// Criteria are those that the scores are held against; nil: those of
	// package metric.
	Criteria []metric.Criterion `json:"criteria,omitempty"`
}

// Scales of normalised measures.
const (
	ScaleRange    = "range"    // of D
	ScaleMean     = "mean"     // of |D|
	ScaleSpeed    = "speed"    // reference speed of the case
	ScalePressure = "pressure" // dynamic pressure of the case
	ScaleEntered  = "entered"
)

// WeightSpacing weights each station by the length it stands for.
const WeightSpacing = "spacing"

// Region is a part of the stations that is told apart: those from From to To,
// those where D has the Sign, or both. With a sign, From = To leaves out the
// bounds.
type Region struct {
	Name string  `json:"name"`
	From float64 `json:"from"` // in the unit of the stations
	To   float64 `json:"to"`
	Sign string  `json:"sign,omitempty"` // SignPositive, SignNegative, or empty
}

// Signs of D in a region.
const (
	SignPositive = "positive"
	SignNegative = "negative"
)

// Kinds of anchors.
const (
	AtWall     = "value"    // the value at X is known by definition, as u = 0 at a wall
	AtSymmetry = "symmetry" // the simulation is the same on both sides of X
)

// Anchor is a support point that physics gives the simulated line beyond its
// own rows. Without a reason it is not used.
type Anchor struct {
	Kind  string  `json:"kind"`
	X     float64 `json:"x"`               // in the unit of the stations
	Value float64 `json:"value"`           // in the unit of the quantity; of AtWall
	Why   string  `json:"why"`             // the physics, e.g. no slip at the wall
	Model string  `json:"model,omitempty"` // the model it belongs to, "" for all
}

// StationPlan is what the stations of a question were when they were locked.
type StationPlan struct {
	At       string `json:"at"`           // time, given by the host
	Late     bool   `json:"late"`         // after the comparison was seen
	In       int    `json:"in,omitempty"` // the log entry of the locking
	Data     string `json:"data"`         // the rows the stations come from
	Policy   string `json:"policy"`       // the choices that decide which are compared
	Excluded []int  `json:"excluded"`     // lines of the reference file
}

// Card holds the reference quantities of a case.
type Card struct {
	Name       string              `json:"name"`
	References []ReferenceQuantity `json:"references"`
	Axes       []Axes              `json:"axes,omitempty"`
}

// ReferenceQuantity is one quantity of a case card: of both sides, or of the
// one that Side names.
type ReferenceQuantity struct {
	Symbol string   `json:"symbol"`
	Value  float64  `json:"value"`
	Unit   string   `json:"unit"`
	Origin string   `json:"origin"`
	U      *float64 `json:"u,omitempty"`    // standard uncertainty, in Unit; nil where it is not known
	Side   string   `json:"side,omitempty"` // "", Simulation or OfData
	Kind   string   `json:"kind,omitempty"` // of an area: one of AreaKinds
	// Shared says whether one error acts on both sides. Where it is empty, the
	// error of one entry for both is shared, those of two entries are not.
	Shared string `json:"shared,omitempty"`
}

// Condition is the value of one condition, such as an angle.
type Condition struct {
	Name  string  `json:"name"`
	Unit  string  `json:"unit"`
	Value float64 `json:"value"`
}

// Ways to treat a difference of conditions between the two sides.
const (
	Corrected = "corrected" // the simulation is moved to the condition of the data
	AsInput   = "input"     // the effect is counted as an input uncertainty
	Tolerated = "accepted"  // left, with a reason
)

// Matching is one condition on both sides. Sensitivity is the change of the
// quantity, in the unit of the data, for one unit of the condition.
type Matching struct {
	Name        string   `json:"name"`
	Unit        string   `json:"unit"`
	Simulation  float64  `json:"simulation"`
	Data        float64  `json:"data"`
	Sensitivity *float64 `json:"sensitivity"`
	Handling    string   `json:"handling"`
	Why         string   `json:"why"`
	Model       string   `json:"model,omitempty"` // the model it belongs to, "" for all
}

// Exclusion takes one station out of the comparison. It stays in the tables,
// hollow in the figure, and the result with it is told.
type Exclusion struct {
	Line int    `json:"line"` // of the reference file
	Why  string `json:"why"`
	Late bool   `json:"late"` // after the comparison was seen
}

// Requirement is the accuracy the decision needs.
type Requirement struct {
	Value   float64 `json:"value"` // in the unit of the data, or percent of |D| when Percent
	Percent bool    `json:"percent"`
	Who     string  `json:"who"`
	Date    string  `json:"date"`
	Late    bool    `json:"late"`         // recorded after the comparison was seen
	In      int     `json:"in,omitempty"` // the log entry of the last change of its size
}

// What a source is an uncertainty of.
const (
	OfData      = "data"
	OfInput     = "input"
	OfNumerical = "numerical"
)

// Bases and patterns of a source.
const (
	Absolute    = "absolute" // in the unit of the data
	OfReading   = "percent of reading"
	OfFullScale = "percent of full scale"
	OfCounts    = "counts"   // of PerCount each
	OfPosition  = "position" // Value is of the place, in the unit of the stations; it acts by the slope of the data
	Independent = "independent"
	Common      = "common" // of a percentage of the reading: a common scale
	Grouped     = "group"  // shared within groups of stations
	Length      = "length" // with a correlation length
)

// Interval is the form of a source known only to lie within its limits: it has
// no standard uncertainty and widens the interval of the model error.
const Interval = "interval"

// Source is one line of the uncertainty budget. Its standard uncertainty is
// Value / Divisor(Coverage, Form, Degrees). A column of a numerical source or
// of an input is looked up in the simulation first, any other in the reference.
//
// A source that names an Input is an uncertainty of that input, in the unit of
// the input; runs with the input changed, or the entered sensitivity, bring it
// to the quantity. A source that is Shared acts on both sides, and only what is
// left of it in E = S - D counts.
type Source struct {
	Name      string  `json:"name"`
	Of        string  `json:"of"`
	Model     string  `json:"model"` // for numerical and input sources: the model it belongs to, "" for all
	Value     float64 `json:"value"`
	Column    string  `json:"column,omitempty"` // holds the value at each station, in place of Value
	Basis     string  `json:"basis"`
	Coverage  Field   `json:"coverage"`
	Random    bool    `json:"random"`
	Pattern   string  `json:"pattern"`
	FullScale float64 `json:"full_scale,omitempty"` // in the unit of the data
	Group     string  `json:"group,omitempty"`      // column of the reference with group numbers
	Length    float64 `json:"length,omitempty"`     // in the unit of the stations
	Degrees   float64 `json:"degrees,omitempty"`    // of freedom; 0: taken as known
	Origin    string  `json:"origin"`               // where the number comes from, or the reason it was entered

	Unknown  bool     `json:"unknown,omitempty"`   // its size is not known: a value, and no zero
	Upper    *float64 `json:"upper,omitempty"`     // half-width above the data where it differs; Value is then the one below
	PerCount float64  `json:"per_count,omitempty"` // one count, in the unit of the data
	Form     string   `json:"form,omitempty"`      // a distribution of package uncertainty, or Interval; empty: as the coverage says
	Type     string   `json:"type,omitempty"`      // TypeA or TypeB
	Shared   bool     `json:"shared,omitempty"`    // acts on the simulation too (of an input: on the data too)

	Input   string  `json:"input,omitempty"` // the input it is an uncertainty of
	Unit    string  `json:"unit,omitempty"`  // of the input, for the reader
	Nominal float64 `json:"nominal,omitempty"`
	// Change of the simulation, and of the data, for one unit of the input; of
	// shared sources of the data Sensitivity is the change of S for one of D.
	Sensitivity     *float64 `json:"sensitivity,omitempty"`
	DataSensitivity *float64 `json:"data_sensitivity,omitempty"`
	// OfScalar says that the value is of the scalar that the question takes from
	// its curves, and not of the values of the curve.
	OfScalar bool `json:"of_scalar,omitempty"`
}

// Types of evaluation of a source: from a series of readings, or by other means.
const (
	TypeA = "A"
	TypeB = "B"
)

// Choices are the decisions whose effect is shown at once.
type Choices struct {
	K             float64            `json:"k"`                    // coverage factor of the statement
	KNum          float64            `json:"k_num"`                // U_num to u_num
	Bounded       bool               `json:"bounded"`              // bounded rule of the grid study
	Rule          string             `json:"rule,omitempty"`       // of the grid study of one value, a name of refinement.Rules; empty: the three finest grids
	Formal        float64            `json:"formal"`               // formal order of the scheme
	Dimension     int                `json:"dimension"`            // 2 or 3
	Interpolation interpolate.Method `json:"interpolation"`        // of the simulation to the stations
	UInterp       bool               `json:"u_interp"`             // count the interpolation uncertainty
	Safety        float64            `json:"safety,omitempty"`     // factor on the estimated error of three grids; 0: 1.25
	NumShared     bool               `json:"num_shared"`           // u_num fully shared between stations
	KStudent      bool               `json:"k_student,omitempty"`  // K follows from the effective degrees of freedom at 95 %
	Sampled       bool               `json:"sampled,omitempty"`    // the interval of the model error by sampling too
	CommonSet     bool               `json:"common_set,omitempty"` // models compared at different stations are set against each other at the shared ones
	NumLinear     bool               `json:"num_linear,omitempty"` // parts of u_num depend on each other: they are summed, not their squares

	Gap    float64 `json:"gap,omitempty"`    // number of median spacings above which the simulation has a gap
	Period float64 `json:"period,omitempty"` // of the stations, in their unit; 0: not periodic
	Probe  float64 `json:"probe,omitempty"`  // width over which the probe averages, in the unit of the stations
	Smooth int     `json:"smooth,omitempty"` // rows of the window before changes of sign are looked for; 0: none
}

// wideSpacing is the number of median spacings that is a gap where a question
// chooses no other. A stretched grid changes its spacing by less than a factor
// two from row to row; ten of the median around is a hole (common practice,
// no source).
const wideSpacing = 10

// DefaultChoices are the choices of a new question.
func DefaultChoices() Choices {
	return Choices{K: 2, KNum: 1.15, Bounded: true, Formal: 2, Dimension: 3, Interpolation: interpolate.Linear, UInterp: true, Gap: wideSpacing}
}

// Entry is one line of the operation log. At is given by the host.
type Entry struct {
	Number int    `json:"number"`
	At     string `json:"at"`
	What   string `json:"what"`
	Why    string `json:"why,omitempty"`
	Shown  bool   `json:"shown"` // whether the comparison had been shown before
}

// Question returns the question of a case and quantity, or nil.
func (s *Study) Question(caseName, quantity string) *Question {
	for i := range s.Questions {
		if s.Questions[i].Case == caseName && s.Questions[i].Quantity == quantity {
			return &s.Questions[i]
		}
	}
	return nil
}

// Size returns the number of bytes of all files.
func (s *Study) Size() int {
	size := 0
	for _, f := range s.Files {
		size += len(f.Data)
	}
	return size
}

// File returns the file of an ID, or nil.
func (s *Study) File(id string) *File {
	for i := range s.Files {
		if s.Files[i].ID == id {
			return &s.Files[i]
		}
	}
	return nil
}

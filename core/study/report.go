package study

import (
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// None is the Number that is absent.
var None = quantity.None

// Number is a computed value, printed with ten significant digits.
type Number = quantity.Number

// Report is everything Evaluate found, and all that sentence, chart and memo
// may use. All numbers of a cell are in the cell's unit.
type Report struct {
	Title       string          `json:"title"`
	Code        *CodeEvidence   `json:"code,omitempty"`        // as a person states it
	CodeChecks  []CodeCheck     `json:"code_checks,omitempty"` // against exact solutions
	Purpose     string          `json:"purpose"`
	Edition     string          `json:"edition"` // edition of the methods
	Files       []FileLine      `json:"files"`
	Cells       []Cell          `json:"cells"`
	Differences []Difference    `json:"differences"` // of models of one question
	Notices     []notice.Notice `json:"notices"`     // of files and of the study as a whole
	Prepared    Signature       `json:"prepared"`
	Checked     Signature       `json:"checked"`
	Approved    Signature       `json:"approved"`
	Log         []Entry         `json:"log"`
}

// Marks of a phrase of a statement.
const (
	Plain    = ""
	Missing  = "missing" // a blank: nothing was given
	Guess    = "guessed" // rests on a guess no one has accepted
	Assumed  = "assumed" // rests on an assumption that is printed
	WordOf   = "outcome" // the word of an outcome
	FigureOf = "number"  // a computed number
)

// Phrase is a piece of a statement. Joined, the texts are the statement.
type Phrase struct {
	Text   string  `json:"text"`
	Mark   string  `json:"mark"`
	Target *Target `json:"target"` // where a blank, guess or number comes from; null for plain words
	// Of a phrase that is one number of the report: where it stands in the cell,
	// such as "joint.statistic", and the value there. Where Over names another
	// place, the value is the first in percent of the magnitude of the second.
	Path  string  `json:"path,omitempty"`
	Over  string  `json:"over,omitempty"`
	Value *Number `json:"value,omitempty"`
}

// FileLine names a source.
type FileLine struct {
	ID      string   `json:"id"`
	Name    string   `json:"name"`
	SHA256  string   `json:"sha256"`
	Bytes   int      `json:"bytes"`
	Matches bool     `json:"matches"` // the bytes have the recorded hash
	Uses    []string `json:"uses"`
}

// Outcomes of a requirement.
const (
	Shown       = "shown"
	NotMet      = "not met"
	NotResolved = "not resolved"
)

// Readings of a pointwise comparison of a scalar.
const (
	SignResolved = "sign resolved"
	Between      = "between"
	WithinNoise  = "within noise"
)

// Cell is one case, quantity and model.
type Cell struct {
	Case      string     `json:"case"`
	Condition string     `json:"condition"`
	Quantity  string     `json:"quantity"`
	Symbol    string     `json:"symbol"`
	Model     string     `json:"model"`
	Grid      string     `json:"grid"`
	Steps     *StepStudy `json:"steps,omitempty"`    // of the time step
	Borrowed  *Borrowed  `json:"borrowed,omitempty"` // from another question
	Reference string     `json:"reference"`          // what the data are called
	Kind      string     `json:"kind"`               // kind of reference
	Use       string     `json:"use"`
	Unit      string     `json:"unit"` // unit of the quantity, "1" for pure numbers
	XName     string     `json:"x_name"`
	XUnit     string     `json:"x_unit"`
	Scalar    bool       `json:"scalar"`
	Downward  bool       `json:"downward"`

	Withheld    bool     `json:"withheld"`    // no statement is made
	Provisional bool     `json:"provisional"` // stated, resting on open points
	Open        []Open   `json:"open"`        // in the order of work: the first is the next job
	Courses     [5]State `json:"courses"`
	Choices     Choices  `json:"choices"`

	Stations    []Station     `json:"stations"`
	Outside     []Number      `json:"outside"`
	StationsAll int           `json:"stations_all"`
	Excluded    []Excluded    `json:"excluded"`
	Conditions  []Compared    `json:"conditions"`
	Application *Application  `json:"application"` // null where no application point is stated
	Summary     *Summary      `json:"summary"`
	Joint       *Joint        `json:"joint"`
	Scores      []ScoreLine   `json:"scores"`
	Measured    []MeasureLine `json:"measured,omitempty"` // of curves, with the other alternatives
	Regions     []RegionLine  `json:"regions"`
	Crossings   Crossings     `json:"crossings"`
	Derived     *Derived      `json:"derived,omitempty"` // where the cell is a scalar taken from curves
	Monitors    []MonitorLine `json:"monitors"`
	Balances    []BalanceLine `json:"balances"`
	Grids       *Grids        `json:"grids"`
	Sources     []SourceLine  `json:"sources"`
	Degrees     Number        `json:"degrees"` // effective degrees of freedom of a scalar; null where all are taken as known
	K95         Number        `json:"k_95"`    // factor that 95 % needs with them
	Requirement *Judgement    `json:"requirement"`
	Tried       []string      `json:"tried,omitempty"` // alternatives that were evaluated
	Fragile     []Fragility   `json:"fragile"`         // alternatives that change an outcome word

	Marine   *MarineLine    `json:"marine,omitempty"`   // where it is asked for
	Trend    *TrendLine     `json:"trend,omitempty"`    // from another case, where it is asked for
	Recorded []RecordedLine `json:"recorded,omitempty"` // stations, requirement and showing, in the order of the log

	Known    string         `json:"known,omitempty"`    // whether the data were known when the simulation was made
	Evidence []EvidenceLine `json:"evidence,omitempty"` // expected for the recorded use

	Inputs        []InputLine       `json:"inputs,omitempty"`
	InputForm     string            `json:"input_form,omitempty"`    // InputsCounted or InputsNominal, where compared
	Members       *MemberLine       `json:"members,omitempty"`       // runs with sampled inputs
	Distributions *DistributionLine `json:"distributions,omitempty"` // where either side is more than one value
	Shared        []SharedLine      `json:"shared,omitempty"`        // sources that act on both sides
	Bound         *BoundLine        `json:"bound,omitempty"`         // what sources known as intervals do
	Sampled       *SampledLine      `json:"sampled,omitempty"`       // the interval of the model error by sampling
	Replicates    *ReplicateLine    `json:"replicates,omitempty"`
	Consistency   []ConsistencyLine `json:"consistency,omitempty"`
	Resolution    *ResolutionLine   `json:"resolution,omitempty"` // of the data, where it is counted or too coarse
	Quality       []QualityLine     `json:"quality,omitempty"`    // card of the case; empty where nothing was entered
	Bounding      *Bounding         `json:"bounding,omitempty"`   // what u_D would change, where it is unknown

	Residuals []ResidualLine `json:"residuals"`
	RoundOff  *RoundOffLine  `json:"round_off"` // null where no second run of another precision is given
	NumSums   *NumSums       `json:"num_sums"`  // null where u_num has no two parts

	Mapping    []string        `json:"mapping,omitempty"`    // how each file's columns were used, as sentences
	References []ReferenceLine `json:"references,omitempty"` // of the case card
	Axes       []Axes          `json:"axes,omitempty"`
	Corrected  Correction      `json:"corrected,omitzero"`
	Reduction  *Reduction      `json:"reduction,omitempty"`

	Treatment *Treatment      `json:"treatment,omitempty"` // what was done with the curves; null for one value
	Curve     Curve           `json:"curve"`               // the simulation as read, for the figure
	Notices   []notice.Notice `json:"notices"`
	FilesUsed []string        `json:"files_used"` // IDs
}

// State of a course of evidence.
type State string

// The states, drawn with fill and form: nothing, outline, solid, hatched.
const (
	Empty   State = "empty"
	Doubts  State = "doubts"
	Settled State = "settled"
	Blocked State = "blocked"
)

// Open is a point that needs a person: which course it belongs to, and the
// entry that answers it.
type Open struct {
	Course  int    `json:"course"`  // 0 to 4
	Blocks  bool   `json:"blocks"`  // withholds the statement
	Missing string `json:"missing"` // what is missing, as a noun phrase for a blank
	Text    string `json:"text"`
	Target  Target `json:"target"`
}

// Target is the place that answers an open point.
type Target struct {
	Kind  string `json:"kind"` // "slip", "question", "source", "file", "course"
	ID    string `json:"id"`
	Field string `json:"field"`
}

// Station is one common station. X, S, D and the uncertainties are standard
// uncertainties in the cell's unit; Lo and Hi bound the model error.
type Station struct {
	X       quantity.Written `json:"x"`
	S       Number           `json:"s"`
	D       quantity.Written `json:"d"`
	E       Number           `json:"e"`
	UD      Number           `json:"u_d"`
	UNum    Number           `json:"u_num"`
	UInterp Number           `json:"u_interp"`
	UInput  Number           `json:"u_input"`
	UVal    Number           `json:"u_val"`
	Ratio   Number           `json:"ratio"`
	Lo      Number           `json:"lo"`
	Hi      Number           `json:"hi"`
	Line    int              `json:"line"`             // line of the reference file
	Weight  *Number          `json:"weight,omitempty"` // of all stations the sum is one; null where they are equal
	Reading string           `json:"reading"`
	// Whitened is what E is worth once its covariance is taken out, in standard
	// uncertainties; the squares sum to the joint statistic. Null at a station
	// that the statistic does not count.
	Whitened Number  `json:"whitened"`
	Percent  *Number `json:"percent,omitempty"` // E in percent of |D|, where it is asked for; null value where |D| is too small
}

// ScoreLine is one difference measure with its scale and the criteria of its
// field. A score is a measurement, a criterion is bound to its scope.
type ScoreLine struct {
	Name     string          `json:"name"`
	Value    Number          `json:"value"`
	Scale    string          `json:"scale"`
	Word     string          `json:"word"` // e.g. over-prediction
	Criteria []CriterionLine `json:"criteria"`
}

// MeasureLine is the uncertainty of a measure of E, in the cell's unit, by
// sampling with the covariance of u_val.
type MeasureLine struct {
	Name    string `json:"name"`
	Value   Number `json:"value"`
	U       Number `json:"u"`        // standard
	Floor   Number `json:"floor"`    // mean of the measure of the stated errors alone
	FloorHi Number `json:"floor_hi"` // and their 95 % point
	Above   bool   `json:"above"`    // the value lies above that point
}

// CriterionLine is a limit of a field on a score.
type CriterionLine struct {
	Name   string `json:"name"`
	Low    Number `json:"low"`
	High   Number `json:"high"`
	Met    bool   `json:"met"`
	Scope  string `json:"scope"`
	Source string `json:"source"`
}

// RegionLine is the comparison in a part of the stations.
type RegionLine struct {
	Name    string `json:"name"`
	From    Number `json:"from"`
	To      Number `json:"to"`
	Sign    string `json:"sign,omitempty"` // of D, where it parts the stations
	Rest    bool   `json:"rest,omitempty"` // the stations of no other region; the parts, weighted by n, make the whole
	N       int    `json:"n"`
	Bias    Number `json:"bias"`
	RMSE    Number `json:"rmse"`
	HitRate Number `json:"hit_rate"`
	Beyond  int    `json:"beyond"` // stations with |E| beyond k u_val
}

// Difference sets two models of one question against each other at the same
// stations: mean of S_A - S_B with its standard uncertainty, from which the
// data cancel.
type Difference struct {
	Case     string `json:"case"`
	Quantity string `json:"quantity"`
	A        string `json:"a"`
	B        string `json:"b"`
	Unit     string `json:"unit"`
	N        int    `json:"n"`
	Mean     Number `json:"mean"`
	U        Number `json:"u"`
	Resolved bool   `json:"resolved"`
	RMSA     Number `json:"rms_a"` // root mean square of E
	RMSB     Number `json:"rms_b"`
	Shared   bool   `json:"shared,omitempty"` // at the shared stations only, by choice
}

// Compared is one condition on both sides and the effect of its difference.
type Compared struct {
	Name       string `json:"name"`
	Unit       string `json:"unit"`
	Simulation Number `json:"simulation"`
	Data       Number `json:"data"`
	Effect     Number `json:"effect"` // on the quantity, in its unit; null where no sensitivity is given
	Handling   string `json:"handling"`
	Why        string `json:"why"`
}

// Application sets the point of application against the conditions at which
// the quantity was compared, over all cases of the study.
type Application struct {
	Text    string `json:"text"` // e.g. α = 11°
	Outside bool   `json:"outside"`
	Range   string `json:"range"` // e.g. α 4.2° to 9°
	// Place is where the point lies among the comparisons that state all of its
	// conditions; nil where none does.
	Place *AppliedPlace `json:"place,omitempty"`
}

// AppliedPlace is the point of application in the space of its conditions.
// Distances are in parts of the span that the comparisons cover.
type AppliedPlace struct {
	State    string          `json:"state"` // inside, edge or outside: a word of package adequacy
	Names    []string        `json:"names"`
	Units    []string        `json:"units"`
	At       []Number        `json:"at"`
	Beyond   Number          `json:"beyond"`  // from the hull of the comparisons
	Nearest  string          `json:"nearest"` // case
	Distance Number          `json:"distance"`
	Points   []ComparedPoint `json:"points"`
}

// ComparedPoint is one comparison in the space of conditions.
type ComparedPoint struct {
	Case string   `json:"case"`
	At   []Number `json:"at"`
}

// EvidenceLine is a piece of evidence that the recorded use of the result
// lets a reader expect, and whether it is there. No score is made of it.
type EvidenceLine struct {
	What  string `json:"what"`
	From  string `json:"from"` // the weight of the decision from which it is expected
	Given bool   `json:"given"`
}

// Excluded is a station that a person took out of the comparison.
type Excluded struct {
	X    quantity.Written `json:"x"`
	D    quantity.Written `json:"d"`
	Line int              `json:"line"`
	Why  string           `json:"why"`
	Late bool             `json:"late"`
}

// Summary counts and averages over the common stations.
type Summary struct {
	N            int    `json:"n"`      // stations compared
	Tested       int    `json:"tested"` // of these, stations with a known u_val
	Bias         Number `json:"bias"`
	MAE          Number `json:"mae"`
	RMSE         Number `json:"rmse"`
	MaxAbs       Number `json:"max_abs"`
	MaxAt        Number `json:"max_at"`
	MaxRatio     Number `json:"max_ratio"`
	WithinUVal   int    `json:"within_u_val"`
	WithinKUVal  int    `json:"within_k_u_val"`
	BeyondChance Number `json:"beyond_chance"` // expected count beyond k u_val, normal errors
}

// Joint is the statistic of all stations together, and how it decomposes.
type Joint struct {
	Statistic          Number `json:"statistic"`
	N                  int    `json:"n"` // rank
	P                  Number `json:"p_value"`
	Reference          Number `json:"reference"` // 95 % point
	Exceeds            bool   `json:"exceeds"`
	Pattern            string `json:"pattern"`
	Independent        Number `json:"independent"` // statistic if every source were independent
	NumShared          Number `json:"num_shared"`  // statistic with u_num fully shared
	Offset             Number `json:"offset"`
	UOffset            Number `json:"u_offset"`
	OffsetPart         Number `json:"offset_part"` // part of the statistic
	Remainder          Number `json:"remainder"`
	RemainderN         int    `json:"remainder_n"`
	RemainderReference Number `json:"remainder_reference"`
	RemainderExceeds   bool   `json:"remainder_exceeds"`
	OffsetResolved     bool   `json:"offset_resolved"`

	// E = a + b S + rest: the scale beside an offset, and the shape left over.
	Scale         Number    `json:"scale"`
	UScale        Number    `json:"u_scale"`
	ScalePart     Number    `json:"scale_part"`
	ShapePart     Number    `json:"shape_part"`
	ShapeN        int       `json:"shape_n"`
	ScaleResolved bool      `json:"scale_resolved"`
	AtLeast       Number    `json:"at_least"` // probability of at least the found number beyond k u_val, by sampling
	Turns         []Turning `json:"turns"`    // common sources of the data whose correlation turns the conclusion
	Without       []Leaving `json:"without"`  // the statistic without each region

	Merged       int               `json:"merged"`       // stations that repeat a reading, each counted once
	Worst        Number            `json:"worst"`        // the largest whitened residual, with its sign
	WorstAt      Number            `json:"worst_at"`     // its station
	Condition    Number            `json:"condition"`    // of the matrix that the statistic rests on
	Eigenvalues  []Number          `json:"eigenvalues"`  // of V scaled to the unit diagonal, ascending, where V was treated whole: the ends of the list where it is long
	Correlations []CorrelationLine `json:"correlations"` // the statistic against the correlation of a common source of the data
	Station      *Leaving          `json:"station"`      // without the one station that changes it most; null where not asked
	Turning      int               `json:"turning"`      // stations each of which, left out alone, turns the conclusion
}

// CorrelationLine is the joint statistic against the assumed correlation of
// one source: a part rho of its variance shared, the rest independent.
type CorrelationLine struct {
	Source string             `json:"source"`
	N      int                `json:"n"`         // rank
	Top    Number             `json:"reference"` // 95 % point
	Low    Number             `json:"low"`       // 1 % point
	Points []CorrelationPoint `json:"points"`
	Flips  []Number           `json:"flips"` // where the conclusion changes
}

// CorrelationPoint is the statistic at one correlation, 0 to 1.
type CorrelationPoint struct {
	Rho       Number `json:"rho"`
	Statistic Number `json:"statistic"`
}

// Turning is a source whose assumed correlation rho, 0 to 1, turns the
// conclusion of the joint statistic.
type Turning struct {
	Source string `json:"source"`
	Rho    Number `json:"rho"`
	At0    Number `json:"at_0"` // statistic with the source independent
	At1    Number `json:"at_1"` // and fully shared
}

// Leaving is the statistic with the stations of a region left out.
type Leaving struct {
	Region    string `json:"region"` // or the place of a single station
	Statistic Number `json:"statistic"`
	N         int    `json:"n"`
	Reference Number `json:"reference"`
	Exceeds   bool   `json:"exceeds"`
}

// Crossings of zero, in the cell's x unit.
type Crossings struct {
	Simulation []Crossing `json:"sim"`
	Reference  []Crossing `json:"ref"`
}

// Crossing is one change of sign. U is the standard uncertainty of its place,
// from that of the values there over the slope: of the simulation by u_num,
// of the data by u_D; null outside the stations.
type Crossing struct {
	X      Number `json:"x"`
	U      Number `json:"u"`
	Rising bool   `json:"rising"`
}

// Derived says how the scalar of a cell was taken from its curves. Values are
// in the cell's unit.
type Derived struct {
	Kind        string           `json:"kind"`
	Formula     string           `json:"formula"`
	Settings    []DerivedSetting `json:"settings"`
	Sides       []DerivedSide    `json:"sides"`
	Effect      Number           `json:"effect"` // of the simulation at all its rows less at the stations of the data
	Others      []DerivedOther   `json:"others"`
	Propagation string           `json:"propagation"` // how u of the curves became u of the scalar; empty where nothing was carried
}

// DerivedSetting is a choice or a number of the taking, in words.
type DerivedSetting struct {
	Name  string `json:"name"`
	Value string `json:"value"`
}

// DerivedSide is the scalar of one curve. U is the standard uncertainty of what
// the method leaves open of this side alone.
type DerivedSide struct {
	Side      string          `json:"side"`
	File      string          `json:"file"`
	Rows      int             `json:"rows"`
	Value     Number          `json:"value"`
	U         Number          `json:"u"`
	At        Number          `json:"at"` // the place it stands for, in AtUnit
	AtUnit    string          `json:"at_unit"`
	Edge      Number          `json:"edge"` // velocity at the edge, in EdgeUnit
	EdgeUnit  string          `json:"edge_unit"`
	Overshoot Number          `json:"overshoot"` // fraction of the edge
	Gap       Number          `json:"gap"`       // of a contour, in lengths
	Bound     bool            `json:"bound"`     // only a bound
	Effects   []DerivedEffect `json:"effects"`
	Places    []DerivedPlace  `json:"places"`
}

// DerivedEffect is what another choice of the method does to the scalar.
type DerivedEffect struct {
	Name   string `json:"name"`
	Change Number `json:"change"`
	U      Number `json:"u"` // standard uncertainty that it stands for
}

// DerivedPlace is a candidate of a crossing, in the unit of the stations.
type DerivedPlace struct {
	X      Number `json:"x"`
	U      Number `json:"u"` // of the values there over the slope
	Rising bool   `json:"rising"`
	Chosen bool   `json:"chosen"`
}

// DerivedOther is the scalar under another choice.
type DerivedOther struct {
	Change     string `json:"change"`
	Simulation Number `json:"simulation"`
	Reference  Number `json:"reference"`
	E          Number `json:"e"`
}

// MonitorLine is the judgement of one monitor, with the points to draw.
// Values are in the cell's unit, of a stand-in in its own; places are in that
// of the monitor.
type MonitorLine struct {
	Grid      string    `json:"grid"`
	File      string    `json:"file"`
	Quantity  string    `json:"quantity"` // of a monitor of another quantity that stands for this one, with its unit; else empty
	Unit      string    `json:"unit"`
	Axis      string    `json:"axis"` // iterations or time
	XName     string    `json:"x_name"`
	Class     string    `json:"class"`
	Rule      string    `json:"rule"`
	Mean      Number    `json:"mean"`
	U         Number    `json:"u"`       // standard
	Entered   string    `json:"entered"` // the reason, where U was entered and not computed
	From      Number    `json:"from"`    // window of the mean
	To        Number    `json:"to"`
	Drift     Number    `json:"drift"`  // fraction per Per
	Change    Number    `json:"change"` // the same in the unit of the values
	Per       Number    `json:"per"`
	Limit     Number    `json:"limit"`     // change that counts as small
	Remaining Number    `json:"remaining"` // to be added to the last value, by geometric extrapolation
	Period    Number    `json:"period"`
	Cycles    int       `json:"cycles"`
	HalfRange Number    `json:"half_range"`
	OfGrid    Number    `json:"of_grid"`  // U_iter over U of the grids: aim at a tenth or less
	Sampling  *Sampling `json:"sampling"` // of an unsteady run, else null
	X         []Number  `json:"x"`
	Y         []Number  `json:"y"`
}

// Sampling is how a mean of an unsteady run came by its uncertainty. Standard
// uncertainties are in the unit of the values, times in that of the monitor.
type Sampling struct {
	StartUp     int    `json:"start_up"` // rows left out in front
	Rows        int    `json:"rows"`     // averaged
	SD          Number `json:"sd"`       // of one row
	Tau         Number `json:"tau"`      // correlation time
	Independent Number `json:"independent"`
	Batches     int    `json:"batches"`
	UBatches    Number `json:"u_batches"` // of the mean, by the scatter of batch means
	UMarkov     Number `json:"u_markov"`  // of the mean, from the correlation of successive rows alone
	Share       Number `json:"share"`     // of u_num that U is; null for runs that are not in u_num
}

// BalanceLine is one balance of a run, in the unit of its file. Fraction,
// Limit and what follow it are parts of Scale.
type BalanceLine struct {
	Grid      string `json:"grid"`
	File      string `json:"file"`
	Kind      string `json:"kind"`
	In        Number `json:"in"`
	Out       Number `json:"out"`
	Net       Number `json:"net"`
	Scale     Number `json:"scale"`
	ScaleOf   string `json:"scale_of"` // what Scale is
	Fraction  Number `json:"fraction"` // Net over Scale, with its sign
	Limit     Number `json:"limit"`    // that counts as small
	LimitOf   string `json:"limit_of"`
	OfGrid    Number `json:"of_grid"` // over U of the grids, if the quantity changed by the same fraction
	OfE       Number `json:"of_e"`    // the same over |E|
	Closed    bool   `json:"closed"`
	Effect    Number `json:"effect"` // entered bound of the effect on the quantity, in the cell's unit
	EffectWhy string `json:"effect_why"`
}

// ResidualLine is the course of one residual, with the points to draw: Y is
// the logarithm to base ten.
type ResidualLine struct {
	Grid     string   `json:"grid"`
	File     string   `json:"file"`
	Name     string   `json:"name"`
	Decades  Number   `json:"decades"`   // fallen
	PerFirst Number   `json:"per_first"` // decades per Per over all rows
	PerLast  Number   `json:"per_last"`  // over the last third
	Per      Number   `json:"per"`
	From     Number   `json:"from"` // of the last third
	To       Number   `json:"to"`
	Stalled  bool     `json:"stalled"`
	X        []Number `json:"x"`
	Y        []Number `json:"y"`
}

// RoundOffLine is what two runs differ by that differ in precision or platform
// only, in the cell's unit.
type RoundOffLine struct {
	Grid  string `json:"grid"`
	File  string `json:"file"`
	RMS   Number `json:"rms"`
	Max   Number `json:"max"`
	N     int    `json:"n"`     // values compared
	Doubt bool   `json:"doubt"` // the two finest grids differ by no more than twice Max
}

// NumSums is u_num by both sums of its parts (root mean square over the
// stations): root of the sum of squares where they are independent, sum where
// they are not. What interpolation adds is in neither.
type NumSums struct {
	Root   Number `json:"root"`
	Linear Number `json:"linear"`
	Apart  bool   `json:"apart"` // by more than a fifth
}

// Grids is the grid study behind u_num: of a scalar, or along a curve.
type Grids struct {
	Points       []GridPoint `json:"points"` // coarse to fine
	Dimension    int         `json:"dimension"`
	Class        string      `json:"class"`
	Ratio        Number      `json:"ratio"`
	Order        Number      `json:"order"`
	Formal       Number      `json:"formal"`
	Extrapolated Number      `json:"extrapolated"`
	Ea           Number      `json:"ea"`
	Eext         Number      `json:"eext"`
	GCI          Number      `json:"gci"`
	U            Number      `json:"u"` // expanded, 95 %
	UNum         Number      `json:"u_num"`
	KNum         Number      `json:"k_num"`
	Rule         string      `json:"rule"`
	R21          Number      `json:"r21"`
	R32          Number      `json:"r32"`

	NextCells Number `json:"next_cells"` // of a grid that would resolve the requirement with E unchanged
	NextCost  Number `json:"next_cost"`  // of its run, relative to the finest

	Along       bool        `json:"along"` // a study along a curve
	Monotone    int         `json:"monotone"`
	NonMonotone int         `json:"non_monotone"`
	OrderLow    Number      `json:"order_low"`
	OrderHigh   Number      `json:"order_high"`
	Local       []LocalGrid `json:"local"`

	Card         *FamilyCard `json:"card,omitempty"`
	Rules        []RuleLine  `json:"rules,omitempty"` // of one value, by every rule
	Fit          *FitLine    `json:"fit,omitempty"`   // behind U, where it is not that of the observed order
	Stated       *StatedNext `json:"stated,omitempty"`
	CostExponent Number      `json:"cost_exponent,omitempty"` // behind NextCost and Stated
}

// GridPoint is one grid.
type GridPoint struct {
	Name  string `json:"name"`
	Cells Number `json:"cells"`
	H     Number `json:"h"` // relative to the finest
	Value Number `json:"value"`
	Used  bool   `json:"used"`             // in the estimate
	YPlus Number `json:"y_plus,omitempty"` // of the first cells; left out where it is not known
}

// LocalGrid is the grid study at one station.
type LocalGrid struct {
	X     Number `json:"x"`
	Class string `json:"class"`
	Order Number `json:"order"`
	U     Number `json:"u"`
}

// SourceLine is one source with its share of the mean u_val squared.
type SourceLine struct {
	Name    string `json:"name"`
	Of      string `json:"of"`
	Text    string `json:"text"` // value, basis, coverage, pattern in words
	U       Number `json:"u"`    // standard uncertainty (root mean square over stations)
	Share   Number `json:"share"`
	Pattern string `json:"pattern"`
	Origin  string `json:"origin"`
	Open    bool   `json:"open"`
}

// Whether the uncertainty of the inputs is in u_val: E then tells of the model
// with its inputs as far as they are known, else of model and inputs together.
const (
	InputsCounted = "counted"
	InputsNominal = "nominal"
)

// InputLine is an input of the simulation with its uncertainty, in its own
// unit, and how it acts on the quantity. Sensitivities of a curve are root mean
// squares over its stations.
type InputLine struct {
	Name            string `json:"name"`
	Unit            string `json:"unit"`
	Nominal         Number `json:"nominal"`
	U               Number `json:"u"` // standard; of an interval its half-width
	Sensitivity     Number `json:"sensitivity"`
	DataSensitivity Number `json:"data_sensitivity"`
	Method          string `json:"method"` // where the sensitivity is from
	Shared          bool   `json:"shared"`
	Text            string `json:"text"`
	Origin          string `json:"origin"`
}

// MemberLine is what runs with sampled inputs come to.
type MemberLine struct {
	N    int    `json:"n"`
	U    Number `json:"u"`    // deviation of the runs, root mean square over the stations
	Mean Number `json:"mean"` // of their means less the compared run, the largest by magnitude
	Rank int    `json:"rank"` // greatest rank of their covariance
}

// SharedLine is a source of the data that acts on the simulation too.
type SharedLine struct {
	Source string `json:"source"`
	U      Number `json:"u"`    // in the data
	Left   Number `json:"left"` // in E
}

// BoundLine is the largest part that sources known as intervals can have in E:
// it widens the interval of the model error at both ends.
type BoundLine struct {
	Half Number `json:"half"`
	At   Number `json:"at"` // station, for curves
}

// SampledLine is the model error by sampling, at the one value or at the
// station of the largest |E|/u_val: two-piece normal bars, few readings and other
// forms as they are. Plus, Minus and Shift are of the sources with two sides
// together; null where there are none.
type SampledLine struct {
	At      Number `json:"at"`
	Value   Number `json:"value"` // mean, of few readings the median
	U       Number `json:"u"`     // null where few readings leave an interval only
	Lo      Number `json:"lo"`
	Hi      Number `json:"hi"`
	Level   Number `json:"level"`
	Draws   int    `json:"draws"`
	Settled bool   `json:"settled"`
	Minus   Number `json:"minus"`
	Plus    Number `json:"plus"`
	Shift   Number `json:"shift"` // of the mean of the data against their value
}

// ReplicateLine is what repeated readings show, level by level. Uncertainties
// of a curve are root mean squares over its stations, degrees and groups the
// least.
type ReplicateLine struct {
	Readings int         `json:"readings"`
	Stations int         `json:"stations"`
	Of       string      `json:"of"`     // what the data are: mean, or single reading
	Counts   string      `json:"counts"` // the outermost level that varies
	U        Number      `json:"u"`      // as counted
	Degrees  Number      `json:"degrees"`
	S        Number      `json:"s"`     // deviation of all readings
	Plain    Number      `json:"plain"` // S over the root of their number: what readings without levels would give
	Levels   []LevelLine `json:"levels"`
}

// LevelLine is one level of replication, from the outermost to the readings.
type LevelLine struct {
	Name      string `json:"name"`
	Groups    int    `json:"groups"`
	Degrees   Number `json:"degrees"`
	Deviation Number `json:"deviation"` // root of the component of variance; null without degrees of freedom
}

// ConsistencyLine is a test of the data against themselves: two numbers, the
// standard uncertainty of their difference, and its multiple.
type ConsistencyLine struct {
	Name     string `json:"name"`
	Value    Number `json:"value"`
	Expected Number `json:"expected"`
	U        Number `json:"u"`
	Ratio    Number `json:"ratio"`
	Holds    bool   `json:"holds"`
}

// ResolutionLine is a step of which all values of the data are multiples.
type ResolutionLine struct {
	Step    Number `json:"step"`
	U       Number `json:"u"` // step over the root of 12
	Counted bool   `json:"counted"`
}

// QualityLine is one item of the data-quality card of a case.
type QualityLine struct {
	Item  string `json:"item"`
	State string `json:"state"`
	Note  string `json:"note"`
}

// Bounding says how far a word rests on the unknown u_D.
type Bounding struct {
	What  string `json:"what"` // requirement or sign
	Word  string `json:"word"` // with u_D = 0
	UD    Number `json:"u_d"`  // up to which the word stays; null where no u_D changes it
	At    Number `json:"at"`   // station, for curves
	After string `json:"after"`
}

// Judgement holds the requirement against the interval of the model error.
type Judgement struct {
	Limit         Number `json:"limit"`   // in the cell's unit
	Percent       Number `json:"percent"` // as entered, or null
	Who           string `json:"who"`
	Date          string `json:"date"`
	Late          bool   `json:"late"`
	Outcome       string `json:"outcome"`
	At            Number `json:"at"` // the deciding station, for curves
	UValNeeded    Number `json:"u_val_needed"`
	Toward        string `json:"toward"` // the outcome that UValNeeded would give, E unchanged
	UNumNeeded    Number `json:"u_num_needed"`
	UNumReduction Number `json:"u_num_reduction"` // fraction
	Ways          []Way  `json:"ways,omitempty"`  // each alone would bring u_val to UValNeeded, the least reduction first
}

// Way is one source whose reduction alone would resolve a requirement, E
// unchanged, at the deciding station.
type Way struct {
	Source    string  `json:"source"`
	Of        string  `json:"of"`
	Now       Number  `json:"now"` // standard
	Needed    Number  `json:"needed"`
	Reduction Number  `json:"reduction"`          // fraction
	Cells     *Number `json:"cells,omitempty"`    // of a finest grid that would do, by the observed order
	Cost      *Number `json:"cost,omitempty"`     // of its run, relative to the finest
	Readings  int     `json:"readings,omitempty"` // of the test that would do, in all
}

// Fragility is an alternative that changes an outcome word.
type Fragility struct {
	Change  string `json:"change"`
	What    string `json:"what"` // requirement, reading, joint statistic, remainder
	From    string `json:"from"`
	Outcome string `json:"outcome"`
	Detail  string `json:"detail"`
	// At is where the word turns on the way from the chosen number to that of
	// the alternative; null where the alternative is no number.
	At *Number `json:"at,omitempty"`
}

// Curve is a line to draw.
type Curve struct {
	X    []quantity.Written `json:"x"`
	Y    []quantity.Written `json:"y"`
	UNum []Number           `json:"u_num"` // standard, at X; empty when unknown
}

package quantity

import (
	"math"
	"strconv"
	"strings"
	"text/scanner"
	"unicode"
)

// Formula is an expression of names and numbers, such as (p - p_ref)/q. It
// knows no values: Bind gives its names their dimensions and places, checks
// the dimensions of every operation, and returns what computes it.
//
// Operations: + - * / ( ), a whole power from 2 to 4 (u^2, u²), and the
// functions sqrt, abs, exp, log (natural), sin, cos, tan, min and max. A plain
// name is a run of letters, digits and underscores; any other name stands in
// double quotes. A name behind "card." is one of the case card.
type Formula struct {
	Text string
	root *branch
}

// Name is a name in a formula.
type Name struct {
	Text   string
	Quoted bool // a column, whatever else has this name
	Card   bool // of the case card, whatever else has this name
}

// Operand is a bound formula: its dimension, and its value for the values that
// its names have in x, in SI.
type Operand struct {
	Dimension Dimension
	Value     func(x []float64) float64
}

// FormulaError is the refusal of a formula: why, and at which character,
// counted from one.
type FormulaError struct {
	Column int
	Why    string
}

func (e *FormulaError) Error() string { return e.Why }

// The bounds of a formula.
const (
	longestFormula = 400 // bytes
	deepestFormula = 40  // operations inside one another
)

// branch is an operation with its arms, a name, or a number.
type branch struct {
	column int
	op     string // "+", "-", "*", "/", "^", the name of a function, "name", "number"
	name   Name
	number float64 // or the power of "^"
	arms   []*branch
}

// functions are those that a formula may call, with their number of arguments.
var functions = map[string]int{"sqrt": 1, "abs": 1, "exp": 1, "log": 1, "sin": 1, "cos": 1, "tan": 1, "min": 2, "max": 2}

// plainSigns are the signs of print that stand for those of the keyboard.
var plainSigns = map[rune]string{'−': "-", '·': "*", '⋅': "*", '×': "*"}

// powers are the raised digits.
var powers = map[rune]float64{'²': 2, '³': 3, '⁴': 4}

// ParseFormula reads a formula. Any error is a *FormulaError.
func ParseFormula(text string) (Formula, error) {
	if len(text) > longestFormula {
		return Formula{}, &FormulaError{longestFormula, "it is longer than " + strconv.Itoa(longestFormula) + " bytes"}
	}
	r := &formulaReader{}
	r.in.Init(strings.NewReader(text))
	r.in.Mode = scanner.ScanIdents | scanner.ScanInts | scanner.ScanFloats | scanner.ScanStrings
	r.in.IsIdentRune = func(c rune, i int) bool {
		return c == '_' || c == '∞' || unicode.IsLetter(c) || i > 0 && (unicode.IsDigit(c) || c >= '₀' && c <= '₉')
	}
	r.in.Error = func(*scanner.Scanner, string) { r.fail("it cannot be read") }
	r.next()
	root := r.sum(0)
	if r.err == nil && r.token != scanner.EOF {
		r.fail("an operation was expected")
	}
	if r.err != nil {
		return Formula{}, r.err
	}
	return Formula{text, root}, nil
}

// formulaReader holds the token that is looked at, and the first refusal.
type formulaReader struct {
	in    scanner.Scanner
	token rune
	err   *FormulaError
}

func (r *formulaReader) next() { r.token = r.in.Scan() }

// fail keeps the first refusal and ends the reading.
func (r *formulaReader) fail(why string) {
	if r.err == nil {
		r.err = &FormulaError{r.column(), why}
	}
	r.token = scanner.EOF
}

func (r *formulaReader) column() int { return max(r.in.Position.Column, 1) }

// sign returns the operation of the token, "" where it is none.
func (r *formulaReader) sign() string {
	if plain, printed := plainSigns[r.token]; printed {
		return plain
	}
	if r.token > 0 {
		return string(r.token)
	}
	return ""
}

func (r *formulaReader) sum(depth int) *branch {
	return r.chain(depth, "+-", func() *branch { return r.product(depth) })
}

func (r *formulaReader) product(depth int) *branch {
	return r.chain(depth, "*/", func() *branch { return r.signed(depth) })
}

// chain reads arms with operations of one rank between them, from the left.
func (r *formulaReader) chain(depth int, signs string, arm func() *branch) *branch {
	if depth > deepestFormula {
		r.fail("it is nested too deeply")
		return nil
	}
	whole := arm()
	for r.err == nil && r.sign() != "" && strings.Contains(signs, r.sign()) {
		b := &branch{column: r.column(), op: r.sign()}
		r.next()
		b.arms = []*branch{whole, arm()}
		whole = b
	}
	return whole
}

// signed reads an arm with minus signs before it.
func (r *formulaReader) signed(depth int) *branch {
	if r.sign() == "-" && depth <= deepestFormula {
		b := &branch{column: r.column(), op: "-"}
		r.next()
		b.arms = []*branch{r.signed(depth + 1)}
		return b
	}
	return r.power(r.single(depth + 1))
}

// power reads a power behind an arm.
func (r *formulaReader) power(base *branch) *branch {
	p, raised := powers[r.token]
	switch {
	case raised:
	case r.token == '^':
		r.next()
		v, err := strconv.ParseFloat(r.in.TokenText(), 64)
		if r.token != scanner.Int || err != nil || v < 2 || v > 4 {
			r.fail("a power is 2, 3 or 4")
			return nil
		}
		p = v
	default:
		return base
	}
	b := &branch{column: r.column(), op: "^", number: p, arms: []*branch{base}}
	r.next()
	return b
}

// single reads a number, a name, a call or what stands in parentheses.
func (r *formulaReader) single(depth int) *branch {
	b := &branch{column: r.column(), op: "name"}
	text := r.in.TokenText()
	switch r.token {
	case scanner.Int, scanner.Float:
		v, err := strconv.ParseFloat(text, 64)
		if err != nil || strings.ContainsAny(text, "xXpPoObB_") {
			r.fail("a number is written with digits, a point and an exponent")
			return nil
		}
		b.op, b.number = "number", v
		r.next()
	case scanner.String:
		inside, err := strconv.Unquote(text)
		if err != nil {
			r.fail("the quoted name cannot be read")
			return nil
		}
		b.name = Name{Text: inside, Quoted: true}
		r.next()
	case scanner.Ident:
		r.next()
		switch {
		case r.token == '(':
			return r.call(b, text, depth)
		case r.token == '.' && text == "card":
			r.next()
			if r.token != scanner.Ident {
				r.fail("a name of the case card was expected")
				return nil
			}
			b.name = Name{Text: r.in.TokenText(), Card: true}
			r.next()
		default:
			b.name = Name{Text: text}
		}
	case '(':
		r.next()
		b = r.sum(depth)
		r.closing()
	default:
		r.fail("a name or a number was expected")
		return nil
	}
	return b
}

// call reads the arguments of a function.
func (r *formulaReader) call(b *branch, name string, depth int) *branch {
	count, known := functions[name]
	if !known {
		r.err = &FormulaError{b.column, name + " is none of the functions sqrt, abs, exp, log, sin, cos, tan, min, max"}
		r.token = scanner.EOF
		return nil
	}
	b.op = name
	for r.err == nil {
		r.next()
		b.arms = append(b.arms, r.sum(depth))
		if r.token != ',' {
			break
		}
	}
	r.closing()
	if r.err == nil && len(b.arms) != count {
		r.err = &FormulaError{b.column, name + " takes " + Counted(count, "argument")}
	}
	return b
}

func (r *formulaReader) closing() {
	if r.token != ')' {
		r.fail("a closing parenthesis was expected")
		return
	}
	r.next()
}

// Bind gives the names of a formula what lookup says they are and checks every
// operation: sums, min and max need one dimension on both sides, exp and log a
// pure number, sin, cos and tan a pure number or an angle, sqrt even exponents.
// An error of lookup is placed at the name. Any error is a *FormulaError.
func (f Formula) Bind(lookup func(Name) (Operand, error)) (Operand, error) {
	if f.root == nil {
		return Operand{}, &FormulaError{1, "it is empty"}
	}
	return f.root.bind(lookup)
}

func (b *branch) bind(lookup func(Name) (Operand, error)) (Operand, error) {
	switch b.op {
	case "number":
		v := b.number
		return Operand{Value: func([]float64) float64 { return v }}, nil
	case "name":
		o, err := lookup(b.name)
		if err != nil {
			return Operand{}, &FormulaError{b.column, err.Error()}
		}
		return o, nil
	}
	arms := make([]Operand, len(b.arms))
	for i, arm := range b.arms {
		o, err := arm.bind(lookup)
		if err != nil {
			return Operand{}, err
		}
		arms[i] = o
	}
	return b.join(arms)
}

// join is the operation on its arms.
func (b *branch) join(arms []Operand) (Operand, error) {
	refuse := func(why string) (Operand, error) { return Operand{}, &FormulaError{b.column, why} }
	first := arms[0]
	f := first.Value
	if len(arms) == 1 {
		d, ok := b.dimension(first.Dimension)
		if !ok {
			return refuse(b.op + " cannot be taken of " + first.Dimension.String())
		}
		return Operand{d, b.ofOne(f)}, nil
	}
	g := arms[1].Value
	if b.op == "*" || b.op == "/" {
		power := 1
		if b.op == "/" {
			power = -1
		}
		whole, ok := Unit{Dimension: first.Dimension, Factor: 1}.times(Unit{Dimension: arms[1].Dimension, Factor: 1}, power)
		if !ok {
			return refuse("its dimension is beyond any unit")
		}
		if b.op == "*" {
			return Operand{whole.Dimension, func(x []float64) float64 { return float64(f(x) * g(x)) }}, nil
		}
		return Operand{whole.Dimension, func(x []float64) float64 { return f(x) / g(x) }}, nil
	}
	if first.Dimension != arms[1].Dimension {
		return refuse(b.op + " joins " + first.Dimension.String() + " and " + arms[1].Dimension.String())
	}
	value := map[string]func(x []float64) float64{
		"+":   func(x []float64) float64 { return f(x) + g(x) },
		"-":   func(x []float64) float64 { return f(x) - g(x) },
		"min": func(x []float64) float64 { return min(f(x), g(x)) },
		"max": func(x []float64) float64 { return max(f(x), g(x)) },
	}[b.op]
	return Operand{first.Dimension, value}, nil
}

// dimension is that of an operation on one arm; false where there is none.
func (b *branch) dimension(d Dimension) (Dimension, bool) {
	switch b.op {
	case "^":
		whole, ok := One.times(Unit{Dimension: d, Factor: 1}, int(b.number))
		return whole.Dimension, ok
	case "sqrt":
		for i := range d {
			if d[i]%2 != 0 {
				return d, false
			}
			d[i] /= 2
		}
		return d, true
	case "exp", "log":
		return pureNumber, d == pureNumber
	case "sin", "cos", "tan":
		return pureNumber, d == pureNumber || d == angle
	}
	return d, true // the sign and the magnitude
}

func (b *branch) ofOne(f func(x []float64) float64) func(x []float64) float64 {
	if b.op == "^" {
		n := int(b.number)
		return func(x []float64) float64 {
			v := f(x)
			p := v
			for range n - 1 {
				p = float64(p * v)
			}
			return p
		}
	}
	of := map[string]func(float64) float64{"-": func(v float64) float64 { return -v }, "sqrt": math.Sqrt, "abs": math.Abs, "exp": math.Exp, "log": math.Log, "sin": math.Sin, "cos": math.Cos, "tan": math.Tan}[b.op]
	return func(x []float64) float64 { return of(f(x)) }
}

// Said returns the formula with its names replaced by what said returns.
func (f Formula) Said(said func(Name) string) string {
	if f.root == nil {
		return ""
	}
	return f.root.said(said, 0)
}

// ranks of the operations: what binds less stands in parentheses.
var ranks = map[string]int{"+": 1, "-": 1, "*": 2, "/": 2, "^": 4}

func (b *branch) said(said func(Name) string, above int) string {
	rank := ranks[b.op]
	text := ""
	switch {
	case b.op == "number":
		return Typed(b.number)
	case b.op == "name":
		return said(b.name)
	case b.op == "^":
		text = b.arms[0].said(said, rank+1) + map[float64]string{2: "²", 3: "³", 4: "⁴"}[b.number]
	case rank == 0:
		for i, arm := range b.arms {
			if i > 0 {
				text += ", "
			}
			text += arm.said(said, 0)
		}
		return b.op + "(" + text + ")"
	case len(b.arms) == 1:
		rank = 1
		text = "−" + b.arms[0].said(said, 2)
	default:
		sign := map[string]string{"+": " + ", "-": " − ", "*": " ", "/": "/"}[b.op]
		text = b.arms[0].said(said, rank) + sign + b.arms[1].said(said, rank+1)
	}
	if rank < above {
		return "(" + text + ")"
	}
	return text
}

// Names returns the names of a formula, each once, in their order.
func (f Formula) Names() []Name {
	var list []Name
	seen := map[Name]bool{}
	var walk func(*branch)
	walk = func(b *branch) {
		if b.op == "name" && !seen[b.name] {
			seen[b.name] = true
			list = append(list, b.name)
		}
		for _, arm := range b.arms {
			walk(arm)
		}
	}
	if f.root != nil {
		walk(f.root)
	}
	return list
}

// String writes a dimension in base units, such as kg m^-1 s^-2; "a pure
// number" where it has none.
func (d Dimension) String() string {
	text := ""
	for _, i := range []int{1, 0, 2, 3, 4} {
		if d[i] == 0 {
			continue
		}
		if text != "" {
			text += " "
		}
		text += [...]string{"m", "kg", "s", "K", "rad"}[i]
		if d[i] != 1 {
			text += "^" + strconv.Itoa(int(d[i]))
		}
	}
	if text == "" {
		return "a pure number"
	}
	return text
}

// Command make writes the files of the demo campaign into the folder it is
// given: go run ./datasets/duct/make datasets/duct. The campaign, the facility
// and every number of it are invented.
package main

import (
	"bytes"
	"fmt"
	"log"
	"math"
	"math/rand/v2"
	"os"
	"path/filepath"
	"sort"
	"strconv"
	"strings"
)

func main() {
	if len(os.Args) != 2 {
		log.Fatal("make: give the folder to write into")
	}
	all := files()
	names := make([]string, 0, len(all))
	for name := range all {
		names = append(names, name)
	}
	sort.Strings(names)
	for _, name := range names {
		path := filepath.Join(os.Args[1], filepath.FromSlash(name))
		if err := os.MkdirAll(filepath.Dir(path), 0o755); err != nil {
			log.Fatalf("make: %v", err)
		}
		if err := os.WriteFile(path, all[name], 0o644); err != nil {
			log.Fatalf("make: %v", err)
		}
	}
}

// files returns the bytes of every file by its name below the folder of the
// campaign: "first" and "second" are the two deliveries.
func files() map[string][]byte {
	all := delivery{}
	all.laboratory()
	all.solvers()
	all.monitors()
	all.sheet()
	return all
}

// delivery holds files by name.
type delivery map[string][]byte

func (d delivery) text(name, text string) { d[name] = []byte(text) }

// rng returns the source of scatter of one file. Every file has a seed of its
// own, so that a change of one leaves the others alone.
func rng(seed uint64) *rand.Rand { return rand.New(rand.NewPCG(26, seed)) }

// table is a text table being written.
type table struct {
	bytes.Buffer
	between string
}

func newTable(between string, head ...string) *table {
	t := &table{between: between}
	for _, line := range head {
		t.WriteString(line + "\n")
	}
	return t
}

// row writes one row.
func (t *table) row(cells ...string) { t.WriteString(strings.Join(cells, t.between) + "\n") }

// fixed writes a number with n decimals; a zero has no sign.
func fixed(v float64, n int) string {
	text := strconv.FormatFloat(v, 'f', n, 64)
	if strings.Trim(text, "-0.") == "" {
		return strings.TrimPrefix(text, "-")
	}
	return text
}

func integer(v int) string { return strconv.Itoa(v) }

func round4(v float64) float64 { return math.Round(v*1e4) / 1e4 }

// tap is one pressure tap of the fairing.
type tap struct {
	x, y float64 // over the chord
	d    float64 // measured coefficient
	s    [2]float64
}

// upperTaps are the taps of the upper branch from the leading edge on.
func upperTaps() []tap {
	taps := make([]tap, 24)
	for i := range taps {
		x := 0.02 + 0.95*math.Pow(float64(i)/23, 1.25)
		sB := round4(-1.05*math.Exp(-math.Pow((x-0.16)/0.2, 2)) - 0.35*(1-x) + 0.28*x*x)
		d := sB - errorB[i]
		taps[i] = tap{x: x, y: halfThickness(x), d: d, s: [2]float64{d + errorA[i], sB}}
	}
	return taps
}

// halfThickness is the height of the fairing over its chord line.
func halfThickness(x float64) float64 {
	return thick / 2 * math.Sqrt(x) * (1 - x) / 0.3849001794597505 // the largest value of √x(1−x)
}

// lowerTaps are those of the lower branch from the leading edge on. The level
// is the one for which the lift from the taps of repeat 1 is 0.436.
func lowerTaps() []tap {
	const level = 0.0515
	taps := make([]tap, 24)
	for i := range taps {
		x := 0.026 + 0.94*math.Pow(float64(i)/23, 1.25)
		d := round4(0.62*math.Exp(-x/0.1) - 0.27*math.Exp(-math.Pow((x-0.34)/0.24, 2)) + 0.11*x + level)
		taps[i] = tap{x: x, y: -halfThickness(x), d: d, s: [2]float64{d + 0.03 - 0.01*x, d + 0.012*math.Sin(7*x)}}
	}
	return taps
}

// loop are all taps round the fairing, from the trailing edge over the upper
// side to the leading edge and back below.
func loop() []tap {
	upper := upperTaps()
	taps := make([]tap, 0, 48)
	for i := len(upper) - 1; i >= 0; i-- {
		taps = append(taps, upper[i])
	}
	return append(taps, lowerTaps()...)
}

// tapLift is the lift coefficient that the taps give, by the trapezium rule
// round the closed contour at 4.2 degrees.
func tapLift() float64 {
	taps := loop()
	normal, axial := 0., 0.
	for i := range taps {
		a, b := taps[i], taps[(i+1)%len(taps)]
		p := (a.d + b.d) / 2
		normal += p * (b.x - a.x) // the contour runs from the trailing edge over the upper side
		axial -= p * (b.y - a.y)
	}
	alpha := 4.2 * math.Pi / 180
	return normal*math.Cos(alpha) - axial*math.Sin(alpha)
}

func invented(line string) string { return "# " + line + " (invented)" }

func runName(c, model, grid string) string { return fmt.Sprintf("%s-%s-%s", c, model, grid) }

// Command make writes the files of the demo campaign into the folder it is
// given: go run ./datasets/duct/make datasets/duct. The campaign, the facility
// and every number of it are invented.
package main

import (
	"fmt"
	"log"
	"math"
	"os"
	"path/filepath"
	"strings"
)

// Comparison errors of the two models at the 24 taps of the upper branch,
// which the demo locks as constants.
var (
	errorA = [24]float64{.0382, .0245, .0315, .0160, .0294, .0392, .0409, .0226, .0264, .0282, .0124, .0409, .0345, .0334, .0368, .0278, .0315, .0355, .0349, .0268, .0218, .0340, .0326, .0229}
	errorB = [24]float64{.0046, .0150, .0230, .0243, .0219, .0153, -.0045, -.0092, -.0216, -.0218, -.0114, -.0056, .0083, .0154, .0235, .0233, .0131, .0006, -.0058, -.0152, -.0275, -.0239, -.0092, .0047}
)

func main() {
	if len(os.Args) != 2 {
		log.Fatal("make: give the folder to write into")
	}
	for name, text := range files() {
		if err := os.WriteFile(filepath.Join(os.Args[1], name), []byte(text), 0o644); err != nil {
			log.Fatalf("make: %v", err)
		}
	}
}

// files returns the text of every file by name.
func files() map[string]string {
	var taps, a, b strings.Builder
	taps.WriteString("# Orrowby duct, campaign OR-26, Quillet strut fairing, upper branch (invented)\nx/c,Cp,u(Cp)\n")
	a.WriteString("x/c,Cp\n")
	b.WriteString("x/c,Cp\n")
	for i := range 24 {
		x := 0.02 + 0.95*math.Pow(float64(i)/23, 1.25)
		sB := round4(-1.05*math.Exp(-math.Pow((x-0.16)/0.2, 2)) - 0.35*(1-x) + 0.28*x*x)
		d := sB - errorB[i]
		fmt.Fprintf(&taps, "%.4f,%.4f,0.0060\n", x, d)
		fmt.Fprintf(&a, "%.4f,%.4f\n", x, d+errorA[i])
		fmt.Fprintf(&b, "%.4f,%.4f\n", x, sB)
	}
	return map[string]string{
		"C1-drag-grids.csv": "grid,cells,Cd A,Cd B\nG1,410000,0.03412,0.03155\nG2,980000,0.03287,0.03068\nG3,2350000,0.03217,0.03021\nG4,5600000,0.03178,0.02995\n",
		"C1-balance.csv":    "# Orrowby duct, campaign OR-26, balance, five runs over three days (invented)\nrun,Cd\n1,0.02951\n2,0.02968\n3,0.02958\n4,0.02983\n5,0.02940\n",
		"C1-taps-upper.csv": taps.String(),
		"C1-A-G4-cp.csv":    a.String(),
		"C1-B-G4-cp.csv":    b.String(),
	}
}

func round4(v float64) float64 { return math.Round(v*1e4) / 1e4 }

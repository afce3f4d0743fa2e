// Command bench prints how fast the core reads, resamples and compares a million
// rows, natively and under js/wasm, beside pandas, numpy and scipy on the same
// input, as ratios.
//
// It is started by make bench from the root of the repository. Times are the best
// of five runs on both sides, one run at a time. It says nothing about accuracy:
// the packages' tests do.
package main

import (
	"encoding/json"
	"flag"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
)

// row is one line of the table: a benchmark of ours and what stands beside it.
type row struct {
	what      string
	folder    string
	benchmark string
	beside    []string
}

var rows = []row{
	{"read 1,000,000 x 3", "tablefile", "BenchmarkRead1M", []string{"pandas.read_csv", "numpy.loadtxt"}},
	{"read 1,000,000 x 3, blanks", "tablefile", "BenchmarkRead1MSpaces", []string{"pandas, blanks", "numpy, blanks"}},
	{"read 1,000,000 x 3, zone", "tablefile", "BenchmarkRead1MZone", []string{"pandas, zone", "numpy, zone"}},
	{"interpolate 1,000,000, linear", "interpolate", "BenchmarkLinear1M", []string{"numpy.interp"}},
	{"resample 1,000,000, linear", "station", "BenchmarkResample1MLinear", []string{"numpy, same work"}},
	{"resample 1,000,000, monotone", "station", "BenchmarkResample1MMonotone", []string{"scipy, same work"}},
	{"compare 1,000,000", "comparison", "BenchmarkPointwise1M", []string{"numpy arithmetic"}},
}

// beside is what the Python program prints.
type beside struct {
	Bytes    int64
	Versions string
	Seconds  map[string]float64
}

func main() {
	python := flag.String("python", "python3", "Python with numpy, scipy and pandas")
	flag.Parse()
	if err := run(*python); err != nil {
		fmt.Fprintln(os.Stderr, "bench:", err)
		os.Exit(1)
	}
}

func run(python string) error {
	theirs, err := timePython(python)
	if err != nil {
		return err
	}
	native, err := timeGo(false)
	if err != nil {
		return err
	}
	wasm, err := timeGo(true)
	if err != nil {
		return err
	}
	lines, err := table(native, wasm, theirs)
	fmt.Println(strings.Join(lines, "\n"))
	return err
}

// table returns the printed lines. A benchmark that did not report is an error,
// after the lines of those that did.
func table(native, wasm map[string]float64, theirs beside) ([]string, error) {
	lines := []string{
		fmt.Sprintf("input %d bytes; best of five runs; %s", theirs.Bytes, theirs.Versions),
		"a ratio below 1 is faster than what stands beside; reading includes the hash of the file,",
		"resampling the uncertainty of the interpolation (beside it too) and the checks of order, gaps and range (not beside it)",
		"",
		fmt.Sprintf("%-30s %10s %10s   %-18s %10s %8s %8s", "", "native s", "js/wasm s", "beside", "s", "native", "js/wasm"),
	}
	var silent []string
	for _, r := range rows {
		own, ownWasm := native[r.benchmark], wasm[r.benchmark]
		if own == 0 || ownWasm == 0 {
			silent = append(silent, r.benchmark)
			continue
		}
		for _, name := range r.beside {
			other := theirs.Seconds[name]
			if other == 0 {
				silent = append(silent, name)
				continue
			}
			lines = append(lines, fmt.Sprintf("%-30s %10.4f %10.4f   %-18s %10.4f %8.2f %8.2f",
				r.what, own, ownWasm, name, other, own/other, ownWasm/other))
		}
	}
	if len(silent) > 0 {
		return lines, fmt.Errorf("no time from %s", strings.Join(silent, ", "))
	}
	return lines, nil
}

// timePython runs the Python side. Some machines force an old kernel of its
// linear-algebra library by variables that slow it down: they are left out.
func timePython(python string) (beside, error) {
	var out beside
	folder := filepath.Join(".cache", "bench")
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return out, err
	}
	cmd := exec.Command(python, filepath.Join("testdata", "bench", "bench.py"), folder)
	for _, variable := range os.Environ() {
		if !strings.HasPrefix(variable, "OPENBLAS_CORETYPE=") && !strings.HasPrefix(variable, "OPENBLAS_L2_SIZE=") {
			cmd.Env = append(cmd.Env, variable)
		}
	}
	cmd.Stderr = os.Stderr
	printed, err := cmd.Output()
	if err != nil {
		return out, fmt.Errorf("%s: %w", cmd, err)
	}
	if err := json.Unmarshal(printed, &out); err != nil {
		return out, fmt.Errorf("reading what %s printed: %w", cmd, err)
	}
	return out, nil
}

// timeGo runs the benchmarks of the table and returns the best seconds of each.
func timeGo(wasm bool) (map[string]float64, error) {
	arguments := []string{"test", "-tags", "noasm", "-run", "^$", "-benchtime", "1x", "-count", "5", "-p", "1"}
	var environment []string
	if wasm {
		root, err := exec.Command("go", "env", "GOROOT").Output()
		if err != nil {
			return nil, fmt.Errorf("go env GOROOT: %w", err)
		}
		arguments = append(arguments, "-exec", filepath.Join(strings.TrimSpace(string(root)), "lib", "wasm", "go_js_wasm_exec"))
		// The runtime of js/wasm holds arguments and environment in one small block.
		for _, name := range []string{"PATH", "HOME", "GOFLAGS", "GOPATH", "GOMODCACHE", "GOCACHE", "GOTOOLCHAIN"} {
			if value, set := os.LookupEnv(name); set {
				environment = append(environment, name+"="+value)
			}
		}
		environment = append(environment, "GOOS=js", "GOARCH=wasm")
	} else {
		environment = os.Environ()
	}
	best := map[string]float64{}
	for _, r := range rows {
		one := append(append([]string{}, arguments...), "-bench", "^"+r.benchmark+"$", "./core/"+r.folder)
		cmd := exec.Command("go", one...)
		cmd.Env = environment
		printed, err := cmd.CombinedOutput()
		if err != nil {
			return nil, fmt.Errorf("%s:\n%s%w", r.benchmark, printed, err)
		}
		keepBest(best, string(printed))
	}
	return best, nil
}

// keepBest notes the least seconds of each benchmark in the output of go test.
func keepBest(best map[string]float64, printed string) {
	for _, line := range strings.Split(printed, "\n") {
		fields := strings.Fields(line)
		if len(fields) < 4 || !strings.HasPrefix(fields[0], "Benchmark") || fields[3] != "ns/op" {
			continue
		}
		var nanoseconds float64
		if _, err := fmt.Sscanf(fields[2], "%g", &nanoseconds); err != nil {
			continue
		}
		// The name ends in "-N" where more than one processor is used.
		name, _, _ := strings.Cut(fields[0], "-")
		if seconds := nanoseconds / 1e9; best[name] == 0 || seconds < best[name] {
			best[name] = seconds
		}
	}
}

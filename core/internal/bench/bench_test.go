package main

import (
	"strings"
	"testing"
)

func TestKeepBest(t *testing.T) {
	printed := `goos: linux
BenchmarkRead1M-2   	       1	 120000000 ns/op	 325.0 MB/s
BenchmarkRead1M-2   	       1	 100000000 ns/op	 390.0 MB/s
BenchmarkRead1M-2   	       1	 110000000 ns/op	 350.0 MB/s
BenchmarkOther      	       1	 2.5 ns/op
BenchmarkBroken
ok  	weirmark/core/tablefile	1.0s
`
	best := map[string]float64{}
	keepBest(best, printed)
	if len(best) != 2 || best["BenchmarkRead1M"] != 0.1 || best["BenchmarkOther"] != 2.5e-9 {
		t.Errorf("%v", best)
	}
}

func TestTable(t *testing.T) {
	native, wasm := map[string]float64{}, map[string]float64{}
	theirs := beside{Bytes: 39, Versions: "v", Seconds: map[string]float64{}}
	for _, r := range rows {
		native[r.benchmark], wasm[r.benchmark] = 0.1, 0.3
		for _, name := range r.beside {
			theirs.Seconds[name] = 0.2
		}
	}
	lines, err := table(native, wasm, theirs)
	if err != nil || !strings.HasSuffix(lines[len(lines)-1], "0.2000     0.50     1.50") {
		t.Errorf("%v, %q", err, lines)
	}
	delete(wasm, rows[0].benchmark)
	if _, err := table(native, wasm, theirs); err == nil || !strings.Contains(err.Error(), rows[0].benchmark) {
		t.Errorf("a benchmark without a time: %v", err)
	}
}

// Command faulty stands in for the core where a test needs one that fails: it
// ends by a panic, works without end, or says what it got.
package main

import (
	"bytes"
	"fmt"

	"weirmark/wasm/bridge"
)

func main() {
	var opened []byte
	calls := 0
	bridge.Serve(func(request []byte, attached [][]byte) ([]byte, [][]byte) {
		calls++
		switch {
		case bytes.Contains(request, []byte(`"kind":"panic"`)):
			panic("asked to fail")
		case bytes.Contains(request, []byte(`"kind":"hang"`)):
			for {
				calls++
			}
		case bytes.Contains(request, []byte(`"kind":"open"`)):
			opened = attached[0]
			if bytes.Equal(opened, []byte("broken")) {
				panic("asked to fail on opening")
			}
		}
		total := 0
		for _, file := range attached {
			total += len(file)
		}
		return fmt.Appendf(nil, `{"calls":%d,"opened":%q,"bytes":%d,"request":%s}`, calls, opened, total, request), attached
	})
}

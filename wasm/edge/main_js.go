// Command edge is the edge service: POST /v1/message, answered by the core. The
// entry beside it serves the page itself, without starting this program.
package main

import (
	"github.com/syumai/workers"

	"weirmark/core/message"
	"weirmark/wasm/edge/door"
)

func main() {
	workers.Serve(door.Handler(func() door.Handle { return new(message.Session).Handle }))
}

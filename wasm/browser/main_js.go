// Command browser is what the page's worker runs: the core behind one function.
package main

import (
	"weirmark/core/message"
	"weirmark/wasm/bridge"
)

func main() {
	session := &message.Session{Progress: bridge.Progress}
	bridge.Serve(session.Handle)
}

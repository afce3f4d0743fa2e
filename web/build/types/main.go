// Command types writes web/engine/types.ts: the requests and replies of
// core/message as TypeScript, so that the page cannot ask in another shape than
// the core understands.
//
//	go run ./web/build/types
//
// It is started in the root of the repository. Its test fails where the file is
// not what the Go types come to.
package main

import (
	"fmt"
	"os"

	"weirmark/core/message"
)

// target is the file written, from the root of the repository.
const target = "web/engine/types.ts"

func main() {
	text, err := typescript(message.Types())
	if err == nil {
		err = os.WriteFile(target, []byte(text), 0o644)
	}
	if err != nil {
		fmt.Fprintln(os.Stderr, "types:", err)
		os.Exit(1)
	}
	fmt.Println(target)
}

// Command build makes the front-end parts.
//
//	go run ./web/build figures    the drawing part, for the command
//	go run ./web/build page       the page, as one file and as a site
//	go run ./web/build serve      shows the site to browsers of this machine
//	go run ./web/build edge       builds the edge service and runs it here
//
// It is started in the root of the repository, after npm ci in web. It ends
// with status 1 and the bundler's own messages where a part does not build.
package main

import (
	"fmt"
	"os"
	"sort"
	"strings"
)

// commands are the subcommands; each takes the arguments after its name and
// prints what it wrote.
var commands = map[string]func(arguments []string) error{
	"figures": figures,
	"page":    page,
	"serve":   serve,
	"edge":    edge,
}

func main() {
	if len(os.Args) < 2 || commands[os.Args[1]] == nil {
		names := make([]string, 0, len(commands))
		for name := range commands {
			names = append(names, name)
		}
		sort.Strings(names)
		fmt.Fprintf(os.Stderr, "usage: build %s\n", strings.Join(names, "|"))
		os.Exit(2)
	}
	if err := commands[os.Args[1]](os.Args[2:]); err != nil {
		fmt.Fprintf(os.Stderr, "build: %v\n", err)
		os.Exit(1)
	}
}

// Command weirmark is the headless host of the core: it moves files and flags
// to the message door and prints what comes back. See README.md.
//
// It exits with 0 when done, 2 when evidence is incomplete, 3 when the input
// was refused or the usage was wrong, 4 on a fault of its own.
package main

import (
	"fmt"
	"io"
	"os"
	"runtime/debug"

	"weirmark/core/message"
)

// internal is the status of a fault of our own.
const internal = 4

const usage = `weirmark read FILE [--card] [--json]
weirmark grids FILE [--size COL] [--value COL] [--dim 1|2|3] [--formal NUMBER] [--limits on|off] [--rule RULE] [--json]
                 RULE: three, two, formal-order, least-squares, correction-factor, factor-of-safety, data-range
weirmark compare --sim FILE[@TABLE] --ref FILE[@TABLE] --x COL --y COL [--ref-x COL] [--ref-y COL]
                 [--u COL|NUMBER|NUMBER%] [--u-k NUMBER] [--u-common COL|NUMBER] [--u-num COL|NUMBER] [--u-input NUMBER]
                 [--u-interp on|off] [--interp linear|monotone] [--k NUMBER] [--json]
weirmark shelf [NAME] [--set NAME=VALUE,...] [--at NUMBER,...] [--curve NAME]
weirmark run STUDY --out DIR
weirmark run STUDY --why PATH [--json]      PATH of a number in report.json, such as cells.0.stations.0.e: its formula, inputs, file and row
weirmark demo DIR [--state received|worked|review]

Exit: 0 done, 2 evidence incomplete, 3 input refused or wrong usage, 4 internal fault.
`

func main() { os.Exit(run(os.Args[1:], os.Stdout, os.Stderr)) }

// run runs one command and returns its exit status.
func run(args []string, out, errs io.Writer) (status int) {
	defer func() {
		if fault := recover(); fault != nil {
			fmt.Fprintf(errs, "weirmark: internal fault: %v\n%s", fault, debug.Stack())
			status = internal
		}
	}()
	if len(args) == 0 {
		fmt.Fprint(errs, usage)
		return message.Refused
	}
	commands := map[string]struct {
		flags map[string]bool // by name: whether it takes a value
		do    func(*invocation) (int, error)
	}{
		"read":    {map[string]bool{"json": false, "card": false}, read},
		"grids":   {map[string]bool{"json": false, "size": true, "value": true, "dim": true, "limits": true, "rule": true, "formal": true}, grids},
		"compare": {map[string]bool{"json": false, "sim": true, "ref": true, "x": true, "y": true, "ref-x": true, "ref-y": true, "u": true, "u-k": true, "u-common": true, "u-num": true, "u-input": true, "u-interp": true, "interp": true, "k": true}, compare},
		"shelf":   {map[string]bool{"set": true, "at": true, "curve": true}, runShelf},
		"run":     {map[string]bool{"out": true, "why": true, "json": false}, runStudy},
		"demo":    {map[string]bool{"state": true}, runDemo},
	}
	if args[0] == "help" || args[0] == "--help" || args[0] == "-h" {
		fmt.Fprint(out, usage)
		return message.Done
	}
	c, known := commands[args[0]]
	if !known {
		fmt.Fprintf(errs, "weirmark: there is no command %q\n%s", args[0], usage)
		return message.Refused
	}
	v := &invocation{out: out, errs: errs}
	if err := v.parse(args[1:], c.flags); err != nil {
		fmt.Fprintf(errs, "weirmark %s: %v\n%s", args[0], err, usage)
		return message.Refused
	}
	status, err := c.do(v)
	if err != nil {
		fmt.Fprintf(errs, "weirmark %s: %v\n", args[0], err)
		if status == message.Done {
			status = message.Refused
		}
	}
	return status
}

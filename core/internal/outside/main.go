// Command outside runs the tests that hold the program against the outside, as
// testdata/published/checks.csv names them, and compares the page
// testdata/published/README.md with what they came to. With -write it writes
// the page anew. It is started from the root of the repository:
//
//	go run -tags noasm ./core/internal/outside -write
//
// It exits with 1 where a test failed or was not made, or where the page
// differs; a page on which a check was not made is never written. It cannot
// tell whether a test asserts what its row says.
package main

import (
	"flag"
	"fmt"
	"os"
	"path/filepath"
)

var (
	folder = filepath.Join("testdata", "published")
	list   = filepath.Join(folder, "checks.csv")
	page   = filepath.Join(folder, "README.md")
)

func main() {
	flags := flag.NewFlagSet("outside", flag.ExitOnError)
	write := flags.Bool("write", false, "write the page instead of comparing it")
	flags.Parse(os.Args[1:]) // ends the program where it fails
	if err := run(*write); err != nil {
		fmt.Fprintln(os.Stderr, "outside:", err)
		os.Exit(1)
	}
}

// run makes the page and compares or writes it; the error says what is wrong.
func run(write bool) error {
	data, err := os.ReadFile(list)
	if err != nil {
		return err
	}
	checks, err := read(data)
	if err != nil {
		return err
	}
	states, err := results(checks)
	if err != nil {
		return err
	}
	made, err := render(checks, states)
	if err != nil {
		return err
	}
	fmt.Println(summary(checks, states))
	for i, c := range checks {
		if states[i] != passed {
			fmt.Printf("%s: %s %s\n", states[i], c.File, c.Test)
		}
	}
	missing := count(states, notMade)
	if missing > 0 {
		return fmt.Errorf("%d checks were not made, so the page can be neither compared nor written: is the folder shared here?", missing)
	}
	if write {
		if err := os.WriteFile(page, made, 0o644); err != nil {
			return err
		}
	} else if committed, err := os.ReadFile(page); err != nil {
		return err
	} else if string(committed) != string(made) {
		return fmt.Errorf("%s differs (- committed, + now); with -write it is written:\n%s",
			filepath.ToSlash(page), difference(string(committed), string(made)))
	}
	if failures := count(states, failed); failures > 0 {
		return fmt.Errorf("%d checks failed", failures)
	}
	return nil
}

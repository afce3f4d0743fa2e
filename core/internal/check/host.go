package main

import (
	"bufio"
	"bytes"
	"io"
	"os"
	"os/exec"
	"strings"
)

// target is where Go code is built for and run.
type target struct {
	name string
	wasm bool
}

var (
	native = target{name: "native"}
	wasm   = target{name: "js/wasm", wasm: true}
)

// nativeOnly are packages that are no part of what runs under js/wasm.
var nativeOnly = []string{"weirmark/core/cmd", "weirmark/core/internal/check", "weirmark/core/internal/bench", "weirmark/core/internal/outside", "weirmark/web"}

// kept are the variables that a run under js/wasm gets. Its runtime holds
// arguments and environment in one small block, so all others are left out.
var kept = []string{
	"PATH", "HOME", "TMPDIR", "CI", "WEIRMARK_SHARED",
	"GOFLAGS", "GOPATH", "GOMODCACHE", "GOCACHE", "GOPROXY", "GOSUMDB", "GOTOOLCHAIN",
}

// environment returns the variables of a run on the target.
func (t target) environment() []string {
	if !t.wasm {
		return os.Environ()
	}
	environment := []string{"GOOS=js", "GOARCH=wasm"}
	for _, name := range kept {
		if value, set := os.LookupEnv(name); set {
			environment = append(environment, name+"="+value)
		}
	}
	return environment
}

// command returns a call of the go tool for the target. The tag noasm keeps
// one set of floating-point bits on every host.
func (t target) command(verb string, arguments ...string) *exec.Cmd {
	all := []string{verb, "-tags", "noasm"}
	cmd := exec.Command("go", append(all, arguments...)...)
	cmd.Env = t.environment()
	return cmd
}

// packages lists the packages of the pattern that the target runs, those that
// do not build among them: they fail under their own name.
func (t target) packages(pattern string) ([]string, error) {
	cmd := t.command("list", "-e", pattern)
	cmd.Stderr = os.Stderr
	out, err := cmd.Output()
	if err != nil {
		return nil, err
	}
	var packages []string
	for _, name := range strings.Fields(string(out)) {
		if !t.wasm || !isNativeOnly(name) {
			packages = append(packages, name)
		}
	}
	return packages, nil
}

func isNativeOnly(name string) bool {
	for _, prefix := range nativeOnly {
		if name == prefix || strings.HasPrefix(name, prefix+"/") {
			return true
		}
	}
	return false
}

// lines calls each with every line that the command prints, its errors
// included, and returns how the command ended.
func lines(cmd *exec.Cmd, each func(string)) error {
	reader, writer := io.Pipe()
	cmd.Stdout = writer
	cmd.Stderr = writer
	ended := make(chan error, 1)
	go func() {
		err := cmd.Run()
		writer.Close()
		ended <- err
	}()
	buffered := bufio.NewReader(reader)
	for {
		line, err := buffered.ReadString('\n')
		if line != "" {
			each(strings.TrimSuffix(line, "\n"))
		}
		if err != nil {
			return <-ended
		}
	}
}

// show runs a command, passes its output on and returns it.
func show(cmd *exec.Cmd) (string, error) {
	var output bytes.Buffer
	both := io.MultiWriter(os.Stdout, &output)
	cmd.Stdout = both
	cmd.Stderr = both
	err := cmd.Run()
	return output.String(), err
}

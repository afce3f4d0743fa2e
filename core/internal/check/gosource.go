package main

import (
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
)

// checkFormat passes where gofmt would change no Go file of ours.
func checkFormat(t *tally) {
	arguments := []string{"-l"}
	for _, folder := range []string{"core", "wasm", "web/build"} {
		if _, err := os.Stat(folder); err == nil {
			arguments = append(arguments, folder)
		}
	}
	cmd := exec.Command("gofmt", arguments...)
	cmd.Stderr = os.Stderr
	out, err := cmd.Output()
	for _, name := range strings.Fields(string(out)) {
		fmt.Println(name)
		t.fail("gofmt: " + name)
	}
	if err != nil && len(t.failed) == 0 {
		t.fail("gofmt: " + err.Error())
	}
	if len(t.failed) == 0 {
		t.pass(1)
	}
}

// vet runs go vet on the packages that the target runs.
func vet(t *tally, on target, pattern string) {
	name := "go vet " + on.name
	packages, err := on.packages(pattern)
	if err != nil {
		t.fail(name + ": the packages could not be listed")
		return
	}
	if _, err := show(on.command("vet", packages...)); err != nil {
		t.fail(name)
		return
	}
	t.pass(1)
}

// elsewhere are texts that belong to one machine or one network and to no
// committed file. They are put together here so that this file has none.
var elsewhere = []string{
	"/" + "work/main", "/" + "work/shared", "/" + "root/",
	"registry." + "npmjs", "proxy." + "golang.org", "deb." + "debian.org", "pypi." + "org",
}

// checkCommitted passes where no file under version control, or about to be,
// names a registry host or a folder of one machine.
func checkCommitted(t *tally) {
	out, err := exec.Command("git", "ls-files", "-z", "--cached", "--others", "--exclude-standard").Output()
	if err != nil {
		t.fail("committed text: git ls-files: " + err.Error())
		return
	}
	read := 0
	for _, name := range strings.Split(strings.TrimSuffix(string(out), "\x00"), "\x00") {
		data, err := os.ReadFile(filepath.FromSlash(name))
		if os.IsNotExist(err) {
			continue // removed, not yet committed
		}
		if err != nil {
			t.fail("committed text: " + err.Error())
			continue
		}
		read++
		for _, where := range foreign(string(data)) {
			t.fail("committed text: " + name + ":" + where)
		}
	}
	if read == 0 {
		t.fail("committed text: no file was read")
	}
	if len(t.failed) == 0 {
		fmt.Printf("%d files read\n", read)
		t.pass(1)
	}
}

// foreign returns "line: text" for every place that names something of elsewhere.
func foreign(data string) []string {
	var found []string
	for number, line := range strings.Split(data, "\n") {
		for _, text := range elsewhere {
			if strings.Contains(line, text) {
				found = append(found, fmt.Sprintf("%d: %s", number+1, text))
			}
		}
	}
	return found
}

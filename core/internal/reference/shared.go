// Package reference holds exact problems and published worked examples used
// by the tests of more than one package, and the way to the shared files.
package reference

import (
	"os"
	"path/filepath"
	"testing"
)

// Shared returns the bytes of a file of the shared folder that lies beside
// the repository (or at WEIRMARK_SHARED). Where the folder is absent a test
// cannot check what it promises: under CI=true that fails, elsewhere the test
// is skipped by name and counted by the runner.
func Shared(t testing.TB, name string) []byte {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(SharedDir(t), filepath.FromSlash(name)))
	if err != nil {
		t.Fatalf("shared file: %v", err)
	}
	return data
}

// SharedDir returns the folder of the shared files, or ends the test as
// Shared does.
func SharedDir(t testing.TB) string {
	t.Helper()
	if dir := os.Getenv("WEIRMARK_SHARED"); dir != "" {
		return dir
	}
	dir, err := os.Getwd()
	if err != nil {
		t.Fatalf("working folder: %v", err)
	}
	for {
		candidate := filepath.Join(dir, "shared", "nasa-tmr")
		if info, err := os.Stat(candidate); err == nil && info.IsDir() {
			return filepath.Dir(candidate)
		}
		up := filepath.Dir(dir)
		if up == dir {
			break
		}
		dir = up
	}
	if os.Getenv("CI") == "true" {
		t.Fatal("the shared folder is absent and CI=true: this check cannot be left out")
	}
	t.Skip("the shared folder is absent: this check against outside files was not made")
	return ""
}

// Root returns the folder of go.mod.
func Root(t testing.TB) string {
	t.Helper()
	dir, err := os.Getwd()
	if err != nil {
		t.Fatalf("working folder: %v", err)
	}
	for {
		if _, err := os.Stat(filepath.Join(dir, "go.mod")); err == nil {
			return dir
		}
		up := filepath.Dir(dir)
		if up == dir {
			t.Fatal("no go.mod above the test's folder")
		}
		dir = up
	}
}

package main

import (
	"bytes"
	"compress/gzip"
	"crypto/sha256"
	"encoding/base64"
	"flag"
	"fmt"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"text/template"

	"github.com/evanw/esbuild/pkg/api"
)

// Where the page is built from and to, from the root of the repository.
const (
	pageEntry    = "web/parts/main.tsx"
	pageTemplate = "web/parts/page.html"
	workerEntry  = "web/engine/worker.ts"
	corePackage  = "./wasm/browser"
	singlePage   = "weirmark.html"
	siteFolder   = "site"
)

// parts are what a page is made of.
type parts struct {
	// script and style are the bundled front end.
	script, style string
	// worker is the program of the worker, carried as text.
	worker string
	// core is the program of the core for js/wasm.
	core []byte
}

// page builds the single page and the same in parts.
func page(arguments []string) error {
	flags := flag.NewFlagSet("page", flag.ContinueOnError)
	out := flags.String("out", "dist", "folder to write to")
	corePath := flags.String("core", corePackage, "Go package that answers in the worker")
	entry := flags.String("entry", pageEntry, "entry point of the front end")
	if err := flags.Parse(arguments); err != nil {
		return err
	}
	p, err := makeParts(".", *entry, *corePath)
	if err != nil {
		return err
	}
	single, err := p.single(".")
	if err != nil {
		return err
	}
	site, err := p.site(".")
	if err != nil {
		return err
	}
	if err := writeFiles(*out, map[string][]byte{singlePage: single}); err != nil {
		return err
	}
	folder := filepath.Join(*out, siteFolder)
	// Files of an earlier build have other names and would be served for ever.
	if err := os.RemoveAll(folder); err != nil {
		return err
	}
	if err := writeFiles(folder, site); err != nil {
		return err
	}
	fmt.Printf("%s: %d kB, %d kB as gzip\n", filepath.Join(*out, singlePage), len(single)/1000, len(pack(single))/1000)
	return nil
}

// makeParts bundles the front end and builds the core, from the repository at root.
func makeParts(root, entry, corePath string) (*parts, error) {
	front, err := bundle(root, entry)
	if err != nil {
		return nil, err
	}
	worker, err := bundle(root, workerEntry)
	if err != nil {
		return nil, err
	}
	core, err := buildCore(root, corePath)
	if err != nil {
		return nil, err
	}
	return &parts{script: front[".js"], style: front[".css"], worker: worker[".js"], core: core}, nil
}

// wordy lists packages that make text or are asked once in a while. Inlining
// makes their code larger and nothing visibly faster: without it the page is
// 0.2 MB smaller. What reads, resamples and compares is left alone.
var wordy = []string{
	"weirmark/core/memo", "weirmark/core/chart", "weirmark/core/sentence", "weirmark/core/message", "weirmark/core/study",
	"weirmark/core/settling", "weirmark/core/plausibility", "weirmark/core/notice",
	"regexp", "regexp/syntax", "encoding/xml", "encoding/json",
	"archive/zip", "time", "fmt", "reflect", "gonum.org/v1/gonum/lapack/gonum", "gonum.org/v1/gonum/mat",
}

// small returns the compiler flags that leave inlining out of the wordy
// packages.
func small() []string {
	var flags []string
	for _, name := range wordy {
		flags = append(flags, "-gcflags="+name+"=-l")
	}
	return flags
}

// bundle returns what an entry point comes to, by the ending of the file.
func bundle(root, entry string) (map[string]string, error) {
	folder, err := filepath.Abs(root)
	if err != nil {
		return nil, err
	}
	result := api.Build(api.BuildOptions{
		AbsWorkingDir:     folder,
		EntryPoints:       []string{entry},
		Tsconfig:          filepath.Join(folder, "web", "tsconfig.json"), // not whatever lies above the checkout
		Outdir:            "dist",
		Bundle:            true,
		Format:            api.FormatIIFE,
		Platform:          api.PlatformBrowser,
		Target:            api.ES2022,
		JSX:               api.JSXAutomatic,
		JSXImportSource:   "preact",
		MinifyWhitespace:  true,
		MinifyIdentifiers: true,
		MinifySyntax:      true,
		LogLevel:          api.LogLevelWarning,
		Plugins:           []api.Plugin{startProgram},
	})
	if len(result.Errors) > 0 {
		return nil, fmt.Errorf("%s could not be bundled", entry)
	}
	files := map[string]string{}
	for _, file := range result.OutputFiles {
		files[filepath.Ext(file.Path)] = string(file.Contents)
	}
	return files, nil
}

// startProgram lets the front end import "go:wasm_exec", the file of the Go tool
// that starts a program for js/wasm and has to be of the same version.
var startProgram = api.Plugin{
	Name: "start program",
	Setup: func(build api.PluginBuild) {
		build.OnResolve(api.OnResolveOptions{Filter: `^go:wasm_exec$`}, func(api.OnResolveArgs) (api.OnResolveResult, error) {
			root, err := exec.Command("go", "env", "GOROOT").Output()
			if err != nil {
				return api.OnResolveResult{}, err
			}
			return api.OnResolveResult{Path: filepath.Join(strings.TrimSpace(string(root)), "lib", "wasm", "wasm_exec.js")}, nil
		})
	},
}

// buildCore builds a package for js/wasm, without the names that only a
// debugger needs, and returns the program.
func buildCore(root, corePath string) ([]byte, error) {
	folder, err := os.MkdirTemp("", "core")
	if err != nil {
		return nil, err
	}
	defer os.RemoveAll(folder)
	name := filepath.Join(folder, "core.wasm")
	build := exec.Command("go", append(append([]string{"build", "-tags", "noasm", "-trimpath", "-ldflags=-s -w"}, small()...), "-o", name, corePath)...)
	build.Dir = root
	build.Env = append(os.Environ(), "GOOS=js", "GOARCH=wasm")
	build.Stderr = os.Stderr
	if err := build.Run(); err != nil {
		return nil, fmt.Errorf("building %s for js/wasm: %w", corePath, err)
	}
	return os.ReadFile(name)
}

// single returns the page that needs no other file.
func (p *parts) single(root string) ([]byte, error) {
	pressed, err := press(p.core)
	if err != nil {
		return nil, err
	}
	return render(root, map[string]string{
		"Policy": filePolicy(p.script),
		"Style":  "<style>" + p.style + "</style>",
		"Worker": p.worker,
		"Core":   `<script type="text/plain" id="core">` + base64.StdEncoding.EncodeToString(pressed) + "</script>",
		"Script": "<script>" + p.script + "</script>",
	}, p.script, p.worker, p.style)
}

// site returns the same page as files; names carry a hash of the content.
func (p *parts) site(root string) (map[string][]byte, error) {
	script := hashedName("page", ".js", []byte(p.script))
	style := hashedName("page", ".css", []byte(p.style))
	core := hashedName("core", ".wasm", p.core)
	index, err := render(root, map[string]string{
		"Policy": sitePolicy,
		"Style":  `<link rel="stylesheet" href="` + style + `">`,
		"Worker": p.worker,
		"Core":   `<script type="text/plain" id="core" data-address="` + core + `"></script>`,
		"Script": `<script src="` + script + `"></script>`,
	}, p.worker)
	if err != nil {
		return nil, err
	}
	return map[string][]byte{
		"index.html": index,
		script:       []byte(p.script),
		style:        []byte(p.style),
		core:         p.core,
	}, nil
}

// render fills the template. The texts of inside go into elements of the page
// and must not end them.
func render(root string, values map[string]string, inside ...string) ([]byte, error) {
	for _, text := range inside {
		if found := elementEnd.FindString(text); found != "" {
			return nil, fmt.Errorf("a bundle contains %q, which would break the page", found)
		}
	}
	t, err := template.New(filepath.Base(pageTemplate)).Option("missingkey=error").ParseFiles(filepath.Join(root, pageTemplate))
	if err != nil {
		return nil, err
	}
	var out bytes.Buffer
	if err := t.Execute(&out, values); err != nil {
		return nil, err
	}
	return out.Bytes(), nil
}

// elementEnd finds what ends or changes the reading of a script or style
// element, and the line ends that a reader of HTML changes, so that hashes fail.
var elementEnd = regexp.MustCompile(`(?i)</(script|style)|<!--|<script|\r`)

// hashed recognises the names that hashedName gives.
var hashed = regexp.MustCompile(`^[a-z]+\.[0-9a-f]{16}\.[a-z]+$`)

func hashedName(stem, ending string, content []byte) string {
	sum := sha256.Sum256(content)
	return fmt.Sprintf("%s.%x%s", stem, sum[:8], ending)
}

// press returns the core as zstd, a quarter smaller than what browsers unpack
// by themselves; the page brings what unpacks it.
func press(core []byte) ([]byte, error) {
	command := exec.Command("zstd", "-19", "-q", "-c", "-")
	command.Stdin, command.Stderr = bytes.NewReader(core), os.Stderr
	pressed, err := command.Output()
	if err != nil {
		return nil, fmt.Errorf("packing the core by zstd (Debian's package of that name): %w", err)
	}
	return pressed, nil
}

// pack returns the bytes as gzip, as small as it gets; the same bytes each time.
func pack(content []byte) []byte {
	var out bytes.Buffer
	writer, err := gzip.NewWriterLevel(&out, gzip.BestCompression)
	if err != nil {
		panic(err) // the level is a constant that exists
	}
	if _, err := writer.Write(content); err != nil {
		panic(err) // a buffer takes all
	}
	if err := writer.Close(); err != nil {
		panic(err)
	}
	return out.Bytes()
}

// writeFiles writes files by name into a folder that it makes.
func writeFiles(folder string, files map[string][]byte) error {
	if err := os.MkdirAll(folder, 0o755); err != nil {
		return err
	}
	for name, content := range files {
		if err := os.WriteFile(filepath.Join(folder, name), content, 0o644); err != nil {
			return err
		}
	}
	return nil
}

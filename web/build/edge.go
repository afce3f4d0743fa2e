package main

import (
	"bytes"
	"context"
	"encoding/json"
	"flag"
	"fmt"
	"os"
	"os/exec"
	"os/signal"
	"path/filepath"
	"sort"
	"strings"
	"syscall"
	"text/template"
)

// Where the edge service is built from and to.
const (
	edgePackage = "./wasm/edge"
	edgeEntry   = "wasm/edge/entry.mjs"
	edgeFolder  = "edge"
	edgeAddress = "127.0.0.1:8018"
)

// edge builds the edge service from the site that is built already, and runs it
// until Ctrl-C.
func edge(arguments []string) error {
	flags := flag.NewFlagSet("edge", flag.ContinueOnError)
	dist := flags.String("dist", "dist", "folder that holds the site and gets the service")
	at := flags.String("at", edgeAddress, "loopback address and port")
	only := flags.Bool("build", false, "build it and do not run it")
	if err := flags.Parse(arguments); err != nil {
		return err
	}
	folder := filepath.Join(*dist, edgeFolder)
	if err := buildEdge(*dist, folder, *at); err != nil {
		return err
	}
	if *only {
		return nil
	}
	return runEdge(folder, *at)
}

// buildEdge writes a folder that holds all that the runtime needs.
func buildEdge(dist, folder, at string) error {
	site, err := readSite(filepath.Join(dist, siteFolder))
	if err != nil {
		return err
	}
	if err := checkLoopback(at); err != nil {
		return err
	}
	// The library's own start program and shim; its tool empties the folder first.
	assets := exec.Command("go", "tool", "workers-assets-gen", "-mode=go", "-o", folder)
	assets.Stderr = os.Stderr
	if err := assets.Run(); err != nil {
		return fmt.Errorf("writing the start program of the edge service: %w", err)
	}
	program, err := buildCore(".", edgePackage)
	if err != nil {
		return err
	}
	entry, err := os.ReadFile(edgeEntry)
	if err != nil {
		return err
	}
	table, err := siteTable(site)
	if err != nil {
		return err
	}
	config, err := edgeConfig(site, at)
	if err != nil {
		return err
	}
	files := map[string][]byte{"app.wasm": program, "entry.mjs": entry, "site.mjs": table, "config.capnp": config}
	for name, content := range site {
		files[name] = content
	}
	return writeFiles(folder, files)
}

func runEdge(folder, at string) error {
	interrupted, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	// The package says where its program is; what it puts among the commands may
	// be a script, which would not pass an interrupt on.
	where := exec.Command("node", "-p", "require('workerd').default")
	where.Dir = "web"
	where.Stderr = os.Stderr
	program, err := where.Output()
	if err != nil {
		return fmt.Errorf("looking for the runtime of the edge service (make setup): %w", err)
	}
	runtime := exec.CommandContext(interrupted, strings.TrimSpace(string(program)), "serve", filepath.Join(folder, "config.capnp"))
	runtime.Cancel = func() error { return runtime.Process.Signal(os.Interrupt) }
	runtime.Stdout, runtime.Stderr = os.Stdout, os.Stderr
	fmt.Printf("The edge service is at http://%s/ (Ctrl-C ends it)\n", at)
	if err := runtime.Run(); err != nil && interrupted.Err() == nil {
		return err
	}
	return nil
}

// siteTable returns the module that lists the files of the site with the headers
// that each is answered with.
func siteTable(site map[string][]byte) ([]byte, error) {
	var imports, entries strings.Builder
	for i, name := range names(site) {
		headers := map[string]string{}
		for _, h := range siteHeaders(name) {
			headers[h.Name] = h.Value
		}
		text, err := json.Marshal(headers)
		if err != nil {
			return nil, err
		}
		fmt.Fprintf(&imports, "import file%d from %q;\n", i, "./"+dataModule(name))
		fmt.Fprintf(&entries, "  %q: { content: file%d, headers: %s },\n", "/"+name, i, text)
	}
	return []byte(imports.String() + "export const files = {\n  __proto__: null,\n" + entries.String() + "};\n"), nil
}

// dataModule names a file of the site as a module of bytes, apart from the
// modules of code.
func dataModule(name string) string { return "site/" + name }

// edgeConfig returns what the runtime reads: the modules and one loopback socket.
func edgeConfig(site map[string][]byte, at string) ([]byte, error) {
	var out bytes.Buffer
	err := configTemplate.Execute(&out, map[string]any{"Files": names(site), "Address": at})
	return out.Bytes(), err
}

var configTemplate = template.Must(template.New("config").Parse(`using Workerd = import "/workerd/workerd.capnp";

const config :Workerd.Config = (
  services = [
    (name = "edge", worker = .edge),
    # The service calls nobody.
    (name = "nowhere", network = (allow = [])),
  ],
  sockets = [(name = "http", address = "{{.Address}}", http = (), service = "edge")],
);

const edge :Workerd.Worker = (
  compatibilityDate = "2026-01-01",
  modules = [
    (name = "entry.mjs", esModule = embed "entry.mjs"),
    (name = "site.mjs", esModule = embed "site.mjs"),
    (name = "worker.mjs", esModule = embed "worker.mjs"),
    (name = "runtime.mjs", esModule = embed "runtime.mjs"),
    (name = "wasm_exec.js", esModule = embed "wasm_exec.js"),
    (name = "app.wasm", wasm = embed "app.wasm"),
{{- range .Files}}
    (name = "site/{{.}}", data = embed "{{.}}"),
{{- end}}
  ],
  globalOutbound = "nowhere",
);
`))

func names(files map[string][]byte) []string {
	var list []string
	for name := range files {
		list = append(list, name)
	}
	sort.Strings(list)
	return list
}

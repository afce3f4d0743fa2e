package main

import (
	"embed"
	"errors"
	"fmt"
	"io/fs"

	"github.com/dop251/goja"

	"weirmark/core/chart"
)

// scripts holds the drawing part, built from web/figures.
//
//go:embed all:renderer
var scripts embed.FS

// renderer draws figures as SVG with the same script as the page. It is not
// safe for several goroutines.
type renderer struct {
	runtime *goja.Runtime
	parse   goja.Callable // JSON text to a value: its fields keep their order
	draw    goja.Callable
}

// newRenderer starts the drawing part. It fails where the command was built without it.
func newRenderer() (*renderer, error) { return rendererFrom(scripts) }

func rendererFrom(files fs.FS) (*renderer, error) {
	const name = "renderer/figures.js"
	source, err := fs.ReadFile(files, name)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, errors.New("this program was built without its drawing part: build it by make run")
	}
	if err != nil {
		return nil, fmt.Errorf("reading the drawing part: %w", err)
	}
	runtime := goja.New()
	// The script asks for a later call to go on with animations. A still figure
	// is whole at once, so that the call never comes.
	never := func(goja.FunctionCall) goja.Value { return runtime.ToValue(0) }
	for _, name := range []string{"setTimeout", "clearTimeout"} {
		if err := runtime.Set(name, never); err != nil {
			return nil, fmt.Errorf("starting the drawing part: %w", err)
		}
	}
	if _, err := runtime.RunScript(name, string(source)); err != nil {
		return nil, fmt.Errorf("starting the drawing part: %w", err)
	}
	parse, _ := goja.AssertFunction(runtime.Get("JSON").ToObject(runtime).Get("parse"))
	exports := runtime.Get("weirmarkFigures")
	if exports == nil {
		return nil, errors.New("starting the drawing part: it offers nothing")
	}
	draw, found := goja.AssertFunction(exports.ToObject(runtime).Get("draw"))
	if !found {
		return nil, errors.New("starting the drawing part: it has no function draw")
	}
	return &renderer{runtime: runtime, parse: parse, draw: draw}, nil
}

// SVG returns a figure as one SVG element. Every id in it begins with prefix,
// which has to be another one for each figure of a document. The same figure
// and prefix give the same text, whatever was drawn before.
func (r *renderer) SVG(f chart.Figure, prefix string) (string, error) {
	option, err := r.parse(goja.Undefined(), r.runtime.ToValue(string(f.Option)))
	if err != nil {
		return "", fmt.Errorf("reading the option of figure %q: %w", f.ID, err)
	}
	svg, err := r.draw(goja.Undefined(), option, r.runtime.ToValue(f.Width), r.runtime.ToValue(f.Height), r.runtime.ToValue(prefix))
	if err != nil {
		return "", fmt.Errorf("drawing figure %q: %w", f.ID, err)
	}
	return svg.String(), nil
}

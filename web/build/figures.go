package main

import (
	"errors"
	"fmt"
	"os"

	"github.com/evanw/esbuild/pkg/api"
)

// figures bundles web/figures into one script for the command's drawing
// engine, which understands ES2017 and has no document.
func figures(arguments []string) error {
	if len(arguments) > 0 {
		return fmt.Errorf("figures takes no arguments: %q", arguments)
	}
	const out = "core/cmd/weirmark/renderer/figures.js"
	if _, err := os.Stat("web/node_modules/echarts"); err != nil {
		return errors.New("web/node_modules is not there: run make setup")
	}
	result := api.Build(api.BuildOptions{
		EntryPoints:       []string{"web/figures/main.ts"},
		Tsconfig:          "web/tsconfig.json", // not whatever lies above the checkout
		Outfile:           out,
		Bundle:            true,
		Format:            api.FormatIIFE,
		GlobalName:        "weirmarkFigures",
		Target:            api.ES2017,
		Platform:          api.PlatformNeutral,
		MainFields:        []string{"module", "main"},
		MinifyWhitespace:  true,
		MinifySyntax:      true,
		MinifyIdentifiers: true,
		Charset:           api.CharsetASCII,
		LegalComments:     api.LegalCommentsEndOfFile,
		Define:            map[string]string{"process.env.NODE_ENV": `"production"`},
		LogLevel:          api.LogLevelWarning,
		Write:             true,
	})
	if n := len(result.Errors); n > 0 {
		return fmt.Errorf("bundling the figures: %d errors", n)
	}
	size := 0
	for _, file := range result.OutputFiles {
		size += len(file.Contents)
	}
	fmt.Printf("%s, %d kB\n", out, (size+500)/1000)
	return nil
}

// Package duct carries the files of the demo campaign, all invented.
package duct

import "embed"

// Files are the tables of the campaign as a laboratory and two solvers would
// hand them over.
//
//go:embed *.csv
var Files embed.FS

// Package duct carries the files of the demo campaign, all invented.
package duct

import "embed"

// Files are the tables of the campaign as a laboratory and two solvers would
// hand them over, in the folders first and second of the two deliveries.
//
//go:embed first second
var Files embed.FS

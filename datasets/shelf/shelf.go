// Package shelf carries tabulated reference figures, each table with its
// manifest; core/dataset reads them.
package shelf

import "embed"

// Files are the entries: name.json, the manifest, and the table it names.
//
//go:embed *.csv *.json
var Files embed.FS

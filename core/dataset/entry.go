package dataset

import (
	"crypto/sha256"
	"encoding/hex"
	"fmt"
	"io/fs"
	"slices"
	"strings"
)

// Entry is a described table.
type Entry struct {
	Name string
	Manifest
	Rows []Row
}

// HashError says that a table is not the one that its manifest describes.
type HashError struct{ Table, Recorded, Found string }

func (e *HashError) Error() string {
	return fmt.Sprintf("%s has SHA-256 %s, its manifest records %s", e.Table, e.Found, e.Recorded)
}

// Names returns the names of the entries of a folder, sorted.
func Names(folder fs.FS) ([]string, error) {
	files, err := fs.Glob(folder, "*.json")
	if err != nil {
		return nil, fmt.Errorf("listing the entries: %w", err)
	}
	names := make([]string, len(files))
	for i, file := range files {
		names[i] = strings.TrimSuffix(file, ".json")
	}
	slices.Sort(names)
	return names, nil
}

// Open reads the entry name.json and its table from a folder. The errors are
// *ManifestError, *HashError, *RowError, or one of the folder.
func Open(folder fs.FS, name string) (Entry, error) {
	data, err := fs.ReadFile(folder, name+".json")
	if err != nil {
		return Entry{}, fmt.Errorf("opening entry %q: %w", name, err)
	}
	m, err := readManifest(name, data)
	if err != nil {
		return Entry{}, err
	}
	table, err := fs.ReadFile(folder, m.Table)
	if err != nil {
		return Entry{}, fmt.Errorf("opening the table of entry %q: %w", name, err)
	}
	sum := sha256.Sum256(table)
	if found := hex.EncodeToString(sum[:]); found != m.SHA256 {
		return Entry{}, &HashError{m.Table, m.SHA256, found}
	}
	rows, err := readRows(m.Table, table)
	if err != nil {
		return Entry{}, err
	}
	e := Entry{name, m, rows}
	return e, e.fault()
}

// fault refuses rows of a curve that the manifest does not list, a listed
// curve without rows, and a curve whose rows are not together.
func (e Entry) fault() error {
	ended := map[string]bool{}
	for i, r := range e.Rows {
		if !slices.ContainsFunc(e.Curves, func(c CurveOf) bool { return c.Name == r.Curve }) {
			return &RowError{e.Table, i + 2, fmt.Sprintf("curve %q is not in the manifest", r.Curve)}
		}
		if i > 0 && e.Rows[i-1].Curve != r.Curve && ended[r.Curve] {
			return &RowError{e.Table, i + 2, fmt.Sprintf("curve %q goes on behind another one", r.Curve)}
		}
		ended[r.Curve] = true
	}
	for _, c := range e.Curves {
		if !ended[c.Name] {
			return &RowError{e.Table, 0, fmt.Sprintf("curve %q has no rows", c.Name)}
		}
	}
	return nil
}

// Curve returns the rows of a curve, flagged ones among them, in the order of
// the table; none for a name that is not there.
func (e Entry) Curve(name string) []Row {
	var rows []Row
	for _, r := range e.Rows {
		if r.Curve == name {
			rows = append(rows, r)
		}
	}
	return rows
}

// Usable returns stations, values and uncertainties (NaN where none is given)
// of the rows of a curve that are not flagged.
func (e Entry) Usable(name string) (x, value, u []float64) {
	for _, r := range e.Curve(name) {
		if r.Flag == Good {
			x, value, u = append(x, r.X.Value), append(value, r.Value.Value), append(u, r.U.Value)
		}
	}
	return x, value, u
}

package dataset

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"
	"path"
	"regexp"
	"strings"

	"weirmark/core/quantity"
)

// Symbol is a quantity of the table, in a unit that core/quantity knows.
type Symbol struct {
	Name    string `json:"name"`
	Meaning string `json:"meaning"`
	Unit    string `json:"unit"`
}

// Origin is the place in a file of the source that a curve was transcribed
// from: the table counted from one, the columns of station, value and (or zero)
// uncertainty counted from one, and the stations that were taken, all where
// From and To are equal.
type Origin struct {
	File    string  `json:"file"`
	Table   int     `json:"table"`
	Station int     `json:"station"`
	Value   int     `json:"value"`
	U       int     `json:"u"`
	From    float64 `json:"from"`
	To      float64 `json:"to"`
}

// CurveOf describes one curve of the table.
type CurveOf struct {
	Name   string  `json:"name"`
	Origin *Origin `json:"origin,omitempty"` // where the source is a file
}

// Manifest describes an entry. Every text must be given; Uncertainty and
// Coverage may be "none stated" and "not stated", Caveats may be empty.
type Manifest struct {
	Title       string    `json:"title"`
	Kind        Kind      `json:"kind"`
	Source      string    `json:"source"`
	Reach       Reach     `json:"reach"`
	Licence     string    `json:"licence"`
	Transcribed string    `json:"transcribed"` // year-month-day
	Selection   string    `json:"selection"`   // what of the source is here, what was left out
	Uncertainty string    `json:"uncertainty"`
	Coverage    string    `json:"coverage"` // of the column u
	Caveats     []string  `json:"caveats"`
	Station     Symbol    `json:"station"`
	Value       Symbol    `json:"value"`
	Curves      []CurveOf `json:"curves"`
	Table       string    `json:"table"`
	SHA256      string    `json:"sha256"` // of the table's bytes, hexadecimal
}

// ManifestError refuses a manifest. Field is "" where it is not a manifest at
// all.
type ManifestError struct{ Entry, Field, Reason string }

func (e *ManifestError) Error() string {
	if e.Field == "" {
		return fmt.Sprintf("manifest of %s: %s", e.Entry, e.Reason)
	}
	return fmt.Sprintf("manifest of %s: field %q %s", e.Entry, e.Field, e.Reason)
}

var (
	day  = regexp.MustCompile(`^[0-9]{4}-(0[1-9]|1[0-2])-(0[1-9]|[12][0-9]|3[01])$`)
	hash = regexp.MustCompile(`^[0-9a-f]{64}$`)
)

// readManifest decodes and checks the manifest of an entry.
func readManifest(entry string, data []byte) (Manifest, error) {
	var m Manifest
	decoder := json.NewDecoder(bytes.NewReader(data))
	decoder.DisallowUnknownFields()
	if err := decoder.Decode(&m); err != nil {
		return Manifest{}, &ManifestError{entry, "", err.Error()}
	}
	if _, err := decoder.Token(); err != io.EOF {
		return Manifest{}, &ManifestError{entry, "", "more follows behind its end"}
	}
	if field, reason := m.fault(); reason != "" {
		return Manifest{}, &ManifestError{entry, field, reason}
	}
	return m, nil
}

// fault returns the first field that is not as stated, and why.
func (m Manifest) fault() (field, reason string) {
	for _, text := range []struct{ field, text string }{
		{"title", m.Title}, {"source", m.Source}, {"licence", m.Licence}, {"selection", m.Selection},
		{"uncertainty", m.Uncertainty}, {"coverage", m.Coverage},
		{"station.name", m.Station.Name}, {"station.meaning", m.Station.Meaning}, {"station.unit", m.Station.Unit},
		{"value.name", m.Value.Name}, {"value.meaning", m.Value.Meaning}, {"value.unit", m.Value.Unit},
	} {
		if strings.TrimSpace(text.text) == "" {
			return text.field, "is blank"
		}
	}
	switch {
	case m.Kind.Noun() == "":
		return "kind", fmt.Sprintf("is %q: law, correlation, simulation or test", string(m.Kind))
	case !m.Reach.known():
		return "reach", fmt.Sprintf("is %q: seen, quoted, memory or computed", string(m.Reach))
	case !day.MatchString(m.Transcribed):
		return "transcribed", fmt.Sprintf("is %q, not a date as 2001-12-31", m.Transcribed)
	case !hash.MatchString(m.SHA256):
		return "sha256", "is not 64 hexadecimal digits"
	case m.Table == "" || m.Table != path.Base(m.Table):
		return "table", fmt.Sprintf("is %q, not a file of the folder", m.Table)
	case m.Caveats == nil:
		return "caveats", "is missing"
	}
	for _, unit := range []struct{ field, symbol string }{{"station.unit", m.Station.Unit}, {"value.unit", m.Value.Unit}} {
		if _, err := quantity.Parse(unit.symbol); err != nil {
			return unit.field, "is an " + err.Error()
		}
	}
	return m.faultOfCurves()
}

func (m Manifest) faultOfCurves() (field, reason string) {
	if len(m.Curves) == 0 {
		return "curves", "is empty"
	}
	seen := map[string]bool{}
	for _, c := range m.Curves {
		if c.Name == "" || seen[c.Name] {
			return "curves", fmt.Sprintf("has the name %q blank or twice", c.Name)
		}
		seen[c.Name] = true
		if o := c.Origin; o != nil && (o.File == "" || o.Table < 1 || o.Station < 1 || o.Value < 1 || o.U < 0 || o.From > o.To) {
			return "curves", fmt.Sprintf("has an incomplete origin of %q", c.Name)
		}
	}
	return "", ""
}

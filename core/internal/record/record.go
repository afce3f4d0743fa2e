// Package record reads the record of messages that every host plays: the native
// handler, js/wasm and the edge service must give the same bytes.
//
// The record is testdata/messages/*.jsonl, one exchange a line. Each has a session
// of its own unless it continues that of the line before; a service that keeps
// nothing between calls plays only those that do not. Request and reply are JSON texts inside JSON strings, so
// that they are compared byte for byte and no host can reformat them unseen.
package record

import (
	"bytes"
	"encoding/json"
	"fmt"
	"os"
	"path/filepath"
	"sort"
)

// Exchange is one request and what must come back.
type Exchange struct {
	// Name says what the exchange shows; it is unique.
	Name string `json:"name"`
	// Continues says that it is asked in the session of the line before.
	Continues bool `json:"continues,omitempty"`
	// Request is the text of the request.
	Request string `json:"request"`
	// Attached are the bytes that go with it, base64 in the file.
	Attached [][]byte `json:"attached,omitempty"`
	// Reply is the text that must come back.
	Reply string `json:"reply"`
	// Files are the bytes that must come with it.
	Files [][]byte `json:"files,omitempty"`
}

// Read returns the exchanges of a folder, files and lines in order. Two of one
// name, an unknown field and a folder without any are errors.
func Read(folder string) ([]Exchange, error) {
	names, err := filepath.Glob(filepath.Join(folder, "*.jsonl"))
	if err != nil {
		return nil, err
	}
	sort.Strings(names)
	seen := map[string]bool{}
	var all []Exchange
	for _, name := range names {
		exchanges, err := readFile(name)
		if err != nil {
			return nil, err
		}
		for _, exchange := range exchanges {
			if exchange.Name == "" || seen[exchange.Name] {
				return nil, fmt.Errorf("%s: the name %q is empty or used twice", name, exchange.Name)
			}
			seen[exchange.Name] = true
		}
		all = append(all, exchanges...)
	}
	if len(all) == 0 {
		return nil, fmt.Errorf("%s: no message is recorded", folder)
	}
	return all, nil
}

func readFile(name string) ([]Exchange, error) {
	content, err := os.ReadFile(name)
	if err != nil {
		return nil, err
	}
	var exchanges []Exchange
	for number, line := range bytes.Split(bytes.TrimSuffix(content, []byte("\n")), []byte("\n")) {
		decoder := json.NewDecoder(bytes.NewReader(line))
		decoder.DisallowUnknownFields()
		var exchange Exchange
		if err := decoder.Decode(&exchange); err != nil {
			return nil, fmt.Errorf("%s:%d: %w", name, number+1, err)
		}
		if exchange.Continues && number == 0 {
			return nil, fmt.Errorf("%s: the first line has none before it to continue", name)
		}
		exchanges = append(exchanges, exchange)
	}
	return exchanges, nil
}

// Difference says how a host's answer departs from the recorded one, or "".
func (e Exchange) Difference(reply []byte, files [][]byte) string {
	if string(reply) != e.Reply {
		return fmt.Sprintf("reply:\n got  %s\n want %s", reply, e.Reply)
	}
	if len(files) != len(e.Files) {
		return fmt.Sprintf("%d files came back, want %d", len(files), len(e.Files))
	}
	for i := range files {
		if !bytes.Equal(files[i], e.Files[i]) {
			return fmt.Sprintf("file %d has %d bytes that differ from the %d recorded", i, len(files[i]), len(e.Files[i]))
		}
	}
	return ""
}

package record_test

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"sort"
	"strings"
	"testing"

	"weirmark/core/internal/record"
	"weirmark/core/internal/reference"
	"weirmark/core/message"
)

var update = flag.Bool("update", false, "write the replies of the native handler into the record")

// TestNative plays the record through the handler itself, on whichever target
// the test was built for.
func TestNative(t *testing.T) {
	folder := filepath.Join(reference.Root(t), "testdata", "messages")
	if *update {
		rewrite(t, folder)
	}
	exchanges, err := record.Read(folder)
	if err != nil {
		t.Fatal(err)
	}
	var session *message.Session
	for _, exchange := range exchanges {
		if !exchange.Continues {
			session = &message.Session{}
		}
		t.Run(exchange.Name, func(t *testing.T) {
			reply, files := session.Handle([]byte(exchange.Request), exchange.Attached)
			if difference := exchange.Difference(reply, files); difference != "" {
				t.Error(difference)
			}
		})
	}
}

// rewrite puts what the handler answers now in place of the recorded replies.
func rewrite(t *testing.T, folder string) {
	names, err := filepath.Glob(filepath.Join(folder, "*.jsonl"))
	if err != nil {
		t.Fatal(err)
	}
	sort.Strings(names)
	for _, name := range names {
		content, err := os.ReadFile(name)
		if err != nil {
			t.Fatal(err)
		}
		var out bytes.Buffer
		encoder := json.NewEncoder(&out)
		encoder.SetEscapeHTML(false)
		var session *message.Session
		for line := range strings.Lines(string(content)) {
			var exchange record.Exchange
			if err := json.Unmarshal([]byte(line), &exchange); err != nil {
				t.Fatalf("%s: %v", name, err)
			}
			if !exchange.Continues {
				session = &message.Session{}
			}
			reply, files := session.Handle([]byte(exchange.Request), exchange.Attached)
			exchange.Reply, exchange.Files = string(reply), files
			if err := encoder.Encode(exchange); err != nil {
				t.Fatal(err)
			}
		}
		if err := os.WriteFile(name, out.Bytes(), 0o644); err != nil {
			t.Fatal(err)
		}
	}
}

func TestReadRefuses(t *testing.T) {
	for _, row := range []struct{ name, content, want string }{
		{"nothing", "", "EOF"},
		{"unknown field", `{"name":"a","request":"","reply":"","answer":""}`, "answer"},
		{"no name", `{"request":"","reply":""}`, "empty"},
		{"nothing to continue", `{"name":"a","continues":true,"request":"","reply":""}`, "continue"},
		{"a name twice", `{"name":"a","request":"","reply":""}` + "\n" + `{"name":"a","request":"","reply":""}`, "twice"},
	} {
		t.Run(row.name, func(t *testing.T) {
			folder := t.TempDir()
			if err := os.WriteFile(filepath.Join(folder, "one.jsonl"), []byte(row.content), 0o644); err != nil {
				t.Fatal(err)
			}
			if _, err := record.Read(folder); err == nil || !strings.Contains(err.Error(), row.want) {
				t.Errorf("error %v, want one with %q", err, row.want)
			}
		})
	}
	if _, err := record.Read(t.TempDir()); err == nil {
		t.Error("a folder without a record is no error")
	}
}

func TestDifference(t *testing.T) {
	exchange := record.Exchange{Reply: `{"a":1}`, Files: [][]byte{{1, 2}}}
	for _, row := range []struct {
		reply string
		files [][]byte
		same  bool
	}{
		{`{"a":1}`, [][]byte{{1, 2}}, true},
		{`{"a": 1}`, [][]byte{{1, 2}}, false},
		{`{"a":1}`, [][]byte{{1, 3}}, false},
		{`{"a":1}`, nil, false},
	} {
		if difference := exchange.Difference([]byte(row.reply), row.files); (difference == "") != row.same {
			t.Errorf("%s %v: difference %q, want none: %v", row.reply, row.files, difference, row.same)
		}
	}
}

package main

import (
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"weirmark/core/message"
	"weirmark/core/notice"
	"weirmark/core/quantity"
)

// TestDrift fails where the committed file is not what the types come to.
func TestDrift(t *testing.T) {
	want, err := typescript(message.Types())
	if err != nil {
		t.Fatal(err)
	}
	have, err := os.ReadFile(filepath.Join("..", "..", "..", filepath.FromSlash(target)))
	if err != nil {
		t.Fatal(err)
	}
	if string(have) != want {
		t.Errorf("%s is not what core/message holds: go run ./web/build/types", target)
	}
}

type word string

type inner struct {
	Value quantity.Number `json:"value"`
}

type base struct {
	Number int `json:"number"`
}

type outer struct {
	base
	Kind     word              `json:"kind"`
	Plain    float64           // no tag: the name as it is
	Maybe    *inner            `json:"maybe,omitempty"`
	Null     *inner            `json:"null"`
	List     []inner           `json:"list"`
	Left     []string          `json:"left,omitempty"`
	Pair     [2]bool           `json:"pair"`
	Nested   [][]*inner        `json:"nested"`
	Table    map[string][]int  `json:"table"`
	Bytes    []byte            `json:"bytes"`
	Raw      json.RawMessage   `json:"raw"`
	Any      any               `json:"any"`
	Odd      bool              `json:"odd name"`
	Hidden   func()            `json:"-"`
	internal map[int]chan bool // must not be looked at
}

func TestTypescript(t *testing.T) {
	const want = heading + `
export interface outer {
  number: number;
  kind: word;
  Plain: number;
  maybe?: inner;
  null: inner | null;
  list: inner[] | null;
  left?: string[];
  pair: boolean[];
  nested: ((inner | null)[] | null)[] | null;
  table: Record<string, number[] | null> | null;
  bytes: string | null;
  raw: unknown;
  any: unknown;
  "odd name": boolean;
}

export type word = string;

export interface inner {
  value: number | null;
}
`
	have, err := typescript([]any{outer{}})
	if err != nil {
		t.Fatal(err)
	}
	if have != want {
		t.Errorf("got\n%s\nwant\n%s", have, want)
	}
}

// Notice has the name of a type of another package inside it.
type Notice struct {
	Of notice.Notice `json:"of"`
}

func TestSharedName(t *testing.T) {
	have, err := typescript([]any{Notice{}})
	if err != nil {
		t.Fatal(err)
	}
	for _, want := range []string{"export interface Notice {\n  of: NoticeNotice;\n}\n", "export interface NoticeNotice {\n  code: string;\n"} {
		if !strings.Contains(have, want) {
			t.Errorf("%q is not in\n%s", want, have)
		}
	}
}

type ownWay struct{}

func (ownWay) MarshalJSON() ([]byte, error) { return []byte("1"), nil }

func TestTypescriptRefuses(t *testing.T) {
	for _, row := range []struct {
		name  string
		value any
		want  string
	}{
		{"nothing", nil, "struct"},
		{"no struct", 1, "struct"},
		{"no name", struct{ A int }{}, "struct"},
		{"a channel", struct1{}, "JSON"},
		{"keys that are no text", struct2{}, "keys"},
		{"a type that writes itself", struct3{}, "own JSON"},
		{"numbers as text", struct4{}, "as text"},
	} {
		t.Run(row.name, func(t *testing.T) {
			if text, err := typescript([]any{row.value}); err == nil || !strings.Contains(err.Error(), row.want) {
				t.Errorf("error %v with %q, want one with %q", err, text, row.want)
			}
		})
	}
}

type (
	struct1 struct{ A chan int }
	struct2 struct{ A map[int]int }
	struct3 struct{ A ownWay }
	struct4 struct {
		A int `json:"a,string"`
	}
)

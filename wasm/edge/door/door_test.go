package door

import (
	"encoding/base64"
	"encoding/json"
	"io"
	"log"
	"net/http"
	"net/http/httptest"
	"os"
	"reflect"
	"strings"
	"testing"
)

// echo replies with what the core would see.
func echo(request []byte, attached [][]byte) ([]byte, [][]byte) { return request, attached }

func call(method, path, contentType, body string) *httptest.ResponseRecorder {
	r := httptest.NewRequest(method, path, strings.NewReader(body))
	r.Header.Set("Content-Type", contentType)
	w := httptest.NewRecorder()
	Handler(func() Handle { return echo }).ServeHTTP(w, r)
	return w
}

func TestHandler(t *testing.T) {
	full := `{"a":"` + strings.Repeat("x", Limit-len(`{"a":""}`)) + `"}`
	for _, row := range []struct {
		name, method, path, contentType, body string
		status                                int
		answer                                string
	}{
		{"a request", "POST", Path, "application/json", `{"kind":"about"}`, 200, `{"kind":"about"}`},
		{"a type with a parameter", "POST", Path, "application/json; charset=utf-8", `{}`, 200, `{}`},
		{"as large as it may be", "POST", Path, "application/json", full, 200, full},
		{"one byte too large", "POST", Path, "application/json", full + " ", 413, "4 MiB"},
		{"other method", "GET", Path, "", "", 405, "POST"},
		{"method that asks what is allowed", "OPTIONS", Path, "", "", 405, "POST"},
		{"other path", "POST", "/v1/messages", "application/json", `{}`, 404, "address"},
		{"a form", "POST", Path, "text/plain", `{}`, 415, "application/json"},
		{"no type", "POST", Path, "", `{}`, 415, "application/json"},
		{"no JSON", "POST", Path, "application/json", `kind`, 400, "no JSON object"},
		{"an array", "POST", Path, "application/json", `[]`, 400, "no JSON object"},
		{"cut off", "POST", Path, "application/json", `{"a":1`, 400, "reading"},
		{"more than one", "POST", Path, "application/json", `{}{}`, 400, "follows"},
		{"attached is no list", "POST", Path, "application/json", `{"attached":1}`, 400, "base64"},
		{"attached is no base64", "POST", Path, "application/json", `{"attached":["*"]}`, 400, "base64"},
		{"attached twice", "POST", Path, "application/json", `{"attached":[],"attached":[]}`, 400, "twice"},
	} {
		t.Run(row.name, func(t *testing.T) {
			w := call(row.method, row.path, row.contentType, row.body)
			if w.Code != row.status || !strings.Contains(w.Body.String(), row.answer) {
				t.Errorf("status %d, want %d; answer %.200s", w.Code, row.status, w.Body)
			}
			if !json.Valid(w.Body.Bytes()) {
				t.Errorf("the answer is no JSON: %.200s", w.Body)
			}
			for name, value := range map[string]string{
				"Content-Type":            "application/json",
				"X-Content-Type-Options":  "nosniff",
				"Cache-Control":           "no-store",
				"Content-Security-Policy": "default-src 'none'; frame-ancestors 'none'",
			} {
				if got := w.Header().Get(name); got != value {
					t.Errorf("%s is %q, want %q", name, got, value)
				}
			}
			if row.status == http.StatusMethodNotAllowed && w.Header().Get("Allow") != "POST" {
				t.Errorf("Allow is %q", w.Header().Get("Allow"))
			}
		})
	}
}

func TestAttachedAndFiles(t *testing.T) {
	text := base64.StdEncoding.EncodeToString([]byte{0, 255, '"'})
	w := call("POST", Path, "application/json", `{ "b" : 1.50, "attached":["`+text+`",""], "a":"\u00e9<" }`)
	// Numbers and texts are passed on as written; the files come last.
	want := `{"b":1.50,"a":"\u00e9<","attached":["` + text + `",""]}`
	if w.Body.String() != want {
		t.Errorf("answer\n got  %s\n want %s", w.Body, want)
	}
}

func TestSealRefuses(t *testing.T) {
	for _, reply := range []string{"", "[]", "}", "null"} {
		if sealed, err := seal([]byte(reply), [][]byte{{1}}); err == nil {
			t.Errorf("%q was sealed as %s", reply, sealed)
		}
	}
}

func TestPanic(t *testing.T) {
	log.SetOutput(io.Discard)
	defer log.SetOutput(os.Stderr)
	w := httptest.NewRecorder()
	r := httptest.NewRequest("POST", Path, strings.NewReader("{}"))
	r.Header.Set("Content-Type", "application/json")
	Handler(func() Handle { return func([]byte, [][]byte) ([]byte, [][]byte) { panic("fault") } }).ServeHTTP(w, r)
	if w.Code != http.StatusInternalServerError || !strings.Contains(w.Body.String(), "failed") || strings.Contains(w.Body.String(), "fault") {
		t.Errorf("status %d, answer %s", w.Code, w.Body)
	}
	if w.Header().Get("X-Content-Type-Options") != "nosniff" {
		t.Error("the answer lacks the headers of the others")
	}
}

// FuzzOpen: what open accepts is a JSON object of the same fields, less attached.
func FuzzOpen(f *testing.F) {
	for _, seed := range []string{`{}`, `{"a":1,"attached":["AA=="]}`, `{"attached":null}`, `{"a":{"attached":[]}}`, `{"\u0061":"\ud800"}`} {
		f.Add([]byte(seed))
	}
	f.Fuzz(func(t *testing.T, body []byte) {
		request, _, err := open(body)
		if err != nil {
			if request != nil {
				t.Errorf("an error came with a request %q", request)
			}
			return
		}
		var before, after map[string]any
		if err := json.Unmarshal(body, &before); err != nil {
			t.Fatalf("%q was accepted and is no JSON: %v", body, err)
		}
		if err := json.Unmarshal(request, &after); err != nil {
			t.Fatalf("%q became %q: %v", body, request, err)
		}
		delete(before, attachedField)
		if !reflect.DeepEqual(before, after) {
			t.Errorf("%q became %q", body, request)
		}
	})
}

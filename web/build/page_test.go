package main

import (
	"bytes"
	"crypto/sha256"
	"encoding/base64"
	"net/http"
	"net/http/httptest"
	"os/exec"
	"path"
	"regexp"
	"strings"
	"sync"
	"testing"
)

// budget is the most that the page may have as gzip, in bytes (architecture.md).
const budget = 3_000_000

const root = "../.."

var built = sync.OnceValues(func() (*parts, error) { return makeParts(root, pageEntry, corePackage) })

func buildParts(t *testing.T) *parts {
	t.Helper()
	p, err := built()
	if err != nil {
		t.Fatal(err)
	}
	return p
}

func TestBudget(t *testing.T) {
	page, err := buildParts(t).single(root)
	if err != nil {
		t.Fatal(err)
	}
	size := len(pack(page))
	t.Logf("the page has %d kB as gzip", size/1000)
	if size > budget {
		t.Errorf("the page has %d bytes as gzip, the budget is %d", size, budget)
	}
}

var (
	policyText = regexp.MustCompile(`<meta http-equiv="Content-Security-Policy" content="([^"]*)">`)
	scripts    = regexp.MustCompile(`(?s)<script>(.*?)</script>`)
	coreText   = regexp.MustCompile(`<script type="text/plain" id="core">([^<]*)</script>`)
	reference  = regexp.MustCompile(`(?:src|href|data-address)="([^"]*)"`)
)

// TestSingle looks at the page as a browser would: the policy lets run the one
// script in it, nothing refers to elsewhere, and the core inside is whole.
func TestSingle(t *testing.T) {
	p := buildParts(t)
	content, err := p.single(root)
	if err != nil {
		t.Fatal(err)
	}
	page := string(content)

	found := scripts.FindAllStringSubmatch(page, -1)
	if len(found) != 1 {
		t.Fatalf("%d scripts would run, want 1", len(found))
	}
	sum := sha256.Sum256([]byte(found[0][1]))
	policies := policyText.FindAllStringSubmatch(page, -1)
	if len(policies) != 1 || !strings.Contains(policies[0][1], "'sha256-"+base64.StdEncoding.EncodeToString(sum[:])+"'") {
		t.Errorf("the policy does not name the script: %v", policies)
	}
	if policyAt, scriptAt := strings.Index(page, "Content-Security-Policy"), strings.Index(page, "<script"); policyAt > scriptAt {
		t.Error("a script stands before the policy")
	}
	// Inside the script and the worker are texts of their own.
	outside := strings.NewReplacer(found[0][1], "", p.worker, "").Replace(page)
	for _, to := range reference.FindAllStringSubmatch(outside, -1) {
		if to[1] != "data:," {
			t.Errorf("the page refers to %q", to[1])
		}
	}
	text := coreText.FindStringSubmatch(page)
	if text == nil {
		t.Fatal("no core is in the page")
	}
	packed, err := base64.StdEncoding.DecodeString(text[1])
	if err != nil {
		t.Fatal(err)
	}
	unpack := exec.Command("zstd", "-d", "-q", "-c", "-")
	unpack.Stdin = bytes.NewReader(packed)
	core, err := unpack.Output()
	if err != nil || !bytes.Equal(core, p.core) {
		t.Errorf("the core in the page is not the one that was built (%v)", err)
	}
}

// TestSite: the page in parts refers to its own files by names that tell their
// content, and to no others.
func TestSite(t *testing.T) {
	p := buildParts(t)
	site, err := p.site(root)
	if err != nil {
		t.Fatal(err)
	}
	outside := strings.ReplaceAll(string(site["index.html"]), p.worker, "")
	named := map[string]bool{"index.html": true}
	for _, to := range reference.FindAllStringSubmatch(outside, -1) {
		if to[1] == "data:," {
			continue
		}
		content, there := site[to[1]]
		if !there {
			t.Errorf("the page refers to %q, which is not in the site", to[1])
			continue
		}
		named[to[1]] = true
		stem, _, _ := strings.Cut(to[1], ".")
		if want := hashedName(stem, path.Ext(to[1]), content); to[1] != want {
			t.Errorf("%s holds what would be named %s", to[1], want)
		}
	}
	for name := range site {
		if !named[name] {
			t.Errorf("%s is in the site and the page does not name it", name)
		}
	}
	if len(site) != 4 {
		t.Errorf("the site has %d files, want page, script, style and core", len(site))
	}
}

// TestSame: two builds give the same bytes, so that a hash tells a change.
func TestSame(t *testing.T) {
	first, err := buildParts(t).single(root)
	if err != nil {
		t.Fatal(err)
	}
	again, err := makeParts(root, pageEntry, corePackage)
	if err != nil {
		t.Fatal(err)
	}
	second, err := again.single(root)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(first, second) {
		t.Error("two builds of the page differ")
	}
}

func TestRenderRefuses(t *testing.T) {
	for _, text := range []string{"</script>", "</SCRIPT >", "<!-- ", "<script", "</style>", "a\r\n"} {
		if _, err := render(root, map[string]string{"Policy": "", "Style": "", "Worker": text, "Core": "", "Script": ""}, text); err == nil {
			t.Errorf("%q was put into the page", text)
		}
	}
	if _, err := render(root, map[string]string{"Policy": ""}); err == nil {
		t.Error("a page without its parts was rendered")
	}
}

func TestSiteHandler(t *testing.T) {
	core := hashedName("core", ".wasm", nil)
	handler := siteHandler(map[string][]byte{"index.html": []byte("page"), core: []byte("core")})
	const kept = "public, max-age=31536000, immutable"
	for _, row := range []struct {
		method, path         string
		status               int
		body, media, caching string
	}{
		{"GET", "/", 200, "page", "text/html; charset=utf-8", "no-store"},
		{"GET", "/index.html", 200, "page", "text/html; charset=utf-8", "no-store"},
		{"HEAD", "/", 200, "", "text/html; charset=utf-8", "no-store"},
		{"GET", "/" + core, 200, "core", "application/wasm", kept},
		{"GET", "/page.js", 404, "", "application/octet-stream", "no-store"},
		{"GET", "//index.html", 404, "", "application/octet-stream", "no-store"},
		{"GET", "/../index.html", 404, "", "application/octet-stream", "no-store"},
		{"POST", "/", 405, "", "text/html; charset=utf-8", "no-store"},
		{"OPTIONS", "/none", 405, "", "application/octet-stream", "no-store"},
	} {
		w := httptest.NewRecorder()
		handler.ServeHTTP(w, httptest.NewRequest(row.method, row.path, nil))
		h := w.Header()
		if w.Code != row.status || w.Body.String() != row.body || h.Get("Content-Type") != row.media || h.Get("Cache-Control") != row.caching {
			t.Errorf("%s %s: status %d, body %q, headers %v", row.method, row.path, w.Code, w.Body, h)
		}
		if h.Get("X-Content-Type-Options") != "nosniff" || h.Get("Content-Security-Policy") != sitePolicy+"; frame-ancestors 'none'" {
			t.Errorf("%s %s: headers %v", row.method, row.path, h)
		}
		if row.status == http.StatusMethodNotAllowed && h.Get("Allow") != "GET, HEAD" {
			t.Errorf("%s %s: allowed is %q", row.method, row.path, h.Get("Allow"))
		}
	}
}

func TestCheckLoopback(t *testing.T) {
	for _, at := range []string{"127.0.0.1:8017", "127.0.0.2:0", "[::1]:80"} {
		if err := checkLoopback(at); err != nil {
			t.Errorf("%s: %v", at, err)
		}
	}
	for _, at := range []string{":8017", "0.0.0.0:8017", "[::]:80", "192.0.2.1:80", "localhost", "example.org:80", ""} {
		if checkLoopback(at) == nil {
			t.Errorf("%q passed as an address of this machine alone", at)
		}
	}
}

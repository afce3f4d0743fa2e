package main

import (
	"crypto/sha256"
	"encoding/base64"
	"strings"
)

// header is one line of an HTTP answer.
type header struct {
	Name  string `json:"name"`
	Value string `json:"value"`
}

// filePolicy is the content security policy of the single page. It lets run the
// one script that has the hash, and lets nothing be fetched from anywhere.
func filePolicy(script string) string {
	sum := sha256.Sum256([]byte(script))
	return strings.Join([]string{
		"default-src 'none'",
		"script-src 'sha256-" + base64.StdEncoding.EncodeToString(sum[:]) + "' 'wasm-unsafe-eval'",
		"worker-src blob:",
		"style-src 'unsafe-inline'",
		"img-src data: blob:",
		"connect-src 'none'",
		"base-uri 'none'",
		"form-action 'none'",
	}, "; ")
}

// sitePolicy is the policy of the page served in parts: scripts, styles and the
// core come from its own address only.
const sitePolicy = "default-src 'none'; script-src 'self' 'wasm-unsafe-eval' blob:; worker-src blob:; " +
	"style-src 'self' 'unsafe-inline'; img-src data: blob:; connect-src 'self'; base-uri 'none'; form-action 'none'"

// siteHeaders are what a server of dist/site says with each file. The policy
// comes once more as a header, since only there it can forbid frames.
func siteHeaders(name string) []header {
	// A name with a hash never has other content; the page itself may.
	caching := "no-store"
	if hashed.MatchString(name) {
		caching = "public, max-age=31536000, immutable"
	}
	return []header{
		{"Content-Type", mediaType(name)},
		{"Cache-Control", caching},
		{"Content-Security-Policy", sitePolicy + "; frame-ancestors 'none'"},
		{"Cross-Origin-Opener-Policy", "same-origin"},
		{"Cross-Origin-Resource-Policy", "same-origin"},
		{"Referrer-Policy", "no-referrer"},
		{"X-Content-Type-Options", "nosniff"},
	}
}

// mediaType returns what a file of the site is, by the end of its name.
func mediaType(name string) string {
	switch {
	case strings.HasSuffix(name, ".html"):
		return "text/html; charset=utf-8"
	case strings.HasSuffix(name, ".js"):
		return "text/javascript; charset=utf-8"
	case strings.HasSuffix(name, ".css"):
		return "text/css; charset=utf-8"
	case strings.HasSuffix(name, ".wasm"):
		return "application/wasm"
	}
	return "application/octet-stream"
}

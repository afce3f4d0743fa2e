package main

import (
	"context"
	"errors"
	"flag"
	"fmt"
	"net"
	"net/http"
	"os"
	"os/signal"
	"path/filepath"
	"strings"
	"syscall"
	"time"
)

// address is where serve answers; only this machine can reach it.
const address = "127.0.0.1:8017"

// serve shows the page in parts to browsers of this machine until Ctrl-C.
func serve(arguments []string) error {
	flags := flag.NewFlagSet("serve", flag.ContinueOnError)
	folder := flags.String("from", filepath.Join("dist", siteFolder), "folder to serve")
	at := flags.String("at", address, "loopback address and port; port 0 takes a free one")
	each := flags.Bool("log", false, "print every request")
	if err := flags.Parse(arguments); err != nil {
		return err
	}
	files, err := readSite(*folder)
	if err != nil {
		return err
	}
	if err := checkLoopback(*at); err != nil {
		return err
	}
	listener, err := net.Listen("tcp", *at)
	if err != nil {
		return err
	}
	handler := siteHandler(files)
	if *each {
		handler = logged(handler)
	}
	server := &http.Server{Handler: handler, ReadHeaderTimeout: 5 * time.Second}
	interrupted, stop := signal.NotifyContext(context.Background(), os.Interrupt, syscall.SIGTERM)
	defer stop()
	go func() {
		<-interrupted.Done()
		server.Close()
	}()
	fmt.Printf("Weirmark is at http://%s/ (Ctrl-C ends it)\n", listener.Addr())
	if err := server.Serve(listener); !errors.Is(err, http.ErrServerClosed) {
		return err
	}
	return nil
}

// logged prints each request before it is answered.
func logged(handler http.Handler) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		fmt.Println(r.Method, r.URL)
		handler.ServeHTTP(w, r)
	})
}

// checkLoopback refuses an address that other machines could call.
func checkLoopback(at string) error {
	host, _, err := net.SplitHostPort(at)
	if err != nil {
		return err
	}
	if ip := net.ParseIP(host); ip == nil || !ip.IsLoopback() {
		return fmt.Errorf("%s is not an address of this machine alone, such as %s", at, address)
	}
	return nil
}

// readSite returns the files of the site by name; it has no folders.
func readSite(folder string) (map[string][]byte, error) {
	entries, err := os.ReadDir(folder)
	if err != nil {
		return nil, fmt.Errorf("no page is built yet (make page): %w", err)
	}
	files := map[string][]byte{}
	for _, entry := range entries {
		content, err := os.ReadFile(filepath.Join(folder, entry.Name()))
		if err != nil {
			return nil, err
		}
		files[entry.Name()] = content
	}
	return files, nil
}

// siteHandler answers with the files and nothing else.
func siteHandler(files map[string][]byte) http.Handler {
	return http.HandlerFunc(func(w http.ResponseWriter, r *http.Request) {
		name := strings.TrimPrefix(r.URL.Path, "/")
		if name == "" {
			name = "index.html"
		}
		content, known := files[name]
		if !known {
			name = ""
		}
		for _, h := range siteHeaders(name) {
			w.Header().Set(h.Name, h.Value)
		}
		switch {
		case r.Method != http.MethodGet && r.Method != http.MethodHead:
			w.Header().Set("Allow", "GET, HEAD")
			w.WriteHeader(http.StatusMethodNotAllowed)
		case !known:
			w.WriteHeader(http.StatusNotFound)
		default:
			w.Header().Set("Content-Length", fmt.Sprint(len(content)))
			if r.Method == http.MethodGet {
				w.Write(content)
			}
		}
	})
}

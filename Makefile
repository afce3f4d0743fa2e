# Every target is one question; the comment above it asks it.
.DEFAULT_GOAL := help
.PHONY: help tools setup build page edge run test reference bench clean demo-data fixtures picture

# One set of floating-point bits on every host: no assembly in the numeric libraries.
GO_BUILD := go build -tags noasm -trimpath
# Debian's own Python carries numpy, scipy and pandas; only reference and bench need it.
PYTHON ?= /usr/bin/python3

# What can I ask?
help:
	@awk '/^# [^(]/{question=substr($$0,3)} /^[a-z-]+:/{sub(":.*",""); printf "make %-10s %s\n",$$0,question}' Makefile

# Are Go, Node, npm and the others here? (as root on Debian they are installed)
tools:
	@.ci/packages build

# Is everything here that a build needs?
setup: web/node_modules/.stamp
	@go mod download

web/node_modules/.stamp: web/package-lock.json | tools
	cd web && npm ci --no-audit --no-fund
	touch $@

# Does it build? (the command: dist/weirmark)
build: setup
	go run ./web/build figures
	$(GO_BUILD) -o dist/weirmark ./core/cmd/weirmark

# Where is the page? (dist/weirmark.html in one file, dist/site in parts)
page: setup
	go run ./web/build page

# How does the page look? (the picture in README.md, made anew)
picture: page
	node web/test/picture.mjs

# Does the edge service answer on this machine? (until Ctrl-C)
edge: page
	go run ./web/build edge

# What does it say about the demo campaign, or about my study (make run STUDY=file)?
# (Status 2 says that evidence is incomplete: an answer, not a fault.)
# (Then the page is served on this machine until Ctrl-C; SERVE=0 leaves that out.)
run: build page
	$(if $(STUDY),dist/weirmark run $(STUDY) --out dist/study,dist/weirmark demo dist/demo) || test $$? -eq 2
	$(if $(filter 0,$(SERVE)),,go run ./web/build serve)

# Does everything hold?
test: build
	go run -tags noasm ./core/internal/check

# Do numpy and scipy still give the committed figures, and the outside checks their page?
reference:
	@.ci/packages figures
	$(PYTHON) testdata/published/reference.py
	go run -tags noasm ./core/internal/outside

# Do the demo files still come out of their program, byte for byte?
demo-data:
	go run ./datasets/duct/make datasets/duct
	test -z "$$(git status --porcelain -- datasets/duct)"

# Can LibreOffice and openpyxl make the workbooks of the tests anew?
fixtures:
	@.ci/packages fixtures
	PYTHON=$(PYTHON) core/tablefile/testdata/workbook/fixtures.sh

# How fast is it, beside pandas, numpy and scipy on the same input?
bench:
	@.ci/packages figures
	go run -tags noasm ./core/internal/bench -python $(PYTHON)

# How do I get back to a fresh clone?
clean:
	rm -rf dist .cache web/node_modules core/cmd/weirmark/renderer/*.js

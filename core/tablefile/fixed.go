package tablefile

import (
	"bytes"
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"
)

// fixed is the separator of tables whose columns are known by position.
const fixed = 0

// Positions are judged by so many rows at least, of so many bytes at most.
const (
	guideRows  = 3
	guideBytes = 1 << 14
)

// splitGuides cuts a line at the guides, which count characters. Where the
// guides are a guess and a cell crosses one, the row does not fit: its count
// is one more than the cells it has.
func (s *splitter) splitGuides(i int) (next int) {
	data := s.data
	start, at, guide := i, 0, 0
	crossed := false
	for !atLineEnd(data, i) {
		if guide < len(s.guides) && at == s.guides[guide] {
			crossed = crossed || s.strict && crosses(data, start, i)
			s.cut(start, i)
			start = i
			guide++
		}
		_, n := utf8.DecodeRune(data[i:])
		i += n
		at++
	}
	s.cut(start, i)
	for ; guide < len(s.guides); guide++ {
		s.cut(i, i)
	}
	if crossed {
		s.count++
	}
	return afterEnd(data, i)
}

// crosses reports whether a cell goes on over the guide at offset i of a line
// whose cell began at start: the signs of a number may follow the number
// before without a blank.
func crosses(data []byte, start, i int) bool {
	if i == start || blankAt(data, i) > 0 || data[i-1] == ' ' || data[i-1] == '\t' {
		return false
	}
	return data[i] != '-' && data[i] != '+'
}

// cut adds the cell data[start:end] without the blanks around it.
func (s *splitter) cut(start, end int) {
	for start < end && isBlank(s.data[start]) {
		start++
	}
	for start < end && isBlank(s.data[end-1]) {
		end--
	}
	s.put(cell{start: start, end: end, repeat: 1})
}

// isBlank reports whether c is a blank of a line.
func isBlank(c byte) bool { return c == ' ' || c == '\t' || c == '\v' || c == '\f' }

// token is a piece of a row: characters start to end of its line.
type token struct{ start, end int }

// findGuides returns the positions at which further columns begin, where the
// rows in data[from:end] show that blanks do not tell the cells apart, else
// nil. Two signs of it are known: cells left blank between others, which
// blanks alone would shift, and numbers that follow each other without one.
func (r *reader) findGuides(from, end int) []int {
	var rows [][]token
	above, joined := 0, false
	for at := from; at < end; at = afterEnd(r.data, r.lineEnd(at)) {
		kind, _ := kindOfLine(r.data, at, spaces)
		if kind != lineContent {
			continue
		}
		text := r.text(at)
		if len(text) > guideBytes || bytes.IndexByte(text, '\t') >= 0 {
			return nil
		}
		tokens, split, numbers := r.tokens(string(text))
		switch {
		case 2*numbers >= len(tokens) && numbers > 0:
			rows = append(rows, tokens)
			joined = joined || split
		case len(rows) == 0:
			above = len(tokens)
		}
	}
	if len(rows) < guideRows {
		return nil
	}
	if joined {
		return guidesByEnds(rows)
	}
	return guidesByGaps(rows, above)
}

// tokens parts a line at blanks, and before the sign of a number that follows
// another. split reports the latter, numbers counts the numbers.
func (r *reader) tokens(line string) (tokens []token, split bool, numbers int) {
	text := []rune(line)
	add := func(start, end int) {
		tokens = append(tokens, token{start, end})
		if _, kind, _ := r.cells.read([]byte(string(text[start:end]))); kind == cellNumber {
			numbers++
		}
	}
	for i := 0; i < len(text); {
		if text[i] == ' ' || text[i] == '\u00a0' {
			i++
			continue
		}
		start := i
		for i < len(text) && text[i] != ' ' && text[i] != '\u00a0' {
			i++
		}
		cuts := []int{start}
		if _, kind, _ := r.cells.read([]byte(string(text[start:i]))); kind == cellText {
			for at := start + 1; at < i; at++ {
				if (text[at] == '-' || text[at] == '+') && (text[at-1] >= '0' && text[at-1] <= '9' || text[at-1] == '.') {
					cuts = append(cuts, at)
				}
			}
		}
		before := numbers
		for k, at := range cuts {
			stop := i
			if k+1 < len(cuts) {
				stop = cuts[k+1]
			}
			add(at, stop)
		}
		split = split || len(cuts) > 1 && numbers-before == len(cuts)
	}
	return tokens, split, numbers
}

// guidesByEnds returns guides for cells that end at the same characters in
// every row, as numbers aligned to the right do.
func guidesByEnds(rows [][]token) []int {
	var ends []int
	most := 0
	for _, row := range rows {
		for _, t := range row {
			if !slices.Contains(ends, t.end) {
				ends = append(ends, t.end)
			}
		}
		most = max(most, len(row))
		if len(ends) > maxColumns {
			return nil
		}
	}
	slices.Sort(ends)
	if most != len(ends) || most < 2 {
		return nil
	}
	for _, row := range rows {
		for _, t := range row {
			if at, _ := slices.BinarySearch(ends, t.end); at > 0 && t.start < ends[at-1] {
				return nil
			}
		}
	}
	return ends[:len(ends)-1]
}

// guidesByGaps returns guides in the middle between cells that are apart in
// every row, where some row leaves a cell blank before another. above is the
// number of words of the last line above the rows, which may name them all.
func guidesByGaps(rows [][]token, above int) []int {
	var fields []token
	for _, row := range rows {
		fields = append(fields, row...)
	}
	slices.SortFunc(fields, func(a, b token) int { return a.start - b.start })
	merged := fields[:1]
	for _, f := range fields[1:] {
		if last := &merged[len(merged)-1]; f.start < last.end {
			last.end = max(last.end, f.end)
		} else {
			merged = append(merged, f)
		}
	}
	most, shifted := above, false
	for _, row := range rows {
		most = max(most, len(row))
		for i, t := range row {
			at, found := slices.BinarySearchFunc(merged, t.start, func(f token, start int) int {
				if f.end <= start {
					return -1
				}
				if f.start > start {
					return 1
				}
				return 0
			})
			if !found || i > 0 && row[i-1].start >= merged[at].start {
				return nil // two cells in one field
			}
			shifted = shifted || at != i
		}
	}
	if !shifted || most != len(merged) {
		return nil
	}
	guides := make([]int, 0, len(merged)-1)
	for i := 1; i < len(merged); i++ {
		guides = append(guides, merged[i-1].end)
	}
	return guides
}

// listGuides lists positions, counted from one, at most twenty of them.
func listGuides(guides []int) string {
	var list []string
	for i, g := range guides {
		if i == 20 {
			list = append(list, "...")
			break
		}
		list = append(list, strconv.Itoa(g+1))
	}
	return strings.Join(list, ", ")
}

// namesByGuides cuts a line of names at the guides. Where a name crosses one,
// the names are taken by blanks, if there are as many.
func (r *reader) namesByGuides(text []byte) []string {
	split := splitter{data: text, separator: fixed, guides: r.guides, strict: true}
	split.split(0)
	if split.count != len(r.guides)+1 {
		return splitNames(text, spaces, len(r.guides)+1)
	}
	names := make([]string, len(split.cells))
	for i, c := range split.cells {
		names[i] = string(split.bytes(c))
	}
	return names
}

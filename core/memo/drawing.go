package memo

import (
	"encoding/xml"
	"errors"
	"fmt"
	"io"
	"strings"
)

// drawn lists the elements of SVG that draw. Everything else is left out with
// what it holds: scripts, foreign content, links, style sheets, animation.
var drawn = map[string]bool{
	"svg": true, "g": true, "defs": true, "clipPath": true, "mask": true, "pattern": true, "marker": true, "symbol": true, "use": true,
	"path": true, "line": true, "polyline": true, "polygon": true, "rect": true, "circle": true, "ellipse": true,
	"text": true, "tspan": true, "title": true, "desc": true, "linearGradient": true, "radialGradient": true, "stop": true,
}

// drawing copies an svg element: only what draws, its ids begun with prefix so
// that several fit in one document, no reference to anything outside itself.
// It returns an error for text that is not one well-formed svg element.
func drawing(svg, prefix string) (string, error) {
	d := xml.NewDecoder(strings.NewReader(svg))
	d.Strict = true
	var out strings.Builder
	var open []string
	skipped := 0 // depth inside an element that is left out
	for {
		token, err := d.RawToken()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			return "", fmt.Errorf("reading the drawing: %w", err)
		}
		switch t := token.(type) {
		case xml.StartElement:
			if len(open) == 0 && (t.Name.Local != "svg" || out.Len() > 0) {
				return "", fmt.Errorf("reading the drawing: %q stands where one svg element was expected", t.Name.Local)
			}
			open = append(open, qualified(t.Name))
			if skipped > 0 || t.Name.Space != "" || !drawn[t.Name.Local] {
				skipped++
				continue
			}
			startTag(&out, t, prefix, len(open) == 1)
		case xml.EndElement:
			if len(open) == 0 || open[len(open)-1] != qualified(t.Name) {
				return "", fmt.Errorf("reading the drawing: </%s> closes nothing", qualified(t.Name))
			}
			open = open[:len(open)-1]
			if skipped > 0 {
				skipped--
				continue
			}
			out.WriteString("</" + t.Name.Local + ">")
		case xml.CharData:
			if len(open) > 0 && skipped == 0 {
				out.WriteString(escape(string(t)))
			}
		}
	}
	if len(open) > 0 || out.Len() == 0 {
		return "", errors.New("reading the drawing: it is not complete")
	}
	return out.String(), nil
}

func qualified(n xml.Name) string {
	if n.Space != "" {
		return n.Space + ":" + n.Local
	}
	return n.Local
}

func startTag(out *strings.Builder, t xml.StartElement, prefix string, outermost bool) {
	out.WriteString("<" + t.Name.Local)
	width, height, box := "", "", false
	for _, a := range t.Attr {
		name, value := qualified(a.Name), a.Value
		switch {
		case name == "id":
			value = prefix + value
		case name == "href" || name == "xlink:href":
			if !strings.HasPrefix(value, "#") {
				continue
			}
			name, value = "href", "#"+prefix+value[1:]
		case a.Name.Space != "" || name == "xmlns" || name == "class" || strings.HasPrefix(strings.ToLower(name), "on"):
			continue
		case outermost && (name == "width" || name == "height"):
			if name == "width" {
				width = value
			} else {
				height = value
			}
			continue
		}
		if name == "viewBox" {
			box = true
		}
		value, inside := local(value, prefix)
		if !inside {
			continue
		}
		out.WriteString(" " + name + `="` + escape(value) + `"`)
	}
	if outermost {
		out.WriteString(` xmlns="http://www.w3.org/2000/svg"`)
		if !box && width != "" && height != "" {
			out.WriteString(` viewBox="0 0 ` + escape(strings.TrimSuffix(width, "px")) + " " + escape(strings.TrimSuffix(height, "px")) + `"`)
		}
	}
	out.WriteString(">")
}

// local gives references such as url(#clip) the prefix. It is not ok where a
// value refers to something outside the drawing.
func local(value, prefix string) (string, bool) {
	var out strings.Builder
	for {
		before, rest, found := strings.Cut(value, "url(")
		out.WriteString(before)
		if !found {
			return out.String(), !strings.Contains(strings.ToLower(before), "url")
		}
		rest = strings.TrimLeft(rest, `'" `)
		if !strings.HasPrefix(rest, "#") {
			return "", false
		}
		out.WriteString("url(#" + prefix)
		inner, after, closed := strings.Cut(rest[1:], ")")
		if !closed {
			return "", false
		}
		out.WriteString(strings.TrimRight(inner, `'" `) + ")")
		value = after
	}
}
